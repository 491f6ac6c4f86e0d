//! What store methods take and give, besides the domain's own types.

use std::collections::BTreeMap;
use std::sync::Arc;

use crate::domain::building::Location;
use crate::domain::time::Timestamp;
use crate::domain::{AssessmentId, Building, BuildingId, Key, Opening, Room};

/// What commits together with a change.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Effects {
    /// The moment that is recorded for the change.
    pub at: Timestamp,
}

/// Which part of a building is addressed.
#[derive(Debug, Clone, PartialEq, Eq)]
pub enum Part {
    /// All of it.
    Whole,
    /// One room.
    Room(Key),
    /// One opening.
    Opening(Key),
}

/// What the service records of a building beside what the bureau wrote.
#[derive(Debug, Clone, PartialEq)]
pub struct Head {
    /// Its id.
    pub id: BuildingId,
    /// Its revision, which is its tag.
    pub revision: u64,
    /// When it was entered.
    pub created_at: Timestamp,
    /// When this revision was saved.
    pub updated_at: Timestamp,
    /// Who saved this revision.
    pub updated_by: String,
    /// Its latest assessment, of whatever revision.
    pub latest_assessment: Option<AssessmentId>,
}

/// The revision in which each part last changed: its tag.
#[derive(Debug, Clone, PartialEq, Eq, Default)]
pub struct PartRevisions {
    /// Of each room.
    pub rooms: BTreeMap<Key, u64>,
    /// Of each opening.
    pub openings: BTreeMap<Key, u64>,
}

/// A building as it is saved.
#[derive(Debug, Clone, PartialEq)]
pub struct SavedBuilding {
    /// What the service records of it.
    pub head: Head,
    /// What the bureau wrote.
    pub building: Arc<Building>,
    /// The tags of its rooms and openings.
    pub parts: Arc<PartRevisions>,
}

impl SavedBuilding {
    /// One of its rooms.
    pub fn room(&self, key: &Key) -> Option<Saved<Room>> {
        let value = self.building.room(key)?.clone();
        Some(Saved { value, revision: *self.parts.rooms.get(key)? })
    }

    /// One of its openings.
    pub fn opening(&self, key: &Key) -> Option<Saved<Opening>> {
        let value = self.building.openings.iter().find(|opening| opening.key == *key)?.clone();
        Some(Saved { value, revision: *self.parts.openings.get(key)? })
    }

    /// The tag of a part; `None` where there is no such part.
    pub fn tag(&self, part: &Part) -> Option<u64> {
        match part {
            Part::Whole => Some(self.head.revision),
            Part::Room(key) => self.parts.rooms.get(key).copied(),
            Part::Opening(key) => self.parts.openings.get(key).copied(),
        }
    }
}

/// A room or an opening with its tag.
#[derive(Debug, Clone, PartialEq)]
pub struct Saved<T> {
    /// The part.
    pub value: T,
    /// The revision of the building in which it last changed.
    pub revision: u64,
}

/// Which buildings to list, and from where.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct ListBuildings {
    /// Only the building of this reference.
    pub reference: Option<String>,
    /// Those after this one, in order of id: [`Page::next`] of the page before.
    pub after: Option<BuildingId>,
    /// At most so many.
    pub limit: u32,
}

/// A page of a list.
#[derive(Debug, Clone, PartialEq)]
pub struct Page<T, Cursor> {
    /// The items, in order.
    pub items: Vec<T>,
    /// Where the next page starts; `None` at the end.
    pub next: Option<Cursor>,
}

/// A building in a list.
#[derive(Debug, Clone, PartialEq)]
pub struct Summary {
    /// Its id.
    pub id: BuildingId,
    /// The bureau's number.
    pub reference: Option<String>,
    /// Its name.
    pub name: String,
    /// Its position.
    pub location: Option<Location>,
    /// Occupancy group of the building code.
    pub occupancy_group: Option<String>,
    /// How many rooms it has.
    pub rooms: u64,
    /// Its revision.
    pub revision: u64,
    /// When this revision was saved.
    pub updated_at: Timestamp,
    /// The worst ratings of its latest assessment; `None` before the first.
    pub worst: Option<Worst>,
}

/// The worst of each rating in a building's latest assessment.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Worst {
    /// The assessment.
    pub assessment: AssessmentId,
    /// Its level.
    pub level: String,
    /// When it was made.
    pub created_at: Timestamp,
    /// The revision it was made of.
    pub building_revision: u64,
    /// The building has changed since.
    pub stale: bool,
    /// The worst flashover rating; `None` for a building without rooms, as below.
    pub flashover: Option<WorstRating>,
    /// The worst backdraft rating.
    pub backdraft: Option<WorstRating>,
    /// The worst entry rating.
    pub entry: Option<WorstRating>,
}

/// A rating and the room that has it.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct WorstRating {
    /// The rating's word.
    pub rating: String,
    /// The first room, in order of rank, that has it.
    pub room: Key,
}

/// What is known of an assessment beside its report.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct AssessmentMeta {
    /// Its id.
    pub id: AssessmentId,
    /// The building.
    pub building: BuildingId,
    /// The revision that was assessed.
    pub building_revision: u64,
    /// `screening`, `transient` or `sampled`.
    pub level: String,
    /// Version of the engine.
    pub engine_version: String,
    /// Number of the rules that rated.
    pub rating_rule: u32,
    /// Digest of the catalogue.
    pub catalogue_digest: String,
    /// Digest of the resolved inputs.
    pub input_digest: String,
    /// Seed of the sampling.
    pub seed: u64,
    /// The assumptions as echoed, JSON.
    pub assumptions: String,
    /// When it was made.
    pub created_at: Timestamp,
}

/// An assessment to be kept.
#[derive(Debug, Clone, PartialEq)]
pub struct NewAssessment {
    /// What is known of it.
    pub meta: AssessmentMeta,
    /// The report's bytes as served, not compressed.
    pub report: Vec<u8>,
    /// A row per room.
    pub findings: Vec<RoomFinding>,
}

/// An assessment in a list.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct AssessmentSummary {
    /// What is known of it.
    pub meta: AssessmentMeta,
    /// The building has changed since.
    pub stale: bool,
    /// The worst flashover rating; `None` for a building without rooms, as below.
    pub flashover: Option<WorstRating>,
    /// The worst backdraft rating.
    pub backdraft: Option<WorstRating>,
    /// The worst entry rating.
    pub entry: Option<WorstRating>,
}

/// Where a list of a building's assessments, newest first, goes on.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct AssessmentCursor {
    /// When the last one listed was made.
    pub created_at: Timestamp,
    /// Its id.
    pub id: AssessmentId,
}

/// The findings of one room, as ranking reads them.
#[derive(Debug, Clone, PartialEq)]
pub struct RoomFinding {
    /// The room.
    pub room: Key,
    /// Its place among the building's rooms; 1 is the worst.
    pub sort_rank: u32,
    /// Flashover.
    pub flashover: Rated,
    /// Flashover comes before water is on the fire.
    pub flashover_before_water: Option<bool>,
    /// Time to flashover.
    pub flashover_s: Option<Spread>,
    /// Heat release that flashover asks for.
    pub required_heat_release_kw: Option<f64>,
    /// Heat release that the room can reach.
    pub available_heat_release_kw: Option<f64>,
    /// Backdraft.
    pub backdraft: Rated,
    /// What the backdraft would be.
    pub backdraft_outcome: String,
    /// When a shut room becomes dangerous to open, on the fire clock.
    pub dangerous_from_s: Option<f64>,
    /// When it ceases to be.
    pub dangerous_until_s: Option<f64>,
    /// Entry.
    pub entry: Rated,
    /// From opening the door to flashover.
    pub entry_s: Option<Spread>,
}

/// A rating, with what ranking needs of it.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Rated {
    /// The rating's word.
    pub rating: String,
    /// Orders the ratings of one kind; the greatest is the worst.
    pub severity: u8,
    /// The scenario it comes from.
    pub scenario: Option<String>,
    /// An input that decides it is assumed.
    pub provisional: bool,
}

/// A computed value between its corners.
#[derive(Debug, Clone, Copy, PartialEq)]
#[expect(missing_docs, reason = "the words are the report's")]
pub struct Spread {
    pub low: f64,
    pub typical: f64,
    pub high: f64,
}
