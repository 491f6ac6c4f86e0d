//! Building, catalogue and assumptions to scenarios, `fire`, findings, ratings and reasons.
//!
//! Pure: no I/O, no clock, no log. A whole building can be assessed in a unit test.
//!
//! The way through: `plan` numbers rooms and openings, `inputs` resolves one room with everything that was
//! assumed, `openings` says what stands open in a scenario, `judge` sets the heat that is there against the heat
//! required, `scenarios` does so for every scenario, and `room` gathers the findings, one subject a file.

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
pub mod transient;
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
pub const ENGINE_VERSION: &str = "1.0.0";

/// Number of the rating rule, printed in every report; its clauses are [`rules::CLAUSES`].
pub const RATING_RULE: u32 = 1;

/// Assesses every room of a building by screening.
///
/// A deeper level asked for is answered by screening too, and the findings say so in `level`.
///
/// # Errors
///
/// [`Stop`] as soon as `watch` breaks; it is asked before each room.
pub fn assess(
    building: &Building,
    catalogue: &Catalogue,
    assumptions: &Assumptions,
    watch: &mut dyn FnMut() -> ControlFlow<Stop>,
) -> Result<BuildingFindings, Stop> {
    let plan = plan::Plan::of(building, catalogue);
    let (spans, assumed) = clocks::Spans::of(building, assumptions);
    let cautions = cautions::of_building(building, assumptions);
    let common = room::Common { spans, assumptions, assumed: &assumed, cautions: &cautions };
    let mut gathered = digest::Gathered::of(&plan, &spans, assumptions, catalogue.digest());

    let mut rooms = Vec::with_capacity(building.rooms.len());
    for (number, room) in building.rooms.iter().enumerate() {
        if let ControlFlow::Break(stop) = watch() {
            return Err(stop);
        }
        let mut account = assumed::Account::of_room(&room.key);
        match inputs::Inputs::of(number, &plan, catalogue, assumptions, &mut account) {
            Ok(inputs) => {
                gathered.room(&inputs);
                rooms.push(room::assess(&inputs, &common, account));
            }
            Err(missing) => {
                gathered.unresolved(&missing);
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
        level: Level::Screening,
        seed: assumptions.seed.unwrap_or(0),
        rooms,
        ranking,
        assumptions: assumed,
        methods,
        cautions,
    })
}
