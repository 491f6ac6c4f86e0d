//! Rules between parts, on both sides of each limit.

use serde_json::{Value, json};

use crate::catalogue::Catalogue;
use crate::domain::edit::CannotRemove;
use crate::domain::{Building, Key};
use crate::wire::{BuildingInput, OpeningInput, Refused, RoomInput, read_value};

/// Two rooms of different size on one floor, and one upstairs.
fn building(openings: Value) -> Value {
    json!({
        "name": "Rules",
        "floors": [{ "floor": 0, "elevation_m": 0 }, { "floor": 1, "elevation_m": 3 }],
        "rooms": [
            { "key": "hall", "use": "lobby", "length_m": 6, "width_m": 4, "height_m": 3 },
            { "key": "closet", "use": "storage", "length_m": 1.5, "width_m": 1, "height_m": 2.2 },
            { "key": "shed", "use": "storage", "length_m": 3, "width_m": 3, "height_m": 2,
              "ceiling": { "form": "sloped", "high_m": 3.5 } },
            { "key": "round", "use": "stage", "area_m2": 12, "perimeter_m": 13, "height_m": 3 },
            { "key": "stair", "use": "stair", "kind": "stair", "length_m": 5, "width_m": 2.5, "height_m": 8 },
            { "key": "upper", "use": "bedroom", "floor": 1, "length_m": 4, "width_m": 3, "height_m": 2.5 },
            { "key": "loft", "use": "storage", "floor": 2, "length_m": 4, "width_m": 3, "height_m": 2.5 },
        ],
        "openings": openings,
    })
}

fn told(value: &Value) -> Vec<String> {
    match read_value::<BuildingInput>(value, Catalogue::embedded()) {
        Ok(_) => Vec::new(),
        Err(Refused::Invalid(faults)) => {
            faults.iter().map(|fault| format!("{} {}", fault.pointer, fault.code)).collect()
        }
        Err(Refused::Unreadable(fault)) => panic!("a value is always readable: {fault:?}"),
    }
}

#[test]
fn openings_must_fit_the_walls_and_ceilings_of_both_rooms() {
    const WIDE: &str = "/openings/0/width_m wider_than_wall";
    const TALL: &str = "/openings/0/height_m above_ceiling";
    for (from, to, width, height, sill, expected) in [
        ("hall", "outside", 6.0, 3.0, 0.0, None),
        ("hall", "outside", 6.001, 3.0, 0.0, Some(WIDE)),
        ("hall", "outside", 1.0, 2.0, 1.0, None),
        ("hall", "outside", 1.0, 2.0, 1.001, Some(TALL)),
        // The smaller of two rooms decides, whichever is named first.
        ("hall", "closet", 1.5, 2.2, 0.0, None),
        ("hall", "closet", 1.6, 2.0, 0.0, Some(WIDE)),
        ("closet", "hall", 1.0, 2.3, 0.0, Some(TALL)),
        // Under a sloped ceiling its highest point counts.
        ("shed", "outside", 1.0, 3.5, 0.0, None),
        ("shed", "outside", 1.0, 3.6, 0.0, Some(TALL)),
        // Of a free shape: half the way round is the longest wall it could have.
        ("round", "outside", 6.5, 2.0, 0.0, None),
        ("round", "outside", 6.6, 2.0, 0.0, Some(WIDE)),
        // A door at the landing, 3 m up the stair, stands on the floor of the upper room.
        ("stair", "upper", 1.0, 2.1, 3.0, None),
        ("stair", "upper", 1.0, 2.1, 3.4, None),
        ("stair", "upper", 1.0, 2.1, 3.5, Some(TALL)),
        // Where nothing says how high the floor lies, the opening must still fit somewhere.
        ("stair", "loft", 1.0, 2.1, 5.5, None),
        ("stair", "loft", 1.0, 2.6, 5.0, Some(TALL)),
    ] {
        let opening = json!({ "key": "d", "kind": "door", "connects": [from, to], "width_m": width, "height_m": height, "sill_m": sill });
        let expected: Vec<String> = expected.into_iter().map(str::to_owned).collect();
        assert_eq!(told(&building(json!([opening]))), expected, "{from} {to} {width} {height} {sill}");
    }
}

#[test]
fn feet_and_metres_that_mean_the_same_fit() {
    let mut value = building(json!([
        { "key": "d", "kind": "gap", "connects": ["hall", "outside"], "width_m": "19 ft 8.2204724409448815 in", "height_m": "118.11023622047244 in" },
    ]));
    assert_eq!(told(&value), Vec::<String>::new());
    // 20 ft is 6.096 m.
    value["rooms"][0]["length_m"] = json!("20 ft");
    value["openings"][0]["width_m"] = json!("240 in");
    assert_eq!(told(&value), Vec::<String>::new());
}

#[test]
fn hatches_must_fit_the_floors_of_both_rooms() {
    const LARGE: &str = "/openings/0/width_m larger_than_floor";
    for (kind, from, to, width, height, expected) in [
        ("hatch", "hall", "upper", 3.0, 4.0, None),
        ("hatch", "hall", "upper", 3.1, 4.0, Some(LARGE)),
        ("hatch", "closet", "upper", 1.0, 1.5, None),
        ("hatch", "closet", "upper", 1.1, 1.1, Some(LARGE)),
        ("roof_vent", "hall", "outside", 6.0, 4.0, None),
        ("roof_vent", "hall", "outside", 6.0, 4.1, Some(LARGE)),
        ("roof_vent", "round", "outside", 4.0, 3.0, None),
        ("roof_vent", "round", "outside", 4.0, 3.1, Some(LARGE)),
        // The height of the room does not bound a side that lies flat.
        ("roof_vent", "hall", "outside", 3.9, 5.0, None),
    ] {
        let opening =
            json!({ "key": "d", "kind": kind, "connects": [from, to], "width_m": width, "height_m": height });
        let expected: Vec<String> = expected.into_iter().map(str::to_owned).collect();
        assert_eq!(told(&building(json!([opening]))), expected, "{kind} {from} {to} {width} {height}");
    }
}

#[test]
fn names_are_the_only_ones_of_their_list() {
    let mut value = building(json!([]));
    let again = value["rooms"][0].clone();
    value["rooms"].as_array_mut().unwrap().push(again);
    value["rooms"][1]["fuel_packages"] = json!([
        { "key": "a", "item": "bed" }, { "key": "b", "item": "bed" }, { "key": "a", "item": "bed" },
    ]);
    // Another room may use the same names.
    value["rooms"][2]["fuel_packages"] = json!([{ "key": "a", "item": "bed" }]);
    value["rooms"][2]["detectors"] =
        json!([{ "key": "a", "class": "smoke_point" }, { "key": "a", "class": "smoke_point" }]);

    assert_eq!(
        told(&value),
        [
            "/rooms/1/fuel_packages/2/key duplicate",
            "/rooms/2/detectors/1/key duplicate",
            "/rooms/7/key duplicate"
        ]
    );
}

fn lawful() -> Building {
    let value = building(json!([
        { "key": "front", "kind": "door", "connects": ["hall", "outside"], "width_m": 0.9, "height_m": 2.1 },
        { "key": "inner", "kind": "door", "connects": ["closet", "hall"], "width_m": 0.8, "height_m": 2 },
    ]));
    read_value::<BuildingInput>(&value, Catalogue::embedded()).unwrap()
}

#[test]
fn a_room_that_is_put_is_held_against_the_openings_that_join_it() {
    let building = lawful();
    let lower = json!({ "key": "hall", "use": "lobby", "length_m": 6, "width_m": 4, "height_m": 2.05 });
    let room = read_value::<RoomInput>(&lower, Catalogue::embedded()).unwrap();

    let faults = building.with_room(room).unwrap_err();

    assert_eq!(faults.len(), 1);
    assert_eq!((faults[0].pointer.as_str(), faults[0].code), ("", "above_ceiling"));
    assert!(faults[0].detail.starts_with("opening `front`: "), "{}", faults[0].detail);
}

#[test]
fn an_opening_that_is_put_is_told_its_own_faults_by_its_own_members() {
    let building = lawful();
    let wide =
        json!({ "key": "new", "kind": "door", "connects": ["closet", "halk"], "width_m": 2, "height_m": 2 });
    let opening = read_value::<OpeningInput>(&wide, Catalogue::embedded()).unwrap();

    let faults = building.with_opening(opening).unwrap_err();

    let told: Vec<_> = faults.iter().map(|fault| format!("{} {}", fault.pointer, fault.code)).collect();
    assert_eq!(told, ["/connects/1 unknown_room", "/width_m wider_than_wall"]);
    assert_eq!(faults[0].suggestion.as_deref(), Some("hall"));
}

#[test]
fn a_room_that_openings_join_is_not_taken_away() {
    let building = lawful();
    let key = |text: &str| Key::new(text).unwrap();

    assert_eq!(
        building.without_room(&key("hall")),
        Err(CannotRemove::Joined { openings: vec![key("front"), key("inner")], boundaries: vec![] })
    );
    assert_eq!(building.without_room(&key("cellar")), Err(CannotRemove::Missing));
    let without = building.without_opening(&key("inner")).unwrap().without_room(&key("closet")).unwrap();
    assert_eq!(without.room(&key("closet")), None);
    assert_eq!(without.rooms.len(), building.rooms.len() - 1);
}
