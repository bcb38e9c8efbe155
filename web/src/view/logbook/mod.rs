//! The Logbook panel: readings of ground runs and flights, what they tell, what to change.

mod change;
mod factors;
mod lines;
mod readings;
mod sheet;

use std::rc::Rc;

use spokeshave::job::Engine;
use spokeshave::result::Logged;
use yew::prelude::*;

use super::caution;
use crate::act::{Act, Seen, use_act};
use crate::form::Switch;
use crate::number::fixed;
use crate::results::RigRef;
use crate::state::{Action, Choice, LogbookChoice, Running, State};
use change::ChangeForm;
use factors::FactorBars;
use lines::{BeforeAfter, Lines};
use readings::Readings;
use sheet::LogSheet;

/// Properties of [`LogbookPanel`].
#[derive(Properties, PartialEq)]
pub struct LogbookPanelProps {
    /// The state.
    pub state: Seen,
    /// What the readings tell; may be a frame old, not there before it is worked out.
    pub logged: Option<Rc<Result<Logged, String>>>,
    /// The job made ready.
    pub rig: Option<RigRef>,
}

/// Whether the panel shows the same of two states.
#[must_use]
pub fn same_logbook(a: &State, b: &State) -> bool {
    Rc::ptr_eq(a.job(), b.job()) && a.drafts == b.drafts && a.units == b.units
}

/// The logbook in a line.
#[must_use]
pub fn in_a_line(state: &State) -> String {
    let Some(logbook) = state.job().logbook.as_ref().filter(|l| !l.readings.is_empty()) else {
        return "rpm read on the ground and in flight".into();
    };
    let count = match logbook.readings.len() {
        1 => "1 reading".into(),
        n => format!("{n} readings"),
    };
    match (logbook.in_use, logbook.factors) {
        (true, Some(f)) => format!(
            "{count}; every figure of the page uses engine power × {}, drag area × {}, power to turn the \
             propeller × {}",
            fixed(f.engine_power, 3),
            fixed(f.drag_area, 3),
            fixed(f.propeller_power, 3)
        ),
        (false, Some(_)) => format!("{count}; factors kept, switched off"),
        (_, None) => count,
    }
}

/// Whether the engine is a motor.
fn is_electric(state: &State) -> bool {
    matches!(state.job().engine, Some(Engine::Electric(_)))
}

/// What a choice about the logbook does.
fn choose<T: 'static>(act: &Act, make: impl Fn(T) -> LogbookChoice + 'static) -> Callback<T> {
    act.on(move |what: T| Action::Choose(Choice::Logbook(make(what)), Running::default()))
}

/// Readings, then what they tell.
#[component]
pub fn LogbookPanel(props: &LogbookPanelProps) -> Html {
    let (act, state) = (use_act(), &props.state);
    let logbook = state.job().logbook.as_ref();
    let empty = logbook.is_none_or(|l| l.readings.is_empty());
    html! {
        <div class="logbook">
            { caution::logbook() }
            <Readings state={state.clone()} />
            <LogSheet state={state.clone()} />
            if !empty { { told(&act, props) } }
            <ChangeForm state={state.clone()} rig={props.rig.clone()} logged={props.logged.clone()} />
        </div>
    }
}

fn told(act: &Act, props: &LogbookPanelProps) -> Html {
    let state = &props.state;
    let logged = match props.logged.as_deref() {
        None => {
            return html! {
                <p class="note" aria-busy="true">{ "The readings are worked out while this panel is open." }</p>
            };
        }
        Some(Err(why)) => return html! { <p class="note">{ format!("Nothing is told yet: {why}.") }</p> },
        Some(Ok(logged)) => Rc::new(logged.clone()),
    };
    let factors = logged.estimate.factors;
    let keep = choose(act, move |_: MouseEvent| LogbookChoice::Keep(factors));
    let logbook = state.job().logbook.clone().unwrap_or_default();
    let electric = is_electric(state);
    let blade = if logged.as_carved { "the carved propeller, as measured" } else { "the propeller as drawn" };
    html! {
        <>
            <h3>{ format!("What the readings tell of {blade}") }</h3>
            <FactorBars logged={logged.clone()} />
            <ul class="remarks">{ for logged.estimate.remarks.iter().map(|r| html! { <li>{ r }</li> }) }</ul>
            <p class="buttons">
                <button type="button" class="act"
                    disabled={logbook.factors == Some(factors) && logbook.in_use} onclick={keep}>
                    { "Keep these factors and use them on the whole page" }
                </button>
                if logbook.factors.is_some() {
                    <Switch label="Use the factors kept" on={logbook.in_use}
                        onswitch={choose(act, LogbookChoice::Use)} />
                }
            </p>
            <Lines logged={logged.clone()} units={state.units} {electric} />
            <BeforeAfter {logged} units={state.units} {electric} />
        </>
    }
}
