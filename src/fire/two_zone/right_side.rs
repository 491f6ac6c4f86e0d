//! The laws by themselves, for whoever wants to solve them in another way.

use super::building::Building;
use super::controls::Controls;
use super::events::{self, Pending};
use super::network::Network;
use super::outcome::{Event, EventKind, Failed, Sample};
use super::rates::{Look, Model};
use super::snapshot;

/// The rates of change of a network as a plain function of time and state, as the solver of
/// [`run`](super::run) sees them: between two events they are smooth.
///
/// For a second solver beside ours: give it [`RightSide::start`], integrate
/// [`RightSide::rates`] from event to event, and tell each event of the run to [`RightSide::happen`].
#[derive(Debug)]
pub struct RightSide<'a> {
    network: &'a Network,
    building: Building,
    controls: Controls,
    look: Look,
}

impl<'a> RightSide<'a> {
    /// The laws of a network before anything has happened.
    ///
    /// # Errors
    ///
    /// [`Failed`] where the network is malformed.
    pub fn new(network: &'a Network) -> Result<Self, Failed> {
        let building = Building::new(network)?;
        let look = Look::new(Model { network, building: &building });
        Ok(Self { controls: Controls::new(network), network, building, look })
    }

    /// Numbers of a state.
    #[must_use]
    pub fn len(&self) -> usize {
        self.building.layout.len
    }

    /// Never: a network has a room.
    #[must_use]
    pub fn is_empty(&self) -> bool {
        self.len() == 0
    }

    /// The state before anything burns.
    #[must_use]
    pub fn start(&self) -> Vec<f64> {
        self.building.start()
    }

    /// Rates of change, per second, written to `rates`.
    pub fn rates(&mut self, time_s: f64, state: &[f64], rates: &mut [f64]) {
        let model = Model { network: self.network, building: &self.building };
        self.look.rates(model, &self.controls, time_s, state, false, rates);
    }

    /// What a state means.
    pub fn sample(&mut self, time_s: f64, state: &[f64]) -> Sample {
        let mut rates = vec![0.0; state.len()];
        self.rates(time_s, state, &mut rates);
        let model = Model { network: self.network, building: &self.building };
        let mut sample = Sample::default();
        snapshot::fill(model, &self.controls, &self.look, state, time_s, &mut sample);
        sample
    }

    /// Lets an event of a run happen. Moves of the schedule and fires lit by the clock are events too.
    pub fn happen(&mut self, event: &Event, sample: &Sample) {
        if let EventKind::Moved(opening) = event.kind {
            let due = self
                .network
                .schedule
                .iter()
                .filter(|m| m.opening == opening && m.at_s <= event.at_s)
                .max_by(|a, b| a.at_s.total_cmp(&b.at_s));
            if let Some(due) = due {
                events::move_leaf(&mut self.controls.leaves[opening], event.at_s, due.open_fraction);
            }
            return;
        }
        let sample = Sample { time_s: event.at_s, ..sample.clone() };
        Pending::new(self.network).happen(self.network, &mut self.controls, event.kind, &sample);
    }
}
