//! `serve`: answers over HTTP until stopped.

use std::net::SocketAddr;
use std::path::Path;

use tempfile::TempDir;
use tokio::net::TcpListener;
use tracing_subscriber::EnvFilter;

use super::demo::{self, Loaded};
use super::{Failure, runtime};
use crate::compute::Compute;
use crate::config::Serve;
use crate::http::{self, App};
use crate::store::Store;

/// Opens the inventory, fills it when asked, answers until a signal comes.
pub fn run(flags: &Serve) -> Result<(), Failure> {
    tracing_subscriber::fmt()
        .with_env_filter(EnvFilter::try_from_default_env().unwrap_or_else(|_| EnvFilter::new("warn")))
        .with_writer(std::io::stderr)
        .init();
    let inventory = Inventory::of(flags)?;
    runtime()?.block_on(serve(flags, &inventory))
}

/// The inventory's address; a temporary one lives as long as this.
struct Inventory {
    url: String,
    temporary: Option<TempDir>,
}

impl Inventory {
    fn of(flags: &Serve) -> Result<Self, Failure> {
        if !flags.demo || flags.database.database.is_some() {
            return Ok(Self { url: flags.database.url().to_owned(), temporary: None });
        }
        let folder = tempfile::Builder::new().prefix("sootline-demo-").tempdir()?;
        let url = format!("sqlite://{}", utf8(&folder.path().join("demo.db"))?);
        Ok(Self { url, temporary: Some(folder) })
    }
}

fn utf8(path: &Path) -> Result<&str, Failure> {
    path.to_str().ok_or_else(|| format!("{} is not valid UTF-8", path.display()).into())
}

async fn serve(flags: &Serve, inventory: &Inventory) -> Result<(), Failure> {
    let listener = TcpListener::bind(flags.listen)
        .await
        .map_err(|error| format!("cannot listen on {}: {error}", flags.listen))?;
    let store = Store::open(&inventory.url).await?;
    let app = App::new(store.clone(), Compute::on_this_machine()?);
    let loaded = if flags.demo { Some(demo::load(&app).await?) } else { None };

    let signals = Signals::listen()?;
    print!("{}", greeting(listener.local_addr()?, inventory, loaded.as_ref()));
    axum::serve(listener, http::router(app)).with_graceful_shutdown(signals.come()).await?;
    store.close().await?;
    Ok(())
}

/// Ctrl-C, or the signal that service managers send. Listened for from the moment this is made, so that
/// whoever has read the greeting can stop the service.
struct Signals {
    #[cfg(unix)]
    interrupt: tokio::signal::unix::Signal,
    #[cfg(unix)]
    terminate: tokio::signal::unix::Signal,
}

impl Signals {
    fn listen() -> std::io::Result<Self> {
        #[cfg(unix)]
        {
            use tokio::signal::unix::{SignalKind, signal};
            Ok(Self {
                interrupt: signal(SignalKind::interrupt())?,
                terminate: signal(SignalKind::terminate())?,
            })
        }
        #[cfg(not(unix))]
        Ok(Self {})
    }

    #[cfg_attr(not(unix), expect(unused_mut, reason = "only the signals of unix are read in place"))]
    async fn come(mut self) {
        #[cfg(unix)]
        tokio::select! { _ = self.interrupt.recv() => {}, _ = self.terminate.recv() => {} }
        #[cfg(not(unix))]
        let _signal = tokio::signal::ctrl_c().await;
    }
}

fn greeting(address: SocketAddr, inventory: &Inventory, demo: Option<&Loaded>) -> String {
    let base = format!("http://{address}");
    let inventory_line = match &inventory.temporary {
        Some(_) => "a temporary file, removed when you stop this".to_owned(),
        None => inventory.url.clone(),
    };
    let (try_line, demo_line) = match demo {
        Some(Loaded::Filled { buildings, rooms, example }) => (
            format!("curl -s {base}{example}"),
            format!("  demo        {buildings} invented buildings, {rooms} rooms, assessed\n"),
        ),
        Some(Loaded::LeftAlone) => (
            format!("curl -s {base}/v1/buildings"),
            "  demo        left out: the inventory holds buildings already\n".to_owned(),
        ),
        None => (format!("curl -s {base}/v1/buildings"), String::new()),
    };
    format!(
        "Sootline {version} answers at {base}\n\
         \x20 documents   {base}/docs\n\
         \x20 inventory   {inventory_line}\n\
         {demo_line}\
         \x20 try         {try_line}\n\
         Figures are for planning. They do not replace size-up, local codes and procedures, or a licensed engineer.\n\
         Stop with Ctrl-C.\n",
        version = env!("CARGO_PKG_VERSION"),
    )
}
