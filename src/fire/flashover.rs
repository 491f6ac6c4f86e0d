//! Heat release that takes a room to flashover.

use super::Exceeded;
use super::ventilation::WallOpening;

/// Criterion: gas of the hot layer at 600 °C, in K.
///
/// Published observations run from 450 to 771 °C. Source: [`PEACOCK_1999`](crate::fire::sources::PEACOCK_1999).
pub const LIMIT_600_C_GAS_K: f64 = 873.15;

/// Criterion: 20 kW/m² on the floor, in kW/m². Published observations run from 15 to 33.
///
/// Source: [`PEACOCK_1999`](crate::fire::sources::PEACOCK_1999).
pub const LIMIT_20_KW_M2_FLOOR: f64 = 20.0;

/// The room as the correlations see it.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Enclosure {
    /// Walls, ceiling and floor without the opening, m².
    pub bounding_area_m2: f64,
    /// Area of the wall opening, m².
    pub opening_area_m2: f64,
    /// Height of the wall opening, m.
    pub opening_height_m: f64,
}

impl Enclosure {
    /// A box with an opening in its wall. Its bounding area leaves the opening out.
    ///
    /// ```
    /// use sootline::fire::flashover::Enclosure;
    /// use sootline::fire::ventilation::WallOpening;
    ///
    /// // By hand: 2·(3.6·2.4) + 2·2.4·(3.6+2.4) - 1.6 = 44.48 m².
    /// let room = Enclosure::of_box(3.6, 2.4, 2.4, WallOpening { area_m2: 1.6, height_m: 2.0 });
    /// assert!((room.bounding_area_m2 - 44.48).abs() < 1e-9);
    /// ```
    #[must_use]
    pub fn of_box(length_m: f64, width_m: f64, height_m: f64, opening: WallOpening) -> Self {
        let area_m2 = 2.0 * (length_m * width_m + height_m * (length_m + width_m));
        Self {
            bounding_area_m2: (area_m2 - opening.area_m2).max(0.0),
            opening_area_m2: opening.area_m2,
            opening_height_m: opening.height_m,
        }
    }

    /// The opening of the room.
    #[must_use]
    pub fn opening(&self) -> WallOpening {
        WallOpening { area_m2: self.opening_area_m2, height_m: self.opening_height_m }
    }
}

/// Heat release at the onset of flashover, in kW, by Babrauskas' rule.
///
/// ```text
/// Q_fo = 750 A_o √H_o
/// ```
///
/// | symbol | field              | unit |
/// |--------|--------------------|------|
/// | `A_o`  | `opening_area_m2`  | m²   |
/// | `H_o`  | `opening_height_m` | m    |
///
/// Half the heat that the inflow can burn. Blind to the size of the room and to its lining. Two thirds of
/// the 33 test fires lie between 450 and 1050 `A_o √H_o`.
///
/// Range: see [`babrauskas_limits`].
///
/// Source: [`BABRAUSKAS_1980`](crate::fire::sources::BABRAUSKAS_1980).
///
/// ```
/// use sootline::fire::flashover::{Enclosure, babrauskas_kw};
///
/// // By hand: 750 · 1.6 · √2 = 1697.1 kW.
/// let room = Enclosure { bounding_area_m2: 44.48, opening_area_m2: 1.6, opening_height_m: 2.0 };
/// assert!((babrauskas_kw(room) - 1697.1).abs() < 0.1);
/// ```
#[must_use]
pub fn babrauskas_kw(room: Enclosure) -> f64 {
    const PER_VENTILATION_FACTOR_KW_M5_2: f64 = 750.0;

    PER_VENTILATION_FACTOR_KW_M5_2 * room.opening().factor_m5_2()
}

/// What a room exceeds of the 33 test rooms behind [`babrauskas_kw`].
#[must_use]
pub fn babrauskas_limits(room: Enclosure) -> Exceeded {
    no_opening(room)
        .when(room.opening_height_m > 2.7, "opening higher than those of the test rooms (about 1 to 2 m)")
        .when(
            room.opening_height_m > 0.0 && room.opening_height_m < 0.3,
            "opening lower than those of the test rooms (about 1 to 2 m)",
        )
        .when(
            room.opening().factor_m5_2() > 0.0 && room.bounding_area_m2 / room.opening().factor_m5_2() > 60.0,
            "surface large beside the opening: the losses that the rule leaves out decide",
        )
}

/// Heat release at the onset of flashover, in kW, by Thomas' energy balance.
///
/// ```text
/// Q_fo = 7.8 A_T + 378 A_o √H_o
/// ```
///
/// | symbol | field              | unit |
/// |--------|--------------------|------|
/// | `A_T`  | `bounding_area_m2` | m²   |
/// | `A_o`  | `opening_area_m2`  | m²   |
/// | `H_o`  | `opening_height_m` | m    |
///
/// A rise of about 600 K. Blind to the lining: the surface term stands for an average wall. Where the
/// lining matters, use [`mccaffrey_kw`].
///
/// Range: see [`thomas_limits`]. Not for closed rooms, which the formula would rate *easiest* to flash over.
///
/// Source: [`THOMAS_1981`](crate::fire::sources::THOMAS_1981).
///
/// ```
/// use sootline::fire::flashover::{Enclosure, thomas_kw};
///
/// // By hand: 7.8 · 44.48 + 378 · 1.6 · √2 = 1202.3 kW.
/// let room = Enclosure { bounding_area_m2: 44.48, opening_area_m2: 1.6, opening_height_m: 2.0 };
/// assert!((thomas_kw(room) - 1202.3).abs() < 0.1);
/// ```
#[must_use]
pub fn thomas_kw(room: Enclosure) -> f64 {
    const SURFACE_LOSS_KW_PER_M2: f64 = 7.8;
    const OPENING_LOSS_KW_PER_M5_2: f64 = 378.0;

    SURFACE_LOSS_KW_PER_M2 * room.bounding_area_m2 + OPENING_LOSS_KW_PER_M5_2 * room.opening().factor_m5_2()
}

/// What a room exceeds of the range of [`thomas_kw`].
///
/// Range: rooms up to about 16 m² of floor, one wall opening, ordinary linings. The floor is not in
/// [`Enclosure`]; a 4 × 4 × 3 m room has 80 m² of surface, which stands for it.
#[must_use]
pub fn thomas_limits(room: Enclosure) -> Exceeded {
    no_opening(room).when(
        room.bounding_area_m2 > 85.0,
        "larger than the rooms behind the balance (about 16 m² of floor, 85 m² of surface)",
    )
}

/// Heat release at the onset of flashover, in kW, by McCaffrey, Quintiere and Harkleroad.
///
/// ```text
/// Q_fo = 610 √( h_k A_T A_o √H_o )
/// ```
///
/// | symbol      | argument              | unit |
/// |-------------|-----------------------|------|
/// | `h_k A_T`   | `conductance_kw_k`    | kW/K |
/// | `A_o`       | `opening_area_m2`     | m²   |
/// | `H_o`       | `opening_height_m`    | m    |
///
/// A rise of 500 K. The 610 is the rounded print; turning 6.85 round gives 623.6, 2 % more.
///
/// Range: see [`mccaffrey_limits`].
///
/// Source: [`MCCAFFREY_1981`](crate::fire::sources::MCCAFFREY_1981).
///
/// ```
/// use sootline::fire::flashover::{Enclosure, mccaffrey_kw};
///
/// // By hand: 610 · √(0.03 · 44.48 · 1.6 · √2) = 1060.0 kW.
/// let room = Enclosure { bounding_area_m2: 44.48, opening_area_m2: 1.6, opening_height_m: 2.0 };
/// assert!((mccaffrey_kw(room, 0.03 * 44.48) - 1060.0).abs() < 0.1);
/// ```
#[must_use]
pub fn mccaffrey_kw(room: Enclosure, conductance_kw_k: f64) -> f64 {
    MCCAFFREY_FLASHOVER * (conductance_kw_k * room.opening().factor_m5_2()).sqrt()
}

/// The 610 of [`mccaffrey_kw`], which its search for the time shares.
pub(super) const MCCAFFREY_FLASHOVER: f64 = 610.0;

/// What a room exceeds of the range of [`mccaffrey_kw`]: eight series of tests, 0.3 to 2.7 m high.
#[must_use]
pub fn mccaffrey_limits(room: Enclosure) -> Exceeded {
    no_opening(room)
        .when(room.opening_height_m > 2.7, "opening higher than the rooms of the fit (0.3 to 2.7 m)")
        .when(room.bounding_area_m2 > 250.0, "surface far larger than in the rooms of the fit")
}

fn no_opening(room: Enclosure) -> Exceeded {
    Exceeded::none().when(
        room.opening().factor_m5_2() <= 0.0,
        "no wall opening: the oxygen in the room decides, not this correlation",
    )
}
