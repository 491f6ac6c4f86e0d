//! The layer of a room that a fan feeds.

use crate::fire::Exceeded;

/// A fire in a room that a fan feeds with air.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Forced {
    /// Heat release, kW.
    pub heat_release_kw: f64,
    /// Air through the fan, kg/s.
    pub mass_flow_kg_s: f64,
    /// Conductance times area, kW/K: `h_k A_T` of
    /// [`total_conductance_kw_k`](crate::fire::linings::total_conductance_kw_k) for
    /// [`foote_pagni_alvares_rise_k`], of
    /// [`deal_beyler_conductance_kw_k`](crate::fire::linings::deal_beyler_conductance_kw_k) for
    /// [`deal_beyler_rise_k`].
    pub conductance_kw_k: f64,
    /// Air that comes in, K.
    pub ambient_temperature_k: f64,
    /// Specific heat of the air, kJ/(kg K).
    pub specific_heat_kj_kgk: f64,
}

/// Rise of the layer in a fan-driven room, in K, by Foote, Pagni and Alvares.
///
/// ```text
/// ΔT/T_a = 0.63 ( Q / (m c_p T_a) )^0.72 ( h_k A_T / (m c_p) )^(-0.36)
/// ```
///
/// | symbol    | field                   | unit      |
/// |-----------|-------------------------|-----------|
/// | `Q`       | `heat_release_kw`       | kW        |
/// | `m`       | `mass_flow_kg_s`        | kg/s      |
/// | `c_p`     | `specific_heat_kj_kgk`  | kJ/(kg K) |
/// | `T_a`     | `ambient_temperature_k` | K         |
/// | `h_k A_T` | `conductance_kw_k`      | kW/K      |
///
/// Range: see [`foote_pagni_alvares_limits`].
///
/// Source: [`FOOTE_1986`](crate::fire::sources::FOOTE_1986).
///
/// ```
/// use sootline::fire::hot_layer::{Forced, foote_pagni_alvares_rise_k};
///
/// // By hand: 293 · 0.63 · (1000/(2.4·293))^0.72 · (0.076594·130/2.4)^(-0.36)
/// //        = 293 · 0.63 · 1.2896 · 0.5987 = 142.5 K.
/// let room = Forced { heat_release_kw: 1000.0, mass_flow_kg_s: 2.4, conductance_kw_k: 0.076594 * 130.0,
///                     ambient_temperature_k: 293.0, specific_heat_kj_kgk: 1.0 };
/// assert!((foote_pagni_alvares_rise_k(room) - 142.5).abs() < 0.3);
/// ```
#[must_use]
pub fn foote_pagni_alvares_rise_k(room: Forced) -> f64 {
    if room.heat_release_kw <= 0.0 {
        return 0.0;
    }
    let flow_kw_k = room.mass_flow_kg_s * room.specific_heat_kj_kgk;
    0.63 * room.ambient_temperature_k
        * (room.heat_release_kw / (flow_kw_k * room.ambient_temperature_k)).powf(0.72)
        * (room.conductance_kw_k / flow_kw_k).powf(-0.36)
}

/// What a room exceeds of the tests behind [`foote_pagni_alvares_rise_k`]: 150 to 490 kW,
/// 0.11 to 0.325 kg/s, walls of 0.1 m refractory, layers of 100 to 300 °C.
#[must_use]
pub fn foote_pagni_alvares_limits(room: Forced, rise_k: f64) -> Exceeded {
    Exceeded::none()
        .when(room.mass_flow_kg_s <= 0.0, "no forced flow: the closed-room form counts instead")
        .when(
            !(150.0..=490.0).contains(&room.heat_release_kw),
            "heat release outside the 150 to 490 kW of the tests",
        )
        .when(
            !(0.11..=0.325).contains(&room.mass_flow_kg_s),
            "air flow outside the 0.11 to 0.325 kg/s of the tests",
        )
        .when(rise_k > 300.0, "layer hotter than the 100 to 300 °C of the tests")
}

/// Rise of the layer in a fan-driven room, in K, by Deal and Beyler.
///
/// ```text
/// ΔT = Q / (m c_p + h A_T)
/// ```
///
/// Symbols as [`foote_pagni_alvares_rise_k`], but with the conductance of
/// [`deal_beyler_conductance_kw_k`](crate::fire::linings::deal_beyler_conductance_kw_k).
/// Range: up to about 2000 s.
///
/// Source: [`DEAL_BEYLER_1990`](crate::fire::sources::DEAL_BEYLER_1990).
///
/// ```
/// use sootline::fire::hot_layer::{Forced, deal_beyler_rise_k};
///
/// // By hand: 1000 / (2.4·1.0 + 0.030638·130) = 1000 / 6.3829 = 156.7 K.
/// let room = Forced { heat_release_kw: 1000.0, mass_flow_kg_s: 2.4, conductance_kw_k: 0.030638 * 130.0,
///                     ambient_temperature_k: 293.0, specific_heat_kj_kgk: 1.0 };
/// assert!((deal_beyler_rise_k(room) - 156.7).abs() < 0.1);
/// ```
#[must_use]
pub fn deal_beyler_rise_k(room: Forced) -> f64 {
    room.heat_release_kw.max(0.0) / (room.mass_flow_kg_s * room.specific_heat_kj_kgk + room.conductance_kw_k)
}

/// What a time exceeds of the range of [`deal_beyler_rise_k`].
#[must_use]
pub fn deal_beyler_limits(time_s: f64) -> Exceeded {
    Exceeded::none().when(time_s > 2000.0, "later than about 2000 s, the end of the fitted tests")
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    fn forced(conductance_kw_k: f64) -> Forced {
        Forced {
            heat_release_kw: 1000.0,
            mass_flow_kg_s: 2.4,
            conductance_kw_k,
            ambient_temperature_k: 293.0,
            specific_heat_kj_kgk: 1.0,
        }
    }

    #[test]
    fn both_forced_forms_give_what_others_worked_out_and_agree() {
        // By hand: 1000 kW, 2.4 kg/s, 130 m² of concrete after 300 s: 142.5 K and 156.7 K.
        let foote_k = foote_pagni_alvares_rise_k(forced(0.076_59 * 130.0));
        let deal_k = deal_beyler_rise_k(forced(0.030_64 * 130.0));

        assert_relative_eq!(foote_k, 142.5, max_relative = 5e-3);
        assert_relative_eq!(deal_k, 156.7, max_relative = 5e-3);
        assert_relative_eq!(foote_k, deal_k, max_relative = 0.3);
    }

    #[test]
    fn a_lumped_loss_gives_the_closed_form() {
        // Derived: Q/(m c_p + hA) = 500/(0.6·1.005 + 0.02·40) = 356.38 K.
        let room = Forced {
            heat_release_kw: 500.0,
            mass_flow_kg_s: 0.6,
            conductance_kw_k: 0.8,
            ambient_temperature_k: 293.0,
            specific_heat_kj_kgk: 1.005,
        };
        assert_relative_eq!(deal_beyler_rise_k(room), 356.38, max_relative = 1e-4);
    }

    #[test]
    fn more_air_cools_and_more_heat_warms_a_forced_room() {
        for step in 1..100 {
            let flow = 0.05 * f64::from(step);
            let less = Forced { mass_flow_kg_s: flow, ..forced(4.0) };
            let more = Forced { mass_flow_kg_s: flow + 0.05, ..forced(4.0) };
            let hotter = Forced { heat_release_kw: 1200.0, ..less };
            for rise in [foote_pagni_alvares_rise_k, deal_beyler_rise_k] {
                assert!(rise(more) < rise(less) && rise(hotter) > rise(less));
            }
        }
        assert!(!foote_pagni_alvares_limits(forced(4.0), 142.0).is_empty());
        assert!(deal_beyler_limits(2000.0).is_empty() && !deal_beyler_limits(2001.0).is_empty());
    }
}
