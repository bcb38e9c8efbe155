//! Green rings on a curve that are dragged up and down.

use super::layout::Layout;
use crate::chart::axis::px;
use crate::chart::linear::Linear;
use web_sys::Element;
use yew::prelude::*;

/// A ring on a curve.
#[derive(Clone, Debug, PartialEq)]
pub struct Handle {
    /// Where, SI.
    pub at: [f64; 2],
    /// What it is, for those who cannot see it.
    pub name: AttrValue,
    /// Its figure with the unit, likewise.
    pub figure: AttrValue,
    /// Whether it is the chosen one.
    pub chosen: bool,
}

/// What is done to a ring, by its index.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Grip {
    /// A drag begins.
    Grab(usize),
    /// It would now stand at this value, SI.
    Move(usize, f64),
    /// The drag ends and what was moved stays.
    Drop(usize),
    /// The drag ends and all is as before.
    Cancel(usize),
    /// Moved to this value, SI, by a key: begun and ended in one.
    Nudge(usize, f64),
}

/// Properties of [`Handles`].
#[derive(Properties, PartialEq)]
pub(super) struct HandlesProps {
    pub(super) handles: Vec<Handle>,
    /// Smallest movement, SI; with Shift a tenth of it.
    pub(super) step: f64,
    /// Projections of the chart.
    pub(super) x: Linear,
    pub(super) y: Linear,
    pub(super) on_grip: Callback<Grip>,
}

impl HandlesProps {
    pub(super) fn new(layout: &Layout, handles: Vec<Handle>, step: f64, on_grip: Callback<Grip>) -> Self {
        Self { handles, step, x: layout.x, y: layout.y, on_grip }
    }
}

/// A drag going on.
#[derive(Clone, Copy, Debug, PartialEq)]
struct Drag {
    index: usize,
    /// Pointer's height at its start, pixels.
    from_px: f64,
    /// Value at its start, and what was told last.
    start: f64,
    told: f64,
    /// Value per pixel upwards.
    per_px: f64,
}

impl Drag {
    /// The value with the pointer at a height, to the step.
    fn value(&self, now_px: f64, step: f64) -> f64 {
        stepped(self.start + (self.from_px - now_px) * self.per_px, step)
    }
}

/// To the nearest step.
fn stepped(value: f64, step: f64) -> f64 {
    if step > 0.0 { (value / step).round() * step } else { value }
}

fn step_of(step: f64, fine: bool) -> f64 {
    if fine { step / 10.0 } else { step }
}

/// The rings.
#[component]
pub(super) fn Handles(props: &HandlesProps) -> Html {
    // Read and written by events between two renderings, so it must not wait for one.
    let drag = use_mut_ref(|| None::<Drag>);
    let keys = |index: usize| {
        let (drag, tell, step) = (drag.clone(), props.on_grip.clone(), props.step);
        let at = props.handles[index].at[1];
        Callback::from(move |event: KeyboardEvent| {
            let way = match event.key().as_str() {
                "ArrowUp" => 1.0,
                "ArrowDown" => -1.0,
                "Escape" if drag.borrow_mut().take().is_some() => return tell.emit(Grip::Cancel(index)),
                _ => return,
            };
            event.prevent_default();
            let step = step_of(step, event.shift_key());
            tell.emit(Grip::Nudge(index, stepped(at + way * step, step)));
        })
    };
    let down = |index: usize| {
        let (drag, tell, per_px) = (drag.clone(), props.on_grip.clone(), -1.0 / props.y.slope());
        let start = props.handles[index].at[1];
        Callback::from(move |event: PointerEvent| {
            if event.button() != 0 {
                return;
            }
            if let Some(ring) = event.target_dyn_into::<Element>() {
                // Without capture the drag only ends at the ring's edge.
                let _ = ring.set_pointer_capture(event.pointer_id());
            }
            let from_px = f64::from(event.client_y());
            *drag.borrow_mut() = Some(Drag { index, from_px, start, told: start, per_px });
            tell.emit(Grip::Grab(index));
        })
    };
    let onpointermove = {
        let (drag, tell, step) = (drag.clone(), props.on_grip.clone(), props.step);
        Callback::from(move |event: PointerEvent| {
            let moved = drag.borrow_mut().as_mut().and_then(|drag| {
                let value = drag.value(f64::from(event.client_y()), step_of(step, event.shift_key()));
                (value != std::mem::replace(&mut drag.told, value)).then_some((drag.index, value))
            });
            if let Some((index, value)) = moved {
                tell.emit(Grip::Move(index, value));
            }
        })
    };
    let ends = |end: fn(usize) -> Grip| {
        let (drag, tell) = (drag.clone(), props.on_grip.clone());
        Callback::from(move |_: PointerEvent| {
            let ended = drag.borrow_mut().take();
            if let Some(drag) = ended {
                tell.emit(end(drag.index));
            }
        })
    };
    let (onpointerup, onpointercancel) = (ends(Grip::Drop), ends(Grip::Cancel));
    let ring = |(index, handle): (usize, &Handle)| {
        let [x, y] = [props.x.px(handle.at[0]), props.y.px(handle.at[1])];
        html! {
            <g class={classes!("handle", handle.chosen.then_some("is-chosen"))} role="slider" tabindex="0"
                aria-label={&handle.name} aria-orientation="vertical" aria-valuenow={handle.at[1].to_string()}
                aria-valuetext={&handle.figure} onkeydown={keys(index)} onpointerdown={down(index)}
                onpointermove={onpointermove.clone()} onpointerup={onpointerup.clone()}
                onpointercancel={onpointercancel.clone()}>
                <circle class="reach" cx={px(x)} cy={px(y)} r="14" />
                <circle class="ring" cx={px(x)} cy={px(y)} r="5.5" />
            </g>
        }
    };
    html! { <g class="handles">{ for props.handles.iter().enumerate().map(ring) }</g> }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_drag_moves_by_steps_from_where_it_began() {
        let drag = Drag { index: 0, from_px: 200.0, start: 19.5, told: 19.5, per_px: 0.25 };
        assert_eq!(drag.value(200.0, 0.1), stepped(19.5, 0.1));
        assert!((drag.value(199.0, 0.1) - 19.8).abs() < 1e-9, "19.75 is nearer to 19.8");
        assert!((drag.value(199.0, step_of(0.1, true)) - 19.75).abs() < 1e-9);
        assert!((drag.value(204.0, 0.1) - 18.5).abs() < 1e-9);
    }
}
