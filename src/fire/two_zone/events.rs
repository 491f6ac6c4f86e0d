//! What happens by itself: things catch fire, go out, fall, give way, answer.

use super::combustion::{FLAME_BAND, OXYGEN_LIMIT};
use super::controls::{Controls, FireControl, Leaf};
use super::devices::Device;
use super::network::{HeatRelease, Ignition, Network};
use super::outcome::{Event, EventKind, Sample};

/// What may yet happen, and how far it has come.
#[derive(Clone, Debug)]
pub(super) struct Pending {
    /// Time fire gas has stood against each opening, s.
    exposed_s: Vec<f64>,
    /// Time each flame has been too weak to last, s.
    weak_s: Vec<f64>,
    detectors: Vec<Device>,
    heads: Vec<Device>,
    moves_done: usize,
    /// Moves by time.
    moves: Vec<super::network::Move>,
}

/// An event that happens within a step, and how far it was at its start: below zero not yet.
#[derive(Clone, Copy, Debug)]
pub(super) struct Reached {
    pub kind: EventKind,
    pub from: f64,
}

/// Share of a flame below which it is out: the limit itself; the band about it only keeps the rates smooth.
const OUT_SHARE: f64 = 0.5;
/// How long a flame too weak to last lingers, s.
const LINGERS_S: f64 = 30.0;
/// Fire gas that a door is exposed to, K.
const EXPOSING_K: f64 = 573.0;

impl Pending {
    pub(super) fn new(network: &Network) -> Self {
        let mut moves = network.schedule.clone();
        moves.sort_by(|a, b| a.at_s.total_cmp(&b.at_s).then(a.opening.cmp(&b.opening)));
        let device = Device::at(network.ambient.indoor_temperature_k);
        Self {
            exposed_s: vec![0.0; network.openings.len()],
            weak_s: vec![0.0; network.fires.len()],
            detectors: vec![device; network.detectors.len()],
            heads: vec![device; network.sprinklers.len()],
            moves_done: 0,
            moves,
        }
    }

    /// The next time at which something happens by the clock, after a time.
    pub(super) fn next_s(&self, network: &Network, controls: &Controls, time_s: f64) -> f64 {
        let mut next = f64::INFINITY;
        let mut consider = |at: f64| {
            if at > time_s && at < next {
                next = at;
            }
        };
        if let Some(next_move) = self.moves.get(self.moves_done) {
            consider(next_move.at_s);
        }
        for (fire, control) in network.fires.iter().zip(&controls.fires) {
            match (control.lit_s, fire.ignites) {
                (None, Ignition::At(at_s)) => consider(at_s),
                (Some(lit_s), _) => {
                    if let HeatRelease::Points(points) = &fire.heat_release {
                        let after = points.partition_point(|p| lit_s + p.0 <= time_s + 1e-9);
                        if let Some(point) = points.get(after) {
                            consider(lit_s + point.0);
                        }
                    }
                }
                _ => {}
            }
        }
        for fan in &network.fans {
            consider(fan.starts_s);
            consider(fan.stops_s);
        }
        for leaf in &controls.leaves {
            consider(leaf.since_s + super::controls::MOVES_S);
        }
        next
    }

    /// Does what the clock says is due; true if anything changed.
    pub(super) fn by_the_clock(
        &mut self,
        network: &Network,
        controls: &mut Controls,
        time_s: f64,
        events: &mut Vec<Event>,
    ) -> bool {
        let mut changed = false;
        while let Some(due) = self.moves.get(self.moves_done)
            && due.at_s <= time_s
        {
            self.moves_done += 1;
            move_leaf(&mut controls.leaves[due.opening], time_s, due.open_fraction);
            events.push(Event { at_s: time_s, kind: EventKind::Moved(due.opening) });
            changed = true;
        }
        for (index, fire) in network.fires.iter().enumerate() {
            if let (None, Ignition::At(at_s)) = (controls.fires[index].lit_s, fire.ignites)
                && at_s <= time_s
            {
                light(&mut controls.fires[index], time_s);
                events.push(Event { at_s: time_s, kind: EventKind::Ignited(index) });
                changed = true;
            }
        }
        changed
    }

    /// The event that comes first within a step, and the share of the step at which it comes.
    pub(super) fn first(
        &self,
        network: &Network,
        controls: &Controls,
        clocks: &[f64],
        from: &Sample,
        to: &Sample,
    ) -> Option<(Reached, f64)> {
        let mut first: Option<(Reached, f64)> = None;
        let mut consider = |kind: EventKind, before: f64, after: f64| {
            if after < 0.0 || after.is_nan() {
                return;
            }
            let share = if before < 0.0 { before / (before - after) } else { 0.0 };
            if first.is_none_or(|(_, earliest)| share < earliest) {
                first = Some((Reached { kind, from: before }, share));
            }
        };
        self.fires(network, controls, clocks, from, to, &mut consider);
        self.openings(network, controls, from, to, &mut consider);
        for (index, detector) in network.detectors.iter().enumerate() {
            let device = &self.detectors[index];
            if !device.answered {
                let (_, before) = device.after(network, detector, from, from);
                let (_, after) = device.after(network, detector, from, to);
                consider(EventKind::Detected(index), before, after);
            }
        }
        for (index, sprinkler) in network.sprinklers.iter().enumerate() {
            let device = &self.heads[index];
            if !device.answered {
                let (_, before) = device.after(network, &sprinkler.head, from, from);
                let (_, after) = device.after(network, &sprinkler.head, from, to);
                consider(EventKind::SprinklerOpened(index), before, after);
            }
        }
        first
    }

    fn fires(
        &self,
        network: &Network,
        controls: &Controls,
        clocks: &[f64],
        from: &Sample,
        to: &Sample,
        consider: &mut impl FnMut(EventKind, f64, f64),
    ) {
        for (index, fire) in network.fires.iter().enumerate() {
            let control = &controls.fires[index];
            let (before, after) = (&from.rooms[fire.room], &to.rooms[fire.room]);
            if control.lit_s.is_none() {
                match fire.ignites {
                    Ignition::Flux(flux) => consider(
                        EventKind::Ignited(index),
                        before.floor_flux_kw_m2 - flux,
                        after.floor_flux_kw_m2 - flux,
                    ),
                    Ignition::SurfaceTemperature(kelvin) => consider(
                        EventKind::Ignited(index),
                        before.ceiling_k - kelvin,
                        after.ceiling_k - kelvin,
                    ),
                    Ignition::At(_) => {}
                }
                continue;
            }
            if control.spent {
                continue;
            }
            let clock_s = clocks[index];
            if spent(&fire.heat_release, clock_s) {
                consider(EventKind::BurntOut(index), -1.0, 0.0);
                continue;
            }
            let wanted_kw = 1e-3 * control.wanted_w(fire, clock_s, to.time_s);
            if !fire.oxygen_limited || wanted_kw < 1e-3 {
                continue;
            }
            if control.alight {
                let stood_s = self.weak_s[index];
                let more_s = if is_weak(to, index) { to.time_s - from.time_s } else { -stood_s };
                consider(EventKind::WentOut(index), stood_s - LINGERS_S, stood_s + more_s - LINGERS_S);
            } else {
                // Another flame of the room, or gas hot enough, lights it where there is oxygen again.
                let pilot = after.upper.temperature_k > 800.0
                    || network
                        .fires
                        .iter()
                        .zip(&controls.fires)
                        .any(|(other, state)| other.room == fire.room && state.alight);
                if pilot {
                    let air = |room: &super::outcome::RoomState| {
                        let base = fire.base_height_m < room.interface_height_m - 0.1;
                        let oxygen = if base { room.lower.gas.oxygen } else { room.upper.gas.oxygen };
                        oxygen - (OXYGEN_LIMIT + 0.5 * FLAME_BAND)
                    };
                    consider(EventKind::Relit(index), air(before), air(after));
                }
            }
        }
    }

    fn openings(
        &self,
        network: &Network,
        controls: &Controls,
        from: &Sample,
        to: &Sample,
        consider: &mut impl FnMut(EventKind, f64, f64),
    ) {
        for (index, opening) in network.openings.iter().enumerate() {
            let way = &opening.gives_way;
            let leaf = &controls.leaves[index];
            if leaf.to >= way.open_fraction {
                continue;
            }
            let hottest = |sample: &Sample| {
                opening.between.iter().fold(0.0_f64, |most, side| match side {
                    super::network::Side::Room(room) => most.max(sample.rooms[*room].upper.temperature_k),
                    super::network::Side::Outside => most,
                })
            };
            if let Some(kelvin) = way.gas_k {
                consider(EventKind::GlassFell(index), hottest(from) - kelvin, hottest(to) - kelvin);
            }
            if let Some(exposed_s) = way.exposed_s {
                let more = if hottest(to) > EXPOSING_K { to.time_s - from.time_s } else { 0.0 };
                let stood = self.exposed_s[index];
                consider(EventKind::BurnedThrough(index), stood - exposed_s, stood + more - exposed_s);
            }
            if let Some(limit_pa) = way.pressure_pa {
                let size = |sample: &Sample| sample.openings[index].pressure_pa.abs() - limit_pa;
                consider(EventKind::GaveWay(index), size(from), size(to));
            }
        }
    }

    /// Follows what changes slowly over a step that stands.
    pub(super) fn follow(&mut self, network: &Network, from: &Sample, to: &Sample) {
        for (index, opening) in network.openings.iter().enumerate() {
            if opening.gives_way.exposed_s.is_none() {
                continue;
            }
            let hot = opening.between.iter().any(|side| match side {
                super::network::Side::Room(room) => to.rooms[*room].upper.temperature_k > EXPOSING_K,
                super::network::Side::Outside => false,
            });
            if hot {
                self.exposed_s[index] += to.time_s - from.time_s;
            }
        }
        for (index, weak_s) in self.weak_s.iter_mut().enumerate() {
            let weak = to.fires[index].alight && is_weak(to, index);
            *weak_s = if weak { *weak_s + to.time_s - from.time_s } else { 0.0 };
        }
        for (device, detector) in self.detectors.iter_mut().zip(&network.detectors) {
            device.element_k = device.after(network, detector, from, to).0;
        }
        for (device, sprinkler) in self.heads.iter_mut().zip(&network.sprinklers) {
            device.element_k = device.after(network, &sprinkler.head, from, to).0;
        }
    }

    /// Lets an event happen.
    pub(super) fn happen(
        &mut self,
        network: &Network,
        controls: &mut Controls,
        kind: EventKind,
        sample: &Sample,
    ) {
        let time_s = sample.time_s;
        match kind {
            EventKind::Ignited(index) => light(&mut controls.fires[index], time_s),
            EventKind::WentOut(index) => {
                controls.fires[index].alight = false;
                controls.fires[index].out_s = time_s;
            }
            EventKind::Relit(index) => controls.fires[index].alight = true,
            EventKind::BurntOut(index) => {
                controls.fires[index].alight = false;
                controls.fires[index].spent = true;
            }
            EventKind::GlassFell(index) | EventKind::BurnedThrough(index) | EventKind::GaveWay(index) => {
                move_leaf(
                    &mut controls.leaves[index],
                    time_s,
                    network.openings[index].gives_way.open_fraction,
                );
            }
            EventKind::Detected(index) => self.detectors[index].answered = true,
            EventKind::SprinklerOpened(index) => {
                self.heads[index].answered = true;
                spray(network, controls, index, sample);
            }
            EventKind::Moved(_) => {}
        }
    }
}

/// Water on the fires of the room: each falls from what it gives now, at Evans' rate.
fn spray(network: &Network, controls: &mut Controls, index: usize, sample: &Sample) {
    let sprinkler = &network.sprinklers[index];
    if sprinkler.density_mm_s <= 0.0 {
        return;
    }
    let rate_1_s = sprinkler.density_mm_s.powf(1.85) / 3.0;
    for (place, fire) in network.fires.iter().enumerate() {
        let control = &mut controls.fires[place];
        if fire.room == sprinkler.head.room && control.lit_s.is_some() && control.spray.is_none() {
            control.spray = Some((sample.fires[place].heat_release_kw.max(1.0), sample.time_s, rate_1_s));
        }
    }
}

fn is_weak(sample: &Sample, fire: usize) -> bool {
    sample.fires[fire].flame_share < OUT_SHARE
}

fn light(control: &mut FireControl, time_s: f64) {
    control.lit_s = Some(time_s);
    control.alight = true;
}

pub(super) fn move_leaf(leaf: &mut Leaf, time_s: f64, open_fraction: f64) {
    *leaf = Leaf { from: leaf.open_fraction(time_s), to: open_fraction.clamp(0.0, 1.0), since_s: time_s };
}

fn spent(heat_release: &HeatRelease, clock_s: f64) -> bool {
    match heat_release {
        HeatRelease::Grown(fire) => clock_s >= fire.phases().end_s,
        HeatRelease::Points(points) => points.last().is_some_and(|last| last.1 <= 0.0 && clock_s >= last.0),
    }
}
