//! The series, one a file: the network of each test, and what is compared.

pub mod chair_room;
pub mod corridor;
pub mod enclosure;
pub mod furniture;
pub mod house;
pub mod large_room;
pub mod open_burner;
pub mod reduced_scale;
pub mod shut_burner;
pub mod steckler;

use super::inputs::Choices;
use super::point::{Point, Series};
use super::run::Runner;

/// Runs a series.
pub fn points(series: Series, runner: &Runner, choices: &Choices) -> Vec<Point> {
    match series {
        Series::Steckler => steckler::points(runner, choices),
        Series::OpenBurner => open_burner::points(runner, choices),
        Series::ShutBurner => shut_burner::points(runner, choices),
        Series::Furniture => furniture::points(runner, choices),
        Series::FurnitureShut => furniture::points_shut(runner, choices),
        Series::LargeRoom => large_room::points(runner, choices),
        Series::Enclosure => enclosure::points(runner, choices),
        Series::Corridor => corridor::points(runner, choices),
        Series::House => house::points(runner, choices),
        Series::ReducedScale => reduced_scale::points(runner, choices),
        Series::ChairRoom => chair_room::points(runner, choices),
    }
}
