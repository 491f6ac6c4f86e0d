//! `assess`: one building document to a table or a report, without a database.

use std::ops::ControlFlow;

use super::{Failure, documents};
use crate::assessment;
use crate::catalogue::Catalogue;
use crate::config::Assess;
use crate::domain::{Assumptions, Building};
use crate::report;
use crate::wire::{self, AssessInput, BuildingInput, Refused};

/// Prints the table, or the report with `--json`.
pub fn run(flags: &Assess) -> Result<(), Failure> {
    let text = documents::read(&flags.file)?;
    let place = flags.file.display().to_string();
    let (building, assumptions) = read(&text).map_err(|refused| documents::faults(&place, &refused))?;

    let findings =
        assessment::assess(&building, Catalogue::embedded(), &assumptions, &mut || ControlFlow::Continue(()))
            .map_err(|_| "the computation was stopped")?;
    let head = report::Head::unsaved(&building, &assumptions);
    let report = report::building_report(&findings, &head);
    if flags.json {
        println!("{}", serde_json::to_string_pretty(&report)?);
    } else {
        print!("{}", report::table(&report));
    }
    Ok(())
}

/// A bare building, or a building with assumptions: told apart by the member `building`.
fn read(text: &[u8]) -> Result<(Building, Assumptions), Refused> {
    let catalogue = Catalogue::embedded();
    if wire::json::parse(text).is_ok_and(|document| document.member("building").is_some()) {
        return wire::read::<AssessInput>(text, catalogue).map(|asked| (asked.building, asked.assumptions));
    }
    wire::read::<BuildingInput>(text, catalogue).map(|building| (building, Assumptions::default()))
}
