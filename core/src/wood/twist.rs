//! The blade twisted by its own load.

use super::BladeBeam;
use super::beam::Twisting;
use super::loads::BladeLoads;
use crate::fit;
use crate::job::{Propeller, Station};
use crate::report::station;
use crate::result::{RunningStation, RunningTwist};
use crate::rig::{Rig, air_of};
use crate::rotor::Condition;

/// Most passes of load and twist in turn.
const PASSES: u32 = 20;
/// Twists that agree, rad.
const SETTLED_RAD: f64 = 0.01 * std::f64::consts::PI / 180.0;

/// Twist under loads at the beam's radii, rad, coarser positive. `None` where the blade does not stand
/// against it.
///
/// Centrifugal twisting moment, the air's moment about the centroid, what centroids beside a straight line
/// add, and tension that straightens the drawn twist.
pub(super) fn twist_rad(beam: &BladeBeam, loads: &BladeLoads, turn_rad: f64) -> Option<Vec<f64>> {
    let figures = Bar::new(beam, loads.rotation_rad_s, turn_rad);
    let bar = figures.twisting(beam, loads.rotation_rad_s);
    bar.twist_rad(&loads.twisting_n, &loads.offset_twisting_n_m, &beam.angles_rad)
}

/// Lowest natural frequencies of twist, rad/s.
pub(super) fn frequencies_rad_s(beam: &BladeBeam, rotation_rad_s: f64, count: usize) -> Option<Vec<f64>> {
    Bar::new(beam, rotation_rad_s, 0.0).twisting(beam, rotation_rad_s).frequencies_rad_s(count)
}

/// The blade as a bar in torsion.
struct Bar {
    stiffness: Vec<f64>,
    gyration: Vec<f64>,
    hold: Vec<f64>,
}

impl Bar {
    fn new(beam: &BladeBeam, rotation_rad_s: f64, turn_rad: f64) -> Self {
        let of = |f: &dyn Fn(usize) -> f64| (0..beam.radii_m.len()).map(f).collect();
        Self {
            stiffness: of(&|i| beam.material.shear_modulus_pa * beam.sections[i].torsion_m4),
            gyration: of(&|i| beam.sections[i].polar_m4() / beam.sections[i].area_m2),
            hold: of(&|i| beam.centrifugal_hold_n(i, turn_rad, rotation_rad_s)),
        }
    }

    fn twisting<'a>(&'a self, beam: &'a BladeBeam, rotation_rad_s: f64) -> Twisting<'a> {
        Twisting {
            radii_m: &beam.radii_m,
            mass_kg_m: &beam.mass_kg_m,
            stiffness_n_m2: &self.stiffness,
            gyration_m2: &self.gyration,
            hold_n: &self.hold,
            rotation_rad_s,
        }
    }
}

/// A flight point with the blade twisted by its load: twist, then load and setting of the twisted blade, then
/// twist again, until they agree. `None` where the point has no answer (held at a limit rpm included) or the
/// blade does not stand.
pub(super) fn running(rig: &Rig, beam: &BladeBeam, point: usize) -> Option<RunningTwist> {
    let drawn_at = rig.condition(point)?;
    let mut twist =
        twist_rad(beam, &BladeLoads::new(beam, &rig.rotor, &drawn_at), beam.beyond_rad(&drawn_at))?;
    let (mut passes, mut settled, mut last, mut relax) = (1, false, None, Relax::default());
    while passes < PASSES && !settled {
        let Some((twisted, at)) = twisted(rig, beam, &twist, point) else { break };
        let next = twist_rad(beam, &BladeLoads::new(beam, &twisted.rotor, &at), beam.beyond_rad(&at))?;
        let change: Vec<f64> = next.iter().zip(&twist).map(|(a, b)| a - b).collect();
        settled = change.iter().all(|c| c.abs() <= SETTLED_RAD);
        relax.step(&mut twist, change);
        passes += 1;
        last = Some((twisted, at));
    }
    Some(RunningTwist {
        flight_point: rig.job.flight_points[point].name.clone(),
        passes,
        settled,
        drawn_rpm: fit::rpm_of(&drawn_at),
        running_rpm: last.as_ref().map(|(_, at)| fit::rpm_of(at)),
        stations: stations(rig, beam, &twist, &drawn_at, last.as_ref()),
    })
}

/// How much of a change is taken: all of it first, then by Aitken's rule, so that load and twist that
/// overshoot one another settle.
struct Relax {
    share: f64,
    before: Option<Vec<f64>>,
}

impl Default for Relax {
    fn default() -> Self {
        Self { share: 1.0, before: None }
    }
}

impl Relax {
    fn step(&mut self, twist: &mut [f64], change: Vec<f64>) {
        if let Some(before) = &self.before {
            let apart: Vec<f64> = change.iter().zip(before).map(|(a, b)| a - b).collect();
            let dot = |a: &[f64], b: &[f64]| a.iter().zip(b).map(|(a, b)| a * b).sum::<f64>();
            let square = dot(&apart, &apart);
            if square > 0.0 {
                self.share = (-self.share * dot(before, &apart) / square).clamp(0.1, 1.5);
            }
        }
        for (t, c) in twist.iter_mut().zip(&change) {
            *t += self.share * c;
        }
        self.before = Some(change);
    }
}

fn stations(
    rig: &Rig,
    beam: &BladeBeam,
    twist: &[f64],
    drawn_at: &Condition,
    running: Option<&(Rig, Condition)>,
) -> Vec<RunningStation> {
    let departure =
        |rig: &Rig, at: &Condition, r: f64| station(&rig.rotor, &rig.rotor.ring(r), at).departure_deg;
    let one = |r: f64| RunningStation {
        radius_m: r,
        twist_deg: beam.at(twist, r).to_degrees(),
        drawn_departure_deg: departure(rig, drawn_at, r),
        running_departure_deg: running.and_then(|(rig, at)| departure(rig, at, r)),
    };
    rig.rotor.blade.station_radii_m().map(one).collect()
}

/// The job with its stations twisted, and the condition of a flight point with it.
fn twisted(rig: &Rig, beam: &BladeBeam, twist: &[f64], point: usize) -> Option<(Rig, Condition)> {
    let p = &rig.job.propeller;
    let stations =
        p.stations.iter().map(|s| turned(s, p, beam.at(twist, s.radius_fraction * p.diameter_m / 2.0)));
    let twisted = rig.with_propeller(Propeller { stations: stations.collect(), ..p.clone() }).ok()?;
    let point = rig.job.flight_points.get(point)?;
    let at = fit::condition(&twisted, point, air_of(point).ok()?).ok()?;
    Some((twisted, at))
}

fn turned(station: &Station, propeller: &Propeller, by_rad: f64) -> Station {
    let radius_m = station.radius_fraction * propeller.diameter_m / 2.0;
    let by_pitch = |pitch_m: f64| (pitch_m / (std::f64::consts::TAU * radius_m)).atan().to_degrees();
    let angle_deg = station.angle_deg.or(station.pitch_m.map(by_pitch)).map(|deg| deg + by_rad.to_degrees());
    Station { angle_deg, pitch_m: None, ..station.clone() }
}
