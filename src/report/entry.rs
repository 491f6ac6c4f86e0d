//! How long has a crew that opens up.

use std::borrow::Cow;

use serde::Serialize;
use utoipa::ToSchema;

use super::figure::{Figure, HoldsWhile, NotCovered, Range, each, number, range};
use super::number::Number;
use super::text::RATING_IS;
use super::words::{FlashoverWord, ScenarioWord};
use crate::assessment::findings;
use crate::domain::Key;

/// How long a crew has after it opened a door onto the starved fire.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
#[schema(as = EntryFinding)]
pub struct Entry {
    /// The rating: the worst over the openings tried.
    pub rating: FlashoverWord,
    /// What the rating is conditional on.
    pub rating_is: &'static str,
    /// Probability given such a fire; only at level sampled.
    #[schema(required)]
    pub probability: Option<Number>,
    /// The scenario that governs.
    #[schema(required)]
    pub scenario: Option<ScenarioWord>,
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
    pub state_at_opening: Option<Cow<'static, str>>,
    /// The openings that were tried.
    pub openings_tried: Vec<String>,
    /// Why there is no answer.
    #[schema(required)]
    pub reason: Option<Cow<'static, str>>,
    /// The same as a stable word for programs.
    #[schema(required)]
    pub reason_key: Option<&'static str>,
    /// An input that decides the rating is assumed, not measured.
    pub provisional: bool,
    /// What flips a `not_indicated`; null with any other rating.
    #[schema(required)]
    pub holds_while: Option<HoldsWhile>,
    /// What was not computed.
    pub not_covered: Vec<NotCovered>,
    /// What each method gave.
    pub figures: Vec<Figure>,
}

impl From<&findings::EntryFinding> for Entry {
    fn from(found: &findings::EntryFinding) -> Self {
        Self {
            rating: found.rating.into(),
            rating_is: RATING_IS,
            probability: number(found.probability),
            scenario: found.scenario.map(Into::into),
            opening: found.opening.as_ref().map(Key::to_string),
            opened_at_s: range(found.opened_at_s),
            time_to_flashover_s: range(found.time_to_flashover_s),
            time_to_260_c_s: range(found.time_to_260_c_s),
            time_to_10_kw_m2_s: range(found.time_to_10_kw_m2_s),
            state_at_opening: found.state_at_opening.clone(),
            openings_tried: found.openings_tried.iter().map(Key::to_string).collect(),
            reason: found.reason.as_ref().map(|reason| reason.text.clone()),
            reason_key: found.reason.as_ref().map(|reason| reason.key),
            provisional: found.provisional,
            holds_while: HoldsWhile::of(&found.holds_while),
            not_covered: each(&found.not_covered),
            figures: each(&found.figures),
        }
    }
}
