//! What is written where a bar is missed: the miss, its likely cause, the experiment that would tell.
//!
//! A bar that is missed with nothing here fails the test; one that is met with something here does too.

/// Why a bar is missed.
#[derive(Clone, Copy, Debug)]
pub struct Miss {
    /// What is off, and which tests make it so.
    pub what: &'static str,
    /// What most likely makes it.
    pub cause: &'static str,
    /// What would separate the causes.
    pub experiment: &'static str,
}

pub const UPPER_RISE: Option<Miss> = None;
pub const LAYER_DEPTH: Option<Miss> = None;
pub const VENT_FLOW: Option<Miss> = None;
pub const NEUTRAL_PLANE: Option<Miss> = None;
pub const OXYGEN_FORCED: Option<Miss> = None;
pub const OXYGEN_SHUT: Option<Miss> = None;
pub const MEAN_RISE_SHUT: Option<Miss> = None;
pub const EXTINCTION_OXYGEN: Option<Miss> = None;
pub const EXTINCTION_TIME: Option<Miss> = None;
pub const TIME_TO_500: Option<Miss> = None;
pub const REACHES_600: Option<Miss> = None;
pub const PEAK_RISE: Option<Miss> = None;
