//! Closed lists of words, as they stand on the wire, in the catalogue and in reports.

use super::assumptions::{GrowthClass, Level, Scenario};
use super::building::{Coverage, SprinklerState};
use super::opening::{Glazing, OpeningKind, Side, Swing};
use super::properties::{DetectorKind, ExposedGrowth, IgnitionEase};
use super::room::{Basis, CeilingForm, Hazard, Place, ReactionToFire, RoomKind};
use super::simulation::{SupplyKind, Zoning};

/// A value out of a closed list, each with its word.
pub trait Word: Copy + PartialEq + std::fmt::Debug + 'static {
    /// Name of the list, as the OpenAPI document prints it.
    const LIST: &'static str;
    /// Every value, in the order of the document.
    const EVERY: &'static [Self];

    /// The word.
    fn word(self) -> &'static str;

    /// The value of a word.
    fn of_word(word: &str) -> Option<Self> {
        Self::EVERY.iter().copied().find(|value| value.word() == word)
    }
}

macro_rules! words {
    ($($list:ident { $($variant:ident = $word:literal),+ $(,)? })*) => {$(
        impl Word for $list {
            const LIST: &'static str = stringify!($list);
            const EVERY: &'static [Self] = &[$(Self::$variant),+];

            fn word(self) -> &'static str {
                match self {
                    $(Self::$variant => $word,)+
                }
            }
        }
    )*};
}

words! {
    RoomKind {
        Room = "room", Corridor = "corridor", Stair = "stair", Shaft = "shaft", Atrium = "atrium",
        Attic = "attic", Void = "void",
    }
    CeilingForm { Flat = "flat", Sloped = "sloped", OpenToRoof = "open_to_roof" }
    ReactionToFire { A1 = "A1", A2 = "A2", B = "B", C = "C", D = "D", E = "E", F = "F" }
    Place { Centre = "centre", Wall = "wall", Corner = "corner" }
    Hazard {
        None = "none", NotRecorded = "not_recorded", LithiumIon = "lithium_ion",
        GasCylinders = "gas_cylinders", FlammableLiquid = "flammable_liquid",
        FlammableGas = "flammable_gas", CombustibleDust = "combustible_dust", Oxidisers = "oxidisers",
        Explosives = "explosives", Hoard = "hoard", ExposedFoam = "exposed_foam",
        MedicalOxygen = "medical_oxygen",
    }
    Basis { Measured = "measured", Estimated = "estimated", Assumed = "assumed" }
    OpeningKind {
        Door = "door", DoubleDoor = "double_door", Window = "window", Vent = "vent", Hatch = "hatch",
        RoofVent = "roof_vent", Gap = "gap",
    }
    Swing { In = "in", Out = "out", Both = "both", Slide = "slide" }
    Side { A = "A", B = "B", C = "C", D = "D" }
    Glazing {
        Float3Mm = "float_3mm", Float6Mm = "float_6mm", DoubleGlazed = "double_glazed",
        Tempered = "tempered", Laminated = "laminated", Wired = "wired",
        FireResisting = "fire_resisting", Plastic = "plastic",
    }
    SprinklerState {
        None = "none", NotRecorded = "not_recorded", OutOfService = "out_of_service",
        Installed = "installed", WorkingTested = "working_tested",
    }
    Coverage { Partial = "partial", Full = "full" }
    Level { Screening = "screening", Transient = "transient", Sampled = "sampled" }
    Scenario {
        AsFound = "as_found", DoorOpen = "door_open", Shut = "shut", ShutLate = "shut_late",
        WindowFails = "window_fails", Entry = "entry",
    }
    GrowthClass { Slow = "slow", Medium = "medium", Fast = "fast", UltraFast = "ultra_fast" }
    IgnitionEase { Easy = "easy", Normal = "normal", Hard = "hard" }
    ExposedGrowth { Fast = "fast", UltraFast = "ultra_fast" }
    DetectorKind {
        SmokePoint = "smoke_point", SmokeBeam = "smoke_beam", SmokeAspirating = "smoke_aspirating",
        HeatFixed = "heat_fixed", HeatRateOfRise = "heat_rate_of_rise",
    }
    Zoning { TwoLayers = "two_layers", Mixed = "mixed" }
    SupplyKind { Fed = "fed", HeatFed = "heat_fed" }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_word_leads_back_to_its_value() {
        fn check<W: Word>() {
            for &value in W::EVERY {
                assert_eq!(W::of_word(value.word()), Some(value), "{}", W::LIST);
            }
            assert_eq!(W::of_word("no such word"), None);
        }

        check::<RoomKind>();
        check::<Hazard>();
        check::<OpeningKind>();
        check::<Glazing>();
        check::<SprinklerState>();
        check::<Scenario>();
        check::<DetectorKind>();
    }
}
