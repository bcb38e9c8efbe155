//! The figures of a flight point that decide, each with its gauge.

use spokeshave::job::Limits;
use spokeshave::result::{Note, PointResult, StationResult};

use super::Cell;
use super::gauge::{Allowed, Gauge};
use crate::number::{NO_FIGURE, figure, fixed, fixed_or_none, signed, with_unit};
use crate::units::{Quantity, Units};

/// What the figures are held against.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Against {
    /// Limits that the user set.
    pub limits: Limits,
    /// The engine's limit, propeller rpm.
    pub engine_rpm: Option<f64>,
    /// Whether the weight hangs on the thrust, not on a wing.
    pub hovers: bool,
}

/// The figures in the order shown.
pub(super) fn cells(units: Units, r: &PointResult, against: &Against) -> Vec<Cell> {
    let f = &r.figures;
    let of = |name, quantity, value, more| Cell {
        name,
        figure: figure(units, quantity, value),
        unit: units.symbol(quantity),
        more,
        gauge: None,
    };
    let torque = format!("torque {}", with_unit(units, Quantity::Torque, f.torque_n_m));
    let several = f.thrust_n.zip(r.meeting.total_thrust_n).is_some_and(|(one, all)| all > 1.5 * one);
    let name = if several { "Thrust of one" } else { "Thrust" };
    let thrust =
        of(name, Quantity::Force, f.thrust_n, format!("thrust coefficient {}", fixed_or_none(f.ct, 4)));
    let power = of("Shaft power", Quantity::Power, f.power_w, torque);
    vec![
        efficiency(r),
        Cell { gauge: thrust_gauge(units, r, against.hovers), ..thrust },
        Cell { gauge: power_gauge(units, r), ..power },
        rpm(units, r, against),
        tip_mach(r, against),
        departure(r),
        Cell {
            name: "Blade angle at 0.75 R",
            figure: f.blade_angle_075_deg.map_or_else(|| NO_FIGURE.into(), |a| format!("{}°", fixed(a, 1))),
            more: format!("pitch {}", with_unit(units, Quantity::Length, f.geometric_pitch_m)),
            ..Cell::default()
        },
        of(
            "Slip",
            Quantity::Share,
            f.slip,
            format!("advance {} a turn", with_unit(units, Quantity::Length, f.effective_pitch_m)),
        ),
    ]
}

/// Thrust against what level flight, or holding the weight, asks of one propeller.
fn thrust_gauge(units: Units, r: &PointResult, hovers: bool) -> Option<Gauge> {
    let (thrust_n, all_n, asked_n) = (r.figures.thrust_n?, r.meeting.total_thrust_n?, r.meeting.asked_n?);
    let least = asked_n * thrust_n / all_n;
    let words = format!(
        "{} asks {}",
        if hovers { "holding the weight" } else { "level flight" },
        with_unit(units, Quantity::Force, Some(least))
    );
    // Level flight gives what is asked, but for the last digit of the solve.
    Gauge::of(thrust_n, Allowed { least: Some(least * (1.0 - 1e-6)), most: None }, words)
}

/// Power against what the engine gives at these revolutions.
fn power_gauge(units: Units, r: &PointResult) -> Option<Gauge> {
    let most = r.meeting.available_power_w?;
    let words = format!("the engine gives {} here", with_unit(units, Quantity::Power, Some(most)));
    Gauge::of(r.figures.power_w?, Allowed { least: None, most: Some(most * (1.0 + 1e-6)) }, words)
}

/// Revolutions against the engine's limit and those of the user, of which the tightest counts.
fn rpm(units: Units, r: &PointResult, against: &Against) -> Cell {
    let own = || against.limits.rpm.iter().filter(|own| own.flight_point == r.name);
    let tightest = |all: &mut dyn Iterator<Item = f64>| all.reduce(f64::min);
    let most =
        tightest(&mut own().filter_map(|o| o.most).chain(against.limits.rpm_most).chain(against.engine_rpm));
    let least = own().filter_map(|o| o.least).reduce(f64::max);
    let torn = most.zip(least).is_some_and(|(most, least)| most < least);
    let allowed = Allowed { least: least.filter(|_| !torn), most };
    let told = |v| with_unit(units, Quantity::Rpm, v);
    let words = match (least, most) {
        (Some(_), Some(_)) if torn => {
            format!("at least {} and at most {}: none keeps both", told(least), told(most))
        }
        (Some(_), Some(_)) => format!("{} to {} allowed", told(least), told(most)),
        (Some(_), None) => format!("at least {}", told(least)),
        _ => format!("at most {}", told(most)),
    };
    let geared = r.meeting.engine_rpm.filter(|e| r.rpm.is_some_and(|rpm| (e - rpm).abs() > 0.5));
    let more = match geared {
        Some(engine) => format!("engine {}", told(Some(engine))),
        None if allowed != Allowed::default() => words.clone(),
        None => "turns in a minute".into(),
    };
    Cell {
        name: "Propeller",
        figure: figure(units, Quantity::Rpm, r.rpm),
        unit: units.symbol(Quantity::Rpm),
        more,
        gauge: r.rpm.and_then(|rpm| Gauge::of(rpm, allowed, words)),
    }
}

fn tip_mach(r: &PointResult, against: &Against) -> Cell {
    let most = against.limits.tip_mach_most;
    let words = format!("at most {}", fixed_or_none(most, 2));
    let more = if r.notes.contains(&Note::MachNotReliable) {
        "too fast to be relied on".into()
    } else if most.is_some() {
        words.clone()
    } else {
        "of the speed of sound".into()
    };
    Cell {
        name: "Tip Mach number",
        figure: fixed_or_none(r.figures.tip_mach, 2),
        more,
        gauge: r.figures.tip_mach.and_then(|mach| Gauge::of(mach, Allowed { least: None, most }, words)),
        ..Cell::default()
    }
}

fn efficiency(r: &PointResult) -> Cell {
    let f = &r.figures;
    let (name, value) = match f.figure_of_merit {
        Some(merit) => ("Figure of merit", Some(merit)),
        None => ("Efficiency", f.efficiency),
    };
    let advance = fixed_or_none(f.advance_ratio, 2);
    let figure = fixed_or_none(value, 2);
    let more = match (value, f.thrust_n) {
        (None, Some(t)) if t <= 0.0 => "no thrust to speak of".into(),
        _ => format!("advance ratio {advance}"),
    };
    Cell { name, figure, more, ..Cell::default() }
}

fn departure(r: &PointResult) -> Cell {
    let worst = r
        .stations
        .iter()
        .enumerate()
        .filter_map(|(i, s)| Some((i, s.departure_deg?)))
        .max_by(|a, b| a.1.abs().total_cmp(&b.1.abs()));
    let inside = r.stations.iter().filter(|s| inside_band(s) == Some(true)).count();
    let gauge = worst.and_then(|(i, departure)| {
        let (least, most) = (r.stations[i].band_low_deg, r.stations[i].band_high_deg);
        let words = format!("the working band of station {}", i + 1);
        Gauge::of(departure, Allowed { least: Some(least?), most: Some(most?) }, words)
    });
    Cell {
        name: "Worst departure",
        figure: worst.map_or_else(|| NO_FIGURE.into(), |w| format!("{}°", signed(w.1, 1))),
        unit: "",
        more: worst.map_or_else(String::new, |w| {
            format!("station {}; {inside} of {} in the band", w.0 + 1, r.stations.len())
        }),
        gauge,
    }
}

/// Whether a station works inside its working band.
#[must_use]
pub fn inside_band(s: &StationResult) -> Option<bool> {
    Some((s.band_low_deg?..=s.band_high_deg?).contains(&s.departure_deg?))
}

#[cfg(test)]
mod tests {
    use super::*;
    use spokeshave::job::{DEMOS, Job};
    use spokeshave::result::State as Answer;
    use spokeshave::rig::Rig;

    #[test]
    fn no_cell_is_empty_at_rest_or_in_flight() {
        for demo in DEMOS {
            let job = Job::from_json(demo.json).unwrap();
            for result in Rig::new(&job).unwrap().analysis().flight_points {
                if result.state == Answer::Ok {
                    for cell in cells(Units::default(), &result, &Against::default()) {
                        assert!(cell.figure.chars().any(|c| c.is_ascii_digit()), "{}: {cell:?}", result.name);
                    }
                }
            }
        }
    }

    #[test]
    fn limits_of_the_user_show_at_the_figure_they_bound() {
        let job = Job::from_json(DEMOS[0].json).unwrap();
        let result = Rig::new(&job).unwrap().point(2).unwrap();
        let (rpm, mach) = (result.rpm.unwrap(), result.figures.tip_mach.unwrap());
        let past = |rpm_most: f64, tip_mach_most: f64| {
            let limits =
                Limits { rpm_most: Some(rpm_most), tip_mach_most: Some(tip_mach_most), ..Limits::default() };
            let cells = cells(
                Units::default(),
                &result,
                &Against { limits, engine_rpm: Some(9000.0), hovers: false },
            );
            [3, 4].map(|i: usize| cells[i].gauge.as_ref().unwrap().is_past())
        };
        assert_eq!(past(rpm - 10.0, mach + 0.01), [true, false]);
        assert_eq!(past(rpm + 10.0, mach - 0.01), [false, true]);
    }
}
