//! The section solver's parts alone: potential flow against a closed form, the boundary layer against
//! plates and similar flows.

use std::f64::consts::{PI, TAU};

use spokeshave::section::outline::Outline;
use spokeshave::section::solver::alone::{Inviscid, inviscid, laminar_closure, march};

use crate::check::{Basis, Check, Mark, worst};

const JOUKOWSKI: Basis = Basis {
    source: "closed form of the symmetric Joukowski section: circle of radius 1.1 about -0.1, mapped by z \
             + 1/z",
    mark: Mark::Computed,
    why: "straight panels: 0.2 % of the lift, 0.5 % of the largest speed; the last 2 % of the chord are \
          left out, the cusp has no thickness",
};

/// How far the circle's centre is off.
const OFF: f64 = 0.1;

/// Points of the section.
fn joukowski(count: usize) -> Vec<[f64; 2]> {
    let mapped = |a: f64| {
        let (x, y) = (-OFF + (1.0 + OFF) * a.cos(), (1.0 + OFF) * a.sin());
        let r2 = x * x + y * y;
        [x + x / r2, y - y / r2]
    };
    (0..=count).map(|k| mapped(TAU * k as f64 / count as f64)).collect()
}

fn chord() -> f64 {
    let nose = 1.0 + 2.0 * OFF;
    2.0 + nose + 1.0 / nose
}

fn solved(alpha_deg: f64) -> Inviscid {
    let outline = Outline::from_points("Joukowski", &joukowski(400)).expect("a fair outline");
    inviscid(&outline, alpha_deg.to_radians()).expect("regular equations")
}

/// Lift by `8 π (1 + e) sin α / chord`.
pub(super) fn joukowski_lift() -> Vec<Check> {
    let of = |alpha_deg: f64| {
        let exact = 8.0 * PI * (1.0 + OFF) * alpha_deg.to_radians().sin() / chord();
        JOUKOWSKI.relative(format!("lift at {alpha_deg}°"), solved(alpha_deg).cl, exact, 0.002)
    };
    [2.0, 5.0, 10.0].map(of).into()
}

/// Speed at a point of the surface in the chord-line frame, from the closed form.
fn joukowski_speed(p: [f64; 2], alpha: f64) -> f64 {
    let z = [2.0 - chord() * (1.0 - p[0]), chord() * p[1]];
    // zeta = z/2 + sqrt(z^2/4 - 1), the root outside the circle
    let (re, im) = (0.25 * (z[0] * z[0] - z[1] * z[1]) - 1.0, 0.5 * z[0] * z[1]);
    let (size, half) = (re.hypot(im).sqrt(), 0.5 * im.atan2(re));
    let root = [size * half.cos(), size * half.sin()];
    let candidates = [1.0, -1.0].map(|sign| [0.5 * z[0] + sign * root[0], 0.5 * z[1] + sign * root[1]]);
    let far = |q: &[f64; 2]| (q[0] + OFF).hypot(q[1]);
    let zeta = if far(&candidates[0]) > far(&candidates[1]) { candidates[0] } else { candidates[1] };
    let phi = zeta[1].atan2(zeta[0] + OFF);
    // |1 - 1/zeta^2|
    let square = [zeta[0] * zeta[0] - zeta[1] * zeta[1], 2.0 * zeta[0] * zeta[1]];
    let size = square[0] * square[0] + square[1] * square[1];
    let slope = (1.0 - square[0] / size).hypot(square[1] / size);
    2.0 * ((phi - alpha).sin() + alpha.sin()).abs() / slope
}

/// Speeds at every node but those in the cusp.
pub(super) fn joukowski_speeds() -> Vec<Check> {
    let of = |alpha_deg: f64| {
        let found = solved(alpha_deg);
        let nodes = found.surface.iter().filter(|(p, _)| p[0] < 0.98);
        let pairs: Vec<(f64, f64)> =
            nodes.map(|(p, u)| (*u, joukowski_speed(*p, alpha_deg.to_radians()))).collect();
        let largest = pairs.iter().fold(0.0, |most: f64, pair| most.max(pair.1));
        let one = |(i, (got, exact)): (usize, (f64, f64))| {
            JOUKOWSKI.within(format!("node {i}"), got, exact, 0.005 * largest)
        };
        worst(&format!("speeds at {alpha_deg}°"), pairs.into_iter().enumerate().map(one).collect())
    };
    [0.0, 4.0, 10.0].map(of).into()
}

/// Places that grow evenly by a factor, from 0.01 to 1, in an even speed.
fn plate(count: u32) -> Vec<(f64, f64)> {
    (0..=count).map(|k| (0.01 * 100_f64.powf(f64::from(k) / f64::from(count)), 1.0)).collect()
}

const BLASIUS: Basis = Basis {
    source: "H. Blasius, 1908: θ sqrt(Re_x)/x = cf sqrt(Re_x) = 0.6641, H = 2.591",
    mark: Mark::FromMemory,
    why: "the closure is a fit: 2 %, 1 % in H; the layer starts 5 % wrong in shape, which it must forget",
};

/// The laminar plate.
pub(super) fn blasius() -> Vec<Check> {
    let theta = 0.6641 * (0.01_f64 / 1e6).sqrt();
    let end = march(1e6, false, [theta, 2.46 * theta, 0.0], &plate(60))[60];
    vec![
        BLASIUS.relative("plate, momentum thickness", end.theta * 1e3, 0.6641, 0.02),
        BLASIUS.relative("plate, friction", end.cf * 1e3, 0.6641, 0.02),
        BLASIUS.relative("plate, shape parameter", end.dstar / end.theta, 2.591, 0.01),
    ]
}

const GROWTH: Basis = Basis {
    source: "J. L. van Ingen, 1956; A. M. O. Smith and N. Gamberoni, 1956: waves on a plate reach e^9 near \
             Re_x = 3e6",
    mark: Mark::FromMemory,
    why: "2.5e6 to 3.6e6: what methods and plates differ by",
};

/// Where waves on a plate have grown by e^9.
pub(super) fn growth() -> Vec<Check> {
    let theta = 0.6641 * (0.01_f64 / 6e6).sqrt();
    let stations = plate(160);
    let points = march(6e6, false, [theta, 2.591 * theta, 0.0], &stations);
    let at = points.iter().position(|p| p.growth >= 9.0);
    let re_x = at.map_or(f64::NAN, |k| 6e6 * stations[k].0);
    vec![GROWTH.between("transition on a plate, Re_x / 1e6", re_x / 1e6, 2.5, 3.6)]
}

const SCHOENHERR: Basis = Basis {
    source: "Kármán and Schoenherr: 1/cf = 17.08 (log10 Re_θ)² + 25.11 log10 Re_θ + 6.012",
    mark: Mark::FromMemory,
    why: "plates measured differ by 5 %",
};

/// The turbulent plate, above `Re_θ` 2000.
pub(super) fn schoenherr() -> Vec<Check> {
    let theta = 400.0 / 2e7;
    let points = march(2e7, true, [theta, 1.5 * theta, 0.05], &plate(120));
    let of = |re_theta: f64, cf: f64| {
        let log = re_theta.log10();
        let expected = 1.0 / (17.08 * log * log + 25.11 * log + 6.012);
        SCHOENHERR.relative(format!("Re_θ {re_theta:.2e}"), cf, expected, 0.05)
    };
    let late = points.iter().map(|p| (2e7 * p.theta, p.cf)).filter(|p| p.0 > 2000.0);
    let checks: Vec<Check> = late.map(|(re_theta, cf)| of(re_theta, cf)).collect();
    assert!(checks.len() > 20, "the layer goes on");
    vec![worst("turbulent plate, friction", checks)]
}

const SIMILAR: Basis = Basis {
    source: "V. M. Falkner and S. W. Skan, 1931; D. R. Hartree, 1937: friction vanishes at β = -0.1988 \
             with H = 4.03; H = 2.216 at β = 1 (stagnation), 2.591 at 0, 2.802 at -0.1",
    mark: Mark::FromMemory,
    why: "the closure is a fit: at separation 5 % in H and 0.01 in β, 2 % in H elsewhere",
};

/// β and friction of the similar flow with a shape parameter.
fn similar(h: f64) -> (f64, f64) {
    let (cf, di) = laminar_closure(1e6, h);
    let (f, g) = (0.5 * cf, di);
    // u = x^m: (1-m)/2 + (2+H) m = f K, (1-H) m = (g-f) K
    let m = 0.5 * (g - f) / ((1.0 - h) * f - (g - f) * (1.5 + h));
    (2.0 * m / (m + 1.0), f)
}

/// The closure's similar flows.
pub(super) fn falkner_skan() -> Vec<Check> {
    let hundredths = |from: u32, to: u32| (from..to).map(|k| 0.01 * f64::from(k));
    let separation = hundredths(380, 440).find(|h| similar(*h).1 <= 0.0).unwrap_or(f64::NAN);
    let mut checks = vec![
        SIMILAR.relative("separation, H", separation, 4.03, 0.05),
        SIMILAR.within("separation, β", similar(separation).0, -0.1988, 0.01),
    ];
    checks.extend([(2.216, 1.0), (2.591, 0.0), (2.802, -0.1)].map(|(exact, beta)| {
        // β falls as H rises: the H of the closure at this β.
        let h = hundredths(215, 400).find(|h| similar(*h).0 < beta).unwrap_or(f64::NAN);
        SIMILAR.relative(format!("H at β {beta}"), h, exact, 0.02)
    }));
    checks
}

const HOWARTH: Basis = Basis {
    source: "L. Howarth, 1938: in u = 1 - x the layer separates at x = 0.1199",
    mark: Mark::FromMemory,
    why: "an integral method: 5 %",
};

/// The linearly retarded flow.
pub(super) fn howarth() -> Vec<Check> {
    let stations: Vec<(f64, f64)> = (4..=300).map(|k| 0.0005 * f64::from(k)).map(|x| (x, 1.0 - x)).collect();
    let theta = 0.6641 * (0.002_f64 / 1e6).sqrt();
    let points = march(1e6, false, [theta, 2.6 * theta, 0.0], &stations);
    let at = points.iter().position(|p| p.cf <= 0.0).unwrap_or(points.len() - 1);
    vec![HOWARTH.relative("separation in u = 1 - x", stations[at].0, 0.1199, 0.05)]
}
