//! The transient level: the whole building as a network of two-layer rooms.
//!
//! `wing` says which rooms stand one by one and which count as one; `shell` and `fires` turn rooms, openings and contents
//! into the engine's; `stand` says how openings stand in a scenario; `network` joins them; `course` runs one and keeps what
//! is asked for; `study` makes the runs of a room; `findings`, `place`, `disagreements` and `holds` tell what came out.

mod course;
mod disagreements;
mod findings;
mod fires;
mod holds;
mod network;
mod people;
mod place;
mod rating;
mod shell;
mod stand;
mod study;
mod wing;

use std::ops::ControlFlow;

use super::clocks::Clock;
use super::findings::{FlashoverFinding, FlashoverRating, Reason, Stop, TransientFinding};
use super::inputs::Inputs;
use super::scenarios::Screened;
use crate::domain::assumptions::Scenario;

pub(in crate::assessment) use network::Whole;
pub(in crate::assessment) use study::Study;

/// The runs of a room, or the reason why there are none.
pub(in crate::assessment) enum Studied {
    /// At level screening.
    NotAsked,
    /// The engine gave no answer for this room.
    Without(Reason),
    /// All of them.
    Done(Box<Study>),
}

impl Studied {
    /// Makes the runs of a room; [`Stop`] only where `watch` breaks.
    pub(in crate::assessment) fn of<'a>(
        whole: &Whole<'a>,
        origin: &Inputs<'a>,
        asked: Option<&[Scenario]>,
        clock: &Clock,
        watch: &mut dyn FnMut() -> ControlFlow<Stop>,
    ) -> Result<Self, Stop> {
        match Study::of(whole, origin, asked, clock, watch) {
            Ok(study) => Ok(Self::Done(Box::new(study))),
            Err(study::NoStudy::Stopped) => Err(Stop),
            Err(none) => Ok(Self::Without(rating::no_study(&none))),
        }
    }

    /// The study, where there is one.
    pub(in crate::assessment) fn done(&self) -> Option<&Study> {
        match self {
            Self::Done(study) => Some(study),
            Self::NotAsked | Self::Without(_) => None,
        }
    }
}

/// The flashover finding by the runs, and what else they say.
pub(in crate::assessment) fn findings(
    inputs: &Inputs<'_>,
    studied: &Studied,
    screened: &[Screened],
    clock: &Clock,
    large: &[&'static str],
    by_screen: FlashoverFinding,
) -> (FlashoverFinding, Option<TransientFinding>) {
    match studied {
        Studied::NotAsked => (by_screen, None),
        Studied::Without(reason) => {
            let finding = FlashoverFinding {
                rating: FlashoverRating::NotAssessed,
                time_s: None,
                time_to_600_c_s: None,
                time_to_20_kw_m2_s: None,
                reason: Some(reason.clone()),
                before_water: None,
                before_water_case: None,
                holds_while: Vec::new(),
                clauses: vec!["2.1", "2.13"],
                ..by_screen
            };
            (finding, None)
        }
        Studied::Done(study) => {
            let found = findings::finding(inputs, study, screened);
            (rating::finding(inputs, study, &found, clock, large, by_screen), Some(found))
        }
    }
}

#[cfg(test)]
pub(in crate::assessment) use wing::Reach;

/// One run with typical inputs, for tests.
#[cfg(test)]
pub(in crate::assessment) fn trial(
    building: &crate::domain::Building,
    origin: usize,
    scenario: Scenario,
    reach: Reach,
) -> study::Ran {
    use super::assumed::Account;
    use super::clocks::Spans;
    use super::plan::Plan;
    use crate::catalogue::Catalogue;
    use crate::domain::Assumptions;

    let (catalogue, assumptions) = (Catalogue::embedded(), Assumptions::default());
    let plan = Plan::of(building, catalogue);
    let (spans, _) = Spans::of(building, &assumptions);
    let rooms: Vec<_> = (0..building.rooms.len())
        .map(|number| Inputs::of(number, &plan, catalogue, &assumptions, &mut Account::default()).ok())
        .collect();
    let whole = Whole { plan: &plan, rooms: &rooms, catalogue, assumptions: &assumptions };
    let inputs = rooms[origin].as_ref().unwrap();
    let standing = stand::Standing::of(&plan, origin, scenario);
    let clock = Clock::of(inputs, spans);
    let made = whole.network(inputs, &standing, network::Corner::TYPICAL, &clock, reach).unwrap();
    let course =
        course::follow(&made, 3600.0, course::Depth::Flashover, &mut || ControlFlow::Continue(())).unwrap();
    study::Ran { standing, made, course }
}
