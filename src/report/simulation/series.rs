//! The series of a run, rounded as every finding is.

use serde::Serialize;
use utoipa::ToSchema;

use crate::assessment::simulation::{OpeningSeries, RoomSeries};
use crate::report::number::Number;

/// A run that holds a value that is no number is broken off before it comes here.
fn rounded(series: &[f64]) -> Vec<Number> {
    series.iter().copied().filter_map(Number::of).collect()
}

/// Declares the series of a room, and their way into a table.
macro_rules! room_series {
    ($(#[$meta:meta])* $name:ident { $($(#[$doc:meta])* $member:ident,)* }) => {
        $(#[$meta])*
        #[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
        pub struct $name { $($(#[$doc])* pub $member: Vec<Number>,)* }

        impl From<&RoomSeries> for $name {
            fn from(series: &RoomSeries) -> Self {
                Self { $($member: rounded(&series.$member),)* }
            }
        }

        impl $name {
            /// The series, each with its name.
            pub(super) fn columns(&self) -> Vec<(&'static str, &[Number])> {
                vec![$((stringify!($member), self.$member.as_slice()),)*]
            }
        }
    };
}

room_series! {
    /// A room over time. Where no hot layer has formed yet its values are those of the air in the room.
    SimulationRoom {
        /// Temperature of the hot layer.
        upper_temperature_c,
        /// Temperature of the cool layer.
        lower_temperature_c,
        /// Height of the interface above the floor of the room.
        interface_height_m,
        /// Pressure at the floor above that of outside air at the same height.
        pressure_pa,
        /// Oxygen of the hot layer.
        upper_oxygen_mole_fraction,
        /// Oxygen of the cool layer.
        lower_oxygen_mole_fraction,
        /// Carbon dioxide of the hot layer.
        upper_carbon_dioxide_mole_fraction,
        /// Carbon monoxide of the hot layer.
        upper_carbon_monoxide_mole_fraction,
        /// Water vapour of the hot layer.
        upper_water_mole_fraction,
        /// Unburned fuel gas of the hot layer, by mass.
        upper_unburned_fuel_mass_fraction,
        /// Soot of the hot layer, by mass.
        upper_soot_mass_fraction,
        /// Surface of the ceiling.
        ceiling_temperature_c,
        /// Surface of the walls beside the hot layer.
        wall_temperature_c,
        /// Radiation that a cold target in the middle of the floor receives.
        floor_heat_flux_kw_m2,
        /// Heat released in the room: at its fires, in its layers, at its doors.
        heat_release_kw,
    }
}

/// An opening over time.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct SimulationOpening {
    /// Flow into the first of `connects`.
    pub inflow_kg_s: Vec<Number>,
    /// Flow out of the first of `connects`.
    pub outflow_kg_s: Vec<Number>,
    /// Height above the floor of the first of `connects` at which the flow turns; null: it does not.
    pub neutral_plane_m: Vec<Option<Number>>,
    /// Heat of fuel gas that burns beyond the opening.
    pub flame_heat_release_kw: Vec<Number>,
}

impl From<&OpeningSeries> for SimulationOpening {
    fn from(series: &OpeningSeries) -> Self {
        Self {
            inflow_kg_s: rounded(&series.inflow_kg_s),
            outflow_kg_s: rounded(&series.outflow_kg_s),
            neutral_plane_m: series
                .neutral_plane_m
                .iter()
                .map(|height| height.and_then(Number::of))
                .collect(),
            flame_heat_release_kw: rounded(&series.flame_heat_release_kw),
        }
    }
}
