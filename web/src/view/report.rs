//! The Report panel: the whole job as pages to print, to hand in or to keep with the propeller.

use std::rc::Rc;

use gloo_timers::callback::Timeout;
use spokeshave::bench::{Paper, Sheet, pdf};
use spokeshave::dossier::{Scale, Scales, dossier};
use yew::prelude::*;

use super::workshop::files::not_taken;
use super::workshop::sheets::Sheets;
use super::workshop::{on_paper, paper_pick};
use crate::act::use_act;
use crate::effect::file;
use crate::results::RigRef;
use crate::state::Action;
use crate::units::{Quantity, Units};

/// Properties of [`ReportPanel`].
#[derive(Properties, PartialEq)]
pub struct ReportPanelProps {
    /// The job made ready; may be a frame old.
    pub rig: Option<RigRef>,
    /// The units picked.
    pub units: Units,
    /// The flight point selected.
    pub point: usize,
}

/// What pages were made of.
type Key = (RigRef, Units, Paper, Option<usize>);

/// A button that makes the pages, then the pages.
#[component]
pub fn ReportPanel(props: &ReportPanelProps) -> Html {
    let paper = use_state_eq(Paper::default);
    let made = use_state(|| None::<(Key, Rc<Vec<Sheet>>)>);
    let asked = use_mut_ref(|| None::<Timeout>);
    let working = use_state_eq(|| false);
    let Some(rig) = &props.rig else { return html! {} };
    let key: Key =
        (rig.clone(), props.units, *paper, Some(props.point).filter(|i| rig.0.condition(*i).is_some()));
    let shown = made.as_ref().filter(|m| m.0 == key).map(|m| m.1.clone());
    let make = {
        let (key, made, working) = (key, made.setter(), working.setter());
        Callback::from(move |_: MouseEvent| {
            let (key, made, done) = (key.clone(), made.clone(), working.clone());
            working.set(true);
            // A moment later, so that the button says what it does first.
            *asked.borrow_mut() = Some(Timeout::new(40, move || {
                let pages = Rc::new(dossier(&key.0.0, &scales(key.1), key.2, key.3));
                made.set(Some((key, pages)));
                done.set(false);
            }));
        })
    };
    let label = match (*working, made.is_some()) {
        (true, _) => "The report is being made",
        (false, true) => "Make the report again, the job or its units have changed",
        (false, false) => "Make the report",
    };
    html! {
        <div class="workshop">
            <p class="note">
                { "Verdict, inputs, method and validity with its sources, charts, stations, strength, what \
                   to carve, readings as carved and of the logbook, in the units picked above. What the job \
                   does not have is left out." }
            </p>
            { paper_pick(&paper) }
            if let Some(pages) = shown {
                <Made {pages} paper={*paper} title={rig.0.job.title.clone()} />
            } else {
                <p class="buttons">
                    <button type="button" class="act" disabled={*working} onclick={make}>{ label }</button>
                </p>
            }
        </div>
    }
}

#[derive(Properties, PartialEq)]
struct MadeProps {
    pages: Rc<Vec<Sheet>>,
    paper: Paper,
    title: String,
}

#[component]
fn Made(props: &MadeProps) -> Html {
    let act = use_act();
    let save = {
        let (pages, title) = (props.pages.clone(), props.title.clone());
        Callback::from(move |_: MouseEvent| {
            let name = file::file_name(&format!("{title} report"), "pdf");
            if !file::offer_bytes(&name, "application/pdf", &pdf(&title, &pages)) {
                act.send(Action::Say(not_taken("The report")));
            }
        })
    };
    html! {
        <>
            <p class="buttons">
                <button type="button" class="act" onclick={save}>{ "Save the report as PDF" }</button>
            </p>
            <Sheets sheets={props.pages.clone()} paper={props.paper} name="page"
                note="Charts are lines, so that they stay sharp at any size." />
        </>
    }
}

/// The units picked, as the core writes them.
fn scales(units: Units) -> Scales {
    let fixed = |q: Quantity| {
        let unit = units.unit(q);
        Scale::fixed(unit.name, unit.per_si, unit.decimals)
    };
    let three = |q: Quantity| Scale { decimals: None, ..fixed(q) };
    Scales {
        unit: on_paper(units.length),
        speed: fixed(Quantity::Speed),
        climb: fixed(Quantity::Climb),
        height: fixed(Quantity::Height),
        distance: three(Quantity::Distance),
        force: three(Quantity::Force),
        torque: three(Quantity::Torque),
        power: three(Quantity::Power),
        stress: fixed(Quantity::Stress),
        mass: three(Quantity::Mass),
        area: three(Quantity::Area),
        fuel: three(Quantity::FuelFlow),
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::units::LengthUnit;

    #[test]
    fn the_page_s_own_units_are_those_of_the_core() {
        let close = |a: Scale, b: Scale| {
            assert_eq!(a.sign, b.sign);
            assert!((a.per_si / b.per_si - 1.0).abs() < 1e-6, "{a:?} {b:?}");
        };
        let (page, core) = (scales(Units::default()), Scales::METRIC);
        for (a, b) in [
            (page.speed, core.speed),
            (page.power, core.power),
            (page.stress, core.stress),
            (page.fuel, core.fuel),
        ] {
            close(a, b);
        }
        let inches = Units { length: LengthUnit::Inch, ..Units::default() };
        close(scales(inches).length(), Scales::INCHES.length());
    }
}
