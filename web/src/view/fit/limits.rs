//! A plain sentence for each limit.

use spokeshave::result::Envelope;
use yew::prelude::*;

use crate::number::{fixed, with_unit};
use crate::units::{Quantity, Units};

/// Properties of [`Limits`].
#[derive(Properties, PartialEq)]
pub(super) struct LimitsProps {
    pub(super) envelope: Envelope,
    pub(super) limit_rpm: Option<f64>,
    pub(super) units: Units,
}

/// The sentences.
#[component]
pub(super) fn Limits(props: &LimitsProps) -> Html {
    let said = sentences(props).into_iter().map(|s| html! { <li>{ s }</li> });
    html! { <ul class="limits" aria-label="Limits">{ for said }</ul> }
}

fn sentences(props: &LimitsProps) -> Vec<String> {
    let (envelope, units) = (&props.envelope, props.units);
    let speed = |v| with_unit(units, Quantity::Speed, Some(v));
    let mut said = vec![rpm(props)];
    said.extend(hover(props));
    said.extend(stall(props));
    said.extend(dive(props));
    said.extend(idle(props));
    for tip in &envelope.marks.tip_mach_from {
        let mach = fixed(tip.tip_mach, 2);
        said.push(if tip.airspeed_m_s > 0.0 {
            format!("At full throttle the tip passes Mach {mach} at {}.", speed(tip.airspeed_m_s))
        } else {
            format!("At full throttle the tip is past Mach {mach} from rest on.")
        });
    }
    if envelope.marks.tip_mach_from.is_empty() {
        said.push(
            "The tip stays below the Mach numbers where propellers lose efficiency and grow loud.".into(),
        );
    }
    said
}

fn hover(props: &LimitsProps) -> Option<String> {
    let force = |n| with_unit(props.units, Quantity::Force, Some(n));
    let (weight, short) = (props.envelope.hover_n()?, props.envelope.hover_short_n()?);
    Some(format!(
        "It cannot hover: full throttle is {} short of the weight of {}.",
        force(short),
        force(weight)
    ))
}

fn rpm(props: &LimitsProps) -> String {
    let (envelope, units) = (&props.envelope, props.units);
    let speed = |v| with_unit(units, Quantity::Speed, Some(v));
    let limit = props.limit_rpm.map_or_else(
        || "the highest rpm of its figures".into(),
        |rpm| format!("its limit of {}", with_unit(units, Quantity::Rpm, Some(rpm))),
    );
    match envelope.marks.limit_rpm_from_m_s {
        Some(v) if v > 0.0 => {
            format!(
                "From {} on full throttle would take the engine past {limit}: it has to be throttled back.",
                speed(v)
            )
        }
        Some(_) => {
            format!("Even at rest full throttle takes the engine past {limit}: it has to be throttled back.")
        }
        None if let Some((from, to)) = envelope.too_slow_to_turn_m_s() => format!(
            "From {} to {} full throttle cannot turn this propeller at any rpm of the engine's power curve: \
             no figures there.",
            speed(from),
            speed(to)
        ),
        None => format!("Full throttle keeps the engine below {limit} over the whole speed range shown."),
    }
}

fn dive(props: &LimitsProps) -> Option<String> {
    let dive = props.envelope.marks.closed_throttle_dive?;
    Some(format!(
        "In a dive with the throttle closed the air alone turns the propeller to {} at {}, if the engine \
         then neither drives nor brakes. The airframe's own limit may come first.",
        with_unit(props.units, Quantity::Rpm, Some(dive.rpm)),
        with_unit(props.units, Quantity::Speed, Some(dive.airspeed_m_s))
    ))
}

fn idle(props: &LimitsProps) -> Option<String> {
    let idle = props.envelope.marks.idle?;
    Some(format!(
        "Standing at idle, {}, it pulls {}: brakes and chocks have to hold that.",
        with_unit(props.units, Quantity::Rpm, Some(idle.rpm)),
        with_unit(props.units, Quantity::Force, Some(idle.value))
    ))
}

fn stall(props: &LimitsProps) -> Option<String> {
    let stall = props.envelope.speeds?.stall_m_s?;
    let best = props.envelope.marks.best_angle_of_climb?.airspeed_m_s;
    let speed = |v| with_unit(props.units, Quantity::Speed, Some(v));
    (best <= stall).then(|| {
        format!(
            "The steepest climb, at {}, lies at the stall of {}: keep above it.",
            speed(best),
            speed(stall)
        )
    })
}
