//! `spokeshave shape JOB chart`.

use spokeshave::result::{ChartCell, Figure, PitchDiameter};
use spokeshave::rig::Rig;
use spokeshave::shape::{self, MOST_CHART_STEPS, PitchBy};

use super::figures::{NAMES, Words, figure_named, words};
use super::refused;
use super::wishes::LimitArgs;
use crate::input::{Outcome, Stop, point_index, print, print_csv, print_json};
use crate::table::{csv_figure, figure, table, word};

#[derive(clap::Args)]
pub(crate) struct Args {
    /// The flight point; the first without it
    #[arg(long)]
    point: Option<String>,
    /// Which figure the table shows; the CSV and the JSON have all
    #[arg(long, default_value = "efficiency")]
    figure: String,
    /// Geometric pitch at 0.75 R, mm; a fifth either way of the drawn one without it
    #[arg(long, value_name = "MM..MM:N")]
    pitch_mm: Option<String>,
    /// Diameter, mm; a tenth either way of the drawn one without it
    #[arg(long, value_name = "MM..MM:N")]
    diameter_mm: Option<String>,
    /// Turn the whole blade to its pitch, rather than scale the pitch of every station
    #[arg(long)]
    turn: bool,
    #[command(flatten)]
    limits: LimitArgs,
    /// One JSON document, SI units
    #[arg(long, conflicts_with = "csv")]
    json: bool,
    /// CSV, SI units
    #[arg(long)]
    csv: bool,
}

pub(super) fn run(rig: &Rig, args: &Args) -> Outcome {
    let point = point_index(rig, args.point.as_deref())?;
    // A take-off has no place in the figures of one flight point.
    let known = figure_named(&args.figure).filter(|figure| *figure != Figure::TakeOffM);
    let shown = known.ok_or_else(|| {
        let names: Vec<&str> = NAMES.into_iter().filter(|name| *name != "take-off").collect();
        Stop::bad(format!("--figure: {}; allowed are {}", args.figure, names.join(", ")))
    })?;
    let drawn = (rig.rotor.blade.pitch_075_m(0.0), rig.job.propeller.diameter_m);
    let pitches = steps("--pitch-mm", args.pitch_mm.as_deref(), drawn.0, 0.2)?;
    let diameters = steps("--diameter-mm", args.diameter_mm.as_deref(), drawn.1, 0.1)?;
    let by = if args.turn { PitchBy::Turn } else { PitchBy::Scale };
    match shape::pitch_diameter(rig, point, &pitches, &diameters, by, &args.limits.over(rig)?) {
        Ok(chart) if args.json => print_json(&chart)?,
        Ok(chart) if args.csv => print_csv(&HEADER, rows(&chart))?,
        Ok(chart) => print(&text(&chart, shown))?,
        Err(e) => return refused(&e),
    }
    Ok(true)
}

/// Steps in metres, as given in mm or so far either way of the drawn figure.
fn steps(name: &str, text: Option<&str>, drawn_m: f64, share: f64) -> Result<Vec<f64>, Stop> {
    let (low, high, count) = match text {
        None => (drawn_m - share * drawn_m.abs(), drawn_m + share * drawn_m.abs(), 9),
        Some(text) => {
            let wrong = || Stop::bad(format!("{name}: {text}; allowed is such as 1400..1600:9"));
            let (ends, count) = text.rsplit_once(':').ok_or_else(wrong)?;
            let (low, high) = ends.split_once("..").ok_or_else(wrong)?;
            let number = |s: &str| s.trim().parse().ok().filter(|x: &f64| x.is_finite()).ok_or_else(wrong);
            let count = count.trim().parse().ok().filter(|n| (1..=MOST_CHART_STEPS).contains(n));
            (1e-3 * number(low)?, 1e-3 * number(high)?, count.ok_or_else(wrong)?)
        }
    };
    let share = |i: usize| i as f64 / (count - 1).max(1) as f64;
    Ok((0..count).map(|i| low + (high - low) * share(i)).collect())
}

const HEADER: [&str; 13] = [
    "pitch_m",
    "diameter_m",
    "state",
    "airspeed_m_s",
    "rpm",
    "thrust_n",
    "power_w",
    "efficiency",
    "rate_of_climb_m_s",
    "endurance_s",
    "tip_mach",
    "standing_rpm",
    "broken",
];

fn rows(chart: &PitchDiameter) -> impl Iterator<Item = Vec<String>> {
    chart.cells.indexed_iter().map(|((p, d), cell)| {
        let place = [chart.pitches_m[p], chart.diameters_m[d]].map(|x| csv_figure(Some(x)));
        let mut row = place.to_vec();
        let Some(ChartCell { figures: f, standing_rpm, broken }) = cell else {
            row.push("no-such-blade".into());
            row.resize(HEADER.len(), String::new());
            return row;
        };
        row.push(word(&f.state));
        let figures = [
            f.airspeed_m_s,
            f.rpm,
            f.thrust_n,
            f.power_w,
            f.efficiency,
            f.rate_of_climb_m_s,
            f.endurance_s,
            f.tip_mach,
            *standing_rpm,
        ];
        row.extend(figures.map(csv_figure));
        row.push(broken.iter().map(word).collect::<Vec<_>>().join(" "));
        row
    })
}

fn text(chart: &PitchDiameter, shown: Figure) -> String {
    let diameters: Vec<String> = chart.diameters_m.iter().map(|d| format!("{:.0}", 1e3 * d)).collect();
    let mut header = vec!["pitch mm \\ diameter mm"];
    header.extend(diameters.iter().map(String::as_str));
    let Words { name, per, decimals } = words(shown);
    let cell = |cell: &Option<ChartCell>| {
        let Some(cell) = cell else { return "–".to_string() };
        let mark = if cell.broken.is_empty() { "" } else { "*" };
        figure(shown.of(&cell.figures).map(|v| v * per), decimals) + mark
    };
    let row = |(row, pitch): (ndarray::ArrayView1<Option<ChartCell>>, &f64)| {
        std::iter::once(format!("{:.0}", 1e3 * pitch)).chain(row.iter().map(cell)).collect()
    };
    let rows = chart.cells.rows().into_iter().zip(&chart.pitches_m).map(row).collect();
    format!(
        "{name} at {0}; drawn: pitch {1:.0} mm, diameter {2:.0} mm; * breaks a limit.\n\
         Limits of rpm and tip Mach number are judged at {0} alone; other flight points may break them.\n\n{3}",
        chart.flight_point,
        1e3 * chart.drawn_m.0,
        1e3 * chart.drawn_m.1,
        table(&header, rows)
    )
}
