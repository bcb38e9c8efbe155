//! What the blade was judged at, what its modes meet, and the hub.

use spokeshave::result::{CaseResult, HubResult, NearOrder};
use yew::prelude::*;

use super::stations::thickness;
use crate::number::{NO_FIGURE, figure, fixed, signed, signed_or_none, with_unit};
use crate::units::{Quantity, Units};

/// Properties of [`Cases`].
#[derive(Properties, PartialEq)]
pub(super) struct CasesProps {
    pub(super) cases: Vec<CaseResult>,
    pub(super) units: Units,
}

/// A row for each case.
#[component]
pub(super) fn Cases(props: &CasesProps) -> Html {
    let units = props.units;
    let head = [
        Quantity::Rpm,
        Quantity::Speed,
        Quantity::Force,
        Quantity::Force,
        Quantity::Torque,
        Quantity::Length,
    ];
    let names = ["Rpm", "Airspeed", "Thrust", "Pull of a blade", "Bending at the hub", "Tip forward"];
    let columns = names.iter().zip(head).map(|(name, q)| {
        let unit = if q == Quantity::Rpm { "" } else { units.symbol(q) };
        html! { <th scope="col">{ *name }<small>{ unit }</small></th> }
    });
    html! {
        <div class="scroll" tabindex="0" role="region" aria-label="Load cases">
            <table class="sheet-table">
                <caption>{ "What the blade is judged at" }</caption>
                <thead><tr>
                    <th scope="col">{ "Case" }</th>{ for columns }
                    <th scope="col">{ "Tip twist" }<small>{ "deg" }</small></th>
                    <th scope="col">{ "Margin" }<small>{ "%" }</small></th>
                    <th scope="col" class="state"><span class="unseen">{ "Remarks" }</span></th>
                </tr></thead>
                <tbody>{ for props.cases.iter().map(|c| row(units, c)) }</tbody>
            </table>
        </div>
    }
}

fn row(units: Units, c: &CaseResult) -> Html {
    let f = c.figures.as_ref();
    let words = match (f.is_none(), c.held) {
        (true, _) => c.state.sentence(),
        (false, true) => "throttled back to the limit rpm",
        (false, false) => "",
    };
    let cells = [
        figure(units, Quantity::Rpm, f.map(|f| f.rpm)),
        figure(units, Quantity::Speed, f.map(|f| f.airspeed_m_s)),
        figure(units, Quantity::Force, f.map(|f| f.thrust_n)),
        figure(units, Quantity::Force, f.map(|f| f.root_tension_n)),
        figure(units, Quantity::Torque, f.map(|f| f.root_forward_n_m)),
        f.and_then(|f| f.tip_forward_m).map_or_else(|| NO_FIGURE.into(), |m| thickness(units, m)),
        signed_or_none(f.and_then(|f| f.tip_twist_deg), 1),
        signed_or_none(f.map(|f| 100.0 * f.margin), 0),
    ];
    html! {
        <tr class={classes!(f.is_some_and(|f| f.margin < 0.0).then_some("over"))}>
            <th scope="row">{ &c.name }</th>
            { for cells.map(|c| html! { <td>{ c }</td> }) }
            <td class="state">{ words }</td>
        </tr>
    }
}

/// Properties of [`Near`].
#[derive(Properties, PartialEq)]
pub(super) struct NearProps {
    pub(super) near: Vec<NearOrder>,
}

/// Modes that come near a whole number of times a turn.
#[component]
pub(super) fn Near(props: &NearProps) -> Html {
    if props.near.is_empty() {
        return html! {
            <p class="note">{ "No natural frequency lies within 10 % of 1 to 4 times a turn in any case." }</p>
        };
    }
    let line = |n: &NearOrder| {
        format!(
            "{}: mode {} ({}) at {} Hz lies {} % from {} a turn{}",
            n.case,
            n.number,
            n.mode.words(),
            fixed(n.hz, 0),
            signed(100.0 * n.away, 0),
            n.order,
            if n.of_engine { " of the engine" } else { "" }
        )
    };
    html! {
        <div>
            <p class="note">
                { "Near a whole number of times a turn, where steady unevenness of the air or the engine \
                   can shake it:" }
            </p>
            <ul class="limits">{ for props.near.iter().map(|n| html! { <li>{ line(n) }</li> }) }</ul>
        </div>
    }
}

/// Properties of [`HubTable`].
#[derive(Properties, PartialEq)]
pub(super) struct HubTableProps {
    pub(super) hub: HubResult,
    pub(super) units: Units,
}

/// Boss and bolts against their limits.
#[component]
pub(super) fn HubTable(props: &HubTableProps) -> Html {
    let (h, units) = (&props.hub, props.units);
    let pa = |v| with_unit(units, Quantity::Stress, v);
    let torque = |v| with_unit(units, Quantity::Torque, v);
    let past = h.past_boss_m.map(|m| {
        let by = format!("{} past what it can hold", with_unit(units, Quantity::Length, Some(m)));
        ("Holes of the hub in the boss", by, String::new())
    });
    let rows = [
        ("Bolts on the hub, if friction did nothing", pa(Some(h.bearing_pa)), pa(Some(h.bearing_limit_pa))),
        ("Tension through the boss", pa(h.boss_tension_pa), pa(Some(h.boss_limit_pa))),
        ("Pressure under the plates", pa(h.clamp_pa), pa(Some(h.clamp_limit_pa))),
        ("Torque on a nut", String::new(), torque(Some(h.most_bolt_torque_n_m))),
        (
            "Friction of one plate over the greatest torque",
            h.friction_share.map_or_else(|| NO_FIGURE.into(), |s| fixed(s, 1)),
            String::new(),
        ),
    ];
    let row = |(name, found, limit): (&'static str, String, String)| {
        html! { <tr><th scope="row">{ name }</th><td>{ found }</td><td>{ limit }</td></tr> }
    };
    html! {
        <div class="scroll" tabindex="0" role="region" aria-label="Hub">
            <table class="sheet-table">
                <caption>
                    { format!(
                        "Hub: greatest torque {}, pull of a blade {}; least margin {} %",
                        torque(Some(h.torque_n_m)),
                        with_unit(units, Quantity::Force, Some(h.pull_n)),
                        signed(100.0 * h.margin, 0)
                    ) }
                </caption>
                <thead>
                    <tr>
                        <th scope="col">{ "What" }</th><th scope="col">{ "Found" }</th>
                        <th scope="col">{ "Limit" }</th>
                    </tr>
                </thead>
                <tbody>{ for rows.into_iter().chain(past).map(row) }</tbody>
            </table>
        </div>
    }
}
