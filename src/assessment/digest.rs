//! SHA-256 of the resolved inputs: two assessments with the same digest had the same to go on.

use std::fmt::{self, Debug, Write};

use sha2::{Digest as _, Sha256};

use super::clocks::Spans;
use super::inputs::Inputs;
use super::plan::Plan;
use crate::domain::assumptions::Assumptions;

/// Gathers what an assessment rests on.
///
/// Resolved structures are written by their derived `Debug`, so that a member added to one of them can not be
/// forgotten here; it prints every number so that it can be read back exactly.
pub(super) struct Gathered {
    hasher: Sha256,
}

impl Gathered {
    /// Begins with what holds for the whole building.
    pub fn of(plan: &Plan<'_>, spans: &Spans, assumptions: &Assumptions, catalogue_digest: &str) -> Self {
        let mut gathered = Self { hasher: Sha256::new() };
        let building = plan.building;
        gathered.add(&(super::ENGINE_VERSION, super::RATING_RULE, catalogue_digest));
        gathered.add(&(spans, assumptions));
        gathered.add(&(
            building.alarm_monitored,
            building.sprinklers,
            building.occupants,
            building.water_available_l_min,
            &building.construction_type,
        ));
        gathered
            .add(&building.floors.iter().map(|floor| (floor.floor, floor.elevation_m)).collect::<Vec<_>>());
        for (opening, hole) in building.openings.iter().zip(&plan.openings) {
            gathered.add(&(
                &opening.key,
                hole,
                opening.held_open,
                opening.self_closing,
                opening.entry,
                opening.glazing,
            ));
            gathered.add(&(opening.sill_m, opening.fire_rating_min, opening.swing, opening.azimuth_deg));
        }
        gathered
    }

    /// Adds a room.
    pub fn room(&mut self, inputs: &Inputs<'_>) {
        self.add(&(inputs.key, inputs.room.kind, inputs.room.floor, inputs.geometry));
        self.add(&(&inputs.contents, &inputs.lined.surfaces, inputs.lined.least_growth_kw_s2));
        self.add(&(inputs.envelope_leak_m2, &inputs.watchers, &inputs.sprinkler, &inputs.hazards));
        self.add(&(inputs.room.mechanical, inputs.room.ceiling, inputs.ambient_k, inputs.horizon));
    }

    /// Adds a room that could not be resolved.
    pub fn unresolved(&mut self, reason: &str) {
        self.add(&reason);
    }

    fn add(&mut self, part: &impl Debug) {
        // Writing to a hasher never fails.
        let _ = write!(self, "{part:?};");
    }

    /// The digest in hexadecimal.
    pub fn finish(self) -> String {
        let mut text = String::with_capacity(64);
        for byte in self.hasher.finalize() {
            let _ = write!(text, "{byte:02x}");
        }
        text
    }
}

impl Write for Gathered {
    fn write_str(&mut self, text: &str) -> fmt::Result {
        self.hasher.update(text.as_bytes());
        Ok(())
    }
}
