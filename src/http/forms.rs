//! STUB
use crate::catalogue::Catalogue;
use crate::domain::{Assumptions, Building, Key, Opening, Room};
use crate::store::SavedBuilding;
use crate::wire;
use super::problem::ApiError;
pub struct Patch;
pub fn building(_: &SavedBuilding) -> wire::Building { todo!() }
pub fn room(_: &Room) -> wire::Room { todo!() }
pub fn opening(_: &Opening) -> wire::Opening { todo!() }
pub fn read_building(_: &[u8], _: &Catalogue) -> Result<Building, ApiError> { todo!() }
pub fn read_room(_: &[u8], _: &Key, _: &Catalogue) -> Result<Room, ApiError> { todo!() }
pub fn read_opening(_: &[u8], _: &Key, _: &Catalogue) -> Result<Opening, ApiError> { todo!() }
pub fn read_patch(_: &[u8]) -> Result<Patch, ApiError> { todo!() }
pub fn patched_building(_: &Building, _: &Patch, _: &Catalogue) -> Result<Building, ApiError> { todo!() }
pub fn patched_room(_: &Building, _: &Key, _: &Patch, _: &Catalogue) -> Result<Building, ApiError> { todo!() }
pub fn patched_opening(_: &Building, _: &Key, _: &Patch, _: &Catalogue) -> Result<Building, ApiError> { todo!() }
pub fn check_with_room(_: &Building, _: &Key) -> Result<(), ApiError> { todo!() }
pub fn check_with_opening(_: &Building, _: &Key) -> Result<(), ApiError> { todo!() }
pub fn read_assumptions(_: &[u8], _: &Catalogue) -> Result<Assumptions, ApiError> { todo!() }
pub fn read_assess(_: &[u8], _: &Catalogue) -> Result<(Building, Assumptions), ApiError> { todo!() }
