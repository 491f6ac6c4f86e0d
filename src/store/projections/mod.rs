//! The tables `rooms`, `openings` and `fuel_packages`: documents as columns.
//!
//! Written in the transaction of the document, read by ranking, maps and an
//! officer's own SQL, and never by the service to answer for a building.

pub(super) mod fuel_packages;
pub(super) mod openings;
pub(super) mod rooms;

use sqlx::SqliteConnection;

use super::error::StoreError;
use crate::domain::Named;
use crate::domain::ids::{AgencyId, BuildingId};

/// The key of a catalogue row; nothing where the properties were given.
fn name<T>(named: &Named<T>) -> Option<String> {
    match named {
        Named::Catalogue(key) => Some(key.clone()),
        Named::Given(_) => None,
    }
}

/// Removes whatever is projected of a building.
pub(super) async fn delete_all(
    db: &mut SqliteConnection,
    agency: &AgencyId,
    id: BuildingId,
) -> Result<(), StoreError> {
    for statement in [fuel_packages::DELETE_ALL, rooms::DELETE_ALL, openings::DELETE_ALL] {
        sqlx::query(statement).bind(agency.0.clone()).bind(id.to_string()).execute(&mut *db).await?;
    }
    Ok(())
}
