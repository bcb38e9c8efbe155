//! The whole sheet: every case, every station, what decides.

use super::assumptions::assumptions;
use super::cases::{Case, cases};
use super::judged::{Loaded, worst};
use super::material::is_wood;
use super::remedy::{Nearest, Say, governing, remedy, sentence};
use super::{BladeBeam, Place, WoodError, hub, mass, twist, verdict, vibration};
use crate::drilling::Pattern;
use crate::engine::Shaft;
use crate::fit::rpm_of;
use crate::job::{PitchControl, VERSION, Wood};
use crate::result::{CaseFigures, CaseResult, HubResult, MaterialUsed, Strength, StressStation, Verdict};
use crate::rig::Rig;

/// A job's blade under all its cases.
pub(super) struct Judged {
    beam: BladeBeam,
    wood: Wood,
    cases: Vec<(Case, Option<Loaded>)>,
    stations: Vec<StressStation>,
}

impl Judged {
    /// # Errors
    /// A species that is not known.
    pub(super) fn new(rig: &Rig) -> Result<Self, WoodError> {
        let beam = BladeBeam::new(rig)?;
        let wood = rig.job.wood.clone().unwrap_or_default();
        let all = cases(rig, wood.overspeed).into_iter();
        let cases: Vec<(Case, Option<Loaded>)> =
            all.map(|case| (case.clone(), Loaded::new(rig, &beam, &case))).collect();
        let answered: Vec<&Loaded> = cases.iter().filter_map(|j| j.1.as_ref()).collect();
        let stations = beam.places.iter().map(|p| station(&beam, p, &answered)).collect();
        Ok(Self { beam, wood, cases, stations })
    }

    fn answered(&self) -> Vec<&Loaded> {
        self.cases.iter().filter_map(|j| j.1.as_ref()).collect()
    }

    fn results(&self) -> Vec<CaseResult> {
        self.cases.iter().map(|(case, loaded)| result(&self.beam, case, loaded.as_ref())).collect()
    }

    fn hub(&self, rig: &Rig) -> Option<HubResult> {
        self.wood.hub.as_ref().and_then(|h| hub_result(rig, &self.beam, h, &self.answered()))
    }

    pub(super) fn verdict(&self, rig: &Rig) -> Verdict {
        let decides = governing(&self.stations, &self.beam.material);
        verdict::of(rig, &self.results(), decides.as_ref(), self.hub(rig).as_ref())
    }

    /// Writes down the thickness that is missing at each place.
    fn add_missing(&mut self, rig: &Rig) {
        let Some(thicker_m) = remedy(rig, &self.beam, &self.answered()) else { return };
        for (station, place) in self.stations.iter_mut().zip(&self.beam.places) {
            // The edge of the hub has the thickness ratio of the station next to it.
            let chords = station.chord_m / rig.job.propeller.stations[place.of].chord_m;
            let tenths = (1e4 * thicker_m[place.of] * chords - 1e-6).ceil();
            station.thicker_m = Some(1e-4 * tenths).filter(|m| *m > 0.0);
        }
    }
}

/// Strength, weight and vibration of a job's blade; without a material of the job's the usual one is taken
/// and said.
///
/// # Errors
/// A species that is not known.
pub fn strength(rig: &Rig) -> Result<Strength, WoodError> {
    let mut judged = Judged::new(rig)?;
    judged.add_missing(rig);
    let (cases, hub) = (judged.results(), judged.hub(rig));
    let answered = judged.answered();
    let speeds: Vec<(String, f64)> = answered.iter().map(|l| (l.name.clone(), l.at.rotation_rad_s)).collect();
    let beam = &judged.beam;
    let mut governing = governing(&judged.stations, &beam.material);
    let verdict = verdict::of(rig, &cases, governing.as_ref(), hub.as_ref());
    if let Some(g) = &mut governing {
        g.sentence = sentence(g, &judged.stations, &verdict, &Say::METRIC);
    }
    Ok(Strength {
        spokeshave: VERSION,
        title: rig.job.title.clone(),
        material: material_used(rig, beam, judged.wood.moisture_percent),
        mass: mass(beam),
        verdict,
        governing,
        vibration: vibration::vibration(beam, &speeds, rig.shaft.as_ref().map_or(1.0, Shaft::gear_ratio)),
        running: (0..rig.job.flight_points.len()).filter_map(|i| twist::running(rig, beam, i)).collect(),
        hub,
        assumptions: assumptions(rig, beam, &cases),
        cases,
        stations: judged.stations,
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
    let one_piece = matches!(rig.job.propeller.pitch_control, PitchControl::Fixed {});
    let holes = Pattern::of(&rig.job).filter(|_| one_piece);
    let pull = cases.iter().map(|c| c.loads.tension_n[0]).fold(0.0, f64::max);
    Some(hub::hub(beam, hub, 2.0 * rig.rotor.blade.hub_radius_m, holes, torque, pull))
}

fn material_used(rig: &Rig, beam: &BladeBeam, moisture_percent: f64) -> MaterialUsed {
    let m = &beam.material;
    MaterialUsed {
        name: m.title.clone(),
        assumed: rig.job.wood.is_none(),
        source: m.source.clone(),
        is_wood: rig.job.wood.as_ref().is_none_or(is_wood),
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
