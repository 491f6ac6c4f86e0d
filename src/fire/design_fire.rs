//! The default fire: growth, a steady stretch and a decay that uses up the fuel.

use super::growth::{self, t_squared_energy_kj, t_squared_kw};

/// Share of the fuel that is burnt when the decay begins.
///
/// Source: [`EN_1991_1_2`](crate::fire::sources::EN_1991_1_2), Annex E.4, from memory.
pub const DECAY_FROM_SHARE: f64 = 0.7;

/// A fire that grows with the square of time to a peak, holds it, and decays in a straight line to
/// zero, releasing its whole energy.
///
/// ```text
/// growth  Q = α t²                    until Q = Q_peak, or until the share is burnt
/// steady  Q = Q_peak                  until the share s of E is burnt
/// decay   Q = Q_d (1 - (t-t_d)/t_e)   with t_e = 2 (1-s) E / Q_d
/// ```
///
/// | symbol   | field              | unit  |
/// |----------|--------------------|-------|
/// | `α`      | `growth_kw_s2`     | kW/s² |
/// | `Q_peak` | `peak_kw`          | kW    |
/// | `E`      | `energy_kj`        | kJ    |
/// | `s`      | `decay_from_share` | -     |
///
/// Where the fuel is so little that the decay begins before the peak, `Q_d` is the heat release at
/// that moment, and the peak is never reached.
///
/// Range: growth as [`growth::t_squared_limits`]; the shape was drawn for cellulosic fuel in
/// ordinary rooms. The time counts from the start of the t² curve: see [`DesignFire::established_s`].
///
/// Source: [`EN_1991_1_2`](crate::fire::sources::EN_1991_1_2), Annex E.4.
///
/// ```
/// use sootline::fire::DesignFire;
///
/// // By hand: peak after √(1000/0.1) = 100 s, by then 0.1·100³/3 = 33 333 kJ of 100 000 kJ;
/// // steady for another (70 000 - 33 333)/1000 = 36.667 s; decay over 2·30 000/1000 = 60 s.
/// let fire = DesignFire { growth_kw_s2: 0.1, peak_kw: 1000.0, energy_kj: 100_000.0, decay_from_share: 0.7 };
/// let phases = fire.phases();
/// assert!((phases.growth_end_s - 100.0).abs() < 1e-9);
/// assert!((phases.decay_start_s - 136.667).abs() < 1e-3);
/// assert!((phases.end_s - 196.667).abs() < 1e-3);
/// assert!((fire.heat_release_kw(166.667) - 500.0).abs() < 0.01);
/// ```
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct DesignFire {
    /// Growth coefficient `α`, kW/s².
    pub growth_kw_s2: f64,
    /// Highest heat release the fuel or the ventilation allows, kW.
    pub peak_kw: f64,
    /// Heat in the fuel that takes part, kJ.
    pub energy_kj: f64,
    /// Share of the energy that is burnt when the decay begins: [`DECAY_FROM_SHARE`] unless known better.
    pub decay_from_share: f64,
}

/// The moments at which a [`DesignFire`] changes its law, on the clock of its curve.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Phases {
    /// End of the growth, s.
    pub growth_end_s: f64,
    /// Start of the decay, s. Equal to the end of the growth where there is no steady stretch.
    pub decay_start_s: f64,
    /// All fuel burnt, s.
    pub end_s: f64,
    /// Highest heat release that is reached, kW.
    pub reached_kw: f64,
}

impl DesignFire {
    /// When the fire changes its law, and the heat release it reaches.
    ///
    /// A fire without growth, peak or fuel has no phases: all zero.
    #[must_use]
    pub fn phases(&self) -> Phases {
        let share = self.decay_from_share.clamp(0.0, 1.0);
        let before_decay_kj = share * self.energy_kj;
        if !(self.growth_kw_s2 > 0.0 && self.peak_kw > 0.0 && self.energy_kj > 0.0) {
            return Phases { growth_end_s: 0.0, decay_start_s: 0.0, end_s: 0.0, reached_kw: 0.0 };
        }

        let to_peak_s = (self.peak_kw / self.growth_kw_s2).sqrt();
        let to_peak_kj = self.peak_kw * to_peak_s / 3.0;
        let (growth_end_s, decay_start_s, reached_kw) = if to_peak_kj >= before_decay_kj {
            let end_s = (3.0 * before_decay_kj / self.growth_kw_s2).cbrt();
            (end_s, end_s, t_squared_kw(self.growth_kw_s2, end_s))
        } else {
            let steady_s = (before_decay_kj - to_peak_kj) / self.peak_kw;
            (to_peak_s, to_peak_s + steady_s, self.peak_kw)
        };
        let decay_s = if reached_kw > 0.0 { 2.0 * (1.0 - share) * self.energy_kj / reached_kw } else { 0.0 };
        Phases { growth_end_s, decay_start_s, end_s: decay_start_s + decay_s, reached_kw }
    }

    /// Heat release at a time, kW.
    #[must_use]
    pub fn heat_release_kw(&self, time_s: f64) -> f64 {
        self.phases().heat_release_kw(self.growth_kw_s2, time_s)
    }

    /// Heat released until a time, kJ. Never more than the energy.
    #[must_use]
    pub fn energy_released_kj(&self, time_s: f64) -> f64 {
        let phases = self.phases();
        if time_s <= phases.growth_end_s {
            return t_squared_energy_kj(self.growth_kw_s2, time_s);
        }
        if time_s >= phases.end_s {
            return if phases.end_s > 0.0 { self.energy_kj } else { 0.0 };
        }
        let grown_kj = t_squared_energy_kj(self.growth_kw_s2, phases.growth_end_s);
        if time_s <= phases.decay_start_s {
            return grown_kj + phases.reached_kw * (time_s - phases.growth_end_s);
        }
        let left_s = phases.end_s - time_s;
        let now_kw = phases.heat_release_kw(self.growth_kw_s2, time_s);
        self.energy_kj - 0.5 * now_kw * left_s
    }

    /// From the start of the curve until all is burnt, s.
    #[must_use]
    pub fn duration_s(&self) -> f64 {
        self.phases().end_s
    }

    /// Highest heat release that is reached, kW: below `peak_kw` where the fuel runs short before.
    #[must_use]
    pub fn reached_kw(&self) -> f64 {
        self.phases().reached_kw
    }

    /// First time at which the fire has a heat release, s; none where it never has.
    ///
    /// ```
    /// use sootline::fire::DesignFire;
    ///
    /// let fire = DesignFire { growth_kw_s2: 0.1, peak_kw: 1000.0, energy_kj: 100_000.0, decay_from_share: 0.7 };
    /// assert_eq!(fire.time_to_kw_s(250.0), Some(50.0)); // by hand: √(250/0.1)
    /// assert_eq!(fire.time_to_kw_s(1001.0), None);
    /// ```
    #[must_use]
    pub fn time_to_kw_s(&self, heat_release_kw: f64) -> Option<f64> {
        if heat_release_kw > self.phases().reached_kw {
            return None;
        }
        growth::t_squared_time_to_kw_s(self.growth_kw_s2, heat_release_kw)
    }

    /// Time on the curve at which burning is established ([`growth::ESTABLISHED_BURNING_KW`]), s: the
    /// zero of the fire clock. `time on the fire clock = time on the curve - established_s`.
    ///
    /// None where the fire never gets there.
    #[must_use]
    pub fn established_s(&self) -> Option<f64> {
        self.time_to_kw_s(growth::ESTABLISHED_BURNING_KW)
    }

    /// The same fuel where no more than a limit can burn: lower and longer.
    #[must_use]
    pub fn capped_kw(self, limit_kw: f64) -> Self {
        Self { peak_kw: self.peak_kw.min(limit_kw), ..self }
    }
}

impl Phases {
    /// Heat release at a time for a growth coefficient, kW: for loops that keep the phases.
    #[must_use]
    pub fn heat_release_kw(&self, growth_kw_s2: f64, time_s: f64) -> f64 {
        if time_s <= 0.0 || time_s >= self.end_s {
            0.0
        } else if time_s < self.growth_end_s {
            t_squared_kw(growth_kw_s2, time_s)
        } else if time_s <= self.decay_start_s {
            self.reached_kw
        } else {
            self.reached_kw * (self.end_s - time_s) / (self.end_s - self.decay_start_s)
        }
    }
}
