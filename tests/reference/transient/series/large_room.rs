//! The large room: heptane spray, door open or shut, fans on or off.

use sootline::fire::two_zone::{HeatRelease, Plan, Position, Side};

use crate::transient::data::{Row, by_test};
use crate::transient::inputs::{
    CALCIUM_SILICATE, Choices, GYPSUM_BOARD, HEPTANE, TOLUENE, air_at, fan, network, room,
};
use crate::transient::point::{Point, Quantity, Series};
use crate::transient::run::Runner;

const HEIGHT_M: f64 = 3.82;
/// The spray came up within 150 to 180 s (from memory): middle.
const RAMP_S: f64 = 165.0;
/// Ramps differ from test to test: compared from here on.
const FROM_S: f64 = 180.0;
/// Share radiated by the spray, as reported (from memory).
const HEPTANE_RADIATES: f64 = 0.44;
/// Cracks of the shut room, m²; measured by the laboratory in this order (from memory, low).
const LEAKAGE_M2: f64 = 0.06;
/// Supply and exhaust, m³/s, 2.4 m above the floor (from memory).
const FANS_M3_S: f64 = 1.0;
const FANS_HEIGHT_M: f64 = 2.4;

pub fn points(runner: &Runner, choices: &Choices) -> Vec<Point> {
    by_test(include_str!("../../data/nist2006_large_room.csv"))
        .iter()
        .flat_map(|(name, rows)| test(name, rows, runner, choices))
        .collect()
}

/// Ambient stands in no row. The lower layer warms with the heat let off so far, which grows with the square
/// of time while the spray comes up: a third of its warming from 60 to 120 s is taken off its value at 60 s.
fn ambient_c(rows: &[Row]) -> f64 {
    let (at_60_c, at_120_c) = (rows[0].number("lower_c"), rows[1].number("lower_c"));
    at_60_c - (at_120_c - at_60_c) / 3.0
}

/// 21.66 × 7.04 × 3.82 m, 12.7 mm board, door 2.0 × 2.0 m (memory, medium); gypsum board on the floor (memory,
/// low). The spray over a pan of 1 × 2 m is taken as a circle of the same area.
fn test(name: &str, rows: &[Row], runner: &Runner, choices: &Choices) -> Vec<Point> {
    let first = &rows[0];
    let open = first.text("door") == "open";
    let ambient_c = ambient_c(rows);
    let ambient_k = ambient_c + 273.15;
    let peak = rows.iter().find(|row| row.text("label") == "peak").unwrap_or(first);
    let stop_s = peak.number("time_s");

    let mut space = room(21.66, 7.04, HEIGHT_M, choices.linings(CALCIUM_SILICATE, GYPSUM_BOARD));
    space.leakage_low_m2 = 0.5 * LEAKAGE_M2;
    space.leakage_high_m2 = 0.5 * LEAKAGE_M2;
    let mut door = choices.opening([Side::Room(0), Side::Outside], 2.0, 2.0, 0.0);
    door.open_fraction = if open { 1.0 } else { 0.0 };
    let kw = first.number("fuel_kw") * choices.heat_factor;
    let mut fire = choices.burner(kw, 1.6, 0.1, Position::Centre);
    fire.heat_release = HeatRelease::Points(vec![(0.0, 0.0), (RAMP_S, kw), (1e5, kw)]);
    fire.radiative_fraction = HEPTANE_RADIATES;
    let fuel = if name == "17" { TOLUENE } else { HEPTANE };
    let mut network = network(vec![space], vec![door], fuel, fire, air_at(ambient_c));
    if first.text("fans") == "on" {
        network.fans = vec![
            fan(Side::Outside, Side::Room(0), FANS_M3_S, FANS_HEIGHT_M),
            fan(Side::Room(0), Side::Outside, FANS_M3_S, FANS_HEIGHT_M),
        ];
    }
    let course = runner.run(Series::LargeRoom, name, &network, &Plan::every(10.0, stop_s));

    let left_out = (name == "17")
        .then_some("toluene: the heat release is that of the fuel, of which it burns an unknown share");
    let filled_s = filled_s(rows, stop_s);
    let mut points = Vec::new();
    for row in rows {
        let time_s = row.number("time_s");
        let compared = if open { FROM_S } else { filled_s };
        if time_s < compared || time_s > stop_s {
            continue;
        }
        let moment = format!("{time_s:.0} s");
        let at = |value: &dyn Fn(&sootline::fire::two_zone::RoomState) -> f64| {
            course.as_ref().and_then(|course| course.at(time_s, |sample| value(&sample.rooms[0])))
        };
        let point = |quantity, measured, computed| {
            Point::new(Series::LargeRoom, quantity, name, &moment, measured, computed).left_out_if(left_out)
        };
        points.push(point(
            Quantity::UpperRise,
            row.number("upper_c") - ambient_c,
            at(&|room| room.upper.temperature_k - ambient_k),
        ));
        points.push(point(
            Quantity::LowerRise,
            row.number("lower_c") - ambient_c,
            at(&|room| room.lower.temperature_k - ambient_k),
        ));
        if open {
            points.push(point(
                Quantity::LayerDepth,
                HEIGHT_M - row.number("interface_m"),
                at(&|room| HEIGHT_M - room.interface_height_m),
            ));
        }
    }
    points
}

/// When a shut room was full: the row of its lowest interface while the fuel ran.
fn filled_s(rows: &[Row], stop_s: f64) -> f64 {
    rows.iter()
        .filter(|row| row.number("time_s") <= stop_s && row.text("label") != "peak")
        .min_by(|a, b| a.number("interface_m").total_cmp(&b.number("interface_m")))
        .map_or(0.0, |row| row.number("time_s"))
}
