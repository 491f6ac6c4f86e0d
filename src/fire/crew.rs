//! Heat on crews: published classes of thermal exposure, and when each is reached 1 m above the floor.

use super::constants::ICE_POINT_K;
use super::crossing::share_above;
use super::sources::{self, Source};
use super::tenability::{Head, Receptor, TwoLayers};

/// Gas at 1 m that ends a search, 260 °C, K: the end of Donnelly's class III.
///
/// Source: [`DONNELLY_2006`](crate::fire::sources::DONNELLY_2006).
pub const LIMIT_260_C_GAS_K: f64 = 260.0 + ICE_POINT_K;

/// Radiation at 1 m that ends a search, kW/m².
///
/// Source: [`DONNELLY_2006`](crate::fire::sources::DONNELLY_2006).
pub const LIMIT_10_KW_M2: f64 = 10.0;

/// Height at which crews are looked at: on hands and knees, m. Common practice.
pub const CREW_HEIGHT_M: f64 = 1.0;

/// Whose classes.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Scheme {
    /// Four classes for electronic gear of fire fighters, by Donnelly and others.
    Donnelly,
    /// Four classes from live training, by Foster and Roberts.
    FosterRoberts,
    /// Three classes, by Utech.
    Utech,
}

/// One class: what it reaches up to, and how long one stays in it.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Class {
    /// Name in reports.
    pub key: &'static str,
    /// Gas up to this, K; infinite in the last.
    pub gas_up_to_k: f64,
    /// Radiation up to this, kW/m²; infinite in the last.
    pub flux_up_to_kw_m2: f64,
    /// Shortest and longest stay that is published, s.
    pub stay_s: (f64, f64),
}

/// Most classes of a scheme.
const CLASSES: usize = 4;

impl Scheme {
    /// All schemes.
    pub const ALL: [Self; 3] = [Self::Donnelly, Self::FosterRoberts, Self::Utech];

    /// Its classes, mildest first.
    ///
    /// | scheme         | class     | gas °C | kW/m² | stay           |
    /// |----------------|-----------|--------|-------|----------------|
    /// | Donnelly       | I         | 100    | 1     | 25 min         |
    /// |                | II        | 160    | 2     | 15 min         |
    /// |                | III       | 260    | 10    | 5 min          |
    /// |                | IV        | above  | above | less than 1 min|
    /// | Foster, Roberts| routine   | 100    | 1     | 25 min         |
    /// |                | hazardous | 120    | 3     | 10 min         |
    /// |                | extreme   | 235    | 10    | 1 min at 160 °C and 4 to 4.5 kW/m² |
    /// |                | critical  | above  | above | less than 1 min|
    /// | Utech          | routine   | 70     | 1.7   | 10 to 20 min   |
    /// |                | ordinary  | 300    | 12.5  | 10 to 20 min   |
    /// |                | emergency | above  | above | 15 to 30 s     |
    ///
    /// Range: fire fighters in full gear with breathing apparatus. Gas and radiation seldom stand in the
    /// proportion of a class: the worse of the two counts.
    ///
    /// Sources: [`DONNELLY_2006`](crate::fire::sources::DONNELLY_2006),
    /// [`FOSTER_ROBERTS_1994`](crate::fire::sources::FOSTER_ROBERTS_1994),
    /// [`UTECH_1973`](crate::fire::sources::UTECH_1973).
    ///
    /// ```
    /// use sootline::fire::crew::Scheme;
    ///
    /// let classes = Scheme::Donnelly.classes();
    /// assert_eq!((classes[1].gas_up_to_k, classes[1].flux_up_to_kw_m2), (160.0 + 273.15, 2.0));
    /// assert_eq!(classes[1].stay_s, (900.0, 900.0));
    /// ```
    #[must_use]
    pub const fn classes(self) -> &'static [Class] {
        match self {
            Self::Donnelly => DONNELLY,
            Self::FosterRoberts => FOSTER_ROBERTS,
            Self::Utech => UTECH,
        }
    }

    /// Where its classes stand.
    #[must_use]
    pub const fn source(self) -> &'static Source {
        match self {
            Self::Donnelly => &sources::DONNELLY_2006,
            Self::FosterRoberts => &sources::FOSTER_ROBERTS_1994,
            Self::Utech => &sources::UTECH_1973,
        }
    }
}

const DONNELLY: &[Class] = &[
    class("class_i", 100.0, 1.0, (1500.0, 1500.0)),
    class("class_ii", 160.0, 2.0, (900.0, 900.0)),
    class("class_iii", 260.0, 10.0, (300.0, 300.0)),
    class("class_iv", f64::INFINITY, f64::INFINITY, (0.0, 60.0)),
];

const FOSTER_ROBERTS: &[Class] = &[
    class("routine", 100.0, 1.0, (1500.0, 1500.0)),
    class("hazardous", 120.0, 3.0, (600.0, 600.0)),
    class("extreme", 235.0, 10.0, (60.0, 60.0)),
    class("critical", f64::INFINITY, f64::INFINITY, (0.0, 60.0)),
];

const UTECH: &[Class] = &[
    class("routine", 70.0, 1.7, (600.0, 1200.0)),
    class("ordinary", 300.0, 12.5, (600.0, 1200.0)),
    class("emergency", f64::INFINITY, f64::INFINITY, (15.0, 30.0)),
];

const fn class(key: &'static str, celsius: f64, flux_up_to_kw_m2: f64, stay_s: (f64, f64)) -> Class {
    Class { key, gas_up_to_k: celsius + ICE_POINT_K, flux_up_to_kw_m2, stay_s }
}

/// A crew in one place, as samples of its room come in.
///
/// A class is reached when gas or radiation first passes what the class before it reaches up to; the first is
/// reached from the start. Radiation is what the sample says for a person in the layer that 1 m lies in.
///
/// ```
/// use sootline::fire::crew::{Crew, Scheme};
/// use sootline::fire::tenability::{Asphyxiants, LayerAir, TwoLayers};
///
/// let room = |celsius: f64| {
///     let air = LayerAir { temperature_k: celsius + 273.15, gas: Asphyxiants::FRESH_AIR, extinction_1_m: 0.0, flux_kw_m2: 0.0 };
///     TwoLayers { interface_height_m: 0.0, upper: air, lower: air }
/// };
/// let mut crew = Crew::starting(0.0, &room(20.0));
/// crew.add(120.0, &room(260.0));
/// // By hand: 2 K/s from 20 °C: 100 °C after 40 s, 160 °C after 70 s, 260 °C not yet passed.
/// let [one, two, three, four] = crew.reached_s(Scheme::Donnelly);
/// assert_eq!((one, two, three, four), (Some(0.0), Some(40.0), Some(70.0), None));
/// ```
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Crew {
    time_s: f64,
    room: TwoLayers,
    reached_s: [[Option<f64>; CLASSES]; Scheme::ALL.len()],
    gas_s: Option<f64>,
    flux_s: Option<f64>,
}

impl Crew {
    /// The room at the time the crew, or the question, begins.
    #[must_use]
    pub fn starting(at_s: f64, room: &TwoLayers) -> Self {
        let mut reached_s = [[None; CLASSES]; Scheme::ALL.len()];
        for first in &mut reached_s {
            first[0] = Some(at_s);
        }
        Self { time_s: at_s, room: *room, reached_s, gas_s: None, flux_s: None }
    }

    /// The room a while later; between, everything runs along straight lines. What is not later is left out.
    pub fn add(&mut self, dt_s: f64, room: &TwoLayers) {
        if dt_s > 0.0 && dt_s.is_finite() {
            let (first, second) = Receptor { height_m: CREW_HEIGHT_M }.stretches(&self.room, room);
            for stretch in [Some(first), second].into_iter().flatten() {
                let starts_s = self.time_s + dt_s * stretch.start;
                self.pass(starts_s, dt_s * (stretch.end - stretch.start), &stretch.from, &stretch.to);
            }
            self.time_s += dt_s;
            self.room = *room;
        }
    }

    /// When each class of a scheme was first reached, s, in the order of [`Scheme::classes`]; none where it was not,
    /// or where the scheme has no fourth.
    #[must_use]
    pub const fn reached_s(&self, scheme: Scheme) -> [Option<f64>; 4] {
        self.reached_s[scheme as usize]
    }

    /// When the gas at 1 m passed 260 °C, s.
    #[must_use]
    pub const fn past_260_c_s(&self) -> Option<f64> {
        self.gas_s
    }

    /// When the radiation at 1 m passed 10 kW/m², s.
    #[must_use]
    pub const fn past_10_kw_m2_s(&self) -> Option<f64> {
        self.flux_s
    }

    /// A stretch with 1 m in one layer.
    fn pass(&mut self, starts_s: f64, dt_s: f64, from: &Head, to: &Head) {
        let at_s = |share: Option<f64>| share.map(|share| starts_s + dt_s * share);
        let gas_s = |limit_k| at_s(share_above(from.air.temperature_k, to.air.temperature_k, limit_k));
        let flux_s = |limit_kw_m2| at_s(share_above(from.air.flux_kw_m2, to.air.flux_kw_m2, limit_kw_m2));

        for (reached_s, scheme) in self.reached_s.iter_mut().zip(Scheme::ALL) {
            for (reached_s, before) in reached_s.iter_mut().skip(1).zip(scheme.classes()) {
                let past_s = earlier(gas_s(before.gas_up_to_k), flux_s(before.flux_up_to_kw_m2));
                *reached_s = reached_s.or(past_s);
            }
        }
        self.gas_s = self.gas_s.or(gas_s(LIMIT_260_C_GAS_K));
        self.flux_s = self.flux_s.or(flux_s(LIMIT_10_KW_M2));
    }
}

/// The earlier of two times, or the one that is there.
fn earlier(a: Option<f64>, b: Option<f64>) -> Option<f64> {
    match (a, b) {
        (Some(a), Some(b)) => Some(a.min(b)),
        (a, b) => a.or(b),
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::fire::tenability::{Asphyxiants, LayerAir};

    fn air(celsius: f64, flux_kw_m2: f64) -> LayerAir {
        LayerAir {
            temperature_k: celsius + 273.15,
            gas: Asphyxiants::FRESH_AIR,
            extinction_1_m: 0.0,
            flux_kw_m2,
        }
    }

    fn whole(celsius: f64, flux_kw_m2: f64) -> TwoLayers {
        TwoLayers {
            interface_height_m: 0.0,
            upper: air(celsius, flux_kw_m2),
            lower: air(celsius, flux_kw_m2),
        }
    }

    #[test]
    fn classes_are_in_order_and_the_last_has_no_end() {
        for scheme in Scheme::ALL {
            let classes = scheme.classes();
            assert!((3..=4).contains(&classes.len()) && !scheme.source().key.is_empty());
            for two in classes.windows(2) {
                assert!(two[0].gas_up_to_k < two[1].gas_up_to_k);
                assert!(two[0].flux_up_to_kw_m2 < two[1].flux_up_to_kw_m2);
                assert!(two[0].stay_s.1 >= two[1].stay_s.1);
            }
            let last = classes.last().unwrap();
            assert!(last.gas_up_to_k.is_infinite() && last.flux_up_to_kw_m2.is_infinite());
        }
    }

    #[test]
    fn the_worse_of_gas_and_radiation_decides() {
        // By hand: 20 to 120 °C and 0 to 20 kW/m² in 100 s: radiation passes 1, 2, 3, 10, 12.5 kW/m² at 5, 10,
        // 15, 50, 62.5 s, 1.7 kW/m² at 8.5 s; the gas passes 70 °C at 50 s, 100 °C at 80 s.
        let mut crew = Crew::starting(0.0, &whole(20.0, 0.0));
        crew.add(100.0, &whole(120.0, 20.0));

        let near = |got: [Option<f64>; 4], want: [f64; 3]| {
            (1..4).all(|i| got[i].map_or(want[i - 1].is_infinite(), |s| (s - want[i - 1]).abs() < 1e-9))
        };
        assert!(near(crew.reached_s(Scheme::Donnelly), [5.0, 10.0, 50.0]));
        assert!(near(crew.reached_s(Scheme::FosterRoberts), [5.0, 15.0, 50.0]));
        assert!(near(crew.reached_s(Scheme::Utech), [8.5, 62.5, f64::INFINITY]));
        assert_eq!((crew.past_260_c_s(), crew.past_10_kw_m2_s()), (None, Some(50.0)));
    }

    #[test]
    fn at_a_limit_the_milder_class_still_holds() {
        let mut crew = Crew::starting(0.0, &whole(20.0, 0.0));
        crew.add(60.0, &whole(260.0, 10.0));

        assert!(
            crew.reached_s(Scheme::Donnelly)[2].is_some() && crew.reached_s(Scheme::Donnelly)[3].is_none()
        );
        assert_eq!((crew.past_260_c_s(), crew.past_10_kw_m2_s()), (None, None));
        crew.add(60.0, &whole(261.0, 10.0));
        assert!(crew.past_260_c_s().is_some() && crew.reached_s(Scheme::Donnelly)[3] == crew.past_260_c_s());
    }

    #[test]
    fn a_layer_that_comes_down_past_one_metre_counts_from_then() {
        // By hand: 2.0 to 0.5 m in 30 s: 1.0 m after 20 s; 500 °C in it is past every class.
        let room = |interface_height_m| TwoLayers {
            interface_height_m,
            upper: air(500.0, 15.0),
            lower: air(30.0, 0.5),
        };
        let mut crew = Crew::starting(100.0, &room(2.0));
        crew.add(30.0, &room(0.5));

        assert_eq!(crew.reached_s(Scheme::Donnelly)[0], Some(100.0));
        for scheme in Scheme::ALL {
            let last = scheme.classes().len() - 1;
            assert!((crew.reached_s(scheme)[last].unwrap() - 120.0).abs() < 1e-9);
        }
        assert!((crew.past_260_c_s().unwrap() - 120.0).abs() < 1e-9);
    }

    #[test]
    fn what_was_reached_once_keeps_its_time() {
        let mut crew = Crew::starting(0.0, &whole(20.0, 0.0));
        for celsius in [180.0, 20.0, 180.0] {
            crew.add(80.0, &whole(celsius, 0.0));
        }

        // By hand: 2 K/s: 100 °C at 40 s.
        assert!((crew.reached_s(Scheme::Donnelly)[1].unwrap() - 40.0).abs() < 1e-9);
    }
}
