//! The resolved inputs of one room.

use super::assumed::{Account, OWN, find};
use super::contents::Contents;
use super::findings::{AssumedValue, Provenance};
use super::geometry::Geometry;
use super::linings::Lined;
use super::plan::Plan;
use super::watchers::{Watcher, watchers_of};
use crate::catalogue::Catalogue;
use crate::domain::room::Hazard;
use crate::domain::{Assumptions, Key, Named, Room};
use crate::fire::constants::{AMBIENT_K, ICE_POINT_K};
use crate::fire::leakage::surface_area_m2;

/// Leakage class where nobody recorded one. Ours.
const DEFAULT_LEAKAGE: &str = "average";

/// Horizons, s: 60 minutes open, 120 minutes shut.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Horizon {
    pub open_s: f64,
    pub shut_s: f64,
}

impl Horizon {
    pub fn of(assumptions: &Assumptions) -> Self {
        match assumptions.horizon_s {
            Some(span) => Self { open_s: span.get(), shut_s: span.get() },
            None => Self { open_s: 3600.0, shut_s: 7200.0 },
        }
    }
}

/// Outdoor and indoor air, K.
pub(super) fn ambient_k(assumptions: &Assumptions) -> f64 {
    let ambient = assumptions.ambient;
    ambient
        .indoor_temperature_c
        .or(ambient.temperature_c)
        .map_or(AMBIENT_K, |temperature| temperature.get() + ICE_POINT_K)
}

/// One room, resolved.
#[derive(Debug, Clone)]
pub(super) struct Inputs<'a> {
    pub number: usize,
    pub room: &'a Room,
    pub key: &'a Key,
    pub plan: &'a Plan<'a>,
    pub geometry: Geometry,
    pub contents: Contents,
    pub lined: Lined<'a>,
    /// Cracks of the envelope, m².
    pub envelope_leak_m2: f64,
    /// Nobody measured it.
    pub leak_assumed: bool,
    pub watchers: Vec<Watcher>,
    pub sprinkler: Option<Watcher>,
    pub hazards: Vec<Hazard>,
    pub ambient_k: f64,
    pub horizon: Horizon,
}

impl<'a> Inputs<'a> {
    /// Resolves one room; the error says which name the catalogue lacks.
    pub fn of(
        number: usize,
        plan: &'a Plan<'a>,
        catalogue: &'a Catalogue,
        assumptions: &Assumptions,
        account: &mut Account,
    ) -> Result<Self, String> {
        let room = &plan.building.rooms[number];
        let geometry = plan.rooms[number].geometry;
        let lined = Lined::of(room, &geometry, catalogue, account)?;
        let contents = Contents::of(room, &geometry, &lined, catalogue, assumptions, account)?;
        let envelope_leak_m2 = envelope_leak_m2(room, &geometry, catalogue, account)?;
        plan.enter_cracks(number, account);
        if assumptions.ambient.temperature_c.is_none() && assumptions.ambient.indoor_temperature_c.is_none() {
            account.own("ambient.temperature_c", AMBIENT_K - ICE_POINT_K, "20 °C, common practice");
        }
        let (watchers, sprinkler) = watchers_of(plan, number, &geometry, catalogue, account)?;
        Ok(Self {
            number,
            room,
            key: &room.key,
            plan,
            geometry,
            contents,
            lined,
            envelope_leak_m2,
            leak_assumed: room.leakage_area_m2.is_none(),
            watchers,
            sprinkler,
            hazards: hazards_of(room),
            ambient_k: ambient_k(assumptions),
            horizon: Horizon::of(assumptions),
        })
    }

    /// The same room with its fire load times a factor.
    pub fn with_load(&self, factor: f64) -> Self {
        let mut fuller = self.clone();
        let load = &mut fuller.contents.load;
        load.p50_mj_m2 *= factor;
        load.typical_mj_m2 *= factor;
        load.p95_mj_m2 *= factor;
        fuller
    }

    /// Hazards outside the methods that are there.
    pub fn known_hazards(&self) -> impl Iterator<Item = Hazard> {
        self.hazards.iter().copied().filter(|hazard| !matches!(hazard, Hazard::None | Hazard::NotRecorded))
    }

    /// Nobody recorded whether there are hazards.
    pub fn hazards_unrecorded(&self) -> bool {
        self.hazards.contains(&Hazard::NotRecorded)
    }
}

/// The hazards in order, `not_recorded` where the list is empty.
fn hazards_of(room: &Room) -> Vec<Hazard> {
    let mut hazards = room.hazards.clone();
    if hazards.is_empty() {
        hazards.push(Hazard::NotRecorded);
    }
    hazards.sort();
    hazards.dedup();
    hazards
}

fn envelope_leak_m2(
    room: &Room,
    geometry: &Geometry,
    catalogue: &Catalogue,
    account: &mut Account,
) -> Result<f64, String> {
    if let Some(measured) = room.leakage_area_m2 {
        return Ok(measured.get());
    }
    let default = Named::Catalogue(DEFAULT_LEAKAGE.to_owned());
    let class = room.leakage_class.as_ref().unwrap_or(&default);
    if room.leakage_class.is_none() {
        account.enter(
            "leakage_class",
            AssumedValue::Text(DEFAULT_LEAKAGE.into()),
            OWN,
            Provenance::Estimated,
        );
    }
    let (leaks, entered) = {
        let found = find(class, |key| catalogue.leakage(key)).ok_or_else(|| format!("leakage {class:?}"))?;
        let leaks = found.properties;
        let area_m2 = surface_area_m2(geometry.wall_area_m2(), leaks.wall_m2_m2)
            + surface_area_m2(geometry.floor_area_m2, leaks.floor_m2_m2)
            + surface_area_m2(geometry.floor_area_m2, leaks.ceiling_m2_m2);
        account.row("leakage_area_m2", area_m2, &found, "wall_m2_m2");
        (area_m2, found.row.is_some())
    };
    if !entered {
        account.own("leakage_area_m2", leaks, "computed from the leakage given and the room's surfaces");
    }
    Ok(leaks)
}
