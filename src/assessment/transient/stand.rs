//! How the openings of the whole building stand in a scenario of the transient level.

use super::super::findings::Reason;
use super::super::openings::{Stand, way_out, way_to_outside};
use super::super::plan::Plan;
use super::super::scenarios::reason;
use crate::domain::assumptions::Scenario;
use crate::fire::two_zone::Position;

/// Gas at which the door of `shut_late` is shut, K: 400 °C.
pub(in crate::assessment) const SHUT_LATE_K: f64 = 673.15;
/// The other moment at which it is, after flashover, s.
pub(in crate::assessment) const SHUT_LATE_AFTER_S: f64 = 60.0;

/// One way in which the building may stand.
#[derive(Debug, Clone, PartialEq)]
pub(in crate::assessment) struct Standing {
    pub scenario: Scenario,
    pub stand: Stand,
    /// Doors that somebody who fled has left open.
    pub way: Vec<usize>,
    /// Glass falls by its criterion.
    pub glass_falls: bool,
    /// Doors that shut themselves do so on detection.
    pub closers_work: bool,
    /// When everything that can be shut in the room of origin is shut, on the fire clock, s.
    pub shut_at_s: Option<f64>,
    pub reason: Option<Reason>,
    /// Where the first fire burns.
    pub position: Position,
}

impl Standing {
    /// The scenario as it begins; `shut_late` begins as `door_open` does.
    pub fn of(plan: &Plan<'_>, origin: usize, scenario: Scenario) -> Self {
        let door = way_out(plan, origin);
        let opened = match scenario {
            Scenario::DoorOpen | Scenario::ShutLate => door,
            _ => None,
        };
        let no_door = scenario == Scenario::DoorOpen && door.is_none();
        Self {
            scenario,
            stand: Stand { opened, ..Stand::as_recorded(scenario) },
            way: opened.map_or_else(Vec::new, |door| way_to_outside(plan, origin, door)),
            glass_falls: scenario == Scenario::WindowFails,
            closers_work: matches!(scenario, Scenario::AsFound | Scenario::WindowFails),
            shut_at_s: None,
            reason: no_door.then(|| reason("no_door", "no door is recorded: as found")),
            position: Position::Corner,
        }
    }

    /// The same way to stand under the name of another scenario.
    pub fn named(self, scenario: Scenario) -> Self {
        Self { scenario, ..self }
    }

    /// Share of an opening that stands open at the start.
    pub fn share(&self, plan: &Plan<'_>, number: usize) -> f64 {
        if self.way.contains(&number) { 1.0 } else { self.stand.of(plan, number).0 }
    }
}
