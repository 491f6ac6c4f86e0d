//! The range of rooms and fires that the validation set spans, by series.

use std::collections::BTreeMap;

use sootline::fire::two_zone::{HeatRelease, Lie, Network, Sample, Side};

use super::point::Series;

/// A measure of a test, as validation ranges are stated.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Measure {
    FireFroude,
    FlameOverHeight,
    LengthOverHeight,
    WidthOverHeight,
    EquivalenceRatio,
    OpeningFactor,
    Rooms,
}

impl Measure {
    pub const ALL: [Self; 7] = [
        Self::FireFroude,
        Self::FlameOverHeight,
        Self::LengthOverHeight,
        Self::WidthOverHeight,
        Self::EquivalenceRatio,
        Self::OpeningFactor,
        Self::Rooms,
    ];

    pub const fn key(self) -> &'static str {
        match self {
            Self::FireFroude => "fire_froude",
            Self::FlameOverHeight => "flame_over_height",
            Self::LengthOverHeight => "length_over_height",
            Self::WidthOverHeight => "width_over_height",
            Self::EquivalenceRatio => "equivalence_ratio",
            Self::OpeningFactor => "opening_factor_m05",
            Self::Rooms => "rooms",
        }
    }

    pub const fn title(self) -> &'static str {
        match self {
            Self::FireFroude => "fire Froude number Q*",
            Self::FlameOverHeight => "flame length over height to the ceiling",
            Self::LengthOverHeight => "length over height",
            Self::WidthOverHeight => "width over height",
            Self::EquivalenceRatio => "greatest equivalence ratio",
            Self::OpeningFactor => "opening factor A√H/A_T, m^½",
            Self::Rooms => "rooms",
        }
    }
}

/// Lowest and highest of each measure in each series.
#[derive(Clone, Debug, Default)]
pub struct Ranges(BTreeMap<(Series, Measure), (f64, f64)>);

impl Ranges {
    pub fn get(&self, series: Series, measure: Measure) -> Option<(f64, f64)> {
        self.0.get(&(series, measure)).copied()
    }

    /// Over some series together.
    pub fn over(&self, series: &[Series], measure: Measure) -> Option<(f64, f64)> {
        series
            .iter()
            .filter_map(|&series| self.get(series, measure))
            .reduce(|(low, high), (lower, higher)| (low.min(lower), high.max(higher)))
    }

    /// Takes a run in.
    pub fn add(&mut self, series: Series, network: &Network, samples: &[Sample]) {
        let Some(fire) = network.fires.first() else {
            return;
        };
        let room = &network.rooms[fire.room];
        let peak_kw = match &fire.heat_release {
            HeatRelease::Points(points) => points.iter().map(|&(_, kw)| kw).fold(0.0, f64::max),
            HeatRelease::Grown(grown) => grown.peak_kw,
        };
        // Q* = Q / (ρ c T √g D^2.5) = Q / (1110 D^2.5) at 20 °C, as printed in NUREG-1934 (from memory). Flame:
        // Heskestad's 0.235 Q^0.4 - 1.02 D.
        let froude = peak_kw / (1110.0 * fire.diameter_m.powf(2.5));
        let flame_m = (0.235 * peak_kw.powf(0.4) - 1.02 * fire.diameter_m).max(0.0);
        let (length_m, width_m) = (room.length_m.max(room.width_m), room.length_m.min(room.width_m));
        let surface_m2 = 2.0 * (length_m * width_m + (length_m + width_m) * room.height_m);
        let mine = |side: &Side| *side == Side::Room(fire.room);
        let opening: f64 = network
            .openings
            .iter()
            .filter(|opening| opening.lie == Lie::Vertical && opening.between.iter().any(mine))
            .map(|opening| {
                opening.open_fraction * opening.width_m * opening.height_m * opening.height_m.sqrt()
            })
            .sum();
        // The plume of a dying flame draws nothing: finite ratios only.
        let equivalence = samples
            .iter()
            .map(|sample| sample.rooms[fire.room].equivalence_ratio)
            .filter(|ratio| ratio.is_finite())
            .fold(0.0, f64::max);
        self.take(series, Measure::FireFroude, froude);
        self.take(series, Measure::FlameOverHeight, flame_m / (room.height_m - fire.base_height_m));
        self.take(series, Measure::LengthOverHeight, length_m / room.height_m);
        self.take(series, Measure::WidthOverHeight, width_m / room.height_m);
        self.take(series, Measure::EquivalenceRatio, equivalence);
        self.take(series, Measure::OpeningFactor, opening / surface_m2);
        self.take(series, Measure::Rooms, super::run::count(network.rooms.len()));
    }

    fn take(&mut self, series: Series, measure: Measure, value: f64) {
        let range = self.0.entry((series, measure)).or_insert((value, value));
        *range = (range.0.min(value), range.1.max(value));
    }
}
