//! Making a polar: an outline, conditions, the run in a worker, and what comes of it.

use spokeshave::job::Job;
use spokeshave::section::library;
use spokeshave::section::make::Comparison;
use spokeshave::section::outline::{MAX_BYTES, Outline};
use web_sys::js_sys::Date;
use yew::prelude::*;

use super::boxes::{Line, Opener, Sheet};
use super::carved::Carved;
use super::drawing::Drawing;
use super::form::{Form, Place};
use super::progress::Progress;
use crate::act::{Seen, use_act};
use crate::background::hand::{Hand, Heard};
use crate::background::polars::{Report, Step};
use crate::form::{Pick, Switch};
use crate::number::fixed;
use crate::view::blade::section_names;

/// Properties of [`Maker`].
#[derive(Properties, PartialEq)]
pub(super) struct MakerProps {
    pub(super) state: Seen,
    /// Reynolds numbers of the stations at all flight points.
    pub(super) reynolds: Vec<f64>,
    /// Thickness ratios of the stations.
    pub(super) thickness: Vec<f64>,
    /// Told the name of a section that joins the job.
    pub(super) onjoin: Callback<String>,
}

/// What the run is doing or has come to.
#[derive(Clone, Debug, Default, PartialEq)]
enum Run {
    #[default]
    Idle,
    At(Option<Step>),
    Done(String, Vec<Comparison>),
    CalledOff,
    /// It gave no section: why.
    Stopped(String),
}

const HINT: &str = "My section\n1.000 0.0012\n0.950 0.0149\n…\n0.000 0.0350\n…\n1.000 0.0000";

/// The form, the drawing, the run.
#[component]
pub(super) fn Maker(props: &MakerProps) -> Html {
    let form = use_state_eq(Form::default);
    let wrong = use_state_eq(|| None::<(Option<Place>, String)>);
    let run = use_state_eq(Run::default);
    let hand = use_mut_ref(|| None::<Hand>);
    let shown = form.proposing(&props.reynolds, &props.thickness);
    let outline = use_memo(shown.outline.clone(), |text| Outline::read(text));
    let busy = matches!(*run, Run::At(_));

    let change = {
        let (form, wrong) = (form.clone(), wrong.clone());
        Callback::from(move |next: Form| {
            wrong.set(None);
            form.set(next);
        })
    };
    let start = use_start(&shown, props, &wrong, &run, &hand);
    let cancel = {
        let (run, hand) = (run.clone(), hand.clone());
        Callback::from(move |()| {
            *hand.borrow_mut() = None;
            run.set(Run::CalledOff);
        })
    };
    html! {
        <div class="maker unprinted">
            <h3>{ "Make a polar" }</h3>
            <div class="maker-grid">
                <Source form={shown.clone()} job={props.state.job().as_ref().clone()} on={change.clone()}
                    message={source_message(&shown, &outline, wrong.as_ref())} />
                <div>
                    if let Ok(outline) = &*outline {
                        <Drawing outline={outline.clone()} blunt={blunt(&shown, outline)} />
                    }
                    <Boxes form={shown.clone()} wrong={(*wrong).clone()} on={change} />
                </div>
            </div>
            if !busy {
                <p class="buttons"><button type="button" class="act" onclick={start}>{ "Make the polar" }</button></p>
            }
            { outcome(&run, &cancel) }
        </div>
    }
}

/// Starts the run: what is wrong is said at its box, else a worker gets the order.
#[hook]
fn use_start(
    form: &Form,
    props: &MakerProps,
    wrong: &UseStateHandle<Option<(Option<Place>, String)>>,
    run: &UseStateHandle<Run>,
    hand: &std::rc::Rc<std::cell::RefCell<Option<Hand>>>,
) -> Callback<MouseEvent> {
    let act = use_act();
    // The job as it is when the run ends.
    let job = use_mut_ref(|| props.state.job().clone());
    job.replace(props.state.job().clone());
    let onjoin = props.onjoin.clone();
    let (form, wrong, run, hand) = (form.clone(), wrong.clone(), run.setter(), hand.clone());
    Callback::from(move |_: MouseEvent| {
        let order = match form.order() {
            Ok(order) => order,
            Err(found) => return wrong.set(Some(found)),
        };
        wrong.set(None);
        run.set(Run::At(None));
        let begun = Date::now();
        let (act, told, job, onjoin) = (act.clone(), run.clone(), job.clone(), onjoin.clone());
        let heard = move |heard: Heard<Report>| {
            told.set(match heard {
                Heard::Report(Report::Step(step)) => Run::At(Some(step)),
                Heard::Report(Report::Refused(why)) => Run::Stopped(crate::form::capital(&why)),
                Heard::Fault(why) => Run::Stopped(format!(
                    "The computation met a fault of its own and stopped; the job is as it was. It said: {why}"
                )),
                Heard::Report(Report::Done(section, comparison)) => {
                    let seconds = fixed((Date::now() - begun) / 1000.0, 1);
                    let (name, origin) = (section.name.clone(), section.origin.clone());
                    // Let go of before the job changes.
                    let job = job.borrow().clone();
                    match super::join(&act, &job, *section) {
                        Ok(how) => {
                            let said = format!("“{name}” joined the job after {seconds} s.{how} {origin}");
                            onjoin.emit(name);
                            Run::Done(said, comparison)
                        }
                        Err(why) => Run::Stopped(format!("“{name}” did not join the job. {why}")),
                    }
                }
            });
        };
        let given = Hand::give("make_polars", &order, heard);
        if given.is_none() {
            run.set(Run::Stopped("This browser refuses to start a worker for it.".into()));
        }
        *hand.borrow_mut() = given;
    })
}

fn outcome(run: &Run, cancel: &Callback<()>) -> Html {
    match run {
        Run::Idle => html! {},
        Run::At(step) => html! { <Progress step={*step} on_cancel={cancel.clone()} /> },
        Run::CalledOff => html! { <p class="said" role="status">{ "Called off. The job is as it was." }</p> },
        Run::Stopped(why) => html! { <p class="message" role="alert">{ why }</p> },
        Run::Done(said, comparison) => html! {
            <>
                <p class="said" role="status">{ said }</p>
                if !comparison.is_empty() { <Carved comparison={comparison.clone()} /> }
            </>
        },
    }
}

/// The outline with the trailing edge that is asked for, where it can be drawn.
fn blunt(form: &Form, outline: &Outline) -> Option<Outline> {
    outline.with_edge_thickness(form.order().ok()?.request.edge_thickness?).ok()
}

/// What is wrong with the outline; nothing while there is none, unless the run was asked for.
fn source_message(
    form: &Form,
    outline: &Result<Outline, spokeshave::section::outline::OutlineError>,
    wrong: Option<&(Option<Place>, String)>,
) -> Option<AttrValue> {
    if let Some((None, why)) = wrong {
        return Some(crate::form::capital(why).into());
    }
    let why = outline.as_ref().err().filter(|_| !form.outline.trim().is_empty())?;
    Some(crate::form::capital(&why.to_string()).into())
}

#[derive(Properties, PartialEq)]
struct SourceProps {
    form: Form,
    job: Job,
    message: Option<AttrValue>,
    on: Callback<Form>,
}

/// Where the outline comes from: pasted, opened, or taken from a section that has one.
#[component]
fn Source(props: &SourceProps) -> Html {
    let refused = use_state_eq(|| None::<AttrValue>);
    let with = {
        let (form, on, refused) = (props.form.clone(), props.on.clone(), refused.clone());
        move |outline: String| {
            refused.set(None);
            on.emit(Form { outline, ..form.clone() });
        }
    };
    let names: Vec<String> =
        section_names(&props.job).into_iter().filter(|n| has_outline(&props.job, n)).collect();
    let mut options: Vec<AttrValue> = vec!["take one as a start".into()];
    options.extend(names.iter().map(|n| AttrValue::from(n.clone())));
    let onpick = {
        let (with, job) = (with.clone(), props.job.clone());
        Callback::from(move |i: usize| {
            if let Some(text) = i.checked_sub(1).and_then(|i| names.get(i)).and_then(|n| listed(&job, n)) {
                with(text);
            }
        })
    };
    let on_open = {
        let with = with.clone();
        Callback::from(move |(name, text): (String, Result<String, String>)| match text {
            Ok(text) => with(text),
            Err(why) => refused.set(Some(format!("{name}: {why}").into())),
        })
    };
    html! {
        <div>
            <Sheet id="make-outline"
                label="Outline: x y on each line, round the section from the trailing edge" hint={HINT}
                text={props.form.outline.clone()} message={props.message.clone()} on={Callback::from(with)} />
            <div class="buttons">
                <Opener label="Open an outline" accept=".dat,.txt,.csv,text/plain" most_bytes={MAX_BYTES}
                    on={on_open} />
                <Pick label="Outline of a section" {options} picked={Some(0)} {onpick} bare=true />
            </div>
        </div>
    }
}

fn has_outline(job: &Job, name: &str) -> bool {
    let own = job.sections.iter().find(|own| own.name == name);
    own.map_or_else(|| library().has_outline(name), |own| !own.outline.is_empty())
}

/// The outline of a section as a list; none where it has none.
fn listed(job: &Job, name: &str) -> Option<String> {
    let own = job.sections.iter().find(|own| own.name == name);
    let outline = match own {
        Some(own) => own.drawn().ok()??,
        None => library().outline(name, 0.12)?,
    };
    let points = outline.points().iter().map(|[x, y]| format!("{x:.6} {y:.6}"));
    Some(std::iter::once(format!("{name}, as drawn")).chain(points).collect::<Vec<_>>().join("\n"))
}

#[derive(Properties, PartialEq)]
struct BoxesProps {
    form: Form,
    wrong: Option<(Option<Place>, String)>,
    on: Callback<Form>,
}

/// Conditions and departures from the drawing.
#[component]
fn Boxes(props: &BoxesProps) -> Html {
    let form = &props.form;
    let line = |place: Place, long: bool, disabled: bool| {
        let (id, label, unit) = place.words();
        let (form, on) = (props.form.clone(), props.on.clone());
        let message =
            props.wrong.as_ref().filter(|w| w.0 == Some(place)).map(|w| AttrValue::from(w.1.clone()));
        html! {
            <Line {id} {label} {unit} {long} {disabled} {message} text={form.text(place).to_string()}
                on={Callback::from(move |text| on.emit(form.with(place, text)))} />
        }
    };
    let onswitch = {
        let (form, on) = (props.form.clone(), props.on.clone());
        Callback::from(move |rough: bool| on.emit(Form { rough, ..form.clone() }))
    };
    html! {
        <>
            <div class="settings">
                { line(Place::Name, true, false) }
                { line(Place::Reynolds, true, false) }
                { line(Place::Thickness, true, false) }
                { line(Place::Amplification, false, false) }
                { line(Place::First, false, false) }
                { line(Place::Last, false, false) }
                { line(Place::Step, false, false) }
            </div>
            <p class="label">{ "As carved" }</p>
            <div class="settings">
                { line(Place::Edge, false, false) }
                <Switch label="Rough or taped leading edge" on={form.rough} {onswitch} />
                { line(Place::TripUpper, false, !form.rough) }
                { line(Place::TripLower, false, !form.rough) }
            </div>
        </>
    }
}
