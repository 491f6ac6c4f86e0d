//! The clocks: what happens when, on the fire's and on the crew's.

use serde::Serialize;
use utoipa::ToSchema;

use super::figure::{Range, number, range};
use super::number::Number;
use super::words::{DetectedByWord, FlashoverWord, GrowthWord, MilestoneWord, ScenarioWord};
use crate::assessment::findings::{self, MilestoneKind};
use crate::domain::Key;

/// A moment on both clocks.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct Milestone {
    /// On the fire clock, typically; zero at established burning.
    #[schema(required)]
    pub fire_clock_s: Option<Number>,
    /// The same over the corners.
    #[schema(required)]
    pub fire_clock_range_s: Option<Range>,
    /// On the crew clock, typically; zero at the call.
    #[schema(required)]
    pub crew_clock_s: Option<Number>,
    /// The same over the corners.
    #[schema(required)]
    pub crew_clock_range_s: Option<Range>,
    /// What happens.
    pub kind: MilestoneWord,
    /// The same in words.
    pub text: &'static str,
    /// The scenario it belongs to, where it belongs to one.
    #[schema(required)]
    pub scenario: Option<ScenarioWord>,
    /// The opening, package or detector meant, where there is one.
    #[schema(required)]
    pub subject: Option<String>,
}

impl From<&findings::Milestone> for Milestone {
    fn from(moment: &findings::Milestone) -> Self {
        Self {
            fire_clock_s: Number::of(moment.fire_clock_s.typical),
            fire_clock_range_s: range(Some(moment.fire_clock_s)),
            crew_clock_s: moment.crew_clock_s.and_then(|band| Number::of(band.typical)),
            crew_clock_range_s: range(moment.crew_clock_s),
            kind: moment.kind.into(),
            text: in_words(moment.kind),
            scenario: moment.scenario.map(Into::into),
            subject: moment.subject.as_ref().map(Key::to_string),
        }
    }
}

const fn in_words(kind: MilestoneKind) -> &'static str {
    match kind {
        MilestoneKind::EstablishedBurning => "Established burning: a flame of about 0.3 m",
        MilestoneKind::Detection => "Somebody or something notices the fire",
        MilestoneKind::Call => "The fire service is called",
        MilestoneKind::DoorsShut => "Self-closing and released doors are shut",
        MilestoneKind::DetectorActs => "The first detector acts",
        MilestoneKind::SprinklerOpens => "The first sprinkler opens",
        MilestoneKind::SmokeAt2M => "Smoke is down to 2 m above the floor",
        MilestoneKind::SmokeAt1M => "Smoke is down to 1 m above the floor",
        MilestoneKind::SmokeNextDoor => "Smoke is down to 2 m in the space behind the door",
        MilestoneKind::ItemIgnites => "The next item takes fire",
        MilestoneKind::GlassFalls => "Window glass falls",
        MilestoneKind::DoorBurnsThrough => "A door burns through",
        MilestoneKind::GivesWay => "An opening gives way to pressure",
        MilestoneKind::WayOutLost => "The way out of the room is lost to a person upright",
        MilestoneKind::FireNextDoor => "The contents of another room take fire",
        MilestoneKind::Layer600C => "The hot layer reaches 600 °C",
        MilestoneKind::Floor20KwM2 => "The floor receives 20 kW/m²",
        MilestoneKind::Flashover => "Flashover",
        MilestoneKind::TurnedOut => "The crew is on the road",
        MilestoneKind::Arrival => "The crew arrives",
        MilestoneKind::WaterOnFire => "Water is on the fire",
        MilestoneKind::FlameOut => "The flame dies for want of oxygen",
        MilestoneKind::Decay => "The fire begins to decay",
        MilestoneKind::BurntOut => "The fuel is burnt",
    }
}

/// The spans between fire and water.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct Clock {
    /// What tells people of the fire first.
    pub detected_by: DetectedByWord,
    /// Established burning to detection.
    #[schema(required)]
    pub detection_s: Option<Range>,
    /// Established burning to call: zero of the crew clock.
    #[schema(required)]
    pub call_s: Option<Range>,
    /// Call to water on the fire.
    #[schema(required)]
    pub call_to_water_s: Option<Number>,
    /// Established burning to water on the fire.
    #[schema(required)]
    pub water_on_fire_s: Option<Range>,
    /// Added to the set-up because of the floor.
    #[schema(required)]
    pub floor_setup_s: Option<Number>,
}

impl From<&findings::ClockFinding> for Clock {
    fn from(clock: &findings::ClockFinding) -> Self {
        Self {
            detected_by: clock.detected_by.into(),
            detection_s: range(Some(clock.detection_s)),
            call_s: range(Some(clock.call_s)),
            call_to_water_s: Number::of(clock.call_to_water_s),
            water_on_fire_s: range(Some(clock.water_on_fire_s)),
            floor_setup_s: Number::of(clock.floor_setup_s),
        }
    }
}

/// One step of the strip slow, medium, fast, ultra-fast: the same room with another growth.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct GrowthStep {
    /// The class.
    pub growth: GrowthWord,
    /// Its coefficient.
    #[schema(required)]
    pub growth_kw_s2: Option<Number>,
    /// The rating with it.
    pub rating: FlashoverWord,
    /// Typical time to flashover with it.
    #[schema(required)]
    pub time_s: Option<Number>,
    /// Whether that is before water is on the fire.
    #[schema(required)]
    pub before_water: Option<bool>,
}

impl From<&findings::GrowthFinding> for GrowthStep {
    fn from(step: &findings::GrowthFinding) -> Self {
        Self {
            growth: step.growth.into(),
            growth_kw_s2: Number::of(step.growth_kw_s2),
            rating: step.rating.into(),
            time_s: number(step.time_s),
            before_water: step.before_water,
        }
    }
}
