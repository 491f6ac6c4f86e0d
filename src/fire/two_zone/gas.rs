//! The gas: one ideal gas of constant heats, and the species it carries.

use super::network::Fuel;
use super::outcome::Composition;

/// Ratio of the heats of air.
pub(super) const GAMMA: f64 = 1.4;
/// Gas constant of air, J/(kg K).
pub(super) const GAS_CONSTANT_J_KGK: f64 = 287.05;
/// Specific heat at constant pressure, J/(kg K): `γ R/(γ - 1)`, 1004.7.
pub(super) const SPECIFIC_HEAT_J_KGK: f64 = GAMMA * GAS_CONSTANT_J_KGK / (GAMMA - 1.0);
/// Stefan-Boltzmann constant, W/(m² K⁴).
pub(super) const STEFAN_BOLTZMANN_W_M2K4: f64 = 1000.0 * crate::fire::constants::STEFAN_BOLTZMANN_KW_M2K4;

/// Where each species stands in a layer's list; the fuels follow.
pub(super) const OXYGEN: usize = 0;
pub(super) const CARBON_DIOXIDE: usize = 1;
pub(super) const WATER: usize = 2;
pub(super) const CARBON_MONOXIDE: usize = 3;
pub(super) const HYDROGEN_CYANIDE: usize = 4;
pub(super) const SOOT: usize = 5;
/// Species that are not fuels.
pub(super) const PRODUCTS: usize = 6;
/// Most fuels one run may burn.
pub const FUELS_MAX: usize = 4;
/// Most species of a layer.
pub(super) const SPECIES_MAX: usize = PRODUCTS + FUELS_MAX;

/// Molar masses, g/mol: IUPAC, abridged.
pub(super) mod molar {
    pub(in super::super) const CARBON: f64 = 12.011;
    pub(in super::super) const HYDROGEN: f64 = 1.008;
    pub(in super::super) const OXYGEN: f64 = 15.999;
    pub(in super::super) const NITROGEN: f64 = 14.007;
}

/// Elements of one kilogram of a product, kg: carbon, hydrogen, oxygen, nitrogen.
pub(super) fn elements(product: usize) -> [f64; 4] {
    use molar::{CARBON as C, HYDROGEN as H, NITROGEN as N, OXYGEN as O};
    let shares = |carbon: f64, hydrogen: f64, oxygen: f64, nitrogen: f64| {
        let whole = carbon * C + hydrogen * H + oxygen * O + nitrogen * N;
        [carbon * C / whole, hydrogen * H / whole, oxygen * O / whole, nitrogen * N / whole]
    };
    match product {
        OXYGEN => [0.0, 0.0, 1.0, 0.0],
        CARBON_DIOXIDE => shares(1.0, 0.0, 2.0, 0.0),
        WATER => shares(0.0, 2.0, 1.0, 0.0),
        CARBON_MONOXIDE => shares(1.0, 0.0, 1.0, 0.0),
        HYDROGEN_CYANIDE => shares(1.0, 1.0, 0.0, 1.0),
        SOOT => [1.0, 0.0, 0.0, 0.0],
        _ => [0.0; 4],
    }
}

/// Elements of one kilogram of a fuel, kg, as [`elements`].
pub(super) fn fuel_elements(fuel: &Fuel) -> [f64; 4] {
    [fuel.carbon, fuel.hydrogen, fuel.oxygen, fuel.nitrogen]
}

/// The list of masses of a layer as named fractions.
///
/// Where there is no nitrogen left (a layer of fuel gas alone) species and mass, each held to the tolerance of the
/// steps, may disagree by it: the species are then the whole.
pub(super) fn composition(species_kg: &[f64], mass_kg: f64) -> Composition {
    let whole_kg = mass_kg.max(species_kg.iter().map(|kg| kg.max(0.0)).sum());
    let share = |kg: f64| (kg / whole_kg).clamp(0.0, 1.0);
    Composition {
        oxygen: share(species_kg[OXYGEN]),
        carbon_dioxide: share(species_kg[CARBON_DIOXIDE]),
        water: share(species_kg[WATER]),
        carbon_monoxide: share(species_kg[CARBON_MONOXIDE]),
        hydrogen_cyanide: share(species_kg[HYDROGEN_CYANIDE]),
        soot: share(species_kg[SOOT]),
        unburned_fuel: share(species_kg[PRODUCTS..].iter().sum()),
    }
}
