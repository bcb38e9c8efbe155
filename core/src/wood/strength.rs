//! The whole sheet: every case, every station, what decides.

use super::assumptions::assumptions;
use super::cases::{Case, cases};
use super::judged::{Loaded, worst};
use super::remedy::{Nearest, governing, remedy};
use super::{BladeBeam, Place, WoodError, hub, mass, twist, vibration};
use crate::engine::Shaft;
use crate::fit::rpm_of;
use crate::job::VERSION;
use crate::result::{CaseFigures, CaseResult, HubResult, MaterialUsed, Strength, StressStation};
use crate::rig::Rig;

/// Strength, weight and vibration of a job's blade; without a material of the job's the usual one is taken and said.
///
/// # Errors
/// A species that is not known.
pub fn strength(rig: &Rig) -> Result<Strength, WoodError> {
    let beam = BladeBeam::new(rig)?;
    let wood = rig.job.wood.clone().unwrap_or_default();
    let judged: Vec<(Case, Option<Loaded>)> = cases(rig, wood.overspeed)
        .into_iter()
        .map(|case| (case.clone(), Loaded::new(rig, &beam, &case)))
        .collect();
    let answered: Vec<&Loaded> = judged.iter().filter_map(|j| j.1.as_ref()).collect();
    let mut stations: Vec<StressStation> = beam.places.iter().map(|p| station(&beam, p, &answered)).collect();
    if let Some(thicker_m) = remedy(rig, &beam, &answered) {
        for (station, place) in stations.iter_mut().zip(&beam.places).filter(|s| s.1.station.is_some()) {
            station.thicker_m = Some(thicker_m[place.of]).filter(|m| *m > 0.0);
        }
    }
    let case_results: Vec<CaseResult> =
        judged.iter().map(|(case, loaded)| result(&beam, case, loaded.as_ref())).collect();
    let speeds: Vec<(String, f64)> = answered.iter().map(|l| (l.name.clone(), l.at.rotation_rad_s)).collect();
    Ok(Strength {
        spokeshave: VERSION,
        title: rig.job.title.clone(),
        material: material_used(rig, &beam, wood.moisture_percent),
        mass: mass(&beam),
        governing: governing(&stations, &beam.material),
        vibration: vibration::vibration(&beam, &speeds, rig.shaft.as_ref().map_or(1.0, Shaft::gear_ratio)),
        running: (0..rig.job.flight_points.len()).filter_map(|i| twist::running(rig, &beam, i)).collect(),
        hub: wood.hub.as_ref().and_then(|h| hub_result(rig, &beam, h, &answered)),
        assumptions: assumptions(rig, &beam, &case_results),
        cases: case_results,
        stations,
    })
}

fn result(beam: &BladeBeam, case: &Case, loaded: Option<&Loaded>) -> CaseResult {
    CaseResult {
        name: case.name.clone(),
        kind: case.kind,
        state: case.at.as_ref().err().copied().unwrap_or(crate::result::State::Ok),
        held: case.held,
        figures: loaded.map(|l| figures(beam, l)),
    }
}

fn figures(beam: &BladeBeam, case: &Loaded) -> CaseFigures {
    let (loads, bent) = (&case.loads, &case.bent);
    let tip = bent.deflection.as_ref().and_then(|d| d.last().copied());
    let twist = twist::twist_rad(beam, loads, beam.beyond_rad(&case.at));
    CaseFigures {
        rpm: rpm_of(&case.at),
        airspeed_m_s: case.at.airspeed_m_s,
        thrust_n: case.air.thrust_n,
        torque_n_m: case.air.torque_n_m,
        root_tension_n: loads.tension_n[0],
        root_forward_n_m: bent.forward_n_m[0],
        root_against_n_m: bent.against_n_m[0],
        rigid_forward_n_m: loads.forward_bending_n_m[0],
        rigid_against_n_m: loads.against_bending_n_m[0],
        tip_forward_m: tip.map(|d| d[0]),
        tip_against_m: tip.map(|d| d[1]),
        tip_twist_deg: twist.and_then(|t| t.last().copied()).map(f64::to_degrees),
        margin: beam.places.iter().map(|p| case.margin(beam, p)).fold(f64::INFINITY, f64::min),
    }
}

fn station(beam: &BladeBeam, place: &Place, cases: &[&Loaded]) -> StressStation {
    let (i, section) = (place.index, &beam.sections[place.index]);
    let (least, greatest, angle) = section.principal();
    let worst = worst(beam, place, cases);
    let found = worst.map(|case| (case.name.clone(), case.stressed(beam, place)));
    let nearest = found.as_ref().map(|(_, (_, s))| Nearest::of(s, &beam.material));
    let carried = found.as_ref().map(|f| f.1.0);
    let stresses = found.as_ref().map(|f| f.1.1);
    StressStation {
        station: place.station.map(|s| s + 1),
        radius_m: beam.radii_m[i],
        chord_m: beam.chords_m[i],
        thickness_m: beam.chords_m[i] * place.thickness_ratio,
        area_m2: section.area_m2,
        flat_m4: section.flat_m4,
        edge_m4: section.edge_m4,
        principal_m4: [least, greatest],
        principal_deg: angle.to_degrees(),
        torsion_m4: section.torsion_m4,
        tension_n: carried.map(|c| c.tension_n),
        flat_n_m: carried.map(|c| c.flat_n_m),
        edge_n_m: carried.map(|c| c.edge_n_m),
        twisting_n_m: carried.map(|c| c.twisting_n_m),
        axial_pa: carried.map(|c| c.tension_n / section.area_m2),
        tension_pa: stresses.map(|s| s.tension_pa),
        compression_pa: stresses.map(|s| s.compression_pa),
        shear_pa: stresses.map(|s| s.shear_pa),
        kind: nearest.as_ref().map(|n| n.kind),
        margin: nearest.as_ref().map(Nearest::margin),
        thicker_m: None,
        case: found.map(|f| f.0),
    }
}

fn hub_result(rig: &Rig, beam: &BladeBeam, hub: &crate::job::Hub, cases: &[&Loaded]) -> Option<HubResult> {
    let torque = cases
        .iter()
        .map(|c| c.air.torque_n_m.abs())
        .fold(None, |m: Option<f64>, t| Some(m.map_or(t, |m| m.max(t))))?;
    let pull = cases.iter().map(|c| c.loads.tension_n[0]).fold(0.0, f64::max);
    Some(hub::hub(beam, hub, 2.0 * rig.rotor.blade.hub_radius_m, torque, pull))
}

fn material_used(rig: &Rig, beam: &BladeBeam, moisture_percent: f64) -> MaterialUsed {
    let m = &beam.material;
    MaterialUsed {
        name: m.title.clone(),
        assumed: rig.job.wood.is_none(),
        source: m.source.clone(),
        moisture_percent,
        density_kg_m3: m.density_kg_m3,
        modulus_pa: m.modulus_pa,
        shear_modulus_pa: m.shear_modulus_pa,
        tension_limit_pa: m.tension.limit_pa,
        tension_reason: m.tension.reason.clone(),
        compression_limit_pa: m.compression.limit_pa,
        compression_reason: m.compression.reason.clone(),
        shear_limit_pa: m.shear.limit_pa,
        shear_reason: m.shear.reason.clone(),
    }
}
