//! Changing buildings as a whole, and the one way in which every change is made.

use std::collections::{HashMap, HashSet};
use std::sync::Arc;

use sqlx::SqliteConnection;

use super::buildings::load;
use super::changes::{self, Change};
use super::condition::Condition;
use super::error::{Conflict, Missing, StoreError};
use super::parts::Sort;
use super::projections::{self, openings, rooms};
use super::records::{Effects, Head, Part, SavedBuilding};
use super::{Store, heads, parts, revisions};
use crate::domain::{Building, BuildingId, Caller, Key, Opening, Room};

/// Whether the addressed part must be there before the change.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Expect {
    /// It must: nothing there is [`StoreError::NotFound`].
    There,
    /// It may be new: nothing there fails a condition that wants it there.
    ThereOrNew,
}

impl Store {
    /// Enters a building under an id that was made for it.
    pub async fn create_building(
        &self,
        caller: &Caller,
        id: BuildingId,
        building: Building,
        effects: Effects,
    ) -> Result<SavedBuilding, StoreError> {
        let by = caller.clone();
        let saved = self
            .writer
            .write(move |tx| {
                Box::pin(async move {
                    if heads::exists(tx, &by.agency, id).await? {
                        return Err(Conflict::IdTaken { id: id.0 }.into());
                    }
                    save(tx, &by, id, None, building, &Part::Whole, &effects).await
                })
            })
            .await?;
        self.remember(caller, &saved);
        Ok(saved)
    }

    /// Puts a building in the place of what was there.
    ///
    /// The tags of rooms and openings that stay as they were do not move.
    pub async fn put_building(
        &self,
        caller: &Caller,
        id: BuildingId,
        building: Building,
        condition: Condition,
        effects: Effects,
    ) -> Result<SavedBuilding, StoreError> {
        self.edit(caller, id, Part::Whole, condition, effects, move |_| Ok(building)).await
    }

    /// Changes a part that is there by a function of the whole building.
    ///
    /// `change` is given the building as it is and answers the building as it
    /// shall be, checked as a whole, or a refusal, with which the edit ends and
    /// nothing is saved. It runs on the writer's task: it should be quick.
    pub async fn edit<E, F>(
        &self,
        caller: &Caller,
        id: BuildingId,
        part: Part,
        condition: Condition,
        effects: Effects,
        change: F,
    ) -> Result<SavedBuilding, E>
    where
        E: From<StoreError> + Send + 'static,
        F: FnOnce(&Building) -> Result<Building, E> + Send + 'static,
    {
        self.change(caller, id, part, (Expect::There, condition), effects, change).await
    }

    /// Deletes a building: it leaves lists, its reference is free, its revisions are kept.
    pub async fn delete_building(
        &self,
        caller: &Caller,
        id: BuildingId,
        condition: Condition,
        effects: Effects,
    ) -> Result<(), StoreError> {
        let by = caller.clone();
        self.writer
            .write(move |tx| {
                Box::pin(async move {
                    let head = heads::get(tx, &by.agency, id).await?;
                    let head = head.ok_or(StoreError::NotFound(Missing::Building))?;
                    condition.judge(Some(head.revision))?;
                    heads::delete(tx, &by.agency, id, effects.at, &by.actor).await?;
                    projections::delete_all(tx, &by.agency, id).await?;
                    parts::delete_all(tx, &by.agency, id).await?;
                    changes::insert(tx, &by, id, head.revision, &Change::Deleted, &effects).await
                })
            })
            .await
    }

    /// Reads, judges, changes and saves a building in one transaction.
    pub(super) async fn change<E, F>(
        &self,
        caller: &Caller,
        id: BuildingId,
        part: Part,
        (expect, condition): (Expect, Condition),
        effects: Effects,
        change: F,
    ) -> Result<SavedBuilding, E>
    where
        E: From<StoreError> + Send + 'static,
        F: FnOnce(&Building) -> Result<Building, E> + Send + 'static,
    {
        let by = caller.clone();
        let cache = self.cache.clone();
        let saved = self
            .writer
            .write(move |tx| {
                Box::pin(async move {
                    let current = load(tx, &by.agency, id, &cache).await?;
                    let current = current.ok_or(StoreError::NotFound(Missing::Building))?;
                    let tag = current.tag(&part);
                    if tag.is_none() && expect == Expect::There {
                        return Err(E::from(StoreError::NotFound(missing(&part))));
                    }
                    condition.judge(tag)?;
                    let next = change(&current.building)?;
                    save(tx, &by, id, Some(&current), next, &part, &effects).await.map_err(E::from)
                })
            })
            .await?;
        self.remember(caller, &saved);
        Ok(saved)
    }
}

fn missing(part: &Part) -> Missing {
    match part {
        Part::Whole => Missing::Building,
        Part::Room(_) => Missing::Room,
        Part::Opening(_) => Missing::Opening,
    }
}

/// Writes the next revision of a building with all that hangs on it.
async fn save(
    tx: &mut SqliteConnection,
    caller: &Caller,
    id: BuildingId,
    before: Option<&SavedBuilding>,
    building: Building,
    part: &Part,
    effects: &Effects,
) -> Result<SavedBuilding, StoreError> {
    refuse_doubled_keys(&building)?;
    if let Some(reference) = &building.reference {
        let holder = heads::id_of_reference(tx, &caller.agency, reference).await?;
        if let Some(by) = holder.filter(|holder| *holder != id) {
            return Err(Conflict::ReferenceTaken { reference: reference.clone(), by }.into());
        }
    }
    let head = Head {
        id,
        revision: before.map_or(1, |before| before.head.revision + 1),
        created_at: before.map_or(effects.at, |before| before.head.created_at),
        updated_at: effects.at,
        updated_by: caller.actor.clone(),
        latest_assessment: before.and_then(|before| before.head.latest_assessment),
    };
    heads::save(tx, &caller.agency, &head, &building).await?;
    revisions::insert(tx, &caller.agency, &head, &building).await?;
    let mut saved = SavedBuilding {
        head,
        building: Arc::new(building),
        parts: before.map(|before| Arc::clone(&before.parts)).unwrap_or_default(),
    };
    save_rooms(tx, caller, before, &mut saved, part).await?;
    save_openings(tx, caller, before, &mut saved, part).await?;
    let change = if before.is_some() { Change::Changed(part) } else { Change::Created };
    changes::insert(tx, caller, id, saved.head.revision, &change, effects).await?;
    Ok(saved)
}

/// Projects the rooms that changed, and moves their tags and that of the addressed room.
async fn save_rooms(
    tx: &mut SqliteConnection,
    caller: &Caller,
    before: Option<&SavedBuilding>,
    saved: &mut SavedBuilding,
    part: &Part,
) -> Result<(), StoreError> {
    let Head { id, revision, .. } = saved.head;
    let tags = &mut Arc::make_mut(&mut saved.parts).rooms;
    let mut gone: HashMap<&Key, &Room> = HashMap::new();
    if let Some(before) = before {
        gone.extend(before.building.rooms.iter().map(|room| (&room.key, room)));
    }
    for room in &saved.building.rooms {
        let same = match gone.remove(&room.key) {
            Some(old) if old == room => true,
            Some(_) => {
                rooms::replace(tx, &caller.agency, id, room).await?;
                false
            }
            None => {
                rooms::insert(tx, &caller.agency, id, room).await?;
                false
            }
        };
        if !same || matches!(part, Part::Room(key) if *key == room.key) {
            parts::set(tx, &caller.agency, id, (Sort::Room, &room.key), revision).await?;
            tags.insert(room.key.clone(), revision);
        }
    }
    for key in gone.into_keys() {
        rooms::delete(tx, &caller.agency, id, key).await?;
        parts::delete(tx, &caller.agency, id, (Sort::Room, key)).await?;
        tags.remove(key);
    }
    Ok(())
}

/// Projects the openings that changed, and moves their tags and that of the addressed opening.
async fn save_openings(
    tx: &mut SqliteConnection,
    caller: &Caller,
    before: Option<&SavedBuilding>,
    saved: &mut SavedBuilding,
    part: &Part,
) -> Result<(), StoreError> {
    let Head { id, revision, .. } = saved.head;
    let tags = &mut Arc::make_mut(&mut saved.parts).openings;
    let mut gone: HashMap<&Key, &Opening> = HashMap::new();
    if let Some(before) = before {
        gone.extend(before.building.openings.iter().map(|opening| (&opening.key, opening)));
    }
    for opening in &saved.building.openings {
        let same = match gone.remove(&opening.key) {
            Some(old) if old == opening => true,
            Some(_) => {
                openings::replace(tx, &caller.agency, id, opening).await?;
                false
            }
            None => {
                openings::insert(tx, &caller.agency, id, opening).await?;
                false
            }
        };
        if !same || matches!(part, Part::Opening(key) if *key == opening.key) {
            parts::set(tx, &caller.agency, id, (Sort::Opening, &opening.key), revision).await?;
            tags.insert(opening.key.clone(), revision);
        }
    }
    for key in gone.into_keys() {
        openings::delete(tx, &caller.agency, id, key).await?;
        parts::delete(tx, &caller.agency, id, (Sort::Opening, key)).await?;
        tags.remove(key);
    }
    Ok(())
}

/// The wire form has looked at this too; here it keeps the tables' keys from failing.
fn refuse_doubled_keys(building: &Building) -> Result<(), Conflict> {
    unique(building.rooms.iter().map(|room| &room.key))?;
    unique(building.openings.iter().map(|opening| &opening.key))?;
    building.rooms.iter().try_for_each(|room| unique(room.fuel_packages.iter().map(|package| &package.key)))
}

fn unique<'a>(keys: impl Iterator<Item = &'a Key>) -> Result<(), Conflict> {
    let mut seen = HashSet::new();
    for key in keys {
        if !seen.insert(key) {
            return Err(Conflict::KeyTaken { key: key.clone() });
        }
    }
    Ok(())
}
