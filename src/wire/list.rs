//! Forms of lists.

use std::marker::PhantomData;

use serde::Serializer;
use serde::ser::SerializeSeq;
use utoipa::openapi::RefOr;
use utoipa::openapi::schema::{Array, Schema};

use super::form::{Components, Form, Way, Written};
use super::json::Json;
use super::reader::Reader;
use crate::domain::Pointer;
use crate::domain::check::NameOutline;

/// A list of at most `MAX` elements.
pub struct List<F, const MAX: usize>(PhantomData<F>);

impl<F: Form, const MAX: usize> Form for List<F, MAX> {
    type Value = Vec<F::Value>;

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<Self::Value> {
        let Json::Array(elements) = json else {
            reader.wrong_type(at, json, "an array");
            return None;
        };
        let mut whole = true;
        if elements.len() > MAX {
            let detail = format!("has {} entries; at most {MAX} are kept", elements.len());
            reader.fault(at, "too_many", detail);
            whole = false;
        }
        let mut values = Vec::with_capacity(elements.len().min(MAX));
        for (index, element) in elements.iter().take(MAX).enumerate() {
            let place = at.element(index);
            note_name::<F>(element, at, &place, reader);
            match F::read(element, &place, reader) {
                Some(value) => values.push(value),
                None => whole = false,
            }
        }
        whole.then_some(values)
    }

    fn write<S: Serializer>(value: &Self::Value, serializer: S) -> Result<S::Ok, S::Error> {
        let mut list = serializer.serialize_seq(Some(value.len()))?;
        for element in value {
            list.serialize_element(&Written::<F>(element))?;
        }
        list.end()
    }

    fn schema(way: Way) -> RefOr<Schema> {
        let mut list = Array::new(F::schema(way));
        list.max_items = Some(MAX);
        list.into()
    }

    fn components(way: Way, into: &mut Components) {
        F::components(way, into);
    }
}

/// Remembers the name by which an element must differ from the others, however faulty the
/// element is otherwise.
fn note_name<F: Form>(element: &Json, list: &Pointer, place: &Pointer, reader: &mut Reader<'_>) {
    let Some(member) = F::IDENTITY else { return };
    let name = match element.member(member) {
        Some(Json::Text(text)) => text.clone(),
        Some(Json::Number(number)) => number.to_string(),
        _ => return,
    };
    reader.outline.names.push(NameOutline { list: list.clone(), name, at: place.member(member) });
}

/// A pair of equals: the two spaces of an opening.
pub struct Pair<F>(PhantomData<F>);

impl<F: Form> Form for Pair<F> {
    type Value = [F::Value; 2];

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<Self::Value> {
        let Json::Array(elements) = json else {
            reader.wrong_type(at, json, "an array of two");
            return None;
        };
        let [first, second] = elements.as_slice() else {
            let detail = format!("must have two entries, and has {}", elements.len());
            reader.fault(at, "wrong_length", detail);
            return None;
        };
        let first = F::read(first, &at.element(0), reader);
        let second = F::read(second, &at.element(1), reader);
        Some([first?, second?])
    }

    fn write<S: Serializer>(value: &Self::Value, serializer: S) -> Result<S::Ok, S::Error> {
        let mut list = serializer.serialize_seq(Some(2))?;
        for element in value {
            list.serialize_element(&Written::<F>(element))?;
        }
        list.end()
    }

    fn schema(way: Way) -> RefOr<Schema> {
        let mut list = Array::new(F::schema(way));
        list.min_items = Some(2);
        list.max_items = Some(2);
        list.into()
    }

    fn components(way: Way, into: &mut Components) {
        F::components(way, into);
    }
}
