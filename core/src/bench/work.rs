//! A job made ready for the bench: what every sheet and file is drawn from.

use std::f64::consts::TAU;
use std::sync::OnceLock;

use crate::carved;
use crate::job::{Job, Rotation};
use crate::result::{RemovalPlan, Verdict};
use crate::rig::Rig;
use crate::wood;

use super::blank::{Blank, Heights};
use super::error::{BenchError, Fault};
use super::form::Form;
use super::loft::{loft, root_radius_m};
use super::ring::Ring;
use super::solid::Solid;
use crate::drilling::Pattern;

/// How far (m) a section may pass the faces of the boss where it enters it.
const BOSS_SLACK_M: f64 = 2e-4;
/// Neighbouring rings turned by more are looked at in between as well: there the surface may cross itself
/// where neither of them does.
const TWISTED_RAD: f64 = 0.35;

/// A station as it is carved.
#[derive(Clone, Debug, PartialEq)]
pub struct Carved {
    /// Its number, from 1, as in the job.
    pub number: usize,
    /// Its section where it stands.
    pub ring: Ring,
    /// Chord, m.
    pub chord_m: f64,
    /// Greatest thickness, m.
    pub thickness_m: f64,
    /// Blade angle to the chord line, rad.
    pub angle_rad: f64,
    /// Angle of the face line, rad, where the face is flat.
    pub face_rad: Option<f64>,
    /// Its edges on the bench.
    pub heights: Heights,
}

/// A blade ready for the bench.
#[derive(Clone, Debug)]
pub struct Bench {
    /// The job it is made from.
    pub job: Job,
    /// The blade as a form.
    pub form: Form,
    /// The wood it is cut from.
    pub blank: Blank,
    /// Rings of the surface, from the inside out.
    pub rings: Vec<Ring>,
    /// Stations between hub and tip.
    pub stations: Vec<Carved>,
    verdict: OnceLock<Result<Verdict, String>>,
    point: Option<usize>,
    take_off: OnceLock<Option<Result<RemovalPlan, String>>>,
}

impl Bench {
    /// Makes a job ready for the bench.
    ///
    /// # Errors
    /// Everything that keeps it from being made: where, and by how much.
    ///
    /// ```
    /// use spokeshave::{bench::Bench, job::{DEMOS, Job}, rig::Rig};
    /// let rig = Rig::new(&Job::from_json(DEMOS[0].json).unwrap()).unwrap();
    /// let bench = Bench::new(&rig).unwrap();
    /// assert_eq!(bench.stations.len(), 11);
    /// ```
    pub fn new(rig: &Rig) -> Result<Self, BenchError> {
        let (job, blade) = (&rig.job, &rig.rotor.blade);
        let form = Form::new(job, blade)?;
        let blank = Blank::new(job, &form)?;
        let rings = loft(&form, blank.boss);
        let mut faults = faults(&rings, &blank);
        faults.extend(drilled_past_boss(job, &form));
        if !faults.is_empty() {
            return Err(BenchError(faults));
        }
        let stations = form.station_radii_m().enumerate();
        let stations = stations
            .filter(|(_, r)| form.chord_m(*r) > 0.0)
            .map(|(i, radius_m)| {
                let (cut, ring) = (blade.cut(radius_m), form.ring(radius_m));
                let chord_m = form.chord_m(radius_m);
                Carved {
                    number: i + 1,
                    chord_m,
                    thickness_m: cut.thickness_ratio * chord_m,
                    angle_rad: cut.angle_rad,
                    // As drawn: the angle that is tabled for its section ends with the thickest of the
                    // tables.
                    face_rad: blade.face_to_chord_rad(radius_m).map(|_| ring.face_rad()),
                    heights: blank.heights(&ring, sawn_m(&rings, &ring)),
                    ring,
                }
            })
            .collect();
        Ok(Self {
            job: job.clone(),
            form,
            blank,
            rings,
            stations,
            verdict: OnceLock::new(),
            point: None,
            take_off: OnceLock::new(),
        })
    }

    /// What must be said of the blade's strength on every sheet that it is made from; worked out once, when
    /// it is first asked for.
    #[must_use]
    pub fn warning(&self) -> Option<String> {
        let judged = self.verdict.get_or_init(|| {
            let rig = Rig::new(&self.job).map_err(|e| e.to_string())?;
            wood::verdict(&rig).map_err(|e| e.to_string())
        });
        match judged {
            Ok(verdict) => verdict.warning(),
            Err(why) => Some(format!("STRENGTH NOT JUDGED: {why}")),
        }
    }

    /// The same with the flight point for whose departure wood is taken off the carved blades; the usual one
    /// without it.
    #[must_use]
    pub fn planned_for(self, point: Option<usize>) -> Self {
        Self { point, take_off: OnceLock::new(), ..self }
    }

    /// What to take off the carved blades; `None` without readings, or where they allow no plan.
    #[must_use]
    pub fn take_off(&self) -> Option<&RemovalPlan> {
        self.planned()?.as_ref().ok()
    }

    /// Why nothing can be planned from the readings of the blades, in words; `None` where there are none, or
    /// a plan.
    #[must_use]
    pub fn without_plan(&self) -> Option<&str> {
        self.planned()?.as_ref().err().map(String::as_str)
    }

    /// The plan, or why there is none; worked out once, when it is first asked for.
    fn planned(&self) -> Option<&Result<RemovalPlan, String>> {
        let plan = || {
            let rig = Rig::new(&self.job).map_err(|e| e.to_string())?;
            let point = self.point.unwrap_or_else(|| carved::usual_point(&rig));
            carved::plan(&rig, point).map_err(|e| e.to_string())
        };
        self.take_off.get_or_init(|| self.job.carved.as_ref().map(|_| plan())).as_ref()
    }

    /// 1 where the leading edge is to the right of a section seen from the tip, −1 where it is to the left.
    #[must_use]
    pub fn hand(&self) -> f64 {
        match self.form.rotation {
            Rotation::ClockwiseFromBehind => 1.0,
            Rotation::AnticlockwiseFromBehind => -1.0,
        }
    }

    /// A point of a ring on paper, mm: seen from the tip towards the hub, height above the rear of the blank
    /// upward.
    #[must_use]
    pub fn on_paper(&self, p: [f64; 2]) -> [f64; 2] {
        [1e3 * self.hand() * p[0], 1e3 * (p[1] - self.blank.back_m)]
    }

    /// The closed surface: the whole propeller where it is of one piece, the holes of its hub drilled, else
    /// one blade.
    #[must_use]
    pub fn solid(&self) -> Solid {
        self.solid_of(&self.rings)
    }

    /// The surface over some of the rings, drilled.
    pub(super) fn solid_of(&self, rings: &[Ring]) -> Solid {
        let whole = self.unhanded(rings);
        let holes = self.blank.boss.and_then(|boss| Some((boss, Pattern::of(&self.job)?.holes())));
        let drilled = holes.and_then(|(boss, holes)| whole.pierced(&holes, boss, self.form.blade.count));
        drilled.unwrap_or(whole).handed(self.hand() > 0.0)
    }

    /// The surface as it is for a propeller that turns clockwise seen from behind.
    fn unhanded(&self, rings: &[Ring]) -> Solid {
        let tip = self.form.blade.radius_m;
        match self.blank.boss {
            Some(boss) => Solid::propeller(rings, tip, self.form.blade.count, boss.radius_m),
            None => Solid::blade(rings, tip),
        }
    }

    /// Blade angle at 0.75 of the tip radius, rad, and the pitch `2π r tan(angle)` there, m.
    #[must_use]
    pub fn nominal(&self) -> (f64, f64) {
        let r = 0.75 * self.form.blade.radius_m;
        let angle = self.form.blade.cut(r).angle_rad;
        (angle, TAU * r * angle.tan())
    }
}

fn drilled_past_boss(job: &Job, form: &Form) -> Option<Fault> {
    let pattern = Pattern::of(job).filter(|_| form.one_piece)?;
    let [reach_mm, hub_mm] = [pattern.reach_m(), form.blade.hub_radius_m].map(|m| 1e3 * m);
    pattern.past_boss_m(form.blade.hub_radius_m).map(|past_m| Fault::DrilledPastBoss {
        reach_mm,
        hub_mm,
        by_mm: 1e3 * past_m,
    })
}

/// The sides of the blade in plan at a station, m: those of the surface, within which its own section lies.
fn sawn_m(rings: &[Ring], station: &Ring) -> [f64; 2] {
    let [low, high] = station.span(0);
    let outer = rings.partition_point(|r| r.radius_m < station.radius_m);
    let (Some(b), Some(a)) = (rings.get(outer), rings.get(outer.saturating_sub(1))) else {
        return [low, high];
    };
    let share = ((station.radius_m - a.radius_m) / (b.radius_m - a.radius_m).max(f64::MIN_POSITIVE)).min(1.0);
    let surface = [0, 1].map(|k| a.span(0)[k] + share * (b.span(0)[k] - a.span(0)[k]));
    [low.min(surface[0]), high.max(surface[1])]
}

fn faults(rings: &[Ring], blank: &Blank) -> Vec<Fault> {
    let twisted = rings.windows(2).filter(|w| w[0].turned_rad(&w[1]) > TWISTED_RAD);
    let between = twisted.flat_map(|w| [0.25, 0.5, 0.75].map(|share| w[0].between(&w[1], share)));
    let crossing = rings.iter().cloned().chain(between).filter_map(|r| Some((r.radius_m, r.crossing_m()?)));
    let worst = crossing.max_by(|a, b| a.1.total_cmp(&b.1));
    let mut faults: Vec<Fault> = worst
        .map(|(r, by)| Fault::CrossesItself { radius_mm: 1e3 * r, by_mm: 1e3 * by })
        .into_iter()
        .collect();
    if let Some(boss) = blank.boss {
        let [back, front] = boss.faces_m;
        let past = |ring: &Ring| {
            let [low, high] = ring.span(1);
            (back - low).max(high - front)
        };
        let inside = rings.iter().filter(|r| r.radius_m <= boss.radius_m);
        let worst = inside.max_by(|a, b| past(a).total_cmp(&past(b)));
        if let Some(ring) = worst.filter(|r| past(r) > BOSS_SLACK_M) {
            let [low, high] = ring.span(1);
            faults.push(Fault::CrossesHub {
                radius_mm: 1e3 * ring.radius_m,
                needed_mm: 1e3 * (high - low),
                given_mm: 1e3 * (front - back),
                by_mm: 1e3 * past(ring),
            });
        }
    }
    faults
}

/// Radius from which the blade is as drawn, m.
pub(super) fn root_m(bench: &Bench) -> f64 {
    root_radius_m(&bench.form)
}
