//! The figures in short, as JSON, for those who ask the service what its methods are worth.

use super::Validation;
use super::bars::{Judged, judge, words};
use super::point::{Quantity, Series};
use super::range::numbers;
use super::record::judged_with_all;

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

/// Per quantity: bias, scatter with and without that of the measurement, tests, series, what was asked, met or
/// not and why not, the figure with left-out tests put back; then the range of the set. Rounded to what two machines
/// agree on.
pub fn json(validation: &Validation) -> String {
    let quantities: Vec<String> =
        judge(&validation.points).iter().map(|judged| quantity(judged, validation)).collect();
    let behind = barred(validation);
    let ranges: Vec<String> = numbers()
        .filter_map(|(number, key, title)| {
            let (low, high) = validation.tally.ranges.over(&behind, number)?;
            let fields = [
                text("key", key),
                text("title", title),
                format!("\"low\": {}", two_digits(low)),
                format!("\"high\": {}", two_digits(high)),
            ];
            Some(format!("    {{ {} }}", fields.join(", ")))
        })
        .collect();
    format!(
        "{{\n  \"quantities\": [\n{}\n  ],\n  \"range\": [\n{}\n  ]\n}}\n",
        quantities.join(",\n"),
        ranges.join(",\n")
    )
}

fn quantity(judged: &Judged, validation: &Validation) -> String {
    let quantity = judged.bar.quantity;
    let mut fields =
        vec![text("key", quantity.key()), text("title", quantity.title()), text("unit", quantity.unit())];
    if let Some(pool) = &judged.pooled {
        fields.push(format!("\"bias\": {:.2}", pool.bias));
        fields.push(format!("\"sd_relative\": {:.2}", pool.sd));
        if let Some((scatter, _)) = judged.bar.scatter {
            fields.push(format!("\"sd_relative_without_measurement\": {:.2}", pool.sd_without(scatter)));
        }
    }
    if let Some((right, of)) = judged.held {
        fields.push(format!("\"tests_right\": {right}"));
        fields.push(format!("\"tests\": {of}"));
    } else if let Some(pool) = &judged.pooled {
        fields.push(format!("\"tests\": {}", pool.tests));
    }
    let series: Vec<String> = if quantity == Quantity::Reaches600 {
        vec![quoted(Series::Furniture.key())]
    } else {
        judged.by_series.iter().map(|(series, _)| quoted(series.key())).collect()
    };
    fields.push(format!("\"series\": [{}]", series.join(", ")));
    let asked: Vec<String> = judged.bar.must.iter().map(|&demand| words(demand, quantity.unit())).collect();
    fields.push(text("asked", &asked.join("; ")));
    fields.push(format!("\"met\": {}", judged.met()));
    fields.push(format!("\"better_bar_met\": {}", judged.proud()));
    if let Some(miss) = judged.bar.miss.filter(|_| !judged.met()) {
        fields.push(text("missed", miss.what));
        fields.push(text("likely_cause", miss.cause));
    }
    if let Some((tests, again)) = judged_with_all(&validation.points, quantity)
        && let Some(pool) = &again.pooled
    {
        let tests: Vec<String> = tests.iter().map(|test| quoted(test)).collect();
        fields.push(format!(
            "\"with_left_out\": {{ \"tests\": [{}], \"bias\": {:.2}, \"sd_relative\": {:.2}, \"met\": {} }}",
            tests.join(", "),
            pool.bias,
            pool.sd,
            again.met()
        ));
    }
    format!("    {{ {} }}", fields.join(", "))
}

fn quoted(value: &str) -> String {
    format!("\"{}\"", value.replace('\\', "\\\\").replace('"', "\\\""))
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
    use super::{quoted, two_digits};

    #[test]
    fn two_digits_are_what_is_left() {
        for (value, expected) in [(0.0, "0"), (1.0, "1.0"), (0.123, "0.12"), (21.66, "22"), (0.0312, "0.031")]
        {
            assert_eq!(two_digits(value), expected);
        }
    }

    #[test]
    fn quotation_marks_do_not_end_a_text() {
        assert_eq!(quoted(r#"a "b" \"#), r#""a \"b\" \\""#);
    }
}
