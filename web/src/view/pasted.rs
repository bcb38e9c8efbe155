//! A sheet pasted or opened, and taken over at a press.

use yew::prelude::*;

use super::sections::boxes::{Opener, Sheet};

/// Properties of [`Pasted`].
#[derive(Properties, PartialEq)]
pub struct PastedProps {
    /// Id, used once on the page.
    pub id: AttrValue,
    /// The name of the box.
    pub label: AttrValue,
    /// What stands in the empty box.
    pub hint: AttrValue,
    /// Longest text read from a file.
    pub most_bytes: usize,
    /// Takes the text; what is said of it, or why it was refused.
    pub take: Callback<AttrValue, Result<String, String>>,
}

/// What was typed and what came of it.
#[derive(Clone, Debug, Default, PartialEq)]
struct Draft {
    text: AttrValue,
    message: Option<AttrValue>,
    said: Option<AttrValue>,
}

/// The box and its buttons.
#[component]
pub fn Pasted(props: &PastedProps) -> Html {
    let draft = use_state_eq(Draft::default);
    let on = {
        let draft = draft.clone();
        Callback::from(move |text: String| draft.set(Draft { text: text.into(), ..Draft::default() }))
    };
    let open = {
        let draft = draft.clone();
        Callback::from(move |(name, text): (String, Result<String, String>)| {
            draft.set(match text {
                Ok(text) => Draft { text: text.into(), ..Draft::default() },
                Err(why) => Draft { message: Some(format!("{name}: {why}").into()), ..(*draft).clone() },
            });
        })
    };
    let take = {
        let (draft, take) = (draft.clone(), props.take.clone());
        Callback::from(move |_: MouseEvent| {
            let next = match take.emit(draft.text.clone()) {
                Ok(said) => Draft { said: Some(said.into()), ..Draft::default() },
                Err(why) => Draft { message: Some(why.into()), said: None, ..(*draft).clone() },
            };
            draft.set(next);
        })
    };
    html! {
        <>
            <Sheet id={props.id.clone()} label={props.label.clone()} text={draft.text.clone()}
                hint={props.hint.clone()}
                message={draft.message.clone()} {on} />
            <p class="buttons">
                <Opener label={format!("Open a file of {}", props.label.to_lowercase())}
                    accept=".csv,.txt,.tsv,text/csv,text/plain" most_bytes={props.most_bytes} on={open} />
                <button type="button" class="act" onclick={take}>
                    { format!("Take over the {}", props.label.to_lowercase()) }
                </button>
            </p>
            <p class="said" role="status">{ draft.said.clone() }</p>
        </>
    }
}
