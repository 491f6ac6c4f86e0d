//! Between the wire's forms and the domain: reading bodies, writing records, patching.

use serde_json::Value;

use super::problem::ApiError;
use super::refusal::invalid;
use crate::catalogue::Catalogue;
use crate::domain::{Assumptions, Building, Invalid, Key, Opening, Pointer, Room, Simulation};
use crate::store::SavedBuilding;
use crate::wire::problem::Slug;
use crate::wire::{
    self, AssessInput, AssessmentRequest, BuildingInput, Links, Meta, OpeningInput, Refused, RoomInput,
    SimulationInput,
};

/// A building as answers and exports write it.
pub fn building_document(saved: &SavedBuilding) -> wire::Building {
    let head = &saved.head;
    let meta = Meta {
        id: head.id,
        revision: head.revision,
        created_at: head.created_at,
        updated_at: head.updated_at,
        updated_by: head.updated_by.clone(),
        links: Links::of(head.id, head.latest_assessment.is_some()),
    };
    wire::Building::of(&saved.building, &meta)
}

/// Reads a building.
pub fn read_building(bytes: &[u8], catalogue: &Catalogue) -> Result<Building, ApiError> {
    wire::read::<BuildingInput>(bytes, catalogue).map_err(refused)
}

/// Reads a room that is put under this key.
pub fn read_room(bytes: &[u8], key: &Key, catalogue: &Catalogue) -> Result<Room, ApiError> {
    wire::read_part::<RoomInput>(bytes, key, catalogue).map_err(refused)
}

/// Reads an opening that is put under this key.
pub fn read_opening(bytes: &[u8], key: &Key, catalogue: &Catalogue) -> Result<Opening, ApiError> {
    wire::read_part::<OpeningInput>(bytes, key, catalogue).map_err(refused)
}

/// Reads what to assume; nothing at all leaves it to the service.
pub fn read_assumptions(bytes: &[u8], catalogue: &Catalogue) -> Result<Assumptions, ApiError> {
    if bytes.is_empty() {
        return Ok(Assumptions::default());
    }
    wire::read::<AssessmentRequest>(bytes, catalogue).map_err(refused)
}

/// Reads a building that is only sent, and what to assume of it.
pub fn read_assess(bytes: &[u8], catalogue: &Catalogue) -> Result<(Building, Assumptions), ApiError> {
    let asked = wire::read::<AssessInput>(bytes, catalogue).map_err(refused)?;
    Ok((asked.building, asked.assumptions))
}

/// Reads a transient run.
pub fn read_simulation(bytes: &[u8], catalogue: &Catalogue) -> Result<Simulation, ApiError> {
    wire::read::<SimulationInput>(bytes, catalogue).map_err(refused)
}

/// A merge patch, read as strictly as any other body.
pub struct Patch(Value);

impl Patch {
    /// Reads it.
    pub fn read(bytes: &[u8]) -> Result<Self, ApiError> {
        wire::read_json(bytes).map(Self).map_err(refused)
    }

    /// The building as it shall be.
    pub fn on_building(&self, building: &Building, catalogue: &Catalogue) -> Result<Building, ApiError> {
        let mut value = serde_json::from_str(&wire::stored::to_text(building)).map_err(unwritable)?;
        wire::merge_patch(&mut value, &self.0);
        wire::read_value::<BuildingInput>(&value, catalogue).map_err(refused)
    }

    /// The building with the room of this key as it shall be.
    pub fn on_room(
        &self,
        building: &Building,
        key: &Key,
        catalogue: &Catalogue,
    ) -> Result<Building, ApiError> {
        let room = building.room(key).ok_or_else(|| ApiError::not_found("such room"))?;
        let mut value = serde_json::to_value(wire::Room::of(room)).map_err(unwritable)?;
        wire::merge_patch(&mut value, &self.0);
        let room = wire::read_part_value::<RoomInput>(&value, key, catalogue).map_err(refused)?;
        building.with_room(room).map_err(invalid)
    }

    /// The building with the opening of this key as it shall be.
    pub fn on_opening(
        &self,
        building: &Building,
        key: &Key,
        catalogue: &Catalogue,
    ) -> Result<Building, ApiError> {
        let opening = building.opening(key).ok_or_else(|| ApiError::not_found("such opening"))?;
        let mut value = serde_json::to_value(wire::Opening::of(opening)).map_err(unwritable)?;
        wire::merge_patch(&mut value, &self.0);
        let opening = wire::read_part_value::<OpeningInput>(&value, key, catalogue).map_err(refused)?;
        building.with_opening(opening).map_err(invalid)
    }
}

/// Values that the domain holds can be written; if not, the fault is the service's.
fn unwritable(error: serde_json::Error) -> ApiError {
    ApiError::internal(&error)
}

fn refused(refused: Refused) -> ApiError {
    match refused {
        Refused::Unreadable(fault) => {
            ApiError::new(Slug::Unreadable, format!("The body cannot be read: {}.", fault.detail))
                .with_faults(vec![fault.into()])
        }
        Refused::Invalid(faults) => invalid(faults),
    }
}

/// A fault of the body as a whole, or of one of its members.
pub fn fault(member: &str, code: &'static str, detail: impl Into<String>) -> Invalid {
    let root = Pointer::root();
    let pointer = if member.is_empty() { root } else { root.member(member) };
    Invalid { pointer, code, detail: detail.into(), suggestion: None }
}
