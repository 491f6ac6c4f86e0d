//! Keeps account of every value that nobody recorded.

use std::borrow::Cow;

use super::findings::{Assumed, AssumedValue, Provenance};
use crate::catalogue::{self, Row};
use crate::domain::{Key, Named};

/// Source of the values that are this project's own.
pub(super) const OWN: &str = "this project's own estimate";

/// What was assumed about one room, or about the building where `room` is none.
#[derive(Debug, Clone, Default)]
pub(super) struct Account {
    room: Option<Key>,
    entries: Vec<Assumed>,
}

impl Account {
    /// Opens the account of a room.
    pub fn of_room(room: &Key) -> Self {
        Self { room: Some(room.clone()), entries: Vec::with_capacity(32) }
    }

    /// Enters a value.
    pub fn enter(
        &mut self,
        field: impl Into<Cow<'static, str>>,
        value: AssumedValue,
        source: impl Into<Cow<'static, str>>,
        provenance: Provenance,
    ) {
        self.entries.push(Assumed {
            room: self.room.clone(),
            field: field.into(),
            value,
            source: source.into(),
            provenance,
        });
    }

    /// Enters a number of this project's own.
    pub fn own(&mut self, field: impl Into<Cow<'static, str>>, value: f64, source: &'static str) {
        self.enter(field, AssumedValue::Number(value), source, Provenance::Estimated);
    }

    /// Enters a number that a row of the catalogue gave.
    pub fn row<T>(
        &mut self,
        field: impl Into<Cow<'static, str>>,
        value: f64,
        found: &Found<'_, T>,
        member: &str,
    ) {
        if let Some(row) = found.row {
            let provenance =
                if row.is_estimated(member) { Provenance::Estimated } else { provenance_of(row.provenance) };
            let source = format!("catalogue {}: {}", row.key, row.source);
            self.enter(field, AssumedValue::Number(value), source, provenance);
        }
    }

    /// All entries.
    pub fn into_entries(self) -> Vec<Assumed> {
        self.entries
    }
}

/// Properties, and the row they come from where the building does not give them itself.
#[derive(Debug)]
pub(super) struct Found<'c, T> {
    pub properties: &'c T,
    pub row: Option<&'c Row<T>>,
}

impl<T> Clone for Found<'_, T> {
    fn clone(&self) -> Self {
        *self
    }
}

impl<T> Copy for Found<'_, T> {}

impl<T> Found<'_, T> {
    /// Whether the properties rest on a recalled value.
    pub fn recalled(&self) -> bool {
        self.row.is_some_and(|row| row.provenance == catalogue::Provenance::Memory)
    }

    /// Key of the row, or `given`.
    pub fn key(&self) -> &str {
        self.row.map_or("given", |row| row.key.as_str())
    }
}

/// The properties that a name stands for; none where the catalogue has no such row.
pub(super) fn find<'c, T>(
    named: &'c Named<T>,
    row_of: impl Fn(&str) -> Option<&'c Row<T>>,
) -> Option<Found<'c, T>> {
    match named {
        Named::Given(properties) => Some(Found { properties, row: None }),
        Named::Catalogue(key) => row_of(key).map(|row| Found { properties: &row.properties, row: Some(row) }),
    }
}

/// The report's word for the catalogue's.
pub(super) fn provenance_of(provenance: catalogue::Provenance) -> Provenance {
    match provenance {
        catalogue::Provenance::Seen => Provenance::Seen,
        catalogue::Provenance::Memory => Provenance::Memory,
    }
}
