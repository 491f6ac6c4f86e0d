//! What an assessment is asked to assume; every member is optional and echoed whole.

use super::building::Response;
use super::ids::Key;
use super::quantity::{Fraction, Span, Temperature};

/// How deep the computation goes.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub enum Level {
    /// Closed forms, microseconds.
    Screening,
    /// Two layers per room, the whole building as a network.
    Transient,
    /// Transient over uncertain inputs.
    Sampled,
}

/// A way the building may stand while a room burns.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum Scenario {
    /// Recorded states; self-closers and released hold-opens shut on detection.
    AsFound,
    /// The door to the way out stands open: someone fled.
    DoorOpen,
    /// Everything shut, leakage only.
    Shut,
    /// Shut late: when the layer reaches 400 °C, or 60 s after flashover.
    ShutLate,
    /// Glass falls by its criterion.
    WindowFails,
    /// Shut or as found until water-on-time, then the entry opened and left open.
    Entry,
}

impl Scenario {
    /// All, in the order of reports.
    pub const ALL: [Self; 6] =
        [Self::AsFound, Self::DoorOpen, Self::Shut, Self::ShutLate, Self::WindowFails, Self::Entry];
}

/// The growth classes of the t² fire.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
#[expect(missing_docs, reason = "the words are the trade's")]
pub enum GrowthClass {
    Slow,
    Medium,
    Fast,
    UltraFast,
}

/// Air around and inside the building before the fire.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub struct Ambient {
    /// Outside temperature; 20 °C unless given.
    pub temperature_c: Option<Temperature>,
    /// Indoor temperature; that outside unless given.
    pub indoor_temperature_c: Option<Temperature>,
    /// Wind speed in m/s, 0 to 60; zero unless given.
    pub wind_m_s: Option<f64>,
    /// Direction the wind comes from, degrees clockwise from north.
    pub wind_from_deg: Option<f64>,
}

/// What an assessment is asked to assume.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct Assumptions {
    /// Level; the service's default where absent.
    pub level: Option<Level>,
    /// Only these scenarios; all where absent.
    pub scenarios: Option<Vec<Scenario>>,
    /// Horizon; 60 min open and 120 min shut where absent.
    pub horizon_s: Option<Span>,
    /// Fractile of the fire load; 0.8 where absent.
    pub fuel_load_fractile: Option<Fraction>,
    /// Growth instead of the room's own.
    pub growth: Option<GrowthClass>,
    /// Item of origin: the key of a fuel package, in rooms that have it.
    pub item_of_origin: Option<Key>,
    /// Response spans instead of the building's own.
    pub response: Response,
    /// Ambient air.
    pub ambient: Ambient,
    /// Times of entry on the fire clock, for the entry scenario.
    pub entry_times_s: Option<Vec<Span>>,
    /// Seed of the sampling.
    pub seed: Option<u64>,
}
