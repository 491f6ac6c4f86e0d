//! What goes out comes in again unchanged, for any lawful building.

use proptest::prelude::*;
use serde_json::Value;

use super::arbitrary;
use crate::catalogue::Catalogue;
use crate::domain::check;
use crate::wire::stored::{SCHEMA, from_text, to_text};
use crate::wire::{self, BuildingInput, OpeningInput, RoomInput, merge_patch};

use super::contract::meta;

proptest! {
    #![proptest_config(ProptestConfig { cases: 128, failure_persistence: None, ..ProptestConfig::default() })]

    #[test]
    fn a_building_that_was_answered_can_be_sent_back_as_it_came(building in arbitrary::building()) {
        prop_assert_eq!(check::faults(&building), vec![]);

        let answer = serde_json::to_vec(&wire::Building::of(&building, &meta())).unwrap();
        let back = wire::read::<BuildingInput>(&answer, Catalogue::embedded());

        prop_assert_eq!(back, Ok(building));
    }

    #[test]
    fn a_building_that_is_kept_is_read_back_equal_and_written_the_same(building in arbitrary::building()) {
        let text = to_text(&building);
        let back = from_text(&text, SCHEMA, Catalogue::embedded()).unwrap();

        prop_assert_eq!(to_text(&back), text);
        prop_assert_eq!(back, building);
    }

    #[test]
    fn parts_come_back_and_fit_where_they_were(building in arbitrary::building()) {
        for room in &building.rooms {
            let sent = serde_json::to_vec(&wire::Room::of(room)).unwrap();
            let back = wire::read_part::<RoomInput>(&sent, &room.key, Catalogue::embedded()).unwrap();
            prop_assert_eq!(building.with_room(back), Ok(building.clone()));
        }
        for opening in &building.openings {
            let sent = serde_json::to_vec(&wire::Opening::of(opening)).unwrap();
            let back = wire::read_part::<OpeningInput>(&sent, &opening.key, Catalogue::embedded()).unwrap();
            prop_assert_eq!(building.with_opening(back), Ok(building.clone()));
        }
    }

    #[test]
    fn an_empty_patch_changes_nothing(building in arbitrary::building()) {
        let mut answer = serde_json::to_value(wire::Building::of(&building, &meta())).unwrap();
        merge_patch(&mut answer, &Value::Object(serde_json::Map::new()));

        let back = wire::read_value::<BuildingInput>(&answer, Catalogue::embedded());

        prop_assert_eq!(back, Ok(building));
    }

    /// Whatever is done to a body, it is read or refused with faults, and nothing panics.
    #[test]
    fn a_spoilt_body_is_read_or_refused(
        building in arbitrary::building(),
        at in any::<prop::sample::Index>(),
        spoilt in prop_oneof![
            Just(Value::Null), Just(Value::Bool(true)), Just(serde_json::json!(-1e300)), Just(serde_json::json!("x")),
            Just(serde_json::json!([])), Just(serde_json::json!({})), Just(serde_json::json!([[[]]])),
        ],
    ) {
        let mut answer = serde_json::to_value(wire::Building::of(&building, &meta())).unwrap();
        let mut pointers = Vec::new();
        collect(&answer, String::new(), &mut pointers);
        let pointer = &pointers[at.index(pointers.len())];
        *answer.pointer_mut(pointer).unwrap() = spoilt;

        if let Err(refused) = wire::read_value::<BuildingInput>(&answer, Catalogue::embedded()) {
            let wire::Refused::Invalid(faults) = refused else { panic!("a value is always readable") };
            prop_assert!(!faults.is_empty());
            for fault in faults {
                let parent = fault.pointer.as_str().rsplit_once('/').map_or("", |(parent, _)| parent);
                prop_assert!(answer.pointer(parent).is_some(), "{} leads nowhere", fault.pointer);
            }
        }
    }

    /// A building that is put together elsewhere is held to the same rules as one that is read.
    #[test]
    fn the_reader_finds_what_the_domain_finds(
        mut building in arbitrary::building(),
        at in any::<prop::sample::Index>(),
        what in 0_u8..7,
    ) {
        spoil(&mut building, at, what);
        let pairs = |faults: Vec<crate::domain::Invalid>| {
            let mut pairs: Vec<_> =
                faults.into_iter().map(|fault| (fault.pointer.to_string(), fault.code, fault.detail)).collect();
            pairs.sort();
            pairs
        };

        let found = pairs(check::faults(&building));
        let answer = serde_json::to_value(wire::Building::of(&building, &meta())).unwrap();
        let told = match wire::read_value::<BuildingInput>(&answer, Catalogue::embedded()) {
            Ok(_) => Vec::new(),
            Err(wire::Refused::Invalid(faults)) => pairs(faults),
            Err(wire::Refused::Unreadable(fault)) => panic!("a value is always readable: {fault:?}"),
        };

        prop_assert_eq!(told, found);
    }

    /// Nor does anything panic on bytes that are no body at all.
    #[test]
    fn any_bytes_are_read_or_refused(bytes in proptest::collection::vec(any::<u8>(), 0..200)) {
        let refused = wire::read::<BuildingInput>(&bytes, Catalogue::embedded());
        prop_assert!(refused.is_err());
    }
}

/// Breaks one rule, where there is something to break and the room is not too large for it.
fn spoil(building: &mut crate::domain::Building, at: prop::sample::Index, what: u8) {
    use crate::domain::{Quantity, check};

    let rooms = building.rooms.len();
    if rooms == 0 {
        return;
    }
    let twin = building.rooms[at.index(rooms)].clone();
    let room = &mut building.rooms[at.index(rooms)];
    match what {
        0 => room.height_m = Quantity::new(0.5).unwrap(),
        1 => building.rooms.push(twin),
        2 => room.ceiling.high_m = Quantity::new(1.0),
        3 => _ = building.rooms.remove(at.index(rooms)),
        _ if building.openings.is_empty() => {}
        _ => {
            let openings = building.openings.len();
            let opening = &mut building.openings[at.index(openings)];
            match what {
                4 => opening.width_m = Quantity::new(100.0).unwrap(),
                5 => opening.height_m = Quantity::new(50.0).unwrap(),
                _ => {
                    opening.connects[1] = opening.connects[0].clone();
                    assert!(!check::faults(building).is_empty());
                }
            }
        }
    }
}

fn collect(value: &Value, at: String, into: &mut Vec<String>) {
    match value {
        Value::Array(items) => {
            for (index, item) in items.iter().enumerate() {
                collect(item, format!("{at}/{index}"), into);
            }
        }
        Value::Object(members) => {
            for (name, member) in members {
                collect(member, format!("{at}/{}", name.replace('~', "~0").replace('/', "~1")), into);
            }
        }
        _ => {}
    }
    into.push(at);
}

#[test]
fn texts_with_units_are_echoed_as_numbers() {
    let room = serde_json::json!({
        "key": "r", "use": "office", "length_m": "12 ft 6 in", "width_m": "36 in", "height_m": "8 ft",
        "fuel_load_mj_m2": "10 lb/ft2", "fuel_packages": [{ "key": "sofa", "item": "upholstered_sofa", "mass_kg": "100 lb" }],
    });

    let room = wire::read_value::<RoomInput>(&room, Catalogue::embedded()).unwrap();
    let answer = serde_json::to_value(wire::Room::of(&room)).unwrap();

    // By hand: 12.5 · 0.3048, 36 · 0.0254, 8 · 0.3048, 100 · 0.45359237.
    assert_eq!(answer["length_m"], 3.81);
    assert_eq!(answer["width_m"], 0.9144);
    assert_eq!(answer["height_m"], 2.4384);
    assert_eq!(answer["fuel_packages"][0]["mass_kg"], 45.359_237);
}

#[test]
fn a_patch_changes_what_it_names_and_null_takes_back() {
    let building =
        wire::read_value::<BuildingInput>(&super::contract::example(), Catalogue::embedded()).unwrap();
    let mut answer = serde_json::to_value(wire::Building::of(&building, &meta())).unwrap();

    merge_patch(
        &mut answer,
        &serde_json::json!({ "notes": "key at the harbour office", "location": null, "water": { "available_l_min": "500 gpm" } }),
    );
    let patched = wire::read_value::<BuildingInput>(&answer, Catalogue::embedded()).unwrap();

    assert_eq!(patched.notes, "key at the harbour office");
    assert_eq!(patched.location, None);
    assert_eq!(patched.water_available_l_min.map(crate::domain::Quantity::get), Some(1_892.705_892));
    assert_eq!(patched.rooms, building.rooms);
}

#[test]
fn a_kept_building_outlives_the_catalogue_key_that_it_names() {
    let building =
        wire::read_value::<BuildingInput>(&super::contract::example(), Catalogue::embedded()).unwrap();
    let text = to_text(&building).replace("\"use\":\"storage\"", "\"use\":\"a_use_of_former_days\"");

    let back = from_text(&text, SCHEMA, Catalogue::embedded()).unwrap();

    assert_eq!(back.rooms[0].room_use, crate::domain::Named::Catalogue("a_use_of_former_days".to_owned()));
    assert!(from_text(&text, SCHEMA + 1, Catalogue::embedded()).is_err());
    assert!(from_text("{", SCHEMA, Catalogue::embedded()).is_err());
}

#[test]
fn what_nobody_can_shut_stands_open_unless_said_otherwise() {
    for (kind, said, expected) in [
        ("gap", None, 1.0),
        ("vent", None, 1.0),
        ("vent", Some(0.2), 0.2),
        ("door", None, 0.0),
        ("window", None, 0.0),
        ("roof_vent", None, 0.0),
        ("door", Some(0.5), 0.5),
    ] {
        let opening = serde_json::json!({
            "key": "o", "kind": kind, "connects": ["r", "outside"], "width_m": 1, "height_m": 1, "open_fraction": said,
        });
        let opening = wire::read_value::<wire::OpeningInput>(&opening, Catalogue::embedded()).unwrap();
        assert_eq!(opening.open_fraction.get(), expected, "{kind}");
    }
}
