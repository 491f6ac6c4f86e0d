use super::*;
use crate::assessment::simulation::{Event, Note, OpeningSeries, RoomSeries};
use crate::domain::{Key, Pointer};

fn key(text: &str) -> Key {
    Key::new(text).unwrap()
}

fn room(pressure_pa: [f64; 2]) -> RoomSeries {
    let flat = || vec![0.25, 0.25];
    RoomSeries {
        upper_temperature_c: vec![20.0, 123.456],
        lower_temperature_c: vec![20.0, 20.0],
        interface_height_m: flat(),
        pressure_pa: pressure_pa.to_vec(),
        upper_oxygen_mole_fraction: flat(),
        lower_oxygen_mole_fraction: flat(),
        upper_carbon_dioxide_mole_fraction: flat(),
        upper_carbon_monoxide_mole_fraction: vec![0.0, 1.234_56e-9],
        upper_water_mole_fraction: flat(),
        upper_unburned_fuel_mass_fraction: flat(),
        upper_soot_mass_fraction: flat(),
        ceiling_temperature_c: flat(),
        wall_temperature_c: flat(),
        floor_heat_flux_kw_m2: flat(),
        heat_release_kw: flat(),
    }
}

fn simulated() -> Simulated {
    let door = OpeningSeries {
        inflow_kg_s: vec![0.0, 0.5],
        outflow_kg_s: vec![0.0, 0.512_345],
        neutral_plane_m: vec![None, Some(1.0)],
        flame_heat_release_kw: vec![0.0, 0.0],
    };
    Simulated {
        time_s: vec![0.0, 12_345.5],
        rooms: vec![(key("z-first"), room([-0.0, -1.5])), (key("a-second"), room([0.0, 2.0]))],
        openings: vec![(key("door"), door)],
        events: vec![
            Event { at_s: 12_345.678_9, kind: EventKind::OpeningMoved, subject: key("door") },
            Event { at_s: 12_345.678_9, kind: EventKind::FireWentOut, subject: key("sofa") },
        ],
        mass_error_relative: 1.234_56e-12,
        energy_error_relative: 0.0,
        element_error_relative: 0.0,
        steps: 70,
        rejected: 2,
        notes: vec![Note {
            key: "sealed",
            pointer: Pointer::root().member("rooms").element(0),
            text: "x".to_owned(),
        }],
    }
}

#[test]
fn findings_have_four_digits_and_moments_are_kept() {
    let answer = serde_json::to_value(SimulationResult::of(&simulated())).unwrap();

    assert_eq!(answer["time_s"], serde_json::json!([0, 12345.5]));
    assert_eq!(answer["rooms"]["z-first"]["upper_temperature_c"], serde_json::json!([20, 123.5]));
    assert_eq!(answer["openings"]["door"]["outflow_kg_s"], serde_json::json!([0, 0.5123]));
    assert_eq!(answer["openings"]["door"]["neutral_plane_m"], serde_json::json!([null, 1]));
    assert_eq!(answer["events"][0]["at_s"], 12_345.679);
    assert_eq!(answer["balance"]["mass_error_relative"], 1.235e-12);
    assert_eq!(answer["solver"], serde_json::json!({ "steps": 70, "rejected": 2 }));
    assert_eq!(
        answer["notes"][1],
        serde_json::json!({ "key": "sealed", "pointer": "/rooms/0", "text": "x" })
    );
}

#[test]
fn every_run_says_that_it_is_for_planning() {
    let answer = serde_json::to_value(SimulationResult::of(&simulated())).unwrap();

    assert_eq!(answer["notes"][0]["key"], "planning_only");
    assert!(answer["notes"][0]["text"].as_str().unwrap().contains("local codes"));
}

#[test]
fn an_event_names_what_it_happened_to_and_nothing_else() {
    let answer = serde_json::to_value(SimulationResult::of(&simulated())).unwrap();

    assert_eq!(
        answer["events"][0],
        serde_json::json!({ "at_s": 12345.679, "kind": "opening_moved", "opening": "door", "fire": null, "detector": null, "sprinkler": null })
    );
    assert_eq!(
        (&answer["events"][1]["fire"], &answer["events"][1]["opening"]),
        (&serde_json::json!("sofa"), &serde_json::Value::Null)
    );
}

#[test]
fn parts_keep_the_order_of_the_request() {
    let text = serde_json::to_string(&SimulationResult::of(&simulated())).unwrap();

    assert!(text.find("z-first").unwrap() < text.find("a-second").unwrap());
}

#[test]
fn a_table_has_a_line_for_each_time_and_a_column_for_each_series() {
    let table = csv(&SimulationResult::of(&simulated()));

    let lines: Vec<&str> = table.strip_suffix("\r\n").unwrap().split("\r\n").collect();
    assert_eq!(lines.len(), 3);
    let header: Vec<&str> = lines[0].split(',').collect();
    assert_eq!(header.len(), 1 + 2 * 15 + 4);
    assert_eq!(
        (header[0], header[1], header[16], header[31]),
        (
            "time_s",
            "rooms.z-first.upper_temperature_c",
            "rooms.a-second.upper_temperature_c",
            "openings.door.inflow_kg_s"
        )
    );
    let [first, last] = [1, 2].map(|line: usize| lines[line].split(',').collect::<Vec<_>>());
    assert_eq!((first.len(), last.len()), (header.len(), header.len()));
    let column = |name: &str| header.iter().position(|column| *column == name).unwrap();
    let pressure = column("rooms.z-first.pressure_pa");
    assert_eq!((first[pressure], last[pressure]), ("0", "-1.5"));
    let plane = column("openings.door.neutral_plane_m");
    assert_eq!((first[plane], last[plane]), ("", "1"));
    // No exponent: 1.235e-9.
    assert_eq!(last[column("rooms.z-first.upper_carbon_monoxide_mole_fraction")], "0.000000001235");
    assert_eq!(last[0], "12345.5");
}

#[test]
fn every_kind_of_event_has_a_subject() {
    use crate::domain::Word as _;
    for &kind in EventKind::EVERY {
        let told = event(&Event { at_s: 0.0, kind, subject: key("x") }).unwrap();

        let subjects = [told.opening, told.fire, told.detector, told.sprinkler];
        assert_eq!(subjects.into_iter().flatten().count(), 1, "{}", kind.word());
    }
}
