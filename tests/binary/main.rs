//! The binary as people run it: its commands, and the README's requests as they are printed.

#![expect(clippy::unwrap_used, reason = "a test may stop at what it cannot do")]

mod commands;
mod golden;
mod readme;
mod server;
