//! The form of a building.

use serde::ser::SerializeMap;
use utoipa::openapi::schema::Object;

use super::form::{Components, Way};
use super::json::Json;
use super::list::{List, Pair};
use super::number::Whole;
use super::object::{self, Maybe, default_of, doc_of, name_of, object, parts};
use super::reader::Reader;
use super::room::FloorNumber;
use super::scalar::OneWord;
use super::text::{CodeLetters, Prose, Text};
use crate::domain::building::{
    Address, Boundary, Building, ConstructionType, Contact, Coverage, FloorLevel, Location, MAX_OPENINGS,
    MAX_ROOMS, Occupants, Preplan, Response, SprinklerState, Sprinklers,
};
use crate::domain::check::{BoundaryOutline, FloorOutline};
use crate::domain::opening::{Opening, Space};
use crate::domain::quantity::{Elevation, FireRating, FloorArea, Latitude, Longitude, Span, WaterFlow};
use crate::domain::room::Room;
use crate::domain::time::Day;
use crate::domain::{Key, Pointer};

/// Members that the service sets. A request may carry them, since it may have come from an answer.
pub(super) const SET_BY_THE_SERVICE: &[&str] =
    &["id", "revision", "schema", "created_at", "updated_at", "updated_by", "links"];

type Line = Text<0, 200>;
type Head = Whole<u32, 0, 1_000_000>;
type Remark = Maybe<Prose<2000>>;

/// The water that crews find.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub(super) struct Water {
    available_l_min: Option<WaterFlow>,
}

/// The alarm system.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub(super) struct Alarm {
    monitored: Option<bool>,
}

object! {
    /// Where post finds it.
    Address as "Address" {
        /// Street and number.
        line: Line = String::new(),
        /// Town.
        place: Line = String::new(),
        /// Postal code.
        postcode: Text<0, 20> = String::new(),
    }

    /// A place on the globe, WGS 84.
    Location as "Location" {
        /// Longitude, east positive.
        longitude_deg: Longitude,
        /// Latitude, north positive.
        latitude_deg: Latitude,
    }

    /// A floor's name and level.
    FloorLevel as "FloorLevel" by "floor" {
        /// Number; 0 is the entrance level.
        floor: FloorNumber,
        /// Name.
        name: Line = String::new(),
        /// Above the entrance level.
        elevation_m: Maybe<Elevation> = None,
    }

    /// The spans between established burning and water on the fire; what is null is assumed, and
    /// the report says so.
    Response as "Response" {
        /// Established burning to detection, where the bureau wants to set it.
        detection_s: Maybe<Span> = None,
        /// Detection to call.
        call_s: Maybe<Span> = None,
        /// Call handling.
        processing_s: Maybe<Span> = None,
        /// Crew turnout.
        turnout_s: Maybe<Span> = None,
        /// Travel.
        travel_s: Maybe<Span> = None,
        /// Set-up until water.
        setup_s: Maybe<Span> = None,
    }

    /// The water that crews find.
    Water as "Water" {
        /// Flow that is there for them.
        available_l_min: Maybe<WaterFlow> = None,
    }

    /// The alarm system.
    Alarm as "Alarm" {
        /// Whether an alarm calls the brigade by itself; null: not recorded.
        monitored: Maybe<bool> = None,
    }

    /// The building's sprinkler record.
    Sprinklers as "Sprinklers" {
        /// State; only `working_tested` is given credit.
        state: OneWord<SprinklerState> = SprinklerState::NotRecorded,
        /// How much of the building they cover.
        coverage: Maybe<OneWord<Coverage>> = None,
    }

    /// Who is inside.
    Occupants as "Occupants" {
        /// By day.
        day: Maybe<Head> = None,
        /// By night.
        night: Maybe<Head> = None,
        /// Whether anybody sleeps there.
        asleep: Maybe<bool> = None,
        /// How many need help to leave.
        need_help: Maybe<Head> = None,
    }

    /// Someone to call.
    Contact as "Contact" {
        /// Name.
        name: Line,
        /// Telephone.
        phone: Text<0, 50> = String::new(),
        /// What they can do.
        role: Line = String::new(),
    }

    /// What a crew wants to know beside the figures.
    Preplan as "Preplan" {
        /// Key box.
        key_box: Remark = None,
        /// Alarm panel.
        alarm_panel: Remark = None,
        /// Alarm code.
        alarm_code: Remark = None,
        /// Bars on windows or doors.
        bars: Remark = None,
        /// Gas shut-off.
        gas_shutoff: Remark = None,
        /// Electricity shut-off.
        electricity_shutoff: Remark = None,
        /// Water shut-off.
        water_shutoff: Remark = None,
        /// Hydrants.
        hydrants: Remark = None,
        /// Standpipes or dry risers.
        standpipes: Remark = None,
        /// Access for vehicles and ladders.
        access: Remark = None,
        /// Roof.
        roof: Remark = None,
        /// Notes.
        notes: Maybe<Prose<10_000>> = None,
        /// Contacts.
        contacts: List<Contact, 50> = Vec::new(),
    }

    /// A wall, floor or ceiling that two spaces share.
    Boundary as "Boundary" by "key" {
        /// Unique among the building's boundaries.
        key: Key,
        /// The two spaces: keys of rooms, or `outside` for one of them.
        between: Pair<Space>,
        /// Area.
        area_m2: Maybe<FloorArea> = None,
        /// Fire resistance, where recorded.
        fire_rating_min: Maybe<FireRating> = None,
    }
}

parts! {
    /// A building.
    BuildingParts as "Building" ignoring SET_BY_THE_SERVICE; {
        /// The bureau's own number, unique in the agency.
        reference: Maybe<Text<1, 64>> = None,
        /// Name.
        name: Text<1, 200>,
        /// Address.
        address: Address = Address::default(),
        /// Position.
        location: Maybe<Location> = None,
        /// Occupancy group of the building code, as printed there (`M`, `S-1`).
        occupancy_group: Maybe<CodeLetters> = None,
        /// Construction type of the building code, as printed there (`III-B`).
        construction_type: Maybe<ConstructionType> = None,
        /// When it was last looked at.
        inspected_on: Maybe<Day> = None,
        /// Notes.
        notes: Prose<10_000> = String::new(),
        /// Floors.
        floors: List<FloorLevel, 351> = Vec::new(),
        /// Response of the brigade.
        response: Response = Response::default(),
        /// Water.
        water: Water = Water::default(),
        /// Alarm.
        alarm: Alarm = Alarm::default(),
        /// Sprinklers.
        sprinklers: Sprinklers = Sprinklers::default(),
        /// Occupants.
        occupants: Occupants = Occupants::default(),
        /// Pre-plan.
        preplan: Preplan = Preplan::default(),
        /// Rooms.
        rooms: List<Room, MAX_ROOMS> = Vec::new(),
        /// Openings.
        openings: List<Opening, MAX_OPENINGS> = Vec::new(),
        /// Walls, floors and ceilings that spaces share.
        boundaries: List<Boundary, 2000> = Vec::new(),
    }
}

/// Reads a building, and holds its parts against each other.
pub(super) fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<Building> {
    let first_fault = reader.count();
    let parts = BuildingParts::read(json, at, reader)?;

    let outline = &mut reader.outline;
    let floors = parts.floors.as_deref().unwrap_or_default();
    outline.floors.extend(
        floors.iter().map(|floor| FloorOutline { floor: floor.floor, elevation_m: floor.elevation_m }),
    );
    for (index, boundary) in parts.boundaries.iter().flatten().enumerate() {
        let at = at.member("boundaries").element(index);
        outline.boundaries.push(BoundaryOutline { at, between: boundary.between.clone() });
    }
    let listed = match json.member("rooms") {
        Some(Json::Array(rooms)) => Some(rooms.len()),
        None | Some(Json::Null) => Some(0),
        Some(_) => None,
    };
    outline.all_rooms_known =
        listed == Some(outline.rooms.len()) && outline.rooms.iter().all(|room| room.key.is_some());
    if !reader.is_stored() {
        for fault in reader.outline.faults() {
            reader.add(fault);
        }
    }
    let building = parts.whole();
    building.filter(|_| reader.count() == first_fault)
}

impl BuildingParts {
    pub(super) fn of(building: &Building) -> Self {
        let building = building.clone();
        Self {
            reference: Some(building.reference),
            name: Some(building.name),
            address: Some(building.address),
            location: Some(building.location),
            occupancy_group: Some(building.occupancy_group),
            construction_type: Some(building.construction_type),
            inspected_on: Some(building.inspected_on),
            notes: Some(building.notes),
            floors: Some(building.floors),
            response: Some(building.response),
            water: Some(Water { available_l_min: building.water_available_l_min }),
            alarm: Some(Alarm { monitored: building.alarm_monitored }),
            sprinklers: Some(building.sprinklers),
            occupants: Some(building.occupants),
            preplan: Some(building.preplan),
            rooms: Some(building.rooms),
            openings: Some(building.openings),
            boundaries: Some(building.boundaries),
        }
    }

    fn whole(self) -> Option<Building> {
        Some(Building {
            reference: self.reference?,
            name: self.name?,
            address: self.address?,
            location: self.location?,
            occupancy_group: self.occupancy_group?,
            construction_type: self.construction_type?,
            inspected_on: self.inspected_on?,
            notes: self.notes?,
            floors: self.floors?,
            response: self.response?,
            water_available_l_min: self.water?.available_l_min,
            alarm_monitored: self.alarm?.monitored,
            sprinklers: self.sprinklers?,
            occupants: self.occupants?,
            preplan: self.preplan?,
            rooms: self.rooms?,
            openings: self.openings?,
            boundaries: self.boundaries?,
        })
    }
}

/// Writes the members that a client gave.
pub(super) fn write_members<M: SerializeMap>(building: &Building, map: &mut M) -> Result<(), M::Error> {
    BuildingParts::of(building).write(map)
}

/// Adds the schema of what a client may send.
pub(super) fn request_components(into: &mut Components) {
    let name = object::component_name("Building", Way::Request);
    object::add_component(into, name, request_object().into(), |into| {
        BuildingParts::components_of_members(Way::Request, into);
    });
}

pub(super) fn request_object() -> Object {
    object::ignored_properties(BuildingParts::object(Way::Request), SET_BY_THE_SERVICE)
}
