//! The whole analysis against a propeller measured in a wind tunnel (its data in [`crate::tunnel`]).

use std::sync::LazyLock;

use spokeshave::job::TipLoss;
use spokeshave::result::PointResult;
use spokeshave::rig::Rig;

use crate::check::{Basis, Check, Mark};
use crate::tunnel::{AT_REST, MEASURED, PRINT_TURN_DEG, job};

const SOURCE: &str = "J. B. Brandt, R. W. Deters, G. K. Ananda, M. S. Selig, UIUC Propeller Database, vol. \
                      2, 2015; R. W. Deters, G. K. Ananda, M. S. Selig, Reynolds Number Effects on the \
                      Performance of Small-Scale Propellers, AIAA 2014-2151: 9 inch print, Clark Y, 6 000 \
                      rpm, Reynolds number about 50 000";
const BASIS: Basis = Basis {
    source: SOURCE,
    mark: Mark::Read,
    why: "the tunnel's CT and CP are good to 1 to 3 % at this size (J. B. Brandt and M. S. Selig, AIAA \
          2011-1255, from memory)",
};
const DESIGN: &str = "by the angle of the drawing, 1.36° finer than the print measured by photograph; \
                      which angle the print really had is not known";
const NO_THRUST: &str = "near zero thrust 0.1° of blade angle is 7 % of CT, and the print's angle is known \
                         to about a degree; the same miss is 3 % of the largest CT";

/// What the program says of the propeller at every measured J, and at rest.
#[derive(Clone, Debug)]
pub struct Answer {
    /// J, CT, CP.
    pub moving: Vec<(f64, f64, f64)>,
    /// CT, CP at rest.
    pub rest: (f64, f64),
}

impl Answer {
    fn of(turn_deg: f64, n_crit: f64, tip_loss: TipLoss) -> Self {
        let mut job = job(turn_deg, n_crit);
        job.method.tip_loss = tip_loss;
        let points = Rig::new(&job).expect("a valid job").analysis().flight_points;
        let figures = |p: &PointResult| (p.figures.ct.unwrap_or(f64::NAN), p.figures.cp.unwrap_or(f64::NAN));
        let moving = points.iter().map(figures).zip(&MEASURED).map(|((ct, cp), m)| (m.0, ct, cp)).collect();
        Self { moving, rest: figures(&points[MEASURED.len()]) }
    }

    /// Root-mean-square misfit of CT and CP over the measured J, as shares of the values at the lowest J.
    #[must_use]
    pub fn misfit(&self) -> (f64, f64) {
        let n = MEASURED.len() as f64;
        let mean = |share: &dyn Fn(usize) -> f64| {
            ((0..MEASURED.len()).map(|i| share(i).powi(2)).sum::<f64>() / n).sqrt()
        };
        let ct = |i: usize| (self.moving[i].1 - MEASURED[i].1) / MEASURED[0].1;
        let cp = |i: usize| (self.moving[i].2 - MEASURED[i].2) / MEASURED[0].2;
        (mean(&ct), mean(&cp))
    }
}

/// With the angle of the print by photograph, in quiet air, n = 9.
pub static PHOTOGRAPHED: LazyLock<Answer> =
    LazyLock::new(|| Answer::of(PRINT_TURN_DEG, 9.0, TipLoss::Prandtl));
/// The same in disturbed air, n = 4.
pub static DISTURBED: LazyLock<Answer> = LazyLock::new(|| Answer::of(PRINT_TURN_DEG, 4.0, TipLoss::Prandtl));
/// With the angle of the design.
pub static DRAWN: LazyLock<Answer> = LazyLock::new(|| Answer::of(0.0, 9.0, TipLoss::Prandtl));
/// With Goldstein's loss at the tip, else as photographed in quiet air.
pub static GOLDSTEIN: LazyLock<Answer> =
    LazyLock::new(|| Answer::of(PRINT_TURN_DEG, 9.0, TipLoss::Goldstein));

/// Thrust and power over J with the print's own angle.
pub(super) fn moving() -> Vec<Check> {
    let (ct, cp) = PHOTOGRAPHED.misfit();
    let last = MEASURED.len() - 1;
    let share = |name: &str, got| {
        let what =
            format!("{name} over J 0.10 to 0.63, root mean square of the misfit over the largest {name}");
        BASIS.within(what, got, 0.0, 0.03)
    };
    vec![
        share("CT", ct),
        share("CP", cp),
        BASIS
            .relative("CT at J 0.63 alone", PHOTOGRAPHED.moving[last].1, MEASURED[last].1, 0.03)
            .misses(NO_THRUST),
    ]
}

/// Thrust and power over J and at rest with Goldstein's loss at the tip.
pub(super) fn with_goldsteins_tip() -> Vec<Check> {
    let (ct, cp) = GOLDSTEIN.misfit();
    let share = |name: &str, got| {
        BASIS.within(format!("{name} with Goldstein's loss at the tip, the same misfit"), got, 0.0, 0.03)
    };
    vec![
        share("CT", ct),
        share("CP", cp),
        BASIS.relative("CT at rest with Goldstein's loss at the tip", GOLDSTEIN.rest.0, AT_REST.0, 0.02),
        BASIS.relative("CP at rest with Goldstein's loss at the tip", GOLDSTEIN.rest.1, AT_REST.1, 0.03),
    ]
}

/// Thrust and power at rest.
pub(super) fn at_rest() -> Vec<Check> {
    vec![
        BASIS.relative("CT at rest", PHOTOGRAPHED.rest.0, AT_REST.0, 0.02),
        BASIS.relative("CP at rest", PHOTOGRAPHED.rest.1, AT_REST.1, 0.03),
    ]
}

/// Thrust and power with the angle of the design.
pub(super) fn at_the_design_angle() -> Vec<Check> {
    let (ct, cp) = DRAWN.misfit();
    let share = |name: &str, got| {
        BASIS
            .within(format!("{name} with the blade angle of the drawing, the same misfit"), got, 0.0, 0.03)
            .misses(DESIGN)
    };
    vec![share("CT", ct), share("CP", cp)]
}
