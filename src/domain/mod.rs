//! What a building is: values checked on construction, quantities with units.
//!
//! Knows no JSON, no database and no physics. Whatever exists here is already
//! lawful: a [`Building`] can be assessed without a further check.

pub mod assumptions;
pub mod building;
pub mod caller;
pub mod check;
pub mod edit;
pub mod ids;
pub mod invalid;
pub mod named;
pub mod opening;
pub mod properties;
pub mod quantity;
pub mod room;
pub mod simulation;
pub mod time;
pub mod units;
pub mod word;

pub use assumptions::Assumptions;
pub use building::Building;
pub use caller::Caller;
pub use ids::{AssessmentId, BuildingId, Key};
pub use invalid::{Invalid, Pointer};
pub use named::Named;
pub use opening::Opening;
pub use quantity::Quantity;
pub use room::Room;
pub use simulation::Simulation;
pub use word::Word;
