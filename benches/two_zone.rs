//! The transient engine: CPU per case, growth with rooms, a thousand variants of a room.
//!
//! `cargo bench --bench two_zone` prints medians of seven in CPU time of this thread, steps, and instructions where
//! `perf` can count them; then Criterion's figures for the four reference cases. The ratio to a general-purpose solver
//! is measured in `tests/oracle`.

use std::hint::black_box;
use std::process::Command;
use std::time::Duration;

use criterion::{Criterion, criterion_group};
use sootline::fire::two_zone::Ended;

#[path = "../tests/two_zone/cases.rs"]
mod cases;
#[path = "two_zone/clock.rs"]
mod clock;
#[path = "../tests/two_zone/support.rs"]
#[expect(dead_code, reason = "the tests use more of it")]
mod support;
#[path = "../tests/two_zone/variants.rs"]
mod variants;

use cases::Case;
use clock::{cpu_time, median_ms};

fn end(case: &Case) -> Ended {
    support::run_all(&case.network, &case.plan(1e-3)).1
}

fn by_name(name: &str) -> Option<Case> {
    let number = name.get(1..).and_then(|digits| digits.parse::<u32>().ok());
    match (name.get(..1)?, number) {
        ("A", None) => Some(cases::a()),
        ("B", None) => Some(cases::b()),
        ("C", Some(rooms)) => Some(cases::c(rooms as usize)),
        ("D", Some(rooms)) => Some(cases::d(rooms)),
        _ => None,
    }
}

const REFERENCE: [&str; 4] = ["A", "B", "C4", "D20"];

/// Instructions of one run more, in millions, where `perf` can count.
fn instructions_m(name: &str) -> Option<f64> {
    let count = |runs: &str| {
        let own = std::env::current_exe().ok()?;
        let out = Command::new("perf")
            .args(["stat", "-x", ",", "-e", "instructions:u"])
            .arg(own)
            .args(["--repeat", name, runs])
            .output()
            .ok()?;
        let text = String::from_utf8(out.stderr).ok()?;
        text.lines().find(|line| line.contains("instructions"))?.split(',').next()?.parse::<f64>().ok()
    };
    Some((count("11")? - count("1")?) / 10.0 / 1e6)
}

/// Power of `y` in `x`, by least squares of their logarithms.
fn exponent(points: &[(f64, f64)]) -> f64 {
    #[expect(clippy::cast_precision_loss, reason = "a handful")]
    let count = points.len() as f64;
    let logs: Vec<(f64, f64)> = points.iter().map(|(x, y)| (x.ln(), y.ln())).collect();
    let mean_x = logs.iter().map(|p| p.0).sum::<f64>() / count;
    let mean_y = logs.iter().map(|p| p.1).sum::<f64>() / count;
    let along: f64 = logs.iter().map(|p| (p.0 - mean_x) * (p.1 - mean_y)).sum();
    along / logs.iter().map(|p| (p.0 - mean_x).powi(2)).sum::<f64>()
}

fn table() {
    println!("case: CPU ms (median of 7), steps, refused, million instructions");
    for name in REFERENCE {
        let case = by_name(name).expect("a reference case");
        let work = end(&case).work;
        let ms = median_ms(7, || drop(black_box(end(&case))));
        let instructions = instructions_m(name).map_or("not counted".to_owned(), |m| format!("{m:.1}"));
        println!("{name}: {ms:.2} ms, {}, {}, {instructions}", work.steps, work.rejected);
    }
    for (what, all) in [
        ("corridors", [5, 10, 20, 40, 60].map(cases::d)),
        ("grids", [(2, 3), (4, 3), (5, 4), (8, 5), (10, 6)].map(|(x, y)| cases::grid(x, y))),
    ] {
        let mut points = Vec::new();
        for case in all {
            let work = match support::try_run(&case.network, &case.plan(1e-3)) {
                Ok((_, ended)) => ended.work,
                Err(failed) => {
                    println!("{}: {failed:?}", case.name);
                    continue;
                }
            };
            let ms = median_ms(3, || drop(black_box(end(&case))));
            #[expect(clippy::cast_precision_loss, reason = "a handful of rooms")]
            points.push((case.network.rooms.len() as f64, ms));
            println!("{}: {ms:.1} ms, {} steps", case.name, work.steps);
        }
        println!("{what}: CPU grows with rooms to the power {:.2}", exponent(&points));
    }
    variants_table();
}

fn variants_table() {
    let mut failures = 0;
    let mut steps = Vec::new();
    let before = cpu_time();
    for number in 0..1000 {
        let case = variants::variant(number);
        match support::try_run(&case.network, &case.plan(1e-3)) {
            Ok((_, ended)) => steps.push(ended.work.steps + ended.work.rejected),
            Err(failed) => {
                failures += 1;
                println!("variant {number}: {failed:?}");
            }
        }
    }
    let whole = cpu_time() - before;
    steps.sort_unstable();
    let (median, slowest) = (steps[steps.len() / 2], steps[steps.len() - 1]);
    println!(
        "1000 variants of B: {:.2} s CPU, {failures} failures; steps: median {median}, slowest {slowest}",
        whole.as_secs_f64(),
    );
}

fn reference_cases(criterion: &mut Criterion) {
    let mut group = criterion.benchmark_group("two_zone");
    group.sample_size(20).measurement_time(Duration::from_secs(3));
    for name in REFERENCE {
        let case = by_name(name).expect("a reference case");
        group.bench_function(name, |bencher| bencher.iter(|| end(black_box(&case))));
    }
    group.finish();
}

criterion_group!(benches, reference_cases);

fn main() {
    let arguments: Vec<String> = std::env::args().skip(1).collect();
    if let [flag, name, runs] = arguments.as_slice()
        && flag == "--repeat"
        && let (Some(case), Ok(runs)) = (by_name(name), runs.parse::<u32>())
    {
        for _ in 0..runs {
            black_box(end(&case));
        }
        return;
    }
    // A test run of the benches only sees that they work.
    if !arguments.iter().any(|argument| argument == "--test") {
        table();
    }
    benches();
    Criterion::default().configure_from_args().final_summary();
}
