//! Assessments: made, kept, read again as they were served.

use std::sync::Arc;

use axum::extract::State;
use axum::http::StatusCode;
use axum::http::header::{CACHE_CONTROL, ETAG, HeaderName, HeaderValue};
use axum::response::{IntoResponse, Response};

use super::answer::{FOR_EVER, REVALIDATE, created, json_bytes, with};
use super::app::App;
use super::ask::Ask;
use super::assessing::{Order, Record, make};
use super::body::{Takes, Unread};
use super::headers::ReadHeaders;
use super::paging::{self, PageQuery};
use super::params::{AssessmentPath, At, BuildingPath, RoomAt, RoomReportPath};
use super::problem::ApiError;
use super::summary::AssessmentSummary;
use super::{examples, forms};
use crate::domain::Caller;
use crate::domain::ids::{AssessmentId, BuildingId};
use crate::domain::time::Timestamp;
use crate::report::{BuildingReport, RoomReport, room_report_bytes};
use crate::store::{AssessmentCursor, Effects, StoredReport};
use crate::wire::{AssessInput, AssessmentRequest, Page};

/// Assess a building that is not in the inventory.
///
/// Nothing is kept: the report has no id, and asking again asks for the work again.
#[utoipa::path(
    post,
    path = "/v1/assess",
    tag = "assessments",
    request_body(content = AssessInput, description = "The building, and what to assume", example = json!(examples::assess())),
    responses((status = 200, description = "The report.", body = BuildingReport)),
)]
pub async fn assess(State(app): State<App>, ask: Ask, body: Unread) -> Result<Response, ApiError> {
    ask.accepts_json()?;
    let bytes = body.take(Takes::Json).await?;
    ask.query(&[])?;
    let (building, assumptions) = forms::read_assess(&bytes, app.catalogue)?;
    let order = Order { building: Arc::new(building), assumptions, record: None, at: app.clock.now() };
    let made = make(&app, order).await?;
    Ok(with(json_bytes(StatusCode::OK, made.bytes), [(CACHE_CONTROL, HeaderValue::from_static("no-store"))]))
}

/// Assess a building as it is now, and keep the report.
///
/// The same inputs give the same findings. The body may be left out.
#[utoipa::path(
    post,
    path = "/v1/buildings/{id}/assessments",
    tag = "assessments",
    params(BuildingPath),
    request_body(content = AssessmentRequest, description = "What to assume", example = json!(examples::assessment())),
    responses((
        status = 201, description = "The report, kept under its own address.", body = BuildingReport,
        headers(
            ("Location" = String, description = "Where it is."),
            ("ETag" = String, description = "Its id: it never changes."),
        ),
        links(
            ("GetAssessment" = (operation_id = "get_assessment", parameters(("id" = "$response.body#/assessment_id")))),
        ),
    )),
)]
pub async fn create_assessment(
    caller: Caller,
    State(app): State<App>,
    At(building): At<BuildingId>,
    ask: Ask,
    body: Unread,
) -> Result<Response, ApiError> {
    let saved = app.store.get_building(&caller, building).await?;
    ask.accepts_json()?;
    let bytes = body.take(Takes::JsonOrNothing).await?;
    ask.query(&[])?;
    let assumptions = forms::read_assumptions(&bytes, app.catalogue)?;
    let (id, at) = (AssessmentId(app.ids.record()), app.clock.now());
    let record = Record { id, building, revision: saved.head.revision };
    let order = Order { building: saved.building, assumptions, record: Some(record), at };
    let made = make(&app, order).await?;
    if let Some(kept) = made.kept {
        app.store.insert_assessment(&caller, kept, Effects { at }).await?;
    }
    let answer = with(json_bytes(StatusCode::CREATED, made.bytes), [tagged(id), (CACHE_CONTROL, REVALIDATE)]);
    created(&format!("/v1/assessments/{id}"), answer)
}

/// List the assessments of a building, newest first.
///
/// Each says whether it is stale: whether the building has changed since.
#[utoipa::path(
    get,
    path = "/v1/buildings/{id}/assessments",
    tag = "assessments",
    params(
        BuildingPath,
        PageQuery,
        ("cursor" = Option<String>, Query, description = paging::CURSOR, pattern = "^[0-9a-f]{48}$"),
    ),
    responses((
        status = 200, description = "A page of the list.", body = Page<AssessmentSummary>,
        headers(("Link" = String, description = "The next page, `rel=\"next\"`; left out on the last.")),
    )),
)]
pub async fn list_assessments(
    caller: Caller,
    State(app): State<App>,
    At(building): At<BuildingId>,
    ask: Ask,
) -> Result<Response, ApiError> {
    app.store.get_building(&caller, building).await?;
    ask.accepts_json()?;
    let query = ask.query(&["limit", "cursor"])?;
    let (after, limit) = (paging::cursor(&query, cursor_of)?, paging::limit(&query)?);
    let found = app.store.list_assessments(&caller, building, after, limit).await?;
    let after = found.next.map(cursor_text);
    let items = found.items.into_iter().map(AssessmentSummary::from).collect();
    let path = format!("/v1/buildings/{building}/assessments");
    paging::answer(&paging::page(&path, &query, items, after.as_deref()), REVALIDATE)
}

/// Moment and id, in hexadecimal: the order of the list is that of both.
fn cursor_text(cursor: AssessmentCursor) -> String {
    format!("{:016x}{}", cursor.created_at.0.cast_unsigned(), cursor.id.0.simple())
}

fn cursor_of(text: &str) -> Option<AssessmentCursor> {
    let (at, id) = text.split_at_checked(16)?;
    let at = paging::number_in(at)?;
    let id = AssessmentId(paging::id_in(id)?);
    Some(AssessmentCursor { created_at: Timestamp(at.cast_signed()), id })
}

/// Read the latest assessment of a building.
///
/// Of whatever revision: `building_revision` in the report tells.
#[utoipa::path(
    get,
    path = "/v1/buildings/{id}/assessments/latest",
    tag = "assessments",
    params(BuildingPath, ReadHeaders),
    responses(
        (
            status = 200, description = "The report as it was served first.", body = BuildingReport,
            headers(("ETag" = String, description = "The assessment's id.")),
        ),
        (status = 304, description = "The caller has it."),
    ),
)]
pub async fn get_latest_assessment(
    caller: Caller,
    State(app): State<App>,
    At(building): At<BuildingId>,
    ask: Ask,
) -> Result<Response, ApiError> {
    let stored = app.store.latest_assessment(&caller, building).await?;
    let stored = stored.ok_or_else(|| ApiError::not_found("assessment of this building yet"))?;
    answer(&ask, &stored, REVALIDATE, |bytes| Ok(Some(bytes)))
}

/// Read an assessment.
///
/// The bytes that were served when it was made, whatever the engine has become since.
#[utoipa::path(
    get,
    path = "/v1/assessments/{id}",
    tag = "assessments",
    params(AssessmentPath, ReadHeaders),
    responses(
        (
            status = 200, description = "The report as it was served first; it never changes.", body = BuildingReport,
            headers(("ETag" = String, description = "The assessment's id.")),
        ),
        (status = 304, description = "The caller has it."),
    ),
)]
pub async fn get_assessment(
    caller: Caller,
    State(app): State<App>,
    At(id): At<AssessmentId>,
    ask: Ask,
) -> Result<Response, ApiError> {
    let stored = app.store.get_assessment(&caller, id).await?;
    answer(&ask, &stored, FOR_EVER, |bytes| Ok(Some(bytes)))
}

/// Read the report of one room.
///
/// Taken out of the stored assessment, complete in itself.
#[utoipa::path(
    get,
    path = "/v1/assessments/{id}/rooms/{room}",
    tag = "assessments",
    params(RoomReportPath, ReadHeaders),
    responses(
        (
            status = 200, description = "The room's part of the report, complete in itself; it never changes.", body = RoomReport,
            headers(("ETag" = String, description = "The assessment's id.")),
        ),
        (status = 304, description = "The caller has it."),
    ),
)]
pub async fn get_room_report(
    caller: Caller,
    State(app): State<App>,
    At(RoomAt(id, room)): At<RoomAt<AssessmentId>>,
    ask: Ask,
) -> Result<Response, ApiError> {
    let stored = app.store.get_assessment(&caller, id).await?;
    answer(&ask, &stored, FOR_EVER, |bytes| room_report_bytes(&bytes, room.as_str()))
}

/// Answers with the stored bytes or what `take` makes of them. They never change under one id,
/// so the id is the tag.
fn answer(
    ask: &Ask,
    stored: &StoredReport,
    keep: HeaderValue,
    take: impl FnOnce(Vec<u8>) -> Result<Option<Vec<u8>>, serde_json::Error>,
) -> Result<Response, ApiError> {
    let bytes = take(stored.unpack()?).map_err(|error| ApiError::internal(&error))?;
    let bytes = bytes.ok_or_else(|| ApiError::not_found("such room in this assessment"))?;
    ask.accepts_json()?;
    ask.query(&[])?;
    let headers = [tagged(stored.meta.id), (CACHE_CONTROL, keep)];
    if ask.conditions().has(&stored.meta.id.to_string()) {
        return Ok((StatusCode::NOT_MODIFIED, headers).into_response());
    }
    Ok(with(json_bytes(StatusCode::OK, bytes), headers))
}

fn tagged(id: AssessmentId) -> (HeaderName, HeaderValue) {
    let tag = HeaderValue::try_from(format!("\"{id}\""));
    (ETAG, tag.expect("hexadecimal digits, dashes and quotes are lawful in a header"))
}
