//! What stands against the fire, and what adds to it: protection, water, hazards, linings, size.

use serde::Serialize;
use utoipa::ToSchema;

use super::figure::{Figure, Range, each, number, range};
use super::number::{Exact, Number};
use super::words::{FlashoverWord, HazardWord};
use crate::assessment::findings;

/// A protection, without credit and with.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct Protection {
    /// `sprinkler`, `self_closer` or `alarm`.
    pub kind: &'static str,
    /// Whether the rating gives it credit: only where it is recorded as working and tested.
    pub credited: bool,
    /// When it acts, on the fire clock.
    #[schema(required)]
    pub acts_at_s: Option<Range>,
    /// Heat release when it acts.
    #[schema(required)]
    pub heat_release_kw: Option<Number>,
    /// Flashover rating without it.
    pub flashover_without: FlashoverWord,
    /// Flashover rating with it.
    pub flashover_with: FlashoverWord,
    /// Whether flashover comes before water without it.
    #[schema(required)]
    pub before_water_without: Option<bool>,
    /// The same with it.
    #[schema(required)]
    pub before_water_with: Option<bool>,
    /// What it does, in words.
    pub text: String,
    /// What each method gave.
    pub figures: Vec<Figure>,
}

impl From<&findings::ProtectionFinding> for Protection {
    fn from(found: &findings::ProtectionFinding) -> Self {
        Self {
            kind: found.kind,
            credited: found.credited,
            acts_at_s: range(found.acts_at_s),
            heat_release_kw: number(found.heat_release_kw),
            flashover_without: found.flashover_without.into(),
            flashover_with: found.flashover_with.into(),
            before_water_without: found.before_water_without,
            before_water_with: found.before_water_with,
            text: found.words.clone(),
            figures: each(&found.figures),
        }
    }
}

/// Needed fire flow against the water recorded.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
#[schema(as = WaterNeeded)]
pub struct Water {
    /// What each formula asks for; each method's title says what its figure means.
    pub figures: Vec<Figure>,
    /// The greatest of them.
    #[schema(required)]
    pub needed_l_min: Option<Number>,
    /// What is recorded.
    #[schema(required)]
    pub available_l_min: Option<Exact>,
    /// Whether that covers the greatest; null where nothing is recorded.
    #[schema(required)]
    pub enough: Option<bool>,
}

impl From<&findings::WaterFinding> for Water {
    fn from(found: &findings::WaterFinding) -> Self {
        Self {
            figures: each(&found.figures),
            needed_l_min: Number::of(found.needed_l_min),
            available_l_min: found.available_l_min.and_then(Exact::of),
            enough: found.enough,
        }
    }
}

/// A hazard outside the methods.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct HazardFound {
    /// Which.
    pub hazard: HazardWord,
    /// What is not computed, in words.
    pub text: &'static str,
    /// Whether it bars `not_indicated`.
    pub bars_not_indicated: bool,
}

impl From<&findings::HazardFinding> for HazardFound {
    fn from(found: &findings::HazardFinding) -> Self {
        Self { hazard: found.hazard.into(), text: found.text, bars_not_indicated: found.bars_not_indicated }
    }
}

/// What one lining does.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct LiningFound {
    /// `walls`, `ceiling` or `floor`.
    pub surface: &'static str,
    /// Key of the catalogue, or `given`.
    pub material: String,
    /// Whether it burns.
    pub combustible: bool,
    /// The growth that it sets at least.
    #[schema(required)]
    pub least_growth_kw_s2: Option<Number>,
    /// Time until heat has come through it.
    #[schema(required)]
    pub penetration_s: Option<Number>,
    /// In words, where it joins the fire.
    #[schema(required)]
    pub text: Option<String>,
}

impl From<&findings::LiningFinding> for LiningFound {
    fn from(found: &findings::LiningFinding) -> Self {
        Self {
            surface: found.surface,
            material: found.material.clone(),
            combustible: found.combustible,
            least_growth_kw_s2: number(found.least_growth_kw_s2),
            penetration_s: Number::of(found.penetration_s),
            text: found.words.clone(),
        }
    }
}

/// What is asked of a large, tall or long space instead of whole-room flashover.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct LargeSpace {
    /// Which of the marks it exceeds, in words.
    pub because: Vec<&'static str>,
    /// Mean height of the flame at the peak.
    #[schema(required)]
    pub flame_height_m: Option<Number>,
    /// From the foot of the fire to the ceiling.
    #[schema(required)]
    pub ceiling_height_m: Option<Number>,
    /// Whether the flame reaches the ceiling.
    pub flame_reaches_ceiling: bool,
    /// Gap that the flame can cross.
    #[schema(required)]
    pub spreads_across_m: Option<Number>,
    /// Gap that is there.
    #[schema(required)]
    pub gap_m: Option<Number>,
    /// Whether the next pile takes fire.
    #[schema(required)]
    pub next_pile_ignites: Option<bool>,
    /// Smoke 2 m above the floor.
    #[schema(required)]
    pub layer_to_2_m_s: Option<Range>,
    /// What each method gave.
    pub figures: Vec<Figure>,
}

impl From<&findings::LargeSpaceFinding> for LargeSpace {
    fn from(found: &findings::LargeSpaceFinding) -> Self {
        Self {
            because: found.because.clone(),
            flame_height_m: Number::of(found.flame_height_m),
            ceiling_height_m: Number::of(found.ceiling_height_m),
            flame_reaches_ceiling: found.flame_reaches_ceiling,
            spreads_across_m: number(found.spreads_across_m),
            gap_m: number(found.gap_m),
            next_pile_ignites: found.next_pile_ignites,
            layer_to_2_m_s: range(found.layer_to_2_m_s),
            figures: each(&found.figures),
        }
    }
}
