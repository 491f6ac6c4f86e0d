//! The bars, in one place, and whether they are met.

use super::misses;
use super::point::{Point, Quantity, Series};
use super::run::count;
use super::statistics::{Spread, counting, holding, of_series, pooled};

/// What a bar asks of a quantity.
#[derive(Clone, Copy, Debug)]
pub enum Demand {
    /// Comes from at least so many series.
    Series(usize),
    /// Pooled bias, each series weighing the same.
    Bias(f64, f64),
    /// Pooled relative standard deviation, the measurement's scatter within.
    Sd(f64),
    /// Bias of every series by itself.
    EachBias(f64, f64),
    /// Standard deviation of every series by itself, and of one series that is allowed more.
    EachSd(f64, Option<(Series, f64)>),
    /// Computed within so much of the measured, in at least this share of the tests.
    Within(f64, f64),
    /// Computed over measured within these, in at least this share of the tests.
    Factor(f64, f64, f64),
    /// Yes or no told rightly, in at least so many of so many tests.
    Right(usize, usize),
}

/// A bar: what must be met, and what is worth being proud of.
pub struct Bar {
    pub quantity: Quantity,
    pub must: &'static [Demand],
    pub proud: &'static [Demand],
    /// Relative standard deviation of the measurement, and where it comes from.
    pub scatter: Option<(f64, &'static str)>,
    /// What is written where it is missed.
    pub miss: Option<misses::Miss>,
}

const NUREG: &str = "NUREG-1934, Table 4-1 (from memory)";

/// All bars. None of them follows from what the engine gives: they were set before it ran.
pub static BARS: [Bar; 12] = [
    Bar {
        quantity: Quantity::UpperRise,
        must: &[
            Demand::Series(4),
            Demand::Bias(0.90, 1.15),
            Demand::Sd(0.14),
            Demand::EachBias(0.80, 1.30),
            Demand::EachSd(0.13, Some((Series::Furniture, 0.17))),
        ],
        proud: &[Demand::Bias(0.95, 1.05), Demand::Sd(0.10)],
        scatter: Some((0.07, NUREG)),
        miss: misses::UPPER_RISE,
    },
    Bar {
        quantity: Quantity::LayerDepth,
        must: &[Demand::Bias(0.85, 1.12), Demand::Sd(0.18)],
        proud: &[Demand::Bias(0.93, 1.07), Demand::Sd(0.12)],
        scatter: Some((0.07, NUREG)),
        miss: misses::LAYER_DEPTH,
    },
    Bar {
        quantity: Quantity::VentFlow,
        must: &[Demand::Bias(0.85, 1.05), Demand::Sd(0.12)],
        proud: &[Demand::Bias(0.92, 1.05), Demand::Sd(0.08)],
        scatter: Some((0.05, "the flow is good to 10 % (two standard deviations)")),
        miss: misses::VENT_FLOW,
    },
    Bar {
        quantity: Quantity::NeutralPlane,
        must: &[Demand::Bias(0.95, 1.05), Demand::Sd(0.06)],
        proud: &[Demand::Bias(0.95, 1.05), Demand::Sd(0.04)],
        scatter: Some((0.03, "rows of probes 0.114 m apart, even spread between them, at about 1.05 m")),
        miss: misses::NEUTRAL_PLANE,
    },
    Bar {
        quantity: Quantity::OxygenDecreaseForced,
        must: &[Demand::Bias(0.95, 1.12), Demand::Sd(0.10)],
        proud: &[Demand::Bias(0.95, 1.12), Demand::Sd(0.07)],
        scatter: Some((0.05, NUREG)),
        miss: misses::OXYGEN_FORCED,
    },
    Bar {
        quantity: Quantity::OxygenDecreaseShut,
        must: &[Demand::Bias(0.90, 1.10), Demand::Sd(0.15)],
        proud: &[Demand::Bias(0.90, 1.10), Demand::Sd(0.10)],
        scatter: Some((0.05, NUREG)),
        miss: misses::OXYGEN_SHUT,
    },
    Bar {
        quantity: Quantity::MeanRiseShut,
        must: &[Demand::Bias(0.90, 1.10), Demand::Sd(0.15)],
        proud: &[Demand::Bias(0.90, 1.10), Demand::Sd(0.10)],
        scatter: Some((0.07, NUREG)),
        miss: misses::MEAN_RISE_SHUT,
    },
    Bar {
        quantity: Quantity::ExtinctionOxygen,
        must: &[Demand::Within(3.0, 0.90)],
        proud: &[Demand::Within(1.5, 0.90)],
        scatter: None,
        miss: misses::EXTINCTION_OXYGEN,
    },
    Bar {
        quantity: Quantity::ExtinctionTime,
        must: &[Demand::Factor(0.5, 1.7, 0.80)],
        proud: &[Demand::Factor(0.8, 1.25, 0.80)],
        scatter: None,
        miss: misses::EXTINCTION_TIME,
    },
    Bar {
        quantity: Quantity::TimeTo500,
        must: &[Demand::Bias(0.95, 1.12), Demand::Sd(0.06), Demand::Within(30.0, 0.75)],
        proud: &[],
        scatter: Some((0.027, "hood lag even between 0 and 25 s, at about 270 s")),
        miss: misses::TIME_TO_500,
    },
    Bar {
        quantity: Quantity::Reaches600,
        must: &[Demand::Right(6, 8)],
        proud: &[Demand::Right(7, 8)],
        scatter: None,
        miss: misses::REACHES_600,
    },
    Bar {
        quantity: Quantity::PeakRise,
        must: &[Demand::Bias(0.80, 1.05), Demand::Sd(0.12)],
        proud: &[Demand::Bias(0.95, 1.05), Demand::Sd(0.12)],
        scatter: Some((0.07, NUREG)),
        miss: misses::PEAK_RISE,
    },
];

/// A bar with what came out.
pub struct Judged {
    pub bar: &'static Bar,
    /// Pooled; none where nothing came out.
    pub pooled: Option<Spread>,
    pub by_series: Vec<(Series, Spread)>,
    /// Tests that came out right, of how many, where the bar counts tests.
    pub held: Option<(usize, usize)>,
    /// Runs that gave nothing.
    pub missing: usize,
    pub must: Vec<(Demand, bool)>,
    pub proud: Vec<(Demand, bool)>,
}

impl Judged {
    pub fn met(&self) -> bool {
        self.must.iter().all(|&(_, met)| met)
    }

    /// Reaches what is worth being proud of, where that is stated.
    pub fn proud(&self) -> bool {
        self.met() && !self.proud.is_empty() && self.proud.iter().all(|&(_, met)| met)
    }

    pub fn verdict(&self) -> &'static str {
        match (self.proud(), self.met()) {
            (true, _) => "met, and the better bar too",
            (false, true) => "met",
            (false, false) => "missed",
        }
    }
}

/// Each bar against the points.
pub fn judge(points: &[Point]) -> Vec<Judged> {
    BARS.iter().map(|bar| judge_one(bar, points)).collect()
}

fn judge_one(bar: &'static Bar, points: &[Point]) -> Judged {
    let quantity = bar.quantity;
    // A yes or a no has no ratio.
    let ratio =
        |point: &Point| point.ratio().filter(|ratio| ratio.is_finite() && quantity != Quantity::Reaches600);
    let by_series: Vec<(Series, Spread)> = Series::ALL
        .into_iter()
        .filter_map(|series| Some((series, of_series(points, quantity, series, &ratio)?)))
        .collect();
    let pool = pooled(points, quantity, &ratio);
    let taken: Vec<&Point> =
        Series::ALL.into_iter().flat_map(|series| counting(points, quantity, series)).collect();
    let missing = taken.iter().filter(|point| point.computed.is_none()).count();
    let judged = |demands: &'static [Demand]| -> Vec<(Demand, bool)> {
        demands.iter().map(|&demand| (demand, meets(demand, pool, &by_series, &taken, missing))).collect()
    };
    let held = bar.must.iter().find_map(|&demand| held(demand, &taken));
    Judged { bar, pooled: pool, held, missing, must: judged(bar.must), proud: judged(bar.proud), by_series }
}

fn held(demand: Demand, points: &[&Point]) -> Option<(usize, usize)> {
    let off = |point: &Point| Some((point.computed? - point.measured).abs());
    match demand {
        Demand::Within(by, _) => Some(holding(points, &|point| off(point).is_some_and(|off| off <= by))),
        Demand::Factor(low, high, _) => {
            Some(holding(points, &|point| point.ratio().is_some_and(|ratio| (low..=high).contains(&ratio))))
        }
        Demand::Right(..) => Some(holding(points, &|point| off(point).is_some_and(|off| off < 0.5))),
        _ => None,
    }
}

fn meets(
    demand: Demand,
    pool: Option<Spread>,
    by_series: &[(Series, Spread)],
    points: &[&Point],
    missing: usize,
) -> bool {
    let share = |least: f64| {
        held(demand, points).is_some_and(|(right, of)| of > 0 && count(right) >= least * count(of) - 1e-9)
    };
    // A mean over the tests that happened to run is no mean: any that gave nothing misses the bar, but for a
    // time that never came, which the share counts as a miss.
    let whole = missing == 0 || points.iter().all(|point| point.quantity == Quantity::TimeTo500);
    match demand {
        Demand::Series(least) => by_series.len() >= least,
        Demand::Bias(low, high) => whole && pool.is_some_and(|pool| (low..=high).contains(&pool.bias)),
        Demand::Sd(most) => whole && pool.is_some_and(|pool| pool.sd <= most),
        Demand::EachBias(low, high) => {
            !by_series.is_empty() && by_series.iter().all(|(_, spread)| (low..=high).contains(&spread.bias))
        }
        Demand::EachSd(most, but) => {
            !by_series.is_empty()
                && by_series.iter().all(|(series, spread)| {
                    let most = but.filter(|(other, _)| other == series).map_or(most, |(_, other)| other);
                    spread.sd <= most
                })
        }
        Demand::Within(_, least) | Demand::Factor(_, _, least) => share(least),
        Demand::Right(least, of) => {
            held(demand, points).is_some_and(|(right, tests)| tests == of && right >= least)
        }
    }
}

/// A demand in words.
pub fn words(demand: Demand, unit: &str) -> String {
    match demand {
        Demand::Series(least) => format!("{least} series"),
        Demand::Bias(low, high) => format!("bias {low:.2} to {high:.2}"),
        Demand::Sd(most) => format!("sd ≤ {most:.2}"),
        Demand::EachBias(low, high) => format!("each series {low:.2} to {high:.2}"),
        Demand::EachSd(most, None) => format!("each ≤ {most:.2}"),
        Demand::EachSd(most, Some((series, other))) => {
            format!("each ≤ {most:.2} ({} {other:.2})", series.key())
        }
        Demand::Within(by, least) => format!("within {by} {unit} in {:.0} %", 100.0 * least),
        Demand::Factor(low, high, least) => format!("factor {low} to {high} in {:.0} %", 100.0 * least),
        Demand::Right(least, of) => format!("{least} of {of} right"),
    }
}
