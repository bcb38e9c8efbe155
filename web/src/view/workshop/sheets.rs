//! Every sheet or page of paper, small, and the button that prints them all.

use std::rc::Rc;

use spokeshave::bench::{Paper, Sheet, svg};
use yew::prelude::*;

use super::print::Print;
use crate::act::use_act;
use crate::effect::file;
use crate::state::Action;

#[derive(Properties, PartialEq)]
pub(in crate::view) struct SheetsProps {
    pub(in crate::view) sheets: Rc<Vec<Sheet>>,
    pub(in crate::view) paper: Paper,
    /// What one of them is called.
    pub(in crate::view) name: &'static str,
    /// What to mind when printing.
    pub(in crate::view) note: &'static str,
}

#[component]
pub(in crate::view) fn Sheets(props: &SheetsProps) -> Html {
    let drawn = use_memo(props.sheets.clone(), |sheets| sheets.iter().map(svg).collect::<Vec<String>>());
    let printing = use_state_eq(|| false);
    let act = use_act();
    let print = {
        let printing = printing.setter();
        Callback::from(move |_: MouseEvent| printing.set(true))
    };
    let over = {
        let printing = printing.setter();
        Callback::from(move |()| printing.set(false))
    };
    let small = |(i, (sheet, drawn)): (usize, (&Sheet, &String))| {
        let (text, name) = (drawn.clone(), format!("{}-{:02}.svg", props.name, i + 1));
        let act = act.clone();
        let take = move |_: MouseEvent| {
            if !file::offer(&name, "image/svg+xml", &text) {
                act.send(Action::Say(super::files::not_taken(&name)));
            }
        };
        html! {
            <figure class="on-paper small">
                { Html::from_html_unchecked(drawn.clone().into()) }
                <figcaption>{ format!("{}. {}", i + 1, sheet.name) }
                    <button type="button" class="inline" onclick={take}
                        aria-label={format!("SVG of {} {}", props.name, i + 1)}>
                        { "SVG" }
                    </button>
                </figcaption>
            </figure>
        }
    };
    html! {
        <>
            <div class="buttons">
                <button type="button" class="act" onclick={print}>
                    { format!("Print {} {}s, {}", drawn.len(), props.name, props.paper.name()) }
                </button>
            </div>
            <p class="note">{ props.note }</p>
            <div class="sheet-previews">{ for props.sheets.iter().zip(drawn.iter()).enumerate().map(small) }</div>
            if *printing { <Print sheets={drawn} paper={props.paper} {over} /> }
        </>
    }
}
