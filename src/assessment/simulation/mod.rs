//! A transient run: what was asked becomes the engine's network, what the engine gives becomes
//! series, events and notes.
//!
//! [`Prepared::of`] makes the network and finds what cannot be run; [`Prepared::run`] runs it. Pure,
//! as the assessment is: no I/O, no clock, no log.

mod burning;
mod devices;
mod gas;
mod network;
mod notes;
mod series;

#[cfg(test)]
mod tests;

use std::ops::ControlFlow;

use super::Stop;
use crate::catalogue::Catalogue;
use crate::domain::word::Word;
use crate::domain::{Invalid, Key, Pointer, Simulation};
use crate::fire::two_zone::{self, FailureReason, Network, Plan};

pub use series::{OpeningSeries, RoomSeries};

/// A run that is ready to go.
#[derive(Debug, Clone, PartialEq)]
pub struct Prepared {
    network: Network,
    plan: Plan,
    keys: Keys,
    notes: Vec<Note>,
}

/// The keys of the parts, in the order of the network.
#[derive(Debug, Clone, PartialEq, Default)]
struct Keys {
    rooms: Vec<Key>,
    openings: Vec<Key>,
    fires: Vec<Key>,
    detectors: Vec<Key>,
    sprinklers: Vec<Key>,
}

/// What a run gave.
#[derive(Debug, Clone, PartialEq)]
pub struct Simulated {
    /// The times of the series, s.
    pub time_s: Vec<f64>,
    /// The rooms, in the order of the request.
    pub rooms: Vec<(Key, RoomSeries)>,
    /// The openings, in the order of the request.
    pub openings: Vec<(Key, OpeningSeries)>,
    /// What happened, in order.
    pub events: Vec<Event>,
    /// Mass of gas that was lost or made, against what was there and what passed.
    pub mass_error_relative: f64,
    /// Energy that was lost or made, likewise.
    pub energy_error_relative: f64,
    /// The worst of the elements, likewise.
    pub element_error_relative: f64,
    /// Steps taken.
    pub steps: usize,
    /// Steps tried and refused.
    pub rejected: usize,
    /// What the reader should know.
    pub notes: Vec<Note>,
}

/// What happened at a moment.
#[derive(Debug, Clone, PartialEq)]
pub struct Event {
    /// When, s.
    pub at_s: f64,
    /// What.
    pub kind: EventKind,
    /// Key of what it happened to.
    pub subject: Key,
}

/// What can happen.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum EventKind {
    /// A fire was lit.
    FireIgnited,
    /// A fire went out for want of oxygen.
    FireWentOut,
    /// A fire that was out burns again.
    FireRelit,
    /// A fire has no fuel left.
    FireBurntOut,
    /// An opening was moved by the schedule.
    OpeningMoved,
    /// Glass fell.
    GlassFell,
    /// A door burned through.
    DoorBurnedThrough,
    /// An opening gave way to pressure.
    OpeningGaveWay,
    /// A detector answered.
    DetectorAnswered,
    /// A sprinkler opened.
    SprinklerOpened,
}

impl Word for EventKind {
    const LIST: &'static str = "SimulationEventKind";
    const EVERY: &'static [Self] = &[
        Self::FireIgnited,
        Self::FireWentOut,
        Self::FireRelit,
        Self::FireBurntOut,
        Self::OpeningMoved,
        Self::GlassFell,
        Self::DoorBurnedThrough,
        Self::OpeningGaveWay,
        Self::DetectorAnswered,
        Self::SprinklerOpened,
    ];

    fn word(self) -> &'static str {
        match self {
            Self::FireIgnited => "fire_ignited",
            Self::FireWentOut => "fire_went_out",
            Self::FireRelit => "fire_relit",
            Self::FireBurntOut => "fire_burnt_out",
            Self::OpeningMoved => "opening_moved",
            Self::GlassFell => "glass_fell",
            Self::DoorBurnedThrough => "door_burned_through",
            Self::OpeningGaveWay => "opening_gave_way",
            Self::DetectorAnswered => "detector_answered",
            Self::SprinklerOpened => "sprinkler_opened",
        }
    }
}

/// What the reader of a run should know.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Note {
    /// Stable word for programs.
    pub key: &'static str,
    /// The part of the request that it is about.
    pub pointer: Pointer,
    /// One sentence for people.
    pub text: String,
}

/// Why a run gave nothing.
#[derive(Debug, Clone, PartialEq)]
pub enum Broken {
    /// Nobody wants it any more, or the caller's budget is spent.
    Stopped {
        /// Where it had got to, s.
        at_s: f64,
    },
    /// It took more steps than the engine allows.
    OutOfSteps {
        /// Where it had got to, s.
        at_s: f64,
    },
    /// There is no solution that the engine can follow.
    Unsolved {
        /// Where it had got to, s.
        at_s: f64,
        /// The room in which it broke off, by its place in the request, and its key.
        room: Option<(usize, Key)>,
        /// Why.
        reason: String,
    },
}

impl Prepared {
    /// Makes a run ready.
    ///
    /// # Errors
    ///
    /// Every part that is lawful by itself and cannot be run, with its place in the request.
    pub fn of(run: &Simulation, catalogue: &Catalogue) -> Result<Self, Vec<Invalid>> {
        let (network, mut notes) = network::of(run, catalogue)?;
        notes.extend(notes::of_request(run));
        let key = |keys: &mut dyn Iterator<Item = &Key>| keys.cloned().collect::<Vec<_>>();
        let keys = Keys {
            rooms: key(&mut run.rooms.iter().map(|room| &room.key)),
            openings: key(&mut run.openings.iter().map(|opening| &opening.key)),
            fires: key(&mut run.fires.iter().map(|fire| &fire.key)),
            detectors: key(&mut run.detectors.iter().map(|detector| &detector.key)),
            sprinklers: key(&mut run.sprinklers.iter().map(|head| &head.key)),
        };
        let plan = Plan {
            duration_s: run.duration_s.get(),
            samples_s: run.times_s(),
            tolerance: run.tolerance.map_or(Plan::TOLERANCE, |tolerance| tolerance.get()),
            step_budget: Plan::STEP_BUDGET,
        };
        Ok(Self { network, plan, keys, notes })
    }

    /// How many rooms a step has to follow.
    #[must_use]
    pub fn rooms(&self) -> usize {
        self.network.rooms.len()
    }

    /// Runs it; `watch` is asked at each step.
    ///
    /// # Errors
    ///
    /// [`Broken`], with the time, the room and the reason.
    pub fn run(&self, watch: &mut dyn FnMut() -> ControlFlow<Stop>) -> Result<Simulated, Broken> {
        let mut series = series::Recorder::of(&self.network, self.plan.samples_s.len());
        let mut go_on = || match watch() {
            ControlFlow::Continue(()) => ControlFlow::Continue(()),
            ControlFlow::Break(Stop) => ControlFlow::Break(()),
        };
        let ended = two_zone::run(&self.network, &self.plan, &mut |sample| series.take(sample), &mut go_on);
        let ended = ended.map_err(|failed| self.broken(&failed))?;
        if let Some((at_s, room)) = series.odd() {
            let room = room.and_then(|room| self.room(room));
            let reason = "the run gave a value that is no number".to_owned();
            return Err(Broken::Unsolved { at_s, room, reason });
        }
        if series.taken() != self.plan.samples_s.len() {
            let reason = "the run ended before it had given every output".to_owned();
            return Err(Broken::Unsolved { at_s: self.plan.duration_s, room: None, reason });
        }

        let (rooms, openings) = series.into_series();
        let mut notes = self.notes.clone();
        notes.extend(ended.notes.iter().map(|note| notes::of_engine(*note, &self.keys)));
        Ok(Simulated {
            time_s: self.plan.samples_s.clone(),
            rooms: self.keys.rooms.iter().cloned().zip(rooms).collect(),
            openings: self.keys.openings.iter().cloned().zip(openings).collect(),
            events: ended.events.iter().filter_map(|event| self.event(event)).collect(),
            mass_error_relative: ended.balance.mass_error_relative,
            energy_error_relative: ended.balance.energy_error_relative,
            element_error_relative: ended.balance.element_error_relative,
            steps: ended.work.steps,
            rejected: ended.work.rejected,
            notes,
        })
    }

    fn room(&self, index: usize) -> Option<(usize, Key)> {
        Some((index, self.keys.rooms.get(index)?.clone()))
    }

    fn broken(&self, failed: &two_zone::Failed) -> Broken {
        let two_zone::Failed { at_s, room, reason } = *failed;
        let reason = match reason {
            FailureReason::Stopped => return Broken::Stopped { at_s },
            FailureReason::OutOfSteps => return Broken::OutOfSteps { at_s },
            FailureReason::StepTooSmall => {
                "the state changes faster than a number can follow, however small the step".to_owned()
            }
            FailureReason::Malformed(what) => format!("the engine does not take it: {what}"),
        };
        Broken::Unsolved { at_s, room: room.and_then(|room| self.room(room)), reason }
    }

    fn event(&self, event: &two_zone::Event) -> Option<Event> {
        use two_zone::EventKind as Engine;
        let Keys { openings, fires, detectors, sprinklers, .. } = &self.keys;
        let (kind, list, index) = match event.kind {
            Engine::Ignited(index) => (EventKind::FireIgnited, fires, index),
            Engine::WentOut(index) => (EventKind::FireWentOut, fires, index),
            Engine::Relit(index) => (EventKind::FireRelit, fires, index),
            Engine::BurntOut(index) => (EventKind::FireBurntOut, fires, index),
            Engine::Moved(index) => (EventKind::OpeningMoved, openings, index),
            Engine::GlassFell(index) => (EventKind::GlassFell, openings, index),
            Engine::BurnedThrough(index) => (EventKind::DoorBurnedThrough, openings, index),
            Engine::GaveWay(index) => (EventKind::OpeningGaveWay, openings, index),
            Engine::Detected(index) => (EventKind::DetectorAnswered, detectors, index),
            Engine::SprinklerOpened(index) => (EventKind::SprinklerOpened, sprinklers, index),
        };
        Some(Event { at_s: event.at_s, kind, subject: list.get(index)?.clone() })
    }
}
