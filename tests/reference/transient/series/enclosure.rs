//! The LLNL enclosure: methane burner with a fan, or shut.

use sootline::fire::two_zone::{Network, Plan, Position, RoomState, Side};

use crate::transient::data::{Row, by_test};
use crate::transient::inputs::{Choices, METHANE, REFRACTORY, air_at, fan, network, room};
use crate::transient::point::{Point, Quantity, Series};
use crate::transient::profile::dry_oxygen_volpct;
use crate::transient::run::{Runner, mean_k};
use crate::transient::series::open_burner::METHANE_G_MOL;

const HEIGHT_M: f64 = 4.5;
/// Cracks of the shut enclosure, m²: built to hold pressure (assumed).
const LEAKAGE_M2: f64 = 0.001;

/// Why a reading of a divided enclosure up to [`LAGS_UNTIL_S`] does not count.
pub const LAGS: &str =
    "sampling lag: enclosure divided (west upper below west middle) and row not later than 500 s";
/// Up to then, s, the oxygen of a divided enclosure lags behind.
pub const LAGS_UNTIL_S: f64 = 500.0;

/// A plenum divides the enclosure: its upper thermocouples are cooler than those in the middle.
pub fn divided(row: &Row) -> bool {
    row.number("west_upper_c") < row.number("west_middle_c")
}

pub fn points(runner: &Runner, choices: &Choices) -> Vec<Point> {
    by_test(include_str!("../../data/llnl1986_enclosure.csv"))
        .iter()
        .flat_map(|(name, rows)| test(name, rows, runner, choices))
        .collect()
}

/// 6.0 × 4.0 × 4.5 m of refractory (memory, medium). Air comes in 0.1 m above the floor; gas leaves through a
/// duct 3.6 m above it (from memory; some tests drew low). The flow of the exhaust was measured by mass: what
/// it draws less the fuel is blown in cold, and leaves through an opening too small for a counterflow.
fn built(rows: &[Row], choices: &Choices) -> Network {
    let last = &rows[rows.len() - 1];
    let mut space = room(6.0, 4.0, HEIGHT_M, choices.linings(REFRACTORY, REFRACTORY));
    space.leakage_low_m2 = 0.5 * LEAKAGE_M2;
    space.leakage_high_m2 = 0.5 * LEAKAGE_M2;
    let ambient = air_at(rows[0].number("west_mean_c"));
    let fire = choices.burner(last.number("fuel_g_s") * 50.0, 0.57, 0.2, Position::Centre);
    let air_g_s = last.number("air_g_s");
    if air_g_s <= 0.0 {
        return network(vec![space], vec![], METHANE, fire, ambient);
    }
    let duct = choices.opening([Side::Room(0), Side::Outside], 0.4, 0.15, 3.525);
    let inlet_m3_s = (air_g_s - last.number("fuel_g_s")) / 1000.0 * ambient.temperature_k / 353.0;
    let mut network = network(vec![space], vec![duct], METHANE, fire, ambient);
    network.fans = vec![fan(Side::Outside, Side::Room(0), inlet_m3_s, 0.1)];
    network
}

/// Mean of both layers by mass: where the oxygen was drawn is not known, and the enclosure is well stirred.
fn oxygen_volpct(room: &RoomState) -> f64 {
    let (upper, lower) = (&room.upper, &room.lower);
    let mass_kg = upper.mass_kg + lower.mass_kg;
    let of = |layer| dry_oxygen_volpct(layer, METHANE_G_MOL) * layer.mass_kg;
    (of(upper) + of(lower)) / mass_kg
}

fn test(name: &str, rows: &[Row], runner: &Runner, choices: &Choices) -> Vec<Point> {
    let (first, last) = (&rows[0], &rows[rows.len() - 1]);
    let forced = last.number("air_g_s") > 0.0;
    let network = built(rows, choices);
    let time_s = last.number("time_s");
    let burn_end_s = last.number("burn_end_s");
    let course = runner.run(
        Series::Enclosure,
        name,
        &network,
        &Plan::every(20.0, if forced { time_s } else { burn_end_s.max(time_s) }),
    );
    let course = course.as_ref();
    let moment = format!("{time_s:.0} s");
    let left_out = if !forced && matches!(name, "51" | "52" | "55" | "60" | "61" | "62" | "63" | "64") {
        Some("not truly shut: oxygen levels off")
    } else if matches!(name, "43" | "45" | "47" | "48") {
        Some("sampling lag")
    } else if !forced {
        Some(
            "oxygen falls about 23 % slower than the nominal methane would: heat, volume or probe place unknown",
        )
    } else {
        None
    };
    let point = |quantity, measured, computed| {
        Point::new(Series::Enclosure, quantity, name, &moment, measured, computed).left_out_if(left_out)
    };

    // The lag is one of the gas sample: temperatures count.
    let lags = (forced && divided(last) && time_s <= LAGS_UNTIL_S).then_some(LAGS);
    let quantity =
        if forced { Quantity::OxygenDecreaseForced } else { Quantity::OxygenDecreaseEnclosureShut };
    let decrease = 100.0 * (first.number("oxygen_mol") - last.number("oxygen_mol"));
    // Gas leaves by the duct out of the upper layer: that is what its analyser sees.
    let computed = course.and_then(|course| {
        course.at(time_s, |sample| {
            let room = &sample.rooms[0];
            20.95 - if forced { dry_oxygen_volpct(&room.upper, METHANE_G_MOL) } else { oxygen_volpct(room) }
        })
    });
    let start_k = first.number("west_mean_c") + 273.15;
    let measured_rise = 0.5 * (last.number("west_mean_c") + last.number("east_mean_c"))
        - 0.5 * (first.number("west_mean_c") + first.number("east_mean_c"));
    let rise =
        course.and_then(|course| course.at(time_s, |sample| mean_k(&sample.rooms[0], HEIGHT_M) - start_k));
    vec![
        point(quantity, decrease, computed).left_out_if(left_out.or(lags)),
        point(Quantity::MeanRiseEnclosure, measured_rise, rise),
    ]
}
