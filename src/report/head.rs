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
    /// When the assessment was made.
    pub created_at: Timestamp,
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
    /// When the assessment was made; null where the moment cannot be written.
    #[schema(required, format = "date-time")]
    pub created_at: Option<String>,
}

/// RFC 3339 in UTC with milliseconds; none outside the years that RFC 3339 can write.
pub(super) fn moment(at: Timestamp) -> Option<String> {
    let at = jiff::Timestamp::from_microsecond(at.0).ok()?;
    Some(at.strftime("%Y-%m-%dT%H:%M:%S%.3fZ").to_string())
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_moment_is_utc_with_milliseconds() {
        // 1 796 116 500 s is 2026-12-01T09:15:00Z, by `date -u -d @1796116500`.
        assert_eq!(moment(Timestamp(1_796_116_500_123_000)).unwrap(), "2026-12-01T09:15:00.123Z");
        assert_eq!(moment(Timestamp(1_796_116_500_000_000)).unwrap(), "2026-12-01T09:15:00.000Z");
    }

    #[test]
    fn a_moment_beyond_the_calendar_is_unknown() {
        assert_eq!(moment(Timestamp(i64::MAX)), None);
    }
}
