//! The few figures that decide, for the flight point selected.

use spokeshave::result::{Note, PointResult, State as Answer, StationResult};
use std::rc::Rc;
use yew::prelude::*;

use crate::app::Compared;

use crate::number::{NO_FIGURE, figure, fixed, fixed_or_none, signed, with_unit};
use crate::units::{Quantity, Units};

/// A figure that decides.
#[derive(Clone, Debug, PartialEq)]
pub struct Cell {
    /// What it is.
    pub name: &'static str,
    /// The figure.
    pub figure: String,
    /// Its unit; empty where there is none.
    pub unit: &'static str,
    /// A line under it.
    pub more: String,
}

impl Cell {
    /// The figure large under its name.
    pub fn item(self) -> Html {
        self.beside(None)
    }

    /// The same with the figure of the blade compared in grey.
    fn beside(self, other: Option<String>) -> Html {
        html! {
            <li>
                <span class="verdict-name">{ self.name }</span>
                <span class="verdict-figure"><b>{ self.figure }</b>
                    if !self.unit.is_empty() { <span class="unit">{ self.unit }</span> }
                </span>
                if let Some(other) = other {
                    <span class="verdict-beside"><span class="unseen">{ "Compared: " }</span>{ other }</span>
                }
                <span class="verdict-more">{ self.more }</span>
            </li>
        }
    }
}

/// Properties of [`Verdict`].
#[derive(Properties, PartialEq)]
pub struct VerdictProps {
    /// The flight point worked out.
    pub result: PointResult,
    /// Units shown.
    pub units: Units,
    /// The blade compared: its name and the same flight point.
    #[prop_or_default]
    pub beside: Option<Rc<Compared>>,
}

/// The figures in a row; a sentence where there is no answer.
#[component]
pub fn Verdict(props: &VerdictProps) -> Html {
    let result = &props.result;
    if result.state != Answer::Ok {
        return html! {
            <section class="verdict-none" aria-label="Verdict">
                <b>{ format!("{}: no answer. ", result.name) }</b>{ result.state.sentence() }
                { " " }<a href="#points">{ "Set it another way" }</a>
            </section>
        };
    }
    let others = props.beside.as_ref().map(|beside| others(props.units, beside.point.as_ref()));
    let cells = cells(props.units, result).into_iter().enumerate().map(|(i, cell)| {
        let other =
            others.as_ref().map(|all| all.get(i).map_or_else(|| NO_FIGURE.into(), |o| o.figure.clone()));
        cell.beside(other)
    });
    html! {
        <section aria-label={format!("Verdict at {}", result.name)}>
            <ul class="verdict">{ for cells }</ul>
            if let Some(beside) = &props.beside {
                <p class="verdict-notes">{ format!("Grey: {}. ", beside.name) }<a href="#shape">{ "Compare another" }</a></p>
            }
            <Notes notes={result.notes.clone()} />
        </section>
    }
}

/// The figures of the blade compared; none without an answer.
fn others(units: Units, beside: Option<&PointResult>) -> Vec<Cell> {
    beside.filter(|r| r.state == Answer::Ok).map_or_else(Vec::new, |r| cells(units, r))
}

#[derive(Properties, PartialEq)]
struct NotesProps {
    notes: Vec<Note>,
}

/// What is worth knowing of the figures, with the way to where it holds.
#[component]
fn Notes(props: &NotesProps) -> Html {
    if props.notes.is_empty() {
        return html! {};
    }
    let words: Vec<&str> = props.notes.iter().map(|n| n.words()).collect();
    html! {
        <p class="verdict-notes">
            { format!("Worth knowing somewhere on the blade: {}. ", words.join("; ")) }<a href="#method">{ "Where" }</a>
        </p>
    }
}

/// The same figures in brief, for under the blade where they stay in sight.
#[component]
pub fn Brief(props: &VerdictProps) -> Html {
    if props.result.state != Answer::Ok {
        return html! {};
    }
    let rows = cells(props.units, &props.result).into_iter().map(|cell| {
        html! { <li><span>{ cell.name }</span><b>{ format!("{} {}", cell.figure, cell.unit) }</b></li> }
    });
    html! { <ul class="brief" aria-hidden="true">{ for rows }</ul> }
}

fn cells(units: Units, r: &PointResult) -> Vec<Cell> {
    let f = &r.figures;
    let of = |name, quantity, value, more| Cell {
        name,
        figure: figure(units, quantity, value),
        unit: units.symbol(quantity),
        more,
    };
    let plain = |name, value: Option<f64>, decimals, more| Cell {
        name,
        figure: fixed_or_none(value, decimals),
        unit: "",
        more,
    };
    let torque = format!("torque {}", with_unit(units, Quantity::Torque, f.torque_n_m));
    vec![
        efficiency(r),
        of("Thrust", Quantity::Force, f.thrust_n, format!("thrust coefficient {}", fixed_or_none(f.ct, 4))),
        of("Shaft power", Quantity::Power, f.power_w, torque),
        plain("Tip Mach number", f.tip_mach, 2, mach_words(units, r)),
        departure(r),
        Cell {
            name: "Blade angle at 0.75 R",
            figure: f.blade_angle_075_deg.map_or_else(|| NO_FIGURE.into(), |a| format!("{}°", fixed(a, 1))),
            unit: "",
            more: format!("pitch {}", with_unit(units, Quantity::Length, f.geometric_pitch_m)),
        },
        of(
            "Slip",
            Quantity::Share,
            f.slip,
            format!("advance {} a turn", with_unit(units, Quantity::Length, f.effective_pitch_m)),
        ),
    ]
}

fn mach_words(units: Units, r: &PointResult) -> String {
    if r.notes.contains(&Note::MachNotReliable) {
        return "too fast to be relied on".into();
    }
    format!("at {}", with_unit(units, Quantity::Rpm, r.rpm))
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
    Cell { name, figure, unit: "", more }
}

fn departure(r: &PointResult) -> Cell {
    let worst = r
        .stations
        .iter()
        .enumerate()
        .filter_map(|(i, s)| Some((i, s.departure_deg?)))
        .max_by(|a, b| a.1.abs().total_cmp(&b.1.abs()));
    let inside = r.stations.iter().filter(|s| inside_band(s) == Some(true)).count();
    Cell {
        name: "Worst departure",
        figure: worst.map_or_else(|| NO_FIGURE.into(), |w| format!("{}°", signed(w.1, 1))),
        unit: "",
        more: worst.map_or_else(String::new, |w| {
            format!("station {}; {inside} of {} in the band", w.0 + 1, r.stations.len())
        }),
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
    use spokeshave::rig::Rig;

    #[test]
    fn no_cell_is_empty_at_rest_or_in_flight() {
        for demo in DEMOS {
            let job = Job::from_json(demo.json).unwrap();
            for result in Rig::new(&job).unwrap().analysis().flight_points {
                if result.state == Answer::Ok {
                    for cell in cells(Units::default(), &result) {
                        assert!(cell.figure.chars().any(|c| c.is_ascii_digit()), "{}: {cell:?}", result.name);
                    }
                }
            }
        }
    }
}
