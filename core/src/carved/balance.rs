//! Balance of unequal blades: static, and of blades that run out of track.

use std::f64::consts::TAU;

use super::{CarvedError, Measured};
use crate::curve::Curve;
use crate::job::{BladeReading, Carved};
use crate::result::{Known, MassOf, StaticBalance};
use crate::rig::Rig;
use crate::wood::beam::first_moment;
use crate::wood::{self, BladeBeam};

/// A resultant below this share of what it is made of is rounding.
const ROUNDING: f64 = 1e-12;

/// The resultant of what each blade contributes in its own direction, evenly spaced round the hub.
pub(super) fn resultant(of: &[f64]) -> (f64, f64) {
    let n = of.len() as f64;
    let turned = |(b, value): (usize, &f64)| {
        let angle = TAU * b as f64 / n;
        (value * angle.cos(), value * angle.sin())
    };
    let (x, y) = of.iter().enumerate().map(turned).fold((0.0, 0.0), |sum, v| (sum.0 + v.0, sum.1 + v.1));
    // What rounding leaves of equal blades is nothing.
    let rounding = ROUNDING * of.iter().map(|v| v.abs()).sum::<f64>();
    if x.hypot(y) <= rounding { (0.0, 0.0) } else { (x, y) }
}

/// Static balance of the blades, hub taken as balanced: the mass moment `∫ ρ A r dr` of each from the hub
/// out, by the outlines of its sections and the density of the readings, else of the job's wood, else of the
/// usual one.
pub(super) fn balance(
    rig: &Rig,
    carved: &Carved,
    measured: &Measured,
    blades: &[Rig],
) -> Result<StaticBalance, CarvedError> {
    let sized = |known: &[Known]| known.contains(&Known::Measured);
    let usual = wood::material(&rig.job.wood.clone().unwrap_or_default())?.density_kg_m3;
    let density = carved.density_kg_m3.unwrap_or(usual);
    let mass = |blade: &Rig| -> Result<MassOf, CarvedError> {
        let (mass, share) = (wood::mass(&BladeBeam::new(blade)?), density / usual);
        Ok(MassOf { mass_kg: share * mass.blade_kg, moment_kg_m: share * mass.static_moment_kg_m })
    };
    let masses = blades.iter().map(mass).collect::<Result<Vec<MassOf>, CarvedError>>()?;
    let moments: Vec<f64> = masses.iter().map(|m| m.moment_kg_m).collect();
    let (x, y) = resultant(&moments);
    let unbalance_kg_m = x.hypot(y);
    let along = |b: usize| {
        let angle = TAU * b as f64 / moments.len() as f64;
        x * angle.cos() + y * angle.sin()
    };
    let heavy = (0..moments.len()).max_by(|a, b| along(*a).total_cmp(&along(*b))).unwrap_or(0);
    Ok(StaticBalance {
        density_kg_m3: density,
        density_given: carved.density_kg_m3.is_some() || rig.job.wood.is_some(),
        read: measured.blades.iter().all(|blade| blade.iter().any(|s| sized(&s.known[1..]))),
        blades: masses,
        unbalance_kg_m,
        heavy_blade: (unbalance_kg_m > 1e-9).then_some(heavy + 1),
        grams_at_tip: 1e3 * unbalance_kg_m / rig.rotor.blade.radius_m,
    })
}

/// `∫ z ρ A r dr` of each blade, kg m²: `z` is how far its masses lie ahead of the plane of the hub, as read,
/// straight between readings, from nothing at the edge of the hub and held beyond the outermost; a blade
/// without such a reading lies in the plane. `None` where none has one.
pub(super) fn track_moments(
    rig: &Rig,
    carved: &Carved,
    blades: &[Rig],
    density_kg_m3: f64,
) -> Result<Option<Vec<f64>>, CarvedError> {
    let line = |b: usize| track(rig, carved.blades.get(b).map_or(&[], |blade| &blade.readings));
    let lines: Vec<Option<Curve>> = (0..blades.len()).map(line).collect();
    if lines.iter().all(Option::is_none) {
        return Ok(None);
    }
    let moment = |(blade, line): (&Rig, &Option<Curve>)| -> Result<f64, CarvedError> {
        let Some(line) = line else { return Ok(0.0) };
        let beam = BladeBeam::new(blade)?;
        let share = density_kg_m3 / beam.material.density_kg_m3;
        let ahead: Vec<f64> =
            beam.radii_m.iter().zip(&beam.mass_kg_m).map(|(r, m)| line.at(*r) * m).collect();
        Ok(share * first_moment(&beam.radii_m, &ahead))
    };
    blades.iter().zip(&lines).map(moment).collect::<Result<Vec<f64>, CarvedError>>().map(Some)
}

/// How far a blade lies ahead over the radius.
fn track(rig: &Rig, readings: &[BladeReading]) -> Option<Curve> {
    let hub_m = rig.rotor.blade.hub_radius_m;
    let read = readings.iter().filter(|r| r.radius_m > hub_m).filter_map(|r| Some((r.radius_m, r.track_m?)));
    let (radii, ahead): (Vec<f64>, Vec<f64>) = std::iter::once((hub_m, 0.0)).chain(read).unzip();
    if radii.len() > 1 { Curve::polyline(radii, ahead) } else { None }
}
