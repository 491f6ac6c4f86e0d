//! Protection with and without credit.

use super::super::findings::FlashoverRating;
use super::super::rules::flashover_severity;
use super::super::testing::{building, opening, q, room};
use super::first;
use crate::domain::building::{Coverage, SprinklerState, Sprinklers};
use crate::domain::opening::OpeningKind::Door;
use crate::domain::room::SprinklerHeads;
use crate::domain::{Building, Named};

fn sprinklered(state: SprinklerState) -> Building {
    let mut store = room("store", "storage", [3.66, 3.6, 2.4]);
    store.sprinkler_heads = Some(SprinklerHeads {
        class: Named::Catalogue("fast_68".to_owned()),
        below_ceiling_m: None,
        spacing_m: Some(q(3.0)),
    });
    let door = opening("d", Door, ["store", "outside"], [0.9, 2.0], 1.0);
    let mut house = building(vec![store], vec![door]);
    house.sprinklers = Sprinklers { state, coverage: Some(Coverage::Full) };
    house
}

#[test]
fn sprinklers_are_given_credit_only_when_recorded_as_working_and_tested() {
    for (state, credited) in [
        (SprinklerState::NotRecorded, false),
        (SprinklerState::OutOfService, false),
        (SprinklerState::Installed, false),
        (SprinklerState::WorkingTested, true),
    ] {
        let found = first(&sprinklered(state));
        let sprinkler = found.protection.iter().find(|p| p.kind == "sprinkler").unwrap();

        assert_eq!(sprinkler.credited, credited, "{state:?}");
        let counted = if credited { sprinkler.flashover_with } else { sprinkler.flashover_without };
        assert_eq!(found.flashover.rating, counted, "{state:?}");
        assert_eq!(sprinkler.flashover_without, FlashoverRating::Expected);
        assert_eq!(sprinkler.flashover_with, FlashoverRating::NotIndicated);
    }
}

#[test]
fn a_rating_that_counts_on_sprinklers_says_so() {
    let found = first(&sprinklered(SprinklerState::WorkingTested));

    assert_eq!(found.flashover.holds_while[0].field, "sprinklers.state");
    assert!(found.flashover.not_covered.iter().any(|left_out| left_out.key == "sprinkler_failure"));
    assert!(found.cautions.iter().any(|caution| caution.key == "sprinkler_credit"));
}

#[test]
fn the_sprinkler_opens_long_before_the_peak() {
    let found = first(&sprinklered(SprinklerState::Installed));
    let sprinkler = found.protection.iter().find(|p| p.kind == "sprinkler").unwrap();

    assert!(sprinkler.heat_release_kw.unwrap() < 1000.0);
    assert!(sprinkler.acts_at_s.unwrap().typical > 0.0);
}

#[test]
fn a_self_closer_is_shown_but_not_counted_on_and_helps_only_if_released_in_time() {
    let mut door = opening("d", Door, ["store", "outside"], [0.9, 2.0], 1.0);
    (door.self_closing, door.held_open) = (true, true);
    let mut house = building(vec![room("store", "storage", [3.66, 3.6, 2.4])], vec![door]);
    let with = |house: &Building| {
        let found = first(house);
        let closer = found.protection.iter().find(|p| p.kind == "self_closer").unwrap().clone();
        assert!(!closer.credited);
        assert_eq!(found.flashover.rating, closer.flashover_without);
        (flashover_severity(closer.flashover_with), flashover_severity(closer.flashover_without))
    };

    // Flashover comes after about 160 s.
    house.response.detection_s = Some(q(30.0));
    let (released_early, without) = with(&house);
    house.response.detection_s = Some(q(600.0));
    let (released_late, _) = with(&house);

    assert!(released_early < without);
    assert_eq!(released_late, without);
}

#[test]
fn water_asked_for_is_set_against_the_water_recorded() {
    let mut house = sprinklered(SprinklerState::None);
    let unknown = first(&house).water.unwrap();
    house.water_available_l_min = Some(q(100.0));
    let short = first(&house).water.unwrap();

    // By hand: Iowa 1.3368 · 31.62 m³ = 42.3 L/min; NFA 13.58 · 13.176 m² = 178.9 L/min.
    assert_eq!(unknown.enough, None);
    assert!((short.needed_l_min - 178.9).abs() < 0.2, "{}", short.needed_l_min);
    assert_eq!(short.enough, Some(false));
}
