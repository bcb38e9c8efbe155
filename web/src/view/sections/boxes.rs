//! A box with its label, unit and message, for figures that are not part of the job.

use web_sys::{HtmlInputElement, HtmlTextAreaElement};
use yew::prelude::*;

/// Properties of [`Line`].
#[derive(Properties, PartialEq)]
pub(in crate::view) struct LineProps {
    /// Id, for the message to be found by; used once on the page.
    pub(in crate::view) id: AttrValue,
    pub(in crate::view) label: AttrValue,
    #[prop_or_default]
    pub(in crate::view) unit: AttrValue,
    pub(in crate::view) text: AttrValue,
    #[prop_or_default]
    pub(in crate::view) message: Option<AttrValue>,
    /// Whether it holds words or a list rather than a figure.
    #[prop_or_default]
    pub(in crate::view) long: bool,
    #[prop_or_default]
    pub(in crate::view) disabled: bool,
    pub(in crate::view) on: Callback<String>,
}

/// A box in a line with its label.
#[component]
pub(in crate::view) fn Line(props: &LineProps) -> Html {
    let wrong = props.message.is_some();
    let id = format!("{}-message", props.id);
    let oninput = props.on.reform(|e: InputEvent| {
        e.target_dyn_into::<HtmlInputElement>().map_or_else(String::new, |input| input.value())
    });
    let class = classes!("entry", wrong.then_some("wrong"), props.long.then_some("long"));
    html! {
        <div class={classes!("labelled", props.long.then_some("long"))}>
            <label class="label" for={props.id.clone()}>{ &props.label }</label>
            <input type="text" id={props.id.clone()} {class} value={props.text.clone()} autocomplete="off"
                spellcheck="false"
                disabled={props.disabled} aria-invalid={wrong.then_some("true")}
                aria-describedby={wrong.then(|| id.clone())} {oninput} />
            <span class="unit">{ &props.unit }</span>
            if let Some(message) = &props.message { <p class="message" {id} role="alert">{ message }</p> }
        </div>
    }
}

/// Properties of [`Sheet`].
#[derive(Properties, PartialEq)]
pub(in crate::view) struct SheetProps {
    pub(in crate::view) id: AttrValue,
    pub(in crate::view) label: AttrValue,
    pub(in crate::view) text: AttrValue,
    pub(in crate::view) hint: AttrValue,
    #[prop_or_default]
    pub(in crate::view) message: Option<AttrValue>,
    pub(in crate::view) on: Callback<String>,
}

/// A box for a text of many lines.
#[component]
pub(in crate::view) fn Sheet(props: &SheetProps) -> Html {
    let wrong = props.message.is_some();
    let id = format!("{}-message", props.id);
    let oninput = props.on.reform(|e: InputEvent| {
        e.target_dyn_into::<HtmlTextAreaElement>().map_or_else(String::new, |input| input.value())
    });
    html! {
        <div class="pasted">
            <label class="label" for={props.id.clone()}>{ &props.label }</label>
            <textarea id={props.id.clone()} rows="7" class={wrong.then_some("wrong")} value={props.text.clone()}
                placeholder={props.hint.clone()} spellcheck="false" autocomplete="off" wrap="off"
                aria-invalid={wrong.then_some("true")} aria-describedby={wrong.then(|| id.clone())} {oninput} />
            if let Some(message) = &props.message { <p class="message" {id} role="alert">{ message }</p> }
        </div>
    }
}

/// Properties of [`Opener`].
#[derive(Properties, PartialEq)]
pub(in crate::view) struct OpenerProps {
    /// What stands on the button.
    pub(in crate::view) label: AttrValue,
    /// Endings of files, as the browser's picker takes them.
    pub(in crate::view) accept: AttrValue,
    pub(in crate::view) most_bytes: usize,
    /// Name and text, or why it could not be read.
    pub(in crate::view) on: Callback<(String, Result<String, String>)>,
}

/// A button that opens a text file.
#[component]
pub(in crate::view) fn Opener(props: &OpenerProps) -> Html {
    let picker = use_node_ref();
    let reading = use_mut_ref(|| None);
    let onchange = {
        let (on, most_bytes) = (props.on.clone(), props.most_bytes);
        Callback::from(move |e: Event| {
            if let Some(input) = e.target_dyn_into::<HtmlInputElement>() {
                let on = on.clone();
                *reading.borrow_mut() =
                    crate::effect::text_file::read_text(&input, most_bytes, move |name, text| {
                        on.emit((name, text));
                    });
            }
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
            <input type="file" accept={props.accept.clone()} class="unseen" ref={picker} {onchange} tabindex="-1"
                aria-label={format!("{}, file", props.label)} />
            <button type="button" class="act" onclick={open}>{ &props.label }</button>
        </>
    }
}
