//! The table `openings`.

use sqlx::SqliteConnection;

use crate::domain::ids::{AgencyId, BuildingId, Key};
use crate::domain::opening::{Opening, Space};
use crate::domain::word::Word;
use crate::store::error::StoreError;
use crate::store::rows;

const SAVE: &str = "
    insert into openings (
        agency_id, building_id, opening_key, name, kind, first_room_key, second_room_key,
        width_m, height_m, area_m2, sill_m, open_fraction, held_open, self_closing, fire_rating_min,
        leakage_area_m2, swing, entry, side, azimuth_deg, glazing
    ) values (
        $1, $2, $3, $4, $5, $6, $7, $8, $9, $10, $11, $12, $13, $14, $15, $16, $17, $18, $19, $20, $21
    )";

const DELETE: &str = "
    delete from openings where agency_id = $1 and building_id = $2 and opening_key = $3";

pub(super) const DELETE_ALL: &str = "delete from openings where agency_id = $1 and building_id = $2";

#[cfg(test)]
pub(in crate::store) const ALL: &[&str] = &[SAVE, DELETE, DELETE_ALL];

/// Writes an opening, in the place of what was there.
pub(in crate::store) async fn replace(
    db: &mut SqliteConnection,
    agency: &AgencyId,
    id: BuildingId,
    opening: &Opening,
) -> Result<(), StoreError> {
    delete(db, agency, id, &opening.key).await?;
    insert(db, agency, id, opening).await
}

/// Writes an opening of which nothing is there.
pub(in crate::store) async fn insert(
    db: &mut SqliteConnection,
    agency: &AgencyId,
    id: BuildingId,
    opening: &Opening,
) -> Result<(), StoreError> {
    let room = |space: &Space| match space {
        Space::Room(key) => Some(key.to_string()),
        Space::Outside => None,
    };
    let [first, second] = &opening.connects;
    sqlx::query(SAVE)
        .bind(agency.0.clone())
        .bind(id.to_string())
        .bind(opening.key.to_string())
        .bind(opening.name.clone())
        .bind(opening.kind.word())
        .bind(room(first))
        .bind(room(second))
        .bind(opening.width_m.get())
        .bind(opening.height_m.get())
        .bind(opening.width_m.get() * opening.height_m.get())
        .bind(opening.sill_m.get())
        .bind(opening.open_fraction.get())
        .bind(opening.held_open)
        .bind(opening.self_closing)
        .bind(rows::number(opening.fire_rating_min))
        .bind(rows::number(opening.leakage_area_m2))
        .bind(opening.swing.map(Word::word))
        .bind(opening.entry)
        .bind(opening.side.map(Word::word))
        .bind(rows::number(opening.azimuth_deg))
        .bind(opening.glazing.map(Word::word))
        .execute(db)
        .await?;
    Ok(())
}

/// Removes an opening.
pub(in crate::store) async fn delete(
    db: &mut SqliteConnection,
    agency: &AgencyId,
    id: BuildingId,
    key: &Key,
) -> Result<(), StoreError> {
    sqlx::query(DELETE).bind(agency.0.clone()).bind(id.to_string()).bind(key.to_string()).execute(db).await?;
    Ok(())
}
