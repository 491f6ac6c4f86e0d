//! Building, catalogue and assumptions to scenarios, `fire`, findings, ratings and reasons.
//!
//! Pure: no I/O, no clock, no log. A whole building can be assessed in a unit test.

pub mod findings;
pub mod rules;

use std::ops::ControlFlow;

pub use findings::{BuildingFindings, RoomFindings, Stop};

use crate::catalogue::Catalogue;
use crate::domain::{Assumptions, Building};

/// Raised by hand whenever any result may change.
pub const ENGINE_VERSION: &str = "1.0.0";

/// Number of the rating rule, printed in every report; its clauses are [`rules::CLAUSES`].
pub const RATING_RULE: u32 = 1;

/// Assesses every room of a building.
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
    let _ = (building, catalogue, assumptions);
    if let ControlFlow::Break(stop) = watch() {
        return Err(stop);
    }
    Err(Stop)
}
