//! Where the map and the sources differ, and where a room uses one that does not stand above it: as long as none
//! does, no way leads from a room back to it.

use std::collections::{BTreeMap, BTreeSet};
use std::path::PathBuf;

use crate::map::Row;
use crate::source::Uses;

/// Everything that is wrong, a sentence each.
pub(crate) fn faults(rows: &[Row], rooms: &BTreeMap<String, Uses>) -> Vec<String> {
    let mut found = Vec::new();
    for (place, row) in rows.iter().enumerate() {
        let told = row.names.join(", ");
        if row.names.len() != 1 {
            found.push(format!("the row “{told}” is to name one room"));
        }
        if !row.clear {
            found.push(format!("the row of {told} is to name what it may use, or to hold a dash"));
        }
        for room in &row.names {
            match rooms.get(room) {
                Some(uses) => {
                    found.extend(not_allowed(room, row, uses));
                    found.extend(not_above(room, &rows[place..], uses));
                    found.extend(not_true(room, row, uses, rooms));
                }
                None => found.push(format!("{room} has a row and is no room")),
            }
        }
    }
    for room in rooms.keys() {
        let count = rows.iter().filter(|row| row.names.contains(room)).count();
        if count != 1 {
            found.push(format!("{room} has {count} rows"));
        }
    }
    found
}

/// What a room uses and its row does not name.
fn not_allowed(room: &str, row: &Row, uses: &Uses) -> Vec<String> {
    let not_told = uses.iter().filter(|(used, _)| !row.may_use.contains(used));
    not_told.map(|(used, files)| format!("{room} may not use {used}: {}", list(files))).collect()
}

/// What a room uses though it stands in its own row or one below.
fn not_above(room: &str, from_here: &[Row], uses: &Uses) -> Vec<String> {
    let below = uses.iter().filter(|(used, _)| from_here.iter().any(|row| row.names.contains(used)));
    below.map(|(used, files)| format!("{room} uses {used}, which is not above it: {}", list(files))).collect()
}

/// What a row names and the room does not use.
fn not_true(room: &str, row: &Row, uses: &Uses, rooms: &BTreeMap<String, Uses>) -> Vec<String> {
    let unused = row.may_use.iter().filter(|told| !uses.contains_key(*told));
    let why = |told| if rooms.contains_key(told) { "it does not use it" } else { "that is no room" };
    unused.map(|told| format!("the row of {room} names {told}: {}", why(told))).collect()
}

fn list(files: &BTreeSet<PathBuf>) -> String {
    files.iter().map(|file| file.display().to_string()).collect::<Vec<_>>().join(", ")
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Rooms from lines such as `fit: rig job`, each use with a file of its own.
    fn rooms(lines: &[&str]) -> BTreeMap<String, Uses> {
        let room = |line: &&str| {
            let (room, used) = line.split_once(':').unwrap();
            let file = |used: &str| (used.to_string(), [format!("{room}/{used}.rs").into()].into());
            (room.to_string(), used.split_whitespace().map(file).collect())
        };
        lines.iter().map(room).collect()
    }

    fn found(rows: &str, lines: &[&str]) -> String {
        let text = format!("## R\n\n| m | h | u |\n| - | - | - |\n{rows}");
        faults(&crate::map::rows(&text, "R"), &rooms(lines)).join("; ")
    }

    const AIR: &str = "| `air` | a | – |\n";

    #[test]
    fn a_true_map_has_no_fault() {
        assert_eq!(found(&format!("{AIR}| `fit` | a | `air` |\n"), &["air:", "fit: air"]), "");
    }

    #[test]
    fn a_use_that_is_not_told_names_its_file() {
        assert_eq!(
            found(&format!("{AIR}| `fit` | a | – |\n"), &["air:", "fit: air"]),
            "fit may not use air: fit/air.rs"
        );
    }

    #[test]
    fn a_row_is_of_a_room_that_is_there_and_alone() {
        assert_eq!(found(&format!("{AIR}| `fit` | a | – |\n"), &["air:"]), "fit has a row and is no room");
        assert_eq!(found(&format!("{AIR}{AIR}"), &["air:"]), "air has 2 rows");
        assert_eq!(
            found("| `air`, `fit` | a | – |\n", &["air:", "fit:"]),
            "the row “air, fit” is to name one room"
        );
    }

    #[test]
    fn a_use_that_does_not_occur_is_not_told() {
        let rows = format!("{AIR}| `fit` | a | `air`, `rig` |\n");
        assert_eq!(
            found(&rows, &["air:", "fit:"]),
            "the row of fit names air: it does not use it; the row of fit names rig: that is no room"
        );
        assert_eq!(
            found("| `air` | a | all |\n", &["air:"]),
            "the row of air is to name what it may use, or to hold a dash"
        );
    }

    #[test]
    fn a_room_without_a_row_is_told() {
        assert_eq!(found(AIR, &["air:", "fit: air"]), "fit has 0 rows");
    }

    #[test]
    fn a_ring_of_uses_is_told_though_every_row_allows_it() {
        let rows = "| `a` | a | – |\n| `b` | b | `a`, `d` |\n| `c` | c | `b` |\n| `d` | d | `c` |\n";
        assert_eq!(found(rows, &["a:", "b: a d", "c: b", "d: c"]), "b uses d, which is not above it: b/d.rs");
    }
}
