//! The page's side: giving an order to a worker and hearing of it.

use serde::Serialize;
use serde::de::DeserializeOwned;
use wasm_bindgen::closure::Closure;
use wasm_bindgen::prelude::wasm_bindgen;
use web_sys::Worker;

#[wasm_bindgen]
extern "C" {
    #[wasm_bindgen(js_namespace = spokeshave, js_name = background)]
    fn background(task: &str, text: &str, hear: &Closure<dyn FnMut(String, String)>) -> Option<Worker>;
}

/// What comes back from a worker.
#[derive(Clone, Debug, PartialEq)]
pub enum Heard<R> {
    /// A report.
    Report(R),
    /// The worker met a fault of its own and stopped.
    Fault(String),
}

/// An order at work; dropping it calls it off.
pub struct Hand {
    worker: Worker,
    _hear: Closure<dyn FnMut(String, String)>,
}

impl Hand {
    /// Gives an order to one of the worker's functions; none where the browser refuses a worker.
    pub fn give<R: DeserializeOwned>(
        task: &str,
        order: &impl Serialize,
        mut heard: impl FnMut(Heard<R>) + 'static,
    ) -> Option<Self> {
        let hear = Closure::<dyn FnMut(String, String)>::new(move |kind: String, text: String| {
            heard(match serde_json::from_str(&text) {
                Ok(report) if kind == "report" => Heard::Report(report),
                _ => Heard::Fault(text),
            });
        });
        let text = serde_json::to_string(order).ok()?;
        let worker = background(task, &text, &hear)?;
        Some(Self { worker, _hear: hear })
    }
}

impl Drop for Hand {
    fn drop(&mut self) {
        self.worker.terminate();
    }
}
