//! How the blade is made, in boxes.

use spokeshave::job::Flange;
use yew::prelude::*;

use crate::act::{Seen, use_act};
use crate::form::Pick;
use crate::state::{Action, Choice, Field, MakingFigure, Running, State};
use crate::view::machine::hinted;

/// Properties of [`MakingForm`].
#[derive(Properties, PartialEq)]
pub(super) struct MakingFormProps {
    pub(super) state: Seen,
}

/// Whether the boxes show the same of two states.
#[must_use]
pub fn same_making(a: &State, b: &State) -> bool {
    a.job().bench == b.job().bench && a.drafts == b.drafts && a.units == b.units && a.point == b.point
}

/// The boxes; an empty one takes what is usual.
#[component]
pub(super) fn MakingForm(props: &MakingFormProps) -> Html {
    const FLANGES: [Option<Flange>; 3] = [None, Some(Flange::Sae1), Some(Flange::Sae2)];
    let (act, state) = (use_act(), &props.state);
    let flange = state.job().bench.as_ref().and_then(|b| b.flange);
    let onpick = act.on(|i: usize| Action::Choose(Choice::Flange(FLANGES[i.min(2)]), Running::default()));
    html! {
        <details class="taken unprinted">
            <summary>{ "How it is made" }</summary>
            <div class="machine"><div class="machine-form">
                { for MakingFigure::ALL.map(|f| hinted(state, Field::Making(f), "usual")) }
                <Pick label="Holes of the hub"
                    options={["own pattern", "SAE 1", "SAE 2"].map(AttrValue::from).to_vec()}
                    picked={FLANGES.iter().position(|f| *f == flange)} {onpick} />
            </div></div>
        </details>
    }
}
