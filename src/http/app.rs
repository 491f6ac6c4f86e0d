//! What every handler works with.

use std::ops::Deref;
use std::sync::Arc;

use super::metrics::Metrics;
use crate::catalogue::Catalogue;
use crate::compute::Compute;
use crate::domain::time::Timestamp;
use crate::store::Store;

/// Tells the time. Passed in, so that a test can fix it.
pub trait Clock: Send + Sync + 'static {
    /// Now.
    fn now(&self) -> Timestamp;
}

/// Makes new ids. Passed in, so that a test can fix them.
pub trait Ids: Send + Sync + 'static {
    /// A new id for a record: UUID version 7.
    fn record(&self) -> uuid::Uuid;
    /// A new id for a request that brought none.
    fn request(&self) -> uuid::Uuid {
        self.record()
    }
}

/// The machine's clock.
#[derive(Debug, Clone, Copy, Default)]
pub struct SystemClock;

impl Clock for SystemClock {
    fn now(&self) -> Timestamp {
        Timestamp(jiff::Timestamp::now().as_microsecond())
    }
}

/// Ids that no other machine makes.
#[derive(Debug, Clone, Copy, Default)]
pub struct UniqueIds;

impl Ids for UniqueIds {
    fn record(&self) -> uuid::Uuid {
        uuid::Uuid::now_v7()
    }
}

/// Most steps of an assessment that somebody waits for. A step is what `assess` counts: one room,
/// and at level transient each step of the solver. A building of some forty rooms fits.
pub const INTERACTIVE_STEPS: u64 = 1_000_000;

/// Most work of a simulation that somebody waits for: solver steps times rooms. A day of a hundred
/// rooms takes about half of it, whether at rest or after a fire.
pub const SIMULATION_ROOM_STEPS: u64 = 1_000_000;

/// What every handler works with; cheap to clone.
#[derive(Clone)]
pub struct App(Arc<Parts>);

/// The parts of an [`App`].
pub struct Parts {
    /// The records.
    pub store: Store,
    /// The catalogue.
    pub catalogue: &'static Catalogue,
    /// The threads of assessments.
    pub compute: Compute,
    /// The time.
    pub clock: Box<dyn Clock>,
    /// New ids.
    pub ids: Box<dyn Ids>,
    /// Steps an assessment may take while somebody waits.
    pub interactive_steps: u64,
    /// Steps times rooms that a simulation may take.
    pub simulation_room_steps: u64,
    /// What is counted.
    pub metrics: Metrics,
}

impl App {
    /// The service as it runs: the machine's clock, ids that are unique.
    pub fn new(store: Store, compute: Compute) -> Self {
        Self::of(Parts {
            store,
            catalogue: Catalogue::embedded(),
            compute,
            clock: Box::new(SystemClock),
            ids: Box::new(UniqueIds),
            interactive_steps: INTERACTIVE_STEPS,
            simulation_room_steps: SIMULATION_ROOM_STEPS,
            metrics: Metrics::default(),
        })
    }

    /// From parts that a test chose.
    pub fn of(parts: Parts) -> Self {
        Self(Arc::new(parts))
    }
}

impl Deref for App {
    type Target = Parts;

    fn deref(&self) -> &Parts {
        &self.0
    }
}
