//! Claims about the transient level.

use super::super::findings::{BuildingFindings, FlashoverRating, RoomFindings, TransientFinding};
use super::super::testing::{building, key, lined, opening, q, room};
use super::assessed_with;
use crate::domain::assumptions::{Level, Scenario};
use crate::domain::opening::OpeningKind::{Door, Gap, Window};
use crate::domain::{Assumptions, Building};

fn run(building: &Building) -> BuildingFindings {
    assessed_with(building, &Assumptions { level: Some(Level::Transient), ..Assumptions::default() })
}

fn of<'f>(found: &'f BuildingFindings, name: &str) -> (&'f RoomFindings, &'f TransientFinding) {
    let room = found.rooms.iter().find(|room| room.key == key(name)).unwrap();
    (room, room.transient.as_ref().unwrap_or_else(|| panic!("{name}: {:?}", room.flashover.reason)))
}

/// A furnished room with its door open to outside.
fn den() -> Building {
    let den = room("den", "living", [4.0, 3.0, 2.4]);
    building(vec![den], vec![opening("d", Door, ["den", "outside"], [0.9, 2.0], 1.0)])
}

/// A bedroom off a corridor.
fn flat() -> Building {
    let rooms = vec![room("bed", "bedroom", [3.5, 3.0, 2.4]), room("hall", "corridor", [6.0, 1.5, 2.4])];
    let openings = vec![
        opening("a", Door, ["bed", "hall"], [0.9, 2.0], 1.0),
        opening("b", Door, ["hall", "outside"], [0.9, 2.0], 0.0),
        opening("w", Window, ["bed", "outside"], [1.2, 1.2], 0.0),
    ];
    building(rooms, openings)
}

#[test]
fn a_furnished_room_with_its_door_open_to_outside_is_expected_to_flash_over() {
    let found = run(&den());
    let (room, runs) = of(&found, "den");

    assert_eq!(found.level, Level::Transient);
    assert_eq!(room.flashover.rating, FlashoverRating::Expected);
    assert!(runs.corners.len() == 4 && runs.corners.iter().all(|corner| corner.flashover_s.is_some()));
    let time_s = room.flashover.time_s.unwrap();
    assert!(time_s.low < time_s.typical && time_s.typical < time_s.high, "{time_s:?}");
    let both =
        [room.flashover.time_to_600_c_s, room.flashover.time_to_20_kw_m2_s].map(|t| t.unwrap().typical);
    assert_eq!(time_s.typical, both[0].min(both[1]));
}

#[test]
fn a_bare_store_of_concrete_is_not_indicated_and_says_what_that_hangs_on() {
    let mut bare = room("bare", "corridor", [6.0, 4.0, 3.0]);
    bare.linings = lined("concrete");
    bare.fuel_load_mj_m2 = Some(q(10.0));
    let house = building(vec![bare], vec![opening("d", Door, ["bare", "outside"], [0.9, 2.0], 1.0)]);

    let found = run(&house);
    let (room, runs) = of(&found, "bare");

    assert_eq!(room.flashover.rating, FlashoverRating::NotIndicated, "{:?}", runs.runs);
    assert_eq!(room.flashover.time_s, None);
    assert!(!room.flashover.holds_while.is_empty() && !room.flashover.not_covered.is_empty());
}

#[test]
fn the_series_has_no_more_than_121_times_and_shows_a_layer_that_forms_and_descends() {
    let found = run(&den());
    let series = &of(&found, "den").1.series;

    assert!(series.len() <= 121 && series.len() > 100, "{}", series.len());
    assert!(series.is_sorted_by(|a, b| a.at_s < b.at_s) && series[0].at_s == 0.0);
    let lowest_m = series.iter().map(|point| point.layer_height_m).fold(f64::INFINITY, f64::min);
    assert!(series[0].layer_height_m > lowest_m + 0.5, "from {} to {lowest_m}", series[0].layer_height_m);
    assert!(series.iter().all(|point| point.oxygen_percent < 21.5 && point.upper_temperature_c < 2000.0));
}

#[test]
fn a_shut_room_is_pressed_outwards_while_its_fire_grows_and_sucked_in_when_it_starves() {
    let found = run(&flat());
    let (_, runs) = of(&found, "bed");
    let shut = runs.runs.iter().find(|run| run.scenario == Scenario::Shut).unwrap();

    assert!(shut.flame_out_s.is_some(), "{shut:?}");
    assert!(shut.peak_pressure_pa > 5.0 && shut.suction_pa < -1.0, "{shut:?}");
    assert!(shut.least_oxygen_percent < 16.0 && shut.peak_carbon_monoxide_ppm > 500.0, "{shut:?}");
    let peak = runs.peak_pressure_pa.unwrap();
    assert!(peak.low <= shut.peak_pressure_pa && peak.high >= shut.peak_pressure_pa);
}

#[test]
fn a_door_that_opens_into_the_shut_room_is_held_by_the_pressure_and_one_that_opens_out_by_the_suction() {
    let mut house = flat();
    house.openings[0].swing = Some(crate::domain::opening::Swing::In);
    let found = run(&house);
    let inwards = of(&found, "bed").1.doors[0].clone();
    // Seen from the corridor the same leaf opens outwards.
    let outwards = of(&found, "hall").1.doors.iter().find(|door| door.opening == key("a")).unwrap().clone();

    assert_eq!((inwards.swing, outwards.swing), (Some("in"), Some("out")));
    assert!(inwards.force_at_peak_n.typical > 0.0 && inwards.force_at_suction_n.typical < 0.0, "{inwards:?}");
    assert!(
        outwards.force_at_peak_n.typical < 0.0 && outwards.force_at_suction_n.typical > 0.0,
        "{outwards:?}"
    );
}

#[test]
fn smoke_of_an_open_bedroom_reaches_the_hall_and_its_way_out_is_lost() {
    let found = run(&flat());
    let (_, runs) = of(&found, "bed");

    assert_eq!(runs.reached.iter().map(|reached| &reached.room).collect::<Vec<_>>(), [&key("hall")]);
    let lost = |room: &str, posture: &str| {
        let found = runs
            .way_out
            .iter()
            .find(|way| way.room == key(room) && way.posture == posture && (way.dose - 0.3).abs() < 1e-9);
        found.and_then(|way| way.lost_s).map(|band| band.typical)
    };
    let (bed_s, hall_s) = (lost("bed", "standing").unwrap(), lost("hall", "standing").unwrap());
    assert!(bed_s < hall_s, "{bed_s} in the room of origin, {hall_s} in the hall");
    assert!(lost("bed", "crawling").unwrap() >= bed_s);
    // Somebody sleeps in a bedroom: the second line is told too.
    assert!(runs.way_out.iter().any(|way| (way.dose - 0.1).abs() < 1e-9));
    assert!(runs.not_covered.iter().any(|left_out| left_out.text.contains("facade")));
}

#[test]
fn every_class_of_crews_is_reached_in_its_order() {
    let found = run(&den());
    let crew = &of(&found, "den").1.crew;

    for scheme in ["donnelly", "foster_roberts", "utech"] {
        let at_s: Vec<f64> = crew
            .iter()
            .filter(|c| c.scheme == scheme)
            .filter_map(|c| c.reached_s)
            .map(|t| t.typical)
            .collect();
        assert!(at_s.len() >= 3 && at_s.is_sorted(), "{scheme} {at_s:?}");
    }
}

#[test]
fn a_door_shut_late_is_shut_at_400_degrees_and_once_more_after_flashover() {
    let found = run(&den());
    let (_, runs) = of(&found, "den");
    let late: Vec<_> = runs.runs.iter().filter(|run| run.scenario == Scenario::ShutLate).collect();
    let open = runs.runs.iter().find(|run| run.scenario == Scenario::DoorOpen).unwrap();

    assert_eq!(late.len(), 2, "{late:?}");
    assert_eq!(late[1].shut_at_s, Some(open.flashover_s.unwrap() + 60.0));
    assert!(late[0].shut_at_s < late[1].shut_at_s);
    // Shut at 400 °C it starves before it flashes over; a minute after flashover is too late.
    assert!(late[0].flashover_s.is_none() && late[1].flashover_s.is_some(), "{late:?}");
}

#[test]
fn rooms_far_off_count_as_one_and_the_answer_stays() {
    use super::super::transient::{Reach, trial};

    // A wing of twelve rooms along a corridor, joined by gaps, and the fire at its end.
    let mut rooms = vec![room("a00", "living", [4.0, 3.0, 2.4])];
    let mut openings = vec![opening("d00", Door, ["a00", "outside"], [0.9, 2.0], 1.0)];
    for number in 1..12 {
        let (before, name) = (format!("a{:02}", number - 1), format!("a{number:02}"));
        rooms.push(room(&name, "office", [4.0, 3.0, 2.4]));
        let kind = if number == 1 { Door } else { Gap };
        let open = if number == 1 { 0.0 } else { 1.0 };
        openings.push(opening(&format!("d{number:02}"), kind, [&before, &name], [0.9, 2.0], open));
    }
    let house = building(rooms, openings);

    let near = trial(&house, 0, Scenario::DoorOpen, Reach { cost: 3, rooms: 8 });
    let all = trial(&house, 0, Scenario::DoorOpen, Reach { cost: 99, rooms: 99 });

    assert!(near.made.rooms.len() < 6 && near.made.far.len() > 6, "{:?}", near.made.rooms);
    assert!(all.made.rooms.len() == 12 && all.made.far.is_empty());
    assert!(!near.course.far_stirred);
    let close = |a: Option<f64>, b: Option<f64>, what: &str| {
        let (a, b) = (a.unwrap(), b.unwrap());
        assert!((a - b).abs() < 1.0, "{what}: {a} against {b}");
    };
    close(near.course.layer_600_c_s, all.course.layer_600_c_s, "600 °C, s");
    close(near.course.floor_20_kw_m2_s, all.course.floor_20_kw_m2_s, "20 kW/m², s");
}

#[test]
fn the_same_building_gives_the_same_runs_however_it_is_numbered() {
    let base = flat();
    let mut other = base.clone();
    other.rooms.reverse();
    other.openings.reverse();

    let (base, other) = (run(&base), run(&other));

    for name in ["bed", "hall"] {
        let (one, two) = (of(&base, name).0, of(&other, name).0);
        assert_eq!(format!("{:?}", one.transient), format!("{:?}", two.transient), "{name}");
        assert_eq!(one.flashover.time_s, two.flashover.time_s);
    }
}

#[test]
fn each_room_has_its_place_beside_the_experiments() {
    let found = run(&den());
    let (room, runs) = of(&found, "den");

    assert_eq!(runs.place.len(), crate::fire::place::NUMBERS.len());
    let outside = runs.place.iter().any(|number| !number.inside);
    assert_eq!(outside, room.cautions.iter().any(|caution| caution.key == "beyond_validation"));
}

#[test]
fn a_hall_too_large_for_one_layer_is_assessed_only_if_its_run_gets_hot() {
    let mut hall = room("hall", "storage", [30.0, 20.0, 7.0]);
    hall.fuel_load_mj_m2 = Some(q(50.0));
    let house = building(vec![hall], vec![opening("d", Door, ["hall", "outside"], [0.9, 2.0], 1.0)]);

    let found = run(&house);
    let (room, runs) = of(&found, "hall");

    assert!(runs.runs.iter().all(|run| run.time_to_600_c_s.is_none()), "{:?}", runs.runs);
    assert_eq!(room.flashover.rating, FlashoverRating::NotAssessed);
    assert_eq!(room.flashover.reason.as_ref().unwrap().key, "large_space");
}

#[test]
fn screening_stays_what_it_was() {
    let asked = Assumptions { level: Some(Level::Screening), ..Assumptions::default() };
    let found = assessed_with(&den(), &asked);

    assert_eq!(found.level, Level::Screening);
    assert!(found.rooms[0].transient.is_none());
}
