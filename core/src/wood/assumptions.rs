//! What was taken for granted of a job, in sentences.

use super::{BladeBeam, Doubt, Kind, Species as Known};
use crate::job::Species;
use crate::result::CaseResult;
use crate::rig::Rig;

/// What was taken for granted of this job.
pub(super) fn assumptions(rig: &Rig, beam: &BladeBeam, cases: &[CaseResult]) -> Vec<String> {
    let mut all = Vec::new();
    if rig.job.wood.is_none() {
        all.push(format!("The job names no material: {} is taken.", beam.material.title));
    }
    all.push(format!("Values: {}. {}", beam.material.source, sound(rig)));
    all.push(format!("{} The blade is clamped at the edge of the hub.", stands(beam)));
    all.push(
        "Steady load only, without gyroscopic load, gust, engine pulse or strike. Bending is what is left \
         when centrifugal force has pulled the bent blade straighter; a stiffer piece of wood than the mean \
         is relieved less."
            .into(),
    );
    all.extend(beam.places.iter().filter_map(|p| Some(doubt(p.station?, p.doubt?, p.thickness_ratio))));
    let judged = beam.places.iter().filter(|p| p.station.is_some()).count();
    let left_out = rig.job.propeller.stations.len() - judged;
    if left_out > 0 {
        all.push(format!("Not judged: {left_out} stations inside the hub or at the very tip."));
    }
    let silent = cases.iter().filter(|c| c.figures.is_none());
    all.extend(
        silent.map(|c| format!("“{}” has no answer and is not in it. {}", c.name, c.state.sentence())),
    );
    all
}

/// What is taken for granted of the material, by what it is.
fn sound(rig: &Rig) -> &'static str {
    let kind = rig.job.wood.as_ref().map(|wood| match &wood.species {
        Species::Named(name) => Known::named(name).map(|s| s.kind),
        Species::Own(_) => None,
    });
    match kind {
        None | Some(Some(Kind::Hardwood | Kind::Softwood)) => {
            "Grain straight and along the blade, no knots, glue as strong as the wood."
        }
        Some(Some(Kind::Composite)) => "Fibres straight and along the blade, soaked through, without voids.",
        Some(Some(Kind::Plastic)) => {
            "Without voids or seams; of a print, layers along the blade, for it is far weaker across them."
        }
        Some(None) => "The same everywhere in the blade, without flaws.",
    }
}

/// Where the centroids stand.
fn stands(beam: &BladeBeam) -> String {
    let lean = beam.line.lean.atan().to_degrees();
    let leaning = if lean == 0.0 { "does not lean".into() } else { format!("leans forward by {lean:.1}°") };
    let [forward, behind] = beam.offsets_m(0.0);
    let ahead = forward.iter().zip(&beam.radii_m).map(|(w, r)| w - beam.line.lean * r).collect::<Vec<f64>>();
    let most = |of: &[f64]| of.iter().fold(0.0, |most: f64, v| if v.abs() > most.abs() { *v } else { most });
    let [ahead, behind] = [ahead, behind].map(|o| 1e3 * most(&o));
    if ahead.abs().max(behind.abs()) < 1e-6 {
        return format!("The sections' centroids stand on a straight line that {leaning}.");
    }
    let side = |mm: f64, one: &str, other: &str| {
        format!("{:.1} mm {}", mm.abs(), if mm < 0.0 { other } else { one })
    };
    format!(
        "The sections stand on the job's stacking line, on a blade that {leaning}: their centroids lie up \
         to {} and {} of the radius through the axis, and centrifugal force bends and twists the blade by \
         it.",
        side(ahead, "ahead", "aft"),
        side(behind, "behind (against the turning)", "before")
    )
}

fn doubt(station: usize, doubt: Doubt, thickness_ratio: f64) -> String {
    let n = station + 1;
    match doubt {
        Doubt::NoOutline => format!("Station {n}: its section has no outline; a usual section is taken."),
        Doubt::Stretched => format!(
            "Station {n}: its outline cannot be drawn {:.0} % thick; the nearest that can is stretched.",
            100.0 * thickness_ratio
        ),
    }
}
