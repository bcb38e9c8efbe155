//! Running other programs.

use anyhow::{Context, Result};
use std::process::Command;

/// Runs a command to its end, with its output shown.
///
/// # Errors
/// If it cannot start or ends with a failure; the message is the command line.
pub fn run(command: &mut Command) -> Result<()> {
    let line = shown(command);
    let status = command.status().with_context(|| format!("cannot run `{line}`"))?;
    anyhow::ensure!(status.success(), "`{line}` failed ({status})");
    Ok(())
}

/// What a command prints, without the line end.
///
/// # Errors
/// As [`run`]; the message ends with what the command said.
pub(crate) fn output(command: &mut Command) -> Result<String> {
    let line = shown(command);
    let output = command.output().with_context(|| format!("cannot run `{line}`"))?;
    let said = String::from_utf8_lossy(&output.stderr);
    anyhow::ensure!(output.status.success(), "`{line}` failed: {}", said.trim());
    Ok(String::from_utf8_lossy(&output.stdout).trim().to_owned())
}

/// The command as a person would type it.
fn shown(command: &Command) -> String {
    let words = std::iter::once(command.get_program()).chain(command.get_args());
    words.map(|word| word.to_string_lossy().into_owned()).collect::<Vec<_>>().join(" ")
}
