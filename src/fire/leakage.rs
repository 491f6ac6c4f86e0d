//! Cracks of a shut room: their area, the pressure they let build up, the gas they let through.

use super::Exceeded;
use super::constants::{AIR_SPECIFIC_HEAT_KJ_KGK, GRAVITY_M_S2, air_density_kg_m3};

/// Discharge coefficient of cracks. Source: [`KLOTE_MILKE`](crate::fire::sources::KLOTE_MILKE).
pub const CRACK_DISCHARGE_COEFFICIENT: f64 = 0.65;

/// Leakage area of a surface from its ratio, in m².
///
/// ```text
/// A_leak = r A
/// ```
///
/// | symbol | argument        | unit  |
/// |--------|-----------------|-------|
/// | `A`    | `area_m2`       | m²    |
/// | `r`    | `leakage_ratio` | m²/m² |
///
/// Range: ratios of the source run from 0.00007 (tight) to 0.0013 (very loose) for outer walls: the
/// spread of one class to the next is a factor of two to three, and it decides.
///
/// Source: [`KLOTE_MILKE`](crate::fire::sources::KLOTE_MILKE).
///
/// ```
/// use sootline::fire::leakage::surface_area_m2;
///
/// // By hand: 35 m² of average outer wall: 35 · 0.00021 = 0.00735 m².
/// assert!((surface_area_m2(35.0, 2.1e-4) - 0.00735).abs() < 1e-9);
/// ```
#[must_use]
pub fn surface_area_m2(area_m2: f64, leakage_ratio: f64) -> f64 {
    area_m2 * leakage_ratio
}

/// Volume that the gas of a room grows by each second while a fire heats it, in m³/s.
///
/// ```text
/// V' = Q / (ρ_a c_p T_a)
/// ```
///
/// | symbol | argument                | unit |
/// |--------|-------------------------|------|
/// | `Q`    | `net_heat_release_kw`   | kW   |
/// | `T_a`  | `ambient_temperature_k` | K    |
///
/// `Q` is the heat that stays in the gas. Exact for an ideal gas at constant pressure.
///
/// Source: [`KARLSSON_QUINTIERE_2000`](crate::fire::sources::KARLSSON_QUINTIERE_2000).
///
/// ```
/// use sootline::fire::leakage::expansion_m3_s;
///
/// // By hand: 500 / (1.2042 · 1.005 · 293.15) = 500 / 354.77 = 1.409 m³/s.
/// assert!((expansion_m3_s(500.0, 293.15) - 1.409).abs() < 0.001);
/// ```
#[must_use]
pub fn expansion_m3_s(net_heat_release_kw: f64, ambient_temperature_k: f64) -> f64 {
    net_heat_release_kw.max(0.0)
        / (air_density_kg_m3(ambient_temperature_k) * AIR_SPECIFIC_HEAT_KJ_KGK * ambient_temperature_k)
}

/// Overpressure of a leaky shut room with a steady fire, in Pa.
///
/// ```text
/// Δp = ( Q / (c_p T_a C_d A) )² / (2 ρ_a)
/// ```
///
/// | symbol | field                   | unit |
/// |--------|-------------------------|------|
/// | `Q`    | `net_heat_release_kw`   | kW   |
/// | `T_a`  | `ambient_temperature_k` | K    |
/// | `C_d`  | `discharge_coefficient` | -    |
/// | `A`    | `leakage_area_m2`       | m²   |
///
/// Range: see [`quasi_steady_pressure_limits`].
///
/// Source: [`KARLSSON_QUINTIERE_2000`](crate::fire::sources::KARLSSON_QUINTIERE_2000).
///
/// ```
/// use sootline::fire::leakage::{PressureInput, quasi_steady_pressure_pa};
///
/// // By hand: 100/(1.005·293) = 0.33960 kg/s; (0.33960/(0.6·0.01))² / (2·1.20478) = 1329.5 Pa.
/// let vent = PressureInput { net_heat_release_kw: 100.0, leakage_area_m2: 0.01, ambient_temperature_k: 293.0, discharge_coefficient: 0.6 };
/// assert!((quasi_steady_pressure_pa(vent) - 1329.5).abs() < 0.5);
/// ```
#[must_use]
pub fn quasi_steady_pressure_pa(vent: PressureInput) -> f64 {
    let mass_flow_kg_s = vent.net_heat_release_kw / (AIR_SPECIFIC_HEAT_KJ_KGK * vent.ambient_temperature_k);
    let flux = mass_flow_kg_s / (vent.discharge_coefficient * vent.leakage_area_m2);
    flux * flux / (2.0 * air_density_kg_m3(vent.ambient_temperature_k))
}

/// What [`quasi_steady_pressure_pa`] needs.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct PressureInput {
    /// Heat that stays in the gas, kW.
    pub net_heat_release_kw: f64,
    /// Leakage area, m².
    pub leakage_area_m2: f64,
    /// Air at the crack, K.
    pub ambient_temperature_k: f64,
    /// Discharge coefficient: [`CRACK_DISCHARGE_COEFFICIENT`] unless known better.
    pub discharge_coefficient: f64,
}

/// What a pressure exceeds of the range of [`quasi_steady_pressure_pa`].
#[must_use]
pub fn quasi_steady_pressure_limits(pressure_pa: f64) -> Exceeded {
    Exceeded::none().when(
        pressure_pa > 2000.0,
        "above about 2 kPa glass and light doors give way and the room is shut no more",
    )
}

/// A warm room with cracks, half of them low and half of them high.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct LeakyRoom {
    /// Leakage area, m².
    pub leakage_area_m2: f64,
    /// Height between the low and the high cracks, m.
    pub height_m: f64,
    /// Gas in the room, K.
    pub gas_temperature_k: f64,
    /// Air outside, K.
    pub ambient_temperature_k: f64,
}

/// Air drawn in low while hot gas leaves high, through the cracks of a shut room, in kg/s.
///
/// ```text
/// z_n = H / (1 + ρ_a/ρ_g)      m = C_d (A/2) √( 2 ρ_a (ρ_a - ρ_g) g z_n )
/// ```
///
/// | symbol | field                                 | unit |
/// |--------|---------------------------------------|------|
/// | `A`    | `leakage_area_m2`                     | m²   |
/// | `H`    | `height_m`                            | m    |
/// | `ρ_g`  | from `gas_temperature_k`              | kg/m³|
/// | `ρ_a`  | from `ambient_temperature_k`          | kg/m³|
///
/// `C_d` is [`CRACK_DISCHARGE_COEFFICIENT`]. The most that cracks let in: half of them at the floor
/// and half at the ceiling is the best place for a draught. No wind.
///
/// Source: [`KARLSSON_QUINTIERE_2000`](crate::fire::sources::KARLSSON_QUINTIERE_2000).
///
/// ```
/// use sootline::fire::leakage::{LeakyRoom, buoyant_exchange_kg_s};
///
/// // By hand: ρ 1.20478 and 0.8825, z_n = 3/2.36519 = 1.26840 m;
/// // 0.65·0.01·√(2·1.20478·0.32228·9.80665·1.2684) = 0.020202 kg/s.
/// let room = LeakyRoom { leakage_area_m2: 0.02, height_m: 3.0, gas_temperature_k: 400.0, ambient_temperature_k: 293.0 };
/// assert!((buoyant_exchange_kg_s(room) - 0.020202).abs() < 1e-5);
/// ```
#[must_use]
pub fn buoyant_exchange_kg_s(room: LeakyRoom) -> f64 {
    if room.gas_temperature_k <= room.ambient_temperature_k {
        return 0.0;
    }
    let outside = air_density_kg_m3(room.ambient_temperature_k);
    let inside = air_density_kg_m3(room.gas_temperature_k);
    let neutral_plane_m = room.height_m / (1.0 + outside / inside);
    CRACK_DISCHARGE_COEFFICIENT
        * 0.5
        * room.leakage_area_m2
        * (2.0 * outside * (outside - inside) * GRAVITY_M_S2 * neutral_plane_m).sqrt()
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    #[test]
    fn heated_gas_grows_as_others_worked_out() {
        // By hand with ρ 1.2, c_p 1.0, 293 K: 500 kW, 1.4221 m³/s; ours has 1.2048 and 1.005, hence 1 %.
        assert_relative_eq!(expansion_m3_s(500.0, 293.0), 1.4221, max_relative = 0.01);
        assert_eq!(expansion_m3_s(-10.0, 293.0), 0.0);
    }

    fn vent(net_heat_release_kw: f64, leakage_area_m2: f64, discharge_coefficient: f64) -> PressureInput {
        PressureInput {
            net_heat_release_kw,
            leakage_area_m2,
            ambient_temperature_k: 293.0,
            discharge_coefficient,
        }
    }

    #[test]
    fn the_pressure_is_that_of_the_closed_form() {
        // Derived: 100 kW, 0.01 m², C_d 0.6: 1329.5 Pa. Karlsson and Quintiere, worked: 500 kW,
        // 0.02 m², C_d 1: 3.0 kPa.
        assert_relative_eq!(quasi_steady_pressure_pa(vent(100.0, 0.01, 0.6)), 1329.51, max_relative = 1e-3);
        assert_relative_eq!(quasi_steady_pressure_pa(vent(500.0, 0.02, 1.0)), 3000.0, max_relative = 0.01);
    }

    #[test]
    fn twice_the_crack_is_a_quarter_of_the_pressure() {
        let ratio = quasi_steady_pressure_pa(vent(100.0, 0.01, 0.65))
            / quasi_steady_pressure_pa(vent(100.0, 0.02, 0.65));

        assert_relative_eq!(ratio, 4.0, max_relative = 1e-12);
    }

    #[test]
    fn pressure_that_breaks_glass_is_told() {
        assert!(
            quasi_steady_pressure_limits(2000.0).is_empty()
                && !quasi_steady_pressure_limits(2001.0).is_empty()
        );
    }

    #[test]
    fn the_exchange_is_that_of_two_vents() {
        // Derived for two vents of 1 m² 3 m apart, 400 K in 293 K, C_d 0.6: 1.8651 kg/s; ours takes 0.65.
        let room = LeakyRoom {
            leakage_area_m2: 2.0,
            height_m: 3.0,
            gas_temperature_k: 400.0,
            ambient_temperature_k: 293.0,
        };

        assert_relative_eq!(buoyant_exchange_kg_s(room), 1.8651 * 0.65 / 0.6, max_relative = 1e-3);
    }

    #[test]
    fn a_cold_room_exchanges_nothing_and_a_hotter_one_more_until_its_gas_is_thin() {
        let at = |gas_temperature_k| {
            buoyant_exchange_kg_s(LeakyRoom {
                leakage_area_m2: 0.02,
                height_m: 2.4,
                gas_temperature_k,
                ambient_temperature_k: 293.0,
            })
        };

        assert_eq!(at(293.0), 0.0);
        assert_eq!(at(280.0), 0.0);
        assert!(at(350.0) < at(500.0) && at(1200.0).is_finite());
    }
}
