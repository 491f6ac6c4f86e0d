//! The stored form of a building: text and its schema number.

use std::fmt::Write as _;

use sha2::{Digest, Sha256};

use super::error::StoreError;
use crate::catalogue::Catalogue;
use crate::domain::Building;
use crate::wire::stored;

pub(super) use crate::wire::stored::{SCHEMA, to_text};

/// Reads a building in any stored form so far.
pub(super) fn from_text(text: &str, schema: u32) -> Result<Building, StoreError> {
    stored::from_text(text, schema, Catalogue::embedded())
        .map_err(|fault| StoreError::Corrupt(fault.to_string()))
}

/// SHA-256 of the text, lower-case hexadecimal.
pub(super) fn digest(text: &str) -> String {
    Sha256::digest(text).iter().fold(String::with_capacity(64), |mut digest, byte| {
        // Writing to a string does not fail.
        let _ = write!(digest, "{byte:02x}");
        digest
    })
}
