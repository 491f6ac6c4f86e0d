//! The same input gives the same bytes, whatever else runs.

use super::cases::{self, Case};
use super::support::run_all;

/// Every number of a run, as its bits are printed: `Debug` of a number is exact.
fn bytes(case: &Case) -> String {
    format!("{:?}", run_all(&case.network, &case.plan(1e-3)))
}

#[test]
fn same_input_same_bytes_on_one_two_and_eight_threads() {
    let cases = [cases::a(), cases::b(), cases::c(4)];
    let alone: Vec<String> = cases.iter().map(bytes).collect();
    for threads in [1, 2, 8] {
        std::thread::scope(|scope| {
            let handles: Vec<_> =
                (0..threads).map(|_| scope.spawn(|| cases.iter().map(bytes).collect::<Vec<_>>())).collect();
            for handle in handles {
                assert!(handle.join().unwrap() == alone, "{threads} threads");
            }
        });
    }
}
