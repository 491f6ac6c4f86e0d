//! Units against values worked by hand, round trips, and garbage.

use proptest::prelude::*;

use super::*;
use crate::domain::quantity as kinds;
use crate::domain::quantity::{
    Angle, Fault, FireLoadDensity, FireRating, Fraction, Kind, Mass, OpeningSide, Quantity, RoomLength, Span,
    Temperature, WaterFlow,
};

#[test]
fn texts_agree_with_values_worked_by_hand() {
    // Exact by definition: 1 ft = 0.3048 m, 1 in = 0.0254 m, 1 lb = 0.45359237 kg,
    // 1 US gal = 3.785411784 L, 1 Btu (International Table) = 1055.05585262 J.
    for (text, unit, expected, origin) in [
        ("12 ft 6 in", "m", 3.81, "12 · 0.3048 + 6 · 0.0254"),
        ("12ft6in", "m", 3.81, "as above"),
        ("6' 6\"", "m", 1.9812, "78 · 0.0254"),
        ("5'-6\"", "m", 1.6764, "66 · 0.0254"),
        ("5′ 6″", "m", 1.6764, "66 · 0.0254"),
        ("6 1/2 in", "m", 0.1651, "6.5 · 0.0254"),
        ("1/2 in", "m", 0.0127, "0.5 · 0.0254"),
        ("36 in", "m", 0.9144, "36 · 0.0254"),
        ("36 Inches", "m", 0.9144, "36 · 0.0254"),
        ("3.5 m", "m", 3.5, "as it is"),
        (" +3.5m ", "m", 3.5, "as it is"),
        ("250 cm", "m", 2.5, "250 / 100"),
        ("2 m 40 cm", "m", 2.4, "2 + 40 / 100"),
        ("1.27e1 mm", "m", 0.0127, "12.7 / 1000"),
        ("-2 ft 6 in", "m", -0.762, "-30 · 0.0254"),
        ("100 ft2", "m2", 9.290_304, "100 · 0.3048²"),
        ("9 sq ft", "m2", 0.836_127_36, "9 · 0.3048²"),
        ("144 in²", "m2", 0.092_903_04, "144 · 0.0254²"),
        ("1000 cfm", "m3/s", 0.471_947_443_2, "1000 · 0.3048³ / 60"),
        ("500 gpm", "L/min", 1_892.705_892, "500 · 3.785411784"),
        ("10 L/s", "L/min", 600.0, "10 · 60"),
        ("10 lb/ft2", "MJ/m2", 908.522_134_578_158, "10 · 8000 Btu · 1055.05585262 J / 0.09290304 m²"),
        ("10 psf", "MJ/m2", 908.522_134_578_158, "as above"),
        ("80000 Btu/ft2", "MJ/m2", 908.522_134_578_158, "the same heat"),
        ("100 kWh/m2", "MJ/m2", 360.0, "100 · 3.6"),
        ("450 kW", "kW", 450.0, "as it is"),
        ("0.45 MW", "kW", 450.0, "0.45 · 1000"),
        ("100 lb", "kg", 45.359_237, "100 · 0.45359237"),
        ("1 lb 8 oz", "kg", 0.680_388_555, "1.5 · 0.45359237"),
        ("50 %", "", 0.5, "50 / 100"),
        ("0.5", "", 0.5, "a share needs no unit"),
        ("20 min", "s", 1200.0, "20 · 60"),
        ("1 h 30 min", "s", 5400.0, "1.5 · 3600"),
        ("1 h", "min", 60.0, "60 minutes"),
        ("68 F", "C", 20.0, "(68 - 32) · 5/9"),
        ("-40 °F", "C", -40.0, "(-40 - 32) · 5/9"),
        ("293.15 K", "C", 20.0, "293.15 - 273.15"),
        ("30 mph", "m/s", 13.4112, "30 · 1609.344 / 3600"),
        ("61.64 kPa", "Pa", 61_640.0, "61.64 · 1000"),
        ("1013.25 hPa", "Pa", 101_325.0, "1013.25 · 100"),
        ("14.5 psi", "Pa", 99_973.980_750_941_23, "14.5 · 0.45359237 kg · 9.80665 m/s² / 0.0254² m²"),
        ("5 mm/min", "mm/s", 0.083_333_333_333_333_33, "5 / 60"),
        ("0.1 gpm/ft2", "mm/s", 0.067_909_722_222_222_22, "0.1 · 231/144 in · 25.4 / 60"),
    ] {
        let got = read(text, unit).unwrap_or_else(|fault| panic!("{text}: {fault}"));
        assert!((got - expected).abs() <= 4.0 * f64::EPSILON * expected.abs(), "{text}: {origin}, got {got}");
    }
}

#[test]
fn feet_and_inches_give_the_number_that_a_person_would_write() {
    assert_eq!(read("12 ft 6 in", "m"), Ok(3.81));
    assert_eq!(read("11 ft 3 in", "m"), Ok(3.429));
    assert_eq!(read("6' 8\"", "m"), Ok(2.032));
}

#[test]
fn garbage_is_refused_at_its_place() {
    for (text, unit, column) in [
        ("", "m", 1),
        ("   ", "m", 4),
        ("wide", "m", 1),
        ("3,5 m", "m", 2),
        ("3.5", "m", 4),
        ("3.5 ", "m", 5),
        ("3.5 stone", "m", 5),
        ("3.5 kg", "m", 5),
        ("1/0 in", "m", 3),
        ("3 ft 2 ft", "m", 8),
        ("12 in 6 ft", "m", 9),
        ("3 m and more", "m", 5),
        ("3 m -2 cm", "m", 5),
        ("--3 m", "m", 2),
        ("3 m2", "m", 5),
        ("3 m2", "m3/s", 3),
        ("1e m", "m", 2),
        ("٣ m", "m", 1),
        ("é 3 m", "m", 1),
        ("12 é", "m", 4),
        ("68 F 2 F", "C", 6),
        ("5 mj/m2", "MJ/m2", 3),
        ("nan m", "m", 1),
        ("inf m", "m", 1),
        ("0x10 m", "m", 2),
        (".", "m", 1),
        (". m", "m", 1),
        ("5 %%", "", 4),
        ("5 x", "", 3),
        (&"1".repeat(65), "m", 65),
        ("3 kg/kg", "kg/kg", 1),
    ] {
        match read(text, unit) {
            Ok(value) => panic!("`{text}` was read as {value} {unit}"),
            Err(fault) => assert_eq!(fault.column, column, "`{text}` as {unit}: {fault}"),
        }
    }
}

#[test]
fn every_unit_of_a_quantity_has_a_family_that_it_belongs_to_unchanged() {
    fn check<K: Kind>(_: impl Fn(f64) -> Option<Quantity<K>>) {
        let (family, unit) = Family::of(K::UNIT).unwrap_or_else(|| panic!("no family for {}", K::UNIT));
        assert_eq!((unit.times, unit.zero), if K::UNIT == "min" { (60.0, 0.0) } else { (1.0, 0.0) });
        assert!(!family.measures.is_empty());
    }

    check(RoomLength::new);
    check(FireLoadDensity::new);
    check(FireRating::new);
    check(Fraction::new);
    check(Mass::new);
    check(Span::new);
    check(Temperature::new);
    check(WaterFlow::new);
    check(Angle::new);
}

#[test]
fn no_spelling_of_a_family_means_two_units() {
    for family in FAMILIES {
        let mut seen = std::collections::HashSet::new();
        for unit in family.units {
            for spelling in unit.spellings {
                let folded = if spelling.starts_with('M') {
                    (*spelling).to_owned()
                } else {
                    spelling.to_ascii_lowercase()
                };
                assert!(
                    seen.insert(folded)
                        || unit.spellings.iter().filter(|s| s.eq_ignore_ascii_case(spelling)).count() > 1,
                    "`{spelling}` of {} stands twice",
                    family.measures
                );
            }
        }
    }
}

fn within<K: Kind>() -> impl Strategy<Value = f64> {
    // Evenly over the range, and evenly over its magnitudes near zero.
    prop_oneof![
        K::MIN..=K::MAX,
        (-6.0..6.0_f64).prop_map(|power| (10_f64.powf(power)).clamp(K::MIN, K::MAX)),
        Just(K::MIN),
        Just(K::MAX),
    ]
}

fn parse_of_print_is_identity<K: Kind>(value: f64) -> Result<(), TestCaseError> {
    let quantity = Quantity::<K>::new(value).unwrap();

    let printed = quantity.to_string();

    let back = Quantity::<K>::parse(&printed).map(Quantity::get);
    prop_assert_eq!(back, Ok(quantity.get()), "{}", printed);
    Ok(())
}

/// Printing in another unit of the family and reading back comes within rounding of the start.
fn other_units_come_back<K: Kind>(value: f64) -> Result<(), TestCaseError> {
    let (family, own) = Family::of(K::UNIT).unwrap();
    for unit in family.units {
        let base = (value - own.zero) * own.times / own.per;
        let other = base * unit.per / unit.times + unit.zero;
        let text = format!("{other} {}", unit.spellings.first().unwrap());
        // A decimal expansion of a tiny number may be longer than what is read.
        if text.len() > LONGEST_TEXT {
            continue;
        }
        let back = read(&text, K::UNIT).unwrap();
        // A few roundings, of the value and of the zero point it passes through.
        let rounding = 8.0 * f64::EPSILON * (value.abs() + unit.zero.abs() + own.zero.abs());
        prop_assert!((back - value).abs() <= rounding, "{} gave {} for {}", text, back, value);
    }
    Ok(())
}

proptest! {
    #![proptest_config(ProptestConfig { failure_persistence: None, ..ProptestConfig::default() })]

    #[test]
    fn lengths_survive(value in within::<kinds::RoomLengthKind>()) {
        parse_of_print_is_identity::<kinds::RoomLengthKind>(value)?;
        other_units_come_back::<kinds::RoomLengthKind>(value)?;
    }

    #[test]
    fn elevations_survive(value in within::<kinds::ElevationKind>()) {
        parse_of_print_is_identity::<kinds::ElevationKind>(value)?;
        other_units_come_back::<kinds::ElevationKind>(value)?;
    }

    #[test]
    fn areas_survive(value in within::<kinds::FloorAreaKind>()) {
        parse_of_print_is_identity::<kinds::FloorAreaKind>(value)?;
        other_units_come_back::<kinds::FloorAreaKind>(value)?;
    }

    #[test]
    fn fire_loads_survive(value in within::<kinds::FireLoadDensityKind>()) {
        parse_of_print_is_identity::<kinds::FireLoadDensityKind>(value)?;
        other_units_come_back::<kinds::FireLoadDensityKind>(value)?;
    }

    #[test]
    fn temperatures_survive(value in within::<kinds::TemperatureKind>()) {
        parse_of_print_is_identity::<kinds::TemperatureKind>(value)?;
        other_units_come_back::<kinds::TemperatureKind>(value)?;
    }

    #[test]
    fn flows_ratings_shares_and_masses_survive(
        flow in within::<kinds::WaterFlowKind>(),
        rating in within::<kinds::FireRatingKind>(),
        share in within::<kinds::FractionKind>(),
        mass in within::<kinds::MassKind>(),
    ) {
        parse_of_print_is_identity::<kinds::WaterFlowKind>(flow)?;
        other_units_come_back::<kinds::WaterFlowKind>(flow)?;
        parse_of_print_is_identity::<kinds::FireRatingKind>(rating)?;
        other_units_come_back::<kinds::FireRatingKind>(rating)?;
        parse_of_print_is_identity::<kinds::FractionKind>(share)?;
        other_units_come_back::<kinds::FractionKind>(share)?;
        parse_of_print_is_identity::<kinds::MassKind>(mass)?;
        other_units_come_back::<kinds::MassKind>(mass)?;
    }

    #[test]
    fn any_text_is_read_or_refused_with_a_place_in_it(text in "\\PC{0,70}") {
        let length = text.chars().count();
        match OpeningSide::parse(&text) {
            Ok(side) => prop_assert!((0.01..=100.0).contains(&side.get())),
            Err(Fault::OutOfRange(value)) => prop_assert!(!(0.01..=100.0).contains(&value)),
            Err(Fault::Unreadable(fault)) => prop_assert!((1..=length + 1).contains(&fault.column)),
        }
    }

    #[test]
    fn so_is_a_text_of_the_right_pieces_in_any_order(
        pieces in proptest::collection::vec(
            prop_oneof!["[0-9]{1,3}", Just(".".to_owned()), Just("ft".to_owned()), Just("in".to_owned()),
                        Just(" ".to_owned()), Just("/".to_owned()), Just("-".to_owned()), Just("'".to_owned()),
                        Just("\"".to_owned()), Just("m".to_owned()), Just("e".to_owned())],
            0..12,
        )
    ) {
        let text = pieces.concat();
        let length = text.chars().count();
        if let Err(Fault::Unreadable(fault)) = RoomLength::parse(&text) {
            prop_assert!((1..=length + 1).contains(&fault.column), "`{}`: {}", text, fault);
        }
    }
}
