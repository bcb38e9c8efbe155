//! Boxes to type in and lists to pick from.

use spokeshave::drawn::DrawnStation;
use web_sys::{HtmlInputElement, HtmlSelectElement};
use yew::prelude::*;

use crate::act::use_act;
use crate::state::{Action, Field, State, shown_text};

/// What a box shows.
#[derive(Clone, Debug, PartialEq)]
pub struct Shown {
    /// Which figure it is.
    pub field: Field,
    /// Its name for a reader of the screen.
    pub name: AttrValue,
    /// The text in it.
    pub text: AttrValue,
    /// Why it was refused.
    pub message: Option<AttrValue>,
    /// The unit behind it.
    pub unit: &'static str,
}

impl Shown {
    /// What the box of a field shows.
    #[must_use]
    pub fn of(state: &State, drawn: &[DrawnStation], field: Field) -> Self {
        let job = state.job();
        let draft = state.drafts.get(&field);
        let quantity = field.quantity(job);
        let unit = state.units.symbol(quantity);
        let mut name = field.name(job);
        if !unit.is_empty() {
            name = format!("{name}, {}", if unit == "°" { "degrees" } else { unit });
        }
        let text = draft.map_or_else(|| shown_text(job, drawn, state.units, field), |d| d.text.clone());
        Self {
            field,
            name: capital(&name).into(),
            text: text.into(),
            message: draft.and_then(|d| d.message.clone()).map(AttrValue::from),
            unit,
        }
    }

    /// Id of the message, for the box to be described by.
    #[must_use]
    pub fn message_id(&self) -> String {
        let id: String = format!("{:?}", self.field).chars().filter(char::is_ascii_alphanumeric).collect();
        format!("message-{id}")
    }
}

/// With a capital first letter.
#[must_use]
pub fn capital(text: &str) -> String {
    let mut chars = text.chars();
    chars.next().map_or_else(String::new, |c| c.to_uppercase().chain(chars).collect())
}

/// Properties of [`Entry`].
#[derive(Properties, PartialEq)]
pub struct EntryProps {
    /// What it shows.
    pub shown: Shown,
    /// Style classes.
    #[prop_or_default]
    pub class: Classes,
    /// Whether it is a text rather than a figure.
    #[prop_or_default]
    pub is_text: bool,
    /// What stands in the empty box.
    #[prop_or_default]
    pub hint: AttrValue,
    /// What the Enter key of a keyboard on the screen says.
    #[prop_or("done")]
    pub enter: &'static str,
}

/// A bare box: its name is spoken, its message stands where the caller puts it.
#[component]
pub fn Entry(props: &EntryProps) -> Html {
    let act = use_act();
    let shown = &props.shown;
    let field = shown.field;
    let wrong = shown.message.is_some();
    let oninput = act.on(move |e: InputEvent| Action::Type(field, text_of(&e)));
    let onchange = act.on(move |_: Event| Action::Commit(field));
    // Not every browser tells of a change when the text is again what it was before an undo.
    let onblur = act.on(move |_: FocusEvent| Action::Commit(field));
    let onkeydown = Callback::from(move |e: KeyboardEvent| match e.key().as_str() {
        "Escape" => act.send(Action::GiveUp(field)),
        "Enter" => act.send(Action::Commit(field)),
        _ => {}
    });
    let mode = if props.is_text { "text" } else { "decimal" };
    html! {
        <input type="text" inputmode={mode} enterkeyhint={props.enter}
            class={classes!("entry", wrong.then_some("wrong"), props.class.clone())}
            value={shown.text.clone()} placeholder={props.hint.clone()} aria-label={shown.name.clone()}
            autocomplete="off" spellcheck="false"
            aria-invalid={wrong.then_some("true")} aria-describedby={wrong.then(|| shown.message_id())}
            {oninput} {onchange} {onblur} {onkeydown} />
    }
}

fn text_of(event: &InputEvent) -> String {
    event.target_dyn_into::<HtmlInputElement>().map_or_else(String::new, |input| input.value())
}

/// Properties of [`Message`].
#[derive(Properties, PartialEq)]
pub struct MessageProps {
    /// The box it belongs to.
    pub shown: Shown,
    /// Whether the box is named in front.
    #[prop_or_default]
    pub named: bool,
}

/// Why an entry was refused and what is allowed.
#[component]
pub fn Message(props: &MessageProps) -> Html {
    let Some(message) = &props.shown.message else { return html! {} };
    html! {
        <p class="message" id={props.shown.message_id()} role="alert">
            if props.named { <b>{ format!("{}: ", props.shown.name) }</b> }
            { message }
        </p>
    }
}

/// Properties of [`Labelled`].
#[derive(Properties, PartialEq)]
pub struct LabelledProps {
    /// What it shows.
    pub shown: Shown,
    /// The label in front.
    pub label: AttrValue,
    /// Whether it is a text rather than a figure.
    #[prop_or_default]
    pub is_text: bool,
    /// What stands in the empty box.
    #[prop_or_default]
    pub hint: AttrValue,
}

/// A box with its label, unit and message.
#[component]
pub fn Labelled(props: &LabelledProps) -> Html {
    html! {
        <div class="labelled">
            <span class="label">{ &props.label }</span>
            <Entry shown={props.shown.clone()} is_text={props.is_text} hint={props.hint.clone()} />
            <span class="unit">{ props.shown.unit }</span>
            <Message shown={props.shown.clone()} />
        </div>
    }
}

/// Properties of [`Pick`].
#[derive(Properties, PartialEq)]
pub struct PickProps {
    /// Its name for a reader of the screen, and the label in front unless bare.
    pub label: AttrValue,
    /// What can be picked.
    pub options: Vec<AttrValue>,
    /// Which is picked; none when what stands is not in the list.
    pub picked: Option<usize>,
    /// Says which was picked.
    pub onpick: Callback<usize>,
    /// Which cannot be picked now.
    #[prop_or_default]
    pub off: Vec<bool>,
    /// Without a visible label.
    #[prop_or_default]
    pub bare: bool,
}

/// A list to pick from.
#[component]
pub fn Pick(props: &PickProps) -> Html {
    let (onpick, picked) = (props.onpick.clone(), props.picked);
    let list = use_node_ref();
    {
        let list = list.clone();
        use_effect_with((picked, props.options.clone()), move |(picked, _)| stand_on(&list, *picked));
    }
    let onchange = Callback::from(move |e: Event| {
        let Some(select) = e.target_dyn_into::<HtmlSelectElement>() else { return };
        onpick.emit(usize::try_from(select.selected_index()).unwrap_or(0));
        // A choice that is refused does not stand; one that is taken is set when it is drawn.
        select.set_selected_index(index(picked));
    });
    let options = props.options.iter().enumerate().map(|(i, text)| {
        let off = props.off.get(i).copied().unwrap_or(false);
        html! { <option key={i} selected={props.picked == Some(i)} disabled={off}>{ text }</option> }
    });
    let list =
        html! { <select ref={list} aria-label={props.label.clone()} {onchange}>{ for options }</select> };
    if props.bare {
        return list;
    }
    html! { <div class="labelled"><span class="label">{ &props.label }</span>{ list }</div> }
}

/// Once a person has picked, only this moves a list: its options' attributes no longer do.
fn stand_on(list: &NodeRef, picked: Option<usize>) {
    if let Some(select) = list.cast::<HtmlSelectElement>() {
        select.set_selected_index(index(picked));
    }
}

fn index(picked: Option<usize>) -> i32 {
    picked.and_then(|i| i32::try_from(i).ok()).unwrap_or(-1)
}

/// Properties of [`Switch`].
#[derive(Properties, PartialEq)]
pub struct SwitchProps {
    /// What it switches.
    pub label: AttrValue,
    /// Whether it is on.
    pub on: bool,
    /// Says what it was switched to.
    pub onswitch: Callback<bool>,
}

/// A box to tick.
#[component]
pub fn Switch(props: &SwitchProps) -> Html {
    let onchange = props
        .onswitch
        .reform(|e: Event| e.target_dyn_into::<HtmlInputElement>().is_some_and(|input| input.checked()));
    html! {
        <label class="switch">
            <input type="checkbox" checked={props.on} {onchange} />
            { &props.label }
        </label>
    }
}
