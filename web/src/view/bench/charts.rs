//! Stress along the blade against its limits, and natural frequencies over the rpm.

use spokeshave::result::{Strength, StressStation};
use yew::prelude::*;

use crate::chart::line::{Axis, Limit, LineChart, Series, Stroke};
use crate::chart::unit::Unit;
use crate::number::with_unit;
use crate::units::{Quantity, Units};

/// Properties of [`Charts`].
#[derive(Properties, PartialEq)]
pub(super) struct ChartsProps {
    pub(super) sheet: Strength,
    pub(super) units: Units,
}

/// Multiples of the speed of rotation that are drawn.
const ORDERS: u32 = 4;

/// The two charts.
#[component]
pub(super) fn Charts(props: &ChartsProps) -> Html {
    html! { <div class="duo">{ stress(&props.sheet, props.units) }{ frequencies(&props.sheet, props.units) }</div> }
}

fn stress(sheet: &Strength, units: Units) -> Html {
    let curve = |name: &'static str, stroke, of: fn(&StressStation) -> Option<f64>| Series {
        name: name.into(),
        points: sheet.stations.iter().map(|s| [s.radius_m, of(s).unwrap_or(f64::NAN)]).collect(),
        stroke,
    };
    let series = vec![
        curve("tension", Stroke::Solid, |s| s.tension_pa),
        curve("compression", Stroke::Dashed, |s| s.compression_pa),
        curve("by rotation alone", Stroke::Dotted, |s| s.axial_pa),
    ];
    // Between the limits one kind of stress is past its own and the other is not: hatched is what is past
    // both.
    let m = &sheet.material;
    let most = m.tension_limit_pa.max(m.compression_limit_pa);
    let limit = |name: &str, pa: f64| Limit {
        y: pa,
        words: format!("{name} {}", with_unit(units, Quantity::Stress, Some(pa))).into(),
        hatched: pa >= most,
    };
    let limits =
        vec![limit("tension limit", m.tension_limit_pa), limit("compression limit", m.compression_limit_pa)];
    let x = Axis { words: "radius".into(), unit: units.unit(Quantity::Length), span: None };
    let y = Axis { words: "greatest stress".into(), unit: units.unit(Quantity::Stress), span: None };
    html! { <LineChart title="Stress in the worst case of each station" {x} {y} {series} {limits} height={240.0} /> }
}

fn frequencies(sheet: &Strength, units: Units) -> Html {
    let lines = &sheet.vibration.lines;
    let Some(top) = lines.iter().find_map(|l| l.rpm.last().copied()).filter(|rpm| *rpm > 0.0) else {
        return html! {};
    };
    let highest = lines.iter().flat_map(|l| l.hz.iter().copied()).fold(0.0, f64::max);
    let modes = lines.iter().map(|l| Series {
        name: l.words().into(),
        points: l.rpm.iter().zip(&l.hz).map(|(rpm, hz)| [*rpm, *hz]).collect(),
        stroke: Stroke::Solid,
    });
    let order = |n: u32| {
        let end = top.min(60.0 * highest / f64::from(n));
        Series {
            name: format!("{n} a turn").into(),
            points: vec![[0.0, 0.0], [end, f64::from(n) * end / 60.0]],
            stroke: Stroke::Dotted,
        }
    };
    let series: Vec<Series> = modes.chain((1..=ORDERS).map(order)).collect();
    let x = Axis { words: "propeller".into(), unit: units.unit(Quantity::Rpm), span: Some((0.0, top)) };
    let y = Axis {
        words: "natural frequency".into(),
        unit: Unit { name: "Hz", per_si: 1.0, decimals: 0 },
        span: None,
    };
    html! { <LineChart title="Natural frequencies of a blade" {x} {y} {series} height={240.0} /> }
}
