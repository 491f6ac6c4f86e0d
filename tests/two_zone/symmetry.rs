//! The answer does not hang on how a building is numbered or drawn.

use sootline::fire::two_zone::{Network, Sample, Side};

use super::cases;
use super::support::{at_end, run_all};

/// The same building, its rooms renumbered: room `n` becomes `to[n]`; openings come in the opposite order, each seen
/// from its other side.
fn renumbered(network: &Network, to: &[usize]) -> Network {
    let side = |side: Side| match side {
        Side::Room(index) => Side::Room(to[index]),
        Side::Outside => Side::Outside,
    };
    let mut rooms = network.rooms.clone();
    for (index, of) in network.rooms.iter().enumerate() {
        rooms[to[index]] = of.clone();
    }
    let openings: Vec<_> = network
        .openings
        .iter()
        .rev()
        .map(|o| sootline::fire::two_zone::Opening {
            between: [side(o.between[1]), side(o.between[0])],
            ..o.clone()
        })
        .collect();
    let last = openings.len() - 1;
    let mut other = Network { rooms, openings, ..network.clone() };
    for fire in &mut other.fires {
        fire.room = to[fire.room];
    }
    for moved in &mut other.schedule {
        moved.opening = last - moved.opening;
    }
    other
}

fn farthest(a: &Sample, b: &Sample, to: &[usize]) -> (f64, f64) {
    a.rooms.iter().enumerate().fold((0.0, 0.0), |(kelvin, metres): (f64, f64), (index, room)| {
        let other = &b.rooms[to[index]];
        (
            kelvin.max((room.upper.temperature_k - other.upper.temperature_k).abs()),
            metres.max((room.interface_height_m - other.interface_height_m).abs()),
        )
    })
}

#[test]
fn numbering_and_order_do_not_matter() {
    for (case, to) in [
        (cases::a(), vec![0]),
        (cases::c(4), vec![3, 2, 1, 0]),
        (cases::d(5), vec![2, 5, 0, 1, 4, 3]),
        (cases::grid(3, 2), vec![5, 1, 3, 0, 2, 4]),
    ] {
        let other = renumbered(&case.network, &to);
        let plan = case.plan(1e-6);

        let (one, _) = run_all(&case.network, &plan);
        let (two, _) = run_all(&other, &plan);

        for (a, b) in one.iter().zip(&two) {
            // Sums come in another order, and rounding may cut a step elsewhere: no more than the tolerance allows.
            let (kelvin, metres) = farthest(a, b, &to);
            assert!(kelvin < 1e-2 && metres < 1e-4, "{} at {}: {kelvin} K, {metres} m", case.name, a.time_s);
        }
    }
}

#[test]
fn rooms_alike_on_a_corridor_stay_alike() {
    let case = cases::d(5);

    let (samples, _) = run_all(&case.network, &case.plan(1e-3));

    for sample in &samples {
        for other in &sample.rooms[2..5] {
            let (a, b) = (&sample.rooms[1], other);
            assert!((a.upper.temperature_k - b.upper.temperature_k).abs() < 1e-6, "{}", sample.time_s);
            assert!((a.interface_height_m - b.interface_height_m).abs() < 1e-8, "{}", sample.time_s);
        }
    }
}

#[test]
fn height_above_the_datum_does_not_matter() {
    // All the building ten metres up: the pressure of still air is taken off everywhere alike.
    let case = cases::c(2);
    let mut raised = case.network.clone();
    for room in &mut raised.rooms {
        room.floor_elevation_m += 10.0;
    }

    let (low, high) = (at_end(&case.network, 600.0, 1e-4), at_end(&raised, 600.0, 1e-4));

    let (kelvin, metres) = farthest(&low, &high, &[0, 1]);
    assert!(kelvin < 1e-3 && metres < 1e-5, "{kelvin} K, {metres} m");
}
