//! Rows as they stand in the files of `seed-data/catalogue`.
//!
//! A file is an array of flat objects, so that a person can review it. These private forms
//! refuse unknown members: a misspelt name must not pass for a missing value.

use serde::Deserialize;

use super::{Provenance, Row};
use crate::domain::properties::{
    DetectorKind, DetectorProperties, ExposedGrowth, FuelProperties, IgnitionEase, ItemProperties,
    LeakageProperties, MaterialProperties, SprinklerProperties, UseProperties,
};

#[derive(Deserialize)]
#[serde(rename_all = "snake_case")]
enum ProvenanceRow {
    Seen,
    Memory,
}

#[derive(Deserialize)]
#[serde(rename_all = "snake_case")]
enum IgnitionRow {
    Easy,
    Normal,
    Hard,
}

#[derive(Deserialize)]
#[serde(rename_all = "snake_case")]
enum ExposedGrowthRow {
    Fast,
    UltraFast,
}

#[derive(Deserialize)]
#[serde(rename_all = "snake_case")]
enum DetectorKindRow {
    SmokePoint,
    SmokeBeam,
    SmokeAspirating,
    HeatFixed,
    HeatRateOfRise,
}

impl From<ProvenanceRow> for Provenance {
    fn from(row: ProvenanceRow) -> Self {
        match row {
            ProvenanceRow::Seen => Self::Seen,
            ProvenanceRow::Memory => Self::Memory,
        }
    }
}

impl From<IgnitionRow> for IgnitionEase {
    fn from(row: IgnitionRow) -> Self {
        match row {
            IgnitionRow::Easy => Self::Easy,
            IgnitionRow::Normal => Self::Normal,
            IgnitionRow::Hard => Self::Hard,
        }
    }
}

impl From<ExposedGrowthRow> for ExposedGrowth {
    fn from(row: ExposedGrowthRow) -> Self {
        match row {
            ExposedGrowthRow::Fast => Self::Fast,
            ExposedGrowthRow::UltraFast => Self::UltraFast,
        }
    }
}

impl From<DetectorKindRow> for DetectorKind {
    fn from(row: DetectorKindRow) -> Self {
        match row {
            DetectorKindRow::SmokePoint => Self::SmokePoint,
            DetectorKindRow::SmokeBeam => Self::SmokeBeam,
            DetectorKindRow::SmokeAspirating => Self::SmokeAspirating,
            DetectorKindRow::HeatFixed => Self::HeatFixed,
            DetectorKindRow::HeatRateOfRise => Self::HeatRateOfRise,
        }
    }
}

/// Declares the flat form of one file and its way into a [`Row`]. `serde(flatten)` would
/// spare the macro, but it defeats `deny_unknown_fields`.
macro_rules! flat_row {
    ($name:ident -> $properties:ident { $($member:ident: $form:ty = $value:expr),* $(,)? }) => {
        #[derive(Deserialize)]
        #[serde(deny_unknown_fields)]
        pub(super) struct $name {
            key: String,
            title: String,
            $($member: $form,)*
            source: String,
            provenance: ProvenanceRow,
            note: String,
            estimated: Vec<String>,
        }

        impl From<$name> for Row<$properties> {
            fn from(row: $name) -> Self {
                Row {
                    key: row.key,
                    title: row.title,
                    properties: $properties { $($member: ($value)(row.$member),)* },
                    source: row.source,
                    provenance: row.provenance.into(),
                    note: row.note,
                    estimated: row.estimated,
                }
            }
        }
    };
    ($name:ident -> $properties:ident { $($member:ident: $form:ty),* $(,)? }) => {
        flat_row!($name -> $properties { $($member: $form = Into::into),* });
    };
}

flat_row!(UseRow -> UseProperties {
    fire_load_mean_mj_m2: f64,
    fire_load_p80_mj_m2: f64,
    fire_load_p95_mj_m2: f64,
    growth_kw_s2: f64,
    heat_release_per_area_kw_m2: f64,
    sleeping: bool,
    way_out: bool,
    fuel: String,
});

flat_row!(ItemRow -> ItemProperties {
    mass_kg: f64,
    energy_mj: f64,
    peak_kw: f64,
    growth_kw_s2: f64,
    burning_area_m2: f64,
    height_m: f64,
    fuel: String,
    ignition: IgnitionRow,
});

flat_row!(FuelRow -> FuelProperties {
    heat_of_combustion_mj_kg: f64,
    chemical_heat_mj_kg: f64,
    radiative_fraction: f64,
    carbon: f64,
    hydrogen: f64,
    oxygen: f64,
    nitrogen: f64,
    chlorine: f64,
    co_yield_kg_kg: Option<f64>,
    soot_yield_kg_kg: Option<f64>,
    hcn_yield_kg_kg: Option<f64>,
    stoichiometric_air_kg_kg: f64,
});

flat_row!(MaterialRow -> MaterialProperties {
    conductivity_w_mk: f64 = Into::into,
    density_kg_m3: f64 = Into::into,
    specific_heat_j_kgk: f64 = Into::into,
    thickness_m: f64 = Into::into,
    combustible: bool = Into::into,
    exposed_growth: Option<ExposedGrowthRow> = |growth: Option<ExposedGrowthRow>| growth.map(Into::into),
});

flat_row!(LeakageRow -> LeakageProperties {
    wall_m2_m2: f64,
    floor_m2_m2: f64,
    ceiling_m2_m2: f64,
});

flat_row!(DetectorRow -> DetectorProperties {
    kind: DetectorKindRow,
    response_time_index_sqrt_ms: Option<f64>,
    activation_c: Option<f64>,
    activation_rise_k: Option<f64>,
    activation_rate_k_min: Option<f64>,
    activation_optical_density_1_m: Option<f64>,
});

flat_row!(SprinklerRow -> SprinklerProperties {
    response_time_index_sqrt_ms: f64,
    conduction_factor_sqrt_m_s: f64,
    activation_c: f64,
    spray_density_mm_s: f64,
});
