//! The numbers against each other: laws that hold whatever the source.

use super::*;
use crate::domain::properties::ExposedGrowth;

fn all() -> &'static Catalogue {
    Catalogue::embedded()
}

/// Molar masses of C, H, O, N, Cl in g/mol: IUPAC standard atomic weights, abridged.
const MOLAR: [f64; 5] = [12.011, 1.008, 15.999, 14.007, 35.45];

fn formula_mass(fuel: &FuelProperties) -> f64 {
    let atoms = [fuel.carbon, fuel.hydrogen, fuel.oxygen, fuel.nitrogen, fuel.chlorine];
    atoms.iter().zip(MOLAR).map(|(n, m)| n * m).sum()
}

#[test]
fn the_air_a_fuel_needs_follows_from_its_formula() {
    for row in all().fuels() {
        let fuel = &row.properties;
        // C to CO2, H to H2O, Cl to HCl first; air holds 0.232 of oxygen by mass.
        let oxygen_atoms = 2.0 * fuel.carbon + 0.5 * (fuel.hydrogen - fuel.chlorine) - fuel.oxygen;
        let air = oxygen_atoms * MOLAR[2] / formula_mass(fuel) / 0.232;

        let printed = fuel.stoichiometric_air_kg_kg;
        assert!((printed / air - 1.0).abs() < 0.005, "{}: {printed} against {air}", row.key);
    }
}

#[test]
fn a_kilogram_of_air_gives_about_three_megajoules_or_the_note_says_not() {
    for row in all().fuels() {
        let per_air = row.properties.heat_of_combustion_mj_kg / row.properties.stoichiometric_air_kg_kg;

        let usual = (2.7..=3.3).contains(&per_air);
        let flagged = row.note.contains("MJ per kg of air");
        assert_eq!(usual, !flagged, "{}: {per_air} MJ/kg", row.key);
    }
}

#[test]
fn no_fuel_yields_more_carbon_or_nitrogen_than_it_holds() {
    for row in all().fuels() {
        let fuel = &row.properties;
        let mass = formula_mass(fuel);

        let hcn = fuel.hcn_yield_kg_kg.unwrap_or(0.0);
        let carbon = fuel.co_yield_kg_kg.unwrap_or(0.0) * 12.011 / 28.010
            + fuel.soot_yield_kg_kg.unwrap_or(0.0)
            + hcn * 12.011 / 27.026;
        assert!(carbon <= fuel.carbon * MOLAR[0] / mass, "{}: carbon {carbon}", row.key);
        assert!(hcn * 14.007 / 27.026 <= fuel.nitrogen * MOLAR[3] / mass, "{}: hcn {hcn}", row.key);
    }
}

#[test]
fn a_mean_with_its_law_gives_the_fractiles() {
    // Gumbel with coefficient of variation 0.30, from its distribution function:
    // x(p) = mean (1 - 0.30 (√6/π) (0.5772 + ln(-ln p))).
    let fractile = |mean: f64, p: f64| {
        mean * (1.0 - 0.30 * (6.0_f64.sqrt() / std::f64::consts::PI) * (0.5772 + (-p.ln()).ln()))
    };
    let mut rows = 0;

    for row in all().uses() {
        // CIB W14 prints wider fractiles, which obey no one law.
        if row.source.starts_with("CIB W14 workshop") {
            continue;
        }
        let load = &row.properties;
        for (got, p) in [(load.fire_load_p80_mj_m2, 0.80), (load.fire_load_p95_mj_m2, 0.95)] {
            let want = fractile(load.fire_load_mean_mj_m2, p);
            // Tables are printed to whole MJ/m²; the standard rounds some a little further.
            assert!((got - want).abs() <= 1.0, "{}: {got} against {want}", row.key);
        }
        rows += 1;
    }
    assert!(rows >= 30, "only {rows} rows were checked");
}

#[test]
fn growth_of_every_use_is_a_class_of_the_european_standard() {
    // 1 MW in 600, 300, 150 and 75 s, EN 1991-1-2, Table E.5, from memory.
    let classes = [600.0, 300.0, 150.0, 75.0].map(|t: f64| 1000.0 / t.powi(2));

    for row in all().uses() {
        let growth = row.properties.growth_kw_s2;
        assert!(classes.iter().any(|class| (growth / class - 1.0).abs() < 0.002), "{}: {growth}", row.key);
    }
}

#[test]
fn no_item_holds_more_heat_than_its_fuel_can_give() {
    for row in all().items() {
        let item = &row.properties;
        let fuel = &all().fuel(item.fuel.key().unwrap()).unwrap().properties;

        let heat = item.energy_mj / item.mass_kg;
        // A little above 1: masses and energies are rounded.
        assert!(heat <= fuel.heat_of_combustion_mj_kg * 1.01, "{}: {heat} MJ/kg", row.key);
    }
}

#[test]
fn every_item_holds_the_heat_to_reach_its_peak() {
    for row in all().items() {
        let item = &row.properties;
        // ∫ α t² dt up to t = √(Q/α), in MJ.
        let to_peak = item.peak_kw.powf(1.5) / (3.0 * item.growth_kw_s2.sqrt()) / 1000.0;

        assert!(to_peak < item.energy_mj, "{}: {to_peak} MJ of {}", row.key, item.energy_mj);
    }
}

#[test]
fn linings_burn_exactly_where_they_speed_a_fire() {
    for row in all().materials() {
        assert_eq!(row.properties.combustible, row.properties.exposed_growth.is_some(), "{}", row.key);
        let bare =
            row.key.ends_with("_foam") || ["fibreboard", "expanded_polystyrene"].contains(&row.key.as_str());
        let ultra_fast = row.properties.exposed_growth == Some(ExposedGrowth::UltraFast);
        assert_eq!(bare, ultra_fast, "{}", row.key);
    }
}

#[test]
fn conductivity_rises_from_insulation_over_masonry_to_metal() {
    let k = |key: &str| all().material(key).unwrap().properties.conductivity_w_mk;
    let order =
        ["mineral_wool", "plywood", "gypsum_board", "plaster", "brick", "concrete", "steel", "aluminium"];

    for pair in order.windows(2) {
        assert!(k(pair[0]) < k(pair[1]), "{pair:?}");
    }
    assert!(all().materials().all(|row| (0.02..=400.0).contains(&row.properties.conductivity_w_mk)));
}

#[test]
fn a_looser_class_leaks_more_through_every_boundary() {
    for class in ["tight average loose very_loose", "stair_tight stair_average stair_loose"] {
        let rows: Vec<_> = class.split(' ').map(|key| &all().leakage(key).unwrap().properties).collect();
        for pair in rows.windows(2) {
            assert!(pair[0].wall_m2_m2 < pair[1].wall_m2_m2, "{class}");
            assert!(pair[0].floor_m2_m2 < pair[1].floor_m2_m2, "{class}");
            assert!(pair[0].ceiling_m2_m2 < pair[1].ceiling_m2_m2, "{class}");
        }
    }
}

#[test]
fn every_detector_has_something_to_act_on() {
    for row in all().detectors() {
        let d = &row.properties;
        let criteria =
            [d.activation_c, d.activation_rise_k, d.activation_rate_k_min, d.activation_optical_density_1_m];
        assert!(criteria.iter().any(Option::is_some), "{}", row.key);
    }
}

#[test]
fn a_sprinkler_is_as_quick_as_its_class_says() {
    // ISO 6182-1: fast at most 50, standard from 80 (from memory); special 50 to 80 on average
    // (seen in the IMO nozzle test procedure).
    let class = |key: &str| match key.split('_').next().unwrap() {
        "fast" | "residential" | "esfr" => 1.0..=50.0,
        "special" => 50.0..=80.0,
        "standard" => 80.0..=350.0,
        other => panic!("a class without a range: {other}"),
    };

    for row in all().sprinklers() {
        let index = row.properties.response_time_index_sqrt_ms;
        assert!(class(&row.key).contains(&index), "{}: {index}", row.key);
        assert!(row.key.ends_with(&format!("_{}", row.properties.activation_c)), "{}", row.key);
    }
}
