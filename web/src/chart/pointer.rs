//! Where the pointer is in a drawing.

use web_sys::Element;
use yew::prelude::*;

/// The pointer in the drawing's pixels, whatever its size on the screen; for an event of a pane that lies at
/// left, top, width, height of the drawing.
#[must_use]
pub fn place(event: &MouseEvent, [left, top, width, height]: [f64; 4]) -> Option<[f64; 2]> {
    let pane = event.target_dyn_into::<Element>()?.get_bounding_client_rect();
    if pane.width() <= 0.0 || pane.height() <= 0.0 {
        return None;
    }
    let share = |at: i32, from: f64, size: f64| ((f64::from(at) - from) / size).clamp(0.0, 1.0);
    Some([
        left + width * share(event.client_x(), pane.left(), pane.width()),
        top + height * share(event.client_y(), pane.top(), pane.height()),
    ])
}
