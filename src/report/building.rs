//! The report of a building.

use serde::Serialize;
use utoipa::ToSchema;

use super::evidence::{Assumption, Caution, MethodUsed, Rule, building_cautions, rules};
use super::figure::{each, number};
use super::head::{Head, ReportHead};
use super::number::{Exact, Number};
use super::room::RoomFindings;
use super::text::{RATING_IS, headline};
use super::words::{BackdraftWord, FlashoverWord};
use crate::assessment::findings;
use crate::wire::AssumptionsEcho;

/// A room's place in its building.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct RankedRoom {
    /// 1 is the worst; rooms that tie share the place.
    pub rank: usize,
    /// Key of the room.
    pub room: String,
    /// Its name.
    pub name: String,
    /// Its headline.
    pub headline: String,
    /// Flashover rating.
    pub flashover: FlashoverWord,
    /// Typical time to flashover, on the fire clock.
    #[schema(required)]
    pub time_s: Option<Number>,
    /// Whether that is before water is on the fire.
    #[schema(required)]
    pub before_water: Option<bool>,
    /// Backdraft rating.
    pub backdraft: BackdraftWord,
    /// Entry rating.
    pub entry: FlashoverWord,
    /// An input that decides the flashover rating is assumed.
    pub provisional: bool,
}

/// The needed fire flow of the most demanding room against the water recorded.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct BuildingWater {
    /// The room that asks for most.
    #[schema(required)]
    pub room: Option<String>,
    /// What it asks for.
    #[schema(required)]
    pub needed_l_min: Option<Number>,
    /// What is recorded.
    #[schema(required)]
    pub available_l_min: Option<Exact>,
    /// Whether that covers it; null where nothing is recorded.
    #[schema(required)]
    pub enough: Option<bool>,
}

/// Where to go from a building's report; null where nothing was kept.
#[derive(Debug, Clone, PartialEq, Eq, Default, Serialize, ToSchema)]
pub struct BuildingReportLinks {
    /// This report.
    #[serde(rename = "self")]
    #[schema(required)]
    pub this: Option<String>,
    /// The building in the inventory.
    #[schema(required)]
    pub building: Option<String>,
    /// What every method says.
    pub methods: &'static str,
}

/// The report of a building, room by room.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct BuildingReport {
    /// Head.
    #[serde(flatten)]
    pub head: ReportHead,
    /// Name of the building.
    pub name: String,
    /// The bureau's own number.
    #[schema(required)]
    pub reference: Option<String>,
    /// What an officer in a hurry must know.
    pub headline: String,
    /// What every rating is conditional on.
    pub rating_is: &'static str,
    /// The assumptions that were asked for, as they came.
    pub requested: AssumptionsEcho,
    /// The rooms, in the order of the building.
    pub rooms: Vec<RoomFindings>,
    /// The rooms, worst first.
    pub ranking: Vec<RankedRoom>,
    /// Water.
    pub water: BuildingWater,
    /// Values that nobody recorded about the building as a whole; each room has its own.
    pub assumptions: Vec<Assumption>,
    /// The methods that the figures of any room name.
    pub methods: Vec<MethodUsed>,
    /// Cautions for the whole building; each room has its own beside them.
    pub cautions: Vec<Caution>,
    /// The rules that gave the ratings.
    pub rules: Vec<Rule>,
    /// Where to go from here.
    pub links: BuildingReportLinks,
}

impl BuildingReport {
    /// The bytes that are served and stored.
    #[must_use]
    pub fn to_json(&self) -> Vec<u8> {
        serde_json::to_vec(self).expect("every map has text for keys, and writing to memory cannot fail")
    }
}

/// Writes the report of a building.
#[must_use]
pub fn building_report(found: &findings::BuildingFindings, head: &Head<'_>) -> BuildingReport {
    let cautions = building_cautions(&found.cautions);
    let rooms: Vec<RoomFindings> = found
        .rooms
        .iter()
        .enumerate()
        .map(|(at, room)| {
            // The findings keep the building's order; the key is compared in case they ever do not.
            let recorded = head.building.rooms.get(at).filter(|recorded| recorded.key == room.key);
            RoomFindings::of(room, recorded.or_else(|| head.building.room(&room.key)), head, &cautions)
        })
        .collect();

    BuildingReport {
        head: ReportHead {
            assessment_id: head.assessment_id.map(|id| id.to_string()),
            building_id: head.building_id.map(|id| id.to_string()),
            building_revision: head.building_revision,
            engine_version: found.engine_version,
            catalogue_digest: found.catalogue_digest.clone(),
            input_digest: found.input_digest.clone(),
            rating_rule: found.rating_rule,
            level: found.level.into(),
            seed: found.seed,
            created_at: head.created_at.map(|at| at.to_string()),
        },
        name: head.building.name.clone(),
        reference: head.building.reference.clone(),
        headline: headline::building(found),
        rating_is: RATING_IS,
        requested: AssumptionsEcho::of(head.assumptions),
        ranking: found.ranking.iter().map(|place| ranked(place, &rooms)).collect(),
        water: water(found, head),
        rooms,
        assumptions: each(&found.assumptions),
        methods: each(&found.methods),
        cautions,
        rules: rules(),
        links: BuildingReportLinks {
            this: head.assessment_id.map(|id| format!("/v1/assessments/{id}")),
            building: head.building_id.map(|id| format!("/v1/buildings/{id}")),
            methods: "/v1/methods",
        },
    }
}

fn ranked(place: &findings::Ranked, rooms: &[RoomFindings]) -> RankedRoom {
    let room = rooms.iter().map(|room| &room.body).find(|room| room.key == place.room.as_str());
    RankedRoom {
        rank: place.place,
        room: place.room.to_string(),
        name: room.map_or_else(|| place.room.to_string(), |room| room.name.clone()),
        headline: room.map_or_else(String::new, |room| room.headline.clone()),
        flashover: place.flashover.into(),
        time_s: number(place.flashover_time_s),
        before_water: place.before_water,
        backdraft: place.backdraft.into(),
        entry: place.entry.into(),
        provisional: room.is_none_or(|room| room.flashover.provisional),
    }
}

fn water(found: &findings::BuildingFindings, head: &Head<'_>) -> BuildingWater {
    let most = found
        .rooms
        .iter()
        .filter_map(|room| Some((room, room.water.as_ref()?.needed_l_min)))
        .filter(|(_, needed_l_min)| needed_l_min.is_finite())
        // The first of equals, so that the answer does not depend on the way of looking.
        .fold(None, |most: Option<(&findings::RoomFindings, f64)>, next| match most {
            Some(most) if most.1 >= next.1 => Some(most),
            _ => Some(next),
        });
    let available_l_min = head.building.water_available_l_min.map(|flow| flow.get());
    BuildingWater {
        room: most.map(|(room, _)| room.key.to_string()),
        needed_l_min: most.and_then(|(_, needed_l_min)| Number::of(needed_l_min)),
        available_l_min: available_l_min.and_then(Exact::of),
        enough: available_l_min.zip(most).map(|(available, (_, needed))| available >= needed),
    }
}
