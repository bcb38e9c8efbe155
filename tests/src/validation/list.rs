//! The list of all checks as one text: how far to trust the program.

use std::fmt::Write;

use crate::check::{Basis, Check};

use super::{TOPICS, Topic, plots};

/// The command that writes the list anew.
pub const COMMAND: &str = "cargo run --release -p spokeshave-tests --bin validation";

const HEAD: &str = "# How far to trust it

Every check of what the core computes against something outside it: what the source says, what the program says, how far apart they
may lie and why. Each is asserted by the test named above its table, so that none can stop holding unnoticed; a known miss is
asserted to miss. Where one line stands for several, it is the one that comes nearest to its tolerance.

Marks: *read*: in the source or a copy of its figures; *computed*: from the source's formulas or by an independent program;
*from memory*: recalled, not looked up; *common practice*: what people of the trade do or say.

A tested figure is no proof that a blade holds or flies: see the cautions.
";

/// What is judged by other programs, which the machine that writes the list need not have.
const JUDGED: &str = "
## Judged by other programs

Other programs judge these, each in a test of its own (`tests/tests/judges`, `tests/judges`); `cargo prove` installs
them. Their figures are printed by the tests and not kept here.

| test | judge | what it must find |
| --- | --- | --- |
| `validate_stations_and_fits_scipy` | SciPy | stations of the examples: inflow angle within 1e-9°; full throttle and level flight: rpm within 3e-7. Both from the job file and the shipped section tables alone (`airfoils/*/polars.csv`, which the program's own section solver made): air, blade, coefficients between and beyond the tables, Mach number, delay of stall, momentum, loads, engine, battery and drag polar are written anew in Python. Where a method leaves a choice open, the program's is taken: so this judges the program's mathematics, not the methods |
| `validate_atmosphere_ambiance` | `ambiance` | pressure, density, temperature, speed of sound, viscosity from 0 to 20 km within 2e-5 |
| `validate_drawn_sections_sectionproperties` | `sectionproperties` | every family drawn at 9, 17 or 32 % thick: area within 0.1 %, second moments 0.2 and 0.5 %, torsion constant 0.5 % |
| `validate_page_firefox`, `validate_page_webkit` | Firefox, WebKitGTK | a whole task on the page from disk: departures as the core has them after typing, undo and reload; no request; no accessibility rule broken; no wider than a narrow screen |
| `validate_solid_trimesh` | `trimesh`, `shapely` | STL watertight, triangles turned alike, handed as asked, as many holes as asked; volume within 0.5 % of the sections less the drilling |
| `validate_drawings_ezdxf_shapely` | `ezdxf`, `shapely` | DXF sound, in millimetres; two cards back to back leave the section within 0.2 % of its area and 0.05 mm of its rim |
| `validate_paper_mupdf` | MuPDF | PDF and SVG of the paper's size within 0.4 mm; a 100 mm bar is 100 ± 0.1 mm |
| `validate_report_mupdf` | MuPDF | report of the paper's size within 0.1 mm; its parts in their order; no word over another or off the page |

Closed forms of single steps (wedges and masses of carved blades, least squares of the logbook, offsets of bent beams) stay beside the code
that they test and are not listed.
";

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
    text + JUDGED
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
