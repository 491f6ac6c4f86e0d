//! A building, a room of origin, a scenario and a corner to the network that the engine runs.

use super::super::clocks::Clock;
use super::super::engine_fuel;
use super::super::inputs::Inputs;
use super::super::judge::FireClock;
use super::super::plan::Plan;
use super::super::protection::sprinkler_credited;
use super::super::scenarios::spread_of_leaks;
use super::super::watchers::{Acts, Watcher};
use super::fires;
use super::shell::{self, Hung, Lean};
use super::stand::Standing;
use super::wing::{Reach, Wing};
use crate::catalogue::Catalogue;
use crate::domain::Assumptions;
use crate::fire::constants::{AMBIENT_K, ICE_POINT_K};
use crate::fire::two_zone::{
    Ambient, Detector, Element, Fan, Fuel, HeatRelease, Move, Network, Side, Sprinkler,
};

/// Pressure against which a fan moves nothing more, Pa. Common practice for small extract fans: 100 to 500.
const FAN_STALLS_PA: f64 = 300.0;
/// Fuel where that of the use is not known.
const DEFAULT_FUEL: &str = "general_contents";

/// The building as every run of it needs it.
pub(in crate::assessment) struct Whole<'a> {
    pub plan: &'a Plan<'a>,
    /// By number; none where a room names what the catalogue does not have.
    pub rooms: &'a [Option<Inputs<'a>>],
    pub catalogue: &'a Catalogue,
    pub assumptions: &'a Assumptions,
}

/// Ends of the uncertain inputs.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(in crate::assessment) struct Corner {
    /// Fire load and growth.
    pub fire: Lean,
    /// Heat into linings, and leakage.
    pub shell: Lean,
}

impl Corner {
    pub const TYPICAL: Self = Self { fire: Lean::Typical, shell: Lean::Typical };
    /// The four that rate, those with much fuel first.
    pub const FOUR: [Self; 4] = [
        Self { fire: Lean::High, shell: Lean::Low },
        Self { fire: Lean::High, shell: Lean::High },
        Self { fire: Lean::Low, shell: Lean::Low },
        Self { fire: Lean::Low, shell: Lean::High },
    ];
}

/// A network and what its parts are in the building.
#[derive(Debug, Clone, PartialEq)]
pub(in crate::assessment) struct Made {
    pub network: Network,
    /// Rooms by number, in the order of the network; the room of origin first. The far rooms, if any, come after.
    pub rooms: Vec<usize>,
    /// Far rooms that count as one.
    pub far: Vec<usize>,
    /// Openings by number, in the order of the network.
    pub openings: Vec<usize>,
    /// When burning is established on the clock of the run, s: zero of the fire clock.
    pub established_s: f64,
}

impl Made {
    /// Place of the far rooms in the network.
    pub fn rest(&self) -> Option<usize> {
        (!self.far.is_empty()).then_some(self.rooms.len())
    }
}

impl<'a> Whole<'a> {
    /// The inputs of a room.
    pub fn inputs(&self, number: usize) -> Option<&Inputs<'a>> {
        self.rooms[number].as_ref()
    }

    /// Makes the network. Rooms stand by distance and key and openings by key, so that numbering changes nothing.
    pub fn network(
        &self,
        origin: &Inputs<'_>,
        standing: &Standing,
        corner: Corner,
        clock: &Clock,
        reach: Reach,
    ) -> Result<Made, &'static str> {
        let plan = self.plan;
        let open = |number: usize| standing.share(plan, number) > 0.0;
        let wing = Wing::of(plan, origin.number, &open, reach);
        let near: Vec<usize> = wing.near.into_iter().filter(|&n| self.inputs(n).is_some()).collect();
        let far: Vec<usize> = wing.far.into_iter().filter(|&n| self.inputs(n).is_some()).collect();

        let mut rooms: Vec<_> = near
            .iter()
            .filter_map(|&number| Some(shell::room(plan, self.inputs(number)?, corner.shell)))
            .collect();
        let mut place = vec![Side::Outside; plan.rooms.len()];
        for (index, &number) in near.iter().enumerate() {
            place[number] = Side::Room(index);
        }
        for &number in &far {
            place[number] = Side::Room(near.len());
        }
        let leaks = corner.shell.of(spread_of_leaks(origin));
        let mut hung = Vec::new();
        let mut far_cracks_m2 = vec![0.0; plan.rooms.len()];
        for (number, hole) in plan.openings.iter().enumerate() {
            let between = hole.sides.map(|side| side.map_or(Side::Outside, |room| place[room]));
            let share = standing.share(plan, number);
            let within = |side: Option<usize>| side.is_some_and(|room| near.contains(&room));
            if between[0] == between[1] {
                continue;
            }
            if !hole.sides.iter().any(|side| within(*side)) && share <= 0.0 {
                // A shut opening from the far rooms to outside is a crack among others.
                if let Some(room) = hole.sides[0].or(hole.sides[1]) {
                    far_cracks_m2[room] += hole.crack_m2 * leaks;
                }
                continue;
            }
            hung.push((number, between, share));
        }
        hung.sort_by(|a, b| plan.opening_key(a.0).cmp(plan.opening_key(b.0)));
        if !far.is_empty() {
            let leak_m2 = |number: usize| {
                let own = self.inputs(number).map_or(0.0, |inputs| inputs.envelope_leak_m2 * leaks);
                own + far_cracks_m2[number]
            };
            rooms.push(shell::rest(plan, &far, leak_m2));
        }
        let floors = &plan.building.floors;
        let openings: Vec<_> = hung
            .iter()
            .map(|&(number, between, share)| {
                let hole = &plan.openings[number];
                let base = hole.sides[0].or(hole.sides[1]);
                let recorded_m =
                    base.map_or(0.0, |room| shell::elevation_m(floors, plan.building.rooms[room].floor));
                let in_network = match between {
                    [Side::Room(room), _] | [_, Side::Room(room)] => rooms[room].floor_elevation_m,
                    _ => recorded_m,
                };
                let floors_m = [recorded_m, in_network];
                shell::opening(
                    plan,
                    Hung { number, between, floors_m, share, glass_falls: standing.glass_falls, leaks },
                )
            })
            .collect();
        let numbers: Vec<usize> = hung.iter().map(|hung| hung.0).collect();

        let fuel = self.fuel(origin)?;
        let mut all = fires::of_origin(origin, corner.fire, standing.position, 0, 0);
        for (index, &number) in near.iter().enumerate().skip(1) {
            all.extend(self.inputs(number).and_then(|other| fires::of_other(other, corner.fire, index, 0)));
        }
        let established_s = match &all[0].heat_release {
            HeatRelease::Grown(first) => FireClock::of(first).on_curve_s(0.0),
            HeatRelease::Points(_) => 0.0,
        };
        let on_run_s = |fire_clock_s: f64| fire_clock_s + established_s;
        let mut network = Network {
            rooms,
            openings,
            fuels: vec![fuel],
            fires: all,
            ambient: ambient(self.assumptions),
            ..Network::default()
        };
        network.schedule = self.schedule(origin, standing, clock, &numbers, &on_run_s);
        network.fans = self.fans(&near, clock, &on_run_s);
        network.sprinklers = sprinklers(origin);
        Ok(Made { network, rooms: near, far, openings: numbers, established_s })
    }

    /// What the contents of the room of origin burn as; those of the other rooms with it: a fuel more is a species more in
    /// every layer.
    fn fuel(&self, origin: &Inputs<'_>) -> Result<Fuel, &'static str> {
        let row = || self.catalogue.fuel(DEFAULT_FUEL).map(|row| &row.properties);
        let given = origin.contents.fuel.as_ref();
        let properties = given.or_else(row).ok_or("the catalogue lacks the fuel of the contents")?;
        engine_fuel::fuel(properties)
            .map_err(|_| "the formula of the fuel contradicts its yields or its heat")
    }

    fn schedule(
        &self,
        origin: &Inputs<'_>,
        standing: &Standing,
        clock: &Clock,
        numbers: &[usize],
        on_run_s: &dyn Fn(f64) -> f64,
    ) -> Vec<Move> {
        let plan = self.plan;
        let mut moves = Vec::new();
        for (opening, &number) in numbers.iter().enumerate() {
            let hole = &plan.openings[number];
            if standing.share(plan, number) <= 0.0 || hole.stays_open() {
                continue;
            }
            if standing.closers_work && hole.shuts_itself {
                let at_s = on_run_s(clock.finding.detection_s.typical);
                moves.push(Move { at_s, opening, open_fraction: 0.0 });
            }
            if let Some(at_s) = standing.shut_at_s
                && hole.sides.contains(&Some(origin.number))
            {
                moves.push(Move { at_s: on_run_s(at_s), opening, open_fraction: 0.0 });
            }
        }
        moves.sort_by(|a, b| a.at_s.total_cmp(&b.at_s).then(a.opening.cmp(&b.opening)));
        moves
    }

    fn fans(&self, near: &[usize], clock: &Clock, on_run_s: &dyn Fn(f64) -> f64) -> Vec<Fan> {
        let mut fans = Vec::new();
        for (index, &number) in near.iter().enumerate() {
            let room = &self.plan.building.rooms[number];
            let Some(mechanical) = room.mechanical else { continue };
            let high_m = 0.9 * self.plan.rooms[number].geometry.height_m;
            let stops_s = match clock.detector {
                Some(act) if mechanical.stops_on_alarm => on_run_s(act.at_s.typical),
                _ => f64::INFINITY,
            };
            let mut fan = |from, to, volume_flow_m3_s: f64| {
                if volume_flow_m3_s > 0.0 {
                    fans.push(Fan {
                        from,
                        to,
                        volume_flow_m3_s,
                        inlet_height_m: high_m,
                        outlet_height_m: high_m,
                        stall_pa: FAN_STALLS_PA,
                        starts_s: 0.0,
                        stops_s,
                    });
                }
            };
            fan(Side::Outside, Side::Room(index), mechanical.supply_m3_s.get());
            fan(Side::Room(index), Side::Outside, mechanical.extract_m3_s.get());
        }
        fans
    }
}

/// The head that may be relied upon.
fn sprinklers(origin: &Inputs<'_>) -> Vec<Sprinkler> {
    let head = origin.sprinkler.as_ref().filter(|_| sprinkler_credited(origin));
    head.map(|head| Sprinkler { head: detector(head), density_mm_s: head.density_mm_s }).into_iter().collect()
}

fn detector(watcher: &Watcher) -> Detector {
    let element = match watcher.acts {
        Acts::Element(element) => {
            Element::Heat { rti_m05s05: element.rti_m05s05, answers_k: element.activation_temperature_k }
        }
        Acts::Rise { usual_k, .. } => Element::Rise(usual_k),
    };
    Detector { room: 0, from_fire_m: watcher.place.radius_m, element }
}

fn ambient(assumptions: &Assumptions) -> Ambient {
    let given = assumptions.ambient;
    let kelvin = |celsius: f64| celsius + ICE_POINT_K;
    let outside_k = given.temperature_c.map(|celsius| kelvin(celsius.get()));
    let inside_k = given.indoor_temperature_c.map(|celsius| kelvin(celsius.get()));
    Ambient {
        temperature_k: outside_k.or(inside_k).unwrap_or(AMBIENT_K),
        indoor_temperature_k: inside_k.or(outside_k).unwrap_or(AMBIENT_K),
        wind_m_s: given.wind_m_s.unwrap_or(0.0),
        wind_from_deg: given.wind_from_deg.unwrap_or(0.0),
        ..Ambient::default()
    }
}
