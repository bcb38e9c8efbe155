//! Every sheet of paper, small, and the button that prints them all.

use std::rc::Rc;

use spokeshave::bench::{Paper, Sheet, svg};
use yew::prelude::*;

use super::print::Print;
use crate::effect::file;
use crate::state::Action;
use crate::view::use_act;

#[derive(Properties, PartialEq)]
pub(super) struct SheetsProps {
    pub(super) sheets: Rc<Vec<Sheet>>,
    pub(super) paper: Paper,
}

#[component]
pub(super) fn Sheets(props: &SheetsProps) -> Html {
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
        let (text, name) = (drawn.clone(), format!("sheet-{:02}.svg", i + 1));
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
                    <button type="button" class="inline" onclick={take} aria-label={format!("SVG of sheet {}", i + 1)}>{ "SVG" }</button>
                </figcaption>
            </figure>
        }
    };
    html! {
        <>
            <div class="buttons">
                <button type="button" class="act" onclick={print}>{ format!("Print {} sheets, {}", drawn.len(), props.paper.name()) }</button>
            </div>
            <p class="note">{ "Print at 100 %, never fitted to the page, and measure the 100 mm bar on every sheet before you cut." }</p>
            <div class="sheet-previews">{ for props.sheets.iter().zip(drawn.iter()).enumerate().map(small) }</div>
            if *printing { <Print sheets={drawn} paper={props.paper} {over} /> }
        </>
    }
}
