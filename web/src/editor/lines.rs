//! The curves of the blade between its stations, and the angles that would be best.

use spokeshave::blade::{Blade, Cut};
use spokeshave::drawn::DrawnStation;
use spokeshave::result::PointResult;

/// Points on a curve from hub to tip.
const SAMPLES: u32 = 80;

/// A curve over radius, with its name.
#[derive(Clone, Debug, PartialEq)]
pub struct Line {
    /// What it is.
    pub name: &'static str,
    /// Radius (m) and figure (SI, or degrees).
    pub points: Vec<[f64; 2]>,
}

/// The best angles at a flight point with their working band.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Best {
    /// What it is.
    pub name: String,
    /// At each station.
    pub points: Vec<BestAt>,
}

/// The best blade angle at a station.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct BestAt {
    /// Radius, m.
    pub radius_m: f64,
    /// Best blade angle, degrees.
    pub angle_deg: f64,
    /// Lower edge of the working band, degrees.
    pub low_deg: f64,
    /// Upper edge of the working band, degrees.
    pub high_deg: f64,
}

fn sampled(name: &'static str, blade: &Blade, of: impl Fn(&Cut) -> f64) -> Line {
    let span = blade.radius_m - blade.hub_radius_m;
    let at = |i: u32| {
        let radius = blade.hub_radius_m + span * f64::from(i) / f64::from(SAMPLES);
        [radius, of(&blade.cut(radius))]
    };
    Line { name, points: (0..=SAMPLES).map(at).collect() }
}

/// Blade angle to the chord line, degrees.
#[must_use]
pub fn twist(blade: &Blade) -> Line {
    sampled("as drawn", blade, |c| c.angle_rad.to_degrees())
}

/// Chord, m.
#[must_use]
pub fn chord(blade: &Blade) -> Line {
    sampled("chord", blade, |c| c.chord_m)
}

/// Greatest thickness, m.
#[must_use]
pub fn thickness(blade: &Blade) -> Line {
    sampled("thickness", blade, |c| c.thickness_ratio * c.chord_m)
}

/// The drawn angle less its departure, where there is one, with the working band about it.
#[must_use]
pub fn best_angles(drawn: &[DrawnStation], point: &Option<PointResult>) -> Vec<BestAt> {
    let stations = point.iter().flat_map(|p| &p.stations);
    let at = |(d, s): (&DrawnStation, &spokeshave::result::StationResult)| {
        let angle_deg = d.angle_deg - s.departure_deg?;
        Some(BestAt {
            radius_m: d.radius_m,
            angle_deg,
            low_deg: angle_deg + s.band_low_deg?,
            high_deg: angle_deg + s.band_high_deg?,
        })
    };
    drawn.iter().zip(stations).filter_map(at).collect()
}
