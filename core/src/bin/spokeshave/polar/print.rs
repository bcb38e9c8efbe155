//! Polars for people and for programs.

use serde::Serialize;
use spokeshave::section::make::{Comparison, Made, Plan, Request, Summary, compare};
use spokeshave::section::solver::{Solved, State};

use crate::input::{Stop, print, print_csv, print_json};
use crate::table::{csv_figure, figure, signed, table};

#[derive(Serialize)]
struct Document {
    spokeshave: u32,
    /// Where the figures come from; none when no polar has enough points.
    origin: Option<String>,
    polars: Vec<Polar>,
    /// As carved and as drawn, where that was asked for.
    #[serde(skip_serializing_if = "Vec::is_empty")]
    comparison: Vec<Comparison>,
}

#[derive(Serialize)]
struct Polar {
    thickness_ratio: f64,
    reynolds: f64,
    summary: Option<Summary>,
    points: Vec<Point>,
}

/// A point; figures are null unless the state is `converged`.
#[derive(Serialize)]
struct Point {
    alpha_deg: f64,
    cl: Option<f64>,
    cd: Option<f64>,
    cm: Option<f64>,
    xtr_upper: Option<f64>,
    xtr_lower: Option<f64>,
    state: State,
}

impl Point {
    fn of(p: &Solved) -> Self {
        let good = |v: f64| (p.state == State::Converged).then_some(v);
        Self {
            alpha_deg: p.alpha_deg,
            cl: good(p.cl),
            cd: good(p.cd),
            cm: good(p.cm),
            xtr_upper: good(p.xtr_upper),
            xtr_lower: good(p.xtr_lower),
            state: p.state,
        }
    }

    fn lift_to_drag(&self) -> Option<f64> {
        Some(self.cl? / self.cd?)
    }

    fn figures(&self) -> [Option<f64>; 5] {
        [self.cl, self.cd, self.cm, self.xtr_upper, self.xtr_lower]
    }

    fn state(&self) -> String {
        serde_json::to_value(self.state).ok().and_then(|v| v.as_str().map(str::to_string)).unwrap_or_default()
    }
}

fn summary(made: &Made) -> Option<Summary> {
    Summary::of(&made.polar()?).ok()
}

fn polars(made: &[Made]) -> Vec<Polar> {
    let one = |m: &Made| Polar {
        thickness_ratio: m.thickness_ratio,
        reynolds: m.reynolds,
        summary: summary(m),
        points: m.points.iter().map(Point::of).collect(),
    };
    made.iter().map(one).collect()
}

pub(super) fn json(plan: &Plan, made: &[Made], drawn: &Plan, clean: &[Made]) -> Result<(), Stop> {
    let origin = plan.table(made).ok().map(|t| t.origin);
    let comparison = compare((plan, made), (drawn, clean));
    let document =
        Document { spokeshave: spokeshave::job::VERSION, origin, polars: polars(made), comparison };
    print_json(&document)
}

pub(super) fn csv(request: &Request, made: &[Made]) -> Result<(), Stop> {
    let header = [
        "thickness_ratio",
        "reynolds",
        "mach",
        "n_crit",
        "alpha_deg",
        "cl",
        "cd",
        "cm",
        "xtr_upper",
        "xtr_lower",
        "state",
    ];
    let row = |m: &Made, p: &Solved| {
        let point = Point::of(p);
        let of = [m.thickness_ratio, m.reynolds, 0.0, request.n_crit, p.alpha_deg];
        let figures = of.map(Some).into_iter().chain(point.figures()).map(csv_figure);
        figures.chain([point.state()]).collect::<Vec<_>>()
    };
    print_csv(&header, made.iter().flat_map(|m| m.points.iter().map(move |p| row(m, p))))
}

fn head(thickness_ratio: f64, reynolds: f64) -> String {
    format!("{:.1} % thick, Reynolds number {reynolds:.0}", 100.0 * thickness_ratio)
}

pub(super) fn people(plan: &Plan, made: &[Made]) -> Result<(), Stop> {
    let header = ["α °", "cl", "cd", "cl/cd", "cm", "transition above", "below", ""];
    for m in made {
        let row = |p: &Solved| {
            let point = Point::of(p);
            vec![
                signed(Some(p.alpha_deg), 2),
                figure(point.cl, 4),
                figure(point.cd, 5),
                figure(point.lift_to_drag(), 1),
                figure(point.cm, 4),
                figure(point.xtr_upper, 3),
                figure(point.xtr_lower, 3),
                if p.state == State::Converged { String::new() } else { point.state() },
            ]
        };
        print(&format!(
            "{}\n{}\n",
            head(m.thickness_ratio, m.reynolds),
            table(&header, m.points.iter().map(row).collect())
        ))?;
        print("")?;
    }
    let columns =
        ["polar", "best angle °", "best cl/cd", "95 % band °", "zero lift °", "cl most", "cd least"];
    let rows = made.iter().map(|m| {
        let s = summary(m);
        let band = s.and_then(|s| s.working_band_deg);
        vec![
            head(m.thickness_ratio, m.reynolds),
            signed(s.and_then(|s| s.best_angle_deg), 2),
            figure(s.and_then(|s| s.best_lift_to_drag), 1),
            band.map_or_else(
                || "–".into(),
                |(a, b)| format!("{} to {}", signed(Some(a), 1), signed(Some(b), 1)),
            ),
            signed(s.and_then(|s| s.zero_lift_deg), 2),
            figure(s.map(|s| s.cl_max), 3),
            figure(s.map(|s| s.cd_min), 5),
        ]
    });
    print(&table(&columns, rows.collect()))?;
    said(plan, made)
}

/// Where the figures come from, under a table.
fn said(plan: &Plan, made: &[Made]) -> Result<(), Stop> {
    match plan.table(made) {
        Ok(t) => print(&format!("\n{}", t.origin)),
        Err(e) => print(&format!("\n{e}")),
    }
}

pub(super) fn comparison(plan: &Plan, drawn: &Plan, made: &[Made], clean: &[Made]) -> Result<(), Stop> {
    let columns = ["polar", "drawn: best °", "cl/cd", "carved: best °", "cl/cd", "change °", "change %"];
    let rows = compare((plan, made), (drawn, clean)).into_iter().map(|c| {
        vec![
            head(c.thickness_ratio, c.reynolds),
            signed(c.drawn.map(|p| p.angle_deg), 2),
            figure(c.drawn.map(|p| p.lift_to_drag), 1),
            signed(c.carved.map(|p| p.angle_deg), 2),
            figure(c.carved.map(|p| p.lift_to_drag), 1),
            signed(c.change().map(|c| c.0), 2),
            signed(c.change().map(|c| 100.0 * (c.1 - 1.0)), 1),
        ]
    });
    print(&table(&columns, rows.collect()))?;
    print("\nAngles to the chord line of the drawing.")?;
    said(plan, made)
}
