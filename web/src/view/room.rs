//! How much room the window has: the blade stands where there is width for it and lies down where there is
//! not.

use gloo_events::EventListener;
use yew::prelude::*;

/// Room of the window.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Room {
    /// The blade stands beside the work.
    Wide,
    /// The blade lies on top of it.
    Narrow,
}

/// Width below which the blade lies down, pixels; the style sheets have the same.
const NARROW_PX: f64 = 920.0;

fn now() -> Room {
    let width = web_sys::window().and_then(|w| w.inner_width().ok()).and_then(|w| w.as_f64());
    if width.is_some_and(|w| w < NARROW_PX) { Room::Narrow } else { Room::Wide }
}

/// The room there is, kept up as the window changes.
#[hook]
pub fn use_room() -> Room {
    let room = use_state_eq(now);
    let setter = room.setter();
    use_effect_with((), move |()| {
        let listener =
            web_sys::window().map(|window| EventListener::new(&window, "resize", move |_| setter.set(now())));
        move || drop(listener)
    });
    *room
}
