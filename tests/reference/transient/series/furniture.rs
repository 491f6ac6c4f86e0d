//! The 2018 room: a chair or a sofa burns.
//!
//! Heat release is told, as the hood measured it; the engine may burn less where the oxygen does not
//! allow it.

use sootline::fire::two_zone::{Fire, HeatRelease, Ignition, Plan, Sample, Supply};

use crate::transient::data::{Row, by_test, table};
use crate::transient::inputs::{Choices, FOAM, position};
use crate::transient::point::{Point, Quantity, Series};
use crate::transient::profile::{dry_oxygen_volpct, layer_at};
use crate::transient::run::Runner;
use crate::transient::series::open_burner::{OXYGEN_POINT_M, TREE, readings_k, room_2018};

const TESTS: &str = include_str!("../../data/fsri2018_furniture.csv");
const COURSES: &str = include_str!("../../data/fsri2018_furniture_course.csv");
/// Below this rise, K, the history is not compared: the hood does not see such small fires.
const HISTORY_FROM_K: f64 = 100.0;
/// The curves end then, s.
const END_S: f64 = 600.0;
/// Unburned gas of foam, taken as formaldehyde-like fragments: it hardly matters for oxygen.
const FRAGMENTS_G_MOL: f64 = 30.0;

/// Seat 0.4 m above the floor; fire 1.0 m across on the chair, 1.5 m on the sofa (common practice).
fn fire(item: &str, location: &str, curve: &[Row], choices: &Choices) -> Fire {
    let points = curve
        .iter()
        .map(|row| {
            let time_s = (row.number("time_s") - choices.hood_lag_s).max(0.0);
            (time_s, row.number("heat_release_kw").max(0.0) * choices.heat_factor)
        })
        .collect();
    Fire {
        room: 0,
        fuel: 0,
        heat_release: HeatRelease::Points(points),
        base_height_m: 0.4,
        diameter_m: if item == "Overstuffed" { 1.5 } else { 1.0 },
        position: position(location),
        radiative_fraction: choices.furniture_radiates,
        oxygen_limited: true,
        supply: Supply::HeatFed { without_flame: 0.1, fades_s: 60.0 },
        ignites: Ignition::At(0.0),
    }
}

/// Mean of the sensors 0.025, 0.3 and 0.6 m below the ceiling, °C.
fn top_c(sample: &Sample) -> f64 {
    let room = &sample.rooms[0];
    [2.415, 2.14, 1.84].iter().map(|&z| layer_at(room, z).temperature_k - 273.15).sum::<f64>() / 3.0
}

pub fn points(runner: &Runner, choices: &Choices) -> Vec<Point> {
    let courses = by_test(COURSES);
    let mut points = Vec::new();
    for row in table(TESTS).iter().filter(|row| row.text("door") == "Open") {
        let name = row.text("test");
        let curve = courses.iter().find(|(test, _)| test == name).map(|(_, rows)| rows.as_slice());
        let Some(curve) = curve else {
            continue;
        };
        let ambient_c = row.number("ambient_c");
        let ambient_k = ambient_c + 273.15;
        let fire = fire(row.text("item"), row.text("location"), curve, choices);
        let network = room_2018(true, FOAM, fire, ambient_c, choices);
        let course = runner.run(Series::Furniture, name, &network, &Plan::every(1.0, END_S));
        let course = course.as_ref();
        let point = |quantity, moment: &str, measured, computed| {
            Point::new(Series::Furniture, quantity, name, moment, measured, computed)
        };

        let peak_c = course.and_then(|course| course.highest(top_c));
        points.push(point(
            Quantity::PeakRise,
            "peak",
            row.number("peak_c") - ambient_c,
            peak_c.map(|peak_c| peak_c - ambient_c),
        ));
        if let Some(measured) = row.maybe("reaches_500_c_s") {
            let reached = course.and_then(|course| course.first_above(500.0, top_c));
            points.push(point(Quantity::TimeTo500, "first", measured, reached));
        }
        let yes = |reached: bool| if reached { 1.0 } else { 0.0 };
        points.push(point(
            Quantity::Reaches600,
            "ever",
            yes(row.maybe("reaches_600_c_s").is_some()),
            peak_c.map(|peak_c| yes(peak_c >= 600.0)),
        ));
        for reading in curve {
            let measured_k = TREE.reduce(&readings_k(reading)).upper_k - ambient_k;
            if measured_k < HISTORY_FROM_K {
                continue;
            }
            let time_s = reading.number("time_s");
            let plain = course.and_then(|course| {
                course.at(time_s, |sample| sample.rooms[0].upper.temperature_k - ambient_k)
            });
            let seen = course.and_then(|course| {
                course.at(time_s, |sample| TREE.seen(&sample.rooms[0]).upper_k - ambient_k)
            });
            let computed = if choices.through_sensors { seen } else { plain };
            points.push(
                point(Quantity::UpperRise, &format!("{time_s:.0} s"), measured_k, computed).beside(plain),
            );
        }
    }
    points
}

/// With the door shut nobody measured the heat release: each test burns the curve of the same item in the
/// open, at the same place where there is one. Report only.
pub fn points_shut(runner: &Runner, choices: &Choices) -> Vec<Point> {
    let courses = by_test(COURSES);
    let tests = table(TESTS);
    let mut points = Vec::new();
    for row in tests.iter().filter(|row| row.text("door") == "Closed") {
        let like = |place: bool| {
            tests.iter().find(|other| {
                other.text("door") == "Open"
                    && other.text("item") == row.text("item")
                    && (!place || other.text("location") == row.text("location"))
            })
        };
        let Some(like) = like(true).or_else(|| like(false)) else {
            continue;
        };
        let Some((_, curve)) = courses.iter().find(|(test, _)| test == like.text("test")) else {
            continue;
        };
        let name = row.text("test");
        let ambient_c = row.number("ambient_c");
        let fire = fire(row.text("item"), row.text("location"), curve, choices);
        let network = room_2018(false, FOAM, fire, ambient_c, choices);
        let course = runner.run(Series::FurnitureShut, name, &network, &Plan::every(2.0, 900.0));
        let course = course.as_ref();
        let point = |quantity, measured, computed| {
            Point::new(Series::FurnitureShut, quantity, name, "extreme", measured, computed)
                .left_out_if(Some("heat release not measured"))
        };
        points.push(point(
            Quantity::PeakRise,
            row.number("peak_c") - ambient_c,
            course.and_then(|course| course.highest(top_c)).map(|peak_c| peak_c - ambient_c),
        ));
        points.push(point(
            Quantity::OxygenLeft,
            row.number("least_oxygen_volpct"),
            course.and_then(|course| {
                course.lowest(|sample| {
                    dry_oxygen_volpct(layer_at(&sample.rooms[0], OXYGEN_POINT_M), FRAGMENTS_G_MOL)
                })
            }),
        ));
    }
    points
}
