//! `spokeshave shape JOB twist`.

use spokeshave::result::{Origin, Twist, TwistStation};
use spokeshave::rig::Rig;
use spokeshave::shape::{self, TwistBy};

use super::{Print, compared, told};
use crate::input::{Outcome, Stop, point_index};
use crate::table::{figure, signed, table};

#[derive(clap::Args)]
pub(crate) struct Args {
    /// A flight point that counts, with its weight where several do; the first of the job without it
    #[arg(long, value_name = "NAME[=WEIGHT]")]
    point: Vec<String>,
    /// Along several flight points, make the weighted loss of lift-to-drag least rather than the weighted
    /// squares of the departures
    #[arg(long)]
    by_loss: bool,
    #[command(flatten)]
    print: Print,
}

pub(super) fn run(rig: &Rig, args: &Args) -> Outcome {
    let weights = weights(rig, &args.point)?;
    let by = if args.by_loss { TwistBy::Loss } else { TwistBy::Departure };
    told(shape::twist_by(rig, &weights, by), &args.print, "best-incidence twist", text)
}

/// One weight a flight point of the job.
pub(super) fn weights(rig: &Rig, points: &[String]) -> Result<Vec<f64>, Stop> {
    let mut weights = vec![0.0; rig.job.flight_points.len()];
    if points.is_empty() {
        weights[0] = 1.0;
    }
    for point in points {
        let known = point_index(rig, Some(point));
        let (index, weight) = match (known, point.rsplit_once('=')) {
            (Ok(index), _) => (index, 1.0),
            (Err(_), Some((name, weight))) => {
                let number = weight.trim().parse().ok().filter(|w: &f64| w.is_finite() && *w >= 0.0);
                let wrong = || Stop::bad(format!("--point: {weight}; allowed is a weight of 0 or more"));
                (point_index(rig, Some(name.trim()))?, number.ok_or_else(wrong)?)
            }
            (Err(e), None) => return Err(e),
        };
        weights[index] = weight;
    }
    if weights.iter().all(|w| *w == 0.0) {
        return Err(Stop::bad("--point: at least one flight point needs a weight above 0"));
    }
    Ok(weights)
}

fn text(t: &Twist) -> String {
    let names: Vec<String> = t.weights.iter().map(|(name, w)| format!("{name} (weight {w})")).collect();
    let mut header = vec!["r mm", "r/R", "drawn °", "new °", "on the face °"];
    header.extend(t.weights.iter().map(|(name, _)| name.as_str()));
    header.push("");
    let rows = t.stations.iter().map(row).collect();
    format!(
        "Best-incidence twist for {}\n{}\n\n{}\n\n{}",
        names.join(", "),
        t.sentence(),
        table(&header, rows),
        compared(&t.flight_points)
    )
}

fn row(s: &TwistStation) -> Vec<String> {
    let words = match s.origin {
        Origin::Solved => "",
        Origin::HeldInboard => "pitch of the next station outboard",
        Origin::HeldAtTip => "pitch of the next station inboard",
    };
    let mut row = vec![
        figure(Some(1e3 * s.radius_m), 1),
        figure(Some(s.radius_fraction), 3),
        figure(Some(s.drawn_angle_deg), 2),
        figure(Some(s.angle_deg), 2),
        figure(s.face_angle_deg, 2),
    ];
    row.extend(s.departures_deg.iter().map(|d| signed(*d, 2)));
    row.push(words.into());
    row
}
