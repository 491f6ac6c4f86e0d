//! What clients send: one entrance for each kind of body.

use std::borrow::Cow;

use utoipa::openapi::RefOr;
use utoipa::openapi::schema::{Object, Schema, Type};
use utoipa::{PartialSchema, ToSchema};

use super::building;
use super::form::{Components, Form, Way};
use super::json::{self, Json};
use super::object::{self, member};
use super::reader::Reader;
use super::simulation;
use crate::catalogue::Catalogue;
use crate::domain::opening::Opening;
use crate::domain::room::Room;
use crate::domain::{self, Assumptions, Invalid, Key, Pointer, Simulation};

/// Why a body is refused.
#[derive(Debug, Clone, PartialEq)]
pub enum Refused {
    /// It is no JSON as WIRE asks for; the first fault. Answered with 400.
    Unreadable(Invalid),
    /// Everything that is wrong in it. Answered with 422.
    Invalid(Vec<Invalid>),
}

/// A kind of body.
pub trait Input {
    /// What it becomes when nothing is wrong with it.
    type Checked;

    /// Reads it; faults are left in the reader.
    fn check(json: &Json, reader: &mut Reader<'_>) -> Option<Self::Checked>;
}

/// A part of a building, whose key stands in the path.
pub trait Part: Input {
    /// The key within the part.
    const KEY: &str = "key";
}

/// A building as a request gives it; it becomes a [`domain::Building`].
pub struct BuildingInput;
/// A room as a request gives it; it becomes a [`domain::Room`].
pub struct RoomInput;
/// An opening as a request gives it; it becomes a [`domain::Opening`].
pub struct OpeningInput;
/// The assumptions of an assessment; they become [`domain::Assumptions`].
pub struct AssumptionsInput;
/// A building and the assumptions under which to assess it, nothing kept.
pub struct AssessInput;
/// The assumptions under which to assess a building that is kept; the body may be empty.
pub struct AssessmentRequest;
/// A transient run, nothing kept; it becomes a [`domain::Simulation`].
pub struct SimulationInput;

/// What [`AssessInput`] becomes.
#[derive(Debug, Clone, PartialEq)]
pub struct Assess {
    /// The building.
    pub building: domain::Building,
    /// The assumptions.
    pub assumptions: Assumptions,
}

impl Input for BuildingInput {
    type Checked = domain::Building;

    fn check(json: &Json, reader: &mut Reader<'_>) -> Option<domain::Building> {
        building::read(json, &Pointer::root(), reader)
    }
}

impl Input for RoomInput {
    type Checked = Room;

    fn check(json: &Json, reader: &mut Reader<'_>) -> Option<Room> {
        let room = <Room as Form>::read(json, &Pointer::root(), reader);
        reader.judge_parts();
        room
    }
}

impl Part for RoomInput {}

impl Input for OpeningInput {
    type Checked = Opening;

    fn check(json: &Json, reader: &mut Reader<'_>) -> Option<Opening> {
        let opening = <Opening as Form>::read(json, &Pointer::root(), reader);
        reader.judge_parts();
        opening
    }
}

impl Part for OpeningInput {}

impl Input for AssumptionsInput {
    type Checked = Assumptions;

    fn check(json: &Json, reader: &mut Reader<'_>) -> Option<Assumptions> {
        <Assumptions as Form>::read(json, &Pointer::root(), reader)
    }
}

impl Input for AssessInput {
    type Checked = Assess;

    fn check(json: &Json, reader: &mut Reader<'_>) -> Option<Assess> {
        let root = Pointer::root();
        let members = object::open(json, &root, reader, &["building", "assumptions"], &[])?;
        let building = match json.member("building") {
            Some(json) => building::read(json, &root.member("building"), reader),
            None => {
                reader.fault(&root.member("building"), "missing", "the member `building` is required");
                None
            }
        };
        let assumptions =
            member::<Assumptions>(members, "assumptions", &root, reader, Some(Assumptions::default));
        Some(Assess { building: building?, assumptions: assumptions? })
    }
}

impl Input for AssessmentRequest {
    type Checked = Assumptions;

    fn check(json: &Json, reader: &mut Reader<'_>) -> Option<Assumptions> {
        let root = Pointer::root();
        let members = object::open(json, &root, reader, &["assumptions"], &[])?;
        member::<Assumptions>(members, "assumptions", &root, reader, Some(Assumptions::default))
    }
}

impl Input for SimulationInput {
    type Checked = Simulation;

    fn check(json: &Json, reader: &mut Reader<'_>) -> Option<Simulation> {
        simulation::read(json, reader)
    }
}

/// Reads a body.
pub fn read<T: Input>(bytes: &[u8], catalogue: &Catalogue) -> Result<T::Checked, Refused> {
    let json = json::parse(bytes).map_err(Refused::Unreadable)?;
    check::<T>(&json, catalogue)
}

/// Reads what stands in a value already, such as the result of a merge patch.
pub fn read_value<T: Input>(value: &serde_json::Value, catalogue: &Catalogue) -> Result<T::Checked, Refused> {
    check::<T>(&value.into(), catalogue)
}

/// Reads a part that is put under `key`: a missing `key` takes it, another one is a fault.
pub fn read_part<T: Part>(bytes: &[u8], key: &Key, catalogue: &Catalogue) -> Result<T::Checked, Refused> {
    let json = json::parse(bytes).map_err(Refused::Unreadable)?;
    check_part::<T>(json, key, catalogue)
}

/// Like [`read_part`], of what stands in a value already.
pub fn read_part_value<T: Part>(
    value: &serde_json::Value,
    key: &Key,
    catalogue: &Catalogue,
) -> Result<T::Checked, Refused> {
    check_part::<T>(value.into(), key, catalogue)
}

/// Reads a body as a plain value, as strictly as any other: for merge patches.
pub fn read_json(bytes: &[u8]) -> Result<serde_json::Value, Refused> {
    json::parse(bytes).map(serde_json::Value::from).map_err(Refused::Unreadable)
}

fn check<T: Input>(json: &Json, catalogue: &Catalogue) -> Result<T::Checked, Refused> {
    judge(Reader::new(catalogue), |reader| T::check(json, reader))
}

fn check_part<T: Part>(mut json: Json, key: &Key, catalogue: &Catalogue) -> Result<T::Checked, Refused> {
    judge(Reader::new(catalogue), |reader| {
        let given = json.member(T::KEY).cloned();
        match given {
            None | Some(Json::Null) => json.set(T::KEY, Json::Text(key.to_string())),
            Some(Json::Text(text)) if text != key.as_str() && Key::new(&text).is_ok() => {
                let detail = format!("the path says `{key}`, the body `{text}`");
                let mend = "leave the member out, or put the part under its own key";
                reader.fault_with(&Pointer::root().member(T::KEY), "contradiction", detail, Some(mend));
            }
            Some(_) => {}
        }
        T::check(&json, reader)
    })
}

fn judge<'c, T>(
    mut reader: Reader<'c>,
    read: impl FnOnce(&mut Reader<'c>) -> Option<T>,
) -> Result<T, Refused> {
    let value = read(&mut reader);
    let faults = reader.into_faults();
    match value {
        Some(value) if faults.is_empty() => Ok(value),
        _ => Err(Refused::Invalid(faults)),
    }
}

/// The schema of a request that is one form.
macro_rules! request_of_form {
    ($($input:ident = $form:ty,)*) => {$(
        impl PartialSchema for $input {
            fn schema() -> RefOr<Schema> {
                component_of(stringify!($input), |into| <$form as Form>::components(Way::Request, into))
            }
        }

        impl ToSchema for $input {
            fn name() -> Cow<'static, str> {
                Cow::Borrowed(stringify!($input))
            }

            fn schemas(into: &mut Components) {
                add_components(into, |into| <$form as Form>::components(Way::Request, into));
            }
        }
    )*};
}

request_of_form! {
    RoomInput = Room,
    OpeningInput = Opening,
    AssumptionsInput = Assumptions,
    SimulationInput = Simulation,
}

/// Adds components that are made apart: one that stands in `into` already may stand there
/// without those that it refers to.
pub(super) fn add_components(into: &mut Components, make: impl FnOnce(&mut Components)) {
    let mut components = Components::new();
    make(&mut components);
    into.append(&mut components);
}

/// The component of this name among those that are made.
pub(super) fn component_of(name: &str, make: impl FnOnce(&mut Components)) -> RefOr<Schema> {
    let mut components = Components::new();
    make(&mut components);
    let found = components.into_iter().find(|(known, _)| known == name);
    found.map_or_else(|| Object::with_type(Type::Object).into(), |(_, schema)| schema)
}

impl PartialSchema for BuildingInput {
    fn schema() -> RefOr<Schema> {
        building::request_object().into()
    }
}

impl ToSchema for BuildingInput {
    fn name() -> Cow<'static, str> {
        Cow::Borrowed("BuildingInput")
    }

    fn schemas(into: &mut Components) {
        add_components(into, building::request_components);
    }
}

fn assumptions_property(object: Object) -> Object {
    object::property::<Assumptions>(
        object,
        Way::Request,
        "assumptions",
        "What to assume; absent or null: the service's defaults.",
        Some(Assumptions::default),
    )
}

impl PartialSchema for AssessInput {
    fn schema() -> RefOr<Schema> {
        let mut object = object::empty(Way::Request, "A building to assess, of which nothing is kept.");
        object.required.push("building".to_owned());
        object.properties.insert("building".to_owned(), object::reference("Building", Way::Request));
        assumptions_property(object).into()
    }
}

impl ToSchema for AssessInput {
    fn name() -> Cow<'static, str> {
        Cow::Borrowed("AssessInput")
    }

    fn schemas(into: &mut Components) {
        add_components(into, building::request_components);
        add_components(into, |into| <Assumptions as Form>::components(Way::Request, into));
    }
}

impl PartialSchema for AssessmentRequest {
    fn schema() -> RefOr<Schema> {
        assumptions_property(object::empty(Way::Request, "What an assessment is asked to assume.")).into()
    }
}

impl ToSchema for AssessmentRequest {
    fn name() -> Cow<'static, str> {
        Cow::Borrowed("AssessmentRequest")
    }

    fn schemas(into: &mut Components) {
        add_components(into, |into| <Assumptions as Form>::components(Way::Request, into));
    }
}
