//! Hands the arguments to the commands. Nothing else.

use std::process::ExitCode;

fn main() -> ExitCode {
    sootline::cli::run()
}
