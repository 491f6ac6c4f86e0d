//! What changes in jumps: which fires burn, how far openings stand open.

use super::network::{Fire, HeatRelease, Network, Supply};
use super::real::Real;

/// Time in which an opening moves, s.
pub(super) const MOVES_S: f64 = 1.0;

/// An opening that moves from one share to another within [`MOVES_S`].
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Leaf {
    pub from: f64,
    pub to: f64,
    pub since_s: f64,
}

impl Leaf {
    /// Share that stands open.
    #[inline]
    pub(super) fn open_fraction(&self, time_s: f64) -> f64 {
        if time_s >= self.since_s + MOVES_S {
            return self.to;
        }
        self.from + (self.to - self.from) * (time_s - self.since_s).smooth_step(0.0, MOVES_S)
    }
}

/// A fire as it stands.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct FireControl {
    /// When it was lit; none: not yet.
    pub lit_s: Option<f64>,
    pub alight: bool,
    /// Since when it is out, s.
    pub out_s: f64,
    /// Water on it: heat release then, kW, since when, and rate of decay, 1/s.
    pub spray: Option<(f64, f64, f64)>,
    /// No fuel left.
    pub spent: bool,
}

/// All of it.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Controls {
    pub leaves: Vec<Leaf>,
    pub fires: Vec<FireControl>,
}

impl Controls {
    pub(super) fn new(network: &Network) -> Self {
        let still = |share: f64| {
            let share = share.clamp(0.0, 1.0);
            Leaf { from: share, to: share, since_s: f64::NEG_INFINITY }
        };
        let cold = FireControl { lit_s: None, alight: false, out_s: 0.0, spray: None, spent: false };
        Self {
            leaves: network.openings.iter().map(|o| still(o.open_fraction)).collect(),
            fires: vec![cold; network.fires.len()],
        }
    }
}

/// Heat release with all the air it wants, at a reading of the fire's own clock, kW.
pub(super) fn wanted_kw(heat_release: &HeatRelease, clock_s: f64) -> f64 {
    match heat_release {
        HeatRelease::Grown(fire) => fire.heat_release_kw(clock_s),
        HeatRelease::Points(points) => {
            let after = points.partition_point(|point| point.0 <= clock_s);
            match (after.checked_sub(1).map(|before| points[before]), points.get(after)) {
                (Some((from_s, from_kw)), Some(&(to_s, to_kw))) => {
                    let share = if to_s > from_s { (clock_s - from_s) / (to_s - from_s) } else { 1.0 };
                    (from_kw + (to_kw - from_kw) * share).max(0.0)
                }
                (Some((_, last_kw)), None) => last_kw.max(0.0),
                (None, Some(&(_, first_kw))) => first_kw.max(0.0),
                (None, None) => 0.0,
            }
        }
    }
}

impl FireControl {
    /// What the fire wants now, W.
    pub(super) fn wanted_w(&self, fire: &Fire, clock_s: f64, time_s: f64) -> f64 {
        if self.lit_s.is_none() || self.spent {
            return 0.0;
        }
        let free_kw = wanted_kw(&fire.heat_release, clock_s);
        let kw = match self.spray {
            Some((at_kw, since_s, rate_1_s)) => {
                free_kw.min(at_kw * (-(time_s - since_s).max(0.0) * rate_1_s).exp())
            }
            None => free_kw,
        };
        1000.0 * kw
    }

    /// Share of the fuel that comes without flame.
    pub(super) fn without_flame(&self, fire: &Fire, time_s: f64) -> f64 {
        match fire.supply {
            Supply::Fed => 1.0,
            Supply::HeatFed { without_flame, fades_s } => {
                if self.alight || fades_s <= 0.0 {
                    without_flame
                } else {
                    without_flame * (-(time_s - self.out_s).max(0.0) / fades_s).exp()
                }
            }
        }
    }
}
