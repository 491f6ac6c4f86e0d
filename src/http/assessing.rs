//! An assessment made: computed off the request's thread, written once, kept as served.

use std::sync::Arc;

use super::app::App;
use super::kept;
use super::problem::ApiError;
use super::refusal::invalid;
use crate::assessment::{BuildingFindings, assess};
use crate::compute::{Lane, StopFlag, Watch};
use crate::domain::assumptions::Level;
use crate::domain::ids::{AssessmentId, BuildingId};
use crate::domain::time::Timestamp;
use crate::domain::{Assumptions, Building, Invalid, Pointer};
use crate::report;
use crate::store::NewAssessment;
use crate::wire::problem::Slug;

/// What is to be assessed, and as what it is to be kept.
pub struct Order {
    /// The building.
    pub building: Arc<Building>,
    /// What to assume.
    pub assumptions: Assumptions,
    /// Where it is kept; nothing is kept without.
    pub record: Option<Record>,
    /// When it is made.
    pub at: Timestamp,
}

/// What an assessment is kept under.
#[derive(Debug, Clone, Copy)]
pub struct Record {
    /// Its id.
    pub id: AssessmentId,
    /// The building.
    pub building: BuildingId,
    /// The building's revision.
    pub revision: u64,
}

/// A report in the bytes in which it is served, and what the store keeps beside it.
pub struct Made {
    /// The report.
    pub bytes: Vec<u8>,
    /// What to keep, where anything is.
    pub kept: Option<NewAssessment>,
}

/// Makes an assessment.
pub async fn make(app: &App, order: Order) -> Result<Made, ApiError> {
    only_what_is_there(order.assumptions.level)?;
    let (catalogue, steps) = (app.catalogue, app.interactive_steps);
    let work = move |flag: &StopFlag| {
        let mut watch = Watch::new(flag, steps);
        let found = assess(&order.building, catalogue, &order.assumptions, &mut || watch.step());
        match found {
            Ok(found) => written(&order, &found),
            Err(_) if watch.is_over_budget() => Err(over_budget(steps)),
            // Whoever asked has gone: nobody reads this.
            Err(_) => Err(ApiError::overloaded("The assessment was abandoned.")),
        }
    };
    app.compute.run(Lane::Interactive, work).await?
}

/// A level that this version cannot compute is refused, never answered with a lower one.
fn only_what_is_there(level: Option<Level>) -> Result<(), ApiError> {
    match level {
        None | Some(Level::Screening | Level::Transient) => Ok(()),
        Some(Level::Sampled) => {
            let detail = "This level is not available in this version yet; `transient` is.";
            let fault = Invalid {
                pointer: Pointer::root().member("assumptions").member("level"),
                code: "not_available",
                detail: detail.to_owned(),
                suggestion: Some("transient".to_owned()),
            };
            Err(invalid(vec![fault]))
        }
    }
}

fn over_budget(steps: u64) -> ApiError {
    ApiError::new(
        Slug::OverBudget,
        format!(
            "The assessment takes more than the {steps} steps that are computed while somebody waits. Level `screening` \
             takes one a room."
        ),
    )
}

fn written(order: &Order, found: &BuildingFindings) -> Result<Made, ApiError> {
    let record = order.record;
    let report = report::building_report(
        found,
        &report::Head {
            building: &order.building,
            assumptions: &order.assumptions,
            assessment_id: record.map(|record| record.id),
            building_id: record.map(|record| record.building),
            building_revision: record.map(|record| record.revision),
            created_at: Some(order.at),
        },
    );
    let json = |error| ApiError::internal(&error);
    let bytes = serde_json::to_vec(&report).map_err(json)?;
    let requested = serde_json::to_string(&report.requested).map_err(json)?;
    let kept = record.map(|record| kept::assessment(record, found, requested, bytes.clone(), order.at));
    Ok(Made { bytes, kept })
}
