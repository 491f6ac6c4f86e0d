//! All SQL. Rows and connections never leave this folder.
//!
//! [`Store`] is the one handle. Every method takes the [`Caller`] whose agency
//! it acts for, and is one transaction: changes go through the one
//! writer, reads through connections that can do nothing else. Ids
//! and moments are passed in. A change that was answered with `Ok` is on disk.
//!
//! | to | call |
//! |---|---|
//! | open, probe, close | [`Store::open`], [`Store::ready`], [`Store::writes_waiting`], [`Store::close`] |
//! | read a building, room, opening | [`get_building`](Store::get_building), [`find_building`](Store::find_building), [`get_room`](Store::get_room), [`get_opening`](Store::get_opening) |
//! | list buildings | [`list_buildings`](Store::list_buildings), [`is_empty`](Store::is_empty) |
//! | save whole | [`create_building`](Store::create_building), [`put_building`](Store::put_building) |
//! | save one part | [`put_room`](Store::put_room), [`put_opening`](Store::put_opening) |
//! | change what is there (PATCH) | [`edit`](Store::edit) |
//! | delete | [`delete_building`](Store::delete_building), [`delete_room`](Store::delete_room), [`delete_opening`](Store::delete_opening) |
//! | keep and read assessments | [`insert_assessment`](Store::insert_assessment), [`get_assessment`](Store::get_assessment), [`latest_assessment`](Store::latest_assessment), [`list_assessments`](Store::list_assessments) |
//!
//! **Tags.** A building's tag is its revision; a room's or opening's is the
//! revision in which it last changed. Every accepted change makes a new
//! revision and moves the tag of what it addressed, even when it changes
//! nothing: of several callers with one tag exactly one is to win, also when
//! they send the same. The tags of other parts move only if those really change.
//!
//! **Order.** A change is judged in this order: not found, stale, the caller's
//! own rules, conflict.

mod assessments;
mod buildings;
mod cache;
mod changes;
mod condition;
mod document;
mod edit;
mod error;
mod findings;
mod heads;
mod open;
mod part_edits;
mod parts;
mod projections;
mod records;
mod revisions;
mod rows;
mod writer;

#[cfg(test)]
mod tests;

use sqlx::sqlite::SqlitePool;

pub use assessments::StoredReport;
pub use condition::Condition;
pub use error::{Cause, Conflict, Missing, StoreError};
pub use records::{
    AssessmentCursor, AssessmentMeta, AssessmentSummary, Effects, Head, ListBuildings, NewAssessment, Page,
    Part, PartRevisions, Rated, RoomFinding, Saved, SavedBuilding, Spread, Summary, Worst, WorstRating,
};

use crate::domain::Caller;

/// The records. Cheap to clone; all clones share one writer.
#[derive(Debug, Clone)]
pub struct Store {
    writer: writer::Writer,
    readers: SqlitePool,
    cache: cache::Cache,
}

impl Store {
    /// Opens `sqlite://path`: makes a missing file and brings an old one to the present form.
    pub async fn open(url: &str) -> Result<Self, StoreError> {
        let database = open::Database::new(url)?;
        // The writer first: it makes the file that readers may only read.
        let connection = database.writer().await?;
        let readers = database.readers().await?;
        Ok(Self {
            writer: writer::Writer::start(database, connection),
            readers,
            cache: cache::Cache::default(),
        })
    }

    /// Whether records can be read and changes are taken: an empty transaction goes the way of every other.
    pub async fn ready(&self) -> Result<(), StoreError> {
        self.is_empty(&Caller::local()).await?;
        self.writer.write(|_| Box::pin(async { Ok(()) })).await
    }

    /// How many changes wait for their turn.
    pub fn writes_waiting(&self) -> usize {
        self.writer.waiting()
    }

    /// Waits for the changes that are queued, then closes the file with nothing left in its log.
    ///
    /// Whatever is asked afterwards, through any clone, is answered with [`StoreError::Closed`].
    pub async fn close(&self) -> Result<(), StoreError> {
        self.readers.close().await;
        self.writer.close().await
    }
}
