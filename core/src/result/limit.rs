//! Limits of the finished propeller and what is left of them, as plain data.

use serde::Serialize;

/// A limit of the finished propeller.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize)]
#[serde(rename_all = "kebab-case")]
pub enum Limit {
    /// A flight point has no answer.
    Answer,
    /// The engine's greatest rpm, in level flight.
    EngineRpm,
    /// The engine's power, in level flight.
    EnginePower,
    /// Greatest propeller rpm.
    RpmMost,
    /// Least propeller rpm.
    RpmLeast,
    /// Least rpm standing at full throttle.
    StandingRpmLeast,
    /// Greatest helical Mach number of the tip.
    TipMachMost,
    /// Greatest diameter, m, by itself or by ground clearance.
    DiameterMost,
    /// Greatest width of the blank, m.
    BlankWidthMost,
    /// Greatest depth of the blank, m.
    BlankDepthMost,
    /// Least stress margin, limit over stress less 1.
    StressMarginLeast,
}

/// How far a limit is kept.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Margin {
    /// The limit.
    pub limit: Limit,
    /// The flight point, where it is one of a flight point.
    pub flight_point: Option<String>,
    /// What is found, in the limit's own unit; `None` where there is no answer.
    pub found: Option<f64>,
    /// What is allowed; `None` where the limit has no figure.
    pub allowed: Option<f64>,
    /// Share of the limit left over; below zero it is broken.
    pub share: f64,
}

impl Limit {
    /// A few plain words.
    #[must_use]
    pub fn words(self) -> &'static str {
        match self {
            Self::Answer => "an answer",
            Self::EngineRpm => "the engine's greatest rpm",
            Self::EnginePower => "the engine's power",
            Self::RpmMost => "greatest rpm",
            Self::RpmLeast => "least rpm",
            Self::StandingRpmLeast => "least rpm standing",
            Self::TipMachMost => "tip Mach number",
            Self::DiameterMost => "diameter",
            Self::BlankWidthMost => "width of the blank",
            Self::BlankDepthMost => "thickness of the blank",
            Self::StressMarginLeast => "stress margin",
        }
    }

    /// A figure in the unit people use, from the limit's own.
    fn told(self, value: f64) -> String {
        match self {
            Self::TipMachMost => format!("Mach {value:.3}"),
            Self::DiameterMost | Self::BlankWidthMost | Self::BlankDepthMost => {
                format!("{:.1} mm ({:.2} in)", 1e3 * value, value / 0.0254)
            }
            Self::StressMarginLeast => format!("{value:.3}"),
            Self::EnginePower => format!("{:.3} kW", 1e-3 * value),
            _ => format!("{value:.0} rpm"),
        }
    }
}

impl Margin {
    /// What the limit is, what is found, and by how much it is kept or broken: one plain sentence.
    #[must_use]
    pub fn sentence(&self) -> String {
        let place = self.flight_point.as_ref().map_or_else(String::new, |p| format!("{p}: "));
        let what = self.limit.words();
        let (Some(found), Some(allowed)) = (self.found, self.allowed) else {
            return format!("{place}there is no answer.");
        };
        let told = |value: f64| self.limit.told(value);
        let kept = if self.share < 0.0 { "past the limit" } else { "to spare" };
        let by = told((found - allowed).abs());
        format!("{place}{what}: {} where {} is the limit, {by} {kept}.", told(found), told(allowed))
    }
}
