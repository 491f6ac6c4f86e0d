//! The JSON against the wire contract.

use serde_json::Value;

use super::super::{Head, building_report, methods_document, room_report, room_report_bytes, sample};
use super::{banned, not_rounded, texts};
use crate::assessment::findings::RoomFindings;
use crate::domain::Assumptions;

fn bytes(rooms: Vec<RoomFindings>) -> Vec<u8> {
    let building = sample::building(&rooms);
    let assumptions = Assumptions::default();
    building_report(&sample::findings(rooms), &sample::head(&building, &assumptions)).to_json()
}

fn report() -> Vec<u8> {
    bytes(vec![sample::room("store"), sample::room("hall")])
}

fn value(bytes: &[u8]) -> Value {
    serde_json::from_slice(bytes).unwrap()
}

fn store() -> Value {
    value(&room_report_bytes(&report(), "store").unwrap().unwrap())
}

#[test]
fn the_same_findings_give_the_same_bytes() {
    assert_eq!(report(), report());
}

#[test]
fn a_room_report_has_every_member_that_the_contract_names() {
    let room = store();

    // Copied by hand from the wire contract.
    for (part, members) in [
        (
            &room,
            "assessment_id building_id building_revision engine_version catalogue_digest input_digest \
             rating_rule level seed created_at key name headline flashover backdraft entry timeline \
             assumptions methods cautions series links",
        ),
        (
            &room["flashover"],
            "rating probability time_s time_to_600_c_s time_to_20_kw_m2_s reason \
             required_heat_release_kw available_heat_release_kw limited_by scenario before_water \
             provisional holds_while not_covered figures",
        ),
        (&room["flashover"]["figures"][0], "method quantity value in_range exceeded unverified"),
        (
            &room["backdraft"],
            "rating probability outcome scenario opening dangerous_from_s dangerous_until_s \
             beyond_horizon ignition_delay_s peak_overpressure_pa pressure_band elements_failing \
             fireball_reach_m limited_by reason provisional holds_while not_covered figures",
        ),
        (
            &room["entry"],
            "rating probability scenario opening opened_at_s time_to_flashover_s time_to_260_c_s \
             time_to_10_kw_m2_s state_at_opening openings_tried reason provisional holds_while \
             not_covered figures",
        ),
        (&room["timeline"][0], "fire_clock_s crew_clock_s kind"),
        (&room["assumptions"][0], "room field value source provenance"),
        (&room["methods"][0], "key title source provenance"),
        (&room["cautions"][0], "key text"),
    ] {
        for member in members.split_whitespace() {
            assert!(part.get(member).is_some(), "{member} is missing");
        }
    }
}

#[test]
fn a_room_report_says_what_was_found() {
    let room = store();

    assert_eq!(room["assessment_id"], "01900000-0000-7000-8000-000000000001");
    assert_eq!(room["building_revision"], 7);
    assert_eq!(room["created_at"], "2026-12-01T09:15:00.123Z");
    assert_eq!(room["level"], "screening");
    assert_eq!(room["flashover"]["rating"], "likely");
    assert_eq!(
        room["flashover"]["time_s"],
        serde_json::json!({ "low": 250.4, "typical": 312, "high": 420.1 })
    );
    assert_eq!(room["flashover"]["required_heat_release_kw"], 1909);
    assert_eq!(room["flashover"]["scenario"], "door_open");
    assert_eq!(room["backdraft"]["outcome"], "not_assessed");
    assert_eq!(room["entry"]["reason"], "needs level transient");
    assert_eq!(room["timeline"][1]["crew_clock_s"], 0);
    assert_eq!(room["links"]["self"], "/v1/assessments/01900000-0000-7000-8000-000000000001/rooms/store");
}

#[test]
fn the_words_beside_a_rating_say_what_it_is_not() {
    let room = store();

    for finding in ["flashover", "backdraft", "entry"] {
        let text = room[finding]["rating_is"].as_str().unwrap();
        assert!(text.contains("established flaming fire") && text.contains("nobody fights it"));
        assert!(text.contains("not the chance of a fire"));
    }
}

#[test]
fn the_stored_report_gives_the_room_that_the_findings_gave() {
    let rooms = vec![sample::room("store"), sample::room("hall")];
    let building = sample::building(&rooms);
    let assumptions = Assumptions::default();
    let report = building_report(&sample::findings(rooms), &sample::head(&building, &assumptions));
    let stored = report.to_json();

    for key in ["store", "hall"] {
        let from_bytes = room_report_bytes(&stored, key).unwrap().unwrap();
        let from_report = serde_json::to_vec(&room_report(&report, key).unwrap()).unwrap();
        assert_eq!(String::from_utf8(from_bytes).unwrap(), String::from_utf8(from_report).unwrap());
    }
}

#[test]
fn a_room_that_is_not_in_the_report_is_none_and_bytes_that_are_no_report_are_an_error() {
    assert!(room_report_bytes(&report(), "cellar").unwrap().is_none());
    for broken in [&b"[]"[..], b"{", b"\xff", b"{\"rooms\":[{}]}", b"{\"rooms\":7}"] {
        assert!(room_report_bytes(broken, "store").is_err());
    }
}

#[test]
fn a_room_report_holds_what_the_building_said_once_for_all_rooms() {
    let room = store();

    let fields: Vec<&str> =
        room["assumptions"].as_array().unwrap().iter().map(|a| a["field"].as_str().unwrap()).collect();
    assert_eq!(fields, ["linings.walls.thickness_m", "response.travel_s"]);
    let methods: Vec<&str> =
        room["methods"].as_array().unwrap().iter().map(|m| m["key"].as_str().unwrap()).collect();
    assert_eq!(methods, ["babrauskas_flashover", "royer_nelson_fire_flow"]);
    let cautions: Vec<&str> =
        room["cautions"].as_array().unwrap().iter().map(|c| c["key"].as_str().unwrap()).collect();
    assert_eq!(cautions[..2], ["wind", "planning_only"]);
    assert_eq!(cautions.iter().filter(|key| **key == "planning_only").count(), 1);
}

#[test]
fn findings_have_four_significant_digits_and_inputs_are_echoed_exactly() {
    let room = store();

    not_rounded(&room, "", &mut |path, number| panic!("{path}: {number}"));
    assert_eq!(room["height_m"], 2.43845);
    assert_eq!(room["assumptions"][0]["value"], 0.012_700_1);
}

#[test]
fn a_figure_that_is_no_number_is_null() {
    assert_eq!(store()["flashover"]["figures"][1]["value"], Value::Null);
}

#[test]
fn nothing_a_report_says_reassures() {
    texts(&value(&report()), "", &mut |path, text| {
        assert_eq!(banned(text), None, "{path}: {text}");
    });
}

#[test]
fn nothing_a_method_says_of_itself_reassures() {
    let methods = serde_json::to_value(methods_document()).unwrap();

    texts(&methods, "", &mut |path, text| {
        // Titles of publications are quoted as they are.
        if !path.ends_with("/citation") {
            assert_eq!(banned(text), None, "{path}: {text}");
        }
    });
}

#[test]
fn nothing_kept_has_no_ids_and_leads_nowhere() {
    let rooms = vec![sample::room("store")];
    let building = sample::building(&rooms);
    let assumptions = Assumptions::default();
    let head = Head::unsaved(&building, &assumptions);

    let report = value(&building_report(&sample::findings(rooms), &head).to_json());

    for member in ["assessment_id", "building_id", "building_revision", "created_at"] {
        assert_eq!(report[member], Value::Null, "{member}");
    }
    assert_eq!(report["links"]["self"], Value::Null);
    assert_eq!(report["rooms"][0]["links"]["self"], Value::Null);
}

#[test]
fn the_building_ranks_its_rooms_and_sets_the_thirstiest_against_its_water() {
    let mut thirsty = sample::room("hall");
    thirsty.water.as_mut().unwrap().needed_l_min = 4321.99;
    let report = value(&bytes(vec![sample::room("store"), thirsty]));

    let ranked: Vec<&str> =
        report["ranking"].as_array().unwrap().iter().map(|place| place["room"].as_str().unwrap()).collect();
    assert_eq!(ranked, ["store", "hall"]);
    assert_eq!(report["water"]["room"], "hall");
    assert_eq!(report["water"]["needed_l_min"], 4322);
    assert_eq!(report["water"]["available_l_min"], 4000);
    assert_eq!(report["water"]["enough"], false);
}
