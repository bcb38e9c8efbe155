//! The units a dossier is written in.

use crate::bench::Unit;
use crate::wood::no_less;

/// A unit as it is written.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Scale {
    /// Its sign behind a figure; empty where there is none.
    pub sign: &'static str,
    /// How many of it make one of the SI unit.
    pub per_si: f64,
    /// Decimals of a figure; `None` for three significant figures.
    pub decimals: Option<usize>,
}

impl Scale {
    /// A unit of figures with so many decimals.
    #[must_use]
    pub const fn fixed(sign: &'static str, per_si: f64, decimals: usize) -> Self {
        Self { sign, per_si, decimals: Some(decimals) }
    }

    /// A unit of three significant figures.
    #[must_use]
    pub const fn three(sign: &'static str, per_si: f64) -> Self {
        Self { sign, per_si, decimals: None }
    }

    /// An SI value as a figure; a dash where there is none.
    #[must_use]
    pub fn figure(&self, si: impl Into<Option<f64>>) -> String {
        let Some(value) = si.into().map(|si| si * self.per_si).filter(|v| v.is_finite()) else {
            return NONE.into();
        };
        fixed(value, self.decimals.unwrap_or_else(|| three_figures(value)))
    }

    /// The same, never less than it is.
    #[must_use]
    pub fn no_less(&self, si: f64) -> String {
        self.figure(no_less(si * self.per_si, self.decimals.unwrap_or(3)) / self.per_si)
    }

    /// The same with its sign always shown.
    #[must_use]
    pub fn signed(&self, si: impl Into<Option<f64>>) -> String {
        let text = self.figure(si);
        let bare = text == NONE || text.starts_with('-') || text.trim_matches(['0', '.']).is_empty();
        if bare { text } else { format!("+{text}") }
    }

    /// The same with its unit.
    #[must_use]
    pub fn say(&self, si: impl Into<Option<f64>>) -> String {
        let text = self.figure(si);
        match (text == NONE, self.sign) {
            (true, _) | (_, "") => text,
            (_, "°") => format!("{text}°"),
            (_, sign) => format!("{text} {sign}"),
        }
    }
}

/// Stands where there is no figure.
pub(super) const NONE: &str = "–";

/// A figure without a minus before a zero.
pub(super) fn fixed(value: f64, decimals: usize) -> String {
    let text = format!("{value:.decimals$}");
    if text.trim_start_matches(['-', '0', '.']).is_empty() {
        text.trim_start_matches('-').into()
    } else {
        text
    }
}

fn three_figures(value: f64) -> usize {
    match value.abs() {
        v if v >= 99.95 => 0,
        v if v >= 9.995 => 1,
        v if v > 0.0 && v < 0.0995 => 4,
        v if v > 0.0 && v < 0.995 => 3,
        _ => 2,
    }
}

/// The units of a dossier.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Scales {
    /// Unit of lengths on the blade, as on the sheets for the bench.
    pub unit: Unit,
    /// Speed, of m/s.
    pub speed: Scale,
    /// Rate of climb, of m/s.
    pub climb: Scale,
    /// Height and distance on the ground, of m.
    pub height: Scale,
    /// Distance flown, of m.
    pub distance: Scale,
    /// Force, of N.
    pub force: Scale,
    /// Torque, of N m.
    pub torque: Scale,
    /// Power, of W.
    pub power: Scale,
    /// Stress, of Pa.
    pub stress: Scale,
    /// Mass, of kg.
    pub mass: Scale,
    /// Area, of m².
    pub area: Scale,
    /// Fuel flow, of kg/h.
    pub fuel: Scale,
}

impl Scales {
    /// Millimetres, km/h, newtons, kilowatts.
    pub const METRIC: Self = Self {
        unit: Unit::Millimetre,
        speed: Scale::fixed("km/h", 3.6, 0),
        climb: Scale::fixed("m/s", 1.0, 1),
        height: Scale::fixed("m", 1.0, 0),
        distance: Scale::three("km", 1e-3),
        force: Scale::three("N", 1.0),
        torque: Scale::three("N m", 1.0),
        power: Scale::three("kW", 1e-3),
        stress: Scale::fixed("MPa", 1e-6, 1),
        mass: Scale::three("kg", 1.0),
        area: Scale::three("m²", 1.0),
        fuel: Scale::three("kg/h", 1.0),
    };

    /// Inches, mph, pounds, horsepower (550 foot-pounds a second).
    pub const INCHES: Self = Self {
        unit: Unit::Inch,
        speed: Scale::fixed("mph", 3600.0 / 1609.344, 0),
        climb: Scale::fixed("ft/min", 60.0 / FOOT_M, 0),
        height: Scale::fixed("ft", 1.0 / FOOT_M, 0),
        distance: Scale::three("mi", 1.0 / 1609.344),
        force: Scale::three("lbf", 1.0 / POUND_N),
        torque: Scale::three("lbf ft", 1.0 / (POUND_N * FOOT_M)),
        power: Scale::three("hp", 1.0 / (550.0 * FOOT_M * POUND_N)),
        stress: Scale::fixed("psi", FOOT_M * FOOT_M / (144.0 * POUND_N), 0),
        mass: Scale::three("lb", 1.0 / POUND_KG),
        area: Scale::three("ft²", 1.0 / (FOOT_M * FOOT_M)),
        fuel: Scale::three("lb/h", 1.0 / POUND_KG),
    };

    /// Fuel for the work done (kg/kWh) with its units.
    #[must_use]
    pub fn consumption(&self, kg_per_kwh: f64) -> String {
        let value = kg_per_kwh * self.fuel.per_si / (1e3 * self.power.per_si);
        format!("{value:.3} {} for each {}", self.fuel.sign, self.power.sign)
    }

    /// Lengths on the blade, of m.
    #[must_use]
    pub fn length(&self) -> Scale {
        match self.unit {
            Unit::Millimetre => Scale::fixed("mm", 1e3, 1),
            Unit::Inch => Scale::fixed("in", 1.0 / 0.0254, 3),
        }
    }
}

/// A foot, m; a pound-force, N; a pound, kg: as they are defined.
const FOOT_M: f64 = 0.3048;
const POUND_N: f64 = 4.448_221_615_260_5;
const POUND_KG: f64 = 0.453_592_37;

/// A coefficient or a share.
pub(super) const PLAIN: Scale = Scale::fixed("", 1.0, 3);
/// An angle, of degrees.
pub(super) const DEGREES: Scale = Scale::fixed("°", 1.0, 1);
/// Turns in a minute.
pub(super) const RPM: Scale = Scale::fixed("rpm", 1.0, 0);
/// Percent of a share.
pub(super) const PERCENT: Scale = Scale::fixed("%", 100.0, 0);

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn figures_are_rounded_signed_and_never_minus_nothing() {
        let newton = Scales::METRIC.force;
        assert_eq!(
            [1234.4, 12.34, 1.234, 0.0123].map(|v| newton.figure(v)),
            ["1234", "12.3", "1.23", "0.0123"]
        );
        assert_eq!((DEGREES.signed(-0.04), DEGREES.signed(1.23)), ("0.0".into(), "+1.2".into()));
        assert_eq!(
            (DEGREES.say(2.0), DEGREES.say(None), DEGREES.say(f64::NAN)),
            ("2.0°".into(), "–".into(), "–".into())
        );
    }

    #[test]
    fn what_is_missing_is_never_told_less_than_it_is() {
        let lengths = [Scale::fixed("mm", 1e3, 1), Scale::fixed("in", 1.0 / 0.0254, 3)];
        for metres in [1e-4, 8e-4, 1e-3, 1.2e-3, 0.0127] {
            for (length, most_over) in lengths.iter().zip([1e-10, 2.6e-5]) {
                let told: f64 = length.no_less(metres).parse().unwrap();
                let over = told / length.per_si - metres;
                assert!(over > -1e-9 && over < most_over, "{metres} {told} {}", length.sign);
            }
        }
    }

    /// Defined values: 1 mph is 0.44704 m/s, 1 hp 745.699 872 W, 1 psi 6894.757 Pa, 1 lbf 4.448 222 N.
    #[test]
    fn units_are_worth_what_they_are_defined_as() {
        let of = Scales::INCHES;
        for (scale, si) in
            [(of.speed, 0.447_04), (of.power, 745.699_872), (of.stress, 6_894.757_29), (of.force, 4.448_222)]
        {
            assert!((scale.per_si * si - 1.0).abs() < 1e-6, "{scale:?}");
        }
        // 1 lb/(hp h) is 0.608 277 kg/kWh.
        assert_eq!(of.consumption(0.608_277), "1.000 lb/h for each hp");
        assert_eq!(Scales::METRIC.consumption(0.3), "0.300 kg/h for each kW");
    }
}
