//! The reducer: entries, steps back and forth, drags, opening.

use spokeshave::job::{AngleReference, DEMOS, Job};

use super::*;
use crate::units::{LengthUnit, Units};

fn start() -> State {
    State::started(None, None)
}

fn typed(state: &State, field: Field, text: &str) -> State {
    state.after(Action::Type(field, text.into())).after(Action::Commit(field))
}

/// With the cruise set by its rpm.
fn by_rpm() -> State {
    start().after(Action::Choose(Choice::Setting(2, SettingKind::Rpm), Running::default()))
}

const ANGLE_8: Field = Field::Station(7, Measure::Angle);
const CHORD_9: Field = Field::Station(8, Measure::Chord);

fn angle_deg(state: &State, i: usize) -> f64 {
    drawn(state.job())[i].angle_deg
}

#[test]
fn it_starts_with_the_cruise_near_three_quarters_of_the_radius() {
    let state = start();
    assert_eq!(state.job().flight_points[state.point].name, "Cruise");
    assert!((state.job().propeller.stations[state.station].radius_fraction - 0.75).abs() < 0.05);
}

#[test]
fn the_plain_job_is_valid() {
    assert!(Job::from_json(BLANK).is_ok());
}

#[test]
fn an_entry_is_one_step_with_a_name() {
    let state = typed(&start(), CHORD_9, "70");
    assert!((state.job().propeller.stations[8].chord_m - 0.07).abs() < 1e-12);
    assert_eq!(state.history.undoes(), Some("chord at station 9"));
    let back = state.after(Action::Undo);
    assert_eq!(**back.job(), **start().job());
    assert_eq!(back.history.redoes(), Some("chord at station 9"));
    assert_eq!(**back.after(Action::Redo).job(), **state.job());
}

#[test]
fn typing_changes_nothing_until_it_is_meant() {
    let state = start().after(Action::Type(ANGLE_8, "2".into()));
    assert_eq!(**state.job(), **start().job());
    assert!(state.after(Action::GiveUp(ANGLE_8)).drafts.is_empty());
}

#[test]
fn a_wrong_entry_stays_as_typed_says_what_is_allowed_and_changes_nothing() {
    for (field, text, said) in [
        (CHORD_9, "-3", "Allowed is above 0, up to 1 520 mm."),
        (ANGLE_8, "95", "Allowed is −90 to 90°."),
        (ANGLE_8, "abc", "Not a number. It was 20.2°. Allowed is −90 to 90°."),
        (Field::Blades, "2.5", "A whole number is needed."),
        (Field::Blades, "13", "Allowed is 1 to 12."),
        (Field::Station(8, Measure::Thickness), "400", "Allowed is 0.38 to 76.5 mm."),
        (Field::Point(2, PointFigure::Airspeed), "9000", "Allowed is 0 to 1 224 km/h."),
        (Field::Point(2, PointFigure::Setting), "0", "Allowed is 1 to 100 000 rpm."),
        (Field::Hub, "5 m", "Allowed is 0 to 1 368 mm."),
    ] {
        let start = by_rpm();
        let state = typed(&start, field, text);
        let draft = &state.drafts[&field];
        assert_eq!(draft.text, text);
        let message = draft.message.clone().unwrap().replace(['\u{202f}', '\u{a0}'], " ");
        assert_eq!(message, said);
        assert_eq!(**state.job(), **start.job());
        assert_eq!(state.history.undoes(), start.history.undoes());
    }
}

#[test]
fn a_radius_has_to_stay_between_its_neighbours() {
    let field = Field::Station(8, Measure::Radius);
    let message = typed(&start(), field, "900").drafts[&field].message.clone().unwrap();
    assert!(message.contains("between its neighbours"), "{message}");
    assert!(typed(&start(), field, "605").drafts.is_empty());
}

#[test]
fn what_is_allowed_is_said_in_the_unit_shown() {
    let inches = Units { length: LengthUnit::Inch, ..Units::default() };
    let state = typed(&start().after(Action::Units(inches)), CHORD_9, "99");
    assert_eq!(state.drafts[&CHORD_9].message.as_deref(), Some("Allowed is above 0, up to 59.84\u{a0}in."));
}

#[test]
fn inches_stay_when_another_job_brings_other_units() {
    let inches = Units { length: LengthUnit::Inch, ..start().units };
    let small = start().after(Action::Units(inches)).after(Action::Demo(2));
    assert_eq!((small.units.length, small.units.power), (LengthUnit::Inch, crate::units::PowerUnit::Watt));
    let picked = Units { power: crate::units::PowerUnit::Horsepower, ..inches };
    assert_eq!(start().after(Action::Units(picked)).after(Action::Demo(2)).units, picked);
}

#[test]
fn chord_and_thickness_are_measures_of_the_wood_and_do_not_move_each_other() {
    let before = drawn(start().job())[8];
    let state = typed(&start(), CHORD_9, "70,0");
    assert!((drawn(state.job())[8].thickness_m - before.thickness_m).abs() < 1e-12);
    let state = typed(&state, Field::Station(8, Measure::Thickness), "10");
    assert!((drawn(state.job())[8].thickness_m - 0.01).abs() < 1e-12);
    assert!((drawn(state.job())[8].chord_m - 0.07).abs() < 1e-12);
}

#[test]
fn an_angle_typed_on_the_face_is_the_angle_on_the_face_whatever_the_reference() {
    let face = Field::Station(4, Measure::FaceAngle);
    let by_face =
        start().after(Action::Choose(Choice::Reference(AngleReference::FlatFace), Running::default()));
    for state in [start(), by_face] {
        let state = typed(&state, face, "24.0");
        assert!((drawn(state.job())[4].face_angle_deg.unwrap() - 24.0).abs() < 1e-9);
        let state = typed(&state, Field::Station(4, Measure::Angle), "27.5");
        assert!((angle_deg(&state, 4) - 27.5).abs() < 1e-9);
    }
}

#[test]
fn a_pitch_can_be_typed_in_place_of_an_angle() {
    let state = typed(&start(), Field::Station(4, Measure::Pitch), "1200");
    assert_eq!(state.job().propeller.stations[4].angle_deg, None);
    assert!((drawn(state.job())[4].pitch_m - 1.2).abs() < 1e-12);
    let state = typed(&state, Field::Station(4, Measure::Angle), "25");
    assert_eq!(state.job().propeller.stations[4].pitch_m, None);
}

#[test]
fn a_text_that_was_not_changed_changes_nothing() {
    let job = start().job().clone();
    for i in 0..job.propeller.stations.len() {
        for measure in [Measure::Radius, Measure::Chord, Measure::FaceAngle, Measure::Pitch] {
            let field = Field::Station(i, measure);
            let text = shown_text(&job, &drawn(&job), start().units, field);
            let state = typed(&start(), field, &text);
            assert!(state.history.undoes().is_none() && state.drafts.is_empty());
        }
    }
}

#[test]
fn a_drag_is_one_step_and_neighbours_follow() {
    let before = start();
    let held = before.after(Action::Take(Held::Station(7, Measure::Angle)));
    let state = [21.0, 21.5, 22.2].iter().fold(held, |s, &deg| s.after(Action::DragTo(deg)));
    assert!((angle_deg(&state, 7) - 22.2).abs() < 1e-9);
    assert!((angle_deg(&state, 6) - (angle_deg(&before, 6) + 1.0)).abs() < 1e-9);
    assert!((angle_deg(&state, 5) - angle_deg(&before, 5)).abs() < 1e-9);
    let state = state.after(Action::LetGo);
    assert_eq!(state.history.undoes(), Some("blade angle at station 8"));
    assert_eq!(**state.after(Action::Undo).job(), **before.job());
}

#[test]
fn a_drag_can_be_put_back_and_leaves_no_step() {
    let state = start().after(Action::Take(Held::Station(3, Measure::Chord))).after(Action::DragTo(0.12));
    let back = state.after(Action::PutBack);
    assert_eq!(**back.job(), **start().job());
    assert_eq!(back.history.undoes(), None);
}

#[test]
fn a_drag_past_what_is_allowed_stops_there() {
    let state = start().after(Action::Take(Held::Station(3, Measure::Angle))).after(Action::DragTo(40.0));
    assert_eq!(**state.after(Action::DragTo(120.0)).job(), **state.job());
}

#[test]
fn an_airspeed_dragged_is_one_step_and_selects_its_flight_point() {
    let airspeed = |s: &State| s.job().flight_points[1].airspeed_m_s.unwrap();
    let held = start().after(Action::Take(Held::Airspeed(1)));
    let state = [31.0, 33.0, -4.0].iter().fold(held, |s, &v| s.after(Action::DragTo(v)));
    assert_eq!((airspeed(&state), state.point), (33.0, 1), "below rest there is no airspeed");
    let state = state.after(Action::LetGo);
    assert_eq!(state.history.undoes(), Some("airspeed of Climb"));
    assert_eq!(**state.after(Action::Undo).job(), **start().job());
    let nudged = start().after(Action::Nudge(Held::Airspeed(1), 31.0));
    assert_eq!(airspeed(&nudged.after(Action::Nudge(Held::Airspeed(1), 32.0)).after(Action::Undo)), 30.5);
}

#[test]
fn a_run_of_key_presses_is_one_step() {
    let nudge = |deg| Action::Nudge(Held::Station(7, Measure::Angle), deg);
    let state = start().after(nudge(19.6)).after(nudge(19.7)).after(Action::EndRun).after(nudge(19.8));
    let once = state.after(Action::Undo);
    assert!((angle_deg(&once, 7) - 19.7).abs() < 1e-9);
    assert_eq!(**once.after(Action::Undo).job(), **start().job());
}

#[test]
fn stations_and_flight_points_come_and_go() {
    let choose = |s: &State, c| s.after(Action::Choose(c, Running::default()));
    let n = start().job().propeller.stations.len();
    let more = choose(&start(), Choice::AddStation(10));
    assert_eq!((more.job().propeller.stations.len(), more.station), (n + 1, 11));
    assert_eq!(**choose(&more, Choice::RemoveStation(11)).job(), **start().job());
    let point = choose(&start(), Choice::AddPoint(2));
    assert_eq!(point.point, 4);
    assert_eq!(point.job().flight_points[4].name, "Point 1");
    let mut few = start();
    for _ in 0..9 {
        few = choose(&few, Choice::RemoveStation(0));
    }
    let refused = choose(&few, Choice::RemoveStation(0));
    assert_eq!(refused.job().propeller.stations.len(), 2);
    assert!(refused.notice.is_some());
}

#[test]
fn a_file_that_is_no_job_changes_nothing_and_says_where() {
    let broken = DEMOS[1].json.replacen("\"chord_m\": 0.0", "\"chord_m\": -0.0", 1);
    for text in ["", "{", "{\"spokeshave\": 2}", &broken] {
        let state = typed(&start(), ANGLE_8, "19");
        let after = state.after(Action::Open("x.json".into(), text.into()));
        assert_eq!(**after.job(), **state.job());
        let notice = after.notice.unwrap();
        assert!(notice.title.contains("x.json") && !notice.lines.is_empty());
    }
    let after = start().after(Action::Open("x.json".into(), broken));
    assert!(after.notice.unwrap().lines[0].starts_with("propeller.stations["));
}

#[test]
fn it_knows_whether_the_job_is_saved_as_a_file() {
    let saved = start().after(Action::Saved);
    assert!(!start().is_filed() && saved.is_filed());
    let changed = typed(&saved, ANGLE_8, "19");
    assert!(!changed.is_filed() && changed.after(Action::Undo).is_filed());
    assert!(changed.after(Action::Open("x.json".into(), DEMOS[1].json.into())).is_filed());
}

#[test]
fn opening_a_job_can_be_undone() {
    let state = typed(&start(), ANGLE_8, "19").after(Action::Demo(1));
    assert_eq!(state.job().title, Job::from_json(DEMOS[1].json).unwrap().title);
    assert!((angle_deg(&state.after(Action::Undo), 7) - 19.0).abs() < 1e-9);
}

#[test]
fn a_job_kept_that_cannot_be_read_is_said() {
    assert!(State::started(Some("{\"spokeshave\": 9}"), None).notice.is_some());
}

#[test]
fn another_kind_of_setting_starts_from_what_the_point_runs_at() {
    let running = Running { rpm: Some(2641.3), power_w: Some(31_300.0) };
    let set = |kind| {
        start().after(Action::Choose(Choice::Setting(2, kind), running)).job().flight_points[2]
            .setting
            .clone()
    };
    assert_eq!(set(SettingKind::Rpm), spokeshave::job::Setting::Rpm { rpm: 2641.0 });
    assert_eq!(set(SettingKind::Power), spokeshave::job::Setting::Power { power_w: 31_300.0 });
}

#[test]
fn full_throttle_without_an_airspeed_is_top_speed() {
    let field = Field::Point(1, PointFigure::Airspeed);
    assert_eq!(typed(&start(), field, "").job().flight_points[1].airspeed_m_s, None);
    let level = Field::Point(2, PointFigure::Airspeed);
    let refused = typed(&start(), level, "");
    assert!(refused.drafts[&level].message.is_some());
}

#[test]
fn a_name_may_be_used_once() {
    let field = Field::Point(0, PointFigure::Name);
    let state = typed(&start(), field, "Cruise");
    assert!(state.drafts[&field].message.as_ref().unwrap().contains("used once"));
    assert_eq!(typed(&start(), field, "Run-up").job().flight_points[0].name, "Run-up");
}

#[test]
fn shares_fall_off_over_the_span() {
    assert_eq!((follows(0, 0), follows(1, 0)), (1.0, 0.0));
    assert!((follows(1, 1) - 0.5).abs() < 1e-12);
    assert!(follows(1, 3) > follows(2, 3) && follows(3, 3) > 0.0 && follows(4, 3) == 0.0);
}
