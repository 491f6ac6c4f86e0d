//! What every finding is made of: ranges, figures, bounds and what was left out.

use std::borrow::Cow;

use serde::Serialize;
use utoipa::ToSchema;

use super::number::Number;
use super::words::{DirectionWord, ScenarioWord};
use crate::assessment::findings;

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
    pub method: &'static str,
    /// What was computed; the unit ends the name.
    pub quantity: &'static str,
    /// The value; null where the method gave none.
    #[schema(required)]
    pub value: Option<Number>,
    /// The scenario it was computed in, where it belongs to one.
    #[schema(required)]
    pub scenario: Option<ScenarioWord>,
    /// Whether the room lies within the method's published range.
    pub in_range: bool,
    /// Which limits of that range the room exceeds, in words.
    pub exceeded: Vec<&'static str>,
    /// Rests on a recalled value that nobody has checked against its text.
    pub unverified: bool,
}

/// The bound of one input within which a `not_indicated` holds.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct Bound {
    /// The input, as in the building.
    pub field: &'static str,
    /// Its value now, as recorded, assumed or worked out from the building.
    #[schema(required)]
    pub now: Option<Number>,
    /// The value at which the rating changes; null where none within the input's limits does.
    #[schema(required)]
    pub value: Option<Number>,
    /// On which side of that value the input must stay.
    pub direction: DirectionWord,
    /// The same in words.
    pub text: String,
}

/// What a `not_indicated` hangs on: the nearest bound, and the further ones.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct HoldsWhile {
    /// The nearest.
    #[serde(flatten)]
    pub nearest: Bound,
    /// The others, nearest first.
    pub others: Vec<Bound>,
}

/// Something that was not computed.
#[derive(Debug, Clone, PartialEq, Eq, Serialize, ToSchema)]
pub struct NotCovered {
    /// Stable word for programs.
    pub key: &'static str,
    /// One sentence for people.
    pub text: Cow<'static, str>,
}

/// The range of a band that may be missing.
pub(super) fn range(band: Option<findings::Band>) -> Option<Range> {
    band.and_then(|band| Range::of(band.low, band.typical, band.high))
}

/// A number that may be missing.
pub(super) fn number(value: Option<f64>) -> Option<Number> {
    value.and_then(Number::of)
}

impl From<&findings::Figure> for Figure {
    fn from(figure: &findings::Figure) -> Self {
        Self {
            method: figure.method,
            quantity: figure.quantity,
            value: Number::of(figure.value),
            scenario: figure.scenario.map(Into::into),
            in_range: figure.in_range,
            exceeded: figure.exceeded.clone(),
            unverified: figure.unverified,
        }
    }
}

impl From<&findings::HoldsWhile> for Bound {
    fn from(holds: &findings::HoldsWhile) -> Self {
        Self {
            field: holds.field,
            now: Number::of(holds.now),
            value: number(holds.value),
            direction: holds.direction.into(),
            text: holds.words.clone(),
        }
    }
}

impl HoldsWhile {
    /// None where nothing is known to flip the rating.
    pub(super) fn of(bounds: &[findings::HoldsWhile]) -> Option<Self> {
        let (nearest, others) = bounds.split_first()?;
        Some(Self { nearest: nearest.into(), others: others.iter().map(Into::into).collect() })
    }
}

impl From<&findings::NotCovered> for NotCovered {
    fn from(left_out: &findings::NotCovered) -> Self {
        Self { key: left_out.key, text: left_out.text.clone() }
    }
}

/// Converts every element.
pub(super) fn each<'a, A: 'a, B: From<&'a A>>(list: &'a [A]) -> Vec<B> {
    list.iter().map(B::from).collect()
}
