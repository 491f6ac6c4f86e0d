//! CPU time of this thread.

use std::time::{Duration, Instant};

/// CPU time this thread has had; where the system does not say, time by the clock.
pub fn cpu_time() -> Duration {
    thread_local!(static START: Instant = Instant::now());
    std::fs::read_to_string("/proc/thread-self/schedstat")
        .ok()
        .and_then(|line| line.split_whitespace().next()?.parse().ok())
        .map_or_else(|| START.with(Instant::elapsed), Duration::from_nanos)
}

/// Median CPU time of one run, ms, over measurements of several runs each.
pub fn median_ms(measurements: usize, runs: u32, mut run: impl FnMut()) -> f64 {
    run();
    let mut all: Vec<f64> = (0..measurements)
        .map(|_| {
            let before = cpu_time();
            for _ in 0..runs {
                run();
            }
            1e3 * (cpu_time() - before).as_secs_f64() / f64::from(runs)
        })
        .collect();
    all.sort_by(f64::total_cmp);
    all[all.len() / 2]
}
