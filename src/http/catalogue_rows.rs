//! Rows of the catalogue as lists give them.

use serde::Serialize;
use serde_json::value::{RawValue, to_raw_value};
use utoipa::ToSchema;
use utoipa::openapi::{Ref, RefOr, Schema};

use super::problem::ApiError;
use crate::catalogue::Row;
use crate::domain::properties::{
    DetectorProperties, FuelProperties, ItemProperties, LeakageProperties, MaterialProperties,
    SprinklerProperties, UseProperties,
};
use crate::wire::WrittenProperties;

/// A row whose properties are written by `$write` and described by the component `$component`.
macro_rules! rows {
    ($($row:ident of $properties:ty, $write:expr, $schema:ident = $component:literal;)*) => {$(
        fn $schema() -> RefOr<Schema> {
            Ref::from_schema_name($component).into()
        }

        /// A row of the catalogue.
        #[derive(Debug, Serialize, ToSchema)]
        pub struct $row {
            /// Name by which buildings refer to it; never changes.
            pub key: String,
            /// Name for people.
            pub title: String,
            /// What it stands for; wherever the name is allowed, this is too.
            #[schema(schema_with = $schema)]
            pub properties: Box<RawValue>,
            /// Publication or practice that the numbers come from.
            pub source: String,
            /// `seen` where that was read, `memory` where the numbers are recalled without it.
            pub provenance: &'static str,
            /// What a reader should know; empty when there is nothing.
            pub note: String,
            /// Members that are this project's own estimates, not the source's.
            pub estimated: Vec<String>,
        }

        impl $row {
            /// The row as it is listed.
            pub fn of(row: &Row<$properties>) -> Result<Self, ApiError> {
                let write: fn(&$properties) -> Result<Box<RawValue>, serde_json::Error> = $write;
                Ok(Self {
                    key: row.key.clone(),
                    title: row.title.clone(),
                    properties: write(&row.properties).map_err(|error| ApiError::internal(&error))?,
                    source: row.source.clone(),
                    provenance: row.provenance.name(),
                    note: row.note.clone(),
                    estimated: row.estimated.clone(),
                })
            }
        }
    )*};
}

rows! {
    CatalogueUse of UseProperties, |of| to_raw_value(&WrittenProperties(of)), use_properties = "UseProperties";
    CatalogueItem of ItemProperties, |of| to_raw_value(&WrittenProperties(of)), item_properties = "ItemProperties";
    CatalogueMaterial of MaterialProperties, |of| to_raw_value(&WrittenProperties(of)), material_properties = "MaterialProperties";
    CatalogueLeakage of LeakageProperties, |of| to_raw_value(&WrittenProperties(of)), leakage_properties = "LeakageProperties";
    CatalogueDetector of DetectorProperties, |of| to_raw_value(&WrittenProperties(of)), detector_properties = "DetectorProperties";
    CatalogueSprinkler of SprinklerProperties, |of| to_raw_value(&WrittenProperties(of)), sprinkler_properties = "SprinklerProperties";
    CatalogueFuel of FuelProperties, |of| to_raw_value(&Fuel::of(of)), fuel_properties = "FuelProperties";
}

/// What a fuel is. A building names fuels by their keys only, so the wire has no form of it.
#[derive(Debug, Serialize, ToSchema)]
#[schema(as = FuelProperties)]
pub struct Fuel {
    /// Net heat of complete combustion, MJ/kg.
    pub heat_of_combustion_mj_kg: f64,
    /// Heat really released in well-ventilated burning, MJ/kg.
    pub chemical_heat_mj_kg: f64,
    /// Share of the chemical heat that leaves as radiation.
    pub radiative_fraction: f64,
    /// Atoms of carbon in the formula as printed.
    pub carbon: f64,
    /// Atoms of hydrogen.
    pub hydrogen: f64,
    /// Atoms of oxygen.
    pub oxygen: f64,
    /// Atoms of nitrogen.
    pub nitrogen: f64,
    /// Atoms of chlorine.
    pub chlorine: f64,
    /// Carbon monoxide per fuel burnt, well ventilated, kg/kg; null: not in the source.
    #[schema(required)]
    pub co_yield_kg_kg: Option<f64>,
    /// Soot per fuel burnt, well ventilated, kg/kg; null: not in the source.
    #[schema(required)]
    pub soot_yield_kg_kg: Option<f64>,
    /// Hydrogen cyanide per fuel burnt, well ventilated, kg/kg; null: not in the source.
    #[schema(required)]
    pub hcn_yield_kg_kg: Option<f64>,
    /// Air that burns one kilogram completely, kg/kg.
    pub stoichiometric_air_kg_kg: f64,
}

impl Fuel {
    fn of(fuel: &FuelProperties) -> Self {
        Self {
            heat_of_combustion_mj_kg: fuel.heat_of_combustion_mj_kg,
            chemical_heat_mj_kg: fuel.chemical_heat_mj_kg,
            radiative_fraction: fuel.radiative_fraction,
            carbon: fuel.carbon,
            hydrogen: fuel.hydrogen,
            oxygen: fuel.oxygen,
            nitrogen: fuel.nitrogen,
            chlorine: fuel.chlorine,
            co_yield_kg_kg: fuel.co_yield_kg_kg,
            soot_yield_kg_kg: fuel.soot_yield_kg_kg,
            hcn_yield_kg_kg: fuel.hcn_yield_kg_kg,
            stoichiometric_air_kg_kg: fuel.stoichiometric_air_kg_kg,
        }
    }
}
