//! A transient run as it is asked for: rooms, openings, fires, devices, air, and how to run.
//!
//! Nothing is taken from a room's use here: what is not given is not there.

use super::ids::Key;
use super::named::Named;
use super::opening::{OpeningKind, Space};
use super::properties::{DetectorProperties, FuelProperties, MaterialProperties, SprinklerProperties};
use super::quantity::{
    AirFlow, AirPressure, AirTemperature, Angle, DischargeCoefficient, Distance, Elevation, FireDiameter,
    FireGrowth, Fraction, FuelEnergy, HeatFlux, LeakageArea, OpeningSide, OutputInterval, OxygenShare,
    PressureDifference, RadiativeFraction, RoomHeight, RoomLength, RunTime, Sill, Span, SprayDensity,
    Temperature, Thickness, Tolerance, WaterShare, WindSpeed,
};
use super::room::Place;

pub mod check;

/// Most rooms of a run.
pub const MAX_ROOMS: usize = 100;
/// Most openings of a run.
pub const MAX_OPENINGS: usize = 400;
/// Most times at which a run gives its state, the start and the end among them.
pub const MAX_OUTPUT_TIMES: usize = 10_000;
/// Most numbers in the series of an answer.
pub const MAX_NUMBERS: usize = 2_000_000;
/// Series that an answer gives of each room.
pub const SERIES_OF_A_ROOM: usize = 15;
/// Series that an answer gives of each opening.
pub const SERIES_OF_AN_OPENING: usize = 4;

/// A transient run, checked.
#[derive(Debug, Clone, PartialEq)]
pub struct Simulation {
    /// Rooms, 1 to [`MAX_ROOMS`].
    pub rooms: Vec<Room>,
    /// Openings, at most [`MAX_OPENINGS`].
    pub openings: Vec<Opening>,
    /// Air outside, and indoors before the fire.
    pub ambient: Ambient,
    /// Fires.
    pub fires: Vec<Fire>,
    /// Openings moved at a time.
    pub schedule: Vec<Move>,
    /// Fans.
    pub fans: Vec<Fan>,
    /// Detectors.
    pub detectors: Vec<Detector>,
    /// Sprinkler heads.
    pub sprinklers: Vec<Sprinkler>,
    /// When it ends.
    pub duration_s: RunTime,
    /// From one output to the next.
    pub output_interval_s: OutputInterval,
    /// Relative tolerance of a step; the engine's own where absent.
    pub tolerance: Option<Tolerance>,
}

/// A room: a box.
#[derive(Debug, Clone, PartialEq)]
pub struct Room {
    /// Unique among the rooms.
    pub key: Key,
    /// Length.
    pub length_m: RoomLength,
    /// Width.
    pub width_m: RoomLength,
    /// Height.
    pub height_m: RoomHeight,
    /// Height of its floor above the datum.
    pub floor_elevation_m: Elevation,
    /// Leakage to outside.
    pub leakage_area_m2: LeakageArea,
    /// Where the leakage lies.
    pub leakage_split: LeakageSplit,
    /// What bounds it.
    pub linings: Linings,
    /// How its air is described.
    pub zoning: Zoning,
}

/// Shares of a room's leakage near the floor and near the ceiling; together one.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct LeakageSplit {
    /// Near the floor.
    pub low: Fraction,
    /// Near the ceiling.
    pub high: Fraction,
}

/// How the air of a room is described.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub enum Zoning {
    /// A hot layer over a cool one.
    #[default]
    TwoLayers,
    /// One mixed zone: shafts and stairs.
    Mixed,
}

/// Linings of a room, each from the room side outwards; through an empty one no heat passes.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct Linings {
    /// Walls.
    pub walls: Vec<Sheet>,
    /// Ceiling.
    pub ceiling: Vec<Sheet>,
    /// Floor.
    pub floor: Vec<Sheet>,
}

/// One sheet of a lining.
#[derive(Debug, Clone, PartialEq)]
pub struct Sheet {
    /// What it is made of.
    pub material: Named<MaterialProperties>,
    /// Thickness; the material's usual one where absent.
    pub thickness_m: Option<Thickness>,
}

/// An opening.
#[derive(Debug, Clone, PartialEq)]
pub struct Opening {
    /// Unique among the openings.
    pub key: Key,
    /// What sort.
    pub kind: OpeningKind,
    /// The two spaces; of a horizontal opening the first is the lower.
    pub connects: [Space; 2],
    /// Width.
    pub width_m: OpeningSide,
    /// Height, or the second side of a horizontal opening.
    pub height_m: OpeningSide,
    /// Lower edge above the floor of the first space.
    pub sill_m: Sill,
    /// Share of the area that stands open at the start.
    pub open_fraction: Fraction,
    /// What it leaks when shut.
    pub leakage_area_m2: LeakageArea,
    /// Where its outer face looks, degrees clockwise from north; sheltered from wind where absent.
    pub azimuth_deg: Option<Angle>,
    /// Discharge coefficient of the open part; the usual one where absent.
    pub discharge_coefficient: Option<DischargeCoefficient>,
    /// When it gives way by itself.
    pub gives_way: Option<GivesWay>,
}

/// When a shut opening gives way; any one of the three is enough.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct GivesWay {
    /// Hot layer beside it reaches this temperature (glass).
    pub gas_temperature_c: Option<Temperature>,
    /// Fire gas has stood against it for so long (a door that burns through).
    pub exposed_s: Option<Span>,
    /// Pressure across it reaches this.
    pub pressure_pa: Option<PressureDifference>,
    /// Share that then stands open.
    pub open_fraction: Fraction,
}

/// Air outside, and indoors before the fire.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Ambient {
    /// Temperature outside.
    pub temperature_c: AirTemperature,
    /// Temperature indoors at the start; that outside where absent.
    pub indoor_temperature_c: Option<AirTemperature>,
    /// Pressure at the datum.
    pub pressure_pa: AirPressure,
    /// Oxygen, by mass.
    pub oxygen_mass_fraction: OxygenShare,
    /// Water vapour, by mass.
    pub water_mass_fraction: WaterShare,
    /// Wind speed.
    pub wind_m_s: WindSpeed,
    /// Where the wind comes from, degrees clockwise from north.
    pub wind_from_deg: Angle,
}

impl Default for Ambient {
    fn default() -> Self {
        const LAWFUL: &str = "the value lies within the limits of its kind";
        Self {
            temperature_c: AirTemperature::new(20.0).expect(LAWFUL),
            indoor_temperature_c: None,
            pressure_pa: AirPressure::new(101_325.0).expect(LAWFUL),
            oxygen_mass_fraction: OxygenShare::new(0.232).expect(LAWFUL),
            water_mass_fraction: WaterShare::new(0.0).expect(LAWFUL),
            wind_m_s: WindSpeed::new(0.0).expect(LAWFUL),
            wind_from_deg: Angle::new(0.0).expect(LAWFUL),
        }
    }
}

/// A fire.
#[derive(Debug, Clone, PartialEq)]
pub struct Fire {
    /// Unique among the fires.
    pub key: Key,
    /// Its room.
    pub room: Key,
    /// Heat release with all the air it wants, since it was lit.
    pub heat_release: HeatRelease,
    /// Height of its base above the floor.
    pub base_height_m: Distance,
    /// Diameter of its base.
    pub diameter_m: FireDiameter,
    /// Where it stands.
    pub position: Place,
    /// Share of the heat that the flame radiates; the fuel's where absent.
    pub radiative_fraction: Option<RadiativeFraction>,
    /// What burns.
    pub fuel: Named<FuelProperties>,
    /// Whether want of oxygen holds it back.
    pub oxygen_limited: bool,
    /// How the fuel answers when the flame weakens.
    pub supply: Supply,
    /// What lights it.
    pub ignites: Ignition,
}

/// Heat release with all the air the fire wants.
#[derive(Debug, Clone, PartialEq)]
pub enum HeatRelease {
    /// Straight lines between points (s, kW); times never fall, nothing burns before the first, the
    /// last holds on.
    Points(Vec<(f64, f64)>),
    /// Growing with t², held at a peak, ended by its fuel.
    Grown(Growth),
}

/// A t² fire.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Growth {
    /// Growth coefficient.
    pub growth_kw_s2: FireGrowth,
    /// Highest heat release.
    pub peak_kw: super::quantity::HeatRelease,
    /// Heat in the fuel.
    pub energy_mj: FuelEnergy,
}

/// The two ways in which fuel comes.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub enum SupplyKind {
    /// As told, burnt or not: a burner.
    #[default]
    Fed,
    /// Less when the flame weakens; what did not come is kept: a solid, a pool.
    HeatFed,
}

/// How the fuel answers when the flame gets less air than it wants.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Supply {
    /// As told, burnt or not.
    Fed,
    /// Less when the flame weakens.
    HeatFed {
        /// Share that goes on coming without a flame.
        after_flame_share: Fraction,
        /// Time in which that share falls to 1/e.
        after_flame_fades_s: Span,
    },
}

/// What lights a fire.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Ignition {
    /// A time.
    At(Span),
    /// Heat received at the floor of its room.
    Flux(HeatFlux),
    /// Temperature of the ceiling's surface.
    Surface(Temperature),
}

/// An opening moved at a time.
#[derive(Debug, Clone, PartialEq)]
pub struct Move {
    /// When.
    pub at_s: Span,
    /// Which.
    pub opening: Key,
    /// Share that then stands open.
    pub open_fraction: Fraction,
}

/// A fan.
#[derive(Debug, Clone, PartialEq)]
pub struct Fan {
    /// Unique among the fans.
    pub key: Key,
    /// Draws from.
    pub from: Space,
    /// Blows to.
    pub to: Space,
    /// Volume it moves.
    pub volume_flow_m3_s: AirFlow,
    /// Inlet above the floor of the room it draws from; half its height where absent.
    pub inlet_height_m: Option<Distance>,
    /// Outlet above the floor of the room it blows to; half its height where absent.
    pub outlet_height_m: Option<Distance>,
    /// Pressure that stops it; none does where absent.
    pub stall_pa: Option<PressureDifference>,
    /// When it starts.
    pub starts_s: Span,
    /// When it stops; never where absent.
    pub stops_s: Option<Span>,
}

/// A detector below a ceiling.
#[derive(Debug, Clone, PartialEq)]
pub struct Detector {
    /// Unique among the detectors.
    pub key: Key,
    /// Its room.
    pub room: Key,
    /// What it is.
    pub class: Named<DetectorProperties>,
    /// Distance from the axis of the fire, seen from above; half the room's diagonal where absent.
    pub from_fire_m: Option<Distance>,
}

/// A sprinkler head below a ceiling.
#[derive(Debug, Clone, PartialEq)]
pub struct Sprinkler {
    /// Unique among the heads.
    pub key: Key,
    /// Its room.
    pub room: Key,
    /// What it is.
    pub class: Named<SprinklerProperties>,
    /// Distance from the axis of the fire, seen from above; half the room's diagonal where absent.
    pub from_fire_m: Option<Distance>,
    /// Water on the floor; the class's where absent.
    pub spray_density_mm_s: Option<SprayDensity>,
}

impl Simulation {
    /// How many times an answer has, without making them.
    pub fn output_times(&self) -> usize {
        let steps = self.duration_s.get() / self.output_interval_s.get();
        // Rounding must not add a step that ends where the run does.
        #[expect(clippy::cast_possible_truncation, reason = "at most a day in hundredths of a second")]
        #[expect(clippy::cast_sign_loss, reason = "both are above zero")]
        let whole = (steps * (1.0 - ROUNDING)).ceil() as usize;
        whole + 1
    }

    /// 0, one interval, two intervals and so on, and the end.
    pub fn times_s(&self) -> Vec<f64> {
        let (interval_s, end_s) = (self.output_interval_s.get(), self.duration_s.get());
        let mut times_s: Vec<f64> = (0_u32..)
            .map(|step| without_dust(f64::from(step) * interval_s))
            .take(self.output_times() - 1)
            .collect();
        times_s.push(end_s);
        times_s
    }

    /// How many numbers the series of an answer hold.
    pub fn numbers(&self) -> usize {
        let series = 1 + SERIES_OF_A_ROOM * self.rooms.len() + SERIES_OF_AN_OPENING * self.openings.len();
        series.saturating_mul(self.output_times())
    }
}

/// Share by which a number of intervals may miss a whole number.
const ROUNDING: f64 = 1e-9;

/// A time to the nanosecond: three tenths, not 0.30000000000000004.
fn without_dust(time_s: f64) -> f64 {
    const PER_SECOND: f64 = 1e9;
    (time_s * PER_SECOND).round() / PER_SECOND
}

#[cfg(test)]
mod tests;
