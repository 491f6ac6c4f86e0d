//! A server of the test's own on a free port.

use std::io::{BufRead, BufReader};
use std::process::{Child, ChildStdout, Command, Stdio};

/// The built binary.
pub fn sootline() -> Command {
    let mut command = Command::new(env!("CARGO_BIN_EXE_sootline"));
    command.env_remove("SOOTLINE_DATABASE").env_remove("SOOTLINE_LISTEN").env_remove("RUST_LOG");
    command
}

/// A running `sootline serve`; stopped when dropped.
pub struct Server {
    child: Child,
    /// Kept open: the server would stop at a closed pipe.
    _out: BufReader<ChildStdout>,
    /// What it printed at start.
    pub greeting: Vec<String>,
    /// Its address, `http://127.0.0.1:PORT`.
    pub base: String,
}

impl Server {
    /// Starts `serve` with these flags on a free port and waits until it has said where it is.
    pub fn start(flags: &[&str]) -> Self {
        let mut child = sootline()
            .args(["serve", "--listen", "127.0.0.1:0"])
            .args(flags)
            .stdout(Stdio::piped())
            .spawn()
            .unwrap();
        let mut out = BufReader::new(child.stdout.take().unwrap());
        let mut greeting = Vec::new();
        loop {
            let mut line = String::new();
            assert!(out.read_line(&mut line).unwrap() > 0, "the server ended: {greeting:?}");
            let last = line.starts_with("Stop with");
            greeting.push(line.trim_end().to_owned());
            if last {
                break;
            }
        }
        let base = greeting[0].split_whitespace().last().unwrap().to_owned();
        Self { child, _out: out, greeting, base }
    }

    /// Sends the signal that service managers send and waits for the end.
    pub fn stop(mut self) -> i32 {
        let id = self.child.id().to_string();
        assert!(Command::new("kill").args(["-TERM", &id]).status().unwrap().success());
        self.child.wait().unwrap().code().unwrap()
    }
}

impl Drop for Server {
    fn drop(&mut self) {
        let _ended = self.child.kill();
        let _reaped = self.child.wait();
    }
}
