//! A button with a sheet that opens below it and closes by Escape or when the focus leaves.

use wasm_bindgen::JsCast;
use web_sys::{HtmlElement, Node};
use yew::prelude::*;

/// Properties of [`Drop`].
#[derive(Properties, PartialEq)]
pub struct DropProps {
    /// What stands on the button.
    pub label: AttrValue,
    /// Style classes.
    #[prop_or_default]
    pub class: Classes,
    /// What the sheet holds.
    pub children: Html,
}

/// The button and its sheet. A press on a button in the sheet closes it.
#[component]
pub fn Drop(props: &DropProps) -> Html {
    let open = use_state_eq(|| false);
    let (whole, button) = (use_node_ref(), use_node_ref());
    let toggle = {
        let open = open.clone();
        Callback::from(move |_: MouseEvent| open.set(!*open))
    };
    let onkeydown = {
        let (open, button) = (open.clone(), button.clone());
        Callback::from(move |e: KeyboardEvent| {
            if e.key() == "Escape" && *open {
                open.set(false);
                focus(&button);
            }
        })
    };
    let onfocusout = {
        let (open, whole) = (open.clone(), whole.clone());
        Callback::from(move |e: FocusEvent| {
            let to = e.related_target().and_then(|t| t.dyn_into::<Node>().ok());
            let inside = whole.cast::<Node>().is_some_and(|w| w.contains(to.as_ref()));
            if !inside {
                open.set(false);
            }
        })
    };
    let onclick = {
        let (open, button) = (open.clone(), button.clone());
        Callback::from(move |e: MouseEvent| {
            let element = e.target().and_then(|t| t.dyn_into::<web_sys::Element>().ok());
            if element.is_some_and(|e| e.closest("button:not([role=radio])").ok().flatten().is_some()) {
                open.set(false);
                // What was pressed goes out of sight, and the focus would go with it.
                focus(&button);
            }
        })
    };
    html! {
        <div class={classes!("drop", props.class.clone())} ref={whole} {onkeydown} {onfocusout}>
            <button type="button" class="drop-button" ref={button} onclick={toggle}
                aria-expanded={if *open { "true" } else { "false" }}>
                { &props.label }
            </button>
            <div class="drop-sheet" hidden={!*open} tabindex="-1" {onclick}>{ props.children.clone() }</div>
        </div>
    }
}

fn focus(button: &NodeRef) {
    if let Some(button) = button.cast::<HtmlElement>() {
        // Fails only for an element that is gone.
        let _ = button.focus();
    }
}
