//! The factors as bars of what was thought before and of what the readings leave.

use std::rc::Rc;

use spokeshave::result::{FactorFound, Logged};
use yew::prelude::*;

use crate::number::fixed;

/// Properties of [`FactorBars`].
#[derive(Properties, PartialEq)]
pub(super) struct FactorBarsProps {
    pub(super) logged: Rc<Logged>,
}

/// Width and height of a bar's drawing.
const WIDTH: f64 = 220.0;
const HEIGHT: f64 = 22.0;

/// A row for each factor.
#[component]
pub(super) fn FactorBars(props: &FactorBarsProps) -> Html {
    let found = &props.logged.estimate.found;
    let reach = |f: &FactorFound| (f.value - 1.0).abs() + 2.0 * f.value * f.deviation;
    let most = found.iter().flat_map(|f| [reach(f), 1.2 * f.width]).fold(0.05, f64::max);
    html! {
        <div class="scroll" tabindex="0" role="region" aria-label="Factors found">
            <table class="sheet-table factors">
                <thead><tr>
                    <th scope="col">{ "The job’s figure times" }</th><th scope="col">{ "Found" }</th>
                    <th scope="col">{ "±" }</th>
                    <th scope="col">{ "± before" }</th>
                    <th scope="col">{ "Thin: before, thick: with the readings" }</th><th scope="col">{ "Remark" }</th>
                </tr></thead>
                <tbody>{ for found.iter().map(|f| row(f, most)) }</tbody>
            </table>
        </div>
    }
}

fn row(f: &FactorFound, most: f64) -> Html {
    let x = |v: f64| 0.5 * WIDTH * (1.0 + ((v - 1.0) / most).clamp(-1.0, 1.0));
    let span = |middle: f64, half: f64| (x(middle - half), x(middle + half));
    let (before, after) = (span(1.0, f.width), span(f.value, f.value * f.deviation));
    let line = |class: &'static str, (from, to): (f64, f64)| {
        html! {
            <line {class} x1={from.to_string()} x2={to.to_string()} y1={(0.5 * HEIGHT).to_string()}
                y2={(0.5 * HEIGHT).to_string()} />
        }
    };
    let name = f.title;
    let middle = x(1.0).to_string();
    html! {
        <tr class={classes!((!f.told).then_some("untold"))}>
            <th scope="row">{ name }</th>
            <td>{ fixed(f.value, 3) }</td>
            <td>{ fixed(f.value * f.deviation, 3) }</td>
            <td>{ fixed(f.width, 3) }</td>
            <td>
                <svg class="factor-bar" width={WIDTH.to_string()} height={HEIGHT.to_string()}
                    viewBox={format!("0 0 {WIDTH} {HEIGHT}")}
                    role="img" aria-label={format!(
                        "{name}: {} to {}",
                        fixed(f.value * (1.0 - f.deviation), 3),
                        fixed(f.value * (1.0 + f.deviation), 3)
                    )}>
                    <line class="one" x1={middle.clone()} x2={middle} y1="1" y2={(HEIGHT - 1.0).to_string()} />
                    { line("before", before) }
                    { line("after", after) }
                    <circle cx={x(f.value).to_string()} cy={(0.5 * HEIGHT).to_string()} r="4" />
                </svg>
            </td>
            <td class="state">
                { f.says() }
            </td>
        </tr>
    }
}
