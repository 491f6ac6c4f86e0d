//! Bias and scatter of computed over measured.
//!
//! Tests are counted, not rows: each test (or configuration that was repeated) weighs the same within its
//! series, whatever the number of its moments; each series weighs the same in the pool.
//!
//! ```text
//! bias = Σ w r          r = computed / measured, Σ w = 1
//! sd   = √(Σ w (r - bias)² · n/(n-1)) / bias      n = tests counted
//! sd without the measurement's scatter = √(max(0, sd² - s²))
//! ```

use super::point::{Point, Quantity, Series};
use super::run::count;

/// Bias and relative standard deviation over some points.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Spread {
    pub bias: f64,
    /// Relative to the bias, the measurement's own scatter within.
    pub sd: f64,
    /// Tests or configurations counted.
    pub tests: usize,
    /// Values compared.
    pub values: usize,
    pub lowest: f64,
    pub highest: f64,
}

impl Spread {
    /// The scatter that is left when that of the measurement is taken off.
    pub fn sd_without(&self, measurement_sd: f64) -> f64 {
        (self.sd * self.sd - measurement_sd * measurement_sd).max(0.0).sqrt()
    }
}

/// A ratio with its weight.
type Weighed = (f64, f64);

/// Points that count, of one quantity and one series.
pub fn counting(points: &[Point], quantity: Quantity, series: Series) -> Vec<&Point> {
    points
        .iter()
        .filter(|point| point.quantity == quantity && point.series == series && point.left_out.is_none())
        .collect()
}

fn tests(points: &[&Point]) -> Vec<String> {
    let mut names: Vec<String> = points.iter().map(|point| point.counted.clone()).collect();
    names.sort();
    names.dedup();
    names
}

fn weighed(points: &[&Point], ratio: &dyn Fn(&Point) -> Option<f64>, share: f64) -> Vec<Weighed> {
    let present: Vec<&Point> = points.iter().copied().filter(|point| ratio(point).is_some()).collect();
    let names = tests(&present);
    present
        .iter()
        .filter_map(|point| {
            let of_test = present.iter().filter(|other| other.counted == point.counted).count();
            Some((ratio(point)?, share / (count(names.len()) * count(of_test))))
        })
        .collect()
}

fn spread(weighed: &[Weighed], tests: usize) -> Option<Spread> {
    if weighed.is_empty() {
        return None;
    }
    let total: f64 = weighed.iter().map(|(_, weight)| weight).sum();
    let bias = weighed.iter().map(|(ratio, weight)| ratio * weight).sum::<f64>() / total;
    let variance =
        weighed.iter().map(|(ratio, weight)| weight * (ratio - bias) * (ratio - bias)).sum::<f64>() / total;
    let correction = if tests > 1 { count(tests) / count(tests - 1) } else { 1.0 };
    let ratios = || weighed.iter().map(|&(ratio, _)| ratio);
    Some(Spread {
        bias,
        sd: (variance * correction).sqrt() / bias,
        tests,
        values: weighed.len(),
        lowest: ratios().fold(f64::INFINITY, f64::min),
        highest: ratios().fold(f64::NEG_INFINITY, f64::max),
    })
}

/// Of one series, by a ratio: [`Point::ratio`], or that of the engine's plain layers.
pub fn of_series(
    points: &[Point],
    quantity: Quantity,
    series: Series,
    ratio: &dyn Fn(&Point) -> Option<f64>,
) -> Option<Spread> {
    let taken = counting(points, quantity, series);
    let present: Vec<&Point> = taken.iter().copied().filter(|point| ratio(point).is_some()).collect();
    spread(&weighed(&taken, ratio, 1.0), tests(&present).len())
}

/// Of all series that count, each weighing the same.
pub fn pooled(points: &[Point], quantity: Quantity, ratio: &dyn Fn(&Point) -> Option<f64>) -> Option<Spread> {
    let mut all = Vec::new();
    let mut counted = 0;
    for series in Series::ALL {
        let taken = counting(points, quantity, series);
        let present: Vec<&Point> = taken.iter().copied().filter(|point| ratio(point).is_some()).collect();
        counted += tests(&present).len();
        all.extend(weighed(&taken, ratio, 1.0));
    }
    spread(&all, counted)
}

/// Tests, not rows, for which something holds; a test whose run gave nothing does not.
///
/// Returns how many tests hold, and of how many.
pub fn holding(points: &[&Point], holds: &dyn Fn(&Point) -> bool) -> (usize, usize) {
    let mut names: Vec<&str> = points.iter().map(|point| point.test.as_str()).collect();
    names.sort_unstable();
    names.dedup();
    let held = names
        .iter()
        .filter(|name| points.iter().filter(|point| point.test == **name).all(|point| holds(point)))
        .count();
    (held, names.len())
}

/// The ratio of the engine's own layers, where sensors see others.
pub fn plain_ratio(point: &Point) -> Option<f64> {
    point.plain.or(point.computed).map(|plain| plain / point.measured)
}

#[cfg(test)]
mod tests_of_it {
    use super::*;

    fn at(series: Series, test: &str, ratio: f64) -> Point {
        Point::new(series, Quantity::UpperRise, test, "", 100.0, Some(100.0 * ratio))
    }

    #[test]
    fn a_test_of_many_rows_weighs_as_one_of_a_single_row() {
        let points = vec![
            at(Series::Steckler, "a", 1.2),
            at(Series::Steckler, "a", 1.2),
            at(Series::Steckler, "a", 1.2),
            at(Series::Steckler, "b", 0.8),
        ];

        let spread = of_series(&points, Quantity::UpperRise, Series::Steckler, &Point::ratio).unwrap();

        // By hand: bias (1.2 + 0.8)/2 = 1.0; variance 0.04 · 2/1 = 0.08, root 0.28284.
        assert!((spread.bias - 1.0).abs() < 1e-12 && (spread.sd - 0.282_842_7).abs() < 1e-6, "{spread:?}");
        assert_eq!((spread.tests, spread.values), (2, 4));
    }

    #[test]
    fn a_series_of_many_tests_weighs_as_one_of_few() {
        let mut points: Vec<Point> =
            (0..9).map(|test| at(Series::Steckler, &test.to_string(), 1.1)).collect();
        points.push(at(Series::LargeRoom, "x", 0.9));

        let spread = pooled(&points, Quantity::UpperRise, &Point::ratio).unwrap();

        // By hand: bias (1.1 + 0.9)/2 = 1.0; variance 0.01 · 10/9, root 0.105409.
        assert!((spread.bias - 1.0).abs() < 1e-12 && (spread.sd - 0.105_409_3).abs() < 1e-6, "{spread:?}");
    }

    #[test]
    fn what_is_left_out_or_missing_does_not_count() {
        let mut out = at(Series::Steckler, "b", 9.0);
        out.left_out = Some("wrong");
        let mut failed = at(Series::Steckler, "c", 1.0);
        failed.computed = None;
        let points = vec![at(Series::Steckler, "a", 1.0), out, failed];

        let spread = of_series(&points, Quantity::UpperRise, Series::Steckler, &Point::ratio).unwrap();
        let held = holding(&counting(&points, Quantity::UpperRise, Series::Steckler), &|point| {
            point.computed.is_some()
        });

        assert_eq!((spread.tests, spread.bias), (1, 1.0));
        // The failed one is a test all the same.
        assert_eq!(held, (1, 2));
    }

    #[test]
    fn measurement_scatter_comes_off_in_squares() {
        let spread = Spread { bias: 1.0, sd: 0.13, tests: 3, values: 3, lowest: 0.9, highest: 1.1 };

        // By hand: √(0.13² - 0.05²) = √0.0144 = 0.12.
        assert!((spread.sd_without(0.05) - 0.12).abs() < 1e-12);
        assert_eq!(spread.sd_without(0.2), 0.0);
    }
}
