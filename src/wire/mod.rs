//! The JSON forms that clients read and write.
//!
//! A body becomes a tree ([`json`]), the tree becomes a value of the domain, and everything that
//! is wrong with it comes back at once ([`read`]). Each object has one definition, from which
//! come the reading, the writing and the two schemas of the OpenAPI document.

mod assumptions;
mod basis;
mod building;
mod form;
mod input;
pub mod json;
mod list;
mod named;
mod number;
mod object;
mod opening;
mod output;
mod patch;
pub mod problem;
mod reader;
mod room;
mod scalar;
mod simulation;
pub mod stored;
mod text;

pub use input::{
    Assess, AssessInput, AssessmentRequest, AssumptionsInput, BuildingInput, Input, OpeningInput, Part,
    Refused, RoomInput, SimulationInput, read, read_json, read_part, read_part_value, read_value,
};
pub use named::WrittenProperties;
pub use output::{AssumptionsEcho, Building, Links, LocationEcho, Meta, Opening, Page, Room};
pub use patch::merge_patch;
pub use problem::{Problem, ProblemItem, Slug};

#[cfg(test)]
mod tests;
