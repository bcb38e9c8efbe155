//! Files to take away.

use std::rc::Rc;

use spokeshave::bench::{Sheet, Unit, files, pdf};
use yew::prelude::*;

use super::Made;
use crate::act::use_act;
use crate::effect::file;
use crate::state::{Action, Notice};

#[derive(Properties, PartialEq)]
pub(super) struct FilesProps {
    pub(super) made: Made,
    pub(super) sheets: Rc<Vec<Sheet>>,
    pub(super) unit: Unit,
}

/// What each file is called on its button.
const FILES: [(&str, &str); 6] = [
    ("Sheets, PDF", "sheets.pdf"),
    ("Solid, STL", ".stl"),
    ("Surface, CSV", "surface.csv"),
    ("Templates, DXF", "templates.dxf"),
    ("Blank from ahead, DXF", "blank-plan.dxf"),
    ("Blank from the side, DXF", "blank-side.dxf"),
];
const HUB: (&str, &str) = ("Hub, DXF", "hub.dxf");

#[component]
pub(super) fn Files(props: &FilesProps) -> Html {
    let act = use_act();
    let hub = props.made.0.blank.boss.is_some().then_some(HUB);
    let button = |(label, ending): (&'static str, &'static str)| {
        let (made, sheets, unit, act) = (props.made.clone(), props.sheets.clone(), props.unit, act.clone());
        let take = move |_: MouseEvent| {
            // Made when asked for: a solid has megabytes.
            let made = made_file(&made, &sheets, unit, ending);
            let taken = made
                .is_some_and(|(name, bytes)| file::offer_bytes(&name, "application/octet-stream", &bytes));
            if !taken {
                act.send(Action::Say(not_taken(label)));
            }
        };
        html! { <button type="button" class="row" onclick={take}>{ label }</button> }
    };
    html! {
        <div class="files-out" role="group" aria-label="Files">{ for FILES.into_iter().chain(hub).map(button) }</div>
    }
}

fn made_file(made: &Made, sheets: &[Sheet], unit: Unit, ending: &str) -> Option<(String, Vec<u8>)> {
    let title = &made.0.job.title;
    if ending == "sheets.pdf" {
        return Some((file::file_name(title, "pdf"), pdf(title, sheets)));
    }
    let found = files(&made.0, unit).ok()?.into_iter().find(|f| f.name.ends_with(ending))?;
    Some((found.name, found.bytes))
}

/// The browser did not take a file.
pub(in crate::view) fn not_taken(what: &str) -> Notice {
    let title = format!("{what}: the browser did not take the file. The job on the page stays.");
    Notice { title, lines: Vec::new() }
}
