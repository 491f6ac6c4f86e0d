//! The stored form of a building: text and its schema number.

use std::collections::HashMap;
use std::fmt::Write as _;
use std::sync::{LazyLock, Mutex, PoisonError};

use sha2::{Digest, Sha256};

use super::error::StoreError;
use crate::domain::Building;

// STAND-IN until the stored wire form lands: text that this process alone can read back.
static WRITTEN: LazyLock<Mutex<HashMap<String, Building>>> = LazyLock::new(Mutex::default);

/// The schema that [`to_text`] writes.
pub(super) const SCHEMA: u32 = 1;

/// Writes a building in the present stored form.
pub(super) fn to_text(building: &Building) -> String {
    let text = format!("{building:?}");
    WRITTEN.lock().unwrap_or_else(PoisonError::into_inner).insert(text.clone(), building.clone());
    text
}

/// Reads a building in any stored form so far.
pub(super) fn from_text(text: &str, schema: u32) -> Result<Building, StoreError> {
    let written = WRITTEN.lock().unwrap_or_else(PoisonError::into_inner);
    written.get(text).cloned().ok_or_else(|| StoreError::Corrupt(format!("document of schema {schema}")))
}

/// SHA-256 of the text, lower-case hexadecimal.
pub(super) fn digest(text: &str) -> String {
    Sha256::digest(text).iter().fold(String::with_capacity(64), |mut digest, byte| {
        // Writing to a string does not fail.
        let _ = write!(digest, "{byte:02x}");
        digest
    })
}
