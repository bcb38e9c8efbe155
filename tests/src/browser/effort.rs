//! What the page's own work costs, apart from what else the machine does.

use super::Browser;
use anyhow::{Context, Result};
use serde_json::json;

impl Browser {
    /// Time that the page's thread has computed since the page was opened, in milliseconds: its own
    /// work and that of the browser for it, without the time in which other programs had the processor.
    ///
    /// # Errors
    /// If the browser does not keep count.
    pub async fn computing_ms(&self) -> Result<f64> {
        self.command("Performance.enable", json!({"timeDomain": "threadTicks"})).await?;
        let count = self.command("Performance.getMetrics", json!({})).await?;
        let mut metrics = count["metrics"].as_array().into_iter().flatten();
        let task = metrics.find(|metric| metric["name"] == "TaskDuration").context("no task time")?;
        Ok(1000.0 * task["value"].as_f64().context("no task time")?)
    }

    /// Which share of the time the page's thread gets while it wants the processor: 1 on a machine that
    /// does nothing else.
    ///
    /// # Errors
    /// If the browser does not keep count.
    pub async fn share_of_processor(&self) -> Result<f64> {
        const SPIN_MS: f64 = 300.0;
        let spin = format!("const end = performance.now() + {SPIN_MS}; while (performance.now() < end) {{}}");
        let before_ms = self.computing_ms().await?;
        self.run(&spin).await?;
        Ok((self.computing_ms().await? - before_ms) / SPIN_MS)
    }
}
