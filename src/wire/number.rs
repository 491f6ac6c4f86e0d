//! Forms of numbers: whole ones, and quantities that come with or without a unit.

use std::marker::PhantomData;

use serde::{Serialize, Serializer};
use utoipa::openapi::schema::{KnownFormat, Schema, SchemaFormat, Type};
use utoipa::openapi::{ObjectBuilder, RefOr};

use super::form::{Form, Way};
use super::json::Json;
use super::object::either;
use super::reader::{Reader, shortened};
use crate::domain::quantity::Kind;
use crate::domain::{Pointer, Quantity, units};

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
