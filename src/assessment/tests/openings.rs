//! What counts as an opening.

use super::super::findings::{FlashoverRating, LimitedBy};
use super::super::testing::{building, opening, room};
use super::{assessed, first, scenario};
use crate::domain::Building;
use crate::domain::assumptions::Scenario;
use crate::domain::opening::Glazing;
use crate::domain::opening::OpeningKind::{Door, Gap, Window};
use crate::domain::room::RoomKind;

/// A lounge behind a small hall whose outer door stands open by a share.
fn lounge_behind_hall(outer: f64) -> Building {
    let mut hall = room("hall", "corridor", [3.0, 1.5, 2.4]);
    hall.kind = RoomKind::Corridor;
    building(
        vec![room("lounge", "living", [4.0, 4.0, 2.4]), hall],
        vec![
            opening("inner", Door, ["lounge", "hall"], [0.9, 2.0], 1.0),
            opening("outer", Door, ["hall", "outside"], [0.9, 2.0], outer),
        ],
    )
}

#[test]
fn an_inner_door_admits_no_more_air_than_lies_behind_it() {
    let room = first(&lounge_behind_hall(0.0));
    let found = scenario(&room, Scenario::AsFound);

    // By hand: 10.8 m³ · 353/293.15 kg/m³ · (0.2315 - 0.15) · 13 100 = 13 884 kJ; (3·13 884/0.04444)^(1/3) = 97.87 s;
    // 0.04444 · 97.87² = 425.7 kW.
    assert_eq!(found.limited_by, Some(LimitedBy::Ventilation));
    assert!((found.available_kw.unwrap() - 425.7).abs() < 0.5, "{:?}", found.available_kw);
    assert_eq!(found.rating, FlashoverRating::NotIndicated);
}

#[test]
fn two_open_doors_in_a_row_admit_what_both_let_through() {
    let room = first(&lounge_behind_hall(1.0));
    let found = scenario(&room, Scenario::AsFound);

    // By hand: 1.8/√2 m² in a row, 1500 · 1.27279 · √2 = 2700 kW.
    assert!((found.available_kw.unwrap() - 2700.0).abs() < 1.0, "{:?}", found.available_kw);
}

#[test]
fn who_fled_has_opened_every_door_on_the_way_out() {
    let mut house = lounge_behind_hall(0.0);
    house.openings[0].open_fraction = super::super::testing::q(0.0);
    let room = first(&house);

    let open = scenario(&room, Scenario::DoorOpen);
    assert!((open.available_kw.unwrap() - 2700.0).abs() < 1.0, "{:?}", open.available_kw);
}

#[test]
fn more_open_area_further_on_never_admits_less_air() {
    let reached: Vec<f64> = [0.0, 0.01, 0.1, 0.3, 1.0]
        .iter()
        .map(|&outer| {
            let room = first(&lounge_behind_hall(outer));
            scenario(&room, Scenario::AsFound).available_kw.unwrap()
        })
        .collect();

    assert!(reached.is_sorted(), "{reached:?}");
}

#[test]
fn the_door_to_the_way_out_is_preferred_to_a_larger_one() {
    let mut hall = room("hall", "corridor", [3.0, 1.5, 2.4]);
    hall.kind = RoomKind::Corridor;
    let rooms =
        vec![room("lounge", "living", [4.0, 4.0, 2.4]), hall, room("store", "storage", [3.0, 3.0, 2.4])];
    let doors = vec![
        opening("big", Door, ["lounge", "store"], [2.0, 2.1], 0.0),
        opening("out", Door, ["lounge", "hall"], [0.8, 2.0], 0.0),
    ];
    let room = first(&building(rooms, doors));

    let open = scenario(&room, Scenario::DoorOpen);
    let states: Vec<_> =
        open.openings.iter().map(|state| (state.key.as_str(), state.open_fraction)).collect();
    assert_eq!(states, [("big", 0.0), ("out", 1.0)]);
}

#[test]
fn everything_shut_leaves_only_what_nobody_can_shut() {
    let gap = opening("gap", Gap, ["store", "outside"], [0.5, 2.0], 1.0);
    let door = opening("door", Door, ["store", "outside"], [0.9, 2.0], 1.0);
    let room = first(&building(vec![room("store", "storage", [3.66, 3.6, 2.4])], vec![gap, door]));

    assert!((scenario(&room, Scenario::Shut).opening_area_m2 - 1.0).abs() < 1e-9);
    assert!((scenario(&room, Scenario::AsFound).opening_area_m2 - 2.8).abs() < 1e-9);
}

/// A store room with its door open a hand's breadth and a large window.
fn store_with_window(glazing: Option<Glazing>) -> Building {
    let door = opening("door", Door, ["store", "outside"], [0.9, 2.0], 0.3);
    let mut window = opening("window", Window, ["store", "outside"], [1.5, 1.2], 0.0);
    window.glazing = glazing;
    building(vec![room("store", "storage", [3.66, 3.6, 2.4])], vec![door, window])
}

#[test]
fn glass_is_wall_until_it_falls_and_an_opening_then() {
    let room = first(&store_with_window(Some(Glazing::Float3Mm)));

    assert!((scenario(&room, Scenario::AsFound).opening_area_m2 - 0.54).abs() < 1e-9);
    assert!((scenario(&room, Scenario::WindowFails).opening_area_m2 - 2.34).abs() < 1e-9);
}

#[test]
fn flashover_that_waits_for_glass_has_its_own_band() {
    // Shut but for its window of thin glass and lined with wool, the room gets hot enough for the pane to fall.
    let mut house = store_with_window(Some(Glazing::Float3Mm));
    house.openings[0].open_fraction = super::super::testing::q(0.0);
    house.rooms[0].linings = super::super::testing::lined("ceramic_fibre");
    let room = first(&house);
    let found = scenario(&room, Scenario::WindowFails);

    let band = found.time_s.unwrap();
    assert!((found.opening_area_m2 - 1.8).abs() < 1e-9);
    assert!(band.low < band.typical && band.typical < band.high, "{band:?}");
}

#[test]
fn fire_resisting_glass_holds() {
    let room = first(&store_with_window(Some(Glazing::FireResisting)));
    let found = scenario(&room, Scenario::WindowFails);

    assert!((found.opening_area_m2 - 0.54).abs() < 1e-9);
    assert_eq!(found.reason.as_ref().unwrap().key, "glass_holds");
}

#[test]
fn an_opening_smaller_than_the_cracks_method_allows_counts_as_a_crack() {
    // 0.001 m²/m³ · 31.6 m³ = 0.0316 m².
    let vent = opening("gap", Gap, ["store", "outside"], [0.15, 0.2], 1.0);
    let room = first(&building(vec![room("store", "storage", [3.66, 3.6, 2.4])], vec![vent]));

    assert_eq!(scenario(&room, Scenario::AsFound).opening_area_m2, 0.0);
    assert_eq!(room.flashover.limited_by, Some(LimitedBy::Oxygen));
}

#[test]
fn rooms_behind_count_whichever_way_the_door_is_written_down() {
    let mut house = lounge_behind_hall(1.0);
    let as_written = assessed(&house);
    house.openings[0].connects.swap(0, 1);

    let turned = assessed(&house);

    assert_eq!(as_written.rooms, turned.rooms);
}
