//! The application: the state, its results, and the effects that follow from them.

use std::cell::RefCell;
use std::rc::Rc;

use gloo_events::EventListener;
use spokeshave::drawn::stations;
use spokeshave::rig::Rig;
use wasm_bindgen::JsCast;
use yew::prelude::*;

use crate::act::{Act, Seen};
use crate::effect::remembered::Remembered;
use crate::effect::{file, keys, theme};
use crate::keep;
use crate::later::{Plan, Work};
use crate::results::{Compared, Later, Now, Results, RigRef, Same};
use crate::state::{Action, Notice, State, Variants};
use crate::view::page::Page;

/// The reducer's state as the UI library wants it.
#[derive(Clone, Debug)]
struct Store(State);

impl Reducible for Store {
    type Action = Action;
    fn reduce(self: Rc<Self>, action: Action) -> Rc<Self> {
        Rc::new(Self(self.0.after(action)))
    }
}

fn started() -> Store {
    let kept = keep::at_start();
    let mut state = State::started(kept.as_deref(), keep::in_file().as_deref());
    state.variants = keep::beside().map_or_else(Variants::default, |text| Variants::from_text(&text));
    if kept.is_some() && state.notice.is_some() {
        keep::set_aside();
    }
    if keep::torn() && state.notice.is_none() {
        state.notice = Some(Notice {
            title: "What this browser kept last of the job was cut off.".into(),
            lines: vec![
                "This is what was kept before it, or an example where there was nothing. Files are as you \
                 saved them."
                    .into(),
            ],
        });
    }
    Store(Remembered::read().applied(state))
}

/// Works out the blade compared at a flight point; none where the job does not allow it.
#[hook]
fn use_beside(state: &State) -> Option<Rc<Compared>> {
    let compared = state.variants.compared().cloned();
    let rig = use_memo((Same(state.job().clone()), compared.clone()), |(job, variant)| {
        let rig = Rig::new(&variant.as_ref()?.of(&job.0)).ok();
        rig.map(|rig| RigRef(Rc::new(rig)))
    });
    let point = state.point;
    let beside = use_memo(((*rig).clone(), compared, point), |(rig, variant, point)| {
        let rig = rig.clone()?;
        let drawn = Rc::new(stations(&rig.0.rotor.blade, rig.0.job.propeller.angle_reference));
        let (name, result) = (variant.as_ref()?.name.clone(), rig.0.point(*point));
        Some(Rc::new(Compared { name, drawn, point: result, rig }))
    });
    (*beside).clone()
}

#[hook]
fn use_now(results: &Rc<RefCell<Results>>, state: &State) -> Rc<Now> {
    let results = results.clone();
    let beside = use_beside(state);
    let kept = use_memo(Same(state.job().clone()), |job| keep::before_work(&job.0.to_json()));
    let key = (Same(state.job().clone()), state.point, state.station, beside);
    use_memo(key, move |(job, point, station, beside)| {
        let mut results = results.borrow_mut();
        let results = results.of(&job.0);
        let section = results.section(*point, *station);
        Now {
            job: job.clone(),
            rig: results.rig().map(RigRef),
            drawn: results.drawn(),
            point: results.point(*point),
            lift_to_drag: Rc::new(section.iter().map(|s| [s.alpha_deg, s.lift_to_drag]).collect()),
            kept: *kept,
            beside: beside.clone(),
        }
    })
}

#[hook]
fn use_later(results: &Rc<RefCell<Results>>, now: &Rc<Now>, state: &State) -> Rc<Later> {
    let later = use_state_eq(Rc::<Later>::default);
    let work = use_mut_ref(|| None::<Work>);
    let (results, setter, before) = (results.clone(), later.setter(), (*later).clone());
    let key = (now.job.clone(), state.point, state.drag.is_some(), state.along, state.opened);
    use_effect_with(key, move |(job, point, dragging, along, opened)| {
        let count = job.0.flight_points.len();
        let plan = Plan { count, point: *point, dragging: *dragging, along: *along, opened: *opened };
        // Putting off the new work calls off the old.
        *work.borrow_mut() = Some(Work::begin(plan, results, before, setter));
    });
    (*later).clone()
}

/// The application.
#[component]
pub fn App() -> Html {
    let store = use_reducer(started);
    let results = use_mut_ref(Results::default);
    let now = use_now(&results, &store.0);
    let later = use_later(&results, &now, &store.0);
    let act = {
        let dispatcher = store.dispatcher();
        use_callback((), move |action: Action, ()| dispatcher.dispatch(action))
    };
    use_drops(&act);
    use_keys(&act, !store.0.drafts.is_empty());
    use_effect_with(Remembered::of(&store.0), |remembered| remembered.write());
    {
        let act = act.clone();
        use_effect_with(store.0.variants.clone(), move |variants| {
            if !keep::keep_beside(&variants.to_text()) {
                act.emit(Action::Say(beside_not_kept()));
            }
        });
    }
    use_effect_with(store.0.theme, |picked| theme::show(*picked));
    use_effect_with(store.0.job().title.clone(), |title| theme::title(title));
    html! {
        <ContextProvider<Act> context={Act(act)}>
            <Page state={Seen::new(Rc::new(store.0.clone()))} {now} {later} />
        </ContextProvider<Act>>
    }
}

fn beside_not_kept() -> Notice {
    let last =
        "They last as long as this page is open. Use one as the drawn blade and save the job to keep it.";
    Notice {
        title: "This browser’s storage does not take the blades beside the drawn one.".into(),
        lines: vec![last.into()],
    }
}

/// A job file dropped anywhere on the page is opened.
#[hook]
fn use_drops(act: &Callback<Action>) {
    let act = act.clone();
    use_effect_with((), move |()| {
        let reading = RefCell::new(None);
        let options = gloo_events::EventListenerOptions::enable_prevent_default();
        let listeners = web_sys::window().map(|window| {
            // Without this the browser would show the file in place of the page.
            let over = EventListener::new_with_options(
                &window,
                "dragover",
                options,
                web_sys::Event::prevent_default,
            );
            let dropped = EventListener::new_with_options(&window, "drop", options, move |event| {
                event.prevent_default();
                let act = act.clone();
                let read = |e| file::read_dropped(e, move |action| act.emit(action));
                *reading.borrow_mut() = event.dyn_ref().and_then(read);
            });
            (over, dropped)
        });
        move || drop(listeners)
    });
}

#[hook]
fn use_keys(act: &Callback<Action>, drafting: bool) {
    let act = act.clone();
    use_effect_with(drafting, move |&drafting| {
        let listener = web_sys::window().map(|window| {
            EventListener::new_with_options(
                &window,
                "keydown",
                gloo_events::EventListenerOptions::enable_prevent_default(),
                move |event| {
                    let meaning = event.dyn_ref().and_then(|key| keys::meaning(key, drafting));
                    if let Some(action) = meaning {
                        event.prevent_default();
                        act.emit(action);
                    }
                },
            )
        });
        move || drop(listener)
    });
}
