//! The threads that assessments run on, their queues and what becomes of abandoned work.
//!
//! Work that takes more than a moment never runs on the threads that answer requests. It waits
//! in one of two bounded lanes: people who wait go before what runs in the background, and
//! whoever finds a lane full is told so at once. Work whose asker has gone away is told to stop.

mod queue;
#[cfg(test)]
mod tests;
mod watch;

use std::num::NonZeroUsize;
use std::panic::{AssertUnwindSafe, catch_unwind};
use std::sync::Arc;
use std::sync::atomic::{AtomicBool, AtomicUsize, Ordering};
use std::thread;

use tokio::sync::oneshot;

use queue::Queue;
pub use watch::Watch;

/// How many pieces of work may wait in each lane.
const WAITING_PER_LANE: usize = 64;

/// Who waits for the work.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Lane {
    /// Somebody waits for the answer.
    Interactive,
    /// Nobody does; it may take long.
    Background,
}

/// Why there is no answer.
#[derive(Debug, Clone, Copy, PartialEq, Eq, thiserror::Error)]
pub enum NoAnswer {
    /// The lane is full.
    #[error("too much work is waiting already")]
    Full,
    /// The work panicked; the panic is in the log.
    #[error("the computation broke off")]
    BrokeOff,
}

/// Told to whoever computes: go on, or nobody waits any more.
#[derive(Debug, Clone, Default)]
pub struct StopFlag(Arc<AtomicBool>);

impl StopFlag {
    /// Whether the work is to stop.
    pub fn is_set(&self) -> bool {
        self.0.load(Ordering::Relaxed)
    }

    fn set(&self) {
        self.0.store(true, Ordering::Relaxed);
    }
}

/// Sets the flag when the asker is dropped.
struct StopOnDrop(StopFlag);

impl Drop for StopOnDrop {
    fn drop(&mut self) {
        self.0.set();
    }
}

/// What is waiting and what runs, for the metrics.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Load {
    /// Pieces of work waiting in the interactive lane.
    pub interactive_waiting: usize,
    /// Pieces of work waiting in the background lane.
    pub background_waiting: usize,
    /// Pieces of work running.
    pub running: usize,
    /// Threads.
    pub threads: usize,
}

/// A handle to the threads; they end when the last handle is dropped.
#[derive(Clone)]
pub struct Compute(Arc<Owner>);

struct Owner {
    shared: Arc<Shared>,
    threads: usize,
}

struct Shared {
    queue: Queue,
    running: AtomicUsize,
}

impl Compute {
    /// All cores but one, so that requests are still answered while rooms burn.
    pub fn on_this_machine() -> std::io::Result<Self> {
        let cores = thread::available_parallelism().map_or(1, NonZeroUsize::get);
        let threads = NonZeroUsize::new(cores - 1).unwrap_or(NonZeroUsize::MIN);
        Self::with(threads, WAITING_PER_LANE)
    }

    /// This many threads, and this many pieces of work waiting in each lane.
    pub fn with(threads: NonZeroUsize, waiting_per_lane: usize) -> std::io::Result<Self> {
        let shared = Arc::new(Shared { queue: Queue::new(waiting_per_lane), running: AtomicUsize::new(0) });
        // The owner stands first: if a thread cannot be started, those that were are told to end.
        let owner = Owner { shared: Arc::clone(&shared), threads: threads.get() };
        for number in 0..threads.get() {
            let shared = Arc::clone(&shared);
            thread::Builder::new().name(format!("compute-{number}")).spawn(move || shared.serve())?;
        }
        Ok(Self(Arc::new(owner)))
    }

    /// Runs the work on a thread of its own and waits. Dropping the future sets the work's flag;
    /// work that has not begun by then never does.
    pub async fn run<T, W>(&self, lane: Lane, work: W) -> Result<T, NoAnswer>
    where
        T: Send + 'static,
        W: FnOnce(&StopFlag) -> T + Send + 'static,
    {
        let flag = StopFlag::default();
        let (answer, waiting) = oneshot::channel();
        let of_work = flag.clone();
        let job = Box::new(move || {
            if !of_work.is_set() {
                // The asker may be gone by now; then nobody needs the answer.
                let _gone = answer.send(work(&of_work));
            }
        });
        self.0.shared.queue.push(lane, job).map_err(|queue::Full| NoAnswer::Full)?;
        let _stop = StopOnDrop(flag);
        // The sender is dropped unsent only when the work panicked.
        waiting.await.map_err(|_| NoAnswer::BrokeOff)
    }

    /// What is waiting and what runs.
    pub fn load(&self) -> Load {
        let [interactive_waiting, background_waiting] = self.0.shared.queue.waiting();
        let running = self.0.shared.running.load(Ordering::Relaxed);
        Load { interactive_waiting, background_waiting, running, threads: self.0.threads }
    }
}

impl Drop for Owner {
    fn drop(&mut self) {
        self.shared.queue.close();
    }
}

impl Shared {
    fn serve(&self) {
        while let Some(job) = self.queue.take() {
            self.running.fetch_add(1, Ordering::Relaxed);
            if catch_unwind(AssertUnwindSafe(job)).is_err() {
                tracing::error!("a computation panicked; its asker is told that it broke off");
            }
            self.running.fetch_sub(1, Ordering::Relaxed);
        }
    }
}
