//! A list of one kind out of a few.

use yew::prelude::*;

use crate::act::Act;
use crate::form::Pick;
use crate::state::{Action, Choice, Running};

/// A list to pick a kind from; `words` says what each is called, `choice` what picking it means.
pub(super) fn kinds<T: Copy + PartialEq + 'static>(
    act: &Act,
    label: &'static str,
    all: &'static [T],
    words: impl Fn(T) -> &'static str,
    now: T,
    choice: impl Fn(T) -> Choice + 'static,
) -> Html {
    let options: Vec<AttrValue> = all.iter().map(|&kind| AttrValue::from(words(kind))).collect();
    let picked = all.iter().position(|&kind| kind == now);
    let onpick = act.on(move |i: usize| {
        let kind = all.get(i).copied().unwrap_or(now);
        Action::Choose(choice(kind), Running::default())
    });
    html! { <Pick {label} {options} {picked} {onpick} /> }
}
