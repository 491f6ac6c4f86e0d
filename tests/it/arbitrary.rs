//! Random lawful buildings, for properties that must hold of all of them.
//!
//! Included by the unit tests too, which know the crate under the same name through `super`.

use std::ops::RangeInclusive;

use proptest::collection::vec;
use proptest::option::of;
use proptest::prelude::*;
use proptest::sample::select;

use super::sootline;
use sootline::catalogue::{Catalogue, Kind as Subject};
use sootline::domain::building::{
    Address, Boundary, Building, ConstructionType, Contact, FloorLevel, Location, Occupants, Preplan,
    Response, Sprinklers,
};
use sootline::domain::opening::{Opening, OpeningKind, Space};
use sootline::domain::properties::{
    DetectorProperties, FuelProperties, ItemProperties, LeakageProperties, MaterialProperties, Properties,
    SprinklerProperties, UseProperties,
};
use sootline::domain::quantity::{Kind, OpeningSide, Quantity, Sill};
use sootline::domain::room::{
    BasisOf, Ceiling, Detector, FloorPlan, FuelPackage, Hazard, Lining, Linings, Mechanical, PlanPosition,
    Room, SprinklerHeads, Storage,
};
use sootline::domain::time::Day;
use sootline::domain::{Key, Named, Word};

fn quantity<K: Kind>(range: RangeInclusive<f64>) -> impl Strategy<Value = Quantity<K>> + Clone {
    range.prop_map(|value| Quantity::new(value).expect("the range lies within the kind's limits"))
}

fn any_quantity<K: Kind>() -> impl Strategy<Value = Quantity<K>> + Clone {
    quantity(K::MIN..=K::MAX)
}

fn word<W: Word>() -> impl Strategy<Value = W> + Clone {
    select(W::EVERY)
}

fn line(most: usize) -> impl Strategy<Value = String> {
    // No control characters, and few enough of the others for any limit in bytes.
    vec("\\PC", 0..=most).prop_map(|characters| characters.concat())
}

fn prose() -> BoxedStrategy<String> {
    vec("\\PC|\n|\t", 0..40).prop_map(|characters| characters.concat()).boxed()
}

fn key(text: String) -> Key {
    Key::new(&text).expect("the text obeys the pattern")
}

/// Numbers within the limits of a set of properties, in the order of the limits.
fn numbers<P: Properties>() -> BoxedStrategy<Vec<f64>> {
    P::LIMITS.iter().map(|limit| limit.least..=limit.most).collect::<Vec<_>>().boxed()
}

fn fuel() -> BoxedStrategy<Named<FuelProperties>> {
    let yields = (of(0.0..=1.0), of(0.0..=1.0), of(0.0..=1.0));
    let own = (numbers::<FuelProperties>(), yields).prop_map(|(mut numbers, yields)| {
        // The first two are the net and the chemical heat, which is not the greater.
        numbers[..2].sort_by(f64::total_cmp);
        let (co_yield_kg_kg, soot_yield_kg_kg, hcn_yield_kg_kg) = yields;
        FuelProperties {
            heat_of_combustion_mj_kg: numbers[1],
            chemical_heat_mj_kg: numbers[0],
            radiative_fraction: numbers[2],
            // Something must burn.
            carbon: numbers[3].max(1.0),
            hydrogen: numbers[4],
            oxygen: numbers[5],
            nitrogen: numbers[6],
            chlorine: numbers[7],
            co_yield_kg_kg,
            soot_yield_kg_kg,
            hcn_yield_kg_kg,
            stoichiometric_air_kg_kg: numbers[11],
        }
    });
    named(Subject::Fuels, own)
}

fn catalogue_key(subject: Subject) -> BoxedStrategy<String> {
    let keys: Vec<String> = Catalogue::embedded().keys(subject).into_iter().map(str::to_owned).collect();
    select(keys).boxed()
}

fn named<P: Clone + std::fmt::Debug + 'static>(
    subject: Subject,
    properties: impl Strategy<Value = P> + 'static,
) -> BoxedStrategy<Named<P>> {
    prop_oneof![
        3 => catalogue_key(subject).prop_map(Named::Catalogue),
        1 => properties.prop_map(Named::Given),
    ]
    .boxed()
}

fn use_properties() -> BoxedStrategy<UseProperties> {
    (numbers::<UseProperties>(), any::<bool>(), any::<bool>(), fuel())
        .prop_map(|(mut numbers, sleeping, way_out, fuel)| {
            // The first three are the mean and the fractiles, which must not fall.
            numbers[..3].sort_by(f64::total_cmp);
            UseProperties {
                fire_load_mean_mj_m2: numbers[0],
                fire_load_p80_mj_m2: numbers[1],
                fire_load_p95_mj_m2: numbers[2],
                growth_kw_s2: numbers[3],
                heat_release_per_area_kw_m2: numbers[4],
                sleeping,
                way_out,
                fuel,
            }
        })
        .boxed()
}

fn item_properties() -> BoxedStrategy<ItemProperties> {
    (numbers::<ItemProperties>(), fuel(), word())
        .prop_map(|(numbers, fuel, ignition)| ItemProperties {
            mass_kg: numbers[0],
            energy_mj: numbers[1],
            peak_kw: numbers[2],
            growth_kw_s2: numbers[3],
            burning_area_m2: numbers[4],
            height_m: numbers[5],
            fuel,
            ignition,
        })
        .boxed()
}

fn material_properties() -> BoxedStrategy<MaterialProperties> {
    (numbers::<MaterialProperties>(), any::<bool>(), of(word()))
        .prop_map(|(numbers, combustible, exposed_growth)| MaterialProperties {
            conductivity_w_mk: numbers[0],
            density_kg_m3: numbers[1],
            specific_heat_j_kgk: numbers[2],
            thickness_m: numbers[3],
            combustible,
            exposed_growth,
        })
        .boxed()
}

fn leakage_properties() -> BoxedStrategy<LeakageProperties> {
    numbers::<LeakageProperties>()
        .prop_map(|numbers| LeakageProperties {
            wall_m2_m2: numbers[0],
            floor_m2_m2: numbers[1],
            ceiling_m2_m2: numbers[2],
        })
        .boxed()
}

fn detector_properties() -> BoxedStrategy<DetectorProperties> {
    (word(), numbers::<DetectorProperties>(), any::<bool>())
        .prop_map(|(kind, numbers, lag)| DetectorProperties {
            kind,
            response_time_index_sqrt_ms: lag.then_some(numbers[0]),
            activation_c: Some(numbers[1]),
            activation_rise_k: lag.then_some(numbers[2]),
            activation_rate_k_min: None,
            activation_optical_density_1_m: lag.then_some(numbers[4]),
        })
        .boxed()
}

fn sprinkler_properties() -> BoxedStrategy<SprinklerProperties> {
    numbers::<SprinklerProperties>()
        .prop_map(|numbers| SprinklerProperties {
            response_time_index_sqrt_ms: numbers[0],
            conduction_factor_sqrt_m_s: numbers[1],
            activation_c: numbers[2],
            spray_density_mm_s: numbers[3],
        })
        .boxed()
}

fn basis(members: &'static [&'static str]) -> BoxedStrategy<BasisOf> {
    use sootline::domain::room::Basis;
    let known = select(&[Basis::Measured, Basis::Estimated][..]);
    proptest::collection::btree_map(select(members).prop_map(str::to_owned), known, 0..4).boxed()
}

fn floor_plan() -> BoxedStrategy<FloorPlan> {
    prop_oneof![
        (quantity(1.0..=60.0), quantity(1.0..=60.0))
            .prop_map(|(length_m, width_m)| FloorPlan::Rectangle { length_m, width_m }),
        // The shortest perimeter is the circle's, 2 √(π A).
        (1.0..=3000.0, 1.001..=3.0).prop_map(|(area, stretch): (f64, f64)| FloorPlan::Shape {
            area_m2: Quantity::new(area).expect("within the limits of an area"),
            perimeter_m: Quantity::new((2.0 * (std::f64::consts::PI * area).sqrt() * stretch).max(1.2))
                .expect("within the limits of a perimeter"),
        }),
    ]
    .boxed()
}

fn lining() -> BoxedStrategy<Lining> {
    (named(Subject::Materials, material_properties()), of(any_quantity()), of(word()))
        .prop_map(|(material, thickness_m, reaction_to_fire)| Lining {
            material,
            thickness_m,
            reaction_to_fire,
        })
        .boxed()
}

fn packages(height: f64) -> BoxedStrategy<Vec<FuelPackage>> {
    let package = (
        named(Subject::Items, item_properties()),
        1_u32..=10_000,
        of(any_quantity()),
        quantity(0.0..=height),
        word(),
        of(any_quantity()),
    );
    vec(package, 0..3)
        .prop_map(|packages| {
            let keyed = packages.into_iter().enumerate();
            keyed
                .map(|(at, (item, count, mass_kg, base_height_m, place, spacing_m))| FuelPackage {
                    key: key(format!("p{at}")),
                    item,
                    count,
                    mass_kg,
                    base_height_m,
                    place,
                    spacing_m,
                })
                .collect()
        })
        .boxed()
}

fn detectors(height: f64) -> BoxedStrategy<Vec<Detector>> {
    let detector =
        (named(Subject::Detectors, detector_properties()), of(quantity(0.0..=height)), of(any_quantity()));
    vec(detector, 0..3)
        .prop_map(|detectors| {
            let keyed = detectors.into_iter().enumerate();
            keyed
                .map(|(at, (class, below_ceiling_m, from_fire_m))| Detector {
                    key: key(format!("s-{at}")),
                    class,
                    below_ceiling_m,
                    from_fire_m,
                })
                .collect()
        })
        .boxed()
}

fn storage(height: f64, area: f64) -> BoxedStrategy<Storage> {
    (
        named(Subject::Items, item_properties()),
        quantity(0.0..=height),
        quantity(0.09..=area),
        of(any_quantity()),
        any::<bool>(),
    )
        .prop_map(|(commodity, height_m, footprint_m2, aisle_m, racks)| Storage {
            commodity,
            height_m,
            footprint_m2,
            aisle_m,
            racks,
        })
        .boxed()
}

fn heads(height: f64) -> BoxedStrategy<SprinklerHeads> {
    (named(Subject::Sprinklers, sprinkler_properties()), of(quantity(0.0..=height)), of(any_quantity()))
        .prop_map(|(class, below_ceiling_m, spacing_m)| SprinklerHeads { class, below_ceiling_m, spacing_m })
        .boxed()
}

fn hazards() -> BoxedStrategy<Vec<Hazard>> {
    let alone = select(vec![vec![], vec![Hazard::None], vec![Hazard::NotRecorded]]);
    let several: Vec<Hazard> =
        Hazard::EVERY.iter().copied().filter(|h| !matches!(h, Hazard::None | Hazard::NotRecorded)).collect();
    prop_oneof![alone, proptest::sample::subsequence(several, 1..4)].boxed()
}

fn mechanical() -> BoxedStrategy<Mechanical> {
    (any_quantity(), any_quantity(), any::<bool>())
        .prop_map(|(supply_m3_s, extract_m3_s, stops_on_alarm)| Mechanical {
            supply_m3_s,
            extract_m3_s,
            stops_on_alarm,
        })
        .boxed()
}

fn position() -> BoxedStrategy<PlanPosition> {
    (any_quantity(), any_quantity(), any_quantity())
        .prop_map(|(x_m, y_m, turn_deg)| PlanPosition { x_m, y_m, turn_deg })
        .boxed()
}

/// A room without a key yet.
fn room() -> BoxedStrategy<Room> {
    (floor_plan(), 2.0..=30.0_f64, 0.0..=5.0_f64)
        .prop_flat_map(|(plan, height, rise)| {
            let area = plan.area_m2();
            let shape = (word(), word(), any::<bool>(), -3..=4_i32, of(position()));
            let shell = (
                of(named(Subject::Leakage, leakage_properties())),
                of(any_quantity()),
                of(mechanical()),
                (of(lining()), of(lining()), of(lining())),
            );
            let contents = (
                line(12),
                named(Subject::Uses, use_properties()),
                of(any_quantity()),
                packages(height),
                of(storage(height, area)),
                hazards(),
                detectors(height),
                of(heads(height)),
                basis(Room::BASIS_MEMBERS),
            );
            (shape, shell, contents).prop_map(move |(shape, shell, contents)| {
                let (kind, form, flat, floor, position) = shape;
                let (leakage_class, leakage_area_m2, mechanical, (walls, ceiling, lower)) = shell;
                let (
                    name,
                    room_use,
                    fuel_load_mj_m2,
                    fuel_packages,
                    storage,
                    hazards,
                    detectors,
                    heads,
                    basis,
                ) = contents;
                let high_m = (!flat).then(|| Quantity::new(height + rise).expect("within a room's height"));
                Room {
                    key: key("unnamed".to_owned()),
                    name,
                    kind,
                    room_use,
                    floor,
                    plan,
                    height_m: Quantity::new(height).expect("within a room's height"),
                    position,
                    ceiling: Ceiling { form, high_m },
                    leakage_class,
                    leakage_area_m2,
                    mechanical,
                    linings: Linings { walls, ceiling, floor: lower },
                    fuel_load_mj_m2,
                    fuel_packages,
                    storage,
                    hazards,
                    detectors,
                    sprinkler_heads: heads,
                    basis,
                }
            })
        })
        .boxed()
}

/// Where an opening goes, as numbers that are later fitted to the rooms.
#[derive(Debug, Clone)]
struct Fit {
    from: prop::sample::Index,
    to: prop::sample::Index,
    outside: bool,
    width: f64,
    height: f64,
    sill: f64,
}

fn fit() -> BoxedStrategy<Fit> {
    (
        any::<prop::sample::Index>(),
        any::<prop::sample::Index>(),
        any::<bool>(),
        0.02..=1.0,
        0.02..=1.0,
        0.0..=1.0,
    )
        .prop_map(|(from, to, outside, width, height, sill)| Fit { from, to, outside, width, height, sill })
        .boxed()
}

/// An opening, its place and size still to be fitted.
fn opening() -> BoxedStrategy<(Opening, Fit)> {
    let leaf =
        (word::<OpeningKind>(), any_quantity(), any::<bool>(), any::<bool>(), of(word()), any::<bool>());
    let rest = (of(any_quantity()), of(any_quantity()), of(word()), of(any_quantity()), of(word()));
    (leaf, rest, line(12), basis(Opening::BASIS_MEMBERS), fit())
        .prop_map(|(leaf, rest, name, basis, fit)| {
            let (kind, open_fraction, held_open, self_closing, swing, entry) = leaf;
            let (fire_rating_min, leakage_area_m2, side, azimuth_deg, glazing) = rest;
            let side_m = OpeningSide::new(1.0).expect("within the limits");
            let opening = Opening {
                key: key("unnamed".to_owned()),
                name,
                kind,
                connects: [Space::Outside, Space::Outside],
                width_m: side_m,
                height_m: side_m,
                sill_m: Sill::new(0.0).expect("within the limits"),
                open_fraction,
                held_open,
                self_closing,
                fire_rating_min,
                leakage_area_m2,
                swing,
                entry,
                side,
                azimuth_deg,
                glazing,
                basis,
            };
            (opening, fit)
        })
        .boxed()
}

/// Least width of a floor, longest wall, highest point.
fn size(room: &Room) -> [f64; 3] {
    let high = room.ceiling.high_m.map_or(room.height_m.get(), |high| high.get());
    match room.plan {
        FloorPlan::Rectangle { length_m, width_m } => {
            let (a, b) = (length_m.get(), width_m.get());
            [a.min(b), a.max(b), high]
        }
        // The largest square that the area allows, and half the way round.
        FloorPlan::Shape { area_m2, perimeter_m } => {
            let wall = perimeter_m.get() / 2.0;
            [area_m2.get().sqrt().min(wall), wall, high]
        }
    }
}

fn fitted((mut opening, fit): (Opening, Fit), rooms: &[Room]) -> Opening {
    let from = fit.from.index(rooms.len());
    let to = fit.to.index(rooms.len());
    let first = &rooms[from];
    let other = rooms.get(to).filter(|_| to != from && !fit.outside);
    let [mut floor, mut wall, mut high] = size(first);
    if let Some(other) = other {
        let [a, b, c] = size(other);
        (floor, wall, high) = (floor.min(a), wall.min(b), high.min(c));
    }
    let second = other.map_or(Space::Outside, |other| Space::Room(other.key.clone()));
    opening.connects = [Space::Room(first.key.clone()), second];
    let side = |most: f64, share: f64| {
        OpeningSide::new((most * share).clamp(0.01, 100.0)).expect("clamped to the limits")
    };
    if opening.kind.is_horizontal() {
        opening.width_m = side(floor, fit.width);
        opening.height_m = side(floor, fit.height);
    } else {
        opening.width_m = side(wall, fit.width);
        opening.height_m = side(high, fit.height);
        let left = (high - opening.height_m.get()).max(0.0);
        opening.sill_m = Sill::new(left * fit.sill).expect("below a ceiling");
    }
    opening
}

fn floors() -> BoxedStrategy<Vec<FloorLevel>> {
    // Numbers that no room has: an elevation would move the openings between two levels.
    let floor = (line(8), of(any_quantity()));
    vec(floor, 0..3)
        .prop_map(|floors| {
            (10..)
                .zip(floors)
                .map(|(floor, (name, elevation_m))| FloorLevel { floor, name, elevation_m })
                .collect()
        })
        .boxed()
}

fn day() -> BoxedStrategy<Day> {
    (1900_i16..=2200, 1_i8..=12, 1_i8..=28)
        .prop_map(|(year, month, day)| Day::new(year, month, day).expect("every month has 28 days"))
        .boxed()
}

fn response() -> BoxedStrategy<Response> {
    let span = || of(any_quantity());
    (span(), span(), span(), span(), span(), span())
        .prop_map(|(detection_s, call_s, processing_s, turnout_s, travel_s, setup_s)| Response {
            detection_s,
            call_s,
            processing_s,
            turnout_s,
            travel_s,
            setup_s,
        })
        .boxed()
}

fn preplan() -> BoxedStrategy<Preplan> {
    let contact = (line(8), line(8), line(8)).prop_map(|(name, phone, role)| Contact { name, phone, role });
    (vec(of(prose()), 12), vec(contact, 0..2))
        .prop_map(|(texts, contacts)| {
            let mut texts = texts.into_iter();
            let mut next = || texts.next().flatten();
            Preplan {
                key_box: next(),
                alarm_panel: next(),
                alarm_code: next(),
                bars: next(),
                gas_shutoff: next(),
                electricity_shutoff: next(),
                water_shutoff: next(),
                hydrants: next(),
                standpipes: next(),
                access: next(),
                roof: next(),
                notes: next(),
                contacts,
            }
        })
        .boxed()
}

fn occupants() -> BoxedStrategy<Occupants> {
    let heads = || of(0_u32..=1_000_000);
    (heads(), heads(), of(any::<bool>()), heads())
        .prop_map(|(day, night, asleep, need_help)| Occupants { day, night, asleep, need_help })
        .boxed()
}

/// A building that obeys every rule.
pub fn building() -> BoxedStrategy<Building> {
    let head = (
        line(30).prop_filter("a building has a name", |name| !name.is_empty()),
        of(line(20).prop_filter("a reference is not empty", |text| !text.is_empty())),
        (line(20), line(20), line(5)).prop_map(|(line, place, postcode)| Address { line, place, postcode }),
        of((any_quantity(), any_quantity())
            .prop_map(|(longitude_deg, latitude_deg)| Location { longitude_deg, latitude_deg })),
        of("[A-Z][A-Z0-9-]{0,5}"),
        of("(I|II|III|IV|V)-[AB]".prop_map(ConstructionType)),
        of(day()),
        prose(),
    );
    let service = (
        floors(),
        response(),
        of(any_quantity()),
        of(any::<bool>()),
        (word(), of(word())).prop_map(|(state, coverage)| Sprinklers { state, coverage }),
        occupants(),
        preplan(),
    );
    let boundary = (any::<prop::sample::Index>(), of(any_quantity()), of(any_quantity()));
    let parts = (vec(room(), 0..5), vec(opening(), 0..6), vec(boundary, 0..3));
    (head, service, parts).prop_map(|(head, service, (mut rooms, openings, boundaries))| {
        for (at, room) in rooms.iter_mut().enumerate() {
            room.key = key(format!("r{at}"));
        }
        let openings = if rooms.is_empty() { Vec::new() } else { openings };
        let boundaries = if rooms.is_empty() { Vec::new() } else { boundaries };
        let openings = openings.into_iter().map(|opening| fitted(opening, &rooms)).enumerate();
        let openings =
            openings.map(|(at, opening)| Opening { key: key(format!("d{at}")), ..opening }).collect();
        let boundaries = boundaries.into_iter().enumerate();
        let boundaries = boundaries
            .map(|(at, (room, area_m2, fire_rating_min))| Boundary {
                key: key(format!("b{at}")),
                between: [Space::Room(rooms[room.index(rooms.len())].key.clone()), Space::Outside],
                area_m2,
                fire_rating_min,
            })
            .collect();
        let (name, reference, address, location, occupancy_group, construction_type, inspected_on, notes) =
            head;
        let (floors, response, water_available_l_min, alarm_monitored, sprinklers, occupants, preplan) =
            service;
        Building {
            name,
            reference,
            address,
            location,
            occupancy_group,
            construction_type,
            inspected_on,
            notes,
            floors,
            response,
            water_available_l_min,
            alarm_monitored,
            sprinklers,
            occupants,
            preplan,
            rooms,
            openings,
            boundaries,
        }
    }).boxed()
}
