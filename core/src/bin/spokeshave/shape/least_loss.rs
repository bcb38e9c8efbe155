//! `spokeshave shape JOB least-loss`.

use spokeshave::result::{Bound, LeastLoss, LossStation};
use spokeshave::rig::Rig;
use spokeshave::shape::adkins_liebeck::Wanted;
use spokeshave::shape::{self, Lift, LossTask};

use super::{Print, compared, told};
use crate::input::{Outcome, point_index};
use crate::table::{figure, table};

#[derive(clap::Args)]
pub(crate) struct Args {
    /// The flight point, which needs a speed; the first without it
    #[arg(long)]
    point: Option<String>,
    /// Thrust of one propeller, N; without thrust or power the drawn blade's
    #[arg(long, value_name = "N", conflicts_with = "power_w")]
    thrust_n: Option<f64>,
    /// Shaft power of one propeller, W
    #[arg(long, value_name = "W")]
    power_w: Option<f64>,
    /// Propeller rpm; without it the drawn blade's
    #[arg(long)]
    rpm: Option<f64>,
    /// The same lift coefficient at every station; without it each station has the chord of least drag for
    /// its lift
    #[arg(long)]
    cl: Option<f64>,
    /// Each station at its best incidence for its own Reynolds number
    #[arg(long, conflicts_with = "cl")]
    best_incidence: bool,
    /// Least chord, mm
    #[arg(long, value_name = "MM")]
    least_chord_mm: Option<f64>,
    /// Greatest chord, mm
    #[arg(long, value_name = "MM")]
    greatest_chord_mm: Option<f64>,
    /// Each station by itself, its lift not smoothed along the blade
    #[arg(long)]
    by_station: bool,
    /// No station more near the tip
    #[arg(long)]
    stations_as_drawn: bool,
    #[command(flatten)]
    print: Print,
}

pub(super) fn run(rig: &Rig, args: &Args) -> Outcome {
    let own = if args.best_incidence { Lift::BestIncidence } else { Lift::LeastDrag };
    let task = LossTask {
        point: point_index(rig, args.point.as_deref())?,
        wanted: args.thrust_n.map(Wanted::Thrust).or(args.power_w.map(Wanted::Power)),
        rpm: args.rpm,
        lift: args.cl.map_or(own, Lift::Coefficient),
        least_chord_m: args.least_chord_mm.map(|c| 1e-3 * c),
        greatest_chord_m: args.greatest_chord_mm.map(|c| 1e-3 * c),
        by_station: args.by_station,
        stations_as_drawn: args.stations_as_drawn,
    };
    told(shape::least_loss(rig, &task), &args.print, "least induced loss", text)
}

fn text(l: &LeastLoss) -> String {
    let header = ["r mm", "r/R", "chord mm", "angle °", "on the face °", "incidence °", "cl", "L/D", ""];
    format!(
        "Least induced loss at {}: {} km/h, {} rpm\n\
         designed: {} N, {} kW, efficiency {}; by blade elements there {} N, {} kW\n\n{}\n\n{}",
        l.flight_point,
        figure(Some(3.6 * l.airspeed_m_s), 1),
        figure(Some(l.rpm), 0),
        figure(Some(l.thrust_n), 1),
        figure(Some(1e-3 * l.power_w), 3),
        figure(Some(l.efficiency), 4),
        figure(Some(l.analysed_thrust_n), 1),
        figure(Some(1e-3 * l.analysed_power_w), 3),
        table(&header, l.stations.iter().map(row).collect()),
        compared(&l.flight_points)
    )
}

fn row(s: &LossStation) -> Vec<String> {
    let words = match s.bound {
        Bound::Free => "",
        Bound::LeastChord => "at the least chord",
        Bound::GreatestChord => "at the greatest chord",
        Bound::NearStall => "at the greatest chord, near stall",
    };
    vec![
        figure(Some(1e3 * s.radius_m), 1),
        figure(Some(s.radius_fraction), 3),
        figure(Some(1e3 * s.chord_m), 1),
        figure(Some(s.angle_deg), 2),
        figure(s.face_angle_deg, 2),
        figure(Some(s.angle_of_attack_deg), 2),
        figure(Some(s.cl), 3),
        figure(Some(s.lift_to_drag), 1),
        words.into(),
    ]
}
