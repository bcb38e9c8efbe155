//! The blades beside the drawn one, by what counts at each flight point.

use std::rc::Rc;

use spokeshave::job::{Aim, Figure, Job};
use spokeshave::rig::Rig;
use spokeshave::shape::{Wish, brief, figure_at};
use spokeshave::wood::least_margin;
use yew::prelude::*;

use super::figures::{change, name, told};
use crate::act::{Seen, use_act};
use crate::number::{NO_FIGURE, signed, with_unit};
use crate::results::{RigRef, Same};
use crate::state::{Action, Beside, Variant};
use crate::units::{Quantity, Units};

/// Properties of [`Blades`].
#[derive(Properties, PartialEq)]
pub(super) struct BladesProps {
    pub(super) state: Seen,
    pub(super) rig: RigRef,
}

/// One blade of the table.
struct Row {
    diameter_m: f64,
    pitch_m: f64,
    figures: Vec<Option<f64>>,
    /// Whether each is that throttled back to the limit rpm.
    held: Vec<bool>,
    /// Least margin of strength, where the job names its wood.
    margin: Option<f64>,
}

impl Row {
    fn of(rig: &Rig, aims: &[Aim]) -> Self {
        let point = |aim: &Aim| rig.job.flight_points.iter().find(|p| p.name == aim.flight_point);
        let at = |aim: &Aim| figure_at(rig, point(aim)?, aim.figure);
        let held = |aim: &Aim| point(aim).is_some_and(|p| brief(rig, p).held_at_limit);
        Self {
            diameter_m: rig.job.propeller.diameter_m,
            pitch_m: rig.rotor.blade.pitch_075_m(0.0),
            figures: aims.iter().map(at).collect(),
            held: aims.iter().map(held).collect(),
            margin: rig
                .job
                .wood
                .as_ref()
                .and_then(|_| least_margin(rig).ok().flatten())
                .map(|(_, margin)| margin),
        }
    }
}

/// The drawn blade and those beside it.
#[component]
pub(super) fn Blades(props: &BladesProps) -> Html {
    let (state, rig) = (&props.state, &props.rig.0);
    let aims = use_memo(props.rig.clone(), |rig| Wish::of(&rig.0).aims);
    let drawn = use_memo((props.rig.clone(), aims.clone()), |(rig, aims)| Row::of(&rig.0, aims));
    let variants = &state.variants;
    if variants.all.is_empty() {
        return html! {
            <p class="note">
                { "No other blade is kept yet. What is made here stands beside the drawn blade, never over it." }
            </p>
        };
    }
    let heads = aims.iter().map(|aim| {
        html! { <th scope="col">{ &aim.flight_point }<small>{ name(aim.figure) }</small></th> }
    });
    let job = Rc::new(rig.job.clone());
    let rows = variants.all.iter().enumerate().map(|(i, variant)| {
        html! {
            <BladeRow key={variant.name.clone()} index={i} variant={variant.clone()} job={Same(job.clone())}
                compared={variants.compared == Some(i)}
                aims={aims.clone()} drawn={drawn.figures.clone()} units={state.units} />
        }
    });
    html! {
        <div class="scroll" tabindex="0" role="region" aria-label="Blades beside the drawn one">
            <table class="sheet-table blades">
                <thead><tr>
                    <th scope="col">{ "Blade" }</th><th scope="col">{ "Diameter" }</th>
                    <th scope="col">{ "Pitch" }</th>
                    <th scope="col">{ "Margin of strength" }<small>{ "of the wood named" }</small></th>
                    { for heads }
                </tr></thead>
                <tbody>
                    <tr><th scope="row">{ "as drawn" }</th>{ figures(&drawn, &aims, None, state.units) }</tr>
                    { for rows }
                </tbody>
            </table>
        </div>
    }
}

fn figures(row: &Row, aims: &[Aim], drawn: Option<&[Option<f64>]>, units: Units) -> Html {
    let cell = |(i, (aim, value)): (usize, (&Aim, &Option<f64>))| {
        let gain = drawn.and_then(|drawn| change(aim.figure, drawn[i], *value));
        let gain = gain.filter(|_| aim.figure != Figure::Rpm);
        html! {
            <td>{ told(units, aim.figure, *value) }
                if row.held[i] { <small class="gain">{ "at the limit rpm" }</small> }
                if let Some(gain) = gain { <small class="gain">{ gain }</small> }
            </td>
        }
    };
    let length = |m: f64| with_unit(units, Quantity::Length, Some(m));
    html! {
        <>
            <td>{ length(row.diameter_m) }</td><td>{ length(row.pitch_m) }</td>
            <td class={row.margin.is_some_and(|m| m < 0.0).then_some("broken")}>{ strength(row.margin) }</td>
            { for aims.iter().zip(&row.figures).enumerate().map(cell) }
        </>
    }
}

fn strength(margin: Option<f64>) -> String {
    let Some(margin) = margin else { return NO_FIGURE.into() };
    let said = format!("{}\u{a0}%", signed(100.0 * margin, 0));
    if margin < 0.0 { format!("not strong enough: {said}") } else { said }
}

#[derive(Properties, PartialEq)]
struct BladeRowProps {
    index: usize,
    variant: Rc<Variant>,
    job: Same,
    compared: bool,
    aims: Rc<Vec<Aim>>,
    drawn: Vec<Option<f64>>,
    units: Units,
}

#[component]
fn BladeRow(props: &BladeRowProps) -> Html {
    let act = use_act();
    let (i, compared) = (props.index, props.compared);
    let key = (props.job.clone(), props.variant.clone(), props.aims.clone());
    let row = use_memo(key, |(job, variant, aims)| worked(&job.0, variant, aims));
    let send = |what: Beside| act.on(move |_: MouseEvent| Action::Beside(what.clone()));
    let name = &props.variant.name;
    html! {
        <tr class={classes!(compared.then_some("selected"))}>
            <th scope="row">{ name }<div class="row-acts">
                <button type="button" class="act" aria-pressed={if compared { "true" } else { "false" }}
                    aria-label={format!("Compare {name}")}
                    onclick={send(Beside::Compare((!compared).then_some(i)))}>{ "Compare" }</button>
                <button type="button" class="act" aria-label={format!("Use {name}")} onclick={send(Beside::Use(i))}>
                    { "Use" }
                </button>
                <button type="button" class="act" aria-label={format!("Remove {name}")}
                    onclick={send(Beside::Drop(i))}>
                    { "Remove" }
                </button>
            </div></th>
            { match &*row {
                Some(row) => figures(row, &props.aims, Some(&props.drawn), props.units),
                None => html! {
                    <td colspan={(props.aims.len() + 3).to_string()}>
                        { "not allowed in the job as it stands now" }
                    </td>
                },
            } }
        </tr>
    }
}

fn worked(job: &Job, variant: &Variant, aims: &[Aim]) -> Option<Row> {
    let job = variant.of(job);
    let allowed = job.check_propeller().is_empty();
    let rig = Rig::new(&job).ok().filter(|_| allowed)?;
    Some(Row::of(&rig, aims))
}
