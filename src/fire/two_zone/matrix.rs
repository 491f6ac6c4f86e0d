//! The matrix of the solver: rooms as blocks on the graph of openings, walls condensed to their faces.
//!
//! Solves `(d - J) u = r` for one `d = 1/(hγ)` and many `r`. Exact for the core of the rooms, the
//! faces and the wall chains; the species that nothing waits for are only carried (each layer gives
//! and takes at the rate of the flows); what a look takes as fixed has no slope. The method is a W-method: it
//! keeps its order with any such matrix. Every flow is written once for giver and taker, so the
//! matrix loses nothing and the method keeps mass, energy and elements to rounding.

use super::building::{Building, SURFACES, ledger};
use super::gas::{GAMMA, GAS_CONSTANT_J_KGK, OXYGEN, PRODUCTS, SPECIES_MAX, SPECIFIC_HEAT_J_KGK};
use super::rates::{CORE, JetBurn, Look, Model, Transfer, held_kg, place, remnant_1_s};
use super::room::Inner;

type Block = [[f64; CORE]; CORE];
type Pair = [[f64; 2]; 2];

const ZERO_BLOCK: Block = [[0.0; CORE]; CORE];

/// A transfer with its slopes by room, and what is needed to carry species along it.
#[derive(Clone, Copy, Debug)]
struct Way {
    transfer: Transfer,
    /// One over the mass of the giver; zero outside.
    per_kg: f64,
    /// Slopes of the giver's temperature.
    warms: [f64; 4],
    /// Mass fractions of what it gives.
    shares: [f64; SPECIES_MAX],
    /// First species of both ends in the state.
    ends: [usize; 2],
}

/// The lift of a plume, with slopes along the room's own directions.
#[derive(Clone, Copy, Debug)]
struct Lift {
    room: usize,
    mass_kg_s: f64,
    slopes: [f64; CORE + SURFACES],
    per_kg: f64,
    temperature_k: f64,
    shares: [f64; SPECIES_MAX],
}

/// The faces of one room: how they hang together and on the core.
#[derive(Clone, Copy, Debug)]
struct Faces {
    /// Inverse of the block of the faces.
    inverse: [[f64; SURFACES]; SURFACES],
    /// Slopes of the heat to each face along the core, W per unit and m².
    on_core: [[f64; CORE]; SURFACES],
    /// Slopes of the heat to both layers along the faces, W/K.
    to_layers: [[f64; SURFACES]; 2],
}

/// The matrix.
#[derive(Debug)]
pub(super) struct Matrix {
    graph: Graph,
    blocks: Vec<Block>,
    pairs: Vec<Pair>,
    factors: Vec<Block>,
    pair_factors: Vec<Pair>,
    ways: Vec<Way>,
    lifts: Vec<Lift>,
    jets: Vec<JetBurn>,
    faces: Vec<Faces>,
    /// Factored chains: one over the reduced diagonal of each node.
    chain_inverse: Vec<f64>,
    d: f64,
    // Scratch.
    core: Vec<[f64; CORE]>,
    /// All species of both layers of each room, side by side.
    pair: Vec<[[f64; SPECIES_MAX]; 2]>,
    face: Vec<[f64; SURFACES]>,
    moved: Vec<f64>,
    lifted: Vec<f64>,
    carried: Vec<f64>,
}

/// Which rooms touch, and the order in which they are taken out.
#[derive(Debug)]
struct Graph {
    /// Rooms in the order of elimination.
    order: Vec<usize>,
    /// Place of the block (row, column), row by row; [`NOWHERE`] where it stays empty.
    places: Vec<usize>,
    /// Row and column of each block.
    blocks: Vec<(usize, usize)>,
    /// For each step of the elimination: later rooms that touch the room then.
    after: Vec<Vec<usize>>,
    /// Products `target -= left · right` of each step, as places of blocks.
    updates: Vec<Vec<(usize, usize, usize)>>,
}

/// Place of a block that stays empty.
const NOWHERE: usize = usize::MAX;

impl Graph {
    /// Place of a block that is or becomes filled.
    #[inline]
    fn at(&self, row: usize, column: usize) -> usize {
        self.places[row * self.order.len() + column]
    }

    fn new(model: Model<'_>) -> Self {
        let rooms = model.building.rooms.len();
        let mut touch: Vec<std::collections::BTreeSet<usize>> = vec![Default::default(); rooms];
        let mut join = |a: usize, b: usize| {
            if a != b {
                touch[a].insert(b);
                touch[b].insert(a);
            }
        };
        for vent in &model.building.vents {
            if let [Some(a), Some(b)] = vent.rooms {
                join(a, b);
            }
        }
        for fan in &model.network.fans {
            if let (super::network::Side::Room(a), super::network::Side::Room(b)) = (fan.from, fan.to) {
                join(a, b);
            }
        }
        let mut places = vec![NOWHERE; rooms * rooms];
        let mut blocks = Vec::new();
        let mut place = |row: usize, column: usize| {
            let place = &mut places[row * rooms + column];
            if *place == NOWHERE {
                *place = blocks.len();
                blocks.push((row, column));
            }
            *place
        };
        for room in 0..rooms {
            place(room, room);
        }
        // The room that touches fewest goes first; ties by number, so that the order is the same always.
        let mut left: Vec<usize> = (0..rooms).collect();
        let mut order = Vec::with_capacity(rooms);
        let mut after = Vec::with_capacity(rooms);
        let mut updates = Vec::with_capacity(rooms);
        while !left.is_empty() {
            let at = (0..left.len()).min_by_key(|&at| (touch[left[at]].len(), left[at])).unwrap_or(0);
            let room = left.remove(at);
            let later: Vec<usize> = touch[room].iter().copied().collect();
            for &one in &later {
                place(room, one);
                place(one, room);
                touch[one].remove(&room);
            }
            let mut products = Vec::new();
            for &row in &later {
                for &column in &later {
                    if row != column {
                        touch[row].insert(column);
                    }
                    products.push((place(row, column), place(row, room), place(room, column)));
                }
            }
            order.push(room);
            after.push(later);
            updates.push(products);
        }
        Self { order, places, blocks, after, updates }
    }
}

impl Matrix {
    pub(super) fn new(model: Model<'_>) -> Self {
        let graph = Graph::new(model);
        let rooms = model.building.rooms.len();
        let len = graph.blocks.len();
        Self {
            blocks: vec![ZERO_BLOCK; len],
            pairs: vec![[[0.0; 2]; 2]; len],
            factors: vec![ZERO_BLOCK; len],
            pair_factors: vec![[[0.0; 2]; 2]; len],
            ways: Vec::new(),
            lifts: Vec::new(),
            jets: Vec::new(),
            faces: Vec::with_capacity(rooms),
            chain_inverse: vec![0.0; model.building.layout.len],
            d: 0.0,
            core: vec![[0.0; CORE]; rooms],
            pair: vec![[[0.0; SPECIES_MAX]; 2]; rooms],
            face: vec![[0.0; SURFACES]; rooms],
            moved: Vec::new(),
            lifted: Vec::new(),
            carried: vec![0.0; model.building.layout.len],
            graph,
        }
    }

    /// Takes the slopes of a look.
    pub(super) fn take(&mut self, model: Model<'_>, look: &Look, state: &[f64], rates: &[f64]) {
        let building = model.building;
        self.blocks.fill(ZERO_BLOCK);
        self.pairs.fill([[0.0; 2]; 2]);
        self.ways.clear();
        self.lifts.clear();
        for transfer in &look.transfers {
            let (per_kg, warms, shares) = match transfer.from {
                Some((room, layer)) => (
                    1.0 / held_kg(building, state, room, layer),
                    temperature_slopes(building, look, state, room, layer),
                    look.shares[room][layer],
                ),
                None => (0.0, [0.0; 4], building.outside_air),
            };
            let ends = [place(building, transfer.from), place(building, transfer.to)];
            self.ways.push(Way { transfer: *transfer, per_kg, warms, shares, ends });
        }
        for (room, inner) in look.inner_slopes.iter().enumerate() {
            if inner.lifted_kg_s.value > 0.0 {
                self.lifts.push(Lift {
                    room,
                    mass_kg_s: inner.lifted_kg_s.value,
                    slopes: inner.lifted_kg_s.along,
                    per_kg: 1.0 / held_kg(building, state, room, 1),
                    temperature_k: look.now[room].lower_k,
                    shares: look.shares[room][1],
                });
            }
        }
        self.moved.resize(self.ways.len(), 0.0);
        self.lifted.resize(self.lifts.len(), 0.0);

        // Rows hold heat to both layers (0 all, 1 hot), masses, oxygen, fuel; turned into rates below.
        for index in 0..self.ways.len() {
            self.add_way(building, index);
        }
        for index in 0..self.lifts.len() {
            self.add_lift(building, look, state, index);
        }
        for (room, inner) in look.inner_slopes.iter().enumerate() {
            self.add_inner(building, look, room, inner);
        }
        self.jets.clear();
        self.jets.extend_from_slice(&look.jet_burns);
        for index in 0..self.jets.len() {
            self.add_jet(building, index);
        }
        self.turn_to_rates(building, look, state, rates);
    }

    fn add_way(&mut self, building: &Building, index: usize) {
        let way = self.ways[index];
        let transfer = &way.transfer;
        let warmth = SPECIFIC_HEAT_J_KGK * transfer.temperature_k;
        let oxygen = way.shares[OXYGEN];
        let fuel: f64 = way.shares[PRODUCTS..building.species].iter().sum();
        // Slopes of the flow along both rooms.
        for end in 0..2 {
            let Some(column) = transfer.rooms[end] else { continue };
            let slopes = &transfer.slopes[end * 4..end * 4 + 4];
            for (place, sign) in [(transfer.from, -1.0), (transfer.to, 1.0)] {
                let Some((row, layer)) = place else { continue };
                let block = &mut self.blocks[self.graph.at(row, column)];
                for (way, slope) in slopes.iter().enumerate() {
                    let moved = sign * slope;
                    block[0][way] += warmth * moved;
                    if layer == 0 {
                        block[1][way] += warmth * moved;
                        block[6][way] += fuel * moved;
                    }
                    block[2 + layer][way] += moved;
                    block[4 + layer][way] += oxygen * moved;
                }
            }
        }
        // The giver's own warmth and composition.
        if let Some((giver, from_layer)) = transfer.from {
            let mass = transfer.mass_kg_s;
            for (place, sign) in [(transfer.from, -1.0), (transfer.to, 1.0)] {
                let Some((row, layer)) = place else { continue };
                let at = self.graph.at(row, giver);
                let block = &mut self.blocks[at];
                let carried = sign * mass * way.per_kg;
                for (column, warm) in way.warms.iter().enumerate() {
                    let heat = sign * mass * SPECIFIC_HEAT_J_KGK * warm;
                    block[0][column] += heat;
                    if layer == 0 {
                        block[1][column] += heat;
                    }
                }
                block[4 + layer][4 + from_layer] += carried;
                block[4 + layer][2 + from_layer] -= carried * oxygen;
                if layer == 0 && from_layer == 0 {
                    block[6][6] += carried;
                    block[6][2] -= carried * fuel;
                }
                self.pairs[at][layer][from_layer] += carried;
            }
        }
    }

    fn add_lift(&mut self, building: &Building, look: &Look, state: &[f64], index: usize) {
        let lift = self.lifts[index];
        let at = self.graph.at(lift.room, lift.room);
        let block = &mut self.blocks[at];
        let oxygen = lift.shares[OXYGEN];
        let fuel: f64 = lift.shares[PRODUCTS..building.species].iter().sum();
        let warmth = SPECIFIC_HEAT_J_KGK * lift.temperature_k;
        let warms = temperature_slopes(building, look, state, lift.room, 1);
        for column in 0..CORE {
            let slope = lift.slopes[column];
            // All the heat stays in the room: only the hot layer's share changes.
            block[1][column] += warmth * slope;
            block[2][column] += slope;
            block[3][column] -= slope;
            block[4][column] += oxygen * slope;
            block[5][column] -= oxygen * slope;
            block[6][column] += fuel * slope;
        }
        for (column, warm) in warms.iter().enumerate() {
            block[1][column] += lift.mass_kg_s * SPECIFIC_HEAT_J_KGK * warm;
        }
        let carried = lift.mass_kg_s * lift.per_kg;
        block[4][5] += carried;
        block[5][5] -= carried;
        block[4][3] -= carried * oxygen;
        block[5][3] += carried * oxygen;
        self.pairs[at][0][1] += carried;
        self.pairs[at][1][1] -= carried;
    }

    fn add_inner(
        &mut self,
        building: &Building,
        look: &Look,
        room: usize,
        inner: &Inner<super::real::Dual<{ CORE + SURFACES }>>,
    ) {
        let block = &mut self.blocks[self.graph.at(room, room)];
        for column in 0..CORE {
            block[0][column] += inner.heat_w[0].along[column] + inner.heat_w[1].along[column];
            block[1][column] += inner.heat_w[0].along[column];
        }
        let fuel_k = building.ambient.indoor_temperature_k;
        for reaction in &look.reaction_slopes[room] {
            let per_oxygen = 1.0 / reaction.products.oxygen();
            for column in 0..CORE {
                let oxygen = reaction.oxygen_kg_s.along[column];
                let supply = reaction.supply_kg_s.along[column];
                let heat = supply * SPECIFIC_HEAT_J_KGK * fuel_k;
                block[0][column] += heat;
                block[1][column] += heat;
                block[2][column] += supply;
                block[4][column] -= oxygen;
                block[6][column] += supply - oxygen * per_oxygen;
            }
        }
    }

    fn add_jet(&mut self, building: &Building, index: usize) {
        let jet = self.jets[index];
        let heat = building.fuels[jet.fuel].heat_per_oxygen_j_kg;
        let per_oxygen = 1.0 / jet.products.oxygen();
        for end in 0..2 {
            let Some(column) = jet.rooms[end] else { continue };
            let at = self.graph.at(jet.room, column);
            let block = &mut self.blocks[at];
            for (way, slope) in jet.slopes[end * 4..end * 4 + 4].iter().enumerate() {
                block[0][way] += heat * slope;
                block[1][way] += heat * slope;
                block[4][way] -= slope;
                block[6][way] -= slope * per_oxygen;
            }
        }
    }

    /// Turns rows of heat into rows of pressure and volume.
    fn turn_to_rates(&mut self, building: &Building, look: &Look, state: &[f64], rates: &[f64]) {
        let layout = &building.layout;
        let gain = GAMMA - 1.0;
        for (at, &(row, column)) in self.graph.blocks.iter().enumerate() {
            let room = &building.rooms[row];
            let offset = layout.pressure(row);
            let pressure = (building.ambient.pressure_pa + state[offset]).max(1.0);
            let volume = state[offset + 1];
            let block = &mut self.blocks[at];
            for way in 0..CORE {
                let (all, hot) = (block[0][way], block[1][way]);
                block[0][way] = gain * all / room.volume_m3;
                block[1][way] = gain * (hot - volume * all / room.volume_m3) / (GAMMA * pressure);
            }
            if row == column {
                block[1][1] -= rates[offset] / (GAMMA * pressure);
                // A remnant is led back to what its mass takes up: in step with the mass, or the two part again.
                let now = &look.now[row];
                let smaller = usize::from(now.there[1] < now.there[0]);
                let led = remnant_1_s(now) * (1.0 - now.there[smaller]);
                let kelvin = [now.upper_k, now.lower_k][smaller];
                let side = [1.0, -1.0][smaller];
                block[1][1] -= led;
                block[1][2 + smaller] += side * led * GAS_CONSTANT_J_KGK * kelvin / pressure;
                block[1][0] -= rates[offset + 1] / pressure;
            }
        }
    }

    /// Factors `d - J`.
    pub(super) fn factor(&mut self, model: Model<'_>, look: &Look, state: &[f64], d: f64) {
        let building = model.building;
        self.d = d;
        for (factor, block) in self.factors.iter_mut().zip(&self.blocks) {
            for (row, from) in factor.iter_mut().zip(block) {
                for (value, slope) in row.iter_mut().zip(from) {
                    *value = -slope;
                }
            }
        }
        for (factor, pair) in self.pair_factors.iter_mut().zip(&self.pairs) {
            *factor = pair.map(|row| row.map(|value| -value));
        }
        self.faces.clear();
        for (index, inner) in look.inner_slopes.iter().enumerate() {
            let faces = self.condense(building, index, inner, d);
            let at = self.graph.at(index, index);
            let (on_pressure, on_volume) = heat_to_rates(building, state, index);
            // Heat to the layers by way of the faces.
            for column in 0..CORE {
                let mut through = [0.0; 2];
                for (layer, sum) in through.iter_mut().enumerate() {
                    for face in 0..SURFACES {
                        let mut warm = 0.0;
                        for other in 0..SURFACES {
                            warm += faces.inverse[face][other] * faces.on_core[other][column];
                        }
                        *sum += faces.to_layers[layer][face] * warm;
                    }
                }
                let all = through[0] + through[1];
                self.factors[at][0][column] -= on_pressure * all;
                self.factors[at][1][column] -= on_volume[0] * through[0] + on_volume[1] * all;
            }
            for diagonal in 0..CORE {
                self.factors[at][diagonal][diagonal] += d;
            }
            self.pair_factors[at][0][0] += d;
            self.pair_factors[at][1][1] += d;
            self.faces.push(faces);
        }
        // Blocks: the diagonal block of each room is turned into its inverse as it is taken out.
        for step in 0..self.graph.order.len() {
            let room = self.graph.order[step];
            let own = self.graph.at(room, room);
            self.factors[own] = inverse(&self.factors[own]);
            self.pair_factors[own] = pair_inverse(&self.pair_factors[own]);
            let (own_block, own_pair) = (self.factors[own], self.pair_factors[own]);
            for &later in &self.graph.after[step] {
                let left = self.graph.at(later, room);
                self.factors[left] = times(&self.factors[left], &own_block);
                self.pair_factors[left] = pair_times(&self.pair_factors[left], &own_pair);
            }
            for &(target, left, right) in &self.graph.updates[step] {
                let product = times(&self.factors[left], &self.factors[right]);
                let pair = pair_times(&self.pair_factors[left], &self.pair_factors[right]);
                for (row, minus) in self.factors[target].iter_mut().zip(&product) {
                    for (value, less) in row.iter_mut().zip(minus) {
                        *value -= less;
                    }
                }
                for (row, minus) in self.pair_factors[target].iter_mut().zip(&pair) {
                    for (value, less) in row.iter_mut().zip(minus) {
                        *value -= less;
                    }
                }
            }
        }
    }

    /// Takes the wall chains out of the faces of a room.
    fn condense(
        &mut self,
        building: &Building,
        index: usize,
        inner: &Inner<super::real::Dual<{ CORE + SURFACES }>>,
        d: f64,
    ) -> Faces {
        let room = &building.rooms[index];
        let mut block = [[0.0; SURFACES]; SURFACES];
        let mut on_core = [[0.0; CORE]; SURFACES];
        let mut to_layers = [[0.0; SURFACES]; 2];
        for face in 0..SURFACES {
            let Some(chain) = room.chains[face] else {
                block[face][face] = 1.0;
                continue;
            };
            let chain = &building.chains[chain];
            let first = room.nodes[face];
            let last = chain.len() - 1;
            let (mut below, mut face_diagonal) = (0.0, 0.0);
            for node in (0..=last).rev() {
                let before = if node > 0 { chain.conductance[node - 1] } else { 0.0 };
                let mut diagonal = chain.capacity[node] * d + before + chain.conductance[node];
                if node < last {
                    diagonal -= chain.conductance[node] * chain.conductance[node] * below;
                }
                below = 1.0 / diagonal;
                self.chain_inverse[first + node] = below;
                face_diagonal = diagonal;
            }
            let per_area = 1.0 / room.areas_m2[face];
            let along = &inner.surfaces_w[face].along;
            block[face][face] += face_diagonal;
            for other in 0..SURFACES {
                if room.chains[other].is_some() {
                    block[face][other] -= along[CORE + other] * per_area;
                }
            }
            for (column, slope) in on_core[face].iter_mut().enumerate() {
                *slope = along[column] * per_area;
            }
            for (layer, row) in to_layers.iter_mut().enumerate() {
                row[face] = inner.heat_w[layer].along[CORE + face];
            }
        }
        Faces { inverse: face_inverse(&block), on_core, to_layers }
    }

    /// Solves for one right side, in place.
    pub(super) fn solve(&mut self, model: Model<'_>, look: &Look, state: &[f64], right: &mut [f64]) {
        let building = model.building;
        let layout = &building.layout;
        // Chains: from the back to the faces.
        for (index, room) in building.rooms.iter().enumerate() {
            let mut heat = [0.0; SURFACES];
            for (face, received) in heat.iter_mut().enumerate() {
                let Some(chain) = room.chains[face] else { continue };
                let chain = &building.chains[chain];
                let first = room.nodes[face];
                let last = chain.len() - 1;
                for node in (0..=last).rev() {
                    let mut sum = chain.capacity[node] * right[first + node];
                    if node < last {
                        sum += chain.conductance[node]
                            * right[first + node + 1]
                            * self.chain_inverse[first + node + 1];
                    }
                    right[first + node] = sum;
                }
                *received = right[first];
            }
            let faces = &self.faces[index];
            let mut warm = [0.0; SURFACES];
            for (face, sum) in warm.iter_mut().enumerate() {
                for (other, received) in heat.iter().enumerate() {
                    *sum += faces.inverse[face][other] * received;
                }
            }
            self.face[index] = warm;
            let at = layout.pressure(index);
            let hot = layout.species_of(index, 0);
            let cool = layout.species_of(index, 1);
            let (on_pressure, on_volume) = heat_to_rates(building, state, index);
            let through = [0, 1].map(|layer: usize| {
                let row = &faces.to_layers[layer];
                (0..SURFACES).map(|face| row[face] * warm[face]).sum::<f64>()
            });
            let all = through[0] + through[1];
            self.core[index] = [
                right[at] + on_pressure * all,
                right[at + 1] + on_volume[0] * through[0] + on_volume[1] * all,
                right[at + 2],
                right[at + 3],
                right[hot + OXYGEN],
                right[cool + OXYGEN],
                right[hot + PRODUCTS..hot + building.species].iter().sum(),
            ];
        }
        self.solve_core();
        for (index, room) in building.rooms.iter().enumerate() {
            let core = self.core[index];
            let faces = &self.faces[index];
            // Faces, then into the chains.
            let mut from_core = [0.0; SURFACES];
            for (face, sum) in from_core.iter_mut().enumerate() {
                for (column, value) in core.iter().enumerate() {
                    *sum += faces.on_core[face][column] * value;
                }
            }
            for face in 0..SURFACES {
                for (other, received) in from_core.iter().enumerate() {
                    self.face[index][face] += faces.inverse[face][other] * received;
                }
                let Some(chain) = room.chains[face] else { continue };
                let chain = &building.chains[chain];
                let first = room.nodes[face];
                right[first] = self.face[index][face];
                for node in 1..chain.len() {
                    right[first + node] = (right[first + node]
                        + chain.conductance[node - 1] * right[first + node - 1])
                        * self.chain_inverse[first + node];
                }
            }
            let at = layout.pressure(index);
            right[at..at + 4].copy_from_slice(&core[..4]);
        }
        self.solve_species(model, look, right);
        self.solve_ledger(model, right);
    }

    fn solve_core(&mut self) {
        for step in 0..self.graph.order.len() {
            let room = self.graph.order[step];
            let here = self.core[room];
            for &later in &self.graph.after[step] {
                let left = &self.factors[self.graph.at(later, room)];
                let target = &mut self.core[later];
                for (row, value) in target.iter_mut().enumerate() {
                    for (column, from) in here.iter().enumerate() {
                        *value -= left[row][column] * from;
                    }
                }
            }
        }
        for step in (0..self.graph.order.len()).rev() {
            let room = self.graph.order[step];
            let mut here = self.core[room];
            for &later in &self.graph.after[step] {
                let right = &self.factors[self.graph.at(room, later)];
                let from = &self.core[later];
                for (row, value) in here.iter_mut().enumerate() {
                    for (column, other) in from.iter().enumerate() {
                        *value -= right[row][column] * other;
                    }
                }
            }
            let own = &self.factors[self.graph.at(room, room)];
            let mut solved = [0.0; CORE];
            for (row, value) in solved.iter_mut().enumerate() {
                for (column, from) in here.iter().enumerate() {
                    *value += own[row][column] * from;
                }
            }
            self.core[room] = solved;
        }
    }

    /// How much more gas each transfer moves, given the core.
    fn move_flows(&mut self) {
        for (way, moved) in self.ways.iter().zip(&mut self.moved) {
            let mut sum = 0.0;
            for end in 0..2 {
                if let Some(room) = way.transfer.rooms[end] {
                    for direction in 0..4 {
                        sum += way.transfer.slopes[end * 4 + direction] * self.core[room][direction];
                    }
                }
            }
            *moved = sum;
        }
        for (lift, lifted) in self.lifts.iter().zip(&mut self.lifted) {
            let mut sum = 0.0;
            for direction in 0..CORE {
                sum += lift.slopes[direction] * self.core[lift.room][direction];
            }
            for face in 0..SURFACES {
                sum += lift.slopes[CORE + face] * self.face[lift.room][face];
            }
            *lifted = sum;
        }
    }

    fn solve_species(&mut self, model: Model<'_>, look: &Look, right: &mut [f64]) {
        let building = model.building;
        let layout = &building.layout;
        self.move_flows();
        // Sources: flows that change, reactions that change.
        self.carried.fill(0.0);
        for (way, &moved) in self.ways.iter().zip(&self.moved) {
            let diluted = match way.transfer.from {
                Some((room, layer)) => {
                    moved - way.transfer.mass_kg_s * way.per_kg * self.core[room][2 + layer]
                }
                None => moved,
            };
            let [from, to] = way.ends;
            for (species, share) in way.shares[..building.species].iter().enumerate() {
                let carried = diluted * share;
                self.carried[from + species] -= carried;
                self.carried[to + species] += carried;
            }
        }
        for (lift, &moved) in self.lifts.iter().zip(&self.lifted) {
            let diluted = moved - lift.mass_kg_s * lift.per_kg * self.core[lift.room][3];
            let (from, to) = (layout.species_of(lift.room, 1), layout.species_of(lift.room, 0));
            for (species, share) in lift.shares[..building.species].iter().enumerate() {
                let carried = diluted * share;
                self.carried[from + species] -= carried;
                self.carried[to + species] += carried;
            }
        }
        for (room, reactions) in look.reaction_slopes.iter().enumerate() {
            let upper = layout.species_of(room, 0);
            let base = layout.ledger;
            for reaction in reactions {
                let oxygen = self.along(room, &reaction.oxygen_kg_s.along);
                let supply = self.along(room, &reaction.supply_kg_s.along);
                let burnt = oxygen / reaction.products.oxygen();
                for species in 0..PRODUCTS {
                    self.carried[upper + species] += burnt * reaction.products.made[species];
                }
                self.carried[upper + PRODUCTS + reaction.fuel] += supply - burnt;
                self.carried[base + ledger::RELEASED] +=
                    oxygen * building.fuels[reaction.fuel].heat_per_oxygen_j_kg;
                self.carried[base + ledger::FUEL] += supply;
                self.carried[base + ledger::FUEL_ENTHALPY] +=
                    supply * SPECIFIC_HEAT_J_KGK * building.ambient.indoor_temperature_k;
                self.carried[base + ledger::SPECIES_OUT + building.species + reaction.fuel] += supply;
            }
        }
        for jet in &self.jets {
            let mut oxygen = 0.0;
            for end in 0..2 {
                if let Some(room) = jet.rooms[end] {
                    for direction in 0..4 {
                        oxygen += jet.slopes[end * 4 + direction] * self.core[room][direction];
                    }
                }
            }
            let burnt = oxygen / jet.products.oxygen();
            let upper = layout.species_of(jet.room, 0);
            for species in 0..PRODUCTS {
                self.carried[upper + species] += burnt * jet.products.made[species];
            }
            self.carried[upper + PRODUCTS + jet.fuel] -= burnt;
            self.carried[layout.ledger + ledger::RELEASED] +=
                oxygen * building.fuels[jet.fuel].heat_per_oxygen_j_kg;
        }
        for (room, pair) in self.pair.iter_mut().enumerate() {
            for (layer, values) in pair.iter_mut().enumerate() {
                let first = layout.species_of(room, layer);
                for species in 0..building.species {
                    values[species] = right[first + species] + self.carried[first + species];
                }
            }
        }
        self.solve_pair();
        for (room, pair) in self.pair.iter().enumerate() {
            for (layer, values) in pair.iter().enumerate() {
                let first = layout.species_of(room, layer);
                right[first..first + building.species].copy_from_slice(&values[..building.species]);
            }
        }
    }

    fn along(&self, room: usize, slopes: &[f64; CORE + SURFACES]) -> f64 {
        let core: f64 = (0..CORE).map(|way| slopes[way] * self.core[room][way]).sum();
        let faces: f64 = (0..SURFACES).map(|face| slopes[CORE + face] * self.face[room][face]).sum();
        core + faces
    }

    fn solve_pair(&mut self) {
        for step in 0..self.graph.order.len() {
            let room = self.graph.order[step];
            let here = self.pair[room];
            for &later in &self.graph.after[step] {
                let left = &self.pair_factors[self.graph.at(later, room)];
                take_pair(&mut self.pair[later], left, &here);
            }
        }
        for step in (0..self.graph.order.len()).rev() {
            let room = self.graph.order[step];
            let mut here = self.pair[room];
            for &later in &self.graph.after[step] {
                let right = &self.pair_factors[self.graph.at(room, later)];
                take_pair(&mut here, right, &self.pair[later]);
            }
            let own = &self.pair_factors[self.graph.at(room, room)];
            let solved = &mut self.pair[room];
            for species in 0..SPECIES_MAX {
                let (hot, cool) = (here[0][species], here[1][species]);
                solved[0][species] = own[0][0] * hot + own[0][1] * cool;
                solved[1][species] = own[1][0] * hot + own[1][1] * cool;
            }
        }
    }

    /// The ledger and the clocks: nothing waits for them.
    fn solve_ledger(&mut self, model: Model<'_>, right: &mut [f64]) {
        let building = model.building;
        let layout = &building.layout;
        let base = layout.ledger;
        for (way, &moved) in self.ways.iter().zip(&self.moved) {
            let transfer = &way.transfer;
            let sign = match (transfer.from, transfer.to) {
                (None, Some(_)) => -1.0,
                (Some(_), None) => 1.0,
                _ => continue,
            };
            let mut warms = 0.0;
            if let Some((room, layer)) = transfer.from {
                warms = (0..4).map(|column| way.warms[column] * self.core[room][column]).sum();
                // Species that leave at the rate they are now there.
                let first = layout.species_of(room, layer);
                for species in 0..building.species {
                    self.carried[base + ledger::SPECIES_OUT + species] +=
                        transfer.mass_kg_s * way.per_kg * right[first + species];
                }
            }
            self.carried[base + ledger::MASS_OUT] += sign * moved;
            self.carried[base + ledger::ENTHALPY_OUT] +=
                sign * SPECIFIC_HEAT_J_KGK * (moved * transfer.temperature_k + transfer.mass_kg_s * warms);
        }
        for room in &building.rooms {
            for face in 0..SURFACES {
                let Some(chain) = room.chains[face] else { continue };
                let chain = &building.chains[chain];
                let last = chain.len() - 1;
                self.carried[base + ledger::LOST] +=
                    room.areas_m2[face] * chain.conductance[last] * right[room.nodes[face] + last];
            }
        }
        for (value, carried) in right[base..].iter_mut().zip(&self.carried[base..]) {
            *value = (*value + carried) / self.d;
        }
        for value in &mut right[layout.clocks..base] {
            *value /= self.d;
        }
    }
}

/// What heat to a room does to its pressure, and what heat to the hot layer, and to all, does to its volume.
#[inline]
fn heat_to_rates(building: &Building, state: &[f64], room: usize) -> (f64, [f64; 2]) {
    let at = building.layout.pressure(room);
    let volume_m3 = building.rooms[room].volume_m3;
    let pressure = (building.ambient.pressure_pa + state[at]).max(1.0);
    let gain = GAMMA - 1.0;
    (gain / volume_m3, [gain / (GAMMA * pressure), -gain * state[at + 1] / (volume_m3 * GAMMA * pressure)])
}

/// Slopes of the temperature of a layer along pressure, volume of the hot layer, both masses.
#[inline]
fn temperature_slopes(
    building: &Building,
    look: &Look,
    state: &[f64],
    room: usize,
    layer: usize,
) -> [f64; 4] {
    let at = building.layout.pressure(room);
    let data = &building.rooms[room];
    let pressure = (building.ambient.pressure_pa + state[at]).max(1.0);
    let now = &look.now[room];
    let least_kg = 1e-8 * data.air_kg;
    let least_m3 = 1e-7 * data.volume_m3;
    let (temperature, volume, kg) = if layer == 0 {
        (now.upper_k, state[at + 1], state[at + 2])
    } else {
        (now.lower_k, data.volume_m3 - state[at + 1], state[at + 3])
    };
    // A layer that goes has little warmth of its own.
    let own = now.there[layer];
    let by_volume = if volume > least_m3 { own * temperature / volume } else { 0.0 };
    let by_mass = if kg > least_kg { -own * temperature / kg } else { 0.0 };
    if layer == 0 {
        [temperature / pressure, by_volume, by_mass, 0.0]
    } else {
        [temperature / pressure, -by_volume, 0.0, by_mass]
    }
}

#[inline]
fn times(a: &Block, b: &Block) -> Block {
    let mut product = ZERO_BLOCK;
    for (row, out) in product.iter_mut().enumerate() {
        for (middle, from) in b.iter().enumerate() {
            let factor = a[row][middle];
            for (column, value) in out.iter_mut().enumerate() {
                *value += factor * from[column];
            }
        }
    }
    product
}

/// `target -= factor · from`, for all species.
#[inline]
fn take_pair(target: &mut [[f64; SPECIES_MAX]; 2], factor: &Pair, from: &[[f64; SPECIES_MAX]; 2]) {
    for species in 0..SPECIES_MAX {
        let (hot, cool) = (from[0][species], from[1][species]);
        target[0][species] -= factor[0][0] * hot + factor[0][1] * cool;
        target[1][species] -= factor[1][0] * hot + factor[1][1] * cool;
    }
}

#[inline]
fn pair_times(a: &Pair, b: &Pair) -> Pair {
    [0, 1].map(|row: usize| [0, 1].map(|column: usize| a[row][0] * b[0][column] + a[row][1] * b[1][column]))
}

#[inline]
fn pair_inverse(a: &Pair) -> Pair {
    let by = 1.0 / (a[0][0] * a[1][1] - a[0][1] * a[1][0]);
    [[a[1][1] * by, -a[0][1] * by], [-a[1][0] * by, a[0][0] * by]]
}

/// Inverse by Gauss and Jordan with rows exchanged for the largest pivot.
fn inverse(block: &Block) -> Block {
    gauss_jordan(block)
}

fn face_inverse(block: &[[f64; SURFACES]; SURFACES]) -> [[f64; SURFACES]; SURFACES] {
    gauss_jordan(block)
}

fn gauss_jordan<const N: usize>(block: &[[f64; N]; N]) -> [[f64; N]; N] {
    let mut work = *block;
    let mut result = [[0.0; N]; N];
    for (index, row) in result.iter_mut().enumerate() {
        row[index] = 1.0;
    }
    // Rows of very different units: pivots are compared by the size of their row.
    let mut size = [0.0; N];
    for (row, size) in work.iter().zip(&mut size) {
        *size = row.iter().fold(1e-300_f64, |most, value| most.max(value.abs()));
    }
    for column in 0..N {
        let mut pivot = column;
        for row in column + 1..N {
            if work[row][column].abs() * size[pivot] > work[pivot][column].abs() * size[row] {
                pivot = row;
            }
        }
        work.swap(column, pivot);
        result.swap(column, pivot);
        size.swap(column, pivot);
        let by = 1.0 / work[column][column];
        for way in 0..N {
            work[column][way] *= by;
            result[column][way] *= by;
        }
        for row in 0..N {
            if row == column {
                continue;
            }
            let factor = work[row][column];
            if factor == 0.0 {
                continue;
            }
            for way in 0..N {
                work[row][way] -= factor * work[column][way];
                result[row][way] -= factor * result[column][way];
            }
        }
    }
    result
}
