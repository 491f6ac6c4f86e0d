//! Tests of the forms as a whole.

use crate as sootline;

#[path = "../../../tests/it/arbitrary.rs"]
mod arbitrary;
mod bad_input;
mod contract;
mod round_trip;
mod rules;
mod schema;
mod simulation;
