//! Steckler's room: doors and windows, steady burner.

use sootline::fire::two_zone::{Plan, Side};

use crate::transient::data::{Row, table};
use crate::transient::inputs::{
    CALCIUM_SILICATE, CERAMIC_FIBRE, Choices, METHANE, air_at, network, position, room,
};
use crate::transient::point::{Point, Quantity, Series};
use crate::transient::profile::Tree;
use crate::transient::run::Runner;

/// The tree in the room, and the height that its archived reduction ran over.
pub const TREE: Tree = Tree {
    sensors_m: &[
        0.06, 0.17, 0.29, 0.40, 0.52, 0.63, 0.74, 0.86, 0.97, 1.09, 1.20, 1.31, 1.43, 1.54, 1.66, 1.77, 1.88,
        2.0, 2.11,
    ],
    height_m: 2.13,
};

/// Steady was half an hour (report, from memory).
const END_S: f64 = 1800.0;

pub fn points(runner: &Runner, choices: &Choices) -> Vec<Point> {
    table(include_str!("../../data/steckler1982.csv"))
        .iter()
        .filter(|row| !row.text("location").starts_with("other"))
        .flat_map(|row| test(row, runner, choices))
        .collect()
}

/// Room 2.8 × 2.8 × 2.18 m (seen); ceramic-fibre board on walls and ceiling (kind from memory); the floor is
/// taken as board of calcium silicate (assumed). Burner 0.3 m across, its top at the floor (from memory).
fn test(row: &Row, runner: &Runner, choices: &Choices) -> Vec<Point> {
    let space = room(2.8, 2.8, 2.18, choices.linings(CERAMIC_FIBRE, CALCIUM_SILICATE));
    let opening = choices.opening(
        [Side::Room(0), Side::Outside],
        row.number("width_m"),
        row.number("height_m"),
        row.number("sill_m"),
    );
    let fire = choices.burner(row.number("fuel_kw"), 0.3, 0.02, position(row.text("location")));
    let ambient_c = row.number("ambient_c");
    let network = network(vec![space], vec![opening], METHANE, fire, air_at(ambient_c));
    let name = row.text("test");
    let course = runner.run(Series::Steckler, name, &network, &Plan::every(60.0, END_S));
    let end = course.as_ref().and_then(|course| course.samples.last());
    let seen = end.map(|end| TREE.seen(&end.rooms[0]));
    let layers = |seen: Option<f64>, plain: Option<f64>| if choices.through_sensors { seen } else { plain };

    let wrong_flow = matches!(name, "242" | "542" | "544");
    let no_height = matches!(name, "41" | "541");
    let flow =
        wrong_flow.then_some("flow carries more than the heat of the fire: wrong opening, heat or flow");
    let height = no_height.then_some("velocity rows are shifted");
    let ambient_k = ambient_c + 273.15;
    let point = |quantity, measured: f64, computed| {
        Point::new(Series::Steckler, quantity, name, "steady", measured, computed)
    };

    let plain_rise = end.map(|end| end.rooms[0].upper.temperature_k - ambient_k);
    let plain_depth = end.map(|end| TREE.height_m - end.rooms[0].interface_height_m);
    let mut points = vec![
        point(
            Quantity::UpperRise,
            row.number("upper_c") - ambient_c,
            layers(seen.map(|seen| seen.upper_k - ambient_k), plain_rise),
        )
        .beside(plain_rise)
        .left_out_if(flow),
        point(
            Quantity::LayerDepth,
            TREE.height_m - row.number("interface_m"),
            layers(seen.map(|seen| TREE.height_m - seen.interface_m), plain_depth),
        )
        .beside(plain_depth)
        .left_out_if(flow.or(height)),
        point(
            Quantity::LowerRise,
            row.number("lower_c") - ambient_c,
            end.map(|end| end.rooms[0].lower.temperature_k - ambient_k),
        )
        .left_out_if(flow),
    ];
    if let Some(flow_kg_s) = row.maybe("flow_kg_s") {
        let through = end.map(|end| 0.5 * (end.openings[0].inflow_kg_s + end.openings[0].outflow_kg_s));
        points.push(point(Quantity::VentFlow, flow_kg_s, through).left_out_if(flow.or(height)));
    }
    if let Some(neutral_m) = row.maybe("neutral_plane_m") {
        let plane = end.and_then(|end| end.openings[0].neutral_plane_m);
        points.push(point(Quantity::NeutralPlane, neutral_m, plane).left_out_if(flow.or(height)));
    }
    points
}
