//! One whole report each, so that a change of form shows as a whole. The findings are made up by
//! hand: nothing here depends on the physics.

use super::super::{building_report, room_report, sample, table};
use crate::assessment::findings::{Direction, FlashoverRating, HoldsWhile, RoomFindings};
use crate::domain::Assumptions;

fn landing() -> RoomFindings {
    let mut landing = sample::room("landing");
    landing.flashover.rating = FlashoverRating::NotIndicated;
    landing.flashover.time_s = None;
    landing.flashover.before_water = None;
    landing.flashover.holds_while = vec![HoldsWhile {
        field: "fuel_load_mj_m2",
        value: Some(419.96),
        now: 100.0,
        direction: Direction::Below,
        words: "Holds while the fire load stays below 420 MJ/m²; now 100.".to_owned(),
    }];
    landing.flashover.reason = sample::reason("not_reached", "not_reached: no criterion of flashover is met");
    landing
}

#[test]
fn a_building_as_a_table_and_a_room_as_json() {
    let rooms = vec![sample::room("store"), landing()];
    let building = sample::building(&rooms);
    let assumptions = Assumptions::default();
    let report = building_report(&sample::findings(rooms), &sample::head(&building, &assumptions));

    let mut room = room_report(&report, "landing").unwrap();
    room.rules.truncate(1);

    insta::assert_snapshot!("building_table", table(&report));
    insta::assert_snapshot!("room_report", serde_json::to_string_pretty(&room).unwrap());
}
