//! What a report says about itself before it says anything about a room.

use serde::Serialize;
use utoipa::ToSchema;

use super::words::LevelWord;
use crate::domain::assumptions::Assumptions;
use crate::domain::building::Building;
use crate::domain::ids::{AssessmentId, BuildingId};
use crate::domain::time::Timestamp;

/// What only the caller knows of an assessment: what was assessed, and under which ids and moment.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Head<'a> {
    /// The building that was assessed.
    pub building: &'a Building,
    /// The assumptions that were asked for.
    pub assumptions: &'a Assumptions,
    /// Id of the assessment; none where nothing is kept.
    pub assessment_id: Option<AssessmentId>,
    /// Id of the building; none where it is not in the inventory.
    pub building_id: Option<BuildingId>,
    /// Its revision.
    pub building_revision: Option<u64>,
    /// When the assessment was made; none where nobody looked at a clock.
    pub created_at: Option<Timestamp>,
}

impl<'a> Head<'a> {
    /// Of an assessment that is not kept: no ids, no moment, so that same inputs give same bytes.
    #[must_use]
    pub const fn unsaved(building: &'a Building, assumptions: &'a Assumptions) -> Self {
        Self {
            building,
            assumptions,
            assessment_id: None,
            building_id: None,
            building_revision: None,
            created_at: None,
        }
    }
}

/// The head members of both reports.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct ReportHead {
    /// Id of the assessment; null where nothing was kept.
    #[schema(required, format = "uuid")]
    pub assessment_id: Option<String>,
    /// Id of the building; null where it is not in the inventory.
    #[schema(required, format = "uuid")]
    pub building_id: Option<String>,
    /// Revision of the building that was assessed.
    #[schema(required)]
    pub building_revision: Option<u64>,
    /// Version of the computation; raised whenever any result may change.
    pub engine_version: &'static str,
    /// SHA-256 of the catalogue.
    pub catalogue_digest: String,
    /// SHA-256 of the resolved inputs: same digest and engine, same findings.
    pub input_digest: String,
    /// Number of the set of rating rules; they are printed under `rules`.
    pub rating_rule: u32,
    /// Which level of computation gave the ratings.
    pub level: LevelWord,
    /// Seed of the sampling.
    pub seed: u64,
    /// When the assessment was made; null where nothing was kept and no clock read.
    #[schema(required, format = "date-time")]
    pub created_at: Option<String>,
}
