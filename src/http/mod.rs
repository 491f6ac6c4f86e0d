//! Routes, extractors, errors to statuses.
//!
//! A handler converts, calls one method of the store or one piece of computing, and answers.
//! `routes` is the list of them all.

pub mod app;
pub mod problem;

mod answer;
mod ask;
pub mod assessing;
mod assessments;
mod body;
mod buildings;
mod caller;
mod catalogue;
mod catalogue_rows;
mod change;
mod conditional;
mod docs;
mod document;
mod examples;
mod forms;
mod headers;
mod kept;
mod layers;
mod media;
mod methods;
mod metrics;
mod openings;
mod pages;
mod paging;
mod params;
mod probes;
mod refusal;
mod rooms;
mod routes;
mod simulations;
mod summary;

pub use app::{App, Clock, Ids, Parts, SystemClock, UniqueIds};
pub use document::{openapi, openapi_text};
pub use forms::building_document;
pub use metrics::Metrics;
pub use routes::router;
