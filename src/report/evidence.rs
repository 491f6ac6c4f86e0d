//! What a report rests on: assumptions, methods, rules, and the cautions that go with it.

use std::borrow::Cow;

use serde::Serialize;
use utoipa::ToSchema;

use super::number::{Exact, Number};
use super::text::cautions;
use super::words::ProvenanceWord;
use crate::assessment::findings::{self, AssumedValue};
use crate::assessment::rules;
use crate::domain::Key;

/// A value that nobody recorded, and what stands for it.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct Assumption {
    /// The room; null where the value belongs to the building.
    #[schema(required)]
    pub room: Option<String>,
    /// The member, by its path in the room or building.
    pub field: Cow<'static, str>,
    /// The value, in the unit that ends the member's name.
    #[schema(required)]
    pub value: Option<Value>,
    /// Where it comes from.
    pub source: Cow<'static, str>,
    /// Whether that was read, recalled or set by this project.
    pub provenance: ProvenanceWord,
}

/// The value of an assumption.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
#[serde(untagged)]
#[schema(as = AssumedValue)]
pub enum Value {
    /// A number.
    Number(Exact),
    /// A word, such as a key of the catalogue.
    Text(Cow<'static, str>),
    /// Yes or no.
    Flag(bool),
}

/// A number of the catalogue is echoed exactly. One that was worked out from it (half a diagonal,
/// a leakage area) is a finding like any other, and shows by its many digits.
fn assumed_number(number: f64) -> Option<Value> {
    const LONGEST_OF_THE_CATALOGUE: usize = 6;
    let as_it_came = format!("{number:e}");
    let digits = as_it_came.split('e').next().map_or(0, |m| m.chars().filter(char::is_ascii_digit).count());
    if digits <= LONGEST_OF_THE_CATALOGUE {
        Exact::of(number).map(Value::Number)
    } else {
        Number::of(number).and_then(|rounded| Exact::of(rounded.get())).map(Value::Number)
    }
}

impl From<&findings::Assumed> for Assumption {
    fn from(assumed: &findings::Assumed) -> Self {
        Self {
            room: assumed.room.as_ref().map(Key::to_string),
            field: assumed.field.clone(),
            value: match &assumed.value {
                AssumedValue::Number(number) => assumed_number(*number),
                AssumedValue::Text(text) => Some(Value::Text(text.clone())),
                AssumedValue::Flag(flag) => Some(Value::Flag(*flag)),
            },
            source: assumed.source.clone(),
            provenance: assumed.provenance.into(),
        }
    }
}

/// A method that a figure names.
#[derive(Debug, Clone, PartialEq, Eq, Serialize, ToSchema)]
pub struct MethodUsed {
    /// Key, as in `figures`.
    pub key: &'static str,
    /// Name for people.
    pub title: &'static str,
    /// Publication.
    pub source: &'static str,
    /// Whether its text was read or recalled.
    pub provenance: ProvenanceWord,
}

impl From<&findings::MethodUsed> for MethodUsed {
    fn from(method: &findings::MethodUsed) -> Self {
        Self {
            key: method.key,
            title: method.title,
            source: method.source,
            provenance: method.provenance.into(),
        }
    }
}

/// A caution.
#[derive(Debug, Clone, PartialEq, Eq, Serialize, ToSchema)]
pub struct Caution {
    /// Stable word for programs.
    pub key: &'static str,
    /// One or two sentences for people.
    pub text: Cow<'static, str>,
}

impl From<&findings::Caution> for Caution {
    fn from(caution: &findings::Caution) -> Self {
        Self { key: caution.key, text: caution.text.clone() }
    }
}

/// Those that every report carries, then those that were found for the building.
pub(super) fn building_cautions(found: &[findings::Caution]) -> Vec<Caution> {
    let always = cautions::ALWAYS.iter().map(|&(key, text)| Caution { key, text: Cow::Borrowed(text) });
    let others = found.iter().filter(|caution| !is_always(caution.key)).map(Caution::from);
    always.chain(others).collect()
}

/// Those of the room that the building's list does not carry already.
pub(super) fn room_cautions(found: &[findings::Caution], building: &[Caution]) -> Vec<Caution> {
    let said = |caution: &&findings::Caution| building.iter().any(|known| known.key == caution.key);
    found.iter().filter(|caution| !said(caution)).map(Caution::from).collect()
}

fn is_always(key: &str) -> bool {
    cautions::ALWAYS.iter().any(|(known, _)| *known == key)
}

/// Something the bureau is asked to record.
#[derive(Debug, Clone, PartialEq, Eq, Serialize, ToSchema)]
pub struct Wanted {
    /// Stable word for programs.
    pub key: &'static str,
    /// One sentence for people.
    pub text: Cow<'static, str>,
}

impl From<&findings::Wanted> for Wanted {
    fn from(wanted: &findings::Wanted) -> Self {
        Self { key: wanted.key, text: wanted.text.clone() }
    }
}

/// A clause of the rules that give the ratings.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Serialize, ToSchema)]
#[schema(as = RatingRule)]
pub struct Rule {
    /// Its number: the set, then the clause.
    pub number: &'static str,
    /// What it says.
    pub text: &'static str,
}

/// The rules, in order.
pub(super) fn rules() -> Vec<Rule> {
    rules::CLAUSES.iter().map(|clause| Rule { number: clause.number, text: clause.text }).collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn what_the_catalogue_says_is_echoed_and_what_was_worked_out_is_rounded() {
        for (number, expected) in [(0.0127, 0.0127), (17.8645, 17.8645), (0.024_515_999_999_999_996, 0.02452)]
        {
            assert_eq!(assumed_number(number), Exact::of(expected).map(Value::Number));
        }
        assert_eq!(assumed_number(f64::INFINITY), None);
    }
}
