//! A room: its box, its linings, what burns in it, what watches it.

use std::collections::BTreeMap;

use super::ids::Key;
use super::named::Named;
use super::properties::{
    DetectorProperties, ItemProperties, LeakageProperties, MaterialProperties, SprinklerProperties,
    UseProperties,
};
use super::quantity::{
    AirFlow, Angle, Distance, FireLoadDensity, FloorArea, LeakageArea, Mass, Perimeter, PlanOffset,
    RoomHeight, RoomLength, Thickness,
};

/// What sort of space a room is.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
#[expect(missing_docs, reason = "the words are the trade's")]
pub enum RoomKind {
    #[default]
    Room,
    Corridor,
    Stair,
    Shaft,
    Atrium,
    Attic,
    Void,
}

/// How the floor was measured.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum FloorPlan {
    /// A rectangle.
    Rectangle {
        /// The longer or first side.
        length_m: RoomLength,
        /// The other side.
        width_m: RoomLength,
    },
    /// Any other shape.
    Shape {
        /// Floor area.
        area_m2: FloorArea,
        /// Length of the walls along the floor; at least that of the circle of the same area.
        perimeter_m: Perimeter,
    },
}

/// Form of the ceiling.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
#[expect(missing_docs, reason = "the words are the trade's")]
pub enum CeilingForm {
    #[default]
    Flat,
    Sloped,
    OpenToRoof,
}

/// The ceiling: `height_m` of the room is its lowest point.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub struct Ceiling {
    /// Form.
    pub form: CeilingForm,
    /// Highest point above the floor, where it is not flat.
    pub high_m: Option<RoomHeight>,
}

/// Where a room stands on the plan.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct PlanPosition {
    /// East of the building's origin.
    pub x_m: PlanOffset,
    /// North of the building's origin.
    pub y_m: PlanOffset,
    /// Turned counter-clockwise.
    pub turn_deg: Angle,
}

/// Fans that serve the room.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Mechanical {
    /// Air blown in.
    pub supply_m3_s: AirFlow,
    /// Air drawn out.
    pub extract_m3_s: AirFlow,
    /// Whether an alarm stops the fans.
    pub stops_on_alarm: bool,
}

/// Reaction to fire of a lining, Euroclass letters of EN 13501-1.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
#[expect(missing_docs, reason = "classes as printed in the standard")]
pub enum ReactionToFire {
    A1,
    A2,
    B,
    C,
    D,
    E,
    F,
}

/// One lining.
#[derive(Debug, Clone, PartialEq)]
pub struct Lining {
    /// Material, by name or by properties.
    pub material: Named<MaterialProperties>,
    /// Thickness; the material's typical one where unknown.
    pub thickness_m: Option<Thickness>,
    /// Reaction to fire, where recorded.
    pub reaction_to_fire: Option<ReactionToFire>,
}

/// The three linings of a room.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct Linings {
    /// Walls.
    pub walls: Option<Lining>,
    /// Ceiling.
    pub ceiling: Option<Lining>,
    /// Floor.
    pub floor: Option<Lining>,
}

/// Where in the room a fuel package stands.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
#[expect(missing_docs, reason = "the words are the trade's")]
pub enum Place {
    #[default]
    Centre,
    Wall,
    Corner,
}

/// Something that burns as one.
#[derive(Debug, Clone, PartialEq)]
pub struct FuelPackage {
    /// Key within the room.
    pub key: Key,
    /// What it is.
    pub item: Named<ItemProperties>,
    /// How many of them.
    pub count: u32,
    /// Mass of one, if it differs from the item's.
    pub mass_kg: Option<Mass>,
    /// Height of its underside above the floor.
    pub base_height_m: Distance,
    /// Where it stands.
    pub place: Place,
    /// Clear distance to the nearest other package.
    pub spacing_m: Option<Distance>,
}

/// Goods in racks or piles.
#[derive(Debug, Clone, PartialEq)]
pub struct Storage {
    /// What is stored, an item of the catalogue.
    pub commodity: Named<ItemProperties>,
    /// Height of the goods above the floor.
    pub height_m: Distance,
    /// Floor covered by goods.
    pub footprint_m2: FloorArea,
    /// Width of the aisle between racks or piles.
    pub aisle_m: Option<Distance>,
    /// In racks rather than piled.
    pub racks: bool,
}

/// Hazards that the methods do not compute.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
#[expect(missing_docs, reason = "the words are the trade's")]
pub enum Hazard {
    None,
    NotRecorded,
    LithiumIon,
    GasCylinders,
    FlammableLiquid,
    FlammableGas,
    CombustibleDust,
    Oxidisers,
    Explosives,
    Hoard,
    ExposedFoam,
    MedicalOxygen,
}

/// One detector.
#[derive(Debug, Clone, PartialEq)]
pub struct Detector {
    /// Key within the room.
    pub key: Key,
    /// Class, by name or by properties.
    pub class: Named<DetectorProperties>,
    /// Distance below the ceiling.
    pub below_ceiling_m: Option<Distance>,
    /// Radial distance from the fire; half the room's diagonal where unknown.
    pub from_fire_m: Option<Distance>,
}

/// The sprinkler heads of a room.
#[derive(Debug, Clone, PartialEq)]
pub struct SprinklerHeads {
    /// Class, by name or by properties.
    pub class: Named<SprinklerProperties>,
    /// Distance below the ceiling.
    pub below_ceiling_m: Option<Distance>,
    /// Spacing between heads.
    pub spacing_m: Option<Distance>,
}

/// How an input is known.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub enum Basis {
    /// Measured on site or on drawings.
    Measured,
    /// Estimated by eye.
    Estimated,
    /// Taken from the catalogue. Set by the service, never by a caller.
    Assumed,
}

/// Member names to how they are known.
pub type BasisOf = BTreeMap<String, Basis>;

/// A room, checked.
#[derive(Debug, Clone, PartialEq)]
pub struct Room {
    /// Unique in the building.
    pub key: Key,
    /// Free text; the key where empty.
    pub name: String,
    /// What sort of space.
    pub kind: RoomKind,
    /// What it is used for.
    pub room_use: Named<UseProperties>,
    /// Floor number; 0 is the entrance level.
    pub floor: i32,
    /// Floor shape.
    pub plan: FloorPlan,
    /// Clear height.
    pub height_m: RoomHeight,
    /// Position on the plan.
    pub position: Option<PlanPosition>,
    /// Ceiling.
    pub ceiling: Ceiling,
    /// How tight the construction is.
    pub leakage_class: Option<Named<LeakageProperties>>,
    /// Leakage area, where measured; overrides the class.
    pub leakage_area_m2: Option<LeakageArea>,
    /// Fans.
    pub mechanical: Option<Mechanical>,
    /// Linings.
    pub linings: Linings,
    /// Fire load density, where surveyed.
    pub fuel_load_mj_m2: Option<FireLoadDensity>,
    /// What was seen standing in the room.
    pub fuel_packages: Vec<FuelPackage>,
    /// Racks or piles.
    pub storage: Option<Storage>,
    /// Hazards outside the methods.
    pub hazards: Vec<Hazard>,
    /// Detectors.
    pub detectors: Vec<Detector>,
    /// Sprinkler heads.
    pub sprinkler_heads: Option<SprinklerHeads>,
    /// How the numbers are known.
    pub basis: BasisOf,
}

impl FloorPlan {
    /// Floor area in m².
    pub fn area_m2(self) -> f64 {
        match self {
            Self::Rectangle { length_m, width_m } => length_m.get() * width_m.get(),
            Self::Shape { area_m2, .. } => area_m2.get(),
        }
    }

    /// Length of the walls along the floor, in m.
    pub fn perimeter_m(self) -> f64 {
        match self {
            Self::Rectangle { length_m, width_m } => 2.0 * (length_m.get() + width_m.get()),
            Self::Shape { perimeter_m, .. } => perimeter_m.get(),
        }
    }
}

impl Room {
    /// Members whose [`Basis`] can be recorded; a dot leads into a member.
    pub const BASIS_MEMBERS: &[&str] = &[
        "kind",
        "use",
        "floor",
        "length_m",
        "width_m",
        "area_m2",
        "perimeter_m",
        "height_m",
        "plan",
        "ceiling",
        "ceiling.form",
        "ceiling.high_m",
        "leakage_class",
        "leakage_area_m2",
        "mechanical",
        "mechanical.supply_m3_s",
        "mechanical.extract_m3_s",
        "linings",
        "linings.walls",
        "linings.walls.material",
        "linings.walls.thickness_m",
        "linings.ceiling",
        "linings.ceiling.material",
        "linings.ceiling.thickness_m",
        "linings.floor",
        "linings.floor.material",
        "linings.floor.thickness_m",
        "fuel_load_mj_m2",
        "fuel_packages",
        "storage",
        "storage.height_m",
        "storage.footprint_m2",
        "storage.aisle_m",
        "hazards",
        "detectors",
        "sprinkler_heads",
    ];

    /// Floor area in m².
    pub fn floor_area_m2(&self) -> f64 {
        self.plan.area_m2()
    }

    /// Length of the walls along the floor, in m.
    pub fn perimeter_m(&self) -> f64 {
        self.plan.perimeter_m()
    }
}

/// Fewest and most pieces of one fuel package.
pub const PACKAGE_COUNT: std::ops::RangeInclusive<u32> = 1..=10_000;
