//! The section families that come with the program.

use spokeshave::section::outline::{
    Outline, OutlineError, arc_back, clark_y, naca_16_series, naca_four_digit, raf_6,
};

/// Thickness ratios of the tables.
const THICKNESS: [f64; 8] = [0.06, 0.08, 0.10, 0.12, 0.15, 0.18, 0.21, 0.24];

/// A family: its outline at one thickness, and where that comes from.
pub(crate) struct Entry {
    pub(crate) name: &'static str,
    pub(crate) title: &'static str,
    /// Where the outline comes from.
    pub(crate) source: &'static str,
    /// Thickness ratios of its tables.
    pub(crate) thickness: &'static [f64],
    pub(crate) draw: fn() -> Result<Outline, OutlineError>,
}

/// All families.
pub(crate) const CATALOGUE: &[Entry] = &[
    Entry {
        name: "clark-y",
        title: "Clark Y, flat face from 30 % of the chord",
        source: "Ordinates as printed in NACA Reports 502 (1934) and 628 (1938), from memory; 11.7 % thick, \
                 trailing edge open by 0.12 % of the chord. Other thicknesses by multiplying the ordinates \
                 from the flat face.",
        thickness: &THICKNESS,
        draw: clark_y,
    },
    Entry {
        name: "raf-6",
        title: "RAF 6, flat face over the whole chord",
        source: "Ordinates over the greatest thickness as in propeller textbooks (Weick, Aircraft Propeller \
                 Design, 1930), from memory; drawn 10 % thick, nose radius 10 % and trailing edge 8 % of \
                 the thickness. Other thicknesses by multiplying the ordinates from the flat face.",
        thickness: &THICKNESS,
        draw: raf_6,
    },
    Entry {
        name: "arc-back",
        title: "Flat face with a circular-arc back",
        source: "Drawn from its definition at 12 % with a nose radius of 10 % of the thickness and a sharp \
                 trailing edge. Other thicknesses by multiplying the ordinates from the flat face; above 18 \
                 % the layer leaves the steep tail over most angles and no tables are given.",
        thickness: &[0.06, 0.08, 0.10, 0.12, 0.15, 0.18],
        draw: || arc_back(0.12, 0.10),
    },
    Entry {
        name: "naca-44xx",
        title: "NACA four-digit, 4 % camber at 40 % of the chord",
        source: "Formulas of NACA Report 460 (Jacobs, Ward, Pinkerton, 1933), drawn 12 % thick. Other \
                 thicknesses by multiplying the ordinates from the mean line.",
        thickness: &THICKNESS,
        draw: || naca_four_digit(4, 4, 0.12),
    },
    Entry {
        name: "naca-00xx",
        title: "NACA four-digit, symmetrical",
        source: "Formula of NACA Report 460 (Jacobs, Ward, Pinkerton, 1933), drawn 12 % thick. Other \
                 thicknesses by multiplying the ordinates.",
        thickness: &THICKNESS,
        draw: || naca_four_digit(0, 0, 0.12),
    },
    Entry {
        name: "naca-16",
        title: "NACA 16-series, design lift coefficient 0.5",
        source: "Thickness of NACA TN 1546 (Lindsey, Stevenson, Daley, 1948) on the mean line a = 1 of NACA \
                 Report 824 (1945), coefficients from memory; drawn 12 % thick. Other thicknesses by \
                 multiplying the ordinates from the mean line.",
        thickness: &THICKNESS,
        draw: || naca_16_series(0.5, 0.12),
    },
];
