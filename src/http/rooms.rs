//! `/v1/buildings/{id}/rooms/{room}`: one room, so that work on two rooms never collides.

use axum::extract::State;
use axum::http::StatusCode;
use axum::response::{IntoResponse, Response};

use super::answer::versioned;
use super::app::App;
use super::ask::Ask;
use super::body::{Takes, Unread};
use super::change::{MayBeNew, judge};
use super::forms::Patch;
use super::headers::{ChangeHeaders, PutHeaders, ReadHeaders};
use super::params::{At, RoomAt, RoomPath};
use super::problem::ApiError;
use super::refusal::invalid;
use super::{examples, forms};
use crate::domain::ids::BuildingId;
use crate::domain::{Building as Record, Caller};
use crate::store::{Missing, Part, SavedBuilding, StoreError};
use crate::wire::{Room, RoomInput};

/// Read a room.
///
/// Its ETag is the revision of the building in which this room last changed.
#[utoipa::path(
    get,
    path = "/v1/buildings/{id}/rooms/{room}",
    tag = "rooms",
    params(RoomPath, ReadHeaders),
    responses(
        (
            status = 200, description = "The room. What this gives, PUT takes.", body = Room,
            headers(("ETag" = String, description = "The building's revision in which the room last changed.")),
        ),
        (status = 304, description = "The caller has the present revision."),
    ),
)]
pub async fn get_room(
    caller: Caller,
    State(app): State<App>,
    At(RoomAt(id, key)): At<RoomAt<BuildingId>>,
    ask: Ask,
) -> Result<Response, ApiError> {
    let saved = app.store.get_room(&caller, id, &key).await?;
    ask.accepts_json()?;
    ask.query(&[])?;
    if let Some(answer) = ask.not_modified(saved.revision) {
        return Ok(answer);
    }
    versioned(saved.revision, &Room::of(&saved.value))
}

/// Put a room under a key that the caller chose.
///
/// With `If-None-Match: *` it is a new room, with `If-Match` the room that is there is replaced.
/// The building is checked with the room in it: its openings must still fit.
#[utoipa::path(
    put,
    path = "/v1/buildings/{id}/rooms/{room}",
    tag = "rooms",
    params(RoomPath, PutHeaders),
    request_body(content = RoomInput, description = "The room", example = json!(examples::room())),
    responses((
        status = 200, description = "The room as saved.", body = Room,
        headers(("ETag" = String, description = "Its new revision.")),
    )),
)]
pub async fn put_room(
    caller: Caller,
    State(app): State<App>,
    At(RoomAt(id, key)): At<RoomAt<BuildingId>>,
    ask: Ask,
    body: Unread,
) -> Result<Response, ApiError> {
    let part = Part::Room(key.clone());
    let change = judge(&app, &caller, (id, &part, MayBeNew::Yes), &ask, Some((body, Takes::Json))).await?;
    let room = forms::read_room(&change.bytes, &key, app.catalogue)?;
    // Putting it once more where it is already tells the faults as this body sees them.
    let again = room.clone();
    let check = move |building: &Record| building.with_room(again).map(drop).map_err(invalid);
    let saved = app.store.put_room(&caller, id, room, change.condition, change.effects, check).await?;
    versioned(saved.revision, &Room::of(&saved.value))
}

/// Change members of a room.
///
/// A merge patch (RFC 7396): null removes, arrays are replaced whole. The result is checked as a
/// whole, and the building with it.
#[utoipa::path(
    patch,
    path = "/v1/buildings/{id}/rooms/{room}",
    tag = "rooms",
    params(RoomPath, ChangeHeaders),
    request_body(
        content = Object, content_type = "application/merge-patch+json",
        description = "Members of the room", example = json!(examples::room_patch()),
    ),
    responses((
        status = 200, description = "The room as saved.", body = Room,
        headers(("ETag" = String, description = "Its new revision.")),
    )),
)]
pub async fn patch_room(
    caller: Caller,
    State(app): State<App>,
    At(RoomAt(id, key)): At<RoomAt<BuildingId>>,
    ask: Ask,
    body: Unread,
) -> Result<Response, ApiError> {
    let part = Part::Room(key.clone());
    let change =
        judge(&app, &caller, (id, &part, MayBeNew::No), &ask, Some((body, Takes::MergePatch))).await?;
    let patch = Patch::read(&change.bytes)?;
    let (catalogue, of) = (app.catalogue, key.clone());
    let edit = move |building: &_| patch.on_room(building, &of, catalogue);
    let saved: SavedBuilding =
        app.store.edit(&caller, id, part, change.condition, change.effects, edit).await?;
    let room = saved.room(&key).ok_or(StoreError::NotFound(Missing::Room))?;
    versioned(room.revision, &Room::of(&room.value))
}

/// Delete a room.
///
/// A room that openings still join is not deleted: the conflict names them.
#[utoipa::path(
    delete,
    path = "/v1/buildings/{id}/rooms/{room}",
    tag = "rooms",
    params(RoomPath, ChangeHeaders),
    responses(
        (status = 204, description = "It is deleted."),
        (status = 409, description = "Openings still join the room."),
    ),
)]
pub async fn delete_room(
    caller: Caller,
    State(app): State<App>,
    At(RoomAt(id, key)): At<RoomAt<BuildingId>>,
    ask: Ask,
) -> Result<Response, ApiError> {
    let part = Part::Room(key.clone());
    let change = judge(&app, &caller, (id, &part, MayBeNew::No), &ask, None).await?;
    app.store.delete_room(&caller, id, &key, change.condition, change.effects).await?;
    Ok(StatusCode::NO_CONTENT.into_response())
}
