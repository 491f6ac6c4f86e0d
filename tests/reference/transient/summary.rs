//! The figures in short, as JSON, for those who ask the service what its methods are worth.

use std::fmt::Write as _;

use super::Validation;
use super::bars::judge;
use super::point::{Quantity, Series};
use super::range::Measure;

/// Series that stand behind a bar.
pub fn barred(validation: &Validation) -> Vec<Series> {
    Series::ALL
        .into_iter()
        .filter(|&series| {
            validation.points.iter().any(|point| {
                point.series == series
                    && point.left_out.is_none()
                    && super::bars::BARS.iter().any(|bar| bar.quantity == point.quantity)
            })
        })
        .collect()
}

/// Per quantity: bias, scatter with and without that of the measurement, tests, series, met or not; then the
/// range of the set. Rounded to what two machines agree on.
pub fn json(validation: &Validation) -> String {
    let mut quantities = Vec::new();
    for judged in judge(&validation.points) {
        let quantity = judged.bar.quantity;
        let mut fields =
            vec![text("key", quantity.key()), text("title", quantity.title()), text("unit", quantity.unit())];
        if let Some(pool) = &judged.pooled {
            fields.push(format!(r#""bias": {:.2}"#, pool.bias));
            fields.push(format!(r#""sd_relative": {:.2}"#, pool.sd));
            if let Some((scatter, _)) = judged.bar.scatter {
                fields.push(format!(r#""sd_relative_without_measurement": {:.2}"#, pool.sd_without(scatter)));
            }
        }
        if let Some((right, of)) = judged.held {
            fields.push(format!(r#""tests_right": {right}"#));
            fields.push(format!(r#""tests": {of}"#));
        } else if let Some(pool) = &judged.pooled {
            fields.push(format!(r#""tests": {}"#, pool.tests));
        }
        let series: Vec<String> = if quantity == Quantity::Reaches600 {
            vec![quoted(Series::Furniture.key())]
        } else {
            judged.by_series.iter().map(|(series, _)| quoted(series.key())).collect()
        };
        fields.push(format!(r#""series": [{}]"#, series.join(", ")));
        fields.push(format!(r#""met": {}"#, judged.met()));
        quantities.push(format!("    {{ {} }}", fields.join(", ")));
    }
    let behind = barred(validation);
    let ranges: Vec<String> = Measure::ALL
        .into_iter()
        .filter_map(|measure| {
            let (low, high) = validation.tally.ranges.over(&behind, measure)?;
            Some(format!(
                "    {{ {}, {}, \"low\": {}, \"high\": {} }}",
                text("key", measure.key()),
                text("title", measure.title()),
                two_digits(low),
                two_digits(high)
            ))
        })
        .collect();
    let mut json = String::from("{\n  \"quantities\": [\n");
    writeln!(json, "{}\n  ],\n  \"range\": [\n{}\n  ]\n}}", quantities.join(",\n"), ranges.join(",\n"))
        .expect("a string takes all that memory holds");
    json
}

fn quoted(value: &str) -> String {
    format!("\"{value}\"")
}

fn text(key: &str, value: &str) -> String {
    format!("\"{key}\": {}", quoted(value))
}

/// Two digits that count.
pub fn two_digits(value: f64) -> String {
    if value == 0.0 || !value.is_finite() {
        return "0".to_owned();
    }
    let magnitude = value.abs().log10().floor();
    let decimals = (0..=6_u8).find(|&digits| f64::from(digits) >= 1.0 - magnitude).unwrap_or(6);
    format!("{value:.*}", usize::from(decimals))
}

#[cfg(test)]
mod tests {
    use super::two_digits;

    #[test]
    fn two_digits_are_what_is_left() {
        for (value, expected) in [(0.0, "0"), (1.0, "1.0"), (0.123, "0.12"), (21.66, "22"), (0.0312, "0.031")]
        {
            assert_eq!(two_digits(value), expected);
        }
    }
}
