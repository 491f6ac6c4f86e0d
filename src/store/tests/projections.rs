use super::*;
use crate::domain::building::ConstructionType;
use crate::domain::opening::{Glazing, Side, Swing};
use crate::domain::room::{
    CeilingForm, Detector, Hazard, Lining, Mechanical, PlanPosition, SprinklerHeads, Storage,
};
use crate::domain::time::Day;

/// A shop of which much is recorded.
fn much_recorded() -> Building {
    let lining = |material: &str, thickness_m: Option<f64>| {
        Some(Lining {
            material: Named::Catalogue(material.to_owned()),
            thickness_m: thickness_m.map(quantity),
            reaction_to_fire: None,
        })
    };
    let mut building = shop("Harbour Row 12");
    building.reference = Some("417-B".to_owned());
    building.construction_type = Some(ConstructionType("III-B".to_owned()));
    building.inspected_on = Some(Day { year: 2026, month: 11, day: 3 });
    building.water_available_l_min = Some(quantity(4000.0));
    building.response.travel_s = Some(quantity(240.0));
    building.occupants.day = Some(40);
    building.rooms[0] = Room {
        position: Some(PlanPosition { x_m: quantity(1.0), y_m: quantity(2.0), turn_deg: quantity(90.0) }),
        ceiling: Ceiling { form: CeilingForm::OpenToRoof, high_m: Some(quantity(5.0)) },
        leakage_class: Some(Named::Catalogue("average".to_owned())),
        mechanical: Some(Mechanical {
            supply_m3_s: quantity(0.25),
            extract_m3_s: quantity(0.5),
            stops_on_alarm: true,
        }),
        linings: Linings {
            walls: lining("gypsum_board", Some(0.0127)),
            ceiling: lining("concrete", None),
            floor: None,
        },
        fuel_packages: vec![package("sofa")],
        storage: Some(Storage {
            commodity: Named::Catalogue("cardboard_cartons".to_owned()),
            height_m: quantity(2.0),
            footprint_m2: quantity(6.0),
            aisle_m: None,
            racks: true,
        }),
        hazards: vec![Hazard::LithiumIon, Hazard::GasCylinders],
        detectors: vec![Detector {
            key: key("s1"),
            class: Named::Catalogue("smoke_point".to_owned()),
            below_ceiling_m: None,
            from_fire_m: None,
        }],
        sprinkler_heads: Some(SprinklerHeads {
            class: Named::Catalogue("quick_response".to_owned()),
            below_ceiling_m: None,
            spacing_m: Some(quantity(3.0)),
        }),
        ..room("store")
    };
    building.openings[0].kind = OpeningKind::DoubleDoor;
    building.openings[0].swing = Some(Swing::Out);
    building.openings[1].side = Some(Side::A);
    building.openings[1].glazing = Some(Glazing::Float6Mm);
    building
}

#[tokio::test]
async fn what_is_recorded_survives_the_file() {
    let kept = Kept::new().await;
    kept.enter(1, much_recorded()).await;

    // Another store has nothing in memory yet.
    let fresh = Store::open(&url(&kept.path())).await.unwrap();

    let read = fresh.get_building(&local(), building_id(1)).await.unwrap();
    assert_eq!(*read.building, much_recorded());
}

#[tokio::test]
async fn projections_say_what_the_document_says() {
    let kept = Kept::new().await;
    kept.enter(1, much_recorded()).await;

    for (claim, from) in [
        ("reference = '417-B' and name = 'Harbour Row 12' and revision = 1 and rooms = 2", "buildings"),
        ("longitude_deg = 0.1 and latitude_deg = 51.2 and occupancy_group = 'M'", "buildings"),
        ("construction_type = 'III-B' and inspected_on = '2026-11-03'", "buildings"),
        ("water_available_l_min = 4000 and travel_s = 240 and occupants_day = 40", "buildings"),
        ("alarm_monitored is null and sprinklers_state = 'not_recorded' and call_s is null", "buildings"),
        (
            "kind = 'room' and room_use = 'storage' and floor = -1 and height_m = 2.4",
            "rooms where room_key = 'store'",
        ),
        ("length_m = 3.66 and width_m = 3.6", "rooms where room_key = 'store'"),
        // By hand: 3.66 × 3.6 and 2 × (3.66 + 3.6).
        (
            "abs(area_m2 - 13.176) < 1e-9 and abs(perimeter_m - 14.52) < 1e-9",
            "rooms where room_key = 'store'",
        ),
        ("ceiling_form = 'open_to_roof' and ceiling_high_m = 5", "rooms where room_key = 'store'"),
        ("plan_x_m = 1 and plan_y_m = 2 and plan_turn_deg = 90", "rooms where room_key = 'store'"),
        ("leakage_class = 'average' and leakage_area_m2 is null", "rooms where room_key = 'store'"),
        (
            "supply_m3_s = 0.25 and extract_m3_s = 0.5 and fans_stop_on_alarm = 1",
            "rooms where room_key = 'store'",
        ),
        ("wall_material = 'gypsum_board' and wall_thickness_m = 0.0127", "rooms where room_key = 'store'"),
        ("ceiling_material = 'concrete' and ceiling_thickness_m is null", "rooms where room_key = 'store'"),
        ("floor_material is null and fuel_load_mj_m2 = 600", "rooms where room_key = 'store'"),
        (
            "storage_commodity = 'cardboard_cartons' and storage_height_m = 2",
            "rooms where room_key = 'store'",
        ),
        ("storage_footprint_m2 = 6 and storage_racks = 1", "rooms where room_key = 'store'"),
        ("hazards = 'lithium_ion gas_cylinders' and detectors = 1", "rooms where room_key = 'store'"),
        ("sprinkler_class = 'quick_response' and sprinkler_spacing_m = 3", "rooms where room_key = 'store'"),
        ("hazards = '' and detectors = 0 and storage_racks is null", "rooms where room_key = 'shop'"),
        ("room_key = 'store' and package_key = 'sofa' and item = 'upholstered_sofa'", "fuel_packages"),
        ("count = 2 and mass_kg = 45 and base_height_m = 0.1 and place = 'corner'", "fuel_packages"),
        ("kind = 'double_door' and swing = 'out' and side is null", "openings where opening_key = 'inner'"),
        ("first_room_key = 'store' and second_room_key = 'shop'", "openings where opening_key = 'inner'"),
        (
            "second_room_key is null and side = 'A' and glazing = 'float_6mm'",
            "openings where opening_key = 'front'",
        ),
        (
            "width_m = 0.9 and height_m = 2 and area_m2 = 1.8 and sill_m = 0",
            "openings where opening_key = 'front'",
        ),
        (
            "open_fraction = 0 and held_open = 0 and self_closing = 1 and entry = 1",
            "openings where opening_key = 'front'",
        ),
    ] {
        assert_eq!(kept.number(&format!("select {claim} from {from}")).await, 1, "{claim}");
    }
}

#[tokio::test]
async fn projections_follow_every_later_revision() {
    let kept = Kept::new().await;
    let id = building_id(1);
    let mut first = shop("Shop");
    first.rooms[0].fuel_packages = vec![package("sofa"), package("chair")];
    kept.enter(1, first).await;
    let mut next = taller(room("store"), 3.0);
    next.fuel_packages = vec![package("sofa")];

    kept.put_room(&local(), id, next, Condition::Any, at(2), accept).await.unwrap();
    kept.delete_opening(&local(), id, &key("inner"), Condition::Any, at(3)).await.unwrap();
    kept.delete_opening(&local(), id, &key("front"), Condition::Any, at(4)).await.unwrap();
    kept.delete_room(&local(), id, &key("shop"), Condition::Any, at(5)).await.unwrap();

    assert_eq!(kept.number("select count(*) from rooms where room_key = 'store' and height_m = 3").await, 1);
    assert_eq!(kept.number("select count(*) from rooms").await, 1);
    assert_eq!(kept.number("select count(*) from fuel_packages").await, 1);
    assert_eq!(kept.number("select count(*) from openings").await, 0);
    assert_eq!(kept.number("select count(*) from building_parts").await, 1);
    assert_eq!(kept.number("select rooms from buildings").await, 1);
}
