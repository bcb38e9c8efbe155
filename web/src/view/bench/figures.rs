//! The figures that decide.

use spokeshave::result::{CaseFigures, Strength};
use yew::prelude::*;

use crate::number::{NO_FIGURE, figure, fixed, signed, significant, with_unit};
use crate::units::{Quantity, Units};
use crate::view::verdict::Cell;

/// Properties of [`Figures`].
#[derive(Properties, PartialEq)]
pub(super) struct FiguresProps {
    pub(super) sheet: Strength,
    pub(super) units: Units,
}

/// The figures in columns.
#[component]
pub(super) fn Figures(props: &FiguresProps) -> Html {
    let cells = cells(&props.sheet, props.units).into_iter().map(Cell::item);
    html! { <ul class="verdict fit-figures">{ for cells }</ul> }
}

fn cells(sheet: &Strength, units: Units) -> [Cell; 4] {
    let g = sheet.governing.as_ref();
    let place =
        |n: Option<usize>| n.map_or_else(|| "at the edge of the hub".into(), |n| format!("at station {n}"));
    let moved = |f: &CaseFigures| f.tip_forward_m.map(f64::abs).unwrap_or_default();
    let answered = sheet.cases.iter().filter_map(|c| Some((c, c.figures.as_ref()?)));
    let most = answered.max_by(|a, b| moved(a.1).total_cmp(&moved(b.1)));
    let mass = &sheet.mass;
    [
        Cell {
            name: "Least margin",
            figure: g.map_or_else(|| NO_FIGURE.into(), |g| signed(100.0 * g.margin, 0)),
            unit: "%",
            more: g.map_or_else(|| "no load known".into(), |g| format!("{} in {}", place(g.station), g.case)),
            gauge: None,
        },
        Cell {
            name: "Tip bends forward",
            figure: figure(units, Quantity::Length, most.and_then(|m| m.1.tip_forward_m)),
            unit: units.symbol(Quantity::Length),
            more: most.map_or_else(String::new, |(case, f)| {
                let twist =
                    f.tip_twist_deg.map_or_else(String::new, |t| format!(", twists {}°", signed(t, 1)));
                format!("in {}{twist}", case.name)
            }),
            gauge: None,
        },
        Cell {
            name: "All blades without the boss",
            figure: significant(units.shown(Quantity::Mass, mass.blades_kg), 3),
            unit: units.symbol(Quantity::Mass),
            more: format!("centre {} from the axis", with_unit(units, Quantity::Length, Some(mass.centre_m))),
            gauge: None,
        },
        Cell {
            name: "Static moment of one blade",
            figure: fixed(1e3 * mass.static_moment_kg_m, if mass.static_moment_kg_m < 0.01 { 2 } else { 1 }),
            unit: "kg mm",
            more: format!("inertia of all {} kg m²", significant(mass.inertia_kg_m2, 3)),
            gauge: None,
        },
    ]
}
