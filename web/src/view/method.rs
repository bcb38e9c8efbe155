//! How it is computed: the switches of the method, the tables used and where they come from, what lies
//! outside them.

use std::rc::Rc;

use spokeshave::job::TipLoss;
use spokeshave::result::{Note, PointResult, State};
use spokeshave::section::Family;
use yew::prelude::*;

use super::trust::trust;
use crate::act::{Act, Seen, use_act};
use crate::form::{Labelled, Pick, Shown, Switch};
use crate::number::{fixed, significant};
use crate::results::RigRef;
use crate::state::{Action, Choice, Field, Running};

/// Properties of [`MethodPanel`].
#[derive(Properties, PartialEq)]
pub struct MethodPanelProps {
    /// The state.
    pub state: Seen,
    /// The job made ready.
    pub rig: Option<RigRef>,
    /// The flight point selected, worked out.
    pub point: Rc<Option<PointResult>>,
}

/// What the panel holds.
#[component]
pub fn MethodPanel(props: &MethodPanelProps) -> Html {
    let families = props.rig.iter().flat_map(|rig| rig.0.rotor.blade.families.iter());
    let families = families.map(|f| html! { <li key={f.about.name.clone()}>{ family(f) }</li> });
    html! {
        <div class="method">
            <div>
                <h3>{ "Method" }</h3>
                <p class="note">
                    { "Blade-element momentum with losses at tip and hub, solved for every element by \
                       bracketing. It leaves out yawed flow, blade sweep, bending and twist under load, and \
                       how one blade's wake meets the fuselage. Air is the ISO standard atmosphere with an \
                       offset." }
                </p>
                <Switches state={props.state.clone()} />
            </div>
            <div>
                <h3>{ "Section tables used" }</h3>
                <ul class="families">{ for families }</ul>
                <Outside point={props.point.clone()} />
            </div>
            { trust() }
        </div>
    }
}

#[derive(Properties, PartialEq)]
struct SwitchesProps {
    state: Seen,
}

#[component]
fn Switches(props: &SwitchesProps) -> Html {
    let act = use_act();
    let (state, method) = (&props.state, &props.state.job().method);
    let switch = |label: &'static str, on: bool, choice: fn(bool) -> Choice| {
        let onswitch = act.on(move |on: bool| Action::Choose(choice(on), Running::default()));
        html! { <Switch {label} {on} {onswitch} /> }
    };
    html! {
        <div class="switches">
            { switch("Mach number changes lift and drag", method.compressibility, Choice::Compressibility) }
            { switch("Rotation delays stall inboard", method.stall_delay, Choice::StallDelay) }
            { switch("The hub takes load off the root", method.hub_loss, Choice::HubLoss) }
            { tip_loss(&act, method.tip_loss) }
            <Labelled shown={Shown::of(state, &[], Field::Elements)} label="Elements of a blade" />
            { quietness(&act, method.n_crit) }
        </div>
    }
}

/// Whose factor at the tip. Goldstein's is exact for light loads, Prandtl's is what most comparisons are made
/// with.
fn tip_loss(act: &Act, whose: TipLoss) -> Html {
    const FACTORS: [TipLoss; 2] = [TipLoss::Prandtl, TipLoss::Goldstein];
    let options: Vec<AttrValue> = vec!["Prandtl (1919)".into(), "Goldstein (1929)".into()];
    let onpick = act.on(|i: usize| Action::Choose(Choice::TipLoss(FACTORS[i.min(1)]), Running::default()));
    html! { <Pick label="Loss at the tip" {options} picked={FACTORS.iter().position(|f| *f == whose)} {onpick} /> }
}

/// Which set of tables: boundary layers turn turbulent later in quiet air. A job file may ask for another n.
fn quietness(act: &Act, n_crit: f64) -> Html {
    const SETS: [f64; 2] = [9.0, 4.0];
    let mut options: Vec<AttrValue> = vec!["quiet (n = 9)".into(), "disturbed (n = 4)".into()];
    let picked = SETS.iter().position(|n| *n == n_crit);
    if picked.is_none() {
        options.push(format!("n = {n_crit}: the nearest tables").into());
    }
    let onpick = act.on(move |i: usize| {
        Action::Choose(Choice::Amplification(SETS.get(i).copied().unwrap_or(n_crit)), Running::default())
    });
    html! { <Pick label="Air the section tables are for" {options} picked={picked.or(Some(2))} {onpick} /> }
}

fn family(family: &Family) -> Html {
    let about = &family.about;
    let (low, high) = family.reynolds_range();
    let thousands = |re: f64| fixed((re / 1000.0).round() * 1000.0, 0);
    let reynolds = if family.polar_count() == 1 {
        "one table for every Reynolds number".to_string()
    } else {
        format!("Reynolds {} to {}", thousands(low), thousands(high))
    };
    let thickness = family.thickness_range().map_or_else(
        || "one thickness".to_string(),
        |(low, high)| format!("{} to {} % thick", significant(100.0 * low, 2), significant(100.0 * high, 2)),
    );
    let origin =
        if about.origin.is_empty() { "The job does not say where they come from." } else { &about.origin };
    html! {
        <>
            <b>{ &about.title }</b>{ format!(", {} tables, {reynolds}, {thickness}.", family.polar_count()) }
            <p class="note">{ origin }</p>
        </>
    }
}

#[derive(Properties, PartialEq)]
struct OutsideProps {
    point: Rc<Option<PointResult>>,
}

/// Where the answer leaves what the tables or the method cover.
#[component]
fn Outside(props: &OutsideProps) -> Html {
    let Some(result) = &*props.point else { return html! {} };
    let lines = result.notes.iter().map(|&note| {
        let at: Vec<String> = (0..result.stations.len())
            .filter(|&i| result.stations[i].notes.contains(&note))
            .map(|i| (i + 1).to_string())
            .collect();
        let place = match at.join(", ") {
            _ if note.of_the_whole() => String::new(),
            none if none.is_empty() => " – between stations".into(),
            some => format!(" – at station {some}"),
        };
        html! {
            <li class={(note == Note::NoBalance).then_some("bad")}>
                { format!("{}{place}", crate::form::capital(note.words())) }
            </li>
        }
    });
    html! {
        <>
            <h3>{ format!("Worth knowing at {}", result.name) }</h3>
            if result.state != State::Ok {
                <p class="note">{ result.state.sentence() }</p>
            } else if result.notes.is_empty() {
                <p class="note">{ "Every station works inside its tables." }</p>
            } else {
                <ul class="outside">{ for lines }</ul>
            }
        </>
    }
}
