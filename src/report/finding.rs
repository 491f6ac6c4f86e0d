//! The three findings of a room, which are never merged into one another.

use serde::Serialize;
use utoipa::ToSchema;

use super::number::{Exact, Number};
use super::words::{
    BackdraftOutcome, BackdraftRating, FlashoverRating, LimitedBy, PressureBand, Scenario,
};

/// A computed time, size or pressure with its spread: corners at level screening and transient,
/// 5, 50 and 95 % when sampled.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, ToSchema)]
pub struct Range {
    /// Least.
    pub low: Number,
    /// Typical.
    pub typical: Number,
    /// Greatest.
    pub high: Number,
}

impl Range {
    /// None where any of the three is not finite.
    #[must_use]
    pub fn of(low: f64, typical: f64, high: f64) -> Option<Self> {
        Some(Self { low: Number::of(low)?, typical: Number::of(typical)?, high: Number::of(high)? })
    }
}

/// What one method gave.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct Figure {
    /// Key of the method; its title and source stand under `methods`.
    pub method: String,
    /// What was computed; the unit ends the name.
    pub quantity: String,
    /// The value; null where the method gave none.
    #[schema(required)]
    pub value: Option<Number>,
    /// The scenario it was computed in, where it belongs to one.
    #[schema(required)]
    pub scenario: Option<Scenario>,
    /// Whether the room lies within the method's published range.
    pub in_range: bool,
    /// Which limits of that range the room exceeds, in words.
    pub exceeded: Vec<String>,
    /// Rests on a recalled value that nobody has checked against its text.
    pub unverified: bool,
}

/// The nearest change of one input that flips a `not_indicated`.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct HoldsWhile {
    /// The input, as in the building.
    pub field: String,
    /// Its value now.
    #[schema(required)]
    pub now: Option<Exact>,
    /// The value at which the rating changes.
    #[schema(required)]
    pub flips_at: Option<Number>,
    /// The same in words.
    pub text: String,
}

/// Can the room flash over, when, and is that before or after water.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
#[schema(as = FlashoverFinding)]
pub struct Flashover {
    /// The rating: the worst over the scenarios.
    pub rating: FlashoverRating,
    /// What the rating is conditional on.
    pub rating_is: String,
    /// Probability given such a fire; only at level sampled.
    #[schema(required)]
    pub probability: Option<Number>,
    /// Established burning to flashover, on the fire clock.
    #[schema(required)]
    pub time_s: Option<Range>,
    /// To a hot layer of 600 °C.
    #[schema(required)]
    pub time_to_600_c_s: Option<Range>,
    /// To 20 kW/m² on the floor.
    #[schema(required)]
    pub time_to_20_kw_m2_s: Option<Range>,
    /// Why there is no answer, or no time.
    #[schema(required)]
    pub reason: Option<String>,
    /// Highest heat release asked for by the correlations in range.
    #[schema(required)]
    pub required_heat_release_kw: Option<Number>,
    /// Heat release that the room can reach: the lesser of what fuel and air allow.
    #[schema(required)]
    pub available_heat_release_kw: Option<Number>,
    /// Which of the two it is.
    #[schema(required)]
    pub limited_by: Option<LimitedBy>,
    /// The scenario that governs.
    #[schema(required)]
    pub scenario: Option<Scenario>,
    /// Whether flashover comes before water is on the fire.
    #[schema(required)]
    pub before_water: Option<bool>,
    /// An input that decides the rating is assumed, not measured.
    pub provisional: bool,
    /// What flips a `not_indicated`; null with any other rating.
    #[schema(required)]
    pub holds_while: Option<HoldsWhile>,
    /// What was not computed.
    pub not_covered: Vec<String>,
    /// What each method gave.
    pub figures: Vec<Figure>,
}

/// Can a shut room hide gas that burns violently when air reaches it.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
#[schema(as = BackdraftFinding)]
pub struct Backdraft {
    /// The rating: the worst over the scenarios.
    pub rating: BackdraftRating,
    /// What the rating is conditional on.
    pub rating_is: String,
    /// Probability given such a fire; only at level sampled.
    #[schema(required)]
    pub probability: Option<Number>,
    /// What would follow; `not_assessed` at level screening.
    pub outcome: BackdraftOutcome,
    /// The scenario that governs.
    #[schema(required)]
    pub scenario: Option<Scenario>,
    /// The opening whose opening is worst.
    #[schema(required)]
    pub opening: Option<String>,
    /// From when the door is dangerous, on the fire clock.
    #[schema(required)]
    pub dangerous_from_s: Option<Range>,
    /// Until when; null with `beyond_horizon` true: it had not ended.
    #[schema(required)]
    pub dangerous_until_s: Option<Range>,
    /// The danger had not ended at the horizon.
    pub beyond_horizon: bool,
    /// Opening to ignition.
    #[schema(required)]
    pub ignition_delay_s: Option<Range>,
    /// Highest pressure above the outside air.
    #[schema(required)]
    pub peak_overpressure_pa: Option<Range>,
    /// The same as a band.
    #[schema(required)]
    pub pressure_band: Option<PressureBand>,
    /// What gives way.
    pub elements_failing: Vec<String>,
    /// How far the fireball reaches out of the opening.
    #[schema(required)]
    pub fireball_reach_m: Option<Range>,
    /// What holds the gas back from burning.
    #[schema(required)]
    pub limited_by: Option<LimitedBy>,
    /// Why this rating, or why there is none.
    #[schema(required)]
    pub reason: Option<String>,
    /// An input that decides the rating is assumed, not measured.
    pub provisional: bool,
    /// What flips a `not_indicated`; null with any other rating.
    #[schema(required)]
    pub holds_while: Option<HoldsWhile>,
    /// What was not computed.
    pub not_covered: Vec<String>,
    /// What each method gave.
    pub figures: Vec<Figure>,
}

/// How long a crew has after it opened a door onto the starved fire.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
#[schema(as = EntryFinding)]
pub struct Entry {
    /// The rating: the worst over the openings tried.
    pub rating: FlashoverRating,
    /// What the rating is conditional on.
    pub rating_is: String,
    /// Probability given such a fire; only at level sampled.
    #[schema(required)]
    pub probability: Option<Number>,
    /// The scenario that governs.
    #[schema(required)]
    pub scenario: Option<Scenario>,
    /// The opening that governs.
    #[schema(required)]
    pub opening: Option<String>,
    /// When it is opened, on the fire clock.
    #[schema(required)]
    pub opened_at_s: Option<Range>,
    /// Opening to flashover.
    #[schema(required)]
    pub time_to_flashover_s: Option<Range>,
    /// Opening to 260 °C at 1 m.
    #[schema(required)]
    pub time_to_260_c_s: Option<Range>,
    /// Opening to 10 kW/m² at 1 m.
    #[schema(required)]
    pub time_to_10_kw_m2_s: Option<Range>,
    /// How the room stands when it is opened.
    #[schema(required)]
    pub state_at_opening: Option<String>,
    /// The openings that were tried.
    pub openings_tried: Vec<String>,
    /// Why there is no answer.
    #[schema(required)]
    pub reason: Option<String>,
    /// An input that decides the rating is assumed, not measured.
    pub provisional: bool,
    /// What flips a `not_indicated`; null with any other rating.
    #[schema(required)]
    pub holds_while: Option<HoldsWhile>,
    /// What was not computed.
    pub not_covered: Vec<String>,
    /// What each method gave.
    pub figures: Vec<Figure>,
}
