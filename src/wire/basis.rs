//! The form of `basis`: how inputs are known, by the names of their members.

use std::marker::PhantomData;

use serde::Serializer;
use utoipa::openapi::RefOr;
use utoipa::openapi::schema::{AdditionalProperties, Object, Schema, Type};

use super::form::{Form, Way};
use super::json::Json;
use super::object::open;
use super::reader::Reader;
use super::scalar::{read_word, word_schema};
use crate::domain::opening::Opening;
use crate::domain::room::{Basis, BasisOf, Room};
use crate::domain::{Pointer, Word};

/// What a caller may say; `assumed` is what the service says of catalogue values.
const LAWFUL: &[Basis] = &[Basis::Measured, Basis::Estimated];

/// The members of which something is known.
pub trait Known {
    /// Their names.
    const MEMBERS: &'static [&'static str];
}

/// Members of a room.
pub struct OfRoom;
/// Members of an opening.
pub struct OfOpening;

impl Known for OfRoom {
    const MEMBERS: &'static [&'static str] = Room::BASIS_MEMBERS;
}

impl Known for OfOpening {
    const MEMBERS: &'static [&'static str] = Opening::BASIS_MEMBERS;
}

/// Names of members to how they are known.
pub struct BasisMap<K>(PhantomData<K>);

/// Nothing said.
pub fn nothing() -> BasisOf {
    BasisOf::new()
}

impl<K: Known> Form for BasisMap<K> {
    type Value = BasisOf;

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<BasisOf> {
        let members = open(json, at, reader, K::MEMBERS, &[])?;
        let mut whole = true;
        let mut basis = BasisOf::new();
        for (name, word) in members {
            // A null takes a word back, in a merge patch and here alike.
            if *word == Json::Null || !K::MEMBERS.contains(&name.as_str()) {
                continue;
            }
            match read_word(word, &at.member(name), reader, LAWFUL) {
                Some(word) => _ = basis.insert(name.clone(), word),
                None => whole = false,
            }
        }
        whole.then_some(basis)
    }

    fn write<S: Serializer>(value: &BasisOf, serializer: S) -> Result<S::Ok, S::Error> {
        serializer.collect_map(value.iter().map(|(name, basis)| (name, basis.word())))
    }

    fn schema(way: Way) -> RefOr<Schema> {
        let mut map = Object::with_type(Type::Object);
        let word = word_schema(LAWFUL);
        if way == Way::Request {
            for member in K::MEMBERS {
                map.properties.insert((*member).to_owned(), super::object::nullable(word.clone()));
            }
            map.additional_properties = Some(Box::new(AdditionalProperties::FreeForm(false)));
        } else {
            map.additional_properties = Some(Box::new(AdditionalProperties::RefOr(word)));
        }
        map.into()
    }
}
