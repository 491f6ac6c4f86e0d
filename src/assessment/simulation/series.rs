//! Samples of the engine, gathered as series in the units of the wire.

use super::gas::MoleFractions;
use crate::fire::constants::ICE_POINT_K;
use crate::fire::two_zone::{Network, OpeningState, RoomState, Sample};

/// Declares the series of a part that has a number at every time.
macro_rules! series {
    ($(#[$meta:meta])* $name:ident { $($(#[$doc:meta])* $member:ident,)* }) => {
        $(#[$meta])*
        #[derive(Debug, Clone, PartialEq, Default)]
        pub struct $name { $($(#[$doc])* pub $member: Vec<f64>,)* }

        impl $name {
            fn with_capacity(times: usize) -> Self {
                Self { $($member: Vec::with_capacity(times),)* }
            }

            fn last_is_finite(&self) -> bool {
                [$(self.$member.last(),)*].into_iter().flatten().all(|value| value.is_finite())
            }
        }
    };
}

series! {
    /// A room over time.
    RoomSeries {
        /// Hot layer.
        upper_temperature_c,
        /// Cool layer.
        lower_temperature_c,
        /// Interface above the floor.
        interface_height_m,
        /// Pressure at the floor above that outside.
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
        /// Unburned fuel of the hot layer.
        upper_unburned_fuel_mass_fraction,
        /// Soot of the hot layer.
        upper_soot_mass_fraction,
        /// Surface of the ceiling.
        ceiling_temperature_c,
        /// Surface of the walls beside the hot layer.
        wall_temperature_c,
        /// Radiation on a cold target at the floor.
        floor_heat_flux_kw_m2,
        /// Heat released in the room.
        heat_release_kw,
    }
}

impl RoomSeries {
    fn push(&mut self, room: &RoomState) {
        let (upper, lower) = (MoleFractions::of(&room.upper.gas), MoleFractions::of(&room.lower.gas));
        self.upper_temperature_c.push(room.upper.temperature_k - ICE_POINT_K);
        self.lower_temperature_c.push(room.lower.temperature_k - ICE_POINT_K);
        self.interface_height_m.push(room.interface_height_m);
        self.pressure_pa.push(room.pressure_pa);
        self.upper_oxygen_mole_fraction.push(upper.oxygen);
        self.lower_oxygen_mole_fraction.push(lower.oxygen);
        self.upper_carbon_dioxide_mole_fraction.push(upper.carbon_dioxide);
        self.upper_carbon_monoxide_mole_fraction.push(upper.carbon_monoxide);
        self.upper_water_mole_fraction.push(upper.water);
        self.upper_unburned_fuel_mass_fraction.push(room.upper.gas.unburned_fuel);
        self.upper_soot_mass_fraction.push(room.upper.gas.soot);
        self.ceiling_temperature_c.push(room.ceiling_k - ICE_POINT_K);
        self.wall_temperature_c.push(room.upper_wall_k - ICE_POINT_K);
        self.floor_heat_flux_kw_m2.push(room.floor_flux_kw_m2);
        self.heat_release_kw.push(room.heat_release_kw);
    }
}

/// An opening over time; flow is positive into the first of the spaces that it joins.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct OpeningSeries {
    /// Into the first.
    pub inflow_kg_s: Vec<f64>,
    /// Out of the first.
    pub outflow_kg_s: Vec<f64>,
    /// Where the flow turns, above the floor of the first; none without a flow both ways.
    pub neutral_plane_m: Vec<Option<f64>>,
    /// Heat of fuel gas that burns beyond the opening.
    pub flame_heat_release_kw: Vec<f64>,
}

impl OpeningSeries {
    fn with_capacity(times: usize) -> Self {
        Self {
            inflow_kg_s: Vec::with_capacity(times),
            outflow_kg_s: Vec::with_capacity(times),
            neutral_plane_m: Vec::with_capacity(times),
            flame_heat_release_kw: Vec::with_capacity(times),
        }
    }

    fn push(&mut self, opening: &OpeningState) {
        self.inflow_kg_s.push(opening.inflow_kg_s);
        self.outflow_kg_s.push(opening.outflow_kg_s);
        self.neutral_plane_m.push(opening.neutral_plane_m);
        self.flame_heat_release_kw.push(opening.flame_heat_release_kw);
    }
}

fn is_finite(opening: &OpeningState) -> bool {
    let numbers = [opening.inflow_kg_s, opening.outflow_kg_s, opening.flame_heat_release_kw];
    numbers.into_iter().chain(opening.neutral_plane_m).all(f64::is_finite)
}

/// Gathers samples.
pub(super) struct Recorder {
    rooms: Vec<RoomSeries>,
    openings: Vec<OpeningSeries>,
    taken: usize,
    odd: Option<(f64, Option<usize>)>,
}

impl Recorder {
    /// For the rooms and openings of a network, and so many samples.
    pub fn of(network: &Network, times: usize) -> Self {
        Self {
            rooms: network.rooms.iter().map(|_| RoomSeries::with_capacity(times)).collect(),
            openings: network.openings.iter().map(|_| OpeningSeries::with_capacity(times)).collect(),
            taken: 0,
            odd: None,
        }
    }

    /// Takes a sample.
    pub fn take(&mut self, sample: &Sample) {
        self.taken += 1;
        for (index, (series, state)) in self.rooms.iter_mut().zip(&sample.rooms).enumerate() {
            series.push(state);
            if self.odd.is_none() && !series.last_is_finite() {
                self.odd = Some((sample.time_s, Some(index)));
            }
        }
        for (series, state) in self.openings.iter_mut().zip(&sample.openings) {
            series.push(state);
            if self.odd.is_none() && !is_finite(state) {
                self.odd = Some((sample.time_s, None));
            }
        }
    }

    /// How many samples were taken.
    pub fn taken(&self) -> usize {
        self.taken
    }

    /// When, and in which room, a value was no number.
    pub fn odd(&self) -> Option<(f64, Option<usize>)> {
        self.odd
    }

    /// The series.
    pub fn into_series(self) -> (Vec<RoomSeries>, Vec<OpeningSeries>) {
        (self.rooms, self.openings)
    }
}
