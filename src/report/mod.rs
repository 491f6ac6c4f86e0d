//! Findings to the documents that people and programs receive.
//!
//! [`building_report`] writes the report of a building, [`room_report`] takes one room out of it,
//! and [`room_report_bytes`] does the same with a report that was stored. Same findings, same
//! bytes. [`methods_document`] tells what every method is, [`table()`] prints a report for people.

pub mod backdraft;
pub mod building;
pub mod entry;
pub mod evidence;
pub mod figure;
pub mod fire;
pub mod flashover;
pub mod head;
pub mod methods;
pub mod number;
pub mod protection;
pub mod room;
pub mod simulation;
pub mod stored;
pub mod table;
pub mod text;
pub mod timeline;
pub mod transient;
pub mod words;

#[cfg(test)]
mod sample;
#[cfg(test)]
mod tests;

pub use building::{BuildingReport, building_report};
pub use head::Head;
pub use methods::{Methods, methods_document};
pub use room::{RoomReport, room_report};
pub use stored::room_report_bytes;
pub use table::table;
