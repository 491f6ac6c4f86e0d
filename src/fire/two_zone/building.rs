//! The network made ready to run: geometry worked out once, everything by index.

use super::combustion::oxygen_need;
use super::gas::{FUELS_MAX, GAS_CONSTANT_J_KGK, OXYGEN, PRODUCTS, SPECIES_MAX, WATER};
use super::network::{Ambient, Fuel, Lie, Network, Opening, Room, Side, Zoning};
use super::outcome::{Failed, FailureReason};
use super::surfaces::Chain;
use crate::fire::leakage::CRACK_DISCHARGE_COEFFICIENT;

/// Surfaces of a room: ceiling, upper half of the walls, lower half, floor.
pub(super) const SURFACES: usize = 4;
pub(super) const CEILING: usize = 0;
pub(super) const UPPER_WALL: usize = 1;
pub(super) const LOWER_WALL: usize = 2;
pub(super) const FLOOR: usize = 3;

/// A room, worked out.
#[derive(Clone, Debug)]
pub(super) struct RoomData {
    pub height_m: f64,
    pub floor_area_m2: f64,
    pub perimeter_m: f64,
    pub volume_m3: f64,
    pub floor_elevation_m: f64,
    pub length_m: f64,
    pub width_m: f64,
    pub mixed: bool,
    /// Area of each surface that takes heat, m²; nothing where the lining is not given.
    pub areas_m2: [f64; SURFACES],
    /// Chain of each surface, by its place in [`Building::chains`].
    pub chains: [Option<usize>; SURFACES],
    /// Where the nodes of each surface stand in the state.
    pub nodes: [usize; SURFACES],
    /// Mass of air at the start, kg.
    pub air_kg: f64,
}

/// A way for gas, worked out.
#[derive(Clone, Debug)]
pub(super) struct Vent {
    pub lie: Lie,
    /// Rooms on either side; none is outside.
    pub rooms: [Option<usize>; 2],
    /// Foot and head above the datum, m.
    pub bottom_m: f64,
    pub top_m: f64,
    /// Discharge coefficient times width of what is open, m, at full opening.
    pub open_width_m: f64,
    /// The same of the cracks when shut.
    pub crack_width_m: f64,
    /// Area at full opening, m².
    pub area_m2: f64,
    /// Pressure of the wind on its outer face, Pa.
    pub wind_pa: f64,
    /// Which opening; none is the leakage of a room.
    pub opening: Option<usize>,
}

impl Vent {
    /// Discharge coefficient times width, m, with a share standing open.
    #[inline]
    pub(super) fn effective_width_m(&self, open_fraction: f64) -> f64 {
        self.open_width_m * open_fraction + self.crack_width_m * (1.0 - open_fraction)
    }
}

/// A fuel with what it needs.
#[derive(Clone, Copy, Debug)]
pub(super) struct FuelData {
    pub fuel: Fuel,
    /// Oxygen it wants, kg/kg.
    pub oxygen_need: f64,
    /// Heat per oxygen, J/kg.
    pub heat_per_oxygen_j_kg: f64,
}

/// The building, worked out.
#[derive(Clone, Debug)]
pub(super) struct Building {
    pub rooms: Vec<RoomData>,
    pub vents: Vec<Vent>,
    pub chains: Vec<Chain>,
    pub fuels: Vec<FuelData>,
    pub ambient: Ambient,
    pub outside_density_kg_m3: f64,
    /// Mass fractions of outside air.
    pub outside_air: [f64; SPECIES_MAX],
    /// Species of a layer.
    pub species: usize,
    pub layout: Layout,
}

/// Where things stand in the state: rooms, then wall nodes, then the clocks of the fires, then the ledger.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) struct Layout {
    /// Numbers of one room.
    pub room: usize,
    /// Species of a layer.
    pub species: usize,
    /// First of the clocks.
    pub clocks: usize,
    /// First of the ledger.
    pub ledger: usize,
    /// All.
    pub len: usize,
}

impl Layout {
    /// Pressure of a room; then volume of its hot layer, mass of the hot, of the cool layer.
    #[inline]
    pub(super) fn pressure(&self, room: usize) -> usize {
        room * self.room
    }

    /// First species of a layer (0 hot, 1 cool).
    #[inline]
    pub(super) fn species_of(&self, room: usize, layer: usize) -> usize {
        room * self.room + 4 + layer * self.species
    }
}

/// Lines of the ledger, after what went outside of each species.
pub(super) mod ledger {
    /// Mass that went outside, kg.
    pub(in super::super) const MASS_OUT: usize = 0;
    /// Enthalpy that went outside with it, J.
    pub(in super::super) const ENTHALPY_OUT: usize = 1;
    /// Heat released, J.
    pub(in super::super) const RELEASED: usize = 2;
    /// Fuel given off, kg.
    pub(in super::super) const FUEL: usize = 3;
    /// Enthalpy that came with it, J.
    pub(in super::super) const FUEL_ENTHALPY: usize = 4;
    /// Heat lost through linings and by radiation to outside, J.
    pub(in super::super) const LOST: usize = 5;
    /// Where the species that went outside begin; then come the fuels given off, one by one.
    pub(in super::super) const SPECIES_OUT: usize = 6;
}

fn malformed(what: &'static str) -> Failed {
    Failed { at_s: 0.0, room: None, reason: FailureReason::Malformed(what) }
}

fn positive(value: f64, what: &'static str) -> Result<f64, Failed> {
    if value.is_finite() && value > 0.0 { Ok(value) } else { Err(malformed(what)) }
}

fn not_negative(value: f64, what: &'static str) -> Result<f64, Failed> {
    if value.is_finite() && value >= 0.0 { Ok(value) } else { Err(malformed(what)) }
}

impl Building {
    /// Works a network out.
    pub(super) fn new(network: &Network) -> Result<Self, Failed> {
        let ambient = network.ambient;
        positive(ambient.temperature_k, "outside temperature")?;
        positive(ambient.indoor_temperature_k, "indoor temperature")?;
        positive(ambient.pressure_pa, "air pressure")?;
        not_negative(ambient.oxygen_mass_fraction, "oxygen of the air")?;
        not_negative(ambient.water_mass_fraction, "water of the air")?;
        not_negative(ambient.wind_m_s, "wind")?;
        if !ambient.wind_from_deg.is_finite() {
            return Err(malformed("direction of the wind"));
        }
        if network.rooms.is_empty() {
            return Err(malformed("no room"));
        }
        if network.fuels.len() > FUELS_MAX {
            return Err(malformed("more fuels than a run may burn"));
        }
        let outside_density_kg_m3 = ambient.pressure_pa / (GAS_CONSTANT_J_KGK * ambient.temperature_k);
        let indoor_density_kg_m3 = ambient.pressure_pa / (GAS_CONSTANT_J_KGK * ambient.indoor_temperature_k);
        let fuels = network.fuels.iter().map(fuel_data).collect::<Result<Vec<_>, _>>()?;
        let species = PRODUCTS + fuels.len();
        let mut outside_air = [0.0; SPECIES_MAX];
        outside_air[OXYGEN] = ambient.oxygen_mass_fraction;
        outside_air[WATER] = ambient.water_mass_fraction;

        let open_area = opening_areas(network);
        let mut chains: Vec<Chain> = Vec::new();
        let mut known: Vec<&[super::network::Slab]> = Vec::new();
        let mut next = network.rooms.len() * (4 + 2 * species);
        let mut rooms = Vec::with_capacity(network.rooms.len());
        for (index, room) in network.rooms.iter().enumerate() {
            let mut data = room_data(room, &open_area[index], indoor_density_kg_m3)?;
            let sheets =
                [&room.linings.ceiling, &room.linings.walls, &room.linings.walls, &room.linings.floor];
            for (surface, slabs) in sheets.into_iter().enumerate() {
                if slabs.is_empty() || data.areas_m2[surface] <= 0.0 {
                    data.areas_m2[surface] = 0.0;
                    continue;
                }
                for slab in slabs {
                    positive(slab.thickness_m, "thickness of a lining")?;
                    positive(slab.conductivity_w_mk, "conductivity of a lining")?;
                    positive(slab.density_kg_m3, "density of a lining")?;
                    positive(slab.specific_heat_j_kgk, "specific heat of a lining")?;
                }
                let chain = known.iter().position(|k| *k == slabs.as_slice()).unwrap_or_else(|| {
                    known.push(slabs);
                    chains.push(Chain::new(slabs));
                    chains.len() - 1
                });
                data.chains[surface] = Some(chain);
                data.nodes[surface] = next;
                next += chains[chain].len();
            }
            rooms.push(data);
        }
        let clocks = next;
        let ledger = clocks + network.fires.len();
        let layout = Layout {
            room: 4 + 2 * species,
            species,
            clocks,
            ledger,
            len: ledger + ledger::SPECIES_OUT + species + fuels.len(),
        };
        let vents = vents(network, &rooms, outside_density_kg_m3)?;
        Ok(Self { rooms, vents, chains, fuels, ambient, outside_density_kg_m3, outside_air, species, layout })
    }

    /// The state before anything burns.
    pub(super) fn start(&self) -> Vec<f64> {
        // A layer must exist to grow: the hot one begins as a five-hundredth of the room.
        const FIRST_LAYER: f64 = 2e-3;

        let mut state = vec![0.0; self.layout.len];
        for (index, room) in self.rooms.iter().enumerate() {
            let share = if room.mixed { 0.5 } else { FIRST_LAYER };
            let at = self.layout.pressure(index);
            state[at + 1] = share * room.volume_m3;
            state[at + 2] = share * room.air_kg;
            state[at + 3] = (1.0 - share) * room.air_kg;
            for layer in 0..2 {
                let first = self.layout.species_of(index, layer);
                for species in 0..self.species {
                    state[first + species] = self.outside_air[species] * state[at + 2 + layer];
                }
            }
            for surface in 0..SURFACES {
                if let Some(chain) = room.chains[surface] {
                    let first = room.nodes[surface];
                    // Linings begin as warm as the air indoors, on the straight line to the air behind.
                    let nodes = &self.chains[chain];
                    state[first..first + nodes.len()].fill(self.ambient.indoor_temperature_k);
                }
            }
        }
        state
    }
}

fn fuel_data(fuel: &Fuel) -> Result<FuelData, Failed> {
    for share in [fuel.carbon, fuel.hydrogen, fuel.oxygen, fuel.nitrogen] {
        not_negative(share, "composition of a fuel")?;
    }
    for share in [fuel.carbon_monoxide_yield, fuel.soot_yield, fuel.hydrogen_cyanide_yield] {
        not_negative(share, "yield of a fuel")?;
    }
    let whole = fuel.carbon + fuel.hydrogen + fuel.oxygen + fuel.nitrogen;
    if (whole - 1.0).abs() > 1e-3 {
        return Err(malformed("elements of a fuel must add up to 1"));
    }
    positive(fuel.heat_of_combustion_kj_kg, "heat of combustion")?;
    let need = oxygen_need(fuel);
    if need < 0.05 {
        return Err(malformed("fuel that needs no oxygen"));
    }
    Ok(FuelData {
        fuel: *fuel,
        oxygen_need: need,
        heat_per_oxygen_j_kg: 1000.0 * fuel.heat_of_combustion_kj_kg / need,
    })
}

/// Area of openings in the upper and the lower half of the walls, in the ceiling and the floor, m².
fn opening_areas(network: &Network) -> Vec<[f64; SURFACES]> {
    let mut areas = vec![[0.0; SURFACES]; network.rooms.len()];
    for opening in &network.openings {
        let base_m = match opening.between[0] {
            Side::Room(first) => network.rooms.get(first).map_or(0.0, |r| r.floor_elevation_m),
            Side::Outside => match opening.between[1] {
                Side::Room(second) => network.rooms.get(second).map_or(0.0, |r| r.floor_elevation_m),
                Side::Outside => 0.0,
            },
        };
        for (end, side) in opening.between.iter().enumerate() {
            let Side::Room(index) = side else { continue };
            let Some(room) = network.rooms.get(*index) else { continue };
            match opening.lie {
                Lie::Horizontal => {
                    let surface = if end == 0 { CEILING } else { FLOOR };
                    areas[*index][surface] += opening.width_m * opening.height_m;
                }
                Lie::Vertical => {
                    let bottom = base_m + opening.sill_m - room.floor_elevation_m;
                    let middle = 0.5 * room.height_m;
                    let top = bottom + opening.height_m;
                    let below = (top.min(middle) - bottom).max(0.0);
                    areas[*index][LOWER_WALL] += opening.width_m * below;
                    areas[*index][UPPER_WALL] += opening.width_m * (opening.height_m - below);
                }
            }
        }
    }
    areas
}

fn room_data(room: &Room, open_m2: &[f64; SURFACES], density_kg_m3: f64) -> Result<RoomData, Failed> {
    let length_m = positive(room.length_m, "length of a room")?;
    let width_m = positive(room.width_m, "width of a room")?;
    let height_m = positive(room.height_m, "height of a room")?;
    if !room.floor_elevation_m.is_finite() {
        return Err(malformed("elevation of a floor"));
    }
    not_negative(room.leakage_low_m2, "leakage of a room")?;
    not_negative(room.leakage_high_m2, "leakage of a room")?;
    let floor_area_m2 = length_m * width_m;
    let perimeter_m = 2.0 * (length_m + width_m);
    let half_wall_m2 = 0.5 * perimeter_m * height_m;
    let volume_m3 = floor_area_m2 * height_m;
    // An opening larger than its wall is still an opening: a sliver of wall stays.
    let left = |whole: f64, open: f64| (whole - open).max(0.02 * whole);
    Ok(RoomData {
        height_m,
        floor_area_m2,
        perimeter_m,
        volume_m3,
        floor_elevation_m: room.floor_elevation_m,
        length_m,
        width_m,
        mixed: room.zoning == Zoning::Mixed,
        areas_m2: [
            left(floor_area_m2, open_m2[CEILING]),
            left(half_wall_m2, open_m2[UPPER_WALL]),
            left(half_wall_m2, open_m2[LOWER_WALL]),
            left(floor_area_m2, open_m2[FLOOR]),
        ],
        chains: [None; SURFACES],
        nodes: [0; SURFACES],
        air_kg: density_kg_m3 * volume_m3,
    })
}

fn vents(network: &Network, rooms: &[RoomData], outside_density_kg_m3: f64) -> Result<Vec<Vent>, Failed> {
    let mut vents = Vec::with_capacity(network.openings.len() + 2 * rooms.len());
    for (index, opening) in network.openings.iter().enumerate() {
        vents.push(opening_vent(network, opening, index, rooms, outside_density_kg_m3)?);
    }
    // Cracks low and high: bands of a twentieth of the height at floor and ceiling.
    const BAND: f64 = 0.05;
    for (index, room) in network.rooms.iter().enumerate() {
        let band_m = BAND * room.height_m;
        for (area_m2, bottom_m) in
            [(room.leakage_low_m2, 0.0), (room.leakage_high_m2, room.height_m - band_m)]
        {
            if area_m2 > 0.0 {
                vents.push(Vent {
                    lie: Lie::Vertical,
                    rooms: [Some(index), None],
                    bottom_m: room.floor_elevation_m + bottom_m,
                    top_m: room.floor_elevation_m + bottom_m + band_m,
                    open_width_m: 0.0,
                    crack_width_m: CRACK_DISCHARGE_COEFFICIENT * area_m2 / band_m,
                    area_m2: 0.0,
                    wind_pa: 0.0,
                    opening: None,
                });
            }
        }
    }
    Ok(vents)
}

fn opening_vent(
    network: &Network,
    opening: &Opening,
    index: usize,
    rooms: &[RoomData],
    outside_density_kg_m3: f64,
) -> Result<Vent, Failed> {
    let side = |side: Side| match side {
        Side::Outside => Ok(None),
        Side::Room(room) if room < rooms.len() => Ok(Some(room)),
        Side::Room(_) => Err(malformed("opening to a room that is not there")),
    };
    let ends = [side(opening.between[0])?, side(opening.between[1])?];
    let Some(base) = ends[0].or(ends[1]) else { return Err(malformed("opening that joins no room")) };
    if ends[0] == ends[1] {
        return Err(malformed("opening from a room to itself"));
    }
    let width_m = positive(opening.width_m, "width of an opening")?;
    let height_m = positive(opening.height_m, "height of an opening")?;
    not_negative(opening.sill_m, "sill of an opening")?;
    not_negative(opening.leakage_area_m2, "leakage of an opening")?;
    not_negative(opening.open_fraction, "open share of an opening")?;
    let way = &opening.gives_way;
    for value in [Some(way.open_fraction), way.gas_k, way.exposed_s, way.pressure_pa, opening.azimuth_deg] {
        if value.is_some_and(|value| !value.is_finite()) {
            return Err(malformed("number of an opening"));
        }
    }
    let coefficient = positive(opening.discharge_coefficient, "discharge coefficient")?;
    let floor_m = rooms[base].floor_elevation_m;
    let (bottom_m, top_m) = match opening.lie {
        Lie::Vertical => (floor_m + opening.sill_m, floor_m + opening.sill_m + height_m),
        // The first is the lower space: the opening lies in its ceiling, or under the floor of the
        // other where the lower space is outside.
        Lie::Horizontal => {
            let level = match ends[0] {
                Some(lower) => rooms[lower].floor_elevation_m + rooms[lower].height_m,
                None => floor_m,
            };
            (level, level)
        }
    };
    let extent_m = match opening.lie {
        Lie::Vertical => height_m,
        Lie::Horizontal => (width_m * height_m).sqrt(),
    };
    let area_m2 = width_m * height_m;
    Ok(Vent {
        lie: opening.lie,
        rooms: ends,
        bottom_m,
        top_m,
        open_width_m: coefficient * area_m2 / extent_m,
        crack_width_m: CRACK_DISCHARGE_COEFFICIENT * opening.leakage_area_m2 / extent_m,
        area_m2,
        wind_pa: wind_pressure_pa(&network.ambient, opening, outside_density_kg_m3),
        opening: Some(index),
    })
}

/// Pressure of the wind on the outer face of an opening, Pa: `Cp ρ u²/2`.
///
/// `Cp` runs from 0.7 on the side the wind meets to -0.5 beside and -0.3 behind. Common practice for low
/// buildings standing free.
fn wind_pressure_pa(ambient: &Ambient, opening: &Opening, density_kg_m3: f64) -> f64 {
    let Some(azimuth_deg) = opening.azimuth_deg else { return 0.0 };
    let meets = (ambient.wind_from_deg - azimuth_deg).to_radians().cos();
    let coefficient = if meets >= 0.0 { -0.5 + 1.2 * meets } else { -0.5 - 0.2 * meets };
    0.5 * coefficient * density_kg_m3 * ambient.wind_m_s * ambient.wind_m_s
}
