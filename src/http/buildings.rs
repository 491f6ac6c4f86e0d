//! `/v1/buildings`: the inventory.

use axum::extract::State;
use axum::http::StatusCode;
use axum::response::{IntoResponse, Response};

use super::answer::{REVALIDATE, created, versioned};
use super::app::App;
use super::ask::Ask;
use super::body::{Takes, Unread};
use super::change::{MayBeNew, judge};
use super::forms::Patch;
use super::headers::{ChangeHeaders, ReadHeaders};
use super::paging::{self, PageQuery};
use super::params::{At, BuildingPath};
use super::problem::ApiError;
use super::summary::BuildingSummary;
use super::{examples, forms};
use crate::domain::Caller;
use crate::domain::ids::BuildingId;
use crate::store::{Effects, ListBuildings, Part};
use crate::wire::{Building, BuildingInput, Page};

/// List the buildings of the inventory.
///
/// Summaries in the order in which the buildings were entered, each with the worst ratings of
/// its latest assessment.
#[utoipa::path(
    get,
    path = "/v1/buildings",
    tag = "buildings",
    params(
        PageQuery,
        ("cursor" = Option<String>, Query, description = paging::CURSOR, pattern = "^[0-9a-f]{32}$"),
        ("reference" = Option<String>, Query, description = "Only the building with this reference, the bureau's own number."),
    ),
    responses((
        status = 200, description = "A page of the list.", body = Page<BuildingSummary>,
        headers(("Link" = String, description = "The next page, `rel=\"next\"`; left out on the last.")),
    )),
)]
pub async fn list_buildings(caller: Caller, State(app): State<App>, ask: Ask) -> Result<Response, ApiError> {
    ask.accepts_json()?;
    let query = ask.query(&["limit", "cursor", "reference"])?;
    let list = ListBuildings {
        reference: query.get("reference").map(str::to_owned),
        after: paging::cursor(&query, |text| paging::id_in(text).map(BuildingId))?,
        limit: paging::limit(&query)?,
    };
    let found = app.store.list_buildings(&caller, &list).await?;
    let after = found.next.map(|id| id.0.simple().to_string());
    let items: Vec<_> = found.items.into_iter().map(BuildingSummary::from).collect();
    paging::answer(&paging::page("/v1/buildings", &query, items, after.as_deref()), REVALIDATE)
}

/// Enter a building.
///
/// The service gives it an id. A reference that another building has is a conflict.
#[utoipa::path(
    post,
    path = "/v1/buildings",
    tag = "buildings",
    request_body(content = BuildingInput, description = "The building", example = json!(examples::building())),
    responses(
        (
            status = 201, description = "The building as saved.", body = Building,
            headers(
                ("Location" = String, description = "Where it is."),
                ("ETag" = String, description = "Its revision, for If-Match."),
            ),
            links(
                ("GetBuilding" = (operation_id = "get_building", parameters(("id" = "$response.body#/id")))),
                ("AssessIt" = (operation_id = "create_assessment", parameters(("id" = "$response.body#/id")))),
            ),
        ),
        (status = 409, description = "Another building has the reference."),
    ),
)]
pub async fn create_building(
    caller: Caller,
    State(app): State<App>,
    ask: Ask,
    body: Unread,
) -> Result<Response, ApiError> {
    ask.accepts_json()?;
    let bytes = body.take(Takes::Json).await?;
    ask.query(&[])?;
    let building = forms::read_building(&bytes, app.catalogue)?;
    let id = BuildingId(app.ids.record());
    let effects = Effects { at: app.clock.now() };
    let saved = app.store.create_building(&caller, id, building, effects).await?;
    let answer = versioned(saved.head.revision, &forms::building_document(&saved))?;
    created(&format!("/v1/buildings/{id}"), answer)
}

/// Read a building, whole.
///
/// With its rooms and openings. Its ETag is its revision, which every change raises.
#[utoipa::path(
    get,
    path = "/v1/buildings/{id}",
    tag = "buildings",
    params(BuildingPath, ReadHeaders),
    responses(
        (
            status = 200, description = "The building. What this gives, PUT takes.", body = Building,
            headers(("ETag" = String, description = "Its revision, for If-Match.")),
        ),
        (status = 304, description = "The caller has the present revision."),
    ),
)]
pub async fn get_building(
    caller: Caller,
    State(app): State<App>,
    At(id): At<BuildingId>,
    ask: Ask,
) -> Result<Response, ApiError> {
    let saved = app.store.get_building(&caller, id).await?;
    ask.accepts_json()?;
    ask.query(&[])?;
    if let Some(answer) = ask.not_modified(saved.head.revision) {
        return Ok(answer);
    }
    versioned(saved.head.revision, &forms::building_document(&saved))
}

/// Replace a building.
///
/// Members that the service sets are accepted and ignored. The tags of rooms and openings that
/// stay as they were do not move.
#[utoipa::path(
    put,
    path = "/v1/buildings/{id}",
    tag = "buildings",
    params(BuildingPath, ChangeHeaders),
    request_body(content = BuildingInput, description = "The building", example = json!(examples::building())),
    responses(
        (
            status = 200, description = "The building as saved.", body = Building,
            headers(("ETag" = String, description = "Its new revision.")),
        ),
        (status = 409, description = "Another building has the reference."),
    ),
)]
pub async fn put_building(
    caller: Caller,
    State(app): State<App>,
    At(id): At<BuildingId>,
    ask: Ask,
    body: Unread,
) -> Result<Response, ApiError> {
    let address = (id, &Part::Whole, MayBeNew::No);
    let change = judge(&app, &caller, address, &ask, Some((body, Takes::Json))).await?;
    let building = forms::read_building(&change.bytes, app.catalogue)?;
    let saved = app.store.put_building(&caller, id, building, change.condition, change.effects).await?;
    versioned(saved.head.revision, &forms::building_document(&saved))
}

/// Change members of a building.
///
/// A merge patch (RFC 7396): null removes, arrays are replaced whole. Rooms and openings have
/// addresses of their own. The result is checked as a whole.
#[utoipa::path(
    patch,
    path = "/v1/buildings/{id}",
    tag = "buildings",
    params(BuildingPath, ChangeHeaders),
    request_body(
        content = Object, content_type = "application/merge-patch+json",
        description = "Members of the building", example = json!(examples::building_patch()),
    ),
    responses(
        (
            status = 200, description = "The building as saved.", body = Building,
            headers(("ETag" = String, description = "Its new revision.")),
        ),
        (status = 409, description = "Another building has the reference."),
    ),
)]
pub async fn patch_building(
    caller: Caller,
    State(app): State<App>,
    At(id): At<BuildingId>,
    ask: Ask,
    body: Unread,
) -> Result<Response, ApiError> {
    let address = (id, &Part::Whole, MayBeNew::No);
    let change = judge(&app, &caller, address, &ask, Some((body, Takes::MergePatch))).await?;
    let patch = Patch::read(&change.bytes)?;
    let catalogue = app.catalogue;
    let edit = move |building: &_| patch.on_building(building, catalogue);
    let saved = app.store.edit(&caller, id, Part::Whole, change.condition, change.effects, edit).await?;
    versioned(saved.head.revision, &forms::building_document(&saved))
}

/// Delete a building.
///
/// It leaves lists and frees its reference; its assessments stay, as records of their own.
#[utoipa::path(
    delete,
    path = "/v1/buildings/{id}",
    tag = "buildings",
    params(BuildingPath, ChangeHeaders),
    responses((status = 204, description = "It is deleted.")),
)]
pub async fn delete_building(
    caller: Caller,
    State(app): State<App>,
    At(id): At<BuildingId>,
    ask: Ask,
) -> Result<Response, ApiError> {
    let change = judge(&app, &caller, (id, &Part::Whole, MayBeNew::No), &ask, None).await?;
    app.store.delete_building(&caller, id, change.condition, change.effects).await?;
    Ok(StatusCode::NO_CONTENT.into_response())
}
