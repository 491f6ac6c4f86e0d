//! The form of a heat release: points in time, or growth, peak and energy.

use serde::{Serialize, Serializer};
use utoipa::openapi::schema::{Array, Schema, Type};
use utoipa::openapi::{ObjectBuilder, RefOr};

use crate::domain::quantity::{self, FireGrowth, FuelEnergy, Kind as _, Span};
use crate::domain::simulation::{Growth, HeatRelease};
use crate::domain::{Pointer, units};
use crate::wire::form::{Components, Form, Way, Written};
use crate::wire::json::Json;
use crate::wire::object::{default_of, doc_of, either, name_of, object};
use crate::wire::reader::Reader;

/// Most points of a curve.
const MAX_POINTS: usize = 10_000;

object! {
    /// A t² fire: growth, a peak that holds, decay when most of the fuel is burnt.
    Growth as "SimulationGrowth" {
        /// Growth coefficient.
        growth_kw_s2: FireGrowth,
        /// Highest heat release.
        peak_kw: quantity::HeatRelease,
        /// Heat in the fuel.
        energy_mj: FuelEnergy,
    }
}

/// Points or growth.
pub struct HeatReleaseForm;

impl Form for HeatReleaseForm {
    type Value = HeatRelease;

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<HeatRelease> {
        match json {
            Json::Object(_) => Growth::read(json, at, reader).map(HeatRelease::Grown),
            Json::Array(points) => points_of(points, at, reader).map(HeatRelease::Points),
            other => {
                let wanted = "an array of points [s, kW], or an object with growth, peak and energy";
                reader.wrong_type(at, other, wanted);
                None
            }
        }
    }

    fn write<S: Serializer>(value: &HeatRelease, serializer: S) -> Result<S::Ok, S::Error> {
        match value {
            HeatRelease::Points(points) => serializer.collect_seq(points),
            HeatRelease::Grown(growth) => Written::<Growth>(growth).serialize(serializer),
        }
    }

    fn schema(way: Way) -> RefOr<Schema> {
        // One schema for both entries: a number would fit the schemas of both, and so neither's choice.
        let number = ObjectBuilder::new()
            .schema_type(Type::Number)
            .minimum(Some(0))
            .maximum(Some(quantity::HeatReleaseKind::MAX));
        let text = ObjectBuilder::new()
            .schema_type(Type::String)
            .min_length(Some(1))
            .max_length(Some(units::LONGEST_TEXT))
            .pattern(Some(units::PATTERN));
        let mut point = Array::new(either([number.into(), text.into()]));
        point.min_items = Some(2);
        point.max_items = Some(2);
        point.description = Some("Time since it was lit, s, and heat release, kW.".to_owned());
        let mut points = Array::new(RefOr::from(point));
        points.min_items = Some(1);
        points.max_items = Some(MAX_POINTS);
        either([points.into(), Growth::schema(way)])
    }

    fn components(way: Way, into: &mut Components) {
        Growth::components(way, into);
    }
}

fn points_of(points: &[Json], at: &Pointer, reader: &mut Reader<'_>) -> Option<Vec<(f64, f64)>> {
    if points.is_empty() || points.len() > MAX_POINTS {
        let code = if points.is_empty() { "too_short" } else { "too_many" };
        let detail = format!("has {} points; 1 to {MAX_POINTS} are lawful", points.len());
        reader.fault(at, code, detail);
        return None;
    }
    let mut whole = true;
    let mut read: Vec<(f64, f64)> = Vec::with_capacity(points.len());
    for (index, point) in points.iter().enumerate() {
        if reader.is_full() {
            return None;
        }
        let place = at.element(index);
        let Some((time_s, heat_kw)) = point_of(point, &place, reader) else {
            whole = false;
            continue;
        };
        if let Some(&(before_s, _)) = read.last()
            && time_s < before_s
        {
            let detail = format!("goes back in time, from {before_s} s to {time_s} s");
            let mend = "put the points in the order of their times";
            reader.fault_with(&place.element(0), "goes_back", detail, Some(mend));
            whole = false;
            continue;
        }
        read.push((time_s, heat_kw));
    }
    whole.then_some(read)
}

fn point_of(point: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<(f64, f64)> {
    let Json::Array(elements) = point else {
        reader.wrong_type(at, point, "a point [s, kW]");
        return None;
    };
    let [time, heat] = elements.as_slice() else {
        let detail = format!("must have two entries, seconds and kilowatts, and has {}", elements.len());
        reader.fault(at, "wrong_length", detail);
        return None;
    };
    let time = Span::read(time, &at.element(0), reader);
    let heat = quantity::HeatRelease::read(heat, &at.element(1), reader);
    Some((time?.get(), heat?.get()))
}
