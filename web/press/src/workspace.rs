//! Where the sources and the built things are.

use anyhow::{Context, Result};
use std::path::PathBuf;
use std::process::Command;

/// The folders and the cargo that a build uses.
#[derive(Debug, Clone)]
pub struct Workspace {
    /// Folder of the top `Cargo.toml`.
    pub root: PathBuf,
    /// Cargo's target folder.
    pub target: PathBuf,
    /// The cargo that runs this program, else the one on the path.
    pub cargo: PathBuf,
}

impl Workspace {
    /// Asks cargo about the workspace that this program was built from.
    ///
    /// # Errors
    /// If cargo does not run or the sources have moved.
    pub fn find() -> Result<Self> {
        let cargo = std::env::var_os("CARGO").map_or_else(|| "cargo".into(), PathBuf::from);
        let inside = std::env::var_os("CARGO_MANIFEST_DIR")
            .map_or_else(|| PathBuf::from(env!("CARGO_MANIFEST_DIR")), PathBuf::from);
        let answer = Command::new(&cargo)
            .args(["metadata", "--no-deps", "--offline", "--format-version", "1"])
            .current_dir(&inside)
            .output()
            .with_context(|| format!("cannot run {} in {}", cargo.display(), inside.display()))?;
        anyhow::ensure!(answer.status.success(), "{}", String::from_utf8_lossy(&answer.stderr));
        let answer: serde_json::Value = serde_json::from_slice(&answer.stdout)?;
        let folder = |key: &str| {
            answer[key].as_str().map(PathBuf::from).with_context(|| format!("cargo did not say its {key}"))
        };
        Ok(Self { root: folder("workspace_root")?, target: folder("target_directory")?, cargo })
    }

    /// A cargo command that runs in the workspace.
    #[must_use]
    pub fn cargo(&self) -> Command {
        let mut command = Command::new(&self.cargo);
        command.current_dir(&self.root).stdin(std::process::Stdio::null());
        // What cargo sets for the program it runs would make the inner build differ from an outer one.
        let inherited = |name: &str| name.starts_with("CARGO_PKG_") || name == "CARGO_MANIFEST_DIR";
        for (name, _) in std::env::vars_os().filter(|(name, _)| name.to_str().is_some_and(inherited)) {
            command.env_remove(name);
        }
        command
    }
}
