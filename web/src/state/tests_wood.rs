//! The reducer: what the blade is made of and how it is held.

use spokeshave::job::Species;
use spokeshave::wood::SPECIES;

use super::*;

fn typed(state: &State, field: Field, text: &str) -> State {
    state.after(Action::Type(field, text.into())).after(Action::Commit(field))
}

fn chosen(state: &State, choice: WoodChoice) -> State {
    state.after(Action::Choose(Choice::Wood(choice), Running::default()))
}

#[test]
fn a_job_without_wood_shows_the_usual_one_and_takes_one_when_it_is_changed() {
    let mut job = Job::clone(State::started(None, None).job());
    job.wood = None;
    let state = State::started(Some(&job.to_json()), None);
    let moisture = Field::Wood(WoodFigure::Moisture);
    assert_eq!(shown_text(state.job(), &[], state.units, moisture), "12");
    assert!(typed(&state, moisture, "12").job().wood.is_none());
    let drier = typed(&state, moisture, "8");
    assert_eq!(drier.job().wood.as_ref().map(|w| w.moisture_percent), Some(8.0));
    let refused = typed(&state, moisture, "200");
    assert!(refused.job().wood.is_none() && !refused.drafts.is_empty());
    let ash = SPECIES.iter().position(|s| s.name == "white-ash").unwrap();
    let picked = chosen(&drier, WoodChoice::Species(ash));
    assert_eq!(picked.job().wood.as_ref().unwrap().species, Species::Named("white-ash".into()));
    assert_eq!((species_of(picked.job()), wood_of(picked.job()).moisture_percent), (Some(ash), 8.0));
    assert_eq!(**picked.after(Action::Undo).after(Action::Undo).job(), **state.job());
}

#[test]
fn how_the_blade_is_made_is_typed_and_taken_out_again() {
    let mut job = Job::clone(State::started(None, None).job());
    job.bench = None;
    let state = State::started(Some(&job.to_json()), None);
    let stacking = Field::Making(MakingFigure::Stacking);
    assert_eq!(shown_text(state.job(), &[], state.units, stacking), "");
    let read = typed(&state, stacking, "25");
    assert_eq!(read.job().bench.as_ref().unwrap().stacking_fraction, Some(0.25));
    assert_eq!(shown_text(read.job(), &[], read.units, stacking), "25");
    let refused = typed(&read, stacking, "125");
    assert_eq!(refused.job(), read.job());
    assert!(refused.drafts[&stacking].message.as_ref().unwrap().contains("100"));
    let flange = |state: &State, to| state.after(Action::Choose(Choice::Flange(to), Running::default()));
    let both = flange(&read, Some(spokeshave::job::Flange::Sae2));
    assert_eq!(both.job().check(), vec![]);
    assert!(typed(&flange(&both, None), stacking, "").job().bench.is_none());
    for figure in MakingFigure::ALL.into_iter().filter(|f| *f != MakingFigure::Stacking) {
        let read = typed(&state, Field::Making(figure), "12");
        assert_eq!(figure.value(read.job()), Some(0.012), "{}", figure.name());
        assert!(read.job().to_json().contains(figure.path().trim_start_matches("bench.")));
    }
}

#[test]
fn a_hub_to_start_from_is_allowed_in_every_example_and_typed_back_unchanged() {
    for demo in 0..DEMOS.len() {
        let state = chosen(&State::started(None, None).after(Action::Demo(demo)), WoodChoice::Hub(true));
        assert_eq!(state.job().check(), vec![]);
        for field in WoodFigure::HUB.into_iter().chain(WoodFigure::BLADE).map(Field::Wood) {
            let text = shown_text(state.job(), &[], state.units, field);
            let after = typed(&state, field, &text);
            assert!(after.drafts.is_empty() && **after.job() == **state.job(), "{field:?} {text}");
        }
        assert!(chosen(&state, WoodChoice::Hub(false)).job().wood.as_ref().unwrap().hub.is_none());
    }
}
