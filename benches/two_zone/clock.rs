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

/// Least CPU time of a measurement: the system counts by ticks of some milliseconds.
const LEAST: Duration = Duration::from_millis(150);

/// CPU time of one run, ms, over as many as make a measurement.
pub fn mean_ms(mut run: impl FnMut()) -> f64 {
    let before = cpu_time();
    let mut runs = 0_u32;
    loop {
        run();
        runs += 1;
        let whole = cpu_time() - before;
        if whole >= LEAST {
            return 1e3 * whole.as_secs_f64() / f64::from(runs);
        }
    }
}

/// Median of several measurements of the CPU time of one run, ms.
pub fn median_ms(measurements: usize, mut run: impl FnMut()) -> f64 {
    run();
    let mut all: Vec<f64> = (0..measurements).map(|_| mean_ms(&mut run)).collect();
    all.sort_by(f64::total_cmp);
    all[all.len() / 2]
}
