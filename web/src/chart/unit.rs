//! Units as shown; everything inside is SI.

use super::number::fixed;

/// A unit of the page.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Unit {
    /// As written after a figure.
    pub name: &'static str,
    /// How many of this unit are one of the SI unit.
    pub per_si: f64,
    /// Decimals that say enough.
    pub decimals: usize,
}

impl Unit {
    /// Millimetres.
    pub const MM: Self = Self { name: "mm", per_si: 1000.0, decimals: 0 };
    /// Inches of 25.4 mm exactly.
    pub const INCH: Self = Self { name: "in", per_si: 1.0 / 0.0254, decimals: 2 };
    /// Metres per second.
    pub const M_S: Self = Self { name: "m/s", per_si: 1.0, decimals: 1 };
    /// Kilometres per hour.
    pub const KM_H: Self = Self { name: "km/h", per_si: 3.6, decimals: 0 };
    /// Knots: nautical miles of 1852 m per hour.
    pub const KNOT: Self = Self { name: "kt", per_si: 3600.0 / 1852.0, decimals: 0 };
    /// Statute miles of 1609.344 m per hour.
    pub const MPH: Self = Self { name: "mph", per_si: 3600.0 / 1609.344, decimals: 0 };

    /// Degrees, of values that are kept in degrees.
    pub const DEGREE: Self = Self { name: "degrees", per_si: 1.0, decimals: 1 };

    /// No unit: a ratio or coefficient.
    #[must_use]
    pub const fn ratio(decimals: usize) -> Self {
        Self { name: "", per_si: 1.0, decimals }
    }

    /// An SI value in this unit.
    #[must_use]
    pub fn of(&self, si: f64) -> f64 {
        si * self.per_si
    }

    /// A value in this unit in SI.
    #[must_use]
    pub fn si(&self, shown: f64) -> f64 {
        shown / self.per_si
    }

    /// The figure alone.
    #[must_use]
    pub fn figure(&self, si: f64) -> String {
        fixed(self.of(si), self.decimals)
    }

    /// The figure alone, without decimals once it has three places before them.
    #[must_use]
    pub fn short_figure(&self, si: f64) -> String {
        let shown = self.of(si);
        fixed(shown, if shown.abs() < 99.95 { self.decimals } else { 0 })
    }

    /// The short figure with the unit.
    #[must_use]
    pub fn short(&self, si: f64) -> String {
        format!("{} {}", self.short_figure(si), self.name).trim_end().to_owned()
    }

    /// The figure with the unit.
    #[must_use]
    pub fn text(&self, si: f64) -> String {
        format!("{} {}", self.figure(si), self.name).trim_end().to_owned()
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn are_the_legal_ones() {
        assert_eq!(Unit::INCH.text(0.0254), "1.00 in");
        assert_eq!(Unit::MM.text(1.215), "1\u{202f}215 mm");
        assert_eq!(Unit::KM_H.text(10.0), "36 km/h");
        let tenths = Unit { decimals: 1, ..Unit::MM };
        assert_eq!((tenths.short(0.76), tenths.short(0.0755)), ("760 mm".to_owned(), "75.5 mm".to_owned()));
        assert!((Unit::KNOT.si(1.0) - 0.514_444_444).abs() < 1e-9);
        assert!((Unit::MPH.si(1.0) - 0.447_04).abs() < 1e-12);
    }
}
