//! What was there, came and went adds up, in any building.

use proptest::test_runner::{Config, RngAlgorithm, TestCaseError, TestRng, TestRunner};
use sootline::fire::two_zone::{Network, Plan, Sample};

use super::buildings::any_building;
use super::support::{is_finite, try_run};

/// A runner that always meets the same buildings.
fn runner(cases: u32) -> TestRunner {
    let config = Config { cases, failure_persistence: None, max_shrink_iters: 100, ..Config::default() };
    TestRunner::new_with_rng(config, TestRng::from_seed(RngAlgorithm::ChaCha, &[7; 32]))
}

fn sane(sample: &Sample) -> Result<(), String> {
    if !is_finite(sample) {
        return Err(format!("not finite at {}", sample.time_s));
    }
    for room in &sample.rooms {
        for layer in [&room.upper, &room.lower] {
            let g = &layer.gas;
            let whole = g.oxygen
                + g.carbon_dioxide
                + g.water
                + g.carbon_monoxide
                + g.hydrogen_cyanide
                + g.soot
                + g.unburned_fuel;
            if !(0.0..=1.0 + 1e-6).contains(&whole) {
                return Err(format!("gas of {whole} at {}", sample.time_s));
            }
            if layer.mass_kg < 0.0 {
                return Err(format!("mass {} at {}", layer.mass_kg, sample.time_s));
            }
        }
    }
    Ok(())
}

fn adds_up(network: &Network) -> Result<(), TestCaseError> {
    // Far more steps than any of these takes; a run that creeps is a fault too.
    let plan = Plan { step_budget: 20_000, ..Plan::every(10.0, 300.0) };
    let (samples, ended) =
        try_run(network, &plan).map_err(|failed| TestCaseError::fail(format!("{failed:?}")))?;
    samples.iter().try_for_each(sane).map_err(TestCaseError::fail)?;
    let balance = ended.balance;
    for (what, error) in [
        ("mass", balance.mass_error_relative),
        ("energy", balance.energy_error_relative),
        ("elements", balance.element_error_relative),
    ] {
        if error.is_nan() || error > 1e-8 {
            return Err(TestCaseError::fail(format!("{what} off by {error:e}")));
        }
    }
    Ok(())
}

#[test]
fn mass_energy_and_elements_add_up_in_any_building() {
    runner(40).run(&any_building(), |network| adds_up(&network)).unwrap();
}

#[test]
#[ignore = "ten times as many buildings; a minute"]
fn mass_energy_and_elements_add_up_in_many_buildings() {
    runner(400).run(&any_building(), |network| adds_up(&network)).unwrap();
}
