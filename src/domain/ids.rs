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

macro_rules! uuids {
    ($($id:ident)*) => {$(
        impl $id {
            /// Reads the form that we print: lower case, with hyphens. Any other is no id of ours.
            pub fn parse(text: &str) -> Option<Self> {
                let lawful = text.len() == 36 && !text.bytes().any(|c| c.is_ascii_uppercase());
                uuid::Uuid::try_parse(text).ok().filter(|_| lawful).map(Self)
            }
        }

        impl fmt::Display for $id {
            fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
                self.0.as_hyphenated().fmt(f)
            }
        }
    )*};
}

uuids! { BuildingId AssessmentId }

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

impl fmt::Display for NotAKey {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str("a key has 1 to 64 of a-z, 0-9, `_` and `-` and begins with a letter or digit")
    }
}

impl std::error::Error for NotAKey {}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn an_id_is_read_only_as_it_is_printed() {
        let printed = "0193f2a0-7c00-7000-8000-00000000abcd";

        assert_eq!(BuildingId::parse(printed).map(|id| id.to_string()).as_deref(), Some(printed));
        for other in [
            "0193F2A0-7C00-7000-8000-00000000ABCD",
            "0193f2a07c0070008000000000000abcd",
            "0193f2a07c007000800000000000abcd",
            "{0193f2a0-7c00-7000-8000-00000000abcd}",
            "urn:uuid:0193f2a0-7c00-7000-8000-00000000abcd",
            "",
            "417-B",
        ] {
            assert_eq!(BuildingId::parse(other), None, "{other}");
        }
    }

    #[test]
    fn a_key_obeys_its_pattern() {
        for (text, lawful) in [
            ("store", true),
            ("0-a_b", true),
            (&"a".repeat(64), true),
            (&"a".repeat(65), false),
            ("", false),
            ("-a", false),
            ("_a", false),
            ("Store", false),
            ("a b", false),
            ("a/b", false),
            ("é", false),
        ] {
            assert_eq!(Key::new(text).is_ok(), lawful, "{text}");
        }
    }
}
