//! The building of the wire contract.

use serde_json::Value;

use crate::catalogue::Catalogue;
use crate::domain::BuildingId;
use crate::domain::time::Timestamp;
use crate::wire::{self, BuildingInput, Links, Meta};

const EXAMPLE: &str = r#"{
        "id": "0193f2a0-7c00-7000-8000-00000000abcd", "reference": "417-B", "revision": 7, "schema": 1,
        "name": "Harbour Row 12",
        "address": { "line": "Harbour Row 12", "place": "Eastmere", "postcode": "" },
        "location": { "longitude_deg": 0.1, "latitude_deg": 51.2 },
        "occupancy_group": "M", "construction_type": "III-B", "inspected_on": "2026-11-03", "notes": "",
        "floors": [ { "floor": -1, "name": "Basement", "elevation_m": -2.8 } ],
        "response": { "detection_s": null, "call_s": 60, "processing_s": 60, "turnout_s": 80,
                      "travel_s": 240, "setup_s": 120 },
        "water": { "available_l_min": 4000 }, "alarm": { "monitored": false },
        "sprinklers": { "state": "none", "coverage": null },
        "occupants": { "day": 40, "night": 0, "asleep": false, "need_help": 0 },
        "preplan": {
            "key_box": null, "alarm_panel": null, "alarm_code": null, "bars": null, "gas_shutoff": null,
            "electricity_shutoff": null, "water_shutoff": null, "hydrants": null, "standpipes": null,
            "access": null, "roof": null, "notes": null, "contacts": [] },
        "rooms": [ {
            "key": "store", "name": "Store room", "kind": "room", "use": "storage", "floor": -1,
            "length_m": 3.66, "width_m": 3.6, "area_m2": null, "perimeter_m": null, "height_m": 2.4,
            "plan": { "x_m": 0, "y_m": 0, "turn_deg": 0 }, "ceiling": { "form": "flat", "high_m": null },
            "leakage_class": "average", "leakage_area_m2": null,
            "mechanical": { "supply_m3_s": 0, "extract_m3_s": 0, "stops_on_alarm": true },
            "linings": {
                "walls": { "material": "gypsum_board", "thickness_m": 0.0127, "reaction_to_fire": null },
                "ceiling": { "material": "concrete", "thickness_m": null, "reaction_to_fire": null },
                "floor": { "material": "concrete", "thickness_m": null, "reaction_to_fire": null } },
            "fuel_load_mj_m2": 600,
            "fuel_packages": [ { "key": "sofa", "item": "upholstered_sofa", "count": 1, "mass_kg": 45,
                                 "base_height_m": 0.1, "place": "wall", "spacing_m": null } ],
            "storage": null, "hazards": [ "not_recorded" ],
            "detectors": [ { "key": "s1", "class": "smoke_point", "below_ceiling_m": 0.03, "from_fire_m": 3 } ],
            "sprinkler_heads": null,
            "basis": { "length_m": "measured", "fuel_load_mj_m2": "estimated" } } ],
        "openings": [ {
            "key": "d", "name": "Store door", "kind": "door", "connects": ["store", "outside"],
            "width_m": 0.9, "height_m": 2, "sill_m": 0, "open_fraction": 0, "held_open": false,
            "self_closing": true, "fire_rating_min": null, "leakage_area_m2": null, "swing": "in",
            "entry": true, "side": "A", "azimuth_deg": 180, "glazing": null,
            "basis": { "width_m": "measured" } } ],
        "boundaries": [],
        "created_at": "2026-12-01T09:15:00.123Z", "updated_at": "2026-12-01T09:15:00.123Z",
        "updated_by": "local",
        "links": { "self": "/v1/buildings/0193f2a0-7c00-7000-8000-00000000abcd", "latest_assessment": null }
}"#;

/// The example of the contract, every member.
pub fn example() -> Value {
    serde_json::from_str(EXAMPLE).unwrap()
}

pub fn meta() -> Meta {
    let id = BuildingId::parse("0193f2a0-7c00-7000-8000-00000000abcd").unwrap();
    let at = Timestamp::parse("2026-12-01T09:15:00.123Z").unwrap();
    Meta {
        id,
        revision: 7,
        created_at: at,
        updated_at: at,
        updated_by: "local".to_owned(),
        links: Links::of(id, false),
    }
}

#[test]
fn the_building_of_the_contract_comes_back_as_it_went_in() {
    let bytes = serde_json::to_vec(&example()).unwrap();

    let building = wire::read::<BuildingInput>(&bytes, Catalogue::embedded()).unwrap();
    let answer = serde_json::to_value(wire::Building::of(&building, &meta())).unwrap();

    assert_eq!(answer, example());
}

#[test]
fn what_is_kept_is_read_back_whole() {
    let bytes = serde_json::to_vec(&example()).unwrap();
    let building = wire::read::<BuildingInput>(&bytes, Catalogue::embedded()).unwrap();

    let text = wire::stored::to_text(&building);

    let back = wire::stored::from_text(&text, wire::stored::SCHEMA, Catalogue::embedded());
    assert_eq!(back.unwrap(), building);
}
