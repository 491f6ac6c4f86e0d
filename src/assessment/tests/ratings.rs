//! Ratings worked by hand.

use super::super::findings::{BackdraftRating, FlashoverRating, LimitedBy, Provenance};
use super::super::testing::{building, key, lined, opening, q, room};
use super::{assessed, assessed_with, first, scenario};
use crate::domain::Assumptions;
use crate::domain::Building;
use crate::domain::assumptions::{GrowthClass, Scenario};
use crate::domain::opening::OpeningKind::{Door, Gap, Hatch};
use crate::domain::room::{FuelPackage, Place, RoomKind};
use crate::domain::{Named, Room};

/// The store room of the wire contract's example, its door standing open.
fn store(open: f64) -> Building {
    let door = opening("d", Door, ["store", "outside"], [0.9, 2.0], open);
    building(vec![room("store", "storage", [3.66, 3.6, 2.4])], vec![door])
}

#[test]
fn the_store_room_is_rated_as_by_hand() {
    let found = first(&store(1.0)).flashover;

    // By hand: A√H = 1.8·√2 = 2.54558; ventilation 1500·2.54558 = 3818.4 kW; fuel 500 kW/m² · 13.176 m² = 6588 kW.
    // A_T = 2·13.176 + 2.4·14.52 - 1.8 = 59.4 m²; Thomas 7.8·59.4 + 378·2.54558 = 1425.6; Babrauskas 1909.2 kW.
    // 3818.4/1909.2 = 2.0: expected.
    assert_eq!(found.rating, FlashoverRating::Expected);
    assert_eq!(found.limited_by, Some(LimitedBy::Ventilation));
    assert!((found.available_heat_release_kw.unwrap() - 3818.4).abs() < 0.1);
    assert!((found.required_heat_release_kw.unwrap() - 1909.2).abs() < 0.1);
    let thomas = found.figures.iter().find(|figure| figure.method == "thomas_flashover").unwrap();
    assert!((thomas.value - 1425.6).abs() < 0.1);
}

#[test]
fn every_correlation_has_its_figure_with_its_range() {
    let found = first(&store(1.0)).flashover;

    for method in ["babrauskas_flashover", "thomas_flashover", "mccaffrey_flashover"] {
        let figure = found.figures.iter().find(|figure| figure.method == method).unwrap();
        assert_eq!(figure.quantity, "required_heat_release_kw");
        assert_eq!(figure.in_range, figure.exceeded.is_empty());
    }
}

#[test]
fn the_required_heat_is_the_highest_figure_in_range() {
    for width_m in [0.3, 0.9, 1.8, 3.0] {
        let door = opening("d", Door, ["store", "outside"], [width_m, 2.0], 1.0);
        let found = first(&building(vec![room("store", "storage", [3.66, 3.6, 2.4])], vec![door])).flashover;

        let highest = found
            .figures
            .iter()
            .filter(|figure| figure.quantity == "required_heat_release_kw" && figure.in_range)
            .map(|figure| figure.value)
            .fold(0.0, f64::max);
        assert_eq!(found.required_heat_release_kw, Some(highest), "{width_m}");
    }
}

#[test]
fn what_comes_after_the_horizon_does_not_count() {
    let short = Assumptions { horizon_s: Some(q(60.0)), ..Assumptions::default() };
    let found = assessed_with(&store(1.0), &short).rooms.remove(0).flashover;

    // By hand: 60 s after established burning the fire has 0.04444 · (60 + √(20/0.04444))² = 293.1 kW.
    assert!((found.available_heat_release_kw.unwrap() - 293.1).abs() < 0.5);
    assert_eq!(found.rating, FlashoverRating::NotIndicated);
    assert_eq!(found.time_s, None);
}

#[test]
fn the_rating_is_the_worst_over_the_scenarios_and_names_it() {
    let room = first(&store(0.0));

    assert_eq!(scenario(&room, Scenario::AsFound).rating, FlashoverRating::NotIndicated);
    assert_eq!(room.flashover.rating, FlashoverRating::Expected);
    assert_eq!(room.flashover.scenario, Some(Scenario::DoorOpen));
}

#[test]
fn only_the_scenarios_asked_for_count() {
    let asked = Assumptions { scenarios: Some(vec![Scenario::Shut]), ..Assumptions::default() };
    let found = assessed_with(&store(0.0), &asked).rooms.remove(0);

    assert_eq!(found.scenarios.len(), 1);
    assert_eq!(found.flashover.rating, FlashoverRating::NotIndicated);
    assert_eq!(found.flashover.limited_by, Some(LimitedBy::Oxygen));
}

#[test]
fn a_room_joined_to_nothing_is_assessed_shut_and_asks_for_its_openings() {
    let found = first(&building(vec![room("cell", "storage", [3.0, 3.0, 2.4])], Vec::new()));

    assert!(found.wanted.iter().any(|wanted| wanted.key == "openings"));
    assert_eq!(found.flashover.rating, FlashoverRating::NotIndicated);
    assert!(found.flashover.provisional_because.iter().any(|because| because == "openings"));
    assert!(found.flashover.figures.iter().any(|figure| figure.method == "oxygen_budget"));
}

#[test]
fn not_indicated_travels_with_what_would_change_it_and_what_was_not_computed() {
    let found = first(&building(vec![room("cell", "storage", [3.0, 3.0, 2.4])], Vec::new()));

    let nearest = &found.flashover.holds_while[0];
    assert_eq!(nearest.field, "openings.open_area_m2");
    assert!(nearest.value.unwrap() > nearest.now);
    assert!(!found.flashover.not_covered.is_empty());
    // The value found does change it: an opening a little larger, 2 m high, in the same room.
    let gap = opening("gap", Gap, ["cell", "outside"], [nearest.value.unwrap() * 1.05 / 2.0, 2.0], 1.0);
    let opened = first(&building(vec![room("cell", "storage", [3.0, 3.0, 2.4])], vec![gap]));
    assert_ne!(opened.flashover.rating, FlashoverRating::NotIndicated);
}

#[test]
fn an_almost_empty_room_holds_while_its_fire_load_stays_so() {
    let mut bare = room("bare", "office", [4.0, 4.0, 2.4]);
    bare.fuel_load_mj_m2 = Some(q(3.0));
    let door = opening("d", Door, ["bare", "outside"], [0.9, 2.0], 1.0);
    let found = first(&building(vec![bare.clone()], vec![door.clone()]));
    assert_eq!(found.flashover.rating, FlashoverRating::NotIndicated);
    let load = found.flashover.holds_while.iter().find(|h| h.field == "fuel_load_mj_m2").unwrap();

    bare.fuel_load_mj_m2 = Some(q(load.value.unwrap() * 1.02));
    let fuller = first(&building(vec![bare], vec![door]));

    assert_ne!(fuller.flashover.rating, FlashoverRating::NotIndicated);
}

#[test]
fn large_tall_and_long_spaces_are_not_rated_for_flashover() {
    let mut stair = room("stair", "stair", [4.0, 3.0, 5.0]);
    stair.kind = RoomKind::Stair;
    let rooms = vec![
        room("hall", "warehouse", [20.0, 16.0, 5.0]),
        room("tower", "office", [5.0, 5.0, 6.1]),
        room("passage", "corridor", [12.0, 1.5, 2.4]),
        stair,
        room("plain", "office", [5.0, 5.0, 3.0]),
    ];
    let findings = assessed(&building(rooms, Vec::new()));

    for large in &findings.rooms[..4] {
        assert_eq!(large.flashover.rating, FlashoverRating::NotAssessed, "{}", large.key);
        assert_eq!(large.flashover.reason.as_ref().unwrap().key, "large_space");
        assert!(large.large_space.is_some());
    }
    assert!(findings.rooms[4].large_space.is_none());
}

#[test]
fn the_flame_in_a_large_space_is_that_of_heskestad() {
    let mut hall = room("hall", "office", [30.0, 20.0, 5.0]);
    hall.fuel_load_mj_m2 = Some(q(400.0));
    let mut hall = building(vec![hall], Vec::new());
    hall.response.detection_s = Some(q(100.0));
    for span in [
        &mut hall.response.call_s,
        &mut hall.response.processing_s,
        &mut hall.response.turnout_s,
        &mut hall.response.travel_s,
        &mut hall.response.setup_s,
    ] {
        *span = Some(q(100.0));
    }
    let large = first(&hall).large_space.unwrap();

    // By hand: water after 600 s; burning is established after √(20/0.01111) = 42.43 s; 0.01111·642.43² = 4585.2 kW;
    // on 4585.2/250 = 18.341 m², D = 4.8324 m; 0.235·4585.2^0.4 - 1.02·4.8324 = 6.848 - 4.929 = 1.92 m.
    assert!((large.flame_height_m - 1.92).abs() < 0.02, "{}", large.flame_height_m);
    assert!(!large.flame_reaches_ceiling);
}

#[test]
fn an_open_hatch_alone_is_not_assessed_rather_than_called_shut() {
    let hatch = opening("h", Hatch, ["cellar", "outside"], [1.0, 1.0], 1.0);
    let found = first(&building(vec![room("cellar", "storage", [4.0, 4.0, 2.4])], vec![hatch]));

    assert_eq!(found.flashover.rating, FlashoverRating::NotAssessed);
    assert_eq!(found.flashover.reason.unwrap().key, "horizontal_openings_only");
}

#[test]
fn entry_needs_a_deeper_level_and_says_so() {
    let found = first(&store(0.0)).entry;

    assert_eq!(found.rating, FlashoverRating::NotAssessed);
    assert_eq!(found.reason.unwrap().text, "needs level transient");
    assert_eq!(found.openings_tried, vec![key("d")]);
}

#[test]
fn the_strip_runs_from_slow_to_ultra_fast_and_never_slows_flashover() {
    let strip = first(&store(1.0)).growth_strip;

    let classes: Vec<_> = strip.iter().map(|step| step.growth).collect();
    assert_eq!(classes, [GrowthClass::Slow, GrowthClass::Medium, GrowthClass::Fast, GrowthClass::UltraFast]);
    assert!(strip.is_sorted_by(|a, b| a.time_s.unwrap() > b.time_s.unwrap()));
}

#[test]
fn every_room_has_the_strip() {
    let findings = assessed(&building(
        vec![room("hall", "warehouse", [30.0, 20.0, 9.0]), room("cell", "storage", [2.0, 2.0, 2.4])],
        Vec::new(),
    ));

    assert!(findings.rooms.iter().all(|room| room.growth_strip.len() == 4));
}

fn package(name: &str, item: &str, spacing_m: f64) -> FuelPackage {
    FuelPackage {
        key: key(name),
        item: Named::Catalogue(item.to_owned()),
        count: 1,
        mass_kg: None,
        base_height_m: q(0.0),
        place: Place::Wall,
        spacing_m: Some(q(spacing_m)),
    }
}

fn furnished(packages: Vec<FuelPackage>) -> Room {
    Room { fuel_packages: packages, ..room("lounge", "living", [4.0, 4.0, 2.4]) }
}

#[test]
fn the_fire_begins_in_the_fastest_item_and_others_join_by_radiation() {
    let near = package("desk", "curtains", 0.3);
    let far = package("shelf", "bookshelf", 30.0);
    let sofa = package("sofa", "upholstered_sofa", 0.3);
    let found = first(&building(vec![furnished(vec![near, far, sofa])], Vec::new())).fire;

    assert_eq!(found.item_of_origin, Some(key("sofa")));
    assert_eq!(found.growth_from, "item");
    let joined: Vec<_> = found.joined.iter().map(|joined| joined.key.as_str()).collect();
    assert_eq!(joined, ["desk"]);
}

#[test]
fn the_item_asked_for_is_the_item_of_origin() {
    let packages = vec![package("shelf", "bookshelf", 1.0), package("sofa", "upholstered_sofa", 1.0)];
    let asked = Assumptions { item_of_origin: Some(key("shelf")), ..Assumptions::default() };
    let found = assessed_with(&building(vec![furnished(packages)], Vec::new()), &asked).rooms.remove(0);

    assert_eq!(found.fire.item_of_origin, Some(key("shelf")));
}

#[test]
fn a_burning_lining_sets_the_growth() {
    for (material, expected_kw_s2) in [("timber", 0.04444), ("fibreboard", 0.17778), ("concrete", 0.01111)] {
        let mut office = room("office", "office", [4.0, 4.0, 2.4]);
        office.linings = lined(material);
        let found = first(&building(vec![office], Vec::new())).fire;

        assert!((found.growth_kw_s2 - expected_kw_s2).abs() < 1e-9, "{material}: {}", found.growth_kw_s2);
    }
}

#[test]
fn what_nobody_recorded_is_listed_with_its_source() {
    let found = first(&store(1.0));

    let load = found.assumptions.iter().find(|assumed| assumed.field == "fuel_load_mj_m2").unwrap();
    assert_eq!(load.provenance, Provenance::Memory);
    assert!(load.source.contains("CIB W14"));
    for field in ["linings.walls.thickness_m", "growth_kw_s2", "leakage_area_m2", "response.travel_s"] {
        assert!(found.assumptions.iter().any(|assumed| assumed.field == field), "{field}");
    }
}

#[test]
fn what_is_recorded_is_not_listed_as_assumed() {
    let mut recorded = store(1.0);
    recorded.rooms[0].fuel_load_mj_m2 = Some(q(600.0));
    recorded.rooms[0].leakage_area_m2 = Some(q(0.01));
    let found = first(&recorded);

    for field in ["fuel_load_mj_m2", "leakage_area_m2"] {
        assert!(found.assumptions.iter().all(|assumed| assumed.field != field), "{field}");
    }
}

#[test]
fn a_shut_room_with_hardly_any_fuel_shows_no_backdraft_and_one_with_much_cannot_be_excluded() {
    let with = |load_mj_m2: f64| {
        let mut origin = room("origin", "office", [4.0, 4.0, 2.4]);
        origin.fuel_load_mj_m2 = Some(q(load_mj_m2));
        origin.linings = lined("timber");
        let door = opening("d", Door, ["origin", "outside"], [0.9, 2.0], 0.0);
        first(&building(vec![origin], vec![door])).backdraft
    };

    let (bare, full) = (with(2.0), with(800.0));

    assert_eq!(bare.rating, BackdraftRating::NotIndicated);
    assert!(!bare.holds_while.is_empty());
    assert_eq!(full.rating, BackdraftRating::CannotBeExcluded);
}

#[test]
fn rooms_are_ranked_worst_first_and_not_assessed_stands_with_the_worst() {
    let rooms = vec![
        room("cell", "bathroom", [2.0, 2.0, 2.4]),
        room("hall", "warehouse", [30.0, 20.0, 9.0]),
        room("store", "storage", [3.66, 3.6, 2.4]),
    ];
    let door = opening("d", Door, ["store", "outside"], [0.9, 2.0], 0.0);
    let findings = assessed(&building(rooms, vec![door]));

    let order: Vec<_> = findings.ranking.iter().map(|ranked| ranked.room.as_str()).collect();
    assert_eq!(order, ["store", "hall", "cell"]);
    assert_eq!(findings.ranking[0].place, 1);
}
