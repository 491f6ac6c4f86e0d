//! The rating rules, numbered, in one place, with the text that reports print.
//!
//! Whoever changes a clause raises [`RATING_RULE`](super::RATING_RULE) and
//! [`ENGINE_VERSION`](super::ENGINE_VERSION).

use super::findings::{BackdraftRating, FlashoverRating};

/// One clause.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Clause {
    /// Number, `rule.clause`.
    pub number: &'static str,
    /// Text that reports print.
    pub text: &'static str,
}

/// Available over highest required heat release from which flashover is expected: the upper end of the
/// published scatter (two thirds of the data within 450 to 1050 about 750 A√H).
pub const EXPECTED_RATIO: f64 = 1.4;
/// Available over highest required heat release from which flashover is likely.
pub const LIKELY_RATIO: f64 = 1.0;
/// Available over lowest required heat release below which flashover is not indicated: the lower end of
/// the published scatter.
pub const NOT_INDICATED_RATIO: f64 = 0.6;

/// Floor area from which a room counts as large, m². Ours.
pub const LARGE_FLOOR_M2: f64 = 300.0;
/// Height from which a room counts as tall, m. Ours.
pub const TALL_M: f64 = 6.0;
/// Length over width from which a room counts as long. Ours.
pub const LONG_RATIO: f64 = 5.0;
/// Volume up to which the gas of a shut room counts as well mixed, m³: the range of the method.
pub const WELL_MIXED_M3: f64 = 500.0;

/// Rule 2, clause by clause.
pub const CLAUSES: &[Clause] = &[
    Clause {
        number: "2.1",
        text: "Every rating is conditional on an established flaming fire in this room that nobody fights. It is \
               never the chance of a fire.",
    },
    Clause {
        number: "2.2",
        text: "Flashover is the earlier of a hot layer of 600 °C and 20 kW/m² on the floor; both times are given. \
               By screening, where the fire has the heat that the highest correlation asks for before that, that moment counts.",
    },
    Clause {
        number: "2.3",
        text: "Flashover by screening compares A, the heat release that the room can reach (the lesser of fuel and \
               air), with R, the heat release required by the correlations in their published range (by all three \
               where none is). Expected: A at least 1.4 times the highest R. Likely: A at least the highest R. Not \
               indicated: with the fire load at its 95 % fractile A below 0.6 times the lowest R. Otherwise possible.",
    },
    Clause {
        number: "2.4",
        text: "A room without an opening is judged by its oxygen: the rise of its gas until the flame dies over the \
               rise to 600 °C takes the place of A over R.",
    },
    Clause {
        number: "2.5",
        text: "The rating is the worst over the scenarios and names its scenario. A scenario that could not be \
               assessed outranks possible and not indicated. Of equal ratings the one with the earliest flashover \
               counts.",
    },
    Clause {
        number: "2.6",
        text: "Backdraft by screening: heat of combustion of unburned gas per kg of layer gas when the flame dies, with \
               what hot fuel and lining give off afterwards, against 3.0 MJ/kg, less for gas above 600 K. Below it at \
               every corner: not indicated. Otherwise it cannot be excluded. Screening says no more than that. A room \
               of more than 500 m³ is not assessed.",
    },
    Clause { number: "2.7", text: "Entry is not assessed: it needs runs in which a crew opens the room." },
    Clause {
        number: "2.8",
        text: "A room with a floor above 300 m², higher than 6 m, or more than 5 times as long as wide, a stair, shaft or \
               atrium is a large space: whole-room flashover is the wrong question, its rating is not assessed, and flame \
               against ceiling and storage, spread to the next pile and descent of the layer are reported. At level transient it \
               is assessed like any other room if the run with typical inputs reaches 600 °C.",
    },
    Clause {
        number: "2.9",
        text: "A hazard outside the methods bars not indicated: the rating becomes possible, or cannot be excluded. Hazards \
               that nobody recorded bar nothing, but make every rating provisional.",
    },
    Clause {
        number: "2.10",
        text: "No credit is given to sprinklers, self-closers or alarms unless they are recorded as working and tested; the \
               findings say what they would change.",
    },
    Clause {
        number: "2.11",
        text: "A rating is provisional when an input that nobody recorded would change it between its low and high value.",
    },
    Clause {
        number: "2.12",
        text: "Rooms are ranked by the worst of their ratings. Not assessed stands with the worst. Ties are broken by \
               flashover before water, then by the number of bad ratings, then by the earliest flashover.",
    },
    Clause {
        number: "2.13",
        text: "Flashover at level transient is read off runs of the whole building: each criterion held for 10 s. Every scenario \
               is run with typical inputs; the worst (the earliest flashover, else the nearest to one) is run at four corners: \
               much or little fuel with fast or slow growth, linings and leakage that take little or much. Four that flash \
               over: expected. Three: likely. None, and none in any other scenario with much fuel: not indicated. Otherwise \
               possible.",
    },
    Clause {
        number: "2.14",
        text: "A run that comes to no end before flashover is never read as none: the room is not assessed, with the reason. \
               The fire stands in a corner or free, whichever comes nearer to flashover with the door open. Doors that shut \
               themselves do so on detection in the room as found and where glass falls; with the door open they do not.",
    },
];

/// Clause 2.3 (and 2.4) as a function: ratios of available to required heat release.
#[must_use]
pub fn flashover(typical_to_highest: f64, p95_to_lowest: f64) -> FlashoverRating {
    if typical_to_highest >= EXPECTED_RATIO {
        FlashoverRating::Expected
    } else if typical_to_highest >= LIKELY_RATIO {
        FlashoverRating::Likely
    } else if p95_to_lowest < NOT_INDICATED_RATIO {
        FlashoverRating::NotIndicated
    } else {
        FlashoverRating::Possible
    }
}

/// Clause 2.5: which rating of two scenarios governs.
#[must_use]
pub const fn flashover_severity(rating: FlashoverRating) -> u8 {
    match rating {
        FlashoverRating::NotIndicated => 0,
        FlashoverRating::Possible => 1,
        FlashoverRating::NotAssessed => 2,
        FlashoverRating::Likely => 3,
        FlashoverRating::Expected => 4,
    }
}

/// Clause 2.12: what a flashover or entry rating weighs between rooms.
#[must_use]
pub const fn flashover_weight(rating: FlashoverRating) -> u8 {
    match rating {
        FlashoverRating::NotIndicated => 0,
        FlashoverRating::Possible => 1,
        FlashoverRating::Likely => 2,
        FlashoverRating::Expected | FlashoverRating::NotAssessed => 3,
    }
}

/// Clause 2.12: what a backdraft rating weighs between rooms.
#[must_use]
pub const fn backdraft_weight(rating: BackdraftRating) -> u8 {
    match rating {
        BackdraftRating::NotIndicated => 0,
        BackdraftRating::CannotBeExcluded => 1,
        BackdraftRating::Credible => 2,
        BackdraftRating::CredibleViolent | BackdraftRating::NotAssessed => 3,
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn each_breakpoint_of_clause_2_3_belongs_to_the_worse_side() {
        for (highest, lowest, expected) in [
            (1.4, 2.0, FlashoverRating::Expected),
            (1.399, 2.0, FlashoverRating::Likely),
            (1.0, 2.0, FlashoverRating::Likely),
            (0.999, 2.0, FlashoverRating::Possible),
            (0.2, 0.6, FlashoverRating::Possible),
            (0.2, 0.599, FlashoverRating::NotIndicated),
        ] {
            assert_eq!(flashover(highest, lowest), expected, "{highest} {lowest}");
        }
    }

    #[test]
    fn clauses_are_numbered_in_order() {
        for (place, clause) in CLAUSES.iter().enumerate() {
            assert_eq!(clause.number, format!("{}.{}", super::super::RATING_RULE, place + 1));
        }
    }

    #[test]
    fn not_assessed_weighs_as_much_as_the_worst() {
        assert_eq!(
            flashover_weight(FlashoverRating::NotAssessed),
            flashover_weight(FlashoverRating::Expected)
        );
        assert_eq!(
            backdraft_weight(BackdraftRating::NotAssessed),
            backdraft_weight(BackdraftRating::CredibleViolent)
        );
    }
}
