//! The accessibility rules, run inside the page.

use super::{Browser, target_folder};
use crate::tools;
use anyhow::{Context, Result};
use serde_json::Value;

/// One broken rule.
#[derive(Debug, Clone)]
pub struct Violation {
    /// Name of the rule.
    pub rule: String,
    /// What it asks for.
    pub help: String,
    /// The elements that break it, with what is wrong with each.
    pub elements: Vec<String>,
}

impl Browser {
    /// Every accessibility rule that the page breaks as it now stands.
    ///
    /// # Errors
    /// If the rules are not installed or cannot run.
    pub async fn violations(&self) -> Result<Vec<Violation>> {
        let script = tools::axe_script(&target_folder()?);
        let rules = std::fs::read_to_string(&script).with_context(|| {
            format!("no accessibility rules at {}: run `cargo prove`, which installs them", script.display())
        })?;
        self.run(&rules).await?;
        // Of the small pictures of printed pages only their names are looked at: what is drawn there is for
        // paper.
        let ask = "const done = arguments[0];
            axe.run({exclude: [['.sheet-previews svg > *']]}).then(found => done(found.violations), fault => done(String(fault)))";
        let found = self.run_async(ask).await?;
        let found = found.as_array().with_context(|| format!("the rules did not run: {found}"))?;
        Ok(found.iter().map(violation).collect())
    }
}

fn violation(found: &Value) -> Violation {
    let text = |value: &Value| value.as_str().unwrap_or_default().to_owned();
    let element = |node: &Value| format!("{} {}", node["target"], text(&node["failureSummary"]));
    Violation {
        rule: text(&found["id"]),
        help: text(&found["help"]),
        elements: found["nodes"].as_array().into_iter().flatten().map(element).collect(),
    }
}
