//! Every command that README names does what it says.
#![cfg(feature = "cli")]

use std::fs;
use std::path::{Path, PathBuf};
use std::process::{Command, Output};

const README: &str = include_str!("../../README.md");
const TOOL: &str = "cargo run --release -- ";
/// What the commands are given, beside the job that the first of them prints.
const GIVEN: [(&str, &str); 5] = [
    ("OUTLINE.dat", include_str!("../../airfoils/arc-back/outline.dat")),
    ("airfoils/clark-y/outline.dat", include_str!("../../airfoils/clark-y/outline.dat")),
    ("table.csv", include_str!("seeds/table/tunnel.csv")),
    ("readings.csv", include_str!("seeds/carved/faces.csv")),
    ("flights.csv", include_str!("seeds/logbook/flights.csv")),
];

/// The commands, without what they are started by and without remarks.
fn commands() -> Vec<&'static str> {
    let lines = README.lines().filter_map(|line| line.strip_prefix(TOOL));
    lines.map(|line| line.split(" #").next().unwrap_or(line).trim()).collect()
}

fn run(folder: &Path, arguments: &str) -> Output {
    Command::new(env!("CARGO_BIN_EXE_spokeshave"))
        .args(arguments.split_whitespace())
        .current_dir(folder)
        .output()
        .unwrap()
}

/// A folder that goes with the test, whatever becomes of it.
struct Made(PathBuf);

impl Drop for Made {
    fn drop(&mut self) {
        // What cannot be removed is left to the system's own cleaning.
        let _ = fs::remove_dir_all(&self.0);
    }
}

#[test]
fn every_command_of_the_readme_has_an_answer() {
    let made = Made(std::env::temp_dir().join(format!("spokeshave-readme-{}", std::process::id())));
    let folder = &made.0;
    fs::create_dir_all(folder.join("airfoils/clark-y")).unwrap();
    for (name, text) in GIVEN {
        fs::write(folder.join(name), text).unwrap();
    }
    let commands = commands();
    assert!(commands.len() > 20, "{commands:?}");
    for line in commands {
        let (arguments, into) = line.split_once(" > ").unwrap_or((line, ""));
        let output = run(folder, arguments);
        let (said, complaint) =
            (String::from_utf8(output.stdout).unwrap(), String::from_utf8_lossy(&output.stderr).into_owned());
        assert_eq!(output.status.code(), Some(0), "{line}: {complaint}");
        assert!(!said.trim().is_empty() && !said.contains("NaN"), "{line}: {said}");
        if !into.is_empty() {
            fs::write(folder.join(into), said).unwrap();
        }
    }
    for written in ["paper", "solid", "report.pdf"] {
        assert!(folder.join(written).exists(), "{written}");
    }
}
