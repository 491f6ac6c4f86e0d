//! Quantities: a number with a unit and physical limits, checked on construction.

use std::fmt;
use std::marker::PhantomData;

use super::units::{self, Unreadable};

/// What a quantity measures: its name in the OpenAPI document, its unit, its limits.
pub trait Kind: Copy + std::fmt::Debug + 'static {
    /// Name of the schema, e.g. `RoomLength`.
    const NAME: &'static str;
    /// Unit in which the number stands, as people write it, e.g. `m`.
    const UNIT: &'static str;
    /// Least lawful value.
    const MIN: f64;
    /// Greatest lawful value.
    const MAX: f64;
    /// Why the limits stand where they do.
    const LIMITS_BECAUSE: &'static str;
}

/// A finite number within the limits of its kind.
#[derive(Debug, Clone, Copy, PartialEq, PartialOrd)]
pub struct Quantity<K: Kind>(f64, PhantomData<K>);

impl<K: Kind> Quantity<K> {
    /// Checks the limits; NaN and infinities are outside them.
    pub fn new(value: f64) -> Option<Self> {
        // Adding zero turns the negative zero into the other: they are the same quantity.
        (K::MIN..=K::MAX).contains(&value).then_some(Self(value + 0.0, PhantomData))
    }

    /// The number, in the kind's unit.
    pub fn get(self) -> f64 {
        self.0
    }

    /// Reads a text with a unit, such as `12 ft 6 in`.
    pub fn parse(text: &str) -> Result<Self, Fault> {
        let value = units::read(text, K::UNIT).map_err(Fault::Unreadable)?;
        Self::new(value).ok_or(Fault::OutOfRange(value))
    }
}

/// The number and its unit, shortest form that reads back as the same quantity.
impl<K: Kind> fmt::Display for Quantity<K> {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(f, "{}{}", self.0, Spaced(K::UNIT))
    }
}

struct Spaced(&'static str);

impl fmt::Display for Spaced {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        let space = if self.0.is_empty() { "" } else { " " };
        write!(f, "{space}{}", self.0)
    }
}

/// Why a text is no quantity of its kind.
#[derive(Debug, Clone, PartialEq)]
pub enum Fault {
    /// It cannot be read.
    Unreadable(Unreadable),
    /// It was read as this number of the kind's unit, which is outside the limits.
    OutOfRange(f64),
}

macro_rules! kinds {
    ($($(#[$meta:meta])* $alias:ident = $kind:ident, $unit:literal, $min:literal ..= $max:literal, $because:literal;)*) => {$(
        #[doc = concat!("Kind of [`", stringify!($alias), "`].")]
        #[derive(Debug, Clone, Copy, PartialEq, PartialOrd)]
        pub struct $kind;
        impl Kind for $kind {
            const NAME: &'static str = stringify!($alias);
            const UNIT: &'static str = $unit;
            const MIN: f64 = $min;
            const MAX: f64 = $max;
            const LIMITS_BECAUSE: &'static str = $because;
        }
        $(#[$meta])*
        #[doc = concat!("\n\nFrom ", stringify!($min), " to ", stringify!($max), " ", $unit, ": ", $because, ". The limits are ours.")]
        pub type $alias = Quantity<$kind>;
    )*};
}

kinds! {
    /// Length or width of a room.
    RoomLength = RoomLengthKind, "m", 0.3..=1000.0, "from a riser cupboard to the longest hall";
    /// Height of a room.
    RoomHeight = RoomHeightKind, "m", 0.3..=150.0, "from a crawl space to an atrium or shaft";
    /// Floor area of a room given by area and perimeter.
    FloorArea = FloorAreaKind, "m2", 0.09..=1000000.0, "the square of the length's limits";
    /// Perimeter of a room given by area and perimeter.
    Perimeter = PerimeterKind, "m", 1.2..=20000.0, "four times the length's limits and some";
    /// Width or height of an opening.
    OpeningSide = OpeningSideKind, "m", 0.01..=100.0, "from a gap to a hangar door";
    /// Height of an opening's lower edge above the floor.
    Sill = SillKind, "m", 0.0..=150.0, "no higher than a room can be";
    /// Elevation of a floor above the entrance level.
    Elevation = ElevationKind, "m", -500.0..=1000.0, "deepest station to tallest tower";
    /// Position on the plan.
    PlanOffset = PlanOffsetKind, "m", -100000.0..=100000.0, "a site";
    /// An angle.
    Angle = AngleKind, "deg", -360.0..=360.0, "one turn either way";
    /// Height above the floor or below the ceiling, or a distance inside a room.
    Distance = DistanceKind, "m", 0.0..=1000.0, "no farther than a room is long";
    /// A leakage area.
    LeakageArea = LeakageAreaKind, "m2", 0.0..=100.0, "beyond it, it is an opening";
    /// A mechanical air flow.
    AirFlow = AirFlowKind, "m3/s", 0.0..=1000.0, "smoke extraction of a large hall";
    /// Thickness of a lining.
    Thickness = ThicknessKind, "m", 0.0001..=5.0, "from paint to a fortress wall";
    /// Heat of the contents per floor area.
    FireLoadDensity = FireLoadDensityKind, "MJ/m2", 0.0..=100000.0, "high racks full of plastics";
    /// Mass of a fuel package.
    Mass = MassKind, "kg", 0.0..=1000000.0, "a lorry load and more";
    /// Share between nothing and all.
    Fraction = FractionKind, "", 0.0..=1.0, "a share of one";
    /// A span of time.
    Span = SpanKind, "s", 0.0..=86400.0, "one day";
    /// A flow of water.
    WaterFlow = WaterFlowKind, "L/min", 0.0..=1000000.0, "a fire main and more";
    /// A fire resistance.
    FireRating = FireRatingKind, "min", 0.0..=480.0, "eight hours";
    /// A temperature.
    Temperature = TemperatureKind, "C", -60.0..=1500.0, "climate to flame";
    /// A wind speed.
    WindSpeed = WindSpeedKind, "m/s", 0.0..=60.0, "up to a hurricane";
    /// Heat release of a fire.
    HeatRelease = HeatReleaseKind, "kW", 0.0..=500000.0, "up to a burning warehouse";
    /// Heat that a fuel can give.
    FuelEnergy = FuelEnergyKind, "MJ", 0.001..=5000000.0, "from a match to a full warehouse";
    /// Growth coefficient of a t² fire.
    FireGrowth = FireGrowthKind, "kW/s2", 0.0001..=50.0, "from smouldering to a dropped match in petrol";
    /// Heat received per area.
    HeatFlux = HeatFluxKind, "kW/m2", 0.1..=500.0, "from warmth on the skin to the inside of a flame";
    /// Diameter of a fire's base.
    FireDiameter = FireDiameterKind, "m", 0.01..=100.0, "from a burner to a hall on fire";
    /// Share of its heat that a flame radiates.
    RadiativeFraction = RadiativeFractionKind, "", 0.0..=0.9, "some heat must rise with the plume";
    /// Temperature of air outside, or indoors before the fire.
    AirTemperature = AirTemperatureKind, "C", -60.0..=80.0, "from polar night to an attic in the sun";
    /// Pressure of outside air.
    AirPressure = AirPressureKind, "Pa", 30000.0..=110000.0, "from the highest mountain to the Dead Sea";
    /// Oxygen in air, by mass.
    OxygenShare = OxygenShareKind, "", 0.05..=0.35, "from inerted rooms to enriched ones";
    /// Water vapour in air, by mass.
    WaterShare = WaterShareKind, "", 0.0..=0.05, "from dry to tropical";
    /// Length of a transient run.
    RunTime = RunTimeKind, "s", 1.0..=86400.0, "a second to a day";
    /// Time between two outputs of a transient run.
    OutputInterval = OutputIntervalKind, "s", 0.01..=86400.0, "a hundredth of a second to a day";
    /// Relative tolerance of a transient run.
    Tolerance = ToleranceKind, "", 0.000001..=0.01, "from far finer than the physics to about 10 K";
    /// A pressure difference.
    PressureDifference = PressureDifferenceKind, "Pa", 1.0..=1000000.0, "from a draught to a blast";
    /// Water on the floor from sprinklers.
    SprayDensity = SprayDensityKind, "mm/s", 0.001..=5.0, "from mist to more than any design";
    /// Discharge coefficient of an opening.
    DischargeCoefficient = DischargeCoefficientKind, "", 0.1..=1.0, "from a grille to a nozzle";
    /// A longitude.
    Longitude = LongitudeKind, "deg", -180.0..=180.0, "the globe";
    /// A latitude.
    Latitude = LatitudeKind, "deg", -90.0..=90.0, "the globe";
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn both_ends_of_the_limits_are_lawful_and_nothing_beyond() {
        for (value, lawful) in [
            (0.3, true),
            (1000.0, true),
            (0.299_999, false),
            (1_000.000_1, false),
            (0.0, false),
            (-3.0, false),
            (1e9, false),
            (f64::NAN, false),
            (f64::INFINITY, false),
            (f64::NEG_INFINITY, false),
        ] {
            assert_eq!(RoomLength::new(value).is_some(), lawful, "{value}");
        }
    }

    #[test]
    fn there_is_one_zero() {
        let zero = Elevation::new(-0.0).unwrap();

        assert!(zero.get().is_sign_positive());
        assert_eq!(zero.to_string(), "0 m");
    }

    #[test]
    fn a_quantity_prints_with_its_unit() {
        assert_eq!(RoomLength::new(3.66).unwrap().to_string(), "3.66 m");
        assert_eq!(Fraction::new(0.25).unwrap().to_string(), "0.25");
        assert_eq!(Temperature::parse("68 F").unwrap().to_string(), "20 C");
    }
}
