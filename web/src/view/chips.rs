//! The flight points as a group of radio buttons.

use std::rc::Rc;

use spokeshave::aircraft::hovers;
use spokeshave::job::{FlightPoint, Job, Setting};
use spokeshave::result::{PointResult, State as Answer};
use wasm_bindgen::JsCast;
use web_sys::{HtmlElement, js_sys};
use yew::prelude::*;

use crate::act::{Seen, use_act};
use crate::number::with_unit;
use crate::state::Action;
use crate::units::{Quantity, Units};

/// What is flown at part throttle, as a line over speed.
#[must_use]
pub fn flown_line(job: &Job) -> &'static str {
    if hovers(job.aircraft.as_ref()) { "hover and climb" } else { "level flight" }
}

/// Properties of [`Chips`].
#[derive(Properties, PartialEq)]
pub struct ChipsProps {
    /// The state.
    pub state: Seen,
    /// Every flight point worked out; shorter until the later frame.
    pub points: Vec<Rc<Option<PointResult>>>,
}

/// The flight points; arrows go from one to the next.
#[component]
pub fn Chips(props: &ChipsProps) -> Html {
    let act = use_act();
    let (state, job) = (&props.state, props.state.job());
    let (now, count) = (state.point, job.flight_points.len());
    let onkeydown = {
        let act = act.clone();
        Callback::from(move |e: KeyboardEvent| {
            let to = match e.key().as_str() {
                "ArrowRight" | "ArrowDown" => (now + 1) % count,
                "ArrowLeft" | "ArrowUp" => (now + count - 1) % count,
                _ => return,
            };
            e.prevent_default();
            act.send(Action::SelectPoint(to));
            focus_sibling(&e, to);
        })
    };
    let chips = job.flight_points.iter().enumerate().map(|(i, point)| {
        let on = i == now;
        html! {
            <button type="button" class="chip" role="radio" aria-checked={if on { "true" } else { "false" }}
                tabindex={if on { "0" } else { "-1" }} onclick={act.on(move |_: MouseEvent| Action::SelectPoint(i))}>
                <b>{ &point.name }</b><span>{ speed_words(state.units, point, props.points.get(i)) }</span>
            </button>
        }
    });
    html! { <div class="chips" role="radiogroup" aria-label="Flight point" {onkeydown}>{ for chips }</div> }
}

/// The airspeed given, else the one that came out, else that there is none.
fn speed_words(units: Units, point: &FlightPoint, result: Option<&Rc<Option<PointResult>>>) -> String {
    let result = result.and_then(|r| r.as_ref().as_ref());
    if result.is_some_and(|r| r.state != Answer::Ok) {
        return "no answer".into();
    }
    match point.airspeed_m_s.or(result.and_then(|r| r.airspeed_m_s)) {
        Some(v) => with_unit(units, Quantity::Speed, Some(v)),
        None => String::new(),
    }
}

fn focus_sibling(event: &KeyboardEvent, to: usize) {
    let chip = event.target().and_then(|t| t.dyn_into::<web_sys::Element>().ok());
    let group = chip.and_then(|c| c.closest("[role=radiogroup]").ok().flatten());
    let chip = group.and_then(|g| g.children().item(u32::try_from(to).unwrap_or(0)));
    if let Some(chip) = chip.and_then(|c| c.dyn_into::<HtmlElement>().ok()) {
        // Fails only for an element that is gone.
        let _: Result<(), js_sys::wasm_bindgen::JsValue> = chip.focus();
    }
}

/// The flight point in a sentence: its setting, height and what comes of it, or why there is no answer.
#[must_use]
pub fn sentence(units: Units, job: &Job, point: &FlightPoint, result: Option<&PointResult>) -> String {
    let hovers = hovers(job.aircraft.as_ref());
    match result {
        Some(r) if r.state != Answer::Ok => r.state.sentence().to_string(),
        _ => format!(
            "{}{}, {}",
            setting_words(units, point, hovers),
            air_words(units, point),
            rpm_words(result)
        ),
    }
}

fn setting_words(units: Units, point: &FlightPoint, hovers: bool) -> String {
    match point.setting {
        Setting::Rpm { .. } => "Rpm as set".into(),
        Setting::Power { power_w } => format!("At {}", with_unit(units, Quantity::Power, Some(power_w))),
        Setting::FullThrottle {} => "Full throttle".into(),
        Setting::Level {} if hovers => "Hover".into(),
        Setting::Level {} => "Level".into(),
        Setting::Throttle { fraction } => {
            format!("{} throttle", with_unit(units, Quantity::Share, Some(fraction)))
        }
    }
}

/// Height and temperature of a flight point.
#[must_use]
pub fn air_words(units: Units, point: &FlightPoint) -> String {
    let height = if point.altitude_m == 0.0 {
        " at sea level".into()
    } else {
        format!(" at {}", with_unit(units, Quantity::Height, Some(point.altitude_m)))
    };
    if point.isa_offset_k == 0.0 {
        return height;
    }
    format!("{height}, {} K off standard", crate::number::signed(point.isa_offset_k, 0))
}

fn rpm_words(result: Option<&PointResult>) -> String {
    with_unit(Units::default(), Quantity::Rpm, result.and_then(|r| r.rpm))
}

#[cfg(test)]
mod tests {
    use super::*;
    use spokeshave::job::DEMOS;
    use spokeshave::rig::Rig;

    #[test]
    fn a_point_is_said_in_a_sentence() {
        let job = Job::from_json(DEMOS[0].json).unwrap();
        let result = Rig::new(&job).unwrap().point(2);
        let said = sentence(Units::default(), &job, &job.flight_points[2], result.as_ref());
        let said = said.replace(['\u{a0}', '\u{202f}'], " ");
        assert!(said.starts_with("Level at 600 m, 2 ") && said.ends_with(" rpm"), "{said}");
    }
}
