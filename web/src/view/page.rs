//! The page: head, verdict, the rack with what stands beside it, panels, foot.

use std::rc::Rc;

use spokeshave::aircraft::hovers;
use spokeshave::job::Limits;
use yew::prelude::*;

use super::bench::{self, BenchPanel};
use super::blade::{BladeSettings, StationTable, in_a_line};
use super::carved::{self, CarvedPanel};
use super::caution;
use super::coefficients::{self, Coefficients};
use super::fit::{self, FitPanel};
use super::head::Head;
use super::logbook::{self, LogbookPanel};
use super::machine::aircraft::same_aircraft;
use super::machine::engine::same_engine;
use super::machine::{AircraftPanel, EnginePanel, aircraft_in_a_line, engine_in_a_line};
use super::method::MethodPanel;
use super::notice::Said;
use super::panel::Panel;
use super::points::Points;
use super::reading::{Lying, MapReading, Standing, StationReading};
use super::report::ReportPanel;
use super::room::{Room, use_room};
use super::sections::{self, Sections};
use super::shape::{self, ShapePanel};
use super::steps::Steps;
use super::verdict::{Against, Verdict};
use super::workshop::{self, Workshop};
use crate::act::{Seen, use_act};
use crate::chart::hatch::Hatches;
use crate::editor::Curves;
use crate::number::{NO_FIGURE, fixed};
use crate::results::{Later, Now};
use crate::state::{Action, Part, State};

/// Properties of [`Page`].
#[derive(Properties, PartialEq)]
pub struct PageProps {
    /// The state.
    pub state: Seen,
    /// What is shown within the frame of an edit.
    pub now: Rc<Now>,
    /// What follows in a later frame.
    pub later: Rc<Later>,
}

/// The page.
#[component]
pub fn Page(props: &PageProps) -> Html {
    let (state, now) = (&props.state, &props.now);
    let narrow = use_room() == Room::Narrow;
    html! {
        <>
            <Hatches />
            <Head state={state.clone()} kept={now.kept} />
            if let Some(notice) = &state.notice { <Said notice={notice.clone()} /> }
            <main>
                if narrow { <Lying ..props.clone() /> }
                if let Some(result) = &*now.point {
                    <Verdict result={result.clone()} units={state.units} against={against(props)}
                        margins={props.later.margins.clone()} beside={now.beside.clone()} />
                }
                <div class="sheet" style={format!("--chip-rows: {}", chip_rows(props))}>
                    if !narrow { <Standing ..props.clone() /> }
                    <div class="work">
                        <Steps />
                        <section class="hero" id="departure" aria-label="Departure">
                            <h2 class="unseen">{ "Departure" }</h2>
                            <MapReading ..props.clone() />
                            <StationReading ..props.clone() />
                        </section>
                        <Panels ..props.clone() />
                    </div>
                </div>
            </main>
            <footer>{ caution::foot() }</footer>
        </>
    }
}

/// Rows the flight points take above the blade, so that the map beside it starts as low.
fn chip_rows(props: &PageProps) -> usize {
    props.state.job().flight_points.len().div_ceil(2).clamp(2, 4)
}

impl Clone for PageProps {
    fn clone(&self) -> Self {
        Self { state: self.state.clone(), now: self.now.clone(), later: self.later.clone() }
    }
}

#[component]
fn Panels(props: &PageProps) -> Html {
    let (state, now, later) = (&props.state, &props.now, &props.later);
    let (act, open) = (use_act(), use_memo((), |()| wide()));
    let job = state.job();
    let answered =
        later.points.iter().filter(|p| p.as_ref().as_ref().is_some_and(|r| r.rpm.is_some())).count();
    html! {
        <>
            <Panel id="aircraft" number={1} title="Aircraft" result={aircraft_in_a_line(state)} open={*open}>
                <AircraftPanel state={state.part(same_aircraft)} />
            </Panel>
            <Panel id="engine" number={2} title="Engine" result={engine_in_a_line(state)} open={*open}
                onunfold={act.on(|open| Action::Unfold(Part::Engine, open))}>
                <EnginePanel state={state.part(same_engine)} offer={later.offer.clone()} point={later.selected()} />
            </Panel>
            <Panel id="points" number={3} title="Flight points" open={*open}
                result={points_line(job.flight_points.len(), answered, later.points.len())}>
                <Points state={state.part(same_points)} results={later.points.clone()} />
            </Panel>
            <Panel id="blade" number={4} title="Blade" result={in_a_line(job, state.units)} open={*open}>
                <BladeSettings state={state.part(same_settings)} />
                <div class="blade-grid">
                    <div class="blade-table">
                        <StationTable state={state.part(same_table)} drawn={now.drawn.clone()}
                            point={now.point.clone()} points={later.points.clone()} beside={now.beside.clone()} />
                    </div>
                    <Curves state={state.clone()} drawn={now.drawn.clone()} point={now.point.clone()}
                        rig={now.rig.clone()} beside={now.beside.clone()} />
                </div>
            </Panel>
            <Panel id="fit" number={5} title="Fit" open={*open}
                onunfold={act.on(|open| Action::Unfold(Part::Fit, open))}
                result={fit::in_a_line(state, later.envelope.as_ref().and_then(|e| e.as_ref().as_ref()))}>
                <FitPanel state={state.part(fit::same_fit)} envelope={later.envelope.clone()}
                    points={later.points.clone()} limit_rpm={limit_rpm(later)}
                    take_off={later.take_off} ceilings={later.ceilings} worth={later.worth.clone()} />
            </Panel>
            <Panel id="shape" number={6} title="Shape" result={shape::in_a_line(state)} open={*open}>
                <ShapePanel state={state.part(shape::same_shape)} rig={later.rig.clone()} />
            </Panel>
            <Panel id="coefficients" number={7} title="Coefficients" open={*open}
                result={coefficients::in_a_line((*now.point).as_ref())}>
                <Coefficients curves={later.curves.clone()} point={later.selected()} units={state.units} />
            </Panel>
            <Panel id="sections" number={8} title="Sections" result={sections::in_a_line(state)} open={*open}>
                <Sections state={state.part(sections::same)} rig={later.rig.clone()} points={later.points.clone()} />
            </Panel>
            <Panel id="bench" number={9} title="Bench" open={*open}
                onunfold={act.on(|open| Action::Unfold(Part::Bench, open))}
                result={bench::in_a_line(state, later.strength.as_deref())}>
                <BenchPanel state={state.part(bench::same_bench)} strength={later.strength.clone()} />
            </Panel>
            <Workshop number={10} rig={later.rig.clone()} state={state.part(workshop::same_making)} />
            <Panel id="carved" number={11} title="As carved" open=false
                onunfold={act.on(|open| Action::Unfold(Part::Carved, open))}
                result={carved::in_a_line(state, later.carved.as_deref())}>
                <CarvedPanel state={state.part(carved::same_carved)} found={later.carved.clone()}
                    rig={later.rig.clone()} />
            </Panel>
            <Panel id="logbook" number={12} title="Logbook" open=false
                onunfold={act.on(|open| Action::Unfold(Part::Logbook, open))}
                result={logbook::in_a_line(state)}>
                <LogbookPanel state={state.part(logbook::same_logbook)} logged={later.logged.clone()}
                    rig={later.rig.clone()} />
            </Panel>
            <Panel id="method" number={13} title="How it is computed" result={method_line(props)} open={*open}>
                <MethodPanel state={state.part(same_method)} rig={later.rig.clone()} point={later.selected()} />
            </Panel>
            <Panel id="report" number={14} title="Report" open=false
                result="the whole job as pages to print or to save as PDF">
                <ReportPanel rig={later.rig.clone()} units={state.units} point={state.point} />
            </Panel>
        </>
    }
}

fn against(props: &PageProps) -> Against {
    let limits = props.state.job().wishes.as_ref().map_or_else(Limits::default, |w| w.limits.clone());
    Against {
        limits,
        engine_rpm: limit_rpm(&props.later),
        hovers: hovers(props.state.job().aircraft.as_ref()),
    }
}

fn limit_rpm(later: &Later) -> Option<f64> {
    later.rig.as_ref()?.0.shaft.as_ref()?.limit_rpm()
}

fn same_points(a: &State, b: &State) -> bool {
    a.job().flight_points == b.job().flight_points
        && hovers(a.job().aircraft.as_ref()) == hovers(b.job().aircraft.as_ref())
        && a.drafts == b.drafts
        && a.point == b.point
        && a.units == b.units
}

fn same_table(a: &State, b: &State) -> bool {
    a.job().propeller == b.job().propeller
        && a.job().sections == b.job().sections
        && a.job().flight_points == b.job().flight_points
        && a.drafts == b.drafts
        && (a.point, a.station, a.units) == (b.point, b.station, b.units)
}

fn same_settings(a: &State, b: &State) -> bool {
    let (p, q) = (&a.job().propeller, &b.job().propeller);
    let sections =
        |s: &State| s.job().propeller.stations.iter().map(|s| s.section.clone()).collect::<Vec<_>>();
    p.blades == q.blades
        && p.diameter_m == q.diameter_m
        && p.hub_diameter_m == q.hub_diameter_m
        && p.rotation == q.rotation
        && p.pitch_control == q.pitch_control
        && p.angle_reference == q.angle_reference
        && p.blockage == q.blockage
        && a.job().sections == b.job().sections
        && sections(a) == sections(b)
        && a.drafts == b.drafts
        && a.units == b.units
}

fn same_method(a: &State, b: &State) -> bool {
    a.job().method == b.job().method && a.drafts == b.drafts && a.units == b.units
}

fn points_line(count: usize, answered: usize, worked_out: usize) -> String {
    let points = if count == 1 { "1 point".into() } else { format!("{count} points") };
    if worked_out < count || answered == count {
        points
    } else {
        format!("{points}, {} without an answer", count - answered)
    }
}

fn method_line(props: &PageProps) -> String {
    let solidity = props.now.rig.as_ref().map(|r| r.0.propeller_figures());
    let figures = solidity.map_or_else(
        || NO_FIGURE.to_string(),
        |p| format!("activity factor {}, solidity {}", fixed(p.activity_factor, 0), fixed(p.solidity, 3)),
    );
    format!("{} elements a blade; {figures}", props.state.job().method.elements)
}

/// Whether there is room for open panels.
fn wide() -> bool {
    let width = web_sys::window().and_then(|w| w.inner_width().ok()).and_then(|w| w.as_f64());
    width.is_none_or(|w| w >= 620.0)
}
