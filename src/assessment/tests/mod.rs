//! What must hold for whole buildings, one claim a test.

mod clocks;
mod finite;
mod hazards;
mod openings;
mod protection;
mod ratings;
mod same;
mod trends;

use std::ops::ControlFlow;

use super::assess;
use super::findings::{BuildingFindings, RoomFindings, ScenarioFinding};
use crate::catalogue::Catalogue;
use crate::domain::assumptions::Scenario;
use crate::domain::{Assumptions, Building};

fn assessed_with(building: &Building, assumptions: &Assumptions) -> BuildingFindings {
    assess(building, Catalogue::embedded(), assumptions, &mut || ControlFlow::Continue(())).unwrap()
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
