//! How fast smoke fills a room from the ceiling down.

use super::Exceeded;
use super::design_fire::DesignFire;

/// A room that fills.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct FillingRoom {
    /// Floor, m².
    pub floor_area_m2: f64,
    /// Height, m.
    pub height_m: f64,
}

/// Volume that the plume draws in per `Q^(1/3) z^(5/3)`, m^(4/3) kW^(-1/3) s^(-1). Published: 0.053 to 0.076.
const ENTRAINED_VOLUME: f64 = 0.064;

/// Height of the layer above the floor under a fire of any course, in m, by Zukoski and Mowrer.
///
/// ```text
/// dz/dt = -(k_v/A) Q^(1/3) z^(5/3)
/// z/H = ( 1 + 2 k_v H^(2/3) I / (3 A) )^(-3/2)      I(t) = ∫ Q^(1/3) dt      k_v = 0.064
/// ```
///
/// | symbol | field or argument              | unit         |
/// |--------|--------------------------------|--------------|
/// | `A`    | `floor_area_m2`                | m²           |
/// | `H`    | `height_m`                     | m            |
/// | `I`    | `cube_root_integral_kw13_s`    | kW^(1/3) s   |
///
/// For a steady fire `I` is `Q^(1/3) t`. The fire burns on the floor, the gas does not swell (that
/// lowers the layer further in a shut room), no smoke leaves.
///
/// Range: see [`zukoski_limits`].
///
/// Sources: [`ZUKOSKI_1978`](crate::fire::sources::ZUKOSKI_1978), [`MOWRER_1999`](crate::fire::sources::MOWRER_1999).
///
/// ```
/// use sootline::fire::smoke_filling::{FillingRoom, zukoski_height_m};
///
/// // By hand: 100 m², 6 m, 1000 kW, 41.7 s: 1 + 2·0.064·3.3019·417/300 = 1.58748; ^(-1.5) = 0.49996; · 6 = 3.0 m.
/// let hall = FillingRoom { floor_area_m2: 100.0, height_m: 6.0 };
/// assert!((zukoski_height_m(hall, 10.0 * 41.7) - 3.0).abs() < 0.01);
/// ```
#[must_use]
pub fn zukoski_height_m(room: FillingRoom, cube_root_integral_kw13_s: f64) -> f64 {
    let filled = 2.0 * ENTRAINED_VOLUME * room.height_m.powf(2.0 / 3.0) * cube_root_integral_kw13_s.max(0.0)
        / (3.0 * room.floor_area_m2);
    room.height_m * (1.0 + filled).powf(-1.5)
}

/// `∫ Q^(1/3) dt` of a [`DesignFire`] up to a time, kW^(1/3) s: closed in each of its three phases.
///
/// ```
/// use sootline::fire::DesignFire;
/// use sootline::fire::smoke_filling::cube_root_integral_kw13_s;
///
/// // By hand in the growth: 0.6 · 0.1^(1/3) · 50^(5/3) = 0.6 · 0.46416 · 678.60 = 188.99.
/// let fire = DesignFire { growth_kw_s2: 0.1, peak_kw: 1000.0, energy_kj: 1e5, decay_from_share: 0.7 };
/// assert!((cube_root_integral_kw13_s(&fire, 50.0) - 188.99).abs() < 0.01);
/// ```
#[must_use]
pub fn cube_root_integral_kw13_s(fire: &DesignFire, time_s: f64) -> f64 {
    let phases = fire.phases();
    let growing_s = time_s.clamp(0.0, phases.growth_end_s);
    let mut integral = 0.6 * fire.growth_kw_s2.cbrt() * growing_s.powf(5.0 / 3.0);
    let root = phases.reached_kw.cbrt();
    integral += root * (time_s.min(phases.decay_start_s) - phases.growth_end_s).max(0.0);
    if time_s > phases.decay_start_s {
        let decay_s = phases.end_s - phases.decay_start_s;
        let left = (phases.end_s - time_s).max(0.0) / decay_s.max(f64::MIN_POSITIVE);
        integral += 0.75 * root * decay_s * (1.0 - left.powf(4.0 / 3.0));
    }
    integral
}

/// Time at which the layer of a [`DesignFire`] is down to a height, in s; none where it never is.
///
/// [`zukoski_height_m`] turned round.
///
/// # Errors
///
/// [`NotConverged`](super::NotConverged) where a number handed in is not finite.
pub fn zukoski_time_to_height_s(
    room: FillingRoom,
    fire: &DesignFire,
    height_m: f64,
) -> Result<Option<f64>, super::NotConverged> {
    if height_m >= room.height_m {
        return Ok(Some(0.0));
    }
    if height_m <= 0.0 {
        return Ok(None);
    }
    let needed = ((room.height_m / height_m).powf(2.0 / 3.0) - 1.0) * 3.0 * room.floor_area_m2
        / (2.0 * ENTRAINED_VOLUME * room.height_m.powf(2.0 / 3.0));
    let phases = fire.phases();
    if cube_root_integral_kw13_s(fire, phases.end_s) < needed {
        return Ok(None);
    }
    let growing = (needed / (0.6 * fire.growth_kw_s2.cbrt())).powf(0.6);
    if growing <= phases.growth_end_s {
        return Ok(Some(growing));
    }
    super::search::first_time_s("time for the layer to come down", 0.0, phases.end_s, |time_s| {
        cube_root_integral_kw13_s(fire, time_s) >= needed
    })
    .map(Some)
}

/// What a room exceeds of the range of [`zukoski_height_m`]: a plume that reaches the ceiling and a floor not so wide that
/// the smoke cools on its way.
#[must_use]
pub fn zukoski_limits(room: FillingRoom) -> Exceeded {
    let shape = room.floor_area_m2 / (room.height_m * room.height_m);
    Exceeded::none()
        .when(shape < 0.4, "a shaft: the plume meets the walls before the ceiling")
        .when(shape > 100.0, "so wide that the smoke cools and mixes before it has spread")
}

/// First smoke above the floor under a steady fire, in m, by NFPA 92. Not below zero nor above the ceiling.
///
/// ```text
/// z/H = 1.11 - 0.28 ln( t Q^(1/3) H^(-4/3) / (A/H²) )
/// ```
///
/// | symbol | field or argument | unit |
/// |--------|-------------------|------|
/// | `t`    | `time_s`          | s    |
/// | `Q`    | `heat_release_kw` | kW   |
/// | `H`    | `height_m`        | m    |
/// | `A`    | `floor_area_m2`   | m²   |
///
/// The *first* smoke, some 35 % sooner than the mean of the layer ([`zukoski_height_m`]).
/// Range: see [`nfpa92_steady_limits`].
///
/// Source: [`NFPA_92`](crate::fire::sources::NFPA_92).
///
/// ```
/// use sootline::fire::smoke_filling::{FillingRoom, nfpa92_steady_height_m};
///
/// // By hand: 26.8·10·6^(-4/3)/(100/36) = 8.850; 1.11 - 0.28·ln 8.850 = 0.4995; · 6 = 3.0 m.
/// let hall = FillingRoom { floor_area_m2: 100.0, height_m: 6.0 };
/// assert!((nfpa92_steady_height_m(hall, 1000.0, 26.8) - 3.0).abs() < 0.01);
/// ```
#[must_use]
pub fn nfpa92_steady_height_m(room: FillingRoom, heat_release_kw: f64, time_s: f64) -> f64 {
    let shape = room.floor_area_m2 / (room.height_m * room.height_m);
    let x = time_s * heat_release_kw.max(0.0).cbrt() * room.height_m.powf(-4.0 / 3.0) / shape;
    if x <= 0.0 {
        return room.height_m;
    }
    room.height_m * (1.11 - 0.28 * x.ln()).clamp(0.0, 1.0)
}

/// First smoke above the floor under a t² fire, in m, by NFPA 92. Not above the ceiling.
///
/// ```text
/// z/H = 0.91 ( t t_g^(-2/5) H^(-4/5) (A/H²)^(-3/5) )^(-1.45)
/// ```
///
/// `t_g` is `growth_time_s`, the time to 1055 kW; other symbols and source as [`nfpa92_steady_height_m`].
/// Range: see [`nfpa92_t_squared_limits`].
///
/// ```
/// use sootline::fire::smoke_filling::{FillingRoom, nfpa92_t_squared_height_m};
///
/// // By hand: 120·150^(-0.4)·6^(-0.8)·2.7778^(-0.6) = 120·0.13476·0.23852·0.54177 = 2.0897; 0.91·2.0897^(-1.45) = 0.3125; · 6 = 1.875 m.
/// let hall = FillingRoom { floor_area_m2: 100.0, height_m: 6.0 };
/// assert!((nfpa92_t_squared_height_m(hall, 150.0, 120.0) - 1.875).abs() < 0.01);
/// ```
#[must_use]
pub fn nfpa92_t_squared_height_m(room: FillingRoom, growth_time_s: f64, time_s: f64) -> f64 {
    if time_s <= 0.0 {
        return room.height_m;
    }
    let shape = room.floor_area_m2 / (room.height_m * room.height_m);
    let x = time_s * growth_time_s.powf(-0.4) * room.height_m.powf(-0.8) * shape.powf(-0.6);
    room.height_m * (0.91 * x.powf(-1.45)).clamp(0.0, 1.0)
}

/// What a state exceeds of the range of [`nfpa92_steady_height_m`]: `A/H²` 0.9 to 14, `z/H` at least 0.2.
#[must_use]
pub fn nfpa92_steady_limits(room: FillingRoom, layer_height_m: f64) -> Exceeded {
    let shape = room.floor_area_m2 / (room.height_m * room.height_m);
    Exceeded::none()
        .when(!(0.9..=14.0).contains(&shape), "floor area over height squared outside 0.9 to 14")
        .when(layer_height_m < 0.2 * room.height_m, "layer lower than a fifth of the height")
}

/// What a state exceeds of the range of [`nfpa92_t_squared_height_m`]: `A/H²` 1 to 23, `z/H` at least 0.2.
#[must_use]
pub fn nfpa92_t_squared_limits(room: FillingRoom, layer_height_m: f64) -> Exceeded {
    let shape = room.floor_area_m2 / (room.height_m * room.height_m);
    Exceeded::none()
        .when(!(1.0..=23.0).contains(&shape), "floor area over height squared outside 1 to 23")
        .when(layer_height_m < 0.2 * room.height_m, "layer lower than a fifth of the height")
}
