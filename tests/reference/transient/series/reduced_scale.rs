//! The room at 2/5 scale: more gas than the door lets burn. Report only: geometry from memory.

use sootline::fire::two_zone::{Plan, Position, Side};

use crate::transient::data::table;
use crate::transient::inputs::{CALCIUM_SILICATE, Choices, METHANE, air_at, network, room};
use crate::transient::point::{Point, Quantity, Series};
use crate::transient::profile::dry_oxygen_volpct;
use crate::transient::run::{Runner, count};
use crate::transient::series::open_burner::METHANE_G_MOL;

const WHY: &str = "geometry from memory; only that oxygen runs out above 250 kW is sure";
const FIRES_KW: [f64; 4] = [50.0, 200.0, 400.0, 600.0];
/// Readings within this of a fire count for it, kW.
const NEAR_KW: f64 = 20.0;

/// 0.98 × 1.46 × 0.98 m, door 0.48 × 0.81 m, board of calcium silicate (memory, medium); burner 0.18 m across,
/// 0.15 m high (memory, low).
pub fn points(runner: &Runner, choices: &Choices) -> Vec<Point> {
    let rows = table(include_str!("../../data/nist1994_reduced_scale.csv"));
    let mut points = Vec::new();
    for kw in FIRES_KW {
        let name = format!("{kw:.0} kW");
        let space = room(1.46, 0.98, 0.98, choices.linings(CALCIUM_SILICATE, CALCIUM_SILICATE));
        let door = choices.opening([Side::Room(0), Side::Outside], 0.48, 0.81, 0.0);
        let fire = choices.burner(kw, 0.18, 0.15, Position::Centre);
        let network = network(vec![space], vec![door], METHANE, fire, air_at(20.0));
        let course = runner.run(Series::ReducedScale, &name, &network, &Plan::every(10.0, 900.0));
        let end = course.as_ref().and_then(|course| course.samples.last());
        let measured = |kind: &str| {
            let near: Vec<f64> = rows
                .iter()
                .filter(|row| {
                    row.text("quantity").starts_with(kind) && (row.number("fuel_kw") - kw).abs() <= NEAR_KW
                })
                .map(|row| row.number("value"))
                .collect();
            near.iter().sum::<f64>() / count(near.len())
        };
        let point = |quantity, measured, computed| {
            Point::new(Series::ReducedScale, quantity, &name, "steady", measured, computed)
                .left_out_if(Some(WHY))
        };
        points.push(point(
            Quantity::UpperRise,
            measured("T_") - 20.0,
            end.map(|end| end.rooms[0].upper.temperature_k - 293.15),
        ));
        points.push(point(
            Quantity::OxygenLeft,
            100.0 * measured("O2_"),
            end.map(|end| dry_oxygen_volpct(&end.rooms[0].upper, METHANE_G_MOL)),
        ));
    }
    points
}
