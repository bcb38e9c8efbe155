//! The blade of a job as a beam: its material, and its sections at many radii.

use thiserror::Error;

use super::material::{Material, material};
use super::places::{Doubt, Place, places};
use super::section::{Section, Shape};
use crate::blade::{Blade, StackingLine};
use crate::curve::Curve;
use crate::job::Job;
use crate::rig::Rig;
use crate::rotor::Condition;

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
    /// Stations that do not rise, or figures that are no numbers.
    #[error("propeller.stations: radii must rise and every figure must be a number")]
    Stations,
}

/// Evenly spaced spans of the beam between hub and tip; the stations are put in besides.
pub(super) const SPANS: usize = 96;
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
    /// How far the blades are turned in the hub, rad; in the angles.
    pub turn_rad: f64,
    /// The line the sections stand on.
    pub line: StackingLine,
    /// Radii of all stations, m, and their sections' shapes.
    stations_m: Vec<f64>,
    drawn: Vec<Drawn>,
    /// What is judged: the edge of the hub, where no station stands there, then the stations outside the
    /// hub.
    pub places: Vec<Place>,
}

impl BladeBeam {
    /// The blade of a job made ready.
    ///
    /// # Errors
    /// A species that is not known; stations that [`Job::check`](crate::job::Job::check) refuses.
    pub fn new(rig: &Rig) -> Result<Self, WoodError> {
        let wood = rig.job.wood.clone().unwrap_or_default();
        Self::of(rig, shapes(&rig.job), material(&wood)?)
    }

    /// The blade of another rig of the same wood whose stations have the same sections and thickness ratios:
    /// their outlines are not measured again.
    pub(super) fn like(&self, rig: &Rig) -> Result<Self, WoodError> {
        Self::of(rig, self.drawn.clone(), self.material.clone())
    }

    fn of(rig: &Rig, drawn: Vec<Drawn>, material: Material) -> Result<Self, WoodError> {
        let blade = &rig.rotor.blade;
        let stations_m: Vec<f64> = blade.station_radii_m().collect();
        let radii_m = radii(blade, &stations_m);
        let thickness: Vec<f64> = rig.job.propeller.stations.iter().map(|s| s.thickness_ratio).collect();
        let beam = Self {
            blades: blade.count,
            material,
            chords_m: radii_m.iter().map(|r| blade.cut(*r).chord_m).collect(),
            angles_rad: radii_m.iter().map(|r| blade.cut(*r).angle_rad + rig.turn_rad()).collect(),
            turn_rad: rig.turn_rad(),
            line: StackingLine::new(&rig.job, blade.radius_m),
            places: places(&radii_m, &stations_m, &drawn),
            sections: Vec::new(),
            mass_kg_m: Vec::new(),
            radii_m,
            stations_m,
            drawn,
        };
        beam.with_thickness(&thickness).ok_or(WoodError::Stations)
    }

    /// The same blade with other thickness ratios of its stations; `None` unless they are as many finite
    /// numbers.
    #[must_use]
    pub fn with_thickness(&self, ratios: &[f64]) -> Option<Self> {
        let thickness = Curve::new(self.stations_m.clone(), ratios.to_vec())?;
        let mut beam = self.clone();
        let section = |(r, chord): (&f64, &f64)| self.section(*r, *chord, thickness.at(*r));
        beam.sections = self.radii_m.iter().zip(&self.chords_m).map(section).collect();
        beam.mass_kg_m = beam.sections.iter().map(|s| self.material.density_kg_m3 * s.area_m2).collect();
        for place in &mut beam.places {
            place.thickness_ratio = thickness.at(self.radii_m[place.index]);
        }
        Some(beam)
    }

    /// The section at a radius: shapes run straight between the stations and are held outside.
    fn section(&self, radius_m: f64, chord_m: f64, thickness_ratio: f64) -> Section {
        let sized = |i: usize| self.drawn[i].shape.sized(chord_m, thickness_ratio);
        let above = self.stations_m.partition_point(|r| *r <= radius_m);
        if above == 0 || above == self.stations_m.len() {
            return sized(above.saturating_sub(1));
        }
        let (r0, r1) = (self.stations_m[above - 1], self.stations_m[above]);
        sized(above - 1).towards(&sized(above), (radius_m - r0) / (r1 - r0))
    }

    /// How far a condition turns the blades beyond the angles kept here, rad.
    pub(super) fn beyond_rad(&self, at: &Condition) -> f64 {
        at.turn_rad - self.turn_rad
    }

    /// A figure known at the radii, at any radius, m; held outside.
    pub(super) fn at(&self, values: &[f64], radius_m: f64) -> f64 {
        super::beam::at(&self.radii_m, values, radius_m)
    }
}

/// The edge of the hub, m.
fn root_m(blade: &Blade) -> f64 {
    blade.hub_radius_m.max(LEAST_ROOT * blade.radius_m)
}

/// Evenly spaced radii with the stations among them.
fn radii(blade: &Blade, stations_m: &[f64]) -> Vec<f64> {
    let (root, tip) = (root_m(blade), blade.radius_m);
    let near = 0.3 * (tip - root) / SPANS as f64;
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
pub(super) struct Drawn {
    pub(super) shape: Shape,
    pub(super) doubt: Option<Doubt>,
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
