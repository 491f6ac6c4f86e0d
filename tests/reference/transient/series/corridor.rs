//! Burn room, stub, corridor: 100 kW. Report only: a remembered width, lining or heat does not fit.

use sootline::fire::two_zone::{HeatRelease, Plan, Position, Side};

use crate::transient::data::{Row, by_test};
use crate::transient::inputs::{
    CALCIUM_SILICATE, CERAMIC_FIBRE, Choices, GYPSUM_BOARD, METHANE, air_at, network, room,
};
use crate::transient::point::{Point, Quantity, Series};
use crate::transient::run::Runner;

const WHY: &str = "geometry and lining from memory, and something of it does not fit";
const COMPARED_S: [f64; 2] = [300.0, 750.0];
const HEIGHTS_M: [f64; 3] = [2.16, 2.0, 2.44];

pub fn points(runner: &Runner, choices: &Choices) -> Vec<Point> {
    by_test(include_str!("../../data/nbs1988_corridor.csv"))
        .iter()
        .flat_map(|(name, rows)| test(name, rows, runner, choices))
        .collect()
}

/// Sizes from memory (medium). Ceramic fibre in the burn room, gypsum board in the corridor (from memory, low).
fn test(name: &str, rows: &[Row], runner: &Runner, choices: &Choices) -> Vec<Point> {
    let hot = choices.linings(CERAMIC_FIBRE, CALCIUM_SILICATE);
    let board = choices.linings(GYPSUM_BOARD, GYPSUM_BOARD);
    let mut rooms = vec![
        room(2.34, 2.34, HEIGHTS_M[0], hot.clone()),
        room(1.02, 1.03, HEIGHTS_M[1], hot),
        room(12.19, 2.44, HEIGHTS_M[2], board),
    ];
    for space in &mut rooms {
        space.leakage_low_m2 = 0.005;
        space.leakage_high_m2 = 0.005;
    }
    let mut exit = choices.opening([Side::Room(2), Side::Outside], 0.76, 2.03, 0.0);
    exit.open_fraction = if name == "MV100O" { 0.0 } else { 1.0 };
    let openings = vec![
        choices.opening([Side::Room(0), Side::Room(1)], 0.81, 1.60, 0.0),
        choices.opening([Side::Room(1), Side::Room(2)], 1.02, 2.0, 0.0),
        exit,
    ];
    let mut fire = choices.burner(100.0, 0.38, 0.3, Position::Wall);
    let kw = 100.0 * choices.heat_factor;
    fire.heat_release = HeatRelease::Points(vec![(0.0, 0.0), (10.0, kw), (1e5, kw)]);
    let network = network(rooms, openings, METHANE, fire, air_at(22.0));
    let course = runner.run(Series::Corridor, name, &network, &Plan::every(10.0, COMPARED_S[1]));

    let start_c = |tree: &str| if tree == "Tree1" { 30.0 } else { 22.0 };
    let mut points = Vec::new();
    for row in rows {
        let (tree, time_s) = (row.text("tree"), row.number("time_s"));
        // Trees 1 and 4: burn room and middle of the corridor.
        let space = match tree {
            "Tree1" => 0,
            "Tree4" => 2,
            _ => continue,
        };
        if !COMPARED_S.contains(&time_s) {
            continue;
        }
        let at = |value: &dyn Fn(&sootline::fire::two_zone::RoomState) -> f64| {
            course.as_ref().and_then(|course| course.at(time_s, |sample| value(&sample.rooms[space])))
        };
        let moment = format!("{}, {time_s:.0} s", row.text("place"));
        let point = |quantity, measured, computed| {
            Point::new(Series::Corridor, quantity, name, &moment, measured, computed).left_out_if(Some(WHY))
        };
        let rise = if space == 0 { Quantity::UpperRise } else { Quantity::RemoteRise };
        points.push(point(
            rise,
            row.number("upper_c") - start_c(tree),
            at(&|room| room.upper.temperature_k - 295.15),
        ));
        points.push(point(
            Quantity::LayerDepth,
            HEIGHTS_M[space] - row.number("interface_m"),
            at(&|room| HEIGHTS_M[space] - room.interface_height_m),
        ));
    }
    points
}
