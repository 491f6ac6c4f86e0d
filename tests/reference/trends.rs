//! What must hold whatever the coefficients: smaller openings, better linings, more fuel.

use sootline::fire::DesignFire;
use sootline::fire::flashover::Enclosure;
use sootline::fire::linings::Surface;
use sootline::fire::screen::{LimitedBy, Screen, ScreenInput, flashover_screen};
use sootline::fire::ventilation::WallOpening;

const FAST_KW_S2: f64 = 0.0469;

#[derive(Clone, Copy)]
struct Case {
    door_width_m: f64,
    conductivity_w_mk: f64,
    density_kg_m3: f64,
    peak_kw: f64,
    energy_kj: f64,
}

const CASE: Case = Case {
    door_width_m: 0.9,
    conductivity_w_mk: 0.17,
    density_kg_m3: 790.0,
    peak_kw: 3000.0,
    energy_kj: 4e6,
};

fn screen(case: Case) -> Screen {
    let opening = WallOpening { area_m2: case.door_width_m * 2.0, height_m: 2.0 };
    // The surface is that of the room with its widest door: only the opening changes from case to case.
    let enclosure =
        Enclosure { bounding_area_m2: 60.0, opening_area_m2: opening.area_m2, opening_height_m: 2.0 };
    let surfaces = [Surface {
        area_m2: 60.0,
        conductivity_w_mk: case.conductivity_w_mk,
        density_kg_m3: case.density_kg_m3,
        specific_heat_j_kgk: 900.0,
        thickness_m: 0.1,
    }];
    flashover_screen(&ScreenInput {
        enclosure,
        surfaces: &surfaces,
        fire: DesignFire {
            growth_kw_s2: FAST_KW_S2,
            peak_kw: case.peak_kw,
            energy_kj: case.energy_kj,
            decay_from_share: 0.7,
        },
        position_factor: 1.0,
        ambient_temperature_k: 293.15,
    })
    .expect("finite numbers only")
}

fn times(screen: &Screen) -> [f64; 4] {
    [screen.babrauskas.time_s, screen.thomas.time_s, screen.mccaffrey.time_s, screen.time_to_600_c_s]
        .map(|time_s| time_s.unwrap_or(f64::INFINITY))
}

#[test]
fn while_fuel_limited_a_smaller_opening_needs_less_heat_and_brings_flashover_sooner() {
    let mut last = screen(Case { door_width_m: 1.1, ..CASE });
    for width_m in [1.05, 1.0, 0.95, 0.9, 0.85, 0.8] {
        let now = screen(Case { door_width_m: width_m, ..CASE });

        assert_eq!(now.limited_by, LimitedBy::Fuel, "{width_m}");
        for ((_, less), (_, more)) in now.requirements().into_iter().zip(last.requirements()) {
            assert!(less.required_kw < more.required_kw, "{width_m}");
        }
        for (sooner, later) in times(&now).into_iter().zip(times(&last)) {
            assert!(sooner < later, "{width_m}: {sooner} {later}");
        }
        last = now;
    }
}

#[test]
fn below_the_ventilation_limit_a_smaller_opening_takes_flashover_away() {
    // By hand for Thomas: 7.8·60 + 378 x = 1500 x at x = 468/1122 = 0.41711 m^2.5, a door of 0.14747 m by 2 m.
    let turning_point_m = 468.0 / 1122.0 / (2.0 * 2.0_f64.sqrt());

    let wider = screen(Case { door_width_m: 1.001 * turning_point_m, ..CASE });
    let narrower = screen(Case { door_width_m: 0.999 * turning_point_m, ..CASE });

    assert!(wider.limited_by == LimitedBy::Ventilation && narrower.limited_by == LimitedBy::Ventilation);
    assert!(wider.thomas.time_s.is_some());
    assert!(narrower.thomas.time_s.is_none());
}

#[test]
fn the_hot_layer_has_its_own_turning_point_on_the_way_to_a_shut_room() {
    // McCaffrey asks for 610 √(h A x) of 1500 x: below x = (610/1500)² h A there is too little air.
    let widths_m = (1..=60).map(|step| 0.005 * f64::from(step));
    let by_width: Vec<_> = widths_m
        .map(|door_width_m| screen(Case { door_width_m, ..CASE }).mccaffrey.time_s.is_some())
        .collect();

    let first = by_width.iter().position(|&reached| reached).unwrap();
    assert!(first > 0, "even a slit flashes over");
    assert!(by_width[first..].iter().all(|&reached| reached), "one turning point only");
}

#[test]
fn a_better_insulating_lining_brings_flashover_sooner_and_needs_less_heat() {
    let mut last = screen(Case { conductivity_w_mk: 1.6, density_kg_m3: 2400.0, ..CASE });
    for (conductivity_w_mk, density_kg_m3) in [(0.8, 1600.0), (0.17, 790.0), (0.26, 500.0), (0.04, 100.0)] {
        // Each has less thermal inertia k ρ c than the one before.
        let now = screen(Case { conductivity_w_mk, density_kg_m3, ..CASE });

        assert!(now.mccaffrey.required_kw < last.mccaffrey.required_kw);
        assert!(now.mccaffrey.time_s < last.mccaffrey.time_s);
        assert!(now.time_to_600_c_s < last.time_to_600_c_s);
        // Babrauskas and Thomas are blind to it.
        assert_eq!(now.thomas, last.thomas);
        last = now;
    }
}

#[test]
fn more_fuel_never_takes_flashover_away_nor_lengthens_the_time() {
    let mut last = screen(Case { energy_kj: 1e4, ..CASE });
    for step in 1..=60 {
        let now = screen(Case { energy_kj: 1e4 * 1.15_f64.powi(step), ..CASE });

        assert!(now.available_kw >= last.available_kw);
        for (new_s, old_s) in times(&now).into_iter().zip(times(&last)) {
            assert!(new_s <= old_s + 0.02, "step {step}: {new_s} {old_s}");
        }
        last = now;
    }
}

#[test]
fn a_higher_peak_never_takes_flashover_away_nor_lengthens_the_time() {
    let mut last = screen(Case { peak_kw: 200.0, ..CASE });
    for step in 1..=40 {
        let now = screen(Case { peak_kw: 200.0 * 1.1_f64.powi(step), ..CASE });

        for (new_s, old_s) in times(&now).into_iter().zip(times(&last)) {
            assert!(new_s <= old_s + 0.02, "step {step}: {new_s} {old_s}");
        }
        last = now;
    }
}
