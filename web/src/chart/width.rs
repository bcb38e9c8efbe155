//! The width a chart has, so that it is drawn at one pixel per unit and its lettering keeps its size.

use wasm_bindgen::JsCast;
use wasm_bindgen::closure::Closure;
use web_sys::{Element, ResizeObserver, js_sys};
use yew::prelude::*;

/// A node and its width in CSS pixels, whole; `initial` until it is known.
#[hook]
pub fn use_width(initial: f64) -> (NodeRef, f64) {
    let node = use_node_ref();
    let width = use_state_eq(|| initial);
    {
        let (node, width) = (node.clone(), width.setter());
        use_effect_with((), move |()| {
            let watch = node.cast::<Element>().and_then(|element| watch(&element, width));
            move || drop(watch)
        });
    }
    (node, *width)
}

/// An observer that ends when dropped.
struct Watch {
    observer: ResizeObserver,
    _report: Closure<dyn FnMut(js_sys::Array)>,
}

impl Drop for Watch {
    fn drop(&mut self) {
        self.observer.disconnect();
    }
}

fn watch(element: &Element, width: UseStateSetter<f64>) -> Option<Watch> {
    let shown = element.get_bounding_client_rect().width().floor();
    if shown > 0.0 {
        width.set(shown);
    }
    let report = Closure::<dyn FnMut(js_sys::Array)>::new(move |entries: js_sys::Array| {
        let entry: web_sys::ResizeObserverEntry = entries.get(0).unchecked_into();
        let now = entry.content_rect().width().floor();
        if now > 0.0 {
            width.set(now);
        }
    });
    let observer = ResizeObserver::new(report.as_ref().unchecked_ref()).ok()?;
    observer.observe(element);
    Some(Watch { observer, _report: report })
}
