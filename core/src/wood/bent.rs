//! The blade bent by its load: centrifugal force pulls it straight and takes bending off it.

use super::BladeBeam;
use super::loads::BladeLoads;

/// Deflection, and the bending that is left.
#[derive(Clone, Debug)]
pub(super) struct Bent {
    /// Forward and against the turning, m, at the radii; `None` where the blade does not stand.
    pub(super) deflection: Option<Vec<[f64; 2]>>,
    /// Bending moment forward, N m.
    pub(super) forward_n_m: Vec<f64>,
    /// Bending moment against the turning, N m.
    pub(super) against_n_m: Vec<f64>,
}

impl Bent {
    /// The blade under loads, turned by `turn_rad` besides the drawing.
    ///
    /// What it is bent by is an offset like the drawn ones ([`super::beam::Offset`]), for small deflections.
    pub(super) fn new(beam: &BladeBeam, loads: &BladeLoads, turn_rad: f64) -> Self {
        let stiffness = beam.stiffness(turn_rad);
        let bending = beam.bending(&stiffness, loads.rotation_rad_s);
        let deflection = bending
            .deflection_m(
                [&loads.forward_n_m, &loads.against_n_m],
                [&loads.offsets_m[0], &loads.offsets_m[1]],
            )
            .filter(|all| all.iter().flatten().all(|v| v.is_finite()));
        let mut bent = Self {
            forward_n_m: loads.forward_bending_n_m.clone(),
            against_n_m: loads.against_bending_n_m.clone(),
            deflection,
        };
        if let Some(deflection) = bent.deflection.clone() {
            bent.relieve(beam, loads, &deflection);
        }
        bent
    }

    fn relieve(&mut self, beam: &BladeBeam, loads: &BladeLoads, deflection: &[[f64; 2]]) {
        let bent = [0, 1].map(|side| deflection.iter().map(|d| d[side]).collect());
        let [forward, against] = beam.offset(&bent, loads.rotation_rad_s).relief_n_m();
        self.forward_n_m.iter_mut().zip(forward).for_each(|(m, off)| *m -= off);
        self.against_n_m.iter_mut().zip(against).for_each(|(m, off)| *m -= off);
    }
}

#[cfg(test)]
mod tests {
    use crate::job::{DEMOS, Job};
    use crate::rig::Rig;
    use crate::wood::BladeBeam;
    use crate::wood::bent::Bent;
    use crate::wood::loads::BladeLoads;

    /// The moments left over are those that bend the beam as it is bent: `M = E I w″` in both planes.
    #[test]
    fn what_is_left_is_what_bends_the_blade() {
        let rig = Rig::new(&Job::from_json(DEMOS[0].json).unwrap()).unwrap();
        let beam = BladeBeam::new(&rig).unwrap();
        let at = rig.condition(0).unwrap();
        let loads = BladeLoads::new(&beam, &rig.rotor, &at);
        let bent = Bent::new(&beam, &loads, 0.0);
        let (deflection, stiffness) = (bent.deflection.clone().unwrap(), beam.stiffness(0.0));
        let r = &beam.radii_m;
        // Curvature forward by the moments left and the stiffness of both planes.
        let curvature = |j: usize| {
            let [out, inside, both] = [0, 1, 2].map(|k| stiffness[k][j]);
            (inside * bent.forward_n_m[j] - both * bent.against_n_m[j]) / (out * inside - both * both)
        };
        for i in [10, 25, 50, 75] {
            let slope = |a: usize, b: usize| (deflection[b][0] - deflection[a][0]) / (r[b] - r[a]);
            let bend = 2.0 * (slope(i, i + 6) - slope(i - 6, i)) / (r[i + 6] - r[i - 6]);
            // That is the mean of the curvature under a hat over the three places.
            let hat = |j: usize| {
                let away =
                    if j < i { (r[i] - r[j]) / (r[i] - r[i - 6]) } else { (r[j] - r[i]) / (r[i + 6] - r[i]) };
                (1.0 - away) * (r[j + 1] - r[j - 1])
            };
            let over = i - 5..=i + 5;
            let mean = over.clone().map(|j| hat(j) * curvature(j)).sum::<f64>() / over.map(hat).sum::<f64>();
            assert!((bend / mean - 1.0).abs() < 0.01, "{i}: {bend} {mean}");
            assert!(bent.forward_n_m[i] < loads.forward_bending_n_m[i]);
        }
    }
}
