//! Two bounded lanes that threads take work from.

use std::collections::VecDeque;
use std::sync::{Condvar, Mutex, MutexGuard, PoisonError};

use super::Lane;

pub(super) type Job = Box<dyn FnOnce() + Send>;

/// The lane takes no more.
#[derive(Debug)]
pub(super) struct Full;

/// After this many pieces of interactive work in a row one of the background gets its turn,
/// so that a busy day does not hold up the night's work for ever.
const TURNS: u32 = 8;

pub(super) struct Queue {
    lanes: Mutex<Lanes>,
    changed: Condvar,
    bound: usize,
}

#[derive(Default)]
struct Lanes {
    interactive: VecDeque<Job>,
    background: VecDeque<Job>,
    in_a_row: u32,
    closed: bool,
}

impl Queue {
    pub(super) fn new(bound: usize) -> Self {
        Self { lanes: Mutex::default(), changed: Condvar::new(), bound }
    }

    pub(super) fn push(&self, lane: Lane, job: Job) -> Result<(), Full> {
        let mut lanes = self.lock();
        let queue = match lane {
            Lane::Interactive => &mut lanes.interactive,
            Lane::Background => &mut lanes.background,
        };
        if queue.len() >= self.bound {
            return Err(Full);
        }
        queue.push_back(job);
        drop(lanes);
        self.changed.notify_one();
        Ok(())
    }

    /// The next piece of work; waits for one; none once the queue is closed.
    pub(super) fn take(&self) -> Option<Job> {
        let mut lanes = self.lock();
        loop {
            if lanes.closed {
                return None;
            }
            if let Some(job) = lanes.next() {
                return Some(job);
            }
            lanes = self.changed.wait(lanes).unwrap_or_else(PoisonError::into_inner);
        }
    }

    pub(super) fn waiting(&self) -> [usize; 2] {
        let lanes = self.lock();
        [lanes.interactive.len(), lanes.background.len()]
    }

    pub(super) fn close(&self) {
        self.lock().closed = true;
        self.changed.notify_all();
    }

    /// Nothing that can panic runs under the lock, so a poisoned one still holds whole lanes.
    fn lock(&self) -> MutexGuard<'_, Lanes> {
        self.lanes.lock().unwrap_or_else(PoisonError::into_inner)
    }
}

impl Lanes {
    fn next(&mut self) -> Option<Job> {
        let background_first = self.in_a_row >= TURNS && !self.background.is_empty();
        if !background_first && let Some(job) = self.interactive.pop_front() {
            self.in_a_row = self.in_a_row.saturating_add(1);
            return Some(job);
        }
        self.in_a_row = 0;
        self.background.pop_front()
    }
}
