//! What the store refuses, as problems.

use super::conditional::stale;
use super::problem::{ApiError, header, member};
use crate::domain::Invalid;
use crate::store::{Conflict, StoreError};
use crate::wire::problem::{Fault, Slug};

impl From<StoreError> for ApiError {
    fn from(error: StoreError) -> Self {
        match error {
            StoreError::NotFound(missing) => Self::not_found(format!("such {missing}")),
            StoreError::Conflict(conflict) => conflicting(&conflict),
            StoreError::Stale { current: Some(current) } => stale(current),
            StoreError::Stale { current: None } => {
                Self::new(Slug::PreconditionFailed, "It is not there any more.").with_faults(vec![header(
                    "If-Match",
                    "stale",
                    "what it names is gone",
                )])
            }
            StoreError::Busy => Self::overloaded("Too many changes are waiting already; ask again shortly."),
            StoreError::Closed => Self::overloaded("The service is stopping."),
            StoreError::Open { .. } | StoreError::Database(_) | StoreError::Corrupt(_) => Self::internal(&error),
        }
    }
}

fn conflicting(conflict: &Conflict) -> ApiError {
    let detail = sentence(&conflict.to_string());
    let faults = match conflict {
        Conflict::ReferenceTaken { .. } => vec![member("/reference", "taken", detail.clone())],
        Conflict::KeyTaken { .. } => vec![member("", "duplicate", detail.clone())],
        Conflict::IdTaken { .. } => Vec::new(),
        Conflict::RoomJoined { openings, .. } => {
            openings.iter().map(|key| member("", "joined", format!("opening `{key}` joins it"))).collect()
        }
    };
    ApiError::new(Slug::Conflict, detail).with_faults(faults)
}

/// Every fault of a body that was read: 422.
pub fn invalid(faults: Vec<Invalid>) -> ApiError {
    let faults: Vec<Fault> = faults.into_iter().map(fault).collect();
    let detail = match faults.as_slice() {
        [one] => format!("The body has a fault: {}.", one.detail),
        many => format!("The body has {} faults; nothing was saved.", many.len()),
    };
    ApiError::new(Slug::Invalid, detail).with_faults(faults)
}

/// One fault.
pub fn fault(invalid: Invalid) -> Fault {
    let Invalid { pointer, code, detail, suggestion } = invalid;
    Fault { suggestion, ..member(pointer.as_str(), code, detail) }
}

fn sentence(text: &str) -> String {
    let mut chars = text.chars();
    chars.next().map_or_else(String::new, |first| format!("{}{}.", first.to_uppercase(), chars.as_str()))
}
