//! From the blade to the bench: the solid turning, the blank in three views, every sheet of paper, files to
//! take away.

pub(super) mod files;
mod form;
mod look;
mod print;
pub(super) mod sheets;
mod turning;

use std::rc::Rc;

use spokeshave::bench::{Bench, BenchError, Paper, Unit};
use yew::prelude::*;

use super::{caution, panel::Panel};
use crate::act::Seen;
use crate::results::RigRef;
use crate::units::LengthUnit;
use files::Files;
use form::MakingForm;
pub use form::same_making;
use look::Views;
use sheets::Sheets;
use turning::Turning;

/// Properties of [`Workshop`].
#[derive(Properties, PartialEq)]
pub struct WorkshopProps {
    /// Place in the order of the job.
    pub number: usize,
    /// The job made ready; may be a frame old.
    pub rig: Option<RigRef>,
    /// The state: how the blade is made, the unit of the lengths written on paper, the flight point
    /// selected.
    pub state: Seen,
}

/// A blade ready for the bench, compared by identity.
#[derive(Clone, Debug)]
pub(super) struct Made(pub(super) Rc<Bench>);

impl PartialEq for Made {
    fn eq(&self, other: &Self) -> bool {
        Rc::ptr_eq(&self.0, &other.0)
    }
}

/// The panel; what it shows is worked out while it is open.
#[component]
pub fn Workshop(props: &WorkshopProps) -> Html {
    let open = use_state_eq(|| false);
    // What to take off carved blades is planned for the flight point selected; nothing else of the bench
    // depends on it.
    let point = props.state.job().carved.as_ref().map(|_| props.state.point);
    let made = use_memo((props.rig.clone(), *open, point), |(rig, open, point)| {
        let rig = rig.as_ref().filter(|_| *open)?;
        let bench = Bench::new(&rig.0).map(|bench| bench.planned_for(*point));
        Some(bench.map(|bench| Made(Rc::new(bench))))
    });
    let onunfold = {
        let open = open.setter();
        Callback::from(move |unfolded| open.set(unfolded))
    };
    html! {
        <Panel id="paper" number={props.number} title="Paper and files" open={false} {onunfold}
            result="templates, blank, bench heights, hub, job card, full size; the solid; STL, DXF, CSV">
            if *open { <MakingForm state={props.state.clone()} /> }
            { match &*made {
                None => Html::default(),
                Some(Err(why)) => refused(why),
                Some(Ok(made)) => html! { <Shown made={made.clone()} unit={props.state.units.length} /> },
            } }
        </Panel>
    }
}

/// What keeps the blade from being made.
fn refused(why: &BenchError) -> Html {
    html! {
        <div class="refused" role="alert">
            <p>{ "This blade cannot be made as it is drawn:" }</p>
            <ul>{ for why.0.iter().map(|fault| html! { <li>{ fault.to_string() }</li> }) }</ul>
        </div>
    }
}

/// The unit of lengths on paper.
pub(super) fn on_paper(unit: LengthUnit) -> Unit {
    match unit {
        LengthUnit::Millimetre => Unit::Millimetre,
        LengthUnit::Inch => Unit::Inch,
    }
}

/// Which paper.
pub(super) fn paper_pick(paper: &UseStateHandle<Paper>) -> Html {
    let pick = |of: Paper| {
        let paper = paper.clone();
        let pressed = (*paper == of).to_string();
        html! { <button type="button" aria-pressed={pressed} onclick={move |_| paper.set(of)}>{ of.name() }</button> }
    };
    html! {
        <div class="workshop-paper">
            <span class="label">{ "Paper" }</span>
            <span class="segments" role="group" aria-label="Size of the paper">
                { pick(Paper::A4) }{ pick(Paper::Letter) }
            </span>
        </div>
    }
}

#[derive(Properties, PartialEq)]
struct ShownProps {
    made: Made,
    unit: LengthUnit,
}

#[component]
fn Shown(props: &ShownProps) -> Html {
    let paper = use_state_eq(Paper::default);
    let unit = on_paper(props.unit);
    let laid =
        use_memo((props.made.clone(), *paper, unit), |(made, paper, unit)| made.0.sheets(*paper, *unit));
    html! {
        <div class="workshop">
            if let Some(warning) = props.made.0.warning() { <p class="warning">{ warning }</p> }
            <div class="workshop-views">
                <Turning made={props.made.clone()} />
                <Views made={props.made.clone()} {unit} />
            </div>
            { paper_pick(&paper) }
            <Sheets sheets={laid.clone()} paper={*paper} name="sheet"
                note="Print at 100 %, never fitted to the page, and measure the 100 mm bar on every sheet \
                      before you cut." />
            <Files made={props.made.clone()} sheets={laid} {unit} />
            { caution::paper(&props.made.0.job) }
        </div>
    }
}
