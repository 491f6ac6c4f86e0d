//! The form of a transient run: the example of the contract, and everything that can be wrong with it.

use serde_json::{Value, json};

use crate::catalogue::Catalogue;
use crate::domain::opening::Space;
use crate::domain::quantity::{Fraction, Span};
use crate::domain::simulation::{HeatRelease, Ignition, Simulation, Supply, Zoning};
use crate::domain::{Invalid, Key, Named};
use crate::wire::{Refused, SimulationInput, read_value};

const EXAMPLE: &str = include_str!("../../../tests/it/simulation.json");

fn example() -> Value {
    serde_json::from_str(EXAMPLE).unwrap()
}

fn read(value: &Value) -> Simulation {
    read_value::<SimulationInput>(value, Catalogue::embedded())
        .unwrap_or_else(|refused| panic!("{value}: {refused:?}"))
}

fn faults(value: &Value) -> Vec<Invalid> {
    match read_value::<SimulationInput>(value, Catalogue::embedded()) {
        Ok(_) => Vec::new(),
        Err(Refused::Invalid(faults)) => faults,
        Err(Refused::Unreadable(fault)) => panic!("a value is always readable: {fault:?}"),
    }
}

/// Places and kinds of the faults, in the order of the places.
fn told(value: &Value) -> Vec<String> {
    let mut told: Vec<_> =
        faults(value).iter().map(|fault| format!("{} {}", fault.pointer, fault.code)).collect();
    told.sort();
    told
}

/// The example with a member set; its parent must be there.
fn with(pointer: &str, value: Value) -> Value {
    let mut run = example();
    let (parent, name) = pointer.rsplit_once('/').unwrap();
    match run.pointer_mut(parent).unwrap_or_else(|| panic!("no {parent}")) {
        Value::Array(items) if name == "-" => items.push(value),
        Value::Array(items) => items[name.parse::<usize>().unwrap()] = value,
        parent => parent[name] = value,
    }
    run
}

fn without(parent: &str, member: &str) -> Value {
    let mut run = example();
    run.pointer_mut(parent).unwrap().as_object_mut().unwrap().remove(member).unwrap();
    run
}

fn key(text: &str) -> Key {
    Key::new(text).unwrap()
}

#[test]
fn the_example_of_the_contract_is_read_as_it_stands() {
    let run = read(&example());

    assert_eq!((run.duration_s.get(), run.output_interval_s.get(), run.tolerance), (1800.0, 10.0, None));
    let room = &run.rooms[0];
    assert_eq!((&room.key, room.length_m.get(), room.height_m.get()), (&key("burn"), 2.8, 2.13));
    let [walls, ceiling] = [&room.linings.walls[0], &room.linings.ceiling[0]];
    assert!(matches!(&walls.material, Named::Given(given) if given.conductivity_w_mk == 0.14));
    assert_eq!(walls.thickness_m.map(|thickness| thickness.get()), Some(0.05));
    assert_eq!(ceiling.material.key(), Some("gypsum_board"));
    assert_eq!(run.openings[0].connects, [Space::Room(key("burn")), Space::Outside]);
    let fire = &run.fires[0];
    assert_eq!(fire.heat_release, HeatRelease::Points(vec![(0.0, 62.9), (1800.0, 62.9)]));
    assert_eq!((fire.supply, fire.ignites), (Supply::Fed, Ignition::At(Span::new(0.0).unwrap())));
    assert_eq!(run.schedule[0].opening, key("door"));
    assert_eq!(run.ambient.pressure_pa.get(), 101_325.0);
}

#[test]
fn what_may_be_left_out_takes_what_the_contract_says() {
    let least = json!({
        "rooms": [{ "key": "r", "length_m": 3, "width_m": 3, "height_m": 2.4 }],
        "fires": [{ "key": "f", "room": "r", "fuel": "wood", "diameter_m": 0.5, "heat_release_kw": [[0, 50]] }],
        "duration_s": 60,
    });

    let run = read(&least);

    let room = &run.rooms[0];
    assert_eq!((room.floor_elevation_m.get(), room.leakage_area_m2.get()), (0.0, 0.0));
    assert_eq!((room.leakage_split.low.get(), room.leakage_split.high.get()), (0.5, 0.5));
    assert_eq!((room.zoning, room.linings.walls.len()), (Zoning::TwoLayers, 0));
    assert_eq!((run.ambient.temperature_c.get(), run.ambient.oxygen_mass_fraction.get()), (20.0, 0.232));
    assert_eq!(run.output_interval_s.get(), 10.0);
    assert!(run.fires[0].oxygen_limited);
    assert!(run.openings.is_empty() && run.schedule.is_empty() && run.fans.is_empty());
    // As the example, and with the members aloud.
    let mut spoken = least.clone();
    spoken["ambient"] = json!({});
    spoken["rooms"][0]["linings"] = json!({ "walls": null });
    spoken["fires"][0]["ignites"] = json!({ "at_s": "0 s" });
    assert_eq!(read(&spoken), run);
}

#[test]
fn a_fire_may_be_given_by_growth_peak_and_energy_in_either_place() {
    let growth = json!({ "growth_kw_s2": 0.0469, "peak_kw": "2 MW", "energy_mj": 500 });
    let mut beside = without("/fires/0", "heat_release_kw");
    for (name, value) in growth.as_object().unwrap() {
        beside["fires"][0][name] = value.clone();
    }

    let inside = with("/fires/0/heat_release_kw", growth);

    assert_eq!(read(&beside), read(&inside));
    assert!(
        matches!(read(&inside).fires[0].heat_release, HeatRelease::Grown(growth) if growth.peak_kw.get() == 2000.0)
    );
}

#[test]
fn a_fire_may_be_lit_by_a_flux_or_a_surface() {
    for ignites in [json!({ "flux_kw_m2": 20 }), json!({ "surface_temperature_c": "720 F" })] {
        read(&with("/fires/0/ignites", ignites));
    }
    let lit = with("/fires/0/ignites", json!({ "surface_temperature_c": "720 F" }));
    // (720 - 32) · 5/9
    assert!(matches!(read(&lit).fires[0].ignites, Ignition::Surface(c) if (c.get() - 382.222).abs() < 1e-3));
}

#[test]
fn a_lining_may_have_several_sheets() {
    let walls = json!([
        { "material": "gypsum_board" },
        { "material": "mineral_wool", "thickness_m": "4 in" },
        { "conductivity_w_mk": 45, "density_kg_m3": 7800, "specific_heat_j_kgk": 480, "thickness_m": 0.0007 },
    ]);

    let run = read(&with("/rooms/0/linings/walls", walls));

    let thickness: Vec<_> = run.rooms[0].linings.walls.iter().map(|sheet| sheet.thickness_m).collect();
    assert_eq!(
        thickness.iter().map(|t| t.map(|t| t.get())).collect::<Vec<_>>(),
        [None, Some(0.1016), Some(0.0007)]
    );
}

#[test]
fn extremes_that_buildings_and_weather_have_are_lawful() {
    for (pointer, value) in [
        ("/rooms/0/linings/walls/thickness_m", json!(0.0001)),
        ("/rooms/0/linings/ceiling/thickness_m", json!("0.1 mm")),
        ("/ambient/temperature_c", json!(-40)),
        ("/ambient/temperature_c", json!(50)),
        ("/ambient/indoor_temperature_c", json!("-40 F")),
        // 4000 m of altitude: about 616 hPa in the standard atmosphere (from memory).
        ("/ambient/pressure_pa", json!(61_640)),
        ("/ambient/pressure_pa", json!("616.4 hPa")),
        ("/duration_s", json!(1)),
        ("/duration_s", json!("24 h")),
        ("/openings/0/open_fraction", json!(0)),
        ("/fires/0/heat_release_kw", json!([[0, 500_000]])),
        ("/fires/0/heat_release_kw", json!([[0, 0], [60, 100], [60, 0]])),
        ("/fires/0/heat_release_kw", json!([["1 min", "100 kW"], ["2 min", "0.2 MW"]])),
        ("/fires", json!([])),
        ("/tolerance", json!(1e-6)),
    ] {
        read(&with(pointer, value));
    }
}

#[test]
fn each_fault_is_told_at_its_place() {
    for (pointer, value, expected) in [
        (
            "/rooms",
            json!([]),
            vec!["/fires/0/room unknown_room", "/openings/0/connects/0 unknown_room", "/rooms too_short"],
        ),
        ("/rooms/0/length_m", json!(0), vec!["/rooms/0/length_m out_of_range"]),
        (
            "/rooms/0/leakage_split",
            json!({ "low": 0.5, "high": 0.6 }),
            vec!["/rooms/0/leakage_split contradiction"],
        ),
        ("/rooms/0/leakage_split", json!({ "low": 1 }), vec!["/rooms/0/leakage_split/high missing"]),
        ("/rooms/0/zoning", json!("layers"), vec!["/rooms/0/zoning unknown_word"]),
        ("/rooms/0/use", json!("office"), vec!["/rooms/0/use unknown_member"]),
        ("/rooms/0/linings/walls", json!([]), vec!["/rooms/0/linings/walls too_short"]),
        ("/rooms/0/linings/walls", json!("brick"), vec!["/rooms/0/linings/walls wrong_type"]),
        (
            "/rooms/0/linings/walls",
            json!({ "material": "bricks" }),
            vec!["/rooms/0/linings/walls/material unknown_name"],
        ),
        (
            "/rooms/0/linings/walls",
            json!({ "density_kg_m3": 240, "thickness_m": 0.05 }),
            vec![
                "/rooms/0/linings/walls/conductivity_w_mk missing",
                "/rooms/0/linings/walls/specific_heat_j_kgk missing",
            ],
        ),
        (
            "/rooms/0/linings/walls/thickness_m",
            json!(0.00009),
            vec!["/rooms/0/linings/walls/thickness_m out_of_range"],
        ),
        ("/rooms/-", example()["rooms"][0].clone(), vec!["/rooms/1/key duplicate"]),
        ("/openings/0/connects", json!(["bern", "outside"]), vec!["/openings/0/connects/0 unknown_room"]),
        ("/openings/0/connects", json!(["burn", "burn"]), vec!["/openings/0/connects joins_itself"]),
        ("/openings/0/width_m", json!(2.9), vec!["/openings/0/width_m wider_than_wall"]),
        ("/openings/0/sill_m", json!(0.5), vec!["/openings/0/height_m above_ceiling"]),
        ("/openings/0/gives_way", json!({}), vec!["/openings/0/gives_way missing"]),
        (
            "/openings/0/discharge_coefficient",
            json!(0),
            vec!["/openings/0/discharge_coefficient out_of_range"],
        ),
        ("/ambient/temperature_c", json!(-61), vec!["/ambient/temperature_c out_of_range"]),
        ("/ambient/pressure_pa", json!(0), vec!["/ambient/pressure_pa out_of_range"]),
        ("/ambient/oxygen_mass_fraction", json!(0.5), vec!["/ambient/oxygen_mass_fraction out_of_range"]),
        ("/fires/0/room", json!("attic"), vec!["/fires/0/room unknown_room"]),
        ("/fires/0/fuel", json!("methan"), vec!["/fires/0/fuel unknown_name"]),
        ("/fires/0/position", json!("middle"), vec!["/fires/0/position unknown_word"]),
        ("/fires/0/base_height_m", json!(2.2), vec!["/fires/0/base_height_m above_ceiling"]),
        ("/fires/0/diameter_m", json!(3), vec!["/fires/0/diameter_m larger_than_floor"]),
        ("/fires/0/radiative_fraction", json!(1), vec!["/fires/0/radiative_fraction out_of_range"]),
        ("/fires/0/heat_release_kw", json!([]), vec!["/fires/0/heat_release_kw too_short"]),
        ("/fires/0/heat_release_kw", json!(62.9), vec!["/fires/0/heat_release_kw wrong_type"]),
        (
            "/fires/0/heat_release_kw",
            json!([[0, 1], [60, 2], [30, 3]]),
            vec!["/fires/0/heat_release_kw/2/0 goes_back"],
        ),
        ("/fires/0/heat_release_kw", json!([[-1, 1]]), vec!["/fires/0/heat_release_kw/0/0 out_of_range"]),
        ("/fires/0/heat_release_kw", json!([[0, -1]]), vec!["/fires/0/heat_release_kw/0/1 out_of_range"]),
        (
            "/fires/0/heat_release_kw",
            json!([[0, 1, 2], 7, [0]]),
            vec![
                "/fires/0/heat_release_kw/0 wrong_length",
                "/fires/0/heat_release_kw/1 wrong_type",
                "/fires/0/heat_release_kw/2 wrong_length",
            ],
        ),
        ("/fires/0/heat_release_kw", Value::Null, vec!["/fires/0/heat_release_kw missing"]),
        ("/fires/0/peak_kw", json!(100), vec!["/fires/0/heat_release_kw contradiction"]),
        ("/fires/0/ignites", json!({}), vec!["/fires/0/ignites missing"]),
        ("/fires/0/ignites", json!({ "at_s": 0, "flux_kw_m2": 20 }), vec!["/fires/0/ignites contradiction"]),
        (
            "/fires/0/ignites",
            json!({ "at": 0 }),
            vec!["/fires/0/ignites missing", "/fires/0/ignites/at unknown_member"],
        ),
        ("/fires/0/after_flame_share", json!(0.3), vec!["/fires/0/after_flame_share contradiction"]),
        ("/schedule/0/opening", json!("dor"), vec!["/schedule/0/opening unknown_opening"]),
        ("/schedule/0/at_s", json!(-1), vec!["/schedule/0/at_s out_of_range"]),
        ("/duration_s", json!(86_401), vec!["/duration_s out_of_range"]),
        ("/duration_s", json!(0), vec!["/duration_s out_of_range"]),
        ("/output_interval_s", json!(0), vec!["/output_interval_s out_of_range"]),
        ("/tolerance", json!(0.5), vec!["/tolerance out_of_range"]),
    ] {
        assert_eq!(told(&with(pointer, value.clone())), expected, "{pointer} = {value}");
    }
}

#[test]
fn what_is_required_is_missed() {
    for (parent, member, expected) in [
        (
            "",
            "rooms",
            vec!["/fires/0/room unknown_room", "/openings/0/connects/0 unknown_room", "/rooms missing"],
        ),
        ("", "fires", vec!["/fires missing"]),
        ("", "duration_s", vec!["/duration_s missing"]),
        ("/rooms/0", "key", vec!["/rooms/0/key missing"]),
        ("/openings/0", "kind", vec!["/openings/0/kind missing"]),
        ("/fires/0", "fuel", vec!["/fires/0/fuel missing"]),
        ("/fires/0", "diameter_m", vec!["/fires/0/diameter_m missing"]),
        ("/fires/0", "heat_release_kw", vec!["/fires/0/heat_release_kw missing"]),
    ] {
        assert_eq!(told(&without(parent, member)), expected, "{parent}/{member}");
    }
    let mut part = without("/fires/0", "heat_release_kw");
    part["fires"][0]["peak_kw"] = json!(100);
    assert_eq!(told(&part), ["/fires/0/energy_mj missing", "/fires/0/growth_kw_s2 missing"]);
}

#[test]
fn unknown_keys_come_back_with_the_nearest() {
    let suggestion = |pointer: &str, name: &str| {
        faults(&with(pointer, json!(name))).into_iter().find_map(|fault| fault.suggestion)
    };

    assert_eq!(suggestion("/fires/0/room", "burns").as_deref(), Some("burn"));
    assert_eq!(suggestion("/schedule/0/opening", "dor").as_deref(), Some("door"));
    assert_eq!(suggestion("/fires/0/fuel", "methan").as_deref(), Some("methane"));
}

#[test]
fn a_fault_in_one_part_hides_none_in_another() {
    let mut run = example();
    run["rooms"][0]["height_m"] = json!(-1);
    run["openings"][0]["width_m"] = json!(9);
    run["fires"][0]["heat_release_kw"] = json!([[60, 1], [0, 1]]);
    run["fires"][0]["room"] = json!("attic");
    run["schedule"][0]["opening"] = json!("window");
    run["duration_s"] = json!("soon");

    assert_eq!(
        told(&run),
        [
            "/duration_s bad_quantity",
            "/fires/0/heat_release_kw/1/0 goes_back",
            "/fires/0/room unknown_room",
            "/openings/0/width_m wider_than_wall",
            "/rooms/0/height_m out_of_range",
            "/schedule/0/opening unknown_opening",
        ]
    );
}

#[test]
fn a_room_whose_key_cannot_be_read_does_not_make_others_unknown() {
    assert_eq!(told(&with("/rooms/0/key", json!("Burn Room"))), ["/rooms/0/key bad_key"]);
    assert_eq!(told(&with("/rooms/0", json!(7))), ["/rooms/0 wrong_type"]);
    assert_eq!(told(&with("/openings/0", json!(7))), ["/openings/0 wrong_type"]);
}

#[test]
fn an_opening_must_fit_rooms_at_their_own_elevations() {
    let mut run = example();
    let mut above = run["rooms"][0].clone();
    above["key"] = json!("above");
    above["floor_elevation_m"] = json!(1.0);
    run["rooms"].as_array_mut().unwrap().push(above);
    run["openings"][0]["connects"] = json!(["burn", "above"]);
    // Seen from above, the door runs from -1 m to 0.83 m: it fits; the other way round it ends at 2.83 m.
    assert_eq!(told(&run), Vec::<String>::new());

    run["openings"][0]["connects"] = json!(["above", "burn"]);

    assert_eq!(told(&run), ["/openings/0/height_m above_ceiling"]);
}

#[test]
fn devices_are_held_against_their_rooms() {
    let fan = json!({ "key": "f", "from": "outside", "to": "burn", "volume_flow_m3_s": "500 cfm", "outlet_height_m": 2 });
    let detector = json!({ "key": "d", "room": "burn", "class": "smoke_point" });
    let head = json!({ "key": "s", "room": "burn", "class": "fast_68", "spray_density_mm_s": "5 mm/min" });
    let mut run = example();
    run["fans"] = json!([fan]);
    run["detectors"] = json!([detector]);
    run["sprinklers"] = json!([head]);
    let read = read(&run);
    assert_eq!(read.fans[0].to, Space::Room(key("burn")));
    assert_eq!(read.sprinklers[0].spray_density_mm_s.map(|d| d.get()), Some(5.0 / 60.0));

    for (pointer, value, expected) in [
        ("/fans/0/to", json!("barn"), "/fans/0/to unknown_room"),
        ("/fans/0/to", json!("outside"), "/fans/0/to joins_itself"),
        ("/fans/0/outlet_height_m", json!(2.2), "/fans/0/outlet_height_m above_ceiling"),
        ("/fans/0/stops_s", json!(-1), "/fans/0/stops_s out_of_range"),
        ("/fans/0/stall_pa", json!(0), "/fans/0/stall_pa out_of_range"),
        ("/detectors/0/room", json!("barn"), "/detectors/0/room unknown_room"),
        ("/detectors/0/class", json!("smoke_poind"), "/detectors/0/class unknown_name"),
        ("/sprinklers/0/class", json!("fast_69"), "/sprinklers/0/class unknown_name"),
        ("/sprinklers/0/room", json!("outside"), "/sprinklers/0/room reserved"),
    ] {
        let mut faulty = run.clone();
        let (parent, name) = pointer.rsplit_once('/').unwrap();
        faulty.pointer_mut(parent).unwrap()[name] = value;

        assert_eq!(told(&faulty), [expected]);
    }
}

#[test]
fn a_fuel_that_is_fed_by_heat_may_go_on_after_its_flame() {
    let mut run = example();
    run["fires"][0]["supply"] = json!("heat_fed");
    run["fires"][0]["after_flame_share"] = json!(0.3);
    assert_eq!(told(&run), ["/fires/0/after_flame_fades_s missing"]);

    run["fires"][0]["after_flame_fades_s"] = json!("5 min");

    let supply = Supply::HeatFed {
        after_flame_share: Fraction::new(0.3).unwrap(),
        after_flame_fades_s: Span::new(300.0).unwrap(),
    };
    assert_eq!(read(&run).fires[0].supply, supply);
}

#[test]
fn the_limits_of_number_hold_on_both_sides() {
    let room =
        |number: usize| json!({ "key": format!("r{number}"), "length_m": 3, "width_m": 3, "height_m": 2.4 });
    let door = |number: usize| json!({ "key": format!("d{number}"), "kind": "door", "connects": ["r0", "outside"], "width_m": 0.8, "height_m": 2 });
    let run = |rooms: usize, doors: usize| {
        json!({
            "rooms": (0..rooms).map(room).collect::<Vec<_>>(),
            "openings": (0..doors).map(door).collect::<Vec<_>>(),
            "fires": [], "duration_s": 60,
        })
    };

    assert_eq!(told(&run(100, 400)), Vec::<String>::new());
    assert_eq!(told(&run(101, 400)), ["/rooms too_many"]);
    assert_eq!(told(&run(100, 401)), ["/openings too_many"]);
}

/// Whatever is wrong anywhere: it is told, and never a panic.
#[test]
fn any_value_anywhere_is_read_or_told() {
    fn walk(value: &Value, at: &str, found: &mut Vec<String>) {
        found.push(at.to_owned());
        match value {
            Value::Array(items) => {
                items
                    .iter()
                    .enumerate()
                    .for_each(|(index, item)| walk(item, &format!("{at}/{index}"), found));
            }
            Value::Object(members) => {
                members.iter().for_each(|(name, member)| walk(member, &format!("{at}/{name}"), found));
            }
            _ => {}
        }
    }
    let mut places = Vec::new();
    walk(&example(), "", &mut places);
    let mut refused = 0;

    for place in places.iter().filter(|place| !place.is_empty()) {
        for value in [
            Value::Null,
            json!(true),
            json!(-1),
            json!(1e300),
            json!(0.5),
            json!("x"),
            json!(""),
            json!([]),
            json!([[]]),
            json!({}),
            json!({ "x": 1 }),
        ] {
            refused += usize::from(!faults(&with(place, value)).is_empty());
        }
    }

    assert!(refused > 300, "only {refused} were refused");
}
