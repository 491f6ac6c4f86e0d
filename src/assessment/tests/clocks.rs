//! The two clocks.

use super::super::findings::{BeforeWater, DetectedBy, MilestoneKind};
use super::super::testing::{building, key, opening, q, room};
use super::{assessed_with, first};
use crate::domain::assumptions::Assumptions;
use crate::domain::building::Response;
use crate::domain::opening::OpeningKind::Door;
use crate::domain::room::Detector;
use crate::domain::{Building, Named};

fn store() -> Building {
    let door = opening("d", Door, ["store", "outside"], [0.9, 2.0], 1.0);
    building(vec![room("store", "storage", [3.66, 3.6, 2.4])], vec![door])
}

fn response(each_s: f64) -> Response {
    let span = Some(q(each_s));
    Response {
        detection_s: span,
        call_s: span,
        processing_s: span,
        turnout_s: span,
        travel_s: span,
        setup_s: span,
    }
}

#[test]
fn water_comes_after_detection_call_processing_turnout_travel_and_set_up() {
    let mut house = store();
    house.response = response(50.0);
    let clock = first(&house).clock;

    assert_eq!(clock.detected_by, DetectedBy::Given);
    assert_eq!(clock.call_s.typical, 100.0);
    assert_eq!(clock.water_on_fire_s.typical, 300.0);
}

#[test]
fn the_spans_of_the_assumptions_replace_the_buildings() {
    let mut house = store();
    house.response = response(50.0);
    let asked = Assumptions { response: response(10.0), ..Assumptions::default() };
    let clock = assessed_with(&house, &asked).rooms.remove(0).clock;

    assert_eq!(clock.water_on_fire_s.typical, 60.0);
}

#[test]
fn a_cellar_takes_longer_to_set_up_in() {
    let mut house = store();
    house.response = response(50.0);
    house.rooms[0].floor = -1;

    assert_eq!(first(&house).clock.water_on_fire_s.typical, 360.0);
}

#[test]
fn the_crew_clock_begins_at_the_call_and_has_no_time_before() {
    let mut house = store();
    house.response = response(50.0);
    let timeline = first(&house).timeline;

    let at = |kind| timeline.iter().find(|milestone| milestone.kind == kind).unwrap();
    assert_eq!(at(MilestoneKind::EstablishedBurning).crew_clock_s, None);
    assert_eq!(at(MilestoneKind::EstablishedBurning).fire_clock_s.typical, 0.0);
    assert_eq!(at(MilestoneKind::Call).crew_clock_s.unwrap().typical, 0.0);
    assert_eq!(at(MilestoneKind::WaterOnFire).crew_clock_s.unwrap().typical, 200.0);
    assert!(timeline.is_sorted_by_key(|milestone| milestone.fire_clock_s.typical));
}

#[test]
fn an_early_crew_comes_before_flashover_and_a_late_one_after() {
    let mut house = store();
    house.response = response(1.0);
    let early = first(&house).flashover;
    house.response = response(1000.0);
    let late = first(&house).flashover;

    assert_eq!((early.before_water, early.before_water_case), (Some(false), Some(BeforeWater::InNoCase)));
    assert_eq!((late.before_water, late.before_water_case), (Some(true), Some(BeforeWater::InEveryCase)));
}

#[test]
fn a_detector_that_somebody_hears_brings_water_sooner_than_smoke_seen_outside() {
    let mut house = store();
    let unseen = first(&house).clock;
    house.rooms[0].detectors.push(Detector {
        key: key("s1"),
        class: Named::Catalogue("smoke_point".to_owned()),
        below_ceiling_m: None,
        from_fire_m: Some(q(2.0)),
    });
    let unheard = first(&house).clock;
    house.alarm_monitored = Some(true);
    let heard = first(&house).clock;

    assert_eq!(unseen.detected_by, DetectedBy::SeenOutside);
    assert_eq!(unheard, unseen);
    assert_eq!(heard.detected_by, DetectedBy::Detector);
    assert!(heard.water_on_fire_s.typical < unseen.water_on_fire_s.typical);
}

#[test]
fn people_awake_by_day_do_not_narrow_the_night() {
    let mut house = store();
    house.occupants.day = Some(12);
    house.occupants.night = Some(0);
    let clock = first(&house).clock;

    assert_eq!(clock.detected_by, DetectedBy::Occupant);
    assert!(clock.detection_s.high >= 1800.0);
}
