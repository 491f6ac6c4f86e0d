//! Temperature of the hot layer under the ceiling: with an opening, with a fan, shut.

mod closed;
mod forced;
mod vented;

pub use closed::{Closed, beyler_closed_limits, beyler_closed_rise_k};
pub use forced::{
    Forced, deal_beyler_limits, deal_beyler_rise_k, foote_pagni_alvares_limits, foote_pagni_alvares_rise_k,
};
pub use vented::{
    GrowingVented, Position, Vented, mccaffrey_limits, mccaffrey_rise_k, mccaffrey_time_to_flashover_s,
    mccaffrey_time_to_rise_s, measured_position_factor, mowrer_williamson_factor,
};
