//! The figures by which blades are told apart, in words and in the unit shown.

use spokeshave::job::Figure;

use crate::chart::unit::Unit;
use crate::number::{NO_FIGURE, fixed, signed, with_unit};
use crate::units::{Quantity, Units};

/// All that may count, in the order shown.
pub(super) const ALL: [Figure; 9] = [
    Figure::Efficiency,
    Figure::AirspeedMS,
    Figure::RateOfClimbMS,
    Figure::ThrustN,
    Figure::PowerW,
    Figure::TakeOffM,
    Figure::EnduranceS,
    Figure::TipMach,
    Figure::Rpm,
];

/// What it is called.
pub(super) fn name(figure: Figure) -> &'static str {
    match figure {
        Figure::Efficiency => "efficiency",
        Figure::AirspeedMS => "airspeed",
        Figure::RateOfClimbMS => "rate of climb",
        Figure::ThrustN => "thrust",
        Figure::PowerW => "shaft power",
        Figure::TakeOffM => "take-off to 15 m (50 ft)",
        Figure::EnduranceS => "endurance",
        Figure::TipMach => "tip Mach number (noise)",
        Figure::Rpm => "rpm",
    }
}

fn quantity(figure: Figure) -> Option<Quantity> {
    match figure {
        Figure::AirspeedMS => Some(Quantity::Speed),
        Figure::RateOfClimbMS => Some(Quantity::Climb),
        Figure::ThrustN => Some(Quantity::Force),
        Figure::PowerW => Some(Quantity::Power),
        Figure::TakeOffM => Some(Quantity::Height),
        Figure::Rpm => Some(Quantity::Rpm),
        Figure::Efficiency | Figure::EnduranceS | Figure::TipMach => None,
    }
}

/// A figure with its unit.
pub(super) fn told(units: Units, figure: Figure, si: Option<f64>) -> String {
    match (quantity(figure), si) {
        (Some(quantity), _) => with_unit(units, quantity, si),
        (None, None) => NO_FIGURE.into(),
        (None, Some(s)) if figure == Figure::EnduranceS => format!("{}\u{a0}min", fixed(s / 60.0, 0)),
        (None, Some(value)) => fixed(value, 3),
    }
}

/// The unit of an axis.
pub(super) fn unit(units: Units, figure: Figure) -> Unit {
    match (figure, quantity(figure)) {
        (Figure::EnduranceS, _) => Unit { name: "min", per_si: 1.0 / 60.0, decimals: 0 },
        (_, Some(quantity)) => units.unit(quantity),
        (_, None) => Unit::ratio(3),
    }
}

/// By how much a figure is more than that of the drawn blade, in percent, and whether that is better.
pub(super) fn change(figure: Figure, drawn: Option<f64>, new: Option<f64>) -> Option<String> {
    let (old, new) = (drawn?, new?);
    let percent = Some(100.0 * (new - old) / old.abs()).filter(|p| p.is_finite())?;
    let said = format!("{}\u{a0}%", signed(percent, 1));
    Some(match percent {
        p if p.abs() < 0.05 => said,
        p if (p < 0.0) == figure.less_is_better() => format!("{said}, better"),
        _ => format!("{said}, worse"),
    })
}
