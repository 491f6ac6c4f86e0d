//! Documents as the store keeps them: WIRE's form without what the service sets, under a schema
//! number. An old one is raised by pure functions when it is read.

use serde::ser::SerializeMap;
use serde::{Serialize, Serializer};

use super::building;
use super::json::{self, Json};
use super::reader::Reader;
use crate::catalogue::Catalogue;
use crate::domain::{Building, Invalid, Pointer};

/// Number of the form that is written now.
pub const SCHEMA: u32 = 1;

/// Why a kept document cannot be read: it was harmed, or a newer program wrote it.
#[derive(Debug, thiserror::Error)]
pub enum StoredError {
    /// A newer form.
    #[error("the document has schema {0}, this program knows up to {SCHEMA}")]
    Newer(u32),
    /// Not a building.
    #[error("the document cannot be read: {}", described(.0))]
    Unreadable(Vec<Invalid>),
}

fn described(faults: &[Invalid]) -> String {
    let one = |fault: &Invalid| format!("{}: {}", fault.pointer, fault.detail);
    faults.iter().take(3).map(one).collect::<Vec<_>>().join("; ")
}

struct Document<'b>(&'b Building);

impl Serialize for Document<'_> {
    fn serialize<S: Serializer>(&self, serializer: S) -> Result<S::Ok, S::Error> {
        let mut map = serializer.serialize_map(None)?;
        building::write_members(self.0, &mut map)?;
        map.end()
    }
}

/// The document of a building, in the form of [`SCHEMA`].
pub fn to_text(building: &Building) -> String {
    serde_json::to_string(&Document(building))
        .expect("every key is a string and every number finite, so there is nothing to fail on")
}

/// The building of a document that was kept in the form of `schema`.
pub fn from_text(text: &str, schema: u32, catalogue: &Catalogue) -> Result<Building, StoredError> {
    if schema > SCHEMA {
        return Err(StoredError::Newer(schema));
    }
    let json = json::parse(text.as_bytes()).map_err(|fault| StoredError::Unreadable(vec![fault]))?;
    let json = raised(json, schema);
    let mut reader = Reader::stored(catalogue);
    let building = building::read(&json, &Pointer::root(), &mut reader);
    building.ok_or_else(|| StoredError::Unreadable(reader.into_faults()))
}

/// Raises a document to the form of [`SCHEMA`], one number at a time. There is only one yet.
fn raised(json: Json, _schema: u32) -> Json {
    json
}
