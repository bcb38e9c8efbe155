//! Asking another judge: a script in `tests/judges`, run by a Python that has what it needs.

use std::path::Path;
use std::process::Command;

use anyhow::{Context, Result};
use spokeshave_press::Workspace;

use crate::tools::judges_python;

/// Runs a script; gives what it says.
///
/// # Errors
/// What the judge finds wrong, or that it is not installed.
pub fn ask(script: &str, arguments: &[&str]) -> Result<String> {
    let python = judges_python(&Workspace::find()?.target);
    let file = Path::new(env!("CARGO_MANIFEST_DIR")).join("judges").join(script);
    let mut judge = Command::new(&python);
    judge.arg(file).args(arguments).env("PYTHONDONTWRITEBYTECODE", "1");
    let said = judge.output().with_context(|| format!("{}: `cargo prove` installs it", python.display()))?;
    anyhow::ensure!(
        said.status.success(),
        "{script} {arguments:?}: {}{}",
        String::from_utf8_lossy(&said.stdout),
        String::from_utf8_lossy(&said.stderr)
    );
    Ok(String::from_utf8_lossy(&said.stdout).into_owned())
}
