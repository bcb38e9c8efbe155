//! Work that waits until the browser has shown a frame.

use std::cell::RefCell;
use std::rc::Rc;

use gloo_render::{AnimationFrame, request_animation_frame};
use gloo_timers::callback::Timeout;

/// Work that has been put off; dropping it calls it off.
#[derive(Debug)]
pub struct Waiting {
    _frame: AnimationFrame,
    _timer: Rc<RefCell<Option<Timeout>>>,
}

/// Runs `work` after the next frame has been drawn: asked for before the frame, put behind it.
pub fn after_frame(work: impl FnOnce() + 'static) -> Waiting {
    let timer = Rc::new(RefCell::new(None));
    let place = timer.clone();
    let frame = request_animation_frame(move |_| {
        *place.borrow_mut() = Some(Timeout::new(0, work));
    });
    Waiting { _frame: frame, _timer: timer }
}
