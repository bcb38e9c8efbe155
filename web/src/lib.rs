//! The Spokeshave page: a Yew app that runs entirely in the browser.

mod app;
pub mod blade_view;
pub mod chart;
pub mod keep;
pub mod saved_page;

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
