//! How far to trust it: what the program's figures were compared with, what misses, and pictures of it; all
//! written by the tests.

use yew::prelude::*;

/// Every check against something outside the program, counted by part.
const CHECKS: &str = include_str!("../../../tests/validation/summary.tsv");

/// What each picture shows, in the order of [`PICTURES`].
const CAPTIONS: &str = include_str!("../../../tests/validation/captions.txt");

/// Measured values as dots, what the program says as lines.
const PICTURES: [&str; 4] = [
    include_str!("../../../tests/validation/tunnel.svg"),
    include_str!("../../../tests/validation/naca-0012.svg"),
    include_str!("../../../tests/validation/eppler-387.svg"),
    include_str!("../../../tests/validation/tip-loss.svg"),
];

/// What was compared, and what misses.
pub(super) fn trust() -> Html {
    let rows: Vec<Vec<&str>> = CHECKS.lines().map(|line| line.split('\t').collect()).collect();
    let parts = rows.iter().filter_map(|row| match row[..] {
        [part, all, hold] => {
            Some(html! { <tr><th scope="row">{ part }</th><td>{ all }</td><td>{ hold }</td></tr> })
        }
        _ => None,
    });
    let misses = rows.iter().filter_map(|row| match row[..] {
        [what, reason] => {
            let figures = what.split("; ").map(|figure| html! { <b>{ minus(figure) }</b> });
            Some(html! { <li>{ for figures }{ minus(&crate::form::capital(reason)) }{ "." }</li> })
        }
        _ => None,
    });
    html! {
        <div class="trust">
            <h3>{ "How far to trust it" }</h3>
            <p class="note">
                { "What it computes beside what measurements, closed forms and independent programs say; \
                   the list of all with sources and tolerances is kept with the program’s sources. A tested \
                   figure is no proof that a blade holds or flies." }
            </p>
            <table class="sheet-table">
                <thead>
                    <tr>
                        <th scope="col">{ "Part" }</th><th scope="col">{ "Compared" }</th>
                        <th scope="col">{ "Within tolerance" }</th>
                    </tr>
                </thead>
                <tbody>{ for parts }</tbody>
            </table>
            <details><summary>{ "What misses, and why" }</summary><ul>{ for misses }</ul></details>
            <details><summary>{ "Measured and computed, in pictures" }</summary>{ pictures() }</details>
        </div>
    }
}

/// A text with a true minus before every figure below zero.
fn minus(text: &str) -> String {
    let mut before = ' ';
    let mut signs = text.chars().peekable();
    let mut told = String::with_capacity(text.len());
    while let Some(c) = signs.next() {
        let sign = c == '-' && before == ' ' && signs.peek().is_some_and(char::is_ascii_digit);
        told.push(if sign { '−' } else { c });
        before = c;
    }
    told
}

fn pictures() -> Html {
    let picture = |(svg, caption): (&&'static str, &'static str)| {
        html! {
            <figure>
                { Html::from_html_unchecked((*svg).into()) }
                <figcaption>{ caption }</figcaption>
            </figure>
        }
    };
    html! { <div class="trust-pictures">{ for PICTURES.iter().zip(CAPTIONS.lines()).map(picture) }</div> }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_picture_has_its_caption() {
        assert_eq!(CAPTIONS.lines().count(), PICTURES.len());
        assert!(CAPTIONS.lines().all(|line| !line.trim().is_empty()));
    }

    #[test]
    fn figures_below_zero_have_a_true_minus_and_words_keep_their_hyphen() {
        assert_eq!(minus("-4.26 for -3.80 ° at 9-4"), "−4.26 for −3.80 ° at 9-4");
    }
}
