//! The answer to a transient run: its series as JSON, or as a table for a spreadsheet.

mod csv;
mod series;
#[cfg(test)]
mod tests;

use serde::ser::SerializeMap;
use serde::{Serialize, Serializer};
use utoipa::ToSchema;

pub use csv::csv;
pub use series::{SimulationOpening, SimulationRoom};

use super::number::{Exact, Number};
use super::text::PLANNING_ONLY;
use super::words::{Printed, Told};
use crate::assessment::ENGINE_VERSION;
use crate::assessment::simulation::{self, EventKind, Simulated};

/// What happened, as its word.
pub type EventWord = Printed<EventKind>;

impl Told for EventKind {
    const TELLS: &'static str = "What happened to a fire, an opening, a detector or a sprinkler.";
}

/// Parts by their keys, in the order of the request.
#[derive(Debug, Clone, PartialEq)]
pub struct ByKey<T>(Vec<(String, T)>);

impl<T> ByKey<T> {
    /// The parts with their keys.
    pub fn iter(&self) -> impl Iterator<Item = (&str, &T)> {
        self.0.iter().map(|(key, part)| (key.as_str(), part))
    }
}

impl<T: Serialize> Serialize for ByKey<T> {
    fn serialize<S: Serializer>(&self, serializer: S) -> Result<S::Ok, S::Error> {
        let mut map = serializer.serialize_map(Some(self.0.len()))?;
        for (key, part) in &self.0 {
            map.serialize_entry(key, part)?;
        }
        map.end()
    }
}

/// Something that happened. Of the four that it can have happened to, one is given.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct SimulationEvent {
    /// When, to the millisecond.
    pub at_s: Exact,
    /// What.
    pub kind: EventWord,
    /// Key of the opening.
    #[schema(required)]
    pub opening: Option<String>,
    /// Key of the fire.
    #[schema(required)]
    pub fire: Option<String>,
    /// Key of the detector.
    #[schema(required)]
    pub detector: Option<String>,
    /// Key of the sprinkler head.
    #[schema(required)]
    pub sprinkler: Option<String>,
}

/// What was lost or made in the computing, against what was there and what passed.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, ToSchema)]
pub struct SimulationBalance {
    /// Mass of gas.
    #[schema(required)]
    pub mass_error_relative: Option<Number>,
    /// Energy of gas and linings, outflow and losses.
    #[schema(required)]
    pub energy_error_relative: Option<Number>,
    /// The worst of carbon, hydrogen, oxygen and nitrogen.
    #[schema(required)]
    pub element_error_relative: Option<Number>,
}

/// The work it took.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Serialize, ToSchema)]
pub struct SimulationSolver {
    /// Steps taken.
    pub steps: usize,
    /// Steps tried and refused.
    pub rejected: usize,
}

/// What the reader should know.
#[derive(Debug, Clone, PartialEq, Eq, Serialize, ToSchema)]
pub struct SimulationNote {
    /// Stable word for programs.
    pub key: &'static str,
    /// JSON Pointer to the part of the request that it is about.
    pub pointer: String,
    /// One sentence for people.
    pub text: String,
}

/// A transient run: series by time, what happened, how well it was computed.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct SimulationResult {
    /// Times of the series: 0, one interval, two intervals and so on, and the end.
    pub time_s: Vec<Exact>,
    /// The rooms, by key. Fractions are of wet gas.
    #[schema(value_type = BTreeMap<String, SimulationRoom>)]
    pub rooms: ByKey<SimulationRoom>,
    /// The openings, by key.
    #[schema(value_type = BTreeMap<String, SimulationOpening>)]
    pub openings: ByKey<SimulationOpening>,
    /// What happened, in order.
    pub events: Vec<SimulationEvent>,
    /// How well mass, energy and elements were kept.
    pub balance: SimulationBalance,
    /// The work it took.
    pub solver: SimulationSolver,
    /// What the reader should know.
    pub notes: Vec<SimulationNote>,
    /// Version of the engine; the same version gives the same answer.
    pub engine_version: &'static str,
}

impl SimulationResult {
    /// The answer to a run.
    #[must_use]
    pub fn of(found: &Simulated) -> Self {
        Self {
            time_s: found.time_s.iter().copied().filter_map(Exact::of).collect(),
            rooms: ByKey(found.rooms.iter().map(|(key, room)| (key.to_string(), room.into())).collect()),
            openings: ByKey(
                found.openings.iter().map(|(key, open)| (key.to_string(), open.into())).collect(),
            ),
            events: found.events.iter().filter_map(event).collect(),
            balance: SimulationBalance {
                mass_error_relative: Number::of(found.mass_error_relative),
                energy_error_relative: Number::of(found.energy_error_relative),
                element_error_relative: Number::of(found.element_error_relative),
            },
            solver: SimulationSolver { steps: found.steps, rejected: found.rejected },
            notes: std::iter::once(planning_only()).chain(found.notes.iter().map(note)).collect(),
            engine_version: ENGINE_VERSION,
        }
    }
}

/// The caution that every run carries, as every report does; it is of the whole run.
fn planning_only() -> SimulationNote {
    SimulationNote { key: "planning_only", pointer: String::new(), text: PLANNING_ONLY.to_owned() }
}

/// Four significant digits would put an event of the evening ten seconds off; a millisecond is finer
/// than any of them is known.
fn event(event: &simulation::Event) -> Option<SimulationEvent> {
    const PER_SECOND: f64 = 1000.0;
    let mut told = SimulationEvent {
        at_s: Exact::of((event.at_s * PER_SECOND).round() / PER_SECOND)?,
        kind: event.kind.into(),
        opening: None,
        fire: None,
        detector: None,
        sprinkler: None,
    };
    let subject = match event.kind {
        EventKind::FireIgnited | EventKind::FireWentOut | EventKind::FireRelit | EventKind::FireBurntOut => {
            &mut told.fire
        }
        EventKind::OpeningMoved
        | EventKind::GlassFell
        | EventKind::DoorBurnedThrough
        | EventKind::OpeningGaveWay => &mut told.opening,
        EventKind::DetectorAnswered => &mut told.detector,
        EventKind::SprinklerOpened => &mut told.sprinkler,
    };
    *subject = Some(event.subject.to_string());
    Some(told)
}

fn note(note: &simulation::Note) -> SimulationNote {
    SimulationNote { key: note.key, pointer: note.pointer.to_string(), text: note.text.clone() }
}
