//! Showing what was built.

use anyhow::{Context, Result};
use spokeshave_press::{Workspace, run};
use std::path::Path;
use std::process::Command;

/// Prints the departure table of the demo job, worked out by the command line program.
pub(crate) fn departure_table(workspace: &Workspace) -> Result<()> {
    println!();
    let program = ["run", "--release", "--quiet", "--package", "spokeshave", "--"];
    run(workspace.cargo().args(program).args(["analyse", "--demo"]))
}

/// Opens a file the way a double click would.
pub(crate) fn in_browser(path: &Path) -> Result<()> {
    let opener = if cfg!(target_os = "macos") { "open" } else { "xdg-open" };
    let mut command = if cfg!(windows) {
        let mut command = Command::new("cmd");
        command.args(["/C", "start", ""]);
        command
    } else {
        Command::new(opener)
    };
    let started = command.arg(path).status();
    let started = started.with_context(|| format!("cannot open {}; open it by hand", path.display()))?;
    anyhow::ensure!(started.success(), "cannot open {}; open it by hand", path.display());
    Ok(())
}
