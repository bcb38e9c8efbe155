//! Where stress is judged.

use super::blade::{Drawn, SPANS};
use super::section::Shape;

/// A radius at which stress is judged.
#[derive(Clone, Debug)]
pub struct Place {
    /// Index into [`BladeBeam::radii_m`](super::blade::BladeBeam::radii_m).
    pub index: usize,
    /// Index of the station in the job; `None` at the edge of the hub.
    pub station: Option<usize>,
    /// Index of the station whose section it has.
    pub of: usize,
    /// Thickness over chord.
    pub thickness_ratio: f64,
    /// The section's shape.
    pub shape: Shape,
    /// What is not known of the section.
    pub doubt: Option<Doubt>,
}

/// What is not known of a section.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Doubt {
    /// It has no outline: a usual section is taken.
    NoOutline,
    /// Its outline cannot be drawn so thick or thin: the nearest is stretched.
    Stretched,
}

/// The edge of the hub, where no station stands there, then the stations outside the hub; thickness is left
/// to be filled in.
pub(super) fn places(radii_m: &[f64], stations_m: &[f64], drawn: &[Drawn]) -> Vec<Place> {
    let place = |index: usize, station: Option<usize>, of: usize| Place {
        index,
        station,
        of,
        thickness_ratio: f64::NAN,
        shape: drawn[of].shape.clone(),
        doubt: drawn[of].doubt,
    };
    let near = 1e-9 + 0.3 * (radii_m[radii_m.len() - 1] - radii_m[0]) / SPANS as f64;
    let index_of = |r: f64| {
        let away = |i: usize| (radii_m[i] - r).abs();
        (0..radii_m.len()).min_by(|a, b| away(*a).total_cmp(&away(*b))).filter(|i| away(*i) <= near)
    };
    let last = radii_m.len() - 1;
    let outside: Vec<Place> = stations_m
        .iter()
        .enumerate()
        .filter_map(|(station, r)| Some(place(index_of(*r).filter(|i| *i < last)?, Some(station), station)))
        .collect();
    let next = stations_m.iter().position(|r| *r >= radii_m[0]).unwrap_or(stations_m.len() - 1);
    let edge = outside.first().is_none_or(|p| p.index > 0).then(|| place(0, None, next));
    edge.into_iter().chain(outside).collect()
}
