//! Printing the sheets: they alone, each on its own paper at full size, until the browser has printed.

use std::rc::Rc;

use gloo_events::EventListener;
use spokeshave::bench::Paper;
use yew::prelude::*;

#[derive(Properties, PartialEq)]
pub(super) struct PrintProps {
    pub(super) sheets: Rc<Vec<String>>,
    pub(super) paper: Paper,
    /// Told when the browser has printed, or when printing was called off.
    pub(super) over: Callback<()>,
}

#[component]
pub(super) fn Print(props: &PrintProps) -> Html {
    {
        let over = props.over.clone();
        use_effect_with((), move |()| {
            let window = web_sys::window();
            let listener =
                window.as_ref().map(|w| EventListener::once(w, "afterprint", move |_| over.emit(())));
            // A frame later the sheets are laid out.
            let asked = gloo_timers::callback::Timeout::new(50, move || {
                if let Some(window) = window {
                    // A browser that does not print says so itself.
                    let _ = window.print();
                }
            });
            move || drop((listener, asked))
        });
    }
    let [w, h] = props.paper.size_mm();
    let size = format!("@page {{ size: {w}mm {h}mm; margin: 0 }}");
    let Some(body) = web_sys::window().and_then(|w| w.document()).and_then(|d| d.body()) else {
        return Html::default();
    };
    create_portal(
        html! {
            <div class="printed-sheets">
                <style>{ size }</style>
                { for props.sheets.iter().map(|svg| html! {
                    <section>{ Html::from_html_unchecked(svg.clone().into()) }</section>
                }) }
            </div>
        },
        body.into(),
    )
}
