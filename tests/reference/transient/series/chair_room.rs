//! A chair in a room with one wide window. Report only: geometry from memory (low).

use sootline::fire::two_zone::{Fire, HeatRelease, Ignition, Plan, Position, Side, Supply};

use crate::transient::data::table;
use crate::transient::inputs::{CONCRETE, Choices, FOAM, GYPSUM_BOARD, air_at, network, room};
use crate::transient::point::{Point, Quantity, Series};
use crate::transient::run::Runner;

const WHY: &str = "geometry from memory (low)";
const COMPARED_S: [f64; 4] = [400.0, 500.0, 600.0, 800.0];
const HEIGHT_M: f64 = 2.31;

/// 2.26 × 3.94 × 2.31 m; window 2.0 × 1.13 m, 0.31 m below the ceiling.
pub fn points(runner: &Runner, choices: &Choices) -> Vec<Point> {
    let rows = table(include_str!("../../data/nbs1984_chair_room.csv"));
    let space = room(3.94, 2.26, HEIGHT_M, choices.linings(GYPSUM_BOARD, CONCRETE));
    let window = choices.opening([Side::Room(0), Side::Outside], 2.0, 1.13, HEIGHT_M - 0.31 - 1.13);
    let curve = rows
        .iter()
        .map(|row| (row.number("time_s"), row.number("heat_release_kw").max(0.0) * choices.heat_factor))
        .collect();
    let fire = Fire {
        room: 0,
        fuel: 0,
        heat_release: HeatRelease::Points(curve),
        base_height_m: 0.4,
        diameter_m: 1.0,
        position: Position::Centre,
        radiative_fraction: choices.furniture_radiates,
        oxygen_limited: true,
        supply: Supply::HeatFed { without_flame: 0.1, fades_s: 60.0 },
        ignites: Ignition::At(0.0),
    };
    let network = network(vec![space], vec![window], FOAM, fire, air_at(22.0));
    let course = runner.run(Series::ChairRoom, "1", &network, &Plan::every(10.0, COMPARED_S[3]));
    let mut points = Vec::new();
    for time_s in COMPARED_S {
        let Some(row) = rows.iter().find(|row| (row.number("time_s") - time_s).abs() < 5.0) else {
            continue;
        };
        let at = |value: &dyn Fn(&sootline::fire::two_zone::Sample) -> f64| {
            course.as_ref().and_then(|course| course.at(time_s, value))
        };
        let moment = format!("{time_s:.0} s");
        let point = |quantity, measured, computed| {
            Point::new(Series::ChairRoom, quantity, "1", &moment, measured, computed).left_out_if(Some(WHY))
        };
        let both = |a: &str, b: &str| 0.5 * (row.number(a) + row.number(b));
        points.push(point(
            Quantity::UpperRise,
            both("upper_a_c", "upper_b_c") - 22.0,
            at(&|sample| sample.rooms[0].upper.temperature_k - 295.15),
        ));
        points.push(point(
            Quantity::VentFlow,
            both("inflow_kg_s", "outflow_kg_s"),
            at(&|sample| 0.5 * (sample.openings[0].inflow_kg_s + sample.openings[0].outflow_kg_s)),
        ));
        points.push(point(
            Quantity::LayerDepth,
            HEIGHT_M - both("interface_a_m", "interface_b_m"),
            at(&|sample| HEIGHT_M - sample.rooms[0].interface_height_m),
        ));
    }
    points
}
