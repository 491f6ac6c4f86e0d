//! Detectors and heads: elements in the ceiling jet, followed from step to step.

use super::network::{Detector, Element, Network};
use super::outcome::Sample;
use crate::fire::ceiling_jet::{CeilingPlace, alpert_rise_k, alpert_velocity_m_s};

/// One device.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Device {
    /// Temperature of the element, K.
    pub element_k: f64,
    /// Has it answered?
    pub answered: bool,
}

/// Gas at a device: the ceiling jet of the strongest fire of its room, in the layer that has formed.
///
/// The jet rises out of the cool gas, at most 1 100 K warmer, as a flame is; the device is never cooler than the
/// layer about it. That the jet draws hot gas where a layer has formed is left out: it answers late rather than early.
fn gas_at(network: &Network, detector: &Detector, sample: &Sample) -> (f64, f64) {
    let room = &network.rooms[detector.room];
    let state = &sample.rooms[detector.room];
    let mut rise_k: f64 = 0.0;
    let mut velocity_m_s: f64 = 0.1;
    for (fire, burning) in network.fires.iter().zip(&sample.fires) {
        if fire.room != detector.room || burning.heat_release_kw <= 0.0 {
            continue;
        }
        let place = CeilingPlace {
            height_m: (room.height_m - fire.base_height_m).max(0.1),
            radius_m: detector.from_fire_m.max(0.0),
        };
        rise_k = rise_k.max(alpert_rise_k(burning.heat_release_kw, place).min(1100.0));
        velocity_m_s = velocity_m_s.max(alpert_velocity_m_s(burning.heat_release_kw, place));
    }
    (
        state.lower.temperature_k + rise_k.max(state.upper.temperature_k - state.lower.temperature_k),
        velocity_m_s,
    )
}

impl Device {
    /// A device in air of a temperature.
    pub(super) fn at(temperature_k: f64) -> Self {
        Self { element_k: temperature_k, answered: false }
    }

    /// The element after a step, and how far beyond its answer it is, K.
    ///
    /// `dT_e/dt = √u/RTI (T_gas - T_e)` with the means of the step, solved exactly.
    pub(super) fn after(
        &self,
        network: &Network,
        detector: &Detector,
        from: &Sample,
        to: &Sample,
    ) -> (f64, f64) {
        let (gas_from_k, velocity_from) = gas_at(network, detector, from);
        let (gas_to_k, velocity_to) = gas_at(network, detector, to);
        match detector.element {
            Element::Rise(rise_k) => (gas_to_k, gas_to_k - network.ambient.indoor_temperature_k - rise_k),
            Element::Heat { rti_m05s05, answers_k } => {
                let step_s = to.time_s - from.time_s;
                let per_s = (0.5 * (velocity_from + velocity_to)).sqrt() / rti_m05s05.max(1e-3);
                let gas_k = 0.5 * (gas_from_k + gas_to_k);
                let element_k = gas_k + (self.element_k - gas_k) * (-per_s * step_s).exp();
                (element_k, element_k - answers_k)
            }
        }
    }
}
