//! The code map of `DEVELOPERS.md` against the sources: every room has its row, uses what the row says and nothing
//! else, and only rooms above it.

mod faults;
mod map;
mod source;

use std::path::{Path, PathBuf};

fn workspace() -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR")).join("..")
}

/// Fails where the table below a heading and the sources of a crate differ.
fn hold(heading: &str, krate: &str) {
    let text = std::fs::read_to_string(workspace().join("DEVELOPERS.md")).unwrap();
    let rows = map::rows(&text, heading);
    let rooms = source::rooms(&workspace(), &Path::new(krate).join("src"));
    assert!(rows.len() > 10 && rooms.len() > 10, "{heading}: {} rows, {} rooms", rows.len(), rooms.len());
    let faults = faults::faults(&rows, &rooms);
    assert!(faults.is_empty(), "{heading}:\n{}", faults.join("\n"));
}

#[test]
fn the_core_is_as_its_map_says() {
    hold("Rooms of the core", "core");
}

#[test]
fn the_page_is_as_its_map_says() {
    hold("Rooms of the page", "web");
}
