//! Detectors and sprinkler heads of a room, and when they act.

use super::assumed::{Account, OWN, find};
use super::geometry::Geometry;
use super::plan::Plan;
use crate::catalogue::Catalogue;
use crate::domain::Key;
use crate::domain::building::{Coverage, SprinklerState};
use crate::domain::properties::{DetectorProperties, SprinklerProperties};
use crate::fire::ceiling_jet::CeilingPlace;
use crate::fire::constants::ICE_POINT_K;
use crate::fire::detection::{self, HeatElement, Watch};
use crate::fire::{DesignFire, Exceeded};

/// Spacing of sprinkler heads where nobody measured it, m: about 12 m² a head, common practice.
const HEAD_SPACING_M: f64 = 3.5;
/// Class of sprinkler where nobody recorded one. Ours: slow, so that none is flattered.
const DEFAULT_SPRINKLER: &str = "standard_68";

/// What makes it act.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) enum Acts {
    /// An element that lags behind the gas.
    Element(HeatElement),
    /// The gas has risen by so much, K: at best and usually.
    Rise { least_k: f64, usual_k: f64 },
}

/// A detector or the nearest sprinkler head.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Watcher {
    pub key: Option<Key>,
    pub place: CeilingPlace,
    pub acts: Acts,
    /// Method of its figure.
    pub method: &'static str,
    pub recalled: bool,
    /// Water it gives, mm/s; zero of a detector.
    pub density_mm_s: f64,
}

impl Watcher {
    /// When it acts, s on the clock of the fire's curve; `best` takes the most sensitive published value.
    pub fn acts_s(&self, fire: &DesignFire, ambient_k: f64, until_s: f64, best: bool) -> Option<f64> {
        match self.acts {
            Acts::Element(element) => {
                let watch = Watch { place: self.place, ambient_temperature_k: ambient_k, until_s };
                detection::activation_by_fire_s(&element, &watch, fire)
            }
            Acts::Rise { least_k, usual_k } => {
                let rise_k = if best { least_k } else { usual_k };
                detection::smoke_alarm_s(fire, self.place, rise_k).filter(|&at_s| at_s <= until_s)
            }
        }
    }

    /// What the place exceeds of the method's range.
    pub fn exceeded(&self, heat_release_kw: f64) -> Exceeded {
        let jet = crate::fire::ceiling_jet::alpert_limits(heat_release_kw, self.place);
        match self.acts {
            Acts::Element(element) => jet.and(detection::element_limits(&element)),
            Acts::Rise { .. } => jet.and(detection::smoke_alarm_limits(self.place)),
        }
    }
}

/// The detectors of a room, and its sprinkler head where there is any sprinkler.
pub(super) fn watchers_of(
    plan: &Plan<'_>,
    number: usize,
    geometry: &Geometry,
    catalogue: &Catalogue,
    account: &mut Account,
) -> Result<(Vec<Watcher>, Option<Watcher>), String> {
    let room = &plan.building.rooms[number];
    let mut detectors = Vec::with_capacity(room.detectors.len());
    for detector in &room.detectors {
        let found = find(&detector.class, |key| catalogue.detector(key))
            .ok_or_else(|| format!("detector {:?}", detector.class))?;
        let radius_m = match detector.from_fire_m {
            Some(distance) => distance.get(),
            None => {
                let radius_m = geometry.half_diagonal_m();
                let field = format!("detectors.{}.from_fire_m", detector.key);
                account.own(field, radius_m, "half the diagonal of the room");
                radius_m
            }
        };
        let place = CeilingPlace { height_m: geometry.height_m, radius_m };
        if let Some((acts, method)) = acts_of(found.properties) {
            detectors.push(Watcher {
                key: Some(detector.key.clone()),
                place,
                acts,
                method,
                recalled: found.recalled(),
                density_mm_s: 0.0,
            });
        }
    }
    Ok((detectors, head_of(plan, number, geometry, catalogue, account)?))
}

/// What makes a detector act: a lagging element where it has one, else a rise of the gas. Optical density
/// is not computed at screening; a class that knows nothing else is taken to act at 13 K.
fn acts_of(class: &DetectorProperties) -> Option<(Acts, &'static str)> {
    if let (Some(rti), Some(activation_c)) = (class.response_time_index_sqrt_ms, class.activation_c) {
        let element = HeatElement {
            rti_m05s05: rti,
            c_factor_m05s05: 0.0,
            activation_temperature_k: activation_c + ICE_POINT_K,
        };
        return Some((Acts::Element(element), "rti_heat_element"));
    }
    let usual_k = class
        .activation_rise_k
        .or_else(|| class.activation_c.map(|activation_c| (activation_c - 20.0).max(1.0)))
        .unwrap_or(detection::SMOKE_DETECTOR_RISE_13_K);
    let least_k = usual_k.min(detection::SMOKE_DETECTOR_RISE_4_K);
    Some((Acts::Rise { least_k, usual_k }, "smoke_detector_rise"))
}

/// The head that is furthest from a fire among four: the worst place.
fn head_of(
    plan: &Plan<'_>,
    number: usize,
    geometry: &Geometry,
    catalogue: &Catalogue,
    account: &mut Account,
) -> Result<Option<Watcher>, String> {
    let room = &plan.building.rooms[number];
    let sprinklers = plan.building.sprinklers;
    let fitted = !matches!(sprinklers.state, SprinklerState::None | SprinklerState::NotRecorded);
    let covered = fitted && sprinklers.coverage == Some(Coverage::Full);
    let class: &SprinklerProperties;
    let recalled;
    match &room.sprinkler_heads {
        Some(heads) => {
            let found = find(&heads.class, |key| catalogue.sprinkler(key))
                .ok_or_else(|| format!("sprinkler {:?}", heads.class))?;
            (class, recalled) = (found.properties, found.recalled());
        }
        None if covered => {
            let row = catalogue
                .sprinkler(DEFAULT_SPRINKLER)
                .ok_or_else(|| format!("sprinkler {DEFAULT_SPRINKLER}"))?;
            account.enter(
                "sprinkler_heads.class",
                super::findings::AssumedValue::Text(DEFAULT_SPRINKLER.into()),
                OWN,
                super::findings::Provenance::Estimated,
            );
            (class, recalled) = (&row.properties, true);
        }
        None => return Ok(None),
    }
    let spacing_m = match room.sprinkler_heads.as_ref().and_then(|heads| heads.spacing_m) {
        Some(spacing) => spacing.get(),
        None => {
            account.own("sprinkler_heads.spacing_m", HEAD_SPACING_M, "about 12 m² a head, common practice");
            HEAD_SPACING_M
        }
    };
    let radius_m = (spacing_m * std::f64::consts::FRAC_1_SQRT_2).min(geometry.half_diagonal_m());
    Ok(Some(Watcher {
        key: None,
        place: CeilingPlace { height_m: geometry.height_m, radius_m },
        acts: Acts::Element(HeatElement {
            rti_m05s05: class.response_time_index_sqrt_ms,
            c_factor_m05s05: class.conduction_factor_sqrt_m_s,
            activation_temperature_k: class.activation_c + ICE_POINT_K,
        }),
        method: "rti_heat_element",
        recalled,
        density_mm_s: class.spray_density_mm_s,
    }))
}
