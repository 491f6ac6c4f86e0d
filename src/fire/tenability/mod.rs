//! What smoke and heat do to people, and when a way out is lost to them.
//!
//! [`Receptor`] takes from a room of two layers what a person at a height stands in; [`Dose`] sums what
//! that does over time, between samples along straight lines; [`WayOut`] is the rule that joins them.
//! A person is taken to stay where he is: who walks out takes less.

mod asphyxiants;
mod dose;
mod from_engine;
mod heat;
mod receptor;
mod visibility;
mod way_out;

pub use asphyxiants::{
    Asphyxiants, asphyxiants_limits, iso13571_carbon_monoxide_rate_1_min,
    iso13571_hydrogen_cyanide_rate_1_min, iso13571_hyperventilation, purser_low_oxygen_rate_1_min,
};
pub use dose::{Dose, Exposure, GasDose, HeatDose, Line};
pub use heat::{
    Clothing, Heat, heat_limits, iso13571_convective_rate_1_min, iso13571_radiant_burn_rate_1_min,
    iso13571_radiant_pain_rate_1_min,
};
pub use receptor::{Head, LayerAir, Receptor, Stretch, TwoLayers};
pub use visibility::{
    CLEAR_M, Sign, extinction_for_m, jin_visibility_limits, jin_visibility_m,
    mulholland_croarkin_extinction_1_m,
};
pub use way_out::{Cause, HEAD_LIMIT_K, LAYER_LIMIT_M, Lost, Reach, WayOut};
