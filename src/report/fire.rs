//! The fire that the findings rest on, and how each scenario was judged.

use std::borrow::Cow;

use serde::Serialize;
use utoipa::ToSchema;

use super::figure::{Figure, Range, each, number, range};
use super::number::{Exact, Number};
use super::words::{BackdraftWord, FlashoverWord, LimitWord, PlaceWord, ScenarioWord};
use crate::assessment::findings;
use crate::domain::Key;

/// The fire that the findings rest on.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct Fire {
    /// Key of the package it starts in; null where the growth of the use stands for it.
    #[schema(required)]
    pub item_of_origin: Option<String>,
    /// Where it burns.
    pub place: PlaceWord,
    /// Growth coefficient.
    #[schema(required)]
    pub growth_kw_s2: Option<Number>,
    /// What set the growth: `assumption`, `item`, `use` or `lining`.
    pub growth_from: &'static str,
    /// Heat release that the fuel reaches with all the air it wants.
    #[schema(required)]
    pub fuel_limit_kw: Option<Number>,
    /// Fuel that half of such rooms stay below.
    #[schema(required)]
    pub energy_p50_mj: Option<Number>,
    /// Fuel at the fractile used.
    #[schema(required)]
    pub energy_mj: Option<Number>,
    /// The fractile used.
    #[schema(required)]
    pub fractile: Option<Exact>,
    /// Fuel that 95 % of such rooms stay below.
    #[schema(required)]
    pub energy_p95_mj: Option<Number>,
    /// Smouldering or small flame before the fire clock starts; never added to a time.
    #[schema(required)]
    pub incubation_s: Option<Range>,
    /// Packages that take fire from the first.
    pub joined: Vec<Joined>,
}

/// A package that takes fire from the first.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct Joined {
    /// The package.
    pub key: String,
    /// When, on the fire clock.
    #[schema(required)]
    pub at_s: Option<Number>,
    /// Distance reckoned with.
    #[schema(required)]
    pub distance_m: Option<Number>,
}

impl From<&findings::FireFinding> for Fire {
    fn from(fire: &findings::FireFinding) -> Self {
        Self {
            item_of_origin: fire.item_of_origin.as_ref().map(Key::to_string),
            place: fire.place.into(),
            growth_kw_s2: Number::of(fire.growth_kw_s2),
            growth_from: fire.growth_from,
            fuel_limit_kw: Number::of(fire.fuel_limit_kw),
            energy_p50_mj: Number::of(fire.energy_p50_mj),
            energy_mj: Number::of(fire.energy_mj),
            fractile: Exact::of(fire.fractile),
            energy_p95_mj: Number::of(fire.energy_p95_mj),
            incubation_s: range(fire.incubation_s),
            joined: each(&fire.joined),
        }
    }
}

impl From<&findings::Joined> for Joined {
    fn from(joined: &findings::Joined) -> Self {
        Self {
            key: joined.key.to_string(),
            at_s: Number::of(joined.at_s),
            distance_m: Number::of(joined.distance_m),
        }
    }
}

/// The flashover screen of one scenario.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct ScenarioScreen {
    /// The scenario.
    pub scenario: ScenarioWord,
    /// Its rating.
    pub rating: FlashoverWord,
    /// Open area that counts.
    #[schema(required)]
    pub opening_area_m2: Option<Number>,
    /// Height of the openings taken as one.
    #[schema(required)]
    pub opening_height_m: Option<Number>,
    /// Heat release that is reached.
    #[schema(required)]
    pub available_kw: Option<Number>,
    /// Least heat release asked for by the correlations in range.
    #[schema(required)]
    pub required_lowest_kw: Option<Number>,
    /// Highest heat release asked for by them.
    #[schema(required)]
    pub required_highest_kw: Option<Number>,
    /// What holds the fire down.
    #[schema(required)]
    pub limited_by: Option<LimitWord>,
    /// Flashover on the fire clock.
    #[schema(required)]
    pub time_s: Option<Range>,
    /// What each opening counts as.
    pub openings: Vec<OpeningState>,
    /// The unburned gas, where the room can starve in this scenario.
    #[schema(required)]
    pub starved: Option<Starved>,
    /// Why it was not judged, or how.
    #[schema(required)]
    pub reason: Option<Cow<'static, str>>,
    /// The same as a stable word for programs.
    #[schema(required)]
    pub reason_key: Option<&'static str>,
}

/// The unburned gas of a scenario in which the room starves.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct Starved {
    /// Backdraft rating of this scenario.
    pub rating: BackdraftWord,
    /// Heat of combustion of unburned gas per kilogram of layer gas.
    #[schema(required)]
    pub excess_fuel_mj_kg: Option<Range>,
    /// From where on a mixture with air can carry a flame.
    #[schema(required)]
    pub threshold_mj_kg: Option<Number>,
    /// Temperature of the layer when the flame dies.
    #[schema(required)]
    pub layer_temperature_c: Option<Range>,
    /// When the flame dies, on the fire clock.
    #[schema(required)]
    pub flame_out_s: Option<Range>,
}

impl From<&findings::StarvedFinding> for Starved {
    fn from(starved: &findings::StarvedFinding) -> Self {
        Self {
            rating: starved.rating.into(),
            excess_fuel_mj_kg: range(Some(starved.excess_fuel_mj_kg)),
            threshold_mj_kg: Number::of(starved.threshold_mj_kg),
            layer_temperature_c: range(Some(starved.layer_temperature_c)),
            flame_out_s: range(Some(starved.flame_out_s)),
        }
    }
}

/// What an opening counts as in a scenario.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct OpeningState {
    /// The opening.
    pub key: String,
    /// Share of it that stands open.
    #[schema(required)]
    pub open_fraction: Option<Number>,
    /// Area that gives the fire air; 0 for a shut one, which only leaks.
    #[schema(required)]
    pub counted_area_m2: Option<Number>,
    /// Why, in a few words.
    pub because: &'static str,
}

impl From<&findings::ScenarioFinding> for ScenarioScreen {
    fn from(screen: &findings::ScenarioFinding) -> Self {
        Self {
            scenario: screen.scenario.into(),
            rating: screen.rating.into(),
            opening_area_m2: Number::of(screen.opening_area_m2),
            opening_height_m: Number::of(screen.opening_height_m),
            available_kw: number(screen.available_kw),
            required_lowest_kw: number(screen.required_lowest_kw),
            required_highest_kw: number(screen.required_highest_kw),
            limited_by: screen.limited_by.map(Into::into),
            time_s: range(screen.time_s),
            openings: each(&screen.openings),
            starved: screen.starved.as_ref().map(Into::into),
            reason: screen.reason.as_ref().map(|reason| reason.text.clone()),
            reason_key: screen.reason.as_ref().map(|reason| reason.key),
        }
    }
}

impl From<&findings::OpeningState> for OpeningState {
    fn from(opening: &findings::OpeningState) -> Self {
        Self {
            key: opening.key.to_string(),
            open_fraction: Number::of(opening.open_fraction),
            counted_area_m2: Number::of(opening.counted_area_m2),
            because: opening.because,
        }
    }
}

/// How smoke fills the room and reaches the space behind its door.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct Smoke {
    /// Layer 2 m above the floor, door shut.
    #[schema(required)]
    pub time_to_2_m_s: Option<Range>,
    /// Layer 1 m above the floor, door shut.
    #[schema(required)]
    pub time_to_1_m_s: Option<Range>,
    /// Spaces that the room's doors lead to.
    pub next_door: Vec<SmokeNextDoor>,
    /// Why a time is missing.
    #[schema(required)]
    pub reason: Option<Cow<'static, str>>,
    /// The same as a stable word for programs.
    #[schema(required)]
    pub reason_key: Option<&'static str>,
    /// What each method gave.
    pub figures: Vec<Figure>,
}

/// How fast the smoke of this room's fire fills the space behind a door.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct SmokeNextDoor {
    /// The door.
    pub opening: String,
    /// The room behind it.
    pub room: String,
    /// Smoke 2 m above its floor with the door open.
    #[schema(required)]
    pub time_open_s: Option<Number>,
    /// The same with the door shut and leaking.
    #[schema(required)]
    pub time_shut_s: Option<Number>,
}

impl From<&findings::SmokeFinding> for Smoke {
    fn from(smoke: &findings::SmokeFinding) -> Self {
        Self {
            time_to_2_m_s: range(smoke.time_to_2_m_s),
            time_to_1_m_s: range(smoke.time_to_1_m_s),
            next_door: each(&smoke.next_door),
            reason: smoke.reason.as_ref().map(|reason| reason.text.clone()),
            reason_key: smoke.reason.as_ref().map(|reason| reason.key),
            figures: each(&smoke.figures),
        }
    }
}

impl From<&findings::SmokeNextDoor> for SmokeNextDoor {
    fn from(door: &findings::SmokeNextDoor) -> Self {
        Self {
            opening: door.opening.to_string(),
            room: door.room.to_string(),
            time_open_s: number(door.time_open_s),
            time_shut_s: number(door.time_shut_s),
        }
    }
}
