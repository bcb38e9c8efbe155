//! The worker's side. It has no document: only what is given here may be touched.

use wasm_bindgen::prelude::wasm_bindgen;
use web_sys::js_sys::Function;
use web_sys::js_sys::wasm_bindgen::JsValue;

use super::order::{Order, Report, carried_out};

/// Makes polars; called in a worker with the order as JSON. `hear` gets `("report", JSON)` again and again, or `("fault",
/// text)` if the program fails.
#[wasm_bindgen]
pub fn make_polars(order: &str, hear: &Function) {
    let tell = |kind: &str, text: &str| {
        // The page may be gone: then nobody has to know.
        let _ = hear.call2(&JsValue::NULL, &JsValue::from_str(kind), &JsValue::from_str(text));
    };
    // The start of the worker puts its own listener where the page has its message.
    crate::keep::report_panics();
    let report = match serde_json::from_str::<Order>(order) {
        Ok(order) => carried_out(&order, |step| tell("report", &text(step))),
        Err(e) => Report::Refused(format!("The order cannot be read: {e}")),
    };
    tell("report", &text(&report));
}

fn text(report: &Report) -> String {
    serde_json::to_string(report).unwrap_or_default()
}
