//! How a browser is started.

use super::Desktop;
use crate::tools;
use anyhow::{Context, Result};
use serde_json::{Map, Value, json};
use std::path::Path;

/// Flags for a browser that asks nothing and calls nobody. The sandbox needs rights that test machines
/// often lack, and the only page opened is our own.
const FLAGS: [&str; 12] = [
    "--no-sandbox",
    "--disable-gpu",
    "--disable-quic",
    "--disable-dev-shm-usage",
    "--no-first-run",
    "--no-default-browser-check",
    "--disable-background-networking",
    "--disable-component-update",
    "--disable-sync",
    "--enable-unsafe-swiftshader",
    "--hide-scrollbars",
    // The size of `WIDE`.
    "--window-size=1440,900",
];

/// What the driver is asked for: a profile of its own, no window unless there is a desktop, all logs.
pub(super) fn capabilities(folder: &Path, desktop: Option<&Desktop>) -> Result<Map<String, Value>> {
    let program =
        tools::chromium().context("no Chromium found: run `cargo prove`, or install the package chromium")?;
    let mut flags: Vec<String> = FLAGS.iter().map(ToString::to_string).collect();
    flags.push(format!("--user-data-dir={}", folder.join("profile").display()));
    if desktop.is_none() {
        flags.push("--headless".into());
    }
    let capabilities = json!({
        "browserName": "chrome",
        "goog:chromeOptions": {
            "args": flags,
            "binary": program,
            "prefs": desktop.map_or_else(|| json!({}), Desktop::preferences),
        },
        // The rules of accessibility take a minute over a page with every panel open.
        "timeouts": {"script": 300_000},
        "goog:loggingPrefs": {"performance": "ALL", "browser": "ALL"},
    });
    match capabilities {
        Value::Object(capabilities) => Ok(capabilities),
        _ => anyhow::bail!("capabilities are an object"),
    }
}
