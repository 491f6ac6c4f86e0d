//! Buildings that the tests enter.

use serde_json::{Value, json};

/// The least that a building with a room and a door can say.
pub fn small() -> Value {
    json!({ "name": "Harbour Row 12", "rooms": [room("store")], "openings": [door("d", "store", "outside")] })
}

/// Small, with this reference.
pub fn with_reference(reference: &str) -> Value {
    let mut building = small();
    building["reference"] = reference.into();
    building
}

/// Two rooms, a door between them and one to the outside.
pub fn two_rooms() -> Value {
    json!({
        "name": "Two rooms",
        "rooms": [room("store"), room("shop")],
        "openings": [door("d", "store", "outside"), door("inner", "store", "shop")],
    })
}

pub fn room(key: &str) -> Value {
    json!({ "key": key, "use": "storage", "length_m": 3.66, "width_m": 3.6, "height_m": 2.4 })
}

pub fn door(key: &str, from: &str, to: &str) -> Value {
    json!({ "key": key, "kind": "door", "connects": [from, to], "width_m": 0.9, "height_m": 2.0 })
}

/// Every member filled in, as the wire contract prints it.
pub fn full() -> Value {
    serde_json::from_str(FULL).unwrap()
}

/// The run of the wire contract.
pub fn simulation() -> Value {
    serde_json::from_str(include_str!("simulation.json")).unwrap()
}

const FULL: &str = r#"{
        "reference": "417-B", "name": "Harbour Row 12",
        "address": { "line": "Harbour Row 12", "place": "Eastmere", "postcode": "" },
        "location": { "longitude_deg": 0.1, "latitude_deg": 51.2 },
        "occupancy_group": "M", "construction_type": "III-B", "inspected_on": "2026-11-03", "notes": "",
        "floors": [{ "floor": -1, "name": "Basement", "elevation_m": -2.8 }],
        "response": { "detection_s": null, "call_s": 60, "processing_s": 60, "turnout_s": 80, "travel_s": 240, "setup_s": 120 },
        "water": { "available_l_min": 4000 }, "alarm": { "monitored": false },
        "sprinklers": { "state": "none", "coverage": null },
        "occupants": { "day": 40, "night": 0, "asleep": false, "need_help": 0 }, "preplan": {},
        "rooms": [{
            "key": "store", "name": "Store room", "kind": "room", "use": "storage", "floor": -1,
            "length_m": 3.66, "width_m": 3.6, "height_m": 2.4,
            "plan": { "x_m": 0, "y_m": 0, "turn_deg": 0 }, "ceiling": { "form": "flat", "high_m": null },
            "leakage_class": "average", "leakage_area_m2": null,
            "mechanical": { "supply_m3_s": 0, "extract_m3_s": 0, "stops_on_alarm": true },
            "linings": {
                "walls": { "material": "gypsum_board", "thickness_m": 0.0127, "reaction_to_fire": null },
                "ceiling": { "material": "concrete" }, "floor": { "material": "concrete" }
            },
            "fuel_load_mj_m2": 600,
            "fuel_packages": [{ "key": "sofa", "item": "upholstered_sofa", "count": 1, "mass_kg": 45, "base_height_m": 0.1, "place": "wall", "spacing_m": null }],
            "storage": null, "hazards": ["not_recorded"],
            "detectors": [{ "key": "s1", "class": "smoke_point", "below_ceiling_m": 0.03, "from_fire_m": 3 }],
            "sprinkler_heads": null,
            "basis": { "length_m": "measured", "fuel_load_mj_m2": "estimated" }
        }],
        "openings": [{
            "key": "d", "name": "Store door", "kind": "door", "connects": ["store", "outside"],
            "width_m": 0.9, "height_m": 2.0, "sill_m": 0, "open_fraction": 0, "held_open": false,
            "self_closing": true, "fire_rating_min": null, "leakage_area_m2": null, "swing": "in",
            "entry": true, "side": "A", "azimuth_deg": 180, "glazing": null, "basis": { "width_m": "measured" }
        }],
        "boundaries": []
    }"#;

/// A report without what differs from one assessment to the next: ids and addresses.
pub fn findings(mut report: Value) -> Value {
    fn strip(value: &mut Value) {
        match value {
            Value::Array(items) => items.iter_mut().for_each(strip),
            Value::Object(members) => {
                members.retain(|name, _| {
                    !matches!(name.as_str(), "links" | "assessment_id" | "building_id" | "building_revision")
                });
                members.values_mut().for_each(strip);
            }
            _ => {}
        }
    }
    strip(&mut report);
    report
}

/// Sets the member at a JSON Pointer; the last name may be new, `-` appends.
#[track_caller]
pub fn set(mut document: Value, pointer: &str, value: Value) -> Value {
    let (parent, name) = pointer.rsplit_once('/').expect("a pointer to a member");
    match document.pointer_mut(parent).expect("the parent is there") {
        Value::Array(items) if name == "-" => items.push(value),
        Value::Array(items) => items[name.parse::<usize>().unwrap()] = value,
        parent => parent[name] = value,
    }
    document
}

/// Every pointer in a document, the root too.
pub fn pointers(document: &Value) -> Vec<String> {
    fn walk(value: &Value, at: &str, found: &mut Vec<String>) {
        found.push(at.to_owned());
        match value {
            Value::Array(items) => {
                for (index, item) in items.iter().enumerate() {
                    walk(item, &format!("{at}/{index}"), found);
                }
            }
            Value::Object(members) => {
                for (name, member) in members {
                    walk(member, &format!("{at}/{name}"), found);
                }
            }
            _ => {}
        }
    }
    let mut found = Vec::new();
    walk(document, "", &mut found);
    found
}
