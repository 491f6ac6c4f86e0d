//! The closed words of a report.

use serde::Serialize;
use utoipa::ToSchema;

/// Declares an enum that is snake_case on the wire and knows its own word.
macro_rules! words {
    ($($(#[$meta:meta])* $name:ident { $($(#[$inner:meta])* $variant:ident = $word:literal,)+ })+) => {$(
        $(#[$meta])*
        #[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash, Serialize, ToSchema)]
        pub enum $name {
            $($(#[$inner])* #[serde(rename = $word)] $variant,)+
        }

        impl $name {
            /// All, in the order of their declaration.
            pub const ALL: &'static [Self] = &[$(Self::$variant,)+];

            /// The word on the wire.
            #[must_use]
            pub const fn word(self) -> &'static str {
                match self { $(Self::$variant => $word,)+ }
            }
        }
    )+};
}

words! {
    /// Which rule gave the ratings.
    Level {
        /// Closed forms.
        Screening = "screening",
        /// Two layers per room over time.
        Transient = "transient",
        /// The transient run over uncertain inputs.
        Sampled = "sampled",
    }

    /// A way the building may stand while the room burns.
    Scenario {
        /// Recorded states; self-closing doors and released hold-opens shut on detection.
        AsFound = "as_found",
        /// The door to the way out stands open: someone fled.
        DoorOpen = "door_open",
        /// Everything shut, leakage only.
        Shut = "shut",
        /// Shut once the fire has grown.
        ShutLate = "shut_late",
        /// Glass falls by its criterion.
        WindowFails = "window_fails",
        /// A crew opens a door after the fire has burnt shut.
        Entry = "entry",
    }

    /// What an established flaming fire that nobody fights does in this room. Never the chance of a fire.
    FlashoverRating {
        /// Every scenario computed falls well short. Always read with `holds_while` and `not_covered`.
        NotIndicated = "not_indicated",
        /// Within the scatter of the published data.
        Possible = "possible",
        /// The fire reaches what the most demanding correlation asks for.
        Likely = "likely",
        /// The fire reaches far more than any correlation asks for.
        Expected = "expected",
        /// No answer: to be treated with the worst until there is one.
        NotAssessed = "not_assessed",
    }

    /// Whether a shut room can hold gas that burns violently once air reaches it.
    BackdraftRating {
        /// Every case computed falls short. Always read with `holds_while` and `not_covered`.
        NotIndicated = "not_indicated",
        /// The first screen does not exclude it.
        CannotBeExcluded = "cannot_be_excluded",
        /// The mixture can burn at median inputs.
        Credible = "credible",
        /// The mixture can burn violently at median inputs.
        CredibleViolent = "credible_violent",
        /// No answer: to be treated with the worst until there is one.
        NotAssessed = "not_assessed",
    }

    /// What follows when a shut room is opened.
    BackdraftOutcome {
        /// Nothing beyond the fire itself.
        None = "none",
        /// Air runs in, mixes, and the mixture burns out through the opening.
        Backdraft = "backdraft",
        /// The gas burns where it leaves.
        FlamingOutflow = "flaming_outflow",
        /// Mixed gas away from the fire ignites.
        SmokeExplosion = "smoke_explosion",
        /// Not computed at this level.
        NotAssessed = "not_assessed",
    }

    /// What holds the fire, or its gas, back.
    LimitedBy {
        /// The fuel that burns at once.
        Fuel = "fuel",
        /// The air through the openings.
        Ventilation = "ventilation",
        /// The oxygen inside the shut room.
        Oxygen = "oxygen",
        /// The gas that the shut fire has made and not burnt.
        UnburnedFuel = "unburned_fuel",
    }

    /// How strong the pressure wave is.
    PressureBand {
        /// Under 100 Pa.
        Under100Pa = "under_100_pa",
        /// 100 to 1000 Pa.
        From100To1000Pa = "100_to_1000_pa",
        /// 1 to 10 kPa.
        From1To10Kpa = "1_to_10_kpa",
        /// Over 10 kPa.
        Over10Kpa = "over_10_kpa",
    }

    /// Whether the text behind a number was read, or the number recalled.
    Provenance {
        /// Read in a published text or data set.
        Seen = "seen",
        /// Recalled without the text: to be checked before anything rests on it.
        Memory = "memory",
    }

    /// Classes of growth of the t² fire.
    Growth {
        /// 1055 kW after 600 s.
        Slow = "slow",
        /// 1055 kW after 300 s.
        Medium = "medium",
        /// 1055 kW after 150 s.
        Fast = "fast",
        /// 1055 kW after 75 s.
        UltraFast = "ultra_fast",
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_word_is_what_the_wire_carries() {
        for &rating in FlashoverRating::ALL {
            assert_eq!(serde_json::to_string(&rating).unwrap(), format!("\"{}\"", rating.word()));
        }
        for &band in PressureBand::ALL {
            assert_eq!(serde_json::to_string(&band).unwrap(), format!("\"{}\"", band.word()));
        }
    }

    #[test]
    fn no_rating_is_a_word_that_reassures() {
        let ratings = FlashoverRating::ALL.iter().map(|r| r.word());
        for word in ratings.chain(BackdraftRating::ALL.iter().map(|r| r.word())) {
            assert!(!["safe", "no_risk", "low", "clear", "pass", "green"].contains(&word));
        }
    }
}
