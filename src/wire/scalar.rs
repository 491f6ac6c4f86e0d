//! Forms of single values: numbers, texts, words, keys, days.

use std::marker::PhantomData;

use serde::{Serialize, Serializer};
use utoipa::openapi::schema::{KnownFormat, Object, Schema, SchemaFormat, Type};
use utoipa::openapi::{ObjectBuilder, RefOr};

use super::form::{Form, Way};
use super::json::Json;
use super::object::either;
use super::reader::{Reader, nearest, shortened};
use crate::domain::building::ConstructionType;
use crate::domain::opening::Space;
use crate::domain::quantity::Kind;
use crate::domain::time::Day;
use crate::domain::{Key, Pointer, Quantity, Word, units};

impl Form for bool {
    type Value = Self;

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<Self> {
        match json {
            Json::Bool(value) => Some(*value),
            other => {
                reader.wrong_type(at, other, "true or false");
                None
            }
        }
    }

    fn write<S: Serializer>(value: &Self, serializer: S) -> Result<S::Ok, S::Error> {
        serializer.serialize_bool(*value)
    }

    fn schema(_: Way) -> RefOr<Schema> {
        Object::with_type(Type::Boolean).into()
    }
}

/// A whole number within limits.
pub struct Whole<T, const MIN: i64, const MAX: i64>(PhantomData<T>);

/// The whole number that a JSON number is, whether written `3` or `3.0`.
fn whole(number: &serde_json::Number) -> Option<i64> {
    /// Beyond it not every whole number has a float.
    const EXACT: f64 = 9_007_199_254_740_992.0;
    if let Some(value) = number.as_i64() {
        return Some(value);
    }
    let value = number.as_f64().filter(|value| value.fract() == 0.0 && value.abs() < EXACT)?;
    #[expect(clippy::cast_possible_truncation, reason = "a whole number below 2^53")]
    Some(value as i64)
}

impl<T, const MIN: i64, const MAX: i64> Form for Whole<T, MIN, MAX>
where
    T: TryFrom<i64> + Serialize,
{
    type Value = T;

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<T> {
        let Json::Number(number) = json else {
            reader.wrong_type(at, json, "a whole number");
            return None;
        };
        if number.as_f64().is_some_and(|value| value.fract() != 0.0) {
            reader.fault(at, "wrong_type", format!("must be a whole number, not {number}"));
            return None;
        }
        let value = whole(number).filter(|value| (MIN..=MAX).contains(value));
        let value = value.and_then(|value| T::try_from(value).ok());
        if value.is_none() {
            reader.fault(at, "out_of_range", format!("must lie between {MIN} and {MAX}, and is {number}"));
        }
        value
    }

    fn write<S: Serializer>(value: &T, serializer: S) -> Result<S::Ok, S::Error> {
        value.serialize(serializer)
    }

    fn schema(_: Way) -> RefOr<Schema> {
        ObjectBuilder::new()
            .schema_type(Type::Integer)
            .format(Some(SchemaFormat::KnownFormat(KnownFormat::Int64)))
            .minimum(Some(MIN))
            .maximum(Some(MAX))
            .into()
    }
}

/// Writes a number in the shortest form that reads back as the same: whole ones without `.0`.
pub(super) fn write_number<S: Serializer>(value: f64, serializer: S) -> Result<S::Ok, S::Error> {
    const EXACT: f64 = 9_007_199_254_740_992.0;
    if value.fract() == 0.0 && value.abs() < EXACT {
        #[expect(clippy::cast_possible_truncation, reason = "a whole number below 2^53")]
        return serializer.serialize_i64(value as i64);
    }
    serializer.serialize_f64(value)
}

/// A number between limits, in a unit: what requests and answers say of it.
pub(super) struct Measure {
    pub unit: &'static str,
    pub min: f64,
    pub max: f64,
    pub because: &'static str,
}

impl Measure {
    /// Reads a number in the unit, or a text with a unit.
    pub fn read(&self, json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<f64> {
        let value = match json {
            // A JSON number always has a float here: the tree holds none that overflow.
            Json::Number(number) => number.as_f64()?,
            Json::Text(text) if units::family_of(self.unit).is_some() => match units::read(text, self.unit) {
                Ok(value) => value,
                Err(fault) => {
                    let detail = format!("`{}` is no quantity: {fault}", shortened(text));
                    reader.fault_with(at, "bad_quantity", detail, Some(self.example()));
                    return None;
                }
            },
            other => {
                let wanted = if units::family_of(self.unit).is_some() {
                    format!("a number of {} or a string with a unit", self.unit_word())
                } else {
                    "a number".to_owned()
                };
                reader.wrong_type(at, other, &wanted);
                return None;
            }
        };
        if (self.min..=self.max).contains(&value) {
            return Some(value + 0.0);
        }
        let because = if self.because.is_empty() { String::new() } else { format!(" ({})", self.because) };
        let space = if self.unit.is_empty() { "" } else { " " };
        let Self { unit, min, max, .. } = self;
        let detail =
            format!("must lie between {min} and {max}{space}{unit}{because}, and is {value}{space}{unit}");
        reader.fault_with(at, "out_of_range", detail, Some(self.example()));
        None
    }

    fn unit_word(&self) -> &'static str {
        if self.unit.is_empty() { "one" } else { self.unit }
    }

    fn example(&self) -> String {
        let Some(family) = units::family_of(self.unit) else {
            return format!("give a number of {}", self.unit_word());
        };
        if self.unit.is_empty() {
            return "give a share of one, such as 0.5, or a percentage, such as \"50 %\"".to_owned();
        }
        let units = family.spellings();
        format!("give a number of {}, or a string with one of the units {units}", self.unit)
    }

    pub fn schema(&self, way: Way) -> RefOr<Schema> {
        let number = ObjectBuilder::new()
            .schema_type(Type::Number)
            .format(Some(SchemaFormat::KnownFormat(KnownFormat::Double)))
            .minimum(Some(self.min))
            .maximum(Some(self.max))
            .build();
        let family = units::family_of(self.unit).filter(|_| way == Way::Request);
        let Some(family) = family else { return number.into() };
        let text = ObjectBuilder::new()
            .schema_type(Type::String)
            .min_length(Some(1))
            .max_length(Some(units::LONGEST_TEXT))
            .pattern(Some(units::PATTERN))
            .description(Some(format!(
                "A number with its unit: {}. The limits of the number hold after conversion.",
                if self.unit.is_empty() { "`%`, or none".to_owned() } else { family.spellings() }
            )))
            .build();
        either([number.into(), text.into()])
    }
}

impl Measure {
    const fn of<K: Kind>() -> Self {
        Self { unit: K::UNIT, min: K::MIN, max: K::MAX, because: K::LIMITS_BECAUSE }
    }
}

impl<K: Kind> Form for Quantity<K> {
    type Value = Self;

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<Self> {
        Measure::of::<K>().read(json, at, reader).and_then(Self::new)
    }

    fn write<S: Serializer>(value: &Self, serializer: S) -> Result<S::Ok, S::Error> {
        write_number(value.get(), serializer)
    }

    fn schema(way: Way) -> RefOr<Schema> {
        Measure::of::<K>().schema(way)
    }
}

/// A quantity that the domain holds as a bare number.
pub struct Bare<K>(PhantomData<K>);

impl<K: Kind> Form for Bare<Quantity<K>> {
    type Value = f64;

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<f64> {
        <Quantity<K> as Form>::read(json, at, reader).map(Quantity::get)
    }

    fn write<S: Serializer>(value: &f64, serializer: S) -> Result<S::Ok, S::Error> {
        write_number(*value, serializer)
    }

    fn schema(way: Way) -> RefOr<Schema> {
        <Quantity<K> as Form>::schema(way)
    }
}

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

/// A word out of a closed list.
pub struct OneWord<W>(PhantomData<W>);

/// Reads a word out of those that a request may use.
pub(super) fn read_word<W: Word>(
    json: &Json,
    at: &Pointer,
    reader: &mut Reader<'_>,
    lawful: &[W],
) -> Option<W> {
    let Json::Text(text) = json else {
        reader.wrong_type(at, json, "a string");
        return None;
    };
    let value = W::of_word(text).filter(|value| lawful.contains(value));
    if value.is_none() {
        let words: Vec<&str> = lawful.iter().map(|value| value.word()).collect();
        let detail = format!("`{}` is none of {}", shortened(text), words.join(", "));
        reader.fault_with(at, "unknown_word", detail, nearest(words, text));
    }
    value
}

pub(super) fn word_schema<W: Word>(lawful: &[W]) -> RefOr<Schema> {
    ObjectBuilder::new()
        .schema_type(Type::String)
        .enum_values(Some(lawful.iter().map(|value| value.word())))
        .into()
}

impl<W: Word> Form for OneWord<W> {
    type Value = W;

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<W> {
        read_word(json, at, reader, W::EVERY)
    }

    fn write<S: Serializer>(value: &W, serializer: S) -> Result<S::Ok, S::Error> {
        serializer.serialize_str(value.word())
    }

    fn schema(_: Way) -> RefOr<Schema> {
        word_schema(W::EVERY)
    }
}

impl Form for Day {
    type Value = Self;

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<Self> {
        let Json::Text(text) = json else {
            reader.wrong_type(at, json, "a string");
            return None;
        };
        let day = Self::parse(text);
        if day.is_none() {
            let detail = format!(
                "`{}` is no day between 1900-01-01 and 2200-12-31, written YYYY-MM-DD",
                shortened(text)
            );
            reader.fault(at, "bad_day", detail);
        }
        day
    }

    fn write<S: Serializer>(value: &Self, serializer: S) -> Result<S::Ok, S::Error> {
        serializer.collect_str(value)
    }

    fn schema(_: Way) -> RefOr<Schema> {
        ObjectBuilder::new()
            .schema_type(Type::String)
            .format(Some(SchemaFormat::KnownFormat(KnownFormat::Date)))
            .pattern(Some(Self::PATTERN))
            .into()
    }
}

/// A text that reads as a quantity reads the same on both ways.
#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn whole_numbers_are_written_without_a_point() {
        for (value, written) in
            [(600.0, "600"), (0.1, "0.1"), (-3.0, "-3"), (0.1 + 0.2, "0.30000000000000004")]
        {
            let mut bytes = Vec::new();
            write_number(value, &mut serde_json::Serializer::new(&mut bytes)).unwrap();
            assert_eq!(String::from_utf8(bytes).unwrap(), written);
        }
    }

    #[test]
    fn quantity_faults_are_told_apart() {
        use crate::domain::quantity::{Fault, RoomLength};

        assert_eq!(RoomLength::parse("1e9 m"), Err(Fault::OutOfRange(1e9)));
        assert!(matches!(RoomLength::parse("wide"), Err(Fault::Unreadable(_))));
    }
}
