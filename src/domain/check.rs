//! Rules that compare one part of a building with another.
//!
//! They run over an [`Outline`], the parts that they compare, each with its place. A reader
//! fills it with what it could make out, so that a fault in one room hides none in another;
//! [`Outline::of`] fills it from a building.

use std::collections::{HashMap, HashSet};

use super::building::{Building, MAX_OPENINGS, MAX_ROOMS};
use super::ids::Key;
use super::invalid::{Invalid, Pointer};
use super::opening::{OpeningKind, Space};
use super::quantity::{Elevation, FloorArea, OpeningSide, RoomHeight, Sill};
use super::room::{Ceiling, Detector, FloorPlan, FuelPackage, Hazard, Room, SprinklerHeads, Storage};

mod opening;
mod room;

/// Share by which a length may pass a limit: the rounding of feet and inches, nothing more.
const ROUNDING: f64 = 1e-9;

/// Whether `value` exceeds `limit` by more than rounding.
pub(super) fn exceeds(value: f64, limit: f64) -> bool {
    value > limit * (1.0 + ROUNDING) + ROUNDING
}

/// A name that must be the only one of its list.
#[derive(Debug, Clone)]
pub struct NameOutline {
    /// The list.
    pub list: Pointer,
    /// The name.
    pub name: String,
    /// Where it stands.
    pub at: Pointer,
}

/// What rules compare of a floor.
#[derive(Debug, Clone, Copy)]
pub struct FloorOutline {
    /// Number.
    pub floor: i32,
    /// Level.
    pub elevation_m: Option<Elevation>,
}

/// What rules compare of a room; what could not be read is `None`.
#[derive(Debug, Clone, Default)]
pub struct RoomOutline {
    /// The room.
    pub at: Pointer,
    /// Key.
    pub key: Option<Key>,
    /// Floor number.
    pub floor: Option<i32>,
    /// Floor shape.
    pub plan: Option<FloorPlan>,
    /// Height.
    pub height_m: Option<RoomHeight>,
    /// Ceiling.
    pub ceiling: Option<Ceiling>,
    /// Hazards.
    pub hazards: Option<Vec<Hazard>>,
    /// Heights above the floor, or depths below the ceiling, of things in the room, in metres.
    pub heights_m: Vec<(Pointer, f64)>,
    /// Floor covered by stored goods.
    pub footprint_m2: Option<FloorArea>,
}

impl RoomOutline {
    /// All of a room that stands at `at`.
    pub fn of(room: &Room, at: &Pointer) -> Self {
        let mut outline = Self {
            at: at.clone(),
            key: Some(room.key.clone()),
            floor: Some(room.floor),
            plan: Some(room.plan),
            height_m: Some(room.height_m),
            ceiling: Some(room.ceiling),
            hazards: Some(room.hazards.clone()),
            ..Self::default()
        };
        outline.add_contents(
            &room.fuel_packages,
            &room.detectors,
            room.storage.as_ref(),
            room.sprinkler_heads.as_ref(),
        );
        outline
    }

    /// Adds what stands in the room and how high.
    pub fn add_contents(
        &mut self,
        packages: &[FuelPackage],
        detectors: &[Detector],
        storage: Option<&Storage>,
        heads: Option<&SprinklerHeads>,
    ) {
        let at = self.at.clone();
        for (index, package) in packages.iter().enumerate() {
            let pointer = at.member("fuel_packages").element(index).member("base_height_m");
            self.heights_m.push((pointer, package.base_height_m.get()));
        }
        for (index, detector) in detectors.iter().enumerate() {
            if let Some(depth) = detector.below_ceiling_m {
                let pointer = at.member("detectors").element(index).member("below_ceiling_m");
                self.heights_m.push((pointer, depth.get()));
            }
        }
        if let Some(storage) = storage {
            self.heights_m.push((at.member("storage").member("height_m"), storage.height_m.get()));
            self.footprint_m2 = Some(storage.footprint_m2);
        }
        if let Some(depth) = heads.and_then(|heads| heads.below_ceiling_m) {
            self.heights_m.push((at.member("sprinkler_heads").member("below_ceiling_m"), depth.get()));
        }
    }

    /// Highest point of the ceiling above the floor, in m.
    fn highest_m(&self) -> Option<f64> {
        let height_m = self.height_m?.get();
        Some(self.ceiling?.high_m.map_or(height_m, |high| high.get().max(height_m)))
    }
}

/// What rules compare of an opening; what could not be read is `None`.
#[derive(Debug, Clone, Default)]
pub struct OpeningOutline {
    /// The opening.
    pub at: Pointer,
    /// Key.
    pub key: Option<Key>,
    /// What sort.
    pub kind: Option<OpeningKind>,
    /// The two spaces.
    pub connects: Option<[Space; 2]>,
    /// Width.
    pub width_m: Option<OpeningSide>,
    /// Height.
    pub height_m: Option<OpeningSide>,
    /// Lower edge.
    pub sill_m: Option<Sill>,
}

/// Two spaces that share a wall, floor or ceiling.
#[derive(Debug, Clone)]
pub struct BoundaryOutline {
    /// The boundary.
    pub at: Pointer,
    /// The two spaces.
    pub between: [Space; 2],
}

/// The parts of a building that rules compare.
#[derive(Debug, Clone, Default)]
pub struct Outline {
    /// Names that must be the only ones of their list.
    pub names: Vec<NameOutline>,
    /// Floors.
    pub floors: Vec<FloorOutline>,
    /// Rooms.
    pub rooms: Vec<RoomOutline>,
    /// Whether every room's key is known; else a name of a room cannot be called unknown.
    pub all_rooms_known: bool,
    /// Openings.
    pub openings: Vec<OpeningOutline>,
    /// Boundaries.
    pub boundaries: Vec<BoundaryOutline>,
}

impl Outline {
    /// All of a building.
    pub fn of(building: &Building) -> Self {
        let mut outline = Self { all_rooms_known: true, ..Self::default() };
        let root = Pointer::root();

        let floors = root.member("floors");
        for (index, floor) in building.floors.iter().enumerate() {
            outline.add_name(&floors, floor.floor.to_string(), &floors.element(index), "floor");
            outline.floors.push(FloorOutline { floor: floor.floor, elevation_m: floor.elevation_m });
        }
        let rooms = root.member("rooms");
        for (index, room) in building.rooms.iter().enumerate() {
            let at = rooms.element(index);
            outline.add_name(&rooms, room.key.to_string(), &at, "key");
            outline.add_room(room, &at);
        }
        let openings = root.member("openings");
        for (index, opening) in building.openings.iter().enumerate() {
            let at = openings.element(index);
            outline.add_name(&openings, opening.key.to_string(), &at, "key");
            outline.openings.push(OpeningOutline {
                at,
                key: Some(opening.key.clone()),
                kind: Some(opening.kind),
                connects: Some(opening.connects.clone()),
                width_m: Some(opening.width_m),
                height_m: Some(opening.height_m),
                sill_m: Some(opening.sill_m),
            });
        }
        let boundaries = root.member("boundaries");
        for (index, boundary) in building.boundaries.iter().enumerate() {
            let at = boundaries.element(index);
            outline.add_name(&boundaries, boundary.key.to_string(), &at, "key");
            outline.boundaries.push(BoundaryOutline { at, between: boundary.between.clone() });
        }
        outline
    }

    fn add_name(&mut self, list: &Pointer, name: String, element: &Pointer, member: &str) {
        self.names.push(NameOutline { list: list.clone(), name, at: element.member(member) });
    }

    fn add_room(&mut self, room: &Room, at: &Pointer) {
        let packages = at.member("fuel_packages");
        for (index, package) in room.fuel_packages.iter().enumerate() {
            self.add_name(&packages, package.key.to_string(), &packages.element(index), "key");
        }
        let detectors = at.member("detectors");
        for (index, detector) in room.detectors.iter().enumerate() {
            self.add_name(&detectors, detector.key.to_string(), &detectors.element(index), "key");
        }
        self.rooms.push(RoomOutline::of(room, at));
    }

    /// Every rule, over the whole building.
    pub fn faults(&self) -> Vec<Invalid> {
        let mut faults = self.faults_of_parts();
        let rooms: HashMap<&Key, &RoomOutline> =
            self.rooms.iter().filter_map(|room| Some((room.key.as_ref()?, room))).collect();
        for outline in &self.openings {
            opening::with_rooms(outline, &rooms, self, &mut faults);
        }
        for boundary in &self.boundaries {
            let at = boundary.at.member("between");
            opening::spaces(&boundary.between, &at, "a boundary", &rooms, self, &mut faults);
        }
        faults
    }

    /// The rules that need no other part: those of a room or an opening by itself.
    pub fn faults_of_parts(&self) -> Vec<Invalid> {
        let mut faults = Vec::new();
        self.names_are_unique(&mut faults);
        for outline in &self.rooms {
            room::alone(outline, &mut faults);
        }
        for outline in &self.openings {
            opening::alone(outline, &mut faults);
        }
        faults
    }

    fn names_are_unique(&self, faults: &mut Vec<Invalid>) {
        let mut seen = HashSet::new();
        for name in &self.names {
            if !seen.insert((&name.list, &name.name)) {
                faults.push(Invalid {
                    pointer: name.at.clone(),
                    code: "duplicate",
                    detail: format!("`{}` stands twice in this list", name.name),
                    suggestion: None,
                });
            }
        }
    }
}

/// Every rule, over a whole building.
pub fn faults(building: &Building) -> Vec<Invalid> {
    let mut faults = Outline::of(building).faults();
    let root = Pointer::root();
    for (list, have, most) in
        [("rooms", building.rooms.len(), MAX_ROOMS), ("openings", building.openings.len(), MAX_OPENINGS)]
    {
        if have > most {
            faults.push(Invalid {
                pointer: root.member(list),
                code: "too_many",
                detail: format!("has {have} entries; at most {most} are kept"),
                suggestion: Some("record the parts of the building as several buildings".to_owned()),
            });
        }
    }
    faults
}
