//! Forms of lists.

use std::marker::PhantomData;

use serde::Serializer;
use serde::ser::SerializeSeq;
use utoipa::openapi::RefOr;
use utoipa::openapi::schema::{Array, Schema};

use super::form::{Components, Form, Way, Written};
use super::json::Json;
use super::reader::Reader;
use super::scalar::OneWord;
use crate::domain::check::NameOutline;
use crate::domain::{Pointer, Word};

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

/// Words out of a closed list, at least `MIN`, none twice.
pub struct Words<W, const MIN: usize>(PhantomData<W>);

impl<W: Word, const MIN: usize> Form for Words<W, MIN> {
    type Value = Vec<W>;

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<Vec<W>> {
        let Json::Array(elements) = json else {
            reader.wrong_type(at, json, "an array");
            return None;
        };
        if elements.len() < MIN {
            reader.fault(at, "too_short", format!("must name {MIN} of the list at least"));
            return None;
        }
        let mut whole = true;
        let mut values = Vec::new();
        for (index, element) in elements.iter().enumerate() {
            let place = at.element(index);
            match OneWord::<W>::read(element, &place, reader) {
                Some(value) if values.contains(&value) => {
                    let word = value.word();
                    reader.fault(&place, "duplicate", format!("`{word}` stands twice in this list"));
                    whole = false;
                }
                Some(value) => values.push(value),
                None => whole = false,
            }
            if reader.is_full() {
                break;
            }
        }
        whole.then_some(values)
    }

    fn write<S: Serializer>(value: &Vec<W>, serializer: S) -> Result<S::Ok, S::Error> {
        serializer.collect_seq(value.iter().map(|value| value.word()))
    }

    fn schema(way: Way) -> RefOr<Schema> {
        let mut list = Array::new(OneWord::<W>::schema(way));
        list.min_items = (MIN > 0).then_some(MIN);
        list.max_items = Some(W::EVERY.len());
        list.unique_items = true;
        list.into()
    }
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
