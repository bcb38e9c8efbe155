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
    let setter = here.setter();
    use_effect_with((), move |()| {
        let listener = web_sys::window()
            .map(|window| EventListener::new(&window, "scroll", move |_| setter.set(part_in_view())));
        move || drop(listener)
    });
    let links = PARTS.iter().enumerate().map(|(i, (id, name))| {
        let on = i == *here;
        let onclick = Callback::from(|_: MouseEvent| open(id));
        html! { <a {onclick} href={format!("#{id}")} class={on.then_some("on")} aria-current={on.then_some("true")}>{ *name }</a> }
    });
    html! { <nav class="steps" aria-label="Parts of the page">{ for links }</nav> }
}

/// Opens the panel of an id, so that a step leads to what it names and not to a closed heading.
fn open(id: &str) {
    let part = web_sys::window().and_then(|w| w.document()).and_then(|d| d.get_element_by_id(id));
    if let Some(panel) = part.filter(|p| p.tag_name() == "DETAILS") {
        // Setting a plain attribute does not fail.
        let _ = panel.set_attribute("open", "");
    }
}

/// The last part whose top has been passed.
fn part_in_view() -> usize {
    let Some(document) = web_sys::window().and_then(|w| w.document()) else { return 0 };
    let passed = |id: &str| {
        document.get_element_by_id(id).is_some_and(|e| e.get_bounding_client_rect().top() < REACHED_PX)
    };
    PARTS.iter().rposition(|(id, _)| passed(id)).unwrap_or(0)
}
