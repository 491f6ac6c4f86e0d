//! A building: the aggregate that is saved whole.

use super::ids::Key;
use super::opening::{Opening, Space};
use super::quantity::{Elevation, FireRating, FloorArea, Latitude, Longitude, Span, WaterFlow};
use super::room::Room;
use super::time::Day;

/// Most rooms a building may have.
pub const MAX_ROOMS: usize = 500;
/// Most openings a building may have.
pub const MAX_OPENINGS: usize = 2000;

/// Lowest and highest floor number.
pub const FLOOR_NUMBERS: std::ops::RangeInclusive<i32> = -50..=300;

/// Where post finds it.
#[derive(Debug, Clone, PartialEq, Eq, Default)]
pub struct Address {
    /// Street and number.
    pub line: String,
    /// Town.
    pub place: String,
    /// Postal code.
    pub postcode: String,
}

/// WGS 84.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Location {
    /// Longitude.
    pub longitude_deg: Longitude,
    /// Latitude.
    pub latitude_deg: Latitude,
}

/// A floor's name and level.
#[derive(Debug, Clone, PartialEq)]
pub struct FloorLevel {
    /// Number; 0 is the entrance level.
    pub floor: i32,
    /// Name.
    pub name: String,
    /// Above the entrance level.
    pub elevation_m: Option<Elevation>,
}

/// The spans between fire and water; what is unknown is assumed and said.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub struct Response {
    /// Established burning to detection, where the bureau wants to set it.
    pub detection_s: Option<Span>,
    /// Detection to call.
    pub call_s: Option<Span>,
    /// Call handling.
    pub processing_s: Option<Span>,
    /// Crew turnout.
    pub turnout_s: Option<Span>,
    /// Travel.
    pub travel_s: Option<Span>,
    /// Set-up until water.
    pub setup_s: Option<Span>,
}

/// Whether sprinklers are there and can be relied upon.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub enum SprinklerState {
    /// None fitted.
    None,
    /// Nobody wrote it down.
    #[default]
    NotRecorded,
    /// Fitted, not working.
    OutOfService,
    /// Fitted, no record of a test.
    Installed,
    /// Recorded as working and tested: the only state that is given credit.
    WorkingTested,
}

/// How much of the building the sprinklers cover.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Coverage {
    /// Some rooms: those that list heads.
    Partial,
    /// Every room.
    Full,
}

/// The building's sprinkler record.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub struct Sprinklers {
    /// State.
    pub state: SprinklerState,
    /// Coverage.
    pub coverage: Option<Coverage>,
}

/// Who is inside.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub struct Occupants {
    /// By day.
    pub day: Option<u32>,
    /// By night.
    pub night: Option<u32>,
    /// Whether anybody sleeps there.
    pub asleep: Option<bool>,
    /// How many need help to leave.
    pub need_help: Option<u32>,
}

/// Someone to call.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Contact {
    /// Name.
    pub name: String,
    /// Telephone.
    pub phone: String,
    /// What they can do.
    pub role: String,
}

/// What a crew wants to know beside the figures; free text, all optional.
#[derive(Debug, Clone, PartialEq, Eq, Default)]
pub struct Preplan {
    /// Key box.
    pub key_box: Option<String>,
    /// Alarm panel.
    pub alarm_panel: Option<String>,
    /// Alarm code.
    pub alarm_code: Option<String>,
    /// Bars on windows or doors.
    pub bars: Option<String>,
    /// Gas shut-off.
    pub gas_shutoff: Option<String>,
    /// Electricity shut-off.
    pub electricity_shutoff: Option<String>,
    /// Water shut-off.
    pub water_shutoff: Option<String>,
    /// Hydrants.
    pub hydrants: Option<String>,
    /// Standpipes or dry risers.
    pub standpipes: Option<String>,
    /// Access for vehicles and ladders.
    pub access: Option<String>,
    /// Roof.
    pub roof: Option<String>,
    /// Notes.
    pub notes: Option<String>,
    /// Contacts.
    pub contacts: Vec<Contact>,
}

/// A wall, floor or ceiling that two spaces share.
#[derive(Debug, Clone, PartialEq)]
pub struct Boundary {
    /// Unique among the building's boundaries.
    pub key: Key,
    /// The two spaces.
    pub between: [Space; 2],
    /// Area.
    pub area_m2: Option<FloorArea>,
    /// Fire resistance, where recorded.
    pub fire_rating_min: Option<FireRating>,
}

/// Construction types of the building code, as printed.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct ConstructionType(pub String);

/// A building, checked as a whole.
#[derive(Debug, Clone, PartialEq)]
pub struct Building {
    /// Name.
    pub name: String,
    /// The bureau's own number, unique in the agency.
    pub reference: Option<String>,
    /// Address.
    pub address: Address,
    /// Position.
    pub location: Option<Location>,
    /// Occupancy group of the building code, as printed (`M`, `S-1`).
    pub occupancy_group: Option<String>,
    /// Construction type of the building code, as printed (`III-B`).
    pub construction_type: Option<ConstructionType>,
    /// When it was last looked at.
    pub inspected_on: Option<Day>,
    /// Notes.
    pub notes: String,
    /// Floors.
    pub floors: Vec<FloorLevel>,
    /// Response.
    pub response: Response,
    /// Water available to crews.
    pub water_available_l_min: Option<WaterFlow>,
    /// Whether an alarm calls the brigade by itself.
    pub alarm_monitored: Option<bool>,
    /// Sprinklers.
    pub sprinklers: Sprinklers,
    /// Occupants.
    pub occupants: Occupants,
    /// Pre-plan.
    pub preplan: Preplan,
    /// Rooms, at most [`MAX_ROOMS`].
    pub rooms: Vec<Room>,
    /// Openings, at most [`MAX_OPENINGS`].
    pub openings: Vec<Opening>,
    /// Boundaries.
    pub boundaries: Vec<Boundary>,
}

impl Building {
    /// The room of this key.
    pub fn room(&self, key: &Key) -> Option<&Room> {
        self.rooms.iter().find(|room| room.key == *key)
    }

    /// The opening of this key.
    pub fn opening(&self, key: &Key) -> Option<&Opening> {
        self.openings.iter().find(|opening| opening.key == *key)
    }

    /// The openings of this room.
    pub fn openings_of<'a>(&'a self, room: &'a Key) -> impl Iterator<Item = &'a Opening> {
        self.openings.iter().filter(move |opening| opening.touches(room))
    }
}
