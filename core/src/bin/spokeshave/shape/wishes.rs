//! Wishes on the command line, put over those of the job file.

use std::str::FromStr;

use spokeshave::job::{Aim, Held, Limits, RpmLimit, Wishes};
use spokeshave::rig::Rig;

use super::figures::{NAMES, figure_named};
use crate::input::{Stop, point_index};

/// Limits of the finished propeller; each takes the place of the job file's.
#[derive(clap::Args)]
pub(super) struct LimitArgs {
    /// Greatest propeller rpm at any flight point
    #[arg(long, value_name = "RPM")]
    rpm_most: Option<f64>,
    /// Propeller rpm at one flight point, from the least to the greatest; either may be left out
    #[arg(long, value_name = "POINT=LEAST..MOST")]
    rpm: Vec<RpmSpan>,
    /// Least propeller rpm standing at full throttle
    #[arg(long, value_name = "RPM")]
    standing_rpm_least: Option<f64>,
    /// Greatest helical Mach number of the tip
    #[arg(long, value_name = "MACH")]
    tip_mach_most: Option<f64>,
    /// Greatest diameter, mm
    #[arg(long, value_name = "MM")]
    diameter_most_mm: Option<f64>,
    /// Height of the shaft above the ground, mm
    #[arg(long, value_name = "MM")]
    shaft_height_mm: Option<f64>,
    /// What is to be left between tip and ground, mm
    #[arg(long, value_name = "MM")]
    ground_clearance_mm: Option<f64>,
    /// Width of the blank that blades and boss need, mm
    #[arg(long, value_name = "MM")]
    blank_width_mm: Option<f64>,
    /// Thickness of the blank that blades and boss need, mm
    #[arg(long, value_name = "MM")]
    blank_thickness_mm: Option<f64>,
    /// Least stress margin, limit over stress less 1; needs a job that names its wood
    #[arg(long, value_name = "MARGIN")]
    stress_margin_least: Option<f64>,
}

/// `POINT=LEAST..MOST`.
#[derive(Clone)]
struct RpmSpan(RpmLimit);

impl FromStr for RpmSpan {
    type Err = String;

    fn from_str(text: &str) -> Result<Self, String> {
        let wrong = || "allowed is POINT=LEAST..MOST, such as Cruise=2200..2600 or Climb=..2900".to_string();
        let (name, span) = text.rsplit_once('=').ok_or_else(wrong)?;
        let (least, most) = span.split_once("..").ok_or_else(wrong)?;
        let number = |s: &str| match s.trim() {
            "" => Ok(None),
            s => s.parse().map(Some).map_err(|_| wrong()),
        };
        let (least, most) = (number(least)?, number(most)?);
        Ok(Self(RpmLimit { flight_point: name.trim().into(), least, most }))
    }
}

impl LimitArgs {
    /// The job's limits with these in their place.
    pub(super) fn over(&self, rig: &Rig) -> Result<Limits, Stop> {
        let own = rig.job.wishes.clone().unwrap_or_default().limits;
        let mm = |value: Option<f64>, own: Option<f64>| value.map(|v| 1e-3 * v).or(own);
        let mut limits = Limits {
            rpm_most: self.rpm_most.or(own.rpm_most),
            standing_rpm_least: self.standing_rpm_least.or(own.standing_rpm_least),
            tip_mach_most: self.tip_mach_most.or(own.tip_mach_most),
            diameter_most_m: mm(self.diameter_most_mm, own.diameter_most_m),
            shaft_height_m: mm(self.shaft_height_mm, own.shaft_height_m),
            ground_clearance_m: mm(self.ground_clearance_mm, own.ground_clearance_m),
            blank_width_most_m: mm(self.blank_width_mm, own.blank_width_most_m),
            blank_depth_most_m: mm(self.blank_thickness_mm, own.blank_depth_most_m),
            stress_margin_least: self.stress_margin_least.or(own.stress_margin_least),
            rpm: own.rpm,
        };
        for RpmSpan(span) in &self.rpm {
            let index = point_index(rig, Some(&span.flight_point))?;
            let flight_point = rig.job.flight_points[index].name.clone();
            limits.rpm.retain(|l| l.flight_point != flight_point);
            limits.rpm.push(RpmLimit { flight_point, ..span.clone() });
        }
        checked(rig, &Wishes { limits: limits.clone(), ..Wishes::default() })?;
        Ok(limits)
    }
}

/// Refused where the job file's check would.
fn checked(rig: &Rig, wishes: &Wishes) -> Result<(), Stop> {
    let mut job = rig.job.clone();
    job.wishes = Some(wishes.clone());
    match job.check() {
        problems if problems.is_empty() => Ok(()),
        problems => Err(Stop::bad(problems.iter().map(ToString::to_string).collect::<Vec<_>>().join("\n"))),
    }
}

/// `POINT:FIGURE`, `POINT:FIGURE=WEIGHT`.
pub(super) fn aim(rig: &Rig, text: &str) -> Result<Aim, Stop> {
    let wrong = || Stop::bad(format!("--aim: {text}; allowed is POINT:FIGURE or POINT:FIGURE=WEIGHT"));
    let (point, rest) = text.rsplit_once(':').ok_or_else(wrong)?;
    let (name, weight) = rest.split_once('=').unwrap_or((rest, "1"));
    let index = point_index(rig, Some(point.trim()))?;
    let figure = figure_named(name.trim())
        .ok_or_else(|| Stop::bad(format!("--aim: {name}; allowed are {}", NAMES.join(", "))))?;
    let weight = weight.trim().parse().map_err(|_| wrong())?;
    let aim = Aim { flight_point: rig.job.flight_points[index].name.clone(), figure, weight };
    checked(rig, &Wishes { aims: vec![aim.clone()], ..Wishes::default() })?;
    Ok(aim)
}

/// What stays as drawn.
pub(super) fn held(text: &str) -> Result<Held, String> {
    let value = serde_json::Value::String(text.to_lowercase());
    serde_json::from_value(value).map_err(|_| "allowed are diameter, pitch, twist, chord".into())
}
