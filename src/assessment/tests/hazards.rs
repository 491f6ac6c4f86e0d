//! Hazards, cautions and what makes a rating provisional.

use super::super::findings::{BackdraftRating, FlashoverRating};
use super::super::testing::{building, opening, room};
use super::{assessed, first};
use crate::domain::building::ConstructionType;
use crate::domain::opening::OpeningKind::Door;
use crate::domain::room::Hazard;

#[test]
fn a_hazard_outside_the_methods_bars_not_indicated_and_says_what_is_not_computed() {
    let mut cell = room("cell", "storage", [3.0, 3.0, 2.4]);
    let without = first(&building(vec![cell.clone()], Vec::new()));
    cell.hazards = vec![Hazard::LithiumIon];
    let with = first(&building(vec![cell], Vec::new()));

    assert_eq!(without.flashover.rating, FlashoverRating::NotIndicated);
    assert_eq!(with.flashover.rating, FlashoverRating::Possible);
    assert_ne!(with.backdraft.rating, BackdraftRating::NotIndicated);
    assert_eq!(with.flashover.reason.unwrap().key, "hazard_lithium_ion");
    assert!(with.cautions.iter().any(|caution| caution.key == "hazard_lithium_ion"));
    assert!(with.flashover.holds_while.is_empty());
}

#[test]
fn every_hazard_but_none_and_not_recorded_bars_not_indicated() {
    use Hazard::*;
    for hazard in [
        LithiumIon,
        GasCylinders,
        FlammableLiquid,
        FlammableGas,
        CombustibleDust,
        Oxidisers,
        Explosives,
        Hoard,
        ExposedFoam,
        MedicalOxygen,
    ] {
        let mut cell = room("cell", "storage", [3.0, 3.0, 2.4]);
        cell.hazards = vec![hazard];
        let found = first(&building(vec![cell], Vec::new()));

        assert_ne!(found.flashover.rating, FlashoverRating::NotIndicated, "{hazard:?}");
        assert!(found.hazards[0].bars_not_indicated);
    }
}

#[test]
fn hazards_not_recorded_make_every_rating_provisional_and_bar_nothing() {
    let mut cell = room("cell", "storage", [3.0, 3.0, 2.4]);
    cell.hazards = vec![Hazard::NotRecorded];
    let found = first(&building(vec![cell], Vec::new()));

    assert_eq!(found.flashover.rating, FlashoverRating::NotIndicated);
    assert!(found.flashover.provisional_because.iter().any(|because| because == "hazards"));
    assert!(found.backdraft.provisional);
    assert!(found.wanted.iter().any(|wanted| wanted.key == "hazards"));
}

#[test]
fn a_rating_that_no_assumed_input_can_change_is_not_provisional() {
    let door = opening("d", Door, ["store", "outside"], [0.9, 2.0], 1.0);
    let found = first(&building(vec![room("store", "storage", [3.66, 3.6, 2.4])], vec![door]));

    assert!(!found.flashover.provisional, "{:?}", found.flashover.provisional_because);
}

#[test]
fn an_assumed_growth_that_decides_the_rating_makes_it_provisional() {
    // Behind an open door to a room of 26 m³ the growth says how much of the air is used at once.
    let rooms = vec![room("lounge", "living", [4.0, 4.0, 2.4]), room("hall", "corridor", [5.4, 2.0, 2.4])];
    let door = opening("d", Door, ["lounge", "hall"], [0.9, 2.0], 1.0);
    let found = first(&building(rooms, vec![door]));

    assert!(found.flashover.provisional_because.iter().any(|because| because == "growth_kw_s2"));
}

#[test]
fn every_report_is_for_planning_only_and_conditional() {
    let findings = assessed(&building(vec![room("cell", "storage", [3.0, 3.0, 2.4])], Vec::new()));

    for key in ["planning_only", "conditional", "collapse"] {
        assert!(findings.cautions.iter().any(|caution| caution.key == key), "{key}");
        assert!(findings.rooms[0].cautions.iter().any(|caution| caution.key == key), "{key}");
    }
}

#[test]
fn a_building_recorded_as_fire_resistive_carries_no_caution_of_collapse() {
    let mut house = building(vec![room("cell", "storage", [3.0, 3.0, 2.4])], Vec::new());
    house.construction_type = Some(ConstructionType("I-A".to_owned()));

    assert!(assessed(&house).cautions.iter().all(|caution| caution.key != "collapse"));
}
