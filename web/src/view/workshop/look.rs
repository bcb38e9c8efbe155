//! The blank from ahead, from the side and from the tip.

use spokeshave::bench::{Unit, machine_drawings, picture, stack_drawing};
use yew::prelude::*;

use super::Made;

#[derive(Properties, PartialEq)]
pub(super) struct ViewsProps {
    pub(super) made: Made,
    pub(super) unit: Unit,
}

#[component]
pub(super) fn Views(props: &ViewsProps) -> Html {
    let views = use_memo((props.made.clone(), props.unit), |(made, unit)| {
        let drawings = machine_drawings(&made.0, *unit);
        let named = |name: &str, title: &'static str| {
            let leaf = drawings.iter().find(|leaf| leaf.name == name)?;
            Some((title, picture(title, &leaf.drawing)))
        };
        let tip = picture("Blank from the tip", &stack_drawing(&made.0));
        [
            named("blank-plan", "Blank from ahead"),
            named("blank-side", "Blank from the side"),
            Some(("Blank from the tip, all stations", tip)),
        ]
    });
    let view = |(title, svg): &(&'static str, String)| {
        html! {
            <figure class="on-paper">
                <figcaption>{ *title }</figcaption>
                { Html::from_html_unchecked(svg.clone().into()) }
            </figure>
        }
    };
    html! { <div class="three-views">{ for views.iter().flatten().map(view) }</div> }
}
