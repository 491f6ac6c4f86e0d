//! Openings of a room and the air that they admit.

use super::Exceeded;
use super::constants::{AIR_DENSITY_TIMES_TEMPERATURE_KG_K_M3, GRAVITY_M_S2, HEAT_PER_AIR_KJ_KG};

/// An upright opening, or several taken as one.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct WallOpening {
    /// Open area, m².
    pub area_m2: f64,
    /// Height from sill to soffit, m.
    pub height_m: f64,
}

impl WallOpening {
    /// Ventilation factor `A √H`, m^(5/2).
    #[must_use]
    pub fn factor_m5_2(self) -> f64 {
        self.area_m2 * self.height_m.sqrt()
    }
}

/// Several wall openings as one, by the rule of EN 1991-1-2 Annex A.
///
/// ```text
/// A_o = Σ A_i        H_o = Σ A_i H_i / A_o
/// ```
///
/// | symbol | field      | unit |
/// |--------|------------|------|
/// | `A_i`  | `area_m2`  | m²   |
/// | `H_i`  | `height_m` | m    |
///
/// Range: openings in walls whose sills lie about equally high. One low and one high opening draw
/// like a chimney and admit more air than this says. Roof vents are not covered.
/// No opening gives area and height zero.
///
/// Source: [`EN_1991_1_2`](crate::fire::sources::EN_1991_1_2), Annex A.
///
/// ```
/// use sootline::fire::ventilation::{WallOpening, combine};
///
/// // By hand: (1.8·2.0 + 1.2·1.0) / 3.0 = 1.6 m.
/// let both = combine([WallOpening { area_m2: 1.8, height_m: 2.0 }, WallOpening { area_m2: 1.2, height_m: 1.0 }]);
/// assert!((both.area_m2 - 3.0).abs() < 1e-12 && (both.height_m - 1.6).abs() < 1e-12);
/// ```
#[must_use]
pub fn combine(openings: impl IntoIterator<Item = WallOpening>) -> WallOpening {
    let (area_m2, moment_m3) = openings
        .into_iter()
        .fold((0.0, 0.0), |(area, moment), o| (area + o.area_m2, moment + o.area_m2 * o.height_m));
    if area_m2 > 0.0 {
        WallOpening { area_m2, height_m: moment_m3 / area_m2 }
    } else {
        WallOpening::default()
    }
}

/// Air that a fully involved room draws through its opening, in kg/s, by Kawagoe.
///
/// ```text
/// m = 0.5 A √H
/// ```
///
/// | symbol | field      | unit |
/// |--------|------------|------|
/// | `A`    | `area_m2`  | m²   |
/// | `H`    | `height_m` | m    |
///
/// Range: one wall opening, room well mixed after flashover. Published coefficients run from 0.40 to
/// 0.61; [`rockett_inflow_kg_s`] gives 0.51 to 0.53.
///
/// Source: [`KAWAGOE_1958`](crate::fire::sources::KAWAGOE_1958).
///
/// ```
/// use sootline::fire::ventilation::{WallOpening, kawagoe_inflow_kg_s};
///
/// // By hand: 0.5 · 1.8 · √2 = 1.2728 kg/s.
/// let door = WallOpening { area_m2: 1.8, height_m: 2.0 };
/// assert!((kawagoe_inflow_kg_s(door) - 1.2728).abs() < 1e-4);
/// ```
#[must_use]
pub fn kawagoe_inflow_kg_s(opening: WallOpening) -> f64 {
    const INFLOW_KG_S_PER_M5_2: f64 = 0.5;

    INFLOW_KG_S_PER_M5_2 * opening.factor_m5_2()
}

/// Heat release inside the room that uses up all air drawn in, in kW.
///
/// ```text
/// Q_v = 3000 · 0.5 A √H = 1500 A √H
/// ```
///
/// Symbols and range as [`kawagoe_inflow_kg_s`]; 3.0 MJ per kg of air holds within 10 % for common
/// fuels. More fuel than this burns outside the opening.
///
/// Sources: [`KAWAGOE_1958`](crate::fire::sources::KAWAGOE_1958), [`HUGGETT_1980`](crate::fire::sources::HUGGETT_1980).
///
/// ```
/// use sootline::fire::ventilation::{WallOpening, kawagoe_limit_kw};
///
/// // By hand: 1500 · 1.6 · √2 = 3394.1 kW.
/// let door = WallOpening { area_m2: 1.6, height_m: 2.0 };
/// assert!((kawagoe_limit_kw(door) - 3394.1).abs() < 0.1);
/// ```
#[must_use]
pub fn kawagoe_limit_kw(opening: WallOpening) -> f64 {
    HEAT_PER_AIR_KJ_KG * kawagoe_inflow_kg_s(opening)
}

/// What an opening exceeds of the range of [`kawagoe_inflow_kg_s`] and [`kawagoe_limit_kw`].
#[must_use]
pub fn kawagoe_limits(opening: WallOpening) -> Exceeded {
    Exceeded::none()
        .when(
            opening.factor_m5_2() <= 0.0,
            "no wall opening: the limit is zero and the oxygen in the room counts instead",
        )
        .when(opening.height_m > 4.0, "opening higher than about 4 m: the room is hardly well mixed")
}

/// Gas and air on either side of an opening, for [`rockett_inflow_kg_s`].
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct WellMixed {
    /// Gas in the room, K.
    pub gas_temperature_k: f64,
    /// Air outside, K.
    pub ambient_temperature_k: f64,
    /// Discharge coefficient; 0.7 is common.
    pub discharge_coefficient: f64,
}

/// Air drawn through an opening of a well-mixed hot room, in kg/s, by the orifice equation.
///
/// ```text
/// m = 2/3 C_d A √H ρ_a √( 2 g (1-s) / (1 + s^(-1/3))³ )      s = ρ_g / ρ_a = T_a / T_g
/// ```
///
/// | symbol | field                   | unit |
/// |--------|-------------------------|------|
/// | `A`    | `area_m2`               | m²   |
/// | `H`    | `height_m`              | m    |
/// | `T_g`  | `gas_temperature_k`     | K    |
/// | `T_a`  | `ambient_temperature_k` | K    |
/// | `C_d`  | `discharge_coefficient` | -    |
///
/// The rival of [`kawagoe_inflow_kg_s`]: it knows the temperature and is flat above some 500 K.
/// Range: one wall opening, uniform gas, no fuel flow in the balance.
///
/// Source: [`ROCKETT_1976`](crate::fire::sources::ROCKETT_1976).
///
/// ```
/// use sootline::fire::ventilation::{WallOpening, WellMixed, rockett_inflow_kg_s};
///
/// // By hand (s = 0.33562, s^(-1/3) = 1.43898): 0.66667·0.7·1.8·1.41421·1.20478·√(13.0318/14.5087) = 1.3565.
/// let door = WallOpening { area_m2: 1.8, height_m: 2.0 };
/// let gas = WellMixed { gas_temperature_k: 873.0, ambient_temperature_k: 293.0, discharge_coefficient: 0.7 };
/// assert!((rockett_inflow_kg_s(door, gas) - 1.3565).abs() < 2e-3);
/// ```
#[must_use]
pub fn rockett_inflow_kg_s(opening: WallOpening, gas: WellMixed) -> f64 {
    if gas.gas_temperature_k <= gas.ambient_temperature_k {
        return 0.0;
    }
    let ambient_density_kg_m3 = AIR_DENSITY_TIMES_TEMPERATURE_KG_K_M3 / gas.ambient_temperature_k;
    let s = gas.ambient_temperature_k / gas.gas_temperature_k;
    let denominator = (1.0 + (1.0 / s).cbrt()).powi(3);
    2.0 / 3.0
        * gas.discharge_coefficient
        * opening.factor_m5_2()
        * ambient_density_kg_m3
        * (2.0 * GRAVITY_M_S2 * (1.0 - s) / denominator).sqrt()
}
