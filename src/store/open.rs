//! Opening the database: the file, its pragmas, its migrations.

use std::num::NonZero;
use std::str::FromStr;
use std::time::Duration;

use sqlx::migrate::Migrator;
use sqlx::sqlite::{
    SqliteConnectOptions, SqliteConnection, SqliteJournalMode, SqlitePool, SqlitePoolOptions,
    SqliteSynchronous,
};
use sqlx::{ConnectOptions, Connection};

use super::error::StoreError;

static MIGRATIONS: Migrator = sqlx::migrate!("migrations/sqlite");

/// Reads of the file through memory maps; pages that the system may take back.
const MMAP_BYTES: &str = "134217728";
/// Pages a connection keeps for itself, in KiB (negative by SQLite's convention). Modest,
/// because there is one cache per connection and the map serves most reads.
const CACHE_KIB: &str = "-2000";
/// The log is cut to this after a checkpoint.
const WAL_LIMIT_BYTES: &str = "33554432";

/// How both kinds of connection reach the file.
#[derive(Debug, Clone)]
pub(super) struct Database {
    url: String,
    options: SqliteConnectOptions,
}

impl Database {
    /// Reads `sqlite://path`.
    pub(super) fn new(url: &str) -> Result<Self, StoreError> {
        let refused = |why: &str| StoreError::Open { url: url.to_owned(), source: why.into() };
        let path = url.strip_prefix("sqlite://").ok_or_else(|| refused("the form is sqlite://path"))?;
        // Each connection to a database in memory would see one of its own.
        if path.is_empty() || path.starts_with(":memory:") || path.contains("mode=memory") {
            return Err(refused("a file is needed, so that readers see what the writer writes"));
        }
        let options = SqliteConnectOptions::from_str(url)
            .map_err(|error| StoreError::Open { url: url.to_owned(), source: error.into() })?
            .foreign_keys(true)
            .busy_timeout(Duration::from_secs(5))
            .pragma("mmap_size", MMAP_BYTES)
            .pragma("cache_size", CACHE_KIB)
            .pragma("temp_store", "memory")
            .pragma("trusted_schema", "off")
            .disable_statement_logging();
        Ok(Self { url: url.to_owned(), options })
    }

    /// The one connection that writes; makes the file and brings it to the present form.
    pub(super) async fn writer(&self) -> Result<SqliteConnection, StoreError> {
        let mut writer = self.connect_writer().await?;
        MIGRATIONS.run(&mut writer).await.map_err(|error| self.refused(error))?;
        Ok(writer)
    }

    /// A connection that writes to a file that was opened before.
    pub(super) async fn connect_writer(&self) -> Result<SqliteConnection, StoreError> {
        self.options
            .clone()
            .create_if_missing(true)
            .journal_mode(SqliteJournalMode::Wal)
            .synchronous(SqliteSynchronous::Full)
            .pragma("journal_size_limit", WAL_LIMIT_BYTES)
            .optimize_on_close(true, 400)
            .connect()
            .await
            .map_err(|error| self.refused(error))
    }

    /// The connections that read, and can do nothing else.
    pub(super) async fn readers(&self) -> Result<SqlitePool, StoreError> {
        let cores = std::thread::available_parallelism().map_or(2, NonZero::get);
        SqlitePoolOptions::new()
            .max_connections(u32::try_from(cores).unwrap_or(u32::MAX).clamp(2, 8))
            .acquire_timeout(Duration::from_secs(5))
            .test_before_acquire(false)
            .idle_timeout(None)
            .max_lifetime(None)
            .connect_with(self.options.clone().read_only(true))
            .await
            .map_err(|error| self.refused(error))
    }

    fn refused(&self, error: impl Into<super::error::Cause>) -> StoreError {
        StoreError::Open { url: self.url.clone(), source: error.into() }
    }
}

/// Ends the write connection with the whole log in the database file.
pub(super) async fn close_writer(mut writer: SqliteConnection) -> Result<(), StoreError> {
    sqlx::query("pragma wal_checkpoint(truncate)").execute(&mut writer).await?;
    Ok(writer.close().await?)
}
