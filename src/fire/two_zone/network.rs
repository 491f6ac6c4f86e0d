//! What a run is given: rooms, openings, fires, devices, outside air.

/// A building as the engine sees it. Indices join its parts: a fire names its room by its place in
/// [`rooms`](Network::rooms).
#[derive(Clone, Debug, PartialEq, Default)]
pub struct Network {
    /// Rooms.
    pub rooms: Vec<Room>,
    /// Openings between rooms, or between a room and the outside.
    pub openings: Vec<Opening>,
    /// Fuels that the fires burn.
    pub fuels: Vec<Fuel>,
    /// Fires, alight or waiting.
    pub fires: Vec<Fire>,
    /// Fans.
    pub fans: Vec<Fan>,
    /// Detectors.
    pub detectors: Vec<Detector>,
    /// Sprinklers.
    pub sprinklers: Vec<Sprinkler>,
    /// Outside air, and the air indoors before the fire.
    pub ambient: Ambient,
    /// Openings moved by hand at a time.
    pub schedule: Vec<Move>,
}

/// One room: a box.
#[derive(Clone, Debug, PartialEq)]
pub struct Room {
    /// Length, m.
    pub length_m: f64,
    /// Width, m.
    pub width_m: f64,
    /// Height, m.
    pub height_m: f64,
    /// Height of its floor above the datum of the building, m.
    pub floor_elevation_m: f64,
    /// Leakage to outside near the floor, m².
    pub leakage_low_m2: f64,
    /// Leakage to outside near the ceiling, m².
    pub leakage_high_m2: f64,
    /// What bounds it.
    pub linings: Linings,
    /// How its air is described.
    pub zoning: Zoning,
}

/// How the air of a room is described.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Default)]
pub enum Zoning {
    /// A hot layer over a cool one.
    #[default]
    TwoLayers,
    /// One mixed zone: shafts and stairs.
    Mixed,
}

/// Linings of a room; each from the room side outwards.
#[derive(Clone, Debug, PartialEq, Default)]
pub struct Linings {
    /// Ceiling. Empty: no heat passes.
    pub ceiling: Vec<Slab>,
    /// Walls. Empty: no heat passes.
    pub walls: Vec<Slab>,
    /// Floor. Empty: no heat passes.
    pub floor: Vec<Slab>,
}

/// One sheet of a lining.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Slab {
    /// Thickness, m.
    pub thickness_m: f64,
    /// Conductivity, W/(m K).
    pub conductivity_w_mk: f64,
    /// Density, kg/m³.
    pub density_kg_m3: f64,
    /// Specific heat, J/(kg K).
    pub specific_heat_j_kgk: f64,
}

/// One end of an opening, a fan.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Side {
    /// A room, by its index.
    Room(usize),
    /// Outside air.
    Outside,
}

/// An opening.
#[derive(Clone, Debug, PartialEq)]
pub struct Opening {
    /// How it lies.
    pub lie: Lie,
    /// What it joins. Heights are above the floor of the first; of a horizontal one the first is the
    /// lower space.
    pub between: [Side; 2],
    /// Width, m; of a horizontal one the first side.
    pub width_m: f64,
    /// Height, m; of a horizontal one the second side.
    pub height_m: f64,
    /// Sill above the floor of the first room, m. A horizontal one lies in its ceiling.
    pub sill_m: f64,
    /// Share that stands open at the start, 0 to 1.
    pub open_fraction: f64,
    /// What it leaks when shut, m², over its whole height.
    pub leakage_area_m2: f64,
    /// Discharge coefficient of the open part.
    pub discharge_coefficient: f64,
    /// Direction its outer face looks to, degrees from north; none: sheltered from wind.
    pub azimuth_deg: Option<f64>,
    /// When it gives way by itself; any one is enough.
    pub gives_way: GivesWay,
}

/// Does an opening stand in a wall or lie in a ceiling?
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Lie {
    /// In a wall.
    Vertical,
    /// In a ceiling or floor.
    Horizontal,
}

/// When a shut opening gives way; it then stands open.
#[derive(Clone, Copy, Debug, PartialEq, Default)]
pub struct GivesWay {
    /// Gas of the hot layer of either room reaches this, K (glass).
    pub gas_k: Option<f64>,
    /// Fire gas of more than 573 K stands against it for this long, s (a door that burns through).
    pub exposed_s: Option<f64>,
    /// Pressure across it, Pa.
    pub pressure_pa: Option<f64>,
    /// Share that then stands open, 0 to 1.
    pub open_fraction: f64,
}

/// A fuel, by mass fractions of its elements.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Fuel {
    /// Carbon, kg/kg.
    pub carbon: f64,
    /// Hydrogen, kg/kg.
    pub hydrogen: f64,
    /// Oxygen, kg/kg.
    pub oxygen: f64,
    /// Nitrogen and what else does not burn, kg/kg.
    pub nitrogen: f64,
    /// Heat of combustion with all the air it wants, kJ/kg of fuel gas.
    pub heat_of_combustion_kj_kg: f64,
    /// Carbon monoxide with all the air it wants, kg/kg.
    pub carbon_monoxide_yield: f64,
    /// Soot with all the air it wants, kg/kg.
    pub soot_yield: f64,
    /// Hydrogen cyanide when starved of air, kg/kg.
    pub hydrogen_cyanide_yield: f64,
}

/// A fire.
#[derive(Clone, Debug, PartialEq)]
pub struct Fire {
    /// Room, by index.
    pub room: usize,
    /// Fuel, by index.
    pub fuel: usize,
    /// Heat release with all the air it wants, from its ignition on.
    pub heat_release: HeatRelease,
    /// Height of its base above the floor, m.
    pub base_height_m: f64,
    /// Diameter, m; of a growing fire at its greatest.
    pub diameter_m: f64,
    /// Where it stands.
    pub position: Position,
    /// Share of the heat that the flame radiates.
    pub radiative_fraction: f64,
    /// False: burns as told whatever the oxygen.
    pub oxygen_limited: bool,
    /// How the fuel answers to want of air.
    pub supply: Supply,
    /// What lights it.
    pub ignites: Ignition,
}

/// Where a fire stands.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Default)]
pub enum Position {
    /// Free.
    #[default]
    Centre,
    /// Against a wall.
    Wall,
    /// In a corner.
    Corner,
}

/// Heat release with all the air it wants, against the time since ignition.
#[derive(Clone, Debug, PartialEq)]
pub enum HeatRelease {
    /// Straight lines between points (s, kW); the last holds on. Times never fall.
    Points(Vec<(f64, f64)>),
    /// Growing with t², held at a peak, falling to nothing.
    Grown(crate::fire::DesignFire),
}

/// How the fuel answers when the flame gets less air than it wants.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Supply {
    /// Fuel comes as told, burnt or not: a burner.
    Fed,
    /// A solid or a pool: it gives less when the flame weakens and keeps what it did not give.
    HeatFed {
        /// Share that goes on without flame, of what the flame drew.
        without_flame: f64,
        /// Time in which that share falls to 1/e, s.
        fades_s: f64,
    },
}

/// What lights a fire.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Ignition {
    /// A time, s.
    At(f64),
    /// Heat received at the floor of its room, kW/m².
    Flux(f64),
    /// Surface of the ceiling lining, K.
    SurfaceTemperature(f64),
}

/// A fan: moves a volume whatever the fire does, until the pressure against it is too high.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Fan {
    /// Draws from.
    pub from: Side,
    /// Blows to.
    pub to: Side,
    /// Volume flow, m³/s.
    pub volume_flow_m3_s: f64,
    /// Height of the inlet above the floor of the room it draws from, m.
    pub inlet_height_m: f64,
    /// Height of the outlet above the floor of the room it blows to, m.
    pub outlet_height_m: f64,
    /// Pressure that stops it, Pa.
    pub stall_pa: f64,
    /// When it starts, s.
    pub starts_s: f64,
    /// When it stops, s.
    pub stops_s: f64,
}

/// A detector below a ceiling.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Detector {
    /// Room, by index.
    pub room: usize,
    /// Distance from the axis of the fire along the ceiling, m.
    pub from_fire_m: f64,
    /// What makes it answer.
    pub element: Element,
}

/// What makes a detector or a head answer.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Element {
    /// Gas at the ceiling this much warmer than at the start, K (smoke, by the usual stand-in).
    Rise(f64),
    /// A heated element.
    Heat {
        /// Response time index, √(m s).
        rti_m05s05: f64,
        /// Temperature at which it answers, K.
        answers_k: f64,
    },
}

/// A sprinkler head.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Sprinkler {
    /// Where and what it is.
    pub head: Detector,
    /// Water on the floor, mm/s (kg/(m² s)).
    pub density_mm_s: f64,
}

/// Outside air, and the air indoors before the fire.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Ambient {
    /// Outside, K.
    pub temperature_k: f64,
    /// Indoors at the start, K.
    pub indoor_temperature_k: f64,
    /// Pressure at the datum, Pa.
    pub pressure_pa: f64,
    /// Oxygen of the air, kg/kg.
    pub oxygen_mass_fraction: f64,
    /// Water vapour of the air, kg/kg.
    pub water_mass_fraction: f64,
    /// Wind, m/s.
    pub wind_m_s: f64,
    /// Where it blows from, degrees from north.
    pub wind_from_deg: f64,
}

impl Default for Ambient {
    fn default() -> Self {
        Self {
            temperature_k: crate::fire::constants::AMBIENT_K,
            indoor_temperature_k: crate::fire::constants::AMBIENT_K,
            pressure_pa: 101_325.0,
            oxygen_mass_fraction: crate::fire::constants::OXYGEN_IN_AIR_MASS_FRACTION,
            water_mass_fraction: 0.0,
            wind_m_s: 0.0,
            wind_from_deg: 0.0,
        }
    }
}

/// An opening moved at a time.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Move {
    /// When, s.
    pub at_s: f64,
    /// Opening, by index.
    pub opening: usize,
    /// Share that then stands open, 0 to 1.
    pub open_fraction: f64,
}
