//! Whatever is lawful can be assessed, and every number that comes out is finite.

use proptest::prelude::*;

use super::super::testing::{building, opening, q, room};
use super::assessed;
use crate::catalogue::{Catalogue, Kind};
use crate::domain::opening::OpeningKind::{Door, Gap, Hatch, RoofVent, Window};

/// Prints of numbers that are none.
fn not_finite(printed: &str) -> bool {
    printed.contains("inf,")
        || printed.contains("inf)")
        || printed.contains("inf }")
        || printed.contains("NaN")
}

#[test]
fn every_use_of_the_catalogue_assesses_with_finite_numbers() {
    for key in Catalogue::embedded().keys(Kind::Uses) {
        let door = opening("d", Door, ["origin", "outside"], [0.9, 2.0], 0.5);
        let findings = assessed(&building(vec![room("origin", key, [5.0, 4.0, 2.6])], vec![door]));

        assert!(!not_finite(&format!("{findings:?}")), "{key}");
    }
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(96))]

    #[test]
    fn rooms_at_the_limits_of_what_is_lawful_assess_with_finite_numbers(
        length_m in prop::sample::select(vec![0.3, 1.0, 5.0, 40.0, 1000.0]),
        width_m in prop::sample::select(vec![0.3, 3.0, 30.0, 1000.0]),
        height_m in prop::sample::select(vec![0.3, 2.4, 12.0, 150.0]),
        load in prop::sample::select(vec![None, Some(0.0), Some(1e-6), Some(500.0), Some(100_000.0)]),
        side_m in prop::sample::select(vec![0.01, 0.3, 2.0, 100.0]),
        share in prop::sample::select(vec![0.0, 1e-9, 0.5, 1.0]),
        kind in prop::sample::select(vec![Door, Window, Gap, Hatch, RoofVent]),
        leak in prop::sample::select(vec![None, Some(0.0), Some(100.0)]),
    ) {
        let mut origin = room("origin", "storage", [length_m, width_m, height_m]);
        origin.fuel_load_mj_m2 = load.map(q);
        origin.leakage_area_m2 = leak.map(q);
        let other = room("next", "corridor", [3.0, 2.0, 2.4]);
        let openings = vec![
            opening("o", kind, ["origin", "outside"], [side_m, side_m], share),
            opening("i", Door, ["origin", "next"], [side_m, side_m], share),
        ];
        let findings = assessed(&building(vec![origin, other], openings));

        let printed = format!("{findings:?}");
        prop_assert!(!not_finite(&printed), "{}", printed);
    }
}
