//! What the data themselves say about the bars that are missed.
//!
//! Nothing here enters a bar. Each table separates a cause in the engine from one in the experiment or in what
//! is compared.

use super::Validation;
use super::data::{Row, by_test, configuration, table};
use super::point::{Point, Quantity, Series};
use super::run::count;
use super::series::enclosure::{LAGS_UNTIL_S, divided};
use super::series::open_burner::{HEIGHT_M, OXYGEN_POINT_M, TREE, readings_k};
use super::series::shut_burner;
use super::series::shut_burner::both_points_volpct;
use super::statistics::{Spread, of_series};

/// Height of the lower oxygen point of the 2018 room, m.
const LOWER_POINT_M: f64 = 0.64;
/// Gas of the 2018 room over its mean temperature, mol K: 101 325 Pa · 32.68 m³ / 8.314 J/(mol K).
const MOL_K: f64 = 101_325.0 * 3.66 * 3.66 * HEIGHT_M / 8.314;
/// Heat of a mole of methane, kJ (50.0 MJ/kg).
const METHANE_KJ_MOL: f64 = 802.0;
/// Oxygen of air, by volume.
const AIR_OXYGEN: f64 = 0.2095;
const METHANE_G_MOL: f64 = 16.04;
const ENCLOSURE_M3: f64 = 108.0;

/// The tables, as the record prints them.
pub fn write(validation: &Validation) -> String {
    let points = &validation.points;
    [
        String::from(
            "## What the data say about the misses\n\nNone of these figures enters a bar; all but those called computed follow from \
             the measurements alone.\n",
        ),
        top_of_layer(points),
        shut_oxygen(points),
        shut_rise(points),
        stirred(points),
    ]
    .join("\n")
}

fn mean(values: &[f64]) -> f64 {
    values.iter().sum::<f64>() / count(values.len())
}

fn two(values: &[f64]) -> String {
    if values.is_empty() { String::new() } else { format!("{:.2}", mean(values)) }
}

fn span(values: &[f64]) -> String {
    let low = values.iter().copied().fold(f64::INFINITY, f64::min);
    let high = values.iter().copied().fold(f64::NEG_INFINITY, f64::max);
    format!("{low:.2} to {high:.2}")
}

/// Ratio of computed to measured of a quantity of a test at a moment.
fn ratio(points: &[Point], quantity: Quantity, test: &str, moment: &str) -> Option<f64> {
    let found = |point: &&Point| point.quantity == quantity && point.test == test && point.moment == moment;
    points.iter().find(found).and_then(Point::ratio)
}

/// Rise of the mean of the three highest sensors over the rise of the two-zone layer, of one row.
fn top_over_layer(row: &Row, ambient_c: f64) -> (f64, f64) {
    let readings_k = readings_k(row);
    let ambient_k = ambient_c + 273.15;
    let top_k = mean(&readings_k[5..]) - ambient_k;
    (top_k, top_k / (TREE.reduce(&readings_k).upper_k - ambient_k))
}

fn top_of_layer(points: &[Point]) -> String {
    let mut text = String::from(
        "### Top of the layer over its mean, 2018 room, door open\n\n\
         Rise of the mean of the sensors 0.025, 0.3 and 0.6 m below the ceiling over the rise of the two-zone layer, measured. A model of one \
         layer cannot tell them apart.\n\n| burner | top over layer |\n|---|---|\n",
    );
    let mut by_configuration: Vec<(String, Vec<f64>)> = Vec::new();
    for row in table(include_str!("../data/fsri2018_open_burner.csv")) {
        let (_, ratio) = top_over_layer(&row, row.number("ambient_c"));
        let name = configuration(row.text("test")).to_owned();
        match by_configuration.iter_mut().find(|(known, _)| *known == name) {
            Some((_, ratios)) => ratios.push(ratio),
            None => by_configuration.push((name, vec![ratio])),
        }
    }
    for (name, ratios) in &by_configuration {
        line!(text, "| {name} | {} |", two(ratios));
    }
    let means: Vec<f64> = by_configuration.iter().map(|(_, ratios)| mean(ratios)).collect();
    line!(text, "| mean of {} | {} |\n", means.len(), two(&means));

    text.push_str(
        "| furniture | top over layer, mean from 100 K on | at its hottest | computed over measured at that moment: two-zone layer | \
         of the two, what is left of the peak | computed over measured peak |\n|---|---|---|---|---|---|\n",
    );
    let tests = table(include_str!("../data/fsri2018_furniture.csv"));
    for (name, rows) in by_test(include_str!("../data/fsri2018_furniture_course.csv")) {
        let Some(test) = tests.iter().find(|test| test.text("test") == name) else {
            continue;
        };
        let ambient_c = test.number("ambient_c");
        let hot = |row: &&Row| TREE.reduce(&readings_k(row)).upper_k - 273.15 - ambient_c >= 100.0;
        let history: Vec<(f64, f64, f64)> = rows
            .iter()
            .filter(hot)
            .map(|row| {
                let (top_k, ratio) = top_over_layer(row, ambient_c);
                (row.number("time_s"), top_k, ratio)
            })
            .collect();
        let Some(&(time_s, _, at_peak)) = history.iter().max_by(|a, b| a.1.total_cmp(&b.1)) else {
            continue;
        };
        let ratios: Vec<f64> = history.iter().map(|&(_, _, ratio)| ratio).collect();
        let layer = ratio(points, Quantity::UpperRise, &name, &format!("{time_s:.0} s"));
        let peak = ratio(points, Quantity::PeakRise, &name, "peak");
        let said = |value: Option<f64>| value.map_or_else(String::new, |value| format!("{value:.2}"));
        line!(
            text,
            "| {name} | {} | {at_peak:.2} | {} | {} | {} |",
            two(&ratios),
            said(layer),
            said(layer.map(|layer| layer / at_peak)),
            said(peak)
        );
    }
    text
}

/// Methane burnt, moles per mole of gas, where its oxygen stands at this fraction of the gas, dried or not:
/// a mole of air that burnt c of methane holds (0.2095 - 2c) of oxygen in (1 + c) of gas, of which 2c are water.
fn burnt_share(oxygen: f64, dried: bool) -> f64 {
    if dried {
        let of_air = (AIR_OXYGEN - oxygen) / (2.0 - oxygen);
        of_air / (1.0 + of_air)
    } else {
        let of_air = (AIR_OXYGEN - oxygen) / (2.0 + oxygen);
        of_air / (1.0 + of_air)
    }
}

/// What the gas of a shut room is like at a moment.
#[derive(Clone, Copy)]
struct Gas {
    time_s: f64,
    mean_c: f64,
    /// Decrease of its oxygen, room mean.
    decrease_volpct: f64,
}

impl Gas {
    fn of(row: &Row) -> Option<Self> {
        let [upper, lower] = both_points_volpct(row)?;
        Some(Self {
            time_s: row.number("time_s"),
            mean_c: row.number("mean_c"),
            decrease_volpct: 0.5 * (upper + lower),
        })
    }
}

/// Heat release from one moment to another in a shut room, kW, by the products that its gas holds. Gas that was driven
/// out took the mean share along; air that came in brought none. Leaks that let gas out and air in at once take more:
/// a least value, as far as the mean is one.
fn burnt_kw(early: Gas, late: Gas, dried: bool) -> f64 {
    let held = |gas: Gas| {
        let share = burnt_share(AIR_OXYGEN - 0.01 * gas.decrease_volpct, dried);
        (MOL_K / (gas.mean_c + 273.15), share)
    };
    let ((early_mol, early_share), (late_mol, late_share)) = (held(early), held(late));
    let driven_out_mol = (early_mol - late_mol).max(0.0);
    let methane_mol =
        late_mol * late_share - early_mol * early_share + driven_out_mol * 0.5 * (early_share + late_share);
    methane_mol * METHANE_KJ_MOL / (late.time_s - early.time_s)
}

/// The same balance over what was computed for the tests of 100 kW, from 180 to 240 s: what it makes of a known fire.
fn burnt_of_computed_kw(points: &[Point]) -> Vec<f64> {
    let computed = |quantity, test: &str, moment: &str| {
        let it = |point: &&Point| point.quantity == quantity && point.test == test && point.moment == moment;
        points.iter().find(it).and_then(|point| point.computed)
    };
    let gas = |test: &str, time_s: f64| {
        let moment = format!("{time_s:.0} s");
        let rise_k = computed(Quantity::MeanRiseShut, test, &moment)?;
        // Ambient to within a few kelvins.
        let mean_c = 20.0 + rise_k;
        Some(Gas { time_s, mean_c, decrease_volpct: computed(Quantity::OxygenMeanShut, test, &moment)? })
    };
    points
        .iter()
        .filter(|point| point.quantity == Quantity::OxygenFallShut)
        .filter_map(|point| Some(burnt_kw(gas(&point.test, 180.0)?, gas(&point.test, 240.0)?, true)))
        .collect()
}

/// Means over the tests of one configuration.
#[derive(Default)]
struct Shut {
    name: String,
    upper: Vec<f64>,
    lower: Vec<f64>,
    over_layer: Vec<f64>,
    at_point: Vec<f64>,
    of_room: Vec<f64>,
    burnt_kw: [Vec<f64>; 2],
}

fn shut_oxygen(points: &[Point]) -> String {
    let mut all: Vec<Shut> = Vec::new();
    for (test, rows) in by_test(shut_burner::DATA) {
        let name = configuration(&test);
        let at = |time_s: f64| rows.iter().find(|row| (row.number("time_s") - time_s).abs() < 0.5);
        // The 500 kW tests were over before 240 s.
        let (from_s, to_s) = if name.starts_with('5') { (120.0, 180.0) } else { (180.0, 240.0) };
        let (Some(early), Some(late)) = (at(from_s), at(to_s)) else {
            continue;
        };
        let Some([upper, lower]) = both_points_volpct(late) else {
            continue;
        };
        let index = all.iter().position(|one| one.name == name).unwrap_or_else(|| {
            all.push(Shut { name: name.to_owned(), ..Shut::default() });
            all.len() - 1
        });
        let one = &mut all[index];
        one.upper.push(upper);
        one.lower.push(lower);
        let middle_m = 0.5 * (HEIGHT_M + late.number("interface_m"));
        let share = (middle_m - LOWER_POINT_M) / (OXYGEN_POINT_M - LOWER_POINT_M);
        one.over_layer.push(upper / (lower + share * (upper - lower)));
        let moment = format!("{to_s:.0} s");
        one.at_point.extend(ratio(points, Quantity::OxygenDecreaseShut, &test, &moment));
        one.of_room.extend(ratio(points, Quantity::OxygenMeanShut, &test, &moment));
        for (burnt, dried) in one.burnt_kw.iter_mut().zip([true, false]) {
            burnt.extend(Gas::of(early).zip(Gas::of(late)).map(|(early, late)| burnt_kw(early, late, dried)));
        }
    }
    let mut text = String::from(
        "### Oxygen of the shut 2018 room\n\n\
         At 240 s (500 kW: 180 s, where computed fires are out). Layer mean: a straight line through both points, from the interface to the ceiling. \
         Burnt: least heat release over the last 60 s by the oxygen balance of the room, nominal heat not used; the first figure if the points read dried \
         gas, the second if not.\n\n\
         | configuration | tests | decrease 0.6 m below the ceiling, vol-% | 1.8 m below | point over layer mean | computed over measured at the point | \
         mean of the room | burnt, kW |\n|---|---|---|---|---|---|---|---|\n",
    );
    for one in &all {
        line!(
            text,
            "| {} | {} | {:.1} | {:.1} | {} | {} | {} | {:.0}, {:.0} |",
            one.name,
            one.upper.len(),
            mean(&one.upper),
            mean(&one.lower),
            two(&one.over_layer),
            two(&one.at_point),
            two(&one.of_room),
            mean(&one.burnt_kw[0]),
            mean(&one.burnt_kw[1])
        );
    }
    line!(
        text,
        "\nThe mean of the room, here and in the balance, is that of both points: the straight line goes on to the floor. Over the computed gas of the tests of 100 kW the same balance \
         gives {:.0} kW: leaks take the rest.",
        mean(&burnt_of_computed_kw(points))
    );
    let of = |taken: &[Point], quantity| {
        of_series(taken, quantity, Series::ShutBurner, &Point::ratio)
            .map_or_else(String::new, |spread| said(&spread))
    };
    let of_100: Vec<Point> = points.iter().filter(|point| point.test.starts_with("100kW")).cloned().collect();
    line!(
        text,
        "\nComputed over measured, all times to 240 s: at the point {}, of 100 kW alone {}; mean of the room {}, of \
         100 kW alone {}; its fall from 180 to 240 s, which lag and place in the profile do not change, 100 kW alone {}. Rise at the lowest sensor, 0.34 m up: {}.",
        of(points, Quantity::OxygenDecreaseShut),
        of(&of_100, Quantity::OxygenDecreaseShut),
        of(points, Quantity::OxygenMeanShut),
        of(&of_100, Quantity::OxygenMeanShut),
        of(points, Quantity::OxygenFallShut),
        of(points, Quantity::LowerRise),
    );
    text
}

fn said(spread: &Spread) -> String {
    format!("{:.2} ± {:.2}", spread.bias, spread.sd)
}

fn shut_rise(points: &[Point]) -> String {
    let of = |chosen: &dyn Fn(&Point) -> bool| {
        let taken: Vec<Point> = points.iter().filter(|point| chosen(point)).cloned().collect();
        of_series(&taken, Quantity::MeanRiseShut, Series::ShutBurner, &Point::ratio)
    };
    let mut text = String::from(
        "### Mean rise of the shut 2018 room\n\n| taken | configurations | computed over measured |\n|---|---|---|\n",
    );
    let large = |point: &Point| point.test.starts_with("500kW");
    let mut row = |name: &str, spread: Option<Spread>| {
        if let Some(spread) = spread {
            line!(text, "| {name} | {} | {} |", spread.tests, said(&spread));
        }
    };
    row("all, as the bar", of(&|_| true));
    row("without 500 kW", of(&|point| !large(point)));
    for time_s in [60, 120, 180, 240] {
        let moment = format!("{time_s} s");
        row(&format!("100 kW at {moment}"), of(&|point| !large(point) && point.moment == moment));
    }
    for time_s in [60, 120, 180, 240] {
        let moment = format!("{time_s} s");
        row(&format!("500 kW at {moment}"), of(&|point| large(point) && point.moment == moment));
    }
    text
}

/// Decrease of oxygen in a room of evenly mixed gas that a fan blows through, vol-% of dried gas.
///
/// ```text
/// m dz/dt = fuel - z · outflow      z = share of the gas that came as fuel, all of it burnt
/// ```
///
/// Gas of the measured mean temperature, straight lines between the rows; flows those of the later row.
fn stirred_volpct(rows: &[Row], until_s: f64) -> f64 {
    let warm_k = |row: &Row| 273.15 + 0.5 * (row.number("west_mean_c") + row.number("east_mean_c"));
    let mut fuel_share = 0.0;
    let mut time_s = 0.0;
    while time_s < until_s {
        let late = rows.iter().position(|row| row.number("time_s") > time_s).unwrap_or(rows.len() - 1);
        let (early, late) = (&rows[late.saturating_sub(1)], &rows[late]);
        let share = (time_s - early.number("time_s")) / (late.number("time_s") - early.number("time_s"));
        let gas_k = warm_k(early) + share.clamp(0.0, 1.0) * (warm_k(late) - warm_k(early));
        let gas_kg = ENCLOSURE_M3 * 353.0 / gas_k;
        let (fuel_g_s, out_g_s) = (late.number("fuel_g_s"), late.number("air_g_s"));
        fuel_share += (fuel_g_s - fuel_share * out_g_s) / 1000.0 / gas_kg;
        time_s += 1.0;
    }
    dry_decrease_volpct(fuel_share)
}

/// Decrease of oxygen, vol-% of dried gas, where this mass share of the gas came as methane and burnt.
fn dry_decrease_volpct(fuel_share: f64) -> f64 {
    let methane = fuel_share / METHANE_G_MOL;
    let oxygen = (1.0 - fuel_share) * 0.2315 / 32.0 - 2.0 * methane;
    let nitrogen = (1.0 - fuel_share) * 0.7685 / 28.15;
    20.95 - 100.0 * oxygen / (oxygen + nitrogen + methane)
}

fn stirred(points: &[Point]) -> String {
    struct Class {
        name: &'static str,
        measured: Vec<f64>,
        computed: Vec<f64>,
    }
    let class = |name| Class { name, measured: Vec::new(), computed: Vec::new() };
    let mut classes = [
        class("divided, 500 s"),
        class("divided, 1000 s"),
        class("divided, later"),
        class("not divided, 2000 s or later"),
    ];
    let mut shut: [Vec<f64>; 2] = Default::default();
    for (test, rows) in by_test(include_str!("../data/llnl1986_enclosure.csv")) {
        let forced = rows[rows.len() - 1].number("air_g_s") > 0.0;
        for row in &rows[1..] {
            let time_s = row.number("time_s");
            let decrease = 100.0 * (rows[0].number("oxygen_mol") - row.number("oxygen_mol"));
            if !forced {
                if (time_s - 500.0).abs() < 0.5 && (row.number("fuel_kw") - 200.0).abs() < 0.5 {
                    shut[usize::from(divided(row))].push(decrease);
                }
                continue;
            }
            let stirred = stirred_volpct(&rows, time_s);
            let class = match (divided(row), time_s) {
                (true, time_s) if time_s <= LAGS_UNTIL_S => 0,
                (true, time_s) if time_s <= 1000.0 => 1,
                (true, _) => 2,
                (false, _) => 3,
            };
            classes[class].measured.push(decrease / stirred);
            let moment = format!("{time_s:.0} s");
            let is_it = |point: &&Point| {
                point.quantity == Quantity::OxygenDecreaseForced
                    && point.test == test
                    && point.moment == moment
            };
            if let Some(computed) = points.iter().find(is_it).and_then(|point| point.computed) {
                classes[class].computed.push(computed / stirred);
            }
        }
    }
    let mut text = String::from(
        "### Oxygen of the enclosure against an evenly mixed room\n\n\
         Decrease over that of evenly mixed gas of 108 m³ with the fuel and exhaust of the test, every row of the tests with a fan; computed at the row that is \
         compared only.\n\n| rows | measured over mixed | lowest to highest | rows | computed over mixed | rows compared |\n|---|---|---|---|---|---|\n",
    );
    for class in &classes {
        line!(
            text,
            "| {} | {} | {} | {} | {} | {} |",
            class.name,
            two(&class.measured),
            span(&class.measured),
            class.measured.len(),
            two(&class.computed),
            class.computed.len()
        );
    }
    let list =
        |values: &[f64]| values.iter().map(|value| format!("{value:.2}")).collect::<Vec<_>>().join(", ");
    line!(
        text,
        "\nWithout a fan, 200 kW, at 500 s: decrease {} vol-% where nothing divides the enclosure, {} where something does.",
        list(&shut[0]),
        list(&shut[1])
    );
    let late = of_rows(points, |moment_s| moment_s > LAGS_UNTIL_S);
    let early = of_rows(points, |moment_s| moment_s <= LAGS_UNTIL_S);
    line!(
        text,
        "\nComputed over measured: rows after 500 s {late}; the rows of 500 s {early}. A probe that lags by a fixed time would read too little of the computed \
         course too: what the engine gives above evenly mixed gas in those rows is its own doing, and is left out with them."
    );
    text
}

fn of_rows(points: &[Point], taken: impl Fn(f64) -> bool) -> String {
    let rows: Vec<Point> = points
        .iter()
        .filter(|point| point.quantity == Quantity::OxygenDecreaseForced)
        .filter(|point| point.moment.trim_end_matches(" s").parse().is_ok_and(&taken))
        .map(|point| Point { left_out: None, ..point.clone() })
        .collect();
    of_series(&rows, Quantity::OxygenDecreaseForced, Series::Enclosure, &Point::ratio)
        .map_or_else(String::new, |spread| format!("{} ({} tests)", said(&spread), spread.tests))
}

#[cfg(test)]
mod tests {
    use super::{burnt_share, dry_decrease_volpct};

    #[test]
    fn what_burnt_follows_from_the_oxygen_that_is_left() {
        // By hand: 1 mol of air burns 0.04 of methane: 0.1295 oxygen in 1.04 of gas (12.452 %), 0.96 dried (13.490 %).
        let share = 0.04 / 1.04;
        for (oxygen, dried) in [(0.1295 / 1.04, false), (0.1295 / 0.96, true)] {
            let got = burnt_share(oxygen, dried);
            assert!((got - share).abs() < 1e-12, "{got}");
        }
        assert_eq!(burnt_share(0.2095, true), 0.0);
    }

    #[test]
    fn a_mixed_room_holds_what_its_air_and_fuel_give() {
        // By hand: 4 g/s of methane in 200 g/s of exhaust is 2 %: 1.2469 mol in 100 g; oxygen 0.98 · 0.72344 - 2 · 0.12469 =
        // 0.45959, nitrogen 0.98 · 2.73002 = 2.67542, carbon dioxide 0.12469 (per 100 g): 14.098 % of 3.25970.
        let got = dry_decrease_volpct(0.02);
        assert!((got - (20.95 - 14.099)).abs() < 0.01, "{got}");
        // Air by these masses holds 20.95 %.
        assert!(dry_decrease_volpct(0.0).abs() < 0.01);
    }
}
