//! How fast the walls, the ceiling and the floor take heat away.

use super::Exceeded;

/// One surface of the room and the layer it is lined with.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Surface {
    /// Area, m², without openings.
    pub area_m2: f64,
    /// Thermal conductivity, W/(m K).
    pub conductivity_w_mk: f64,
    /// Density, kg/m³.
    pub density_kg_m3: f64,
    /// Specific heat, J/(kg K).
    pub specific_heat_j_kgk: f64,
    /// Thickness, m.
    pub thickness_m: f64,
}

impl Surface {
    /// Thermal inertia `k ρ c`, kW² s/(m⁴ K²).
    #[must_use]
    pub fn inertia_kw2_s_m4k2(&self) -> f64 {
        self.conductivity_w_mk * self.density_kg_m3 * self.specific_heat_j_kgk * 1e-6
    }

    /// Conductance through the whole thickness `k/d`, kW/(m² K).
    #[must_use]
    pub fn steady_conductance_kw_m2k(&self) -> f64 {
        self.conductivity_w_mk / self.thickness_m * 1e-3
    }
}

/// Time after which heat has gone through the lining, in s.
///
/// ```text
/// t_p = (ρ c / k) (d/2)²
/// ```
///
/// | symbol | field                 | unit     |
/// |--------|-----------------------|----------|
/// | `k`    | `conductivity_w_mk`   | W/(m K)  |
/// | `ρ`    | `density_kg_m3`       | kg/m³    |
/// | `c`    | `specific_heat_j_kgk` | J/(kg K) |
/// | `d`    | `thickness_m`         | m        |
///
/// Range: one homogeneous layer. A thin lining on something else is not one.
///
/// Source: [`MCCAFFREY_1981`](crate::fire::sources::MCCAFFREY_1981).
///
/// ```
/// use sootline::fire::linings::{Surface, penetration_time_s};
///
/// // By hand: 1440·840/0.48 · 0.008² = 161.28 s.
/// let plaster = Surface { area_m2: 44.48, conductivity_w_mk: 0.48, density_kg_m3: 1440.0, specific_heat_j_kgk: 840.0, thickness_m: 0.016 };
/// assert!((penetration_time_s(&plaster) - 161.28).abs() < 0.01);
/// ```
#[must_use]
pub fn penetration_time_s(surface: &Surface) -> f64 {
    let half_m = 0.5 * surface.thickness_m;
    surface.density_kg_m3 * surface.specific_heat_j_kgk / surface.conductivity_w_mk * half_m * half_m
}

/// Effective conductance of a lining a time after the fire began, in kW/(m² K).
///
/// ```text
/// h_k = √(k ρ c / t)   t < t_p
/// h_k = k / d          t ≥ t_p
/// ```
///
/// Symbols as [`penetration_time_s`]; `t` is `time_s`. At `t_p` it falls by half at one blow, as
/// printed, so that a temperature computed with it jumps by up to 26 %: joining the two smoothly would be
/// another correlation. Time zero gives infinity.
///
/// Source: [`MCCAFFREY_1981`](crate::fire::sources::MCCAFFREY_1981).
///
/// ```
/// use sootline::fire::linings::{Surface, conductance_kw_m2k};
///
/// let board = Surface { area_m2: 1.0, conductivity_w_mk: 0.17, density_kg_m3: 790.0, specific_heat_j_kgk: 900.0, thickness_m: 0.0159 };
/// // By hand: √(0.00017·790·0.9/100) = 0.034767 before, 0.00017/0.0159 = 0.010692 after 264 s.
/// assert!((conductance_kw_m2k(&board, 100.0) - 0.034767).abs() < 1e-6);
/// assert!((conductance_kw_m2k(&board, 600.0) - 0.010692).abs() < 1e-6);
/// ```
#[must_use]
pub fn conductance_kw_m2k(surface: &Surface, time_s: f64) -> f64 {
    if time_s < penetration_time_s(surface) {
        (surface.inertia_kw2_s_m4k2() / time_s).sqrt()
    } else {
        surface.steady_conductance_kw_m2k()
    }
}

/// Conductance times area summed over all surfaces, `Σ h_k A`, in kW/K.
///
/// The correlations take `h_k A_T`; McCaffrey, Quintiere and Harkleroad weight several linings by area,
/// which is this sum.
#[must_use]
pub fn total_conductance_kw_k(surfaces: &[Surface], time_s: f64) -> f64 {
    surfaces.iter().map(|s| conductance_kw_m2k(s, time_s) * s.area_m2).sum()
}

/// Conductance weighted by area, in kW/(m² K); zero without surfaces.
#[must_use]
pub fn mean_conductance_kw_m2k(surfaces: &[Surface], time_s: f64) -> f64 {
    let area_m2 = total_area_m2(surfaces);
    if area_m2 > 0.0 { total_conductance_kw_k(surfaces, time_s) / area_m2 } else { 0.0 }
}

/// Area of all surfaces, m².
#[must_use]
pub fn total_area_m2(surfaces: &[Surface]) -> f64 {
    surfaces.iter().map(|s| s.area_m2).sum()
}

/// Conductance of a closed or fan-driven room by Deal and Beyler, times area and summed, in kW/K.
///
/// ```text
/// h = 0.4 max( √(k ρ c / t), k/d )
/// ```
///
/// Symbols as [`penetration_time_s`]. Range: up to about 2000 s.
///
/// Source: [`DEAL_BEYLER_1990`](crate::fire::sources::DEAL_BEYLER_1990).
///
/// ```
/// use sootline::fire::linings::{Surface, deal_beyler_conductance_kw_k};
///
/// // By hand: 0.4 · √(0.001·2000·0.88/300) · 130 m² = 0.4 · 0.076594 · 130 = 3.9829 kW/K.
/// let concrete = Surface { area_m2: 130.0, conductivity_w_mk: 1.0, density_kg_m3: 2000.0, specific_heat_j_kgk: 880.0, thickness_m: 0.2 };
/// assert!((deal_beyler_conductance_kw_k(&[concrete], 300.0) - 3.9829).abs() < 1e-3);
/// ```
#[must_use]
pub fn deal_beyler_conductance_kw_k(surfaces: &[Surface], time_s: f64) -> f64 {
    surfaces
        .iter()
        .map(|s| {
            let transient = (s.inertia_kw2_s_m4k2() / time_s).sqrt();
            0.4 * transient.max(s.steady_conductance_kw_m2k()) * s.area_m2
        })
        .sum()
}

/// What the linings exceed of the range that the conductance was fitted for.
#[must_use]
pub fn conductance_limits(surfaces: &[Surface]) -> Exceeded {
    Exceeded::none()
        .when(surfaces.is_empty(), "no surface is known")
        .when(
            surfaces.iter().any(|s| s.thickness_m < 0.005),
            "a lining thinner than 5 mm: what lies behind it decides and is not in the conductance",
        )
        .when(
            surfaces.iter().any(|s| s.conductivity_w_mk > 5.0),
            "a metal surface: the film of gas decides, not the conduction",
        )
}
