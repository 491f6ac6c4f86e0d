//! The files as files: keys, counts, sources, limits, references, look-ups.

use super::*;

/// Every row has these or none; they are not numbers, so they have no limits.
const OTHER_MEMBERS: [&str; 7] =
    ["fuel", "ignition", "sleeping", "way_out", "combustible", "exposed_growth", "kind"];

#[test]
fn every_key_fixed_by_the_wire_contract_is_there() {
    for (kind, keys) in [
        (
            Kind::Uses,
            "storage office sales living bedroom kitchen corridor stair assembly dining classroom ward workshop \
             garage plant archive laboratory hotel_room stage lobby",
        ),
        (
            Kind::Materials,
            "gypsum_board concrete brick plaster timber plywood steel glass mineral_wool ceramic_fibre",
        ),
        (Kind::Fuels, "methane propane heptane wood polyurethane polystyrene pvc"),
        (
            Kind::Items,
            "upholstered_sofa upholstered_chair mattress bed wardrobe bookshelf desk workstation television \
             curtains clothing_rack wood_pallet_stack cardboard_cartons refuse_pile christmas_tree rack_storage car",
        ),
        (Kind::Leakage, "tight average loose very_loose"),
        (Kind::Detectors, "smoke_point"),
    ] {
        let present = Catalogue::embedded().keys(kind);
        for key in keys.split_whitespace() {
            assert!(present.contains(&key), "{} lacks {key}", kind.name());
        }
    }
}

#[test]
fn the_catalogue_is_as_large_as_promised() {
    let all = Catalogue::embedded();
    for (kind, least) in [(Kind::Uses, 20), (Kind::Items, 40), (Kind::Fuels, 25), (Kind::Materials, 25)] {
        assert!(all.keys(kind).len() >= least, "{} has {}", kind.name(), all.keys(kind).len());
    }
}

#[test]
fn keys_are_well_formed_and_unique_in_their_file() {
    for kind in Kind::ALL {
        let keys = Catalogue::embedded().keys(kind);
        for (at, key) in keys.iter().enumerate() {
            let mut letters = key.chars();
            let first = letters.next().unwrap();
            assert!(first.is_ascii_lowercase() || first.is_ascii_digit(), "{key}");
            assert!(
                letters.all(|c| c.is_ascii_lowercase() || c.is_ascii_digit() || c == '_' || c == '-'),
                "{key}"
            );
            assert!(key.len() <= 64, "{key}");
            assert!(!keys[..at].contains(key), "{key} stands twice in {}", kind.name());
        }
    }
}

#[test]
fn every_row_has_a_title_and_a_source() {
    for row in every_row() {
        assert!(!row.title.trim().is_empty(), "{} {}", row.kind.name(), row.key);
        assert!(row.source.trim().len() > 5, "{} {}", row.kind.name(), row.key);
    }
}

#[test]
fn estimates_are_explained_and_name_members_that_exist() {
    for row in every_row() {
        let numbers: Vec<_> = row.numbers.iter().map(|(name, _)| *name).collect();
        for member in &row.estimated {
            assert!(
                numbers.contains(&member.as_str()) || OTHER_MEMBERS.contains(&member.as_str()),
                "{} {}: no number {member}",
                row.kind.name(),
                row.key
            );
        }
        // What an item or a use burns as, and the outline of an item, is ours in every row.
        let explained = ["fuel", "ignition", "burning_area_m2", "height_m"];
        if row.estimated.iter().any(|member| !explained.contains(&member.as_str())) {
            assert!(row.note.len() > 20, "{} {} explains nothing", row.kind.name(), row.key);
        }
    }
}

#[test]
fn every_number_has_limits_and_keeps_them() {
    for row in every_row() {
        for (member, _) in &row.numbers {
            assert!(row.limits.contains(member), "{member} of {} has no limits", row.kind.name());
        }
        assert!(row.faults.is_empty(), "{} {}: {:?}", row.kind.name(), row.key, row.faults);
    }
}

#[test]
fn every_fuel_named_by_a_use_or_an_item_is_in_the_file_of_fuels() {
    for row in every_row() {
        if let Some(fuel) = row.fuel {
            assert!(Catalogue::embedded().fuel(&fuel).is_some(), "{} names {fuel}", row.key);
        }
    }
}

#[test]
fn a_row_is_found_by_its_key_and_by_no_other() {
    let all = Catalogue::embedded();

    assert!(all.uses().all(|row| all.use_of(&row.key) == Some(row)));
    assert!(all.items().all(|row| all.item(&row.key) == Some(row)));
    assert!(all.fuels().all(|row| all.fuel(&row.key) == Some(row)));
    assert!(all.materials().all(|row| all.material(&row.key) == Some(row)));
    assert!(all.leakages().all(|row| all.leakage(&row.key) == Some(row)));
    assert!(all.detectors().all(|row| all.detector(&row.key) == Some(row)));
    assert!(all.sprinklers().all(|row| all.sprinkler(&row.key) == Some(row)));
    assert_eq!(all.use_of("Storage"), None);
    assert_eq!(all.use_of(""), None);
    assert_eq!(all.fuel("storage"), None);
}

#[test]
fn a_slip_of_the_pen_is_offered_the_key_that_was_meant() {
    for (kind, written, meant) in [
        (Kind::Uses, "storrage", "storage"),
        (Kind::Uses, "offices", "office"),
        (Kind::Uses, "Hotel room", "hotel_room"),
        (Kind::Uses, "class_room", "classroom"),
        (Kind::Items, "matress", "mattress"),
        (Kind::Items, "sofa", "upholstered_sofa"),
        (Kind::Items, "wardrob", "wardrobe"),
        (Kind::Materials, "gypsum", "gypsum_board"),
        (Kind::Materials, "gypsumboard", "gypsum_board"),
        (Kind::Materials, "ceramic_fiber", "ceramic_fibre"),
        (Kind::Fuels, "Polyurethan", "polyurethane"),
        (Kind::Leakage, "avarage", "average"),
        (Kind::Detectors, "smoke", "smoke_point"),
        (Kind::Sprinklers, "fast-68", "fast_68"),
    ] {
        assert_eq!(Catalogue::embedded().nearest(kind, written), Some(meant), "{written}");
    }
}

#[test]
fn a_name_like_nothing_gets_no_suggestion() {
    for name in ["", "  ", "zzzzqqqq", "7", "\u{1F525}\u{1F525}", &"storage".repeat(600_000)] {
        assert_eq!(Catalogue::embedded().nearest(Kind::Uses, name), None);
    }
}

#[test]
fn a_misspelt_member_in_a_file_is_refused() {
    let row = r#"[{ "key": "k", "title": "K", "wall_m2_m2": 0.1, "floor_m2_m2": 0.1, "ceiling_m2_m2": 0.1,
                    "source": "s", "provenance": "seen", "note": "", "estimated": [] }]"#;
    let read = |text: &str| Table::<LeakageProperties>::read::<super::super::rows::LeakageRow>(text);

    assert!(read(row).is_ok());
    assert!(read(&row.replace("ceiling_m2_m2", "celling_m2_m2")).is_err());
    assert!(read(&row.replace(r#""note": "","#, r#""note": "", "remark": "","#)).is_err());
    assert!(read(&row.replace(r#""seen""#, r#""guessed""#)).is_err());
}

#[test]
fn the_digest_is_sha_256_of_the_files_in_order() {
    // FIPS 180-4, example of the one-block message "abc".
    let abc = "ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad";

    assert_eq!(digest_of(&["abc"]), abc);
    assert_eq!(digest_of(&["a", "", "bc"]), abc);
    assert_ne!(digest_of(&["bc", "a"]), abc);
    assert_eq!(Catalogue::embedded().digest(), digest_of(&FILES));
}
