//! Published experiments beside the transient engine: the validation, and its record.

/// Adds a line to a text.
macro_rules! line {
    ($text:expr, $($words:tt)*) => { crate::transient::add_line(&mut $text, format_args!($($words)*)) };
}

pub mod bars;
pub mod data;
pub mod evidence;
pub mod inputs;
pub mod misses;
pub mod plots;
pub mod point;
pub mod profile;
pub mod range;
pub mod record;
pub mod repeat;
pub mod run;
pub mod sensitivity;
pub mod series;
pub mod statistics;
pub mod summary;
pub mod table;

use inputs::Choices;
use point::{Point, Series};
use run::{Engine, Runner, Tally};

/// See `line!`.
pub fn add_line(text: &mut String, words: std::fmt::Arguments) {
    use std::fmt::Write as _;
    text.write_fmt(words).and_then(|()| text.write_char('\n')).expect("a string takes all that memory holds");
}

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
    Validation {
        points: by_series.into_iter().flat_map(|(_, points)| points).collect(),
        tally: runner.tally(),
    }
}

/// The files of a validation, by their paths in this folder.
pub fn files(validation: &Validation, engine: &Engine) -> Vec<(String, String)> {
    let mut files = vec![
        ("VALIDATION.md".to_owned(), record::write(validation, engine)),
        ("validation_summary.json".to_owned(), summary::json(validation)),
    ];
    for judged in bars::judge(&validation.points) {
        if judged.bar.quantity != point::Quantity::Reaches600 {
            let path = format!("plots/{}.svg", judged.bar.quantity.key());
            files.push((path, plots::scatter(&judged, &validation.points)));
        }
    }
    files
}

#[cfg(test)]
mod tests {
    use std::path::Path;
    use std::sync::LazyLock;

    use super::*;

    const REWRITE: &str = "SOOTLINE_REWRITE_VALIDATION";
    /// Prints the rows of a series, or of `all`, with `--nocapture`.
    const SHOW: &str = "SOOTLINE_SHOW_VALIDATION";

    /// One validation serves all tests here.
    static VALIDATION: LazyLock<Validation> =
        LazyLock::new(|| validate(&Series::ALL, &run::engine, &Choices::default()));

    #[test]
    fn every_run_ends_and_keeps_mass_energy_and_elements() {
        let tally = &VALIDATION.tally;

        assert!(tally.failures.is_empty(), "{:#?}", tally.failures);
        assert!(tally.worst_balance.iter().all(|&error| error <= 1e-8), "{:?}", tally.worst_balance);
    }

    #[test]
    fn the_record_is_what_the_engine_computes() {
        let folder = Path::new(env!("CARGO_MANIFEST_DIR")).join("tests/reference");
        let mut stale = Vec::new();
        for (path, computed) in files(&VALIDATION, &run::engine) {
            let path = folder.join(path);
            if std::env::var_os(REWRITE).is_some() {
                std::fs::write(&path, &computed).unwrap();
            }
            if std::fs::read_to_string(&path).unwrap_or_default() != computed {
                stale.push(path);
            }
        }

        println!("{}\n{}", table::bars(&VALIDATION), table::reported(&VALIDATION));
        if let Ok(wanted) = std::env::var(SHOW) {
            for series in Series::ALL.into_iter().filter(|series| wanted == "all" || wanted == series.key()) {
                println!("{}", table::rows(&VALIDATION, series));
            }
        }
        assert!(
            stale.is_empty(),
            "stale: {stale:?}; run `{REWRITE}=1 cargo test --test reference transient` and look at what changed"
        );
    }

    #[test]
    fn the_service_tells_the_figures_of_the_record() {
        let told = sootline::fire::methods::find("two_layer_network").unwrap().validation;

        for judged in bars::judge(&VALIDATION.points) {
            let figure = match (&judged.pooled, judged.held) {
                (Some(pool), _) => format!("{:.2} ± {:.2}", pool.bias, pool.sd),
                (None, Some((right, of))) => format!("{right} of {of}"),
                (None, None) => continue,
            };
            assert!(told.contains(&figure), "{}: {figure} is not in: {told}", judged.bar.quantity.title());
        }
    }

    #[test]
    fn a_missed_bar_is_explained_and_a_met_one_has_nothing_to_explain() {
        for judged in bars::judge(&VALIDATION.points) {
            let quantity = judged.bar.quantity.title();
            match (judged.met(), judged.bar.miss) {
                (false, None) => {
                    panic!("{quantity} is missed: say in misses.rs what, why, and what would tell")
                }
                (true, Some(_)) => panic!("{quantity} is met: misses.rs still explains it"),
                (false, Some(miss)) => {
                    for part in [miss.what, miss.cause, miss.experiment] {
                        assert!(part.len() > 20, "{quantity}: {part}");
                    }
                }
                (true, None) => {}
            }
        }
    }

    #[test]
    fn the_answer_does_not_depend_on_which_series_run_beside() {
        let alone = validate(&[Series::Steckler], &run::engine, &Choices::default());

        let beside = VALIDATION.points.iter().filter(|point| point.series == Series::Steckler);
        for (one, other) in alone.points.iter().zip(beside) {
            assert_eq!((&one.test, one.computed), (&other.test, other.computed));
        }
    }
}
