//! The blade as drawn: chord, blade angle, thickness and section at any radius.
//!
//! Between stations chord, angle and thickness follow a monotone cubic in radius; sections blend linearly in
//! radius from one station's to the next. Inboard of the first station and outboard of the last one
//! everything is held. Blade angles are kept to the chord line: an angle measured on the flat face is turned
//! by the section's own angle between face and chord line at that thickness.

mod line;

use std::f64::consts::{PI, TAU};
use std::sync::Arc;

use crate::curve::Curve;
use crate::job::{AngleReference, Job, Propeller, Station};
use crate::section::{Family, TableError, library};

pub use line::StackingLine;

/// What the blade is at one radius.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Cut {
    /// Radius, m.
    pub radius_m: f64,
    /// Chord, m.
    pub chord_m: f64,
    /// Blade angle to the chord line, rad.
    pub angle_rad: f64,
    /// Thickness over chord.
    pub thickness_ratio: f64,
    /// The section.
    pub section: SectionMix,
}

/// One family, or two with the share of the second.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct SectionMix {
    /// Index into [`Blade::families`].
    pub inner: usize,
    /// Index into [`Blade::families`].
    pub outer: usize,
    /// Share of `outer`, 0 to 1; 0 where both are the same.
    pub share: f64,
}

/// A blade ready for any radius.
#[derive(Clone, Debug)]
pub struct Blade {
    /// Number of blades.
    pub count: u32,
    /// Tip radius, m.
    pub radius_m: f64,
    /// Hub radius, m.
    pub hub_radius_m: f64,
    /// Speed of the air at the disc over the airspeed, 1 less the blockage.
    pub axial_share: f64,
    /// Families used, each once.
    pub families: Vec<Arc<Family>>,
    chord: Curve,
    angle: Curve,
    thickness: Curve,
    /// Radius of each station, m, and the index of its family.
    stations: Vec<(f64, usize)>,
}

/// Why a blade could not be built from a job that was not checked.
#[derive(Clone, Debug, thiserror::Error, PartialEq)]
#[non_exhaustive]
pub enum BladeError {
    /// A section is neither in the job nor shipped.
    #[error("propeller.stations[{station}].section: \"{name}\" is not known")]
    UnknownSection {
        /// Index of the station.
        station: usize,
        /// Its section's name.
        name: String,
    },
    /// A section's tables are wrong.
    #[error("section \"{name}\": {error}")]
    Table {
        /// The section's name.
        name: String,
        /// What is wrong.
        error: TableError,
    },
    /// Stations do not rise, or a figure is missing or not finite.
    #[error("propeller.stations: radii must rise and every figure must be a number")]
    Stations,
}

impl Blade {
    /// The blade of a job.
    ///
    /// # Errors
    /// Only for a job that [`Job::check`] refuses.
    pub fn new(job: &Job) -> Result<Self, BladeError> {
        Self::with(job, &[])
    }

    /// The blade of a job whose sections are the same as those of a job already made ready, whose families
    /// are taken over.
    ///
    /// # Errors
    /// Only for a job that [`Job::check`] refuses.
    pub fn with(job: &Job, known: &[Arc<Family>]) -> Result<Self, BladeError> {
        let p = &job.propeller;
        let radius_m = p.diameter_m / 2.0;
        let mut families: Vec<Arc<Family>> = Vec::new();
        let mut stations = Vec::new();
        for (i, s) in p.stations.iter().enumerate() {
            let index = if let Some(known) = families.iter().position(|f| f.about.name == s.section) {
                known
            } else {
                let ready = known.iter().find(|f| f.about.name == s.section).cloned();
                families.push(ready.map_or_else(|| family(job, i, &s.section), Ok)?);
                families.len() - 1
            };
            stations.push((s.radius_fraction * radius_m, index));
        }
        let figures = |of: &dyn Fn(usize, &Station) -> f64| {
            let y = p.stations.iter().enumerate().map(|(i, s)| of(i, s)).collect();
            Curve::new(stations.iter().map(|s| s.0).collect(), y).ok_or(BladeError::Stations)
        };
        let chord = figures(&|_, s| s.chord_m)?;
        let angle = figures(&|i, s| chord_line_angle_rad(p, s, &families[stations[i].1]))?;
        let thickness = figures(&|_, s| s.thickness_ratio)?;
        let hub_radius_m = p.hub_diameter_m / 2.0;
        let axial_share = 1.0 - p.blockage.unwrap_or(0.0);
        Ok(Self {
            count: p.blades,
            radius_m,
            hub_radius_m,
            axial_share,
            families,
            chord,
            angle,
            thickness,
            stations,
        })
    }

    /// The blade at a radius, m.
    #[must_use]
    pub fn cut(&self, radius_m: f64) -> Cut {
        Cut {
            radius_m,
            chord_m: self.chord.at(radius_m),
            angle_rad: self.angle.at(radius_m),
            thickness_ratio: self.thickness.at(radius_m),
            section: self.section(radius_m),
        }
    }

    /// Radii of the stations, m.
    pub fn station_radii_m(&self) -> impl Iterator<Item = f64> {
        self.stations.iter().map(|s| s.0)
    }

    /// Angle (rad) from the flat face up to the chord line at a radius (m); `None` where there is no flat
    /// face.
    #[must_use]
    pub fn face_to_chord_rad(&self, radius_m: f64) -> Option<f64> {
        self.face_to_chord_of(radius_m, self.thickness.at(radius_m))
    }

    /// The same for another thickness ratio of the section there.
    #[must_use]
    pub fn face_to_chord_of(&self, radius_m: f64, thickness_ratio: f64) -> Option<f64> {
        let (mix, t) = (self.section(radius_m), thickness_ratio);
        let inner = self.families[mix.inner].face_angle_rad(t)?;
        let outer = self.families[mix.outer].face_angle_rad(t)?;
        Some(inner + mix.share * (outer - inner))
    }

    /// `(100 000/16) ∫ (c/D) x³ dx`, one blade, from the hub to the tip.
    #[must_use]
    pub fn activity_factor(&self) -> f64 {
        let d = 2.0 * self.radius_m;
        let inner = self.hub_radius_m / self.radius_m;
        6_250.0 * integral(inner, 1.0, |x| self.chord.at(x * self.radius_m) / d * x.powi(3))
    }

    /// Blade area over disc area.
    #[must_use]
    pub fn solidity(&self) -> f64 {
        let area = integral(self.hub_radius_m, self.radius_m, |r| self.chord.at(r));
        f64::from(self.count) * area / (PI * self.radius_m * self.radius_m)
    }

    /// Geometric pitch `2π r tan(angle)` at 0.75 of the tip radius with the blades turned by `turn_rad`, m.
    #[must_use]
    pub fn pitch_075_m(&self, turn_rad: f64) -> f64 {
        let r = 0.75 * self.radius_m;
        TAU * r * (self.angle.at(r) + turn_rad).tan()
    }

    fn section(&self, radius_m: f64) -> SectionMix {
        let same = |i: usize| SectionMix { inner: self.stations[i].1, outer: self.stations[i].1, share: 0.0 };
        let above = self.stations.partition_point(|s| s.0 <= radius_m);
        if above == 0 || above == self.stations.len() {
            return same(above.saturating_sub(1));
        }
        let ((r0, inner), (r1, outer)) = (self.stations[above - 1], self.stations[above]);
        if inner == outer {
            same(above)
        } else {
            SectionMix { inner, outer, share: (radius_m - r0) / (r1 - r0) }
        }
    }
}

/// Blade angle of a station to the chord line, rad.
fn chord_line_angle_rad(p: &Propeller, s: &Station, family: &Family) -> f64 {
    let radius_m = s.radius_fraction * p.diameter_m / 2.0;
    let given = match (s.angle_deg, s.pitch_m) {
        (Some(deg), _) => deg.to_radians(),
        (None, Some(pitch)) => (pitch / (TAU * radius_m)).atan(),
        (None, None) => f64::NAN,
    };
    match p.angle_reference {
        AngleReference::ChordLine => given,
        AngleReference::FlatFace => given + family.face_angle_rad(s.thickness_ratio).unwrap_or(f64::NAN),
    }
}

fn family(job: &Job, station: usize, name: &str) -> Result<Arc<Family>, BladeError> {
    let Some(own) = job.sections.iter().find(|s| s.name == name) else {
        return library()
            .family(name, job.method.n_crit)
            .cloned()
            .ok_or_else(|| BladeError::UnknownSection { station, name: name.to_string() });
    };
    Family::new(own.about(), &own.polars)
        .map(Arc::new)
        .map_err(|error| BladeError::Table { name: name.to_string(), error })
}

/// Midpoint rule on 400 steps: the curves are cubics, so that four figures are certain.
fn integral(from: f64, to: f64, of: impl Fn(f64) -> f64) -> f64 {
    const STEPS: u32 = 400;
    let h = (to - from) / f64::from(STEPS);
    (0..STEPS).map(|i| h * of(from + h * (f64::from(i) + 0.5))).sum()
}
