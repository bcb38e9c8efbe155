//! The worker's side. It has no document: only what is given here may be touched.

use serde::Serialize;
use serde::de::DeserializeOwned;
use wasm_bindgen::prelude::wasm_bindgen;
use web_sys::js_sys::Function;
use web_sys::js_sys::wasm_bindgen::JsValue;

use super::{polars, shape};

/// Makes polars; called in a worker with the order as JSON. `hear` gets `("report", JSON)` again and again,
/// or `("fault", text)` if the program fails.
#[wasm_bindgen]
pub fn make_polars(order: &str, hear: &Function) {
    carry_out(order, hear, |order, tell| polars::carried_out(order, tell), polars::Report::Refused);
}

/// Shapes a blade; the same way.
#[wasm_bindgen]
pub fn shape_blade(order: &str, hear: &Function) {
    carry_out(order, hear, |order, tell| shape::carried_out(order, tell), shape::Report::Refused);
}

fn carry_out<O: DeserializeOwned, R: Serialize>(
    order: &str,
    hear: &Function,
    work: impl FnOnce(&O, &dyn Fn(&R)) -> R,
    refused: impl FnOnce(String) -> R,
) {
    let tell = |report: &R| {
        let text = serde_json::to_string(report).unwrap_or_default();
        // The page may be gone: then nobody has to know.
        let _ = hear.call2(&JsValue::NULL, &JsValue::from_str("report"), &JsValue::from_str(&text));
    };
    // The start of the worker puts its own listener where the page has its message.
    crate::keep::report_panics();
    tell(&match serde_json::from_str::<O>(order) {
        Ok(order) => work(&order, &tell),
        Err(e) => refused(format!("The order cannot be read: {e}")),
    });
}
