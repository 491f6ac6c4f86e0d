//! Rates of change of the whole state, and how they change with it.

use super::building::{Building, RoomData, SURFACES, Vent, ledger};
use super::combustion::Products;
use super::controls::Controls;
use super::gas::{
    CARBON_DIOXIDE, FUELS_MAX, GAMMA, GAS_CONSTANT_J_KGK, OXYGEN, PRODUCTS, SOOT, SPECIES_MAX,
    SPECIFIC_HEAT_J_KGK, WATER,
};
use super::jets;
use super::network::{Fan, Fire, HeatRelease, Lie, Network, Position, Side};
use super::radiation::{self, Glow, Zones};
use super::real::{Dual, Real};
use super::room::{self, Around, Burning, Derived, Fires, Inner, Inside, Reaction, black_w_m2};
use super::vents::{self, Flank, Flow};

/// An opening that stands open by less than this share only leaks.
const CRACKS_BELOW: f64 = 0.01;

/// Tangent of the half angle at which a turbulent jet widens, 12°. Common practice.
const SPREADS: f64 = 0.21;

/// Directions of a vent: pressure, volume and both masses of either side.
pub(super) const VENT_WAYS: usize = 8;
/// Directions of a room: its core, then its faces.
pub(super) const ROOM_WAYS: usize = CORE + SURFACES;
/// Core of a room: pressure, volume of the hot layer, both masses, oxygen of both layers, fuel gas of the hot layer.
pub(super) const CORE: usize = 7;

/// A place gas can be: a room and a layer (0 hot, 1 cool), or outside.
pub(super) type Place = Option<(usize, usize)>;

/// Gas on its way from one place to another.
#[derive(Clone, Copy, Debug)]
pub(super) struct Transfer {
    pub from: Place,
    pub to: Place,
    pub mass_kg_s: f64,
    /// Slopes along the vent's directions.
    pub slopes: [f64; VENT_WAYS],
    /// Whose directions they are.
    pub rooms: [Option<usize>; 2],
    /// Temperature of what is drawn, K.
    pub temperature_k: f64,
}

/// Fuel gas that burns as it comes hot into a room.
#[derive(Clone, Copy, Debug)]
pub(super) struct JetBurn {
    /// Room it comes into.
    pub room: usize,
    pub fuel: usize,
    pub oxygen_kg_s: f64,
    /// Slopes along the vent's directions: it goes with the flow, the flow with the pressure, and the pressure with
    /// what burns; without them the three would chase each other.
    pub slopes: [f64; VENT_WAYS],
    /// Whose directions they are.
    pub rooms: [Option<usize>; 2],
    pub products: Products,
}

/// What a fire does, as the last look at it found.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub(super) struct FireRates {
    pub wanted_w: f64,
    pub heat_w: f64,
    pub supply_kg_s: f64,
    pub flame: f64,
    pub drawn: f64,
    pub clock_rate: f64,
    pub drawn_kg_s: f64,
    pub need_kg_s: f64,
}

/// What an opening does, as the last look at it found.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub(super) struct OpeningRates {
    pub inflow_kg_s: f64,
    pub outflow_kg_s: f64,
    pub neutral_m: Option<f64>,
    pub pressure_pa: f64,
    pub flame_w: f64,
}

/// One look at the building: everything between the state and its rates. Kept to be reused; nothing is
/// allocated once it has grown.
#[derive(Debug, Default)]
pub(super) struct Look {
    pub inside: Vec<Inside<f64>>,
    pub now: Vec<Derived<f64>>,
    pub zones: Vec<Zones<f64>>,
    /// Mass fractions of both layers of each room.
    pub shares: Vec<[[f64; SPECIES_MAX]; 2]>,
    pub around: Vec<Around>,
    pub inner: Vec<Inner<f64>>,
    pub transfers: Vec<Transfer>,
    pub reactions: Vec<Vec<Reaction<f64>>>,
    /// Heat from door jets and through openings, W.
    extra_heat_w: Vec<[f64; 2]>,
    extra_surfaces_w: Vec<[f64; SURFACES]>,
    burning: Vec<Vec<Burning>>,
    pub fires: Vec<FireRates>,
    pub openings: Vec<OpeningRates>,
    /// Burning of fuel gas beyond openings.
    pub jet_burns: Vec<JetBurn>,
    jet_heat_w: Vec<f64>,
    radiated_out_w: f64,
    mass: Vec<[f64; 2]>,
    heat: Vec<[f64; 2]>,
    /// Species gained by each layer, and outside, kg/s.
    gains: Vec<[[f64; SPECIES_MAX]; 2]>,
    outside_gains: [f64; SPECIES_MAX],
    // With slopes.
    pub inner_slopes: Vec<Inner<Dual<ROOM_WAYS>>>,
    pub reaction_slopes: Vec<Vec<Reaction<Dual<ROOM_WAYS>>>>,
}

/// A network and its working, ready to be looked at.
#[derive(Clone, Copy, Debug)]
pub(super) struct Model<'a> {
    pub network: &'a Network,
    pub building: &'a Building,
}

impl Look {
    pub(super) fn new(model: Model<'_>) -> Self {
        let rooms = model.building.rooms.len();
        Self {
            reactions: vec![Vec::new(); rooms],
            reaction_slopes: vec![Vec::new(); rooms],
            burning: vec![Vec::new(); rooms],
            fires: vec![FireRates::default(); model.network.fires.len()],
            openings: vec![OpeningRates::default(); model.network.openings.len()],
            ..Self::default()
        }
    }

    /// Rates of change at a time and a state; with slopes where asked.
    pub(super) fn rates(
        &mut self,
        model: Model<'_>,
        controls: &Controls,
        time_s: f64,
        state: &[f64],
        slopes: bool,
        out: &mut [f64],
    ) {
        self.read(model, state);
        self.burning(model, controls, time_s, state);
        self.transfers.clear();
        self.jet_burns.clear();
        self.jet_heat_w.clear();
        self.jet_heat_w.resize(model.building.rooms.len(), 0.0);
        self.extra_heat_w.clear();
        self.extra_heat_w.resize(model.building.rooms.len(), [0.0; 2]);
        self.extra_surfaces_w.clear();
        self.extra_surfaces_w.resize(model.building.rooms.len(), [0.0; SURFACES]);
        self.radiated_out_w = 0.0;
        self.openings.fill(OpeningRates::default());
        for vent in &model.building.vents {
            self.vent(model, controls, time_s, vent, slopes);
        }
        for fan in &model.network.fans {
            self.fan(model, time_s, fan, slopes);
        }
        self.mixing(model);
        self.rooms(model, slopes);
        self.gather(model, controls, state, out);
    }

    /// Heat of fuel gas that burns as it comes into a room, W.
    pub(super) fn jet_released_w(&self, room: usize) -> f64 {
        self.jet_heat_w.get(room).copied().unwrap_or(0.0)
    }

    /// Temperatures, layers, what glows.
    fn read(&mut self, model: Model<'_>, state: &[f64]) {
        let building = model.building;
        self.inside.clear();
        self.now.clear();
        self.zones.clear();
        self.around.clear();
        self.shares.clear();
        for (index, room) in building.rooms.iter().enumerate() {
            let inside = variables::<f64>(building, index, state);
            let now = inside.derived(room);
            let mut shares = [[0.0; SPECIES_MAX]; 2];
            for (layer, shares) in shares.iter_mut().enumerate() {
                let per_kg = 1.0 / held_kg(building, state, index, layer);
                let first = building.layout.species_of(index, layer);
                for (share, kg) in shares.iter_mut().zip(&state[first..first + building.species]) {
                    *share = kg * per_kg;
                }
            }
            self.shares.push(shares);
            let glow =
                [glow(building, index, 0, state, &shares[0]), glow(building, index, 1, state, &shares[1])];
            let around = Around { inflow_m2_s: 0.0, glow };
            self.zones.push(radiation::zones(room, &now, &around, &inside.surfaces_k));
            self.inside.push(inside);
            self.now.push(now);
            self.around.push(around);
        }
    }

    fn burning(&mut self, model: Model<'_>, controls: &Controls, time_s: f64, state: &[f64]) {
        for list in &mut self.burning {
            list.clear();
        }
        for (index, fire) in model.network.fires.iter().enumerate() {
            let control = &controls.fires[index];
            if control.lit_s.is_none() {
                continue;
            }
            let clock_s = state[model.building.layout.clocks + index];
            let wanted_w = control.wanted_w(fire, clock_s, time_s);
            self.burning[fire.room].push(Burning {
                fire: index,
                fuel: fire.fuel,
                wanted_w,
                alight: control.alight,
                oxygen_limited: fire.oxygen_limited,
                without_flame: control.without_flame(fire, time_s),
                base_m: fire.base_height_m,
                diameter_m: burning_diameter_m(fire, wanted_w),
                images: match fire.position {
                    Position::Centre => 1.0,
                    Position::Wall => std::f64::consts::SQRT_2,
                    Position::Corner => 2.0,
                },
                radiative: fire.radiative_fraction,
            });
        }
    }

    fn vent(&mut self, model: Model<'_>, controls: &Controls, time_s: f64, vent: &Vent, slopes: bool) {
        let share = vent.opening.map_or(0.0, |index| controls.leaves[index].open_fraction(time_s));
        let width_m = vent.effective_width_m(share);
        if width_m <= 0.0 {
            return;
        }
        if slopes {
            let (flow, flanks) = self.flow::<Dual<VENT_WAYS>>(model, vent, width_m, share);
            self.pass(model, vent, &flow, &flanks, share < CRACKS_BELOW);
        } else {
            let (flow, flanks) = self.flow::<f64>(model, vent, width_m, share);
            self.pass(model, vent, &flow, &flanks, share < CRACKS_BELOW);
        }
        if vent.lie == Lie::Vertical && share > 0.0 {
            self.shine(model, vent, vent.area_m2 * share);
        }
    }

    fn flow<R: Real>(
        &self,
        model: Model<'_>,
        vent: &Vent,
        width_m: f64,
        share: f64,
    ) -> (Flow<R>, [Flank<R>; 2]) {
        let building = model.building;
        let outside_kg_m3 = building.outside_density_kg_m3;
        let side = |end: usize| match vent.rooms[end] {
            Some(room) => flank::<R>(building, room, &self.inside[room], end * 4),
            None => outside::<R>(outside_kg_m3),
        };
        let flanks = [side(0), side(1)];
        // The wind stands on the outer face.
        let wind = |end: usize| if vent.rooms[end].is_none() { vent.wind_pa } else { 0.0 };
        let wind_pa = [wind(0), wind(1)];
        let sides = [&flanks[0], &flanks[1]];
        let flow = match vent.lie {
            Lie::Vertical => {
                vents::through_wall(sides, vent.bottom_m, vent.top_m, width_m, wind_pa, outside_kg_m3)
            }
            Lie::Horizontal => vents::through_ceiling(
                sides,
                vent.bottom_m,
                vent.area_m2.sqrt(),
                width_m,
                vent.area_m2 * share,
                wind_pa,
                outside_kg_m3,
            ),
        };
        (flow, flanks)
    }

    /// Sends the gas of a flow where it belongs: hot gas to the hot layer beyond, cool gas to the cool one.
    fn pass<R: Real>(
        &mut self,
        model: Model<'_>,
        vent: &Vent,
        flow: &Flow<R>,
        flanks: &[Flank<R>; 2],
        cracks: bool,
    ) {
        let zero = R::constant(0.0);
        let kelvin = [0, 1].map(|end: usize| {
            let absolute = flanks[end].pressure_pa + model.building.ambient.pressure_pa;
            move |density: R| absolute / density * (1.0 / GAS_CONSTANT_J_KGK)
        });
        let mut low_kg_s = [zero; 2];
        let mut low_k = [0.0; 2];
        for giver in 0..2 {
            let taker = 1 - giver;
            let mut hot_kg_s = zero;
            let mut hot_heat = 0.0;
            for layer in 0..2 {
                let mass = flow.from[giver][layer];
                if mass.value() == 0.0 {
                    continue;
                }
                let temperature_k = match vent.rooms[giver] {
                    Some(room) if layer == 0 => self.now[room].upper_k,
                    Some(room) => self.now[room].lower_k,
                    None => model.building.ambient.temperature_k,
                };
                let from = vent.rooms[giver].map(|room| (room, layer));
                let slopes: [f64; VENT_WAYS] = mass.slopes();
                let mut send = |to: Place, mass: R| {
                    if mass.value() > 0.0 {
                        self.transfers.push(Transfer {
                            from,
                            to,
                            mass_kg_s: mass.value(),
                            slopes: mass.slopes(),
                            rooms: vent.rooms,
                            temperature_k,
                        });
                    }
                };
                match vent.rooms[taker] {
                    None => send(None, mass),
                    Some(room) => {
                        let upper = if cracks {
                            // A jet as thin as a crack draws a hundred times its own flow within a metre:
                            // what it brings is spread through the room.
                            let inside = &self.inside[room];
                            let hot_kg = inside.upper_kg.max(0.0);
                            R::constant(hot_kg / (hot_kg + inside.lower_kg.max(0.0)).max(1e-9))
                        } else {
                            let from = &flanks[giver];
                            let density = if layer == 0 { from.upper_kg_m3 } else { from.lower_kg_m3 };
                            let arrives = kelvin[giver](density);
                            let (hot, cool) = (&flanks[taker].upper_kg_m3, &flanks[taker].lower_kg_m3);
                            share_to_upper(kelvin[taker](*hot), kelvin[taker](*cool), arrives)
                        };
                        let to_upper = mass * upper;
                        let to_lower = mass - to_upper;
                        send(Some((room, 0)), to_upper);
                        send(Some((room, 1)), to_lower);
                        low_kg_s[taker] = low_kg_s[taker] + to_lower;
                        low_k[taker] = temperature_k;
                        hot_kg_s = hot_kg_s + to_upper;
                        hot_heat += to_upper.value() * temperature_k;
                    }
                }
                if layer == 0 || self.now_is_hot(vent.rooms[giver], layer) {
                    self.jet(model, vent, giver, layer, mass.value(), &slopes);
                }
            }
            let Some(room) = vent.rooms[taker] else { continue };
            let beyond = &flanks[taker];
            let kelvin = &kelvin[taker];
            // Hot gas that comes from another room rises to the layer beyond and draws cool gas along.
            let risen = if vent.rooms[giver].is_some() && hot_kg_s.value() > 1e-6 {
                let foot_m = flow.neutral_m.unwrap_or(vent.bottom_m).max(vent.bottom_m);
                let climbs_m = beyond.interface_m - 0.5 * (foot_m + vent.top_m);
                let warmer_k = -kelvin(beyond.lower_kg_m3) + hot_heat / hot_kg_s.value();
                jets::drawn_kg_s(hot_kg_s, warmer_k, climbs_m) * beyond.lower_gives
            } else {
                zero
            };
            // Cool gas that comes in above the interface falls through the hot layer and draws of it.
            let fallen = if low_kg_s[taker].value() > 1e-6 {
                let head_m = flow.neutral_m.unwrap_or(vent.top_m).min(vent.top_m);
                let falls_m = -beyond.interface_m + 0.5 * (vent.bottom_m + head_m);
                let cooler_k = kelvin(beyond.upper_kg_m3) - low_k[taker];
                jets::drawn_kg_s(low_kg_s[taker], cooler_k, falls_m) * beyond.upper_gives
            } else {
                zero
            };
            let now = &self.now[room];
            for (from, mass, temperature_k) in [(1, risen, now.lower_k), (0, fallen, now.upper_k)] {
                if mass.value() > 0.0 {
                    self.transfers.push(Transfer {
                        from: Some((room, from)),
                        to: Some((room, 1 - from)),
                        mass_kg_s: mass.value(),
                        slopes: mass.slopes(),
                        rooms: vent.rooms,
                        temperature_k,
                    });
                }
            }
        }
        if vent.opening.is_some() && vent.lie == Lie::Vertical {
            self.draughts(model, vent, low_kg_s.map(Real::value), low_k);
        }
        if let Some(index) = vent.opening {
            let out = flow.from[0][0].value() + flow.from[0][1].value();
            let into = flow.from[1][0].value() + flow.from[1][1].value();
            let opening = &mut self.openings[index];
            opening.inflow_kg_s = into;
            opening.outflow_kg_s = out;
            opening.neutral_m = flow.neutral_m;
            opening.pressure_pa = flow.pressure_pa;
        }
    }

    fn now_is_hot(&self, room: Option<usize>, layer: usize) -> bool {
        room.is_some_and(|room| layer == 1 && self.now[room].lower_k > 700.0)
    }

    /// Fuel gas that comes hot through an opening burns where it meets air.
    fn jet(
        &mut self,
        model: Model<'_>,
        vent: &Vent,
        giver: usize,
        layer: usize,
        mass_kg_s: f64,
        slopes: &[f64; VENT_WAYS],
    ) {
        let Some(room) = vent.rooms[giver] else { return };
        let now = &self.now[room];
        let temperature_k = if layer == 0 { now.upper_k } else { now.lower_k };
        if temperature_k <= 700.0 || mass_kg_s <= 0.0 {
            return;
        }
        let building = model.building;
        let lit = super::combustion::lights(temperature_k);
        for (index, fuel) in building.fuels.iter().enumerate() {
            let share = self.shares[room][layer][PRODUCTS + index].max(0.0);
            let wants = mass_kg_s * share * fuel.oxygen_need * lit;
            if wants <= 0.0 {
                continue;
            }
            let burns = match vent.rooms[1 - giver] {
                // Outside there is air enough; what burns there is told, not fed back.
                None => wants,
                Some(beyond) => {
                    let lower_kg = self.inside[beyond].lower_kg.max(1e-8 * building.rooms[beyond].air_kg);
                    let oxygen = (self.inside[beyond].lower_oxygen_kg / lower_kg).max(0.0);
                    // A jet draws about as much as it brings on its way to the layer.
                    let there = mass_kg_s * oxygen * self.now[beyond].there[1];
                    let burns = super::combustion::smooth_min(wants, there);
                    if burns > 0.0 {
                        let per_mass = burns / mass_kg_s;
                        self.jet_burns.push(JetBurn {
                            room: beyond,
                            fuel: index,
                            oxygen_kg_s: burns,
                            slopes: slopes.map(|slope| slope * per_mass),
                            rooms: vent.rooms,
                            products: super::combustion::products(&fuel.fuel, 0.5, self.now[beyond].upper_k),
                        });
                        self.jet_heat_w[beyond] += burns * fuel.heat_per_oxygen_j_kg;
                        self.extra_heat_w[beyond][0] += burns * fuel.heat_per_oxygen_j_kg;
                    }
                    burns
                }
            };
            if let Some(opening) = vent.opening {
                self.openings[opening].flame_w += burns * fuel.heat_per_oxygen_j_kg;
            }
        }
    }

    /// Radiation through an opening, between what lies on either side.
    fn shine(&mut self, model: Model<'_>, vent: &Vent, area_m2: f64) {
        let building = model.building;
        let outside_w_m2 = black_w_m2(building.ambient.temperature_k);
        let mut hot_share = [0.0; 2];
        let mut power = [outside_w_m2; 2];
        for end in 0..2 {
            let Some(room) = vent.rooms[end] else { continue };
            let interface_m = building.rooms[room].floor_elevation_m + self.now[room].interface_m;
            hot_share[end] = ((vent.top_m - interface_m) / (vent.top_m - vent.bottom_m)).clamp(0.0, 1.0);
            let zones = &self.zones[room];
            if !zones.any {
                // A room without faces does not shine.
                return;
            }
            power[end] =
                hot_share[end] * zones.leaves_w_m2(0) + (1.0 - hot_share[end]) * zones.leaves_w_m2(1);
        }
        for end in 0..2 {
            let Some(room) = vent.rooms[end] else {
                self.radiated_out_w += area_m2 * (power[1 - end] - outside_w_m2);
                continue;
            };
            // What leaves and what comes is shared between gas and faces as the zone sends it.
            let zones = &self.zones[room];
            let received_w = area_m2 * (power[1 - end] - power[end]);
            let mut taken =
                Inner { lifted_kg_s: 0.0, heat_w: [0.0; 2], surfaces_w: [0.0; SURFACES], released_w: 0.0 };
            for (zone, share) in [(0, hot_share[end]), (1, 1.0 - hot_share[end])] {
                let part_w = received_w * share;
                taken.heat_w[zone] += part_w * zones.takes[zone];
                radiation::give(zones, zone, part_w * (1.0 - zones.takes[zone]), &mut taken);
            }
            for layer in 0..2 {
                self.extra_heat_w[room][layer] += taken.heat_w[layer];
            }
            for surface in 0..SURFACES {
                self.extra_surfaces_w[room][surface] += taken.surfaces_w[surface];
            }
        }
    }

    fn fan(&mut self, model: Model<'_>, time_s: f64, fan: &Fan, slopes: bool) {
        if time_s < fan.starts_s || time_s > fan.stops_s || fan.volume_flow_m3_s <= 0.0 {
            return;
        }
        let rooms = [fan.from, fan.to].map(|side| match side {
            Side::Room(room) => Some(room),
            Side::Outside => None,
        });
        if slopes {
            self.blow::<Dual<VENT_WAYS>>(model, fan, rooms);
        } else {
            self.blow::<f64>(model, fan, rooms);
        }
    }

    fn blow<R: Real>(&mut self, model: Model<'_>, fan: &Fan, rooms: [Option<usize>; 2]) {
        let building = model.building;
        let outside_kg_m3 = building.outside_density_kg_m3;
        let flanks = [0, 1].map(|end| match rooms[end] {
            Some(room) => flank::<R>(building, room, &self.inside[room], end * 4),
            None => outside::<R>(outside_kg_m3),
        });
        let against = flanks[1].pressure_pa - flanks[0].pressure_pa;
        let works = (-(against / fan.stall_pa) + 1.0).at_least(0.0).at_most(1.0);
        // The inlet takes from the layer it lies in, over a band about the interface.
        let (upper_share, drawn) = match rooms[0] {
            Some(room) => {
                let data = &building.rooms[room];
                let band_m = 0.05 * data.height_m;
                let below = fan.inlet_height_m - self.now[room].interface_m;
                let share = below.smooth_step(-band_m, band_m);
                (share, [self.now[room].upper_k, self.now[room].lower_k])
            }
            None => (0.0, [building.ambient.temperature_k; 2]),
        };
        for (layer, share) in [(0, upper_share), (1, 1.0 - upper_share)] {
            if share <= 0.0 {
                continue;
            }
            let side = &flanks[0];
            let (density, gives) = if layer == 0 {
                (side.upper_kg_m3, side.upper_gives)
            } else {
                (side.lower_kg_m3, side.lower_gives)
            };
            let whole = density * works * (fan.volume_flow_m3_s * share);
            let own = whole * gives;
            // What its layer does not give comes from the other.
            for (layer, mass) in [(layer, own), (1 - layer, whole - own)] {
                if mass.value() <= 0.0 {
                    continue;
                }
                let temperature_k = drawn[layer];
                let upper = match rooms[1] {
                    Some(room) => {
                        // A jet from the wall mixes into the layer at its height; warmer gas rises.
                        let band_m = 0.05 * building.rooms[room].height_m;
                        let above = fan.outlet_height_m - self.now[room].interface_m;
                        above.smooth_step(-band_m, band_m).max(share_to_upper(
                            self.now[room].upper_k,
                            self.now[room].lower_k,
                            temperature_k,
                        ))
                    }
                    None => 0.0,
                };
                let slopes: [f64; VENT_WAYS] = mass.slopes();
                let targets = match rooms[1] {
                    Some(room) => [(Some((room, 0)), upper), (Some((room, 1)), 1.0 - upper)],
                    None => [(None, 1.0), (None, 0.0)],
                };
                for (to, part) in targets {
                    if part > 0.0 {
                        self.transfers.push(Transfer {
                            from: rooms[0].map(|room| (room, layer)),
                            to,
                            mass_kg_s: mass.value() * part,
                            slopes: slopes.map(|slope| slope * part),
                            rooms,
                            temperature_k,
                        });
                    }
                }
            }
        }
    }

    /// Shafts and stairs: both layers of a mixed zone change places within seconds. So does a layer that is nearly
    /// gone with the other.
    fn mixing(&mut self, model: Model<'_>) {
        const MIXES_S: f64 = 2.0;
        for (index, room) in model.building.rooms.iter().enumerate() {
            let now = &self.now[index];
            let inside = &self.inside[index];
            let share = if room.mixed { 1.0 } else { 1.0 - now.there[0].min(now.there[1]) };
            if share < 1e-4 {
                continue;
            }
            // A mixed zone keeps two equal halves; a vanishing layer changes places with as much of the other.
            let (hot_kg, cool_kg) = (inside.upper_kg.max(0.0), inside.lower_kg.max(0.0));
            let rate_1_s = share / MIXES_S;
            let smaller = usize::from(cool_kg < hot_kg);
            for (from, temperature_k) in [(0, now.upper_k), (1, now.lower_k)] {
                let by = if room.mixed { from } else { smaller };
                let mut slopes = [0.0; VENT_WAYS];
                slopes[2 + by] = rate_1_s;
                self.transfers.push(Transfer {
                    from: Some((index, from)),
                    to: Some((index, 1 - from)),
                    mass_kg_s: rate_1_s * [hot_kg, cool_kg][by],
                    slopes,
                    rooms: [Some(index), None],
                    temperature_k,
                });
            }
        }
    }

    /// Draught across the plumes of each room: what comes in low spreads as a jet of the width of its opening, by
    /// [`SPREADS`] on either side, until it fills the width of the room; taken at half the length of the room.
    fn draughts(&mut self, model: Model<'_>, vent: &Vent, flow_in_kg_s: [f64; 2], temperatures_k: [f64; 2]) {
        for end in 0..2 {
            let (Some(room), flow) = (vent.rooms[end], flow_in_kg_s[end]) else { continue };
            if flow <= 0.0 {
                continue;
            }
            let data = &model.building.rooms[room];
            let density = model.building.ambient.pressure_pa / (GAS_CONSTANT_J_KGK * temperatures_k[end]);
            let (long_m, wide_m) = (data.length_m.max(data.width_m), data.length_m.min(data.width_m));
            let opening_m = vent.area_m2 / (vent.top_m - vent.bottom_m).max(1e-3);
            let across_m = (opening_m + 2.0 * SPREADS * 0.5 * long_m).min(wide_m);
            self.around[room].inflow_m2_s += flow / density / across_m;
        }
    }

    fn rooms(&mut self, model: Model<'_>, slopes: bool) {
        let building = model.building;
        self.inner.clear();
        if slopes {
            self.inner_slopes.clear();
        }
        for (index, room) in building.rooms.iter().enumerate() {
            let burning = Fires { fuels: &building.fuels, fires: &self.burning[index] };
            let inner = room::inside(
                room,
                &self.inside[index],
                &self.now[index],
                &burning,
                &self.around[index],
                &self.zones[index],
                &mut self.reactions[index],
            );
            self.inner.push(inner);
            if slopes {
                let inside = with_slopes(&self.inside[index]);
                let now = inside.derived(room);
                let zones = radiation::zones(room, &now, &self.around[index], &inside.surfaces_k);
                let inner = room::inside(
                    room,
                    &inside,
                    &now,
                    &burning,
                    &self.around[index],
                    &zones,
                    &mut self.reaction_slopes[index],
                );
                self.inner_slopes.push(inner);
            }
        }
    }

    /// Adds everything up.
    fn gather(&mut self, model: Model<'_>, controls: &Controls, state: &[f64], out: &mut [f64]) {
        let building = model.building;
        let layout = &building.layout;
        out.fill(0.0);
        self.mass.clear();
        self.mass.resize(building.rooms.len(), [0.0; 2]);
        self.heat.clear();
        self.heat.resize(building.rooms.len(), [0.0; 2]);
        self.gains.clear();
        self.gains.resize(building.rooms.len(), [[0.0; SPECIES_MAX]; 2]);
        self.outside_gains = [0.0; SPECIES_MAX];
        for index in 0..self.inner.len() {
            let inner = self.inner[index];
            let extra_w = room::to_what_is_there(self.extra_heat_w[index], self.now[index].there);
            for layer in 0..2 {
                self.heat[index][layer] += inner.heat_w[layer] + extra_w[layer];
            }
            if inner.lifted_kg_s > 0.0 {
                let lift = Transfer {
                    from: Some((index, 1)),
                    to: Some((index, 0)),
                    mass_kg_s: inner.lifted_kg_s,
                    slopes: [0.0; VENT_WAYS],
                    rooms: [None, None],
                    temperature_k: self.now[index].lower_k,
                };
                self.carry(building, &lift, out);
            }
        }
        for index in 0..self.transfers.len() {
            let transfer = self.transfers[index];
            self.carry(building, &transfer, out);
        }
        for (room, gains) in self.gains.iter().enumerate() {
            for (layer, gains) in gains.iter().enumerate() {
                let first = layout.species_of(room, layer);
                out[first..first + building.species].copy_from_slice(&gains[..building.species]);
            }
        }
        let first = place(building, None);
        out[first..first + building.species].copy_from_slice(&self.outside_gains[..building.species]);
        self.react(model, controls, out);

        for (index, room) in building.rooms.iter().enumerate() {
            let at = layout.pressure(index);
            let [upper_w, lower_w] = self.heat[index];
            let pressure_pa = building.ambient.pressure_pa + state[at];
            let pressure_rate = (GAMMA - 1.0) * (upper_w + lower_w) / room.volume_m3;
            out[at] = pressure_rate;
            out[at + 1] = ((GAMMA - 1.0) * upper_w - state[at + 1] * pressure_rate) / (GAMMA * pressure_pa);
            out[at + 1] += remnant_1_s(&self.now[index])
                * (remnant_m3(room, &self.now[index], &self.inside[index]) - state[at + 1]);
            out[at + 2] += self.mass[index][0];
            out[at + 3] += self.mass[index][1];
            for surface in 0..SURFACES {
                let Some(chain) = room.chains[surface] else { continue };
                let chain = &building.chains[chain];
                let first = room.nodes[surface];
                let area = room.areas_m2[surface];
                let received =
                    (self.inner[index].surfaces_w[surface] + self.extra_surfaces_w[index][surface]) / area;
                let mut inward = received;
                let nodes = &state[first..first + chain.len()];
                let rates = &mut out[first..first + chain.len()];
                let next = nodes[1..].iter().chain(std::iter::once(&building.ambient.temperature_k));
                let along = chain.conductance.iter().zip(&chain.per_capacity);
                for (((here, next), rate), (conductance, per_capacity)) in
                    nodes.iter().zip(next).zip(rates).zip(along)
                {
                    let onward = conductance * (here - next);
                    *rate = (inward - onward) * per_capacity;
                    inward = onward;
                }
                out[layout.ledger + ledger::LOST] += inward * area;
            }
        }
        out[layout.ledger + ledger::LOST] += self.radiated_out_w;
    }

    /// Adds one transfer to both its ends.
    #[inline]
    fn carry(&mut self, building: &Building, transfer: &Transfer, out: &mut [f64]) {
        let layout = &building.layout;
        let mass = transfer.mass_kg_s;
        let enthalpy_w = mass * SPECIFIC_HEAT_J_KGK * transfer.temperature_k;
        match transfer.from {
            Some((room, layer)) => {
                self.mass[room][layer] -= mass;
                self.heat[room][layer] -= enthalpy_w;
            }
            None => {
                out[layout.ledger + ledger::MASS_OUT] -= mass;
                out[layout.ledger + ledger::ENTHALPY_OUT] -= enthalpy_w;
            }
        }
        match transfer.to {
            Some((room, layer)) => {
                self.mass[room][layer] += mass;
                self.heat[room][layer] += enthalpy_w;
            }
            None => {
                out[layout.ledger + ledger::MASS_OUT] += mass;
                out[layout.ledger + ledger::ENTHALPY_OUT] += enthalpy_w;
            }
        }
        let mut moved = match transfer.from {
            Some((room, layer)) => self.shares[room][layer],
            None => building.outside_air,
        };
        for share in &mut moved {
            *share *= mass;
        }
        let from = match transfer.from {
            Some((room, layer)) => &mut self.gains[room][layer],
            None => &mut self.outside_gains,
        };
        for (gain, moved) in from.iter_mut().zip(&moved) {
            *gain -= moved;
        }
        let to = match transfer.to {
            Some((room, layer)) => &mut self.gains[room][layer],
            None => &mut self.outside_gains,
        };
        for (gain, moved) in to.iter_mut().zip(&moved) {
            *gain += moved;
        }
    }

    /// Adds what burns and what fuel comes.
    fn react(&mut self, model: Model<'_>, controls: &Controls, out: &mut [f64]) {
        let building = model.building;
        let layout = &building.layout;
        let fuel_k = building.ambient.indoor_temperature_k;
        for fire in &mut self.fires {
            *fire = FireRates::default();
        }
        for room in 0..building.rooms.len() {
            let upper = layout.species_of(room, 0);
            for reaction in &self.reactions[room] {
                let per_oxygen = 1.0 / reaction.products.oxygen();
                let burnt = reaction.oxygen_kg_s * per_oxygen;
                for species in 0..PRODUCTS {
                    out[upper + species] += burnt * reaction.products.made[species];
                }
                out[upper + PRODUCTS + reaction.fuel] += reaction.supply_kg_s - burnt;
                self.mass[room][0] += reaction.supply_kg_s;
                let enthalpy_w = reaction.supply_kg_s * SPECIFIC_HEAT_J_KGK * fuel_k;
                self.heat[room][0] += enthalpy_w;
                let heat_w = reaction.oxygen_kg_s * building.fuels[reaction.fuel].heat_per_oxygen_j_kg;
                out[layout.ledger + ledger::RELEASED] += heat_w;
                out[layout.ledger + ledger::FUEL] += reaction.supply_kg_s;
                out[layout.ledger + ledger::FUEL_ENTHALPY] += enthalpy_w;
                out[layout.ledger + ledger::SPECIES_OUT + building.species + reaction.fuel] +=
                    reaction.supply_kg_s;
                if let Some(index) = reaction.fire {
                    let fuel = &building.fuels[reaction.fuel];
                    self.fires[index] = FireRates {
                        wanted_w: 0.0,
                        heat_w,
                        supply_kg_s: reaction.supply_kg_s,
                        flame: reaction.flame,
                        drawn: reaction.drawn,
                        clock_rate: 1.0,
                        drawn_kg_s: reaction.drawn_kg_s,
                        need_kg_s: reaction.supply_kg_s * fuel.oxygen_need,
                    };
                }
            }
            for burning in &self.burning[room] {
                let fuel = &building.fuels[burning.fuel];
                let fire = &mut self.fires[burning.fire];
                fire.wanted_w = burning.wanted_w;
                let wanted_kg_s = burning.wanted_w / fuel.heat_per_oxygen_j_kg / fuel.oxygen_need;
                // A starved solid keeps what it does not give: its own clock slows.
                fire.clock_rate = if wanted_kg_s > 0.0 { fire.supply_kg_s / wanted_kg_s } else { 1.0 };
                if controls.fires[burning.fire].spent {
                    fire.clock_rate = 0.0;
                }
                out[layout.clocks + burning.fire] = fire.clock_rate;
            }
        }
        for jet in &self.jet_burns {
            let fuel = &building.fuels[jet.fuel];
            let (index, oxygen, products) = (jet.fuel, jet.oxygen_kg_s, &jet.products);
            let burnt = oxygen / products.oxygen();
            let upper = layout.species_of(jet.room, 0);
            for species in 0..PRODUCTS {
                out[upper + species] += burnt * products.made[species];
            }
            out[upper + PRODUCTS + index] -= burnt;
            out[layout.ledger + ledger::RELEASED] += oxygen * fuel.heat_per_oxygen_j_kg;
        }
    }
}

/// Diameter of what burns now, m: a fire that grows spreads over its item, its area in step with its heat release; a
/// burner, or a curve that was measured, has its size from the start.
fn burning_diameter_m(fire: &Fire, wanted_w: f64) -> f64 {
    match &fire.heat_release {
        HeatRelease::Points(_) => fire.diameter_m,
        HeatRelease::Grown(design) => {
            let share = wanted_w / (1000.0 * design.phases().reached_kw.max(1e-3));
            fire.diameter_m * share.clamp(0.0, 1.0).sqrt()
        }
    }
}

/// Rate at which the volume of a layer that is nearly gone is led back to what its gas takes up, 1/s: the
/// volume and the mass of a remnant drift apart by the errors of the steps, and their ratio would mean nothing.
#[inline]
pub(super) fn remnant_1_s(now: &Derived<f64>) -> f64 {
    const LEADS_BACK_1_S: f64 = 1.0;
    (1.0 - now.there[0].min(now.there[1])) * LEADS_BACK_1_S
}

/// Volume of the hot layer by what the smaller layer takes up, m³.
#[inline]
fn remnant_m3(room: &RoomData, now: &Derived<f64>, inside: &Inside<f64>) -> f64 {
    let takes_m3 = |mass_kg: f64, temperature_k: f64| {
        mass_kg.max(0.0) * GAS_CONSTANT_J_KGK * temperature_k / inside.pressure_pa
    };
    if now.there[0] < now.there[1] {
        takes_m3(inside.upper_kg, now.upper_k)
    } else {
        room.volume_m3 - takes_m3(inside.lower_kg, now.lower_k)
    }
}

/// First species of a place in the state: a layer, or what went outside.
#[inline]
pub(super) fn place(building: &Building, place: Place) -> usize {
    match place {
        Some((room, layer)) => building.layout.species_of(room, layer),
        None => building.layout.ledger + ledger::SPECIES_OUT,
    }
}

/// Mass of a layer, never nothing.
#[inline]
pub(super) fn held_kg(building: &Building, state: &[f64], room: usize, layer: usize) -> f64 {
    state[building.layout.pressure(room) + 2 + layer].max(1e-8 * building.rooms[room].air_kg)
}

/// Share of arriving gas that goes to the hot layer, by its temperature between those of the layers.
#[inline]
fn share_to_upper<R: Real>(upper_k: R, lower_k: R, arrives_k: R) -> R {
    let spread = (upper_k - lower_k).at_least(5.0);
    ((arrives_k - lower_k) / spread).smooth_step(0.0, 1.0)
}

/// The variables of a room from the state.
fn variables<R: Real>(building: &Building, index: usize, state: &[f64]) -> Inside<R> {
    let layout = &building.layout;
    let room = &building.rooms[index];
    let at = layout.pressure(index);
    let hot = layout.species_of(index, 0);
    let cool = layout.species_of(index, 1);
    let fuel_kg: f64 = state[hot + PRODUCTS..hot + building.species].iter().sum();
    Inside {
        pressure_pa: R::variable((building.ambient.pressure_pa + state[at]).max(1.0), 0),
        upper_m3: R::variable(state[at + 1], 1),
        upper_kg: R::variable(state[at + 2], 2),
        lower_kg: R::variable(state[at + 3], 3),
        upper_oxygen_kg: R::variable(state[hot + OXYGEN], 4),
        lower_oxygen_kg: R::variable(state[cool + OXYGEN], 5),
        upper_fuel_kg: R::variable(fuel_kg, 6),
        surfaces_k: std::array::from_fn(|surface| {
            if room.chains[surface].is_some() {
                R::variable(state[room.nodes[surface]], CORE + surface)
            } else {
                R::constant(building.ambient.indoor_temperature_k)
            }
        }),
    }
}

/// The same variables, each a direction of its own.
fn with_slopes(inside: &Inside<f64>) -> Inside<Dual<ROOM_WAYS>> {
    Inside {
        pressure_pa: Dual::variable(inside.pressure_pa, 0),
        upper_m3: Dual::variable(inside.upper_m3, 1),
        upper_kg: Dual::variable(inside.upper_kg, 2),
        lower_kg: Dual::variable(inside.lower_kg, 3),
        upper_oxygen_kg: Dual::variable(inside.upper_oxygen_kg, 4),
        lower_oxygen_kg: Dual::variable(inside.lower_oxygen_kg, 5),
        upper_fuel_kg: Dual::variable(inside.upper_fuel_kg, 6),
        surfaces_k: std::array::from_fn(|s| Dual::variable(inside.surfaces_k[s], CORE + s)),
    }
}

/// One side of a vent, its directions from `first` on.
fn flank<R: Real>(building: &Building, index: usize, inside: &Inside<f64>, first: usize) -> Flank<R> {
    let room = &building.rooms[index];
    let seeded = Inside {
        pressure_pa: R::variable(inside.pressure_pa, first),
        upper_m3: R::variable(inside.upper_m3, first + 1),
        upper_kg: R::variable(inside.upper_kg, first + 2),
        lower_kg: R::variable(inside.lower_kg, first + 3),
        upper_oxygen_kg: R::constant(0.0),
        lower_oxygen_kg: R::constant(0.0),
        upper_fuel_kg: R::constant(0.0),
        surfaces_k: [R::constant(0.0); SURFACES],
    };
    let now = seeded.derived(room);
    let dense = seeded.pressure_pa * (1.0 / GAS_CONSTANT_J_KGK);
    Flank {
        pressure_pa: seeded.pressure_pa - building.ambient.pressure_pa,
        floor_m: room.floor_elevation_m,
        interface_m: now.interface_m + room.floor_elevation_m,
        upper_kg_m3: dense / now.upper_k,
        lower_kg_m3: dense / now.lower_k,
        upper_gives: now.there[0],
        lower_gives: now.there[1],
    }
}

fn outside<R: Real>(density_kg_m3: f64) -> Flank<R> {
    Flank {
        pressure_pa: R::constant(0.0),
        floor_m: 0.0,
        interface_m: R::constant(1e9),
        upper_kg_m3: R::constant(density_kg_m3),
        lower_kg_m3: R::constant(density_kg_m3),
        upper_gives: R::constant(1.0),
        lower_gives: R::constant(1.0),
    }
}

/// What makes a layer glow.
fn glow(building: &Building, room: usize, layer: usize, state: &[f64], shares: &[f64; SPECIES_MAX]) -> Glow {
    // Mole fractions in gas of the molar mass of air.
    let water = shares[WATER].clamp(0.0, 1.0) * (28.96 / 18.015);
    let mut fuel_shares = [0.0; FUELS_MAX];
    let fuels = &shares[PRODUCTS..building.species];
    let whole: f64 = fuels.iter().map(|share| share.max(0.0)).sum();
    if whole > 0.0 {
        for (share, fuel) in fuel_shares.iter_mut().zip(fuels) {
            *share = fuel.max(0.0) / whole;
        }
    }
    Glow {
        soot_kg: state[building.layout.species_of(room, layer) + SOOT].max(0.0),
        gases: water + shares[CARBON_DIOXIDE].clamp(0.0, 1.0) * (28.96 / 44.009),
        water,
        fuel_shares,
    }
}
