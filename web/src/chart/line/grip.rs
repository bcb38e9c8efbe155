//! An upright line that can be moved along the chart: by the pointer, by keys, and as a reader of the screen
//! hears it.

use web_sys::Element;
use yew::prelude::*;

use super::layout::Layout;
use crate::chart::linear::Linear;
use crate::chart::unit::Unit;

/// Width of what the pointer can take, pixels.
const REACH: f64 = 28.0;
/// Shift makes a press of a key so much larger.
const COARSER: f64 = 10.0;

/// What happens to the line.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Pull {
    /// It was taken.
    Take,
    /// The pointer has it here, SI.
    To(f64),
    /// It was let go.
    LetGo,
    /// It goes back.
    PutBack,
    /// A key moved it here, SI.
    Nudge(f64),
    /// The run of key presses is over.
    EndRun,
}

/// An upright line that can be moved.
#[derive(Clone, Debug, PartialEq)]
pub struct Grip {
    /// Where, SI.
    pub x: f64,
    /// What it is, for a reader of the screen.
    pub name: AttrValue,
    /// Whether keys reach it; of several charts with the same line one is enough.
    pub keys: bool,
    /// Told what happens.
    pub onpull: Callback<Pull>,
}

/// Properties of [`Holder`].
#[derive(Clone, Properties, PartialEq)]
pub(super) struct GripProps {
    grip: Grip,
    unit: Unit,
    x: Linear,
    top: f64,
    height: f64,
}

impl GripProps {
    pub(super) fn new(layout: &Layout, grip: Grip, unit: Unit) -> Self {
        Self { grip, unit, x: layout.x, top: layout.top, height: layout.height() }
    }
}

/// A strip over the line with a ring at its foot.
#[component]
pub(super) fn Holder(props: &GripProps) -> Html {
    let held = use_mut_ref(|| false);
    let grip = &props.grip;
    let style = format!(
        "left: {:.1}px; top: {:.1}px; width: {REACH}px; height: {:.1}px",
        props.x.px(props.x.held(grip.x)) - REACH / 2.0,
        props.top,
        props.height + REACH / 2.0
    );
    let taken = {
        let (held, onpull) = (held.clone(), grip.onpull.clone());
        Callback::from(move |e: PointerEvent| {
            if e.button() == 0 {
                if let Some(strip) = e.target_dyn_into::<Element>() {
                    // Without capture the drag still works as long as the pointer stays on the strip.
                    let _ = strip.set_pointer_capture(e.pointer_id());
                }
                *held.borrow_mut() = true;
                onpull.emit(Pull::Take);
            }
        })
    };
    let moved = {
        let (held, props) = (held.clone(), props.clone());
        Callback::from(move |e: PointerEvent| {
            if let (true, Some(value)) = (*held.borrow(), under(&props, &e)) {
                props.grip.onpull.emit(Pull::To(value));
            }
        })
    };
    let released = |pull: Pull| {
        let (held, onpull) = (held.clone(), grip.onpull.clone());
        Callback::from(move |_: PointerEvent| {
            if held.replace(false) {
                onpull.emit(pull);
            }
        })
    };
    let onkeydown = keys(props, &held);
    let onblur = grip.onpull.reform(|_: FocusEvent| Pull::EndRun);
    let pointer = (taken, moved, released(Pull::LetGo), released(Pull::PutBack));
    let (onpointerdown, onpointermove, onpointerup, onpointercancel) = pointer;
    if !grip.keys {
        return html! {
            <div class="grip" aria-hidden="true" {style} {onpointerdown} {onpointermove} {onpointerup}
                {onpointercancel}></div>
        };
    }
    html! {
        <div class="grip" role="slider" tabindex="0" aria-label={grip.name.clone()} aria-orientation="horizontal"
            aria-valuemin={bound(props, props.x.span().0)} aria-valuemax={bound(props, props.x.span().1)}
            aria-valuenow={bound(props, grip.x)} aria-valuetext={props.unit.text(grip.x)} {style} {onkeydown} {onblur}
            {onpointerdown} {onpointermove} {onpointerup} {onpointercancel}></div>
    }
}

fn bound(props: &GripProps, si: f64) -> String {
    format!("{:.1}", props.unit.of(si))
}

/// The value under the pointer on a round figure of the unit shown, inside the axis.
fn under(props: &GripProps, event: &PointerEvent) -> Option<f64> {
    let place = event.target_dyn_into::<Element>()?.parent_element()?.get_bounding_client_rect();
    let value = props.x.value(f64::from(event.client_x()) - place.left());
    Some(rounded(props.unit, props.x.held(value)))
}

/// On the last decimal place that the unit is shown with.
fn rounded(unit: Unit, si: f64) -> f64 {
    let places = 10_f64.powi(i32::try_from(unit.decimals).unwrap_or(0));
    unit.si((unit.of(si) * places).round() / places)
}

fn keys(props: &GripProps, held: &std::rc::Rc<std::cell::RefCell<bool>>) -> Callback<KeyboardEvent> {
    let (props, held) = (props.clone(), held.clone());
    Callback::from(move |e: KeyboardEvent| {
        let step = props.unit.si(10_f64.powi(-i32::try_from(props.unit.decimals).unwrap_or(0)));
        let by = if e.shift_key() { COARSER * step } else { step };
        let to = |by: f64| Pull::Nudge(rounded(props.unit, props.x.held(props.grip.x + by)));
        let pull = match e.key().as_str() {
            "ArrowRight" | "ArrowUp" => to(by),
            "ArrowLeft" | "ArrowDown" => to(-by),
            "Escape" if held.replace(false) => Pull::PutBack,
            _ => return,
        };
        e.prevent_default();
        props.grip.onpull.emit(pull);
    })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::chart::number::fixed;

    #[test]
    fn a_line_stands_on_round_figures_of_the_unit_shown() {
        assert_eq!(fixed(Unit::KM_H.of(rounded(Unit::KM_H, 33.37)), 3), "120.000");
        assert_eq!(fixed(rounded(Unit::M_S, 33.37), 3), "33.400");
    }
}
