//! Air drawn in by the fire plume, up to a height.

use super::real::Real;

/// A fire as its plume sees it.
#[derive(Clone, Copy, Debug)]
pub(super) struct Source {
    /// Diameter, m.
    pub diameter_m: f64,
    /// Share of the heat that rises with the gas.
    pub convective_share: f64,
    /// Images the walls make: 1 free, 2 against a wall, 4 in a corner.
    pub images: f64,
    /// `(ρ²/T)^(1/3)` of the air drawn, against that of air at 293 K and 101 325 Pa.
    pub air_factor: f64,
    /// Draught across the plume, m/s.
    pub draught_m_s: f64,
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

/// Mass flow of the plume at a height above the base, kg/s, by McCaffrey:
///
/// ```text
/// flame         z/Q^0.4 < 0.08   m/Q = 0.011 (z/Q^0.4)^0.566
/// intermittent  to 0.20          m/Q = 0.026 (z/Q^0.4)^0.909
/// plume         above            m/Q = 0.124 (z/Q^0.4)^1.895
/// ```
///
/// Against a wall or in a corner: the share of the plume that its mirror images leave to the room.
/// A draught `U` across the plume adds what a bent-over plume draws, `2π b ρ β U` per metre of
/// height, `β` = 0.6 ([`HOULT_1969`](crate::fire::sources::HOULT_1969)), over a plume that widens by
/// `b` = 0.15 m per metre.
///
/// Source: [`MCCAFFREY_1979`](crate::fire::sources::MCCAFFREY_1979).
#[inline]
pub(super) fn flow_kg_s<R: Real>(heat_release_kw: R, height_m: R, source: &Source) -> R {
    if height_m.value() <= 0.0 || heat_release_kw.value() <= 0.0 {
        return R::constant(0.0);
    }
    let images = source.images;
    let heat = heat_release_kw * images;
    let scaled = height_m / heat.powf(0.4);
    let per_kw = match scaled.value() {
        flame if flame < 0.08 => scaled.powf(0.566) * 0.011,
        pulsing if pulsing < 0.20 => scaled.powf(0.909) * 0.026,
        _ => scaled.powf(1.895) * 0.124,
    };
    let still = heat * per_kw * (source.air_factor / images);
    if source.draught_m_s <= 0.0 {
        return still;
    }
    const CROSS_FLOW: f64 = 0.6;
    const WIDENS: f64 = 0.15;
    let radius = height_m * (0.5 * WIDENS) + 0.5 * source.diameter_m;
    let across = height_m
        * radius
        * (2.0 * std::f64::consts::PI * CROSS_FLOW * source.density_kg_m3 * source.draught_m_s / images);
    still + across
}
