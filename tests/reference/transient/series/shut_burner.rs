//! The 2018 room: gas burner, door shut, until the gas was turned off or the flame died.

use sootline::fire::two_zone::Plan;

use crate::transient::data::{Row, by_test, configuration};
use crate::transient::inputs::{Choices, METHANE};
use crate::transient::point::{Point, Quantity, Series};
use crate::transient::profile::{dry_oxygen_volpct, layer_at};
use crate::transient::run::{Course, Runner, mean_k};
use crate::transient::series::open_burner::{HEIGHT_M, METHANE_G_MOL, OXYGEN_POINT_M, burner, room_2018};

/// Times at which the course is compared, s.
const COURSE_S: [f64; 4] = [60.0, 120.0, 180.0, 240.0];
/// A flame that has not died by then never does.
const END_S: f64 = 1800.0;

pub fn points(runner: &Runner, choices: &Choices) -> Vec<Point> {
    by_test(include_str!("../../data/fsri2018_closed_burner.csv"))
        .iter()
        .flat_map(|(name, rows)| test(name, rows, runner, choices))
        .collect()
}

/// Leakage is not stated; an opening of 0.03 m² fits the pressure at 60 s.
fn test(name: &str, rows: &[Row], runner: &Runner, choices: &Choices) -> Vec<Point> {
    let first = &rows[0];
    let ambient_c = first.number("ambient_c");
    let ambient_k = ambient_c + 273.15;
    let fuel_kw = first.number("fuel_kw");
    let network = room_2018(false, METHANE, burner(first, choices), ambient_c, choices);
    let course = runner.run(Series::ShutBurner, name, &network, &Plan::every(5.0, END_S));
    let oxygen = |course: &Course, time_s: f64| {
        course.at(time_s - choices.oxygen_lag_s, |sample| {
            dry_oxygen_volpct(layer_at(&sample.rooms[0], OXYGEN_POINT_M), METHANE_G_MOL)
        })
    };
    let point = |quantity, moment: &str, measured, computed| {
        Point::new(Series::ShutBurner, quantity, name, moment, measured, computed)
            .counted_as(configuration(name))
    };

    let mut points = Vec::new();
    for row in rows {
        let time_s = row.number("time_s");
        if !COURSE_S.contains(&time_s) || time_s >= row.number("burner_off_s") {
            continue;
        }
        let moment = format!("{time_s:.0} s");
        let rise = course
            .as_ref()
            .and_then(|course| course.at(time_s, |sample| mean_k(&sample.rooms[0], HEIGHT_M) - ambient_k));
        points.push(point(Quantity::MeanRiseShut, &moment, row.number("mean_c") - ambient_c, rise));
        if let Some(measured) = row.maybe("oxygen_upper_volpct") {
            let left = course.as_ref().and_then(|course| oxygen(course, time_s));
            points.push(point(
                Quantity::OxygenDecreaseShut,
                &moment,
                20.95 - measured,
                left.map(|left| 20.95 - left),
            ));
        }
    }
    if let Some(last) = rows.iter().find(|row| row.number("before_off") > 0.5)
        && last.number("self_extinguished") > 0.5
    {
        let out_s = course.as_ref().and_then(|course| course.went_out_s(fuel_kw));
        points.push(point(Quantity::ExtinctionTime, "flame out", last.number("burner_off_s"), out_s));
        if let Some(measured) = last.maybe("oxygen_upper_volpct") {
            // The row stands 5 s before the end; so does what is read of the run.
            let left = course.as_ref().zip(out_s).and_then(|(course, out_s)| oxygen(course, out_s - 5.0));
            points.push(point(Quantity::ExtinctionOxygen, "5 s before", measured, left));
        }
    }
    points
}
