//! Changing one room or one opening of a building.

use super::Store;
use super::condition::Condition;
use super::edit::Expect;
use super::error::{Conflict, StoreError};
use super::records::{Effects, Part, Saved, SavedBuilding};
use crate::domain::opening::Space;
use crate::domain::{Building, BuildingId, Caller, Key, Opening, Room};

impl Store {
    /// Puts a room under its key: a new one, or in the place of what was there.
    ///
    /// `check` judges the building with the room in it; its refusal ends the
    /// change and nothing is saved.
    pub async fn put_room<E, F>(
        &self,
        caller: &Caller,
        id: BuildingId,
        room: Room,
        condition: Condition,
        effects: Effects,
        check: F,
    ) -> Result<Saved<Room>, E>
    where
        E: From<StoreError> + Send + 'static,
        F: FnOnce(&Building) -> Result<(), E> + Send + 'static,
    {
        let key = room.key.clone();
        let part = Part::Room(key.clone());
        let place = move |building: &Building| {
            let mut next = building.clone();
            match next.rooms.iter_mut().find(|old| old.key == room.key) {
                Some(old) => *old = room,
                None => next.rooms.push(room),
            }
            check(&next).map(|()| next)
        };
        let saved = self.change(caller, id, part, (Expect::ThereOrNew, condition), effects, place).await?;
        Ok(found(saved.room(&key), &saved)?)
    }

    /// Puts an opening under its key: a new one, or in the place of what was there.
    ///
    /// `check` judges the building with the opening in it; its refusal ends the
    /// change and nothing is saved.
    pub async fn put_opening<E, F>(
        &self,
        caller: &Caller,
        id: BuildingId,
        opening: Opening,
        condition: Condition,
        effects: Effects,
        check: F,
    ) -> Result<Saved<Opening>, E>
    where
        E: From<StoreError> + Send + 'static,
        F: FnOnce(&Building) -> Result<(), E> + Send + 'static,
    {
        let key = opening.key.clone();
        let part = Part::Opening(key.clone());
        let place = move |building: &Building| {
            let mut next = building.clone();
            match next.openings.iter_mut().find(|old| old.key == opening.key) {
                Some(old) => *old = opening,
                None => next.openings.push(opening),
            }
            check(&next).map(|()| next)
        };
        let saved = self.change(caller, id, part, (Expect::ThereOrNew, condition), effects, place).await?;
        Ok(found(saved.opening(&key), &saved)?)
    }

    /// Deletes a room, unless openings join it: those are named in the conflict.
    ///
    /// Boundaries that it shared go with it: a wall of a room that is no more
    /// has nothing to say.
    pub async fn delete_room(
        &self,
        caller: &Caller,
        id: BuildingId,
        key: &Key,
        condition: Condition,
        effects: Effects,
    ) -> Result<SavedBuilding, StoreError> {
        let room = key.clone();
        self.edit(caller, id, Part::Room(key.clone()), condition, effects, move |building| {
            let openings: Vec<Key> = building.openings_of(&room).map(|opening| opening.key.clone()).collect();
            if !openings.is_empty() {
                return Err(Conflict::RoomJoined { room, openings }.into());
            }
            let mut next = building.clone();
            next.rooms.retain(|old| old.key != room);
            let of_room = |space: &Space| matches!(space, Space::Room(key) if *key == room);
            next.boundaries.retain(|boundary| !boundary.between.iter().any(of_room));
            Ok(next)
        })
        .await
    }

    /// Deletes an opening.
    pub async fn delete_opening(
        &self,
        caller: &Caller,
        id: BuildingId,
        key: &Key,
        condition: Condition,
        effects: Effects,
    ) -> Result<SavedBuilding, StoreError> {
        let opening = key.clone();
        self.edit(caller, id, Part::Opening(key.clone()), condition, effects, move |building| {
            let mut next = building.clone();
            next.openings.retain(|old| old.key != opening);
            Ok(next)
        })
        .await
    }
}

/// The part that was just saved.
fn found<T>(part: Option<T>, saved: &SavedBuilding) -> Result<T, StoreError> {
    part.ok_or_else(|| StoreError::Corrupt(format!("building {} lost a part on saving", saved.head.id)))
}
