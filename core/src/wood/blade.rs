//! The blade of a job as a beam: its material, and its sections at many radii.

use thiserror::Error;

use super::material::{Material, material};
use super::section::{Section, Shape};
use crate::blade::Blade;
use crate::job::Job;
use crate::rig::Rig;

/// Why the strength of a job's blade cannot be judged.
#[derive(Clone, Debug, Error, PartialEq)]
#[non_exhaustive]
pub enum WoodError {
    /// The species is not in the program's list.
    #[error("wood.species: \"{name}\" is not known; allowed is one of {known}, or an object with own values")]
    UnknownSpecies {
        /// What the job says.
        name: String,
        /// What is known.
        known: String,
    },
}

/// Evenly spaced spans of the beam between hub and tip; the stations are put in besides.
const SPANS: usize = 96;
/// Root of the beam over the tip radius where the job's hub is nothing.
const LEAST_ROOT: f64 = 0.01;
/// Thickness ratios at which outlines can be drawn.
const DRAWN: [f64; 2] = [0.01, 0.6];

/// The blade as a beam from the edge of the hub to the tip.
#[derive(Clone, Debug)]
pub struct BladeBeam {
    /// Number of blades.
    pub blades: u32,
    /// The material.
    pub material: Material,
    /// Radii, m, rising from the edge of the hub to the tip, the stations among them.
    pub radii_m: Vec<f64>,
    /// Sections at the radii.
    pub sections: Vec<Section>,
    /// Chords at the radii, m.
    pub chords_m: Vec<f64>,
    /// Blade angles to the chord line at the radii, rad.
    pub angles_rad: Vec<f64>,
    /// Mass per metre of radius, kg/m.
    pub mass_kg_m: Vec<f64>,
    /// What is judged: the edge of the hub, where no station stands there, then the stations outside the hub.
    pub places: Vec<Place>,
}

/// A radius at which stress is judged.
#[derive(Clone, Debug)]
pub struct Place {
    /// Index into [`BladeBeam::radii_m`].
    pub index: usize,
    /// Index of the station in the job; `None` at the edge of the hub.
    pub station: Option<usize>,
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

impl BladeBeam {
    /// The blade of a job made ready.
    ///
    /// # Errors
    /// A species that is not known.
    pub fn new(rig: &Rig) -> Result<Self, WoodError> {
        let material = material(&rig.job.wood.clone().unwrap_or_default())?;
        let blade = &rig.rotor.blade;
        let drawn = shapes(&rig.job);
        let stations: Vec<f64> = blade.station_radii_m().collect();
        let radii_m = radii(blade, &stations);
        let cut = |r: &f64| blade.cut(*r);
        let chords_m: Vec<f64> = radii_m.iter().map(|r| cut(r).chord_m).collect();
        let shaped = Shapes { radii_m: &stations, drawn: &drawn };
        let sections: Vec<Section> =
            radii_m.iter().map(|r| shaped.section(*r, cut(r).chord_m, cut(r).thickness_ratio)).collect();
        Ok(Self {
            blades: blade.count,
            mass_kg_m: sections.iter().map(|s| material.density_kg_m3 * s.area_m2).collect(),
            angles_rad: radii_m.iter().map(|r| cut(r).angle_rad + rig.turn_rad()).collect(),
            places: places(blade, &radii_m, &stations, &drawn),
            material,
            radii_m,
            sections,
            chords_m,
        })
    }
}

/// The edge of the hub, m.
fn root_m(blade: &Blade) -> f64 {
    blade.hub_radius_m.max(LEAST_ROOT * blade.radius_m)
}

/// Evenly spaced radii with the stations among them.
fn radii(blade: &Blade, stations_m: &[f64]) -> Vec<f64> {
    let (root, tip) = (root_m(blade), blade.radius_m);
    let near = 0.02 * (tip - root) / SPANS as f64;
    let mut all: Vec<f64> =
        stations_m.iter().copied().filter(|r| *r > root + near && *r < tip - near).collect();
    let even = (0..=SPANS).map(|i| root + (tip - root) * i as f64 / SPANS as f64);
    let free: Vec<f64> = even.filter(|r| all.iter().all(|s| (r - s).abs() > near)).collect();
    all.extend(free);
    all.sort_by(f64::total_cmp);
    all
}

/// A section's shape, with what is not known of it.
#[derive(Clone, Debug)]
struct Drawn {
    shape: Shape,
    doubt: Option<Doubt>,
}

/// The shape at every station.
fn shapes(job: &Job) -> Vec<Drawn> {
    job.propeller.stations.iter().map(|s| shape(job, &s.section, s.thickness_ratio)).collect()
}

fn shape(job: &Job, name: &str, thickness_ratio: f64) -> Drawn {
    let held = thickness_ratio.clamp(DRAWN[0], DRAWN[1]);
    let Some(outline) = job.section_outline(name, held) else {
        return Drawn { shape: Shape::usual(), doubt: Some(Doubt::NoOutline) };
    };
    Drawn { shape: Shape::of(&outline), doubt: (held != thickness_ratio).then_some(Doubt::Stretched) }
}

fn places(blade: &Blade, radii_m: &[f64], stations_m: &[f64], drawn: &[Drawn]) -> Vec<Place> {
    let place = |index: usize, station: Option<usize>, of: usize| Place {
        index,
        station,
        thickness_ratio: blade.cut(radii_m[index]).thickness_ratio,
        shape: drawn[of].shape.clone(),
        doubt: drawn[of].doubt,
    };
    let near = 1e-9 + 0.03 * (radii_m[radii_m.len() - 1] - radii_m[0]) / SPANS as f64;
    let index_of = |r: f64| {
        let best =
            (0..radii_m.len()).min_by(|a, b| (radii_m[*a] - r).abs().total_cmp(&(radii_m[*b] - r).abs()));
        best.filter(|i| (radii_m[*i] - r).abs() <= near)
    };
    let outside: Vec<Place> = stations_m
        .iter()
        .enumerate()
        .filter_map(|(station, r)| Some(place(index_of(*r)?, Some(station), station)))
        .collect();
    let next = stations_m.iter().position(|r| *r >= radii_m[0]).unwrap_or(stations_m.len() - 1);
    let edge = outside.first().is_none_or(|p| p.index > 0).then(|| place(0, None, next));
    edge.into_iter().chain(outside).collect()
}

/// Shapes at the stations, running straight between them.
struct Shapes<'a> {
    radii_m: &'a [f64],
    drawn: &'a [Drawn],
}

impl Shapes<'_> {
    fn section(&self, radius_m: f64, chord_m: f64, thickness_ratio: f64) -> Section {
        let sized = |i: usize| self.drawn[i].shape.sized(chord_m, thickness_ratio);
        let above = self.radii_m.partition_point(|r| *r <= radius_m);
        if above == 0 || above == self.radii_m.len() {
            return sized(above.saturating_sub(1));
        }
        let (r0, r1) = (self.radii_m[above - 1], self.radii_m[above]);
        sized(above - 1).towards(&sized(above), (radius_m - r0) / (r1 - r0))
    }
}
