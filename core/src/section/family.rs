//! A section family made ready for lookup: every polar on one common grid of angles, as cubics.
//!
//! Each polar keeps its own monotone cubic in angle (module [`crate::curve`]); it is only written down on the
//! union of all the family's angles, which changes nothing of it, so that one search serves all polars.
//! Between polars the coefficients are linear in ln Re and in thickness ratio; beyond the outermost polars
//! they are held.

use std::f64::consts::{PI, TAU};
use std::ops::Range;

use super::extend::{Coefficients, extended};
use super::polar::{Polar, TableError, check_polars};
use crate::curve::Curve;

/// What is worth saying about a family besides its polars.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct About {
    /// The name a station calls it by.
    pub name: String,
    /// The name for people.
    pub title: String,
    /// Where the polars come from.
    pub origin: String,
    /// Angle of the flat face above the chord line by thickness ratio: (t/c, degrees). Empty when there is
    /// no flat face.
    pub face_angle_deg: Vec<(f64, f64)>,
    /// Korn factor: 0.87 for ordinary sections, 0.95 for modern ones.
    pub korn_factor: f64,
}

/// Angles that tell what a polar covers, rad, and how steep it is.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Landmarks {
    /// Zero lift.
    pub zero_lift: f64,
    /// Greatest lift.
    pub stall: f64,
    /// Greatest lift downward.
    pub negative_stall: f64,
    /// First row.
    pub first: f64,
    /// Last row.
    pub last: f64,
    /// The most that the rises of lift and drag coefficient with the angle add up to anywhere, with the
    /// coefficients themselves, 1/rad.
    pub steepest: f64,
}

/// A family of section polars, by thickness and Reynolds number.
#[derive(Clone, Debug)]
pub struct Family {
    /// Name, origin, flat face.
    pub about: About,
    grid: Vec<f64>,
    bins: Vec<u16>,
    /// `[polar][angle]`: lift, its slope, drag, its slope (per rad).
    nodes: Vec<[f64; 4]>,
    polars: Vec<Entry>,
    rows: Vec<(f64, Range<usize>)>,
}

#[derive(Clone, Debug)]
struct Entry {
    ln_reynolds: f64,
    mach: f64,
    landmarks: Landmarks,
}

/// Up to four polars with their weights.
#[derive(Clone, Copy, Debug)]
pub(super) struct Mix {
    pub(super) part: [(usize, f64); 4],
    pub(super) count: usize,
    /// The thickness or the Reynolds number lay outside the tables and was held at their edge.
    pub(super) outside: Outside,
}

/// Which argument lay outside the tables.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub struct Outside {
    /// Thickness ratio.
    pub thickness: bool,
    /// Reynolds number.
    pub reynolds: bool,
}

const BINS: usize = 1_440;
/// Most grid nodes a family may take (32 bytes each).
const MOST_NODES: usize = 2_000_000;

impl Family {
    /// Makes a family ready for lookup.
    ///
    /// # Errors
    /// If the tables do not go together; the message says which and why.
    pub fn new(about: About, polars: &[Polar]) -> Result<Self, TableError> {
        check_polars(polars)?;
        let mut order: Vec<&Polar> = polars.iter().collect();
        let key = |p: &Polar| (p.thickness_ratio.unwrap_or(0.0), p.reynolds.unwrap_or(1.0));
        order.sort_by(|a, b| key(a).partial_cmp(&key(b)).unwrap_or(std::cmp::Ordering::Equal));
        let tables: Vec<Vec<(f64, Coefficients)>> = order.iter().map(|p| extended(&own_rows(p))).collect();
        let grid = union_of_angles(&tables);
        if grid.len() * tables.len() > MOST_NODES || grid.len() > usize::from(u16::MAX) {
            let found = format!("{} different angles in {} polars", grid.len(), tables.len());
            return Err(TableError::new("polars", found, "polars that share their angles, or fewer"));
        }
        let nodes: Vec<[f64; 4]> = tables.iter().flat_map(|t| on_grid(t, &grid)).collect();
        let own_nodes = nodes.chunks(grid.len());
        let entries = order.iter().zip(own_nodes).map(|(p, own)| entry(p, steepest(own, &grid))).collect();
        Ok(Self { about, bins: bins_of(&grid), grid, nodes, polars: entries, rows: rows_of(&order) })
    }

    /// The same with all lift and all drag coefficients times a factor: what an error of the polars would
    /// make of them.
    #[must_use]
    pub fn scaled(&self, lift: f64, drag: f64) -> Self {
        let nodes =
            self.nodes.iter().map(|[cl, dcl, cd, dcd]| [lift * cl, lift * dcl, drag * cd, drag * dcd]);
        let mut scaled = Self { nodes: nodes.collect(), ..self.clone() };
        for polar in &mut scaled.polars {
            polar.landmarks.steepest *= lift.max(drag);
        }
        scaled
    }

    /// Thickness ratios covered; `None` when the polars hold for one section only.
    #[must_use]
    pub fn thickness_range(&self) -> Option<(f64, f64)> {
        let (first, last) = (self.rows.first()?.0, self.rows.last()?.0);
        (last > 0.0).then_some((first, last))
    }

    /// Reynolds numbers covered.
    #[must_use]
    pub fn reynolds_range(&self) -> (f64, f64) {
        let re = || self.polars.iter().map(|p| p.ln_reynolds.exp());
        (re().fold(f64::INFINITY, f64::min), re().fold(0.0, f64::max))
    }

    /// Every Reynolds number for which there is a polar, rising.
    #[must_use]
    pub fn reynolds_numbers(&self) -> Vec<f64> {
        let mut numbers: Vec<f64> = self.polars.iter().map(|p| p.ln_reynolds.exp().round()).collect();
        numbers.sort_by(f64::total_cmp);
        numbers.dedup();
        numbers
    }

    /// Every thickness ratio for which there are polars, rising; empty when the polars hold for one section
    /// only.
    #[must_use]
    pub fn thickness_ratios(&self) -> Vec<f64> {
        self.rows.iter().map(|r| r.0).filter(|t| *t > 0.0).collect()
    }

    /// Number of polars.
    #[must_use]
    pub fn polar_count(&self) -> usize {
        self.polars.len()
    }

    /// Angle (rad) from the flat face up to the chord line at a thickness ratio; `None` without a flat face.
    /// Blade angle on the chord line is the angle on the face plus this.
    #[must_use]
    pub fn face_angle_rad(&self, thickness_ratio: f64) -> Option<f64> {
        let (t, a) = self.about.face_angle_deg.iter().copied().unzip();
        Curve::new(t, a).map(|c| c.at(thickness_ratio).to_radians())
    }

    pub(super) fn mix(&self, thickness_ratio: f64, reynolds: f64) -> Mix {
        let ln_re = reynolds.max(1.0).ln();
        let mut mix = Mix { part: [(0, 0.0); 4], count: 0, outside: Outside::default() };
        let (i, w, out) = bracket(&self.rows, |r| r.0, thickness_ratio);
        mix.outside.thickness = out && self.rows[0].0 > 0.0;
        self.add_row(&mut mix, i, 1.0 - w, ln_re);
        if w > 0.0 {
            self.add_row(&mut mix, i + 1, w, ln_re);
        }
        mix
    }

    fn add_row(&self, mix: &mut Mix, row: usize, weight: f64, ln_re: f64) {
        let range = &self.rows[row].1;
        let (i, w, out) = bracket(&self.polars[range.clone()], |p| p.ln_reynolds, ln_re);
        // A single polar holds for every Reynolds number.
        mix.outside.reynolds |= out && range.len() > 1;
        for (polar, share) in [(i, 1.0 - w), (i + 1, w)] {
            if share > 0.0 {
                mix.part[mix.count] = (range.start + polar, weight * share);
                mix.count += 1;
            }
        }
    }

    pub(super) fn blend<T>(&self, mix: &Mix, of: impl Fn(&Landmarks, f64) -> T) -> T
    where
        T: std::iter::Sum<T> + std::ops::Mul<f64, Output = T>,
    {
        mix.part[..mix.count]
            .iter()
            .map(|&(p, w)| of(&self.polars[p].landmarks, self.polars[p].mach) * w)
            .sum()
    }

    /// Coefficients of a mix at an angle (rad, −π to π).
    pub(super) fn at(&self, mix: &Mix, alpha_rad: f64) -> Coefficients {
        let a = wrapped(alpha_rad);
        let i = self.interval(a);
        let h = self.grid[i + 1] - self.grid[i];
        let t = (a - self.grid[i]) / h;
        // Hermite basis.
        let (t2, t3) = (t * t, t * t * t);
        let h01 = 3.0 * t2 - 2.0 * t3;
        let (h00, h10, h11) = (1.0 - h01, (t3 - 2.0 * t2 + t) * h, (t3 - t2) * h);
        // The polars are mixed first, so that the cubic is worked out once.
        let (mut p, mut q) = ([0.0; 4], [0.0; 4]);
        for &(polar, w) in &mix.part[..mix.count] {
            let at = polar * self.grid.len() + i;
            if let [left, right] = &self.nodes[at..at + 2] {
                for k in 0..4 {
                    p[k] += w * left[k];
                    q[k] += w * right[k];
                }
            }
        }
        let cl = h00 * p[0] + h10 * p[1] + h01 * q[0] + h11 * q[1];
        let cd = h00 * p[2] + h10 * p[3] + h01 * q[2] + h11 * q[3];
        Coefficients { cl, cd }
    }

    fn interval(&self, a: f64) -> usize {
        let bin = ((a + PI) * (BINS as f64 / TAU)) as usize;
        let mut i = usize::from(self.bins[bin.min(BINS - 1)]);
        while i + 2 < self.grid.len() && self.grid[i + 1] <= a {
            i += 1;
        }
        i
    }
}

fn wrapped(alpha_rad: f64) -> f64 {
    if alpha_rad.abs() <= PI { alpha_rad } else { (alpha_rad + PI).rem_euclid(TAU) - PI }
}

/// Index of the lower neighbour, weight of the upper one, and whether `x` lies outside.
fn bracket<T>(items: &[T], key: impl Fn(&T) -> f64, x: f64) -> (usize, f64, bool) {
    let last = items.len() - 1;
    if x <= key(&items[0]) || last == 0 {
        return (0, 0.0, x < key(&items[0]) || (last == 0 && x > key(&items[0])));
    }
    if x >= key(&items[last]) {
        return (last, 0.0, x > key(&items[last]));
    }
    let i = items.partition_point(|p| key(p) <= x) - 1;
    let (a, b) = (key(&items[i]), key(&items[i + 1]));
    (i, (x - a) / (b - a), false)
}

fn own_rows(polar: &Polar) -> Vec<(f64, Coefficients)> {
    polar.points.iter().map(|p| (p.alpha_deg.to_radians(), Coefficients { cl: p.cl, cd: p.cd })).collect()
}

fn union_of_angles(tables: &[Vec<(f64, Coefficients)>]) -> Vec<f64> {
    let mut grid: Vec<f64> = tables.iter().flatten().map(|r| r.0).collect();
    grid.sort_by(f64::total_cmp);
    grid.dedup_by(|b, a| *b - *a < 1e-9);
    grid
}

fn on_grid(table: &[(f64, Coefficients)], grid: &[f64]) -> Vec<[f64; 4]> {
    let x: Vec<f64> = table.iter().map(|r| r.0).collect();
    let curve = |y: Vec<f64>| Curve::new(x.clone(), y);
    let lift = curve(table.iter().map(|r| r.1.cl).collect());
    let drag = curve(table.iter().map(|r| r.1.cd).collect());
    let (Some(lift), Some(drag)) = (lift, drag) else { return vec![[0.0, 0.0, 1.0, 0.0]; grid.len()] };
    grid.iter()
        .map(|&a| {
            let (l, d) = (lift.jet(a), drag.jet(a));
            [l.value, l.slope, d.value, d.slope]
        })
        .collect()
}

fn bins_of(grid: &[f64]) -> Vec<u16> {
    (0..BINS)
        .map(|b| {
            let left = TAU * (b as f64) / (BINS as f64) - PI;
            let i = grid.partition_point(|&a| a <= left).saturating_sub(1);
            u16::try_from(i.min(grid.len() - 2)).unwrap_or(0)
        })
        .collect()
}

fn rows_of(order: &[&Polar]) -> Vec<(f64, Range<usize>)> {
    let mut rows: Vec<(f64, Range<usize>)> = Vec::new();
    for (i, p) in order.iter().enumerate() {
        let t = p.thickness_ratio.unwrap_or(0.0);
        match rows.last_mut() {
            Some((last, range)) if *last == t => range.end = i + 1,
            _ => rows.push((t, i..i + 1)),
        }
    }
    rows
}

fn entry(polar: &Polar, steepest: f64) -> Entry {
    Entry {
        ln_reynolds: polar.reynolds.unwrap_or(1.0).max(1.0).ln(),
        mach: polar.mach,
        landmarks: Landmarks { steepest, ..landmarks(polar) },
    }
}

/// Stall is sought within ±25°: beyond it a plate's lift may exceed a thin section's. Where lift still rises there it
/// may be such a plate's already: an angle on whose either side it falls, or the table's end, goes before.
fn landmarks(polar: &Polar) -> Landmarks {
    let (points, n) = (&polar.points, polar.points.len());
    let rad = |i: usize| points[i].alpha_deg.to_radians();
    let (first, last) = (rad(0), rad(n - 1));
    // Of equal lifts the last one looked at counts: the angle nearest to the attached range.
    let greatest = |sign: f64, order: &[usize]| {
        let lift = |i: usize| sign * points[i].cl;
        let near = || order.iter().copied().filter(|&i| points[i].alpha_deg.abs() <= 25.0);
        let falls =
            |i: &usize| [i.saturating_sub(1), (i + 1).min(n - 1)].iter().all(|&j| lift(j) <= lift(*i));
        let by_lift = |a: &usize, b: &usize| lift(*a).total_cmp(&lift(*b));
        near().filter(falls).max_by(by_lift).or_else(|| near().max_by(by_lift))
    };
    let (up, down): (Vec<usize>, Vec<usize>) = ((0..n).collect(), (0..n).rev().collect());
    let at = greatest(1.0, &down);
    let stall = at.map_or(last, rad);
    let negative_stall = greatest(-1.0, &up[..=at.unwrap_or(n - 1)]).map_or(first, rad);
    let crossing = points.windows(2).find(|w| {
        let inside = w[0].alpha_deg.to_radians() >= negative_stall && w[1].alpha_deg.to_radians() <= stall;
        inside && w[0].cl <= 0.0 && w[1].cl > 0.0
    });
    let zero_lift = crossing.map_or(0.0, |w| {
        let share = -w[0].cl / (w[1].cl - w[0].cl);
        (w[0].alpha_deg + share * (w[1].alpha_deg - w[0].alpha_deg)).to_radians()
    });
    Landmarks { zero_lift, stall, negative_stall, first, last, steepest: 0.0 }
}

/// See [`Landmarks::steepest`].
fn steepest(nodes: &[[f64; 4]], grid: &[f64]) -> f64 {
    let pairs = nodes.windows(2).zip(grid.windows(2));
    let rises = pairs.map(|(n, x)| {
        let ([cl0, dcl0, cd0, dcd0], [cl1, dcl1, cd1, dcd1]) = (n[0], n[1]);
        let h = x[1] - x[0];
        let own = cl0.abs().max(cl1.abs()) + cd0.max(cd1);
        own + steepest_of_cubic((cl1 - cl0) / h, dcl0, dcl1) + steepest_of_cubic((cd1 - cd0) / h, dcd0, dcd1)
    });
    rises.fold(0.0, f64::max)
}

/// The greatest size of the slope of a cubic between two places, from its mean and those at its ends.
fn steepest_of_cubic(mean: f64, first: f64, last: f64) -> f64 {
    let (a, b) = (3.0 * (first + last - 2.0 * mean), 6.0 * mean - 4.0 * first - 2.0 * last);
    let ends = first.abs().max(last.abs());
    let vertex = -0.5 * b / a;
    if (0.0..1.0).contains(&vertex) { ends.max((first + 0.5 * b * vertex).abs()) } else { ends }
}

#[cfg(test)]
mod tests;
