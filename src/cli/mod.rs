//! Commands, their help and their tables.

mod assess;
mod demo;
mod documents;
mod export;
mod import;
mod serve;
mod version;

use std::process::ExitCode;

use clap::{CommandFactory, Parser};

use crate::config::{Command, CommandLine};

/// Why a command ended without doing its work: one sentence for people.
type Failure = Box<dyn std::error::Error + Send + Sync>;

/// Parses the arguments and runs the command.
///
/// Ends with 0 when the work was done, 1 when it was not, 2 when the arguments are wrong.
pub fn run() -> ExitCode {
    let line = CommandLine::parse();
    if line.version {
        print!("{}", version::text());
        return ExitCode::SUCCESS;
    }
    let Some(command) = line.command else {
        // Nothing asked: the help is the answer, and it goes where answers go.
        print!("{}", CommandLine::command().render_long_help());
        return ExitCode::SUCCESS;
    };
    let outcome = match command {
        Command::Serve(flags) => serve::run(&flags),
        Command::Assess(flags) => assess::run(&flags),
        Command::Openapi => {
            print!("{}", crate::http::openapi_text());
            Ok(())
        }
        Command::Import(flags) => import::run(&flags),
        Command::Export(flags) => export::run(&flags),
    };
    match outcome {
        Ok(()) => ExitCode::SUCCESS,
        Err(failure) => {
            eprintln!("sootline: {}", chain(failure.as_ref()));
            ExitCode::FAILURE
        }
    }
}

/// The error and what caused it, once.
fn chain(error: &dyn std::error::Error) -> String {
    let mut text = error.to_string();
    let mut cause = error.source();
    while let Some(inner) = cause {
        let words = inner.to_string();
        if !text.contains(&words) {
            text.push_str(": ");
            text.push_str(&words);
        }
        cause = inner.source();
    }
    text
}

/// A runtime for the commands that touch the inventory.
fn runtime() -> Result<tokio::runtime::Runtime, Failure> {
    Ok(tokio::runtime::Builder::new_multi_thread().enable_all().build()?)
}
