//! What the carved propeller does.

use super::balance::{balance, resultant, track_moments};
use super::measured::{Measured, Size, propeller};
use super::{CarvedError, doubts};
use crate::fit;
use crate::job::{Carved as Readings, FlightPoint};
use crate::result::{
    Carved, CarvedBlade, CarvedPoint, CarvedStation, CarvedStrength, LoadOf, OncePerTurn, Read,
    StationDeparture,
};
use crate::rig::{Rig, air_of};
use crate::rotor::{Condition, Rotor};
use crate::shape::brief;
use crate::wood::least_margin;

/// The carved blades: differences, loads, balance.
///
/// # Errors
/// No readings; readings of a blade that cannot be.
pub fn analyse(rig: &Rig) -> Result<Carved, CarvedError> {
    analysed(rig, &Measured::new(rig)?)
}

/// The same for blades already measured, or as a correction leaves them.
///
/// # Errors
/// No readings; blades that cannot be.
pub fn analysed(rig: &Rig, measured: &Measured) -> Result<Carved, CarvedError> {
    let readings = rig.job.carved.as_ref().ok_or(CarvedError::NoReadings)?;
    let set = Set::new(rig, measured)?;
    let rotors: Vec<Rotor> = set.blades.iter().map(|b| b.rotor.clone()).collect();
    let balance = balance(rig, readings, measured, &set.blades)?;
    let masses = Masses {
        moments_kg_m: balance.blades.iter().map(|m| m.moment_kg_m).collect(),
        read: balance.read,
        ahead_kg_m2: track_moments(rig, readings, &set.blades, balance.density_kg_m3)?,
    };
    let point = |p: &FlightPoint| carved_point(rig, &set, &rotors, &masses, p);
    Ok(Carved {
        spokeshave: crate::job::VERSION,
        title: rig.job.title.clone(),
        angle_reference: readings.angle_reference,
        blades: blades(rig, readings, measured),
        flight_points: rig.job.flight_points.iter().map(point).collect(),
        balance,
        strength: strength(rig, &set.blades)?,
        doubts: doubts(rig),
    })
}

/// The least margin of the blades as they are.
fn strength(rig: &Rig, blades: &[Rig]) -> Result<Option<CarvedStrength>, CarvedError> {
    if rig.job.wood.is_none() {
        return Ok(None);
    }
    let drawn_margin = least_margin(rig)?.map(|(_, margin)| margin);
    let mut least: Option<CarvedStrength> = None;
    for (b, blade) in blades.iter().enumerate() {
        if let Some((case, margin)) = least_margin(blade)?
            && least.as_ref().is_none_or(|l| margin < l.margin)
        {
            least = Some(CarvedStrength { blade: b + 1, case, margin, drawn_margin });
        }
    }
    Ok(least)
}

/// How the blades' masses lie.
struct Masses {
    /// Mass moment about the axis of each.
    moments_kg_m: Vec<f64>,
    /// Whether they rest on readings of every blade.
    read: bool,
    /// The same by how far they lie ahead of the plane of the hub, where track was read.
    ahead_kg_m2: Option<Vec<f64>>,
}

/// The propellers of the mean and of each blade.
pub(super) struct Set {
    pub(super) mean: Rig,
    pub(super) blades: Vec<Rig>,
}

impl Set {
    pub(super) fn new(rig: &Rig, measured: &Measured) -> Result<Self, CarvedError> {
        let of = |sizes: &[Size]| {
            let new = rig.with_propeller(propeller(rig, &measured.radii_m, sizes));
            let new = new.map_err(crate::shape::ShapeError::from)?;
            match new.job.check() {
                problems if problems.is_empty() => Ok(new),
                problems => Err(CarvedError::Refused(problems)),
            }
        };
        let blades: Result<Vec<Rig>, CarvedError> = measured.blades.iter().map(|b| of(b)).collect();
        Ok(Self { mean: of(&measured.mean())?, blades: blades? })
    }
}

/// The job with the propeller of mean blades in place of the drawn one.
///
/// # Errors
/// Blades that cannot be.
pub fn mean_rig(rig: &Rig, measured: &Measured) -> Result<Rig, CarvedError> {
    Set::new(rig, measured).map(|set| set.mean)
}

fn blades(rig: &Rig, readings: &Readings, measured: &Measured) -> Vec<CarvedBlade> {
    let mean = measured.mean();
    let drawn = &rig.rotor.blade;
    let station = |s: usize, size: &Size| {
        let r = measured.radii_m[s];
        let cut = drawn.cut(r);
        let face = |thickness: f64, chord: f64| drawn.face_to_chord_of(r, thickness / chord);
        let on_face = face(size.thickness_m, size.chord_m).map(|f| (size.angle_rad - f).to_degrees());
        let read = |k: usize, carved: f64, drawn: f64, mean: f64| Read {
            carved,
            from_drawn: carved - drawn,
            from_mean: carved - mean,
            known: size.known[k],
        };
        CarvedStation {
            radius_m: r,
            radius_fraction: r / drawn.radius_m,
            angle_deg: read(
                0,
                size.angle_rad.to_degrees(),
                cut.angle_rad.to_degrees(),
                mean[s].angle_rad.to_degrees(),
            ),
            face_angle_deg: on_face,
            chord_m: read(1, size.chord_m, cut.chord_m, mean[s].chord_m),
            thickness_m: read(2, size.thickness_m, cut.thickness_ratio * cut.chord_m, mean[s].thickness_m),
            track_m: size.track_m,
        }
    };
    let blade = |(b, sizes): (usize, &Vec<Size>)| CarvedBlade {
        blade: b + 1,
        readings: readings.blades.get(b).map_or(0, |blade| blade.readings.len()),
        stations: sizes.iter().enumerate().map(|(s, size)| station(s, size)).collect(),
    };
    measured.blades.iter().enumerate().map(blade).collect()
}

fn carved_point(rig: &Rig, set: &Set, rotors: &[Rotor], masses: &Masses, point: &FlightPoint) -> CarvedPoint {
    let condition = |rig: &Rig| fit::condition(rig, point, air_of(point).ok()?).ok();
    let (as_drawn, as_carved) = (condition(rig), condition(&set.mean));
    let loads = as_carved.map_or_else(Vec::new, |at| loads(&set.mean.rotor, rotors, &at));
    let once = as_carved.filter(|_| rotors.len() > 1).map(|at| once_per_turn(&loads, masses, &at));
    let departure = |r: f64| StationDeparture {
        radius_m: r,
        drawn_deg: as_drawn.and_then(|at| rig.rotor.departure_deg(&rig.rotor, r, &at)),
        blades_deg: rotors
            .iter()
            .map(|blade| as_carved.and_then(|at| set.mean.rotor.departure_deg(blade, r, &at)))
            .collect(),
    };
    CarvedPoint {
        drawn: brief(rig, point),
        carved: brief(&set.mean, point),
        stations: set.mean.rotor.blade.station_radii_m().map(departure).collect(),
        once_per_turn: once,
        blades: loads,
    }
}

fn loads(mean: &Rotor, rotors: &[Rotor], at: &Condition) -> Vec<LoadOf> {
    let told = |load: &crate::rotor::BladeLoad| LoadOf {
        thrust_n: load.thrust_n,
        torque_n_m: load.torque_n_m,
        bending_n_m: load.bending_n_m,
        drag_n: load.drag_n,
    };
    mean.blade_loads(rotors, at).iter().map(told).collect()
}

/// The resultants of forces and moments that turn with the propeller.
fn once_per_turn(loads: &[LoadOf], masses: &Masses, at: &Condition) -> OncePerTurn {
    let size = |of: fn(&LoadOf) -> f64| {
        let (x, y) = resultant(&loads.iter().map(of).collect::<Vec<_>>());
        x.hypot(y)
    };
    let turning = |of: &[f64]| {
        let (x, y) = resultant(of);
        x.hypot(y) * at.rotation_rad_s.powi(2)
    };
    OncePerTurn {
        moment_n_m: size(|l| l.bending_n_m),
        air_force_n: size(|l| l.drag_n),
        mass_force_n: masses.read.then(|| turning(&masses.moments_kg_m)),
        track_moment_n_m: masses.ahead_kg_m2.as_deref().map(turning),
    }
}
