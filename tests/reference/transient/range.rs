//! The range of rooms and fires that the validation set spans, by series.
//!
//! In the numbers by which a report places a room ([`Place`]), by the same formulas.

use std::collections::BTreeMap;

use sootline::fire::flame::RoundFire;
use sootline::fire::place::{Case, NUMBERS, Place};
use sootline::fire::two_zone::{HeatRelease, Lie, Network, Opening, Side};
use sootline::fire::ventilation::{WallOpening, kawagoe_inflow_kg_s};

use super::point::Series;

/// As the record calls them, in the order of [`NUMBERS`].
pub const TITLES: [&str; 7] = [
    "fire Froude number Q*",
    "tip of the flame over height of the ceiling",
    "length over height",
    "width over height",
    "equivalence ratio",
    "opening factor A√H/A_T, √m",
    "rooms",
];

/// Lowest and highest of each number in each series.
#[derive(Clone, Debug, Default)]
pub struct Ranges(BTreeMap<(Series, usize), (f64, f64)>);

impl Ranges {
    pub fn get(&self, series: Series, number: usize) -> Option<(f64, f64)> {
        self.0.get(&(series, number)).copied()
    }

    /// Over some series together.
    pub fn over(&self, series: &[Series], number: usize) -> Option<(f64, f64)> {
        series
            .iter()
            .filter_map(|&series| self.get(series, number))
            .reduce(|(low, high), (lower, higher)| (low.min(lower), high.max(higher)))
    }

    /// Takes a test in.
    pub fn add(&mut self, series: Series, network: &Network) {
        let Some(place) = place(network) else {
            return;
        };
        let numbers = [
            Some(place.fire_froude),
            Some(place.flame_over_height),
            Some(place.length_over_height),
            Some(place.width_over_height),
            place.equivalence_ratio,
            Some(place.opening_factor_m1_2),
            Some(place.rooms),
        ];
        for (number, value) in numbers.into_iter().enumerate() {
            if let Some(value) = value {
                let range = self.0.entry((series, number)).or_insert((value, value));
                *range = (range.0.min(value), range.1.max(value));
            }
        }
    }
}

/// Names and titles, in order.
pub fn numbers() -> impl Iterator<Item = (usize, &'static str, &'static str)> {
    NUMBERS.into_iter().zip(TITLES).enumerate().map(|(number, (key, title))| (number, key, title))
}

fn place(network: &Network) -> Option<Place> {
    let fire = network.fires.first()?;
    let room = &network.rooms[fire.room];
    let heat_release_kw = match &fire.heat_release {
        HeatRelease::Points(points) => points.iter().map(|&(_, kw)| kw).fold(0.0, f64::max),
        HeatRelease::Grown(grown) => grown.peak_kw,
    };
    let here = |side: &Side| *side == Side::Room(fire.room);
    let open: Vec<&Opening> = network
        .openings
        .iter()
        .filter(|opening| {
            opening.lie == Lie::Vertical && opening.open_fraction > 0.0 && opening.between.iter().any(here)
        })
        .collect();
    let area = |opening: &Opening| opening.open_fraction * opening.width_m * opening.height_m;
    let area_m2: f64 = open.iter().map(|opening| area(opening)).sum();
    let area_height: f64 = open.iter().map(|opening| area(opening) * opening.height_m).sum();
    let opening = WallOpening { area_m2, height_m: if area_m2 > 0.0 { area_height / area_m2 } else { 0.0 } };
    let blown_m3_s: f64 =
        network.fans.iter().filter(|fan| here(&fan.to)).map(|fan| fan.volume_flow_m3_s).sum();
    let inflow_kg_s = kawagoe_inflow_kg_s(opening) + blown_m3_s * 353.0 / network.ambient.temperature_k;
    Some(Place::of(&Case {
        length_m: room.length_m.max(room.width_m),
        width_m: room.length_m.min(room.width_m),
        height_m: room.height_m,
        fire: RoundFire { heat_release_kw, diameter_m: fire.diameter_m },
        base_height_m: fire.base_height_m,
        opening,
        inflow_kg_s,
        rooms: u32::try_from(network.rooms.len()).ok()?,
    }))
}
