//! From a room of the transient engine to what a person stands in.

use super::asphyxiants::Asphyxiants;
use super::receptor::{LayerAir, TwoLayers};
use crate::fire::constants::AMBIENT_K;
use crate::fire::radiation::{HotLayer, layer_flux_kw_m2};
use crate::fire::two_zone::{Composition, RoomState};

/// Molar masses, kg/kmol. Measured.
const OXYGEN: f64 = 31.998;
const CARBON_DIOXIDE: f64 = 44.009;
const WATER: f64 = 18.015;
const CARBON_MONOXIDE: f64 = 28.010;
const HYDROGEN_CYANIDE: f64 = 27.026;
/// Nitrogen with the argon of air: (28.965 - 0.2095 · 31.998)/0.7905. Derived.
const REST: f64 = 28.16;
/// Unburned fuel is a mixture that nobody names: taken as heavy as air. Ours; 5 % of it by mass moves the other
/// shares by less than 5 %.
const UNBURNED_FUEL: f64 = 28.965;

impl From<&RoomState> for TwoLayers {
    /// A person below the layer receives what the floor does; one within it, at least that of a thick layer
    /// all round him, black: too much where the smoke is thin, which tells only above 200 °C.
    fn from(room: &RoomState) -> Self {
        let all_round_kw_m2 = layer_flux_kw_m2(HotLayer {
            temperature_k: room.upper.temperature_k,
            emissivity: 1.0,
            view_factor: 1.0,
            surface_temperature_k: AMBIENT_K,
        });
        Self {
            interface_height_m: room.interface_height_m,
            upper: LayerAir {
                temperature_k: room.upper.temperature_k,
                gas: breathed(&room.upper.gas),
                extinction_1_m: room.upper_extinction_1_m,
                flux_kw_m2: room.floor_flux_kw_m2.max(all_round_kw_m2),
            },
            lower: LayerAir {
                temperature_k: room.lower.temperature_k,
                gas: breathed(&room.lower.gas),
                extinction_1_m: room.lower_extinction_1_m,
                flux_kw_m2: room.floor_flux_kw_m2,
            },
        }
    }
}

/// Shares by volume from shares by mass; soot takes no volume.
fn breathed(gas: &Composition) -> Asphyxiants {
    let rest = 1.0
        - gas.oxygen
        - gas.carbon_dioxide
        - gas.water
        - gas.carbon_monoxide
        - gas.hydrogen_cyanide
        - gas.soot
        - gas.unburned_fuel;
    let kmol = gas.oxygen / OXYGEN
        + gas.carbon_dioxide / CARBON_DIOXIDE
        + gas.water / WATER
        + gas.carbon_monoxide / CARBON_MONOXIDE
        + gas.hydrogen_cyanide / HYDROGEN_CYANIDE
        + gas.unburned_fuel / UNBURNED_FUEL
        + rest / REST;
    Asphyxiants {
        carbon_monoxide_ppm: 1e6 * gas.carbon_monoxide / CARBON_MONOXIDE / kmol,
        hydrogen_cyanide_ppm: 1e6 * gas.hydrogen_cyanide / HYDROGEN_CYANIDE / kmol,
        carbon_dioxide_percent: 100.0 * gas.carbon_dioxide / CARBON_DIOXIDE / kmol,
        oxygen_percent: 100.0 * gas.oxygen / OXYGEN / kmol,
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::fire::two_zone::Layer;
    use approx::assert_relative_eq;

    #[test]
    fn dry_air_has_the_oxygen_that_is_measured() {
        // 20.95 % by volume, 23.15 % by mass.
        let air = breathed(&Composition { oxygen: 0.2315, ..Composition::default() });

        assert_relative_eq!(air.oxygen_percent, 20.95, max_relative = 1e-3);
        assert_eq!(air.carbon_monoxide_ppm, 0.0);
    }

    #[test]
    fn the_products_of_methane_stand_in_their_proportions() {
        // By hand: CH4 + 2 O2 + 7.52 N2 → CO2 + 2 H2O + 7.52 N2: 1/10.52 = 9.51 % of CO₂. Masses 44.009, 36.03,
        // 7.52·28.16 = 211.76: 291.80.
        let burnt =
            Composition { carbon_dioxide: 44.009 / 291.80, water: 36.03 / 291.80, ..Composition::default() };
        assert_relative_eq!(breathed(&burnt).carbon_dioxide_percent, 9.506, max_relative = 1e-3);
        // By hand: 1 % by mass of CO in dry air: kmol 0.0072348 + 0.00035702 + 0.0269354 = 0.0345272: 10 340 ppm.
        let smoke = Composition { oxygen: 0.2315, carbon_monoxide: 0.01, ..Composition::default() };
        assert_relative_eq!(breathed(&smoke).carbon_monoxide_ppm, 10_340.0, max_relative = 1e-3);
    }

    #[test]
    fn a_person_in_the_layer_receives_no_less_than_one_below() {
        let room = RoomState {
            upper: Layer { temperature_k: 573.15, ..Layer::default() },
            lower: Layer { temperature_k: 300.0, ..Layer::default() },
            interface_height_m: 1.1,
            floor_flux_kw_m2: 1.5,
            upper_extinction_1_m: 2.0,
            ..RoomState::default()
        };
        let two = TwoLayers::from(&room);

        // By hand: 5.6704e-11 (573.15⁴ - 293.15⁴) = 5.6704e-11 · 1.00526e11 = 5.700 kW/m².
        assert_relative_eq!(two.upper.flux_kw_m2, 5.700, max_relative = 1e-3);
        assert_eq!(two.lower.flux_kw_m2, 1.5);
        assert_eq!((two.interface_height_m, two.upper.extinction_1_m), (1.1, 2.0));
        let near_fire = TwoLayers::from(&RoomState { floor_flux_kw_m2: 9.0, ..room });
        assert_eq!(near_fire.upper.flux_kw_m2, 9.0);
    }
}
