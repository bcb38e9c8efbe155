//! The hatches of the page.

use yew::prelude::*;

/// Patterns that the style sheet refers to by `url(#hatch-…)`. Has to stand once in the page, shown (it takes
/// no room).
#[component]
pub fn Hatches() -> Html {
    html! {
        <svg class="hatches" width="0" height="0" aria-hidden="true" focusable="false">
            <defs>
                { pattern("hatch-stall", "hatch-stall") }
                { pattern("hatch-limit", "hatch-limit") }
                { pattern("hatch-missing", "hatch-missing") }
            </defs>
        </svg>
    }
}

fn pattern(id: &'static str, class: &'static str) -> Html {
    html! {
        <pattern id={id} width="6" height="6" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
            <line class={class} x1="0" y1="0" x2="0" y2="6" />
        </pattern>
    }
}
