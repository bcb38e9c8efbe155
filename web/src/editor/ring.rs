//! A green ring: dragging, keys, and what a reader of the screen hears.

use std::cell::RefCell;
use std::rc::Rc;

use wasm_bindgen::JsCast;
use web_sys::Element;
use yew::prelude::*;

use super::pull::{Pull, pressed};
use crate::act::{Act, use_act};
use crate::chart::axis::px;
use crate::form::capital;
use crate::number::plain;
use crate::state::{Action, Held, Measure};

/// What the rings of one curve have in common.
#[derive(Clone, Debug)]
pub struct Hand {
    /// The ring held.
    pub pull: Rc<RefCell<Option<Pull>>>,
    /// Pixels down for each unit of the figure.
    pub slope: f64,
}

impl PartialEq for Hand {
    fn eq(&self, other: &Self) -> bool {
        Rc::ptr_eq(&self.pull, &other.pull) && self.slope == other.slope
    }
}

/// Properties of [`Ring`].
#[derive(Properties, PartialEq)]
pub struct RingProps {
    /// Which station.
    pub station: usize,
    /// How many there are.
    pub count: usize,
    /// What the ring moves.
    pub measure: Measure,
    /// The figure, SI or degrees.
    pub value: f64,
    /// Where the ring is, pixels.
    pub place: [f64; 2],
    /// Whether its station is selected.
    pub chosen: bool,
    /// The figure in the unit shown.
    pub shown: f64,
    /// The same as written.
    pub figure: AttrValue,
    /// The unit shown.
    pub unit: &'static str,
    /// What the rings have in common.
    pub hand: Hand,
}

/// A ring.
#[component]
pub fn Ring(props: &RingProps) -> Html {
    let act = use_act();
    let [x, y] = props.place;
    let chosen = props.chosen;
    let degrees = if props.measure == Measure::Angle { "°" } else { "" };
    html! {
        <g class={classes!("ring", chosen.then_some("is-chosen"))} role="slider"
            tabindex={if chosen { "0" } else { "-1" }}
            aria-label={format!("{} at station {}", capital(props.measure.name()), props.station + 1)}
            aria-orientation="vertical" aria-valuenow={plain(props.shown, 2).replace('\u{2212}', "-")}
            aria-valuetext={format!("{} {}", props.figure, props.unit)}
            onpointerdown={taken(props, &act)} onpointermove={moved(props, &act)}
            onpointerup={released(props, &act, Action::LetGo)}
            onpointercancel={released(props, &act, Action::PutBack)} onkeydown={keys(props, &act)}
            onblur={act.on(|_: FocusEvent| Action::EndRun)}>
            <circle class="ring-reach" cx={px(x)} cy={px(y)} r="14" />
            <circle class="ring-mark" cx={px(x)} cy={px(y)} r="5" />
            if chosen {
                <text class="haloed strong" x={px(x)} y={px(y - 10.0)} text-anchor="middle">
                    { format!("{}{degrees}", props.figure) }
                </text>
            }
        </g>
    }
}

fn taken(props: &RingProps, act: &Act) -> Callback<PointerEvent> {
    let (act, pull) = (act.clone(), props.hand.pull.clone());
    let (station, measure, value) = (props.station, props.measure, props.value);
    Callback::from(move |e: PointerEvent| {
        if e.button() != 0 {
            return;
        }
        if let Some(ring) = e.target_dyn_into::<Element>() {
            // Without capture the drag still works as long as the pointer stays on the ring.
            let _ = ring.set_pointer_capture(e.pointer_id());
        }
        *pull.borrow_mut() = Some(Pull { station, measure, y_px: f64::from(e.client_y()), value });
        act.send(Action::Take(Held::Station(station, measure)));
    })
}

fn moved(props: &RingProps, act: &Act) -> Callback<PointerEvent> {
    let (act, hand) = (act.clone(), props.hand.clone());
    Callback::from(move |e: PointerEvent| {
        let mut pull = hand.pull.borrow_mut();
        let Some(held) = pull.as_mut() else { return };
        let before = held.shown(e.shift_key());
        *held = held.moved(f64::from(e.client_y()), hand.slope, e.shift_key());
        let value = held.shown(e.shift_key());
        drop(pull);
        if value != before {
            act.send(Action::DragTo(value));
        }
    })
}

fn released(props: &RingProps, act: &Act, action: Action) -> Callback<PointerEvent> {
    let (act, pull) = (act.clone(), props.hand.pull.clone());
    Callback::from(move |_: PointerEvent| {
        let held = pull.borrow_mut().take();
        if held.is_some() {
            act.send(action.clone());
        }
    })
}

fn keys(props: &RingProps, act: &Act) -> Callback<KeyboardEvent> {
    let (act, pull) = (act.clone(), props.hand.pull.clone());
    let (station, measure, value, count) = (props.station, props.measure, props.value, props.count);
    Callback::from(move |e: KeyboardEvent| {
        let nudge = |upward| {
            Action::Nudge(Held::Station(station, measure), pressed(measure, value, upward, e.shift_key()))
        };
        let action = match e.key().as_str() {
            "ArrowUp" => nudge(true),
            "ArrowDown" => nudge(false),
            "ArrowRight" if station + 1 < count => Action::SelectStation(station + 1),
            "ArrowLeft" if station > 0 => Action::SelectStation(station - 1),
            "Escape" if pull.borrow_mut().take().is_some() => Action::PutBack,
            _ => return,
        };
        e.prevent_default();
        if let Action::SelectStation(to) = action {
            focus_ring(&e, to);
        }
        act.send(action);
    })
}

/// Gives the focus to another ring of the same measure.
fn focus_ring(event: &KeyboardEvent, to: usize) {
    let ring = event.target_dyn_into::<Element>();
    let Some(label) = ring.as_ref().and_then(|r| r.get_attribute("aria-label")) else { return };
    let Some((name, _)) = label.rsplit_once(' ') else { return };
    let other = ring.and_then(|r| r.parent_element());
    let other =
        other.and_then(|p| p.query_selector(&format!("[aria-label=\"{name} {}\"]", to + 1)).ok().flatten());
    if let Some(other) = other.and_then(|o| o.dyn_into::<web_sys::SvgElement>().ok()) {
        // Fails only for an element that is gone.
        let _ = other.focus();
    }
}
