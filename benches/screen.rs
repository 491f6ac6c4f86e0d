//! The hot path: the flashover screen of one room in one scenario. Goal: at most 5 µs on one core.

use std::hint::black_box;

use criterion::{Criterion, criterion_group, criterion_main};
use sootline::fire::DesignFire;
use sootline::fire::flashover::Enclosure;
use sootline::fire::linings::Surface;
use sootline::fire::screen::{ScreenInput, flashover_screen};
use sootline::fire::ventilation::WallOpening;

fn board(area_m2: f64) -> Surface {
    Surface {
        area_m2,
        conductivity_w_mk: 0.17,
        density_kg_m3: 790.0,
        specific_heat_j_kgk: 900.0,
        thickness_m: 0.0159,
    }
}

fn concrete(area_m2: f64) -> Surface {
    Surface {
        area_m2,
        conductivity_w_mk: 1.6,
        density_kg_m3: 2400.0,
        specific_heat_j_kgk: 750.0,
        thickness_m: 0.15,
    }
}

fn one_room(criterion: &mut Criterion) {
    let door = WallOpening { area_m2: 1.8, height_m: 2.0 };
    let surfaces = [board(33.9), board(13.4), concrete(13.4)];
    let input = ScreenInput {
        enclosure: Enclosure::of_box(3.66, 3.66, 2.44, door),
        surfaces: &surfaces,
        fire: DesignFire { growth_kw_s2: 0.0469, peak_kw: 3000.0, energy_kj: 8e6, decay_from_share: 0.7 },
        position_factor: 1.0,
        ambient_temperature_k: 293.15,
    };
    criterion.bench_function("flashover_screen of one room", |bencher| {
        bencher.iter(|| flashover_screen(black_box(&input)));
    });
}

criterion_group!(benches, one_room);
criterion_main!(benches);
