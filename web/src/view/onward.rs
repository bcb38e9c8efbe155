//! Enter leads from box to box.

use wasm_bindgen::JsCast;
use web_sys::{Element, HtmlElement, HtmlInputElement, KeyboardEvent};
use yew::TargetCast;

/// Enter in a box goes on to the next one `within` what holds them, or to a button marked `next` there;
/// leaving the one before takes what was typed.
pub(super) fn next(e: &KeyboardEvent, within: &str) {
    if e.key() != "Enter" {
        return;
    }
    let Some(here) = e.target_dyn_into::<HtmlInputElement>() else { return };
    let Ok(Some(panel)) = here.closest(within) else { return };
    let Ok(boxes) = panel.query_selector_all("input.entry, button.next") else { return };
    let all: Vec<Element> = (0..boxes.length()).filter_map(|i| boxes.get(i)?.dyn_into().ok()).collect();
    if let Some(next) = all.iter().position(|b| *b == **here).and_then(|i| all.get(i + 1)) {
        e.prevent_default();
        go_to(next);
    }
}

/// Gives a box, with all that is in it marked, or a button the focus.
pub(super) fn go_to(place: &Element) {
    if let Some(place) = place.dyn_ref::<HtmlElement>() {
        // What is on the page can have the focus.
        let _ = place.focus();
    }
    if let Some(input) = place.dyn_ref::<HtmlInputElement>() {
        input.select();
    }
}
