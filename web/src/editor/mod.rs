//! Twist, chord and thickness as curves over radius, with a green ring at each station to drag or to move by
//! keys.

pub mod curve;
pub mod frame;
pub mod lines;
pub mod pull;
pub mod ring;

use std::rc::Rc;

use spokeshave::blade::Blade;
use spokeshave::drawn::DrawnStation;
use spokeshave::result::PointResult;
use yew::prelude::*;

use crate::act::{Seen, use_act};
use crate::form::Pick;
use crate::number::fixed;
use crate::results::{Compared, RigRef};
use crate::state::{Action, Measure};
use crate::units::{Quantity, Units};
use curve::DragCurve;
use frame::Spans;
use lines::{Best, Line, best_angles, chord, thickness, twist};

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
    /// The blade compared.
    #[prop_or_default]
    pub beside: Option<Rc<Compared>>,
}

const ANGLE: &[Measure] = &[Measure::Angle];
const WOOD: &[Measure] = &[Measure::Chord, Measure::Thickness];

/// The curves and how far neighbours follow.
#[component]
pub fn Curves(props: &CurvesProps) -> Html {
    let spans = use_mut_ref(|| None::<[Spans; 2]>);
    let Some(rig) = &props.rig else { return html! {} };
    let (state, blade) = (&props.state, &rig.0.rotor.blade);
    let best = best(props);
    // While a ring is held the axes stand still, or the ring would run from the pointer.
    let held = if state.drag.is_some() { *spans.borrow() } else { None };
    let now = held.unwrap_or_else(|| {
        [Spans::of(&props.drawn, ANGLE, &best), Spans::of(&props.drawn, WOOD, &Best::default())]
    });
    *spans.borrow_mut() = Some(now);
    let length = state.units.unit(Quantity::Length);
    let other = props.beside.as_ref().map(|b| &b.rig.0.rotor.blade);
    let ghosts = |of: &[fn(&Blade) -> Line]| -> Vec<Line> {
        other.into_iter().flat_map(|blade| of.iter().map(move |line| line(blade))).collect()
    };
    html! {
        <div class="curves">
            <DragCurve title="Blade angle" what="degrees to the chord line" measures={ANGLE}
                lines={vec![twist(blade)]} {best} ghosts={ghosts(&[twist])}
                rings={rings(&props.drawn, ANGLE)} spans={now[0]} {length} selected={state.station} height={196.0} />
            <DragCurve title="Chord and thickness" what={length.name} measures={WOOD}
                lines={vec![chord(blade), thickness(blade)]} ghosts={ghosts(&[chord, thickness])}
                rings={rings(&props.drawn, WOOD)} spans={now[1]} {length} selected={state.station} height={176.0} />
            <Follow span={state.follow} units={state.units} />
        </div>
    }
}

fn best(props: &CurvesProps) -> Best {
    let state = &props.state;
    let name = state.job().flight_points.get(state.point).map_or("", |p| p.name.as_str());
    Best {
        name: format!("best at {name}, and its working band"),
        points: best_angles(&props.drawn, &props.point),
    }
}

/// Radius and figure of each station, for each measure.
fn rings(drawn: &[DrawnStation], measures: &[Measure]) -> Vec<Vec<[f64; 2]>> {
    let of = |m: &Measure| drawn.iter().filter_map(|d| Some([d.radius_m, m.of(d)?])).collect();
    measures.iter().map(of).collect()
}

#[derive(Properties, PartialEq)]
struct FollowProps {
    span: usize,
    units: Units,
}

#[component]
fn Follow(props: &FollowProps) -> Html {
    let act = use_act();
    let words = |n: usize| match n {
        0 => "none".to_string(),
        1 => "1 on either side".to_string(),
        n => format!("{n} on either side"),
    };
    let step_words = {
        let step_m = props.units.shown(Quantity::Length, pull::step(Measure::Chord, false));
        let decimals = props.units.decimals(Quantity::Length).max(1);
        format!("{} {}", fixed(step_m, decimals), props.units.symbol(Quantity::Length))
    };
    let options: Vec<AttrValue> = (0..=5).map(|n| words(n).into()).collect();
    html! {
        <div class="follow">
            <Pick label="Neighbours that follow" {options} picked={Some(props.span)}
                onpick={act.on(Action::Follow)} />
            <p class="note">
                { format!(
                    "Drag a ring, or press ↑ ↓ on it: 0.1° or {}, with Shift ten times finer. ← → go to the \
                     next ring, Esc puts it back.",
                    step_words
                ) }
            </p>
        </div>
    }
}
