//! Twist, chord and thickness as curves over radius, with a green ring at each station to drag or to move by keys.

pub mod curve;
pub mod frame;
pub mod lines;
pub mod pull;

use std::rc::Rc;

use spokeshave::drawn::DrawnStation;
use spokeshave::result::PointResult;
use yew::prelude::*;

use crate::app::RigRef;
use crate::state::{Action, Measure, drawn};
use crate::units::Quantity;
use crate::view::form::Pick;
use crate::view::{Seen, use_act};
use curve::DragCurve;
use lines::{Best, best_angles, chord, thickness, twist};

/// Properties of [`Curves`].
#[derive(Properties, PartialEq)]
pub struct CurvesProps {
    /// The state.
    pub state: Seen,
    /// The stations as drawn.
    pub drawn: Rc<Vec<DrawnStation>>,
    /// The flight point selected, worked out.
    pub point: Rc<Option<PointResult>>,
    /// The job made ready.
    pub rig: Option<RigRef>,
}

/// The curves and how far neighbours follow.
#[component]
pub fn Curves(props: &CurvesProps) -> Html {
    let Some(rig) = &props.rig else { return html! {} };
    let (state, blade) = (&props.state, &rig.0.rotor.blade);
    // While a ring is held the axes stand still, or the ring would run from the pointer.
    let start = state.drag.as_ref().map(|d| Rc::new(drawn(&d.start)));
    let still = start.unwrap_or_else(|| props.drawn.clone());
    let length = state.units.unit(Quantity::Length);
    let name = state.job().flight_points.get(state.point).map_or("", |p| p.name.as_str());
    let best = Best {
        name: format!("best at {name}, and its working band"),
        points: best_angles(&props.drawn, &props.point),
    };
    html! {
        <div class="curves">
            <DragCurve title="Blade angle" what="degrees to the chord line" measures={vec![Measure::Angle]}
                lines={vec![twist(blade)]} best={best} drawn={props.drawn.clone()} still={still.clone()}
                length={length} selected={state.station} held={held(state, &[Measure::Angle])} height={196.0} />
            <DragCurve title="Chord and thickness" what={length.name} measures={vec![Measure::Chord, Measure::Thickness]}
                lines={vec![chord(blade), thickness(blade)]} drawn={props.drawn.clone()} {still}
                length={length} selected={state.station} held={held(state, &[Measure::Chord, Measure::Thickness])} height={176.0} />
            <Follow span={state.follow} />
        </div>
    }
}

fn held(state: &Seen, measures: &[Measure]) -> bool {
    state.drag.as_ref().is_some_and(|d| measures.contains(&d.measure))
}

#[derive(Properties, PartialEq)]
struct FollowProps {
    span: usize,
}

#[component]
fn Follow(props: &FollowProps) -> Html {
    let act = use_act();
    let words = |n: usize| match n {
        0 => "none".to_string(),
        1 => "1 on either side".to_string(),
        n => format!("{n} on either side"),
    };
    let options: Vec<AttrValue> = (0..=5).map(|n| words(n).into()).collect();
    html! {
        <div class="follow">
            <Pick label="Neighbours that follow" {options} picked={Some(props.span)} onpick={act.on(Action::Follow)} />
            <p class="note">
                { "Drag a ring, or press ↑ ↓ on it: 0.1° or 0.5 mm, with Shift ten times finer. ← → go to the next ring, Esc puts it back." }
            </p>
        </div>
    }
}
