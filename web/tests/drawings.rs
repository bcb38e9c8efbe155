//! Every drawing, rendered to text without a browser, for every example and flight point.

use spokeshave::fit::Along;
use spokeshave::job::{DEMOS, Figure, Job};
use spokeshave::result::{PointResult, StationResult};
use spokeshave::rig::Rig;
use spokeshave_web::act::Seen;
use spokeshave_web::background::shape::{Order, Report, Task, carried_out};
use spokeshave_web::blade_view::{
    BladeRack, BladeStrip, DepartureChart, FlightMark, Planform, RadiusAxis, StationCard,
};
use spokeshave_web::chart::line::{Axis, LineChart, Series};
use spokeshave_web::chart::unit::Unit;
use spokeshave_web::results::Offered;
use spokeshave_web::results::RigRef;
use spokeshave_web::state::{Action, Beside, State, Variant};
use spokeshave_web::view::fit::FitPanel;
use spokeshave_web::view::machine::{AircraftPanel, EnginePanel};
use spokeshave_web::view::shape::{ChartDrawing, CostDrawings, ShapePanel};
use std::rc::Rc;
use yew::prelude::*;

/// What is drawn.
#[derive(Clone, Copy, Debug, Default, PartialEq, Properties)]
struct Shown {
    /// Which example.
    demo: usize,
    /// Which flight point.
    point: usize,
    /// Which station.
    station: usize,
    /// Whether all figures that may be missing are missing.
    silent: bool,
}

fn job(shown: &Shown) -> Job {
    Job::from_json(DEMOS[shown.demo].json).expect("examples are valid")
}

fn stations(shown: &Shown, point: &PointResult) -> Vec<StationResult> {
    let silence = |s: &StationResult| StationResult {
        radius_m: s.radius_m,
        chord_m: s.chord_m,
        blade_angle_deg: s.blade_angle_deg,
        ..StationResult::default()
    };
    if shown.silent { point.stations.iter().map(silence).collect() } else { point.stations.clone() }
}

#[component]
fn BladeDrawings(shown: &Shown) -> Html {
    let rig = Rig::new(&job(shown)).expect("examples are valid");
    let point = rig.point(shown.point).expect("the point is there");
    let blade = &rig.rotor.blade;
    let shape = Rc::new(Planform::of(blade));
    let axis = RadiusAxis::new(blade.hub_radius_m, blade.radius_m, 440.0);
    let all = Rc::new(stations(shown, &point));
    let (selected, length, on_select) = (shown.station, Unit::MM, Callback::noop());
    let outline = Rc::new(vec![[1.0, 0.0], [0.3, 0.1], [0.0, 0.0], [0.3, -0.02]]);
    let curve = rig.section_curve(shown.point, selected);
    let curve = Rc::new(curve.iter().map(|p| [p.alpha_deg, p.lift_to_drag]).collect::<Vec<_>>());
    html! {
        <>
            <BladeRack shape={shape.clone()} stations={all.clone()} {axis} {length} {selected} on_select={on_select.clone()} />
            <BladeStrip {shape} stations={all.clone()} {length} {selected} on_select={on_select.clone()} />
            if let Some(station) = all.get(selected) {
                <StationCard station={station.clone()} index={selected} count={all.len()} airspeed_m_s={point.airspeed_m_s}
                    rpm={point.rpm} {outline} lift_to_drag={curve} {length} speed={Unit::KM_H}
                    thrust={Unit { name: "N/m", ..Unit::ratio(0) }} torque={Unit { name: "N m/m", ..Unit::ratio(0) }} {on_select} />
            }
        </>
    }
}

#[component]
fn MapDrawing(shown: &Shown) -> Html {
    let job = job(shown);
    let rig = Rig::new(&job).expect("examples are valid");
    let Some(map) = rig.map(shown.point, Along::FullThrottle, 60, 40) else { return html! { "no map" } };
    let points: Vec<PointResult> = (0..job.flight_points.len()).filter_map(|i| rig.point(i)).collect();
    let mark = |(i, p): (usize, &PointResult)| FlightMark {
        name: p.name.clone().into(),
        advance_m: p.figures.effective_pitch_m,
        selected: i == shown.point,
    };
    let marks: Vec<FlightMark> = points.iter().enumerate().map(mark).collect();
    let all = stations(shown, &points[shown.point]);
    let stations: Vec<_> = all.iter().map(|s| (s.radius_m, s.departure_deg)).collect();
    let blade = &rig.rotor.blade;
    let axis = RadiusAxis::new(blade.hub_radius_m, blade.radius_m, 440.0);
    html! {
        <DepartureChart map={Rc::new(map)} {axis} {marks} {stations} selected={shown.station} length={Unit::INCH}
            speed={Unit::KNOT} radius_figures={true} on_station={Callback::noop()} on_mark={Callback::noop()} />
    }
}

/// The page's state with an example and a flight point of it.
fn state(shown: &Shown) -> State {
    State::started(None, None).after(Action::Demo(shown.demo)).after(Action::SelectPoint(shown.point))
}

#[component]
fn MachinePanels(shown: &Shown) -> Html {
    let state = Seen::new(Rc::new(state(shown)));
    let rig = Rig::new(state.job()).expect("examples are valid");
    let curve = spokeshave::fit::offer(&rig, shown.point, 48);
    let crossings = spokeshave::fit::offer_crossings(&rig, shown.point);
    let (offer, point) = (Rc::new(Offered { curve, crossings }), Rc::new(rig.point(shown.point)));
    html! {
        <>
            <AircraftPanel state={state.clone()} />
            <EnginePanel {state} {offer} {point} />
        </>
    }
}

#[component]
fn SpeedRange(shown: &Shown) -> Html {
    let state = Seen::new(Rc::new(state(shown)));
    let rig = Rig::new(state.job()).expect("examples are valid");
    let fractions: Vec<f64> = state.job().propeller.stations.iter().map(|s| s.radius_fraction).collect();
    let envelope = spokeshave::fit::envelope(&rig, &state.job().flight_points[shown.point], 60, &fractions);
    let points: Vec<_> = (0..state.job().flight_points.len()).map(|i| Rc::new(rig.point(i))).collect();
    let limit_rpm = rig.shaft.as_ref().and_then(spokeshave::engine::Shaft::limit_rpm);
    html! { <FitPanel {state} envelope={Some(Rc::new(envelope))} {points} {limit_rpm} /> }
}

fn shaped(state: &State, task: Task) -> Report {
    carried_out(&Order { job: state.job().to_json(), task }, |_| {})
}

#[component]
fn Shape(shown: &Shown) -> Html {
    let mut state = state(shown);
    let count = state.job().flight_points.len();
    let alone = (0..count).map(|i| f64::from(u8::from(i == shown.point))).collect();
    if let Report::Blade(propeller, said) = shaped(&state, Task::Twist(alone)) {
        let variant = Variant { name: "a twisted one".into(), propeller: *propeller, said };
        state = state.after(Action::Beside(Beside::Keep(variant)));
    }
    let rig = Rc::new(Rig::new(state.job()).expect("examples are valid"));
    let chart = shaped(&state, Task::Chart(shown.point, Figure::Efficiency, 6));
    let costs = shaped(&state, Task::Errors([0.25, 0.5, 0.3]));
    let (state, units) = (Seen::new(Rc::new(state.clone())), state.units);
    html! {
        <>
            <ShapePanel state={state.clone()} rig={Some(RigRef(rig.clone()))} />
            if let Report::Chart(chart) = chart { <ChartDrawing chart={Rc::new(*chart)} rig={RigRef(rig)} {units} /> }
            if let Report::Errors(costs) = costs { <CostDrawings {state} costs={Rc::new(costs)} /> }
        </>
    }
}

#[component]
fn BrokenCurve() -> Html {
    let axis = |words: &'static str| Axis { words: words.into(), unit: Unit::ratio(2), span: None };
    let series = vec![Series {
        name: "thrust".into(),
        points: vec![[0.0, 1.0], [0.5, f64::NAN], [1.0, f64::INFINITY], [1.5, 0.2]],
        ..Series::default()
    }];
    html! {
        <>
            <LineChart title="Broken" x={axis("J")} y={axis("CT")} {series} />
            <LineChart title="Empty" x={axis("J")} y={axis("CT")} series={Vec::<Series>::new()} />
        </>
    }
}

fn drawn<C: BaseComponent>(props: impl FnOnce() -> C::Properties + Send + 'static) -> String {
    let text = pollster::block_on(yew::ServerRenderer::<C>::with_props(props).hydratable(false).render());
    for bad in ["NaN", ">inf", "\"inf", "-inf", "∞"] {
        assert!(!text.contains(bad), "{bad} in {text}");
    }
    text
}

/// Every flight point of every example.
fn everywhere() -> impl Iterator<Item = Shown> {
    (0..DEMOS.len()).flat_map(|demo| {
        let points = job(&Shown { demo, ..Shown::default() }).flight_points.len();
        (0..points).map(move |point| Shown { demo, point, ..Shown::default() })
    })
}

#[test]
fn blades_are_drawn_for_every_example_and_flight_point() {
    for shown in everywhere() {
        let count = job(&shown).propeller.stations.len();
        for station in [0, count / 2, count - 1] {
            let shown = Shown { station, ..shown };
            let text = drawn::<BladeDrawings>(move || shown);
            assert_eq!(text.matches("role=\"listbox\"").count(), 2, "{shown:?}");
            assert!(text.matches("role=\"option\"").count() >= 2 * 9, "{shown:?}");
            assert_eq!(text.matches("aria-selected=\"true\"").count(), 2, "{shown:?}");
        }
    }
}

#[test]
fn what_has_no_figure_is_said_in_words() {
    let text = drawn::<BladeDrawings>(|| Shown { silent: true, ..Shown::default() });
    assert!(text.contains("No answer at this flight point."));
    assert!(text.contains("No velocity triangle"));
    assert!(text.contains("no departure"));
}

#[test]
fn maps_are_drawn_for_every_example_and_stay_small() {
    // 60 by 40 cells; twice of what the examples take today.
    const MOST_BYTES: usize = 120_000;
    for shown in everywhere() {
        let text = drawn::<MapDrawing>(move || shown);
        assert!(text.contains("in per turn") && text.contains("kt"), "{shown:?}");
        assert!(text.len() < MOST_BYTES, "{shown:?}: {} bytes", text.len());
    }
}

#[test]
fn curves_with_gaps_and_without_points_are_drawn() {
    let text = drawn::<BrokenCurve>(|| ());
    assert!(text.contains("Broken") && text.contains("Empty"));
}

#[test]
fn aircraft_and_engine_are_drawn_for_every_example_and_flight_point() {
    for shown in everywhere() {
        let (demo, text) = (shown.demo, drawn::<MachinePanels>(move || shown));
        let (hovers, piston) = (demo == 2, demo == 0);
        assert_eq!(text.contains("To hover each rotor has to hold"), hovers, "{shown:?}");
        assert_eq!(text.contains("Speeds of the aircraft"), !hovers, "{shown:?}");
        assert_eq!(text.contains("Full-throttle curve: remove row 5"), piston, "{shown:?}");
        assert_eq!(text.contains("Cells in series"), !piston, "{shown:?}");
        assert!(text.contains("full throttle") && text.contains("propeller at"), "{shown:?}");
    }
}

#[test]
fn the_speed_range_is_drawn_for_every_example_and_flight_point() {
    for shown in everywhere() {
        let job = job(&shown);
        let text = drawn::<SpeedRange>(move || shown);
        assert!(text.contains("Before you act"), "{shown:?}");
        assert!(text.contains("Standing start") && text.contains("Propeller rpm"), "{shown:?}");
        let movable = job.flight_points[shown.point].airspeed_m_s.is_some();
        assert_eq!(text.matches("role=\"slider\"").count(), usize::from(movable), "{shown:?}");
        assert_eq!(text.contains("Rate of climb"), shown.demo != 2, "{shown:?}");
    }
}

#[test]
fn shapes_are_drawn_for_every_example_and_flight_point() {
    for shown in everywhere() {
        let text = drawn::<Shape>(move || shown);
        assert!(text.contains("Before you act") && text.contains("Least induced loss"), "{shown:?}");
        assert!(text.contains("over pitch and diameter") && text.contains("drawn-mark"), "{shown:?}");
        assert!(
            text.contains("For each degree of blade angle") && text.contains("Errors apart"),
            "{shown:?}"
        );
        let kept = text.contains("a twisted one") && text.contains("Use a twisted one");
        assert!(kept || text.contains("No other blade is kept yet"), "{shown:?}");
    }
}
