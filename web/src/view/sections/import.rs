//! A measured table, pasted or opened, becomes a section of the job.

use spokeshave::job::Section;
use spokeshave::section::import::{MOST_BYTES, read};
use yew::prelude::*;

use super::boxes::{Line, Opener, Sheet};
use crate::act::{Seen, use_act};

/// Properties of [`Import`].
#[derive(Properties, PartialEq)]
pub(super) struct ImportProps {
    pub(super) state: Seen,
    /// Told the name of a section that joins the job.
    pub(super) onjoin: Callback<String>,
}

/// Texts as typed, and what came of them.
#[derive(Clone, Debug, Default, PartialEq)]
struct Draft {
    table: String,
    from: String,
    name: String,
    face: String,
    message: Option<AttrValue>,
    said: Option<AttrValue>,
}

const HINT: &str = "alpha_deg,cl,cd,reynolds\n-2,0.15,0.0102,200000\n0,0.37,0.0095,200000";

/// The boxes and the button.
#[component]
pub(super) fn Import(props: &ImportProps) -> Html {
    let act = use_act();
    let draft = use_state_eq(|| Draft { name: "measured".into(), ..Draft::default() });
    let set = |change: fn(&mut Draft, String)| {
        let draft = draft.clone();
        Callback::from(move |text: String| {
            let mut next = Draft { message: None, said: None, ..(*draft).clone() };
            change(&mut next, text);
            draft.set(next);
        })
    };
    let on_open = {
        let draft = draft.clone();
        Callback::from(move |(name, text): (String, Result<String, String>)| {
            let next = match text {
                Ok(table) => Draft { table, from: name, message: None, said: None, ..(*draft).clone() },
                Err(why) => Draft { message: Some(format!("{name}: {why}").into()), ..(*draft).clone() },
            };
            draft.set(next);
        })
    };
    let add = {
        let draft = draft.clone();
        let (job, onjoin) = (props.state.job().clone(), props.onjoin.clone());
        Callback::from(move |_: MouseEvent| {
            let joined = section(&draft).and_then(|(section, said)| {
                let name = section.name.clone();
                Ok((name, said + &super::join(&act, &job, section)?))
            });
            let next = match joined {
                Ok((name, said)) => {
                    onjoin.emit(name);
                    Draft { message: None, said: Some(said.into()), ..(*draft).clone() }
                }
                Err(why) => Draft { message: Some(why.into()), said: None, ..(*draft).clone() },
            };
            draft.set(next);
        })
    };
    html! {
        <div class="import unprinted">
            <h3>{ "Bring in a measured table" }</h3>
            <p class="note">
                { "A line of headings with units, then a row for each angle. Needed: alpha_deg or \
                   alpha_rad, cl, cd. Also read: reynolds, mach, thickness_ratio or thickness [%]. Commas, \
                   semicolons or tabs between columns." }
            </p>
            <Sheet id="import-table" label="Table" text={draft.table.clone()} hint={HINT}
                message={draft.message.clone()}
                on={set(|d, text| { d.table = text; d.from.clear(); })} />
            <div class="settings">
                <Line id="import-name" label="Section name" long=true text={draft.name.clone()}
                    on={set(|d, text| d.name = text)} />
                <Line id="import-face" label="Chord line above the flat face; empty: no face" unit="°"
                    text={draft.face.clone()}
                    on={set(|d, text| d.face = text)} />
            </div>
            <p class="buttons">
                <Opener label="Open a table" accept=".csv,.txt,.tsv,text/csv,text/plain"
                    most_bytes={MOST_BYTES} on={on_open} />
                <button type="button" class="act" onclick={add}>{ "Add it to the job" }</button>
            </p>
            <p class="said" role="status">{ draft.said.clone() }</p>
        </div>
    }
}

/// The section, and what is said of it.
fn section(draft: &Draft) -> Result<(Section, String), String> {
    let read = read(&draft.table, &draft.from).map_err(|e| e.to_string())?;
    let polars = read.table.polars.len();
    let face = draft.face.trim().replace(',', ".").replace('−', "-");
    let face_angle_deg = match face.as_str() {
        "" => None,
        text => {
            Some(text.parse::<f64>().map_err(|_| format!("“{text}” is no number of degrees for the face."))?)
        }
    };
    let section = Section { face_angle_deg, ..Section::of(draft.name.trim(), read.table) };
    if let Some(problem) = section.problems().first() {
        return Err(problem.to_string());
    }
    if let Some(why) = super::taken(&section.name) {
        return Err(why);
    }
    let unused = if read.unused.is_empty() {
        String::new()
    } else {
        format!(" Not used: {}.", read.unused.join(", "))
    };
    let polars = if polars == 1 { "1 polar".into() } else { format!("{polars} polars") };
    let said = format!("{} rows, {polars} joined the job as “{}”.{unused}", read.rows, section.name);
    Ok((section, said))
}

#[cfg(test)]
mod tests {
    use super::*;
    use spokeshave::job::{DEMOS, Job};

    #[test]
    fn a_table_becomes_a_section_or_is_refused_with_its_place() {
        let rows: String = (0..6).map(|k| format!("{k},0.{k},0.01\n")).collect::<Vec<_>>().concat();
        let draft = Draft {
            table: format!("alpha_deg,cl,cd\n{rows}"),
            name: "tunnel".into(),
            face: "2,5".into(),
            ..Draft::default()
        };
        let (own, said) = section(&draft).unwrap();
        assert_eq!((own.name.as_str(), own.face_angle_deg), ("tunnel", Some(2.5)));
        assert!(said.contains("6 rows, 1 polar joined"), "{said}");
        let job = Job::from_json(DEMOS[0].json).unwrap();
        assert!(!super::super::joined(&job, "tunnel").contains("replaced"));
        assert!(super::super::joined(&job.with_section(own), "tunnel").contains("“tunnel” replaced"));
        let bad = Draft { table: draft.table.replace("cd", "drag"), ..draft.clone() };
        assert!(section(&bad).unwrap_err().contains("no column cd"));
        assert!(section(&Draft { face: "flat".into(), ..draft.clone() }).unwrap_err().contains("no number"));
        let shipped = Draft { name: "raf-6".into(), ..draft.clone() };
        assert!(section(&shipped).unwrap_err().contains("program’s own"));
        assert!(section(&Draft { name: " ".into(), ..draft }).unwrap_err().contains("name"));
    }
}
