//! Axes: ticks with their figures, the unit once at the end.

use super::linear::Linear;
use super::ticks::{MOST, Tick, ticks};
use super::unit::Unit;
use yew::prelude::*;

/// Ticks of an axis whose projection takes SI values, with the pixel of each.
#[must_use]
pub fn placed(scale: &Linear, unit: &Unit, most: usize) -> Vec<(f64, Tick)> {
    let (low, high) = scale.span();
    let place = |tick: Tick| (scale.px(unit.si(tick.at)), tick);
    ticks(unit.of(low), unit.of(high), most).into_iter().map(place).collect()
}

/// Most ticks whose figures still keep apart on a length.
#[must_use]
pub fn most_on(length_px: f64, each_px: f64) -> usize {
    ((length_px / each_px) as usize).clamp(2, MOST)
}

/// An axis along the bottom of a frame: ticks at `y` downwards, figures under them.
pub fn bottom(ticks: &[(f64, Tick)], y: f64) -> Html {
    ticks
        .iter()
        .map(|(x, tick)| {
            html! {
                <g class="tick">
                    <line x1={px(*x)} x2={px(*x)} y1={px(y)} y2={px(y + 4.0)} />
                    <text x={px(*x)} y={px(y + 16.0)} text-anchor="middle">{ &tick.label }</text>
                </g>
            }
        })
        .collect()
}

/// An axis along the left of a frame: ticks at `x` to the left, figures beside them.
pub fn left(ticks: &[(f64, Tick)], x: f64) -> Html {
    ticks
        .iter()
        .map(|(y, tick)| {
            html! {
                <g class="tick">
                    <line x1={px(x - 4.0)} x2={px(x)} y1={px(*y)} y2={px(*y)} />
                    <text x={px(x - 7.0)} y={px(y + 4.0)} text-anchor="end">{ &tick.label }</text>
                </g>
            }
        })
        .collect()
}

/// Hairlines across a frame at the ticks of its left axis.
pub fn rows(ticks: &[(f64, Tick)], from: f64, to: f64) -> Html {
    ticks
        .iter()
        .map(|(y, _)| html! { <line class="hair" x1={px(from)} x2={px(to)} y1={px(*y)} y2={px(*y)} /> })
        .collect()
}

/// A pixel as an attribute, to a tenth.
#[must_use]
pub fn px(value: f64) -> AttrValue {
    let tenths = (value * 10.0).round() / 10.0;
    // Adding zero turns a negative zero into a plain one.
    AttrValue::from((tenths + 0.0).to_string())
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn stand_at_round_figures_of_the_unit() {
        let y = Linear::new((0.09, 0.76), (440.0, 0.0));
        let inches = placed(&y, &Unit::INCH, MOST);
        assert_eq!(
            inches.iter().map(|(_, t)| t.label.as_str()).collect::<Vec<_>>(),
            ["5", "10", "15", "20", "25"]
        );
        assert!((inches[1].0 - y.px(0.254)).abs() < 1e-9);
    }

    #[test]
    fn have_fewer_ticks_where_there_is_less_room() {
        assert_eq!((most_on(900.0, 60.0), most_on(200.0, 60.0), most_on(10.0, 60.0)), (6, 3, 2));
    }

    #[test]
    fn pixels_are_short() {
        assert_eq!((px(-0.01).as_str(), px(12.34).as_str(), px(7.0).as_str()), ("0", "12.3", "7"));
    }
}
