//! The table `room_findings`.

use sqlx::SqliteConnection;

use super::error::StoreError;
use super::records::{AssessmentMeta, RoomFinding, Spread, WorstRating};
use crate::domain::ids::AgencyId;

const INSERT: &str = "
    insert into room_findings (
        agency_id, assessment_id, room_key, building_id, sort_rank,
        flashover_rating, flashover_severity, flashover_scenario, flashover_provisional,
        flashover_before_water, flashover_low_s, flashover_typical_s, flashover_high_s,
        required_heat_release_kw, available_heat_release_kw,
        backdraft_rating, backdraft_severity, backdraft_scenario, backdraft_provisional,
        backdraft_outcome, dangerous_from_s, dangerous_until_s,
        entry_rating, entry_severity, entry_scenario, entry_provisional,
        entry_low_s, entry_typical_s, entry_high_s
    ) values (
        $1, $2, $3, $4, $5, $6, $7, $8, $9, $10, $11, $12, $13, $14, $15, $16, $17, $18, $19, $20,
        $21, $22, $23, $24, $25, $26, $27, $28, $29
    )";

#[cfg(test)]
pub(super) const ALL: &[&str] = &[INSERT];

/// Writes the findings of one room.
pub(super) async fn insert(
    db: &mut SqliteConnection,
    agency: &AgencyId,
    meta: &AssessmentMeta,
    finding: &RoomFinding,
) -> Result<(), StoreError> {
    let RoomFinding { flashover, backdraft, entry, .. } = finding;
    let low = |spread: Option<Spread>| spread.map(|spread| spread.low);
    let typical = |spread: Option<Spread>| spread.map(|spread| spread.typical);
    let high = |spread: Option<Spread>| spread.map(|spread| spread.high);
    sqlx::query(INSERT)
        .bind(agency.0.clone())
        .bind(meta.id.to_string())
        .bind(finding.room.to_string())
        .bind(meta.building.to_string())
        .bind(finding.sort_rank)
        .bind(flashover.rating.clone())
        .bind(flashover.severity)
        .bind(flashover.scenario.clone())
        .bind(flashover.provisional)
        .bind(finding.flashover_before_water)
        .bind(low(finding.flashover_s))
        .bind(typical(finding.flashover_s))
        .bind(high(finding.flashover_s))
        .bind(finding.required_heat_release_kw)
        .bind(finding.available_heat_release_kw)
        .bind(backdraft.rating.clone())
        .bind(backdraft.severity)
        .bind(backdraft.scenario.clone())
        .bind(backdraft.provisional)
        .bind(finding.backdraft_outcome.clone())
        .bind(finding.dangerous_from_s)
        .bind(finding.dangerous_until_s)
        .bind(entry.rating.clone())
        .bind(entry.severity)
        .bind(entry.scenario.clone())
        .bind(entry.provisional)
        .bind(low(finding.entry_s))
        .bind(typical(finding.entry_s))
        .bind(high(finding.entry_s))
        .execute(db)
        .await?;
    Ok(())
}

/// The worst rating of one kind: of equals the room that ranks first.
pub(super) fn worst(
    findings: &[RoomFinding],
    kind: impl Fn(&RoomFinding) -> &super::records::Rated,
) -> Option<WorstRating> {
    let by_severity = |finding: &&RoomFinding| (kind(finding).severity, std::cmp::Reverse(finding.sort_rank));
    findings
        .iter()
        .max_by_key(by_severity)
        .map(|finding| WorstRating { rating: kind(finding).rating.clone(), room: finding.room.clone() })
}
