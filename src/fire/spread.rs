//! When the next item takes fire.

use super::design_fire::DesignFire;
use super::radiation::point_source_heat_release_kw;

/// How easily an item takes fire under radiation, by Babrauskas' three classes.
///
/// Source: [`BABRAUSKAS_1982`](crate::fire::sources::BABRAUSKAS_1982), from memory.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum Ignitability {
    /// Thin curtains, loose newspaper: 10 kW/m².
    Easy,
    /// Upholstered furniture and most solids: 20 kW/m².
    Normal,
    /// Wood of 13 mm and thicker, hard surfaces: 40 kW/m².
    Difficult,
}

impl Ignitability {
    /// Flux at which the item takes fire, kW/m².
    #[must_use]
    pub const fn flux_kw_m2(self) -> f64 {
        match self {
            Self::Easy => 10.0,
            Self::Normal => 20.0,
            Self::Difficult => 40.0,
        }
    }
}

/// A burning item and what stands near.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Neighbour {
    /// From the middle of the fire to the near face of the item, m.
    pub distance_m: f64,
    /// Share of the heat that the flame radiates; 0.35 unless known better.
    pub radiative_fraction: f64,
    /// How easily it takes fire.
    pub ignitability: Ignitability,
}

/// Time at which an item near a growing fire takes fire, in s on the clock of the fire's curve; none where it never does.
///
/// ```text
/// Q_ign = 4 π r² q_ign / χ_r        t = first time with Q(t) ≥ Q_ign
/// ```
///
/// | symbol  | field                | unit  |
/// |---------|----------------------|-------|
/// | `q_ign` | `ignitability`       | kW/m² |
/// | `r`     | `distance_m`         | m     |
/// | `χ_r`   | `radiative_fraction` | -     |
///
/// The item takes fire the moment it receives the flux: no time to heat through, which is early; the
/// hot layer adds nothing, which is late once the room is hot.
/// Range: [`point_source_limits`](super::radiation::point_source_limits).
///
/// Source: [`BABRAUSKAS_1982`](crate::fire::sources::BABRAUSKAS_1982).
///
/// ```
/// use sootline::fire::DesignFire;
/// use sootline::fire::spread::{Ignitability, Neighbour, ignition_s};
///
/// // By hand: 4π·1²·20/0.35 = 718.1 kW, after √(718.1/0.0469) = 123.7 s.
/// let fire = DesignFire { growth_kw_s2: 0.0469, peak_kw: 2000.0, energy_kj: 6e5, decay_from_share: 0.7 };
/// let chair = Neighbour { distance_m: 1.0, radiative_fraction: 0.35, ignitability: Ignitability::Normal };
/// assert!((ignition_s(&fire, chair).unwrap() - 123.7).abs() < 0.1);
/// ```
#[must_use]
pub fn ignition_s(fire: &DesignFire, item: Neighbour) -> Option<f64> {
    fire.time_to_kw_s(point_source_heat_release_kw(
        item.ignitability.flux_kw_m2(),
        item.radiative_fraction,
        item.distance_m,
    ))
}
