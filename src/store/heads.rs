//! The table `buildings`: a building's head.

use sqlx::SqliteConnection;

use super::error::StoreError;
use super::records::Head;
use super::rows;
use crate::domain::building::Building;
use crate::domain::ids::{AgencyId, BuildingId};
use crate::domain::time::Timestamp;
use crate::domain::word::Word;

const GET: &str = "
    select b.revision, b.created_at_us, b.updated_at_us, b.updated_by, (
        select a.assessment_id from assessments a
        where a.agency_id = b.agency_id and a.building_id = b.building_id
        order by a.created_at_us desc, a.assessment_id desc limit 1
    ) as latest_assessment_id
    from buildings b
    where b.agency_id = $1 and b.building_id = $2 and b.deleted_at_us is null";

const EXISTS: &str = "select 1 from buildings where agency_id = $1 and building_id = $2";

const ID_OF_REFERENCE: &str = "
    select building_id from buildings
    where agency_id = $1 and reference = $2 and deleted_at_us is null";

const SAVE: &str = "
    insert into buildings (
        agency_id, building_id, reference, name, revision, rooms,
        created_at_us, updated_at_us, updated_by, deleted_at_us,
        address_line, address_place, address_postcode, longitude_deg, latitude_deg,
        occupancy_group, construction_type, inspected_on, water_available_l_min, alarm_monitored,
        sprinklers_state, sprinklers_coverage,
        occupants_day, occupants_night, occupants_asleep, occupants_need_help,
        detection_s, call_s, processing_s, turnout_s, travel_s, setup_s
    ) values (
        $1, $2, $3, $4, $5, $6, $7, $8, $9, null, $10, $11, $12, $13, $14, $15, $16, $17, $18, $19,
        $20, $21, $22, $23, $24, $25, $26, $27, $28, $29, $30, $31
    )
    on conflict (agency_id, building_id) do update set
        reference = excluded.reference, name = excluded.name, revision = excluded.revision,
        rooms = excluded.rooms, updated_at_us = excluded.updated_at_us, updated_by = excluded.updated_by,
        address_line = excluded.address_line, address_place = excluded.address_place,
        address_postcode = excluded.address_postcode, longitude_deg = excluded.longitude_deg,
        latitude_deg = excluded.latitude_deg, occupancy_group = excluded.occupancy_group,
        construction_type = excluded.construction_type, inspected_on = excluded.inspected_on,
        water_available_l_min = excluded.water_available_l_min,
        alarm_monitored = excluded.alarm_monitored, sprinklers_state = excluded.sprinklers_state,
        sprinklers_coverage = excluded.sprinklers_coverage, occupants_day = excluded.occupants_day,
        occupants_night = excluded.occupants_night, occupants_asleep = excluded.occupants_asleep,
        occupants_need_help = excluded.occupants_need_help, detection_s = excluded.detection_s,
        call_s = excluded.call_s, processing_s = excluded.processing_s, turnout_s = excluded.turnout_s,
        travel_s = excluded.travel_s, setup_s = excluded.setup_s";

const DELETE: &str = "
    update buildings set deleted_at_us = $3, updated_at_us = $3, updated_by = $4
    where agency_id = $1 and building_id = $2 and deleted_at_us is null";

#[cfg(test)]
pub(super) const ALL: &[&str] = &[GET, EXISTS, ID_OF_REFERENCE, SAVE, DELETE];

#[derive(sqlx::FromRow)]
struct Row {
    revision: i64,
    created_at_us: i64,
    updated_at_us: i64,
    updated_by: String,
    latest_assessment_id: Option<String>,
}

/// The head of a building that is not deleted.
pub(super) async fn get(
    db: &mut SqliteConnection,
    agency: &AgencyId,
    id: BuildingId,
) -> Result<Option<Head>, StoreError> {
    let row: Option<Row> =
        sqlx::query_as(GET).bind(agency.0.clone()).bind(id.to_string()).fetch_optional(db).await?;
    row.map(|row| {
        Ok(Head {
            id,
            revision: rows::count(row.revision)?,
            created_at: Timestamp(row.created_at_us),
            updated_at: Timestamp(row.updated_at_us),
            updated_by: row.updated_by,
            latest_assessment: row.latest_assessment_id.as_deref().map(rows::assessment_id).transpose()?,
        })
    })
    .transpose()
}

/// Whether the id was ever given, deleted buildings included.
pub(super) async fn exists(
    db: &mut SqliteConnection,
    agency: &AgencyId,
    id: BuildingId,
) -> Result<bool, StoreError> {
    let row = sqlx::query(EXISTS).bind(agency.0.clone()).bind(id.to_string()).fetch_optional(db).await?;
    Ok(row.is_some())
}

/// The building that has this reference.
pub(super) async fn id_of_reference(
    db: &mut SqliteConnection,
    agency: &AgencyId,
    reference: &str,
) -> Result<Option<BuildingId>, StoreError> {
    let id: Option<String> = sqlx::query_scalar(ID_OF_REFERENCE)
        .bind(agency.0.clone())
        .bind(reference.to_owned())
        .fetch_optional(db)
        .await?;
    id.as_deref().map(rows::building_id).transpose()
}

/// Writes the head that goes with a revision.
pub(super) async fn save(
    db: &mut SqliteConnection,
    agency: &AgencyId,
    head: &Head,
    building: &Building,
) -> Result<(), StoreError> {
    let Building { address, response, sprinklers, occupants, .. } = building;
    sqlx::query(SAVE)
        .bind(agency.0.clone())
        .bind(head.id.to_string())
        .bind(building.reference.clone())
        .bind(building.name.clone())
        .bind(rows::stored_count(head.revision))
        .bind(rows::stored_count(building.rooms.len() as u64))
        .bind(head.created_at.0)
        .bind(head.updated_at.0)
        .bind(head.updated_by.clone())
        .bind(address.line.clone())
        .bind(address.place.clone())
        .bind(address.postcode.clone())
        .bind(building.location.map(|location| location.longitude_deg.get()))
        .bind(building.location.map(|location| location.latitude_deg.get()))
        .bind(building.occupancy_group.clone())
        .bind(building.construction_type.clone().map(|printed| printed.0))
        .bind(building.inspected_on.map(|day| day.to_string()))
        .bind(rows::number(building.water_available_l_min))
        .bind(building.alarm_monitored)
        .bind(sprinklers.state.word())
        .bind(sprinklers.coverage.map(Word::word))
        .bind(occupants.day)
        .bind(occupants.night)
        .bind(occupants.asleep)
        .bind(occupants.need_help)
        .bind(rows::number(response.detection_s))
        .bind(rows::number(response.call_s))
        .bind(rows::number(response.processing_s))
        .bind(rows::number(response.turnout_s))
        .bind(rows::number(response.travel_s))
        .bind(rows::number(response.setup_s))
        .execute(db)
        .await?;
    Ok(())
}

/// Marks a building as deleted.
pub(super) async fn delete(
    db: &mut SqliteConnection,
    agency: &AgencyId,
    id: BuildingId,
    at: Timestamp,
    actor: &str,
) -> Result<(), StoreError> {
    sqlx::query(DELETE)
        .bind(agency.0.clone())
        .bind(id.to_string())
        .bind(at.0)
        .bind(actor.to_owned())
        .execute(db)
        .await?;
    Ok(())
}
