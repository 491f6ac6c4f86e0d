//! Building, catalogue and assumptions to scenarios, `fire`, findings, ratings and reasons.
//!
//! Pure: no I/O, no clock, no log. A whole building can be assessed in a unit test.
//!
//! The way through: `plan` numbers rooms and openings, `inputs` resolves one room with everything that was
//! assumed, `openings` says what stands open in a scenario, `judge` sets the heat that is there against the heat
//! required, `scenarios` does so for every scenario, and `room` gathers the findings, one subject a file. At level
//! transient `transient` runs the building as a network, and its rating takes the place of the screen's.

pub mod findings;
pub mod rules;
pub mod simulation;

mod assumed;
mod backdraft;
mod cautions;
mod clocks;
mod contents;
mod digest;
mod engine_fuel;
mod entry;
mod flashover;
mod geometry;
mod hazards;
mod holds_while;
mod inputs;
mod judge;
mod large_spaces;
mod linings;
mod methods;
mod not_covered;
mod openings;
mod plan;
mod protection;
mod ranking;
mod room;
mod scenarios;
mod smoke;
mod timeline;
mod transient;
mod watchers;
mod water;

#[cfg(test)]
mod testing;
#[cfg(test)]
mod tests;

use std::ops::ControlFlow;

pub use findings::{BuildingFindings, RoomFindings, Stop};

use crate::catalogue::Catalogue;
use crate::domain::assumptions::Level;
use crate::domain::{Assumptions, Building};

/// Raised by hand whenever any result may change.
pub const ENGINE_VERSION: &str = "2.0.0";

/// Number of the rating rule, printed in every report; its clauses are [`rules::CLAUSES`].
pub const RATING_RULE: u32 = 2;

/// Assesses every room of a building: by transient runs, or by screening where that is asked for.
///
/// Level sampled is answered by transient runs, and the findings say so in `level`.
///
/// # Errors
///
/// [`Stop`] as soon as `watch` breaks; it is asked before each room, and at each step of a run.
pub fn assess(
    building: &Building,
    catalogue: &Catalogue,
    assumptions: &Assumptions,
    watch: &mut dyn FnMut() -> ControlFlow<Stop>,
) -> Result<BuildingFindings, Stop> {
    let level = match assumptions.level {
        Some(Level::Screening) => Level::Screening,
        None | Some(Level::Transient | Level::Sampled) => Level::Transient,
    };
    let plan = plan::Plan::of(building, catalogue);
    let (spans, assumed) = clocks::Spans::of(building, assumptions);
    let cautions = cautions::of_building(building, assumptions, level);
    let common = room::Common { assumptions, assumed: &assumed, cautions: &cautions };
    let mut gathered = digest::Gathered::of(&plan, &spans, assumptions, catalogue.digest());

    let mut resolved = Vec::with_capacity(building.rooms.len());
    let mut accounts = Vec::with_capacity(building.rooms.len());
    for (number, room) in building.rooms.iter().enumerate() {
        let mut account = assumed::Account::of_room(&room.key);
        let inputs = inputs::Inputs::of(number, &plan, catalogue, assumptions, &mut account);
        match &inputs {
            Ok(inputs) => gathered.room(inputs),
            Err(missing) => gathered.unresolved(missing),
        }
        let (inputs, missing) = match inputs {
            Ok(inputs) => (Some(inputs), None),
            Err(missing) => (None, Some(missing)),
        };
        resolved.push(inputs);
        accounts.push((account, missing));
    }
    let whole = transient::Whole { plan: &plan, rooms: &resolved, catalogue, assumptions };

    let mut rooms = Vec::with_capacity(building.rooms.len());
    for ((number, room), (account, missing)) in building.rooms.iter().enumerate().zip(accounts) {
        if let ControlFlow::Break(stop) = watch() {
            return Err(stop);
        }
        match whole.inputs(number) {
            Some(inputs) => {
                let clock = clocks::Clock::of(inputs, spans);
                let studied = match level {
                    Level::Screening => transient::Studied::NotAsked,
                    Level::Transient | Level::Sampled => {
                        let asked = assumptions.scenarios.as_deref();
                        transient::Studied::of(&whole, inputs, asked, &clock, watch)?
                    }
                };
                rooms.push(room::assess(inputs, &common, account, clock, &studied));
            }
            None => {
                let missing = missing.unwrap_or_default();
                rooms.push(room::unresolved(room, &room.key, &missing, &common));
            }
        }
    }
    let ranking = ranking::ranking(&rooms);
    let methods = methods::union(rooms.iter().flat_map(|room| &room.methods));
    Ok(BuildingFindings {
        engine_version: ENGINE_VERSION,
        rating_rule: RATING_RULE,
        catalogue_digest: catalogue.digest().to_owned(),
        input_digest: gathered.finish(),
        level,
        seed: assumptions.seed.unwrap_or(0),
        rooms,
        ranking,
        assumptions: assumed,
        methods,
        cautions,
    })
}
