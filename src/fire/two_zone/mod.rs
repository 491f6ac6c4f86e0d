//! The transient engine: two layers in every room of a network.

#![expect(clippy::needless_range_loop, reason = "rows, columns and layers are told by their numbers")]

mod balance;
mod building;
mod combustion;
mod controls;
mod devices;
mod drive;
mod events;
mod gas;
mod jets;
mod matrix;
mod network;
#[cfg(test)]
mod order;
mod outcome;
mod plume;
mod radiation;
mod rates;
mod real;
mod right_side;
mod room;
mod sampling;
mod snapshot;
mod solver;
mod surfaces;
mod vents;

pub use drive::run;
pub use network::{
    Ambient, Detector, Element, Fan, Fire, Fuel, GivesWay, HeatRelease, Ignition, Lie, Linings, Move,
    Network, Opening, Position, Room, Side, Slab, Sprinkler, Supply, Zoning,
};
pub use outcome::{
    Balance, Composition, Ended, Event, EventKind, Failed, FailureReason, FireState, Layer, Note,
    OpeningState, Plan, RoomState, Sample, Work,
};
pub use right_side::RightSide;
