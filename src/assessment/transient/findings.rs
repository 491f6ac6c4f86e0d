//! What the runs of a room say.

use super::super::findings::{
    Band, CornerFinding, CrewFinding, DoorForceFinding, GaveWayFinding, NotCovered, ReachedFinding,
    RunFinding, TransientFinding, WayOutFinding,
};
use super::super::inputs::Inputs;
use super::super::methods::figure;
use super::super::scenarios::Screened;
use super::course::{Course, GaveWay, RoomCourse};
use super::disagreements;
use super::network::Corner;
use super::place;
use super::shell::{Lean, is_mixed};
use super::study::{Ran, Study};
use crate::domain::Key;
use crate::domain::opening::{Space, Swing as Recorded};
use crate::domain::room::Place;
use crate::fire::Exceeded;
use crate::fire::constants::ICE_POINT_K;
use crate::fire::crew::Scheme;
use crate::fire::door_force::{self, CLOSER_N, HANDLE_FROM_EDGE_M, LIMIT_133_N, Leaf, Swing, klote_milke_n};
use crate::fire::tenability::{Cause, Line, Lost};
use crate::fire::two_zone::{Note, Position};

/// The finding.
pub(super) fn finding(inputs: &Inputs<'_>, study: &Study, screened: &[Screened]) -> TransientFinding {
    let people_sleep_here = sleeps(inputs);
    let doors = doors(inputs, study);
    let way_out = way_out(inputs, study, people_sleep_here);
    let crew = crew(study);
    let mut figures = vec![figure(
        "two_layer_network",
        "peak_layer_temperature_c",
        study.ran[study.governing].course.hottest_k - ICE_POINT_K,
        &place::outside(inputs, study),
        true,
        Some(study.scenario()),
    )];
    if let Some(lost_s) = way_out.first().and_then(|first| first.lost_s) {
        let none = Exceeded::none();
        figures.push(figure("way_out_lost", "time_s", lost_s.typical, &none, true, Some(study.scenario())));
    }
    if let Some(door) = doors.first() {
        let limits =
            door_force::klote_milke_limits(leaf(inputs, &door.opening), door.peak_pressure_pa.typical);
        let worst_n = door.force_at_peak_n.typical.max(door.force_at_suction_n.typical);
        figures.push(figure("door_opening_force", "force_n", worst_n, &limits, true, None));
    }
    if crew.iter().any(|crew| crew.reached_s.is_some_and(|at_s| at_s.typical > 0.0)) {
        let last = crew.iter().filter_map(|crew| crew.reached_s).map(|at_s| at_s.typical).fold(0.0, f64::max);
        let none = Exceeded::none();
        figures.push(figure("crew_thermal_classes", "time_s", last, &none, true, Some(study.scenario())));
    }
    TransientFinding {
        scenario: study.scenario(),
        runs: study.ran.iter().map(run).collect(),
        corners: Corner::FOUR
            .iter()
            .zip(&study.corners)
            .map(|(corner, course)| at_corner(*corner, course))
            .collect(),
        peak_pressure_pa: study.shut_band(|p| p.peak_pa),
        suction_pa: study.shut_band(|p| p.suction_pa),
        doors,
        way_out,
        crew,
        reached: reached(inputs, study),
        gave_way: gave_way(inputs, &study.whole),
        place: place::numbers(inputs, study),
        disagreements: disagreements::of(inputs, study, screened),
        not_covered: not_covered(inputs, study),
        notes: notes(study),
        series: study.whole.course.series.clone(),
        run_count: study.runs,
        step_count: study.steps,
        figures,
    }
}

fn run(ran: &Ran) -> RunFinding {
    let course = &ran.course;
    RunFinding {
        scenario: ran.standing.scenario,
        reason: ran.standing.reason.clone(),
        place: match ran.standing.position {
            Position::Centre => Place::Centre,
            Position::Wall => Place::Wall,
            Position::Corner => Place::Corner,
        },
        shut_at_s: ran.standing.shut_at_s,
        flashover_s: course.flashover_s(),
        time_to_600_c_s: course.layer_600_c_s,
        time_to_20_kw_m2_s: course.floor_20_kw_m2_s,
        flame_out_s: course.flame_out_s,
        peak_layer_temperature_c: course.hottest_k - ICE_POINT_K,
        peak_floor_flux_kw_m2: course.floor_kw_m2,
        least_oxygen_percent: course.oxygen_percent,
        peak_carbon_monoxide_ppm: course.carbon_monoxide_ppm,
        peak_heat_release_kw: course.peak_kw,
        peak_pressure_pa: course.pressures.peak_pa,
        suction_pa: course.pressures.suction_pa,
    }
}

fn at_corner(corner: Corner, course: &Course) -> CornerFinding {
    let word = |lean| if lean == Lean::High { "high" } else { "low" };
    CornerFinding {
        fire: word(corner.fire),
        shell: word(corner.shell),
        flashover_s: course.flashover_s(),
        peak_layer_temperature_c: course.hottest_k - ICE_POINT_K,
    }
}

fn sleeps(inputs: &Inputs<'_>) -> bool {
    let occupants = inputs.plan.building.occupants;
    inputs.contents.sleeping
        || occupants.asleep == Some(true)
        || occupants.need_help.is_some_and(|people| people > 0)
}

fn leaf(inputs: &Inputs<'_>, key: &Key) -> Leaf {
    let plan = inputs.plan;
    let place = plan.building.openings.iter().position(|opening| opening.key == *key);
    let (opening, hole) = place.map_or_else(
        || (&plan.building.openings[0], &plan.openings[0]),
        |place| (&plan.building.openings[place], &plan.openings[place]),
    );
    let leaves = if opening.kind == crate::domain::opening::OpeningKind::DoubleDoor { 2.0 } else { 1.0 };
    Leaf {
        width_m: hole.width_m / leaves,
        height_m: hole.height_m,
        handle_from_edge_m: HANDLE_FROM_EDGE_M,
        closer_n: if opening.self_closing || opening.held_open { CLOSER_N } else { 0.0 },
    }
}

/// The doors of the room shut. Friction is not counted, nor is a closer where none is recorded.
fn doors(inputs: &Inputs<'_>, study: &Study) -> Vec<DoorForceFinding> {
    let Some(shut) = study.shut() else { return Vec::new() };
    let plan = inputs.plan;
    let mut found = Vec::new();
    for (index, &number) in shut.made.openings.iter().enumerate() {
        let hole = &plan.openings[number];
        if !hole.is_door() || !hole.sides.contains(&Some(inputs.number)) {
            continue;
        }
        let recorded = &plan.building.openings[number];
        let first = matches!(&recorded.connects[0], Space::Room(key) if key == inputs.key);
        let swing = match (recorded.swing, first) {
            (Some(Recorded::Slide), _) => continue,
            (Some(Recorded::In), true) | (Some(Recorded::Out), false) => Some(Swing::In),
            (Some(Recorded::Out), true) | (Some(Recorded::In), false) => Some(Swing::Out),
            (Some(Recorded::Both), _) => Some(Swing::Both),
            (None, _) => None,
        };
        let over = |of: &dyn Fn(&Course) -> f64| {
            let typical = of(&shut.course);
            let corners = study.shut_corners.iter().map(of);
            let (low, high) = corners.fold((typical, typical), |(l, h), v| (l.min(v), h.max(v)));
            Band { low, typical, high }
        };
        let peak_pressure_pa = over(&|course| course.across[index].peak_pa);
        let suction_pa = over(&|course| course.across[index].suction_pa);
        let leaf = leaf(inputs, &recorded.key);
        let force = |pressure: Band, swing: Swing| {
            let at = |pa: f64| klote_milke_n(leaf, swing.opposing_pa(pa));
            let (one, two) = (at(pressure.low), at(pressure.high));
            Band { low: one.min(two), typical: at(pressure.typical), high: one.max(two) }
        };
        let force_at_peak_n = force(peak_pressure_pa, swing.unwrap_or(Swing::In));
        let force_at_suction_n = force(suction_pa, swing.unwrap_or(Swing::Out));
        found.push(DoorForceFinding {
            opening: recorded.key.clone(),
            swing: swing.map(|swing| match swing {
                Swing::In => "in",
                Swing::Out => "out",
                Swing::Both => "both",
            }),
            peak_pressure_pa,
            suction_pa,
            force_at_peak_n,
            force_at_suction_n,
            over_limit: force_at_peak_n.typical > LIMIT_133_N || force_at_suction_n.typical > LIMIT_133_N,
        });
    }
    found
}

/// A room of a course, by number.
fn room_of(course: &Course, number: usize) -> Option<&RoomCourse> {
    course.rooms.iter().find(|room| room.number == number)
}

/// The room of origin, and every room that is lost.
fn way_out(inputs: &Inputs<'_>, study: &Study, sleeps: bool) -> Vec<WayOutFinding> {
    let mut found = Vec::new();
    for room in &study.whole.course.rooms {
        let origin = room.number == inputs.number;
        for (posture, of) in [
            ("standing", lost_standing as fn(&RoomCourse, Line) -> Option<Lost>),
            ("crawling", lost_crawling),
        ] {
            for (line, asked) in [(Line::ThreeTenths, true), (Line::OneTenth, sleeps)] {
                let typical = of(room, line);
                if !asked || (typical.is_none() && !origin) {
                    continue;
                }
                found.push(WayOutFinding {
                    room: inputs.plan.building.rooms[room.number].key.clone(),
                    posture,
                    dose: line.dose(),
                    lost_s: study.band_of_whole(|course| Some(of(room_of(course, room.number)?, line)?.at_s)),
                    cause: typical.map(|lost| cause(lost.cause)),
                });
            }
        }
    }
    found
}

fn lost_standing(room: &RoomCourse, line: Line) -> Option<Lost> {
    room.people.as_ref()?.standing(line)
}

fn lost_crawling(room: &RoomCourse, line: Line) -> Option<Lost> {
    room.people.as_ref()?.crawling(line)
}

const fn cause(cause: Cause) -> &'static str {
    match cause {
        Cause::Gas => "gas",
        Cause::Heat => "heat",
        Cause::Visibility => "visibility",
        Cause::Layer => "layer",
    }
}

fn crew(study: &Study) -> Vec<CrewFinding> {
    let mut found = Vec::new();
    for (scheme, name) in Scheme::ALL.into_iter().zip(["donnelly", "foster_roberts", "utech"]) {
        for (place, class) in scheme.classes().iter().enumerate() {
            let of = |course: &Course| course.rooms[0].people.as_ref()?.crew.reached_s(scheme)[place];
            found.push(CrewFinding {
                scheme: name,
                class: class.key,
                reached_s: study.band_of_whole(of),
                stay_from_s: class.stay_s.0,
                stay_to_s: class.stay_s.1,
            });
        }
    }
    found
}

/// Rooms other than that of origin that smoke or fire comes to, in order of time and key.
fn reached(inputs: &Inputs<'_>, study: &Study) -> Vec<ReachedFinding> {
    let mut found: Vec<ReachedFinding> = study
        .whole
        .course
        .rooms
        .iter()
        .filter(|room| room.number != inputs.number && (room.smoke_s.is_some() || room.fire_s.is_some()))
        .map(|room| ReachedFinding {
            room: inputs.plan.building.rooms[room.number].key.clone(),
            smoke_s: study.band_of_whole(|course| room_of(course, room.number)?.smoke_s),
            fire_s: study.band_of_whole(|course| room_of(course, room.number)?.fire_s),
            peak_layer_temperature_c: room.hottest_k - ICE_POINT_K,
            lowest_layer_m: room.lowest_layer_m,
        })
        .collect();
    let at_s =
        |room: &ReachedFinding| room.smoke_s.or(room.fire_s).map_or(f64::INFINITY, |band| band.typical);
    found.sort_by(|a, b| at_s(a).total_cmp(&at_s(b)).then_with(|| a.room.cmp(&b.room)));
    found
}

fn gave_way(inputs: &Inputs<'_>, whole: &Ran) -> Vec<GaveWayFinding> {
    let made = &whole.made;
    whole
        .course
        .gave_way
        .iter()
        .map(|&(at_s, opening, how)| GaveWayFinding {
            opening: inputs.plan.opening_key(made.openings[opening]).clone(),
            at_s,
            how: match how {
                GaveWay::Glass => "glass_fell",
                GaveWay::BurnedThrough => "burned_through",
                GaveWay::Pressure => "pressure",
            },
        })
        .collect()
}

/// What the runs leave out.
fn not_covered(inputs: &Inputs<'_>, study: &Study) -> Vec<NotCovered> {
    let item = |key, text: &'static str| NotCovered { key, text: text.into() };
    let mut left_out = vec![
        item(
            "spread_by_other_ways",
            "Fire that goes by the facade, ducts, voids, shafts not entered, or through walls and floors: rooms are reached \
             through openings only.",
        ),
        item(
            "rooms_not_named",
            "Rooms that are not named as reached were not shown to stay free of smoke or fire.",
        ),
        item("other_givings_way", "Light partitions, ceilings and roofs that give way."),
    ];
    if study.whole.made.rest().is_some() {
        let stirred = study.whole.course.far_stirred;
        left_out.push(if stirred {
            item("rooms_beyond", "Rooms further off count as one volume, and smoke comes to it: when to which is not computed.")
        } else {
            item("rooms_beyond", "Rooms further off count as one volume, which stays at rest.")
        });
    }
    let long = |number: usize| {
        let geometry = inputs.plan.rooms[number].geometry;
        geometry.length_m > 5.0 * geometry.width_m && !is_mixed(inputs.plan.building.rooms[number].kind)
    };
    if study.whole.made.rooms.iter().any(|&number| long(number)) {
        left_out.push(item(
            "long_rooms",
            "Corridors more than 5 times as long as wide fill at once along their whole length: the time that smoke takes to \
             their far end is left out.",
        ));
    }
    left_out
}

fn notes(study: &Study) -> Vec<&'static str> {
    let mut notes = Vec::new();
    let mut once = |text: &'static str| {
        if !notes.contains(&text) {
            notes.push(text);
        }
    };
    for note in study.ran.iter().chain([&study.whole]).flat_map(|ran| &ran.course.notes) {
        match note {
            Note::PressureBeyondBuildings(0) => once(
                "The pressure is above 10 kPa in a run: no real room holds that. It leaks more than was recorded, or something \
                 gives way.",
            ),
            Note::HotterThanTried(0) => {
                once("The gas is above 1500 K, beyond what the physics is tried for.")
            }
            Note::FlameBeyondCeiling(0) => once("The flame is taller than the room."),
            _ => {}
        }
    }
    notes
}
