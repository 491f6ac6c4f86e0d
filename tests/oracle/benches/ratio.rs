//! CPU of our solver and of a general-purpose one on the same laws, in the same run, at equal error.
//!
//! The error is the largest difference of a hot layer's temperature, over rooms and samples, from a run of ours at
//! a tolerance of 1e-7. Of each solver the fastest setting counts that stays within 1 K.
//!
//! The second solver takes its slopes by differences. Since a structured or exact form would be cheaper,
//! its time is also printed without any time for slopes: better than it could ever do.

use std::hint::black_box;
use std::time::Duration;

use sootline::cases::{self, Case};
use sootline::clock::{cpu_time, median_ms};
use sootline::fire::two_zone::{Event, Plan, Sample};
use sootline::second::{Algebra, follow};
use sootline::support::run_all;

fn error_k(samples: &[Sample], exact: &[Sample]) -> f64 {
    let apart = |(a, b): (&Sample, &Sample)| {
        a.rooms
            .iter()
            .zip(&b.rooms)
            .map(|(x, y)| (x.upper.temperature_k - y.upper.temperature_k).abs())
            .fold(0.0, f64::max)
    };
    samples.iter().zip(exact).map(apart).fold(0.0, f64::max)
}

fn ours(case: &Case, tolerance: f64) -> (Vec<Sample>, Vec<Event>) {
    let (samples, ended) = run_all(&case.network, &Plan { tolerance, ..case.plan(tolerance) });
    (samples, ended.events)
}

/// CPU time of a run of the second solver, whole and without any for slopes, over as many as make a measurement: the
/// system counts by ticks of some milliseconds.
fn second_ms(case: &Case, events: &[Event], tolerance: f64, algebra: Algebra) -> (f64, f64) {
    let mut runs = 0.0;
    let (mut whole, mut slopes) = (Duration::ZERO, Duration::ZERO);
    while whole < Duration::from_millis(500) {
        let before = cpu_time();
        let second = follow(case, events, tolerance, algebra, true);
        whole += (cpu_time() - before).saturating_sub(second.pattern_time);
        slopes += second.slopes_time;
        runs += 1.0;
    }
    (1e3 * whole.as_secs_f64() / runs, 1e3 * whole.saturating_sub(slopes).as_secs_f64() / runs)
}

fn main() {
    if std::env::args().any(|argument| argument == "--test") {
        return;
    }
    for (case, algebra) in [
        (cases::a(), Algebra::Dense),
        (cases::b(), Algebra::Dense),
        (cases::c(4), Algebra::Dense),
        (cases::c(4), Algebra::Sparse),
        (cases::d(20), Algebra::Sparse),
    ] {
        let (exact, events) = ours(&case, 1e-7);
        let mut best_ours = f64::INFINITY;
        for tolerance in [3e-3, 1e-3, 7e-4, 5e-4, 3e-4, 1e-4] {
            let error = error_k(&ours(&case, tolerance).0, &exact);
            let ms = median_ms(7, || drop(black_box(ours(&case, tolerance))));
            println!("{} ours {tolerance:e}: {ms:.2} ms, {error:.2} K", case.name);
            if error <= 1.0 {
                best_ours = best_ours.min(ms);
            }
        }
        let (mut best, mut best_bare) = (f64::INFINITY, f64::INFINITY);
        for tolerance in [1e-3, 3e-4, 1e-4, 3e-5] {
            let second = follow(&case, &events, tolerance, algebra, true);
            let mut all: Vec<(f64, f64)> =
                (0..3).map(|_| second_ms(&case, &events, tolerance, algebra)).collect();
            all.sort_by(|a, b| a.0.total_cmp(&b.0));
            let (ms, bare_ms) = all[1];
            let error = error_k(&second.samples, &exact);
            println!(
                "{} second ({algebra:?}) {tolerance:e}: {ms:.1} ms, {bare_ms:.1} ms without slopes, {error:.2} K, {} steps",
                case.name, second.steps
            );
            if error <= 1.0 {
                best = best.min(ms);
                best_bare = best_bare.min(bare_ms);
            }
        }
        println!(
            "{} within 1 K: ours {best_ours:.2} ms; second {best:.1} ms, ratio {:.1}; {best_bare:.1} ms without slopes, ratio {:.1}",
            case.name,
            best / best_ours,
            best_bare / best_ours
        );
    }
}
