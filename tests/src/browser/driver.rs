//! The driver process.

use super::Desktop;
use crate::tools;
use anyhow::{Context, Result};
use std::process::Stdio;
use tokio::io::{AsyncBufReadExt, BufReader};
use tokio::process::{Child, Command};

/// A running chromedriver; it is killed when dropped.
#[derive(Debug)]
pub(super) struct Driver {
    process: Child,
    pub(super) url: String,
}

impl Driver {
    /// Starts the driver on a free port; the browsers it starts show their windows on the desktop.
    pub(super) async fn start(desktop: Option<&Desktop>) -> Result<Self> {
        let program = tools::chromedriver()
            .context("chromedriver is missing: run `cargo prove`, or install the package chromium-driver")?;
        let mut command = Command::new(program);
        if let Some(desktop) = desktop {
            command.env("DISPLAY", desktop.display());
        }
        let mut process = command
            .arg("--port=0")
            .stdin(Stdio::null())
            .stdout(Stdio::piped())
            .stderr(Stdio::null())
            .kill_on_drop(true)
            .spawn()?;
        let output = process.stdout.take().context("chromedriver has no output")?;
        let mut lines = BufReader::new(output).lines();
        while let Some(line) = lines.next_line().await? {
            if let Some(port) = line.strip_suffix('.').and_then(|line| line.rsplit_once("on port ")) {
                // Read on, so that the driver never waits for a full pipe.
                let url = format!("http://localhost:{}", port.1);
                tokio::spawn(async move { while let Ok(Some(_)) = lines.next_line().await {} });
                return Ok(Self { process, url });
            }
        }
        anyhow::bail!("chromedriver ended without naming its port")
    }

    /// Ends the driver.
    pub(super) async fn stop(mut self) {
        // It may have ended by itself, which is as good.
        let _ = self.process.kill().await;
    }
}
