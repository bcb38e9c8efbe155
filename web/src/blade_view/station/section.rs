//! The section at its blade angle, with the air as it comes in.

use super::triangle::arrow;
use crate::chart::axis::px;
use crate::chart::number::fixed;
use crate::chart::path::{Path, polygon};
use crate::chart::unit::Unit;
use spokeshave::result::StationResult;
use std::rc::Rc;
use yew::prelude::*;

const HEIGHT: f64 = 138.0;
/// Room above and under the drawing.
const MARGIN: (f64, f64) = (16.0, 24.0);
/// Length of the arrow of the air and of the chord line beyond the section, in chords.
const ARROW: f64 = 0.5;
const BEYOND: f64 = 1.22;
/// Under this blade angle, rad, its figure stands outside the arc for want of room inside.
const FLAT: f64 = 0.3;

/// Properties of [`Section`].
#[derive(Properties, PartialEq)]
pub(super) struct SectionProps {
    pub(super) station: StationResult,
    pub(super) outline: Rc<Vec<[f64; 2]>>,
    pub(super) length: Unit,
    pub(super) width: f64,
}

/// Where a section stands: its leading edge, its size, its angle.
struct Stand {
    nose: [f64; 2],
    chord_px: f64,
    angle: f64,
}

impl Stand {
    /// As large as the drawing allows for the section, its angle and the arrow.
    fn new(angle: f64, air: Option<f64>, width: f64) -> Self {
        let unit = Self { nose: [0.0, 0.0], chord_px: 1.0, angle };
        let mut corners =
            vec![unit.at([BEYOND, 0.0]), unit.at([0.3, 0.2]), unit.at([0.3, -0.1]), [0.0, 0.0], [0.9, 0.0]];
        corners.extend(air.map(|a| [-ARROW * a.cos(), -ARROW * a.sin()]));
        let span = |i: usize| {
            let of = corners.iter().map(|c| c[i]);
            (of.clone().fold(f64::MAX, f64::min), of.fold(f64::MIN, f64::max))
        };
        let ((left, right), (top, low)) = (span(0), span(1));
        let figure = if angle.abs() < FLAT { 40.0 } else { 0.0 };
        let room = [width - 12.0 - figure, HEIGHT - MARGIN.0 - MARGIN.1];
        let chord_px = (room[0] / (right - left)).min(room[1] / (low - top)).min(150.0);
        let spare = 0.5 * (room[1] - (low - top) * chord_px);
        Self { nose: [6.0 - left * chord_px, MARGIN.0 + spare - top * chord_px], chord_px, angle }
    }

    /// A point of the section (chords: along, up) on the screen, turned by the blade angle.
    fn at(&self, [along, up]: [f64; 2]) -> [f64; 2] {
        let (sin, cos) = self.angle.sin_cos();
        [
            self.nose[0] + self.chord_px * (along * cos + up * sin),
            self.nose[1] + self.chord_px * (along * sin - up * cos),
        ]
    }

    /// So many chords from the leading edge in a direction under the plane of turning.
    fn towards(&self, angle: f64, chords: f64) -> [f64; 2] {
        let (sin, cos) = angle.sin_cos();
        [self.nose[0] + self.chord_px * chords * cos, self.nose[1] + self.chord_px * chords * sin]
    }
}

/// Outline, chord line, plane of turning and the air.
#[component]
pub(super) fn Section(props: &SectionProps) -> Html {
    let station = &props.station;
    let angle = station.blade_angle_deg.to_radians();
    let air = station.inflow_angle_deg.map(f64::to_radians);
    let stand = Stand::new(angle, air, props.width);
    let name = format!("Section at its blade angle of {}°", fixed(station.blade_angle_deg, 1));
    let width = px(props.width);
    html! {
        <svg class="section-figure" width={width.clone()} height={px(HEIGHT)}
            viewBox={format!("0 0 {width} {HEIGHT}")}
            role="img" aria-label={name}>
            { plane(&stand, props.width) }
            { outline(&stand, &props.outline) }
            { chord_line(&stand) }
            { air.map(|air| flow(&stand, air)) }
            { angle_mark(&stand, station.blade_angle_deg) }
            <text class="quiet" x="0" y={px(HEIGHT - 4.0)}>{ words(station, props) }</text>
        </svg>
    }
}

fn words(station: &StationResult, props: &SectionProps) -> String {
    let unit = Unit { decimals: props.length.decimals.max(1), ..props.length };
    let chord = unit.short(station.chord_m);
    let outline = if props.outline.len() < 3 { ", outline not given" } else { "" };
    format!("chord {chord}, {} % thick{outline}", fixed(100.0 * station.thickness_ratio, 0))
}

fn plane(stand: &Stand, width: f64) -> Html {
    let y = px(stand.nose[1]);
    let above = stand.angle >= 0.0;
    html! {
        <>
            <line class="centre-line" x1="0" x2={px(width)} y1={y.clone()} y2={y} />
            <text class="axis-figure haloed" x={px(width - 2.0)}
                y={px(stand.nose[1] + if above { -5.0 } else { 13.0 })} text-anchor="end">
                { "plane of turning" }
            </text>
        </>
    }
}

fn outline(stand: &Stand, outline: &[[f64; 2]]) -> Html {
    if outline.len() < 3 {
        return Html::default();
    }
    html! { <path class="section-outline" d={polygon(outline.iter().map(|p| stand.at(*p)))} /> }
}

fn chord_line(stand: &Stand) -> Html {
    let [from, to] = [stand.nose, stand.towards(stand.angle, BEYOND)];
    html! { <line class="chord-ray" x1={px(from[0])} y1={px(from[1])} x2={px(to[0])} y2={px(to[1])} /> }
}

/// The air up to the leading edge, and its direction carried on past it.
fn flow(stand: &Stand, air: f64) -> Html {
    let (from, on) = (stand.towards(air, -ARROW), stand.towards(air, BEYOND));
    let above = if air >= 0.0 { -6.0 } else { 14.0 };
    html! {
        <>
            <line class="air-ray" x1={px(stand.nose[0])} y1={px(stand.nose[1])} x2={px(on[0])} y2={px(on[1])} />
            { arrow(from, stand.nose, "arrow") }
            <text x={px(from[0].max(2.0))} y={px((from[1] + above).max(11.0))}>{ "air" }</text>
        </>
    }
}

/// The blade angle as an arc from the plane of turning to the chord line.
fn angle_mark(stand: &Stand, blade_angle_deg: f64) -> Html {
    let reach = 1.12;
    let (from, to) = (stand.towards(0.0, reach), stand.towards(stand.angle, reach));
    let mut path = Path::default();
    path.move_to(from);
    path.arc_to(stand.chord_px * reach, stand.angle >= 0.0, to);
    let flat = stand.angle.abs() < FLAT;
    let at = stand.towards(0.42 * stand.angle, if flat { reach + 0.06 } else { reach - 0.05 });
    let anchor = if flat { "start" } else { "end" };
    html! {
        <>
            <path class="angle-arc" d={path.into_string()} />
            <text class="haloed" x={px(at[0])} y={px(at[1] + 4.0)} text-anchor={anchor}>
                { format!("{}°", fixed(blade_angle_deg, 1)) }
            </text>
        </>
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_positive_angle_lowers_the_trailing_edge_and_the_top_stays_up() {
        let stand = Stand { nose: [0.0, 0.0], chord_px: 100.0, angle: 30_f64.to_radians() };
        let tail = stand.at([1.0, 0.0]);
        assert!((tail[0] - 86.6).abs() < 0.1 && (tail[1] - 50.0).abs() < 0.1, "{tail:?}");
        assert!(stand.at([0.3, 0.1])[1] < stand.at([0.3, 0.0])[1]);
    }

    #[test]
    fn every_angle_stays_on_the_drawing() {
        for deg in [-60.0, -5.0, 0.0, 19.5, 51.0, 85.0] {
            for air in [-70.0, 0.0, 18.0, 80.0] {
                let stand = Stand::new(f64::to_radians(deg), Some(f64::to_radians(air)), 240.0);
                for at in [stand.at([1.0, 0.0]), stand.nose, stand.towards(f64::to_radians(air), -ARROW)] {
                    assert!(
                        (0.0..=240.0).contains(&at[0]) && (0.0..=HEIGHT).contains(&at[1]),
                        "{deg} {air}: {at:?}"
                    );
                }
            }
        }
    }
}
