//! The key of the departure scale.

use crate::chart::axis::px;
use crate::chart::departure::{BREAKS_DEG, CLASSES, style_of_class};
use crate::chart::number::signed;
use yew::prelude::*;

/// Width of one class.
const CELL: f64 = 20.0;
const LEFT: f64 = 34.0;
const WIDTH: f64 = LEFT + CELL * CLASSES as f64 + 34.0;

/// The scale from slack to hard, with the marks of stall and working band.
#[component]
pub fn DepartureKey() -> Html {
    html! {
        <div class="departure-key">
            <svg width={px(WIDTH)} height="32" viewBox={format!("0 0 {} 32", px(WIDTH))} role="img"
                aria-label="Key: departure in degrees, from slack below −6 to hard above +6">
                <text x={px(LEFT - 5.0)} y="13" text-anchor="end">{ "slack" }</text>
                { for (0..CLASSES).map(cell) }
                { for BREAKS_DEG.iter().enumerate().map(|(i, b)| figure(i, *b)) }
                <rect class="frame" x={px(LEFT)} y="2" width={px(CELL * CLASSES as f64)} height="14" />
                <text x={px(WIDTH - 29.0)} y="13">{ "hard" }</text>
            </svg>
            <span class="key-item">
                <svg width="28" height="16" aria-hidden="true">
                    <rect class="band departure-8" x="0.5" y="1.5" width="27" height="13" />
                    <rect class="stalled" x="0.5" y="1.5" width="27" height="13" />
                    <rect class="stall-edge" x="0.5" y="1.5" width="27" height="13" />
                </svg>
                { "stalled" }
            </span>
            <span class="key-item">
                <svg width="28" height="16" aria-hidden="true">
                    <line class="band-edge" x1="0" x2="28" y1="8" y2="8" />
                </svg>
                { "working band" }
            </span>
        </div>
    }
}

fn cell(class: usize) -> Html {
    let x = LEFT + CELL * class as f64;
    html! { <rect class={classes!("band", style_of_class(class))} x={px(x)} y="2" width={px(CELL)} height="14" /> }
}

fn figure(index: usize, at: f64) -> Html {
    let x = LEFT + CELL * (index + 1) as f64;
    html! { <text class="axis-figure" x={px(x)} y="29" text-anchor="middle">{ signed(at, 0) }</text> }
}
