//! Measured tables of a section.

use crate::mutation::{attack, seeds};
use crate::{said, written};
use spokeshave::job::Section;
use spokeshave::section::import;

fn read(text: &str) {
    match import::read(text, "a file") {
        Ok(read) => {
            let points = read.table.polars.iter().flat_map(|p| &p.points);
            assert!(points.clone().all(|p| p.cl.is_finite() && p.cd.is_finite()), "points");
            assert!(read.rows > 0 && points.count() > 0);
            let section = Section::of("read", read.table);
            assert_eq!(section.problems(), vec![], "a table that was taken");
            written(section);
        }
        Err(e) => said(&e.to_string()),
    }
}

#[test]
fn a_changed_table_is_read_or_refused() {
    attack(seeds("table"), read);
}
