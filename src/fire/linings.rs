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

/// Most heat that the gas gives to a lining which has warmed through, per area and kelvin, in kW/(m² K).
///
/// `k/d` of a metal sheet is a thousand times that of a board, but the gas beside it passes on no more
/// than its own film does. Without the cap a steel-lined room would seem unable to flash over.
///
/// Source: [`PEATROSS_BEYLER_1994`](crate::fire::sources::PEATROSS_BEYLER_1994).
pub const FILM_LIMIT_KW_M2K: f64 = 0.03;

/// Effective conductance of a lining a time after the fire began, in kW/(m² K).
///
/// ```text
/// h_k = √(k ρ c / t)   t < t_p
/// h_k = k / d          t ≥ t_p, at most 0.03
/// ```
///
/// Symbols as [`penetration_time_s`]; `t` is `time_s`. The cap is [`FILM_LIMIT_KW_M2K`]: it holds for
/// metal sheet and thin glass only. At `t_p` it falls by half at one blow, as
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
        surface.steady_conductance_kw_m2k().min(FILM_LIMIT_KW_M2K)
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
/// h = 0.4 max( √(k ρ c / t), k/d )     once t ≥ t_p at most 0.03
/// ```
///
/// Symbols as [`penetration_time_s`]; the cap is [`FILM_LIMIT_KW_M2K`]. Range: up to about 2000 s.
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
            let lining = 0.4 * transient.max(s.steady_conductance_kw_m2k());
            let warmed_through = time_s >= penetration_time_s(s);
            if warmed_through { lining.min(FILM_LIMIT_KW_M2K) * s.area_m2 } else { lining * s.area_m2 }
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

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    fn lining(
        conductivity_w_mk: f64,
        density_kg_m3: f64,
        specific_heat_j_kgk: f64,
        thickness_m: f64,
    ) -> Surface {
        Surface { area_m2: 10.0, conductivity_w_mk, density_kg_m3, specific_heat_j_kgk, thickness_m }
    }

    #[test]
    fn penetration_time_and_conductance_match_the_worked_rooms() {
        // By hand, three constructed rooms: plaster, board, concrete.
        for (surface, time_s, penetration_s, conductance) in [
            (lining(0.48, 1440.0, 840.0, 0.016), 300.0, 161.3, 0.03),
            (lining(0.17, 790.0, 900.0, 0.0159), 600.0, 264.3, 0.010_69),
            (lining(1.0, 2000.0, 880.0, 0.15), 600.0, 9900.0, 0.054_16),
        ] {
            assert_relative_eq!(penetration_time_s(&surface), penetration_s, max_relative = 5e-4);
            assert_relative_eq!(conductance_kw_m2k(&surface, time_s), conductance, max_relative = 5e-4);
        }
    }

    #[test]
    fn the_conductance_falls_by_half_at_the_penetration_time() {
        // √(kρc/t_p) = 2k/d, so the printed law jumps by two.
        let board = lining(0.17, 790.0, 900.0, 0.0159);
        let at_s = penetration_time_s(&board);

        let before = conductance_kw_m2k(&board, at_s * (1.0 - 1e-9));
        let after = conductance_kw_m2k(&board, at_s);

        assert_relative_eq!(before / after, 2.0, max_relative = 1e-6);
    }

    #[test]
    fn the_conductance_never_rises_with_time() {
        let board = lining(0.17, 790.0, 900.0, 0.0159);
        let mut last = f64::INFINITY;
        for step in 1..2000 {
            let now = conductance_kw_m2k(&board, f64::from(step));
            assert!(now > 0.0 && now <= last);
            last = now;
        }
    }

    #[test]
    fn several_linings_are_weighted_by_area() {
        let board = lining(0.17, 790.0, 900.0, 0.0159);
        let concrete = Surface { area_m2: 30.0, ..lining(1.0, 2000.0, 880.0, 0.15) };
        let mean = mean_conductance_kw_m2k(&[board, concrete], 600.0);

        // By hand: (10·0.010692 + 30·0.054160)/40 = 0.043293.
        assert_relative_eq!(mean, 0.043_293, max_relative = 1e-4);
        assert_eq!(mean_conductance_kw_m2k(&[], 600.0), 0.0);
    }

    #[test]
    fn a_steel_sheet_takes_no_more_heat_than_the_gas_gives() {
        let sheet = Surface {
            area_m2: 10.0,
            conductivity_w_mk: 45.0,
            density_kg_m3: 7850.0,
            specific_heat_j_kgk: 480.0,
            thickness_m: 0.001,
        };

        // By hand: k/d = 45 kW/(m² K), capped at 0.03; ten square metres of it.
        assert_relative_eq!(conductance_kw_m2k(&sheet, 300.0), 0.03);
        assert_relative_eq!(deal_beyler_conductance_kw_k(&[sheet], 300.0), 0.3);
    }

    #[test]
    fn thin_and_metal_linings_are_told() {
        assert!(conductance_limits(&[lining(0.17, 790.0, 900.0, 0.0159)]).is_empty());
        assert!(!conductance_limits(&[lining(0.17, 790.0, 900.0, 0.003)]).is_empty());
        assert!(!conductance_limits(&[lining(45.0, 7850.0, 460.0, 0.01)]).is_empty());
        assert!(!conductance_limits(&[]).is_empty());
    }
}
