//! The table of stations, tip on top as on the rack.

use std::rc::Rc;

use spokeshave::drawn::DrawnStation;
use spokeshave::job::AngleReference;
use spokeshave::result::PointResult;
use yew::prelude::*;

use super::head::TableHead;
use super::one_section;
use super::row::StationRow;
use crate::act::{Seen, use_act};
use crate::number::{figure, fixed, signed_or_none};
use crate::results::Compared;
use crate::state::choice::FEWEST_STATIONS;
use crate::state::{Action, Choice, Running};
use crate::units::Quantity;

/// Most flight points that get a column.
const MOST_COLUMNS: usize = 4;

/// Properties of [`StationTable`].
#[derive(Properties, PartialEq)]
pub struct StationTableProps {
    /// The state.
    pub state: Seen,
    /// The stations as drawn.
    pub drawn: Rc<Vec<DrawnStation>>,
    /// The flight point selected, worked out.
    pub point: Rc<Option<PointResult>>,
    /// Every flight point; may be a frame old.
    pub points: Vec<Rc<Option<PointResult>>>,
    /// The blade compared.
    #[prop_or_default]
    pub beside: Option<Rc<Compared>>,
}

/// Which columns of the table there are.
#[derive(Clone, Debug, PartialEq)]
pub struct Columns {
    /// Flight points with a departure column.
    pub points: Vec<usize>,
    /// Whether any station has a flat face.
    pub face: bool,
    /// Whether stations differ in section.
    pub sections: bool,
    /// Name of the blade compared.
    pub beside: Option<String>,
}

/// The table and what is done with its rows.
#[component]
pub fn StationTable(props: &StationTableProps) -> Html {
    let open = use_state_eq(|| false);
    let (state, job) = (&props.state, props.state.job());
    let columns = Columns {
        points: shown_points(job.flight_points.len(), state.point),
        face: props.drawn.iter().any(|d| d.face_angle_deg.is_some()),
        sections: *open || one_section(job).is_none(),
        beside: props.beside.as_ref().map(|b| b.name.clone()),
    };
    let departures = |i: usize| -> Vec<Option<f64>> {
        columns.points.iter().map(|&p| departure(result(props, p), i)).collect()
    };
    let rows = (0..props.drawn.len()).rev().map(|i| {
        html! {
            <StationRow key={i} index={i} state={state.clone()} drawn={props.drawn.clone()} columns={columns.clone()}
                departures={departures(i)} beside={beside(props, i)}
                now={departure(props.point.as_ref().as_ref(), i)} />
        }
    });
    let by_station = {
        let open = open.clone();
        Callback::from(move |_: MouseEvent| open.set(!*open))
    };
    html! {
        <>
            <div class="scroll" tabindex="0" role="region" aria-label="Stations">
                <table class="sheet-table station-table">
                    <TableHead columns={columns.clone()} state={state.clone()} />
                    <tbody>{ for rows }</tbody>
                </table>
            </div>
            <RowButtons state={state.clone()} />
            <p class="note">
                { "Boxed figures are yours to type in; a comma or a point is decimal, a unit may follow. " }
                if columns.face { { "“On face” is what a protractor reads on the flat face. " } }
                { match job.propeller.angle_reference {
                    AngleReference::ChordLine => {
                        "Angles are kept to the chord line, and pitch is reckoned from that. "
                    }
                    AngleReference::FlatFace => {
                        "Angles are kept as read on the flat face, and pitch is reckoned from that. "
                    }
                } }
                <span class="wide-only">
                    { "“To best” is the first turn towards the best angle; the inflow moves a little when the \
                       blade does. " }
                </span>
                if one_section(job).is_some() {
                    <button type="button" class="inline" onclick={by_station}>
                        { if *open { "Hide sections" } else { "Sections by station" } }
                    </button>
                }
            </p>
        </>
    }
}

/// The one selected is worked out first, so that its column never lags.
fn result(props: &StationTableProps, point: usize) -> Option<&PointResult> {
    if point == props.state.point {
        return props.point.as_ref().as_ref();
    }
    props.points.get(point)?.as_ref().as_ref()
}

fn departure(result: Option<&PointResult>, station: usize) -> Option<f64> {
    result?.stations.get(station)?.departure_deg
}

/// Chord, angle to the chord line and departure of the station of the blade compared.
fn beside(props: &StationTableProps, station: usize) -> Option<String> {
    let other = props.beside.as_ref()?;
    let drawn = other.drawn.get(station)?;
    let departure = departure(other.point.as_ref(), station);
    let chord = figure(props.state.units, Quantity::Length, Some(drawn.chord_m));
    Some(format!("{chord}, {}°, {}", fixed(drawn.angle_deg, 1), signed_or_none(departure, 1)))
}

/// The first few, and the one selected.
fn shown_points(count: usize, selected: usize) -> Vec<usize> {
    let mut shown: Vec<usize> = (0..count.min(MOST_COLUMNS)).collect();
    if selected >= shown.len() {
        shown.pop();
        shown.push(selected);
    }
    shown
}

#[derive(Properties, PartialEq)]
struct RowButtonsProps {
    state: Seen,
}

#[component]
fn RowButtons(props: &RowButtonsProps) -> Html {
    let act = use_act();
    let (i, count) = (props.state.station, props.state.job().propeller.stations.len());
    let choose =
        |choice: Choice| act.on(move |_: MouseEvent| Action::Choose(choice.clone(), Running::default()));
    html! {
        <p class="buttons">
            <button type="button" class="act" onclick={choose(Choice::AddStation(i))}>
                { format!("Add a station outward of {}", i + 1) }
            </button>
            <button type="button" class="act" disabled={count <= FEWEST_STATIONS}
                onclick={choose(Choice::RemoveStation(i))}>
                { format!("Remove station {}", i + 1) }
            </button>
        </p>
    }
}

#[cfg(test)]
mod tests {
    use super::shown_points;

    #[test]
    fn the_point_selected_always_has_a_column() {
        assert_eq!(shown_points(3, 1), [0, 1, 2]);
        assert_eq!(shown_points(9, 7), [0, 1, 2, 7]);
    }
}
