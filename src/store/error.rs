//! What a store method may answer instead of its result.

use std::fmt;

use crate::domain::{BuildingId, Key};

/// Why a store method did not do what it was asked.
///
/// `Display` is fit for a client but for [`Database`](Self::Database),
/// [`Corrupt`](Self::Corrupt) and [`Open`](Self::Open), whose causes belong in the log.
#[derive(Debug, thiserror::Error)]
pub enum StoreError {
    /// No such record in the caller's agency, or it is deleted.
    #[error("there is no such {0}")]
    NotFound(Missing),
    /// The records as they are forbid it.
    #[error(transparent)]
    Conflict(#[from] Conflict),
    /// The condition does not hold: someone else changed it first, it is there
    /// already, or (`current` is `None`) it is not there.
    #[error("the record has changed since it was read")]
    Stale {
        /// The tag it has now.
        current: Option<u64>,
    },
    /// The write queue is full, or another process holds the file.
    #[error("too many changes are waiting; try again shortly")]
    Busy,
    /// The store is closed.
    #[error("the store is closed")]
    Closed,
    /// The file cannot be opened or brought to the present form.
    #[error("opening the database {url}")]
    Open {
        /// As asked for.
        url: String,
        /// Why.
        #[source]
        source: Cause,
    },
    /// The database failed.
    #[error("the database failed")]
    Database(#[source] Cause),
    /// A record cannot be read as this program would have written it.
    #[error("a stored record cannot be read: {0}")]
    Corrupt(String),
}

/// Text for the log. Its type is not told: what lies below the store stays there.
pub type Cause = Box<dyn std::error::Error + Send + Sync>;

/// What was not found.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
#[expect(missing_docs, reason = "the words say it")]
pub enum Missing {
    Building,
    Room,
    Opening,
    Assessment,
}

impl fmt::Display for Missing {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(match self {
            Self::Building => "building",
            Self::Room => "room",
            Self::Opening => "opening",
            Self::Assessment => "assessment",
        })
    }
}

/// How the records as they are forbid a change.
#[derive(Debug, Clone, PartialEq, Eq, thiserror::Error)]
pub enum Conflict {
    /// Another building has this reference.
    #[error("the reference {reference} belongs to building {by}")]
    ReferenceTaken {
        /// The reference.
        reference: String,
        /// Who has it.
        by: BuildingId,
    },
    /// Two rooms, two openings, or two fuel packages of one room have this key.
    #[error("the key {key} is used twice")]
    KeyTaken {
        /// The key.
        key: Key,
    },
    /// The id was given before.
    #[error("the id {id} is taken")]
    IdTaken {
        /// The id.
        id: uuid::Uuid,
    },
    /// Openings still join the room.
    #[error("room {room} is still joined by {}", keys(openings))]
    RoomJoined {
        /// The room.
        room: Key,
        /// The openings that join it, in the building's order.
        openings: Vec<Key>,
    },
}

fn keys(keys: &[Key]) -> String {
    keys.iter().map(Key::as_str).collect::<Vec<_>>().join(", ")
}

impl From<sqlx::Error> for StoreError {
    fn from(error: sqlx::Error) -> Self {
        match &error {
            sqlx::Error::PoolTimedOut => Self::Busy,
            sqlx::Error::PoolClosed => Self::Closed,
            sqlx::Error::Database(cause) if is_busy(cause.as_ref()) => Self::Busy,
            _ => Self::Database(error.into()),
        }
    }
}

/// `SQLITE_BUSY` in any of its extended forms: the low byte is 5.
fn is_busy(cause: &dyn sqlx::error::DatabaseError) -> bool {
    const SQLITE_BUSY: u32 = 5;
    cause.code().and_then(|code| code.parse::<u32>().ok()).is_some_and(|code| code & 0xff == SQLITE_BUSY)
}
