//! Screening of one room and of a building of twenty rooms, all scenarios and corners.
//!
//! Goal: one room at most 100 µs on one core.

use std::hint::black_box;
use std::ops::ControlFlow;

use criterion::{Criterion, criterion_group, criterion_main};
use sootline::assessment::assess;
use sootline::catalogue::Catalogue;
use sootline::domain::assumptions::Level;
use sootline::domain::opening::{Opening, OpeningKind, Space};
use sootline::domain::quantity::{Kind, Quantity};
use sootline::domain::room::{FloorPlan, FuelPackage, Hazard, Lining, Linings, Place, RoomKind};
use sootline::domain::{Assumptions, Building, Key, Named, Room};

fn key(text: &str) -> Key {
    Key::new(text).expect("the keys of this bench are lawful")
}

fn q<K: Kind>(value: f64) -> Quantity<K> {
    Quantity::new(value).expect("the numbers of this bench are within limits")
}

fn lining(material: &str) -> Option<Lining> {
    Some(Lining {
        material: Named::Catalogue(material.to_owned()),
        thickness_m: Some(q(0.0127)),
        reaction_to_fire: None,
    })
}

fn room(name: &str, room_use: &str, [length_m, width_m]: [f64; 2]) -> Room {
    Room {
        key: key(name),
        name: String::new(),
        kind: RoomKind::Room,
        room_use: Named::Catalogue(room_use.to_owned()),
        floor: 0,
        plan: FloorPlan::Rectangle { length_m: q(length_m), width_m: q(width_m) },
        height_m: q(2.4),
        position: None,
        ceiling: Default::default(),
        leakage_class: Some(Named::Catalogue("average".to_owned())),
        leakage_area_m2: None,
        mechanical: None,
        linings: Linings {
            walls: lining("gypsum_board"),
            ceiling: lining("gypsum_board"),
            floor: lining("concrete"),
        },
        fuel_load_mj_m2: None,
        fuel_packages: Vec::new(),
        storage: None,
        hazards: vec![Hazard::None],
        detectors: Vec::new(),
        sprinkler_heads: None,
        basis: Default::default(),
    }
}

fn opening(name: &str, kind: OpeningKind, sides: [&str; 2], [width_m, height_m]: [f64; 2]) -> Opening {
    let side = |name: &str| if name == Key::OUTSIDE { Space::Outside } else { Space::Room(key(name)) };
    Opening {
        key: key(name),
        name: String::new(),
        kind,
        connects: sides.map(side),
        width_m: q(width_m),
        height_m: q(height_m),
        sill_m: q(0.0),
        open_fraction: q(0.0),
        held_open: false,
        self_closing: false,
        fire_rating_min: None,
        leakage_area_m2: None,
        swing: None,
        entry: true,
        side: None,
        azimuth_deg: None,
        glazing: None,
        basis: Default::default(),
    }
}

fn building(rooms: Vec<Room>, openings: Vec<Opening>) -> Building {
    Building {
        name: "Bench house".to_owned(),
        reference: None,
        address: Default::default(),
        location: None,
        occupancy_group: None,
        construction_type: None,
        inspected_on: None,
        notes: String::new(),
        floors: Vec::new(),
        response: Default::default(),
        water_available_l_min: None,
        alarm_monitored: None,
        sprinklers: Default::default(),
        occupants: Default::default(),
        preplan: Default::default(),
        rooms,
        openings,
        boundaries: Vec::new(),
    }
}

/// A furnished living room with a door and a window.
fn one_room() -> Building {
    let mut lounge = room("lounge", "living", [5.0, 4.0]);
    lounge.fuel_packages = ["upholstered_sofa", "curtains", "television"]
        .iter()
        .map(|item| FuelPackage {
            key: key(item),
            item: Named::Catalogue((*item).to_owned()),
            count: 1,
            mass_kg: None,
            base_height_m: q(0.0),
            place: Place::Wall,
            spacing_m: Some(q(0.4)),
        })
        .collect();
    let openings = vec![
        opening("door", OpeningKind::Door, ["lounge", "outside"], [0.9, 2.0]),
        opening("window", OpeningKind::Window, ["lounge", "outside"], [1.4, 1.2]),
    ];
    building(vec![lounge], openings)
}

/// Nineteen rooms along a corridor with a door to outside.
fn twenty_rooms() -> Building {
    const USES: [&str; 5] = ["office", "storage", "classroom", "bedroom", "kitchen"];

    let mut rooms = vec![Room { kind: RoomKind::Corridor, ..room("hall", "corridor", [9.0, 2.0]) }];
    let mut openings = vec![opening("front", OpeningKind::Door, ["hall", "outside"], [0.9, 2.0])];
    for number in 1..20 {
        let name = format!("room-{number}");
        rooms.push(room(&name, USES[number % USES.len()], [4.0, 3.0 + 0.1 * number as f64]));
        openings.push(opening(&format!("door-{number}"), OpeningKind::Door, [&name, "hall"], [0.9, 2.0]));
        openings.push(opening(
            &format!("window-{number}"),
            OpeningKind::Window,
            [&name, "outside"],
            [1.2, 1.2],
        ));
    }
    building(rooms, openings)
}

fn screening(c: &mut Criterion) {
    let assumptions = Assumptions { level: Some(Level::Screening), ..Assumptions::default() };
    let catalogue = Catalogue::embedded();
    for (name, house) in [("one room", one_room()), ("twenty rooms", twenty_rooms())] {
        c.bench_function(&format!("screening, {name}"), |b| {
            b.iter(|| assess(black_box(&house), catalogue, &assumptions, &mut || ControlFlow::Continue(())));
        });
    }
}

/// Every scenario and corner of every room, through the whole building.
fn transient(c: &mut Criterion) {
    let assumptions = Assumptions::default();
    let catalogue = Catalogue::embedded();
    let mut group = c.benchmark_group("transient");
    group.sample_size(10);
    for (name, house) in [("one room", one_room()), ("twenty rooms", twenty_rooms())] {
        group.bench_function(name, |b| {
            b.iter(|| assess(black_box(&house), catalogue, &assumptions, &mut || ControlFlow::Continue(())));
        });
    }
    group.finish();
}

criterion_group!(benches, screening, transient);
criterion_main!(benches);
