//! The assumptions that were asked for, echoed whole.

use serde::Serialize;
use utoipa::ToSchema;

use super::number::Exact;
use super::words::{GrowthWord, LevelWord, ScenarioWord};
use crate::domain::Key;
use crate::domain::assumptions::{Ambient, Assumptions};
use crate::domain::building::Response;
use crate::domain::quantity::{Kind, Quantity};

/// What was asked for; null where it was left to the service.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
#[schema(as = RequestedAssumptions)]
pub struct Requested {
    /// Level.
    #[schema(required)]
    pub level: Option<LevelWord>,
    /// Only these scenarios.
    #[schema(required)]
    pub scenarios: Option<Vec<ScenarioWord>>,
    /// Horizon.
    #[schema(required)]
    pub horizon_s: Option<Exact>,
    /// Fractile of the fire load.
    #[schema(required)]
    pub fuel_load_fractile: Option<Exact>,
    /// Growth.
    #[schema(required)]
    pub growth: Option<GrowthWord>,
    /// Key of the fuel package that burns first.
    #[schema(required)]
    pub item_of_origin: Option<String>,
    /// Spans of the response.
    pub response: RequestedResponse,
    /// Air before the fire.
    pub ambient: RequestedAmbient,
    /// Times of entry, on the fire clock.
    #[schema(required)]
    pub entry_times_s: Option<Vec<Exact>>,
    /// Seed of the sampling.
    #[schema(required)]
    pub seed: Option<u64>,
}

/// Spans of the response that were asked for.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct RequestedResponse {
    /// Established burning to detection.
    #[schema(required)]
    pub detection_s: Option<Exact>,
    /// Detection to call.
    #[schema(required)]
    pub call_s: Option<Exact>,
    /// Call handling.
    #[schema(required)]
    pub processing_s: Option<Exact>,
    /// Turnout.
    #[schema(required)]
    pub turnout_s: Option<Exact>,
    /// Travel.
    #[schema(required)]
    pub travel_s: Option<Exact>,
    /// Set-up.
    #[schema(required)]
    pub setup_s: Option<Exact>,
}

/// Air before the fire that was asked for.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct RequestedAmbient {
    /// Outside.
    #[schema(required)]
    pub temperature_c: Option<Exact>,
    /// Inside.
    #[schema(required)]
    pub indoor_temperature_c: Option<Exact>,
    /// Wind.
    #[schema(required)]
    pub wind_m_s: Option<Exact>,
    /// Where it comes from.
    #[schema(required)]
    pub wind_from_deg: Option<Exact>,
}

fn exact<K: Kind>(quantity: Option<Quantity<K>>) -> Option<Exact> {
    quantity.and_then(|quantity| Exact::of(quantity.get()))
}

impl From<&Assumptions> for Requested {
    fn from(asked: &Assumptions) -> Self {
        Self {
            level: asked.level.map(Into::into),
            scenarios: asked
                .scenarios
                .as_ref()
                .map(|scenarios| scenarios.iter().map(|&scenario| scenario.into()).collect()),
            horizon_s: exact(asked.horizon_s),
            fuel_load_fractile: exact(asked.fuel_load_fractile),
            growth: asked.growth.map(Into::into),
            item_of_origin: asked.item_of_origin.as_ref().map(Key::to_string),
            response: (&asked.response).into(),
            ambient: (&asked.ambient).into(),
            entry_times_s: asked
                .entry_times_s
                .as_ref()
                .map(|times| times.iter().filter_map(|time| Exact::of(time.get())).collect()),
            seed: asked.seed,
        }
    }
}

impl From<&Response> for RequestedResponse {
    fn from(asked: &Response) -> Self {
        Self {
            detection_s: exact(asked.detection_s),
            call_s: exact(asked.call_s),
            processing_s: exact(asked.processing_s),
            turnout_s: exact(asked.turnout_s),
            travel_s: exact(asked.travel_s),
            setup_s: exact(asked.setup_s),
        }
    }
}

impl From<&Ambient> for RequestedAmbient {
    fn from(asked: &Ambient) -> Self {
        Self {
            temperature_c: exact(asked.temperature_c),
            indoor_temperature_c: exact(asked.indoor_temperature_c),
            wind_m_s: asked.wind_m_s.and_then(Exact::of),
            wind_from_deg: asked.wind_from_deg.and_then(Exact::of),
        }
    }
}
