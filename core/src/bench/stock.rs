//! What a blade is made of, in the words of those who make it.

use crate::job::{Job, Species};
use crate::wood::{Kind, Species as Known};

/// What sort of stock a blade is cut from, or grown of.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(crate) enum Stock {
    /// Boards glued to a blank.
    Wood,
    /// Printed, moulded or milled plastic.
    Plastic,
    /// Fibres in resin.
    Laminate,
    /// The job's own material, of which no more is known than its values.
    Own,
}

impl Stock {
    pub(crate) fn of(job: &Job) -> Self {
        let Some(wood) = &job.wood else { return Self::Wood };
        let Species::Named(name) = &wood.species else { return Self::Own };
        match Known::named(name).map(|s| s.kind) {
            Some(Kind::Plastic) => Self::Plastic,
            Some(Kind::Composite) => Self::Laminate,
            _ => Self::Wood,
        }
    }

    /// Whether it takes up moisture, has grain and knots.
    pub(crate) fn is_wood(self) -> bool {
        self == Self::Wood
    }

    /// What the blade is made of, as a word in a sentence.
    pub(crate) fn word(self) -> &'static str {
        if self.is_wood() { "wood" } else { "material" }
    }

    /// What boards are called.
    pub(crate) fn board(self) -> &'static str {
        if self.is_wood() { "boards" } else { "layers" }
    }

    /// How the block comes about.
    pub(crate) fn making(self) -> &'static str {
        match self {
            Self::Wood => "Glue up the blank",
            Self::Plastic => {
                "Make the block (or print or mill the solid from its STL file, layers along the blade, and \
                 go on at step 7)"
            }
            Self::Laminate => {
                "Lay up the block, fibres along the blade (or mould the blade from its STL file, and go on at step 7)"
            }
            Self::Own => "Make the block",
        }
    }
}

/// The name of a job's material; `None` where it names none.
pub(crate) fn name(job: &Job) -> Option<String> {
    job.wood.as_ref().map(|wood| match &wood.species {
        Species::Named(name) => name.replace('-', " "),
        Species::Own(own) => own.name.clone(),
    })
}
