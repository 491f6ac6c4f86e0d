//! The form of an opening of a run.

use serde::Serializer;
use serde::ser::SerializeMap;
use utoipa::openapi::RefOr;
use utoipa::openapi::schema::Schema;

use crate::domain::check::OpeningOutline;
use crate::domain::opening::{OpeningKind, Space};
use crate::domain::quantity::{
    Angle, DischargeCoefficient, Fraction, LeakageArea, OpeningSide, PressureDifference, Sill, Span,
    Temperature,
};
use crate::domain::simulation::{GivesWay, Opening};
use crate::domain::{Key, Pointer};
use crate::wire::form::{Components, Form, Way};
use crate::wire::json::Json;
use crate::wire::list::Pair;
use crate::wire::object::{self, Maybe, default_of, doc_of, name_of, object, parts};
use crate::wire::opening::OpenShare;
use crate::wire::reader::Reader;
use crate::wire::room::zero;
use crate::wire::scalar::OneWord;

object! {
    /// When an opening gives way by itself: at the first of those that are given.
    GivesWay as "SimulationGivesWay" {
        /// The hot layer beside it reaches this temperature (glass falls).
        gas_temperature_c: Maybe<Temperature> = None,
        /// Fire gas of more than 300 °C has stood against it for so long (a door burns through).
        exposed_s: Maybe<Span> = None,
        /// Pressure across it, either way (a door, a pane, a light partition is pushed out).
        pressure_pa: Maybe<PressureDifference> = None,
        /// Share that then stands open.
        open_fraction: Fraction = Fraction::new(1.0).expect("one lies within the limits of a share"),
    }
}

parts! {
    /// An opening between two spaces. Of a hatch or roof vent `width_m` and `height_m` are the two
    /// sides, and the first of `connects` is the lower space.
    OpeningParts as "SimulationOpening" ignoring &[]; {
        /// Unique among the openings.
        key: Key,
        /// What sort.
        kind: OneWord<OpeningKind>,
        /// The two spaces: keys of rooms, or `outside` for one of them.
        connects: Pair<Space>,
        /// Width.
        width_m: OpeningSide,
        /// Height, or the second side of a hatch or roof vent.
        height_m: OpeningSide,
        /// Lower edge above the floor of the first of `connects`.
        sill_m: Sill = zero!(Sill),
        /// Share of the area that stands open at the start. Absent: 1 of a gap or vent, which nobody
        /// can shut, and 0 of all others.
        open_fraction: OpenShare = zero!(Fraction),
        /// What it leaks when shut, over its whole height.
        leakage_area_m2: LeakageArea = zero!(LeakageArea),
        /// Where the outer face looks, clockwise from north; null: sheltered from the wind.
        azimuth_deg: Maybe<Angle> = None,
        /// Discharge coefficient of the open part; null: 0.7.
        discharge_coefficient: Maybe<DischargeCoefficient> = None,
        /// When it gives way by itself; null: never.
        gives_way: Maybe<GivesWay> = None,
    }
}

impl OpeningParts {
    fn of(opening: &Opening) -> Self {
        let opening = opening.clone();
        Self {
            key: Some(opening.key),
            kind: Some(opening.kind),
            connects: Some(opening.connects),
            width_m: Some(opening.width_m),
            height_m: Some(opening.height_m),
            sill_m: Some(opening.sill_m),
            open_fraction: Some(opening.open_fraction),
            leakage_area_m2: Some(opening.leakage_area_m2),
            azimuth_deg: Some(opening.azimuth_deg),
            discharge_coefficient: Some(opening.discharge_coefficient),
            gives_way: Some(opening.gives_way),
        }
    }

    fn outline(&self, at: &Pointer) -> OpeningOutline {
        OpeningOutline {
            at: at.clone(),
            key: self.key.clone(),
            kind: self.kind,
            connects: self.connects.clone(),
            width_m: self.width_m,
            height_m: self.height_m,
            sill_m: self.sill_m,
        }
    }

    fn whole(self) -> Option<Opening> {
        Some(Opening {
            key: self.key?,
            kind: self.kind?,
            connects: self.connects?,
            width_m: self.width_m?,
            height_m: self.height_m?,
            sill_m: self.sill_m?,
            open_fraction: self.open_fraction?,
            leakage_area_m2: self.leakage_area_m2?,
            azimuth_deg: self.azimuth_deg?,
            discharge_coefficient: self.discharge_coefficient?,
            gives_way: self.gives_way?,
        })
    }
}

impl Form for Opening {
    type Value = Self;

    const IDENTITY: Option<&'static str> = Some("key");

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<Self> {
        let mut parts = OpeningParts::read(json, at, reader)?;
        if matches!(json.member("open_fraction"), None | Some(Json::Null)) {
            parts.open_fraction = parts.kind.map(OpenShare::of_kind);
        }
        reader.outline.openings.push(parts.outline(at));
        if let Some(Some(GivesWay { gas_temperature_c: None, exposed_s: None, pressure_pa: None, .. })) =
            parts.gives_way
        {
            let mend = "give `gas_temperature_c`, `exposed_s` or `pressure_pa`, or leave `gives_way` out";
            let detail = "nothing says when the opening gives way";
            reader.fault_with(&at.member("gives_way"), "missing", detail, Some(mend));
            return None;
        }
        parts.whole()
    }

    fn write<S: Serializer>(value: &Self, serializer: S) -> Result<S::Ok, S::Error> {
        let mut map = serializer.serialize_map(None)?;
        OpeningParts::of(value).write(&mut map)?;
        map.end()
    }

    fn schema(way: Way) -> RefOr<Schema> {
        object::reference("SimulationOpening", way)
    }

    fn components(way: Way, into: &mut Components) {
        let schema = OpeningParts::object(way);
        let name = object::component_name("SimulationOpening", way);
        object::add_component(into, name, schema.into(), |into| {
            OpeningParts::components_of_members(way, into);
        });
    }
}
