//! Forms: how a value stands in JSON, in both directions, and how the document describes it.
//!
//! A form is a type that is never built; its `Value` is what the program holds. The object
//! forms come from one definition each, by the macros of [`super::object`].

use serde::{Serialize, Serializer};
use utoipa::openapi::RefOr;
use utoipa::openapi::schema::Schema;

use super::json::Json;
use super::reader::Reader;
use crate::domain::Pointer;

/// Which of the two documents is described.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Way {
    /// What a client sends.
    Request,
    /// What the service answers.
    Answer,
}

/// Named schemas of the OpenAPI document.
pub type Components = Vec<(String, RefOr<Schema>)>;

/// How a value stands in JSON.
pub trait Form {
    /// What the program holds.
    type Value;

    /// The member that tells the elements of a list apart, of forms that stand in lists.
    const IDENTITY: Option<&'static str> = None;

    /// Whether the document may print the value that an absent member takes: not if it hangs on
    /// other members.
    const DEFAULT_STATED: bool = true;

    /// Reads a value. `None` means that a fault has been recorded.
    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<Self::Value>;

    /// Writes a value.
    fn write<S: Serializer>(value: &Self::Value, serializer: S) -> Result<S::Ok, S::Error>;

    /// Its schema, or a reference to the component that has it.
    fn schema(way: Way) -> RefOr<Schema>;

    /// Its schema as a member of this name: some limits hang on the name.
    fn schema_of(_member: &str, way: Way) -> RefOr<Schema> {
        Self::schema(way)
    }

    /// The components that the schema refers to.
    fn components(_way: Way, _into: &mut Components) {}
}

/// A value that serialises by its form.
pub struct Written<'v, F: Form + ?Sized>(pub &'v F::Value);

impl<F: Form + ?Sized> Serialize for Written<'_, F> {
    fn serialize<S: Serializer>(&self, serializer: S) -> Result<S::Ok, S::Error> {
        F::write(self.0, serializer)
    }
}
