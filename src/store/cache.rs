//! Decoded buildings, so that a read need not parse a document it parsed before.
//!
//! An entry is one revision, which never changes, so it cannot be wrong; whether
//! that revision is still the present one the database says at every read.

use std::collections::HashMap;
use std::sync::{Arc, Mutex, MutexGuard, PoisonError};

use super::records::PartRevisions;
use crate::domain::Building;
use crate::domain::ids::{AgencyId, BuildingId};

/// Most buildings kept.
pub(super) const BUILDINGS: usize = 256;
/// Most rooms, openings and fuel packages kept, over all buildings: some 1 kB each.
pub(super) const PARTS: usize = 8000;

/// A building and its parts' tags at one revision.
#[derive(Debug, Clone)]
pub(super) struct Decoded {
    pub(super) building: Arc<Building>,
    pub(super) parts: Arc<PartRevisions>,
}

#[derive(Debug, Clone, Default)]
pub(super) struct Cache(Arc<Mutex<Entries>>);

#[derive(Debug, Default)]
struct Entries {
    by_id: HashMap<(AgencyId, BuildingId), Entry>,
    parts: usize,
    clock: u64,
}

#[derive(Debug)]
struct Entry {
    revision: u64,
    decoded: Decoded,
    parts: usize,
    used: u64,
}

impl Cache {
    pub(super) fn get(&self, agency: &AgencyId, id: BuildingId, revision: u64) -> Option<Decoded> {
        let mut entries = self.entries();
        entries.clock += 1;
        let now = entries.clock;
        let entry = entries.by_id.get_mut(&(agency.clone(), id))?;
        if entry.revision != revision {
            return None;
        }
        entry.used = now;
        Some(entry.decoded.clone())
    }

    pub(super) fn put(&self, agency: &AgencyId, id: BuildingId, revision: u64, decoded: Decoded) {
        let parts = weight(&decoded.building);
        if parts > PARTS {
            return;
        }
        let mut entries = self.entries();
        // A slow reader must not put an old revision in the place of a newer one.
        if entries.by_id.get(&(agency.clone(), id)).is_some_and(|entry| entry.revision > revision) {
            return;
        }
        entries.clock += 1;
        let entry = Entry { revision, decoded, parts, used: entries.clock };
        entries.parts += parts;
        if let Some(old) = entries.by_id.insert((agency.clone(), id), entry) {
            entries.parts -= old.parts;
        }
        while entries.parts > PARTS || entries.by_id.len() > BUILDINGS {
            entries.forget_one();
        }
    }

    fn entries(&self) -> MutexGuard<'_, Entries> {
        // Nothing in here can be left half done by a panic.
        self.0.lock().unwrap_or_else(PoisonError::into_inner)
    }
}

impl Entries {
    /// Drops the entry that was not used for longest.
    fn forget_one(&mut self) {
        let oldest = self.by_id.iter().min_by_key(|(_, entry)| entry.used).map(|(id, _)| id.clone());
        if let Some(old) = oldest.and_then(|id| self.by_id.remove(&id)) {
            self.parts -= old.parts;
        }
    }
}

fn weight(building: &Building) -> usize {
    let packages: usize = building.rooms.iter().map(|room| room.fuel_packages.len()).sum();
    1 + building.rooms.len() + building.openings.len() + packages
}
