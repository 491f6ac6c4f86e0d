//! What the store refuses, as problems.

use super::conditional::gone;
use super::conditional::stale;
use super::forms::fault;
use super::problem::ApiError;
use crate::domain::Invalid;
use crate::store::{Conflict, StoreError};
use crate::wire::problem::Slug;

impl From<StoreError> for ApiError {
    fn from(error: StoreError) -> Self {
        match error {
            StoreError::NotFound(missing) => Self::not_found(format!("such {missing}")),
            StoreError::Conflict(conflict) => conflicting(&conflict),
            StoreError::Stale { current: Some(current) } => stale(current),
            StoreError::Stale { current: None } => gone(),
            StoreError::Busy => Self::overloaded("Too many changes are waiting already; ask again shortly."),
            StoreError::Closed => Self::overloaded("The service is stopping."),
            StoreError::Open { .. } | StoreError::Database(_) | StoreError::Corrupt(_) => {
                Self::internal(&error)
            }
        }
    }
}

fn conflicting(conflict: &Conflict) -> ApiError {
    let words = conflict.to_string();
    let faults = match conflict {
        Conflict::ReferenceTaken { .. } => vec![fault("reference", "taken", words.as_str())],
        Conflict::KeyTaken { .. } => vec![fault("", "duplicate", words.as_str())],
        Conflict::IdTaken { .. } => Vec::new(),
        Conflict::RoomJoined { openings, .. } => {
            openings.iter().map(|key| fault("", "joined", format!("opening `{key}` joins it"))).collect()
        }
    };
    ApiError::new(Slug::Conflict, sentence(&words)).with_faults(faults.into_iter().map(Into::into).collect())
}

/// Every fault of a body that was read: 422.
pub fn invalid(faults: Vec<Invalid>) -> ApiError {
    let detail = match faults.as_slice() {
        [one] => format!("The body has a fault: {}. Nothing was saved.", one.detail),
        many => format!("The body has {} faults. Nothing was saved.", many.len()),
    };
    ApiError::new(Slug::Invalid, detail).with_faults(faults.into_iter().map(Into::into).collect())
}

fn sentence(text: &str) -> String {
    let mut chars = text.chars();
    chars.next().map_or_else(String::new, |first| format!("{}{}.", first.to_uppercase(), chars.as_str()))
}
