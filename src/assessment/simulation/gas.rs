//! Mass fractions to mole fractions of the wet gas.

use crate::fire::two_zone::Composition;

/// Molar masses, g/mol. IUPAC.
const OXYGEN: f64 = 31.998;
const CARBON_DIOXIDE: f64 = 44.009;
const CARBON_MONOXIDE: f64 = 28.010;
const WATER: f64 = 18.015;
const NITROGEN: f64 = 28.014;
const HYDROGEN_CYANIDE: f64 = 27.026;
/// Unburned fuel: what leaves a hot solid is a mixture, and that of several fires is one here. Taken
/// as near to air; a hundredth of methane by mass reads the oxygen 0.9 % too high.
const UNBURNED_FUEL: f64 = 30.0;

/// Mole fractions of a layer.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct MoleFractions {
    pub oxygen: f64,
    pub carbon_dioxide: f64,
    pub carbon_monoxide: f64,
    pub water: f64,
}

impl MoleFractions {
    /// Soot is no gas, and nitrogen is what the others leave.
    pub fn of(gas: &Composition) -> Self {
        let followed = gas.oxygen
            + gas.carbon_dioxide
            + gas.water
            + gas.carbon_monoxide
            + gas.hydrogen_cyanide
            + gas.soot
            + gas.unburned_fuel;
        let nitrogen = (1.0 - followed).max(0.0);
        let moles = gas.oxygen / OXYGEN
            + gas.carbon_dioxide / CARBON_DIOXIDE
            + gas.water / WATER
            + gas.carbon_monoxide / CARBON_MONOXIDE
            + gas.hydrogen_cyanide / HYDROGEN_CYANIDE
            + gas.unburned_fuel / UNBURNED_FUEL
            + nitrogen / NITROGEN;
        Self {
            oxygen: gas.oxygen / OXYGEN / moles,
            carbon_dioxide: gas.carbon_dioxide / CARBON_DIOXIDE / moles,
            carbon_monoxide: gas.carbon_monoxide / CARBON_MONOXIDE / moles,
            water: gas.water / WATER / moles,
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn dry_air_has_the_moles_that_a_hand_finds() {
        let air = MoleFractions::of(&Composition { oxygen: 0.232, ..Composition::default() });

        // By hand: 0.232/31.998 = 0.0072505, 0.768/28.014 = 0.0274149; 0.0072505/0.0346654 = 0.20916.
        assert!((air.oxygen - 0.20916).abs() < 1e-5, "{}", air.oxygen);
        assert_eq!((air.water, air.carbon_dioxide), (0.0, 0.0));
    }

    #[test]
    fn burnt_methane_has_two_water_for_each_carbon_dioxide() {
        // CH4 + 2 O2 -> CO2 + 2 H2O, in 2 · 3.76 N2: masses 44.009, 36.030, 210.665 of 290.704.
        let burnt = Composition {
            carbon_dioxide: 44.009 / 290.704,
            water: 36.030 / 290.704,
            ..Composition::default()
        };

        let moles = MoleFractions::of(&burnt);

        // By hand: 1, 2 and 7.52 of 10.52 moles.
        assert!((moles.carbon_dioxide - 0.09506).abs() < 1e-4);
        assert!((moles.water - 0.19011).abs() < 1e-4);
    }

    #[test]
    fn soot_takes_no_room() {
        let clean = Composition { oxygen: 0.2, ..Composition::default() };
        let sooty = Composition { oxygen: 0.19, soot: 0.05, ..Composition::default() };

        // 0.19 of 0.95 is 0.2 of 1.
        let (clean, sooty) = (MoleFractions::of(&clean), MoleFractions::of(&sooty));
        assert!((clean.oxygen - sooty.oxygen).abs() < 1e-12);
    }
}
