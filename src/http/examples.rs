//! Bodies that the OpenAPI document shows; a test sends every one of them.

use serde_json::{Value, json};

/// A building with one room and one door.
pub fn building() -> Value {
    json!({
        "name": "Harbour Row 12",
        "reference": "417-B",
        "address": { "line": "Harbour Row 12", "place": "Eastmere", "postcode": "" },
        "response": { "call_s": 60, "processing_s": 60, "turnout_s": 80, "travel_s": 240, "setup_s": 120 },
        "water": { "available_l_min": 4000 },
        "rooms": [room()],
        "openings": [opening()]
    })
}

/// A change of a building.
pub fn building_patch() -> Value {
    json!({ "notes": "Key at the harbour office.", "inspected_on": "2026-11-03" })
}

/// A room, measured in feet and metres.
pub fn room() -> Value {
    json!({
        "key": "store",
        "name": "Store room",
        "use": "storage",
        "length_m": "12 ft",
        "width_m": 3.6,
        "height_m": 2.4,
        "linings": {
            "walls": { "material": "gypsum_board", "thickness_m": 0.0127 },
            "ceiling": { "material": "concrete" },
            "floor": { "material": "concrete" }
        },
        "fuel_load_mj_m2": 600,
        "hazards": ["not_recorded"],
        "basis": { "length_m": "measured", "width_m": "measured", "height_m": "measured" }
    })
}

/// A change of a room.
pub fn room_patch() -> Value {
    json!({ "fuel_load_mj_m2": 450, "basis": { "fuel_load_mj_m2": "estimated" } })
}

/// A door.
pub fn opening() -> Value {
    json!({
        "key": "d",
        "name": "Store door",
        "kind": "door",
        "connects": ["store", "outside"],
        "width_m": "36 in",
        "height_m": 2.0,
        "open_fraction": 0,
        "self_closing": false,
        "entry": true,
        "side": "A"
    })
}

/// A change of an opening.
pub fn opening_patch() -> Value {
    json!({ "self_closing": true })
}

/// What to assume of a building in the inventory.
pub fn assessment() -> Value {
    json!({ "assumptions": { "level": "screening", "fuel_load_fractile": 0.8 } })
}

/// A building that is only sent.
pub fn assess() -> Value {
    json!({ "building": building(), "assumptions": { "level": "screening" } })
}
