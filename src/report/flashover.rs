//! Can the room flash over.

use std::borrow::Cow;

use serde::Serialize;
use utoipa::ToSchema;

use super::figure::{Figure, HoldsWhile, NotCovered, Range, each, number, range};
use super::number::Number;
use super::text::RATING_IS;
use super::words::{BeforeWaterWord, FlashoverWord, LimitWord, ScenarioWord};
use crate::assessment::findings;

/// Can the room flash over, when, and is that before or after water.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
#[schema(as = FlashoverFinding)]
pub struct Flashover {
    /// The rating: the worst over the scenarios.
    pub rating: FlashoverWord,
    /// What the rating is conditional on.
    pub rating_is: &'static str,
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
    pub reason: Option<Cow<'static, str>>,
    /// The same as a stable word for programs.
    #[schema(required)]
    pub reason_key: Option<&'static str>,
    /// Highest heat release asked for by the correlations in range.
    #[schema(required)]
    pub required_heat_release_kw: Option<Number>,
    /// Least heat release asked for by them.
    #[schema(required)]
    pub required_lowest_kw: Option<Number>,
    /// Heat release that the room can reach: the lesser of what fuel and air allow.
    #[schema(required)]
    pub available_heat_release_kw: Option<Number>,
    /// Which of the two it is.
    #[schema(required)]
    pub limited_by: Option<LimitWord>,
    /// The scenario that governs.
    #[schema(required)]
    pub scenario: Option<ScenarioWord>,
    /// Whether flashover comes before water is on the fire, with typical values.
    #[schema(required)]
    pub before_water: Option<bool>,
    /// How sure that is.
    #[schema(required)]
    pub before_water_case: Option<BeforeWaterWord>,
    /// An input that decides the rating is assumed, not measured.
    pub provisional: bool,
    /// Which inputs make it so.
    pub provisional_because: Vec<Cow<'static, str>>,
    /// What flips a `not_indicated`; null with any other rating.
    #[schema(required)]
    pub holds_while: Option<HoldsWhile>,
    /// What was not computed.
    pub not_covered: Vec<NotCovered>,
    /// What each method gave.
    pub figures: Vec<Figure>,
    /// Numbers of the clauses of the rating rules that gave the rating.
    pub clauses: Vec<&'static str>,
}

impl From<&findings::FlashoverFinding> for Flashover {
    fn from(found: &findings::FlashoverFinding) -> Self {
        Self {
            rating: found.rating.into(),
            rating_is: RATING_IS,
            probability: number(found.probability),
            time_s: range(found.time_s),
            time_to_600_c_s: range(found.time_to_600_c_s),
            time_to_20_kw_m2_s: range(found.time_to_20_kw_m2_s),
            reason: found.reason.as_ref().map(|reason| reason.text.clone()),
            reason_key: found.reason.as_ref().map(|reason| reason.key),
            required_heat_release_kw: number(found.required_heat_release_kw),
            required_lowest_kw: number(found.required_lowest_kw),
            available_heat_release_kw: number(found.available_heat_release_kw),
            limited_by: found.limited_by.map(Into::into),
            scenario: found.scenario.map(Into::into),
            before_water: found.before_water,
            before_water_case: found.before_water_case.map(Into::into),
            provisional: found.provisional,
            provisional_because: found.provisional_because.clone(),
            holds_while: HoldsWhile::of(&found.holds_while),
            not_covered: each(&found.not_covered),
            figures: each(&found.figures),
            clauses: found.clauses.clone(),
        }
    }
}
