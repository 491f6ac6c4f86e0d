//! The same inputs give the same findings, however they are numbered.

use std::ops::ControlFlow;

use proptest::prelude::*;

use super::super::findings::Stop;
use super::super::testing::{building, opening, q, room};
use super::super::{ENGINE_VERSION, RATING_RULE, assess};
use super::{assessed, assessed_with};
use crate::catalogue::Catalogue;
use crate::domain::assumptions::Level;
use crate::domain::opening::OpeningKind::{Door, DoubleDoor, Gap, Window};
use crate::domain::{Assumptions, Building};

/// A house whose rooms hang together in several ways.
fn house() -> Building {
    let rooms = vec![
        room("lounge", "living", [5.0, 4.0, 2.4]),
        room("hall", "corridor", [4.0, 1.5, 2.4]),
        room("kitchen", "kitchen", [3.0, 3.0, 2.4]),
        room("bed", "bedroom", [3.5, 3.0, 2.4]),
        room("shop", "sales", [9.0, 6.0, 3.2]),
        room("cell", "storage", [2.0, 2.0, 2.2]),
    ];
    let openings = vec![
        opening("a", Door, ["lounge", "hall"], [0.9, 2.0], 1.0),
        opening("b", Door, ["kitchen", "hall"], [0.9, 2.0], 0.5),
        opening("c", Door, ["bed", "hall"], [0.9, 2.0], 0.0),
        opening("d", Door, ["hall", "outside"], [0.9, 2.0], 0.0),
        opening("e", Window, ["lounge", "outside"], [1.4, 1.2], 0.1),
        opening("f", Gap, ["kitchen", "lounge"], [1.2, 2.1], 1.0),
        opening("g", DoubleDoor, ["shop", "outside"], [1.8, 2.1], 0.0),
        opening("h", Door, ["shop", "hall"], [0.9, 2.0], 0.0),
    ];
    building(rooms, openings)
}

#[test]
fn the_same_inputs_give_the_same_findings_to_the_last_digit() {
    let (once, again) = (assessed(&house()), assessed(&house()));

    assert_eq!(format!("{once:?}"), format!("{again:?}"));
}

#[test]
fn the_head_names_engine_rule_catalogue_and_inputs() {
    let findings = assessed(&house());

    assert_eq!(findings.engine_version, ENGINE_VERSION);
    assert_eq!(findings.rating_rule, RATING_RULE);
    assert_eq!(findings.catalogue_digest, Catalogue::embedded().digest());
    assert_eq!(findings.input_digest.len(), 64);
}

#[test]
fn the_digest_follows_the_inputs_and_nothing_else() {
    let base = assessed(&house()).input_digest;
    let mut renamed = house();
    renamed.name = "Another name".to_owned();
    renamed.notes = "Seen in March.".to_owned();
    let mut fuller = house();
    fuller.rooms[0].fuel_load_mj_m2 = Some(q(500.0));
    let mut opened = house();
    opened.openings[2].open_fraction = q(0.2);
    let other_fractile = Assumptions { fuel_load_fractile: Some(q(0.5)), ..Assumptions::default() };

    assert_eq!(assessed(&renamed).input_digest, base);
    assert_ne!(assessed(&fuller).input_digest, base);
    assert_ne!(assessed(&opened).input_digest, base);
    assert_ne!(assessed_with(&house(), &other_fractile).input_digest, base);
}

#[test]
fn work_stops_as_soon_as_nobody_wants_it() {
    let mut asked = 0;
    let screening = Assumptions { level: Some(Level::Screening), ..Assumptions::default() };
    let answer = assess(&house(), Catalogue::embedded(), &screening, &mut || {
        asked += 1;
        if asked < 3 { ControlFlow::Continue(()) } else { ControlFlow::Break(Stop) }
    });

    assert_eq!(answer, Err(Stop));
    assert_eq!(asked, 3);
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(24))]

    #[test]
    fn renumbering_rooms_and_openings_changes_no_finding(
        rooms in Just((0..6).collect::<Vec<usize>>()).prop_shuffle(),
        openings in Just((0..8).collect::<Vec<usize>>()).prop_shuffle(),
    ) {
        let base = house();
        let mut other = base.clone();
        other.rooms = rooms.iter().map(|&number| base.rooms[number].clone()).collect();
        other.openings = openings.iter().map(|&number| base.openings[number].clone()).collect();

        let (base, other) = (assessed(&base), assessed(&other));

        for room in &base.rooms {
            prop_assert_eq!(Some(room), other.rooms.iter().find(|found| found.key == room.key));
        }
        prop_assert_eq!(base.ranking, other.ranking);
    }
}
