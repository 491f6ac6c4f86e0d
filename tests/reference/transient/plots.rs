//! Scatter plots as SVG: computed against measured, one mark a value, one colour and shape a series.

use std::fmt::Write as _;

use super::bars::Judged;
use super::point::{Point, Series};
use super::statistics::counting;

/// A drawing, px.
const SIZE: f64 = 560.0;
const LEFT: f64 = 74.0;
const TOP: f64 = 44.0;
const SIDE: f64 = 430.0;
const LEGEND_LINE: f64 = 18.0;

/// Colours that people with weak colour vision tell apart; none stands for good or bad, and none is green.
const fn colour(series: Series) -> &'static str {
    match series {
        Series::Steckler => "#0072b2",
        Series::OpenBurner => "#d55e00",
        Series::ShutBurner => "#aa3377",
        Series::Furniture => "#e69f00",
        Series::LargeRoom => "#56b4e9",
        _ => "#444444",
    }
}

fn mark(series: Series, x: f64, y: f64, counts: bool) -> String {
    let fill = colour(series);
    let style = if counts {
        format!(r##"fill="{fill}" fill-opacity="0.65" stroke="{fill}" stroke-width="0.5""##)
    } else {
        format!(r##"fill="none" stroke="{fill}" stroke-width="1.2""##)
    };
    let corners = |points: &[(f64, f64)]| {
        let corners: Vec<String> =
            points.iter().map(|(dx, dy)| format!("{:.1},{:.1}", x + dx, y + dy)).collect();
        format!(r##"<polygon points="{}" {style}/>"##, corners.join(" "))
    };
    match series {
        Series::OpenBurner => corners(&[(-3.2, -3.2), (3.2, -3.2), (3.2, 3.2), (-3.2, 3.2)]),
        Series::Furniture => corners(&[(0.0, -4.2), (4.2, 0.0), (0.0, 4.2), (-4.2, 0.0)]),
        Series::LargeRoom => corners(&[(0.0, -4.2), (3.9, 3.0), (-3.9, 3.0)]),
        Series::ShutBurner => corners(&[(0.0, 4.2), (3.9, -3.0), (-3.9, -3.0)]),
        _ => format!(r##"<circle cx="{x:.1}" cy="{y:.1}" r="3.5" {style}/>"##),
    }
}

/// One axis, the same for both directions.
#[derive(Clone, Copy)]
struct Axis {
    low: f64,
    high: f64,
    logarithmic: bool,
}

impl Axis {
    /// Round ends about all values: logarithmic where they span more than a factor of eight.
    fn about(values: &[f64]) -> Self {
        let highest = values.iter().copied().fold(f64::MIN, f64::max);
        let lowest = values.iter().copied().fold(f64::MAX, f64::min);
        if lowest > 0.0 && highest / lowest > 8.0 {
            return Self { low: round_down(lowest), high: round_up(highest), logarithmic: true };
        }
        let step = step(highest.max(1e-9));
        Self { low: 0.0, high: (highest * 1.02 / step).ceil() * step, logarithmic: false }
    }

    fn share(self, value: f64) -> f64 {
        if self.logarithmic {
            (value / self.low).ln() / (self.high / self.low).ln()
        } else {
            (value - self.low) / (self.high - self.low)
        }
    }

    fn ticks(self) -> Vec<f64> {
        if !self.logarithmic {
            let step = step(self.high);
            let mut ticks = Vec::new();
            let mut at = 0.0;
            while at <= self.high + 1e-9 {
                ticks.push(at);
                at += step;
            }
            return ticks;
        }
        let mut ticks = Vec::new();
        let mut decade = 10.0_f64.powf(self.low.log10().floor());
        while decade <= self.high {
            ticks.extend([1.0, 2.0, 5.0].map(|digit| digit * decade));
            decade *= 10.0;
        }
        ticks.retain(|tick| (self.low * 0.999..=self.high * 1.001).contains(tick));
        ticks
    }
}

/// About five steps to the top: 1, 2 or 5 times a power of ten.
fn step(highest: f64) -> f64 {
    let rough = highest / 5.0;
    let power = 10.0_f64.powf(rough.log10().floor());
    [1.0, 2.0, 5.0, 10.0].map(|digit| digit * power).into_iter().find(|step| *step >= rough).unwrap_or(rough)
}

fn round_down(value: f64) -> f64 {
    let power = 10.0_f64.powf(value.log10().floor());
    [5.0, 2.0, 1.0].map(|digit| digit * power).into_iter().find(|round| *round <= value).unwrap_or(power)
}

fn round_up(value: f64) -> f64 {
    let power = 10.0_f64.powf(value.log10().floor());
    [1.0, 2.0, 5.0, 10.0]
        .map(|digit| digit * power)
        .into_iter()
        .find(|round| *round >= value)
        .unwrap_or(value)
}

fn label(value: f64) -> String {
    let text = format!("{value:.3}");
    text.trim_end_matches('0').trim_end_matches('.').to_owned()
}

/// The plot of a bar: 1:1, the pooled bias, and the bias with two standard deviations to each side.
pub fn scatter(judged: &Judged, points: &[Point]) -> String {
    let quantity = judged.bar.quantity;
    let shown: Vec<(&Point, f64)> = points
        .iter()
        .filter(|point| point.quantity == quantity && !counting(points, quantity, point.series).is_empty())
        .filter_map(|point| Some((point, point.computed?)))
        .collect();
    let values: Vec<f64> = shown.iter().flat_map(|(point, computed)| [point.measured, *computed]).collect();
    let axis = Axis::about(&values);
    let series: Vec<Series> = judged.by_series.iter().map(|&(series, _)| series).collect();
    let across = |value: f64| LEFT + SIDE * axis.share(value);
    let up = |value: f64| TOP + SIDE * (1.0 - axis.share(value));

    let hollow = shown.iter().find(|(point, _)| point.left_out.is_some()).map(|(point, _)| point.series);
    let legend_lines = series.len() + 3 + usize::from(hollow.is_some());
    let height = TOP + SIDE + 62.0 + LEGEND_LINE * super::run::count(legend_lines);
    let mut svg = String::new();
    let mut put = |line: String| {
        writeln!(svg, "{line}").expect("a string takes all that memory holds");
    };
    put(format!(
        r##"<svg xmlns="http://www.w3.org/2000/svg" width="{SIZE:.0}" height="{height:.0}" viewBox="0 0 {SIZE:.0} {height:.0}" font-family="sans-serif" font-size="12" fill="#222">"##
    ));
    put(format!(r##"<rect width="{SIZE:.0}" height="{height:.0}" fill="#ffffff"/>"##));
    put(format!(
        r#"<text x="{LEFT:.0}" y="24" font-size="15" font-weight="bold">{}</text>"#,
        capital(quantity.title())
    ));
    put(format!(
        r##"<clipPath id="field"><rect x="{LEFT:.0}" y="{TOP:.0}" width="{SIDE:.0}" height="{SIDE:.0}"/></clipPath>"##
    ));
    for tick in axis.ticks() {
        let (x, y) = (across(tick), up(tick));
        let (bottom, right) = (TOP + SIDE, LEFT + SIDE);
        put(format!(
            r##"<path d="M{x:.1} {TOP:.0}V{bottom:.0}M{LEFT:.0} {y:.1}H{right:.0}" stroke="#dddddd" fill="none"/>"##
        ));
        put(format!(
            r#"<text x="{x:.1}" y="{:.0}" text-anchor="middle">{}</text>"#,
            bottom + 16.0,
            label(tick)
        ));
        put(format!(
            r#"<text x="{:.0}" y="{:.1}" text-anchor="end">{}</text>"#,
            LEFT - 6.0,
            y + 4.0,
            label(tick)
        ));
    }
    let line = |ratio: f64, style: &str| {
        // On both axes alike a constant ratio is a straight line between two points of it.
        let (a, b) = (axis.low.max(axis.high * 1e-6), axis.high);
        format!(
            r#"<path d="M{:.1} {:.1}L{:.1} {:.1}" clip-path="url(#field)" fill="none" {style}/>"#,
            across(a),
            up(a * ratio),
            across(b),
            up(b * ratio)
        )
    };
    const BIAS: &str = r##"stroke="#222222" stroke-width="1.4" stroke-dasharray="8 4""##;
    const BAND: &str = r##"stroke="#222222" stroke-width="1" stroke-dasharray="2 3""##;
    const EQUAL: &str = r##"stroke="#888888" stroke-width="1""##;
    put(line(1.0, EQUAL));
    if let Some(pool) = &judged.pooled {
        put(line(pool.bias, BIAS));
        put(line(pool.bias * (1.0 - 2.0 * pool.sd).max(0.01), BAND));
        put(line(pool.bias * (1.0 + 2.0 * pool.sd), BAND));
    }
    for (point, computed) in &shown {
        put(mark(point.series, across(point.measured), up(*computed), point.left_out.is_none()));
    }
    put(format!(
        r##"<rect x="{LEFT:.0}" y="{TOP:.0}" width="{SIDE:.0}" height="{SIDE:.0}" fill="none" stroke="#222222"/>"##
    ));
    let middle = LEFT + SIDE / 2.0;
    put(format!(
        r#"<text x="{middle:.0}" y="{:.0}" text-anchor="middle">measured, {}</text>"#,
        TOP + SIDE + 36.0,
        quantity.unit()
    ));
    let centre = TOP + SIDE / 2.0;
    put(format!(
        r#"<text x="18" y="{centre:.0}" text-anchor="middle" transform="rotate(-90 18 {centre:.0})">computed, {}</text>"#,
        quantity.unit()
    ));
    let mut y = TOP + SIDE + 60.0;
    for series in series {
        put(mark(series, LEFT + 8.0, y - 4.0, true));
        put(format!(r##"<text x="{:.0}" y="{y:.0}">{}</text>"##, LEFT + 34.0, series.title()));
        y += LEGEND_LINE;
    }
    if let Some(series) = hollow {
        put(mark(series, LEFT + 8.0, y - 4.0, false));
        put(format!(r##"<text x="{:.0}" y="{y:.0}">left out of bias and band</text>"##, LEFT + 34.0));
        y += LEGEND_LINE;
    }
    let keys =
        [(EQUAL, "computed = measured"), (BIAS, "bias"), (BAND, "bias ± two relative standard deviations")];
    for (style, text) in keys {
        put(format!(r##"<path d="M{:.0} {:.0}h24" fill="none" {style}/>"##, LEFT, y - 4.0));
        put(format!(r##"<text x="{:.0}" y="{y:.0}">{text}</text>"##, LEFT + 34.0));
        y += LEGEND_LINE;
    }
    put("</svg>".to_owned());
    svg
}

fn capital(text: &str) -> String {
    let mut letters = text.chars();
    letters.next().map_or_else(String::new, |first| first.to_uppercase().chain(letters).collect())
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn an_axis_holds_all_its_values_between_round_ends() {
        for values in [vec![0.2, 0.9, 1.3], vec![12.0, 950.0], vec![270.0, 331.0], vec![8.4, 13.9]] {
            let axis = Axis::about(&values);

            assert!(values.iter().all(|&value| (0.0..=1.0).contains(&axis.share(value))), "{values:?}");
            assert!((3..=13).contains(&axis.ticks().len()), "{values:?} {:?}", axis.ticks());
        }
    }
}
