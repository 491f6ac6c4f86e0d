//! What was there, what came and what went: the run's own check.
//!
//! Contents are summed from the state; what crossed the bounds of the building was summed up step by step from the flows, the
//! fuel and the heat, each by its own law. The two need not agree; that they do is the check.

use super::building::{Building, SURFACES, ledger};
use super::gas::{GAMMA, PRODUCTS, elements, fuel_elements};
use super::outcome::Balance;

/// Sums over a building.
#[derive(Clone, Copy, Debug)]
pub(super) struct Account<'a> {
    building: &'a Building,
}

impl<'a> Account<'a> {
    pub(super) fn new(building: &'a Building) -> Self {
        Self { building }
    }

    /// Compares the end with the start.
    pub(super) fn balance(&self, start: &[f64], end: &[f64]) -> Balance {
        let line = |state: &[f64], line: usize| state[self.building.layout.ledger + line];
        let passed = |what: usize| line(end, what) - line(start, what);

        let mass_error =
            self.mass_kg(end) - self.mass_kg(start) + passed(ledger::MASS_OUT) - passed(ledger::FUEL);
        let mass_size = self.mass_kg(start) + passed(ledger::FUEL).abs() + passed(ledger::MASS_OUT).abs();

        let energy_error =
            self.energy_j(end) - self.energy_j(start) + passed(ledger::ENTHALPY_OUT) + passed(ledger::LOST)
                - passed(ledger::RELEASED)
                - passed(ledger::FUEL_ENTHALPY);
        // Against what the fire gave, not the warmth of the air at rest: that would hide an error.
        let energy_size = passed(ledger::RELEASED).abs().max(1e-3 * self.gas_j(start));

        let mut worst: f64 = 0.0;
        for element in 0..3 {
            let (before, after) = (self.element_kg(start, element), self.element_kg(end, element));
            let mut out = 0.0;
            let mut fuel = 0.0;
            for species in 0..self.building.species {
                out += passed(ledger::SPECIES_OUT + species) * self.share(species, element);
            }
            for (index, data) in self.building.fuels.iter().enumerate() {
                fuel += passed(ledger::SPECIES_OUT + self.building.species + index)
                    * fuel_elements(&data.fuel)[element];
            }
            let size = before + fuel.abs() + out.abs();
            if size > 1e-9 {
                worst = worst.max(((after - before + out - fuel) / size).abs());
            }
        }
        Balance {
            mass_error_relative: (mass_error / mass_size).abs(),
            energy_error_relative: (energy_error / energy_size).abs(),
            element_error_relative: worst,
        }
    }

    fn mass_kg(&self, state: &[f64]) -> f64 {
        (0..self.building.rooms.len())
            .map(|room| {
                let at = self.building.layout.pressure(room);
                state[at + 2] + state[at + 3]
            })
            .sum()
    }

    fn gas_j(&self, state: &[f64]) -> f64 {
        let building = self.building;
        building
            .rooms
            .iter()
            .enumerate()
            .map(|(index, room)| {
                let pressure = building.ambient.pressure_pa + state[building.layout.pressure(index)];
                pressure * room.volume_m3 / (GAMMA - 1.0)
            })
            .sum()
    }

    fn energy_j(&self, state: &[f64]) -> f64 {
        let building = self.building;
        let mut sum = self.gas_j(state);
        for room in &building.rooms {
            for face in 0..SURFACES {
                let Some(chain) = room.chains[face] else { continue };
                for (node, capacity) in building.chains[chain].capacity.iter().enumerate() {
                    sum += room.areas_m2[face] * capacity * state[room.nodes[face] + node];
                }
            }
        }
        sum
    }

    /// Kilograms of an element in one kilogram of a species.
    fn share(&self, species: usize, element: usize) -> f64 {
        match species.checked_sub(PRODUCTS) {
            Some(fuel) => fuel_elements(&self.building.fuels[fuel].fuel)[element],
            None => elements(species)[element],
        }
    }

    fn element_kg(&self, state: &[f64], element: usize) -> f64 {
        let layout = &self.building.layout;
        let mut sum = 0.0;
        for room in 0..self.building.rooms.len() {
            for layer in 0..2 {
                for species in 0..self.building.species {
                    sum += state[layout.species_of(room, layer) + species] * self.share(species, element);
                }
            }
        }
        sum
    }
}
