//! Air drawn in by the fire plume, up to a height.

use super::real::Real;

/// A fire as its plume sees it.
#[derive(Clone, Copy, Debug)]
pub(super) struct Source<R> {
    /// Diameter, m.
    pub diameter_m: f64,
    /// Share of the heat that rises with the gas.
    pub convective_share: f64,
    /// How much larger the fire is with its images in the walls: 1 free, √2 against a wall, 2 in a corner.
    pub images: f64,
    /// `(ρ²/T)^(1/3)` of the air drawn, against that of air at 293 K and 101 325 Pa.
    pub air_factor: f64,
    /// Draught across the plume, m/s.
    pub draught_m_s: R,
    /// Density of the air drawn, kg/m³.
    pub density_kg_m3: f64,
}

/// Height of the flame, m, by Heskestad: `L = 0.235 Q^(2/5) - 1.02 D`.
///
/// Source: [`HESKESTAD_1983`](crate::fire::sources::HESKESTAD_1983).
#[inline]
pub(super) fn flame_height_m<R: Real>(heat_release_kw: R, diameter_m: f64) -> R {
    (heat_release_kw.powf(0.4) * 0.235 - 1.02 * diameter_m).at_least(0.0)
}

/// Mass flow of the plume at a height above the base, kg/s, by Heskestad:
///
/// ```text
/// L = 0.235 Q^(2/5) - 1.02 D     z_0 = 0.083 Q^(2/5) - 1.02 D
/// above the flame   m = 0.071 Q_c^(1/3) (z - z_0)^(5/3) + 0.00185 Q_c
/// in the flame      m = m(L) z/L
/// ```
///
/// Against a wall or in a corner the fire is a part of the larger one that its mirror images make.
/// Whole mirrors make it 2 and 4 times larger; the room tests at hand lie between that (Steckler)
/// and no effect at all (the 2018 room), by how close the fire stood: we take the root, √2 and 2.
///
/// A draught `U` across the plume adds what a bent-over plume draws, `2π b ρ β U` per metre of
/// height with `β` = 0.6, over a plume that widens by `b` = 0.15 m per metre.
///
/// Sources: [`HESKESTAD_1984`](crate::fire::sources::HESKESTAD_1984), [`HOULT_1969`](crate::fire::sources::HOULT_1969).
#[inline]
pub(super) fn flow_kg_s<R: Real>(heat_release_kw: R, height_m: R, source: &Source<R>) -> R {
    const CROSS_FLOW: f64 = 0.6;
    const WIDENS: f64 = 0.15;

    if height_m.value() <= 0.0 || heat_release_kw.value() <= 0.0 {
        return R::constant(0.0);
    }
    let images = source.images;
    let heat = heat_release_kw * images;
    let convective = heat * source.convective_share;
    let power = heat.powf(0.4);
    let length = power * 0.235 - 1.02 * source.diameter_m;
    let above = |height: R| {
        let over = (height - power * 0.083 + 1.02 * source.diameter_m).at_least(0.0);
        over * over.cbrt().squared() * convective.cbrt() * 0.071 + convective * 1.85e-3
    };
    let still = if length.value() <= 0.05 {
        // Wide and weak: no flame to speak of; the plume gathers over half a diameter.
        above(height_m) * (height_m / (0.5 * source.diameter_m).max(0.05)).at_most(1.0)
    } else if height_m.value() < length.value() {
        above(length) * height_m / length
    } else {
        above(height_m)
    };
    let radius = height_m * (0.5 * WIDENS) + 0.5 * source.diameter_m;
    let across = height_m
        * radius
        * source.draught_m_s
        * (2.0 * std::f64::consts::PI * CROSS_FLOW * source.density_kg_m3 / images);
    still * (source.air_factor / images) + across
}
