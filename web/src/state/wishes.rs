//! Limits of the finished propeller, as a search has them.

use spokeshave::job::{Job, Limits, RpmLimit, Wishes};

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
            Self::StressMargin => ("least margin of stress", "stress_margin_least", Quantity::Share),
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

/// One of the two limits of rpm that a flight point may have of its own.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum RpmBound {
    /// Least.
    Least,
    /// Greatest.
    Most,
}

impl RpmBound {
    /// What it is called.
    #[must_use]
    pub fn name(self) -> &'static str {
        match self {
            Self::Least => "least rpm",
            Self::Most => "greatest rpm",
        }
    }

    fn of(self, limit: &mut RpmLimit) -> &mut Option<f64> {
        match self {
            Self::Least => &mut limit.least,
            Self::Most => &mut limit.most,
        }
    }

    /// Its path in the job file.
    pub(super) fn path(self, job: &Job, point: usize) -> String {
        let i = place(job, point).unwrap_or_default();
        format!("wishes.limits.rpm[{i}].{}", if self == Self::Least { "least" } else { "most" })
    }

    /// The limit at a flight point, rpm.
    #[must_use]
    pub fn value(self, job: &Job, point: usize) -> Option<f64> {
        let i = place(job, point)?;
        *self.of(&mut job.wishes.as_ref()?.limits.rpm.get(i)?.clone())
    }

    /// Writes the limit at a flight point, rpm, or takes it out; whether there is such a point.
    pub(super) fn write(self, job: &mut Job, point: usize, value: Option<f64>) -> bool {
        let Some(flight_point) = job.flight_points.get(point).map(|p| p.name.clone()) else { return false };
        let found = place(job, point);
        let mut wishes = job.wishes.take().unwrap_or_default();
        let all = &mut wishes.limits.rpm;
        let i = found.unwrap_or_else(|| {
            all.push(RpmLimit { flight_point, least: None, most: None });
            all.len() - 1
        });
        *self.of(&mut all[i]) = value;
        all.retain(|limit| limit.least.is_some() || limit.most.is_some());
        job.wishes = some(wishes);
        true
    }
}

/// Where the limits of a flight point stand.
fn place(job: &Job, point: usize) -> Option<usize> {
    let name = &job.flight_points.get(point)?.name;
    job.wishes.as_ref()?.limits.rpm.iter().position(|limit| limit.flight_point == *name)
}

#[cfg(test)]
mod tests {
    use super::*;
    use spokeshave::job::DEMOS;

    #[test]
    fn a_limit_of_rpm_comes_and_goes_with_its_flight_point() {
        let mut job = Job::from_json(DEMOS[0].json).unwrap();
        job.wishes = None;
        assert!(RpmBound::Most.write(&mut job, 1, Some(3100.0)));
        assert!(RpmBound::Least.write(&mut job, 2, Some(2300.0)));
        assert_eq!(job.check(), vec![]);
        assert_eq!(RpmBound::Most.value(&job, 1), Some(3100.0));
        assert_eq!(RpmBound::Most.value(&job, 2), None);
        assert_eq!(RpmBound::Least.path(&job, 2), "wishes.limits.rpm[1].least");
        assert!(RpmBound::Most.write(&mut job, 1, None));
        assert!(RpmBound::Least.write(&mut job, 2, None));
        assert_eq!(job.wishes, None);
        assert!(!RpmBound::Most.write(&mut job, 99, Some(3000.0)));
    }
}
