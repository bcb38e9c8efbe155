//! Measured tables of a section.

use super::{said, written};
use spokeshave::job::Section;
use spokeshave::section::import;

pub(crate) fn read(text: &str) {
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
