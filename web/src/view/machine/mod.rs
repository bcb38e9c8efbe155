//! The Aircraft and the Engine panel: what is asked for and what is offered.

pub mod aircraft;
mod asked;
pub mod engine;
mod offered;
mod picks;
mod rows;

pub use aircraft::{AircraftPanel, aircraft_in_a_line};
pub use engine::{EnginePanel, engine_in_a_line};

use yew::prelude::*;

use crate::act::Seen;
use crate::form::{Labelled, Shown, capital};
use crate::state::Field;

/// A box under its own name.
fn labelled(state: &Seen, field: Field) -> Html {
    let label = capital(&field.name(state.job()));
    html! { <Labelled shown={Shown::of(state, &[], field)} {label} /> }
}

/// The same for a figure the job may go without.
fn optional(state: &Seen, field: Field) -> Html {
    hinted(state, field, "none")
}

/// The same with what holds in its absence.
pub(super) fn hinted(state: &Seen, field: Field, hint: &'static str) -> Html {
    let label = capital(&field.name(state.job()));
    html! { <Labelled shown={Shown::of(state, &[], field)} {label} {hint} /> }
}

/// Which figures are still those of an invented example, where some are.
fn still_invented(names: &[String]) -> Html {
    if names.is_empty() {
        return html! {};
    }
    html! { <p class="note">{ format!("Still an invented example's, put in your own: {}.", names.join(", ")) }</p> }
}
