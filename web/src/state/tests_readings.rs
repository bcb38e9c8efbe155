//! Readings typed at the bench and out of the logbook.

use spokeshave::job::LogReading;

use super::*;

fn typed(state: &State, field: Field, text: &str) -> State {
    state.after(Action::Type(field, text.into())).after(Action::Commit(field))
}

#[test]
fn an_angle_may_be_in_degrees_and_minutes_and_an_empty_box_takes_it_out_again() {
    let start = State::new(Job::from_json(DEMOS[0].json).unwrap());
    let field = Field::Reading(1, 7, BladeFigure::Angle);
    let read = typed(&start, field, "18 30");
    let reading = read.job().carved.as_ref().unwrap().blades[1].readings[0];
    assert_eq!(reading.angle_deg, Some(18.5));
    assert!((reading.radius_m - 0.54).abs() < 1e-4);
    let more = typed(&read, Field::Reading(1, 7, BladeFigure::Chord), "76");
    assert_eq!(more.job().carved.as_ref().unwrap().blades[1].readings.len(), 1);
    let without = typed(&more, field, "");
    assert_eq!(without.job().carved.as_ref().unwrap().blades[1].readings[0].angle_deg, None);
    let none = typed(&without, Field::Reading(1, 7, BladeFigure::Chord), "");
    assert_eq!(none.job().carved.as_ref().unwrap().blades[1].readings.len(), 0);
}

#[test]
fn an_impossible_angle_is_refused_with_its_likely_cause_and_changes_nothing() {
    let start = State::new(Job::from_json(DEMOS[0].json).unwrap());
    let field = Field::Reading(0, 3, BladeFigure::Angle);
    for (text, said) in [("146.5", "read from the other side"), ("north", "ot a number")] {
        let refused = typed(&start, field, text);
        assert!(refused.job().carved.is_none());
        let message = refused.drafts[&field].message.clone().unwrap();
        assert!(message.contains(said), "{message}");
    }
}

#[test]
fn a_doubted_reading_is_confirmed_until_it_is_typed_anew() {
    let field = Field::Reading(1, 7, BladeFigure::Angle);
    let read = typed(&State::new(Job::from_json(DEMOS[0].json).unwrap()), field, "71");
    let confirmed = |state: &State| state.job().carved.as_ref().unwrap().blades[1].readings[0].confirmed;
    let choice = Choice::Carved(CarvedChoice::Confirm(1, 0, true));
    let right = read.after(Action::Choose(choice, Running::default()));
    assert!(!confirmed(&read) && confirmed(&right));
    assert!(!confirmed(&typed(&right, field, "70")));
}

#[test]
fn a_reading_between_the_stations_is_told_and_can_be_taken_out() {
    let start = State::new(Job::from_json(DEMOS[0].json).unwrap());
    let read = typed(&start, Field::Reading(0, 7, BladeFigure::Chord), "76");
    let mut carved = read.job().carved.clone().unwrap();
    let at_station_m = carved.blades[0].readings[0].radius_m;
    for off_m in [0.0009, 0.0011] {
        carved.blades[0].readings[0].radius_m = at_station_m + off_m;
        let sheet = Choice::Carved(CarvedChoice::Readings(Box::new(carved.clone())));
        let brought = read.after(Action::Choose(sheet, Running::default()));
        let between = between_stations(brought.job(), 0);
        let boxed = Field::Reading(0, 7, BladeFigure::Chord).value(brought.job(), &[]);
        assert_eq!(between.is_empty(), off_m < 0.001);
        assert_eq!(between.is_empty(), boxed == Some(0.076));
        for (i, reading) in between {
            assert_eq!(BladeFigure::Chord.of(reading), Some(0.076));
            let out = Choice::Carved(CarvedChoice::Remove(0, i));
            let out = brought.after(Action::Choose(out, Running::default()));
            assert!(out.job().carved.as_ref().unwrap().blades[0].readings.is_empty());
        }
    }
}

#[test]
fn a_reading_of_the_logbook_is_added_typed_and_removed() {
    let choose = |state: &State, choice: LogbookChoice| {
        state.after(Action::Choose(Choice::Logbook(choice), Running::default()))
    };
    let start = State::new(Job::from_json(DEMOS[0].json).unwrap());
    let one = choose(&start, LogbookChoice::Add);
    assert_eq!(one.job().logbook.as_ref().unwrap().readings[0], LogReading::default());
    let read =
        typed(&typed(&one, Field::Log(0, LogFigure::Rpm), "2950"), Field::Log(0, LogFigure::Throttle), "100");
    let reading = &read.job().logbook.as_ref().unwrap().readings[0];
    assert_eq!((reading.engine_rpm, reading.throttle), (Some(2950.0), Some(1.0)));
    for full in ["full", " Full "] {
        let read = typed(&one, Field::Log(0, LogFigure::Throttle), full);
        assert_eq!(read.job().logbook.as_ref().unwrap().readings[0].throttle, Some(1.0), "{full}");
    }
    // The box is in percent already: that is no cause to tell.
    let field = Field::Log(0, LogFigure::Throttle);
    let refused = typed(&one, field, "150");
    assert_eq!(refused.drafts[&field].message.as_deref(), Some("Allowed is 0 to 100\u{a0}%."));
    let level = choose(&read, LogbookChoice::Level(0, true));
    assert!(level.notice.is_some(), "level flight needs an airspeed");
    let gone = choose(&read, LogbookChoice::Remove(0));
    assert!(gone.job().logbook.as_ref().unwrap().readings.is_empty());
}
