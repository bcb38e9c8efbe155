//! The Shape panel: better blades beside the drawn one, and where it is worth being careful.

mod careful;
mod chart;
mod figures;
mod lines;
mod variants;
mod wishes;
mod work;

use spokeshave::job::FlightPoint;
use spokeshave::shape::Wish;
use yew::prelude::*;

use super::caution;
use crate::act::Seen;
use crate::background::shape::Task;
use crate::number::signed;
use crate::results::RigRef;
use crate::state::State;
use careful::Careful;
use chart::PitchDiameter;
use variants::Blades;
use wishes::WishBoxes;
use work::{Run, Work, use_work};

pub use careful::CostDrawings;
pub use chart::Drawing as ChartDrawing;

/// Properties of [`ShapePanel`].
#[derive(Properties, PartialEq)]
pub struct ShapePanelProps {
    /// The state.
    pub state: Seen,
    /// The job made ready.
    pub rig: Option<RigRef>,
}

/// Whether the panel shows the same of two states.
#[must_use]
pub fn same_shape(a: &State, b: &State) -> bool {
    std::rc::Rc::ptr_eq(a.job(), b.job())
        && a.variants == b.variants
        && a.drafts == b.drafts
        && (a.point, a.station, a.units) == (b.point, b.station, b.units)
}

/// The panel in a line.
#[must_use]
pub fn in_a_line(state: &State) -> String {
    match state.variants.all.len() {
        0 => "best-incidence twist, least induced loss, search".into(),
        1 => "1 blade beside the drawn one".into(),
        n => format!("{n} blades beside the drawn one"),
    }
}

/// Ways to a better blade, what came of them, a chart, what errors cost.
#[component]
pub fn ShapePanel(props: &ShapePanelProps) -> Html {
    let work = use_work();
    let state = &props.state;
    let Some(rig) = &props.rig else { return html! {} };
    let point = state.job().flight_points.get(state.point);
    html! {
        <div class="shape">
            <WishBoxes state={state.clone()} rig={rig.clone()} />
            if let Some(point) = point { { ways(&work, state, rig, point) } }
            { told(&work) }
            <Blades state={state.clone()} rig={rig.clone()} />
            <PitchDiameter state={state.clone()} rig={rig.clone()} chart={work.drawn.chart.clone()} busy={work.busy()}
                on_draw={drawing(&work, state, rig)} />
            <Careful state={state.clone()} costs={work.drawn.costs.clone()} busy={work.busy()}
                on_draw={careful(&work, state)} />
            { caution::shape() }
        </div>
    }
}

/// The buttons that make a blade.
fn ways(work: &Work, state: &Seen, rig: &RigRef, point: &FlightPoint) -> Html {
    let count = state.job().flight_points.len();
    let here = state.point;
    let alone: Vec<f64> = (0..count).map(|i| f64::from(u8::from(i == here))).collect();
    let all = weights(state, rig);
    let button = |label: String, name: String, task: Task, off: bool| {
        let (work, job) = (work.clone(), state.job().clone());
        // What is at work is called off, not begun again; the button keeps the focus.
        let busy = work.busy().then_some("true");
        let onclick = Callback::from(move |_: MouseEvent| work.begin(&job, &name, task.clone()));
        html! {
            <button type="button" class="act" disabled={off} aria-disabled={busy} {onclick}>{ label }</button>
        }
    };
    let name = &point.name;
    let standing = point.airspeed_m_s == Some(0.0);
    html! {
        <>
        <div class="buttons ways unprinted">
            { button(format!("Best-incidence twist at {name}"), format!("twist, {name}"), Task::Twist(alone), false) }
            { button(
                "Best-incidence twist over all that counts".into(),
                "twist, all points".into(),
                Task::Twist(all),
                count < 2
            ) }
            { button(
                format!("Least induced loss at {name}"),
                format!("least loss, {name}"),
                Task::LeastLoss(here),
                standing
            ) }
            { button("Search".into(), "search".into(), Task::Search, false) }
        </div>
        if standing {
            <p class="note unprinted">{ "Least induced loss is laid out for a speed, and here there is none." }</p>
        }
        </>
    }
}

/// The weight of each flight point in what counts.
fn weights(state: &State, rig: &RigRef) -> Vec<f64> {
    let aims = Wish::of(&rig.0).aims;
    let weight = |p: &FlightPoint| aims.iter().filter(|a| a.flight_point == p.name).map(|a| a.weight).sum();
    state.job().flight_points.iter().map(weight).collect()
}

fn drawing(work: &Work, state: &Seen, _rig: &RigRef) -> Callback<Task> {
    let (work, job) = (work.clone(), state.job().clone());
    Callback::from(move |task: Task| work.begin(&job, "the chart", task))
}

fn careful(work: &Work, state: &Seen) -> Callback<Task> {
    let (work, job) = (work.clone(), state.job().clone());
    Callback::from(move |task: Task| work.begin(&job, "what errors cost", task))
}

/// How the work stands, or what it came to.
fn told(work: &Work) -> Html {
    match &*work.run {
        Run::Idle => html! {},
        Run::At(name, step) => {
            let words = match step {
                None => format!("Working out {name}"),
                Some(step) => {
                    let best = step.gain.map_or_else(
                        || "none within limits yet".to_string(),
                        |gain| format!("best so far {}\u{a0}% over the drawn one", signed(100.0 * gain, 2)),
                    );
                    format!("{} blades tried; {best}", step.trials)
                }
            };
            let cancel = work.clone();
            html! {
                <div class="work-bar">
                    <progress aria-label={format!("Working out {name}")} />
                    <span>{ words }</span>
                    <button type="button" class="act" onclick={move |_: MouseEvent| cancel.call_off()}>
                        { "Call it off" }
                    </button>
                </div>
            }
        }
        Run::Stopped(why) => html! { <p class="message" role="alert">{ why }</p> },
        Run::Done(said) => html! { <p class="said" role="status">{ said.join(" ") }</p> },
    }
}
