//! What one input does to the findings, other inputs held.

use proptest::prelude::*;

use super::super::findings::{FlashoverRating, LimitedBy};
use super::super::rules::flashover_severity;
use super::super::testing::{board, building, lined, opening, q, room};
use super::{assessed, first, scenario};
use crate::domain::Building;
use crate::domain::assumptions::Scenario;
use crate::domain::opening::OpeningKind::{Door, DoubleDoor};
use crate::domain::room::Linings;

/// A living room of 4 × 4 × 2.4 m that stands open to outside by an opening 2 m high.
fn living_open(width_m: f64) -> Building {
    let way = opening("way", DoubleDoor, ["lounge", "outside"], [width_m, 2.0], 1.0);
    building(vec![room("lounge", "living", [4.0, 4.0, 2.4])], vec![way])
}

#[test]
fn while_fuel_limits_a_smaller_opening_needs_less_heat_and_brings_flashover_sooner() {
    // 250 kW/m² on 16 m² are 4000 kW; by hand 1500·w·2·√2 exceeds that from w = 0.943 m on.
    let widths_m = [3.6, 3.0, 2.4, 1.8, 1.4, 1.1];
    let found: Vec<_> = widths_m
        .iter()
        .map(|&width_m| scenario(&first(&living_open(width_m)), Scenario::AsFound).clone())
        .collect();

    for pair in found.windows(2) {
        let (wider, narrower) = (&pair[0], &pair[1]);
        assert_eq!(narrower.limited_by, Some(LimitedBy::Fuel));
        assert!(narrower.required_highest_kw < wider.required_highest_kw);
        assert!(narrower.time_s.unwrap().typical < wider.time_s.unwrap().typical);
    }
}

#[test]
fn below_the_ventilation_limit_a_smaller_opening_takes_flashover_away_and_starves_the_fire() {
    // By hand: A = 1500 x, R = 7.8·(2·16 + 4·4·2.4 - A_o) + 378 x with x = A_o √2 (the rule of Thomas asks for
    // most there). With A_o = 0.3434 m²: 1500·0.4856 = 728.4 kW, 7.8·70.057 + 378·0.4856 = 730.0 kW: the width
    // at which it turns is 0.172 m.
    let above = first(&living_open(0.19));
    let below = first(&living_open(0.155));
    let (above, below) = (scenario(&above, Scenario::AsFound), scenario(&below, Scenario::AsFound));

    assert_eq!(above.rating, FlashoverRating::Likely);
    assert_eq!(below.rating, FlashoverRating::Possible);
    assert_eq!(above.limited_by, Some(LimitedBy::Ventilation));
    assert!(above.starved.is_none() && below.starved.is_some());
}

#[test]
fn an_opening_small_enough_leaves_no_flashover_but_a_starved_fire() {
    // 0.015 · 2 m² are less than 0.001 m²/m³ · 38.4 m³: a crack, and the oxygen decides.
    let found = first(&living_open(0.015));
    let found = scenario(&found, Scenario::AsFound);

    assert_eq!(found.rating, FlashoverRating::NotIndicated);
    assert!(found.starved.is_some());
}

#[test]
fn a_better_insulating_lining_brings_flashover_sooner() {
    let times: Vec<f64> = [lined("concrete"), lined("gypsum_board"), lined("mineral_wool")]
        .into_iter()
        .map(|linings| lounge_lined(linings, 1.8))
        .collect();

    assert!(times.is_sorted_by(|a, b| a > b), "{times:?}");
}

fn lounge_lined(linings: Linings, width_m: f64) -> f64 {
    let mut lounge = living_open(width_m);
    lounge.rooms[0].linings = linings;
    scenario(&first(&lounge), Scenario::AsFound).time_s.unwrap().typical
}

#[test]
fn shutting_the_door_never_lets_smoke_reach_the_corridor_sooner() {
    for room_use in ["living", "storage", "bathroom", "archive", "stage"] {
        let rooms =
            vec![room("origin", room_use, [4.0, 3.0, 2.5]), room("hall", "corridor", [9.0, 2.0, 2.5])];
        let door = opening("door", Door, ["origin", "hall"], [0.9, 2.0], 1.0);
        let findings = assessed(&building(rooms, vec![door]));
        let next = &findings.rooms[0].smoke.next_door[0];

        let open_s = next.time_open_s.unwrap_or(f64::INFINITY);
        let shut_s = next.time_shut_s.unwrap_or(f64::INFINITY);
        assert!(shut_s >= open_s, "{room_use}: open {open_s}, shut {shut_s}");
    }
}

/// Rating as it weighs between scenarios, and time; later than anything where there is none.
fn rated(building: &Building) -> (u8, f64) {
    let found = first(building).flashover;
    (flashover_severity(found.rating), found.time_s.map_or(f64::INFINITY, |band| band.typical))
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(64))]

    #[test]
    fn more_fuel_never_lowers_a_flashover_rating_nor_lengthens_the_time(
        load in 1.0..3000.0_f64, more in 1.0..3.0_f64, width_m in 0.05..3.9_f64, height_m in 0.5..2.3_f64,
        length_m in 2.0..8.0_f64, linings in prop::sample::select(vec!["gypsum_board", "concrete", "brick", "timber"]),
    ) {
        let with = |load_mj_m2: f64| {
            let mut origin = room("origin", "office", [length_m, 4.0, 2.4]);
            origin.fuel_load_mj_m2 = Some(q(load_mj_m2));
            origin.linings = lined(linings);
            let way = opening("way", DoubleDoor, ["origin", "outside"], [width_m, height_m], 1.0);
            rated(&building(vec![origin], vec![way]))
        };
        let (less, more) = (with(load), with(load * more));

        prop_assert!(more.0 >= less.0, "{less:?} {more:?}");
        // A time is only told from "possible" on; where both tell one, more fuel never lengthens it.
        // (0.02 s: the tolerance of the search.)
        prop_assert!(more.1 <= less.1 + 0.02, "{less:?} {more:?}");
    }

    #[test]
    fn a_lining_that_takes_less_heat_never_lengthens_the_time(
        share in 0.3..3.0_f64, less in 0.3..0.99_f64, width_m in 1.0..3.5_f64,
    ) {
        let slower = lounge_lined(board(share), width_m);
        let sooner = lounge_lined(board(share * less), width_m);

        prop_assert!(sooner <= slower + 0.02, "{sooner} {slower}");
    }
}
