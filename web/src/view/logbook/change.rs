//! What to change for a wanted rpm or speed.

use spokeshave::carved::analyse;
use spokeshave::change::{Wanted, changes};
use std::rc::Rc;

use spokeshave::result::{Carved, Change, Figure, Logged};
use spokeshave::rig::Rig;
use yew::prelude::*;

use super::lines::points;
use crate::act::Seen;
use crate::form::Pick;
use crate::number::{read, signed, with_unit};
use crate::results::RigRef;
use crate::units::{Quantity, Units};
use crate::view::carved::take_off;
use crate::view::sections::boxes::Line;

/// Properties of [`ChangeForm`].
#[derive(Properties, PartialEq)]
pub(super) struct ChangeFormProps {
    pub(super) state: Seen,
    pub(super) rig: Option<RigRef>,
    /// What the readings tell, which the answer uses.
    pub(super) logged: Option<Rc<Result<Logged, String>>>,
}

/// What was asked and what came of it.
#[derive(Clone, Debug, Default, PartialEq)]
struct Asked {
    point: usize,
    speed: bool,
    text: AttrValue,
    answer: Option<Result<Vec<Change>, String>>,
}

/// The form and the ways to what is wanted.
#[component]
pub(super) fn ChangeForm(props: &ChangeFormProps) -> Html {
    let asked = use_state_eq(Asked::default);
    {
        // Another job, another answer.
        let asked = asked.clone();
        use_effect_with(props.rig.clone(), move |_| asked.set(Asked { answer: None, ..(*asked).clone() }));
    }
    let now = (*asked).clone();
    let pick_point = {
        let (asked, now) = (asked.clone(), now.clone());
        Callback::from(move |point| asked.set(Asked { point, answer: None, ..now.clone() }))
    };
    let pick_figure = {
        let (asked, now) = (asked.clone(), now.clone());
        Callback::from(move |i: usize| asked.set(Asked { speed: i == 1, answer: None, ..now.clone() }))
    };
    let typed = {
        let (asked, now) = (asked.clone(), now.clone());
        Callback::from(move |text: String| {
            asked.set(Asked { text: text.into(), answer: None, ..now.clone() });
        })
    };
    let ask = {
        let (asked, now, rig, units) = (asked.clone(), now.clone(), props.rig.clone(), props.state.units);
        let logged = props.logged.clone();
        Callback::from(move |_: MouseEvent| {
            let found = logged.as_deref().and_then(|logged| logged.as_ref().ok());
            let answer = rig.as_ref().map(|rig| answered(rig, found, &now, units));
            asked.set(Asked { answer, ..now.clone() });
        })
    };
    let names =
        props.state.job().flight_points.iter().map(|p| AttrValue::from(p.name.clone())).collect::<Vec<_>>();
    let quantity = quantity(now.speed);
    let asked_of_wood = matches!(&now.answer, Some(Ok(changes)) if changes.iter().any(|c| c.plan.is_some()));
    // Worked out once for each job: the panel of the carved blades, which has it too, may never have been
    // open.
    let before = use_memo((props.rig.clone(), asked_of_wood), |(rig, asked)| {
        rig.as_ref().filter(|_| *asked).and_then(|rig| analyse(&rig.0).ok())
    });
    html! {
        <div class="change">
            <h3>{ "What to change" }</h3>
            <div class="settings unprinted">
                <Pick label="At" options={names} picked={now.point} onpick={pick_point} />
                <Pick label="Wanted" options={vec!["rpm of the propeller".into(), "airspeed".into()]}
                    picked={usize::from(now.speed)} onpick={pick_figure} />
                <Line id="wanted" label="How much" unit={props.state.units.symbol(quantity)} text={now.text.clone()}
                    message={now.answer.as_ref().and_then(|a| a.as_ref().err()).cloned().map(AttrValue::from)}
                    on={typed} />
                <button type="button" class="act" onclick={ask}>{ "Work out the changes" }</button>
            </div>
            if let Some(Ok(changes)) = &now.answer {
                if props.logged.as_deref().is_some_and(Result::is_ok) {
                    <p class="note">{ "Worked out with the factors that the readings tell, kept or not." }</p>
                }
                { for changes.iter().map(|c| told(c, (*before).as_ref(), now.speed, props.state.units)) }
            }
        </div>
    }
}

fn quantity(speed: bool) -> Quantity {
    if speed { Quantity::Speed } else { Quantity::Rpm }
}

/// The changes, with the factors that the readings tell where there are any.
fn answered(
    rig: &RigRef,
    logged: Option<&Logged>,
    asked: &Asked,
    units: Units,
) -> Result<Vec<Change>, String> {
    let value = read(units, quantity(asked.speed), &asked.text).map_err(|why| format!("Wanted: {why}."))?;
    let figure = if asked.speed { Figure::AirspeedMS } else { Figure::Rpm };
    let known = logged.map(|logged| Rig::with_factors(&rig.0.job, &logged.estimate.factors)).transpose();
    let known = known.map_err(|e| e.to_string())?;
    let wanted = Wanted { point: asked.point, figure, value };
    changes(known.as_ref().unwrap_or(&rig.0), &wanted).map_err(|e| e.to_string())
}

fn told(c: &Change, before: Option<&Carved>, speed: bool, units: Units) -> Html {
    let length = |m: f64| {
        let decimals = units.decimals(Quantity::Length);
        format!(
            "{}\u{a0}{}",
            signed(units.shown(Quantity::Length, m), decimals),
            units.symbol(Quantity::Length)
        )
    };
    let amount = c.says(&length);
    if c.is_in_vain() {
        return html! { <p class="note">{ amount }</p> };
    }
    let reached = match (c.reached, c.had) {
        (true, _) => String::new(),
        (false, Some(had)) => {
            format!(" Not reached: {} is the nearest.", with_unit(units, quantity(speed), Some(had)))
        }
        (false, None) => format!(" Not reached. {}", c.state.sentence()),
    };
    let then = format!(
        "{amount}{reached} Then {} across, pitch {} at three quarters of the radius. {}",
        with_unit(units, Quantity::Length, Some(c.diameter_m)),
        with_unit(units, Quantity::Length, Some(c.pitch_m)),
        c.says_limit().unwrap_or_default()
    );
    let pairs = c.flight_points.iter().map(|p| (&p.drawn, &p.shaped));
    html! {
        <details open={c.reached}>
            <summary>{ then }</summary>
            if let (Some(plan), Some(before)) = (&c.plan, before) {
                { for plan.warns(before).into_iter().map(|warns| html! { <p class="warning">{ warns }</p> }) }
                <div class="duo">{ for plan.blades.iter().map(|b| take_off(b, units)) }</div>
            }
            { points("Every flight point now and changed", ["now", "changed"], pairs, units) }
        </details>
    }
}
