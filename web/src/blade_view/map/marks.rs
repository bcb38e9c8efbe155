//! The flight points on the map: each a vertical line at the airspeed where the blade makes its advance per
//! turn.

use super::frame::Frame;
use super::{DepartureChartProps, FlightMark};
use crate::chart::axis::px;
use crate::chart::departure;
use crate::chart::spread::spread;
use yew::prelude::*;

/// Rough width of a letter of the names, pixels.
const LETTER: f64 = 6.4;
/// Names are cut to so many letters.
const LONGEST: usize = 16;

/// A flight point placed on the map.
struct Placed<'a> {
    index: usize,
    mark: &'a FlightMark,
    x: f64,
    /// Where it lies.
    lies: Lies,
}

/// Where a flight point lies.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
enum Lies {
    /// Before the left end.
    Before,
    On,
    /// Past the right end.
    Past,
}

/// Pixels of the flight points that are on the map.
pub(super) fn places(frame: &Frame, marks: &[FlightMark]) -> Vec<f64> {
    marks.iter().filter_map(|m| frame.x_of_advance(m.advance_m?)).collect()
}

/// Lines with their names above the frame.
pub(super) fn lines(frame: &Frame, props: &DepartureChartProps) -> Html {
    let placed = placed(frame, &props.marks);
    let names: Vec<String> = placed.iter().map(name).collect();
    let sizes: Vec<f64> = names.iter().map(|n| LETTER * n.chars().count() as f64 + 12.0).collect();
    let wanted: Vec<f64> = placed.iter().map(|p| p.x).collect();
    let middles = spread(&wanted, &sizes, frame.left - 6.0, frame.right + 10.0);
    let one = |(((p, name), middle), size): (((&Placed, String), f64), f64)| {
        let index = p.index;
        let onclick = props.on_mark.reform(move |_: MouseEvent| index);
        let class = classes!("flight-mark", p.mark.selected.then_some("is-chosen"));
        html! {
            <g {class} {onclick}>
                { line(frame, p, middle, size) }
                <text x={px(middle)} y={px(frame.axis.top_px - 18.0)} text-anchor="middle">
                    { name }
                    <title>{ &p.mark.name }</title>
                </text>
            </g>
        }
    };
    let lines: Html = placed.iter().zip(names).zip(middles).zip(sizes).map(one).collect();
    html! { <g aria-hidden="true">{ lines }</g> }
}

/// Dots of the stations on the line of the chosen flight point.
pub(super) fn dots(frame: &Frame, props: &DepartureChartProps) -> Html {
    let chosen = props.marks.iter().find(|m| m.selected).and_then(|m| frame.x_of_advance(m.advance_m?));
    let Some(x) = chosen else { return Html::default() };
    let dot = |s: &(f64, Option<f64>)| {
        let class = classes!("dot", departure::style(s.1));
        html! { <circle {class} cx={px(x)} cy={px(frame.axis.y(s.0))} r="4" /> }
    };
    html! { <g aria-hidden="true">{ for props.stations.iter().map(dot) }</g> }
}

/// Flight points with an answer, from left to right.
fn placed<'a>(frame: &Frame, marks: &'a [FlightMark]) -> Vec<Placed<'a>> {
    let place = |(index, mark): (usize, &'a FlightMark)| {
        let advance_m = mark.advance_m?;
        let (x, lies) = match frame.x_of_advance(advance_m) {
            Some(x) => (x, Lies::On),
            None if frame.starts_past(advance_m) => (frame.left, Lies::Before),
            None => (frame.right, Lies::Past),
        };
        Some(Placed { index, mark, x, lies })
    };
    let mut placed: Vec<Placed> = marks.iter().enumerate().filter_map(place).collect();
    placed.sort_by(|a, b| a.x.total_cmp(&b.x));
    placed
}

fn name(placed: &Placed) -> String {
    let name = &placed.mark.name;
    let cut = name.char_indices().nth(LONGEST).map(|(i, _)| format!("{}…", name[..i].trim_end()));
    let shown = cut.unwrap_or_else(|| name.to_string());
    match placed.lies {
        Lies::Before => format!("◂ {shown}"),
        Lies::On => shown,
        Lies::Past => format!("{shown} ▸"),
    }
}

/// From the name down to the frame and through it; beyond the ends there is nothing to draw a line at.
fn line(frame: &Frame, placed: &Placed, middle: f64, size: f64) -> Html {
    let (x, top) = (px(placed.x), frame.axis.top_px);
    // Straight down where the name stands over the line, slanting where others have pushed it aside.
    let half = 0.5 * size - 6.0;
    let start = placed.x.clamp(middle - half, middle + half);
    let lead = format!("M{} {}L{x} {}", px(start), px(top - 12.0), px(top));
    if placed.lies != Lies::On {
        return html! { <path class="flight-line" d={lead} /> };
    }
    html! { <path class="flight-line" d={format!("{lead}V{}", px(frame.axis.hub_px))} /> }
}

#[cfg(test)]
mod tests {
    use super::super::frame::tests::frame;
    use super::*;

    fn mark(name: &'static str, advance_m: Option<f64>) -> FlightMark {
        FlightMark { name: name.into(), advance_m, selected: false }
    }

    #[test]
    fn points_without_an_answer_have_no_mark_and_those_past_the_map_say_so() {
        let marks = [mark("Dive", Some(9.0)), mark("Glide", None), mark("Standing start", Some(0.0))];
        let frame = frame();
        let placed = placed(&frame, &marks);
        assert_eq!(placed.iter().map(name).collect::<Vec<_>>(), ["Standing start", "Dive ▸"]);
        assert_eq!(places(&frame, &marks), [10.0]);
    }

    #[test]
    fn points_before_a_map_that_does_not_begin_at_rest_say_so() {
        let mut map = super::super::frame::tests::sample();
        map.airspeeds_m_s.iter_mut().for_each(|v| *v += 20.0);
        let frame = Frame::new(&map, frame().axis, 10.0, 410.0);
        let marks = [mark("Standing start", Some(0.0))];
        let placed = placed(&frame, &marks);
        assert_eq!((name(&placed[0]), placed[0].x), ("◂ Standing start".into(), 10.0));
    }

    #[test]
    fn long_names_are_cut_between_letters() {
        let long = [mark("Übergang in großer Höhe mit Last", Some(0.5))];
        assert_eq!(name(&placed(&frame(), &long)[0]), "Übergang in groß…");
    }
}
