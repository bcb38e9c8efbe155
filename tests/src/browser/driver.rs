//! The driver process.

use super::Desktop;
use crate::tools;
use anyhow::{Context, Result};
use std::fs::File;
use std::path::{Path, PathBuf};
use std::process::Stdio;
use tokio::io::{AsyncBufReadExt, BufReader};
use tokio::process::{Child, Command};

/// A running chromedriver; it is killed when dropped.
#[derive(Debug)]
pub(super) struct Driver {
    process: Child,
    pub(super) url: String,
    /// What the driver and the browser say of faults of their own.
    words: PathBuf,
}

impl Driver {
    /// Starts the driver on a free port; the browsers it starts show their windows on the desktop. What it
    /// and they say of faults goes into `folder`.
    pub(super) async fn start(desktop: Option<&Desktop>, folder: &Path) -> Result<Self> {
        let words = folder.join("driver.txt");
        let program = tools::chromedriver()
            .context("chromedriver is missing: run `cargo prove`, or install the package chromium-driver")?;
        let mut command = Command::new(program);
        if let Some(desktop) = desktop {
            command.env("DISPLAY", desktop.display());
        }
        let mut process = command
            .args(["--port=0", "--enable-chrome-logs"])
            .stdin(Stdio::null())
            .stdout(Stdio::piped())
            .stderr(File::create(&words)?)
            .kill_on_drop(true)
            .spawn()?;
        let output = process.stdout.take().context("chromedriver has no output")?;
        let mut lines = BufReader::new(output).lines();
        while let Some(line) = lines.next_line().await? {
            if let Some(port) = line.strip_suffix('.').and_then(|line| line.rsplit_once("on port ")) {
                // Read on, so that the driver never waits for a full pipe.
                let url = format!("http://localhost:{}", port.1);
                tokio::spawn(async move { while let Ok(Some(_)) = lines.next_line().await {} });
                return Ok(Self { process, url, words });
            }
        }
        anyhow::bail!("chromedriver ended without naming its port")
    }

    /// The last that driver and browser said of faults of their own.
    pub(super) fn last_words(&self) -> String {
        let said = std::fs::read_to_string(&self.words).unwrap_or_default();
        let lines: Vec<&str> = said.lines().collect();
        lines[lines.len().saturating_sub(20)..].join("\n")
    }

    /// Ends the driver.
    pub(super) async fn stop(mut self) {
        // It may have ended by itself, which is as good.
        let _ = self.process.kill().await;
    }
}
