//! Items of lists.

use serde::Serialize;
use utoipa::ToSchema;

use crate::store;
use crate::wire::{Links, LocationEcho};

/// The worst rating of one kind, and the room that has it.
#[derive(Debug, Serialize, ToSchema)]
pub struct WorstRating {
    /// The rating.
    pub rating: String,
    /// Key of the first room, in order of rank, that has it.
    pub room: String,
}

/// The worst ratings of a building's latest assessment.
#[derive(Debug, Serialize, ToSchema)]
pub struct Worst {
    /// Id of the assessment.
    #[schema(format = "uuid")]
    pub assessment_id: String,
    /// Which level of computation gave the ratings.
    pub level: String,
    /// When it was made.
    #[schema(format = DateTime)]
    pub created_at: String,
    /// The revision that was assessed.
    pub building_revision: u64,
    /// The building has changed since.
    pub stale: bool,
    /// Flashover; null for a building without rooms.
    #[schema(required)]
    pub flashover: Option<WorstRating>,
    /// Backdraft; null for a building without rooms.
    #[schema(required)]
    pub backdraft: Option<WorstRating>,
    /// Entry; null for a building without rooms.
    #[schema(required)]
    pub entry: Option<WorstRating>,
}

/// A building in a list.
#[derive(Debug, Serialize, ToSchema)]
pub struct BuildingSummary {
    /// Its id.
    #[schema(format = "uuid")]
    pub id: String,
    /// The bureau's own number.
    #[schema(required)]
    pub reference: Option<String>,
    /// Its name.
    pub name: String,
    /// Where it stands.
    #[schema(required)]
    pub location: Option<LocationEcho>,
    /// Occupancy group of the building code, as printed.
    #[schema(required)]
    pub occupancy_group: Option<String>,
    /// How many rooms it has.
    pub rooms: u64,
    /// Its revision.
    pub revision: u64,
    /// When this revision was saved.
    #[schema(format = DateTime)]
    pub updated_at: String,
    /// The worst ratings of its latest assessment; null before the first.
    #[schema(required)]
    pub worst: Option<Worst>,
    /// Where to go from here.
    pub links: Links,
}

/// Where to go from an assessment in a list.
#[derive(Debug, Serialize, ToSchema)]
pub struct AssessmentSummaryLinks {
    /// The report.
    #[serde(rename = "self")]
    pub this: String,
    /// The building.
    pub building: String,
}

/// An assessment in a list.
#[derive(Debug, Serialize, ToSchema)]
pub struct AssessmentSummary {
    /// Its id.
    #[schema(format = "uuid")]
    pub id: String,
    /// Id of the building.
    #[schema(format = "uuid")]
    pub building_id: String,
    /// The revision that was assessed.
    pub building_revision: u64,
    /// Which level of computation gave the ratings.
    pub level: String,
    /// Version of the computation.
    pub engine_version: String,
    /// Number of the set of rating rules.
    pub rating_rule: u32,
    /// SHA-256 of the resolved inputs.
    pub input_digest: String,
    /// When it was made.
    #[schema(format = DateTime)]
    pub created_at: String,
    /// The building has changed since.
    pub stale: bool,
    /// Flashover; null for a building without rooms.
    #[schema(required)]
    pub flashover: Option<WorstRating>,
    /// Backdraft; null for a building without rooms.
    #[schema(required)]
    pub backdraft: Option<WorstRating>,
    /// Entry; null for a building without rooms.
    #[schema(required)]
    pub entry: Option<WorstRating>,
    /// Where to go from here.
    pub links: AssessmentSummaryLinks,
}

impl From<store::WorstRating> for WorstRating {
    fn from(worst: store::WorstRating) -> Self {
        Self { rating: worst.rating, room: worst.room.to_string() }
    }
}

impl From<store::Worst> for Worst {
    fn from(worst: store::Worst) -> Self {
        Self {
            assessment_id: worst.assessment.to_string(),
            level: worst.level,
            created_at: worst.created_at.to_string(),
            building_revision: worst.building_revision,
            stale: worst.stale,
            flashover: worst.flashover.map(Into::into),
            backdraft: worst.backdraft.map(Into::into),
            entry: worst.entry.map(Into::into),
        }
    }
}

impl From<store::Summary> for BuildingSummary {
    fn from(summary: store::Summary) -> Self {
        Self {
            id: summary.id.to_string(),
            reference: summary.reference,
            name: summary.name,
            location: summary.location.map(Into::into),
            occupancy_group: summary.occupancy_group,
            rooms: summary.rooms,
            revision: summary.revision,
            updated_at: summary.updated_at.to_string(),
            links: Links::of(summary.id, summary.worst.is_some()),
            worst: summary.worst.map(Into::into),
        }
    }
}

impl From<store::AssessmentSummary> for AssessmentSummary {
    fn from(summary: store::AssessmentSummary) -> Self {
        let store::AssessmentSummary { meta, stale, flashover, backdraft, entry } = summary;
        Self {
            id: meta.id.to_string(),
            building_id: meta.building.to_string(),
            building_revision: meta.building_revision,
            level: meta.level,
            engine_version: meta.engine_version,
            rating_rule: meta.rating_rule,
            input_digest: meta.input_digest,
            created_at: meta.created_at.to_string(),
            stale,
            flashover: flashover.map(Into::into),
            backdraft: backdraft.map(Into::into),
            entry: entry.map(Into::into),
            links: AssessmentSummaryLinks {
                this: format!("/v1/assessments/{}", meta.id),
                building: format!("/v1/buildings/{}", meta.building),
            },
        }
    }
}
