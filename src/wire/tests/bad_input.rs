//! Bad input: what is wrong is told with its place and its kind, all of it at once.

use serde_json::{Value, json};

use super::contract::example;
use crate::catalogue::Catalogue;
use crate::domain::{Invalid, Key};
use crate::wire::{
    AssessInput, AssessmentRequest, AssumptionsInput, BuildingInput, Input, OpeningInput, Refused, RoomInput,
    read, read_part_value, read_value,
};

fn faults_of<T: Input>(value: &Value) -> Vec<Invalid> {
    match read_value::<T>(value, Catalogue::embedded()) {
        Ok(_) => Vec::new(),
        Err(Refused::Invalid(faults)) => faults,
        Err(Refused::Unreadable(fault)) => panic!("a value is always readable: {fault:?}"),
    }
}

/// Pointers and codes, in the order of the pointers.
fn told(faults: &[Invalid]) -> Vec<(String, &'static str)> {
    let mut told: Vec<_> = faults.iter().map(|fault| (fault.pointer.to_string(), fault.code)).collect();
    told.sort();
    told
}

fn with(pointer: &str, value: Value) -> Value {
    let mut building = example();
    *building.pointer_mut(pointer).unwrap_or_else(|| panic!("no {pointer} in the example")) = value;
    building
}

fn without(parent: &str, member: &str) -> Value {
    let mut building = example();
    building.pointer_mut(parent).unwrap().as_object_mut().unwrap().remove(member).unwrap();
    building
}

fn added(parent: &str, member: &str, value: Value) -> Value {
    let mut building = example();
    building.pointer_mut(parent).unwrap().as_object_mut().unwrap().insert(member.to_owned(), value);
    building
}

#[test]
fn each_bad_value_is_told_at_its_place() {
    for (pointer, value, code) in [
        // Zero, negative or absurd sizes.
        ("/rooms/0/length_m", json!(0), "out_of_range"),
        ("/rooms/0/length_m", json!(-3.66), "out_of_range"),
        ("/rooms/0/width_m", json!(1e9), "out_of_range"),
        ("/rooms/0/height_m", json!(0.0), "out_of_range"),
        ("/rooms/0/height_m", json!("-8 ft"), "out_of_range"),
        ("/openings/0/width_m", json!(0), "out_of_range"),
        ("/openings/0/open_fraction", json!(1.01), "out_of_range"),
        ("/rooms/0/fuel_load_mj_m2", json!(-1), "out_of_range"),
        ("/rooms/0/fuel_packages/0/count", json!(0), "out_of_range"),
        ("/rooms/0/fuel_packages/0/count", json!(10_001), "out_of_range"),
        ("/rooms/0/floor", json!(1_000_000_000_000_i64), "out_of_range"),
        ("/location/latitude_deg", json!(91), "out_of_range"),
        ("/response/travel_s", json!("2 days"), "bad_quantity"),
        ("/rooms/0/length_m", json!("12 parsecs"), "bad_quantity"),
        ("/rooms/0/length_m", json!("3.5"), "bad_quantity"),
        ("/rooms/0/length_m", json!("68 F"), "bad_quantity"),
        // Wrong types.
        ("/name", json!(12), "wrong_type"),
        ("/rooms", json!({}), "wrong_type"),
        ("/rooms/0", json!("store"), "wrong_type"),
        ("/rooms/0/height_m", json!([2.4]), "wrong_type"),
        ("/rooms/0/height_m", json!(null), "wrong_type"),
        ("/rooms/0/floor", json!(0.5), "wrong_type"),
        ("/openings/0/entry", json!("yes"), "wrong_type"),
        ("/rooms/0/linings/walls", json!("gypsum_board"), "wrong_type"),
        ("/rooms/0/use", json!(7), "wrong_type"),
        ("/openings/0/connects", json!("store"), "wrong_type"),
        ("/openings/0/connects", json!(["store"]), "wrong_length"),
        // Words and names.
        ("/rooms/0/kind", json!("corridoor"), "unknown_word"),
        ("/rooms/0/hazards/0", json!("lithium"), "unknown_word"),
        ("/openings/0/swing", json!("IN"), "unknown_word"),
        ("/rooms/0/use", json!("storeage"), "unknown_name"),
        ("/rooms/0/linings/ceiling/material", json!("concret"), "unknown_name"),
        ("/rooms/0/fuel_packages/0/item", json!("sofa"), "unknown_name"),
        ("/rooms/0/detectors/0/class", json!("smoke"), "unknown_name"),
        ("/rooms/0/leakage_class", json!("averge"), "unknown_name"),
        // Keys, texts, days.
        ("/openings/0/key", json!("Door 1"), "bad_key"),
        ("/openings/0/key", json!("outside"), "reserved"),
        ("/name", json!(""), "too_short"),
        ("/name", json!("n".repeat(201)), "too_long"),
        ("/name", json!("a\u{0}b"), "bad_text"),
        ("/notes", json!("n".repeat(10_001)), "too_long"),
        ("/occupancy_group", json!("S_1"), "bad_text"),
        ("/inspected_on", json!("2026-02-30"), "bad_day"),
        ("/inspected_on", json!("3 Nov 2026"), "bad_day"),
        // Members against each other.
        ("/openings/0/width_m", json!(3.67), "wider_than_wall"),
        ("/openings/0/height_m", json!(2.41), "above_ceiling"),
        ("/openings/0/connects", json!(["store", "store"]), "joins_itself"),
        ("/openings/0/connects", json!(["outside", "outside"]), "joins_itself"),
        ("/rooms/0/basis/length_m", json!("assumed"), "unknown_word"),
    ] {
        let faults = faults_of::<BuildingInput>(&with(pointer, value.clone()));

        assert_eq!(told(&faults), [(pointer.to_owned(), code)], "{pointer} = {value}");
    }
}

#[test]
fn faults_between_members_point_at_the_one_to_mend() {
    for (pointer, value, expected) in [
        ("/openings/0/connects", json!(["stroe", "outside"]), "/openings/0/connects/0 unknown_room"),
        ("/openings/0/connects", json!(["store", "Hall"]), "/openings/0/connects/1 bad_key"),
        ("/openings/0/sill_m", json!(0.5), "/openings/0/height_m above_ceiling"),
        ("/rooms/0/ceiling/high_m", json!(2.0), "/rooms/0/ceiling/high_m contradiction"),
        ("/rooms/0/hazards", json!(["none", "hoard"]), "/rooms/0/hazards/0 contradiction"),
        ("/rooms/0/hazards", json!(["hoard", "hoard"]), "/rooms/0/hazards/1 duplicate"),
        (
            "/rooms/0/fuel_packages/0/base_height_m",
            json!(2.5),
            "/rooms/0/fuel_packages/0/base_height_m above_ceiling",
        ),
        (
            "/rooms/0/storage",
            json!({ "commodity": "cardboard_cartons", "height_m": 3, "footprint_m2": 4 }),
            "/rooms/0/storage/height_m above_ceiling",
        ),
        (
            "/rooms/0/storage",
            json!({ "commodity": "cardboard_cartons", "height_m": 2, "footprint_m2": 14 }),
            "/rooms/0/storage/footprint_m2 larger_than_floor",
        ),
        (
            "/boundaries",
            json!([{ "key": "b", "between": ["store", "loft"] }]),
            "/boundaries/0/between/1 unknown_room",
        ),
        ("/floors", json!([{ "floor": 0 }, { "floor": 0 }]), "/floors/1/floor duplicate"),
        ("/rooms/0/basis", json!({ "lenght_m": "measured" }), "/rooms/0/basis/lenght_m unknown_member"),
    ] {
        let faults = faults_of::<BuildingInput>(&with(pointer, value.clone()));

        let told: Vec<String> =
            faults.iter().map(|fault| format!("{} {}", fault.pointer, fault.code)).collect();
        assert_eq!(told, [expected], "{pointer} = {value}");
    }
}

#[test]
fn absent_and_unknown_members_are_told() {
    for (parent, member) in [
        ("", "name"),
        ("/rooms/0", "key"),
        ("/rooms/0", "use"),
        ("/rooms/0", "height_m"),
        ("/rooms/0", "width_m"),
        ("/openings/0", "kind"),
        ("/openings/0", "connects"),
        ("/openings/0", "width_m"),
        ("/openings/0", "height_m"),
        ("/location", "latitude_deg"),
        ("/rooms/0/linings/walls", "material"),
        ("/rooms/0/detectors/0", "class"),
    ] {
        let faults = faults_of::<BuildingInput>(&without(parent, member));
        assert_eq!(told(&faults), [(format!("{parent}/{member}"), "missing")]);
    }

    for (parent, member, nearest) in [
        ("", "nmae", Some("name")),
        ("", "roms", Some("rooms")),
        ("/rooms/0", "heigth_m", Some("height_m")),
        ("/rooms/0", "id", None),
        ("/openings/0", "fire_rating", Some("fire_rating_min")),
        ("/preplan", "gas_shut_off", Some("gas_shutoff")),
    ] {
        let faults = faults_of::<BuildingInput>(&added(parent, member, json!(1)));
        assert_eq!(told(&faults), [(format!("{parent}/{member}"), "unknown_member")]);
        assert_eq!(faults[0].suggestion.as_deref(), nearest, "{member}");
    }
}

#[test]
fn the_size_of_a_floor_is_given_once_and_whole() {
    let room = |sizes: Value| {
        let mut room = json!({ "key": "r", "use": "office", "height_m": 2.4 });
        room.as_object_mut().unwrap().extend(sizes.as_object().unwrap().clone());
        room
    };
    for (sizes, expected) in [
        (json!({ "length_m": 4, "width_m": 3 }), None),
        (json!({ "area_m2": 12, "perimeter_m": 14 }), None),
        (json!({ "area_m2": "130 sq ft", "perimeter_m": "46 ft" }), None),
        (json!({}), Some(("/length_m", "missing"))),
        (json!({ "length_m": 4 }), Some(("/width_m", "missing"))),
        (json!({ "width_m": 3 }), Some(("/length_m", "missing"))),
        (json!({ "area_m2": 12 }), Some(("/perimeter_m", "missing"))),
        (json!({ "perimeter_m": 14 }), Some(("/area_m2", "missing"))),
        (json!({ "length_m": 4, "width_m": 3, "area_m2": 12 }), Some(("/area_m2", "contradiction"))),
        (json!({ "length_m": 4, "perimeter_m": 14 }), Some(("/perimeter_m", "contradiction"))),
        // By hand: a circle of 12 m² has a perimeter of 2 √(12 π) = 12.28 m.
        (json!({ "area_m2": 12, "perimeter_m": 12.27 }), Some(("/perimeter_m", "contradiction"))),
        (json!({ "area_m2": 12, "perimeter_m": 12.29 }), None),
    ] {
        let faults = faults_of::<RoomInput>(&room(sizes.clone()));
        let expected: Vec<_> = expected.into_iter().map(|(at, code)| (at.to_owned(), code)).collect();
        assert_eq!(told(&faults), expected, "{sizes}");
    }
}

#[test]
fn an_unknown_name_comes_with_the_nearest() {
    for (pointer, name, nearest) in [
        ("/rooms/0/use", "storeage", "storage"),
        ("/rooms/0/linings/walls/material", "gypsum-board", "gypsum_board"),
        ("/rooms/0/fuel_packages/0/item", "sofa", "upholstered_sofa"),
        ("/rooms/0/kind", "corridoor", "corridor"),
        ("/openings/0/kind", "doubledoor", "double_door"),
    ] {
        let faults = faults_of::<BuildingInput>(&with(pointer, json!(name)));
        assert_eq!(faults[0].suggestion.as_deref(), Some(nearest), "{name}");
    }
    let faults = faults_of::<BuildingInput>(&with("/openings/0/connects/0", json!("stor")));
    assert_eq!(faults[0].suggestion.as_deref(), Some("store"));
}

#[test]
fn all_faults_come_back_at_once_even_where_rooms_are_broken() {
    let mut building = example();
    building["name"] = json!(null);
    building["notse"] = json!("x");
    building["rooms"] = json!([
        { "key": "a", "use": "offce", "length_m": -1, "width_m": 3, "height_m": 2.4 },
        { "key": "b", "use": "office", "length_m": 4, "width_m": 3, "height_m": "tall" },
        { "key": "b", "use": "office", "length_m": 4, "width_m": 3, "height_m": 2.4, "hazards": ["none", "hoard"] },
    ]);
    building["openings"] = json!([
        { "key": "d", "kind": "door", "connects": ["a", "a"], "width_m": 0.9, "height_m": 2 },
        { "key": "e", "kind": "door", "connects": ["b", "outside"], "width_m": 5, "height_m": 3 },
        { "key": "f", "kind": "door", "connects": ["a", "cellar"], "width_m": 0.9, "height_m": 9 },
        { "key": "g", "kind": "dor", "connects": ["a", "b"] },
    ]);

    let faults = faults_of::<BuildingInput>(&building);

    let expected = [
        ("/name", "wrong_type"),
        ("/notse", "unknown_member"),
        ("/openings/0/connects", "joins_itself"),
        ("/openings/1/height_m", "above_ceiling"),
        ("/openings/1/width_m", "wider_than_wall"),
        ("/openings/2/connects/1", "unknown_room"),
        ("/openings/2/height_m", "above_ceiling"),
        ("/openings/3/height_m", "missing"),
        ("/openings/3/kind", "unknown_word"),
        ("/openings/3/width_m", "missing"),
        ("/rooms/0/length_m", "out_of_range"),
        ("/rooms/0/use", "unknown_name"),
        ("/rooms/1/height_m", "bad_quantity"),
        ("/rooms/2/hazards/0", "contradiction"),
        ("/rooms/2/key", "duplicate"),
    ];
    let told = told(&faults);
    let told: Vec<_> = told.iter().map(|(at, code)| (at.as_str(), *code)).collect();
    assert_eq!(told, expected);
}

#[test]
fn a_room_whose_key_is_broken_makes_no_opening_dangle() {
    let faults = faults_of::<BuildingInput>(&with("/rooms/0/key", json!("The Store")));

    assert_eq!(told(&faults), [("/rooms/0/key".to_owned(), "bad_key")]);
    assert_eq!(faults[0].suggestion.as_deref(), Some("the_store"));
}

#[test]
fn too_many_rooms_or_openings_are_refused_and_the_most_are_not() {
    let room = |at: usize| json!({ "key": format!("r{at}"), "use": "office", "length_m": 4, "width_m": 3, "height_m": 2.4 });
    let opening = |at: usize| json!({ "key": format!("d{at}"), "kind": "door", "connects": ["r0", "outside"], "width_m": 0.9, "height_m": 2 });
    let building = |rooms: usize, openings: usize| {
        json!({
            "name": "Large",
            "rooms": (0..rooms).map(room).collect::<Vec<_>>(),
            "openings": (0..openings).map(opening).collect::<Vec<_>>(),
        })
    };

    assert_eq!(told(&faults_of::<BuildingInput>(&building(500, 2000))), []);
    assert_eq!(
        told(&faults_of::<BuildingInput>(&building(501, 2001))),
        [("/openings".to_owned(), "too_many"), ("/rooms".to_owned(), "too_many")]
    );
}

#[test]
fn a_hostile_body_costs_little_and_answers_little() {
    let zeros = json!({ "name": "x", "rooms": vec![0; 1_000_000] });
    assert!(faults_of::<BuildingInput>(&zeros).len() <= 1001);

    let many: serde_json::Map<String, Value> = (0..200_000).map(|at| (format!("m{at}"), json!(1))).collect();
    let faults = faults_of::<BuildingInput>(&Value::Object(many));
    assert!(faults.len() <= 1001);
}

#[test]
fn a_room_without_any_way_in_is_no_fault() {
    let cell = json!({ "key": "cell", "use": "storage", "length_m": 4, "width_m": 3, "height_m": 2.4 });

    assert_eq!(told(&faults_of::<BuildingInput>(&json!({ "name": "Shut", "rooms": [cell] }))), []);
    assert_eq!(told(&faults_of::<BuildingInput>(&json!({ "name": "Empty" }))), []);
}

#[test]
fn a_part_takes_its_key_from_the_path() {
    let key = Key::new("store").unwrap();
    let room =
        |key: Value| json!({ "key": key, "use": "storage", "length_m": 4, "width_m": 3, "height_m": 2.4 });
    let read = |value: &Value| read_part_value::<RoomInput>(value, &key, Catalogue::embedded());

    let mut bare = room(json!(null));
    assert_eq!(read(&bare).unwrap().key, key);
    bare.as_object_mut().unwrap().remove("key");
    assert_eq!(read(&bare).unwrap().key, key);
    assert_eq!(read(&room(json!("store"))).unwrap().key, key);
    for (other, code) in
        [(json!("cellar"), "contradiction"), (json!("Not A Key"), "bad_key"), (json!(1), "wrong_type")]
    {
        let Err(Refused::Invalid(faults)) = read(&room(other.clone())) else { panic!("{other} was taken") };
        assert_eq!(told(&faults), [("/key".to_owned(), code)]);
    }
}

#[test]
fn a_part_alone_is_held_to_the_rules_of_parts() {
    let opening = |connects: Value, kind: &str| json!({ "key": "d", "kind": kind, "connects": connects, "width_m": 0.9, "height_m": 2 });

    assert_eq!(told(&faults_of::<OpeningInput>(&opening(json!(["a", "b"]), "door"))), []);
    assert_eq!(
        told(&faults_of::<OpeningInput>(&opening(json!(["a", "a"]), "door"))),
        [("/connects".to_owned(), "joins_itself")]
    );
    assert_eq!(
        told(&faults_of::<OpeningInput>(&opening(json!(["outside", "a"]), "roof_vent"))),
        [("/connects/0".to_owned(), "contradiction")]
    );
}

#[test]
fn properties_may_stand_in_place_of_a_name_and_are_held_to_their_limits() {
    let properties = json!({
        "fire_load_mean_mj_m2": "50 lb/ft2", "fire_load_p80_mj_m2": 5000, "fire_load_p95_mj_m2": 6000,
        "growth_kw_s2": 0.0469, "heat_release_per_area_kw_m2": "250 kW/m2", "fuel": "wood",
    });
    assert_eq!(told(&faults_of::<BuildingInput>(&with("/rooms/0/use", properties.clone()))), []);

    for (member, value, code) in [
        ("growth_kw_s2", json!(1e6), "out_of_range"),
        ("fire_load_p95_mj_m2", json!("fast"), "bad_quantity"),
        ("fuel", json!("wod"), "unknown_name"),
        ("sleeping", json!("no"), "wrong_type"),
    ] {
        let mut changed = properties.clone();
        changed[member] = value;
        let faults = faults_of::<BuildingInput>(&with("/rooms/0/use", changed));
        assert_eq!(told(&faults), [(format!("/rooms/0/use/{member}"), code)]);
    }
    let fuel = json!({
        "heat_of_combustion_mj_kg": 18, "chemical_heat_mj_kg": 13, "radiative_fraction": 0.3, "carbon": 1,
        "hydrogen": 1.7, "oxygen": 0.7, "nitrogen": 0, "chlorine": 0, "stoichiometric_air_kg_kg": 6,
    });
    let with_fuel = |member: &str, value: Value| {
        let mut changed = properties.clone();
        changed["fuel"] = fuel.clone();
        changed["fuel"][member] = value;
        told(&faults_of::<BuildingInput>(&with("/rooms/0/use", changed)))
    };
    assert_eq!(with_fuel("oxygen", json!(0.8)), []);
    assert_eq!(with_fuel("oxygen", json!(-1)), [("/rooms/0/use/fuel/oxygen".to_owned(), "out_of_range")]);
    assert_eq!(
        with_fuel("chemical_heat_mj_kg", json!(19)),
        [("/rooms/0/use/fuel/chemical_heat_mj_kg".to_owned(), "contradiction")]
    );
    let mut falling = properties.clone();
    falling["fire_load_p80_mj_m2"] = json!(100);
    let faults = faults_of::<BuildingInput>(&with("/rooms/0/use", falling));
    assert_eq!(told(&faults), [("/rooms/0/use/fire_load_mean_mj_m2".to_owned(), "contradiction")]);
}

#[test]
fn assumptions_are_held_to_their_words_and_limits() {
    assert_eq!(told(&faults_of::<AssumptionsInput>(&json!({}))), []);
    assert_eq!(
        told(&faults_of::<AssumptionsInput>(&json!({ "scenarios": [] }))),
        [("/scenarios".to_owned(), "too_short")]
    );
    let faults = faults_of::<AssumptionsInput>(&json!({
        "level": "screen", "scenarios": ["shut", "open", "shut"], "horizon_s": -1, "fuel_load_fractile": 2,
        "ambient": { "wind_m_s": "200 mph", "wind": 3 }, "response": { "turnout_s": "80 s" },
        "seed": -1, "entry_times_s": [60, "soon"],
    }));
    let told = told(&faults);
    let told: Vec<_> = told.iter().map(|(at, code)| (at.as_str(), *code)).collect();
    assert_eq!(
        told,
        [
            ("/ambient/wind", "unknown_member"),
            ("/ambient/wind_m_s", "out_of_range"),
            ("/entry_times_s/1", "bad_quantity"),
            ("/fuel_load_fractile", "out_of_range"),
            ("/horizon_s", "out_of_range"),
            ("/level", "unknown_word"),
            ("/scenarios/1", "unknown_word"),
            ("/scenarios/2", "duplicate"),
            ("/seed", "out_of_range"),
        ]
    );
}

#[test]
fn an_assessment_body_carries_its_parts_under_their_names() {
    let faults = faults_of::<AssessInput>(&json!({ "assumptions": { "level": "deep" }, "biulding": {} }));
    assert_eq!(
        told(&faults),
        [
            ("/assumptions/level".to_owned(), "unknown_word"),
            ("/biulding".to_owned(), "unknown_member"),
            ("/building".to_owned(), "missing"),
        ]
    );

    let mut building = example();
    building["rooms"][0]["height_m"] = json!(0);
    building["openings"][0]["connects"] = json!(["store", "store"]);
    let faults = faults_of::<AssessInput>(&json!({ "building": building }));
    assert_eq!(
        told(&faults),
        [
            ("/building/openings/0/connects".to_owned(), "joins_itself"),
            ("/building/rooms/0/height_m".to_owned(), "out_of_range"),
        ]
    );

    assert_eq!(told(&faults_of::<AssessmentRequest>(&json!({}))), []);
    assert_eq!(told(&faults_of::<AssessmentRequest>(&json!([]))), [(String::new(), "wrong_type")]);
}

#[test]
fn unreadable_bodies_are_told_from_faulty_ones() {
    for (body, unreadable) in [
        (&b"{\"name\": \"a\", \"name\": \"b\"}"[..], true),
        (b"{\"name\": 1e309}", true),
        (b"{\"name\": \"\xff\"}", true),
        (b"", true),
        (b"null", false),
        (b"[]", false),
        (b"\"name\"", false),
    ] {
        let refused = read::<BuildingInput>(body, Catalogue::embedded()).unwrap_err();
        assert_eq!(matches!(refused, Refused::Unreadable(_)), unreadable, "{refused:?}");
    }
}

#[test]
fn a_fault_says_what_to_do() {
    let faults = faults_of::<BuildingInput>(&with("/rooms/0/length_m", json!(3660)));

    assert_eq!(
        faults[0].detail,
        "must lie between 0.3 and 1000 m (from a riser cupboard to the longest hall), and is 3660 m"
    );
    assert!(faults[0].suggestion.as_deref().unwrap().contains("mm"), "{:?}", faults[0].suggestion);
}
