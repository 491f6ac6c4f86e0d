//! The form of a transient run.
//!
//! Its parts are read one by one and then held against each other, so that a fault in one room
//! hides none in a fire of another.

mod curve;
mod devices;
mod fire;
mod lining;
mod mention;
mod opening;
mod room;

use super::form::Form;
use super::json::Json;
use super::list::List;
use super::object::{Maybe, default_of, doc_of, name_of, object};
use super::reader::Reader;
use crate::domain::Pointer;
use crate::domain::quantity::{
    AirPressure, AirTemperature, Angle, OutputInterval, OxygenShare, RunTime, Tolerance, WaterShare,
    WindSpeed,
};
use crate::domain::simulation::{
    Ambient, Detector, Fan, Fire, MAX_OPENINGS, MAX_ROOMS, Move, Opening, Room, Simulation, Sprinkler,
};

/// From one output to the next, where a request does not say.
fn usual_interval() -> OutputInterval {
    OutputInterval::new(10.0).expect("ten seconds lie within the limits of an interval")
}

object! {
    /// Air outside, and indoors before the fire.
    Ambient as "SimulationAmbient" {
        /// Temperature outside.
        temperature_c: AirTemperature = Ambient::default().temperature_c,
        /// Temperature indoors at the start; null: that outside.
        indoor_temperature_c: Maybe<AirTemperature> = None,
        /// Pressure at the elevation of zero.
        pressure_pa: AirPressure = Ambient::default().pressure_pa,
        /// Oxygen, by mass.
        oxygen_mass_fraction: OxygenShare = Ambient::default().oxygen_mass_fraction,
        /// Water vapour, by mass.
        water_mass_fraction: WaterShare = Ambient::default().water_mass_fraction,
        /// Wind speed; it presses on openings whose `azimuth_deg` is given.
        wind_m_s: WindSpeed = Ambient::default().wind_m_s,
        /// Where the wind comes from, clockwise from north.
        wind_from_deg: Angle = Ambient::default().wind_from_deg,
    }

    /// A transient run, of which nothing is kept. Nothing is assumed from a use: what is not given
    /// is not there.
    Simulation as "Simulation" {
        /// Rooms, one at least.
        rooms: List<Room, MAX_ROOMS>,
        /// Openings between rooms, or between a room and the outside.
        openings: List<Opening, MAX_OPENINGS> = Vec::new(),
        /// Air.
        ambient: Ambient = Ambient::default(),
        /// Fires, burning from the start or lit later. None at all is lawful.
        fires: List<Fire, 100>,
        /// Openings moved at a time, in any order.
        schedule: List<Move, 1000> = Vec::new(),
        /// Fans.
        fans: List<Fan, 200> = Vec::new(),
        /// Detectors.
        detectors: List<Detector, 400> = Vec::new(),
        /// Sprinkler heads.
        sprinklers: List<Sprinkler, 400> = Vec::new(),
        /// When the run ends.
        duration_s: RunTime,
        /// From one output to the next. At most 10 000 times and 2 000 000 numbers are given: 15 of
        /// each room, 4 of each opening and the time, at each time.
        output_interval_s: OutputInterval = usual_interval(),
        /// Relative tolerance of a step; null: 0.001, which is about 1 K.
        tolerance: Maybe<Tolerance> = None,
    }
}

/// Reads a run, and holds its parts against each other.
pub(super) fn read(json: &Json, reader: &mut Reader<'_>) -> Option<Simulation> {
    let root = Pointer::root();
    let run = <Simulation as Form>::read(json, &root, reader);

    let (rooms, openings) = (listed(json, "rooms"), listed(json, "openings"));
    if rooms == Some(0) && json.member("rooms").is_some() {
        reader.fault(&root.member("rooms"), "too_short", "a run has one room at least");
    }
    let outline = &mut reader.outline;
    outline.all_rooms_known =
        rooms == Some(outline.rooms.len()) && outline.rooms.iter().all(|room| room.key.is_some());
    reader.cross.all_openings_known = openings == Some(outline.openings.len())
        && outline.openings.iter().all(|opening| opening.key.is_some());
    let between = outline.faults();
    for fault in between.into_iter().chain(reader.cross.faults(&reader.outline)) {
        reader.add(fault);
    }
    run
}

/// How many elements a list has; none where it is no list.
fn listed(json: &Json, member: &str) -> Option<usize> {
    match json.member(member) {
        Some(Json::Array(elements)) => Some(elements.len()),
        None => Some(0),
        Some(_) => None,
    }
}
