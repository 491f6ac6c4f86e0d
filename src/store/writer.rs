//! The one writer: a task of its own behind a fair, bounded queue.
//!
//! Each job is a whole transaction. It runs in the writer's task, so a caller
//! that goes away neither tears it nor holds it up; one that went away while
//! its job was waiting is passed over. Jobs run in the order they came.

use std::any::Any;
use std::future::poll_fn;
use std::panic::{AssertUnwindSafe, catch_unwind};
use std::pin::Pin;
use std::task::Poll;

use sqlx::{Connection, SqliteConnection};
use tokio::sync::mpsc::error::TrySendError;
use tokio::sync::{mpsc, oneshot};

use super::error::StoreError;
use super::open::{Database, close_writer};

/// A future with its type put away.
pub(super) type BoxFuture<'a, T> = Pin<Box<dyn Future<Output = T> + Send + 'a>>;

type Job = Box<dyn for<'c> FnOnce(&'c mut SqliteConnection) -> BoxFuture<'c, ()> + Send>;

enum Message {
    Run(Job),
    Close(oneshot::Sender<Result<(), StoreError>>),
}

/// Changes that may wait. Beyond it a caller is told to come back: at some
/// thousand changes a second nobody waits here longer than about a second.
pub(super) const QUEUE: usize = 512;

/// The near end of the queue.
#[derive(Debug, Clone)]
pub(super) struct Writer {
    queue: mpsc::Sender<Message>,
}

impl Writer {
    /// Starts the task that owns `connection`.
    pub(super) fn start(database: Database, connection: SqliteConnection) -> Self {
        let (queue, jobs) = mpsc::channel(QUEUE);
        tokio::spawn(run(database, connection, jobs));
        Self { queue }
    }

    /// Runs `work` as one transaction: kept when it answers `Ok`, undone when it answers `Err`.
    ///
    /// `work` must have no effect but on the connection it is given, so that it
    /// can be run again on an engine that asks for that.
    pub(super) async fn write<T, E, F>(&self, work: F) -> Result<T, E>
    where
        T: Send + 'static,
        E: From<StoreError> + Send + 'static,
        F: for<'t> FnOnce(&'t mut SqliteConnection) -> BoxFuture<'t, Result<T, E>> + Send + 'static,
    {
        let (reply, answer) = oneshot::channel();
        let job: Job = Box::new(move |connection| {
            Box::pin(async move {
                if !reply.is_closed() {
                    // A caller that has gone meanwhile has no ear for the answer.
                    let _ = reply.send(in_transaction(connection, work).await);
                }
            })
        });
        match self.queue.try_send(Message::Run(job)) {
            Ok(()) => {}
            Err(TrySendError::Full(_)) => return Err(StoreError::Busy.into()),
            Err(TrySendError::Closed(_)) => return Err(StoreError::Closed.into()),
        }
        answer.await.unwrap_or_else(|_| {
            let lost = if self.queue.is_closed() {
                StoreError::Closed
            } else {
                StoreError::Database("the change ended without an answer and was undone".into())
            };
            Err(lost.into())
        })
    }

    /// How many jobs wait.
    pub(super) fn waiting(&self) -> usize {
        self.queue.max_capacity() - self.queue.capacity()
    }

    /// Waits for what is queued, moves the log into the file, ends the task.
    pub(super) async fn close(&self) -> Result<(), StoreError> {
        let (reply, answer) = oneshot::channel();
        if self.queue.send(Message::Close(reply)).await.is_err() {
            return Ok(());
        }
        answer.await.unwrap_or(Ok(()))
    }
}

async fn in_transaction<T, E, F>(connection: &mut SqliteConnection, work: F) -> Result<T, E>
where
    E: From<StoreError>,
    F: for<'t> FnOnce(&'t mut SqliteConnection) -> BoxFuture<'t, Result<T, E>>,
{
    // Immediate: a transaction that reads first and then writes would be refused at once.
    let mut transaction = connection.begin_with("BEGIN IMMEDIATE").await.map_err(StoreError::from)?;
    match work(&mut transaction).await {
        Ok(done) => {
            transaction.commit().await.map_err(StoreError::from)?;
            Ok(done)
        }
        Err(refusal) => {
            transaction.rollback().await.map_err(StoreError::from)?;
            Err(refusal)
        }
    }
}

async fn run(database: Database, connection: SqliteConnection, mut jobs: mpsc::Receiver<Message>) {
    let mut connection = Some(connection);
    while let Some(message) = jobs.recv().await {
        let job = match message {
            Message::Run(job) => job,
            Message::Close(reply) => {
                let closed = match connection.take() {
                    Some(connection) => close_writer(connection).await,
                    None => Ok(()),
                };
                drop(jobs);
                let _ = reply.send(closed);
                return;
            }
        };
        let mut writer = match connection.take() {
            Some(writer) => writer,
            None => match database.connect_writer().await {
                Ok(writer) => writer,
                Err(error) => {
                    tracing::error!(error = &error as &dyn std::error::Error, "no write connection");
                    continue;
                }
            },
        };
        match catching(job(&mut writer)).await {
            Ok(()) => connection = Some(writer),
            // The connection goes with the panic: its transaction is undone as it closes.
            Err(_) => tracing::error!("a change panicked and was undone"),
        }
    }
    if let Some(connection) = connection {
        // Every handle is gone without a word; the log is recovered at the next start in any case.
        let _ = close_writer(connection).await;
    }
}

/// Turns a panic of the future into an error, so that one bad change does not end the writer.
async fn catching(mut job: BoxFuture<'_, ()>) -> Result<(), Box<dyn Any + Send>> {
    poll_fn(|context| match catch_unwind(AssertUnwindSafe(|| job.as_mut().poll(context))) {
        Ok(Poll::Ready(())) => Poll::Ready(Ok(())),
        Ok(Poll::Pending) => Poll::Pending,
        Err(panic) => Poll::Ready(Err(panic)),
    })
    .await
}
