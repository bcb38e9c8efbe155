//! Published ordinates, in hundredths of the chord: station, upper side, lower side, from the flat face.

/// Clark Y, 11.7 % thick. Ordinates as printed in NACA Reports 502 (1934) and 628 (1938), from memory.
///
/// The trailing edge is open by 0.12 %.
pub(crate) const CLARK_Y: &[[f64; 3]] = &[
    [0.0, 3.50, 3.50],
    [1.25, 5.45, 1.93],
    [2.5, 6.50, 1.47],
    [5.0, 7.90, 0.93],
    [7.5, 8.85, 0.63],
    [10.0, 9.60, 0.42],
    [15.0, 10.69, 0.15],
    [20.0, 11.36, 0.03],
    [30.0, 11.70, 0.0],
    [40.0, 11.40, 0.0],
    [50.0, 10.52, 0.0],
    [60.0, 9.15, 0.0],
    [70.0, 7.35, 0.0],
    [80.0, 5.22, 0.0],
    [90.0, 2.80, 0.0],
    [95.0, 1.49, 0.0],
    [100.0, 0.12, 0.0],
];

/// RAF 6 at 10 % thickness: the usual propeller table of ordinates over the greatest thickness (2.5 %: 0.41
/// ... 90 %: 0.35), nose radius 0.10 and edge thickness 0.08 of the thickness; from memory of tables in
/// propeller textbooks (Weick, "Aircraft Propeller Design", 1930). The rounded nose ahead of 2.5 % is drawn
/// here from the radius, not from a table.
pub(crate) const RAF_6: &[[f64; 3]] = &[
    [0.0, 1.0, 1.0],
    [0.30, 1.95, 0.28],
    [1.0, 2.90, 0.04],
    [2.5, 4.10, 0.0],
    [5.0, 5.90, 0.0],
    [10.0, 7.90, 0.0],
    [20.0, 9.50, 0.0],
    [30.0, 9.98, 0.0],
    [40.0, 9.90, 0.0],
    [50.0, 9.50, 0.0],
    [60.0, 8.70, 0.0],
    [70.0, 7.40, 0.0],
    [80.0, 5.60, 0.0],
    [90.0, 3.50, 0.0],
    [100.0, 0.80, 0.0],
];
