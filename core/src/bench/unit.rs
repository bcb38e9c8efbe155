//! Lengths in words, in the unit a shop works in.

/// Unit of the lengths on paper; drawings themselves are full size in either.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Unit {
    /// Millimetres.
    #[default]
    Millimetre,
    /// Inches.
    Inch,
}

/// Millimetres of an inch.
const INCH_MM: f64 = 25.4;

impl Unit {
    /// Its sign.
    #[must_use]
    pub fn sign(self) -> &'static str {
        match self {
            Self::Millimetre => "mm",
            Self::Inch => "in",
        }
    }

    /// Its name behind "in".
    #[must_use]
    pub fn plural(self) -> &'static str {
        match self {
            Self::Millimetre => "mm",
            Self::Inch => "inches",
        }
    }

    /// A length (m) as a figure: to a tenth of a millimetre, or two hundredths of that in inches.
    #[must_use]
    pub fn figure(self, metres: f64) -> String {
        let (value, digits) = match self {
            Self::Millimetre => (1e3 * metres, 1),
            Self::Inch => (1e3 * metres / INCH_MM, 3),
        };
        let text = format!("{value:.digits$}");
        if text.trim_start_matches(['-', '0', '.']).is_empty() {
            text.trim_start_matches('-').into()
        } else {
            text
        }
    }

    /// The depth of a cut (m) as a figure: to a hundredth of a millimetre, or a thousandth of an inch.
    #[must_use]
    pub fn fine(self, metres: f64) -> String {
        match self {
            Self::Millimetre => format!("{:.2}", 1e3 * metres),
            Self::Inch => self.figure(metres),
        }
    }

    /// A length (m) with its unit.
    #[must_use]
    pub fn say(self, metres: f64) -> String {
        format!("{} {}", self.figure(metres), self.sign())
    }

    /// A torque (N m) as it is set.
    #[must_use]
    pub fn torque(self, newton_metres: f64) -> String {
        match self {
            Self::Millimetre => format!("{newton_metres:.1} N m"),
            // 1 lbf ft is 0.3048 m of 4.448 222 N.
            Self::Inch => format!("{:.1} lbf ft", newton_metres / 1.355_818),
        }
    }

    /// A volume (m³) of anything but boards.
    #[must_use]
    pub fn bulk(self, cubic_metres: f64) -> String {
        match self {
            Self::Millimetre => format!("{:.1} cm³", 1e6 * cubic_metres),
            Self::Inch => format!("{:.2} in³", cubic_metres * (1e3 / INCH_MM).powi(3)),
        }
    }

    /// A volume (m³) as it is bought: litres, or board feet (144 cubic inches).
    #[must_use]
    pub fn volume(self, cubic_metres: f64) -> String {
        match self {
            Self::Millimetre => format!("{:.2} dm³", 1e3 * cubic_metres),
            Self::Inch => {
                format!("{:.2} board feet", cubic_metres * (1e3 / INCH_MM).powi(3) / 144.0)
            }
        }
    }
}
