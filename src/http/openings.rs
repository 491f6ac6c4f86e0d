//! `/v1/buildings/{id}/openings/{opening}`: one door, window, vent, hatch or gap.

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
use super::params::{At, OpeningAt, OpeningPath};
use super::problem::ApiError;
use super::refusal::invalid;
use super::{examples, forms};
use crate::domain::{Building as Record, Caller};
use crate::store::{Missing, Part, SavedBuilding, StoreError};
use crate::wire::{Opening, OpeningInput};

/// Read an opening.
///
/// Its ETag is the revision of the building in which this opening last changed.
#[utoipa::path(
    get,
    path = "/v1/buildings/{id}/openings/{opening}",
    tag = "openings",
    params(OpeningPath, ReadHeaders),
    responses(
        (
            status = 200, description = "The opening. What this gives, PUT takes.", body = Opening,
            headers(("ETag" = String, description = "The building's revision in which it last changed.")),
        ),
        (status = 304, description = "The caller has the present revision."),
    ),
)]
pub async fn get_opening(
    caller: Caller,
    State(app): State<App>,
    At(OpeningAt(id, key)): At<OpeningAt>,
    ask: Ask,
) -> Result<Response, ApiError> {
    let saved = app.store.get_opening(&caller, id, &key).await?;
    ask.accepts_json()?;
    ask.query(&[])?;
    if let Some(answer) = ask.not_modified(saved.revision) {
        return Ok(answer);
    }
    versioned(saved.revision, &Opening::of(&saved.value))
}

/// Put an opening under a key that the caller chose.
///
/// With `If-None-Match: *` it is a new opening, with `If-Match` the one that is there is replaced.
/// The building is checked with it: it must join rooms that exist, and fit their walls.
#[utoipa::path(
    put,
    path = "/v1/buildings/{id}/openings/{opening}",
    tag = "openings",
    params(OpeningPath, PutHeaders),
    request_body(content = OpeningInput, description = "The opening", example = json!(examples::opening())),
    responses((
        status = 200, description = "The opening as saved.", body = Opening,
        headers(("ETag" = String, description = "Its new revision.")),
    )),
)]
pub async fn put_opening(
    caller: Caller,
    State(app): State<App>,
    At(OpeningAt(id, key)): At<OpeningAt>,
    ask: Ask,
    body: Unread,
) -> Result<Response, ApiError> {
    let part = Part::Opening(key.clone());
    let change = judge(&app, &caller, (id, &part, MayBeNew::Yes), &ask, Some((body, Takes::Json))).await?;
    let opening = forms::read_opening(&change.bytes, &key, app.catalogue)?;
    // Putting it once more where it is already tells the faults as this body sees them.
    let again = opening.clone();
    let check = move |building: &Record| building.with_opening(again).map(drop).map_err(invalid);
    let saved = app.store.put_opening(&caller, id, opening, change.condition, change.effects, check).await?;
    versioned(saved.revision, &Opening::of(&saved.value))
}

/// Change members of an opening.
///
/// A merge patch (RFC 7396): null removes, arrays are replaced whole. The result is checked as a
/// whole, and the building with it.
#[utoipa::path(
    patch,
    path = "/v1/buildings/{id}/openings/{opening}",
    tag = "openings",
    params(OpeningPath, ChangeHeaders),
    request_body(
        content = Object, content_type = "application/merge-patch+json",
        description = "Members of the opening", example = json!(examples::opening_patch()),
    ),
    responses((
        status = 200, description = "The opening as saved.", body = Opening,
        headers(("ETag" = String, description = "Its new revision.")),
    )),
)]
pub async fn patch_opening(
    caller: Caller,
    State(app): State<App>,
    At(OpeningAt(id, key)): At<OpeningAt>,
    ask: Ask,
    body: Unread,
) -> Result<Response, ApiError> {
    let part = Part::Opening(key.clone());
    let change =
        judge(&app, &caller, (id, &part, MayBeNew::No), &ask, Some((body, Takes::MergePatch))).await?;
    let patch = Patch::read(&change.bytes)?;
    let (catalogue, of) = (app.catalogue, key.clone());
    let edit = move |building: &_| patch.on_opening(building, &of, catalogue);
    let saved: SavedBuilding =
        app.store.edit(&caller, id, part, change.condition, change.effects, edit).await?;
    let opening = saved.opening(&key).ok_or(StoreError::NotFound(Missing::Opening))?;
    versioned(opening.revision, &Opening::of(&opening.value))
}

/// Delete an opening.
///
/// The rooms that it joined stay; a room left without any way in is assessed shut.
#[utoipa::path(
    delete,
    path = "/v1/buildings/{id}/openings/{opening}",
    tag = "openings",
    params(OpeningPath, ChangeHeaders),
    responses((status = 204, description = "It is deleted.")),
)]
pub async fn delete_opening(
    caller: Caller,
    State(app): State<App>,
    At(OpeningAt(id, key)): At<OpeningAt>,
    ask: Ask,
) -> Result<Response, ApiError> {
    let part = Part::Opening(key.clone());
    let change = judge(&app, &caller, (id, &part, MayBeNew::No), &ask, None).await?;
    app.store.delete_opening(&caller, id, &key, change.condition, change.effects).await?;
    Ok(StatusCode::NO_CONTENT.into_response())
}
