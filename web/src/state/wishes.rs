//! Limits of the finished propeller, as a search has them.

use spokeshave::job::{Job, Limits, Wishes};

use crate::units::Quantity;

/// A limit of the finished propeller.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum LimitFigure {
    /// Greatest rpm.
    Rpm,
    /// Least rpm standing at full throttle.
    StandingRpm,
    /// Greatest Mach number of the tip.
    TipMach,
    /// Greatest diameter.
    Diameter,
    /// Height of the shaft.
    ShaftHeight,
    /// Clearance to the ground.
    Clearance,
    /// Width of the blank.
    BlankWidth,
    /// Thickness of the blank.
    BlankDepth,
    /// Least stress margin.
    StressMargin,
}

impl LimitFigure {
    /// All of them, in the order shown.
    pub const ALL: [Self; 9] = [
        Self::StandingRpm,
        Self::Rpm,
        Self::TipMach,
        Self::Diameter,
        Self::ShaftHeight,
        Self::Clearance,
        Self::BlankWidth,
        Self::BlankDepth,
        Self::StressMargin,
    ];

    /// What it is called, its name in the job file, what it measures.
    const fn about(self) -> (&'static str, &'static str, Quantity) {
        match self {
            Self::Rpm => ("greatest rpm", "rpm_most", Quantity::Rpm),
            Self::StandingRpm => ("least rpm standing", "standing_rpm_least", Quantity::Rpm),
            Self::TipMach => ("greatest tip Mach number", "tip_mach_most", Quantity::Coefficient),
            Self::Diameter => ("greatest diameter", "diameter_most_m", Quantity::Length),
            Self::ShaftHeight => ("height of the shaft", "shaft_height_m", Quantity::Length),
            Self::Clearance => ("ground clearance", "ground_clearance_m", Quantity::Length),
            Self::BlankWidth => ("width of the blank", "blank_width_most_m", Quantity::Length),
            Self::BlankDepth => ("thickness of the blank", "blank_depth_most_m", Quantity::Length),
            Self::StressMargin => ("least stress margin", "stress_margin_least", Quantity::Coefficient),
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
        self.about().2
    }

    /// Its path in the job file.
    pub(super) fn path(self) -> String {
        format!("wishes.limits.{}", self.about().1)
    }

    fn place(self, limits: &mut Limits) -> &mut Option<f64> {
        match self {
            Self::Rpm => &mut limits.rpm_most,
            Self::StandingRpm => &mut limits.standing_rpm_least,
            Self::TipMach => &mut limits.tip_mach_most,
            Self::Diameter => &mut limits.diameter_most_m,
            Self::ShaftHeight => &mut limits.shaft_height_m,
            Self::Clearance => &mut limits.ground_clearance_m,
            Self::BlankWidth => &mut limits.blank_width_most_m,
            Self::BlankDepth => &mut limits.blank_depth_most_m,
            Self::StressMargin => &mut limits.stress_margin_least,
        }
    }

    /// The figure, SI.
    #[must_use]
    pub fn value(self, job: &Job) -> Option<f64> {
        *self.place(&mut job.wishes.as_ref()?.limits.clone())
    }

    /// Writes the figure, SI.
    pub(super) fn write(self, job: &mut Job, value: f64) {
        *self.place(&mut job.wishes.get_or_insert_default().limits) = Some(value);
    }

    /// Takes the figure out.
    pub(super) fn clear(self, job: &mut Job) {
        if let Some(wishes) = &mut job.wishes {
            *self.place(&mut wishes.limits) = None;
            job.wishes = some(wishes.clone());
        }
    }
}

/// Wishes that say something.
pub(super) fn some(wishes: Wishes) -> Option<Wishes> {
    (wishes != Wishes::default()).then_some(wishes)
}
