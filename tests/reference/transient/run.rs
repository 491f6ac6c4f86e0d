//! Runs a network and reads what the comparison asks for.

use std::sync::Mutex;

use sootline::fire::two_zone::{Ended, EventKind, Failed, Network, Plan, RoomState, Sample};

/// What runs a network: the engine, or a stand-in that tries the harness.
pub type Engine = dyn Fn(&Network, &Plan) -> Result<(Vec<Sample>, Ended), Failed> + Sync;

/// The engine itself.
pub fn engine(network: &Network, plan: &Plan) -> Result<(Vec<Sample>, Ended), Failed> {
    let mut samples = Vec::new();
    let ended = sootline::fire::two_zone::run(
        network,
        plan,
        &mut |sample| samples.push(sample.clone()),
        &mut || std::ops::ControlFlow::Continue(()),
    )?;
    Ok((samples, ended))
}

/// Runs, and keeps what went wrong and how much work it was.
pub struct Runner<'a> {
    engine: &'a Engine,
    tally: Mutex<Tally>,
}

/// What the runs of a validation came to.
#[derive(Clone, Debug, Default)]
pub struct Tally {
    pub runs: usize,
    pub steps: usize,
    pub failures: Vec<String>,
    /// Greatest relative errors of mass, energy, elements.
    pub worst_balance: [f64; 3],
    pub ranges: super::range::Ranges,
}

impl<'a> Runner<'a> {
    pub fn new(engine: &'a Engine) -> Self {
        Self { engine, tally: Mutex::default() }
    }

    pub fn tally(self) -> Tally {
        let mut tally = self.tally.into_inner().unwrap_or_default();
        tally.failures.sort();
        tally
    }

    /// Runs a test. None: it failed, which the tally tells.
    pub fn run(
        &self,
        series: super::point::Series,
        test: &str,
        network: &Network,
        plan: &Plan,
    ) -> Option<Course> {
        let outcome = (self.engine)(network, plan);
        let mut tally = self.tally.lock().expect("no thread that holds it can panic");
        tally.runs += 1;
        match outcome {
            Ok((samples, ended)) => {
                tally.steps += ended.work.steps;
                let balance = &ended.balance;
                let errors = [
                    balance.mass_error_relative,
                    balance.energy_error_relative,
                    balance.element_error_relative,
                ];
                for (worst, error) in tally.worst_balance.iter_mut().zip(errors) {
                    *worst = worst.max(error.abs());
                }
                tally.ranges.add(series, network);
                Some(Course { samples, ended })
            }
            Err(failed) => {
                tally.failures.push(format!("{} {test}: {failed:?}", series.key()));
                None
            }
        }
    }
}

/// What one run gave.
pub struct Course {
    pub samples: Vec<Sample>,
    pub ended: Ended,
}

impl Course {
    /// A value at a moment, by straight lines between the samples about it.
    pub fn at(&self, time_s: f64, value: impl Fn(&Sample) -> f64) -> Option<f64> {
        let after = self.samples.iter().position(|sample| sample.time_s >= time_s)?;
        let late = &self.samples[after];
        if after == 0 || late.time_s <= time_s {
            return Some(value(late));
        }
        let early = &self.samples[after - 1];
        let share = (time_s - early.time_s) / (late.time_s - early.time_s);
        Some(value(early) * (1.0 - share) + value(late) * share)
    }

    /// Mean of a value over the samples from one moment to another.
    pub fn mean(&self, from_s: f64, to_s: f64, value: impl Fn(&Sample) -> f64) -> Option<f64> {
        let taken: Vec<f64> = self
            .samples
            .iter()
            .filter(|sample| (from_s - 1e-6..=to_s + 1e-6).contains(&sample.time_s))
            .map(value)
            .collect();
        (!taken.is_empty()).then(|| taken.iter().sum::<f64>() / count(taken.len()))
    }

    pub fn highest(&self, value: impl Fn(&Sample) -> f64) -> Option<f64> {
        self.samples.iter().map(value).reduce(f64::max)
    }

    pub fn lowest(&self, value: impl Fn(&Sample) -> f64) -> Option<f64> {
        self.samples.iter().map(value).reduce(f64::min)
    }

    /// First moment at which a rising value passes a mark, between samples by a straight line.
    pub fn first_above(&self, mark: f64, value: impl Fn(&Sample) -> f64) -> Option<f64> {
        let first = self.samples.iter().position(|sample| value(sample) >= mark)?;
        if first == 0 {
            return Some(self.samples[0].time_s);
        }
        let (early, late) = (&self.samples[first - 1], &self.samples[first]);
        let share = (mark - value(early)) / (value(late) - value(early));
        Some(early.time_s + share * (late.time_s - early.time_s))
    }

    /// When the fire went out by itself: as the engine tells it, else when a fed burner first burns
    /// less than a tenth of what it is fed.
    pub fn went_out_s(&self, fuel_kw: f64) -> Option<f64> {
        let told = self.ended.events.iter().find(|event| matches!(event.kind, EventKind::WentOut(0)));
        told.map(|event| event.at_s).or_else(|| {
            let weak =
                |sample: &&Sample| sample.time_s > 30.0 && sample.fires[0].heat_release_kw < 0.1 * fuel_kw;
            self.samples.iter().find(weak).map(|sample| sample.time_s)
        })
    }
}

/// Mean temperature of a room by volume, K.
pub fn mean_k(room: &RoomState, height_m: f64) -> f64 {
    let interface_m = room.interface_height_m.clamp(0.0, height_m);
    (room.upper.temperature_k * (height_m - interface_m) + room.lower.temperature_k * interface_m) / height_m
}

/// A count as a number.
pub fn count(n: usize) -> f64 {
    f64::from(u32::try_from(n).expect("far fewer than four thousand million points"))
}
