//! Forms of keys that name what stands elsewhere in the run; whether it does is judged at the end.

use serde::Serializer;
use utoipa::openapi::RefOr;
use utoipa::openapi::schema::Schema;

use crate::domain::opening::Space;
use crate::domain::simulation::check::{Mention, Mentioned};
use crate::domain::{Key, Pointer};
use crate::wire::form::{Form, Way};
use crate::wire::json::Json;
use crate::wire::reader::Reader;

fn note(reader: &mut Reader<'_>, of: Mentioned, at: &Pointer, key: &Key) {
    reader.cross.mentions.push(Mention { at: at.clone(), of, key: key.clone() });
}

/// The key of a room.
pub struct RoomName;
/// The key of an opening.
pub struct OpeningName;
/// The key of a room, or `outside`.
pub struct SpaceName;

impl Form for RoomName {
    type Value = Key;

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<Key> {
        let key = Key::read(json, at, reader)?;
        note(reader, Mentioned::Room, at, &key);
        Some(key)
    }

    fn write<S: Serializer>(value: &Key, serializer: S) -> Result<S::Ok, S::Error> {
        <Key as Form>::write(value, serializer)
    }

    fn schema(way: Way) -> RefOr<Schema> {
        <Key as Form>::schema(way)
    }
}

impl Form for OpeningName {
    type Value = Key;

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<Key> {
        let key = Key::read(json, at, reader)?;
        note(reader, Mentioned::Opening, at, &key);
        Some(key)
    }

    fn write<S: Serializer>(value: &Key, serializer: S) -> Result<S::Ok, S::Error> {
        <Key as Form>::write(value, serializer)
    }

    fn schema(way: Way) -> RefOr<Schema> {
        <Key as Form>::schema(way)
    }
}

impl Form for SpaceName {
    type Value = Space;

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<Space> {
        let space = Space::read(json, at, reader)?;
        if let Space::Room(key) = &space {
            note(reader, Mentioned::Room, at, key);
        }
        Some(space)
    }

    fn write<S: Serializer>(value: &Space, serializer: S) -> Result<S::Ok, S::Error> {
        <Space as Form>::write(value, serializer)
    }

    fn schema(way: Way) -> RefOr<Schema> {
        <Space as Form>::schema(way)
    }
}
