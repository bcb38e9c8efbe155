//! How the blade is made.

use spokeshave::job::{Job, Making};

use crate::units::Quantity;

/// A figure of how the blade is made; each has a usual value where the job has none.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum MakingFigure {
    /// Where the chord lines stand on the stacking line.
    Stacking,
    /// Least thickness of the trailing edge.
    TrailingEdge,
    /// Least radius of the leading edge.
    LeadingEdge,
    /// Length over which the tip is rounded off.
    TipLength,
    /// Thickness of the blank.
    BlankThickness,
    /// Width of the blank.
    BlankWidth,
    /// Wood left round the blade.
    Allowance,
}

impl MakingFigure {
    /// All, in the order shown.
    pub const ALL: [Self; 7] = [
        Self::Stacking,
        Self::TrailingEdge,
        Self::LeadingEdge,
        Self::TipLength,
        Self::BlankThickness,
        Self::BlankWidth,
        Self::Allowance,
    ];

    /// What it is called and its name in the job file.
    const fn about(self) -> (&'static str, &'static str) {
        match self {
            Self::Stacking => ("stacking line behind the leading edge", "stacking_fraction"),
            Self::TrailingEdge => ("least trailing edge", "trailing_edge_m"),
            Self::LeadingEdge => ("least leading-edge radius", "leading_edge_radius_m"),
            Self::TipLength => ("length of the rounded tip", "tip_length_m"),
            Self::BlankThickness => ("thickness of the blank", "blank_thickness_m"),
            Self::BlankWidth => ("width of the blank", "blank_width_m"),
            Self::Allowance => ("wood left round the blade", "allowance_m"),
        }
    }

    /// What it is called.
    #[must_use]
    pub fn name(self) -> &'static str {
        self.about().0
    }

    /// What it measures.
    #[must_use]
    pub fn quantity(self) -> Quantity {
        if self == Self::Stacking { Quantity::Share } else { Quantity::Length }
    }

    /// Its path in the job file.
    pub(in crate::state) fn path(self) -> String {
        format!("bench.{}", self.about().1)
    }

    fn place(self, making: &mut Making) -> &mut Option<f64> {
        match self {
            Self::Stacking => &mut making.stacking_fraction,
            Self::TrailingEdge => &mut making.trailing_edge_m,
            Self::LeadingEdge => &mut making.leading_edge_radius_m,
            Self::TipLength => &mut making.tip_length_m,
            Self::BlankThickness => &mut making.blank_thickness_m,
            Self::BlankWidth => &mut making.blank_width_m,
            Self::Allowance => &mut making.allowance_m,
        }
    }

    /// The figure, SI; none where the usual one is taken.
    #[must_use]
    pub fn value(self, job: &Job) -> Option<f64> {
        *self.place(&mut job.bench.clone()?)
    }

    /// Puts the figure in, SI, or takes it out.
    pub(in crate::state) fn write(self, job: &mut Job, value: Option<f64>) {
        change(job, |making| *self.place(making) = value);
    }
}

/// Changes how the blade is made; what is usual needs no place in the job.
pub(in crate::state) fn change(job: &mut Job, by: impl FnOnce(&mut Making)) {
    let mut making = job.bench.take().unwrap_or_default();
    by(&mut making);
    job.bench = (making != Making::default()).then_some(making);
}
