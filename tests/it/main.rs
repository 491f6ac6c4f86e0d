//! The service over HTTP, one file per resource.

// The example of a whole building is one `json!`.
#![recursion_limit = "256"]
#![expect(clippy::unwrap_used, reason = "a test may stop at what it cannot do")]

mod assessments;
mod bad_input;
mod buildings;
mod catalogue;
mod conditional;
mod docs;
mod fixtures;
mod openapi;
mod operations;
mod parts;
mod reading;
mod reports;
mod simulations;
mod support;
mod surface;
