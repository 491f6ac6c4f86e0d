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

/// A row whose properties are described by the component `$component`.
macro_rules! rows {
    ($($row:ident of $properties:ty, $schema:ident = $component:literal;)*) => {$(
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
                Ok(Self {
                    key: row.key.clone(),
                    title: row.title.clone(),
                    properties: to_raw_value(&WrittenProperties(&row.properties)).map_err(|error| ApiError::internal(&error))?,
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
    CatalogueUse of UseProperties, use_properties = "UseProperties";
    CatalogueItem of ItemProperties, item_properties = "ItemProperties";
    CatalogueMaterial of MaterialProperties, material_properties = "MaterialProperties";
    CatalogueLeakage of LeakageProperties, leakage_properties = "LeakageProperties";
    CatalogueDetector of DetectorProperties, detector_properties = "DetectorProperties";
    CatalogueSprinkler of SprinklerProperties, sprinkler_properties = "SprinklerProperties";
    CatalogueFuel of FuelProperties, fuel_properties = "FuelProperties";
}
