//! The 2018 room: gas burner, door shut, until the gas was turned off or the flame died.

use sootline::fire::two_zone::{Layer, Plan, RoomState};

use crate::transient::data::{Row, by_test, configuration};
use crate::transient::inputs::{Choices, METHANE};
use crate::transient::point::{Point, Quantity, Series};
use crate::transient::profile::{layer_at, oxygen_volpct};
use crate::transient::run::{Runner, mean_k};
use crate::transient::series::open_burner::{HEIGHT_M, METHANE_G_MOL, OXYGEN_POINT_M, burner, room_2018};

pub const DATA: &str = include_str!("../../data/fsri2018_closed_burner.csv");
/// Times at which the course is compared, s.
const COURSE_S: [f64; 4] = [60.0, 120.0, 180.0, 240.0];
/// A flame that has not died by then never does.
const END_S: f64 = 1800.0;

pub fn points(runner: &Runner, choices: &Choices) -> Vec<Point> {
    by_test(DATA).iter().flat_map(|(name, rows)| test(name, rows, runner, choices)).collect()
}

/// Decrease of oxygen at the two points, 0.6 and 1.8 m below the ceiling, where both were read.
pub fn both_points_volpct(row: &Row) -> Option<[f64; 2]> {
    let decrease = |column| row.maybe(column).map(|left: f64| 20.95 - left);
    Some([decrease("oxygen_upper_volpct")?, decrease("oxygen_lower_volpct")?])
}

/// Leakage is not stated; an opening of 0.03 m² fits the pressure at 60 s.
fn test(name: &str, rows: &[Row], runner: &Runner, choices: &Choices) -> Vec<Point> {
    let first = &rows[0];
    let ambient_c = first.number("ambient_c");
    let ambient_k = ambient_c + 273.15;
    let fuel_kw = first.number("fuel_kw");
    let network = room_2018(false, METHANE, burner(first, choices), ambient_c, choices);
    let course = runner.run(Series::ShutBurner, name, &network, &Plan::every(5.0, END_S));
    let course = course.as_ref();
    let oxygen = |layer: &Layer| oxygen_volpct(layer, METHANE_G_MOL, choices.oxygen_dried);
    let lagged = |time_s: f64, value: &dyn Fn(&RoomState) -> f64| {
        course.and_then(|course| {
            course.at(time_s - choices.oxygen_lag_s, |sample| 20.95 - value(&sample.rooms[0]))
        })
    };
    let at_point = |room: &RoomState| oxygen(layer_at(room, OXYGEN_POINT_M));
    // By volume, as the mean of two points that lie evenly about the middle of the height.
    let of_room = |room: &RoomState| {
        let below = (room.interface_height_m / HEIGHT_M).clamp(0.0, 1.0);
        oxygen(&room.lower) * below + oxygen(&room.upper) * (1.0 - below)
    };
    let point = |quantity, moment: &str, measured, computed| {
        Point::new(Series::ShutBurner, quantity, name, moment, measured, computed)
            .counted_as(configuration(name))
    };
    let burning = |row: &Row| row.number("time_s") < row.number("burner_off_s");

    let mut points = Vec::new();
    for row in rows.iter().filter(|row| COURSE_S.contains(&row.number("time_s")) && burning(row)) {
        let time_s = row.number("time_s");
        let moment = format!("{time_s:.0} s");
        let rise = course
            .and_then(|course| course.at(time_s, |sample| mean_k(&sample.rooms[0], HEIGHT_M) - ambient_k));
        points.push(point(Quantity::MeanRiseShut, &moment, row.number("mean_c") - ambient_c, rise));
        let low = course
            .and_then(|course| course.at(time_s, |sample| sample.rooms[0].lower.temperature_k - ambient_k));
        points.push(point(Quantity::LowerRise, &moment, row.number("lower_c") - ambient_c, low));
        if let Some([upper, lower]) = both_points_volpct(row) {
            points.push(point(Quantity::OxygenDecreaseShut, &moment, upper, lagged(time_s, &at_point)));
            let mean = 0.5 * (upper + lower);
            points.push(point(Quantity::OxygenMeanShut, &moment, mean, lagged(time_s, &of_room)));
        }
    }
    if fuel_kw < 200.0
        && let Some((measured, computed)) = fall(&points)
    {
        points.push(point(Quantity::OxygenFallShut, "180 to 240 s", measured, computed));
    }
    if let Some(last) = rows.iter().find(|row| row.number("before_off") > 0.5)
        && last.number("self_extinguished") > 0.5
    {
        let out_s = course.and_then(|course| course.went_out_s(fuel_kw));
        points.push(point(Quantity::ExtinctionTime, "flame out", last.number("burner_off_s"), out_s));
        if let Some(measured) = last.maybe("oxygen_upper_volpct") {
            // The row stands 5 s before the end; so does what is read of the run.
            let left =
                out_s.and_then(|out_s| lagged(out_s - 5.0, &at_point)).map(|decrease| 20.95 - decrease);
            points.push(point(Quantity::ExtinctionOxygen, "5 s before", measured, left));
        }
    }
    points
}

/// How far the mean fell from 180 to 240 s, measured and computed: blind to lag and to where in the profile a point
/// lies.
fn fall(points: &[Point]) -> Option<(f64, Option<f64>)> {
    let at = |moment: &str| {
        points.iter().find(|point| point.quantity == Quantity::OxygenMeanShut && point.moment == moment)
    };
    let (early, late) = (at("180 s")?, at("240 s")?);
    let computed = late.computed.zip(early.computed).map(|(late, early)| late - early);
    Some((late.measured - early.measured, computed))
}
