//! What the page asked of the network and what it complained of.

use super::{Browser, cdp};
use anyhow::{Result, ensure};
use serde_json::Value;

/// One line of the browser's console.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct ConsoleLine {
    /// `SEVERE`, `WARNING`, `INFO` or `DEBUG`.
    pub level: String,
    /// The line.
    pub text: String,
}

/// What has been logged since the last look.
#[derive(Debug, Clone, Default)]
pub struct Logs {
    /// Address of every request but those for the opened file itself and for data that the page
    /// carries or made itself.
    pub requests: Vec<String>,
    /// Lines of the console.
    pub console: Vec<ConsoleLine>,
}

impl Logs {
    /// The lines of the console that report something wrong.
    #[must_use]
    pub fn complaints(&self) -> Vec<&ConsoleLine> {
        self.console.iter().filter(|line| line.level == "SEVERE" || line.level == "WARNING").collect()
    }
}

impl Browser {
    /// Takes the logs since the last call.
    ///
    /// # Errors
    /// If the browser is gone.
    pub async fn logs(&self) -> Result<Logs> {
        let network = cdp::log(&self.client, "performance").await?;
        let console = cdp::log(&self.client, "browser").await?;
        let entries = |log: &Value| log.as_array().cloned().unwrap_or_default();
        let text = |entry: &Value, key: &str| entry[key].as_str().unwrap_or_default().to_owned();
        Ok(Logs {
            requests: entries(&network).iter().filter_map(|entry| request(&text(entry, "message"))).collect(),
            console: entries(&console)
                .iter()
                .map(|entry| ConsoleLine { level: text(entry, "level"), text: text(entry, "message") })
                .collect(),
        })
    }

    /// The page has asked nobody for anything and has complained of nothing since the logs were last taken.
    ///
    /// # Errors
    /// What it asked for, what it complained of.
    pub async fn assert_quiet(&self) -> Result<()> {
        let logs = self.logs().await?;
        let complaints = logs.complaints();
        ensure!(logs.requests.is_empty() && complaints.is_empty(), "{:?} {complaints:?}", logs.requests);
        Ok(())
    }
}

/// The address that a network event asks for, if it is one a page that needs no network would not.
fn request(event: &str) -> Option<String> {
    let event: Value = serde_json::from_str(event).ok()?;
    let event = &event["message"];
    if event["method"] != "Network.requestWillBeSent" && event["method"] != "Network.webSocketCreated" {
        return None;
    }
    let asked = event["params"]["request"]["url"].as_str().or(event["params"]["url"].as_str())?;
    // The browser's own empty tab is a page too.
    let by_browser = event["params"]["documentURL"].as_str().is_some_and(|page| page.starts_with("chrome:"));
    let is_page = event["params"]["type"] == "Document" && asked.starts_with("file:");
    let carried = ["data:", "blob:", "about:"].iter().any(|scheme| asked.starts_with(scheme));
    (!by_browser && !is_page && !carried).then(|| asked.to_owned())
}

#[cfg(test)]
mod tests {
    use super::*;

    fn event(kind: &str, url: &str) -> String {
        let params = serde_json::json!({"type": kind, "request": {"url": url}});
        serde_json::json!({"message": {"method": "Network.requestWillBeSent", "params": params}}).to_string()
    }

    #[test]
    fn only_what_leaves_the_page_counts() {
        assert_eq!(request(&event("Document", "file:///a/page.html")), None);
        assert_eq!(request(&event("Image", "data:image/png;base64,AA")), None);
        assert_eq!(request(&event("Script", "file:///a/other.js")), Some("file:///a/other.js".into()));
        assert_eq!(request(&event("Image", "http://example.test/x")), Some("http://example.test/x".into()));
    }
}
