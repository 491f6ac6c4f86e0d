//! The table `rooms`.

use sqlx::SqliteConnection;

use super::{fuel_packages, name};
use crate::domain::ids::{AgencyId, BuildingId, Key};
use crate::domain::room::{FloorPlan, Lining, Room};
use crate::domain::word::Word;
use crate::store::error::StoreError;
use crate::store::rows;

const SAVE: &str = "
    insert into rooms (
        agency_id, building_id, room_key, name, kind, room_use, floor,
        length_m, width_m, area_m2, perimeter_m, height_m, ceiling_form, ceiling_high_m,
        plan_x_m, plan_y_m, plan_turn_deg, leakage_class, leakage_area_m2,
        supply_m3_s, extract_m3_s, fans_stop_on_alarm,
        wall_material, wall_thickness_m, ceiling_material, ceiling_thickness_m,
        floor_material, floor_thickness_m, fuel_load_mj_m2,
        storage_commodity, storage_height_m, storage_footprint_m2, storage_aisle_m, storage_racks,
        hazards, detectors, sprinkler_class, sprinkler_spacing_m
    ) values (
        $1, $2, $3, $4, $5, $6, $7, $8, $9, $10, $11, $12, $13, $14, $15, $16, $17, $18, $19, $20,
        $21, $22, $23, $24, $25, $26, $27, $28, $29, $30, $31, $32, $33, $34, $35, $36, $37, $38
    )";

const DELETE: &str = "delete from rooms where agency_id = $1 and building_id = $2 and room_key = $3";

pub(super) const DELETE_ALL: &str = "delete from rooms where agency_id = $1 and building_id = $2";

#[cfg(test)]
pub(in crate::store) const ALL: &[&str] = &[SAVE, DELETE, DELETE_ALL];

/// Writes a room and its fuel packages, in the place of what was there.
pub(in crate::store) async fn replace(
    db: &mut SqliteConnection,
    agency: &AgencyId,
    id: BuildingId,
    room: &Room,
) -> Result<(), StoreError> {
    delete(db, agency, id, &room.key).await?;
    insert(db, agency, id, room).await
}

/// Writes a room and its fuel packages, of which nothing is there.
pub(in crate::store) async fn insert(
    db: &mut SqliteConnection,
    agency: &AgencyId,
    id: BuildingId,
    room: &Room,
) -> Result<(), StoreError> {
    let (length_m, width_m) = match room.plan {
        FloorPlan::Rectangle { length_m, width_m } => (Some(length_m.get()), Some(width_m.get())),
        FloorPlan::Shape { .. } => (None, None),
    };
    let material = |lining: &Option<Lining>| lining.as_ref().and_then(|lining| name(&lining.material));
    let thickness_m = |lining: &Option<Lining>| rows::number(lining.as_ref().and_then(|it| it.thickness_m));
    let hazards: Vec<&str> = room.hazards.iter().map(|hazard| hazard.word()).collect();
    let storage = room.storage.as_ref();
    let heads = room.sprinkler_heads.as_ref();
    sqlx::query(SAVE)
        .bind(agency.0.clone())
        .bind(id.to_string())
        .bind(room.key.to_string())
        .bind(room.name.clone())
        .bind(room.kind.word())
        .bind(name(&room.room_use))
        .bind(room.floor)
        .bind(length_m)
        .bind(width_m)
        .bind(room.floor_area_m2())
        .bind(room.perimeter_m())
        .bind(room.height_m.get())
        .bind(room.ceiling.form.word())
        .bind(rows::number(room.ceiling.high_m))
        .bind(room.position.map(|position| position.x_m.get()))
        .bind(room.position.map(|position| position.y_m.get()))
        .bind(room.position.map(|position| position.turn_deg.get()))
        .bind(room.leakage_class.as_ref().and_then(name))
        .bind(rows::number(room.leakage_area_m2))
        .bind(room.mechanical.map(|fans| fans.supply_m3_s.get()))
        .bind(room.mechanical.map(|fans| fans.extract_m3_s.get()))
        .bind(room.mechanical.map(|fans| fans.stops_on_alarm))
        .bind(material(&room.linings.walls))
        .bind(thickness_m(&room.linings.walls))
        .bind(material(&room.linings.ceiling))
        .bind(thickness_m(&room.linings.ceiling))
        .bind(material(&room.linings.floor))
        .bind(thickness_m(&room.linings.floor))
        .bind(rows::number(room.fuel_load_mj_m2))
        .bind(storage.and_then(|goods| name(&goods.commodity)))
        .bind(storage.map(|goods| goods.height_m.get()))
        .bind(storage.map(|goods| goods.footprint_m2.get()))
        .bind(rows::number(storage.and_then(|goods| goods.aisle_m)))
        .bind(storage.map(|goods| goods.racks))
        .bind(hazards.join(" "))
        .bind(rows::stored_count(room.detectors.len() as u64))
        .bind(heads.and_then(|heads| name(&heads.class)))
        .bind(rows::number(heads.and_then(|heads| heads.spacing_m)))
        .execute(&mut *db)
        .await?;
    for package in &room.fuel_packages {
        fuel_packages::insert(db, agency, id, &room.key, package).await?;
    }
    Ok(())
}

/// Removes a room and its fuel packages.
pub(in crate::store) async fn delete(
    db: &mut SqliteConnection,
    agency: &AgencyId,
    id: BuildingId,
    key: &Key,
) -> Result<(), StoreError> {
    fuel_packages::delete(db, agency, id, key).await?;
    sqlx::query(DELETE).bind(agency.0.clone()).bind(id.to_string()).bind(key.to_string()).execute(db).await?;
    Ok(())
}
