//! What each open input is worth: one varied at a time, the rest as chosen.

use super::inputs::Choices;
use super::point::{Point, Quantity, Series};
use super::run::Engine;
use super::statistics::of_series;

/// A variation of the inputs.
pub struct Variation {
    pub name: &'static str,
    pub vary: fn(&mut Choices),
}

pub const VARIATIONS: [Variation; 14] = [
    Variation { name: "burner top at 0.3 m (2018 room)", vary: |choices| choices.burner_top_m = 0.3 },
    Variation { name: "burner top at 0.7 m (2018 room)", vary: |choices| choices.burner_top_m = 0.7 },
    Variation { name: "methane radiates 0.14", vary: |choices| choices.methane_radiates = 0.14 },
    Variation { name: "methane radiates 0.30", vary: |choices| choices.methane_radiates = 0.30 },
    Variation { name: "furniture radiates 0.45", vary: |choices| choices.furniture_radiates = 0.45 },
    Variation { name: "lining conductivity × 0.7", vary: |choices| choices.lining_factor = 0.7 },
    Variation { name: "lining conductivity × 1.5", vary: |choices| choices.lining_factor = 1.5 },
    Variation { name: "discharge coefficient 0.63", vary: |choices| choices.discharge_coefficient = 0.63 },
    Variation { name: "heat release × 0.9", vary: |choices| choices.heat_factor = 0.9 },
    Variation { name: "heat release × 1.1", vary: |choices| choices.heat_factor = 1.1 },
    Variation { name: "leakage 0.015 m² (2018 room shut)", vary: |choices| choices.leakage_2018_m2 = 0.015 },
    Variation {
        name: "oxygen points read undried gas (2018 room)",
        vary: |choices| choices.oxygen_dried = false,
    },
    Variation { name: "hood lag 15 s (furniture)", vary: |choices| choices.hood_lag_s = 15.0 },
    Variation {
        name: "layers of the engine, not seen by sensors",
        vary: |choices| choices.through_sensors = false,
    },
];

/// What is watched: quantity and series.
pub const WATCHED: [(Quantity, Series); 14] = [
    (Quantity::UpperRise, Series::Steckler),
    (Quantity::UpperRise, Series::OpenBurner),
    (Quantity::UpperRise, Series::LargeRoom),
    (Quantity::UpperRise, Series::Furniture),
    (Quantity::LayerDepth, Series::Steckler),
    (Quantity::LayerDepth, Series::OpenBurner),
    (Quantity::VentFlow, Series::Steckler),
    (Quantity::OxygenDecreaseForced, Series::Enclosure),
    (Quantity::OxygenDecreaseShut, Series::ShutBurner),
    (Quantity::OxygenFallShut, Series::ShutBurner),
    (Quantity::MeanRiseShut, Series::ShutBurner),
    (Quantity::ExtinctionTime, Series::ShutBurner),
    (Quantity::TimeTo500, Series::Furniture),
    (Quantity::PeakRise, Series::Furniture),
];

/// Bias of each watched quantity under a variation.
pub fn biases(engine: &Engine, choices: &Choices) -> Vec<Option<f64>> {
    let mut series: Vec<Series> = WATCHED.iter().map(|&(_, series)| series).collect();
    series.sort_unstable();
    series.dedup();
    let points = super::validate(&series, engine, choices).points;
    WATCHED
        .iter()
        .map(|&(quantity, series)| {
            of_series(&points, quantity, series, &Point::ratio).map(|spread| spread.bias)
        })
        .collect()
}
