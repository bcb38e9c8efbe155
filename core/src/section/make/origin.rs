//! What a made table says of itself.

use super::{Made, Plan};

/// Edge beyond which the drag of the solver is not to be trusted, chords.
const TRUSTED_EDGE: f64 = 0.01;

/// Method, settings and counts of points.
pub(super) fn origin(plan: &Plan, made: &[Made]) -> String {
    let request = &plan.request;
    let name = if plan.base.name().is_empty() { "an outline without a name" } else { plan.base.name() };
    let mut said = vec![
        format!("Computed by this program's section solver from the outline {name:?}, not measured"),
        format!("Mach 0, n = {} at transition, {} nodes", request.n_crit, request.nodes),
        transition(request.trip_upper, request.trip_lower),
        edge(plan),
        counts(made),
    ];
    said.extend(left_out(made));
    said.join(". ") + "."
}

fn transition(upper: Option<f64>, lower: Option<f64>) -> String {
    let at = |x: f64| format!("{} %", super::rounded(100.0 * x, 10.0));
    match (upper, lower) {
        (None, None) => "Free transition".into(),
        (Some(u), None) => format!("Tripped at {} of the chord on the upper side", at(u)),
        (None, Some(l)) => format!("Tripped at {} of the chord on the lower side", at(l)),
        (Some(u), Some(l)) => format!("Tripped at {} of the chord above and {} below", at(u), at(l)),
    }
}

fn edge(plan: &Plan) -> String {
    let thickest = plan.drawn.iter().map(|o| o.measures().edge_thickness).fold(0.0, f64::max);
    let share = super::rounded(100.0 * thickest, 100.0);
    let how = if plan.request.edge_thickness.is_some() { "left" } else { "drawn" };
    let caution = if thickest > TRUSTED_EDGE + 1e-9 { ", where the drag is less certain" } else { "" };
    format!("Trailing edge {how} up to {share} % of the chord thick{caution}")
}

fn counts(made: &[Made]) -> String {
    let tried: usize = made.iter().map(|m| m.points.len()).sum();
    let good: usize = made.iter().map(|m| m.converged().count()).sum();
    format!("{good} of {tried} points converged; the others are left out, and lines run across their gaps")
}

fn left_out(made: &[Made]) -> Option<String> {
    let short: Vec<String> = made
        .iter()
        .filter(|m| m.polar().is_none())
        .map(|m| format!("{:.1} % thick at Reynolds number {}", 100.0 * m.thickness_ratio, m.reynolds))
        .collect();
    (!short.is_empty()).then(|| format!("Too few points converged for a polar: {}", short.join(", ")))
}
