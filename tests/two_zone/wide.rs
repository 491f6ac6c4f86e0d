//! Thousands of variants of a room: none fails, none takes far longer than the rest.

use super::support::{is_finite, try_run};
use super::variants::variant;

/// Runs variants; steps of each with its number, sorted, and what failed.
fn steps(numbers: std::ops::Range<u64>) -> (Vec<(usize, u64)>, Vec<String>) {
    let mut taken = Vec::new();
    let mut failures = Vec::new();
    for number in numbers {
        let case = variant(number);
        match try_run(&case.network, &case.plan(1e-3)) {
            Ok((samples, ended)) => {
                if !samples.iter().all(is_finite) {
                    failures.push(format!("{number}: not finite"));
                }
                taken.push((ended.work.steps + ended.work.rejected, number));
            }
            Err(failed) => failures.push(format!("{number}: {failed:?}")),
        }
    }
    taken.sort_unstable();
    (taken, failures)
}

fn holds(numbers: std::ops::Range<u64>) {
    let (taken, failures) = steps(numbers);
    let (median, slowest) = (taken[taken.len() / 2].0, taken[taken.len() - 1].0);
    let longest = &taken[taken.len() - taken.len().min(10)..];
    println!("{} runs, median {median} steps, slowest {slowest}", taken.len());
    assert!(failures.is_empty(), "{} failed: {:#?}", failures.len(), &failures[..failures.len().min(10)]);
    assert!(slowest <= 5 * median, "median {median}; the longest, steps and number: {longest:?}");
}

#[test]
fn no_variant_of_a_room_fails_or_takes_far_longer_than_the_rest() {
    holds(0..100);
}

#[test]
#[ignore = "a thousand runs; half a minute unoptimised"]
fn no_variant_of_a_thousand_fails_or_takes_far_longer_than_the_rest() {
    holds(0..1000);
}
