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

/// A burner in a room with an open door.
pub fn simulation() -> Value {
    json!({
        "rooms": [{
            "key": "burn", "length_m": 2.8, "width_m": 2.8, "height_m": 2.13, "floor_elevation_m": 0.0,
            "leakage_area_m2": 0.0, "leakage_split": { "low": 0.5, "high": 0.5 },
            "linings": {
                "walls": { "conductivity_w_mk": 0.14, "density_kg_m3": 240, "specific_heat_j_kgk": 1000, "thickness_m": 0.05 },
                "ceiling": { "material": "gypsum_board", "thickness_m": 0.0127 },
                "floor": { "material": "concrete", "thickness_m": 0.15 }
            }
        }],
        "openings": [{
            "key": "door", "kind": "door", "connects": ["burn", "outside"], "width_m": 0.74, "height_m": 1.83,
            "sill_m": 0.0, "open_fraction": 1.0, "leakage_area_m2": 0.0
        }],
        "ambient": {
            "temperature_c": 20, "indoor_temperature_c": null, "pressure_pa": 101_325,
            "oxygen_mass_fraction": 0.232, "wind_m_s": 0, "wind_from_deg": 0
        },
        "fires": [{
            "key": "burner", "room": "burn", "heat_release_kw": [[0, 62.9], [1800, 62.9]], "base_height_m": 0.0,
            "diameter_m": 0.3, "position": "centre", "radiative_fraction": 0.24, "fuel": "methane",
            "oxygen_limited": true, "ignites": { "at_s": 0 }
        }],
        "schedule": [{ "at_s": 600, "opening": "door", "open_fraction": 1.0 }],
        "fans": [], "detectors": [], "sprinklers": [],
        "duration_s": 1800, "output_interval_s": 10, "tolerance": null
    })
}
