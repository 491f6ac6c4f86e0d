//! The form of a room.

use serde::Serializer;
use serde::ser::SerializeMap;
use utoipa::openapi::RefOr;
use utoipa::openapi::schema::Schema;

use super::basis::{BasisMap, OfRoom};
use super::form::{Components, Form, Way};
use super::json::Json;
use super::list::{List, Words};
use super::named::NameOr;
use super::number::Whole;
use super::object::{self, Maybe, default_of, doc_of, name_of, object, parts};
use super::reader::Reader;
use super::scalar::OneWord;
use super::text::Text;
use crate::domain::check::RoomOutline;
use crate::domain::properties::{
    DetectorProperties, ItemProperties, LeakageProperties, MaterialProperties, SprinklerProperties,
    UseProperties,
};
use crate::domain::quantity::{
    AirFlow, Angle, Distance, FireLoadDensity, FloorArea, LeakageArea, Mass, Perimeter, PlanOffset,
    RoomHeight, RoomLength, Thickness,
};
use crate::domain::room::{
    Ceiling, CeilingForm, Detector, FloorPlan, FuelPackage, Hazard, Lining, Linings, Mechanical, Place,
    PlanPosition, ReactionToFire, Room, RoomKind, SprinklerHeads, Storage,
};
use crate::domain::{Key, Pointer};

/// A floor number.
pub(super) type FloorNumber = Whole<i32, -50, 300>;

/// Zero, which every kind that is asked for it has within its limits.
macro_rules! zero {
    ($quantity:ident) => {
        $quantity::new(0.0).expect("zero lies within the limits of this kind")
    };
}
pub(super) use zero;

object! {
    /// Where the room stands on the plan.
    PlanPosition as "PlanPosition" {
        /// East of the building's origin.
        x_m: PlanOffset = zero!(PlanOffset),
        /// North of the building's origin.
        y_m: PlanOffset = zero!(PlanOffset),
        /// Turned counter-clockwise.
        turn_deg: Angle = zero!(Angle),
    }

    /// The ceiling; `height_m` of the room is its lowest point.
    Ceiling as "Ceiling" {
        /// Form.
        form: OneWord<CeilingForm> = CeilingForm::Flat,
        /// Highest point above the floor, where it is not flat.
        high_m: Maybe<RoomHeight> = None,
    }

    /// Fans that serve the room.
    Mechanical as "Mechanical" {
        /// Air blown in.
        supply_m3_s: AirFlow = zero!(AirFlow),
        /// Air drawn out.
        extract_m3_s: AirFlow = zero!(AirFlow),
        /// Whether an alarm stops the fans.
        stops_on_alarm: bool = false,
    }

    /// One lining.
    Lining as "Lining" {
        /// Material: a name of `/v1/catalogue/materials`, or its properties.
        material: NameOr<MaterialProperties>,
        /// Thickness; the material's usual one where unknown.
        thickness_m: Maybe<Thickness> = None,
        /// Reaction to fire by the letters of EN 13501-1, where recorded.
        reaction_to_fire: Maybe<OneWord<ReactionToFire>> = None,
    }

    /// The linings of a room.
    Linings as "Linings" {
        /// Walls.
        walls: Maybe<Lining> = None,
        /// Ceiling.
        ceiling: Maybe<Lining> = None,
        /// Floor.
        floor: Maybe<Lining> = None,
    }

    /// Something that burns as one.
    FuelPackage as "FuelPackage" by "key" {
        /// Unique in the room.
        key: Key,
        /// What it is: a name of `/v1/catalogue/items`, or its properties.
        item: NameOr<ItemProperties>,
        /// How many of them.
        count: Whole<u32, 1, 10_000> = 1,
        /// Mass of one, if it differs from the item's.
        mass_kg: Maybe<Mass> = None,
        /// Height of its underside above the floor.
        base_height_m: Distance = zero!(Distance),
        /// Where in the room it stands.
        place: OneWord<Place> = Place::Centre,
        /// Clear distance to the nearest other package.
        spacing_m: Maybe<Distance> = None,
    }

    /// Goods in racks or piles.
    Storage as "Storage" {
        /// What is stored: a name of `/v1/catalogue/items`, or its properties.
        commodity: NameOr<ItemProperties>,
        /// Height of the goods above the floor.
        height_m: Distance,
        /// Floor covered by goods.
        footprint_m2: FloorArea,
        /// Width of the aisle between racks or piles.
        aisle_m: Maybe<Distance> = None,
        /// In racks rather than piled.
        racks: bool = false,
    }

    /// One detector.
    Detector as "Detector" by "key" {
        /// Unique in the room.
        key: Key,
        /// Class: a name of `/v1/catalogue/detectors`, or its properties.
        class: NameOr<DetectorProperties>,
        /// Distance below the ceiling.
        below_ceiling_m: Maybe<Distance> = None,
        /// Distance from the fire, seen from above; half the room's diagonal where unknown.
        from_fire_m: Maybe<Distance> = None,
    }

    /// The sprinkler heads of a room.
    SprinklerHeads as "SprinklerHeads" {
        /// Class: a name of `/v1/catalogue/sprinklers`, or its properties.
        class: NameOr<SprinklerProperties>,
        /// Distance below the ceiling.
        below_ceiling_m: Maybe<Distance> = None,
        /// Distance from head to head.
        spacing_m: Maybe<Distance> = None,
    }
}

parts! {
    /// A room. Its floor is given by `length_m` and `width_m`, or by `area_m2` and `perimeter_m`.
    RoomParts as "Room" ignoring &[]; {
        /// Unique in the building.
        key: Key,
        /// Free text.
        name: Text<0, 200> = String::new(),
        /// What sort of space.
        kind: OneWord<RoomKind> = RoomKind::Room,
        /// What it is used for: a name of `/v1/catalogue/uses`, or its properties.
        room_use as "use": NameOr<UseProperties>,
        /// Floor number; 0 is the entrance level.
        floor: FloorNumber = 0,
        /// The first or longer side of a rectangular floor; `width_m` goes with it.
        length_m: Maybe<RoomLength> = None,
        /// The other side of a rectangular floor.
        width_m: Maybe<RoomLength> = None,
        /// Area of a floor of any other shape; `perimeter_m` goes with it.
        area_m2: Maybe<FloorArea> = None,
        /// Length of the walls along the floor; at least that of the circle of the same area.
        perimeter_m: Maybe<Perimeter> = None,
        /// Clear height; under a ceiling that is not flat, that of its lowest point.
        height_m: RoomHeight,
        /// Position on the plan.
        plan: Maybe<PlanPosition> = None,
        /// Ceiling.
        ceiling: Ceiling = Ceiling::default(),
        /// How tight the construction is: a name of `/v1/catalogue/leakage`, or its properties.
        leakage_class: Maybe<NameOr<LeakageProperties>> = None,
        /// Leakage area, where measured; it overrides the class.
        leakage_area_m2: Maybe<LeakageArea> = None,
        /// Fans.
        mechanical: Maybe<Mechanical> = None,
        /// Linings.
        linings: Linings = Linings::default(),
        /// Fire load per floor area, where surveyed; the use's where not.
        fuel_load_mj_m2: Maybe<FireLoadDensity> = None,
        /// What was seen standing in the room.
        fuel_packages: List<FuelPackage, 200> = Vec::new(),
        /// Racks or piles.
        storage: Maybe<Storage> = None,
        /// Hazards that the methods do not compute.
        hazards: Words<Hazard, 0> = vec![Hazard::NotRecorded],
        /// Detectors.
        detectors: List<Detector, 100> = Vec::new(),
        /// Sprinkler heads.
        sprinkler_heads: Maybe<SprinklerHeads> = None,
        /// How inputs are known, by the name of the member; one that is not named is estimated.
        basis: BasisMap<OfRoom> = super::basis::nothing(),
    }
}

impl RoomParts {
    fn of(room: &Room) -> Self {
        let room = room.clone();
        let (length_m, width_m, area_m2, perimeter_m) = match room.plan {
            FloorPlan::Rectangle { length_m, width_m } => (Some(length_m), Some(width_m), None, None),
            FloorPlan::Shape { area_m2, perimeter_m } => (None, None, Some(area_m2), Some(perimeter_m)),
        };
        Self {
            key: Some(room.key),
            name: Some(room.name),
            kind: Some(room.kind),
            room_use: Some(room.room_use),
            floor: Some(room.floor),
            length_m: Some(length_m),
            width_m: Some(width_m),
            area_m2: Some(area_m2),
            perimeter_m: Some(perimeter_m),
            height_m: Some(room.height_m),
            plan: Some(room.position),
            ceiling: Some(room.ceiling),
            leakage_class: Some(room.leakage_class),
            leakage_area_m2: Some(room.leakage_area_m2),
            mechanical: Some(room.mechanical),
            linings: Some(room.linings),
            fuel_load_mj_m2: Some(room.fuel_load_mj_m2),
            fuel_packages: Some(room.fuel_packages),
            storage: Some(room.storage),
            hazards: Some(room.hazards),
            detectors: Some(room.detectors),
            sprinkler_heads: Some(room.sprinkler_heads),
            basis: Some(room.basis),
        }
    }

    /// The floor out of its two pairs of members, of which one must be whole and the other absent.
    fn floor_plan(&self, at: &Pointer, reader: &mut Reader<'_>) -> Option<FloorPlan> {
        let (length_m, width_m) = (self.length_m?, self.width_m?);
        let (area_m2, perimeter_m) = (self.area_m2?, self.perimeter_m?);
        let missing = |reader: &mut Reader<'_>, name: &str, with: &str| {
            let detail = format!("the member `{name}` is required with `{with}`");
            reader.fault(&at.member(name), "missing", detail);
        };
        match (length_m, width_m, area_m2, perimeter_m) {
            (Some(length_m), Some(width_m), None, None) => Some(FloorPlan::Rectangle { length_m, width_m }),
            (None, None, Some(area_m2), Some(perimeter_m)) => Some(FloorPlan::Shape { area_m2, perimeter_m }),
            (None, None, None, None) => {
                let mend = "give `length_m` and `width_m`, or `area_m2` and `perimeter_m`";
                let detail = "the size of the floor is required";
                reader.fault_with(&at.member("length_m"), "missing", detail, Some(mend));
                None
            }
            (Some(_), None, None, None) => {
                missing(reader, "width_m", "length_m");
                None
            }
            (None, Some(_), None, None) => {
                missing(reader, "length_m", "width_m");
                None
            }
            (None, None, Some(_), None) => {
                missing(reader, "perimeter_m", "area_m2");
                None
            }
            (None, None, None, Some(_)) => {
                missing(reader, "area_m2", "perimeter_m");
                None
            }
            _ => {
                let name = if area_m2.is_some() { "area_m2" } else { "perimeter_m" };
                let detail = "the size of the floor is given twice";
                let mend = "give either `length_m` and `width_m`, or `area_m2` and `perimeter_m`";
                reader.fault_with(&at.member(name), "contradiction", detail, Some(mend));
                None
            }
        }
    }

    fn outline(&self, at: &Pointer, plan: Option<FloorPlan>) -> RoomOutline {
        let mut outline = RoomOutline {
            at: at.clone(),
            key: self.key.clone(),
            floor: self.floor,
            plan,
            height_m: self.height_m,
            ceiling: self.ceiling,
            hazards: self.hazards.clone(),
            ..RoomOutline::default()
        };
        outline.add_contents(
            self.fuel_packages.as_deref().unwrap_or_default(),
            self.detectors.as_deref().unwrap_or_default(),
            self.storage.as_ref().and_then(Option::as_ref),
            self.sprinkler_heads.as_ref().and_then(Option::as_ref),
        );
        outline
    }

    fn whole(self, plan: Option<FloorPlan>) -> Option<Room> {
        Some(Room {
            key: self.key?,
            name: self.name?,
            kind: self.kind?,
            room_use: self.room_use?,
            floor: self.floor?,
            plan: plan?,
            height_m: self.height_m?,
            position: self.plan?,
            ceiling: self.ceiling?,
            leakage_class: self.leakage_class?,
            leakage_area_m2: self.leakage_area_m2?,
            mechanical: self.mechanical?,
            linings: self.linings?,
            fuel_load_mj_m2: self.fuel_load_mj_m2?,
            fuel_packages: self.fuel_packages?,
            storage: self.storage?,
            hazards: self.hazards?,
            detectors: self.detectors?,
            sprinkler_heads: self.sprinkler_heads?,
            basis: self.basis?,
        })
    }
}

impl Form for Room {
    type Value = Self;

    const IDENTITY: Option<&'static str> = Some("key");

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<Self> {
        let parts = RoomParts::read(json, at, reader);
        let Some(parts) = parts else {
            reader.outline.rooms.push(RoomOutline { at: at.clone(), ..RoomOutline::default() });
            return None;
        };
        let plan = parts.floor_plan(at, reader);
        reader.outline.rooms.push(parts.outline(at, plan));
        parts.whole(plan)
    }

    fn write<S: Serializer>(value: &Self, serializer: S) -> Result<S::Ok, S::Error> {
        let mut map = serializer.serialize_map(None)?;
        RoomParts::of(value).write(&mut map)?;
        map.end()
    }

    fn schema(way: Way) -> RefOr<Schema> {
        object::reference("Room", way)
    }

    fn components(way: Way, into: &mut Components) {
        let schema = RoomParts::object(way);
        let name = object::component_name("Room", way);
        object::add_component(into, name, schema.into(), |into| {
            RoomParts::components_of_members(way, into);
        });
    }
}
