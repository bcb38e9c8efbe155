//! The head of the table of stations: names and, under them, units.

use yew::prelude::*;

use super::table::Columns;
use crate::act::Seen;
use crate::units::Quantity;

/// Properties of [`TableHead`].
#[derive(Properties, PartialEq)]
pub struct TableHeadProps {
    /// Which columns there are.
    pub columns: Columns,
    /// The state.
    pub state: Seen,
}

/// Names and units.
#[component]
pub fn TableHead(props: &TableHeadProps) -> Html {
    let (columns, state) = (&props.columns, &props.state);
    let length = state.units.symbol(Quantity::Length);
    let th = |name: &'static str, unit: &str, class: &'static str| {
        html! { <th scope="col" rowspan="2" {class}>{ name }<small>{ unit.to_string() }</small></th> }
    };
    let job = state.job();
    let names: Vec<&str> = job.flight_points.iter().map(|f| f.name.as_str()).collect();
    let shorts = shortened(&names);
    let points = columns.points.iter().filter_map(|&p| {
        let (name, short) = (names.get(p)?.to_string(), shorts.get(p)?.clone());
        Some(html! { <th scope="col" class={point_class(p == state.point)} title={name}>{ short }</th> })
    });
    let now = names.get(state.point).copied().unwrap_or_default();
    let now_short = shorts.get(state.point).cloned().unwrap_or_default();
    html! {
        <thead>
            <tr>
                <th scope="col" rowspan="2"><span class="unseen">{ "Station" }</span></th>
                { th("Radius", length, "") }
                { th("Chord", length, "") }
                { th("Thick", length, "") }
                { th("Angle", "deg", "") }
                if columns.face { { th("On face", "deg", "") } }
                { th("Pitch", length, "wide-only") }
                if columns.sections { { th("Section", "", "") } }
                <th scope="colgroup" colspan={columns.points.len().to_string()} class="group">
                    { "Departure, degrees" }
                </th>
                <th scope="col" rowspan="2" class="wide-only" title={now.to_string()}>
                    { "To best" }<small>{ now_short }</small>
                </th>
                if let Some(name) = &columns.beside {
                    <th scope="col" rowspan="2" class="beside">
                        { name }<small>{ "chord, angle, departure" }</small>
                    </th>
                }
            </tr>
            <tr>{ for points }</tr>
        </thead>
    }
}

/// Style of a departure column; narrow screens keep the one selected.
#[must_use]
pub fn point_class(selected: bool) -> &'static str {
    if selected { "departure-column now" } else { "departure-column" }
}

/// Names short enough for narrow columns: a telling word of each, or, where two would read the same, the last
/// letters.
fn shortened(names: &[&str]) -> Vec<String> {
    let words: Vec<String> = names.iter().map(|name| short(name)).collect();
    let alike = |i: usize| words.iter().filter(|w| **w == words[i]).count() > 1;
    let ending = |name: &str| {
        let letters: Vec<char> = name.chars().collect();
        letters[letters.len().saturating_sub(8)..].iter().collect::<String>().trim().to_lowercase()
    };
    names.iter().enumerate().map(|(i, name)| if alike(i) { ending(name) } else { words[i].clone() }).collect()
}

fn short(name: &str) -> String {
    let word = name.split_whitespace().find(|w| w.chars().count() > 3).unwrap_or(name);
    let short: String = word.chars().take(8).collect();
    short.to_lowercase()
}

#[cfg(test)]
mod tests {
    use super::shortened;

    #[test]
    fn names_alike_are_told_apart_by_their_ends() {
        assert_eq!(shortened(&["Level cruise", "Climb"]), ["level", "climb"]);
        assert_eq!(shortened(&["Point 1", "Point 2"]), ["point 1", "point 2"]);
        assert!(shortened(&[""])[0].is_empty());
    }
}
