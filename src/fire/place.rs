//! Where a room and its fire stand beside the experiments that a method was compared with.

use super::constants::{HEAT_PER_OXYGEN_KJ_KG, OXYGEN_IN_AIR_MASS_FRACTION};
use super::flame::{RoundFire, dimensionless_heat_release, heskestad_height_m};
use super::ventilation::WallOpening;

/// Heat released over what the oxygen of the incoming air can burn: the global equivalence ratio.
///
/// ```text
/// φ = Q / ( m_air Y_O2 ΔH_O2 )
/// ```
///
/// | symbol  | argument          | unit  |
/// |---------|-------------------|-------|
/// | `Q`     | `heat_release_kw` | kW    |
/// | `m_air` | `inflow_kg_s`     | kg/s  |
///
/// `Q` is what the fuel would give with all the air it wants; `m_air` that of a fan, or
/// [`kawagoe_inflow_kg_s`](super::ventilation::kawagoe_inflow_kg_s). None where no air comes in: the store of oxygen
/// in the room decides then.
///
/// Source: [`NUREG_1934`](crate::fire::sources::NUREG_1934).
///
/// ```
/// use sootline::fire::place::equivalence_ratio;
///
/// // By hand: 1000/(1.0 · 0.2315 · 13 100) = 1000/3032.65 = 0.32974.
/// assert!((equivalence_ratio(1000.0, 1.0).unwrap() - 0.32974).abs() < 1e-5);
/// assert!(equivalence_ratio(1000.0, 0.0).is_none());
/// ```
#[must_use]
pub fn equivalence_ratio(heat_release_kw: f64, inflow_kg_s: f64) -> Option<f64> {
    (inflow_kg_s > 0.0)
        .then(|| heat_release_kw / (inflow_kg_s * OXYGEN_IN_AIR_MASS_FRACTION * HEAT_PER_OXYGEN_KJ_KG))
}

/// Opening factor of a room, in √m.
///
/// ```text
/// O = A_o √H_o / A_T
/// ```
///
/// | symbol      | argument           | unit |
/// |-------------|--------------------|------|
/// | `A_o`,`H_o` | `opening`          | m²,m |
/// | `A_T`       | `bounding_area_m2` | m²   |
///
/// `A_T` holds walls, ceiling and floor, here with the openings. Source: [`EN_1991_1_2`](crate::fire::sources::EN_1991_1_2),
/// whose range for fully developed fires is 0.02 to 0.20.
///
/// ```
/// use sootline::fire::place::opening_factor_m1_2;
/// use sootline::fire::ventilation::WallOpening;
///
/// // By hand: 1.6·√2/46.08 = 0.049105: a door of 0.8 × 2.0 m in a room of 3.6 × 2.4 × 2.4 m.
/// let door = WallOpening { area_m2: 1.6, height_m: 2.0 };
/// assert!((opening_factor_m1_2(door, 46.08) - 0.049105).abs() < 1e-6);
/// ```
#[must_use]
pub fn opening_factor_m1_2(opening: WallOpening, bounding_area_m2: f64) -> f64 {
    if bounding_area_m2 > 0.0 { opening.factor_m5_2() / bounding_area_m2 } else { 0.0 }
}

/// A room and its fire, as [`Place`] looks at them.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Case {
    /// Length, m: the longer side.
    pub length_m: f64,
    /// Width, m.
    pub width_m: f64,
    /// Height, m.
    pub height_m: f64,
    /// The fire at its peak, with all the air it wants.
    pub fire: RoundFire,
    /// Height of its base above the floor, m.
    pub base_height_m: f64,
    /// Openings of the room of origin, as one.
    pub opening: WallOpening,
    /// Air that comes in, kg/s.
    pub inflow_kg_s: f64,
    /// Rooms that gas moves through.
    pub rooms: u32,
}

/// Where a case stands, in numbers without a scale (the opening factor in √m).
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Place {
    /// Fire Froude number: dimensionless heat release of its diameter.
    pub fire_froude: f64,
    /// Tip of the flame over the height of the ceiling.
    pub flame_over_height: f64,
    /// Length over height.
    pub length_over_height: f64,
    /// Width over height.
    pub width_over_height: f64,
    /// Global equivalence ratio; none where no air comes in.
    pub equivalence_ratio: Option<f64>,
    /// Opening factor, √m.
    pub opening_factor_m1_2: f64,
    /// Rooms that gas moves through.
    pub rooms: f64,
}

impl Place {
    /// The place of a case.
    ///
    /// The flame is Heskestad's, from its base; one that would pass the ceiling gives more than 1.
    ///
    /// ```
    /// use sootline::fire::flame::RoundFire;
    /// use sootline::fire::place::{Case, Place};
    /// use sootline::fire::ventilation::{WallOpening, kawagoe_inflow_kg_s};
    ///
    /// // By hand: 62.9 kW of 0.3 m in 2.8 × 2.8 × 2.13 m with a door of 0.74 × 1.83 m:
    /// // L = 0.235·62.9^0.4 - 0.306 = 0.9258 m, /2.13 = 0.4346; φ = 62.9/(3032.65·0.91596) = 0.02264.
    /// let door = WallOpening { area_m2: 0.74 * 1.83, height_m: 1.83 };
    /// let place = Place::of(&Case {
    ///     length_m: 2.8, width_m: 2.8, height_m: 2.13,
    ///     fire: RoundFire { heat_release_kw: 62.9, diameter_m: 0.3 }, base_height_m: 0.0,
    ///     opening: door, inflow_kg_s: kawagoe_inflow_kg_s(door), rooms: 1,
    /// });
    /// assert!((place.flame_over_height - 0.4346).abs() < 1e-4);
    /// assert!((place.equivalence_ratio.unwrap() - 0.02264).abs() < 1e-5);
    /// ```
    #[must_use]
    pub fn of(case: &Case) -> Self {
        let over_height = |metres: f64| if case.height_m > 0.0 { metres / case.height_m } else { 0.0 };
        let walls_m2 = 2.0 * case.height_m * (case.length_m + case.width_m);
        Self {
            fire_froude: if case.fire.diameter_m > 0.0 { dimensionless_heat_release(case.fire) } else { 0.0 },
            flame_over_height: over_height(case.base_height_m + heskestad_height_m(case.fire)),
            length_over_height: over_height(case.length_m),
            width_over_height: over_height(case.width_m),
            equivalence_ratio: equivalence_ratio(case.fire.heat_release_kw, case.inflow_kg_s),
            opening_factor_m1_2: opening_factor_m1_2(
                case.opening,
                2.0 * case.length_m * case.width_m + walls_m2,
            ),
            rooms: f64::from(case.rooms),
        }
    }

    fn numbers(&self) -> [Option<f64>; 7] {
        [
            Some(self.fire_froude),
            Some(self.flame_over_height),
            Some(self.length_over_height),
            Some(self.width_over_height),
            self.equivalence_ratio,
            Some(self.opening_factor_m1_2),
            Some(self.rooms),
        ]
    }
}

/// Names of the numbers of a [`Place`], in the order of [`ValidationSet::compare`].
pub const NUMBERS: [&str; 7] = [
    "fire_froude",
    "flame_over_height",
    "length_over_height",
    "width_over_height",
    "equivalence_ratio",
    "opening_factor_m1_2",
    "rooms",
];

/// The span of a set of experiments in each number.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct ValidationSet {
    spans: [Option<(f64, f64)>; 7],
}

/// One number of a place beside the set.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Compared {
    /// Its name, one of [`NUMBERS`].
    pub number: &'static str,
    /// What it is here; none where it has no meaning.
    pub value: Option<f64>,
    /// Least of the set; none where no experiment has it.
    pub lowest: Option<f64>,
    /// Greatest of the set.
    pub highest: Option<f64>,
    /// True when it lies within the set. Where neither has it, it does.
    pub inside: bool,
}

impl ValidationSet {
    /// The span of these experiments.
    #[must_use]
    pub fn spanning(places: &[Place]) -> Self {
        let mut spans = [None; 7];
        for place in places {
            for (span, number) in spans.iter_mut().zip(place.numbers()) {
                *span = match (*span, number) {
                    (Some((low, high)), Some(x)) => Some((f64::min(low, x), f64::max(high, x))),
                    (None, Some(x)) => Some((x, x)),
                    (span, None) => span,
                };
            }
        }
        Self { spans }
    }

    /// Each number of a place beside the span of the set.
    ///
    /// Within the span is no proof that a mixture of such numbers was ever tried.
    #[must_use]
    pub fn compare(&self, place: &Place) -> [Compared; 7] {
        let numbers = place.numbers();
        std::array::from_fn(|i| Compared {
            number: NUMBERS[i],
            value: numbers[i],
            lowest: self.spans[i].map(|(low, _)| low),
            highest: self.spans[i].map(|(_, high)| high),
            inside: match (numbers[i], self.spans[i]) {
                (Some(x), Some((low, high))) => (low..=high).contains(&x),
                (None, None) => true,
                _ => false,
            },
        })
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::fire::ventilation::kawagoe_inflow_kg_s;
    use approx::assert_relative_eq;

    const DOOR: WallOpening = WallOpening { area_m2: 0.74 * 1.83, height_m: 1.83 };

    fn case(heat_release_kw: f64) -> Case {
        Case {
            length_m: 2.8,
            width_m: 2.8,
            height_m: 2.13,
            fire: RoundFire { heat_release_kw, diameter_m: 0.3 },
            base_height_m: 0.0,
            opening: DOOR,
            inflow_kg_s: kawagoe_inflow_kg_s(DOOR),
            rooms: 1,
        }
    }

    #[test]
    fn a_measured_room_stands_where_it_was_worked_by_hand() {
        // Geometry of Steckler, Quintiere and Rinkinen (1982), by hand: Q* = 62.9/(353·1.005·√9.80665·0.3^2.5)
        // = 62.9/54.765 = 1.1486; 2.8/2.13 = 1.31455; A√H = 1.3542·1.35277 = 1.83192, A_T = 39.536, O = 0.046336.
        let place = Place::of(&case(62.9));

        assert_relative_eq!(place.fire_froude, 1.1486, max_relative = 1e-4);
        assert_relative_eq!(place.length_over_height, 1.314_55, max_relative = 1e-5);
        assert_relative_eq!(place.width_over_height, 1.314_55, max_relative = 1e-5);
        assert_relative_eq!(place.opening_factor_m1_2, 0.046_336, max_relative = 1e-4);
        assert_eq!(place.rooms, 1.0);
    }

    #[test]
    fn the_ratio_is_one_where_the_fire_takes_all_the_air() {
        // By hand: Kawagoe's limit takes 3000 of the 3032.65 kJ that a kg of air holds.
        let limit_kw = super::super::ventilation::kawagoe_limit_kw(DOOR);
        assert_relative_eq!(
            equivalence_ratio(limit_kw, kawagoe_inflow_kg_s(DOOR)).unwrap(),
            3000.0 / 3032.65,
            max_relative = 1e-6
        );
    }

    #[test]
    fn a_shut_room_has_no_ratio_and_is_told_apart_from_vented_tests() {
        let shut = Case { opening: WallOpening::default(), inflow_kg_s: 0.0, ..case(62.9) };
        let set = ValidationSet::spanning(&[Place::of(&case(31.6)), Place::of(&case(158.0))]);
        let compared = set.compare(&Place::of(&shut));

        assert_eq!(
            (compared[4].number, compared[4].value, compared[4].inside),
            ("equivalence_ratio", None, false)
        );
        assert_eq!((compared[5].number, compared[5].inside), ("opening_factor_m1_2", false));
        let shut_set = ValidationSet::spanning(&[Place::of(&shut)]);
        assert!(shut_set.compare(&Place::of(&shut)).iter().all(|number| number.inside));
    }

    #[test]
    fn within_and_beyond_the_span_are_told_number_by_number() {
        let set = ValidationSet::spanning(&[Place::of(&case(31.6)), Place::of(&case(158.0))]);
        let outside = |case: &Case| -> Vec<&str> {
            set.compare(&Place::of(case)).iter().filter(|c| !c.inside).map(|c| c.number).collect()
        };

        assert!(outside(&case(62.9)).is_empty());
        assert_eq!(outside(&case(500.0)), ["fire_froude", "flame_over_height", "equivalence_ratio"]);
        assert_eq!(outside(&Case { rooms: 4, ..case(62.9) }), ["rooms"]);
        assert_eq!(
            outside(&Case { length_m: 9.0, ..case(62.9) }),
            ["length_over_height", "opening_factor_m1_2"]
        );
    }

    #[test]
    fn an_empty_set_holds_nothing_and_strange_rooms_give_numbers() {
        let none = ValidationSet::spanning(&[]);
        assert!(none.compare(&Place::of(&case(62.9))).iter().all(|number| !number.inside));

        let flat = Case { height_m: 0.0, length_m: 0.0, width_m: 0.0, ..case(62.9) };
        let point = Case { fire: RoundFire { heat_release_kw: 10.0, diameter_m: 0.0 }, ..case(62.9) };
        for strange in [flat, point] {
            assert!(Place::of(&strange).numbers().iter().flatten().all(|number| number.is_finite()));
        }
    }

    #[test]
    fn numbers_without_a_scale_do_not_see_the_size() {
        // Froude scaling: half the size takes 2^-2.5 of the heat; flame, shape and ratio stay.
        let half = Case {
            length_m: 1.4,
            width_m: 1.4,
            height_m: 1.065,
            fire: RoundFire { heat_release_kw: 62.9 * 0.5_f64.powf(2.5), diameter_m: 0.15 },
            opening: WallOpening { area_m2: DOOR.area_m2 / 4.0, height_m: DOOR.height_m / 2.0 },
            inflow_kg_s: kawagoe_inflow_kg_s(DOOR) * 0.5_f64.powf(2.5),
            ..case(62.9)
        };
        let (whole, half) = (Place::of(&case(62.9)), Place::of(&half));

        assert_relative_eq!(half.fire_froude, whole.fire_froude, max_relative = 1e-12);
        assert_relative_eq!(half.flame_over_height, whole.flame_over_height, max_relative = 1e-12);
        assert_relative_eq!(
            half.equivalence_ratio.unwrap(),
            whole.equivalence_ratio.unwrap(),
            max_relative = 1e-12
        );
    }
}
