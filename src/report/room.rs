//! The report of one room.

use serde::Serialize;
use utoipa::ToSchema;

use super::backdraft::Backdraft;
use super::building::BuildingReport;
use super::entry::Entry;
use super::evidence::{Assumption, Caution, MethodUsed, Rule, Wanted, room_cautions};
use super::figure::each;
use super::fire::{Fire, ScenarioScreen, Smoke};
use super::flashover::Flashover;
use super::head::{Head, ReportHead};
use super::number::{Exact, Number};
use super::protection::{HazardFound, LargeSpace, LiningFound, Protection, Water};
use super::text::headline;
use super::timeline::{Clock, GrowthStep, Milestone};
use super::transient::{Series, Transient};
use super::words::RoomKindWord;
use crate::assessment::findings;
use crate::domain::{Named, Room};

/// Where to go from a room's report; null where nothing was kept.
#[derive(Debug, Clone, PartialEq, Eq, Default, Serialize, ToSchema)]
pub struct RoomLinks {
    /// This report.
    #[serde(rename = "self")]
    #[schema(required)]
    pub this: Option<String>,
    /// The building's report.
    #[schema(required)]
    pub assessment: Option<String>,
    /// The building in the inventory.
    #[schema(required)]
    pub building: Option<String>,
    /// The room in the inventory.
    #[schema(required)]
    pub room: Option<String>,
}

impl RoomLinks {
    fn of(head: &Head<'_>, key: &str) -> Self {
        let assessment = head.assessment_id.map(|id| format!("/v1/assessments/{id}"));
        let building = head.building_id.map(|id| format!("/v1/buildings/{id}"));
        Self {
            this: assessment.as_ref().map(|path| format!("{path}/rooms/{key}")),
            room: building.as_ref().map(|path| format!("{path}/rooms/{key}")),
            assessment,
            building,
        }
    }
}

/// What the room's own report and its place in the building's report have in common.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct RoomBody {
    /// Key of the room.
    pub key: String,
    /// Its name; the key where it has none.
    pub name: String,
    /// What sort of space.
    #[schema(required)]
    pub kind: Option<RoomKindWord>,
    /// What it is used for: a key of the catalogue, or `given`.
    #[serde(rename = "use")]
    #[schema(required)]
    pub room_use: Option<String>,
    /// Floor number; 0 is the entrance level.
    #[schema(required)]
    pub floor: Option<i32>,
    /// Floor area.
    #[schema(required)]
    pub floor_area_m2: Option<Number>,
    /// Height.
    #[schema(required)]
    pub height_m: Option<Exact>,
    /// One sentence for an officer in a hurry.
    pub headline: String,
    /// Can it flash over.
    pub flashover: Flashover,
    /// Can it, shut, hide a backdraft.
    pub backdraft: Backdraft,
    /// How long has a crew that opens up.
    pub entry: Entry,
    /// How each scenario was judged.
    pub scenarios: Vec<ScenarioScreen>,
    /// The same room with slow, medium, fast and ultra-fast growth.
    pub growth_strip: Vec<GrowthStep>,
    /// The fire that the findings rest on.
    pub fire: Fire,
    /// The spans between fire and water.
    pub clock: Clock,
    /// Every moment on both clocks, in order of time.
    pub timeline: Vec<Milestone>,
    /// How smoke fills the room and the space behind its door.
    pub smoke: Smoke,
    /// What is asked of a large space instead; null for any other.
    #[schema(required)]
    pub large_space: Option<LargeSpace>,
    /// Protection without credit and with.
    pub protection: Vec<Protection>,
    /// Needed fire flow against the water recorded.
    #[schema(required)]
    pub water: Option<Water>,
    /// Hazards outside the methods.
    pub hazards: Vec<HazardFound>,
    /// What the linings do.
    pub linings: Vec<LiningFound>,
    /// What the bureau is asked to record.
    pub wanted: Vec<Wanted>,
    /// Keys of the methods that the figures name.
    pub method_keys: Vec<&'static str>,
    /// What the transient runs gave; null at level screening, and where they gave no answer.
    #[schema(required)]
    pub transient: Option<Transient>,
    /// Time series of the governing scenario; null at level screening.
    #[schema(required)]
    pub series: Option<Series>,
    /// Where to go from here.
    pub links: RoomLinks,
}

impl RoomBody {
    fn of(found: &findings::RoomFindings, recorded: Option<&Room>, head: &Head<'_>) -> Self {
        Self {
            key: found.key.to_string(),
            name: found.name.clone(),
            kind: recorded.map(|room| room.kind.into()),
            room_use: recorded.map(|room| match &room.room_use {
                Named::Catalogue(key) => key.clone(),
                Named::Given(_) => "given".to_owned(),
            }),
            floor: recorded.map(|room| room.floor),
            floor_area_m2: recorded.and_then(|room| Number::of(room.floor_area_m2())),
            height_m: recorded.and_then(|room| Exact::of(room.height_m.get())),
            headline: headline::room(found),
            flashover: (&found.flashover).into(),
            backdraft: (&found.backdraft).into(),
            entry: (&found.entry).into(),
            scenarios: each(&found.scenarios),
            growth_strip: each(&found.growth_strip),
            fire: (&found.fire).into(),
            clock: (&found.clock).into(),
            timeline: each(&found.timeline),
            smoke: (&found.smoke).into(),
            large_space: found.large_space.as_ref().map(Into::into),
            protection: each(&found.protection),
            water: found.water.as_ref().map(Into::into),
            hazards: each(&found.hazards),
            linings: each(&found.linings),
            wanted: each(&found.wanted),
            method_keys: found.methods.iter().map(|method| method.key).collect(),
            transient: found.transient.as_ref().map(Into::into),
            series: found.transient.as_ref().and_then(Series::of),
            links: RoomLinks::of(head, found.key.as_str()),
        }
    }
}

/// A room within the report of its building. What all rooms share (methods, the building's
/// assumptions and cautions) stands once, beside `rooms`.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct RoomFindings {
    /// The findings.
    #[serde(flatten)]
    pub body: RoomBody,
    /// Values that nobody recorded of this room.
    pub assumptions: Vec<Assumption>,
    /// Cautions for this room, beside those for the building.
    pub cautions: Vec<Caution>,
}

impl RoomFindings {
    pub(super) fn of(
        found: &findings::RoomFindings,
        recorded: Option<&Room>,
        head: &Head<'_>,
        building_cautions: &[Caution],
    ) -> Self {
        Self {
            body: RoomBody::of(found, recorded, head),
            assumptions: found
                .assumptions
                .iter()
                .filter(|assumed| assumed.room.is_some())
                .map(Assumption::from)
                .collect(),
            cautions: room_cautions(&found.cautions, building_cautions),
        }
    }
}

/// The report of one room, complete in itself.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct RoomReport {
    /// Head.
    #[serde(flatten)]
    pub head: ReportHead,
    /// The findings.
    #[serde(flatten)]
    pub body: RoomBody,
    /// Values that nobody recorded, of the room and then of the building.
    pub assumptions: Vec<Assumption>,
    /// The methods that the figures name.
    pub methods: Vec<MethodUsed>,
    /// Cautions, for the room and then for the building.
    pub cautions: Vec<Caution>,
    /// The rules that gave the ratings.
    pub rules: Vec<Rule>,
}

/// The report of one room, out of its building's; none where the building has no such room.
#[must_use]
pub fn room_report(report: &BuildingReport, key: &str) -> Option<RoomReport> {
    let room = report.rooms.iter().find(|room| room.body.key == key)?;
    let used = |method: &&MethodUsed| room.body.method_keys.contains(&method.key);
    Some(RoomReport {
        head: report.head.clone(),
        body: room.body.clone(),
        assumptions: [room.assumptions.as_slice(), report.assumptions.as_slice()].concat(),
        methods: report.methods.iter().filter(used).cloned().collect(),
        cautions: [room.cautions.as_slice(), report.cautions.as_slice()].concat(),
        rules: report.rules.clone(),
    })
}
