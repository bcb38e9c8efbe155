//! Why a blade cannot be drawn for the bench: where, and by how much.

use thiserror::Error;

/// One thing that cannot be made.
#[derive(Clone, Debug, Error, PartialEq)]
#[non_exhaustive]
pub enum Fault {
    /// A section has no outline, or not at that thickness.
    #[error(
        "station {station}, r {radius_mm:.1} mm: section \"{section}\" has no outline that can be drawn \
         {percent:.1} % thick; 1 to 60 % can be drawn, of a section whose outline is known"
    )]
    NoOutline {
        /// Number of the station, from 1.
        station: usize,
        /// Its radius, mm.
        radius_mm: f64,
        /// Its section.
        section: String,
        /// Its thickness, percent of the chord.
        percent: f64,
    },
    /// A station lies inside the hub.
    #[error(
        "station {station}, r {radius_mm:.1} mm: {by_mm:.1} mm inside the hub, whose radius is {hub_mm:.1} \
         mm; leave it out or make the propeller's hub diameter smaller"
    )]
    InsideHub {
        /// Number of the station, from 1.
        station: usize,
        /// Its radius, mm.
        radius_mm: f64,
        /// Radius of the hub, mm.
        hub_mm: f64,
        /// How far inside, mm.
        by_mm: f64,
    },
    /// The trailing edge that the job names is too thick for a station.
    #[error(
        "station {station}, r {radius_mm:.1} mm: a least trailing edge of {wanted_mm:.2} mm is wanted; at \
         most {:.2} mm can be drawn there, 5 % of the chord or what the section has itself", floored(*most_mm)
    )]
    TrailingEdgeTooThick {
        /// Number of the station, from 1.
        station: usize,
        /// Its radius, mm.
        radius_mm: f64,
        /// Thickness wanted, mm.
        wanted_mm: f64,
        /// Most that can be drawn, mm.
        most_mm: f64,
    },
    /// The blade or its boss is thicker than the blank.
    #[error(
        "{}: the blank must be {needed_mm:.1} mm thick, {by_mm:.1} mm more than the {given_mm:.1} mm it has",
        place(*radius_mm)
    )]
    ThickerThanBlank {
        /// Radius of the section that reaches farthest, mm; 0 for the boss.
        radius_mm: f64,
        /// Thickness needed along the axis, mm.
        needed_mm: f64,
        /// Thickness given, mm.
        given_mm: f64,
        /// How much is missing, mm.
        by_mm: f64,
    },
    /// The blade or its hub is wider than the blank.
    #[error(
        "{}: the blank must be {needed_mm:.1} mm wide, {by_mm:.1} mm more than the {given_mm:.1} mm it has",
        place(*radius_mm)
    )]
    WiderThanBlank {
        /// Radius of the section that reaches farthest, mm; 0 for the hub.
        radius_mm: f64,
        /// Width needed, mm.
        needed_mm: f64,
        /// Width given, mm.
        given_mm: f64,
        /// How much is missing, mm.
        by_mm: f64,
    },
    /// A section at the hub reaches past its boss.
    #[error(
        "r {radius_mm:.1} mm: the section is {needed_mm:.1} mm high along the axis where it enters the hub, \
         and passes the boss of {given_mm:.1} mm by {by_mm:.1} mm"
    )]
    CrossesHub {
        /// Radius where it does, mm.
        radius_mm: f64,
        /// Height of the section, mm.
        needed_mm: f64,
        /// Thickness of the boss, mm.
        given_mm: f64,
        /// How far it passes, mm.
        by_mm: f64,
    },
    /// The hub's holes reach past its boss.
    #[error(
        "hub drilling: the holes reach {reach_mm:.1} mm from the axis, {by_mm:.1} mm farther than a boss of \
         radius {hub_mm:.1} mm can hold; a smaller bolt circle or a larger hub diameter of the propeller"
    )]
    DrilledPastBoss {
        /// How far they reach, mm.
        reach_mm: f64,
        /// Radius of the boss, mm.
        hub_mm: f64,
        /// How much too far, mm.
        by_mm: f64,
    },
    /// Two blades run into one another.
    #[error("r {radius_mm:.1} mm: neighbouring blades overlap by {by_mm:.1} mm")]
    BladesOverlap {
        /// Radius where they overlap most, mm.
        radius_mm: f64,
        /// By how much, mm.
        by_mm: f64,
    },
    /// The surface crosses itself.
    #[error("r {radius_mm:.1} mm: the surface crosses itself, over {by_mm:.2} mm")]
    CrossesItself {
        /// Radius of the section that crosses itself, mm.
        radius_mm: f64,
        /// Distance between the two places of the outline that cross, along the outline, mm.
        by_mm: f64,
    },
}

/// Where a blank is too small: 0 is the boss.
fn place(radius_mm: f64) -> String {
    if radius_mm == 0.0 { "boss of the hub".into() } else { format!("r {radius_mm:.1} mm") }
}

/// A hundredth that is not more than a length, mm.
fn floored(length_mm: f64) -> f64 {
    (100.0 * length_mm).floor() / 100.0
}

/// Everything that keeps a blade from being drawn.
#[derive(Clone, Debug, Error, PartialEq)]
#[error("{}", .0.iter().map(ToString::to_string).collect::<Vec<_>>().join("\n"))]
pub struct BenchError(pub Vec<Fault>);
