//! The layers on the screen. They are painted once per map and left alone while stations are chosen.

use super::frame::Frame;
use super::layers::{Fill, Layers};
use crate::chart::axis::px;
use crate::chart::departure::style_of_class;
use std::rc::Rc;
use yew::prelude::*;

/// Properties of [`Paint`]; the same layers are the same picture.
#[derive(Properties)]
pub(super) struct PaintProps {
    pub(super) layers: Rc<Option<Layers>>,
    pub(super) frame: Rc<Frame>,
}

impl PartialEq for PaintProps {
    fn eq(&self, other: &Self) -> bool {
        Rc::ptr_eq(&self.layers, &other.layers) && self.frame == other.frame
    }
}

/// Fills, lines, stall and working band, cut off at the frame, with their figures and words.
#[component]
pub(super) fn Paint(props: &PaintProps) -> Html {
    let frame = &props.frame;
    let Some(layers) = &*props.layers else { return nothing(frame) };
    let [x, y, w, h] = [frame.left, frame.axis.top_px, frame.width(), frame.height()].map(px);
    html! {
        <g class="map-paint" aria-hidden="true">
            <svg x={x.clone()} y={y.clone()} width={w.clone()} height={h.clone()}
                viewBox={format!("{x} {y} {w} {h}")}>
                <rect class={classes!("band", style_of_class(0))} {x} {y} width={w} height={h} />
                { for layers.fills.iter().map(fill) }
                <path class="stall-veil" d={layers.stalled.clone()} />
                <path class="stalled" d={layers.stalled.clone()} />
                <path class="stall-edge" d={layers.stalled.clone()} />
                <path class="best-edge" d={layers.best.clone()} />
                <path class="band-edge" d={layers.band.clone()} />
                <path class="missing" d={layers.missing.clone()} />
            </svg>
            { word(layers.stalled_at, "stalled") }
            { word(layers.band_at, "working band") }
            { for layers.labels.iter().map(|l| haloed(l.at, l.text.clone(), "haloed strong")) }
        </g>
    }
}

fn nothing(frame: &Frame) -> Html {
    let (x, y) = (0.5 * (frame.left + frame.right), 0.5 * (frame.axis.top_px + frame.axis.hub_px));
    haloed([x, y], "No departure to show.".to_owned(), "haloed")
}

fn fill(fill: &Fill) -> Html {
    let class = classes!("band", fill.class, fill.lined.then_some("is-lined"));
    html! { <path {class} d={fill.data.clone()} /> }
}

fn word(at: Option<[f64; 2]>, word: &str) -> Option<Html> {
    at.map(|at| haloed(at, word.to_owned(), "haloed"))
}

fn haloed(at: [f64; 2], text: String, class: &'static str) -> Html {
    html! { <text {class} x={px(at[0])} y={px(at[1] + 4.0)} text-anchor="middle">{ text }</text> }
}
