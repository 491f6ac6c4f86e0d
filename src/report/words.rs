//! Closed words of the findings, as a report and its schema print them.

use std::borrow::Cow;

use serde::{Serialize, Serializer};
use utoipa::openapi::RefOr;
use utoipa::openapi::schema::{ObjectBuilder, Schema, Type};
use utoipa::{PartialSchema, ToSchema};

use crate::assessment::findings;
use crate::domain::{assumptions, building, room};

/// A closed set of words.
pub trait Words: Copy + 'static {
    /// Name of the schema.
    const NAME: &'static str;
    /// What the words tell.
    const TELLS: &'static str;
    /// All of them, in order.
    const EVERY: &'static [Self];

    /// The word on the wire.
    fn word(self) -> &'static str;
}

/// A value printed as its word.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct Word<W>(pub W);

impl<W: Words> Serialize for Word<W> {
    fn serialize<S: Serializer>(&self, serializer: S) -> Result<S::Ok, S::Error> {
        serializer.serialize_str(self.0.word())
    }
}

impl<W: Words> PartialSchema for Word<W> {
    fn schema() -> RefOr<Schema> {
        ObjectBuilder::new()
            .schema_type(Type::String)
            .description(Some(W::TELLS))
            .enum_values(Some(W::EVERY.iter().map(|value| value.word())))
            .into()
    }
}

impl<W: Words> ToSchema for Word<W> {
    fn name() -> Cow<'static, str> {
        Cow::Borrowed(W::NAME)
    }
}

impl<W> From<W> for Word<W> {
    fn from(value: W) -> Self {
        Self(value)
    }
}

/// Enumerations of the findings carry their words; only the schema is added.
macro_rules! of_findings {
    ($($name:ident as $alias:ident tells $tells:literal;)*) => {$(
        #[doc = concat!($tells, " See [`findings::", stringify!($name), "`].")]
        pub type $alias = Word<findings::$name>;

        impl Words for findings::$name {
            const NAME: &'static str = stringify!($name);
            const TELLS: &'static str = $tells;
            const EVERY: &'static [Self] = Self::ALL;

            fn word(self) -> &'static str {
                self.word()
            }
        }
    )*};
}

/// Enumerations of the domain get their words here.
macro_rules! of_domain {
    ($($path:path, $name:ident as $alias:ident tells $tells:literal { $($variant:ident = $word:literal),+ $(,)? })*) => {$(
        #[doc = $tells]
        pub type $alias = Word<$path>;

        impl Words for $path {
            const NAME: &'static str = stringify!($name);
            const TELLS: &'static str = $tells;
            const EVERY: &'static [Self] = &[$(Self::$variant),+];

            fn word(self) -> &'static str {
                match self { $(Self::$variant => $word,)+ }
            }
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
    assumptions::Level, Level as LevelWord tells "How deep the computation went." {
        Screening = "screening", Transient = "transient", Sampled = "sampled",
    }
    assumptions::Scenario, Scenario as ScenarioWord tells "A way the building may stand while the room burns." {
        AsFound = "as_found", DoorOpen = "door_open", Shut = "shut", ShutLate = "shut_late",
        WindowFails = "window_fails", Entry = "entry",
    }
    assumptions::GrowthClass, GrowthClass as GrowthWord tells "Growth of the t² fire: 1055 kW after 600, 300, 150 or 75 s." {
        Slow = "slow", Medium = "medium", Fast = "fast", UltraFast = "ultra_fast",
    }
    room::Hazard, Hazard as HazardWord tells "A hazard that the methods do not compute." {
        None = "none", NotRecorded = "not_recorded", LithiumIon = "lithium_ion",
        GasCylinders = "gas_cylinders", FlammableLiquid = "flammable_liquid",
        FlammableGas = "flammable_gas", CombustibleDust = "combustible_dust", Oxidisers = "oxidisers",
        Explosives = "explosives", Hoard = "hoard", ExposedFoam = "exposed_foam",
        MedicalOxygen = "medical_oxygen",
    }
    room::Place, FirePlace as PlaceWord tells "Where in the room the fire burns." {
        Centre = "centre", Wall = "wall", Corner = "corner",
    }
    room::RoomKind, RoomKind as RoomKindWord tells "What sort of space." {
        Room = "room", Corridor = "corridor", Stair = "stair", Shaft = "shaft", Atrium = "atrium",
        Attic = "attic", Void = "void",
    }
    building::SprinklerState, SprinklerState as SprinklerWord tells "What is recorded of the sprinklers." {
        None = "none", NotRecorded = "not_recorded", OutOfService = "out_of_service",
        Installed = "installed", WorkingTested = "working_tested",
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_word_is_what_the_wire_carries() {
        assert_eq!(
            serde_json::to_string(&Word(findings::FlashoverRating::NotIndicated)).unwrap(),
            "\"not_indicated\""
        );
        assert_eq!(serde_json::to_string(&Word(assumptions::Scenario::ShutLate)).unwrap(), "\"shut_late\"");
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
