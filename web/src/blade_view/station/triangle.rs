//! The velocity triangle: how the air meets the station, where the chord lies and where it would be best.

use super::rays::Rays;
use crate::chart::axis::px;
use crate::chart::path::polygon;
use crate::chart::spread::spread;
use crate::chart::unit::Unit;
use spokeshave::result::StationResult;
use std::f64::consts::TAU;
use yew::prelude::*;

/// Height of the drawing, and of the part for the arrows.
pub(super) const HEIGHT: f64 = 132.0;
const DEEPEST: f64 = 92.0;
/// Where the arrows start.
const START: [f64; 2] = [10.0, 24.0];
/// Room at the right for words.
const WORDS: f64 = 124.0;

/// Properties of [`Triangle`].
#[derive(Properties, PartialEq)]
pub(super) struct TriangleProps {
    pub(super) station: StationResult,
    pub(super) airspeed_m_s: Option<f64>,
    pub(super) rpm: Option<f64>,
    pub(super) speed: Unit,
    pub(super) width: f64,
}

/// Velocities at the blade, m/s.
#[derive(Clone, Copy, Debug, PartialEq)]
struct Air {
    /// Against the turning: `Ω r` less the swirl.
    turning: f64,
    /// Towards the back: flown and drawn in.
    forward: f64,
    flown: f64,
    drawn: f64,
    swirl: f64,
}

impl Air {
    fn new(station: &StationResult, airspeed_m_s: Option<f64>, rpm: Option<f64>) -> Option<Self> {
        let (flown, rim) = (airspeed_m_s?, rpm? / 60.0 * TAU * station.radius_m);
        let (drawn, swirl) = (station.induced_axial_m_s?, station.induced_swirl_m_s?);
        let air = Self { turning: rim - swirl, forward: flown + drawn, flown, drawn, swirl };
        (air.turning.is_finite() && air.forward.is_finite() && air.speed() > 0.0).then_some(air)
    }

    fn speed(&self) -> f64 {
        self.turning.hypot(self.forward)
    }
}

/// The arrows to one scale with their figures.
#[component]
pub(super) fn Triangle(props: &TriangleProps) -> Html {
    let Some(air) = Air::new(&props.station, props.airspeed_m_s, props.rpm) else {
        return html! { <p class="station-none">{ "No velocity triangle: there is no balance of the air here." }</p> };
    };
    let name = words_for_all(&air, &props.speed);
    html! {
        <svg class="triangle" width={px(props.width)} height={px(HEIGHT)}
            viewBox={format!("0 0 {} {HEIGHT}", px(props.width))}
            role="img" aria-label={name}>
            { arrows(&air, props) }
        </svg>
    }
}

fn words_for_all(air: &Air, speed: &Unit) -> String {
    format!(
        "Velocity triangle: turning {}, forward {} of which {} drawn in; meets the blade at {}",
        speed.text(air.turning),
        speed.text(air.forward),
        speed.text(air.drawn),
        speed.text(air.speed()),
    )
}

fn arrows(air: &Air, props: &TriangleProps) -> Html {
    let [x, y] = START;
    let across = (props.width - x - WORDS).max(60.0);
    let up = air.forward < 0.0;
    let scale = (across / air.turning.abs().max(1e-9)).min(DEEPEST / air.forward.abs().max(1e-9));
    // With the air coming from behind, the triangle stands on its head.
    let y = if up { HEIGHT - 30.0 } else { y };
    let corner = [x + air.turning * scale, y];
    let end = [corner[0], y + air.forward * scale];
    let turning = turning_words(air, &props.speed);
    let length = air.speed() * scale;
    let rays = Rays::new(&props.station, [x, y], length, up);
    html! {
        <>
            { rays.as_ref().map(Rays::wedge) }
            { arrow([x, y], corner, "arrow") }
            { arrow(corner, end, "arrow") }
            { rays.as_ref().map(Rays::lines) }
            { arrow([x, y], end, "arrow is-heavy") }
            <text x={px((0.5 * (x + corner[0])).max(x + 3.1 * turning.chars().count() as f64))}
                y={px(if up { y + 18.0 } else { y - 9.0 })} text-anchor="middle">
                { turning }
            </text>
            { side_words(air, props, corner, end, rays.as_ref()) }
            if roomy(corner) {
                <text x={px(x)} y={px(if up { 14.0 } else { HEIGHT - 6.0 })}>{ meets_words(air, &props.speed) }</text>
            }
        </>
    }
}

/// Whether there is room for words to the left of the forward arrow.
fn roomy(corner: [f64; 2]) -> bool {
    corner[0] > 190.0
}

fn meets_words(air: &Air, speed: &Unit) -> String {
    format!("meets the blade at {}", speed.text(air.speed()))
}

fn turning_words(air: &Air, speed: &Unit) -> String {
    let swirl = speed.of(air.swirl);
    let less = if swirl.abs() >= 0.5 {
        format!(", {} swirl taken off", speed.figure(air.swirl))
    } else {
        String::new()
    };
    format!("turning {}{less}", speed.text(air.turning))
}

/// The column at the right: forward and its parts, and the names of the two rays, none on another.
fn side_words(
    air: &Air,
    props: &TriangleProps,
    corner: [f64; 2],
    end: [f64; 2],
    rays: Option<&Rays>,
) -> Html {
    let speed = &props.speed;
    let middle = 0.5 * (corner[1] + end[1]);
    let mut words = vec![
        (middle - 22.0, format!("forward {}", speed.text(air.forward)), ""),
        (middle - 7.0, format!("{} flown", speed.figure(air.flown)), "quiet"),
        (middle + 8.0, format!("{} drawn in", speed.figure(air.drawn)), "quiet"),
    ];
    if let Some(rays) = rays {
        let mut ends = vec![(rays.chord[1] + 2.0, "chord".to_owned(), "is-chord")];
        ends.extend(rays.best.map(|b| (b[1] + 2.0, "best".to_owned(), "")));
        ends.sort_by(|a, b| a.0.total_cmp(&b.0));
        words.extend(ends);
    }
    if !roomy(corner) {
        words.push((HEIGHT, meets_words(air, speed), ""));
    }
    if air.forward < 0.0 {
        words.sort_by(|a, b| a.0.total_cmp(&b.0));
    }
    let wanted: Vec<f64> = words.iter().map(|w| w.0).collect();
    let heights = spread(&wanted, &vec![15.0; wanted.len()], 4.0, HEIGHT);
    let at = |ray: Option<[f64; 2]>, y: f64, x: f64| {
        ray.map(|r| html! { <line class="lead" x1={px(r[0])} y1={px(r[1])} x2={px(x - 3.0)} y2={px(y)} /> })
    };
    let x = corner[0].max(rays.map_or(0.0, Rays::right)) + 14.0;
    let one = |((_, text, class), y): ((f64, String, &'static str), f64)| {
        let ray = match text.as_str() {
            "chord" => rays.map(|r| r.chord),
            "best" => rays.and_then(|r| r.best),
            _ => None,
        };
        html! { <>{ at(ray, y, x) }<text {class} x={px(x)} y={px(y + 4.0)}>{ text }</text></> }
    };
    words.into_iter().zip(heights).map(one).collect()
}

/// A line with a head at its end; a very short one is drawn without.
pub(super) fn arrow(from: [f64; 2], to: [f64; 2], class: &'static str) -> Html {
    let (dx, dy) = (to[0] - from[0], to[1] - from[1]);
    let length = dx.hypot(dy);
    let head = (length > 10.0).then(|| {
        let (ux, uy) = (dx / length, dy / length);
        let back = [to[0] - 9.0 * ux, to[1] - 9.0 * uy];
        let side = |s: f64| [back[0] - 3.2 * s * uy, back[1] + 3.2 * s * ux];
        html! { <path class="arrow-head" d={polygon([to, side(1.0), side(-1.0)])} /> }
    });
    html! { <><line {class} x1={px(from[0])} y1={px(from[1])} x2={px(to[0])} y2={px(to[1])} />{ head }</> }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn velocities_add_up_to_the_blades_own() {
        let station = StationResult {
            radius_m: 0.54,
            induced_axial_m_s: Some(3.8),
            induced_swirl_m_s: Some(1.2),
            ..Default::default()
        };
        let air = Air::new(&station, Some(47.2), Some(2736.0)).unwrap();
        assert!((air.turning - (154.72 - 1.2)).abs() < 0.01, "{air:?}");
        assert!((air.forward - 51.0).abs() < 1e-9);
        assert_eq!(Air::new(&station, None, Some(2736.0)), None);
        assert_eq!(Air::new(&StationResult::default(), Some(1.0), Some(1.0)), None);
    }
}
