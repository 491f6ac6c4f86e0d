//! Between columns and the domain's types.

use uuid::Uuid;

use super::error::StoreError;
use crate::domain::ids::{AssessmentId, BuildingId, Key};
use crate::domain::quantity::{Kind, Quantity};

/// The number of an optional quantity.
pub(super) fn number<K: Kind>(quantity: Option<Quantity<K>>) -> Option<f64> {
    quantity.map(Quantity::get)
}

/// A count or revision as the database keeps it.
pub(super) fn stored_count(count: u64) -> i64 {
    // Nothing is counted that far; a saturated number is refused by its column's check or key.
    i64::try_from(count).unwrap_or(i64::MAX)
}

/// A count or revision as it was kept.
pub(super) fn count(stored: i64) -> Result<u64, StoreError> {
    u64::try_from(stored).map_err(|_| StoreError::Corrupt(format!("a count of {stored}")))
}

/// A key as it was kept.
pub(super) fn key(stored: &str) -> Result<Key, StoreError> {
    Key::new(stored).map_err(|_| StoreError::Corrupt(format!("the key {stored:?}")))
}

/// A building's id as it was kept.
pub(super) fn building_id(stored: &str) -> Result<BuildingId, StoreError> {
    uuid(stored).map(BuildingId)
}

/// An assessment's id as it was kept.
pub(super) fn assessment_id(stored: &str) -> Result<AssessmentId, StoreError> {
    uuid(stored).map(AssessmentId)
}

fn uuid(stored: &str) -> Result<Uuid, StoreError> {
    Uuid::try_parse(stored).map_err(|_| StoreError::Corrupt(format!("the id {stored:?}")))
}
