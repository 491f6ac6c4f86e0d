//! Height of a flame and where its plume seems to come from.

use super::Exceeded;
use super::constants::{AIR_SPECIFIC_HEAT_KJ_KGK, AMBIENT_K, GRAVITY_M_S2, air_density_kg_m3};

/// A round fire.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct RoundFire {
    /// Total heat release, kW.
    pub heat_release_kw: f64,
    /// Diameter, m.
    pub diameter_m: f64,
}

/// Diameter of the circle with an area, m: how a burning area becomes a [`RoundFire`].
#[must_use]
pub fn equivalent_diameter_m(area_m2: f64) -> f64 {
    (4.0 * area_m2.max(0.0) / std::f64::consts::PI).sqrt()
}

/// Mean height of a flame above its base, in m, by Heskestad. Zero where the formula turns negative.
///
/// ```text
/// L = 0.235 Q^0.4 - 1.02 D
/// ```
///
/// | symbol | field             | unit |
/// |--------|-------------------|------|
/// | `Q`    | `heat_release_kw` | kW   |
/// | `D`    | `diameter_m`      | m    |
///
/// Range: see [`heskestad_height_limits`]. Other prints have 0.23 or `3.7 Q*^0.4`, up to 7 % apart.
///
/// Source: [`HESKESTAD_1983`](crate::fire::sources::HESKESTAD_1983).
///
/// ```
/// use sootline::fire::flame::{RoundFire, heskestad_height_m};
///
/// // Published (training case of a petrol tray): 2.43 m, 11 136 kW, 7.29 m.
/// let tray = RoundFire { heat_release_kw: 11_136.0, diameter_m: 2.43 };
/// assert!((heskestad_height_m(tray) - 7.29).abs() < 0.01);
/// ```
#[must_use]
pub fn heskestad_height_m(fire: RoundFire) -> f64 {
    (0.235 * fire.heat_release_kw.max(0.0).powf(0.4) - 1.02 * fire.diameter_m).max(0.0)
}

/// Dimensionless heat release `Q* = Q / (ρ c_p T √g D^2.5)` at 20 °C.
#[must_use]
pub fn dimensionless_heat_release(fire: RoundFire) -> f64 {
    fire.heat_release_kw
        / (air_density_kg_m3(AMBIENT_K)
            * AIR_SPECIFIC_HEAT_KJ_KGK
            * AMBIENT_K
            * GRAVITY_M_S2.sqrt()
            * fire.diameter_m.powf(2.5))
}

/// What a fire exceeds of the range of [`heskestad_height_m`]: `Q*` of 0.1 to 10 000.
#[must_use]
pub fn heskestad_height_limits(fire: RoundFire) -> Exceeded {
    let q_star = dimensionless_heat_release(fire);
    Exceeded::none()
        .when(q_star < 0.1, "too wide for its heat: the flame breaks up into many (Q* below 0.1)")
        .when(q_star > 1e4, "a jet rather than a fire (Q* above 10 000)")
}

/// Height of the point from which the plume seems to come, above the base of the fire, in m, by Heskestad.
/// Negative where it lies below.
///
/// ```text
/// z_0 = 0.083 Q^0.4 - 1.02 D
/// ```
///
/// Symbols as [`heskestad_height_m`]. `Q` is the *total* heat release: the worked case of ISO 16736 comes out
/// only so, though one paper prints the convective.
///
/// Range: pool and solid fires without much fuel below the surface; as [`heskestad_height_limits`].
///
/// Source: [`HESKESTAD_1983`](crate::fire::sources::HESKESTAD_1983).
///
/// ```
/// use sootline::fire::flame::{RoundFire, heskestad_virtual_origin_m};
///
/// // Published (ISO 16736:2006 Annex B in the form of GB/T 31593.7-2015, B.8): 1.8 m, 2500 kW/m², 0.921 m.
/// let pool = RoundFire { heat_release_kw: 2500.0 * 2.54469, diameter_m: 1.8 };
/// assert!((heskestad_virtual_origin_m(pool) - 0.921).abs() < 0.003);
/// ```
#[must_use]
pub fn heskestad_virtual_origin_m(fire: RoundFire) -> f64 {
    0.083 * fire.heat_release_kw.max(0.0).powf(0.4) - 1.02 * fire.diameter_m
}
