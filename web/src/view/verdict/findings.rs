//! Limits that are broken: a sentence each, with the way to where it can be mended.

use std::rc::Rc;

use spokeshave::result::{Limit, Margin};
use yew::prelude::*;

use crate::form::capital;
use crate::number::with_unit;
use crate::units::{Quantity, Units};

#[derive(Properties, PartialEq)]
pub(super) struct FindingsProps {
    pub(super) margins: Rc<Vec<Margin>>,
    pub(super) units: Units,
}

/// The sentences; nothing where every limit is kept.
#[component]
pub(super) fn Findings(props: &FindingsProps) -> Html {
    let said: Vec<Html> = worst(&props.margins).into_iter().filter_map(|w| finding(w, props.units)).collect();
    if said.is_empty() {
        return html! {};
    }
    html! { <ul class="findings" aria-label="Limits that are broken">{ for said }</ul> }
}

fn finding(worst: Worst, units: Units) -> Option<Html> {
    let (place, word) = mended(worst.margin.limit);
    let said = sentence(worst, units)?;
    Some(html! { <li>{ said }{ " " }<a href={place}>{ word }</a></li> })
}

/// Where a limit is broken most, and at how many places more it is broken.
#[derive(Clone, Copy, Debug)]
struct Worst<'a> {
    margin: &'a Margin,
    more: usize,
}

/// The limits that are broken, each once. Those without a figure have a sentence of their own at the flight
/// point.
fn worst(margins: &[Margin]) -> Vec<Worst<'_>> {
    let mut all: Vec<Worst> = Vec::new();
    for margin in margins.iter().filter(|m| m.share < 0.0 && m.found.is_some()) {
        match all.iter_mut().find(|w| w.margin.limit == margin.limit) {
            None => all.push(Worst { margin, more: 0 }),
            Some(w) => {
                w.more += 1;
                if margin.share < w.margin.share {
                    w.margin = margin;
                }
            }
        }
    }
    all
}

/// What is broken and by how much.
fn sentence(Worst { margin, more }: Worst, units: Units) -> Option<String> {
    let (found, allowed) = (margin.found?, margin.allowed?);
    let quantity = quantity(margin.limit);
    let told = |value: f64| with_unit(units, quantity, Some(value));
    let place = margin.flight_point.as_ref().map_or_else(String::new, |p| format!("{p}: "));
    let so = match more {
        0 => String::new(),
        1 => "; broken at 1 more flight point".into(),
        more => format!("; broken at {more} more flight points"),
    };
    Some(format!(
        "{}{} {}, past the limit of {} by {}{so}.",
        place,
        if place.is_empty() { capital(noun(margin.limit)) } else { noun(margin.limit).into() },
        told(found),
        told(allowed),
        told((found - allowed).abs())
    ))
}

fn noun(limit: Limit) -> &'static str {
    match limit {
        Limit::EngineRpm | Limit::RpmMost | Limit::RpmLeast => "propeller rpm",
        Limit::StandingRpmLeast => "rpm standing",
        Limit::EnginePower => "shaft power",
        _ => limit.words(),
    }
}

fn quantity(limit: Limit) -> Quantity {
    match limit {
        Limit::Answer | Limit::EngineRpm | Limit::RpmMost | Limit::RpmLeast | Limit::StandingRpmLeast => {
            Quantity::Rpm
        }
        Limit::EnginePower => Quantity::Power,
        Limit::DiameterMost | Limit::BlankWidthMost | Limit::BlankDepthMost => Quantity::Length,
        Limit::TipMachMost => Quantity::Coefficient,
        Limit::StressMarginLeast => Quantity::Share,
    }
}

/// Where it can be mended.
fn mended(limit: Limit) -> (&'static str, &'static str) {
    match limit {
        Limit::DiameterMost | Limit::BlankWidthMost | Limit::BlankDepthMost => ("#blade", "Change the blade"),
        Limit::StressMarginLeast => ("#bench", "Where it is stressed"),
        _ => ("#shape", "Shape another blade"),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn margin(share: f64, point: &str, found: Option<f64>) -> Margin {
        let flight_point = Some(point.to_string());
        Margin { limit: Limit::RpmMost, flight_point, found, allowed: Some(2500.0), share }
    }

    #[test]
    fn a_limit_is_said_once_where_it_is_broken_most() {
        let margins = [
            margin(-0.02, "Climb", Some(2550.0)),
            margin(0.02, "Cruise", Some(2450.0)),
            margin(-0.04, "Top speed", Some(2600.0)),
            margin(-1.0, "Dive", None),
        ];
        let worst = worst(&margins);
        assert_eq!(worst.len(), 1);
        let said = sentence(worst[0], Units::default()).unwrap();
        assert!(said.starts_with("Top speed: propeller rpm 2"), "{said}");
        assert!(said.contains("by 100\u{a0}rpm; broken at 1 more flight point."), "{said}");
    }

    #[test]
    fn where_every_limit_is_kept_nothing_is_said() {
        assert!(worst(&[margin(0.02, "Climb", Some(2450.0)), margin(-1.0, "Dive", None)]).is_empty());
    }
}
