//! Keys that work wherever the focus is.

use wasm_bindgen::JsCast;
use web_sys::{HtmlElement, KeyboardEvent};

use crate::state::Action;

/// What a key pressed anywhere on the page means; `drafting` while a box holds a text that is not part of the
/// job.
#[must_use]
pub fn meaning(event: &KeyboardEvent, drafting: bool) -> Option<Action> {
    if event.ctrl_key() || event.meta_key() {
        // In a box with such a text the browser's own undo works on the text.
        return if drafting && typing(event) {
            None
        } else {
            undo(&event.key().to_lowercase(), event.shift_key())
        };
    }
    if typing(event) || event.alt_key() {
        return None;
    }
    let digit: usize = event.key().parse().ok()?;
    (1..=9).contains(&digit).then(|| Action::SelectPoint(digit - 1))
}

fn undo(key: &str, shift: bool) -> Option<Action> {
    match (key, shift) {
        ("z", false) => Some(Action::Undo),
        ("z", true) | ("y", false) => Some(Action::Redo),
        _ => None,
    }
}

fn typing(event: &KeyboardEvent) -> bool {
    let element = event.target().and_then(|t| t.dyn_into::<HtmlElement>().ok());
    element.is_some_and(|e| ["INPUT", "SELECT", "TEXTAREA"].contains(&e.tag_name().as_str()))
}
