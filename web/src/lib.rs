//! The Spokeshave page: a Yew app that runs entirely in the browser.
//!
//! One direction: [`state`] (pure: actions to state) → [`results`] (what the core computes, kept by what it
//! depends on) → views. The browser is touched at the edges only: [`keep`], [`saved_page`], `effect`.

pub mod act;
pub mod app;
pub mod background;
pub mod blade_view;
pub mod chart;
pub mod editor;
pub mod effect;
pub mod form;
pub mod keep;
pub mod later;
pub mod number;
pub mod results;
pub mod saved_page;
pub mod state;
pub mod timing;
pub mod units;
pub mod view;

use wasm_bindgen::prelude::wasm_bindgen;

/// Starts the application in the page's own node; called once by the start script.
#[wasm_bindgen]
pub fn start() {
    keep::report_panics();
    let document = web_sys::window().and_then(|window| window.document());
    if let Some(root) = document.and_then(|document| document.get_element_by_id(spokeshave_boot::node::APP)) {
        yew::Renderer::<app::App>::with_root(root).render();
    }
}
