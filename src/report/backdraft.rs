//! Can a shut room hide a backdraft.

use std::borrow::Cow;

use serde::Serialize;
use utoipa::ToSchema;

use super::figure::{Figure, HoldsWhile, NotCovered, Range, each, number, range};
use super::number::Number;
use super::text::RATING_IS;
use super::words::{BackdraftWord, LimitWord, OutcomeWord, ScenarioWord};
use crate::assessment::findings;
use crate::domain::Key;

/// Bands of the overpressure; the findings carry the word.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Serialize, ToSchema)]
pub enum PressureBand {
    /// Under 100 Pa.
    #[serde(rename = "under_100_pa")]
    Under100Pa,
    /// 100 to 1000 Pa.
    #[serde(rename = "100_to_1000_pa")]
    From100To1000Pa,
    /// 1 to 10 kPa.
    #[serde(rename = "1_to_10_kpa")]
    From1To10KPa,
    /// Over 10 kPa.
    #[serde(rename = "over_10_kpa")]
    Over10KPa,
}

/// Can a shut room hide gas that burns violently when air reaches it.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
#[schema(as = BackdraftFinding)]
pub struct Backdraft {
    /// The rating: the worst over the scenarios.
    pub rating: BackdraftWord,
    /// What the rating is conditional on.
    pub rating_is: &'static str,
    /// Probability given such a fire; only at level sampled.
    #[schema(required)]
    pub probability: Option<Number>,
    /// What would follow; `not_assessed` at level screening.
    pub outcome: OutcomeWord,
    /// The scenario that governs.
    #[schema(required)]
    pub scenario: Option<ScenarioWord>,
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
    #[schema(required, value_type = Option<PressureBand>)]
    pub pressure_band: Option<&'static str>,
    /// What gives way.
    pub elements_failing: Vec<&'static str>,
    /// How far the fireball reaches out of the opening.
    #[schema(required)]
    pub fireball_reach_m: Option<Range>,
    /// Excess fuel gas per kilogram of layer gas, MJ/kg: what the screen judges by.
    #[schema(required)]
    pub excess_fuel_mj_kg: Option<Range>,
    /// Temperature of the layer when the flame dies.
    #[schema(required)]
    pub layer_temperature_c: Option<Range>,
    /// When the flame dies, on the fire clock.
    #[schema(required)]
    pub flame_out_s: Option<Range>,
    /// What holds the gas back from burning.
    #[schema(required)]
    pub limited_by: Option<LimitWord>,
    /// Why this rating, or why there is none.
    #[schema(required)]
    pub reason: Option<Cow<'static, str>>,
    /// The same as a stable word for programs.
    #[schema(required)]
    pub reason_key: Option<&'static str>,
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

impl From<&findings::BackdraftFinding> for Backdraft {
    fn from(found: &findings::BackdraftFinding) -> Self {
        Self {
            rating: found.rating.into(),
            rating_is: RATING_IS,
            probability: number(found.probability),
            outcome: found.outcome.into(),
            scenario: found.scenario.map(Into::into),
            opening: found.opening.as_ref().map(Key::to_string),
            dangerous_from_s: range(found.dangerous_from_s),
            dangerous_until_s: range(found.dangerous_until_s),
            beyond_horizon: found.beyond_horizon,
            ignition_delay_s: range(found.ignition_delay_s),
            peak_overpressure_pa: range(found.peak_overpressure_pa),
            pressure_band: found.pressure_band,
            elements_failing: found.elements_failing.clone(),
            fireball_reach_m: range(found.fireball_reach_m),
            excess_fuel_mj_kg: range(found.excess_fuel_mj_kg),
            layer_temperature_c: range(found.layer_temperature_c),
            flame_out_s: range(found.flame_out_s),
            limited_by: found.limited_by.map(Into::into),
            reason: found.reason.as_ref().map(|reason| reason.text.clone()),
            reason_key: found.reason.as_ref().map(|reason| reason.key),
            provisional: found.provisional,
            provisional_because: found.provisional_because.clone(),
            holds_while: HoldsWhile::of(&found.holds_while),
            not_covered: each(&found.not_covered),
            figures: each(&found.figures),
            clauses: found.clauses.clone(),
        }
    }
}
