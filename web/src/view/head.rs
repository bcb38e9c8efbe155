//! The head of the page: title, steps back and forth, units, files, colours.

use gloo_file::callbacks::FileReader;
use spokeshave::job::DEMOS;
use web_sys::HtmlInputElement;
use yew::prelude::*;

use super::drop::Drop;
use super::mark::{bend, halves, mark};
use super::units::UnitPicks;
use crate::act::{Act, Seen, use_act};
use crate::effect::file;
use crate::form::{Entry, Message, Shown};
use crate::saved_page;
use crate::state::{Action, Draft, Field, Notice, Theme};
use crate::units::LengthUnit;

/// Properties of [`Head`].
#[derive(Properties, PartialEq)]
pub struct HeadProps {
    /// The state.
    pub state: Seen,
    /// Whether this browser keeps the job.
    pub kept: bool,
}

/// The head of the page.
#[component]
pub fn Head(props: &HeadProps) -> Html {
    let state = &props.state;
    html! {
        <header class="head">
            <span class="brand">{ mark() }<span>{ "Spokeshave" }</span></span>
            <Title state={state.clone()} kept={props.kept} />
            <Steps undoes={owned(state.history.undoes())} redoes={owned(state.history.redoes())} />
            <div class="head-wide">
                <LengthSwitch state={state.clone()} />
                <Drop label="Units"><UnitPicks units={state.units} /></Drop>
                <Drop label="Jobs"><Jobs /></Drop>
                <Files state={state.clone()} />
                <ThemeButton theme={state.theme} />
            </div>
            <Drop label="Menu" class="head-narrow">
                <Files state={state.clone()} />
                <ThemeButton theme={state.theme} />
                <h2 class="drop-title">{ "Units" }</h2>
                <UnitPicks units={state.units} />
                <h2 class="drop-title">{ "Jobs" }</h2>
                <Jobs />
            </Drop>
        </header>
    }
}

fn owned(name: Option<&str>) -> Option<AttrValue> {
    name.map(|n| AttrValue::from(n.to_string()))
}

#[component]
fn Title(props: &HeadProps) -> Html {
    let shown = Shown::of(&props.state, &[], Field::Title);
    let saved = match (props.kept, props.state.is_filed()) {
        (true, true) => "saved as a file, kept in this browser",
        (true, false) => "kept in this browser, not saved as a file",
        (false, true) => "saved as a file; this browser keeps nothing",
        (false, false) => "not kept: this browser refuses storage. Save the job.",
    };
    html! {
        <div class="title">
            <h1 class="unseen">{ format!("{} – Spokeshave", props.state.job().title) }</h1>
            <Entry shown={shown.clone()} is_text=true class="title-entry" hint="Untitled" />
            <span class={classes!("saved", (!props.kept).then_some("saved-not"))} role="status">{ saved }</span>
            <Message {shown} />
        </div>
    }
}

#[derive(Properties, PartialEq)]
struct StepsProps {
    undoes: Option<AttrValue>,
    redoes: Option<AttrValue>,
}

#[component]
fn Steps(props: &StepsProps) -> Html {
    let act = use_act();
    let button = |name: &Option<AttrValue>, word: &str, forward: bool, action: Action| {
        let text = name.as_ref().map_or_else(|| format!("{word}: nothing"), |n| format!("{word}: {n}"));
        let onclick = act.on(move |_: MouseEvent| action.clone());
        html! {
            <button type="button" class="icon" title={text.clone()} aria-label={text}
                disabled={name.is_none()} {onclick}>
                { bend(forward) }
            </button>
        }
    };
    html! {
        <div class="steps-back">
            { button(&props.undoes, "Undo", false, Action::Undo) }
            { button(&props.redoes, "Redo", true, Action::Redo) }
        </div>
    }
}

#[derive(Properties, PartialEq)]
struct StateProps {
    state: Seen,
}

/// Millimetres or inches.
#[component]
fn LengthSwitch(props: &StateProps) -> Html {
    let act = use_act();
    let units = props.state.units;
    let choices = LengthUnit::ALL.iter().map(|&length| {
        let onclick = act.on(move |_: MouseEvent| Action::Units(crate::units::Units { length, ..units }));
        let on = units.length == length;
        html! {
            <button type="button" aria-pressed={if on { "true" } else { "false" }} {onclick}>
                { length.symbol() }
            </button>
        }
    });
    html! { <div class="segments" role="group" aria-label="Unit of lengths">{ for choices }</div> }
}

/// Jobs to start from.
#[component]
fn Jobs() -> Html {
    let act = use_act();
    let examples = DEMOS.iter().enumerate().map(|(i, demo)| {
        html! {
            <button type="button" class="row" onclick={act.on(move |_: MouseEvent| Action::Demo(i))}>
                { crate::form::capital(demo.about) }
            </button>
        }
    });
    html! {
        <div class="rows">
            <button type="button" class="row" onclick={act.on(|_: MouseEvent| Action::Blank)}>
                { "New: a plain two-blade propeller of one pitch" }
            </button>
            <p class="note">
                { "Examples. Aircraft, engines and figures in them are invented. The job on the page can be \
                   had back with Undo." }
            </p>
            { for examples }
        </div>
    }
}

/// Opening, saving, printing.
#[component]
fn Files(props: &StateProps) -> Html {
    let act = use_act();
    let reading = use_mut_ref(|| None::<FileReader>);
    let picker = use_node_ref();
    let onchange = {
        let (act, reading) = (act.clone(), reading);
        Callback::from(move |e: Event| {
            let Some(input) = e.target_dyn_into::<HtmlInputElement>() else { return };
            let act = act.clone();
            *reading.borrow_mut() = file::read_picked(&input, move |action| act.send(action));
        })
    };
    let open = {
        let picker = picker.clone();
        Callback::from(move |_: MouseEvent| {
            if let Some(input) = picker.cast::<HtmlInputElement>() {
                input.click();
            }
        })
    };
    html! {
        <>
            <input type="file" accept=".json,application/json" class="unseen" ref={picker} {onchange} tabindex="-1"
                aria-label="Job file to open" />
            <button type="button" class="plain-button" onclick={open}>{ "Open" }</button>
            <button type="button" class="plain-button" onclick={save(&act, &props.state)}>{ "Save" }</button>
            <button type="button" class="plain-button" onclick={save_page(&act, &props.state)}>
                { "Save page with job" }
            </button>
            <button type="button" class="plain-button" onclick={Callback::from(|_: MouseEvent| print())}>
                { "Print" }
            </button>
        </>
    }
}

fn save(act: &Act, state: &Seen) -> Callback<MouseEvent> {
    let (act, job, left) = (act.clone(), state.job().clone(), not_taken(state));
    Callback::from(move |_: MouseEvent| {
        let name = file::file_name(&job.title, "json");
        told(&act, &left, file::offer(&name, "application/json", &job.to_json()));
    })
}

fn save_page(act: &Act, state: &Seen) -> Callback<MouseEvent> {
    let (act, job, left) = (act.clone(), state.job().clone(), not_taken(state));
    Callback::from(move |_: MouseEvent| {
        let name = file::file_name(&job.title, "html");
        let page = saved_page::with_job(&job.to_json());
        told(&act, &left, page.is_some_and(|page| file::offer(&name, "text/html", &page)));
    })
}

/// What was typed and could not be taken over, a line each.
fn not_taken(state: &Seen) -> Vec<String> {
    let line = |(field, draft): (&Field, &Draft)| {
        let why = draft.message.as_ref()?;
        Some(format!("{}: “{}”. {why}", field.name(state.job()), draft.text))
    };
    state.drafts.iter().filter_map(line).collect()
}

fn told(act: &Act, left: &[String], taken: bool) {
    if taken {
        act.send(Action::Saved);
        if !left.is_empty() {
            let title =
                "Saved with the last figures that were right, without what is typed in these boxes:".into();
            act.send(Action::Say(Notice { title, lines: left.to_vec() }));
        }
    } else {
        let lines = vec!["The browser did not take the file. The job is still on this page.".to_string()];
        act.send(Action::Say(Notice { title: "Nothing was saved.".into(), lines }));
    }
}

fn print() {
    if let Some(window) = web_sys::window() {
        // A browser that cannot print has no dialogue to fail.
        let _ = window.print();
    }
}

#[derive(Properties, PartialEq)]
struct ThemeProps {
    theme: Theme,
}

#[component]
fn ThemeButton(props: &ThemeProps) -> Html {
    let act = use_act();
    let (next, now) = match props.theme {
        Theme::Auto => (Theme::Light, "as the device"),
        Theme::Light => (Theme::Dark, "light"),
        Theme::Dark => (Theme::Auto, "dark"),
    };
    let text = format!("Colours: {now}");
    html! {
        <button type="button" class="icon theme" title={text.clone()} aria-label={text.clone()}
            onclick={act.on(move |_: MouseEvent| Action::Theme(next))}>
            { halves() }<span class="theme-words">{ text }</span>
        </button>
    }
}
