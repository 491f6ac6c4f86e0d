//! The table `fuel_packages`.

use sqlx::SqliteConnection;

use super::name;
use crate::domain::ids::{AgencyId, BuildingId, Key};
use crate::domain::room::FuelPackage;
use crate::domain::word::Word;
use crate::store::error::StoreError;
use crate::store::rows;

const INSERT: &str = "
    insert into fuel_packages (
        agency_id, building_id, room_key, package_key, item, count, mass_kg, base_height_m, place, spacing_m
    ) values ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10)";

const DELETE: &str = "
    delete from fuel_packages where agency_id = $1 and building_id = $2 and room_key = $3";

pub(super) const DELETE_ALL: &str = "delete from fuel_packages where agency_id = $1 and building_id = $2";

#[cfg(test)]
pub(in crate::store) const ALL: &[&str] = &[INSERT, DELETE, DELETE_ALL];

/// Writes a fuel package of a room.
pub(super) async fn insert(
    db: &mut SqliteConnection,
    agency: &AgencyId,
    id: BuildingId,
    room: &Key,
    package: &FuelPackage,
) -> Result<(), StoreError> {
    sqlx::query(INSERT)
        .bind(agency.0.clone())
        .bind(id.to_string())
        .bind(room.to_string())
        .bind(package.key.to_string())
        .bind(name(&package.item))
        .bind(package.count)
        .bind(rows::number(package.mass_kg))
        .bind(package.base_height_m.get())
        .bind(package.place.word())
        .bind(rows::number(package.spacing_m))
        .execute(db)
        .await?;
    Ok(())
}

/// Removes the fuel packages of a room.
pub(super) async fn delete(
    db: &mut SqliteConnection,
    agency: &AgencyId,
    id: BuildingId,
    room: &Key,
) -> Result<(), StoreError> {
    sqlx::query(DELETE)
        .bind(agency.0.clone())
        .bind(id.to_string())
        .bind(room.to_string())
        .execute(db)
        .await?;
    Ok(())
}
