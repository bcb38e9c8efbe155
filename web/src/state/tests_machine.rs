//! The reducer: aircraft and engine, their figures, kinds and rows.

use spokeshave::job::{Aircraft, AltitudeLaw, Engine};

use super::*;

fn start() -> State {
    State::started(None, None)
}

fn typed(state: &State, field: Field, text: &str) -> State {
    state.after(Action::Type(field, text.into())).after(Action::Commit(field))
}

fn chosen(state: &State, choice: Choice) -> State {
    state.after(Action::Choose(choice, Running::default()))
}

const MASS: Field = Field::Aircraft(AircraftFigure::Mass);
const FUEL: Field = Field::Engine(EngineFigure::Fuel);

fn rows(state: &State) -> usize {
    match &state.job().engine {
        Some(Engine::Piston(p)) => p.full_throttle.len(),
        _ => 0,
    }
}

#[test]
fn a_mass_is_typed_in_the_unit_shown_and_is_one_step() {
    let pounds = Units { mass: crate::units::MassUnit::Pound, ..start().units };
    for (state, text) in
        [(start(), "450"), (start(), "992.08 lb"), (start().after(Action::Units(pounds)), "450 kg")]
    {
        let after = typed(&state, MASS, text);
        let Some(mass_kg) = AircraftFigure::Mass.value(after.job()) else { panic!("no mass") };
        assert!((mass_kg - 450.0).abs() < 0.01, "{text}: {mass_kg}");
        assert_eq!(after.history.undoes(), Some("mass in flight"));
        assert_eq!(**after.after(Action::Undo).job(), **start().job());
    }
}

#[test]
fn every_figure_of_aircraft_and_engine_is_shown_and_typed_back_unchanged() {
    for demo in 0..DEMOS.len() {
        let state = start().after(Action::Demo(demo));
        for field in machine_fields() {
            let text = shown_text(state.job(), &[], state.units, field);
            let after = typed(&state, field, &text);
            assert!(
                after.drafts.is_empty() && after.history.undoes() == state.history.undoes(),
                "{field:?} {text}"
            );
        }
    }
}

fn machine_fields() -> Vec<Field> {
    use AircraftFigure as A;
    use EngineFigure as E;
    let aircraft = [A::Mass, A::WingArea, A::ZeroLiftDrag, A::InducedFactor, A::AspectRatio, A::Oswald];
    let engine = [E::CurveRpm(1), E::CurvePower(1), E::GearRatio, E::LimitRpm, E::Consumption, E::Fuel];
    let motor = [E::SpeedConstant, E::Resistance, E::NoLoadCurrent, E::Cells, E::CellVoltage, E::UsableShare];
    let engine = engine.into_iter().chain(motor).map(Field::Engine);
    aircraft.into_iter().map(Field::Aircraft).chain(engine).collect()
}

#[test]
fn what_is_wrong_stays_as_typed_with_what_is_allowed() {
    for (field, text, said) in [
        (MASS, "0", "Allowed is 0.01 to 100 000 kg."),
        (Field::Aircraft(AircraftFigure::Engines), "0", "Allowed is 1 to 12."),
        (Field::Engine(EngineFigure::GearRatio), "0", "Allowed is 0.1 to 20."),
        (Field::Engine(EngineFigure::CurvePower(1)), "0", "Allowed is 0.001 to 5 000 kW."),
        (
            Field::Engine(EngineFigure::CurveRpm(1)),
            "3000",
            "Allowed is above 2 000 and below 2 800 rpm, the rows beside it.",
        ),
        (Field::Engine(EngineFigure::CurveRpm(4)), "100", "Allowed is above 3 200 rpm, the row before."),
        (FUEL, "much", "Not a number. It was 50 kg. Allowed is "),
    ] {
        let state = typed(&start(), field, text);
        let draft = &state.drafts[&field];
        let message = draft.message.clone().unwrap().replace(['\u{202f}', '\u{a0}'], " ");
        assert_eq!(draft.text, text);
        assert!(message.starts_with(said), "{message}");
        assert_eq!(**state.job(), **start().job());
    }
}

#[test]
fn an_empty_box_takes_out_only_what_a_job_may_go_without() {
    let without = typed(&start(), FUEL, "");
    assert_eq!(EngineFigure::Fuel.value(without.job()), None);
    assert_eq!(EngineFigure::Fuel.value(typed(&without, FUEL, "40").job()), Some(40.0));
    assert!(typed(&start(), MASS, "").drafts[&MASS].message.is_some());
}

#[test]
fn drag_given_another_way_is_the_same_drag() {
    let factor = |s: &State| match &s.job().aircraft {
        Some(Aircraft::Aeroplane(a)) => a.drag.induced_factor(),
        _ => 0.0,
    };
    let by_ratio = chosen(&start(), Choice::Aircraft(AircraftChoice::DragBy(DragBy::AspectRatio)));
    assert!(AircraftFigure::AspectRatio.value(by_ratio.job()).is_some());
    assert_eq!(AircraftFigure::InducedFactor.value(by_ratio.job()), None);
    assert!((factor(&by_ratio) - factor(&start())).abs() < 1e-12);
    assert_eq!(by_ratio.history.undoes(), Some("how drag due to lift is given"));
}

#[test]
fn a_row_is_added_between_its_neighbours_and_undone() {
    let more = chosen(&start(), Choice::Engine(EngineChoice::AddRow(1)));
    assert_eq!((rows(&more), EngineFigure::CurveRpm(2).value(more.job())), (6, Some(2_600.0)));
    assert_eq!(**more.after(Action::Undo).job(), **start().job());
    let last = chosen(&start(), Choice::Engine(EngineChoice::AddRow(4)));
    assert_eq!(EngineFigure::CurveRpm(5).value(last.job()), Some(3_400.0));
    let mut few = start();
    for _ in 0..3 {
        few = chosen(&few, Choice::Engine(EngineChoice::RemoveRow(0)));
    }
    let refused = chosen(&few, Choice::Engine(EngineChoice::RemoveRow(0)));
    assert_eq!(rows(&refused), 2);
    assert!(refused.notice.is_some());
}

#[test]
fn every_kind_of_aircraft_and_engine_starts_valid_and_can_be_undone() {
    for demo in 0..DEMOS.len() {
        let state = start().after(Action::Demo(demo));
        for kind in AircraftKind::ALL {
            let after = chosen(&state, Choice::Aircraft(AircraftChoice::Kind(kind)));
            assert_eq!(AircraftKind::of(after.job().aircraft.as_ref()), kind);
            assert!(after.job().check().is_empty());
        }
        for kind in EngineKind::ALL {
            let after = chosen(&state, Choice::Engine(EngineChoice::Kind(kind)));
            assert_eq!(EngineKind::of(after.job().engine.as_ref()), kind);
            assert!(after.job().check().is_empty());
            assert!(after.notice.is_none());
        }
    }
}

#[test]
fn the_mass_stays_when_the_kind_of_aircraft_changes() {
    let kind = |k| Choice::Aircraft(AircraftChoice::Kind(k));
    let rotors = chosen(&start(), kind(AircraftKind::Multirotor));
    assert_eq!(AircraftFigure::Mass.value(rotors.job()), AircraftFigure::Mass.value(start().job()));
}

#[test]
fn power_is_held_to_a_height_that_can_be_typed() {
    let law = |k| Choice::Engine(EngineChoice::Altitude(k));
    let held = chosen(&start(), law(AltitudeKind::HeldTo));
    let field = Field::Engine(EngineFigure::HeldTo);
    let held = typed(&held, field, "1500");
    let Some(Engine::Piston(p)) = &held.job().engine else { panic!("no piston engine") };
    assert!(matches!(&p.altitude_law, AltitudeLaw::HeldTo(h) if h.altitude_m == 1_500.0));
    assert_eq!(**chosen(&held, law(AltitudeKind::Falling)).job(), **start().job());
}
