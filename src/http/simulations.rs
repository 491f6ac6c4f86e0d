//! `/v1/simulations`: one transient run, computed off the request's thread, nothing kept.

use axum::extract::State;
use axum::http::StatusCode;
use axum::http::header::{ACCEPT, CACHE_CONTROL, CONTENT_TYPE, HeaderValue, VARY};
use axum::response::{IntoResponse, Response};

use super::answer::{json_bytes, with};
use super::app::App;
use super::ask::Ask;
use super::body::{Takes, Unread};
use super::problem::ApiError;
use super::refusal::invalid;
use super::{examples, forms, media};
use crate::assessment::simulation::{Broken, Prepared};
use crate::compute::{Lane, StopFlag, Watch};
use crate::domain::simulation::{MAX_NUMBERS, MAX_OUTPUT_TIMES, Simulation};
use crate::domain::{Invalid, Pointer};
use crate::report::simulation::{SimulationResult, csv};
use crate::wire::SimulationInput;
use crate::wire::problem::Slug;

/// Run one fire in a set of rooms, minute by minute.
///
/// Nothing is kept, and nothing is assumed from a use: what is not given is not there. The answer is
/// JSON or, with `Accept: text/csv`, its series as a table (RFC 4180): one line a time, one column a
/// series, named by its path in the JSON answer (`rooms.burn.pressure_pa`), empty where that is null;
/// events, balance and notes are in the JSON answer only. A run that takes too many steps, times or
/// numbers is refused as `over-budget`; one that the engine cannot follow as `invalid`, with the time,
/// the room and the reason. A caller that goes away stops its run. Figures are for planning.
#[utoipa::path(
    post,
    path = "/v1/simulations",
    tag = "simulations",
    request_body(content = SimulationInput, description = "Rooms, openings, fires and how to run", example = json!(examples::simulation())),
    responses((
        status = 200, description = "What the fire does.",
        content((SimulationResult = "application/json"), (String = "text/csv")),
        headers(("Vary" = String, description = "The answer hangs on `Accept`.")),
    )),
)]
pub async fn simulate(State(app): State<App>, ask: Ask, body: Unread) -> Result<Response, ApiError> {
    let as_csv = ask.prefers_csv()?;
    let bytes = body.take(Takes::Json).await?;
    ask.query(&[])?;
    let run = forms::read_simulation(&bytes, app.catalogue)?;
    can_be_written(&run)?;
    let prepared = Prepared::of(&run, app.catalogue).map_err(invalid)?;

    let steps = app.simulation_room_steps / u64::try_from(prepared.rooms().max(1)).unwrap_or(u64::MAX);
    let work = move |flag: &StopFlag| {
        let mut watch = Watch::new(flag, steps);
        let found = prepared.run(&mut || watch.step());
        let found = found.map_err(|broken| refused(broken, watch.is_over_budget()))?;
        written(&SimulationResult::of(&found), as_csv)
    };
    let bytes = app.compute.run(Lane::Interactive, work).await??;

    let answer = if as_csv {
        (StatusCode::OK, [(CONTENT_TYPE, HeaderValue::from_static(media::CSV))], bytes).into_response()
    } else {
        json_bytes(StatusCode::OK, bytes)
    };
    let headers =
        [(CACHE_CONTROL, HeaderValue::from_static("no-store")), (VARY, HeaderValue::from_name(ACCEPT))];
    Ok(with(answer, headers))
}

fn written(result: &SimulationResult, as_csv: bool) -> Result<Vec<u8>, ApiError> {
    if as_csv {
        return Ok(csv(result).into_bytes());
    }
    serde_json::to_vec(result).map_err(|error| ApiError::internal(&error))
}

/// Refuses what would be more numbers than one answer holds.
fn can_be_written(run: &Simulation) -> Result<(), ApiError> {
    let (times, numbers) = (run.output_times(), run.numbers());
    let (code, detail) = if times > MAX_OUTPUT_TIMES {
        ("too_many_times", format!("asks for {times} output times; at most {MAX_OUTPUT_TIMES} are given"))
    } else if numbers > MAX_NUMBERS {
        ("too_many_numbers", format!("asks for {numbers} numbers; at most {MAX_NUMBERS} are given"))
    } else {
        return Ok(());
    };
    let fault = Invalid {
        pointer: Pointer::root().member("output_interval_s"),
        code,
        detail: detail.clone(),
        suggestion: Some("a longer interval, a shorter run or fewer rooms".to_owned()),
    };
    let error = ApiError::new(Slug::OverBudget, format!("The run {detail}."));
    Err(error.with_faults(vec![fault.into()]))
}

/// Why a run gave nothing, as a problem.
fn refused(broken: Broken, over_budget: bool) -> ApiError {
    match broken {
        Broken::Stopped { at_s } if over_budget => out_of_steps(at_s),
        Broken::OutOfSteps { at_s } => out_of_steps(at_s),
        // Whoever asked has gone: nobody reads this.
        Broken::Stopped { .. } => ApiError::overloaded("The simulation was abandoned."),
        Broken::Unsolved { at_s, room, reason } => {
            let rooms = Pointer::root().member("rooms");
            let (pointer, place) = match room {
                Some((index, key)) => (rooms.element(index), format!(" in room `{key}`")),
                None => (Pointer::root(), String::new()),
            };
            let detail = format!("the run broke off at {at_s:.3} s{place}: {reason}");
            let fault = Invalid { pointer, code: "not_solved", detail: detail.clone(), suggestion: None };
            let error = ApiError::new(Slug::Invalid, format!("This cannot be run: {detail}."));
            error.with_faults(vec![fault.into()])
        }
    }
}

fn out_of_steps(at_s: f64) -> ApiError {
    let detail = format!(
        "The run takes more steps than are computed while somebody waits; it had got to {at_s:.3} s. \
         Ask for a shorter run, fewer rooms or a wider tolerance."
    );
    ApiError::new(Slug::OverBudget, detail)
}
