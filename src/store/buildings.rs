//! Reading buildings.

use std::sync::Arc;

use sqlx::{Connection, SqliteConnection};

use super::cache::{Cache, Decoded};
use super::error::{Missing, StoreError};
use super::records::{Head, ListBuildings, Page, Saved, SavedBuilding, Summary, Worst, WorstRating};
use super::{Store, heads, parts, revisions, rows};
use crate::domain::building::Location;
use crate::domain::ids::{AgencyId, BuildingId, Key};
use crate::domain::quantity::{Latitude, Longitude};
use crate::domain::time::Timestamp;
use crate::domain::{Caller, Opening, Room};

/// Heads with the latest assessment of each.
macro_rules! summaries {
    ($rest:literal) => {
        concat!(
            "
    select b.building_id, b.reference, b.name, b.longitude_deg, b.latitude_deg, b.occupancy_group,
        b.rooms, b.revision, b.updated_at_us,
        a.assessment_id, a.level, a.created_at_us, a.building_revision,
        a.flashover_worst_rating, a.flashover_worst_room_key,
        a.backdraft_worst_rating, a.backdraft_worst_room_key,
        a.entry_worst_rating, a.entry_worst_room_key
    from buildings b
    left join assessments a on a.agency_id = b.agency_id and a.assessment_id = (
        select l.assessment_id from assessments l
        where l.agency_id = b.agency_id and l.building_id = b.building_id
        order by l.created_at_us desc, l.assessment_id desc limit 1
    )
    where b.agency_id = $1 and b.deleted_at_us is null and b.building_id > $2",
            $rest
        )
    };
}

const LIST: &str = summaries!(" order by b.building_id limit $3");

const LIST_BY_REFERENCE: &str = summaries!(" and b.reference = $4 order by b.building_id limit $3");

const ANY: &str = "
    select 1 from buildings where agency_id = $1 and deleted_at_us is null limit 1";

#[cfg(test)]
pub(super) const ALL: &[&str] = &[LIST, LIST_BY_REFERENCE, ANY];

impl Store {
    /// A building as it is now.
    pub async fn get_building(&self, caller: &Caller, id: BuildingId) -> Result<SavedBuilding, StoreError> {
        let mut reader = self.readers.acquire().await?;
        let head = heads::get(&mut reader, &caller.agency, id).await?;
        let head = head.ok_or(StoreError::NotFound(Missing::Building))?;
        if let Some(decoded) = self.cache.get(&caller.agency, id, head.revision) {
            return Ok(saved(head, decoded));
        }
        // One snapshot: the document and the tags must be of the same revision.
        let mut snapshot = reader.begin().await?;
        let found = load(&mut snapshot, &caller.agency, id, &self.cache).await?;
        snapshot.commit().await?;
        let found = found.ok_or(StoreError::NotFound(Missing::Building))?;
        self.remember(caller, &found);
        Ok(found)
    }

    /// The building that has this reference.
    pub async fn find_building(
        &self,
        caller: &Caller,
        reference: &str,
    ) -> Result<Option<SavedBuilding>, StoreError> {
        let mut reader = self.readers.acquire().await?;
        let id = heads::id_of_reference(&mut reader, &caller.agency, reference).await?;
        drop(reader);
        match id {
            None => Ok(None),
            Some(id) => match self.get_building(caller, id).await {
                // Deleted between the two reads.
                Err(StoreError::NotFound(_)) => Ok(None),
                found => found.map(Some),
            },
        }
    }

    /// A room as it is now.
    pub async fn get_room(
        &self,
        caller: &Caller,
        id: BuildingId,
        key: &Key,
    ) -> Result<Saved<Room>, StoreError> {
        self.get_building(caller, id).await?.room(key).ok_or(StoreError::NotFound(Missing::Room))
    }

    /// An opening as it is now.
    pub async fn get_opening(
        &self,
        caller: &Caller,
        id: BuildingId,
        key: &Key,
    ) -> Result<Saved<Opening>, StoreError> {
        self.get_building(caller, id).await?.opening(key).ok_or(StoreError::NotFound(Missing::Opening))
    }

    /// A page of summaries in order of id, which is the order in which they were entered.
    ///
    /// The walk from page to page is over ids, which never change: whatever is
    /// saved meanwhile, each building that is there all along comes once.
    pub async fn list_buildings(
        &self,
        caller: &Caller,
        list: &ListBuildings,
    ) -> Result<Page<Summary, BuildingId>, StoreError> {
        let statement = if list.reference.is_some() { LIST_BY_REFERENCE } else { LIST };
        let mut query = sqlx::query_as::<_, Row>(statement)
            .bind(caller.agency.0.clone())
            // No id is before the empty text.
            .bind(list.after.map_or_else(String::new, |id| id.to_string()))
            .bind(i64::from(list.limit) + 1);
        if let Some(reference) = &list.reference {
            query = query.bind(reference.clone());
        }
        let mut reader = self.readers.acquire().await?;
        let found = query.fetch_all(&mut *reader).await?;
        drop(reader);
        let items = found.into_iter().map(Row::summary).collect::<Result<Vec<_>, _>>()?;
        Ok(page(items, list.limit, |last| last.id))
    }

    /// Whether the agency has no building.
    pub async fn is_empty(&self, caller: &Caller) -> Result<bool, StoreError> {
        let mut reader = self.readers.acquire().await?;
        let any = sqlx::query(ANY).bind(caller.agency.0.clone()).fetch_optional(&mut *reader).await?;
        Ok(any.is_none())
    }

    /// Keeps a decoded building for the next read.
    pub(super) fn remember(&self, caller: &Caller, saved: &SavedBuilding) {
        let decoded = Decoded { building: Arc::clone(&saved.building), parts: Arc::clone(&saved.parts) };
        self.cache.put(&caller.agency, saved.head.id, saved.head.revision, decoded);
    }
}

/// Reads a building; to be called within a transaction.
pub(super) async fn load(
    db: &mut SqliteConnection,
    agency: &AgencyId,
    id: BuildingId,
    cache: &Cache,
) -> Result<Option<SavedBuilding>, StoreError> {
    let Some(head) = heads::get(db, agency, id).await? else { return Ok(None) };
    let decoded = match cache.get(agency, id, head.revision) {
        Some(decoded) => decoded,
        None => Decoded {
            building: Arc::new(revisions::get(db, agency, id, head.revision).await?),
            parts: Arc::new(parts::list(db, agency, id).await?),
        },
    };
    Ok(Some(saved(head, decoded)))
}

fn saved(head: Head, decoded: Decoded) -> SavedBuilding {
    SavedBuilding { head, building: decoded.building, parts: decoded.parts }
}

/// Makes a page of what was read with one more than the limit.
pub(super) fn page<T, Cursor>(
    mut items: Vec<T>,
    limit: u32,
    cursor: impl Fn(&T) -> Cursor,
) -> Page<T, Cursor> {
    let limit = usize::try_from(limit).unwrap_or(usize::MAX);
    let more = items.len() > limit;
    items.truncate(limit);
    let next = if more { items.last().map(cursor) } else { None };
    Page { items, next }
}

/// A worst rating of an assessment's row.
pub(super) fn worst_rating(
    rating: Option<String>,
    room: Option<&str>,
) -> Result<Option<WorstRating>, StoreError> {
    match (rating, room) {
        (Some(rating), Some(room)) => Ok(Some(WorstRating { rating, room: rows::key(room)? })),
        _ => Ok(None),
    }
}

#[derive(sqlx::FromRow)]
struct Row {
    building_id: String,
    reference: Option<String>,
    name: String,
    longitude_deg: Option<f64>,
    latitude_deg: Option<f64>,
    occupancy_group: Option<String>,
    rooms: i64,
    revision: i64,
    updated_at_us: i64,
    assessment_id: Option<String>,
    level: Option<String>,
    created_at_us: Option<i64>,
    building_revision: Option<i64>,
    flashover_worst_rating: Option<String>,
    flashover_worst_room_key: Option<String>,
    backdraft_worst_rating: Option<String>,
    backdraft_worst_room_key: Option<String>,
    entry_worst_rating: Option<String>,
    entry_worst_room_key: Option<String>,
}

impl Row {
    fn summary(self) -> Result<Summary, StoreError> {
        let id = rows::building_id(&self.building_id)?;
        let revision = rows::count(self.revision)?;
        let location = match (self.longitude_deg, self.latitude_deg) {
            (Some(longitude), Some(latitude)) => Longitude::new(longitude)
                .zip(Latitude::new(latitude))
                .map(|(longitude_deg, latitude_deg)| Location { longitude_deg, latitude_deg }),
            _ => None,
        };
        let worst = match (self.assessment_id, self.level, self.created_at_us, self.building_revision) {
            (Some(assessment), Some(level), Some(created_at_us), Some(assessed)) => Some(Worst {
                assessment: rows::assessment_id(&assessment)?,
                level,
                created_at: Timestamp(created_at_us),
                building_revision: rows::count(assessed)?,
                stale: rows::count(assessed)? != revision,
                flashover: worst_rating(
                    self.flashover_worst_rating,
                    self.flashover_worst_room_key.as_deref(),
                )?,
                backdraft: worst_rating(
                    self.backdraft_worst_rating,
                    self.backdraft_worst_room_key.as_deref(),
                )?,
                entry: worst_rating(self.entry_worst_rating, self.entry_worst_room_key.as_deref())?,
            }),
            _ => None,
        };
        Ok(Summary {
            id,
            reference: self.reference,
            name: self.name,
            location,
            occupancy_group: self.occupancy_group,
            rooms: rows::count(self.rooms)?,
            revision,
            updated_at: Timestamp(self.updated_at_us),
            worst,
        })
    }
}
