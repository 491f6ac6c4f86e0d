//! The table `building_parts`: the revision in which each part last changed.

use sqlx::SqliteConnection;

use super::error::StoreError;
use super::records::PartRevisions;
use super::rows;
use crate::domain::Key;
use crate::domain::ids::{AgencyId, BuildingId};

const LIST: &str = "
    select kind, part_key, revision from building_parts where agency_id = $1 and building_id = $2";

const SET: &str = "
    insert into building_parts (agency_id, building_id, kind, part_key, revision)
    values ($1, $2, $3, $4, $5)
    on conflict (agency_id, building_id, kind, part_key) do update set revision = excluded.revision";

const DELETE: &str = "
    delete from building_parts
    where agency_id = $1 and building_id = $2 and kind = $3 and part_key = $4";

const DELETE_ALL: &str = "delete from building_parts where agency_id = $1 and building_id = $2";

#[cfg(test)]
pub(super) const ALL: &[&str] = &[LIST, SET, DELETE, DELETE_ALL];

/// Which sort of part.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Sort {
    Room,
    Opening,
}

impl Sort {
    pub(super) fn word(self) -> &'static str {
        match self {
            Self::Room => "room",
            Self::Opening => "opening",
        }
    }
}

/// The tags of all parts.
pub(super) async fn list(
    db: &mut SqliteConnection,
    agency: &AgencyId,
    id: BuildingId,
) -> Result<PartRevisions, StoreError> {
    let found: Vec<(String, String, i64)> =
        sqlx::query_as(LIST).bind(agency.0.clone()).bind(id.to_string()).fetch_all(db).await?;
    let mut parts = PartRevisions::default();
    for (sort, key, revision) in found {
        let of_sort = if sort == Sort::Room.word() { &mut parts.rooms } else { &mut parts.openings };
        of_sort.insert(rows::key(&key)?, rows::count(revision)?);
    }
    Ok(parts)
}

/// Moves a part's tag.
pub(super) async fn set(
    db: &mut SqliteConnection,
    agency: &AgencyId,
    id: BuildingId,
    (sort, key): (Sort, &Key),
    revision: u64,
) -> Result<(), StoreError> {
    sqlx::query(SET)
        .bind(agency.0.clone())
        .bind(id.to_string())
        .bind(sort.word())
        .bind(key.to_string())
        .bind(rows::stored_count(revision))
        .execute(db)
        .await?;
    Ok(())
}

/// Forgets a part that is no more.
pub(super) async fn delete(
    db: &mut SqliteConnection,
    agency: &AgencyId,
    id: BuildingId,
    (sort, key): (Sort, &Key),
) -> Result<(), StoreError> {
    sqlx::query(DELETE)
        .bind(agency.0.clone())
        .bind(id.to_string())
        .bind(sort.word())
        .bind(key.to_string())
        .execute(db)
        .await?;
    Ok(())
}

/// Forgets the parts of a building that is no more.
pub(super) async fn delete_all(
    db: &mut SqliteConnection,
    agency: &AgencyId,
    id: BuildingId,
) -> Result<(), StoreError> {
    sqlx::query(DELETE_ALL).bind(agency.0.clone()).bind(id.to_string()).execute(db).await?;
    Ok(())
}
