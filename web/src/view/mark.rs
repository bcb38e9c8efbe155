//! Small drawings: the mark and the signs on buttons.

use yew::prelude::*;

/// The mark: a blade with its shaving curling up from it.
pub fn mark() -> Html {
    html! {
        <svg class="mark" width="34" height="24" viewBox="0 0 34 24" aria-hidden="true">
            <path d="M1 19.5c6-3.6 11-4.6 16-4.6s10 1 16 4.6c-6 .9-11 1.2-16 1.2s-10-.3-16-1.2z" />
            <path class="shaving"
                d="M17 14.9c4.4-1.6 7-4.1 6.4-7.4-.5-2.8-3.8-4-5.9-2.3-1.9 1.6-1.5 4.6.9 5.2 1.5.4 2.9-.7 2.7-2.2" />
        </svg>
    }
}

/// An arrow that bends back; mirrored for redo.
pub fn bend(forward: bool) -> Html {
    let class = if forward { "sign mirrored" } else { "sign" };
    html! {
        <svg {class} width="18" height="18" viewBox="0 0 18 18" aria-hidden="true">
            <path d="M6.5 3.5 3 7l3.5 3.5M3.5 7h7.2a3.8 3.8 0 0 1 0 7.6H8" />
        </svg>
    }
}

/// A disc with one half filled.
pub fn halves() -> Html {
    html! {
        <svg class="sign" width="18" height="18" viewBox="0 0 18 18" aria-hidden="true">
            <circle cx="9" cy="9" r="6" />
            <path class="filled" d="M9 3a6 6 0 0 1 0 12z" />
        </svg>
    }
}
