//! Readings brought in as a sheet, and taken out again.

use spokeshave::carved::import;
use spokeshave::job::Carved;
use spokeshave::sheet::MOST_BYTES;
use yew::prelude::*;

use super::choose;
use crate::act::{Seen, use_act};
use crate::state::{CarvedChoice, State};
use crate::view::pasted::Pasted;

const HINT: &str =
    "blade,radius_mm,face angle,chord_mm,thickness_mm\n1,300,31 15,93.5,20.4\n1,540,18.6,76,11.2";

/// Properties of [`ReadingsSheet`].
#[derive(Properties, PartialEq)]
pub(super) struct ReadingsSheetProps {
    pub(super) state: Seen,
}

/// The sheet and the buttons.
#[component]
pub(super) fn ReadingsSheet(props: &ReadingsSheetProps) -> Html {
    let act = use_act();
    // Not switched off when nothing is left to take out: that would take the focus away from the button just
    // pressed.
    let none = props.state.job().carved.is_none();
    let clear = if none { Callback::noop() } else { choose(&act, |_: MouseEvent| CarvedChoice::Clear) };
    let take = {
        let (act, state) = (act.clone(), props.state.clone());
        Callback::from(move |text: AttrValue| match read(&state, &text) {
            Ok((carved, said)) => {
                choose(&act, |carved: Carved| CarvedChoice::Readings(Box::new(carved))).emit(carved);
                Ok(said)
            }
            Err(why) => Err(why),
        })
    };
    html! {
        <details class="import unprinted">
            <summary>{ "Bring in a sheet of readings, or start over" }</summary>
            <p class="note">
                { "A line of headings with units, then a row for each place: blade, radius_mm or station, \
                   face angle or chord-line angle, chord_mm, thickness_mm, track_mm. It takes the place of \
                   the readings above." }
            </p>
            <Pasted id="carved-sheet" label="Readings" hint={HINT} most_bytes={MOST_BYTES} {take} />
            <p class="buttons">
                <button type="button" class="act" aria-disabled={none.then_some("true")} onclick={clear}>
                    { "Take out all readings of the blades" }
                </button>
            </p>
        </details>
    }
}

fn read(state: &State, text: &str) -> Result<(Carved, String), String> {
    let job = state.job();
    let (carved, unused) =
        import::read(text, &job.propeller, job.carved.as_ref()).map_err(|e| e.to_string())?;
    let count: usize = carved.blades.iter().map(|b| b.readings.len()).sum();
    let unused = if unused.is_empty() { String::new() } else { format!(" Not used: {}.", unused.join(", ")) };
    Ok((carved, format!("Readings taken over: {count}.{unused}")))
}
