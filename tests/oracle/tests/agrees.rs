//! Ours and a general-purpose solver give the same answer to the same laws.

use sootline::cases::{self, Case};
use sootline::second::{Algebra, follow};
use sootline::support::run_all;

/// Largest differences over rooms and samples: K and m; where a layer is too thin to have a temperature, none.
fn differences(case: &Case, algebra: Algebra) -> (f64, f64) {
    let (ours, ended) = run_all(&case.network, &case.plan(1e-5));
    let second = follow(case, &ended.events, 1e-5, algebra, false);
    assert_eq!(ours.len(), second.samples.len());
    let (mut kelvin, mut metres) = ((0.0_f64, 0.0), (0.0_f64, 0.0));
    for (a, b) in ours.iter().zip(&second.samples) {
        assert_eq!(a.time_s, b.time_s);
        for (x, y) in a.rooms.iter().zip(&b.rooms) {
            let apart = [
                (x.upper.temperature_k - y.upper.temperature_k).abs(),
                (x.lower.temperature_k - y.lower.temperature_k).abs(),
            ];
            for k in apart {
                if k > kelvin.0 {
                    kelvin = (k, a.time_s);
                }
            }
            let m = (x.interface_height_m - y.interface_height_m).abs();
            if m > metres.0 {
                metres = (m, a.time_s);
            }
        }
    }
    println!(
        "{}: {:.4} K at {} s, {:.3} mm at {} s; steps {} and {}",
        case.name,
        kelvin.0,
        kelvin.1,
        1000.0 * metres.0,
        metres.1,
        ended.work.steps,
        second.steps
    );
    (kelvin.0, metres.0)
}

fn agrees(case: &Case, algebra: Algebra) {
    let (kelvin, metres) = differences(case, algebra);
    assert!(kelvin <= 0.5, "{}: {kelvin} K", case.name);
    assert!(metres <= 5e-3, "{}: {metres} m", case.name);
}

#[test]
fn both_solvers_agree_on_a_room_with_an_open_door() {
    agrees(&cases::a(), Algebra::Dense);
}

#[test]
fn both_solvers_agree_on_a_room_whose_door_opens_late() {
    agrees(&cases::b(), Algebra::Dense);
}

#[test]
fn both_solvers_agree_on_rooms_in_a_row() {
    agrees(&cases::c(4), Algebra::Dense);
}

#[test]
fn both_solvers_agree_on_rooms_on_a_corridor() {
    agrees(&cases::d(20), Algebra::Sparse);
}
