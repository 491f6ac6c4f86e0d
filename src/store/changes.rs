//! The table `changes`: what happened, in order.

use sqlx::SqliteConnection;

use super::error::StoreError;
use super::parts::Sort;
use super::records::{Effects, Part};
use super::rows;
use crate::domain::ids::{AssessmentId, BuildingId};
use crate::domain::{Caller, Key};

const NEXT_SEQUENCE: &str = "
    update agencies set change_sequence = change_sequence + 1
    where agency_id = $1
    returning change_sequence";

const INSERT: &str = "
    insert into changes (
        agency_id, sequence, kind, building_id, revision, part_kind, part_key, assessment_id, actor, at_us
    ) values ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10)";

#[cfg(test)]
pub(super) const ALL: &[&str] = &[NEXT_SEQUENCE, INSERT];

/// What happened to a building.
#[derive(Debug, Clone)]
pub(super) enum Change<'a> {
    Created,
    Changed(&'a Part),
    Deleted,
    Assessed(AssessmentId),
}

impl Change<'_> {
    fn word(&self) -> &'static str {
        match self {
            Self::Created => "building_created",
            Self::Changed(_) => "building_changed",
            Self::Deleted => "building_deleted",
            Self::Assessed(_) => "assessment_created",
        }
    }
}

/// Records a change.
pub(super) async fn insert(
    db: &mut SqliteConnection,
    caller: &Caller,
    id: BuildingId,
    revision: u64,
    change: &Change<'_>,
    effects: &Effects,
) -> Result<(), StoreError> {
    let sequence: i64 =
        sqlx::query_scalar(NEXT_SEQUENCE).bind(caller.agency.0.clone()).fetch_one(&mut *db).await?;
    let part: Option<(Sort, &Key)> = match change {
        Change::Changed(Part::Room(key)) => Some((Sort::Room, key)),
        Change::Changed(Part::Opening(key)) => Some((Sort::Opening, key)),
        _ => None,
    };
    let assessment = match change {
        Change::Assessed(assessment) => Some(assessment.to_string()),
        _ => None,
    };
    sqlx::query(INSERT)
        .bind(caller.agency.0.clone())
        .bind(sequence)
        .bind(change.word())
        .bind(id.to_string())
        .bind(rows::stored_count(revision))
        .bind(part.map(|(sort, _)| sort.word()))
        .bind(part.map(|(_, key)| key.to_string()))
        .bind(assessment)
        .bind(caller.actor.clone())
        .bind(effects.at.0)
        .execute(db)
        .await?;
    Ok(())
}
