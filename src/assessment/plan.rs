//! The building as the scenarios need it: rooms and openings by number, indexed once.

use std::collections::HashMap;

use super::assumed::{Account, find};
use super::findings::Provenance;
use super::geometry::Geometry;
use crate::catalogue::Catalogue;
use crate::domain::opening::{OpeningKind, Space};
use crate::domain::room::RoomKind;
use crate::domain::{Building, Key, Opening};

/// Rooms and openings by number.
#[derive(Debug)]
pub(super) struct Plan<'b> {
    pub building: &'b Building,
    pub rooms: Vec<Place>,
    pub openings: Vec<Hole>,
    /// Openings of each room.
    pub of_room: Vec<Vec<usize>>,
}

/// What others need to know of a room.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Place {
    pub geometry: Geometry,
    /// The way out leads through here.
    pub way_out: bool,
}

/// An opening by the numbers of what it joins; `None` is outside.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Hole {
    pub kind: OpeningKind,
    pub sides: [Option<usize>; 2],
    pub width_m: f64,
    pub height_m: f64,
    pub open_fraction: f64,
    pub shuts_itself: bool,
    /// What it leaks when shut, m².
    pub crack_m2: f64,
}

impl Hole {
    pub fn area_m2(&self) -> f64 {
        self.width_m * self.height_m
    }

    /// What lies behind it, seen from a room.
    pub fn behind(&self, room: usize) -> Option<usize> {
        if self.sides[0] == Some(room) { self.sides[1] } else { self.sides[0] }
    }

    pub fn is_door(&self) -> bool {
        matches!(self.kind, OpeningKind::Door | OpeningKind::DoubleDoor)
    }

    /// Whether nobody can shut it.
    pub fn stays_open(&self) -> bool {
        matches!(self.kind, OpeningKind::Gap | OpeningKind::Vent)
    }
}

impl<'b> Plan<'b> {
    /// Numbers the rooms and openings of a building. A side that names no room counts as outside: the
    /// checks on the building let none through.
    pub fn of(building: &'b Building, catalogue: &Catalogue) -> Self {
        let numbers: HashMap<&Key, usize> =
            building.rooms.iter().enumerate().map(|(number, room)| (&room.key, number)).collect();
        let number_of = |space: &Space| match space {
            Space::Room(key) => numbers.get(key).copied(),
            Space::Outside => None,
        };
        let rooms = building
            .rooms
            .iter()
            .map(|room| Place {
                geometry: Geometry::of(room),
                way_out: matches!(room.kind, RoomKind::Corridor | RoomKind::Stair)
                    || find(&room.room_use, |key| catalogue.use_of(key))
                        .is_some_and(|found| found.properties.way_out),
            })
            .collect();
        let mut of_room = vec![Vec::new(); building.rooms.len()];
        let mut openings = Vec::with_capacity(building.openings.len());
        for (number, opening) in building.openings.iter().enumerate() {
            let sides = [number_of(&opening.connects[0]), number_of(&opening.connects[1])];
            for room in sides.into_iter().flatten() {
                of_room[room].push(number);
            }
            openings.push(Hole {
                kind: opening.kind,
                sides,
                width_m: opening.width_m.get(),
                height_m: opening.height_m.get(),
                open_fraction: opening.open_fraction.get(),
                shuts_itself: opening.self_closing || opening.held_open,
                crack_m2: crack_m2(opening),
            });
        }
        // Sums must not depend on the order in which somebody entered the openings.
        for list in &mut of_room {
            list.sort_by(|&a, &b| building.openings[a].key.cmp(&building.openings[b].key));
        }
        Self { building, rooms, openings, of_room }
    }

    /// Key of an opening.
    pub fn opening_key(&self, number: usize) -> &'b Key {
        &self.building.openings[number].key
    }

    /// Enters the cracks and fractions that nobody recorded for the openings of a room.
    pub fn enter_cracks(&self, room: usize, account: &mut Account) {
        for &number in &self.of_room[room] {
            let opening = &self.building.openings[number];
            if opening.leakage_area_m2.is_none() && !self.openings[number].stays_open() {
                account.enter(
                    format!("openings.{}.leakage_area_m2", opening.key),
                    super::findings::AssumedValue::Number(self.openings[number].crack_m2),
                    CRACK_SOURCE,
                    Provenance::Memory,
                );
            }
            if opening.kind == OpeningKind::Window && opening.glazing.is_none() {
                account.enter(
                    format!("openings.{}.glazing", opening.key),
                    super::findings::AssumedValue::Text("float_3_mm".into()),
                    "this project's choice: the pane that falls first",
                    Provenance::Estimated,
                );
            }
        }
    }
}

const CRACK_SOURCE: &str = "gap of 3 mm round doors and hatches (0.0195 m² for a stair door of 1.0 × 2.1 m, Klote and \
    Milke after an ASHRAE table, seen); 0.00025 m² per m of crack round windows and vents without seals \
    (EN 12101-6, from memory)";

/// What an opening leaks when it is shut, m²: recorded, else crack length times gap.
fn crack_m2(opening: &Opening) -> f64 {
    /// 0.0195 m² over the 6.2 m round a door of 1.0 × 2.1 m.
    const DOOR_M2_M: f64 = 0.0195 / 6.2;
    const WINDOW_M2_M: f64 = 0.000_25;

    if let Some(recorded) = opening.leakage_area_m2 {
        return recorded.get();
    }
    let (width_m, height_m) = (opening.width_m.get(), opening.height_m.get());
    let round_m = 2.0 * (width_m + height_m);
    let area_m2 = match opening.kind {
        OpeningKind::Door | OpeningKind::Hatch => DOOR_M2_M * round_m,
        OpeningKind::DoubleDoor => DOOR_M2_M * (round_m + height_m),
        OpeningKind::Window | OpeningKind::RoofVent => WINDOW_M2_M * round_m,
        OpeningKind::Vent | OpeningKind::Gap => 0.0,
    };
    area_m2.min(width_m * height_m)
}
