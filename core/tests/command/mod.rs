//! Running the command line as a script does.
#![cfg(feature = "cli")]

use std::io::Write;
use std::process::{Command, Output, Stdio};

/// Runs it with an input; waits for it to end.
pub(crate) fn run(args: &[&str], input: &str) -> Output {
    let mut child = Command::new(env!("CARGO_BIN_EXE_spokeshave"))
        .args(args)
        .stdin(Stdio::piped())
        .stdout(Stdio::piped())
        .stderr(Stdio::piped())
        .spawn()
        .unwrap();
    // A command that refuses its arguments closes its input early.
    let _ = child.stdin.take().unwrap().write_all(input.as_bytes());
    child.wait_with_output().unwrap()
}

/// What it printed.
pub(crate) fn out(o: &Output) -> String {
    String::from_utf8(o.stdout.clone()).unwrap()
}

/// What it complained of.
pub(crate) fn err(o: &Output) -> String {
    String::from_utf8(o.stderr.clone()).unwrap()
}
