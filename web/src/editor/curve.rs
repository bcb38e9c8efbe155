//! A curve with rings: dragging, keys, and what a reader of the screen hears.

use std::rc::Rc;

use spokeshave::drawn::DrawnStation;
use wasm_bindgen::JsCast;
use web_sys::Element;
use yew::prelude::*;

use super::frame::Frame;
use super::lines::{Best, BestAt, Line};
use super::pull::{Pull, pressed};
use crate::chart::axis::{bottom, left, most_on, placed, px, rows};
use crate::chart::path::{polygon, polyline};
use crate::chart::unit::Unit;
use crate::chart::width::use_width;
use crate::number::fixed;
use crate::state::{Action, Measure};
use crate::view::form::capital;
use crate::view::{Act, use_act};

/// Properties of [`DragCurve`].
#[derive(Properties, PartialEq)]
pub struct DragCurveProps {
    /// Heading.
    pub title: AttrValue,
    /// What is measured, in which unit.
    pub what: AttrValue,
    /// What the rings move, one set of rings each.
    pub measures: Vec<Measure>,
    /// The curves, one for each measure.
    pub lines: Vec<Line>,
    /// The best angles.
    #[prop_or_default]
    pub best: Best,
    /// The stations as drawn.
    pub drawn: Rc<Vec<DrawnStation>>,
    /// The stations the axes are made for.
    pub still: Rc<Vec<DrawnStation>>,
    /// Unit of length.
    pub length: Unit,
    /// The station selected.
    pub selected: usize,
    /// Whether one of its rings is held.
    pub held: bool,
    /// Height, pixels.
    pub height: f64,
}

/// A curve over radius with a ring at each station.
#[component]
pub fn DragCurve(props: &DragCurveProps) -> Html {
    let (node, width) = use_width(360.0);
    let pull = use_mut_ref(|| None::<Pull>);
    let unit = if props.measures.contains(&Measure::Angle) { Unit::DEGREE } else { props.length };
    let frame = Frame::new(&props.still, &props.measures, &props.best, unit, (width, props.height));
    let hand = Hand { act: use_act(), pull, frame };
    let rings = props.measures.iter().map(|&m| rings(props, &hand, m, unit));
    html! {
        <figure class="drag-curve">
            <figcaption><b>{ &props.title }</b><span>{ format!(", {}", props.what) }</span></figcaption>
            <div ref={node}>
                <svg width={px(width)} height={px(props.height)} viewBox={format!("0 0 {} {}", px(width), px(props.height))}
                    role="group" aria-label={format!("{} over radius; each ring can be moved", props.title)}>
                    { axes(&frame, unit, props.length) }
                    { best(&frame, &props.best) }
                    { for props.lines.iter().enumerate().map(|(i, line)| curve(&frame, line, i)) }
                    { for rings }
                </svg>
            </div>
        </figure>
    }
}

fn axes(frame: &Frame, unit: Unit, length: Unit) -> Html {
    let up = placed(&frame.y, &unit, most_on(frame.low - frame.top, 26.0));
    let along = placed(&frame.x, &length, most_on(frame.right - frame.left, 52.0));
    html! {
        <g aria-hidden="true">
            { rows(&up, frame.left, frame.right) }
            <rect class="frame" x={px(frame.left)} y={px(frame.top)} width={px(frame.right - frame.left)} height={px(frame.low - frame.top)} />
            { left(&up, frame.left) }
            { bottom(&along, frame.low) }
            <text class="axis-figure" x={px(frame.right)} y={px(frame.low + 31.0)} text-anchor="end">
                { format!("radius, {}", length.name) }
            </text>
        </g>
    }
}

fn best(frame: &Frame, best: &Best) -> Html {
    if best.points.len() < 2 {
        return html! {};
    }
    let place = |b: &BestAt, y: f64| [frame.x.px(b.radius_m), frame.y.px(frame.y.held(y))];
    let band = best.points.iter().map(|b| place(b, b.high_deg));
    let band = band.chain(best.points.iter().rev().map(|b| place(b, b.low_deg)));
    let line = best.points.iter().map(|b| place(b, b.angle_deg));
    html! {
        <g aria-hidden="true">
            <path class="working-band" d={polygon(band)} />
            <path class="curve is-dashed" d={polyline(line)} />
            <text class="haloed quiet" x={px(frame.right - 6.0)} y={px(frame.top + 16.0)} text-anchor="end">{ &best.name }</text>
        </g>
    }
}

fn curve(frame: &Frame, line: &Line, i: usize) -> Html {
    let inside = |p: &&[f64; 2]| frame.x.holds(p[0]);
    let path = polyline(
        line.points.iter().filter(inside).map(|p| [frame.x.px(p[0]), frame.y.px(frame.y.held(p[1]))]),
    );
    // The first curve has its name below it, the second above.
    let at = line.points[line.points.len() * (2 + 2 * i) / 9];
    let off = if i == 0 { 24.0 } else { -10.0 };
    html! {
        <g aria-hidden="true">
            <path class="curve" d={path} />
            <text class="haloed strong" x={px(frame.x.px(at[0]))} y={px(frame.y.px(at[1]) + off)} text-anchor="middle">{ line.name }</text>
        </g>
    }
}

/// What moves the rings.
#[derive(Clone)]
struct Hand {
    act: Act,
    pull: Rc<std::cell::RefCell<Option<Pull>>>,
    frame: Frame,
}

fn rings(props: &DragCurveProps, hand: &Hand, measure: Measure, unit: Unit) -> Html {
    let count = props.drawn.len();
    let ring = |(i, drawn): (usize, &DrawnStation)| {
        let value = measure.of(drawn)?;
        let (x, y) = (hand.frame.x.px(drawn.radius_m), hand.frame.y.px(hand.frame.y.held(value)));
        let chosen = i == props.selected;
        let figure = fixed(unit.of(value), unit.decimals.max(1));
        let text = format!("{figure} {}", unit.name);
        let written = if measure == Measure::Angle { format!("{figure}°") } else { figure };
        Some(html! {
            <g key={i} class={classes!("ring", chosen.then_some("is-chosen"))} role="slider" tabindex={if chosen { "0" } else { "-1" }}
                aria-label={format!("{} at station {}", capital(measure.name()), i + 1)} aria-orientation="vertical"
                aria-valuenow={fixed(unit.of(value), 2).replace(['\u{202f}'], "").replace('\u{2212}', "-")} aria-valuetext={text.clone()}
                onpointerdown={hand.taken(i, measure, value)} onpointermove={hand.moved()} onpointerup={hand.let_go()}
                onpointercancel={hand.put_back()} onkeydown={hand.keys(i, measure, value, count)}
                onblur={hand.act.on(|_: FocusEvent| Action::EndRun)}>
                <circle class="ring-reach" cx={px(x)} cy={px(y)} r="14" />
                <circle class="ring-mark" cx={px(x)} cy={px(y)} r="5" />
                if chosen { <text class="haloed strong" x={px(x)} y={px(y - 10.0)} text-anchor="middle">{ written }</text> }
            </g>
        })
    };
    props.drawn.iter().enumerate().filter_map(ring).collect()
}

impl Hand {
    fn taken(&self, station: usize, measure: Measure, value: f64) -> Callback<PointerEvent> {
        let (act, pull) = (self.act.clone(), self.pull.clone());
        Callback::from(move |e: PointerEvent| {
            if e.button() != 0 {
                return;
            }
            if let Some(ring) = e.target_dyn_into::<Element>() {
                // Without capture the drag still works as long as the pointer stays on the ring.
                let _ = ring.set_pointer_capture(e.pointer_id());
            }
            *pull.borrow_mut() = Some(Pull { station, measure, y_px: f64::from(e.client_y()), value });
            act.send(Action::Take(station, measure));
        })
    }

    fn moved(&self) -> Callback<PointerEvent> {
        let (act, pull, slope) = (self.act.clone(), self.pull.clone(), self.frame.y.slope());
        Callback::from(move |e: PointerEvent| {
            let mut pull = pull.borrow_mut();
            let Some(held) = pull.as_mut() else { return };
            let before = held.shown(e.shift_key());
            *held = held.moved(f64::from(e.client_y()), slope, e.shift_key());
            let value = held.shown(e.shift_key());
            drop(pull);
            if value != before {
                act.send(Action::DragTo(value));
            }
        })
    }

    fn let_go(&self) -> Callback<PointerEvent> {
        let (act, pull) = (self.act.clone(), self.pull.clone());
        Callback::from(move |_: PointerEvent| {
            if pull.borrow_mut().take().is_some() {
                act.send(Action::LetGo);
            }
        })
    }

    fn put_back(&self) -> Callback<PointerEvent> {
        let (act, pull) = (self.act.clone(), self.pull.clone());
        Callback::from(move |_: PointerEvent| {
            if pull.borrow_mut().take().is_some() {
                act.send(Action::PutBack);
            }
        })
    }

    fn keys(&self, station: usize, measure: Measure, value: f64, count: usize) -> Callback<KeyboardEvent> {
        let (act, pull) = (self.act.clone(), self.pull.clone());
        Callback::from(move |e: KeyboardEvent| {
            let action = match e.key().as_str() {
                "ArrowUp" => Action::Nudge(station, measure, pressed(measure, value, true, e.shift_key())),
                "ArrowDown" => Action::Nudge(station, measure, pressed(measure, value, false, e.shift_key())),
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
