//! An outline as read: its shape, chord line and flat face, with what is measured of it.

use spokeshave::section::outline::Outline;
use yew::prelude::*;

use crate::chart::axis::px;
use crate::chart::path::polygon;
use crate::chart::width::use_width;
use crate::number::{fixed, signed};

/// Properties of [`Drawing`].
#[derive(Properties, PartialEq)]
pub(super) struct DrawingProps {
    pub(super) outline: Outline,
    /// The same with its trailing edge left thicker, where that is asked for.
    pub(super) blunt: Option<Outline>,
}

const MARGIN: f64 = 10.0;

/// The drawing and its figures.
#[component]
pub(super) fn Drawing(props: &DrawingProps) -> Html {
    let (node, width) = use_width(340.0);
    let outline = &props.outline;
    let scale = width - 2.0 * MARGIN;
    let heights = || outline.points().iter().map(|p| p[1]);
    let (low, high) = heights().fold((0.0_f64, 0.0_f64), |(a, b), y| (a.min(y), b.max(y)));
    let height = (high - low) * scale + 2.0 * MARGIN;
    let place = |p: &[f64; 2]| [MARGIN + p[0] * scale, MARGIN + (high - p[1]) * scale];
    let shape = |o: &Outline| polygon(o.points().iter().map(place));
    let [nose, tail] = [[-0.01, 0.0], [1.01, 0.0]].map(|p| place(&p));
    html! {
        <div class="outline-drawing">
            <div ref={node}>
                <svg width={px(width)} height={px(height)}
                    viewBox={format!("0 0 {} {}", px(width), px(height))} role="img"
                    aria-label={format!("Outline of the section: {}", facts(outline).join(", "))}>
                    <path class="section-shape" d={shape(outline)} />
                    if let Some(blunt) = &props.blunt { <path class="band-edge" d={shape(blunt)} /> }
                    <line class="centre-line" x1={px(nose[0])} y1={px(nose[1])} x2={px(tail[0])} y2={px(tail[1])} />
                </svg>
            </div>
            <p class="note">{ facts(outline).join(" · ") }</p>
        </div>
    }
}

/// What is measured of an outline.
fn facts(outline: &Outline) -> Vec<String> {
    let m = outline.measures();
    let percent = |v: f64, decimals| fixed(100.0 * v, decimals);
    let face = outline.face_angle_rad().map_or_else(
        || "no flat face".to_string(),
        |a| format!("chord line {}° from the flat face", signed(a.to_degrees(), 2)),
    );
    vec![
        format!("{} points", outline.points().len()),
        format!("{} % thick at {} %", percent(m.thickness_ratio, 1), percent(m.thickness_at, 0)),
        format!("camber {} % at {} %", percent(m.camber_ratio, 1), percent(m.camber_at, 0)),
        face,
        format!("nose radius {} %", percent(m.nose_radius, 2)),
        format!("trailing edge {} %", percent(m.edge_thickness, 2)),
    ]
}
