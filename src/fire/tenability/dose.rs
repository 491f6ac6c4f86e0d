//! A fractional effective dose, summed along straight lines between samples.

use super::asphyxiants::Asphyxiants;
use super::heat::Heat;
use crate::fire::search;

/// Something that acts on a person at a rate.
pub trait Exposure: Copy + PartialEq {
    /// Dose per minute: 1 is the full dose.
    fn dose_rate_1_min(&self) -> f64;

    /// What stands there a share of the way to another, along a straight line.
    #[must_use]
    fn towards(&self, other: &Self, share: f64) -> Self;

    /// Shares of the way at which the rate steps or bends.
    fn breaks(&self, other: &Self) -> [Option<f64>; 2];
}

/// A dose that counts as too much.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Line {
    /// 0.3: about one person in nine is overcome (ISO 13571: log-normal about 1, 11 %).
    ThreeTenths,
    /// 0.1: where people sleep or need help; about one in a hundred.
    OneTenth,
}

impl Line {
    /// The dose.
    #[must_use]
    pub const fn dose(self) -> f64 {
        match self {
            Self::ThreeTenths => 0.3,
            Self::OneTenth => 0.1,
        }
    }
}

/// Dose of gases that stun.
pub type GasDose = Dose<Asphyxiants>;

/// Dose of heat.
pub type HeatDose = Dose<Heat>;

/// A dose as it adds up.
///
/// ```text
/// FED = ∫ dt / t(state)
/// ```
///
/// Between two samples the state runs along a straight line and the rate is summed by Gauss' rule of five
/// points, cut where the rate steps: within 2 % even where the rate grows or falls ten thousand times between
/// two samples. A dose of 1 overcomes half of all people; which dose decides is a [`Line`].
///
/// Source: [`ISO_13571`](crate::fire::sources::ISO_13571).
///
/// ```
/// use sootline::fire::tenability::{Asphyxiants, GasDose, Line};
///
/// // By hand: 1400 ppm of CO: 35 000/1400 = 25 min to a full dose, 0.3 · 25 min = 450 s.
/// let smoke = Asphyxiants { carbon_monoxide_ppm: 1400.0, ..Asphyxiants::FRESH_AIR };
/// let mut dose = GasDose::starting(0.0, smoke);
/// dose.add(600.0, smoke);
/// dose.add(900.0, smoke);
/// assert!((dose.total() - 1.0).abs() < 1e-12);
/// assert!((dose.reached_s(Line::ThreeTenths).unwrap() - 450.0).abs() < 0.02);
/// ```
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Dose<E> {
    time_s: f64,
    state: E,
    total: f64,
    three_tenths_s: Option<f64>,
    one_tenth_s: Option<f64>,
}

impl<E: Exposure> Dose<E> {
    /// No dose yet; the state at this time.
    #[must_use]
    pub const fn starting(at_s: f64, state: E) -> Self {
        Self { time_s: at_s, state, total: 0.0, three_tenths_s: None, one_tenth_s: None }
    }

    /// Adds what is taken in while the state runs along a straight line to this one. A time that is not finite, or
    /// not later, adds nothing.
    pub fn add(&mut self, dt_s: f64, state: E) {
        if dt_s > 0.0 && dt_s.is_finite() {
            let taken = integral(&self.state, &state, dt_s);
            self.three_tenths_s =
                self.three_tenths_s.or_else(|| self.crossed_s(Line::ThreeTenths, taken, dt_s, &state));
            self.one_tenth_s =
                self.one_tenth_s.or_else(|| self.crossed_s(Line::OneTenth, taken, dt_s, &state));
            self.total += taken;
            self.time_s += dt_s;
        }
        self.state = state;
    }

    /// The state changes at once, without time: the layer passes the head.
    pub fn change_to(&mut self, state: E) {
        self.state = state;
    }

    /// The dose so far.
    #[must_use]
    pub const fn total(&self) -> f64 {
        self.total
    }

    /// When the dose reached a line, s; none while it has not.
    #[must_use]
    pub const fn reached_s(&self, line: Line) -> Option<f64> {
        match line {
            Line::ThreeTenths => self.three_tenths_s,
            Line::OneTenth => self.one_tenth_s,
        }
    }

    /// When the dose passes a line on the way to a state; none where it does not.
    fn crossed_s(&self, line: Line, taken: f64, dt_s: f64, state: &E) -> Option<f64> {
        if self.total + taken < line.dose() {
            return None;
        }
        let reached = |since_s: f64| {
            let there = self.state.towards(state, since_s / dt_s);
            self.total + integral(&self.state, &there, since_s) >= line.dose()
        };
        // A step so long that the search cannot end has no better answer than its end.
        Some(self.time_s + search::first_time_s("dose", 0.0, dt_s, reached).unwrap_or(dt_s))
    }
}

/// Dose taken in along a straight line, cut where the rate steps.
fn integral<E: Exposure>(from: &E, to: &E, dt_s: f64) -> f64 {
    let dt_min = dt_s / 60.0;
    if from == to {
        return from.dose_rate_1_min() * dt_min;
    }
    let [a, b] = from.breaks(to).map(|share| share.unwrap_or(1.0));
    let cuts = [0.0, a.min(b), a.max(b), 1.0];
    let share: f64 = cuts.windows(2).map(|two| piece(from, to, two[0], two[1])).sum();
    share * dt_min
}

/// Rate over a piece of the way, by Gauss' rule of five points.
fn piece<E: Exposure>(from: &E, to: &E, start: f64, end: f64) -> f64 {
    /// Points from the middle, as shares of the half, and their weights: exact to the ninth degree. The published
    /// digits end where a double does.
    const POINTS: [(f64, f64); 5] = [
        (-0.906_179_845_938_664, 0.236_926_885_056_189_1),
        (-0.538_469_310_105_683_1, 0.478_628_670_499_366_5),
        (0.0, 0.568_888_888_888_888_9),
        (0.538_469_310_105_683_1, 0.478_628_670_499_366_5),
        (0.906_179_845_938_664, 0.236_926_885_056_189_1),
    ];

    if end <= start {
        return 0.0;
    }
    let (middle, half) = (0.5 * (start + end), 0.5 * (end - start));
    // A rate is never negative; what is not a number counts as nothing.
    let rate = |share: f64| from.towards(to, share).dose_rate_1_min().max(0.0);
    half * POINTS.iter().map(|(at, weight)| weight * rate(middle + at * half)).sum::<f64>()
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::fire::tenability::heat::Clothing;
    use approx::assert_relative_eq;
    use proptest::prelude::*;

    const FRESH: Asphyxiants = Asphyxiants::FRESH_AIR;

    /// One straight line from fresh air, in equal steps.
    fn along(to: Asphyxiants, minutes: f64, steps: u32) -> GasDose {
        let mut dose = GasDose::starting(0.0, FRESH);
        for step in 1..=steps {
            dose.add(
                60.0 * minutes / f64::from(steps),
                FRESH.towards(&to, f64::from(step) / f64::from(steps)),
            );
        }
        dose
    }

    #[test]
    fn ramps_in_one_step_give_their_closed_forms() {
        // By hand: ∫ C t/T dt = C T/2: 7000 ppm over 10 min: 7000·10/2/35 000 = 1.
        let monoxide = Asphyxiants { carbon_monoxide_ppm: 7000.0, ..FRESH };
        assert_relative_eq!(along(monoxide, 10.0, 1).total(), 1.0, max_relative = 1e-12);
        // By hand: a^2.36 T/3.36: 200^2.36·10/(3.36·1.2e6) = 269 421·10/4.032e6 = 0.66821.
        let cyanide = Asphyxiants { hydrogen_cyanide_ppm: 200.0, ..FRESH };
        assert_relative_eq!(along(cyanide, 10.0, 1).total(), 0.668_21, max_relative = 1e-4);
        // By hand: from 20 to 5 % in 15/15.95 of 10 min: (e^(0.54·15.9-8.13) - e^(0.54·0.9-8.13))
        // / 0.54 · 10/15.95 = (1.57775 - 0.00047891)/0.54 · 0.626959 = 1.83127.
        let starved = Asphyxiants { oxygen_percent: 5.0, ..FRESH };
        assert_relative_eq!(along(starved, 10.0, 1).total(), 1.831_27, max_relative = 1e-4);
    }

    #[test]
    fn a_step_of_the_rate_within_a_sample_is_cut_where_it_is() {
        // 3500 ppm of CO all the time (0.1 per minute), CO₂ from 0 to 4 % in 10 min: 5 min at 1, then
        // ∫ e^(0.4 t/5) over the second half = (e^0.8 - e^0.4)/0.08 = (2.225541 - 1.491825)/0.08 = 9.17145.
        let from = Asphyxiants { carbon_monoxide_ppm: 3500.0, carbon_dioxide_percent: 0.0, ..FRESH };
        let to = Asphyxiants { carbon_dioxide_percent: 4.0, ..from };
        let mut dose = GasDose::starting(0.0, from);

        dose.add(600.0, to);

        assert_relative_eq!(dose.total(), 0.1 * (5.0 + 9.171_45), max_relative = 1e-6);
    }

    #[test]
    fn a_line_crossed_within_a_ramp_is_found_where_it_is() {
        // 7000 ppm reached after 600 s: dose = t²/600²: 0.3 at 600 √0.3 = 328.63 s, 0.1 at 189.74 s.
        let dose = along(Asphyxiants { carbon_monoxide_ppm: 7000.0, ..FRESH }, 10.0, 3);

        assert!((dose.reached_s(Line::ThreeTenths).unwrap() - 328.63).abs() < 0.02);
        assert!((dose.reached_s(Line::OneTenth).unwrap() - 189.74).abs() < 0.02);
    }

    #[test]
    fn a_line_not_reached_has_no_time() {
        // 0.2999 of a full dose: the second line only.
        let mut dose = GasDose::starting(0.0, Asphyxiants { carbon_monoxide_ppm: 3500.0, ..FRESH });
        dose.add(60.0 * 2.999, Asphyxiants { carbon_monoxide_ppm: 3500.0, ..FRESH });

        assert!(dose.reached_s(Line::ThreeTenths).is_none());
        assert!((dose.reached_s(Line::OneTenth).unwrap() - 60.0).abs() < 0.02);
    }

    #[test]
    fn the_error_of_a_smooth_sum_falls_with_the_tenth_power_of_the_step() {
        // Oxygen from 19 to 3 %: the closed form is an exponential.
        let from = Asphyxiants { oxygen_percent: 19.0, ..FRESH };
        let to = Asphyxiants { oxygen_percent: 3.0, ..FRESH };
        let exact = ((0.54_f64 * 17.9 - 8.13).exp() - (0.54_f64 * 1.9 - 8.13).exp()) / 0.54 / 16.0;
        let error = |steps: u32| {
            let mut dose = GasDose::starting(0.0, from);
            for step in 1..=steps {
                dose.add(60.0 / f64::from(steps), from.towards(&to, f64::from(step) / f64::from(steps)));
            }
            (dose.total() / exact - 1.0).abs()
        };

        let order = (error(2) / error(4)).log2();
        assert!((9.0..11.0).contains(&order), "{order}");
        assert!(error(1) < 0.01 && error(4) < 1e-8, "{} {}", error(1), error(4));
    }

    #[test]
    fn a_change_without_time_adds_nothing_and_counts_from_then_on() {
        let smoke = Asphyxiants { carbon_monoxide_ppm: 35_000.0, ..FRESH };
        let mut dose = GasDose::starting(10.0, FRESH);

        dose.add(50.0, FRESH);
        dose.change_to(smoke);
        assert_eq!(dose.total(), 0.0);
        dose.add(30.0, smoke);

        // By hand: 1 per minute from 60 s on: 0.5, and 0.3 after 18 s.
        assert_relative_eq!(dose.total(), 0.5, max_relative = 1e-12);
        assert!((dose.reached_s(Line::ThreeTenths).unwrap() - 78.0).abs() < 0.02);
    }

    #[test]
    fn what_cannot_be_adds_nothing_and_ends() {
        let mut dose = HeatDose::starting(
            0.0,
            Heat { gas_temperature_k: 300.0, flux_kw_m2: 0.0, clothing: Clothing::Light },
        );
        for wrong in [f64::NAN, f64::INFINITY, -1.0, 0.0] {
            dose.add(wrong, Heat { gas_temperature_k: 800.0, flux_kw_m2: 20.0, clothing: Clothing::Light });
        }
        assert_eq!(dose.total(), 0.0);

        let mut dose = GasDose::starting(0.0, FRESH);
        dose.add(1e9, Asphyxiants { carbon_monoxide_ppm: f64::NAN, ..FRESH });
        assert_eq!(dose.total(), 0.0);
    }

    fn any_air() -> impl Strategy<Value = Asphyxiants> {
        (0.0..50_000.0_f64, 0.0..1000.0_f64, 0.0..20.0_f64, 0.0..21.0_f64).prop_map(|(co, hcn, co2, o2)| {
            Asphyxiants {
                carbon_monoxide_ppm: co,
                hydrogen_cyanide_ppm: hcn,
                carbon_dioxide_percent: co2,
                oxygen_percent: o2,
            }
        })
    }

    proptest! {
        #[test]
        fn a_dose_never_falls_and_does_not_depend_on_how_the_line_is_cut(from in any_air(), to in any_air(), cut in 0.01..0.99_f64) {
            let mut whole = GasDose::starting(0.0, from);
            whole.add(60.0, to);
            let mut halves = GasDose::starting(0.0, from);
            halves.add(60.0 * cut, from.towards(&to, cut));
            let first = halves.total();
            halves.add(60.0 * (1.0 - cut), to);

            prop_assert!(first >= 0.0 && halves.total() >= first && whole.total().is_finite());
            prop_assert!((whole.total() - halves.total()).abs() <= 0.02 * whole.total());
            match (whole.reached_s(Line::ThreeTenths), halves.reached_s(Line::ThreeTenths)) {
                (Some(a), Some(b)) => prop_assert!((a - b).abs() < 0.5, "{a} {b}"),
                (None, None) => {}
                _ => prop_assert!((whole.total() - 0.3).abs() < 0.006),
            }
        }
    }
}
