//! When a detector or a sprinkler head acts.

use super::Exceeded;
use super::ceiling_jet::{
    CeilingPlace, alpert_heat_release_kw, alpert_rise_per_kw_2_3, alpert_velocity_per_kw_1_3,
};
use super::constants::{AIR_SPECIFIC_HEAT_KJ_KGK, AMBIENT_K, GRAVITY_M_S2, air_density_kg_m3};
use super::design_fire::DesignFire;

/// Rise of the ceiling jet that stands for the alarm of a smoke detector, K: the customary value.
///
/// It is weakly founded: 10 to 15 K have been used for every detector and fire.
///
/// Sources: [`HESKESTAD_DELICHATSIOS_1977`](crate::fire::sources::HESKESTAD_DELICHATSIOS_1977),
/// [`GEIMAN_GOTTUK_2003`](crate::fire::sources::GEIMAN_GOTTUK_2003).
pub const SMOKE_DETECTOR_RISE_13_K: f64 = 13.0;

/// The rival for modern detectors, K.
///
/// Source: [`BUKOWSKI_AVERILL_1998`](crate::fire::sources::BUKOWSKI_AVERILL_1998).
pub const SMOKE_DETECTOR_RISE_4_K: f64 = 4.0;

/// A heat detector or the link of a sprinkler.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct HeatElement {
    /// Response time index, m^(1/2) s^(1/2).
    pub rti_m05s05: f64,
    /// Conduction to the fitting, (m/s)^(1/2); zero where unknown.
    pub c_factor_m05s05: f64,
    /// Temperature at which it acts, K.
    pub activation_temperature_k: f64,
}

/// Response time index from a time constant in a wind tunnel, in m^(1/2) s^(1/2).
///
/// ```text
/// RTI = τ √u
/// ```
///
/// Source: [`HESKESTAD_BILL_1988`](crate::fire::sources::HESKESTAD_BILL_1988).
///
/// ```
/// use sootline::fire::detection::rti_m05s05;
///
/// // Published (SNI 03-3985 annex): 80 s at 5 ft/s; by hand 80 · √1.524 = 98.76.
/// assert!((rti_m05s05(80.0, 1.524) - 98.76).abs() < 0.01);
/// ```
#[must_use]
pub fn rti_m05s05(time_constant_s: f64, velocity_m_s: f64) -> f64 {
    time_constant_s * velocity_m_s.sqrt()
}

/// The next rise of a heat element above ambient, in K, over a step with steady gas.
///
/// ```text
/// dT_e/dt = √u (T_g - T_e) / RTI - C (T_e - T_0) / RTI
/// ```
///
/// | symbol | field or argument | unit            |
/// |--------|-------------------|-----------------|
/// | `T_g`  | `gas_rise_k`      | K above ambient |
/// | `u`    | `velocity_m_s`    | m/s             |
/// | `RTI`  | `rti_m05s05`      | m^½ s^½         |
/// | `C`    | `c_factor_m05s05` | (m/s)^½         |
///
/// Solved exactly over the step, so that no step is too long for it.
/// Range: RTI 20 to 350; link in the full jet, which is within 12 % of the ceiling height.
///
/// Source: [`HESKESTAD_BILL_1988`](crate::fire::sources::HESKESTAD_BILL_1988).
///
/// ```
/// use sootline::fire::detection::{GasStep, HeatElement, element_rise_k};
///
/// // By hand: τ = 50/√2 = 35.355 s; 100 · (1 - e^(-23.12/35.355)) = 48.0 K.
/// let head = HeatElement { rti_m05s05: 50.0, c_factor_m05s05: 0.0, activation_temperature_k: 341.15 };
/// let rise_k = element_rise_k(&head, 0.0, GasStep { gas_rise_k: 100.0, velocity_m_s: 2.0, step_s: 23.12 });
/// assert!((rise_k - 48.0).abs() < 0.01);
/// ```
#[must_use]
pub fn element_rise_k(element: &HeatElement, rise_k: f64, gas: GasStep) -> f64 {
    let root = gas.velocity_m_s.max(0.0).sqrt();
    let sum = root + element.c_factor_m05s05;
    if sum <= 0.0 {
        return rise_k;
    }
    let steady_k = gas.gas_rise_k * root / sum;
    steady_k + (rise_k - steady_k) * (-sum * gas.step_s / element.rti_m05s05).exp()
}

/// Gas that washes a heat element for a while.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct GasStep {
    /// Gas above ambient, K.
    pub gas_rise_k: f64,
    /// Speed, m/s.
    pub velocity_m_s: f64,
    /// For how long, s.
    pub step_s: f64,
}

/// Where an element hangs and what surrounds it.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Watch {
    /// Place of the element.
    pub place: CeilingPlace,
    /// Ambient temperature, K.
    pub ambient_temperature_k: f64,
    /// When to stop looking, s.
    pub until_s: f64,
}

/// Time at which a heat element acts in the ceiling jet of a fire, in s; none where it does not by the end.
///
/// The jet is Alpert's ([`ceiling_jet`](super::ceiling_jet)) with the heat release of the moment, taken as
/// quasi-steady; steps are 1 s or 2 % of the time, whichever is longer.
///
/// Range: [`element_rise_k`] and [`alpert_limits`](super::ceiling_jet::alpert_limits).
///
/// ```
/// use sootline::fire::ceiling_jet::CeilingPlace;
/// use sootline::fire::detection::{HeatElement, Watch, activation_s};
///
/// // By hand for a steady 1000 kW: ΔT 58.41 K, u 2.0319 m/s, τ = 100/√2.0319 = 70.15 s;
/// // 70.15 · ln(58.41/(58.41-48)) = 121.0 s.
/// let head = HeatElement { rti_m05s05: 100.0, c_factor_m05s05: 0.0, activation_temperature_k: 293.15 + 48.0 };
/// let watch = Watch { place: CeilingPlace { height_m: 5.0, radius_m: 2.5 }, ambient_temperature_k: 293.15, until_s: 3600.0 };
/// let time_s = activation_s(&head, &watch, |_| 1000.0).unwrap();
/// assert!((time_s - 121.0).abs() < 0.5);
/// ```
#[must_use]
pub fn activation_s(
    element: &HeatElement,
    watch: &Watch,
    heat_release_kw: impl Fn(f64) -> f64,
) -> Option<f64> {
    const SHORTEST_STEP_S: f64 = 1.0;
    const STEP_SHARE_OF_TIME: f64 = 0.02;

    let needed_k = element.activation_temperature_k - watch.ambient_temperature_k;
    if needed_k <= 0.0 {
        return Some(0.0);
    }
    let rise_per = alpert_rise_per_kw_2_3(watch.place);
    let velocity_per = alpert_velocity_per_kw_1_3(watch.place);
    let (mut time_s, mut rise_k) = (0.0, 0.0);
    while time_s < watch.until_s {
        let step_s = (STEP_SHARE_OF_TIME * time_s).max(SHORTEST_STEP_S);
        let cube_root = heat_release_kw(time_s + 0.5 * step_s).max(0.0).cbrt();
        let gas = GasStep {
            gas_rise_k: rise_per * cube_root * cube_root,
            velocity_m_s: velocity_per * cube_root,
            step_s,
        };
        let next_k = element_rise_k(element, rise_k, gas);
        if next_k >= needed_k {
            // A straight line within the step: its curvature is below the step's own error.
            let at_s = time_s + step_s * (needed_k - rise_k) / (next_k - rise_k);
            return (at_s <= watch.until_s).then_some(at_s);
        }
        time_s += step_s;
        rise_k = next_k;
    }
    None
}

/// [`activation_s`] for a [`DesignFire`], on the clock of its curve.
#[must_use]
pub fn activation_by_fire_s(element: &HeatElement, watch: &Watch, fire: &DesignFire) -> Option<f64> {
    let phases = fire.phases();
    // After its end the fire heats nothing more.
    let watch = Watch { until_s: watch.until_s.min(phases.end_s), ..*watch };
    activation_s(element, &watch, |time_s| phases.heat_release_kw(fire.growth_kw_s2, time_s))
}

/// Time at which the ceiling jet at a smoke detector has risen by so much, in s on the clock of the fire's curve; none where
/// it never does.
///
/// ```text
/// alarm when ΔT(Q(t)) ≥ 13 K        (4 K for modern detectors)
/// ```
///
/// A stand-in, not a model of smoke: it says nothing of smouldering, and 13 K is weakly founded
/// ([`SMOKE_DETECTOR_RISE_13_K`]). Give the two rises as the span of the answer.
/// The jet takes [`heskestad_delichatsios_front_s`] to get there, which counts as the least.
///
/// Sources: [`HESKESTAD_DELICHATSIOS_1977`](crate::fire::sources::HESKESTAD_DELICHATSIOS_1977),
/// [`ALPERT_1972`](crate::fire::sources::ALPERT_1972).
///
/// ```
/// use sootline::fire::DesignFire;
/// use sootline::fire::ceiling_jet::CeilingPlace;
/// use sootline::fire::detection::{SMOKE_DETECTOR_RISE_13_K, smoke_alarm_s};
///
/// // By hand: r/H = 1: Q = 3 · (13·3/5.38)^1.5 = 58.55 kW, after √(58.55/0.0117) = 70.7 s.
/// let fire = DesignFire { growth_kw_s2: 0.0117, peak_kw: 1000.0, energy_kj: 1e6, decay_from_share: 0.7 };
/// let place = CeilingPlace { height_m: 3.0, radius_m: 3.0 };
/// assert!((smoke_alarm_s(&fire, place, SMOKE_DETECTOR_RISE_13_K).unwrap() - 70.7).abs() < 0.1);
/// ```
#[must_use]
pub fn smoke_alarm_s(fire: &DesignFire, place: CeilingPlace, rise_k: f64) -> Option<f64> {
    let risen_s = fire.time_to_kw_s(alpert_heat_release_kw(rise_k, place))?;
    Some(risen_s.max(heskestad_delichatsios_front_s(fire.growth_kw_s2, place)))
}

/// Time at which the first warm gas of a t² fire arrives at a place under the ceiling, in s.
///
/// ```text
/// t_f = 0.861 (1 + r/H) (A α)^(-1/5) H^(4/5)        A = g / (c_p T_0 ρ_0)
/// ```
///
/// | symbol | argument       | unit  |
/// |--------|----------------|-------|
/// | `α`    | `growth_kw_s2` | kW/s² |
/// | `H`    | `height_m`     | m     |
/// | `r`    | `radius_m`     | m     |
///
/// Range: t² growth, wide flat ceiling, `r/H` up to 4.
///
/// Source: [`HESKESTAD_DELICHATSIOS_1977`](crate::fire::sources::HESKESTAD_DELICHATSIOS_1977), in the form of NFPA 72 Annex B.
///
/// ```
/// use sootline::fire::ceiling_jet::CeilingPlace;
/// use sootline::fire::detection::heskestad_delichatsios_front_s;
///
/// // By hand: A = 9.80665/(1.005·353) = 0.027642; (0.027642·0.0117)^(-0.2) = 4.991; 3^0.8 = 2.408;
/// // 0.861 · 2 · 4.991 · 2.408 = 20.7 s.
/// let place = CeilingPlace { height_m: 3.0, radius_m: 3.0 };
/// assert!((heskestad_delichatsios_front_s(0.0117, place) - 20.7).abs() < 0.1);
/// ```
#[must_use]
pub fn heskestad_delichatsios_front_s(growth_kw_s2: f64, place: CeilingPlace) -> f64 {
    if growth_kw_s2 <= 0.0 {
        return 0.0;
    }
    let a = GRAVITY_M_S2 / (AIR_SPECIFIC_HEAT_KJ_KGK * AMBIENT_K * air_density_kg_m3(AMBIENT_K));
    0.861 * (1.0 + place.radius_m / place.height_m) * (a * growth_kw_s2).powf(-0.2) * place.height_m.powf(0.8)
}

/// What an element exceeds of the range of [`element_rise_k`].
#[must_use]
pub fn element_limits(element: &HeatElement) -> Exceeded {
    Exceeded::none()
        .when(element.rti_m05s05 < 20.0, "quicker than tested links (RTI below 20)")
        .when(element.rti_m05s05 > 350.0, "slower than tested links (RTI above 350)")
}

/// What a place exceeds of the range of [`smoke_alarm_s`].
#[must_use]
pub fn smoke_alarm_limits(place: CeilingPlace) -> Exceeded {
    Exceeded::none()
        .when(place.radius_m > 4.0 * place.height_m, "further from the fire than four ceiling heights")
        .when(place.height_m > 15.5, "ceiling higher than the 15.5 m of the tests")
}
