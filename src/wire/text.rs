//! Forms of texts: free ones, code letters, keys and the spaces that keys name.

use serde::Serializer;
use utoipa::openapi::schema::{Schema, Type};
use utoipa::openapi::{ObjectBuilder, RefOr};

use super::form::{Form, Way};
use super::json::Json;
use super::reader::Reader;
use crate::domain::building::ConstructionType;
use crate::domain::opening::Space;
use crate::domain::{Key, Pointer};

/// Text on one line.
pub struct Text<const MIN: usize, const MAX: usize>;
/// Text on any number of lines.
pub struct Prose<const MAX: usize>;

/// Patterns that keep control characters out; the second lets tabs and line ends in.
const ONE_LINE: &str = r"^[^\u0000-\u001f\u007f]*$";
const MANY_LINES: &str = r"^[^\u0000-\u0008\u000b\u000c\u000e-\u001f\u007f]*$";

struct TextRule {
    min: usize,
    max: usize,
    lines: bool,
}

impl TextRule {
    fn read<'j>(&self, json: &'j Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<&'j str> {
        let Json::Text(text) = json else {
            reader.wrong_type(at, json, "a string");
            return None;
        };
        let length = text.chars().count();
        let control = text.chars().any(|c| c.is_ascii_control() && !(self.lines && "\t\n\r".contains(c)));
        if length < self.min {
            reader.fault(at, "too_short", "must not be empty");
        } else if length > self.max {
            let max = self.max;
            reader.fault(at, "too_long", format!("has {length} characters; at most {max} are kept"));
        } else if control {
            reader.fault(at, "bad_text", "must not hold control characters");
        } else {
            return Some(text);
        }
        None
    }

    fn schema(&self) -> RefOr<Schema> {
        let mut text = ObjectBuilder::new()
            .schema_type(Type::String)
            .max_length(Some(self.max))
            .pattern(Some(if self.lines { MANY_LINES } else { ONE_LINE }));
        if self.min > 0 {
            text = text.min_length(Some(self.min));
        }
        text.into()
    }
}

impl<const MIN: usize, const MAX: usize> Text<MIN, MAX> {
    const RULE: TextRule = TextRule { min: MIN, max: MAX, lines: false };
}

impl<const MIN: usize, const MAX: usize> Form for Text<MIN, MAX> {
    type Value = String;

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<String> {
        Self::RULE.read(json, at, reader).map(str::to_owned)
    }

    fn write<S: Serializer>(value: &String, serializer: S) -> Result<S::Ok, S::Error> {
        serializer.serialize_str(value)
    }

    fn schema(_: Way) -> RefOr<Schema> {
        Self::RULE.schema()
    }
}

impl<const MAX: usize> Prose<MAX> {
    const RULE: TextRule = TextRule { min: 0, max: MAX, lines: true };
}

impl<const MAX: usize> Form for Prose<MAX> {
    type Value = String;

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<String> {
        Self::RULE.read(json, at, reader).map(str::to_owned)
    }

    fn write<S: Serializer>(value: &String, serializer: S) -> Result<S::Ok, S::Error> {
        serializer.serialize_str(value)
    }

    fn schema(_: Way) -> RefOr<Schema> {
        Self::RULE.schema()
    }
}

/// Code letters of a standard, as printed there: `S-1`, `III-B`.
pub struct CodeLetters;

impl CodeLetters {
    const PATTERN: &str = "^[A-Za-z0-9][A-Za-z0-9 ./()-]{0,11}$";

    fn lawful(text: &str) -> bool {
        let bytes = text.as_bytes();
        (1..=12).contains(&bytes.len())
            && bytes.first().is_some_and(u8::is_ascii_alphanumeric)
            && bytes.iter().all(|c| c.is_ascii_alphanumeric() || b" ./()-".contains(c))
    }
}

impl Form for CodeLetters {
    type Value = String;

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<String> {
        let Json::Text(text) = json else {
            reader.wrong_type(at, json, "a string");
            return None;
        };
        if !Self::lawful(text) {
            let detail =
                "must be the code letters of the standard, at most 12 of letters, digits, spaces and `./()-`";
            reader.fault(at, "bad_text", detail);
            return None;
        }
        Some(text.clone())
    }

    fn write<S: Serializer>(value: &String, serializer: S) -> Result<S::Ok, S::Error> {
        serializer.serialize_str(value)
    }

    fn schema(_: Way) -> RefOr<Schema> {
        ObjectBuilder::new()
            .schema_type(Type::String)
            .min_length(Some(1))
            .max_length(Some(12))
            .pattern(Some(Self::PATTERN))
            .into()
    }
}

impl Form for ConstructionType {
    type Value = Self;

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<Self> {
        CodeLetters::read(json, at, reader).map(Self)
    }

    fn write<S: Serializer>(value: &Self, serializer: S) -> Result<S::Ok, S::Error> {
        serializer.serialize_str(&value.0)
    }

    fn schema(way: Way) -> RefOr<Schema> {
        CodeLetters::schema(way)
    }
}

impl Form for Key {
    type Value = Self;

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<Self> {
        let Json::Text(text) = json else {
            reader.wrong_type(at, json, "a string");
            return None;
        };
        match Key::new(text) {
            Ok(key) if key.as_str() == Key::OUTSIDE => {
                reader.fault(at, "reserved", "`outside` is the name of the space around the building");
                None
            }
            Ok(key) => Some(key),
            Err(error) => {
                reader.fault_with(at, "bad_key", error.to_string(), keyed(text));
                None
            }
        }
    }

    fn write<S: Serializer>(value: &Self, serializer: S) -> Result<S::Ok, S::Error> {
        serializer.serialize_str(value.as_str())
    }

    fn schema(_: Way) -> RefOr<Schema> {
        ObjectBuilder::new()
            .schema_type(Type::String)
            .min_length(Some(1))
            .max_length(Some(64))
            .pattern(Some(Key::PATTERN))
            .into()
    }
}

/// A key like the text, where one can be made.
fn keyed(text: &str) -> Option<String> {
    let lower = text.trim().to_ascii_lowercase();
    let lawful = lower.chars().map(|c| if c.is_ascii_alphanumeric() || c == '-' { c } else { '_' });
    let key: String = lawful.take(64).collect();
    let key = key.trim_start_matches(['_', '-']);
    Key::new(key).ok().filter(|key| key.as_str() != Key::OUTSIDE).map(|key| key.to_string())
}

impl Form for Space {
    type Value = Self;

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<Self> {
        match json {
            Json::Text(text) if text == Key::OUTSIDE => Some(Self::Outside),
            other => Key::read(other, at, reader).map(Self::Room),
        }
    }

    fn write<S: Serializer>(value: &Self, serializer: S) -> Result<S::Ok, S::Error> {
        serializer.serialize_str(match value {
            Self::Room(key) => key.as_str(),
            Self::Outside => Key::OUTSIDE,
        })
    }

    fn schema(way: Way) -> RefOr<Schema> {
        Key::schema(way)
    }
}
