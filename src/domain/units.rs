//! Units that people write beside numbers, and how they turn into ours.
//!
//! Factors of the inch, pound and US gallon are exact by definition (international yard and
//! pound, 1959; US gallon of 231 cubic inches); the Btu is that of the International Table,
//! 1055.05585262 J. `lb/ft2` as a fire load means ordinary combustibles of 8000 Btu/lb, the
//! usual reckoning of fire load surveys in those units (common practice, from memory).

use std::fmt;

/// Longest text that is read as a quantity.
pub const LONGEST_TEXT: usize = 64;
/// What every text that is read here looks like, as a pattern for the OpenAPI document. Not
/// all that look so are read.
pub const PATTERN: &str = r"^\s*[+−-]?\s*\.?[0-9].*$";

/// One unit. A value of `x` of it is `(x - zero) * times / per` of the family's base unit.
#[derive(Debug)]
pub struct Unit {
    /// How it is written; the first is how we write it.
    pub spellings: &'static [&'static str],
    times: f64,
    per: f64,
    zero: f64,
}

/// Units that turn into each other.
#[derive(Debug)]
pub struct Family {
    /// What they measure, in words.
    pub measures: &'static str,
    /// The units.
    pub units: &'static [Unit],
    /// Whether several may be added up, as in `12 ft 6 in`.
    pub compound: bool,
}

impl Family {
    fn of(unit: &str) -> Option<(&'static Family, &'static Unit)> {
        FAMILIES.iter().find_map(|family| Some((family, family.own(unit)?)))
    }

    fn own(&self, unit: &str) -> Option<&Unit> {
        self.units.iter().find(|known| known.spellings.contains(&unit))
    }

    /// The units' first spellings, for people.
    pub fn spellings(&self) -> String {
        let first = |unit: &Unit| unit.spellings.first().copied().unwrap_or_default();
        self.units.iter().map(first).filter(|spelling| !spelling.is_empty()).collect::<Vec<_>>().join(", ")
    }
}

/// The family to which a unit belongs.
pub fn family_of(unit: &str) -> Option<&'static Family> {
    Family::of(unit).map(|(family, _)| family)
}

const fn unit(spellings: &'static [&'static str], times: f64, per: f64) -> Unit {
    Unit { spellings, times, per, zero: 0.0 }
}

const fn alone(measures: &'static str, units: &'static [Unit]) -> Family {
    Family { measures, units, compound: false }
}

const fn added(measures: &'static str, units: &'static [Unit]) -> Family {
    Family { measures, units, compound: true }
}

const BTU_J: f64 = 1_055.055_852_62;
const FT2_M2: f64 = 0.092_903_04;
const LB_KG: f64 = 0.453_592_37;
/// Heat of ordinary combustibles, per pound, in the reckoning of surveys.
const ORDINARY_BTU_LB: f64 = 8000.0;

static FAMILIES: &[Family] = &[
    added(
        "a length",
        &[
            unit(&["m", "metre", "metres", "meter", "meters"], 1.0, 1.0),
            unit(&["cm", "centimetre", "centimetres", "centimeter", "centimeters"], 1.0, 100.0),
            unit(&["mm", "millimetre", "millimetres", "millimeter", "millimeters"], 1.0, 1000.0),
            unit(&["km"], 1000.0, 1.0),
            unit(&["yd", "yard", "yards"], 9144.0, 10_000.0),
            unit(&["ft", "foot", "feet", "'", "′", "’"], 3048.0, 10_000.0),
            unit(&["in", "inch", "inches", "\"", "″", "”", "''"], 254.0, 10_000.0),
        ],
    ),
    alone(
        "an area",
        &[
            unit(&["m2", "m²", "m^2", "sq m", "sqm"], 1.0, 1.0),
            unit(&["cm2", "cm²", "cm^2", "sq cm"], 1.0, 10_000.0),
            unit(&["mm2", "mm²", "mm^2", "sq mm"], 1.0, 1_000_000.0),
            unit(&["ft2", "ft²", "ft^2", "sq ft", "sqft", "sf"], 9_290_304.0, 1e8),
            unit(&["in2", "in²", "in^2", "sq in"], 64_516.0, 1e8),
        ],
    ),
    alone(
        "a flow",
        &[
            unit(&["m3/s", "m³/s"], 1.0, 1.0),
            unit(&["m3/h", "m³/h", "m3/hr"], 1.0, 3600.0),
            unit(&["L/s", "l/s"], 1.0, 1000.0),
            unit(&["L/min", "l/min", "lpm"], 1.0, 60_000.0),
            unit(&["cfm", "ft3/min", "ft³/min"], 0.028_316_846_592, 60.0),
            unit(&["gpm", "gal/min"], 3.785_411_784, 60_000.0),
        ],
    ),
    alone(
        "a fire load per floor area",
        &[
            unit(&["MJ/m2", "MJ/m²", "MJ/m^2"], 1.0, 1.0),
            unit(&["kJ/m2", "kJ/m²"], 1.0, 1000.0),
            unit(&["kWh/m2", "kWh/m²"], 3.6, 1.0),
            unit(&["Btu/ft2", "Btu/ft²", "Btu/sq ft"], BTU_J, FT2_M2 * 1e6),
            unit(&["kBtu/ft2", "kBtu/ft²"], BTU_J, FT2_M2 * 1e3),
            unit(&["lb/ft2", "lb/ft²", "lb/sq ft", "psf"], ORDINARY_BTU_LB * BTU_J, FT2_M2 * 1e6),
        ],
    ),
    added(
        "a mass",
        &[
            unit(&["kg"], 1.0, 1.0),
            unit(&["g"], 1.0, 1000.0),
            unit(&["t", "tonne", "tonnes"], 1000.0, 1.0),
            unit(&["lb", "lbs", "pound", "pounds"], LB_KG, 1.0),
            unit(&["oz"], LB_KG, 16.0),
        ],
    ),
    alone("a share", &[unit(&[""], 1.0, 1.0), unit(&["%", "percent"], 1.0, 100.0)]),
    added(
        "a span of time",
        &[
            unit(&["s", "sec", "second", "seconds"], 1.0, 1.0),
            unit(&["min", "minute", "minutes"], 60.0, 1.0),
            unit(&["h", "hr", "hour", "hours"], 3600.0, 1.0),
        ],
    ),
    alone(
        "a temperature",
        &[
            unit(&["C", "°C", "deg C", "degC"], 1.0, 1.0),
            Unit { spellings: &["F", "°F", "deg F", "degF"], times: 5.0, per: 9.0, zero: 32.0 },
            Unit { spellings: &["K"], times: 1.0, per: 1.0, zero: 273.15 },
        ],
    ),
    alone("an angle", &[unit(&["deg", "°", "degrees"], 1.0, 1.0)]),
    alone(
        "a pressure",
        &[
            unit(&["Pa"], 1.0, 1.0),
            unit(&["kPa"], 1000.0, 1.0),
            unit(&["hPa", "mbar"], 100.0, 1.0),
            unit(&["bar"], 100_000.0, 1.0),
            unit(&["psi"], LB_KG * 9.806_65, 0.000_645_16),
        ],
    ),
    alone(
        "a water density",
        &[
            unit(&["mm/s"], 1.0, 1.0),
            unit(&["mm/min"], 1.0, 60.0),
            unit(&["gpm/ft2", "gpm/ft²"], 3.785_411_784, 60.0 * FT2_M2),
        ],
    ),
    alone(
        "a speed",
        &[
            unit(&["m/s"], 1.0, 1.0),
            unit(&["km/h", "kph"], 1.0, 3.6),
            unit(&["mph"], 0.447_04, 1.0),
            unit(&["kn", "kt", "knots"], 1852.0, 3600.0),
            unit(&["ft/s"], 3048.0, 10_000.0),
        ],
    ),
    alone(
        "a heat release",
        &[
            unit(&["kW"], 1.0, 1.0),
            unit(&["W"], 1.0, 1000.0),
            unit(&["MW"], 1000.0, 1.0),
            unit(&["Btu/s"], BTU_J, 1000.0),
        ],
    ),
    alone(
        "an energy",
        &[
            unit(&["MJ"], 1.0, 1.0),
            unit(&["kJ"], 1.0, 1000.0),
            unit(&["GJ"], 1000.0, 1.0),
            unit(&["kWh"], 3.6, 1.0),
            unit(&["Btu"], BTU_J, 1e6),
        ],
    ),
    alone("a heat release per area", &[unit(&["kW/m2", "kW/m²"], 1.0, 1.0)]),
    alone("a growth coefficient", &[unit(&["kW/s2", "kW/s²"], 1.0, 1.0)]),
    alone(
        "a heat of combustion",
        &[
            unit(&["MJ/kg"], 1.0, 1.0),
            unit(&["kJ/g"], 1.0, 1.0),
            unit(&["kJ/kg"], 1.0, 1000.0),
            unit(&["Btu/lb"], BTU_J, LB_KG * 1e6),
        ],
    ),
    alone("a conductivity", &[unit(&["W/(m K)", "W/mK", "W/m K"], 1.0, 1.0)]),
    alone(
        "a density",
        &[unit(&["kg/m3", "kg/m³"], 1.0, 1.0), unit(&["lb/ft3", "lb/ft³", "pcf"], LB_KG, 0.028_316_846_592)],
    ),
    alone("a specific heat", &[unit(&["J/(kg K)", "J/kgK"], 1.0, 1.0), unit(&["kJ/(kg K)"], 1000.0, 1.0)]),
];

/// Why a text is no quantity, and where.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Unreadable {
    /// The character at which the fault shows, counted from 1.
    pub column: usize,
    /// What is wrong there.
    pub reason: String,
}

impl fmt::Display for Unreadable {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(f, "at character {}: {}", self.column, self.reason)
    }
}

/// Reads a text such as `12 ft 6 in` as a number of `unit`.
///
/// ```
/// use sootline::domain::units;
///
/// assert_eq!(units::read("12 ft 6 in", "m"), Ok(3.81)); // 12 · 0.3048 + 6 · 0.0254
/// assert_eq!(units::read("68 F", "C"), Ok(20.0)); // (68 - 32) · 5/9
/// assert_eq!(units::read("3 parsecs", "m").map_err(|fault| fault.column), Err(3));
/// ```
pub fn read(text: &str, unit: &str) -> Result<f64, Unreadable> {
    let fault = |column, reason: String| Err(Unreadable { column, reason });
    let Some((family, wanted)) = Family::of(unit) else {
        return fault(1, format!("a text is not read here: send a number of {unit}"));
    };
    if text.chars().count() > LONGEST_TEXT {
        return fault(LONGEST_TEXT + 1, format!("longer than {LONGEST_TEXT} characters"));
    }
    Reading { text, at: 0 }.quantity(family, wanted)
}

struct Reading<'a> {
    text: &'a str,
    at: usize,
}

impl<'a> Reading<'a> {
    fn quantity(mut self, family: &Family, wanted: &Unit) -> Result<f64, Unreadable> {
        self.skip_spaces();
        let negative = self.take(&["-", "−"]);
        if !negative {
            self.take(&["+"]);
        }
        let mut total: Option<Sum> = None;
        let mut last: Option<&Unit> = None;
        loop {
            self.skip_spaces();
            // A drawing writes 6'-6".
            if last.is_some_and(|unit| unit.spellings.contains(&"ft")) && self.take(&["-"]) {
                self.skip_spaces();
            }
            let number = self.number()?;
            self.skip_spaces();
            let unit_at = self.at;
            let unit = self.unit(family)?;
            if let Some(larger) = last
                && unit.times / unit.per >= larger.times / larger.per
            {
                return Err(self.fault(unit_at, "a smaller unit must follow a larger one".to_owned()));
            }
            let number = if negative { -number } else { number };
            let first = last.is_none();
            total = Some(Sum::add(total, number - unit.zero, unit));
            last = Some(unit);
            self.skip_spaces();
            if self.rest().is_empty() {
                if first && std::ptr::eq(unit, wanted) {
                    return Ok(number);
                }
                break;
            }
            if !family.compound {
                let measures = family.measures;
                return Err(self.fault(self.at, format!("the text goes on after {measures}")));
            }
        }
        let Some(sum) = total else { return Err(self.fault(0, "a number is missing".to_owned())) };
        Ok(sum.of(wanted))
    }

    fn number(&mut self) -> Result<f64, Unreadable> {
        let start = self.at;
        let whole = self.digits();
        if let Some(fraction) = self.fraction(whole)? {
            return Ok(fraction);
        }
        let mut decimals = "";
        if self.rest().starts_with('.') {
            self.at += 1;
            decimals = self.digits();
        }
        if whole.is_empty() && decimals.is_empty() {
            self.at = start;
            let found = self.rest().chars().next();
            let found = found.map_or_else(|| "the text ends".to_owned(), |c| format!("found `{c}`"));
            return Err(self.fault(start, format!("a number is expected, {found}")));
        }
        self.exponent();
        if self.rest().starts_with(',') {
            return Err(self.fault(self.at, "write decimals with a point, not a comma".to_owned()));
        }
        let text = self.text.get(start..self.at).unwrap_or_default();
        text.parse().map_err(|_| self.fault(start, "a number is expected".to_owned()))
    }

    /// `1/2` or, after a whole number, `6 1/2`.
    fn fraction(&mut self, whole: &str) -> Result<Option<f64>, Unreadable> {
        if whole.is_empty() {
            return Ok(None);
        }
        let before = self.at;
        let (whole, over) = if self.rest().starts_with('/') {
            (0.0, whole)
        } else {
            self.skip_spaces();
            let over = self.digits();
            (whole.parse().unwrap_or(f64::INFINITY), over)
        };
        let slash = !over.is_empty() && self.take(&["/"]);
        let under_at = self.at;
        let under = if slash { self.digits() } else { "" };
        if under.is_empty() {
            self.at = before;
            return Ok(None);
        }
        let over: f64 = over.parse().unwrap_or(f64::INFINITY);
        let under: f64 = under.parse().unwrap_or(f64::INFINITY);
        if under == 0.0 {
            return Err(self.fault(under_at, "nothing can be divided by zero".to_owned()));
        }
        Ok(Some(whole + over / under))
    }

    /// `e` with digits after it; a unit may begin with the same letter.
    fn exponent(&mut self) {
        let before = self.at;
        if self.take(&["e", "E"]) {
            if !self.take(&["-"]) {
                self.take(&["+"]);
            }
            if self.digits().is_empty() {
                self.at = before;
            }
        }
    }

    fn unit<'f>(&mut self, family: &'f Family) -> Result<&'f Unit, Unreadable> {
        let rest = self.rest();
        let fitting = family
            .units
            .iter()
            .flat_map(|unit| unit.spellings.iter().map(move |spelling| (*spelling, unit)))
            .filter(|(spelling, _)| begins(rest, spelling));
        if let Some((spelling, unit)) = fitting.max_by_key(|(spelling, _)| spelling.len()) {
            self.at += spelling.len();
            return Ok(unit);
        }
        let units = family.spellings();
        let word: String = rest.chars().take_while(|c| !c.is_whitespace()).take(16).collect();
        let reason = if word.is_empty() {
            format!("the unit is missing: one of {units}")
        } else {
            format!("`{word}` is no unit of {}: use one of {units}", family.measures)
        };
        Err(self.fault(self.at, reason))
    }

    fn digits(&mut self) -> &'a str {
        let rest = self.rest();
        let end = rest.find(|c: char| !c.is_ascii_digit()).unwrap_or(rest.len());
        self.at += end;
        rest.get(..end).unwrap_or_default()
    }

    fn rest(&self) -> &'a str {
        self.text.get(self.at..).unwrap_or_default()
    }

    fn skip_spaces(&mut self) {
        let rest = self.rest();
        self.at += rest.len() - rest.trim_start().len();
    }

    fn take(&mut self, any: &[&str]) -> bool {
        let found = any.iter().find(|text| self.rest().starts_with(**text));
        self.at += found.map_or(0, |text| text.len());
        found.is_some()
    }

    fn fault(&self, at: usize, reason: String) -> Unreadable {
        let column = self.text.get(..at).map_or(0, |before| before.chars().count()) + 1;
        Unreadable { column, reason }
    }
}

/// Whether `rest` begins with the unit and the unit ends there. Case counts only where it
/// tells mega from milli.
fn begins(rest: &str, spelling: &str) -> bool {
    let Some((head, tail)) = rest.split_at_checked(spelling.len()) else { return false };
    let mega = spelling.starts_with('M');
    let same = head.eq_ignore_ascii_case(spelling) && (!mega || head.starts_with('M'));
    let word = spelling.ends_with(|c: char| c.is_alphanumeric());
    let goes_on = tail.starts_with(|c: char| {
        c.is_alphabetic() || "/²³^".contains(c) || (spelling.is_empty() && !c.is_whitespace())
    });
    same && !((word || spelling.is_empty()) && goes_on)
}

/// Terms added up in the unit they stand in as long as they share a divisor, so that
/// `12 ft 6 in` is 3.81 m and not a neighbour of it.
struct Sum {
    over: f64,
    per: f64,
}

impl Sum {
    fn add(sum: Option<Self>, number: f64, unit: &Unit) -> Self {
        let over = number * unit.times;
        match sum {
            None => Self { over, per: unit.per },
            Some(sum) if sum.per == unit.per => Self { over: sum.over + over, per: sum.per },
            Some(sum) => Self { over: sum.over / sum.per + over / unit.per, per: 1.0 },
        }
    }

    fn of(self, wanted: &Unit) -> f64 {
        self.over * wanted.per / (self.per * wanted.times) + wanted.zero
    }
}

#[cfg(test)]
mod tests;
