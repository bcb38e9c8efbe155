//! What the page has to say.

use yew::prelude::*;

use crate::act::use_act;
use crate::state::{Action, Notice};

/// Properties of [`Said`].
#[derive(Properties, PartialEq)]
pub struct SaidProps {
    /// What is said.
    pub notice: Notice,
}

/// A notice above the page, with a button to close it.
#[component]
pub fn Said(props: &SaidProps) -> Html {
    let act = use_act();
    let lines = props.notice.lines.iter().map(|line| html! { <li>{ line }</li> });
    html! {
        <section class="notice" role="alert">
            <div>
                <b>{ &props.notice.title }</b>
                <ul>{ for lines }</ul>
            </div>
            <button type="button" class="plain-button" onclick={act.on(|_: MouseEvent| Action::Dismiss)}>
                { "Close" }
            </button>
        </section>
    }
}
