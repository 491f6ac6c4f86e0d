//! Figures as lines of text, for the terminal.

use super::Validation;
use super::bars::{Judged, judge, words};
use super::point::{Point, Quantity, Series};
use super::statistics::{Spread, of_series, plain_ratio, pooled};

fn figures(spread: &Spread) -> String {
    format!(
        "{:.3} ± {:.3}  n={:<3} {:.2}..{:.2}",
        spread.bias, spread.sd, spread.tests, spread.lowest, spread.highest
    )
}

/// Do the engine's own layers give another figure than the sensors see?
fn differs(plain: &Spread, seen: &Spread) -> bool {
    (plain.bias - seen.bias).abs() > 1e-9 || (plain.sd - seen.sd).abs() > 1e-9
}

/// The bars and what stands beside them.
pub fn bars(validation: &Validation) -> String {
    let mut text = String::new();
    for judged in judge(&validation.points) {
        text.push_str(&bar(&judged, validation));
    }
    let tally = &validation.tally;
    text.push_str(&format!(
        "\n{} runs, {} steps, balance errors mass {:.1e} energy {:.1e} elements {:.1e}\n",
        tally.runs, tally.steps, tally.worst_balance[0], tally.worst_balance[1], tally.worst_balance[2],
    ));
    for failure in &tally.failures {
        text.push_str(&format!("FAILED {failure}\n"));
    }
    text
}

fn bar(judged: &Judged, validation: &Validation) -> String {
    let quantity = judged.bar.quantity;
    let verdict = if judged.proud() {
        "PROUD "
    } else if judged.met() {
        "met   "
    } else {
        "MISSED"
    };
    let mut text = format!("{verdict} {:<34}", quantity.title());
    if let Some(pool) = &judged.pooled {
        text.push_str(&figures(pool));
        if let Some((scatter, _)) = judged.bar.scatter {
            text.push_str(&format!("  without scatter {:.3}", pool.sd_without(scatter)));
        }
        if let Some(plain) = pooled(&validation.points, quantity, &plain_ratio)
            && differs(&plain, pool)
        {
            text.push_str(&format!("  plain {:.3} ± {:.3}", plain.bias, plain.sd));
        }
    }
    if let Some((right, of)) = judged.held {
        text.push_str(&format!("  holds in {right} of {of}"));
    }
    if judged.missing > 0 {
        text.push_str(&format!("  {} GAVE NOTHING", judged.missing));
    }
    let said: Vec<String> = judged
        .must
        .iter()
        .map(|&(demand, met)| format!("{}{}", if met { "" } else { "NOT " }, words(demand, quantity.unit())))
        .collect();
    text.push_str(&format!("\n         must: {}\n", said.join(", ")));
    let proud: Vec<String> = judged.bar.proud.iter().map(|&demand| words(demand, quantity.unit())).collect();
    if !proud.is_empty() {
        text.push_str(&format!("         proud: {}\n", proud.join(", ")));
    }
    if judged.by_series.len() > 1 {
        for (series, spread) in &judged.by_series {
            text.push_str(&format!("         {:<14} {}", series.key(), figures(spread)));
            if let Some(plain) = of_series(&validation.points, quantity, *series, &plain_ratio)
                && differs(&plain, spread)
            {
                text.push_str(&format!("  plain {:.3} ± {:.3}", plain.bias, plain.sd));
            }
            text.push('\n');
        }
    }
    text
}

/// What is told without a bar: bias and scatter of every quantity and series, left-out points within.
pub fn reported(validation: &Validation) -> String {
    let mut text = String::from("Without a bar (what is left out of the bars counts here)\n");
    for quantity in Quantity::ALL {
        for series in Series::ALL {
            let all: Vec<Point> = validation
                .points
                .iter()
                .filter(|point| point.quantity == quantity && point.series == series)
                .map(|point| Point { left_out: None, ..point.clone() })
                .collect();
            let barred = validation.points.iter().any(|point| {
                point.quantity == quantity && point.series == series && point.left_out.is_none()
            }) && super::bars::BARS.iter().any(|bar| bar.quantity == quantity);
            if barred {
                continue;
            }
            if let Some(spread) = of_series(&all, quantity, series, &Point::ratio) {
                text.push_str(&format!(
                    "         {:<52} {:<14} {}\n",
                    quantity.title(),
                    series.key(),
                    figures(&spread)
                ));
            }
        }
    }
    text
}

/// Each value of a series.
pub fn rows(validation: &Validation, series: Series) -> String {
    let mut points: Vec<&Point> = validation.points.iter().filter(|point| point.series == series).collect();
    points.sort_by_key(|point| point.quantity);
    let mut text = String::new();
    let mut last = None;
    for point in points {
        if last != Some(point.quantity) {
            text.push_str(&format!("{} [{}]\n", point.quantity.title(), point.quantity.unit()));
            last = Some(point.quantity);
        }
        let value = |value: Option<f64>| value.map_or_else(|| "-".to_owned(), |value| format!("{value:.3}"));
        text.push_str(&format!(
            "  {:<28} {:<24} measured {:>9.3}  computed {:>9}  ratio {:>6}  plain {:>9} {}\n",
            point.test,
            point.moment,
            point.measured,
            value(point.computed),
            value(point.ratio()),
            value(point.plain),
            point.left_out.map_or_else(String::new, |reason| format!("[out: {reason}]")),
        ));
    }
    text
}
