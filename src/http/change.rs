//! What comes before every change of a building or a part of it.

use axum::body::Bytes;

use super::app::App;
use super::ask::Ask;
use super::body::{Takes, Unread};
use super::problem::ApiError;
use crate::domain::Caller;
use crate::domain::ids::BuildingId;
use crate::store::{Condition, Effects, Missing, Part, StoreError};

/// A change that may be made, as far as can be told without reading its body.
pub struct Change {
    /// What the store is to judge again when it makes the change.
    pub condition: Condition,
    /// The body.
    pub bytes: Bytes,
    /// What commits with the change.
    pub effects: Effects,
}

/// Whether the address may be empty yet.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum MayBeNew {
    /// It must be there.
    No,
    /// A put may create it.
    Yes,
}

/// Judges a change up to its body, in the order of the contract: 404, 406, 413, 415, 428, 412, 400.
pub async fn judge(
    app: &App,
    caller: &Caller,
    (id, part, may_be_new): (BuildingId, &Part, MayBeNew),
    ask: &Ask,
    body: Option<(Unread, Takes)>,
) -> Result<Change, ApiError> {
    let before = app.store.get_building(caller, id).await?;
    let tag = before.tag(part);
    if tag.is_none() && may_be_new == MayBeNew::No {
        return Err(StoreError::NotFound(missing(part)).into());
    }
    ask.accepts_json()?;
    let bytes = match body {
        Some((unread, takes)) => unread.take(takes).await?,
        None => Bytes::new(),
    };
    let conditions = ask.conditions();
    let condition = match tag {
        Some(tag) => conditions.for_change(tag)?,
        None => conditions.for_put(tag)?,
    };
    ask.query(&[])?;
    Ok(Change { condition, bytes, effects: Effects { at: app.clock.now() } })
}

fn missing(part: &Part) -> Missing {
    match part {
        Part::Whole => Missing::Building,
        Part::Room(_) => Missing::Room,
        Part::Opening(_) => Missing::Opening,
    }
}
