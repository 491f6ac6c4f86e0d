//! The sentences, read as an officer would.

use std::borrow::Cow;

use super::super::sample;
use super::super::text::{cautions, headline};
use super::banned;
use crate::assessment::findings::*;
use crate::domain::assumptions::Scenario;
use crate::domain::room::Hazard;

fn with(flashover: FlashoverRating, backdraft: BackdraftRating) -> RoomFindings {
    let mut room = sample::room("store");
    room.flashover.rating = flashover;
    room.backdraft.rating = backdraft;
    room
}

#[test]
fn it_tells_what_when_in_which_case_and_before_or_after_water() {
    let room = with(FlashoverRating::Likely, BackdraftRating::NotIndicated);

    // The example of the wire contract.
    assert_eq!(
        headline::room(&room),
        "Flashover after about 5 minutes with the door open, before water is on the fire."
    );
}

#[test]
fn a_shut_room_that_may_hide_a_backdraft_says_so() {
    let room = with(FlashoverRating::Expected, BackdraftRating::CannotBeExcluded);

    assert_eq!(
        headline::room(&room),
        "Flashover expected after about 5 minutes with the door open, before water is on the fire; \
         shut, it may hide a backdraft."
    );
}

#[test]
fn not_indicated_never_stands_without_its_condition() {
    let mut room = with(FlashoverRating::NotIndicated, BackdraftRating::NotIndicated);
    room.flashover.holds_while = vec![HoldsWhile {
        field: "fuel_load_mj_m2",
        value: Some(420.0),
        now: 100.0,
        direction: Direction::Below,
        words: "Holds while the fire load stays below 420 MJ/m²; now 100.".to_owned(),
    }];

    assert_eq!(
        headline::room(&room),
        "Flashover not indicated, but only while the fire load stays below 420 MJ/m² (now 100)."
    );

    room.flashover.holds_while.clear();
    assert_eq!(
        headline::room(&room),
        "Flashover not indicated in the cases computed, as the room is recorded."
    );
}

#[test]
fn what_was_not_assessed_counts_with_the_worst() {
    let mut room = with(FlashoverRating::NotAssessed, BackdraftRating::NotAssessed);
    room.flashover.reason = sample::reason("not_converged", "The computation did not settle.");

    assert_eq!(
        headline::room(&room),
        "Not assessed, count it with the worst: the computation did not settle."
    );
}

#[test]
fn a_large_space_is_told_by_flame_pile_and_smoke() {
    let mut room = with(FlashoverRating::NotAssessed, BackdraftRating::NotAssessed);
    room.large_space = Some(LargeSpaceFinding {
        because: vec!["floor over 300 m²"],
        flame_height_m: 9.0,
        ceiling_height_m: 8.0,
        flame_reaches_ceiling: true,
        spreads_across_m: Some(3.0),
        gap_m: Some(2.0),
        next_pile_ignites: Some(true),
        layer_to_2_m_s: Some(Band { low: 200.0, typical: 250.0, high: 300.0 }),
        figures: Vec::new(),
    });

    assert_eq!(
        headline::room(&room),
        "Too large to be judged as one room for flashover: flames reach the ceiling, fire crosses to \
         the next pile and smoke is down to head height after about 4 minutes."
    );
}

#[test]
fn a_hazard_that_no_figure_counts_is_named() {
    let mut room = with(FlashoverRating::Possible, BackdraftRating::NotIndicated);
    for hazard in [Hazard::LithiumIon, Hazard::GasCylinders] {
        room.hazards.push(HazardFinding { hazard, text: "", bars_not_indicated: true });
    }

    assert!(headline::room(&room).ends_with("; not counted: lithium-ion batteries and gas cylinders."));
}

#[test]
fn flashover_without_a_time_says_how_far_it_goes() {
    for (key, expected) in [
        (
            "only_at_the_worst_corner",
            "Flashover possible with the door open, if fuel, growth and lining are at their worst.",
        ),
        ("within_scatter", "Flashover possible with the door open: the fire comes close to what it takes."),
        ("hazard_gas_cylinders", "Flashover cannot be excluded, whatever the figures say."),
        ("oxygen_budget", "Flashover possible with the door open, before the air inside is used up."),
        ("anything_else", "Flashover possible with the door open, at a time that cannot be told."),
    ] {
        let mut room = with(FlashoverRating::Possible, BackdraftRating::NotIndicated);
        room.flashover.time_s = None;
        room.flashover.reason = sample::reason(key, "");

        assert_eq!(headline::room(&room), expected);
    }
}

#[test]
fn a_room_whose_openings_nobody_recorded_says_so() {
    let mut room = with(FlashoverRating::Possible, BackdraftRating::CannotBeExcluded);
    room.wanted = vec![Wanted { key: "openings", text: Cow::Borrowed("Record its openings.") }];

    assert!(headline::room(&room).ends_with("; its openings are not recorded."));
}

#[test]
fn no_headline_of_any_finding_reassures() {
    let mut said = 0;
    for &flashover in FlashoverRating::ALL {
        for &backdraft in BackdraftRating::ALL {
            for scenario in Scenario::ALL {
                for &case in BeforeWater::ALL {
                    for time_s in [None, Some(sample::BAND)] {
                        let mut room = with(flashover, backdraft);
                        room.flashover.scenario = Some(scenario);
                        room.flashover.before_water_case = Some(case);
                        room.flashover.time_s = time_s;

                        let sentence = headline::room(&room);

                        assert_eq!(banned(&sentence), None, "{sentence}");
                        assert!(sentence.ends_with('.') && sentence.is_ascii(), "{sentence}");
                        assert!(sentence.len() <= 170, "{} letters: {sentence}", sentence.len());
                        said += 1;
                    }
                }
            }
        }
    }
    assert_eq!(said, 5 * 5 * 6 * 4 * 2);
}

#[test]
fn a_building_leads_with_how_many_rooms_and_the_worst() {
    let findings =
        sample::findings(vec![with(FlashoverRating::Likely, BackdraftRating::CannotBeExcluded), {
            let mut hall = sample::room("hall");
            hall.flashover.rating = FlashoverRating::NotAssessed;
            hall.flashover.before_water = None;
            hall
        }]);

    assert_eq!(
        headline::building(&findings),
        "1 of 2 rooms may flash over before water is on the fire; 2 may hide a backdraft when shut; \
         1 could not be judged for flashover. The worst, The store: flashover after about 5 minutes with \
         the door open, before water is on the fire; shut, it may hide a backdraft."
    );
}

#[test]
fn a_building_without_rooms_is_not_called_anything() {
    assert_eq!(
        headline::building(&sample::findings(Vec::new())),
        "No rooms are recorded, so nothing was assessed."
    );
}

#[test]
fn the_cautions_of_every_report_defer_and_promise_nothing() {
    let text = |wanted: &str| {
        cautions::ALWAYS.iter().find(|(key, _)| *key == wanted).map(|(_, text)| *text).unwrap()
    };

    assert!(text("planning_only").contains("do not replace size-up"));
    assert!(text("planning_only").contains("licensed engineer"));
    assert!(text("local_procedures").contains("procedures"));
    assert!(text("absence_of_signs").contains("proves nothing"));
    assert!(text("doors").contains("never a reason to open, wedge or undo one"));
    for (key, text) in cautions::ALWAYS {
        assert_eq!(banned(text), None, "{key}");
    }
}
