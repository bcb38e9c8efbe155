//! Where to be careful: what a degree and a millimetre cost along the blade, on one radius axis, and what
//! errors together come to.

use std::rc::Rc;

use spokeshave::job::{Figure, Job};
use yew::prelude::*;

use super::figures::{name, told, unit};
use crate::act::Seen;
use crate::background::shape::{Cost, DRAG_PERCENT, LIFT_PERCENT, Task};
use crate::chart::line::{Axis, LineChart, Series, Stroke, Upright};
use crate::chart::unit::Unit;
use crate::form::Pick;
use crate::number::significant;
use crate::state::State;
use crate::units::{LengthUnit, Quantity, Units};

/// Properties of [`Careful`].
#[derive(Properties, PartialEq)]
pub(super) struct CarefulProps {
    pub(super) state: Seen,
    pub(super) costs: Option<(Rc<Job>, Rc<Vec<Cost>>)>,
    pub(super) busy: bool,
    pub(super) on_draw: Callback<Task>,
}

/// Tolerances to pick from: angle in degrees, chord and thickness in mm, and what they are called.
const TOLERANCES: [([f64; 3], &str); 3] =
    [([0.1, 0.2, 0.1], "fine"), ([0.25, 0.5, 0.3], "usual"), ([0.5, 1.0, 0.5], "coarse")];

/// A choice of tolerances in words.
fn choice(([angle_deg, chord_mm, thickness_mm], name): ([f64; 3], &str), units: Units) -> AttrValue {
    let decimals = if units.length == LengthUnit::Inch { 3 } else { 1 };
    let length = |mm: f64| Unit { decimals, ..units.unit(Quantity::Length) }.text(1e-3 * mm);
    format!("{name}: {angle_deg}°, {} of chord, {} of thickness", length(chord_mm), length(thickness_mm))
        .into()
}

/// What is to be worked out, and the drawings.
#[component]
pub(super) fn Careful(props: &CarefulProps) -> Html {
    let tolerance = use_state_eq(|| 1);
    let state = &props.state;
    let options: Vec<AttrValue> = TOLERANCES.iter().map(|t| choice(*t, state.units)).collect();
    let onpick = {
        let tolerance = tolerance.setter();
        Callback::from(move |i: usize| tolerance.set(i.min(2)))
    };
    let onclick = {
        let (on, task) = (props.on_draw.clone(), Task::Errors(TOLERANCES[*tolerance].0));
        Callback::from(move |_: MouseEvent| on.emit(task.clone()))
    };
    let costs = props.costs.as_ref().filter(|(job, _)| **job == **state.job());
    html! {
        <section class="careful">
            <h3>{ "Where to be careful" }</h3>
            <div class="buttons unprinted">
                <Pick label="Errors of carving" {options} picked={Some(*tolerance)} {onpick} />
                <button type="button" class="act" aria-disabled={props.busy.then_some("true")} {onclick}>
                    { "What they cost" }
                </button>
            </div>
            if let Some((_, costs)) = costs {
                <CostDrawings state={state.clone()} costs={costs.clone()} />
            } else if props.costs.is_some() {
                <p class="note">{ "The job has changed since this was worked out." }</p>
            }
        </section>
    }
}

/// Properties of [`CostDrawings`].
#[derive(Properties, PartialEq)]
pub struct CostDrawingsProps {
    /// The state.
    pub state: Seen,
    /// What errors cost.
    pub costs: Rc<Vec<Cost>>,
}

/// One figure along the blade, all of them in a table.
#[component]
pub fn CostDrawings(props: &CostDrawingsProps) -> Html {
    let picked = use_state_eq(|| None::<usize>);
    let state = &props.state;
    let costs: Vec<&Cost> = props.costs.iter().filter(|c| moves(c)).collect();
    let here = state.job().flight_points.get(state.point).map_or("", |p| p.name.as_str());
    let usual = costs.iter().position(|c| c.flight_point == here && c.figure == Figure::Efficiency);
    let shown = picked.or(usual).unwrap_or(0);
    let Some(cost) = costs.get(shown).or(costs.first()) else { return html! {} };
    let words = |c: &Cost| AttrValue::from(format!("{} at {}", name(c.figure), c.flight_point));
    let onpick = {
        let picked = picked.setter();
        Callback::from(move |i: usize| picked.set(Some(i)))
    };
    let rows = costs.iter().map(|c| {
        let unit = unit(state.units, c.figure);
        let band = |b: f64| format!("{}\u{a0}{}", significant(unit.of(b), 2), unit.name);
        html! {
            <tr>
                <th scope="row">{ words(c) }</th><td>{ told(state.units, c.figure, Some(c.drawn)) }</td>
                { for c.bands.iter().map(|b| html! { <td>{ band(*b) }</td> }) }
            </tr>
        }
    });
    html! {
        <>
            <div class="buttons">
                <Pick label="Shown along the blade" options={costs.iter().map(|c| words(c)).collect::<Vec<_>>()}
                    picked={Some(shown.min(costs.len() - 1))} {onpick} />
            </div>
            <p class="note">{ careful_words(state, cost) }</p>
            <div class="trio">{ for (0..3).map(|k| along(state, cost, k)) }</div>
            <div class="scroll" tabindex="0" role="region" aria-label="What errors of carving come to">
                <table class="sheet-table worth">
                    <caption>
                        { "What errors of carving come to, either way; linear in the errors, each \
                           difference matched anew with engine and aircraft" }
                    </caption>
                    <thead><tr>
                        <th scope="col">{ "Figure" }</th><th scope="col">{ "As drawn" }</th>
                        <th scope="col">{ "Errors apart" }<small>{ "root of squares" }</small></th>
                        <th scope="col">{ "All to the worse" }</th>
                        <th scope="col">
                            { "Polars in doubt" }
                            <small>{ format!("lift ±{LIFT_PERCENT} %, drag ±{DRAG_PERCENT} %") }</small>
                        </th>
                    </tr></thead>
                    <tbody>{ for rows }</tbody>
                </table>
            </div>
        </>
    }
}

/// Whether errors change a figure at all: in level flight the drag gives the thrust.
fn moves(cost: &Cost) -> bool {
    cost.bands[1] > 1e-6 * cost.drawn.abs().max(1.0)
}

/// The station at which a degree costs most.
fn careful_words(state: &State, cost: &Cost) -> String {
    let slopes = cost.slopes[0].iter().enumerate().filter_map(|(i, s)| Some((i, (*s)?)));
    let Some((i, slope)) = slopes.max_by(|a, b| a.1.abs().total_cmp(&b.1.abs())) else {
        return String::new();
    };
    format!(
        "A degree matters most at station {}: {} {} {}.",
        i + 1,
        name(cost.figure),
        if slope < 0.0 { "falls by" } else { "grows by" },
        told(state.units, cost.figure, Some(slope.abs())),
    )
}

/// What is in error at a station, and how many of the slope's own units, degree and millimetre, it is told for.
fn kind(k: usize, units: Units) -> (&'static str, f64) {
    match (k, units.length) {
        (0, _) => ("For each degree of blade angle", 1.0),
        (1, LengthUnit::Millimetre) => ("For each millimetre of chord", 1.0),
        (1, LengthUnit::Inch) => ("For each 0.1 in of chord", 2.54),
        (_, LengthUnit::Millimetre) => ("For each millimetre of thickness", 1.0),
        (_, LengthUnit::Inch) => ("For each 0.1 in of thickness", 2.54),
    }
}

fn along(state: &Seen, cost: &Cost, k: usize) -> Html {
    let p = &state.job().propeller;
    let tip_m = 0.5 * p.diameter_m;
    let radii = p.stations.iter().map(|s| s.radius_fraction * tip_m);
    let (title, times) = kind(k, state.units);
    let slopes: Vec<Option<f64>> = cost.slopes[k].iter().map(|s| s.map(|s| times * s)).collect();
    let points = radii.zip(&slopes).map(|(r, s)| [r, s.unwrap_or(f64::NAN)]).collect();
    let series = vec![Series { name: AttrValue::default(), points, stroke: Stroke::Solid }];
    let x =
        Axis { words: "radius".into(), unit: state.units.unit(Quantity::Length), span: Some((0.0, tip_m)) };
    let shown = unit(state.units, cost.figure);
    let unit = Unit { decimals: decimals(&slopes, &shown), ..shown };
    let y = Axis { words: AttrValue::default(), unit, span: None };
    let chosen = p.stations.get(state.station);
    let uprights = chosen.map(|s| Upright {
        x: s.radius_fraction * tip_m,
        name: format!("station {}", state.station + 1).into(),
        chosen: true,
    });
    html! {
        <LineChart {title} {x} {y} {series} uprights={uprights.into_iter().collect::<Vec<_>>()}
            height={200.0} />
    }
}

/// Enough decimals for the largest slope to have three figures.
fn decimals(slopes: &[Option<f64>], unit: &Unit) -> usize {
    let most = slopes.iter().flatten().fold(0.0_f64, |m, s| m.max(unit.of(*s).abs()));
    let places = if most > 0.0 { 2 - most.log10().floor() as i32 } else { 0 };
    usize::try_from(places.clamp(0, 6)).unwrap_or(0)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn small_slopes_have_figures_to_tell_them_apart() {
        let unit = Unit::ratio(3);
        assert_eq!(decimals(&[Some(0.0012), None], &unit), 5);
        assert_eq!(decimals(&[Some(-250.0)], &unit), 0);
        assert_eq!(crate::number::fixed(0.0012, decimals(&[Some(0.0012)], &unit)), "0.00120");
    }
}
