//! The table `building_revisions`: every revision whole.

use sqlx::SqliteConnection;

use super::document;
use super::error::StoreError;
use super::records::Head;
use super::rows;
use crate::domain::Building;
use crate::domain::ids::{AgencyId, BuildingId};

const GET: &str = "
    select schema, document from building_revisions
    where agency_id = $1 and building_id = $2 and revision = $3";

const INSERT: &str = "
    insert into building_revisions (agency_id, building_id, revision, schema, document, digest, actor, at_us)
    values ($1, $2, $3, $4, $5, $6, $7, $8)";

#[cfg(test)]
pub(super) const ALL: &[&str] = &[GET, INSERT];

/// A building as it was at a revision.
pub(super) async fn get(
    db: &mut SqliteConnection,
    agency: &AgencyId,
    id: BuildingId,
    revision: u64,
) -> Result<Building, StoreError> {
    let (schema, text): (u32, String) = sqlx::query_as(GET)
        .bind(agency.0.clone())
        .bind(id.to_string())
        .bind(rows::stored_count(revision))
        .fetch_optional(db)
        .await?
        .ok_or_else(|| StoreError::Corrupt(format!("building {id} lacks revision {revision}")))?;
    document::from_text(&text, schema)
}

/// Keeps a building at the revision of its head.
pub(super) async fn insert(
    db: &mut SqliteConnection,
    agency: &AgencyId,
    head: &Head,
    building: &Building,
) -> Result<(), StoreError> {
    let text = document::to_text(building);
    let digest = document::digest(&text);
    sqlx::query(INSERT)
        .bind(agency.0.clone())
        .bind(head.id.to_string())
        .bind(rows::stored_count(head.revision))
        .bind(document::SCHEMA)
        .bind(text)
        .bind(digest)
        .bind(head.updated_by.clone())
        .bind(head.updated_at.0)
        .execute(db)
        .await?;
    Ok(())
}
