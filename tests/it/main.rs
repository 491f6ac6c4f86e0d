//! The service over HTTP, one file per resource.

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
mod support;
mod surface;
