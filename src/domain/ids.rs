//! Ids that the service gives and keys that the bureau gives.

use std::fmt;

/// A building's id: UUID version 7, lower case on the wire.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct BuildingId(pub uuid::Uuid);

/// An assessment's id: UUID version 7, lower case on the wire.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct AssessmentId(pub uuid::Uuid);

/// An agency's name: the bureau that owns records.
#[derive(Debug, Clone, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct AgencyId(pub String);

impl AgencyId {
    /// The agency that the first migration makes.
    pub fn local() -> Self {
        Self("local".to_owned())
    }
}

/// The bureau's name for a part of a building: `[a-z0-9][a-z0-9_-]{0,63}`, unique in its kind.
#[derive(Debug, Clone, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct Key(String);

impl Key {
    /// The pattern a key obeys, as the OpenAPI document prints it.
    pub const PATTERN: &str = "^[a-z0-9][a-z0-9_-]{0,63}$";
    /// The reserved key of the space outside the building.
    pub const OUTSIDE: &str = "outside";

    /// Checks the pattern.
    pub fn new(text: &str) -> Result<Self, NotAKey> {
        let lawful = |c: u8| c.is_ascii_lowercase() || c.is_ascii_digit();
        let bytes = text.as_bytes();
        let first = bytes.first().copied().is_some_and(lawful);
        let rest = bytes.iter().all(|&c| lawful(c) || c == b'_' || c == b'-');
        if first && rest && bytes.len() <= 64 { Ok(Self(text.to_owned())) } else { Err(NotAKey) }
    }

    /// The key as text.
    pub fn as_str(&self) -> &str {
        &self.0
    }
}

/// The text is no key.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct NotAKey;

impl fmt::Display for Key {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(&self.0)
    }
}

impl fmt::Display for BuildingId {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        self.0.fmt(f)
    }
}

impl fmt::Display for AssessmentId {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        self.0.fmt(f)
    }
}
