//! Texts made of seed texts by few changes, as a person or a broken tool might make them; and a run of one
//! target over many of them.

use std::path::Path;
use std::sync::mpsc::{RecvTimeoutError, channel};
use std::time::{Duration, Instant};

use proptest::prelude::*;
use proptest::test_runner::{Config, RngAlgorithm, TestCaseError, TestError, TestRng, TestRunner};

/// Texts tried in a short run, always the same ones.
const SHORT: u32 = 120;
/// Texts of one part of a long run.
const PART: u32 = 2_000;
/// Longest a text may take.
const PATIENCE: Duration = Duration::from_secs(30);
/// Longest a text becomes, characters.
const MOST_CHARACTERS: usize = 60_000;

/// Words that stand where a number or a word should: the ends of the range of numbers, other kinds of value,
/// marks of other formats.
const WORDS: &[&str] = &[
    "-1",
    "0",
    "-0.0",
    "1e308",
    "-1e308",
    "1e-308",
    "5e-324",
    "NaN",
    "inf",
    "null",
    "true",
    "\"\"",
    "{}",
    "[]",
    "[[[[[[",
    "4294967296",
    "-9223372036854775809",
    "0.1",
    "1000",
    "360",
    "½",
    "−3",
    "3°",
    "18 30",
    "1,5",
    "1;5",
    ",",
    ";",
    "\t",
    "\n",
    "\r\n",
    "\n\n",
    "#",
    "\"",
    "'",
    "\\u0000",
    "\u{0}",
    "\u{feff}",
    "\u{202e}",
    "ß",
    "mm",
    "[in]",
    "%",
    "%%",
    "yes",
    "station",
    "alpha",
    "rpm",
    "999999999999999999999",
];

/// One change of a text. Places are shares of its length.
#[derive(Clone, Debug)]
enum Edit {
    Remove { at: f64, length: usize },
    Insert { at: f64, word: usize },
    Repeat { at: f64, length: usize, times: usize },
    Move { from: f64, to: f64, length: usize },
    Number { which: f64, to: Number },
    Line { which: f64, to: LineEdit },
    End { at: f64 },
}

#[derive(Clone, Debug)]
enum Number {
    Word(usize),
    Times(f64),
    Negated,
}

#[derive(Clone, Debug)]
enum LineEdit {
    Drop,
    Twice,
    Swap(f64),
}

fn edits() -> impl Strategy<Value = Edit> {
    let (place, word) = (0.0..1.0_f64, 0..WORDS.len());
    let number = prop_oneof![
        word.clone().prop_map(Number::Word),
        prop_oneof![Just(1e-6), Just(0.1), Just(10.0), Just(1e6), 0.5..2.0_f64].prop_map(Number::Times),
        Just(Number::Negated),
    ];
    let line =
        prop_oneof![Just(LineEdit::Drop), Just(LineEdit::Twice), place.clone().prop_map(LineEdit::Swap)];
    prop_oneof![
        2 => (place.clone(), 1..40_usize).prop_map(|(at, length)| Edit::Remove { at, length }),
        2 => (place.clone(), word).prop_map(|(at, word)| Edit::Insert { at, word }),
        1 => (place.clone(), 1..60_usize, 1..30_usize).prop_map(|(at, length, times)| Edit::Repeat { at, length, times }),
        1 => (place.clone(), place.clone(), 1..60_usize).prop_map(|(from, to, length)| Edit::Move { from, to, length }),
        8 => (place.clone(), number).prop_map(|(which, to)| Edit::Number { which, to }),
        3 => (place.clone(), line).prop_map(|(which, to)| Edit::Line { which, to }),
        1 => place.prop_map(|at| Edit::End { at }),
    ]
}

impl Edit {
    fn on(&self, text: &str) -> String {
        match self {
            Self::Number { which, to } => number(text, *which, to),
            Self::Line { which, to } => line(text, *which, to),
            _ => self.on_characters(text.chars().collect()).into_iter().collect(),
        }
    }

    fn on_characters(&self, mut all: Vec<char>) -> Vec<char> {
        let span = |at: f64, length: usize, all: &[char]| {
            let from = place(at, all.len());
            from..(from + length).min(all.len())
        };
        match self {
            Self::Remove { at, length } => drop(all.drain(span(*at, *length, &all))),
            Self::Insert { at, word } => {
                let at = place(*at, all.len());
                drop(all.splice(at..at, WORDS[*word].chars()));
            }
            Self::Repeat { at, length, times } => {
                let part = span(*at, *length, &all);
                let again: Vec<char> =
                    all[part.clone()].iter().copied().cycle().take(part.len() * times).collect();
                drop(all.splice(part.end..part.end, again));
            }
            Self::Move { from, to, length } => {
                let part: Vec<char> = all.drain(span(*from, *length, &all)).collect();
                let to = place(*to, all.len());
                drop(all.splice(to..to, part));
            }
            Self::End { at } => all.truncate(place(*at, all.len())),
            Self::Number { .. } | Self::Line { .. } => {}
        }
        all
    }
}

/// A place from 0 to a length by its share.
fn place(share: f64, length: usize) -> usize {
    ((share * (length as f64 + 1.0)) as usize).min(length)
}

/// Another number in place of one.
fn number(text: &str, which: f64, to: &Number) -> String {
    let of_number = |c: char| c.is_ascii_digit() || ".-+eE".contains(c);
    let mut found: Vec<std::ops::Range<usize>> = Vec::new();
    let mut begin = None;
    for (i, c) in text.char_indices().chain([(text.len(), ' ')]) {
        match (begin, of_number(c)) {
            (None, true) => begin = Some(i),
            (Some(from), false) => {
                if text[from..i].contains(|c: char| c.is_ascii_digit()) {
                    found.push(from..i);
                }
                begin = None;
            }
            _ => {}
        }
    }
    let Some(span) = found.get(place(which, found.len().saturating_sub(1))).cloned() else {
        return text.into();
    };
    let old = text[span.clone()].parse::<f64>().unwrap_or(1.0);
    let new = match to {
        Number::Word(word) => WORDS[*word].to_string(),
        Number::Times(factor) => (old * factor).to_string(),
        Number::Negated => (-old).to_string(),
    };
    format!("{}{new}{}", &text[..span.start], &text[span.end..])
}

fn line(text: &str, which: f64, to: &LineEdit) -> String {
    let mut lines: Vec<&str> = text.split('\n').collect();
    let at = place(which, lines.len() - 1);
    match to {
        LineEdit::Drop => drop(lines.remove(at)),
        LineEdit::Twice => lines.insert(at, lines[at]),
        LineEdit::Swap(other) => {
            let other = place(*other, lines.len() - 1);
            lines.swap(at, other);
        }
    }
    lines.join("\n")
}

/// Texts of seeds with up to six changes.
fn texts(seeds: Vec<String>) -> impl Strategy<Value = String> {
    let changes = prop::collection::vec(edits(), 0..6);
    (prop::sample::select(seeds), changes).prop_map(|(seed, changes)| {
        let text = changes.iter().fold(seed, |text, edit| edit.on(&text));
        text.chars().take(MOST_CHARACTERS).collect()
    })
}

/// The files of a folder of seeds (`core/tests/seeds/…`), in the order of their names.
///
/// # Panics
/// When the folder cannot be read.
pub(crate) fn seeds(folder: &str) -> Vec<String> {
    let folder = Path::new(env!("CARGO_MANIFEST_DIR")).join("tests/seeds").join(folder);
    let mut files: Vec<_> =
        std::fs::read_dir(folder).expect("a folder of seeds").flatten().map(|f| f.path()).collect();
    files.sort();
    files.iter().map(|f| std::fs::read_to_string(f).expect("a text")).collect()
}

/// Tries a target with every seed as it is, then with changed ones: always the same few, or, where
/// `SPOKESHAVE_MUTATE_SECONDS` says so, new ones for that long. It must come back from every text without a
/// panic.
///
/// # Panics
/// With the smallest text found that breaks the target, or that keeps it longer than half a minute.
pub(crate) fn attack(seeds: Vec<String>, target: fn(&str)) {
    for seed in &seeds {
        within_patience(seed, target).unwrap_or_else(|e| panic!("a seed as it is: {e}\n{seed}"));
    }
    let seconds = std::env::var("SPOKESHAVE_MUTATE_SECONDS").ok().and_then(|s| s.parse().ok());
    let until = seconds.map(|s| Instant::now() + Duration::from_secs(s));
    let strategy = texts(seeds);
    let tried = std::cell::Cell::new(0_u64);
    for part in 0_u64.. {
        let cases = if until.is_some() { PART } else { SHORT };
        let config =
            Config { cases, failure_persistence: None, max_shrink_iters: 4_000, ..Config::default() };
        let mut begin = [7; 32];
        begin[..8].copy_from_slice(&part.to_le_bytes());
        let mut runner = TestRunner::new_with_rng(config, TestRng::from_seed(RngAlgorithm::ChaCha, &begin));
        let late = || until.is_some_and(|until| Instant::now() > until);
        let found = runner.run(&strategy, |text| {
            if late() {
                return Ok(());
            }
            tried.set(tried.get() + 1);
            within_patience(&text, target).map_err(TestCaseError::fail)
        });
        match found {
            Ok(()) => {}
            Err(TestError::Fail(why, text)) => panic!("{why}\n--- the text:\n{text}\n--- as code: {text:?}"),
            Err(TestError::Abort(why)) => panic!("{why}"),
        }
        if until.is_none() || late() {
            break;
        }
    }
    println!("{} changed texts", tried.get());
}

/// Runs a target with a text in a thread of its own, so that one that does not come back is known too.
fn within_patience(text: &str, target: fn(&str)) -> Result<(), String> {
    let (done, answer) = channel();
    let own = text.to_string();
    let thread = std::thread::spawn(move || {
        target(&own);
        let _ = done.send(());
    });
    match answer.recv_timeout(PATIENCE) {
        Err(RecvTimeoutError::Timeout) => Err(format!("not back after {PATIENCE:?}")),
        Ok(()) | Err(RecvTimeoutError::Disconnected) => thread.join().map_err(|why| {
            let words = why.downcast_ref::<String>().cloned();
            words
                .or_else(|| why.downcast_ref::<&str>().map(ToString::to_string))
                .unwrap_or_else(|| "a panic".into())
        }),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn changes_keep_a_text_a_text() {
        assert_eq!(number("a 1.5, b -2e3", 0.9, &Number::Times(2.0)), "a 1.5, b -4000");
        assert_eq!(number("no number", 0.5, &Number::Negated), "no number");
        assert_eq!(line("a\nb\nc", 0.0, &LineEdit::Swap(0.99)), "c\nb\na");
        assert_eq!(Edit::Remove { at: 0.3, length: 99 }.on("ößü"), "ö");
        assert_eq!(Edit::Repeat { at: 0.0, length: 2, times: 2 }.on("ab"), "ababab");
        assert_eq!(Edit::Move { from: 0.0, to: 0.99, length: 1 }.on("abc"), "bca");
    }

    #[test]
    #[should_panic(expected = "seven hundred")]
    fn a_target_that_breaks_is_found() {
        attack(vec!["rpm\n700\n".into()], |text| assert!(!text.contains("7000"), "seven hundred times ten"));
    }
}
