//! The list of all checks as one text: how far to trust the program.

use std::fmt::Write;

use serde::Deserialize;

use crate::check::{Basis, Check};

use super::{TOPICS, Topic, plots};

/// The command that writes the list anew.
pub const COMMAND: &str = "cargo run --release -p spokeshave-tests --bin validation";

const HEAD: &str = "# How far to trust it

The checks of what the core computes against something outside it: what the source says, what the program says, how far apart they
may lie and why. Each is asserted by the test named above its table, so that none can stop holding unnoticed; a known miss is
asserted to miss. Where one line stands for several, it is the one that comes nearest to its tolerance.

Marks: *read*: in the source or a copy of its figures; *computed*: from the source's formulas or by an independent program;
*from memory*: recalled, not looked up; *common practice*: what people of the trade do or say.

A tested figure is no proof that a blade holds or flies: see the cautions.
";

/// What is judged by other programs, which the machine that writes the list need not have. Their scripts take
/// from the same file what they allow, and fail where more comes out than stands there.
const JUDGED: &str = include_str!("../../judges/within.json");
const JUDGED_HEAD: &str = "
## Judged by other programs

Other programs judge these, each in a test of its own (`tests/tests/judges`, `tests/judges`; what the page shows and prints in Chromium in
`tests/tests/browser`); `cargo prove` installs them. All are marked *computed*: by an independent program. What came out is the most that
was found when this was written; a test fails where three times as much comes out.
";
const CLOSED_FORMS: &str = "
What stands beside the code that it tests is not listed: closed forms of single steps (wedges and masses of carved blades, least squares of
the logbook, offsets of bent beams), and the closures of the boundary layer, whose source is named in the test.
";

/// What another program judges, in one test.
#[derive(Deserialize)]
struct Judged {
    test: String,
    judge: String,
    finds: String,
    figures: Vec<Allowed>,
}

/// By how much it may find the program off.
#[derive(Deserialize)]
struct Allowed {
    what: String,
    unit: String,
    within: f64,
    came_out: f64,
    why: String,
}

/// A file of the list, by its name below `tests`.
pub struct File {
    /// Name, with folders.
    pub name: &'static str,
    /// What stands in it.
    pub text: String,
}

/// The list and its pictures.
#[must_use]
pub fn files() -> Vec<File> {
    let mut files = vec![
        File { name: "validation.md", text: text() },
        File { name: "validation/summary.tsv", text: for_the_page() },
    ];
    let captions = plots::CAPTIONS.map(|(_, says)| says).join("\n") + "\n";
    files.push(File { name: "validation/captions.txt", text: captions });
    files.extend(plots::all().map(|(name, text)| File { name, text }));
    files
}

/// Parts in the order of the topics.
fn parts() -> Vec<(&'static str, Vec<&'static Topic>)> {
    let mut parts: Vec<(&str, Vec<&Topic>)> = Vec::new();
    for topic in &TOPICS {
        match parts.last_mut() {
            Some((name, topics)) if *name == topic.part => topics.push(topic),
            _ => parts.push((topic.part, vec![topic])),
        }
    }
    parts
}

fn text() -> String {
    let mut text = format!("{HEAD}\nWritten by `{COMMAND}`; the test `the_list_is_up_to_date` compares.\n");
    summary(&mut text);
    misses(&mut text);
    text.push_str("\n## Pictures\n");
    for (file, says) in plots::CAPTIONS {
        let _ = writeln!(text, "\n![{says}]({file})\n\n{says}");
    }
    for (part, topics) in parts() {
        let _ = writeln!(text, "\n## {part}");
        for topic in topics {
            tables(&mut text, topic);
        }
    }
    judged(&mut text);
    text + CLOSED_FORMS
}

fn judged(text: &mut String) {
    text.push_str(JUDGED_HEAD);
    let all: Vec<Judged> = serde_json::from_str(JUDGED).expect("within.json");
    for Judged { test, judge, finds, figures } in all {
        let _ = writeln!(text, "\n### {judge}: `{test}`\n\n{finds}.");
        if !figures.is_empty() {
            text.push_str("\n| off by | came out | within | why | |\n| --- | --: | --: | --- | --- |\n");
        }
        for Allowed { what, unit, within, came_out, why } in figures {
            let verdict = if came_out < within { "holds" } else { "**misses**" };
            let (came_out, within) = (short(came_out), short(within));
            let _ = writeln!(text, "| {what} | {came_out} {unit} | {within} {unit} | {why} | {verdict} |");
        }
    }
}

/// Parts with their count of comparisons and of known misses.
pub(super) fn counts() -> impl Iterator<Item = (&'static str, usize, usize)> {
    parts().into_iter().map(|(part, topics)| {
        let checks = || topics.iter().flat_map(|t| t.checks());
        (part, checks().map(|c| c.of).sum(), checks().filter(|c| c.known_miss.is_some()).count())
    })
}

fn summary(text: &mut String) {
    text.push_str("\n| part | comparisons | hold | miss, known |\n| --- | --: | --: | --: |\n");
    for (part, all, miss) in counts() {
        let _ = writeln!(text, "| {part} | {all} | {} | {miss} |", all - miss);
    }
}

/// What the page tells of the list: a row for each part, then one for each reason of misses.
fn for_the_page() -> String {
    let rows = counts().map(|(part, all, miss)| format!("{part}\t{all}\t{}\n", all - miss));
    let misses = told_misses().into_iter().map(|(reason, all)| format!("{}\t{reason}\n", all.join("; ")));
    rows.chain(misses).collect()
}

/// Reasons of known misses, each with all that misses for it.
pub(super) fn told_misses() -> Vec<(&'static str, Vec<String>)> {
    let mut told: Vec<(&str, Vec<String>)> = Vec::new();
    for check in TOPICS.iter().flat_map(Topic::checks) {
        let Some(reason) = check.known_miss else { continue };
        let (got, expected) = (figure(check.got, check), figure(check.expected, check));
        let says = format!("{}: {got} for {expected}{}", check.what, unit(check));
        match told.iter_mut().find(|t| t.0 == reason) {
            Some((_, all)) => all.push(says),
            None => told.push((reason, vec![says])),
        }
    }
    told
}

fn misses(text: &mut String) {
    text.push_str("\n## What misses\n");
    for (reason, all) in told_misses() {
        let _ = writeln!(text, "\n- {}\n  – {reason}.", all.join(";\n  "));
    }
}

fn tables(text: &mut String, topic: &Topic) {
    let _ = writeln!(text, "\n### `{}`", topic.test);
    let mut before: Option<Basis> = None;
    for check in topic.checks() {
        if before != Some(check.basis) {
            let Basis { source, mark, why } = check.basis;
            let _ = writeln!(text, "\nSource ({mark}): {source}.\n\nTolerance: {why}.\n");
            text.push_str("| what | expected | got | within | |\n| --- | --: | --: | --: | --- |\n");
            before = Some(check.basis);
        }
        let verdict = if check.holds() { "holds" } else { "**misses**" };
        let (expected, got) = (figure(check.expected, check), figure(check.got, check));
        let within = short(check.tolerance);
        let _ =
            writeln!(text, "| {} | {expected}{} | {got} | {within} | {verdict} |", check.what, unit(check));
    }
}

fn unit(check: &Check) -> String {
    if check.unit.is_empty() { String::new() } else { format!(" {}", check.unit) }
}

/// A value, its last place a twentieth of the tolerance or less: what differs below that says nothing.
fn figure(value: f64, check: &Check) -> String {
    let last = (check.tolerance / 20.0).log10().floor() as i32;
    let size = value.abs().max(check.expected.abs()).max(check.tolerance);
    if !(1e-3..1e7).contains(&size) {
        let first = if value == 0.0 { last } else { value.abs().log10().floor() as i32 };
        return format!("{value:.*e}", (first - last).max(1) as usize);
    }
    let said = format!("{value:.*}", (-last).max(1) as usize);
    // No zero below zero.
    if said.chars().all(|c| "-0.".contains(c)) { said.trim_start_matches('-').into() } else { said }
}

/// A tolerance to two figures.
fn short(tolerance: f64) -> String {
    if !(1e-3..1e7).contains(&tolerance) {
        return format!("{tolerance:.1e}");
    }
    let places = 1 - tolerance.log10().floor() as i32;
    format!("{tolerance:.*}", places.max(1) as usize)
}
