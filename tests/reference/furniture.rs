//! Chair and sofa burns with the door open: heat release at 600 °C, and whether it got there.

use sootline::fire::flashover::{Enclosure, babrauskas_kw, mccaffrey_kw, thomas_kw};
use sootline::fire::linings::{Surface, total_conductance_kw_k};
use sootline::fire::ventilation::WallOpening;

use crate::rows;

const BURNS: &str = include_str!("data/fsri2018_furniture_open.csv");

/// The published scatter about Babrauskas' rule, 450 to 1050 about 750 for two thirds of the data,
/// taken for all three correlations: chosen beforehand, as the rating rule of the screen uses the
/// same band.
const SCATTER: std::ops::RangeInclusive<f64> = 0.6..=1.4;

/// The fan-free burn of one chair or sofa.
struct Burn {
    name: String,
    reaches_600_c_s: Option<f64>,
    peak_kw: f64,
    at_600_c_kw: Option<f64>,
}

fn burns() -> Vec<Burn> {
    rows(BURNS)
        .map(|row| Burn {
            name: row[0].to_owned(),
            reaches_600_c_s: row[4].parse().ok(),
            peak_kw: row[6].parse().expect("a peak stands in every row"),
            at_600_c_kw: row[7].parse().ok(),
        })
        .collect()
}

fn room() -> Enclosure {
    Enclosure::of_box(3.66, 3.66, 2.44, WallOpening { area_m2: 1.8, height_m: 2.0 })
}

/// The board is not stated: both ends of gypsum products, thin and thick.
fn linings() -> [Surface; 4] {
    let area_m2 = room().bounding_area_m2;
    let board = |conductivity_w_mk, density_kg_m3, specific_heat_j_kgk, thickness_m| Surface {
        area_m2,
        conductivity_w_mk,
        density_kg_m3,
        specific_heat_j_kgk,
        thickness_m,
    };
    [
        board(0.17, 790.0, 900.0, 0.0127),
        board(0.17, 790.0, 900.0, 0.032),
        board(0.48, 1440.0, 840.0, 0.0127),
        board(0.48, 1440.0, 840.0, 0.032),
    ]
}

/// Lowest and highest of the lining corners, at a time.
fn mccaffrey_span_kw(time_s: f64) -> (f64, f64) {
    linings()
        .iter()
        .map(|lining| mccaffrey_kw(room(), total_conductance_kw_k(&[*lining], time_s)))
        .fold((f64::INFINITY, 0.0), |(low, high), kw| (low.min(kw), high.max(kw)))
}

/// When the burn that never got there is judged: the mean time of those that did.
const JUDGED_AT_S: f64 = 290.0;

#[derive(Clone, Copy, PartialEq, Eq)]
enum Verdict {
    Yes,
    No,
    Undecided,
}

impl Verdict {
    fn of(peak_kw: f64, low_kw: f64, high_kw: f64) -> Self {
        if peak_kw >= high_kw {
            Self::Yes
        } else if peak_kw < low_kw {
            Self::No
        } else {
            Self::Undecided
        }
    }

    fn beside(self, measured: bool) -> &'static str {
        match (self, measured) {
            (Self::Yes, true) => "yes",
            (Self::No, false) => "no",
            (Self::Yes, false) => "yes (miss)",
            (Self::No, true) => "no (miss)",
            (Self::Undecided, _) => "either",
        }
    }
}

fn verdicts(burn: &Burn) -> [Verdict; 3] {
    let (low_kw, high_kw) = mccaffrey_span_kw(burn.reaches_600_c_s.unwrap_or(JUDGED_AT_S));
    let (babrauskas, thomas) = (babrauskas_kw(room()), thomas_kw(room()));
    [
        Verdict::of(burn.peak_kw, babrauskas, babrauskas),
        Verdict::of(burn.peak_kw, thomas, thomas),
        Verdict::of(burn.peak_kw, low_kw, high_kw),
    ]
}

#[test]
fn heat_release_at_600_c_is_met_within_the_published_scatter() {
    for burn in burns() {
        let Some(measured_kw) = burn.at_600_c_kw else {
            continue;
        };
        let (low_kw, high_kw) = mccaffrey_span_kw(burn.reaches_600_c_s.unwrap());

        assert!(SCATTER.contains(&(babrauskas_kw(room()) / measured_kw)), "{}", burn.name);
        assert!(SCATTER.contains(&(thomas_kw(room()) / measured_kw)), "{}", burn.name);
        // The lining is unknown: what some gypsum board would give must meet the measurement within
        // the scatter.
        assert!(low_kw / measured_kw <= 1.4 && high_kw / measured_kw >= 0.6, "{}", burn.name);
    }
}

#[test]
fn a_wrong_yes_or_no_lies_within_the_scatter_of_the_correlation() {
    for burn in burns() {
        let measured = burn.at_600_c_kw.is_some();
        let required = [babrauskas_kw(room()), thomas_kw(room())];

        for (verdict, required_kw) in verdicts(&burn).into_iter().zip(required) {
            let right = verdict == if measured { Verdict::Yes } else { Verdict::No };
            assert!(right || SCATTER.contains(&(burn.peak_kw / required_kw)), "{}", burn.name);
        }
    }
}

#[test]
fn each_correlation_is_right_about_most_burns() {
    // Chosen beforehand: better than a coin, as a screen must be; eight burns allow no finer judgement.
    for correlation in 0..2 {
        let right = burns()
            .iter()
            .filter(|burn| {
                let expected = if burn.at_600_c_kw.is_some() { Verdict::Yes } else { Verdict::No };
                verdicts(burn)[correlation] == expected
            })
            .count();

        assert!(right > burns().len() / 2, "correlation {correlation}: {right}");
    }
}

#[test]
fn one_burn_never_got_there_and_counts_as_a_no() {
    let never: Vec<_> = burns().into_iter().filter(|burn| burn.at_600_c_kw.is_none()).collect();

    assert_eq!(never.len(), 1);
    assert!(burns().len() == 8 && never[0].name == "RedAccent_Open_Corner_3");
}

pub fn table() -> String {
    let mut text = String::from(
        "## Chair and sofa burns, door open (2018)\n\n\
         Heat release when the gas 0 to 0.6 m below the ceiling reached 600 °C, beside what the correlations ask for. \
         Tolerance: 0.6 to 1.4, the published scatter. McCaffrey: lowest to highest of four gypsum linings, as the board is not stated.\n\n\
         | burn | measured kW | Babrauskas kW (ratio) | Thomas kW (ratio) | McCaffrey kW (ratio) |\n\
         |---|---|---|---|---|\n",
    );
    let (babrauskas, thomas) = (babrauskas_kw(room()), thomas_kw(room()));
    for burn in burns() {
        let (low, high) = mccaffrey_span_kw(burn.reaches_600_c_s.unwrap_or(JUDGED_AT_S));
        let line = match burn.at_600_c_kw {
            Some(measured) => format!(
                "| {} | {measured:.0} | {babrauskas:.0} ({:.2}) | {thomas:.0} ({:.2}) | {low:.0} to {high:.0} ({:.2} to {:.2}) |\n",
                burn.name,
                babrauskas / measured,
                thomas / measured,
                low / measured,
                high / measured,
            ),
            None => {
                format!("| {} | never | {babrauskas:.0} | {thomas:.0} | {low:.0} to {high:.0} |\n", burn.name)
            }
        };
        text.push_str(&line);
    }
    text.push_str(
        "\nDid it get there? The measured peak of heat release against the three.\n\n\
         | burn | peak kW | measured | Babrauskas | Thomas | McCaffrey |\n|---|---|---|---|---|---|\n",
    );
    for burn in burns() {
        let measured = burn.at_600_c_kw.is_some();
        let [b, t, m] = verdicts(&burn).map(|verdict| verdict.beside(measured));
        let said = if measured { "yes" } else { "no" };
        text.push_str(&format!("| {} | {:.0} | {said} | {b} | {t} | {m} |\n", burn.name, burn.peak_kw));
    }
    text
}
