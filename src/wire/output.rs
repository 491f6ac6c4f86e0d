//! What the service answers.

use std::borrow::Cow;

use serde::ser::SerializeMap;
use serde::{Serialize, Serializer};
use utoipa::openapi::RefOr;
use utoipa::openapi::schema::{KnownFormat, Object, Schema, SchemaFormat, Type};
use utoipa::{PartialSchema, ToSchema};

use super::building::{self, BuildingParts};
use super::form::{Components, Form, Way, Written};
use super::input::{add_components, component_of};
use super::stored::SCHEMA;
use crate::domain::time::Timestamp;
use crate::domain::{self, Assumptions, BuildingId};

/// Where more is found about a building.
#[derive(Debug, Clone, PartialEq, Eq, Serialize, ToSchema)]
#[schema(as = BuildingLinks)]
pub struct Links {
    /// The building itself.
    #[serde(rename = "self")]
    pub this: String,
    /// Its latest assessment; null: none yet.
    #[schema(required)]
    pub latest_assessment: Option<String>,
}

impl Links {
    /// The links of a building.
    pub fn of(id: BuildingId, assessed: bool) -> Self {
        let this = format!("/v1/buildings/{id}");
        let latest_assessment = assessed.then(|| format!("{this}/assessments/latest"));
        Self { this, latest_assessment }
    }
}

/// What the service sets beside what a bureau gave.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Meta {
    /// Id.
    pub id: BuildingId,
    /// Revision, from 1.
    pub revision: u64,
    /// When it was first saved.
    pub created_at: Timestamp,
    /// When this revision was saved.
    pub updated_at: Timestamp,
    /// Who saved it.
    pub updated_by: String,
    /// Links.
    pub links: Links,
}

/// A building as an answer gives it.
#[derive(Debug, Clone, PartialEq)]
pub struct Building {
    building: domain::Building,
    meta: Meta,
}

impl Building {
    /// The answer for a building.
    pub fn of(building: &domain::Building, meta: &Meta) -> Self {
        Self { building: building.clone(), meta: meta.clone() }
    }

    /// What a bureau gave.
    pub fn domain(&self) -> &domain::Building {
        &self.building
    }

    /// What the service set.
    pub fn meta(&self) -> &Meta {
        &self.meta
    }
}

impl Serialize for Building {
    fn serialize<S: Serializer>(&self, serializer: S) -> Result<S::Ok, S::Error> {
        let meta = &self.meta;
        let mut map = serializer.serialize_map(None)?;
        map.serialize_entry("id", &meta.id.to_string())?;
        map.serialize_entry("revision", &meta.revision)?;
        map.serialize_entry("schema", &SCHEMA)?;
        building::write_members(&self.building, &mut map)?;
        map.serialize_entry("created_at", &meta.created_at.to_string())?;
        map.serialize_entry("updated_at", &meta.updated_at.to_string())?;
        map.serialize_entry("updated_by", &meta.updated_by)?;
        map.serialize_entry("links", &meta.links)?;
        map.end()
    }
}

fn text(format: Option<SchemaFormat>, doc: &str) -> Object {
    let mut text = Object::with_type(Type::String);
    text.format = format;
    text.description = Some(doc.to_owned());
    text
}

fn count(doc: &str) -> Object {
    let mut count = Object::with_type(Type::Integer);
    count.minimum = Some(1_usize.into());
    count.description = Some(doc.to_owned());
    count
}

impl PartialSchema for Building {
    fn schema() -> RefOr<Schema> {
        let mut object = BuildingParts::object(Way::Answer);
        let uuid = || Some(SchemaFormat::Custom("uuid".to_owned()));
        let moment = || Some(SchemaFormat::KnownFormat(KnownFormat::DateTime));
        for (name, schema) in [
            ("id", text(uuid(), "Id, given by the service.").into()),
            ("revision", count("Raised by every change.").into()),
            ("schema", count("Number of the form in which the document is kept.").into()),
            ("created_at", text(moment(), "When it was first saved.").into()),
            ("updated_at", text(moment(), "When this revision was saved.").into()),
            ("updated_by", text(None, "Who saved this revision.").into()),
            ("links", utoipa::openapi::Ref::from_schema_name(Links::name()).into()),
        ] {
            object.required.push(name.to_owned());
            object.properties.insert(name.to_owned(), schema);
        }
        object.into()
    }
}

impl ToSchema for Building {
    fn name() -> Cow<'static, str> {
        Cow::Borrowed("Building")
    }

    fn schemas(into: &mut Components) {
        add_components(into, |into| BuildingParts::components_of_members(Way::Answer, into));
        into.push((Links::name().into_owned(), Links::schema()));
    }
}

/// Answers that are one form.
macro_rules! answer_of_form {
    ($($(#[doc = $doc:literal])* $answer:ident = $domain:ty, $name:literal;)*) => {$(
        $(#[doc = $doc])*
        #[derive(Debug, Clone, PartialEq)]
        pub struct $answer($domain);

        impl $answer {
            /// The answer for it.
            pub fn of(value: &$domain) -> Self {
                Self(value.clone())
            }

            /// What it says.
            pub fn domain(&self) -> &$domain {
                &self.0
            }
        }

        impl Serialize for $answer {
            fn serialize<S: Serializer>(&self, serializer: S) -> Result<S::Ok, S::Error> {
                Written::<$domain>(&self.0).serialize(serializer)
            }
        }

        impl PartialSchema for $answer {
            fn schema() -> RefOr<Schema> {
                component_of($name, |into| <$domain as Form>::components(Way::Answer, into))
            }
        }

        impl ToSchema for $answer {
            fn name() -> Cow<'static, str> {
                Cow::Borrowed($name)
            }

            fn schemas(into: &mut Components) {
                add_components(into, |into| <$domain as Form>::components(Way::Answer, into));
            }
        }
    )*};
}

answer_of_form! {
    /// A room as an answer gives it.
    Room = domain::Room, "Room";
    /// An opening as an answer gives it.
    Opening = domain::Opening, "Opening";
    /// Assumptions as a report echoes them.
    AssumptionsEcho = Assumptions, "Assumptions";
}

/// A position, WGS 84.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct LocationEcho(domain::building::Location);

impl From<domain::building::Location> for LocationEcho {
    fn from(location: domain::building::Location) -> Self {
        Self(location)
    }
}

impl Serialize for LocationEcho {
    fn serialize<S: Serializer>(&self, serializer: S) -> Result<S::Ok, S::Error> {
        Written::<domain::building::Location>(&self.0).serialize(serializer)
    }
}

impl PartialSchema for LocationEcho {
    fn schema() -> RefOr<Schema> {
        component_of("Location", |into| {
            <domain::building::Location as Form>::components(Way::Answer, into);
        })
    }
}

impl ToSchema for LocationEcho {
    fn name() -> Cow<'static, str> {
        Cow::Borrowed("Location")
    }
}

/// One page of a list.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct Page<T: ToSchema> {
    /// The entries.
    pub items: Vec<T>,
    /// Path of the next page; null: this is the last.
    #[schema(required)]
    pub next: Option<String>,
    /// The cursor in that path.
    #[schema(required)]
    pub next_cursor: Option<String>,
}
