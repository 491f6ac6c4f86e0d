//! The form of an opening.

use serde::Serializer;
use serde::ser::SerializeMap;
use utoipa::openapi::RefOr;
use utoipa::openapi::schema::Schema;

use super::basis::{BasisMap, OfOpening};
use super::form::{Components, Form, Way};
use super::json::Json;
use super::list::Pair;
use super::object::{self, Maybe, default_of, doc_of, name_of, parts};
use super::reader::Reader;
use super::room::zero;
use super::scalar::OneWord;
use super::text::Text;
use crate::domain::check::OpeningOutline;
use crate::domain::opening::{Glazing, Opening, OpeningKind, Side, Space, Swing};
use crate::domain::quantity::{Angle, FireRating, Fraction, LeakageArea, OpeningSide, Sill};
use crate::domain::{Key, Pointer};

parts! {
    /// An opening between two spaces. Of a hatch or roof vent `width_m` and `height_m` are the two
    /// sides, and the first of `connects` is the lower space.
    OpeningParts as "Opening" ignoring &[]; {
        /// Unique among the building's openings.
        key: Key,
        /// Free text.
        name: Text<0, 200> = String::new(),
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
        /// Share of the area that stands open as found. Absent: 1 of a gap or vent, which nobody can
        /// shut, and 0 of all others.
        open_fraction: OpenShare = zero!(Fraction),
        /// A hold-open keeps it open until detection releases it.
        held_open: bool = false,
        /// Shuts itself.
        self_closing: bool = false,
        /// Fire resistance, where recorded.
        fire_rating_min: Maybe<FireRating> = None,
        /// Leakage when shut, where measured.
        leakage_area_m2: Maybe<LeakageArea> = None,
        /// Which way the leaf moves, seen from the first of `connects`.
        swing: Maybe<OneWord<Swing>> = None,
        /// A crew could enter or open it.
        entry: bool = false,
        /// Side of the building: A is the address side, then clockwise.
        side: Maybe<OneWord<Side>> = None,
        /// Where the outer face looks, clockwise from north.
        azimuth_deg: Maybe<Angle> = None,
        /// Pane.
        glazing: Maybe<OneWord<Glazing>> = None,
        /// How inputs are known, by the name of the member; one that is not named is estimated.
        basis: BasisMap<OfOpening> = super::basis::nothing(),
    }
}

/// The share that stands open: a fraction, whose default hangs on the kind.
pub(super) struct OpenShare;

impl OpenShare {
    pub(super) fn of_kind(kind: OpeningKind) -> Fraction {
        match kind {
            OpeningKind::Gap | OpeningKind::Vent => {
                Fraction::new(1.0).expect("one lies within the limits of a share")
            }
            _ => zero!(Fraction),
        }
    }
}

impl Form for OpenShare {
    type Value = Fraction;

    const DEFAULT_STATED: bool = false;

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<Fraction> {
        <Fraction as Form>::read(json, at, reader)
    }

    fn write<S: Serializer>(value: &Fraction, serializer: S) -> Result<S::Ok, S::Error> {
        <Fraction as Form>::write(value, serializer)
    }

    fn schema(way: Way) -> RefOr<Schema> {
        <Fraction as Form>::schema(way)
    }
}

impl OpeningParts {
    fn of(opening: &Opening) -> Self {
        let opening = opening.clone();
        Self {
            key: Some(opening.key),
            name: Some(opening.name),
            kind: Some(opening.kind),
            connects: Some(opening.connects),
            width_m: Some(opening.width_m),
            height_m: Some(opening.height_m),
            sill_m: Some(opening.sill_m),
            open_fraction: Some(opening.open_fraction),
            held_open: Some(opening.held_open),
            self_closing: Some(opening.self_closing),
            fire_rating_min: Some(opening.fire_rating_min),
            leakage_area_m2: Some(opening.leakage_area_m2),
            swing: Some(opening.swing),
            entry: Some(opening.entry),
            side: Some(opening.side),
            azimuth_deg: Some(opening.azimuth_deg),
            glazing: Some(opening.glazing),
            basis: Some(opening.basis),
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
            name: self.name?,
            kind: self.kind?,
            connects: self.connects?,
            width_m: self.width_m?,
            height_m: self.height_m?,
            sill_m: self.sill_m?,
            open_fraction: self.open_fraction?,
            held_open: self.held_open?,
            self_closing: self.self_closing?,
            fire_rating_min: self.fire_rating_min?,
            leakage_area_m2: self.leakage_area_m2?,
            swing: self.swing?,
            entry: self.entry?,
            side: self.side?,
            azimuth_deg: self.azimuth_deg?,
            glazing: self.glazing?,
            basis: self.basis?,
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
        parts.whole()
    }

    fn write<S: Serializer>(value: &Self, serializer: S) -> Result<S::Ok, S::Error> {
        let mut map = serializer.serialize_map(None)?;
        OpeningParts::of(value).write(&mut map)?;
        map.end()
    }

    fn schema(way: Way) -> RefOr<Schema> {
        object::reference("Opening", way)
    }

    fn components(way: Way, into: &mut Components) {
        let schema = OpeningParts::object(way);
        let name = object::component_name("Opening", way);
        object::add_component(into, name, schema.into(), |into| {
            OpeningParts::components_of_members(way, into);
        });
    }
}
