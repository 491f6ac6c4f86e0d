//! The gas of a shut room.

use crate::fire::Exceeded;
use crate::fire::oxygen::{LIMIT_AT_AMBIENT, usable_heat_kj};

/// A steady fire in a shut room.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Closed {
    /// Heat release, kW.
    pub heat_release_kw: f64,
    /// Time since it began, s.
    pub time_s: f64,
    /// Thermal inertia of the linings, weighted by area, kW² s/(m⁴ K²).
    pub inertia_kw2_s_m4k2: f64,
    /// Walls, ceiling and floor, m².
    pub bounding_area_m2: f64,
    /// Air in the room, kg.
    pub air_mass_kg: f64,
    /// Specific heat of the air, kJ/(kg K).
    pub specific_heat_kj_kgk: f64,
}

/// Rise of the gas in a shut room with a steady fire, in K, by Beyler.
///
/// ```text
/// ΔT = 2 K2/K1² ( K1 √t - 1 + e^(-K1 √t) )
/// K1 = 2 · 0.4 √(kρc) A_T / (m c_p)      K2 = Q / (m c_p)
/// ```
///
/// | symbol | field                  | unit           |
/// |--------|------------------------|----------------|
/// | `Q`    | `heat_release_kw`      | kW             |
/// | `t`    | `time_s`               | s              |
/// | `kρc`  | `inertia_kw2_s_m4k2`   | kW² s/(m⁴ K²)  |
/// | `A_T`  | `bounding_area_m2`     | m²             |
/// | `m`    | `air_mass_kg`          | kg             |
/// | `c_p`  | `specific_heat_kj_kgk` | kJ/(kg K)      |
///
/// Several prints leave `A_T` out of `K1`; then it has not the unit s^(-1/2), so it must stand there.
/// Range: see [`beyler_closed_limits`].
///
/// Source: [`BEYLER_1991`](crate::fire::sources::BEYLER_1991).
///
/// ```
/// use sootline::fire::hot_layer::{Closed, beyler_closed_rise_k};
///
/// // By hand: kρc = 0.00016·790·0.9 = 0.11376, K1 = 0.8·0.33728·94/72 = 0.35227, K2 = 1.38889,
/// // K1√200 = 4.9819: 2·1.38889/0.124095 · (4.9819 - 1 + 0.00686) = 89.3 K.
/// let room = Closed { heat_release_kw: 100.0, time_s: 200.0, inertia_kw2_s_m4k2: 0.11376, bounding_area_m2: 94.0,
///                     air_mass_kg: 72.0, specific_heat_kj_kgk: 1.0 };
/// assert!((beyler_closed_rise_k(room) - 89.3).abs() < 0.1);
/// ```
#[must_use]
pub fn beyler_closed_rise_k(room: Closed) -> f64 {
    let capacity_kj_k = room.air_mass_kg * room.specific_heat_kj_kgk;
    let k1 = 2.0 * 0.4 * room.inertia_kw2_s_m4k2.sqrt() * room.bounding_area_m2 / capacity_kj_k;
    let k2 = room.heat_release_kw.max(0.0) / capacity_kj_k;
    let x = k1 * room.time_s.max(0.0).sqrt();
    // x - 1 + e^(-x) loses all digits for a small x: e^(-x) - 1 is what `exp_m1` keeps.
    if k1 > 0.0 { 2.0 * k2 / (k1 * k1) * (x + (-x).exp_m1()) } else { k2 * room.time_s.max(0.0) }
}

/// What a state exceeds of the range of [`beyler_closed_rise_k`]: shut but leaky enough not to build up
/// pressure, and oxygen not yet short, which limits the heat to `air mass × 13.1 MJ/kg × 8 %`.
#[must_use]
pub fn beyler_closed_limits(room: Closed, rise_k: f64) -> Exceeded {
    let released_kj = room.heat_release_kw * room.time_s;
    Exceeded::none()
        .when(
            released_kj > usable_heat_kj(room.air_mass_kg, LIMIT_AT_AMBIENT),
            "more heat than the oxygen of the shut room yields",
        )
        .when(rise_k > 150.0, "rise above 150 K, where the lost gas mass begins to matter")
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    fn closed(time_s: f64, inertia_kw2_s_m4k2: f64) -> Closed {
        Closed {
            heat_release_kw: 100.0,
            time_s,
            inertia_kw2_s_m4k2,
            bounding_area_m2: 94.0,
            air_mass_kg: 72.0,
            specific_heat_kj_kgk: 1.0,
        }
    }

    #[test]
    fn the_closed_rise_is_what_others_worked_out() {
        // By hand, with A_T in K1: 89.3 K.
        assert_relative_eq!(beyler_closed_rise_k(closed(200.0, 0.113_76)), 89.3, max_relative = 5e-3);
    }

    #[test]
    fn the_closed_rise_has_both_ends_right() {
        // Early: all heat in the gas, Q t/(m c_p). Late: the loss decides, Q √t / (0.4 √(kρc) A_T).
        let early = closed(0.01, 0.113_76);
        assert_relative_eq!(beyler_closed_rise_k(early), 100.0 * 0.01 / 72.0, max_relative = 0.03);
        let late = closed(1e8, 0.113_76);
        let steady_k = 100.0 * 1e4 / (0.4 * 0.113_76_f64.sqrt() * 94.0);
        assert_relative_eq!(beyler_closed_rise_k(late), steady_k, max_relative = 0.01);
        assert_relative_eq!(beyler_closed_rise_k(closed(50.0, 0.0)), 100.0 * 50.0 / 72.0);
        assert_eq!(beyler_closed_rise_k(closed(0.0, 0.1)), 0.0);
    }

    #[test]
    fn a_closed_room_short_of_oxygen_is_told() {
        // 72 kg of air yield 72 · 0.0815 · 13 100 = 76 871 kJ, which 100 kW use in 769 s.
        assert!(beyler_closed_limits(closed(760.0, 0.113_76), 100.0).is_empty());
        assert!(!beyler_closed_limits(closed(780.0, 0.113_76), 100.0).is_empty());
    }
}
