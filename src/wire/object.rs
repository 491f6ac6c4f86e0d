//! Forms of objects: one definition gives the reading, the writing and both schemas.
//!
//! A member with a default may be absent or null in a request; one without is required. In
//! answers every member is present.

use serde::Serializer;
use serde::ser::SerializeMap;
use utoipa::openapi::schema::{AdditionalProperties, Object, OneOf, Schema, SchemaType, Type};
use utoipa::openapi::{Ref, RefOr};

use super::form::{Components, Form, Way, Written};
use super::json::Json;
use super::reader::{Reader, nearest, shortened};
use crate::domain::Pointer;

/// The members of an object, after a look for unknown ones.
pub(super) fn open<'j>(
    json: &'j Json,
    at: &Pointer,
    reader: &mut Reader<'_>,
    known: &[&str],
    ignored: &[&str],
) -> Option<&'j [(String, Json)]> {
    let Json::Object(members) = json else {
        reader.wrong_type(at, json, "an object");
        return None;
    };
    for (name, _) in members {
        if known.contains(&name.as_str()) || ignored.contains(&name.as_str()) {
            continue;
        }
        if reader.is_full() {
            break;
        }
        let detail = format!("there is no member `{}` here", shortened(name));
        let near = nearest(known.iter().copied(), name);
        reader.fault_with(&at.member(name), "unknown_member", detail, near);
    }
    Some(members)
}

/// Reads one member. `None` means a fault; an absent or null member takes its default.
pub(super) fn member<F: Form>(
    members: &[(String, Json)],
    name: &str,
    at: &Pointer,
    reader: &mut Reader<'_>,
    default: Option<fn() -> F::Value>,
) -> Option<F::Value> {
    let given = members.iter().find(|(known, _)| known == name).map(|(_, json)| json);
    match (given, default) {
        (None | Some(Json::Null), Some(default)) => Some(default()),
        (None, None) => {
            reader.fault(&at.member(name), "missing", format!("the member `{name}` is required"));
            None
        }
        (Some(json), _) => F::read(json, &at.member(name), reader),
    }
}

/// Adds a member to the schema of an object.
pub(super) fn property<F: Form>(
    mut object: Object,
    way: Way,
    name: &str,
    doc: &str,
    default: Option<fn() -> F::Value>,
) -> Object {
    let schema = F::schema_of(name, way);
    let schema = match (way, default) {
        (Way::Request, Some(default)) => {
            let written = serde_json::to_value(Written::<F>(&default())).unwrap_or_default();
            let schema = nullable(schema);
            if F::DEFAULT_STATED { with_default(schema, written) } else { schema }
        }
        _ => {
            object.required.push(name.to_owned());
            schema
        }
    };
    object.properties.insert(name.to_owned(), described(schema, doc.trim()));
    object
}

/// An object that knows only the members it will be given.
pub(super) fn empty(way: Way, doc: &str) -> Object {
    let mut object = Object::with_type(Type::Object);
    object.description = Some(doc.trim().to_owned());
    if way == Way::Request {
        object.additional_properties = Some(Box::new(AdditionalProperties::FreeForm(false)));
    }
    object
}

/// Adds members that the service sets: a request may carry them, and nothing looks at them.
pub(super) fn ignored_properties(mut object: Object, names: &[&str]) -> Object {
    for name in names {
        let mut anything = Object::with_type(SchemaType::AnyValue);
        anything.description = Some("Set by the service; accepted and ignored in requests.".to_owned());
        object.properties.insert((*name).to_owned(), anything.into());
    }
    object
}

fn described(schema: RefOr<Schema>, doc: &str) -> RefOr<Schema> {
    let doc = doc.to_owned();
    match schema {
        RefOr::Ref(mut reference) => {
            reference.description = doc;
            reference.into()
        }
        RefOr::T(Schema::Object(mut object)) => {
            object.description = Some(doc);
            object.into()
        }
        RefOr::T(Schema::OneOf(mut choice)) => {
            choice.description = Some(doc);
            RefOr::T(Schema::OneOf(choice))
        }
        RefOr::T(Schema::Array(mut array)) => {
            array.description = Some(doc);
            array.into()
        }
        other => other,
    }
}

/// States the value that an absent member takes, where it is a single value.
fn with_default(schema: RefOr<Schema>, default: serde_json::Value) -> RefOr<Schema> {
    let plain =
        default.is_boolean() || default.is_number() || default.as_str().is_some_and(|t| !t.is_empty());
    match schema {
        RefOr::T(Schema::Object(mut object)) if plain => {
            object.default = Some(default);
            object.into()
        }
        RefOr::T(Schema::OneOf(mut choice)) if plain => {
            choice.default = Some(default);
            RefOr::T(Schema::OneOf(choice))
        }
        other => other,
    }
}

/// One schema or the other.
pub(super) fn either(schemas: [RefOr<Schema>; 2]) -> RefOr<Schema> {
    let mut choice = OneOf::new();
    choice.items = schemas.into();
    RefOr::T(Schema::OneOf(choice))
}

/// The schema, or null.
pub(super) fn nullable(schema: RefOr<Schema>) -> RefOr<Schema> {
    let null = || Object::with_type(Type::Null);
    match schema {
        RefOr::T(Schema::Object(mut object)) => {
            object.schema_type = or_null(object.schema_type);
            if let Some(words) = &mut object.enum_values
                && !words.contains(&serde_json::Value::Null)
            {
                words.push(serde_json::Value::Null);
            }
            object.into()
        }
        RefOr::T(Schema::Array(mut array)) => {
            array.schema_type = or_null(array.schema_type);
            array.into()
        }
        RefOr::T(Schema::OneOf(mut choice)) => {
            let is_null = |item: &RefOr<Schema>| matches!(item, RefOr::T(Schema::Object(object)) if object.schema_type == Type::Null.into());
            if !choice.items.iter().any(is_null) {
                choice.items.push(null().into());
            }
            RefOr::T(Schema::OneOf(choice))
        }
        other => either([other, null().into()]),
    }
}

fn or_null(schema_type: SchemaType) -> SchemaType {
    match schema_type {
        SchemaType::Type(Type::Null) => Type::Null.into(),
        SchemaType::Type(one) => SchemaType::Array(vec![one, Type::Null]),
        SchemaType::Array(mut several) => {
            if !several.contains(&Type::Null) {
                several.push(Type::Null);
            }
            SchemaType::Array(several)
        }
        SchemaType::AnyValue => SchemaType::AnyValue,
    }
}

/// Name of the component that holds an object's schema.
pub(super) fn component_name(name: &str, way: Way) -> String {
    match way {
        Way::Request => format!("{name}Input"),
        Way::Answer => name.to_owned(),
    }
}

pub(super) fn reference(name: &str, way: Way) -> RefOr<Schema> {
    Ref::from_schema_name(component_name(name, way)).into()
}

/// Adds a component and, the first time, those that it refers to.
pub(super) fn add_component(
    into: &mut Components,
    name: String,
    schema: Schema,
    inner: impl FnOnce(&mut Components),
) {
    if !into.iter().any(|(known, _)| *known == name) {
        into.push((name, schema.into()));
        inner(into);
    }
}

/// Writes one member.
pub(super) fn entry<F: Form, M: SerializeMap>(
    map: &mut M,
    name: &str,
    value: &F::Value,
) -> Result<(), M::Error> {
    map.serialize_entry(name, &Written::<F>(value))
}

/// An optional form: null stands for unknown.
pub struct Maybe<F>(std::marker::PhantomData<F>);

impl<F: Form> Form for Maybe<F> {
    type Value = Option<F::Value>;

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<Self::Value> {
        match json {
            Json::Null => Some(None),
            other => F::read(other, at, reader).map(Some),
        }
    }

    fn write<S: Serializer>(value: &Self::Value, serializer: S) -> Result<S::Ok, S::Error> {
        match value {
            Some(value) => F::write(value, serializer),
            None => serializer.serialize_none(),
        }
    }

    fn schema(way: Way) -> RefOr<Schema> {
        nullable(F::schema(way))
    }

    fn schema_of(member: &str, way: Way) -> RefOr<Schema> {
        nullable(F::schema_of(member, way))
    }

    fn components(way: Way, into: &mut Components) {
        F::components(way, into);
    }
}

/// The document's text of a doc comment.
macro_rules! doc_of {
    ($($doc:literal)*) => { concat!($($doc),*) };
}

/// The default of a member, if it has one.
macro_rules! default_of {
    ($codec:ty) => {
        None
    };
    ($codec:ty, $default:expr) => {
        Some((|| $default) as fn() -> <$codec as $crate::wire::form::Form>::Value)
    };
}

/// The name of a member on the wire.
macro_rules! name_of {
    ($member:ident) => {
        stringify!($member)
    };
    ($member:ident, $name:literal) => {
        $name
    };
}

/// The form of a structure of the domain whose members are those of the object.
macro_rules! object {
    ($(
        $(#[doc = $doc:literal])*
        $domain:ident as $name:literal $(by $identity:literal)? {
            $($(#[doc = $member_doc:literal])* $member:ident $(as $wire:literal)?: $codec:ty $(= $default:expr)?,)*
        }
    )*) => {$(
        impl $crate::wire::form::Form for $domain {
            type Value = Self;

            $(const IDENTITY: Option<&'static str> = Some($identity);)?

            fn read(
                json: &$crate::wire::json::Json,
                at: &$crate::domain::Pointer,
                reader: &mut $crate::wire::reader::Reader<'_>,
            ) -> Option<Self> {
                let known = &[$(name_of!($member $(, $wire)?)),*];
                let members = $crate::wire::object::open(json, at, reader, known, &[])?;
                $(
                    let $member = $crate::wire::object::member::<$codec>(
                        members, name_of!($member $(, $wire)?), at, reader, default_of!($codec $(, $default)?),
                    );
                )*
                Some(Self { $($member: $member?),* })
            }

            fn write<S: serde::Serializer>(value: &Self, serializer: S) -> Result<S::Ok, S::Error> {
                use serde::ser::SerializeMap;
                let mut map = serializer.serialize_map(None)?;
                $($crate::wire::object::entry::<$codec, _>(
                    &mut map, name_of!($member $(, $wire)?), &value.$member,
                )?;)*
                map.end()
            }

            fn schema(way: $crate::wire::form::Way) -> utoipa::openapi::RefOr<utoipa::openapi::schema::Schema> {
                $crate::wire::object::reference($name, way)
            }

            fn components(way: $crate::wire::form::Way, into: &mut $crate::wire::form::Components) {
                let object = $crate::wire::object::empty(way, doc_of!($($doc)*));
                $(
                    let object = $crate::wire::object::property::<$codec>(
                        object, way, name_of!($member $(, $wire)?), doc_of!($($member_doc)*),
                        default_of!($codec $(, $default)?),
                    );
                )*
                let name = $crate::wire::object::component_name($name, way);
                $crate::wire::object::add_component(into, name, object.into(), |into| {
                    $(<$codec as $crate::wire::form::Form>::components(way, into);)*
                });
            }
        }
    )*};
}

/// An object whose members must be read one by one and then put together: `None` in a member
/// means that a fault has been recorded for it.
macro_rules! parts {
    (
        $(#[doc = $doc:literal])*
        $parts:ident as $name:literal ignoring $ignored:expr; {
            $($(#[doc = $member_doc:literal])* $member:ident $(as $wire:literal)?: $codec:ty $(= $default:expr)?,)*
        }
    ) => {
        $(#[doc = $doc])*
        pub(super) struct $parts {
            $($(#[doc = $member_doc])* pub $member: Option<<$codec as $crate::wire::form::Form>::Value>,)*
        }

        impl $parts {
            pub(super) fn read(
                json: &$crate::wire::json::Json,
                at: &$crate::domain::Pointer,
                reader: &mut $crate::wire::reader::Reader<'_>,
            ) -> Option<Self> {
                let known = &[$(name_of!($member $(, $wire)?)),*];
                let members = $crate::wire::object::open(json, at, reader, known, $ignored)?;
                Some(Self {
                    $($member: $crate::wire::object::member::<$codec>(
                        members, name_of!($member $(, $wire)?), at, reader, default_of!($codec $(, $default)?),
                    ),)*
                })
            }

            /// Writes the members; one that is `None` is left out.
            pub(super) fn write<M: serde::ser::SerializeMap>(&self, map: &mut M) -> Result<(), M::Error> {
                $(if let Some(value) = &self.$member {
                    $crate::wire::object::entry::<$codec, _>(map, name_of!($member $(, $wire)?), value)?;
                })*
                Ok(())
            }

            pub(super) fn object(way: $crate::wire::form::Way) -> utoipa::openapi::schema::Object {
                let object = $crate::wire::object::empty(way, doc_of!($($doc)*));
                $(
                    let object = $crate::wire::object::property::<$codec>(
                        object, way, name_of!($member $(, $wire)?), doc_of!($($member_doc)*),
                        default_of!($codec $(, $default)?),
                    );
                )*
                object
            }

            pub(super) fn components_of_members(
                way: $crate::wire::form::Way,
                into: &mut $crate::wire::form::Components,
            ) {
                $(<$codec as $crate::wire::form::Form>::components(way, into);)*
            }
        }
    };
}

pub(super) use {default_of, doc_of, name_of, object, parts};
