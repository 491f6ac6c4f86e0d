//! Water that is asked for to fight a fire, by formulas that mean different things.

use super::Exceeded;

const LITRES_PER_GALLON: f64 = 3.785_411_784;
const CUBIC_METRES_PER_CUBIC_FOOT: f64 = 0.028_316_846_592;
const SQUARE_METRES_PER_SQUARE_FOOT: f64 = 0.092_903_04;

/// Rate that fills the largest single space with steam in about half a minute, in L/min, by Royer and Nelson (Iowa).
///
/// ```text
/// Q[gpm] = V[ft³] / 100          Q[L/min] = 1.3368 V[m³]
/// ```
///
/// | symbol | argument    | unit |
/// |--------|-------------|------|
/// | `V`    | `volume_m3` | m³   |
///
/// What it means: one knock-down of a shut, unvented space, from a few nozzles placed right, not a
/// supply for the whole fight. Range: one undivided space.
///
/// Source: [`ROYER_NELSON_1959`](crate::fire::sources::ROYER_NELSON_1959).
///
/// ```
/// use sootline::fire::fire_flow::royer_nelson_l_min;
///
/// // Published: 50 × 75 × 12 ft, 450 gpm; by hand 450 · 3.785412 = 1703.4 L/min.
/// let volume_m3 = 50.0 * 75.0 * 12.0 * 0.3048_f64.powi(3);
/// assert!((royer_nelson_l_min(volume_m3) - 1703.4).abs() < 0.1);
/// ```
#[must_use]
pub fn royer_nelson_l_min(volume_m3: f64) -> f64 {
    LITRES_PER_GALLON / CUBIC_METRES_PER_CUBIC_FOOT / 100.0 * volume_m3.max(0.0)
}

/// Rate for an interior attack on the part of a floor that burns, in L/min, by the National Fire Academy.
///
/// ```text
/// Q[gpm] = (L W / 3) f           Q[L/min] = 13.58 A[m²] f
/// ```
///
/// | symbol | argument         | unit |
/// |--------|------------------|------|
/// | `A`    | `floor_area_m2`  | m²   |
/// | `f`    | `involved_share` | -    |
///
/// What it means: hose streams of an offensive attack inside, on one floor. Each exposed building adds a
/// quarter of the rate for full involvement. Range: see [`nfa_limits`].
///
/// Source: [`NFA_FORMULA`](crate::fire::sources::NFA_FORMULA).
///
/// ```
/// use sootline::fire::fire_flow::nfa_l_min;
///
/// // Published: 30 × 50 ft, a quarter involved, 125 gpm; by hand 125 · 3.785412 = 473.2 L/min.
/// let area_m2 = 30.0 * 50.0 * 0.3048_f64.powi(2);
/// assert!((nfa_l_min(area_m2, 0.25) - 473.2).abs() < 0.1);
/// ```
#[must_use]
pub fn nfa_l_min(floor_area_m2: f64, involved_share: f64) -> f64 {
    LITRES_PER_GALLON / SQUARE_METRES_PER_SQUARE_FOOT / 3.0 * floor_area_m2.max(0.0) * involved_share
}

/// What a share exceeds of the range of [`nfa_l_min`]: up to about half involved.
#[must_use]
pub fn nfa_limits(involved_share: f64) -> Exceeded {
    Exceeded::none().when(
        involved_share > 0.5,
        "more than half involved: the formula is for an attack inside, which such a fire does not allow",
    )
}

/// Class of construction of the ISO guide, with its coefficient.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum IsoConstruction {
    /// Frame: 1.5.
    Frame,
    /// Joisted masonry: 1.0.
    JoistedMasonry,
    /// Noncombustible, or masonry noncombustible: 0.8.
    Noncombustible,
    /// Fire resistive: 0.6.
    FireResistive,
}

impl IsoConstruction {
    /// The coefficient `F`.
    #[must_use]
    pub const fn coefficient(self) -> f64 {
        match self {
            Self::Frame => 1.5,
            Self::JoistedMasonry => 1.0,
            Self::Noncombustible => 0.8,
            Self::FireResistive => 0.6,
        }
    }
}

/// A building as the ISO guide sees it.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct IsoBuilding {
    /// Effective area: the largest floor and half of the others, m².
    pub effective_area_m2: f64,
    /// Class of construction.
    pub construction: IsoConstruction,
    /// Occupancy factor `O`: 0.75 noncombustible, 0.85 limited, 1.0 combustible, 1.15 free-burning, 1.25 rapid-burning.
    pub occupancy_factor: f64,
    /// Exposure and communication `X + P`: zero for a building that stands alone.
    pub exposure: f64,
}

/// Needed fire flow of a whole building, in L/min, by the ISO guide, with its limits and rounding.
///
/// ```text
/// NFF = C O (1 + X + P)          C[gpm] = 18 F √(A[ft²])
/// from 500 to 12 000 gpm; nearest 250 gpm below 2500, else nearest 500
/// ```
///
/// | symbol  | field               | unit |
/// |---------|---------------------|------|
/// | `A`     | `effective_area_m2` | m²   |
/// | `F`     | `construction`      | -    |
/// | `O`     | `occupancy_factor`  | -    |
/// | `X + P` | `exposure`          | -    |
///
/// What it means: what the public supply should give for a building so that a rating bureau is content; it holds
/// for hours, with exposures, and is no rate of attack. Range: buildings without sprinklers; dwellings have a table of
/// their own.
///
/// Source: [`ISO_NFF`](crate::fire::sources::ISO_NFF).
///
/// ```
/// use sootline::fire::fire_flow::{IsoBuilding, IsoConstruction, iso_needed_fire_flow_l_min};
///
/// // By hand: 900 m² = 9687.5 ft²; 18 · √9687.5 = 1771.6 gpm, rounded to 1750 gpm = 6624.5 L/min.
/// let shop = IsoBuilding { effective_area_m2: 900.0, construction: IsoConstruction::JoistedMasonry, occupancy_factor: 1.0, exposure: 0.0 };
/// assert!((iso_needed_fire_flow_l_min(shop) - 6624.5).abs() < 0.1);
/// ```
#[must_use]
pub fn iso_needed_fire_flow_l_min(building: IsoBuilding) -> f64 {
    let area_ft2 = building.effective_area_m2.max(0.0) / SQUARE_METRES_PER_SQUARE_FOOT;
    let construction_gpm = 18.0 * building.construction.coefficient() * area_ft2.sqrt();
    let raw_gpm = construction_gpm * building.occupancy_factor * (1.0 + building.exposure);
    let step_gpm = if raw_gpm < 2500.0 { 250.0 } else { 500.0 };
    let rounded_gpm = ((raw_gpm / step_gpm).round() * step_gpm).clamp(500.0, 12_000.0);
    rounded_gpm * LITRES_PER_GALLON
}

/// Water needed beside water there is.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Supply {
    /// Asked for, L/min.
    pub needed_l_min: f64,
    /// Recorded as available, L/min.
    pub available_l_min: f64,
    /// Available over needed; infinite where none is needed.
    pub ratio: f64,
    /// What is missing, L/min; zero where it is enough.
    pub shortfall_l_min: f64,
}

/// Sets a needed flow against the water recorded.
///
/// ```
/// use sootline::fire::fire_flow::compare;
///
/// let supply = compare(6000.0, 4000.0);
/// assert_eq!(supply.shortfall_l_min, 2000.0);
/// ```
#[must_use]
pub fn compare(needed_l_min: f64, available_l_min: f64) -> Supply {
    Supply {
        needed_l_min,
        available_l_min,
        ratio: if needed_l_min > 0.0 { available_l_min / needed_l_min } else { f64::INFINITY },
        shortfall_l_min: (needed_l_min - available_l_min).max(0.0),
    }
}
