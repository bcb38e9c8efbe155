//! The As carved panel: readings typed at the bench, what they say, and what to take off.

mod entry;
mod found;
mod sheet;
mod take_off;

use std::rc::Rc;

use spokeshave::job::AngleReference;
use spokeshave::result::Doubt;
use yew::prelude::*;

use super::caution;
use crate::act::{Act, Seen, use_act};
use crate::form::Pick;
use crate::number::fixed;
use crate::results::CarvedFound;
use crate::results::RigRef;
use crate::state::{Action, CarvedChoice, Choice, Running, State};
use entry::BladeEntry;
use found::{Balance, Differences, Holds, Points};
use sheet::ReadingsSheet;
use take_off::TakeOffSheet;
pub use take_off::table as take_off;

/// Properties of [`CarvedPanel`].
#[derive(Properties, PartialEq)]
pub struct CarvedPanelProps {
    /// The state.
    pub state: Seen,
    /// What the readings say; may be a frame old, not there before it is worked out.
    pub found: Option<Rc<Result<CarvedFound, String>>>,
    /// The job made ready; may be a frame old.
    pub rig: Option<RigRef>,
}

/// Whether the panel shows the same of two states.
#[must_use]
pub fn same_carved(a: &State, b: &State) -> bool {
    a.job().carved == b.job().carved
        && a.job().propeller == b.job().propeller
        && a.job().flight_points == b.job().flight_points
        && a.drafts == b.drafts
        && (a.point, a.units) == (b.point, b.units)
}

/// The carved blades in a line.
#[must_use]
pub fn in_a_line(state: &State, found: Option<&Result<CarvedFound, String>>) -> String {
    let readings: usize =
        state.job().carved.iter().flat_map(|c| &c.blades).map(|blade| blade.readings.len()).sum();
    if readings == 0 {
        return "measure each blade: angle, chord, thickness".into();
    }
    let count = if readings == 1 { "1 reading".into() } else { format!("{readings} readings") };
    let Some(Ok(found)) = found else { return count };
    let stations = found.carved.blades.iter().flat_map(|b| &b.stations);
    let worst = stations.map(|s| s.angle_deg.from_drawn.abs()).fold(0.0, f64::max);
    let b = &found.carved.balance;
    let balance = format!("balance: {}", b.says());
    let strength = match &found.carved.strength {
        Some(s) if s.margin < 0.0 => "; not strong enough",
        _ => "",
    };
    let left_out = found.carved.doubts.iter().filter(|d| !d.counted).count();
    let doubted =
        if left_out > 0 { format!("; hard to believe and left out: {left_out}") } else { String::new() };
    format!("{count}; up to {}° from the drawing; {balance}{strength}{doubted}", fixed(worst, 1))
}

/// What a choice about the blades does.
fn choose<T: 'static>(act: &Act, make: impl Fn(T) -> CarvedChoice + 'static) -> Callback<T> {
    act.on(move |what: T| Action::Choose(Choice::Carved(make(what)), Running::default()))
}

/// Boxes for every blade, then what they say.
#[component]
pub fn CarvedPanel(props: &CarvedPanelProps) -> Html {
    const REFERENCES: [AngleReference; 2] = [AngleReference::FlatFace, AngleReference::ChordLine];
    let (act, state) = (use_act(), &props.state);
    let job = state.job();
    let reference = job.carved.as_ref().map_or(AngleReference::FlatFace, |c| c.angle_reference);
    let pick = choose(&act, |i: usize| CarvedChoice::Reference(REFERENCES[i.min(1)]));
    let doubts = props.rig.as_ref().map_or_else(Vec::new, |rig| spokeshave::carved::doubts(&rig.0));
    let blades = (0..job.propeller.blades as usize).map(|blade| {
        let doubts: Vec<Doubt> = doubts.iter().filter(|d| d.blade == blade + 1).cloned().collect();
        html! { <BladeEntry key={blade} {blade} {doubts} state={state.clone()} /> }
    });
    html! {
        <div class="carved">
            <p class="note">
                { "Type what the protractor and the callipers read; leave empty what was not measured. \
                   Enter goes down the column. An angle may be in decimals or in degrees and minutes, 18 30 \
                   or 18..30. Track is how far the blade lies ahead of the plane of the hub, less than \
                   nothing where it lies behind. Between readings the difference from the drawing is \
                   interpolated." }
            </p>
            <div class="settings unprinted">
                <Pick label="Angles read" options={vec!["on the flat face".into(), "to the chord line".into()]}
                    picked={REFERENCES.iter().position(|r| *r == reference)} onpick={pick} />
            </div>
            <div class={classes!("carved-blades", job.carved.is_none().then_some("unprinted"))}>{ for blades }</div>
            <ReadingsSheet state={state.clone()} />
            { results(props) }
        </div>
    }
}

fn results(props: &CarvedPanelProps) -> Html {
    if props.state.job().carved.is_none() {
        return html! {};
    }
    let found = match props.found.as_deref() {
        None => {
            return html! {
                <p class="note" aria-busy="true">{ "The readings are worked out while this panel is open." }</p>
            };
        }
        Some(Err(why)) => return html! { <p class="note">{ format!("Nothing yet: {why}.") }</p> },
        Some(Ok(found)) => Rc::new(found.clone()),
    };
    let units = props.state.units;
    html! {
        <>
            <Differences found={found.clone()} {units} />
            <Points found={found.clone()} {units} />
            <Balance found={found.clone()} {units} />
            <Holds found={found.clone()} {units} />
            <TakeOffSheet {found} {units} />
            { caution::carved() }
        </>
    }
}
