//! Lift, drag and lift-to-drag of a section over the angle of attack, one curve for each Reynolds number.

use std::rc::Rc;

use spokeshave::section::SectionCurve;
use yew::prelude::*;

use crate::chart::line::{Axis, LineChart, Series, Stroke};
use crate::chart::unit::Unit;
use crate::number::{fixed, fixed_or_none, signed_or_none};

/// Properties of [`Charts`].
#[derive(Properties, PartialEq)]
pub(super) struct ChartsProps {
    pub(super) curves: Rc<Vec<SectionCurve>>,
}

/// Drag is shown up to this many times that of the middle curve at its best, so that the working range is
/// readable.
const DRAG_SHOWN: f64 = 3.0;

/// Three charts and the best of each curve.
#[component]
pub(super) fn Charts(props: &ChartsProps) -> Html {
    let curves = &props.curves;
    let drag = curves.get(curves.len() / 2).and_then(drag_at_best).map(|cd| (0.0, DRAG_SHOWN * cd));
    let most = curves.iter().filter_map(|c| c.best).map(|b| b.1).fold(0.0, f64::max);
    let ratio = (most > 0.0).then_some((0.0, 1.1 * most));
    html! {
        <>
            <div class="trio">
                { chart("Lift coefficient", "cl", Unit::ratio(2), None, curves, |p| p[1]) }
                { chart("Drag coefficient", "cd", Unit::ratio(4), drag, curves, |p| p[2]) }
                { chart("Lift-to-drag", "cl/cd", Unit::ratio(0), ratio, curves, |p| p[1] / p[2]) }
            </div>
            <Bests curves={curves.clone()} />
        </>
    }
}

fn drag_at_best(curve: &SectionCurve) -> Option<f64> {
    let (angle, _) = curve.best?;
    curve.points.iter().find(|p| p[0] >= angle).map(|p| p[2])
}

fn chart(
    title: &'static str,
    words: &'static str,
    unit: Unit,
    span: Option<(f64, f64)>,
    curves: &[SectionCurve],
    of: impl Fn(&[f64; 3]) -> f64,
) -> Html {
    // Neighbours are told apart by their strokes.
    let strokes = [Stroke::Solid, Stroke::Dashed, Stroke::Dotted];
    let series: Vec<Series> = curves
        .iter()
        .zip(strokes.into_iter().cycle())
        .map(|(c, stroke)| Series {
            name: short(c.reynolds).into(),
            points: c.points.iter().map(|p| [p[0], of(p)]).collect(),
            stroke,
        })
        .collect();
    let x = Axis { words: "angle of attack".into(), unit: Unit { decimals: 0, ..Unit::DEGREE }, span: None };
    let y = Axis { words: words.into(), unit, span };
    html! { <LineChart {title} {x} {y} {series} height={260.0} /> }
}

/// A Reynolds number in few letters.
pub(super) fn short(reynolds: f64) -> String {
    let millions = (reynolds / 1e5).round() / 10.0;
    if millions >= 1.0 {
        format!("{} million", fixed(millions, usize::from(millions.fract() != 0.0)))
    } else {
        fixed((reynolds / 1000.0).round() * 1000.0, 0)
    }
}

/// Best angle and best lift-to-drag by Reynolds number.
#[component]
fn Bests(props: &ChartsProps) -> Html {
    let heads = props.curves.iter().map(|c| html! { <th scope="col">{ short(c.reynolds) }</th> });
    let row = |name: &'static str, of: fn(&SectionCurve) -> String| {
        let cells = props.curves.iter().map(|c| html! { <td>{ of(c) }</td> });
        html! { <tr><th scope="row">{ name }</th>{ for cells }</tr> }
    };
    html! {
        <div class="scroll" tabindex="0" role="region" aria-label="Best lift-to-drag by Reynolds number">
            <table class="sheet-table bests">
                <thead><tr><th scope="col">{ "Reynolds" }</th>{ for heads }</tr></thead>
                <tbody>
                    { row("Best angle, °", |c| signed_or_none(c.best.map(|b| b.0), 1)) }
                    { row("Best cl/cd", |c| fixed_or_none(c.best.map(|b| b.1), 0)) }
                </tbody>
            </table>
        </div>
    }
}

#[cfg(test)]
mod tests {
    use super::short;

    #[test]
    fn reynolds_numbers_are_short() {
        assert_eq!(short(30e3), "30\u{202f}000");
        assert_eq!(short(750e3), "750\u{202f}000");
        assert_eq!((short(1.5e6), short(6e6)), ("1.5 million".into(), "6 million".into()));
    }
}
