//! Flags and environment, parsed once.

use std::net::SocketAddr;
use std::path::PathBuf;

use clap::{Args, Parser, Subcommand};

/// Where the service listens unless told otherwise: this machine only.
pub const DEFAULT_LISTEN: &str = "127.0.0.1:8080";
/// The inventory's file unless told otherwise.
pub const DEFAULT_DATABASE: &str = "sqlite://sootline.db";

/// The command line.
#[derive(Debug, Parser)]
#[command(
    name = "sootline",
    disable_version_flag = true,
    about = "Rates the fire risk of buildings, room by room, before anything burns.",
    long_about = "Keeps a fire prevention bureau's inventory of buildings and says, room by room, whether and when \
                  a fire can flash over, whether water is on it before that, and whether a shut room can hide a \
                  backdraft.\n\nThe figures are for planning. They do not replace size-up, local codes and \
                  procedures, or a licensed engineer.",
    after_help = "First steps:\n  \
                  sootline serve --demo              an invented district to look at, gone when you stop it\n  \
                  sootline serve                     your own inventory, in ./sootline.db\n  \
                  sootline assess building.json      one building, without any database\n\n\
                  `sootline <COMMAND> --help` explains a command and shows examples."
)]
pub struct CommandLine {
    /// Print the versions of the build, the stored documents and the computation.
    #[arg(long, short = 'V', global = true)]
    pub version: bool,

    /// What to do.
    #[command(subcommand)]
    pub command: Option<Command>,
}

/// What to do.
#[derive(Debug, Subcommand)]
pub enum Command {
    /// Answer over HTTP until stopped.
    ///
    /// One process, one SQLite file, no other service. Stop it with Ctrl-C: requests that
    /// are being answered are finished first.
    #[command(after_help = "Examples:\n  \
        sootline serve --demo\n  \
        sootline serve --listen 0.0.0.0:8080 --database sqlite:///var/lib/sootline/inventory.db")]
    Serve(Serve),

    /// Rate every room of one building document, without a database.
    ///
    /// FILE is a building as the service takes it, or {"building": …, "assumptions": …}.
    /// A dash reads standard input.
    #[command(after_help = "Examples:\n  \
        sootline assess seed-data/demo/buildings/01-*.json\n  \
        curl -s localhost:8080/v1/buildings/ID | sootline assess - --json")]
    Assess(Assess),

    /// Print the OpenAPI 3.1 description of the service.
    Openapi,

    /// Put building documents into the inventory.
    ///
    /// A building whose `reference` is known already is replaced, any other is added. A file
    /// holds one document, an array of them, or one document a line. Every fault of a file is
    /// listed; a document with a fault is left out, the others are saved.
    #[command(after_help = "Examples:\n  \
        sootline import buildings/ --database sqlite://sootline.db\n  \
        sootline import district.ndjson")]
    Import(Import),

    /// Write every building document of the inventory, one a line.
    ///
    /// What this writes, `import` reads.
    #[command(after_help = "Example:\n  sootline export > district.ndjson")]
    Export(Export),
}

/// Where the inventory is.
#[derive(Debug, Clone, Args)]
pub struct Database {
    /// SQLite file of the inventory; made if it does not exist [default: sqlite://sootline.db].
    #[arg(long, env = "SOOTLINE_DATABASE", value_name = "URL")]
    pub database: Option<String>,
}

impl Database {
    /// The URL asked for, or the default.
    pub fn url(&self) -> &str {
        self.database.as_deref().unwrap_or(DEFAULT_DATABASE)
    }
}

/// Flags of `serve`.
#[derive(Debug, Args)]
pub struct Serve {
    /// Address and port to listen on; port 0 takes any free one.
    #[arg(long, env = "SOOTLINE_LISTEN", value_name = "ADDRESS:PORT", default_value = DEFAULT_LISTEN)]
    pub listen: SocketAddr,

    #[command(flatten)]
    #[expect(
        missing_docs,
        reason = "described by its own type; a doc comment here would replace the help text"
    )]
    pub database: Database,

    /// Fill an empty inventory with an invented district, already assessed.
    ///
    /// Without --database the inventory is a temporary file that is removed at exit; an
    /// inventory that holds buildings is left alone.
    #[arg(long)]
    pub demo: bool,
}

/// Flags of `assess`.
#[derive(Debug, Args)]
pub struct Assess {
    /// The document; a dash reads standard input.
    #[arg(value_name = "FILE")]
    pub file: PathBuf,

    /// Print the whole report as JSON instead of a table.
    #[arg(long)]
    pub json: bool,
}

/// Flags of `import`.
#[derive(Debug, Args)]
pub struct Import {
    /// A file, or a folder whose .json and .ndjson files are read in order of name.
    #[arg(value_name = "DIR|FILE")]
    pub from: PathBuf,

    #[command(flatten)]
    #[expect(
        missing_docs,
        reason = "described by its own type; a doc comment here would replace the help text"
    )]
    pub database: Database,
}

/// Flags of `export`.
#[derive(Debug, Args)]
pub struct Export {
    #[command(flatten)]
    #[expect(
        missing_docs,
        reason = "described by its own type; a doc comment here would replace the help text"
    )]
    pub database: Database,
}
