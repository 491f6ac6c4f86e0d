//! Published experiments beside the transient engine: the validation, and its record.

pub mod bars;
pub mod data;
pub mod inputs;
pub mod misses;
pub mod point;
pub mod profile;
pub mod range;
pub mod run;
pub mod sensitivity;
pub mod series;
pub mod statistics;
pub mod table;

use inputs::Choices;
use point::{Point, Series};
use run::{Engine, Runner, Tally};

/// All that came out.
pub struct Validation {
    pub points: Vec<Point>,
    pub tally: Tally,
}

/// Runs some series, those of each thread one after another; the answer does not depend on the threads.
pub fn validate(series: &[Series], engine: &Engine, choices: &Choices) -> Validation {
    let runner = Runner::new(engine);
    let mut by_series: Vec<(Series, Vec<Point>)> = Vec::new();
    std::thread::scope(|scope| {
        let started: Vec<_> = series
            .iter()
            .map(|&series| {
                let runner = &runner;
                (series, scope.spawn(move || series::points(series, runner, choices)))
            })
            .collect();
        for (series, thread) in started {
            by_series.push((series, thread.join().expect("a panic in a series is a panic here")));
        }
    });
    by_series.sort_by_key(|&(series, _)| series);
    Validation { points: by_series.into_iter().flat_map(|(_, points)| points).collect(), tally: runner.tally() }
}
