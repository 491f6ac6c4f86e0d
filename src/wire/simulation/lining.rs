//! The forms of linings: a sheet of a material or of given properties, or several of them.

use serde::ser::SerializeMap;
use serde::{Serialize, Serializer};
use utoipa::openapi::RefOr;
use utoipa::openapi::schema::{Array, Schema};

use crate::domain::properties::MaterialProperties;
use crate::domain::quantity::Thickness;
use crate::domain::simulation::{Linings, Sheet};
use crate::domain::{Named, Pointer};
use crate::wire::form::{Components, Form, Way, Written};
use crate::wire::json::Json;
use crate::wire::named::{Amount, NameOr};
use crate::wire::object::{Maybe, default_of, doc_of, either, entry, name_of, object};
use crate::wire::reader::Reader;

/// Most sheets of one lining.
const MAX_SHEETS: usize = 10;

/// A sheet whose properties are given in place of a material.
struct PlainSheet {
    conductivity_w_mk: f64,
    density_kg_m3: f64,
    specific_heat_j_kgk: f64,
    thickness_m: Thickness,
}

/// A sheet of a material.
struct MaterialSheet {
    material: Named<MaterialProperties>,
    thickness_m: Option<Thickness>,
}

object! {
    /// The linings of a room. Through one that is null no heat passes.
    Linings as "SimulationLinings" {
        /// Walls.
        walls: Sheets = Vec::new(),
        /// Ceiling.
        ceiling: Sheets = Vec::new(),
        /// Floor.
        floor: Sheets = Vec::new(),
    }

    /// One sheet of a lining, by its properties.
    PlainSheet as "SimulationSheet" {
        /// Thermal conductivity, W/(m K).
        conductivity_w_mk: Amount<MaterialProperties>,
        /// Density, kg/m³.
        density_kg_m3: Amount<MaterialProperties>,
        /// Specific heat, J/(kg K).
        specific_heat_j_kgk: Amount<MaterialProperties>,
        /// Thickness.
        thickness_m: Thickness,
    }

    /// One sheet of a lining, by its material.
    MaterialSheet as "SimulationMaterialSheet" {
        /// Material: a name of `/v1/catalogue/materials`, or its properties.
        material: NameOr<MaterialProperties>,
        /// Thickness; null: the material's usual one.
        thickness_m: Maybe<Thickness> = None,
    }
}

impl From<PlainSheet> for Sheet {
    fn from(plain: PlainSheet) -> Self {
        let properties = MaterialProperties {
            conductivity_w_mk: plain.conductivity_w_mk,
            density_kg_m3: plain.density_kg_m3,
            specific_heat_j_kgk: plain.specific_heat_j_kgk,
            thickness_m: plain.thickness_m.get(),
            combustible: false,
            exposed_growth: None,
        };
        Self { material: Named::Given(properties), thickness_m: Some(plain.thickness_m) }
    }
}

impl Form for Sheet {
    type Value = Self;

    /// The member `material` tells the two forms apart.
    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<Self> {
        const PROPERTIES: [&str; 3] = ["conductivity_w_mk", "density_kg_m3", "specific_heat_j_kgk"];
        let plain = json.member("material").is_none()
            && PROPERTIES.iter().any(|member| json.member(member).is_some());
        if plain {
            return PlainSheet::read(json, at, reader).map(Self::from);
        }
        let MaterialSheet { material, thickness_m } = MaterialSheet::read(json, at, reader)?;
        Some(Self { material, thickness_m })
    }

    fn write<S: Serializer>(value: &Self, serializer: S) -> Result<S::Ok, S::Error> {
        let mut map = serializer.serialize_map(Some(2))?;
        entry::<NameOr<MaterialProperties>, _>(&mut map, "material", &value.material)?;
        entry::<Maybe<Thickness>, _>(&mut map, "thickness_m", &value.thickness_m)?;
        map.end()
    }

    fn schema(way: Way) -> RefOr<Schema> {
        either([PlainSheet::schema(way), MaterialSheet::schema(way)])
    }

    fn components(way: Way, into: &mut Components) {
        PlainSheet::components(way, into);
        MaterialSheet::components(way, into);
    }
}

/// No sheet, one, or several from the room side outwards.
struct Sheets;

impl Form for Sheets {
    type Value = Vec<Sheet>;

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<Vec<Sheet>> {
        let elements = match json {
            Json::Object(_) => return Sheet::read(json, at, reader).map(|sheet| vec![sheet]),
            Json::Array(elements) => elements,
            other => {
                reader.wrong_type(at, other, "a sheet, an array of sheets from the room outwards, or null");
                return None;
            }
        };
        if elements.is_empty() || elements.len() > MAX_SHEETS {
            let code = if elements.is_empty() { "too_short" } else { "too_many" };
            let detail = format!("has {} sheets; 1 to {MAX_SHEETS} are lawful", elements.len());
            reader.fault_with(at, code, detail, Some("null: no heat passes"));
            return None;
        }
        let sheets = elements.iter().enumerate();
        let sheets: Vec<_> =
            sheets.map(|(index, sheet)| Sheet::read(sheet, &at.element(index), reader)).collect();
        sheets.into_iter().collect()
    }

    fn write<S: Serializer>(value: &Vec<Sheet>, serializer: S) -> Result<S::Ok, S::Error> {
        match value.as_slice() {
            [] => serializer.serialize_none(),
            [one] => Written::<Sheet>(one).serialize(serializer),
            several => serializer.collect_seq(several.iter().map(Written::<Sheet>)),
        }
    }

    fn schema(way: Way) -> RefOr<Schema> {
        let mut several = Array::new(Sheet::schema(way));
        several.min_items = Some(1);
        several.max_items = Some(MAX_SHEETS);
        either([Sheet::schema(way), several.into()])
    }

    fn components(way: Way, into: &mut Components) {
        Sheet::components(way, into);
    }
}
