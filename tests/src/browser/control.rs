//! Controls, found by role and name as a screen reader finds them.

use super::Browser;
use anyhow::{Context, Result};
use fantoccini::Locator;
use fantoccini::elements::Element;
use fantoccini::key::Key;
use serde_json::{Value, json};

/// Marks an element for the time between finding it and getting hold of it.
const MARK: &str = "data-under-test";

/// Something on the page that a person can act on or read.
#[derive(Debug, Clone)]
pub struct Control {
    element: Element,
    what: String,
}

impl Browser {
    /// Waits for the one control with this role and exactly this name.
    ///
    /// # Errors
    /// If it does not appear, or there are several.
    pub async fn control(&self, role: &str, name: &str) -> Result<Control> {
        self.one_control(role, &format!("{name:?}"), |found| found == name).await
    }

    /// Waits for the one control with this role and a name that starts so.
    ///
    /// # Errors
    /// If it does not appear, or there are several.
    pub async fn control_starting(&self, role: &str, start: &str) -> Result<Control> {
        self.one_control(role, &format!("{start:?}…"), |found| found.starts_with(start)).await
    }

    async fn one_control(&self, role: &str, name: &str, fits: impl Fn(&str) -> bool) -> Result<Control> {
        let what = format!("{role} {name}");
        let one = async || {
            let nodes = self.nodes(role, &fits).await?;
            anyhow::ensure!(nodes.len() < 2, "{} controls are {what}", nodes.len());
            Ok(nodes.into_iter().next())
        };
        match self.wait(&what, one).await {
            Ok(node) => {
                let element = self.element(node).await.with_context(|| what.clone())?;
                Ok(Control { element, what })
            }
            Err(error) => {
                let others = self.names(role).await?;
                Err(error.context(format!("each {role} there: {others:?}")))
            }
        }
    }

    /// The names of all controls with this role, in page order.
    ///
    /// # Errors
    /// If the browser is gone.
    pub async fn names(&self, role: &str) -> Result<Vec<String>> {
        Ok(self.role(role).await?.into_iter().map(|(name, _)| name).collect())
    }

    /// Presses the button with this name.
    ///
    /// # Errors
    /// If there is none, or it cannot be pressed.
    pub async fn press(&self, name: &str) -> Result<()> {
        self.control("button", name).await?.click().await
    }

    /// Sends keys to whatever has the focus.
    ///
    /// # Errors
    /// If nothing has the focus.
    pub async fn keys(&self, keys: &str) -> Result<()> {
        Ok(self.client.active_element().await?.send_keys(keys).await?)
    }

    async fn nodes(&self, role: &str, fits: impl Fn(&str) -> bool) -> Result<Vec<Value>> {
        let all = self.role(role).await?;
        Ok(all.into_iter().filter(|(name, _)| fits(name)).map(|(_, node)| node).collect())
    }

    /// Name and browser node of each control with this role.
    async fn role(&self, role: &str) -> Result<Vec<(String, Value)>> {
        let document = self.command("DOM.getDocument", json!({"depth": 0})).await?;
        let root = &document["root"]["nodeId"];
        let query = json!({"nodeId": root, "role": role});
        let found = self.command("Accessibility.queryAXTree", query).await?;
        let nodes = found["nodes"].as_array().cloned().unwrap_or_default();
        let shown = nodes.iter().filter(|node| node["ignored"] != json!(true));
        let name = |node: &Value| node["name"]["value"].as_str().unwrap_or_default().to_owned();
        Ok(shown.map(|node| (name(node), node["backendDOMNodeId"].clone())).collect())
    }

    async fn element(&self, node: Value) -> Result<Element> {
        let object = self.command("DOM.resolveNode", json!({"backendNodeId": node})).await?;
        let script = format!("function() {{ this.setAttribute('{MARK}', '') }}");
        let call = json!({"objectId": object["object"]["objectId"], "functionDeclaration": script});
        self.command("Runtime.callFunctionOn", call).await?;
        let element = self.client.find(Locator::Css(&format!("[{MARK}]"))).await?;
        self.run(&format!("document.querySelector('[{MARK}]').removeAttribute('{MARK}')")).await?;
        Ok(element)
    }
}

impl Control {
    /// Clicks it, as a person would: it must be in view and not covered.
    ///
    /// # Errors
    /// If it cannot be clicked.
    pub async fn click(&self) -> Result<()> {
        self.element.click().await.with_context(|| format!("clicking {}", self.what))
    }

    /// Types over what stands in it and leaves it with Enter.
    ///
    /// # Errors
    /// If nothing can be typed there.
    pub async fn enter(&self, text: &str) -> Result<()> {
        self.replace(text).await?;
        self.keys(&String::from(char::from(Key::Enter))).await
    }

    /// Types over what stands in it and stays there.
    ///
    /// # Errors
    /// If nothing can be typed there.
    pub async fn replace(&self, text: &str) -> Result<()> {
        let backspace = String::from(char::from(Key::Backspace));
        let select_all = format!("{}a{}", char::from(Key::Control), char::from(Key::Null));
        self.keys(&select_all).await?;
        self.keys(if text.is_empty() { &backspace } else { text }).await
    }

    /// Sends keys to it.
    ///
    /// # Errors
    /// If it takes none.
    pub async fn keys(&self, keys: &str) -> Result<()> {
        self.element.send_keys(keys).await.with_context(|| format!("typing into {}", self.what))
    }

    /// What can be read in it.
    ///
    /// # Errors
    /// If it is gone from the page.
    pub async fn text(&self) -> Result<String> {
        self.element.text().await.with_context(|| format!("reading {}", self.what))
    }

    /// What stands in a field.
    ///
    /// # Errors
    /// If it is gone from the page.
    pub async fn value(&self) -> Result<String> {
        let value = self.element.prop("value").await.with_context(|| format!("reading {}", self.what))?;
        Ok(value.unwrap_or_default())
    }

    /// An attribute of its element.
    ///
    /// # Errors
    /// If it is gone from the page.
    pub async fn attribute(&self, name: &str) -> Result<Option<String>> {
        self.element.attr(name).await.with_context(|| format!("reading {}", self.what))
    }
}
