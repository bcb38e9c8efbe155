//! A section of the user's own: from a table that was made or measured, and back to what a blade asks of it.

use super::check::section_problems;
use super::document::{Job, Section, ordinary_korn};
use super::error::Problem;
use crate::section::outline::{Outline, OutlineError};
use crate::section::{About, Table, library};

impl Section {
    /// A table under the name that stations call it by.
    #[must_use]
    pub fn of(name: &str, table: Table) -> Self {
        let (face_angle_deg, face_angles) = match table.face_angles.as_slice() {
            [only] => (Some(only.angle_deg), Vec::new()),
            _ => (None, table.face_angles),
        };
        Self {
            name: name.to_string(),
            origin: table.origin,
            face_angle_deg,
            face_angles,
            outline: table.outline,
            korn_factor: ordinary_korn(),
            polars: table.polars,
        }
    }

    /// Every value that is not allowed, as if it were the only section of a job.
    #[must_use]
    pub fn problems(&self) -> Vec<Problem> {
        section_problems(self)
    }

    /// What is worth saying about it besides its polars.
    #[must_use]
    pub fn about(&self) -> About {
        let by_thickness = self.face_angles.iter().map(|f| (f.thickness_ratio, f.angle_deg));
        About {
            name: self.name.clone(),
            title: self.name.clone(),
            origin: self.origin.clone(),
            face_angle_deg: self.face_angle_deg.map(|a| (0.0, a)).into_iter().chain(by_thickness).collect(),
            korn_factor: self.korn_factor,
        }
    }

    /// Whether blade angles can be measured on its face.
    #[must_use]
    pub fn has_face(&self) -> bool {
        self.face_angle_deg.is_some() || !self.face_angles.is_empty()
    }

    /// Its outline, where it has one.
    ///
    /// # Errors
    /// What is wrong with the points.
    pub fn drawn(&self) -> Result<Option<Outline>, OutlineError> {
        if self.outline.is_empty() {
            Ok(None)
        } else {
            Outline::from_points(&self.name, &self.outline).map(Some)
        }
    }

    /// Its outline drawn at a thickness ratio; `None` where it has none or cannot be drawn that thick.
    #[must_use]
    pub fn outline_at(&self, thickness_ratio: f64) -> Option<Outline> {
        self.drawn().ok()??.scaled_to(thickness_ratio).ok()
    }
}

impl Job {
    /// The outline of a section at a thickness ratio: of the job's own section of that name, or of the one
    /// that comes with the program. `None` where there is none or it cannot be drawn that thick.
    #[must_use]
    pub fn section_outline(&self, name: &str, thickness_ratio: f64) -> Option<Outline> {
        match self.sections.iter().find(|own| own.name == name) {
            Some(own) => own.outline_at(thickness_ratio),
            None => library().outline(name, thickness_ratio),
        }
    }

    /// The job with a section more, or with the section of that name replaced.
    #[must_use]
    pub fn with_section(&self, section: Section) -> Self {
        let mut more = self.clone();
        match more.sections.iter_mut().find(|own| own.name == section.name) {
            Some(own) => *own = section,
            None => more.sections.push(section),
        }
        more
    }
}
