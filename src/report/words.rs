//! Closed words of the findings, as a report and its schema print them.

use std::borrow::Cow;

use serde::{Serialize, Serializer};
use utoipa::openapi::RefOr;
use utoipa::openapi::schema::{ObjectBuilder, Schema, Type};
use utoipa::{PartialSchema, ToSchema};

use crate::assessment::findings;
use crate::domain::word::Word;
use crate::domain::{assumptions, room};

/// What the words of a closed list tell, for the schema.
pub trait Told: Word {
    /// One or two sentences.
    const TELLS: &'static str;
}

/// A value printed as its word.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct Printed<W>(pub W);

impl<W: Word> Printed<W> {
    /// The word.
    #[must_use]
    pub fn word(self) -> &'static str {
        self.0.word()
    }
}

impl<W: Word> Serialize for Printed<W> {
    fn serialize<S: Serializer>(&self, serializer: S) -> Result<S::Ok, S::Error> {
        serializer.serialize_str(self.0.word())
    }
}

impl<W: Told> PartialSchema for Printed<W> {
    fn schema() -> RefOr<Schema> {
        ObjectBuilder::new()
            .schema_type(Type::String)
            .description(Some(W::TELLS))
            .enum_values(Some(W::EVERY.iter().map(|value| value.word())))
            .into()
    }
}

impl<W: Told> ToSchema for Printed<W> {
    fn name() -> Cow<'static, str> {
        Cow::Borrowed(W::LIST)
    }
}

impl<W> From<W> for Printed<W> {
    fn from(value: W) -> Self {
        Self(value)
    }
}

/// Enumerations of the findings carry their words; the list and what it tells are added.
macro_rules! of_findings {
    ($($name:ident as $alias:ident tells $tells:literal;)*) => {$(
        #[doc = concat!($tells, " See [`findings::", stringify!($name), "`].")]
        pub type $alias = Printed<findings::$name>;

        impl Word for findings::$name {
            const LIST: &'static str = stringify!($name);
            const EVERY: &'static [Self] = Self::ALL;

            fn word(self) -> &'static str {
                self.word()
            }
        }

        impl Told for findings::$name {
            const TELLS: &'static str = $tells;
        }
    )*};
}

/// Enumerations of the domain are closed lists already.
macro_rules! of_domain {
    ($($name:path as $alias:ident tells $tells:literal;)*) => {$(
        #[doc = $tells]
        pub type $alias = Printed<$name>;

        impl Told for $name {
            const TELLS: &'static str = $tells;
        }
    )*};
}

of_findings! {
    FlashoverRating as FlashoverWord tells "What an established flaming fire that nobody fights does in this room, never the chance of a fire. `not_indicated` is only to be read with `holds_while` and `not_covered`; `not_assessed` counts with the worst.";
    BackdraftRating as BackdraftWord tells "Whether the shut room can hold gas that burns violently once air reaches it. Screening gives `not_indicated`, `cannot_be_excluded` or `not_assessed`, which counts with the worst.";
    BackdraftOutcome as OutcomeWord tells "What follows when the shut room is opened.";
    LimitedBy as LimitWord tells "What holds the fire, or its gas, back.";
    BeforeWater as BeforeWaterWord tells "How sure the order of flashover and water on the fire is, over the corners of both.";
    Provenance as ProvenanceWord tells "Whether a published text was read, a value recalled without its text, or set by this project.";
    Direction as DirectionWord tells "On which side of the value the input must stay.";
    DetectedBy as DetectedByWord tells "What tells people of the fire first.";
    MilestoneKind as MilestoneWord tells "A moment of the fire or of the response.";
}

of_domain! {
    assumptions::Level as LevelWord tells "How deep the computation went.";
    assumptions::Scenario as ScenarioWord tells "A way the building may stand while the room burns.";
    assumptions::GrowthClass as GrowthWord tells "Growth of the t² fire: 1055 kW after 600, 300, 150 or 75 s.";
    room::Hazard as HazardWord tells "A hazard that the methods do not compute.";
    room::Place as PlaceWord tells "Where in the room the fire burns.";
    room::RoomKind as RoomKindWord tells "What sort of space.";
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_word_is_what_the_wire_carries() {
        assert_eq!(
            serde_json::to_string(&Printed(findings::FlashoverRating::NotIndicated)).unwrap(),
            "\"not_indicated\""
        );
        assert_eq!(
            serde_json::to_string(&Printed(assumptions::Scenario::ShutLate)).unwrap(),
            "\"shut_late\""
        );
    }

    #[test]
    fn no_rating_is_a_word_that_reassures() {
        let flashover = findings::FlashoverRating::ALL.iter().map(|rating| rating.word());
        let backdraft = findings::BackdraftRating::ALL.iter().map(|rating| rating.word());
        for word in flashover.chain(backdraft) {
            assert!(!["safe", "no_risk", "low", "clear", "pass", "green"].contains(&word), "{word}");
        }
    }
}
