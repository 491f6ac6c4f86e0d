//! Growth of a fire with the square of time.

use super::Exceeded;

/// Heat release at which a flame is *established*: about 0.3 m high, the zero of the fire clock. Common practice.
pub const ESTABLISHED_BURNING_KW: f64 = 20.0;

/// Heat release that the growth classes reach at their growth time.
///
/// NFPA prints 1055 kW (1000 Btu/s), EN 1991-1-2 prints 1000 kW, at the same four times. We take
/// 1055 kW: it is the faster by 5.5 %, and the filling equation of NFPA 92 that shares the growth
/// time is written for it.
pub const REFERENCE_KW: f64 = 1055.0;

/// The rival reference of EN 1991-1-2, for comparison.
pub const REFERENCE_EN_1991_KW: f64 = 1000.0;

/// How fast a fire grows, by the four classes of NFPA 92, NFPA 204 and EN 1991-1-2.
///
/// Sources: [`NFPA_204`](crate::fire::sources::NFPA_204), [`EN_1991_1_2`](crate::fire::sources::EN_1991_1_2).
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum GrowthClass {
    /// 1055 kW after 600 s.
    Slow,
    /// 1055 kW after 300 s.
    Medium,
    /// 1055 kW after 150 s.
    Fast,
    /// 1055 kW after 75 s.
    UltraFast,
}

impl GrowthClass {
    /// The four classes, slowest first.
    pub const ALL: [Self; 4] = [Self::Slow, Self::Medium, Self::Fast, Self::UltraFast];

    /// Time to 1055 kW, in s.
    #[must_use]
    pub const fn growth_time_s(self) -> f64 {
        match self {
            Self::Slow => 600.0,
            Self::Medium => 300.0,
            Self::Fast => 150.0,
            Self::UltraFast => 75.0,
        }
    }

    /// Growth coefficient `α = 1055 / t_g²`, in kW/s².
    ///
    /// ```
    /// use sootline::fire::growth::GrowthClass;
    ///
    /// // Published: 0.0469 kW/s² (NFPA 204, fast).
    /// assert!((GrowthClass::Fast.coefficient_kw_s2() - 0.0469).abs() < 5e-5);
    /// ```
    #[must_use]
    pub const fn coefficient_kw_s2(self) -> f64 {
        let time_s = self.growth_time_s();
        REFERENCE_KW / (time_s * time_s)
    }
}

/// Heat release of a fire that grows with the square of time, in kW.
///
/// ```text
/// Q = α t²
/// ```
///
/// | symbol | argument        | unit  |
/// |--------|-----------------|-------|
/// | `α`    | `growth_kw_s2`  | kW/s² |
/// | `t`    | `time_s`        | s     |
///
/// Time runs from the virtual ignition of the curve, without the incubation before it.
/// Range: see [`t_squared_limits`].
///
/// Source: [`NFPA_204`](crate::fire::sources::NFPA_204).
///
/// ```
/// use sootline::fire::growth::t_squared_kw;
///
/// // By hand: 0.0469 · 60² = 168.84 kW.
/// assert!((t_squared_kw(0.0469, 60.0) - 168.84).abs() < 1e-9);
/// ```
#[must_use]
pub fn t_squared_kw(growth_kw_s2: f64, time_s: f64) -> f64 {
    let time_s = time_s.max(0.0);
    growth_kw_s2 * time_s * time_s
}

/// Heat that a t² fire has released by a time, in kJ.
///
/// ```text
/// E = α t³ / 3
/// ```
///
/// Symbols, range and source as [`t_squared_kw`].
///
/// ```
/// use sootline::fire::growth::t_squared_energy_kj;
///
/// // By hand: 0.0469 · 300³ / 3 = 422 100 kJ.
/// assert!((t_squared_energy_kj(0.0469, 300.0) - 422_100.0).abs() < 1e-6);
/// ```
#[must_use]
pub fn t_squared_energy_kj(growth_kw_s2: f64, time_s: f64) -> f64 {
    let time_s = time_s.max(0.0);
    growth_kw_s2 * time_s * time_s * time_s / 3.0
}

/// Time at which a t² fire has a heat release, in s; none where it never grows.
///
/// ```text
/// t = √(Q / α)
/// ```
///
/// Symbols, range and source as [`t_squared_kw`].
///
/// ```
/// use sootline::fire::growth::{ESTABLISHED_BURNING_KW, t_squared_time_to_kw_s};
///
/// // By hand: √(20 / 0.0469) = 20.65 s: so long is a fast fire before it is established.
/// let time_s = t_squared_time_to_kw_s(0.0469, ESTABLISHED_BURNING_KW).unwrap();
/// assert!((time_s - 20.65).abs() < 0.01);
/// ```
#[must_use]
pub fn t_squared_time_to_kw_s(growth_kw_s2: f64, heat_release_kw: f64) -> Option<f64> {
    if heat_release_kw <= 0.0 {
        return Some(0.0);
    }
    (growth_kw_s2 > 0.0).then(|| (heat_release_kw / growth_kw_s2).sqrt())
}

/// What a growth coefficient exceeds.
///
/// Range: 0.0028 to 0.19 kW/s², the four classes. Racks above 5 m grow with the cube of time and the
/// height, which no t² curve follows (NZ C/VM2, from memory).
#[must_use]
pub fn t_squared_limits(growth_kw_s2: f64) -> Exceeded {
    Exceeded::none()
        .when(growth_kw_s2 < 0.0027, "growth slower than the slowest class (1055 kW in 600 s)")
        .when(growth_kw_s2 > 0.19, "growth faster than the fastest class (1055 kW in 75 s)")
}
