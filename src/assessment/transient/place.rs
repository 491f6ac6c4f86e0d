//! The room's place beside the experiments that the engine was compared with.

use super::super::findings::PlaceNumber;
use super::super::inputs::Inputs;
use super::study::Study;
use crate::fire::Exceeded;
use crate::fire::flame::RoundFire;
use crate::fire::place::{Case, Place, ValidationSet};
use crate::fire::two_zone::HeatRelease;
use crate::fire::ventilation::{WallOpening, combine, kawagoe_inflow_kg_s};

/// Ends of the set: the experiments of `tests/reference` that stand behind a bar, as the record of the validation tells
/// them to two digits.
const ENDS: [Place; 2] = [
    Place {
        fire_froude: 0.11,
        flame_over_height: 0.16,
        length_over_height: 1.3,
        width_over_height: 0.89,
        equivalence_ratio: Some(0.011),
        opening_factor_m1_2: 0.0,
        rooms: 1.0,
    },
    Place {
        fire_froude: 2.9,
        flame_over_height: 1.9,
        length_over_height: 5.7,
        width_over_height: 1.8,
        equivalence_ratio: Some(0.75),
        opening_factor_m1_2: 0.061,
        rooms: 1.0,
    },
];

/// The place in the governing scenario, with typical inputs: openings as they stand at its start, the fire at its peak.
fn of(inputs: &Inputs<'_>, study: &Study) -> Place {
    let ran = &study.ran[study.governing];
    let plan = inputs.plan;
    let geometry = &inputs.geometry;
    let opening = combine(plan.of_room[inputs.number].iter().filter_map(|&number| {
        let hole = &plan.openings[number];
        let share = ran.standing.share(plan, number);
        (share > 0.0 && !hole.kind.is_horizontal())
            .then_some(WallOpening { area_m2: share * hole.area_m2(), height_m: hole.height_m })
    }));
    let smoky = study.whole.course.rooms.iter().filter(|room| room.smoke_s.is_some()).count();
    let (fire, base_height_m) = ran.made.network.fires.first().map_or(
        (RoundFire { heat_release_kw: 0.0, diameter_m: 1.0 }, 0.0),
        |first| {
            let heat_release_kw = match &first.heat_release {
                HeatRelease::Grown(grown) => grown.reached_kw(),
                HeatRelease::Points(points) => points.iter().fold(0.0, |most, point| f64::max(most, point.1)),
            };
            (RoundFire { heat_release_kw, diameter_m: first.diameter_m }, first.base_height_m)
        },
    );
    Place::of(&Case {
        length_m: geometry.length_m,
        width_m: geometry.width_m,
        height_m: geometry.height_m,
        fire,
        base_height_m,
        opening,
        inflow_kg_s: kawagoe_inflow_kg_s(opening),
        rooms: u32::try_from(smoky.max(1)).unwrap_or(u32::MAX),
    })
}

/// Each number of the place beside the set.
pub(super) fn numbers(inputs: &Inputs<'_>, study: &Study) -> Vec<PlaceNumber> {
    ValidationSet::spanning(&ENDS)
        .compare(&of(inputs, study))
        .into_iter()
        .map(|compared| PlaceNumber {
            number: compared.number,
            value: compared.value.filter(|value| value.is_finite()),
            lowest: compared.lowest,
            highest: compared.highest,
            inside: compared.inside,
        })
        .collect()
}

/// What of it lies outside, in words.
pub(super) fn outside(inputs: &Inputs<'_>, study: &Study) -> Exceeded {
    ValidationSet::spanning(&ENDS).compare(&of(inputs, study)).into_iter().fold(
        Exceeded::none(),
        |exceeded, compared| {
            let words = match compared.number {
                "fire_froude" => "fire Froude number not tried",
                "flame_over_height" => "flame over height not tried",
                "length_over_height" => "length over height not tried",
                "width_over_height" => "width over height not tried",
                "equivalence_ratio" => "equivalence ratio not tried",
                "opening_factor_m1_2" => "opening factor not tried",
                _ => "number of rooms not tried",
            };
            exceeded.when(!compared.inside, words)
        },
    )
}

#[cfg(test)]
mod tests {
    use super::*;

    /// A number of one line of the record.
    fn of(line: &str, member: &str) -> Option<f64> {
        let after = line.split_once(&format!("\"{member}\": "))?.1;
        after.split([',', ' ', '}']).next()?.parse().ok()
    }

    #[test]
    fn the_ends_are_those_of_the_record_of_the_validation() {
        let record = include_str!("../../../tests/reference/validation_summary.json");
        let set = ValidationSet::spanning(&ENDS);

        for compared in set.compare(&ENDS[0]) {
            let key = format!("\"key\": \"{}\"", compared.number);
            let line = record.lines().find(|line| line.contains(&key)).unwrap();
            assert_eq!(of(line, "low"), compared.lowest, "{line}");
            assert_eq!(of(line, "high"), compared.highest, "{line}");
        }
    }
}
