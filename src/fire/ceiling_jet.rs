//! The jet of hot gas under the ceiling.

use super::Exceeded;

/// A place under the ceiling as the fire sees it.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct CeilingPlace {
    /// Ceiling above the base of the fire, m.
    pub height_m: f64,
    /// Distance from the axis of the fire, m.
    pub radius_m: f64,
}

/// Rise of the ceiling jet above ambient, in K, by Alpert.
///
/// ```text
/// r/H ≤ 0.18   ΔT = 16.9 Q^(2/3) / H^(5/3)
/// r/H > 0.18   ΔT = 5.38 (Q/r)^(2/3) / H
/// ```
///
/// | symbol | field or argument | unit |
/// |--------|-------------------|------|
/// | `Q`    | `heat_release_kw` | kW   |
/// | `H`    | `height_m`        | m    |
/// | `r`    | `radius_m`        | m    |
///
/// `Q` is the total heat release. The two laws meet within 1 % at `r/H = 0.18`.
/// Range: see [`alpert_limits`].
///
/// Source: [`ALPERT_1972`](crate::fire::sources::ALPERT_1972).
///
/// ```
/// use sootline::fire::ceiling_jet::{CeilingPlace, alpert_rise_k};
///
/// // By hand: 5.38 · (1000/2.5)^(2/3) / 5 = 5.38 · 54.288 / 5 = 58.41 K.
/// assert!((alpert_rise_k(1000.0, CeilingPlace { height_m: 5.0, radius_m: 2.5 }) - 58.41).abs() < 0.01);
/// ```
#[must_use]
pub fn alpert_rise_k(heat_release_kw: f64, place: CeilingPlace) -> f64 {
    let cube_root = heat_release_kw.max(0.0).cbrt();
    alpert_rise_per_kw_2_3(place) * cube_root * cube_root
}

/// Speed of the ceiling jet, in m/s, by Alpert.
///
/// ```text
/// r/H ≤ 0.15   u = 0.96 (Q/H)^(1/3)
/// r/H > 0.15   u = 0.195 Q^(1/3) H^(1/2) / r^(5/6)
/// ```
///
/// Symbols, range and source as [`alpert_rise_k`]. Alpert's later print has 0.947 and 0.197.
///
/// ```
/// use sootline::fire::ceiling_jet::{CeilingPlace, alpert_velocity_m_s};
///
/// // By hand: 0.195 · 10 · √5 / 2.5^(5/6) = 4.3603 / 2.1460 = 2.032 m/s.
/// assert!((alpert_velocity_m_s(1000.0, CeilingPlace { height_m: 5.0, radius_m: 2.5 }) - 2.032).abs() < 0.001);
/// ```
#[must_use]
pub fn alpert_velocity_m_s(heat_release_kw: f64, place: CeilingPlace) -> f64 {
    alpert_velocity_per_kw_1_3(place) * heat_release_kw.max(0.0).cbrt()
}

/// Heat release that raises the ceiling jet by so much, in kW: [`alpert_rise_k`] turned round.
///
/// ```
/// use sootline::fire::ceiling_jet::{CeilingPlace, alpert_heat_release_kw, alpert_rise_k};
///
/// let place = CeilingPlace { height_m: 2.4, radius_m: 3.0 };
/// assert!((alpert_rise_k(alpert_heat_release_kw(13.0, place), place) - 13.0).abs() < 1e-9);
/// ```
#[must_use]
pub fn alpert_heat_release_kw(rise_k: f64, place: CeilingPlace) -> f64 {
    (rise_k.max(0.0) / alpert_rise_per_kw_2_3(place)).powf(1.5)
}

/// `ΔT / Q^(2/3)`: what a loop over time keeps.
pub(super) fn alpert_rise_per_kw_2_3(place: CeilingPlace) -> f64 {
    if place.radius_m <= 0.18 * place.height_m {
        16.9 / place.height_m.powf(5.0 / 3.0)
    } else {
        5.38 / (place.radius_m.powf(2.0 / 3.0) * place.height_m)
    }
}

/// `u / Q^(1/3)`: what a loop over time keeps.
pub(super) fn alpert_velocity_per_kw_1_3(place: CeilingPlace) -> f64 {
    if place.radius_m <= 0.15 * place.height_m {
        0.96 / place.height_m.cbrt()
    } else {
        0.195 * place.height_m.sqrt() / place.radius_m.powf(5.0 / 6.0)
    }
}

/// What a fire exceeds of Alpert's tests: 0.67 to 98 MW under wide ceilings of 4.6 to 15.5 m.
///
/// In a small room the layer that fills it makes detectors act sooner than this says: late, so cautious.
#[must_use]
pub fn alpert_limits(heat_release_kw: f64, place: CeilingPlace) -> Exceeded {
    Exceeded::none()
        .when(
            place.height_m < 4.6,
            "ceiling lower than the 4.6 m of the tests; the gas is confined and detectors act sooner",
        )
        .when(place.height_m > 15.5, "ceiling higher than the 15.5 m of the tests")
        .when(heat_release_kw < 670.0, "fire smaller than the 670 kW of the tests")
        .when(heat_release_kw > 98_000.0, "fire larger than the 98 MW of the tests")
}
