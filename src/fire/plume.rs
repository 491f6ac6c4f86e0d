//! Air that a plume draws in, and its temperature.

use super::Exceeded;
use super::constants::GRAVITY_M_S2;
use super::flame::{RoundFire, heskestad_height_m, heskestad_virtual_origin_m};

/// A round fire and its share of convective heat.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct PlumeFire {
    /// Heat and width.
    pub fire: RoundFire,
    /// Share of the heat that goes up with the gas; 0.65 to 0.7 for most fuels.
    pub convective_share: f64,
}

impl PlumeFire {
    fn convective_kw(&self) -> f64 {
        self.convective_share * self.fire.heat_release_kw.max(0.0)
    }
}

/// Mass flow of a plume at a height above the base of the fire, in kg/s, by Heskestad.
///
/// ```text
/// z ≥ L   m = 0.071 Q_c^(1/3) (z-z_0)^(5/3) [ 1 + 0.027 Q_c^(2/3) (z-z_0)^(-5/3) ]
/// z < L   m = 0.0056 Q_c z / L
/// ```
///
/// | symbol | field or argument                                               | unit |
/// |--------|-----------------------------------------------------------------|------|
/// | `Q_c`  | `convective_share` × `heat_release_kw`                          | kW   |
/// | `z`    | `height_m`                                                      | m    |
/// | `L`    | [`heskestad_height_m`](super::flame::heskestad_height_m)        | m    |
/// | `z_0`  | [`heskestad_virtual_origin_m`](super::flame::heskestad_virtual_origin_m) | m |
///
/// The two laws do not meet exactly at the flame tip. Another print has 0.026.
/// Range: fire on the floor in still air, away from walls, `Q*` as for the flame.
///
/// Source: [`HESKESTAD_1984`](crate::fire::sources::HESKESTAD_1984).
///
/// ```
/// use sootline::fire::flame::RoundFire;
/// use sootline::fire::plume::{PlumeFire, heskestad_kg_s};
///
/// // By hand: Q_c 700, L 2.704, z_0 0.295: 0.071·8.879·(5.705)^(5/3)·(1 + 0.027·78.84/18.215) = 12.82 kg/s.
/// let fire = PlumeFire { fire: RoundFire { heat_release_kw: 1000.0, diameter_m: 1.0 }, convective_share: 0.7 };
/// assert!((heskestad_kg_s(fire, 6.0) - 12.82).abs() < 0.05);
/// ```
#[must_use]
pub fn heskestad_kg_s(fire: PlumeFire, height_m: f64) -> f64 {
    let convective_kw = fire.convective_kw();
    if convective_kw <= 0.0 || height_m <= 0.0 {
        return 0.0;
    }
    let flame_m = heskestad_height_m(fire.fire);
    if height_m < flame_m {
        return 0.0056 * convective_kw * height_m / flame_m;
    }
    let above_m = (height_m - heskestad_virtual_origin_m(fire.fire)).max(0.0);
    // Multiplied out: the bracket as printed divides by zero at the virtual origin.
    0.071 * convective_kw.cbrt() * above_m.powf(5.0 / 3.0) + 0.071 * 0.027 * convective_kw
}

/// Rise of the temperature on the axis of the plume above the flame, in K, by Heskestad.
///
/// ```text
/// ΔT_0 = 25 ( Q_c^0.4 / (z-z_0) )^(5/3)
/// ```
///
/// Symbols as [`heskestad_kg_s`]. Range: above the flame; None at or below its tip.
///
/// Source: [`HESKESTAD_1984`](crate::fire::sources::HESKESTAD_1984).
///
/// ```
/// use sootline::fire::flame::RoundFire;
/// use sootline::fire::plume::{PlumeFire, heskestad_axis_rise_k};
///
/// // By hand: 25 · (700^0.4 / 5.705)^(5/3) = 25 · (13.740/5.705)^(5/3) = 25 · 4.328 = 108.2 K.
/// let fire = PlumeFire { fire: RoundFire { heat_release_kw: 1000.0, diameter_m: 1.0 }, convective_share: 0.7 };
/// assert!((heskestad_axis_rise_k(fire, 6.0).unwrap() - 108.2).abs() < 0.3);
/// ```
#[must_use]
pub fn heskestad_axis_rise_k(fire: PlumeFire, height_m: f64) -> Option<f64> {
    if height_m <= heskestad_height_m(fire.fire) {
        return None;
    }
    let above_m = height_m - heskestad_virtual_origin_m(fire.fire);
    (above_m > 0.0).then(|| 25.0 * (fire.convective_kw().powf(0.4) / above_m).powf(5.0 / 3.0))
}

/// Mass flow of a plume far above the fire, in kg/s, by Zukoski, Kubota and Cetegen.
///
/// ```text
/// m = 0.071 Q^(1/3) z^(5/3)
/// ```
///
/// | symbol | argument          | unit |
/// |--------|-------------------|------|
/// | `Q`    | `heat_release_kw` | kW   |
/// | `z`    | `height_m`        | m    |
///
/// Range: far above the flame. Other prints take the convective heat with 0.076, or 0.053.
///
/// Source: [`ZUKOSKI_1981`](crate::fire::sources::ZUKOSKI_1981).
///
/// ```
/// use sootline::fire::plume::zukoski_kg_s;
///
/// // By hand: 0.071 · 10 · 6^(5/3) = 0.71 · 19.812 = 14.07 kg/s.
/// assert!((zukoski_kg_s(1000.0, 6.0) - 14.07).abs() < 0.01);
/// ```
#[must_use]
pub fn zukoski_kg_s(heat_release_kw: f64, height_m: f64) -> f64 {
    0.071 * heat_release_kw.max(0.0).cbrt() * height_m.max(0.0).powf(5.0 / 3.0)
}

/// Mass flow of a plume at a height, in kg/s, by NFPA 92.
///
/// ```text
/// z > z_l   m = 0.071 Q_c^(1/3) z^(5/3) + 0.0018 Q_c      z_l = 0.166 Q_c^0.4
/// z ≤ z_l   m = 0.032 Q_c^0.6 z
/// ```
///
/// | symbol | argument        | unit |
/// |--------|-----------------|------|
/// | `Q_c`  | `convective_kw` | kW   |
/// | `z`    | `height_m`      | m    |
///
/// Range: axisymmetric plume away from walls in a large space.
///
/// Source: [`NFPA_92`](crate::fire::sources::NFPA_92).
///
/// ```
/// use sootline::fire::plume::nfpa92_kg_s;
///
/// // By hand: 0.071 · 8.879 · 19.812 + 0.0018 · 700 = 13.75 kg/s.
/// assert!((nfpa92_kg_s(700.0, 6.0) - 13.75).abs() < 0.01);
/// ```
#[must_use]
pub fn nfpa92_kg_s(convective_kw: f64, height_m: f64) -> f64 {
    let convective_kw = convective_kw.max(0.0);
    let height_m = height_m.max(0.0);
    let limiting_m = 0.166 * convective_kw.powf(0.4);
    if height_m > limiting_m {
        0.071 * convective_kw.cbrt() * height_m.powf(5.0 / 3.0) + 0.0018 * convective_kw
    } else {
        0.032 * convective_kw.powf(0.6) * height_m
    }
}

/// Mass flow over a large fire, in kg/s, by Thomas and Hinkley.
///
/// ```text
/// m = 0.188 P z^1.5
/// ```
///
/// | symbol | argument      | unit |
/// |--------|---------------|------|
/// | `P`    | `perimeter_m` | m    |
/// | `z`    | `height_m`    | m    |
///
/// Range: see [`thomas_large_fire_limits`]. Other coefficients, for small rooms near the opening: 0.210 and 0.337.
///
/// Source: [`THOMAS_HINKLEY_1963`](crate::fire::sources::THOMAS_HINKLEY_1963).
///
/// ```
/// use sootline::fire::plume::thomas_large_fire_kg_s;
///
/// // By hand: 0.188 · 3.14159 · 6^1.5 = 8.68 kg/s.
/// assert!((thomas_large_fire_kg_s(3.14159, 6.0) - 8.68).abs() < 0.01);
/// ```
#[must_use]
pub fn thomas_large_fire_kg_s(perimeter_m: f64, height_m: f64) -> f64 {
    0.188 * perimeter_m * height_m.max(0.0).powf(1.5)
}

/// What a fire exceeds of the range of [`thomas_large_fire_kg_s`]: `z < 2.5 P`, `P` of 0.9 to 14 m.
#[must_use]
pub fn thomas_large_fire_limits(perimeter_m: f64, height_m: f64) -> Exceeded {
    Exceeded::none()
        .when(height_m > 2.5 * perimeter_m, "higher above the fire than 2.5 perimeters")
        .when(!(0.9..=14.0).contains(&perimeter_m), "perimeter outside 0.9 to 14 m")
}

/// State on the axis of a plume, by McCaffrey.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct McCaffreyPlume {
    /// Rise above ambient, K.
    pub rise_k: f64,
    /// Upward speed, m/s.
    pub velocity_m_s: f64,
    /// Mass flow through the height, kg/s.
    pub mass_flow_kg_s: f64,
}

/// Plume of a methane burner at a height, by McCaffrey, in three regions of `x = z / Q^0.4`.
///
/// ```text
/// ΔT = T_0 ( κ / (0.9 √(2g)) )² x^(2η-1)      u = κ x^η Q^0.2      m = Q a x^b
/// flame        x < 0.08        κ 6.8  η  1/2   a 0.011  b 0.566
/// intermittent 0.08 ≤ x < 0.2  κ 1.9  η  0     a 0.026  b 0.909
/// plume        x ≥ 0.2         κ 1.1  η -1/3   a 0.124  b 1.895
/// ```
///
/// | symbol | argument                | unit |
/// |--------|-------------------------|------|
/// | `Q`    | `heat_release_kw`       | kW   |
/// | `z`    | `height_m`              | m    |
/// | `T_0`  | `ambient_temperature_k` | K    |
///
/// Range: 0.3 m square burner of 14 to 57 kW; used far beyond.
///
/// Source: [`MCCAFFREY_1979`](crate::fire::sources::MCCAFFREY_1979).
///
/// ```
/// use sootline::fire::plume::mccaffrey;
///
/// // By hand: x = 1/100^0.4 = 0.1585: 293·(1.9/(0.9·4.4287))²/0.1585 = 420 K; 1.9·100^0.2 = 4.77 m/s.
/// let plume = mccaffrey(100.0, 1.0, 293.0);
/// assert!((plume.rise_k - 420.0).abs() < 1.0 && (plume.velocity_m_s - 4.77).abs() < 0.01);
/// ```
#[must_use]
pub fn mccaffrey(heat_release_kw: f64, height_m: f64, ambient_temperature_k: f64) -> McCaffreyPlume {
    if heat_release_kw <= 0.0 || height_m <= 0.0 {
        return McCaffreyPlume { rise_k: 0.0, velocity_m_s: 0.0, mass_flow_kg_s: 0.0 };
    }
    let x = height_m / heat_release_kw.powf(0.4);
    let (kappa, eta, a, b) = if x < 0.08 {
        (6.8, 0.5, 0.011, 0.566)
    } else if x < 0.2 {
        (1.9, 0.0, 0.026, 0.909)
    } else {
        (1.1, -1.0 / 3.0, 0.124, 1.895)
    };
    let ratio: f64 = kappa / (0.9 * (2.0 * GRAVITY_M_S2).sqrt());
    McCaffreyPlume {
        rise_k: ambient_temperature_k * ratio * ratio * x.powf(2.0 * eta - 1.0),
        velocity_m_s: kappa * x.powf(eta) * heat_release_kw.powf(0.2),
        mass_flow_kg_s: heat_release_kw * a * x.powf(b),
    }
}
