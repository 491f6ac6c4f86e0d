//! Routes, extractors, errors to statuses.
//!
//! A handler converts, calls one method of the store or one piece of computing, and answers.
//! [`routes`] is the list of them all.

pub mod app;
pub mod problem;

mod ask;
mod body;
mod caller;
mod conditional;
mod docs;
mod document;
mod layers;
mod media;
mod metrics;
mod pages;
mod paging;
mod params;
mod probes;
mod routes;

pub use app::{App, Clock, Ids, Parts, SystemClock, UniqueIds};
pub use document::openapi;
pub use metrics::Metrics;
pub use routes::router;
