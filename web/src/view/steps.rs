//! Steps through the page: links to its parts, the one in view marked.

use gloo_events::EventListener;
use yew::prelude::*;

/// Parts of the page by id and name, in the order of the job.
pub const PARTS: [(&str, &str); 15] = [
    ("departure", "Departure"),
    ("aircraft", "1 Aircraft"),
    ("engine", "2 Engine"),
    ("points", "3 Points"),
    ("blade", "4 Blade"),
    ("fit", "5 Fit"),
    ("shape", "6 Shape"),
    ("coefficients", "7 Coefficients"),
    ("sections", "8 Sections"),
    ("bench", "9 Bench"),
    ("paper", "10 Paper"),
    ("carved", "11 As carved"),
    ("logbook", "12 Logbook"),
    ("method", "13 Method"),
    ("report", "14 Report"),
];

/// Height over which a part counts as reached, pixels.
const REACHED_PX: f64 = 240.0;

/// The links.
#[component]
pub fn Steps() -> Html {
    let here = use_state_eq(|| 0usize);
    let asked = use_mut_ref(|| None::<usize>);
    {
        let (setter, asked) = (here.setter(), asked.clone());
        use_effect_with((), move |()| {
            let scrolled = move |_: &Event| {
                let held = asked.borrow().filter(|&i| is_reached(PARTS[i].0));
                *asked.borrow_mut() = held;
                setter.set(held.unwrap_or_else(part_in_view));
            };
            let listener = web_sys::window().map(|window| EventListener::new(&window, "scroll", scrolled));
            move || drop(listener)
        });
    }
    let links = PARTS.iter().enumerate().map(|(i, (id, name))| {
        let on = i == *here;
        let (setter, asked) = (here.setter(), asked.clone());
        let onclick = Callback::from(move |_: MouseEvent| {
            *asked.borrow_mut() = Some(i);
            setter.set(i);
            open(id);
        });
        html! {
            <a {onclick} href={format!("#{id}")} title={whole_name(id)} class={on.then_some("on")}
                aria-current={on.then_some("true")}>
                { *name }
            </a>
        }
    });
    html! { <nav class="steps" aria-label="Parts of the page">{ for links }</nav> }
}

/// What stands over a part, where its link is shorter.
fn whole_name(id: &str) -> Option<&'static str> {
    match id {
        "points" => Some("Flight points"),
        "paper" => Some("Paper and files"),
        "method" => Some("How it is computed"),
        _ => None,
    }
}

/// Opens the panel of an id, so that a step leads to what it names and not to a closed heading.
fn open(id: &str) {
    let part = web_sys::window().and_then(|w| w.document()).and_then(|d| d.get_element_by_id(id));
    if let Some(panel) = part.filter(|p| p.tag_name() == "DETAILS") {
        // Setting a plain attribute does not fail.
        let _ = panel.set_attribute("open", "");
    }
}

/// Distance of a part's top from that of the window, pixels.
fn top_of(id: &str) -> Option<f64> {
    let part = web_sys::window()?.document()?.get_element_by_id(id)?;
    Some(part.get_bounding_client_rect().top())
}

/// Whether the part a link was pressed for is where the link leads: at the top, or as near to it as the
/// page's end lets it.
fn is_reached(id: &str) -> bool {
    top_of(id).is_some_and(|top| top > -1.0 && (top < REACHED_PX || is_at_end()))
}

fn is_at_end() -> bool {
    let left = || {
        let window = web_sys::window()?;
        let whole = window.document()?.document_element()?.get_bounding_client_rect().bottom();
        Some(whole - window.inner_height().ok()?.as_f64()?)
    };
    left().is_some_and(|left| left < 2.0)
}

/// The last part whose top has been passed.
fn part_in_view() -> usize {
    let passed = |id: &str| top_of(id).is_some_and(|top| top < REACHED_PX);
    PARTS.iter().rposition(|(id, _)| passed(id)).unwrap_or(0)
}
