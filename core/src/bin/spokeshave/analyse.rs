//! `spokeshave analyse`: every flight point, its figures and its stations.

use spokeshave::result::{Analysis, PointResult, State, StationResult};

use crate::input::{Format, JobSource, Outcome, Stop, point_index, print, print_csv, print_json};
use crate::table::{csv_figure, figure, signed, table, word};
use crate::vary::VaryArgs;

#[derive(clap::Args)]
pub(crate) struct Args {
    #[command(flatten)]
    source: JobSource,
    /// One flight point by name instead of all
    #[arg(long)]
    point: Option<String>,
    #[command(flatten)]
    format: Format,
    #[command(flatten)]
    vary: VaryArgs,
}

pub(crate) fn run(args: &Args) -> Outcome {
    if args.vary.any() {
        return vary(args);
    }
    let rig = args.source.rig()?;
    let mut analysis = rig.analysis();
    if let Some(name) = &args.point {
        let only = point_index(&rig, Some(name))?;
        analysis.flight_points = analysis.flight_points.into_iter().skip(only).take(1).collect();
    }
    if args.format.json {
        print_json(&analysis)?;
    } else if args.format.csv {
        csv(&analysis)?;
    } else {
        print(&text(&analysis))?;
    }
    Ok(analysis.flight_points.iter().all(|p| p.state == State::Ok))
}

fn vary(args: &Args) -> Outcome {
    const HEADER: [&str; 11] = [
        "flight_point",
        "state",
        "airspeed_m_s",
        "rpm",
        "thrust_n",
        "power_w",
        "efficiency",
        "tip_mach",
        "rate_of_climb_m_s",
        "power_share",
        "fuel_kg_per_h",
    ];
    let mut answered = true;
    let rows = args.vary.rows(&args.source, |rig| {
        let only = args.point.as_deref().map(|name| point_index(rig, Some(name))).transpose()?;
        let points = (0..rig.job.flight_points.len()).filter(|i| only.is_none_or(|o| o == *i));
        let points: Vec<PointResult> = points.filter_map(|i| rig.point(i)).collect();
        answered &= points.iter().all(|p| p.state == State::Ok);
        Ok(points.iter().map(varied_row).collect())
    })?;
    let header: Vec<&str> = args.vary.paths().chain(HEADER).collect();
    print_csv(&header, rows.into_iter())?;
    Ok(answered)
}

fn varied_row(p: &PointResult) -> Vec<String> {
    let (f, m) = (&p.figures, &p.meeting);
    let figures = [
        p.airspeed_m_s,
        p.rpm,
        f.thrust_n,
        f.power_w,
        f.efficiency,
        f.tip_mach,
        m.rate_of_climb_m_s,
        m.power_share,
        m.fuel_kg_per_h,
    ];
    let mut row = vec![p.name.clone(), word(&p.state)];
    row.extend(figures.into_iter().map(csv_figure));
    row
}

fn text(analysis: &Analysis) -> String {
    let p = &analysis.propeller;
    let mut out = format!(
        "{}\n{} blades, {:.0} mm across, {:.1}° and {:.0} mm pitch at 0.75 R, activity factor {:.0}, \
         solidity {:.3}\n\n",
        analysis.title,
        p.blades,
        1000.0 * p.diameter_m,
        p.blade_angle_075_deg,
        1000.0 * p.geometric_pitch_m,
        p.activity_factor,
        p.solidity
    );
    out += &points_table(&analysis.flight_points);
    for point in &analysis.flight_points {
        out += "\n\n";
        out += &stations_text(point);
    }
    out + "\n\nDeparture is the angle of attack less the angle of best lift-to-drag: below zero the station \
           is slack, above it hard."
}

fn points_table(points: &[PointResult]) -> String {
    let header = [
        "",
        "km/h",
        "rpm",
        "thrust N",
        "power kW",
        "effic.",
        "CT",
        "CP",
        "J",
        "slip %",
        "tip Mach",
        "0.75 R: attack",
    ];
    let rows = points.iter().map(|p| {
        let f = &p.figures;
        let merit = f.figure_of_merit.map(|m| format!("FM {m:.2}"));
        vec![
            p.name.clone(),
            figure(p.airspeed_m_s.map(|v| 3.6 * v), 0),
            figure(p.rpm, 0),
            figure(f.thrust_n, decimals(f.thrust_n)),
            figure(f.power_w.map(|w| w / 1000.0), 2),
            merit.unwrap_or_else(|| figure(f.efficiency, 3)),
            figure(f.ct, 4),
            figure(f.cp, 4),
            figure(f.advance_ratio, 3),
            figure(f.slip.map(|s| 100.0 * s), 0),
            figure(f.tip_mach, 2),
            signed(f.angle_of_attack_075_deg, 1),
        ]
    });
    table(&header, rows.collect())
}

/// Small thrusts want a decimal more.
fn decimals(thrust_n: Option<f64>) -> usize {
    usize::from(thrust_n.is_some_and(|t| t.abs() < 100.0))
}

fn stations_text(point: &PointResult) -> String {
    if point.state != State::Ok {
        return format!("{}: no answer. {}", point.name, point.state.sentence());
    }
    let header = [
        "station",
        "r mm",
        "r/R",
        "chord mm",
        "angle",
        "air",
        "attack",
        "best",
        "departure",
        "of best %",
        "cl",
        "cd",
        "Re/1000",
        "Mach",
        "",
    ];
    let rows = point.stations.iter().enumerate().map(|(i, s)| station_row(i, s)).collect();
    let whole: Vec<&str> = point.notes.iter().filter(|n| n.of_the_whole()).map(|n| n.words()).collect();
    let said = if whole.is_empty() { String::new() } else { format!(": {}", whole.join("; ")) };
    format!("{}{said}\n{}", point.name, table(&header, rows))
}

fn station_row(i: usize, s: &StationResult) -> Vec<String> {
    vec![
        (i + 1).to_string(),
        figure(Some(1000.0 * s.radius_m), 0),
        figure(Some(s.radius_fraction), 3),
        figure(Some(1000.0 * s.chord_m), 1),
        figure(Some(s.blade_angle_deg), 1),
        figure(s.inflow_angle_deg, 1),
        figure(s.angle_of_attack_deg, 1),
        figure(s.best_angle_deg, 1),
        signed(s.departure_deg, 1),
        figure(s.share_of_best.map(|x| 100.0 * x), 0),
        figure(s.cl, 2),
        figure(s.cd, 4),
        figure(Some(s.reynolds / 1000.0), 0),
        figure(Some(s.mach), 2),
        s.notes.iter().map(|n| n.words()).collect::<Vec<_>>().join("; "),
    ]
}

fn csv(analysis: &Analysis) -> Result<(), Stop> {
    let header = [
        "flight_point",
        "state",
        "station",
        "radius_m",
        "radius_fraction",
        "chord_m",
        "blade_angle_deg",
        "inflow_angle_deg",
        "angle_of_attack_deg",
        "best_angle_deg",
        "departure_deg",
        "share_of_best",
        "band_low_deg",
        "band_high_deg",
        "cl",
        "cd",
        "reynolds",
        "mach",
        "axial_factor",
        "swirl_factor",
        "loss_factor",
        "thrust_n_per_m",
        "torque_n_m_per_m",
        "notes",
    ];
    let rows = analysis
        .flight_points
        .iter()
        .flat_map(|p| p.stations.iter().enumerate().map(|(i, s)| csv_row(p, i, s)).collect::<Vec<_>>());
    print_csv(&header, rows)
}

fn csv_row(p: &PointResult, i: usize, s: &StationResult) -> Vec<String> {
    let figures = [
        Some(s.radius_m),
        Some(s.radius_fraction),
        Some(s.chord_m),
        Some(s.blade_angle_deg),
        s.inflow_angle_deg,
        s.angle_of_attack_deg,
        s.best_angle_deg,
        s.departure_deg,
        s.share_of_best,
        s.band_low_deg,
        s.band_high_deg,
        s.cl,
        s.cd,
        Some(s.reynolds),
        Some(s.mach),
        s.axial_factor,
        s.swirl_factor,
        s.loss_factor,
        Some(s.thrust_n_per_m),
        Some(s.torque_n_m_per_m),
    ];
    let mut row = vec![p.name.clone(), word(&p.state), (i + 1).to_string()];
    row.extend(figures.into_iter().map(csv_figure));
    row.push(s.notes.iter().map(word).collect::<Vec<_>>().join(" "));
    row
}
