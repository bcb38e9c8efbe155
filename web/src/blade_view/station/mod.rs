//! One station at one flight point: in a sentence, as the air meets it, and in figures.

mod facts;
mod ledger;
mod lift_drag;
mod rays;
mod section;
mod sentence;
mod triangle;

pub use sentence::sentence;

use crate::chart::number::fixed;
use crate::chart::unit::Unit;
use crate::chart::width::use_width;
use spokeshave::result::StationResult;
use std::rc::Rc;
use yew::prelude::*;

/// Properties of [`StationCard`].
#[derive(Properties, PartialEq)]
pub struct StationCardProps {
    /// The station at the flight point shown.
    pub station: StationResult,
    /// Its index, hub first.
    pub index: usize,
    /// How many stations there are.
    pub count: usize,
    /// Airspeed, m/s, when the flight point has an answer.
    pub airspeed_m_s: Option<f64>,
    /// Rotation of the propeller, rpm, when the flight point has an answer.
    pub rpm: Option<f64>,
    /// The section's outline in chords: along from the leading edge, and up. Empty when it is not known.
    #[prop_or_default]
    pub outline: Rc<Vec<[f64; 2]>>,
    /// Lift-to-drag (second) over the angle of attack in degrees (first), as it is here.
    #[prop_or_default]
    pub lift_to_drag: Rc<Vec<[f64; 2]>>,
    /// Unit of length.
    pub length: Unit,
    /// Unit of speed.
    pub speed: Unit,
    /// Unit of thrust for a length of radius.
    pub thrust: Unit,
    /// Unit of torque for a length of radius.
    pub torque: Unit,
    /// Told the index of the station to show.
    pub on_select: Callback<usize>,
}

/// The station in detail.
#[component]
pub fn StationCard(props: &StationCardProps) -> Html {
    let (node, width) = use_width(424.0);
    let station = &props.station;
    html! {
        <article class="station-card" ref={node} aria-label={format!("Station {}", props.index + 1)}>
            { header(props) }
            <p class="station-says" role="status">{ sentence(station) }</p>
            <triangle::Triangle station={station.clone()} airspeed_m_s={props.airspeed_m_s} rpm={props.rpm}
                speed={props.speed} {width} />
            <div class="station-two">
                <section::Section station={station.clone()} outline={props.outline.clone()} length={props.length}
                    width={(0.55 * width - 6.0).floor()} />
                { ledger::ledger(station) }
            </div>
            <lift_drag::LiftDrag station={station.clone()} curve={props.lift_to_drag.clone()} />
            { facts::facts(station, props.thrust, props.torque) }
        </article>
    }
}

fn header(props: &StationCardProps) -> Html {
    let s = &props.station;
    let place =
        format!("{} from the centre, {} R", props.length.short(s.radius_m), fixed(s.radius_fraction, 2));
    let step = |to: Option<usize>, sign: &'static str, name: &'static str| {
        let select = props.on_select.clone();
        let onclick = Callback::from(move |_: MouseEvent| to.into_iter().for_each(|i| select.emit(i)));
        html! {
            <button type="button" {onclick} disabled={to.is_none()} aria-label={name} title={name}>{ sign }</button>
        }
    };
    let outward = Some(props.index + 1).filter(|i| *i < props.count);
    html! {
        <header>
            <h3>{ format!("Station {}", props.index + 1) }</h3>
            <p>{ place }</p>
            <div class="station-step">
                { step(outward, "▲", "Next station outward") }
                { step(props.index.checked_sub(1), "▼", "Next station inward") }
            </div>
        </header>
    }
}
