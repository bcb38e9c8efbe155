//! How far the work has come, and calling it off.

use yew::prelude::*;

use super::charts::short;
use crate::background::polars::Step;
use crate::number::fixed;

/// Properties of [`Progress`].
#[derive(Properties, PartialEq)]
pub(super) struct ProgressProps {
    /// None until the worker has begun.
    pub(super) step: Option<Step>,
    pub(super) on_cancel: Callback<()>,
}

/// A bar, what is in work, and a button.
#[component]
pub(super) fn Progress(props: &ProgressProps) -> Html {
    let (done, total) = props.step.map_or((0, 1), |s| (s.done, s.total.max(1)));
    let words = props.step.map_or_else(
        || "Starting".to_string(),
        |s| {
            let thickness = fixed(100.0 * s.thickness_ratio, 1);
            format!("{done} of {total} angles; {thickness} % thick, Reynolds {}", short(s.reynolds))
        },
    );
    html! {
        <div class="work-bar">
            <progress aria-label="Polars being made" max={total.to_string()} value={done.to_string()} />
            <span>{ words }</span>
            <button type="button" class="act" onclick={props.on_cancel.reform(|_: MouseEvent| ())}>
                { "Call it off" }
            </button>
        </div>
    }
}
