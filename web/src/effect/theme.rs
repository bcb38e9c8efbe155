//! Colours of the page: the root element says which.

use crate::state::Theme;

/// Tells the document which colours to take.
pub fn show(theme: Theme) {
    let Some(root) = web_sys::window().and_then(|w| w.document()).and_then(|d| d.document_element()) else {
        return;
    };
    // Setting an attribute of an element that is there does not fail.
    let _ = match theme {
        Theme::Auto => root.remove_attribute("data-theme"),
        Theme::Light => root.set_attribute("data-theme", "light"),
        Theme::Dark => root.set_attribute("data-theme", "dark"),
    };
}

/// The title of the document.
pub fn title(job: &str) {
    if let Some(document) = web_sys::window().and_then(|w| w.document()) {
        let name = if job.is_empty() { "Spokeshave".to_string() } else { format!("{job} – Spokeshave") };
        document.set_title(&name);
    }
}
