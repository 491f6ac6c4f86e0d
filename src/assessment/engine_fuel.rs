//! A fuel of the catalogue as the engine takes it: mass fractions of its elements, and the heat it
//! gives when it gets all the air it wants.

use crate::domain::properties::{FuelProperties, PropertyFault};
use crate::fire::two_zone::Fuel;

/// Atomic masses, g/mol. IUPAC, abridged to what matters here.
const CARBON: f64 = 12.011;
const HYDROGEN: f64 = 1.008;
const OXYGEN: f64 = 15.999;
const NITROGEN: f64 = 14.007;
const CHLORINE: f64 = 35.45;

/// Heat that carbon monoxide keeps, kJ/kg: 283.0 kJ/mol (standard enthalpies of formation, from
/// memory) over 28.010 g/mol.
const HEAT_IN_CARBON_MONOXIDE_KJ_KG: f64 = 10_103.0;
/// Heat that soot keeps, taken as carbon, kJ/kg: 393.5 kJ/mol (as above) over 12.011 g/mol.
const HEAT_IN_SOOT_KJ_KG: f64 = 32_762.0;

/// Hydrogen cyanide of a starved fire over that of a well-ventilated one. Upholstery of polyurethane
/// gave 0.0035 kg/kg before flashover and 0.015 after (Gann and others, NIST TN 1453, 2003, from
/// memory): about four. Taken for every fuel.
const CYANIDE_STARVED_OVER_VENTILATED: f64 = 4.0;

/// Rounding that yields given to a few digits may have.
const ROUNDING: f64 = 1e-6;

/// Mass fractions out of the atoms of a formula.
struct Elements {
    carbon: f64,
    hydrogen: f64,
    oxygen: f64,
    nitrogen: f64,
    inert: f64,
}

impl Elements {
    /// Each atom of chlorine leaves with one of hydrogen, so that neither takes part in the burning.
    fn of(fuel: &FuelProperties) -> Self {
        let bound = fuel.chlorine.min(fuel.hydrogen);
        let masses = [
            fuel.carbon * CARBON,
            (fuel.hydrogen - bound) * HYDROGEN,
            fuel.oxygen * OXYGEN,
            fuel.nitrogen * NITROGEN,
            fuel.chlorine * CHLORINE + bound * HYDROGEN,
        ];
        let whole: f64 = masses.iter().sum();
        let [carbon, hydrogen, oxygen, nitrogen, inert] = masses.map(|mass| mass / whole);
        Self { carbon, hydrogen, oxygen, nitrogen, inert }
    }

    /// Oxygen that burns a kilogram to carbon dioxide and water, kg/kg.
    fn oxygen_need(&self) -> f64 {
        self.carbon * 2.0 * OXYGEN / CARBON + self.hydrogen * OXYGEN / (2.0 * HYDROGEN) - self.oxygen
    }
}

/// The fuel as the engine takes it.
///
/// The heat is the net heat of combustion less what carbon monoxide and soot keep. The *chemical*
/// heat of the tables is lower, because part of the fuel leaves unburnt, which takes no oxygen
/// either; with it a balance of elements would ask for a third more oxygen per heat than the
/// 13.1 MJ/kg that hold for nearly all fuels.
///
/// # Errors
///
/// The member that makes the rest impossible.
pub(super) fn fuel(properties: &FuelProperties) -> Result<Fuel, PropertyFault> {
    let elements = Elements::of(properties);
    let carbon_monoxide_yield = properties.co_yield_kg_kg.unwrap_or(0.0);
    let soot_yield = properties.soot_yield_kg_kg.unwrap_or(0.0);

    let left_carbon = carbon_monoxide_yield * CARBON / (CARBON + OXYGEN) + soot_yield;
    if left_carbon > elements.carbon + ROUNDING {
        let member = if soot_yield > 0.0 { "soot_yield_kg_kg" } else { "co_yield_kg_kg" };
        let reason = format!(
            "soot and carbon monoxide hold {left_carbon:.3} kg of carbon per kg of fuel, and the formula only {:.3}",
            elements.carbon
        );
        return Err(PropertyFault { member, reason });
    }
    let kept = carbon_monoxide_yield * CARBON / (CARBON + OXYGEN) * OXYGEN / CARBON
        + soot_yield * 2.0 * OXYGEN / CARBON;
    if elements.oxygen_need() - kept <= 0.0 {
        let reason = "the formula holds all the oxygen that it burns with".to_owned();
        return Err(PropertyFault { member: "oxygen", reason });
    }
    let heat_of_combustion_kj_kg = properties.heat_of_combustion_mj_kg * 1000.0
        - carbon_monoxide_yield * HEAT_IN_CARBON_MONOXIDE_KJ_KG
        - soot_yield * HEAT_IN_SOOT_KJ_KG;
    if heat_of_combustion_kj_kg <= 0.0 {
        let reason = "is less than the heat that its soot and carbon monoxide keep".to_owned();
        return Err(PropertyFault { member: "heat_of_combustion_mj_kg", reason });
    }

    let cyanide = properties.hcn_yield_kg_kg.unwrap_or(0.0) * CYANIDE_STARVED_OVER_VENTILATED;
    let most_cyanide = elements.nitrogen * (HYDROGEN + CARBON + NITROGEN) / NITROGEN;
    Ok(Fuel {
        carbon: elements.carbon,
        hydrogen: elements.hydrogen,
        oxygen: elements.oxygen,
        nitrogen: elements.nitrogen + elements.inert,
        heat_of_combustion_kj_kg,
        carbon_monoxide_yield,
        soot_yield,
        hydrogen_cyanide_yield: cyanide.min(most_cyanide),
    })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::catalogue::Catalogue;

    fn of(key: &str) -> Fuel {
        fuel(&Catalogue::embedded().fuel(key).unwrap().properties).unwrap()
    }

    fn oxygen_need(fuel: &Fuel) -> f64 {
        let to_monoxide = fuel.carbon_monoxide_yield * CARBON / 28.01;
        (fuel.carbon - fuel.soot_yield - to_monoxide) * 31.998 / CARBON
            + to_monoxide * OXYGEN / CARBON
            + fuel.hydrogen * 31.998 / 4.032
            - fuel.oxygen
    }

    #[test]
    fn methane_agrees_with_a_formula_worked_by_hand() {
        let methane = of("methane");

        // By hand: CH4 has 12.011 of 16.043 g/mol; nothing is known of its soot, so all heat is there.
        assert!((methane.carbon - 0.74868).abs() < 1e-5);
        assert!((methane.hydrogen - 0.25132).abs() < 1e-5);
        assert!((methane.oxygen, methane.nitrogen) == (0.0, 0.0));
        assert!((methane.heat_of_combustion_kj_kg - 50_100.0).abs() < 1e-6);
    }

    #[test]
    fn what_soot_and_carbon_monoxide_keep_is_not_released() {
        let propane = of("propane");

        // By hand: 46 000 - 0.005 · 10 103 - 0.024 · 32 762 = 45 163 kJ/kg.
        assert!((propane.heat_of_combustion_kj_kg - 45_163.2).abs() < 0.1);
    }

    #[test]
    fn chlorine_takes_its_hydrogen_along() {
        let pvc = of("pvc");

        // By hand: CH1.5Cl0.5 is 12.011 + 1.512 + 17.725 = 31.248 g/mol, of which HCl is 18.229.
        assert!((pvc.carbon - 0.38438).abs() < 1e-5);
        assert!((pvc.hydrogen - 0.03226).abs() < 1e-5);
        assert!((pvc.nitrogen - 0.58337).abs() < 1e-5);
    }

    #[test]
    fn cyanide_is_never_more_than_the_nitrogen_holds() {
        let foam = of("polyurethane");
        let scant = FuelProperties {
            nitrogen: 0.0001,
            ..Catalogue::embedded().fuel("polyurethane").unwrap().properties.clone()
        };

        // By hand: four times 0.005; and 0.0001 · 14.007 / 18.64 · 27.026 / 14.007 = 0.000145.
        assert!((foam.hydrogen_cyanide_yield - 0.02).abs() < 1e-12);
        assert!((fuel(&scant).unwrap().hydrogen_cyanide_yield - 0.000_145).abs() < 1e-6);
    }

    /// The catalogue's stoichiometric air was worked out apart from this; air is 23.15 % oxygen.
    #[test]
    fn every_fuel_of_the_catalogue_wants_the_air_that_its_row_says() {
        for row in Catalogue::embedded().fuels() {
            let need = Elements::of(&row.properties).oxygen_need();

            let air = need / 0.2315;
            let said = row.properties.stoichiometric_air_kg_kg;
            assert!((air / said - 1.0).abs() < 0.015, "{}: {air} against {said}", row.key);
        }
    }

    /// Huggett's 13.1 MJ per kg of oxygen, ± 5 % for most fuels; rows whose own note doubts them, and
    /// one-carbon oxygenates, lie further out.
    #[test]
    fn heat_per_oxygen_is_that_of_nearly_all_fuels() {
        let mut far = Vec::new();
        for row in Catalogue::embedded().fuels() {
            let fuel = fuel(&row.properties).unwrap();
            let per_oxygen = fuel.heat_of_combustion_kj_kg / oxygen_need(&fuel);
            if (per_oxygen / 13_100.0 - 1.0).abs() > 0.1 {
                far.push((row.key.as_str(), per_oxygen.round()));
            }
        }
        let rows = Catalogue::embedded().fuels().len();
        assert!(far.len() * 5 <= rows, "{} of {rows}: {far:?}", far.len());
    }

    #[test]
    fn every_fuel_of_the_catalogue_can_be_run() {
        for row in Catalogue::embedded().fuels() {
            let fuel = fuel(&row.properties).unwrap_or_else(|fault| panic!("{}: {fault:?}", row.key));

            let whole = fuel.carbon + fuel.hydrogen + fuel.oxygen + fuel.nitrogen;
            assert!((whole - 1.0).abs() < 1e-12, "{}", row.key);
        }
    }

    #[test]
    fn a_formula_that_contradicts_its_yields_is_told() {
        let methane = &Catalogue::embedded().fuel("methane").unwrap().properties;
        for (made, member) in [
            (FuelProperties { soot_yield_kg_kg: Some(0.8), ..methane.clone() }, "soot_yield_kg_kg"),
            (FuelProperties { oxygen: 40.0, ..methane.clone() }, "oxygen"),
            (
                FuelProperties {
                    heat_of_combustion_mj_kg: 5.0,
                    soot_yield_kg_kg: Some(0.5),
                    ..methane.clone()
                },
                "heat_of_combustion_mj_kg",
            ),
        ] {
            assert_eq!(fuel(&made).unwrap_err().member, member);
        }
    }
}
