//! What the blade is made of and how it is held, in boxes.

use spokeshave::wood::SPECIES;
use yew::prelude::*;

use crate::act::{Seen, use_act};
use crate::form::{Labelled, Pick, Shown, Switch, capital};
use crate::state::{Action, Choice, Field, Running, WoodChoice, WoodFigure, species_of, wood_of};

/// Properties of [`WoodForm`].
#[derive(Properties, PartialEq)]
pub(super) struct WoodFormProps {
    pub(super) state: Seen,
}

/// The boxes.
#[component]
pub(super) fn WoodForm(props: &WoodFormProps) -> Html {
    let act = use_act();
    let (state, job) = (&props.state, props.state.job());
    let choose = |choice| Action::Choose(Choice::Wood(choice), Running::default());
    let options: Vec<AttrValue> = SPECIES.iter().map(|s| AttrValue::from(capital(s.title))).collect();
    let wood = wood_of(job);
    let held = wood.hub.is_some();
    let own = species_of(job).is_none();
    // What is no wood takes up no moisture.
    let wooden = spokeshave::wood::is_wood(&wood);
    let asked = |figure: &WoodFigure| wooden || *figure != WoodFigure::Moisture;
    html! {
        <div class="machine-form">
            <Pick label="Material" {options} picked={species_of(job)}
                onpick={act.on(move |i| choose(WoodChoice::Species(i)))} />
            if own { <p class="note">{ "The job brings a material of its own." }</p> }
            if job.wood.is_none() {
                <p class="note">{ "The job names no material: this one is taken until another is picked." }</p>
            }
            { for WoodFigure::BLADE.into_iter().filter(asked).map(|figure| labelled(state, figure)) }
            <Switch label="Judge the hub" on={held} onswitch={act.on(move |on| choose(WoodChoice::Hub(on)))} />
            if held { { for WoodFigure::HUB.map(|figure| labelled(state, figure)) } }
        </div>
    }
}

fn labelled(state: &Seen, figure: WoodFigure) -> Html {
    let hint = if figure == WoodFigure::NutTorque { "none" } else { "" };
    html! { <Labelled shown={Shown::of(state, &[], Field::Wood(figure))} label={capital(figure.name())} {hint} /> }
}
