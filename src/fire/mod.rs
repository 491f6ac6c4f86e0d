//! Enclosure fire dynamics: numbers in, numbers out.
//!
//! SI units, heat release in kW, temperatures in kelvin. Nothing here knows a building, a
//! catalogue, a clock or a log. A correlation computes whatever it is given; what it was never
//! fitted for is told by its sibling `*_limits`, which returns [`Exceeded`].

pub mod constants;
pub mod error;
pub mod exceeded;
pub mod methods;
pub mod sources;

pub mod growth;

pub mod design_fire;
pub mod fuel_load;

pub mod ventilation;

pub mod linings;

pub mod flashover;
pub mod hot_layer;

pub mod screen;

pub mod ceiling_jet;
pub mod flame;
pub mod plume;

pub mod detection;
pub mod sprinkler;

pub mod smoke_filling;

pub mod glazing;
pub mod radiation;
pub mod spread;
pub mod two_zone;

pub mod leakage;
pub mod oxygen;

pub mod excess_fuel;

pub mod fire_flow;

pub mod crew;
pub mod tenability;

pub mod door_burn_through;
pub mod door_force;
pub mod give_way;

pub mod place;

mod crossing;
mod search;

pub use design_fire::DesignFire;
pub use error::NotConverged;
pub use exceeded::Exceeded;
