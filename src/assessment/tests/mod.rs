//! What must hold for whole buildings, one claim a test.

mod clocks;
mod finite;
mod hazards;
mod openings;
mod protection;
mod ratings;
mod same;
mod transient;
mod trends;

use std::ops::ControlFlow;

use super::assess;
use super::findings::{BuildingFindings, RoomFindings, ScenarioFinding};
use crate::catalogue::Catalogue;
use crate::domain::assumptions::{Level, Scenario};
use crate::domain::{Assumptions, Building};

/// By screening, unless another level is asked for.
fn assessed_with(building: &Building, assumptions: &Assumptions) -> BuildingFindings {
    let level = assumptions.level.unwrap_or(Level::Screening);
    let assumptions = Assumptions { level: Some(level), ..assumptions.clone() };
    assess(building, Catalogue::embedded(), &assumptions, &mut || ControlFlow::Continue(())).unwrap()
}

fn assessed(building: &Building) -> BuildingFindings {
    assessed_with(building, &Assumptions::default())
}

/// The findings of the first room.
fn first(building: &Building) -> RoomFindings {
    assessed(building).rooms.remove(0)
}

/// One scenario of a room.
fn scenario(room: &RoomFindings, scenario: Scenario) -> &ScenarioFinding {
    room.scenarios.iter().find(|found| found.scenario == scenario).unwrap()
}
