//! Forms of catalogue names and of the properties that may stand in their place.

use std::marker::PhantomData;

use serde::{Serialize, Serializer};
use utoipa::openapi::schema::{Schema, Type};
use utoipa::openapi::{ObjectBuilder, RefOr};

use super::form::{Components, Form, Way};
use super::json::Json;
use super::number::{Measure, write_number};
use super::object::{Maybe, default_of, doc_of, either, name_of, object};
use super::reader::Reader;
use super::scalar::OneWord;
use crate::catalogue::Kind;
use crate::domain::properties::{
    DetectorKind, DetectorProperties, ExposedGrowth, FuelProperties, IgnitionEase, ItemProperties,
    LeakageProperties, MaterialProperties, Properties, SprinklerProperties, UseProperties,
};
use crate::domain::{Named, Pointer};

/// Properties that have rows in the catalogue.
pub trait Listed: Properties {
    /// The list of their rows.
    const KIND: Kind;
}

macro_rules! listed {
    ($($properties:ident = $kind:ident,)*) => {$(
        impl Listed for $properties {
            const KIND: Kind = Kind::$kind;
        }
    )*};
}

listed! {
    UseProperties = Uses,
    ItemProperties = Items,
    FuelProperties = Fuels,
    MaterialProperties = Materials,
    LeakageProperties = Leakage,
    DetectorProperties = Detectors,
    SprinklerProperties = Sprinklers,
}

/// Longest name that is looked up.
const LONGEST_NAME: usize = 64;

/// The name of a row of the catalogue.
pub struct RowName<P>(PhantomData<P>);

impl<P: Listed> Form for RowName<P> {
    type Value = String;

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<String> {
        let Json::Text(name) = json else {
            reader.wrong_type(at, json, "a string");
            return None;
        };
        reader.look_up(at, P::KIND, name).then(|| name.clone())
    }

    fn write<S: Serializer>(value: &String, serializer: S) -> Result<S::Ok, S::Error> {
        serializer.serialize_str(value)
    }

    fn schema(_: Way) -> RefOr<Schema> {
        ObjectBuilder::new()
            .schema_type(Type::String)
            .max_length(Some(LONGEST_NAME))
            .description(Some(format!("A key of `/v1/catalogue/{}`.", P::KIND.name())))
            .into()
    }
}

/// The name of a row of the catalogue, or the properties themselves.
pub struct NameOr<P>(PhantomData<P>);

impl<P: Listed + Form<Value = P>> Form for NameOr<P> {
    type Value = Named<P>;

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<Named<P>> {
        match json {
            Json::Text(_) => RowName::<P>::read(json, at, reader).map(Named::Catalogue),
            Json::Object(_) => {
                let properties = P::read(json, at, reader)?;
                let faults = properties.faults();
                for fault in &faults {
                    reader.fault(&at.member(fault.member), "contradiction", fault.reason.clone());
                }
                faults.is_empty().then_some(Named::Given(properties))
            }
            other => {
                let list = P::KIND.name();
                let wanted = format!("a name of /v1/catalogue/{list} or an object with the properties");
                reader.wrong_type(at, other, &wanted);
                None
            }
        }
    }

    fn write<S: Serializer>(value: &Named<P>, serializer: S) -> Result<S::Ok, S::Error> {
        match value {
            Named::Catalogue(name) => serializer.serialize_str(name),
            Named::Given(properties) => P::write(properties, serializer),
        }
    }

    fn schema(way: Way) -> RefOr<Schema> {
        either([RowName::<P>::schema(way), P::schema(way)])
    }

    fn components(way: Way, into: &mut Components) {
        P::components(way, into);
    }
}

/// A number of a set of properties; its limits and its unit hang on the member's name.
pub struct Amount<P>(PhantomData<P>);

/// Units by the ending of a member's name, longer endings first.
const UNITS: &[(&str, &str)] = &[
    ("_mj_m2", "MJ/m2"),
    ("_kw_m2", "kW/m2"),
    ("_kw_s2", "kW/s2"),
    ("_mj_kg", "MJ/kg"),
    ("_kg_kg", "kg/kg"),
    ("_kg_m3", "kg/m3"),
    ("_j_kgk", "J/(kg K)"),
    ("_w_mk", "W/(m K)"),
    ("_m2_m2", "m2/m2"),
    ("_k_min", "K/min"),
    ("_sqrt_m_s", "√(m/s)"),
    ("_sqrt_ms", "√(m s)"),
    ("_mm_s", "mm/s"),
    ("_1_m", "1/m"),
    // A difference of temperatures, which must not be read as a temperature.
    ("_rise_k", "kelvin"),
    ("_fraction", ""),
    ("_kg", "kg"),
    ("_mj", "MJ"),
    ("_kw", "kW"),
    ("_m2", "m2"),
    ("_m", "m"),
    ("_c", "C"),
];

fn measure<P: Properties>(member: &str) -> Measure {
    let unit = UNITS.iter().find(|(ending, _)| member.ends_with(ending)).map_or("one", |(_, unit)| unit);
    let limit = P::LIMITS.iter().find(|limit| limit.member == member);
    let (min, max) = limit.map_or((f64::MIN, f64::MAX), |limit| (limit.least, limit.most));
    Measure { unit, min, max, because: "" }
}

impl<P: Properties> Form for Amount<P> {
    type Value = f64;

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<f64> {
        measure::<P>(at.last()).read(json, at, reader)
    }

    fn write<S: Serializer>(value: &f64, serializer: S) -> Result<S::Ok, S::Error> {
        write_number(*value, serializer)
    }

    fn schema(way: Way) -> RefOr<Schema> {
        Self::schema_of("", way)
    }

    fn schema_of(member: &str, way: Way) -> RefOr<Schema> {
        measure::<P>(member).schema(way)
    }
}

/// A set of properties as answers write it.
pub struct WrittenProperties<'p, P>(pub &'p P);

impl<P: Form<Value = P>> Serialize for WrittenProperties<'_, P> {
    fn serialize<S: Serializer>(&self, serializer: S) -> Result<S::Ok, S::Error> {
        P::write(self.0, serializer)
    }
}

object! {
    /// What a room is used for, in place of a name of `/v1/catalogue/uses`.
    UseProperties as "UseProperties" {
        /// Mean fire load, net heat per floor area, MJ/m².
        fire_load_mean_mj_m2: Amount<UseProperties>,
        /// Fire load that 80 % of such rooms stay below, MJ/m²; at least the mean.
        fire_load_p80_mj_m2: Amount<UseProperties>,
        /// Fire load that 95 % of such rooms stay below, MJ/m²; at least the 80 % fractile.
        fire_load_p95_mj_m2: Amount<UseProperties>,
        /// Growth coefficient of the t² fire, kW/s².
        growth_kw_s2: Amount<UseProperties>,
        /// Heat release per burning floor area, fuel-controlled, kW/m².
        heat_release_per_area_kw_m2: Amount<UseProperties>,
        /// People sleep here.
        sleeping: bool = false,
        /// The way out leads through here.
        way_out: bool = false,
        /// The fuel that the contents burn as: a name of `/v1/catalogue/fuels`, or its properties.
        fuel: NameOr<FuelProperties>,
    }

    /// A thing that burns as one, in place of a name of `/v1/catalogue/items`.
    ItemProperties as "ItemProperties" {
        /// Mass before the fire, kg.
        mass_kg: Amount<ItemProperties>,
        /// Heat it can release, MJ.
        energy_mj: Amount<ItemProperties>,
        /// Highest heat release, burning freely, kW.
        peak_kw: Amount<ItemProperties>,
        /// Growth coefficient of its t² fire, kW/s².
        growth_kw_s2: Amount<ItemProperties>,
        /// Area it burns over, seen from above, m².
        burning_area_m2: Amount<ItemProperties>,
        /// Height of its top above its foot, m.
        height_m: Amount<ItemProperties>,
        /// The fuel it burns as: a name of `/v1/catalogue/fuels`, or its properties.
        fuel: NameOr<FuelProperties>,
        /// How readily it takes fire from another.
        ignition: OneWord<IgnitionEase> = IgnitionEase::Normal,
    }

    /// What burns, in place of a name of `/v1/catalogue/fuels`. Yields that are null are not known.
    FuelProperties as "FuelProperties" {
        /// Net heat of complete combustion, MJ/kg.
        heat_of_combustion_mj_kg: Amount<FuelProperties>,
        /// Heat really released in well-ventilated burning, MJ/kg; at most the former.
        chemical_heat_mj_kg: Amount<FuelProperties>,
        /// Share of the chemical heat that leaves as radiation.
        radiative_fraction: Amount<FuelProperties>,
        /// Atoms of carbon in the formula.
        carbon: Amount<FuelProperties>,
        /// Atoms of hydrogen in the formula.
        hydrogen: Amount<FuelProperties>,
        /// Atoms of oxygen in the formula.
        oxygen: Amount<FuelProperties>,
        /// Atoms of nitrogen in the formula.
        nitrogen: Amount<FuelProperties>,
        /// Atoms of chlorine in the formula.
        chlorine: Amount<FuelProperties>,
        /// Carbon monoxide per fuel burnt, well ventilated, kg/kg.
        co_yield_kg_kg: Maybe<Amount<FuelProperties>> = None,
        /// Soot per fuel burnt, well ventilated, kg/kg.
        soot_yield_kg_kg: Maybe<Amount<FuelProperties>> = None,
        /// Hydrogen cyanide per fuel burnt, well ventilated, kg/kg.
        hcn_yield_kg_kg: Maybe<Amount<FuelProperties>> = None,
        /// Air that burns one kilogram completely, kg/kg.
        stoichiometric_air_kg_kg: Amount<FuelProperties>,
    }

    /// What a surface is lined with, in place of a name of `/v1/catalogue/materials`.
    MaterialProperties as "MaterialProperties" {
        /// Thermal conductivity, W/(m K).
        conductivity_w_mk: Amount<MaterialProperties>,
        /// Density, kg/m³.
        density_kg_m3: Amount<MaterialProperties>,
        /// Specific heat, J/(kg K).
        specific_heat_j_kgk: Amount<MaterialProperties>,
        /// Thickness it usually has, m.
        thickness_m: Amount<MaterialProperties>,
        /// It burns.
        combustible: bool,
        /// What it does to growth when a flame can reach it; null: nothing.
        exposed_growth: Maybe<OneWord<ExposedGrowth>> = None,
    }

    /// How much a room leaks, in place of a name of `/v1/catalogue/leakage`: areas of leak per
    /// area of boundary, shut doors and windows aside.
    LeakageProperties as "LeakageProperties" {
        /// Through walls, m²/m².
        wall_m2_m2: Amount<LeakageProperties>,
        /// Through the floor, m²/m².
        floor_m2_m2: Amount<LeakageProperties>,
        /// Through the ceiling, m²/m².
        ceiling_m2_m2: Amount<LeakageProperties>,
    }

    /// A detector, in place of a name of `/v1/catalogue/detectors`. It acts on whichever of its
    /// criteria is met first.
    DetectorProperties as "DetectorProperties" {
        /// What it feels.
        kind: OneWord<DetectorKind>,
        /// Response time index, √(m s); null: it follows the gas without delay.
        response_time_index_sqrt_ms: Maybe<Amount<DetectorProperties>> = None,
        /// Temperature of its element at which it acts, °C.
        activation_c: Maybe<Amount<DetectorProperties>> = None,
        /// Rise of its element's temperature at which it acts, K.
        activation_rise_k: Maybe<Amount<DetectorProperties>> = None,
        /// Rate of that rise at which it acts, K/min.
        activation_rate_k_min: Maybe<Amount<DetectorProperties>> = None,
        /// Optical density, to base ten, of the smoke at which it acts, 1/m.
        activation_optical_density_1_m: Maybe<Amount<DetectorProperties>> = None,
    }

    /// A sprinkler head, in place of a name of `/v1/catalogue/sprinklers`.
    SprinklerProperties as "SprinklerProperties" {
        /// Response time index, √(m s).
        response_time_index_sqrt_ms: Amount<SprinklerProperties>,
        /// Conduction factor, √(m/s).
        conduction_factor_sqrt_m_s: Amount<SprinklerProperties>,
        /// Temperature of its element at which it opens, °C.
        activation_c: Amount<SprinklerProperties>,
        /// Water reaching the floor, per area, mm/s.
        spray_density_mm_s: Amount<SprinklerProperties>,
    }
}
