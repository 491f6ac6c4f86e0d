//! Forms of other single values: true or false, words out of closed lists, days.

use std::marker::PhantomData;

use serde::Serializer;
use utoipa::openapi::schema::{KnownFormat, Object, Schema, SchemaFormat, Type};
use utoipa::openapi::{ObjectBuilder, RefOr};

use super::form::{Form, Way};
use super::json::Json;
use super::reader::{Reader, nearest, shortened};
use crate::domain::time::Day;
use crate::domain::{Pointer, Word};

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
