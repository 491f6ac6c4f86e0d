//! Burner fires in a shut room that went out by themselves: when, and at how much oxygen.
//!
//! That the flame counts as out at the limit itself, where half of it burns, was settled with these
//! burns in view (fading on below it kept a fire alive on leakage that had gone out in the test).
//! So this shows consistency, not foresight.

use sootline::fire::DesignFire;
use sootline::fire::linings::Surface;
use sootline::fire::oxygen::{LimitingOxygen, ShutBurn, ShutRoom, burn_shut};

use crate::rows;

const BURNS: &str = include_str!("data/fsri2018_self_extinction.csv");
const COURSE: &str = include_str!("data/fsri2018_shut_course.csv");

/// Published predicted over measured rise of the closed-room correlation whose conductance the burn
/// takes: 1.04 ± 0.37 (Overholt, NIST SP 1169, 2014, from memory).
const CLOSED_ROOM_SCATTER: std::ops::RangeInclusive<f64> = 0.67..=1.41;

/// Gas of the shut room while the burner is on, mean of many tests.
struct Course {
    fuel_kw: f64,
    time_s: f64,
    rise_k: f64,
    oxygen_volpct: f64,
}

fn course() -> Vec<Course> {
    rows(COURSE)
        .map(|row| {
            let number = |column: usize| row[column].parse::<f64>().expect("a number in every column");
            Course { fuel_kw: number(0), time_s: number(1), rise_k: number(3), oxygen_volpct: number(5) }
        })
        .collect()
}

struct Burn {
    name: String,
    fuel_kw: f64,
    extinction_s: f64,
    oxygen_volpct: f64,
    mean_c: f64,
}

fn burns() -> Vec<Burn> {
    rows(BURNS)
        .map(|row| {
            let number = |column: usize| row[column].parse::<f64>().expect("a number in every column");
            Burn {
                name: row[0].to_owned(),
                fuel_kw: number(2),
                extinction_s: number(3),
                oxygen_volpct: 0.5 * (number(5) + number(6)),
                mean_c: number(7),
            }
        })
        .collect()
}

/// A steady burner: full at once, and never short of gas.
fn burner(fuel_kw: f64) -> DesignFire {
    DesignFire { growth_kw_s2: fuel_kw, peak_kw: fuel_kw, energy_kj: 1e7, decay_from_share: 1.0 }
}

#[derive(Clone, Copy)]
struct Corner {
    limit: LimitingOxygen,
    leakage_area_m2: f64,
    dense_board: bool,
}

const TYPICAL: Corner = Corner { limit: LimitingOxygen::TYPICAL, leakage_area_m2: 0.015, dense_board: false };

/// What is not known of the room: the oxygen limit, the cracks, the board.
fn corners() -> Vec<Corner> {
    let mut all = Vec::new();
    for limit in [LimitingOxygen::EARLY, LimitingOxygen::LATE] {
        for leakage_area_m2 in [0.0, 0.03] {
            for dense_board in [false, true] {
                all.push(Corner { limit, leakage_area_m2, dense_board });
            }
        }
    }
    all
}

fn burn(fuel_kw: f64, corner: Corner) -> ShutBurn {
    burn_until(fuel_kw, corner, 7200.0)
}

fn burn_until(fuel_kw: f64, corner: Corner, horizon_s: f64) -> ShutBurn {
    let (conductivity_w_mk, density_kg_m3, specific_heat_j_kgk) =
        if corner.dense_board { (0.48, 1440.0, 840.0) } else { (0.17, 790.0, 900.0) };
    let surfaces = [Surface {
        area_m2: 62.5,
        conductivity_w_mk,
        density_kg_m3,
        specific_heat_j_kgk,
        thickness_m: 0.0159,
    }];
    let room = ShutRoom {
        volume_m3: 32.7,
        height_m: 2.44,
        leakage_area_m2: corner.leakage_area_m2,
        surfaces: &surfaces,
        ambient_temperature_k: 293.15,
        limit: corner.limit,
    };
    burn_shut(&burner(fuel_kw), &room, horizon_s)
}

fn span(fuel_kw: f64, of: impl Fn(&ShutBurn) -> f64) -> (f64, f64) {
    corners()
        .into_iter()
        .map(|corner| of(&burn(fuel_kw, corner)))
        .fold((f64::INFINITY, f64::NEG_INFINITY), |(low, high), x| (low.min(x), high.max(x)))
}

fn volpct(burn: &ShutBurn) -> f64 {
    burn.state.oxygen_mass_fraction * 0.2095 / 0.2315 * 100.0
}

fn celsius(burn: &ShutBurn) -> f64 {
    burn.state.temperature_k - 273.15
}

#[test]
fn the_typical_shut_room_goes_out_within_a_factor_of_one_and_a_half() {
    // The same burner went out after 322 to 566 s depending on where it stood, so no well-mixed model can do
    // better than about 1.3 about their mean; half more is granted for cracks and board that are not stated.
    for measured in burns() {
        let ratio = burn(measured.fuel_kw, TYPICAL).state.time_s / measured.extinction_s;

        assert!((1.0 / 1.5..=1.5).contains(&ratio), "{}: {ratio:.2}", measured.name);
    }
}

#[test]
fn most_measured_extinctions_lie_between_the_corners() {
    let inside = burns()
        .iter()
        .filter(|measured| {
            let (low_s, high_s) = span(measured.fuel_kw, |burn| burn.state.time_s);
            (low_s..=high_s).contains(&measured.extinction_s)
        })
        .count();

    assert!(inside * 3 >= burns().len() * 2, "{inside}");
}

#[test]
fn the_flame_dies_at_an_oxygen_that_was_measured_within_three_percent_by_volume() {
    // The limit itself is published as 12 to 14.5 % by volume in cold gas, and the probes see one place each.
    for measured in burns() {
        let computed = volpct(&burn(measured.fuel_kw, TYPICAL));

        assert!((computed - measured.oxygen_volpct).abs() < 3.0, "{}: {computed}", measured.name);
    }
}

#[test]
fn the_mean_rise_on_the_way_lies_within_the_scatter_of_closed_rooms() {
    for measured in course() {
        let computed = burn_until(measured.fuel_kw, TYPICAL, measured.time_s);
        let ratio = (computed.state.temperature_k - 293.15) / measured.rise_k;

        assert!(CLOSED_ROOM_SCATTER.contains(&ratio), "{} s: {ratio:.2}", measured.time_s);
    }
}

#[test]
fn the_oxygen_on_the_way_is_met_within_two_percent_by_volume() {
    // The probes lag by 10 to 20 s and see one place each: 2 % by volume is what 20 s of the
    // largest fire use up.
    for measured in course() {
        let computed = volpct(&burn_until(measured.fuel_kw, TYPICAL, measured.time_s));

        assert!((computed - measured.oxygen_volpct).abs() < 2.0, "{} s: {computed}", measured.time_s);
    }
}

pub fn table() -> String {
    let mut text = String::from(
        "## Burner in a shut room until it went out by itself (2018)\n\n\
         Typical: oxygen limit 0.15, cracks 0.015 m², light gypsum board. Corners: limit 0.13 and 0.16, cracks 0 and 0.03 m², light and dense \
         board. One rule of the model was settled with these burns in view, so they are no independent check. Tests whose burner was turned off before the fire went out are not in the list, so the measured times lean early. Tolerance: typical time within a factor of 1.5, oxygen within 3 % by volume. The measured oxygen is the mean of high and low.\n\n\
         | test | measured s | typical s (ratio) | corners s | oxygen % | typical % | mean °C | typical °C | |\n\
         |---|---|---|---|---|---|---|---|---|\n",
    );
    for measured in burns() {
        let typical = burn(measured.fuel_kw, TYPICAL);
        let (low_s, high_s) = span(measured.fuel_kw, |burn| burn.state.time_s);
        let outside = if (low_s..=high_s).contains(&measured.extinction_s) {
            String::new()
        } else {
            let nearest_s = measured.extinction_s.clamp(low_s, high_s);
            format!("outside the corners by {:.0} s", (nearest_s - measured.extinction_s).abs())
        };
        text.push_str(&format!(
            "| {} | {:.0} | {:.0} ({:.2}) | {low_s:.0} to {high_s:.0} | {:.1} | {:.1} | {:.0} | {:.0} | {outside} |\n",
            measured.name,
            measured.extinction_s,
            typical.state.time_s,
            typical.state.time_s / measured.extinction_s,
            measured.oxygen_volpct,
            volpct(&typical),
            measured.mean_c,
            celsius(&typical),
        ));
    }
    text.push_str(
        "\nOn the way there, mean of all tests; tolerance 0.67 to 1.41 on the rise, 2 % by volume on the oxygen.\n\n\
         | kW | s | measured rise K | typical rise K (ratio) | oxygen % | typical % |\n|---|---|---|---|---|---|\n",
    );
    for measured in course() {
        let computed = burn_until(measured.fuel_kw, TYPICAL, measured.time_s);
        let rise_k = computed.state.temperature_k - 293.15;
        text.push_str(&format!(
            "| {:.0} | {:.0} | {:.0} | {rise_k:.0} ({:.2}) | {:.1} | {:.1} |\n",
            measured.fuel_kw,
            measured.time_s,
            measured.rise_k,
            rise_k / measured.rise_k,
            measured.oxygen_volpct,
            volpct(&computed),
        ));
    }
    text
}
