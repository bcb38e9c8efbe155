//! The removals that best restore departure and even the blades.
//!
//! At each radius the wanted angle is the one that gives the drawn blade's departure with the chord and
//! thickness the plan leaves, in the balance of that element at the flight point's condition as drawn; where
//! the factor of tip and hub leaves little load, as for a twist ([`LEAST_FACTOR`]), it is the drawn one.
//! Within what planing can reach ([`super::plane`]) each blade takes the angle of least squares both from the
//! wanted one and from the mean of the blades; chord and thickness likewise, from the drawn ones. What one
//! blade can give at one radius is in [`super::piece`]. Small differences that no plane would set right are
//! left, and nothing is cut where a blade was not read: beyond its outermost readings, and nowhere where one
//! has none.

use super::CarvedError;
use super::even::evened;
use super::load::{Set, analysed};
use super::measured::{Measured, Size};
use super::piece::Piece;
use super::plane::{Profile, Slab};
use crate::fit;
use crate::job::Setting;
use crate::result::{Known, PlannedBlade, PlannedStation, RemovalPlan};
use crate::rig::{Rig, air_of};
use crate::rotor::Condition;
use crate::shape::LEAST_FACTOR;

/// The flight point a plan is judged at without one named: the first in flight that has an answer, else the
/// first that has one.
#[must_use]
pub fn usual_point(rig: &Rig) -> usize {
    let points = &rig.job.flight_points;
    let answered = |i: &usize| rig.condition(*i).is_some();
    let flying = |i: &usize| {
        points[*i].setting == Setting::Level {} || points[*i].airspeed_m_s.is_none_or(|v| v > 0.0)
    };
    let mut all = 0..points.len();
    all.clone().find(|i| flying(i) && answered(i)).or_else(|| all.find(answered)).unwrap_or(0)
}

/// What to take off, judged at a flight point, and what comes of it.
///
/// # Errors
/// No readings; no such flight point or none with an answer; readings of a blade that cannot be.
pub fn plan(rig: &Rig, point: usize) -> Result<RemovalPlan, CarvedError> {
    let measured = Measured::new(rig)?;
    if let Some(blade) = measured.read.iter().position(|read| !read) {
        return Err(CarvedError::Unread(blade + 1));
    }
    let name = rig.job.flight_points.get(point).map_or_else(|| point.to_string(), |p| p.name.clone());
    let at = rig.job.flight_points.get(point).and_then(|p| fit::condition(rig, p, air_of(p).ok()?).ok());
    let at = at.ok_or_else(|| CarvedError::NoAnswer(name.clone()))?;
    let bench = Bench::new(rig, &measured);
    let drawn: Vec<f64> = measured.radii_m.iter().map(|&r| rig.rotor.blade.cut(r).angle_rad).collect();
    let first = bench.planned(&drawn);
    let wanted = wanted(rig, &bench.after(&first), &at)?;
    let planned = bench.planned(&wanted);
    bench.told(rig, point, &planned)
}

/// The angle at each radius that gives the drawn departure with the sizes of a plan, rad.
fn wanted(rig: &Rig, planned: &Measured, at: &Condition) -> Result<Vec<f64>, CarvedError> {
    let mean = Set::new(rig, planned)?.mean.rotor;
    let angle = |r: f64| {
        let as_drawn = rig.rotor.element(&rig.rotor.ring(r), at).0;
        let (drawn, best) = (as_drawn.balance()?, as_drawn.section.best()?);
        let element = mean.element(&mean.ring(r), at).0;
        let alpha = element.section.best()?.alpha_rad + drawn.alpha_rad - best.alpha_rad;
        let balance = element.balance_at(alpha).filter(|b| b.loss > LEAST_FACTOR)?;
        Some(balance.inflow_rad + alpha - at.turn_rad)
    };
    let drawn = |r: f64| rig.rotor.blade.cut(r).angle_rad;
    Ok(planned.radii_m.iter().map(|&r| angle(r).unwrap_or_else(|| drawn(r))).collect())
}

/// The blades with every face planed by an angle (rad) that is wanted at its radius, as far as the least
/// chord and thickness allow. Stations without a flat face, or where a blade was not read, stay as they are.
#[must_use]
pub fn planed(rig: &Rig, measured: &Measured, wanted_rad: impl Fn(f64) -> f64) -> Measured {
    let bench = Bench::new(rig, measured);
    let mut after = measured.clone();
    for (s, &r) in measured.radii_m.iter().enumerate() {
        for (blade, piece) in after.blades.iter_mut().zip(bench.pieces(s)) {
            let slab = piece.turned(piece.within_reach(wanted_rad(r)));
            blade[s].angle_rad = slab.face_rad + piece.face_to_chord(&slab);
            (blade[s].chord_m, blade[s].thickness_m) = (slab.chord_m, slab.thickness_m);
        }
    }
    after
}

/// The same as what to take off each blade, and what comes of it; the flight point is that for which it is
/// done.
///
/// # Errors
/// No readings; blades that cannot be.
pub fn planing(
    rig: &Rig,
    measured: &Measured,
    point: usize,
    wanted_rad: impl Fn(f64) -> f64,
) -> Result<RemovalPlan, CarvedError> {
    let bench = Bench::new(rig, measured);
    let station = |(s, r): (usize, &f64)| {
        let wanted = wanted_rad(*r);
        let one = |piece: &Piece| {
            let whole = (piece.slab.chord_m, piece.slab.thickness_m);
            piece.told(piece.within_reach(wanted), whole, piece.angle(0.0, whole) + wanted)
        };
        bench.pieces(s).iter().map(one).collect()
    };
    let planned: Vec<Vec<PlannedStation>> = measured.radii_m.iter().enumerate().map(station).collect();
    bench.told(rig, point, &planned)
}

/// The blades on the bench.
struct Bench<'r> {
    rig: &'r Rig,
    measured: &'r Measured,
    profiles: Vec<Option<Profile>>,
    /// Least chord and thickness at each radius, m.
    least: Vec<(f64, f64)>,
}

impl<'r> Bench<'r> {
    fn new(rig: &'r Rig, measured: &'r Measured) -> Self {
        let shares =
            rig.job.carved.as_ref().map_or((1.0, 1.0), |c| (c.least_chord_share, c.least_thickness_share));
        let blade = &rig.rotor.blade;
        let least = |&r: &f64| {
            let cut = blade.cut(r);
            (shares.0 * cut.chord_m, shares.1 * cut.thickness_ratio * cut.chord_m)
        };
        let profile = |&r: &f64| {
            let cut = blade.cut(r);
            blade.face_to_chord_rad(r)?;
            let name = &blade.families[cut.section.inner].about.name;
            let outline = rig.job.section_outline(name, cut.thickness_ratio.clamp(0.02, 0.55))?;
            Profile::new(&outline)
        };
        let radii = &measured.radii_m;
        Self {
            rig,
            measured,
            profiles: radii.iter().map(profile).collect(),
            least: radii.iter().map(least).collect(),
        }
    }

    /// The plan at every radius, by blade, for wanted angles to the chord line, rad.
    fn planned(&self, wanted_rad: &[f64]) -> Vec<Vec<PlannedStation>> {
        wanted_rad.iter().enumerate().map(|(s, wanted)| self.station(s, *wanted)).collect()
    }

    /// A plan with what comes of it.
    fn told(
        &self,
        rig: &Rig,
        point: usize,
        planned: &[Vec<PlannedStation>],
    ) -> Result<RemovalPlan, CarvedError> {
        let blade = |b: usize| PlannedBlade {
            blade: b + 1,
            stations: planned.iter().map(|s| s[b].clone()).collect(),
        };
        Ok(RemovalPlan {
            flight_point: rig.job.flight_points.get(point).map_or_else(String::new, |p| p.name.clone()),
            blades: (0..self.measured.blades.len()).map(blade).collect(),
            after: analysed(rig, &self.after(planned))?,
        })
    }

    /// The blades as a plan leaves them.
    fn after(&self, planned: &[Vec<PlannedStation>]) -> Measured {
        let mut after = self.measured.clone();
        for (b, sizes) in after.blades.iter_mut().enumerate() {
            for (size, station) in sizes.iter_mut().zip(planned) {
                let p = &station[b];
                size.angle_rad = p.angle_deg.to_radians();
                size.chord_m = p.chord_m;
                size.thickness_m = p.thickness_m;
            }
        }
        after
    }

    /// The blades at a radius. They are cut where all of them were read: one that is turned beside another
    /// that is not known may be set farther from it.
    fn pieces(&self, s: usize) -> Vec<Piece<'_>> {
        let read = [0, 1, 2].map(|k| self.measured.blades.iter().all(|blade| is_read(blade[s].known[k])));
        self.measured.blades.iter().map(|blade| self.piece(s, &blade[s], read)).collect()
    }

    fn station(&self, s: usize, wanted_rad: f64) -> Vec<PlannedStation> {
        let pieces = self.pieces(s);
        let cut = self.rig.rotor.blade.cut(self.measured.radii_m[s]);
        let (drawn_chord, drawn_thickness) = (cut.chord_m, cut.thickness_ratio * cut.chord_m);
        let mut turns = vec![0.0; pieces.len()];
        let mut goals: Vec<(f64, f64)> = Vec::new();
        // The wedge takes chord and thickness, which the next look at both allows for.
        for _ in 0..3 {
            let wedged: Vec<Slab> = pieces.iter().zip(&turns).map(|(p, t)| p.turned(*t)).collect();
            let bound = |least: f64, now: f64| (least.min(now), now);
            let chords: Vec<_> = wedged.iter().map(|w| bound(self.least[s].0, w.chord_m)).collect();
            let thick: Vec<_> = wedged.iter().map(|w| bound(self.least[s].1, w.thickness_m)).collect();
            goals = evened(drawn_chord, &chords).into_iter().zip(evened(drawn_thickness, &thick)).collect();
            let reach: Vec<(f64, f64)> = pieces.iter().zip(&goals).map(|(p, g)| p.reach(*g)).collect();
            let angles = evened(wanted_rad, &reach);
            let weighed = |((p, a), g): ((&Piece, &f64), &(f64, f64))| p.weighed(*a, *g, drawn_chord);
            turns = pieces.iter().zip(&angles).zip(&goals).map(weighed).collect();
        }
        pieces
            .iter()
            .zip(&turns)
            .zip(&goals)
            .map(|((p, turn), goal)| p.told(*turn, *goal, wanted_rad))
            .collect()
    }

    fn piece(&self, s: usize, size: &Size, read: [bool; 3]) -> Piece<'_> {
        let radius_m = self.measured.radii_m[s];
        let mut piece = Piece {
            rig: self.rig,
            radius_m,
            profile: self.profiles[s].as_ref(),
            slab: Slab { face_rad: 0.0, chord_m: size.chord_m, thickness_m: size.thickness_m },
            least: self.least[s],
            read,
        };
        piece.slab.face_rad = size.angle_rad - piece.face_to_chord(&piece.slab);
        piece
    }
}

/// Whether a size was read there, or on both sides of there.
fn is_read(known: Known) -> bool {
    matches!(known, Known::Measured | Known::Interpolated)
}
