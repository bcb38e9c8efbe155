//! The blade as a solid to turn, drawn as flat faces from back to front.

use spokeshave::bench::turned;
use yew::prelude::*;

use super::Made;
use crate::chart::axis::px;

#[derive(Properties, PartialEq)]
pub(super) struct TurningProps {
    pub(super) made: Made,
}

/// Width of the drawing, in its own units.
const WIDE: f64 = 600.0;
const TALL: f64 = 260.0;

#[component]
pub(super) fn Turning(props: &TurningProps) -> Html {
    let turn = use_state_eq(|| 20.0_f64);
    let tilt = use_state_eq(|| -60.0_f64);
    let solid = use_memo(props.made.clone(), |made| made.0.coarse());
    let faces = turned(&solid, turn.to_radians(), tilt.to_radians());
    let reach = props.made.0.form.blade.radius_m;
    let whole = props.made.0.blank.boss.is_some();
    // One blade alone lies to the right of the axis: it is brought to the middle.
    let (scale, middle) =
        if whole { (0.49 * WIDE / reach, 0.5 * WIDE) } else { (0.98 * WIDE / reach, 0.01 * WIDE) };
    let paths = faces.iter().map(|face| {
        let d: Vec<String> = face
            .corners
            .iter()
            .map(|[x, y]| format!("{} {}", px(middle + scale * x), px(0.5 * TALL - scale * y)))
            .collect();
        // Nine tones: neighbouring faces of one tone are the same class.
        let tone = (8.0 * face.light).round();
        html! { <path class={format!("tone-{tone}")} d={format!("M{}Z", d.join("L"))} /> }
    });
    let slider =
        |label: &'static str, value: &UseStateHandle<f64>, least: &'static str, most: &'static str| {
            let setter = value.setter();
            let oninput = Callback::from(move |e: InputEvent| {
                let typed = e.target_dyn_into::<web_sys::HtmlInputElement>();
                if let Some(degrees) = typed.and_then(|input| input.value().parse().ok()) {
                    setter.set(degrees);
                }
            });
            html! {
                <label class="slide"><span>{ label }</span>
                    <input type="range" min={least} max={most} step="1" value={value.to_string()} {oninput} />
                </label>
            }
        };
    html! {
        <figure class="turning">
            <figcaption>{ "The solid" }</figcaption>
            <svg viewBox={format!("0 0 {WIDE} {TALL}")} role="img"
                aria-label="The finished shape, to be turned with the two sliders below">
                { for paths }
            </svg>
            { slider("Turn about the axis", &turn, "0", "360") }
            { slider("Tilt", &tilt, "-180", "180") }
        </figure>
    }
}
