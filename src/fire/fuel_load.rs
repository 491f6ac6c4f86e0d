//! Heat in what can burn: content, density, wood equivalent.

/// Things of one kind in a room.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Fuel {
    /// Mass, kg.
    pub mass_kg: f64,
    /// Heat of combustion, MJ/kg.
    pub heat_of_combustion_mj_kg: f64,
}

/// Heat content of a set of things, in MJ.
///
/// ```text
/// E = Σ m_i H_i
/// ```
///
/// | symbol | field                      | unit  |
/// |--------|----------------------------|-------|
/// | `m_i`  | `mass_kg`                  | kg    |
/// | `H_i`  | `heat_of_combustion_mj_kg` | MJ/kg |
///
/// Range: all of it burns; moisture and protection are not taken off.
///
/// Source: elementary; worked cases in [`EN_1991_1_2`](crate::fire::sources::EN_1991_1_2) Annex E
/// and in national rules.
///
/// ```
/// use sootline::fire::fuel_load::{Fuel, heat_content_mj};
///
/// // Published (facade fire test report): 90.1 kg of pine at 19.1 MJ/kg, 1720.91 MJ.
/// let crib = Fuel { mass_kg: 90.1, heat_of_combustion_mj_kg: 19.1 };
/// assert!((heat_content_mj([crib]) - 1720.91).abs() < 1e-9);
/// ```
#[must_use]
pub fn heat_content_mj(fuels: impl IntoIterator<Item = Fuel>) -> f64 {
    fuels.into_iter().map(|fuel| fuel.mass_kg * fuel.heat_of_combustion_mj_kg).sum()
}

/// Fuel load density, in MJ per m² of floor; zero for no floor.
///
/// ```text
/// q = E / A
/// ```
///
/// ```
/// use sootline::fire::fuel_load::density_mj_m2;
///
/// assert_eq!(density_mj_m2(885_000.0, 2000.0), 442.5); // by hand
/// ```
#[must_use]
pub fn density_mj_m2(heat_content_mj: f64, floor_area_m2: f64) -> f64 {
    if floor_area_m2 > 0.0 { heat_content_mj / floor_area_m2 } else { 0.0 }
}

/// Mass of wood per m² of floor with the same heat, in kg/m².
///
/// ```text
/// w = q / H_wood
/// ```
///
/// Rules differ on the heat of wood: 16.7 to 18.8 MJ/kg.
///
/// ```
/// use sootline::fire::fuel_load::wood_equivalent_kg_m2;
///
/// assert_eq!(wood_equivalent_kg_m2(350.0, 17.5), 20.0); // by hand
/// ```
#[must_use]
pub fn wood_equivalent_kg_m2(density_mj_m2: f64, wood_mj_kg: f64) -> f64 {
    density_mj_m2 / wood_mj_kg
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::{assert_relative_eq, relative_eq};

    const MJ_PER_KCAL: f64 = 4.184e-3;

    fn load(kg_and_mj_kg: &[(f64, f64)]) -> f64 {
        heat_content_mj(
            kg_and_mj_kg
                .iter()
                .map(|&(mass_kg, heat_of_combustion_mj_kg)| Fuel { mass_kg, heat_of_combustion_mj_kg }),
        )
    }

    #[test]
    fn a_mixed_store_has_the_wood_equivalent_that_was_printed() {
        // Teaching note on the Argentine decree 351/79, case 1: 200 m², wood 4400 kcal/kg, 16.5 kg/m².
        let store = [(2000.0, 4000.0), (500.0, 4000.0), (700.0, 4000.0), (150.0, 10_000.0), (50.0, 5000.0)]
            .map(|(kg, kcal)| (kg, kcal * MJ_PER_KCAL));
        let density = density_mj_m2(load(&store), 200.0);
        let wood = wood_equivalent_kg_m2(density, 4400.0 * MJ_PER_KCAL);

        assert_relative_eq!(wood, 16.5, max_relative = 0.003);
    }

    #[test]
    fn printed_subtotals_come_out() {
        for (kg, mj_kg, expected_mj, origin) in [
            (10_000.0, 17.0, 170_000.0, "Polish article on PN-B-02852, cotton"),
            (5000.0, 19.0, 95_000.0, "the same, silk"),
            (20_000.0, 31.0, 620_000.0, "the same, polyester, by hand"),
            (1000.0, 47.3, 47_300.0, "teaching note after Drysdale, propane (printed in kJ by a slip)"),
            (540.0, 13.4, 7236.0, "Russian article on NPB 105-03, cardboard, by hand"),
        ] {
            let got_mj = load(&[(kg, mj_kg)]);
            assert!(relative_eq!(got_mj, expected_mj, max_relative = 1e-9), "{origin}: {got_mj}");
        }
        // 9 tiers · 15 bays · 2 boxes · 2 kg = 540 kg on 40 m²: 180.9 MJ/m², between two printed bands.
        assert_relative_eq!(density_mj_m2(7236.0, 40.0), 180.9, max_relative = 1e-9);
        // A tonne of propane on one square metre is 2.7 t of wood at 17.6 MJ/kg: printed in the same note.
        assert_relative_eq!(wood_equivalent_kg_m2(47_300.0, 17.6), 2700.0, max_relative = 0.006);
    }

    #[test]
    fn two_things_in_an_office_have_the_wood_equivalent_that_was_printed() {
        // Korean fire-investigation question: 300 m², 15 kg at 4500 and 50 kg at 9500 kcal/kg, 0.4 kg/m².
        let things = [(15.0, 4500.0 * MJ_PER_KCAL), (50.0, 9500.0 * MJ_PER_KCAL)];
        let wood = wood_equivalent_kg_m2(density_mj_m2(load(&things), 300.0), 4500.0 * MJ_PER_KCAL);

        assert_relative_eq!(wood, 0.4, max_relative = 0.006);
    }
}
