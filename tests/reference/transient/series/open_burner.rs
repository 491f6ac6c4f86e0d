//! The 2018 room: gas burner, door open. The room itself serves the shut and the furnished tests too.

use sootline::fire::two_zone::{Fire, Fuel, Network, Plan, Side};

use crate::transient::data::{Row, configuration, table};
use crate::transient::inputs::{CONCRETE, Choices, GYPSUM_BOARD, METHANE, air_at, network, position, room};
use crate::transient::point::{Point, Quantity, Series};
use crate::transient::profile::{Tree, dry_oxygen_volpct, layer_at};
use crate::transient::run::Runner;

/// Height of the room, m.
pub const HEIGHT_M: f64 = 2.44;
/// The mean of the four trees.
pub const TREE: Tree =
    Tree { sensors_m: &[0.34, 0.64, 0.94, 1.24, 1.54, 1.84, 2.14, 2.415], height_m: HEIGHT_M };
/// Height of the upper oxygen point: 0.6 m below the ceiling.
pub const OXYGEN_POINT_M: f64 = 1.84;
/// Molar mass of methane.
pub const METHANE_G_MOL: f64 = 16.04;

const DEPTHS: [&str; 8] = [
    "below_2p1_c",
    "below_1p8_c",
    "below_1p5_c",
    "below_1p2_c",
    "below_0p9_c",
    "below_0p6_c",
    "below_0p3_c",
    "below_0p025_c",
];

/// Readings of the tree in a row of the data, lowest first.
pub fn readings_k(row: &Row) -> Vec<f64> {
    DEPTHS.iter().map(|depth| row.number(depth) + 273.15).collect()
}

/// 3.66 × 3.66 × 2.44 m with a door of 0.90 × 2.0 m (seen on the plan). The board is not stated: the usual one.
/// The floor is taken as the concrete of the laboratory (assumed).
pub fn room_2018(open: bool, fuel: Fuel, fire: Fire, ambient_c: f64, choices: &Choices) -> Network {
    let mut space = room(3.66, 3.66, HEIGHT_M, choices.linings(GYPSUM_BOARD, CONCRETE));
    space.leakage_low_m2 = 0.5 * choices.leakage_2018_m2;
    space.leakage_high_m2 = 0.5 * choices.leakage_2018_m2;
    let mut door = choices.opening([Side::Room(0), Side::Outside], 0.9, 2.0, 0.0);
    door.open_fraction = if open { 1.0 } else { 0.0 };
    network(vec![space], vec![door], fuel, fire, air_at(ambient_c))
}

/// The burner of a row: a square top, taken as the circle of the same area.
pub fn burner(row: &Row, choices: &Choices) -> Fire {
    let diameter_m = row.number("burner_side_m") * (4.0 / std::f64::consts::PI).sqrt();
    choices.burner(row.number("fuel_kw"), diameter_m, choices.burner_top_m, position(row.text("location")))
}

pub fn points(runner: &Runner, choices: &Choices) -> Vec<Point> {
    table(include_str!("../../data/fsri2018_open_burner.csv"))
        .iter()
        .flat_map(|row| test(row, runner, choices))
        .collect()
}

fn test(row: &Row, runner: &Runner, choices: &Choices) -> Vec<Point> {
    let name = row.text("test");
    let ambient_c = row.number("ambient_c");
    let ambient_k = ambient_c + 273.15;
    let (from_s, to_s) = (row.number("window_start_s"), row.number("window_end_s"));
    let network = room_2018(true, METHANE, burner(row, choices), ambient_c, choices);
    let course = runner.run(Series::OpenBurner, name, &network, &Plan::every(5.0, to_s));
    let mean = |value: &dyn Fn(&sootline::fire::two_zone::RoomState) -> f64| {
        course.as_ref().and_then(|course| course.mean(from_s, to_s, |sample| value(&sample.rooms[0])))
    };
    let layers = |seen: Option<f64>, plain: Option<f64>| if choices.through_sensors { seen } else { plain };
    let point = |quantity, measured: f64, computed| {
        Point::new(Series::OpenBurner, quantity, name, "end of burn", measured, computed)
            .counted_as(configuration(name))
    };

    let plain_rise = mean(&|room| room.upper.temperature_k - ambient_k);
    let plain_depth = mean(&|room| HEIGHT_M - room.interface_height_m);
    vec![
        point(
            Quantity::UpperRise,
            row.number("upper_c") - ambient_c,
            layers(mean(&|room| TREE.seen(room).upper_k - ambient_k), plain_rise),
        )
        .beside(plain_rise),
        point(
            Quantity::LayerDepth,
            HEIGHT_M - row.number("interface_m"),
            layers(mean(&|room| HEIGHT_M - TREE.seen(room).interface_m), plain_depth),
        )
        .beside(plain_depth),
        point(
            Quantity::OxygenDecreaseOpen,
            20.95 - row.number("oxygen_upper_volpct"),
            mean(&|room| 20.95 - dry_oxygen_volpct(layer_at(room, OXYGEN_POINT_M), METHANE_G_MOL)),
        ),
    ]
}
