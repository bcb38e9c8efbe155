//! The figures that decide.

use spokeshave::result::{CaseFigures, Strength};
use yew::prelude::*;

use crate::number::{NO_FIGURE, figure, fixed, signed, significant, with_unit};
use crate::units::{LengthUnit, MassUnit, Quantity, Units};
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
            figure: moment(units, mass.static_moment_kg_m),
            unit: match (units.mass, units.length) {
                (MassUnit::Kilogram, LengthUnit::Millimetre) => "kg mm",
                (MassUnit::Kilogram, LengthUnit::Inch) => "kg in",
                (MassUnit::Pound, LengthUnit::Millimetre) => "lb mm",
                (MassUnit::Pound, LengthUnit::Inch) => "lb in",
            },
            more: inertia(units, mass.inertia_kg_m2),
            gauge: None,
        },
    ]
}

/// A mass times its arm, kg m, in the units of mass and length.
fn moment(units: Units, kg_m: f64) -> String {
    let shown = units.shown(Quantity::Mass, units.shown(Quantity::Length, kg_m));
    fixed(shown, if shown.abs() < 10.0 { 2 } else { 1 })
}

/// A mass times the square of its arm, kg m², in the units of mass and height.
fn inertia(units: Units, kg_m2: f64) -> String {
    let height = |v| units.shown(Quantity::Height, v);
    let shown = units.shown(Quantity::Mass, height(height(kg_m2)));
    let [mass, height] = [Quantity::Mass, Quantity::Height].map(|q| units.symbol(q));
    format!("inertia of all {} {mass} {height}²", significant(shown, 3))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::units::HeightUnit;

    /// 1 kg m is 1000 kg mm, or 1 / (0.45359237 × 0.0254) lb in; 1 kg m² is 1 / (0.45359237 × 0.3048²) lb ft².
    #[test]
    fn moments_follow_the_units_of_mass_and_length() {
        let metric = Units::default();
        let pounds =
            Units { mass: MassUnit::Pound, length: LengthUnit::Inch, height: HeightUnit::Foot, ..metric };
        assert_eq!(moment(metric, 0.0021), "2.10");
        assert_eq!(moment(pounds, 1.0), "86.8");
        assert_eq!(inertia(metric, 0.167), "inertia of all 0.167 kg m²");
        assert_eq!(inertia(pounds, 1.0), "inertia of all 23.7 lb ft²");
    }
}
