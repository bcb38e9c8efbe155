//! The angle of best lift-to-drag of a section where it works, and the band round it.
//!
//! The best angle is the one of greatest cl/cd in the attached range, sought between −2° and 20° and refined.
//! A top may be flat: where two maxima lie within 0.5 % of one another the lower angle is taken, so that the
//! answer does not jump. The working band is the span of angles round it that keeps 95 % of the greatest
//! lift-to-drag.

use super::extend::Coefficients;

/// Best lift-to-drag of a section.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Best {
    /// Angle of attack of greatest cl/cd, rad to the chord line.
    pub alpha_rad: f64,
    /// The greatest cl/cd.
    pub lift_to_drag: f64,
}

/// Where maxima within this share of one another count as one.
const SAME_TOP: f64 = 0.995;
/// Share of the best lift-to-drag that the working band keeps.
pub const BAND_SHARE: f64 = 0.95;
const STEP_RAD: f64 = 0.5 * std::f64::consts::PI / 180.0;
const LOWEST_RAD: f64 = -4.0 * STEP_RAD;
const HIGHEST_RAD: f64 = 40.0 * STEP_RAD;
const BAND_REACH_RAD: f64 = 40.0 * STEP_RAD;
/// Golden-section passes: one degree to 1e-3 degrees, where the top of cl/cd is flat to 1e-8.
const PASSES: usize = 14;

/// The best angle of a section given by its coefficients, sought up to its stall angle (rad). `None` when it
/// nowhere lifts.
pub fn best(at: impl Fn(f64) -> Coefficients, stall_rad: f64) -> Option<Best> {
    let ratio = |a: f64| {
        let c = at(a);
        c.cl / c.cd
    };
    let end = stall_rad.clamp(LOWEST_RAD + STEP_RAD, HIGHEST_RAD);
    let (node, _) = highest_node(&ratio, end)?;
    let (alpha_rad, lift_to_drag) = refined(&ratio, node - STEP_RAD, (node + STEP_RAD).min(end));
    Some(Best { alpha_rad, lift_to_drag })
}

/// The span of angles (rad) round the best that keeps [`BAND_SHARE`] of the best lift-to-drag.
pub fn working_band(at: impl Fn(f64) -> Coefficients, best: Best) -> (f64, f64) {
    let spare = |a: f64| {
        let c = at(a);
        c.cl / c.cd - BAND_SHARE * best.lift_to_drag
    };
    (edge(&spare, best.alpha_rad, -0.5 * STEP_RAD), edge(&spare, best.alpha_rad, 0.5 * STEP_RAD))
}

/// The local maximum among the half-degree nodes that counts, as (angle, ratio).
fn highest_node(ratio: &impl Fn(f64) -> f64, end: f64) -> Option<(f64, f64)> {
    const MOST: usize = ((HIGHEST_RAD - LOWEST_RAD) / STEP_RAD) as usize + 3;
    let count = (((end - LOWEST_RAD) / STEP_RAD).ceil() as usize + 1).min(MOST);
    let node = |i: usize| (LOWEST_RAD + STEP_RAD * i as f64).min(end);
    let mut values = [f64::NEG_INFINITY; MOST];
    for (i, value) in values[..count].iter_mut().enumerate() {
        *value = ratio(node(i));
    }
    let peak = |i: usize| {
        values[i] > 0.0
            && (i == 0 || values[i] >= values[i - 1])
            && (i + 1 == count || values[i] >= values[i + 1])
    };
    let beats = |top: Option<(f64, f64)>, v: f64| top.is_none_or(|(_, best)| v * SAME_TOP > best);
    (0..count)
        .filter(|&i| peak(i))
        .fold(None, |top, i| if beats(top, values[i]) { Some((node(i), values[i])) } else { top })
}

fn refined(ratio: &impl Fn(f64) -> f64, mut lo: f64, mut hi: f64) -> (f64, f64) {
    const G: f64 = 0.618_033_988_749_894_9;
    let (mut a, mut b) = (hi - G * (hi - lo), lo + G * (hi - lo));
    let (mut fa, mut fb) = (ratio(a), ratio(b));
    for _ in 0..PASSES {
        if fa >= fb {
            (hi, b, fb) = (b, a, fa);
            a = hi - G * (hi - lo);
            fa = ratio(a);
        } else {
            (lo, a, fa) = (a, b, fb);
            b = lo + G * (hi - lo);
            fb = ratio(b);
        }
    }
    if fa >= fb { (a, fa) } else { (b, fb) }
}

fn edge(spare: &impl Fn(f64) -> f64, from: f64, step: f64) -> f64 {
    let mut a = from;
    while (a - from).abs() < BAND_REACH_RAD {
        if spare(a + step) < 0.0 {
            return bisected(spare, a, a + step);
        }
        a += step;
    }
    a
}

fn bisected(spare: &impl Fn(f64) -> f64, mut inside: f64, mut outside: f64) -> f64 {
    for _ in 0..16 {
        let middle = 0.5 * (inside + outside);
        if spare(middle) >= 0.0 { inside = middle } else { outside = middle }
    }
    inside
}

#[cfg(test)]
mod tests {
    use super::*;

    /// cl = 2π(α + 2°), cd = 0.01 + 0.01 cl²: best at cl = 1, where cl/cd = 50.
    fn parabola(alpha: f64) -> Coefficients {
        let cl = std::f64::consts::TAU * (alpha + 2f64.to_radians());
        Coefficients { cl, cd: 0.01 + 0.01 * cl * cl }
    }

    #[test]
    fn finds_the_closed_form_best_of_a_parabolic_drag() {
        let b = best(parabola, 15f64.to_radians()).unwrap();
        let expected = 1.0 / std::f64::consts::TAU - 2f64.to_radians();
        assert!((b.alpha_rad - expected).to_degrees().abs() < 1e-3);
        assert!((b.lift_to_drag - 50.0).abs() < 1e-6);
    }

    #[test]
    fn the_band_keeps_95_per_cent() {
        // cl/cd = 100 cl/(1 + cl²) = 47.5 at cl = 0.7236 and 1.3820: 0.95 cl² − 2 cl + 0.95 = 0.
        let b = best(parabola, 15f64.to_radians()).unwrap();
        let (lo, hi) = working_band(parabola, b);
        let root = (1.0f64 - 0.95 * 0.95).sqrt();
        for (edge, cl) in [(lo, (1.0 - root) / 0.95), (hi, (1.0 + root) / 0.95)] {
            let expected = cl / std::f64::consts::TAU - 2f64.to_radians();
            assert!((edge - expected).to_degrees().abs() < 1e-3, "{edge} {expected}");
        }
    }

    #[test]
    fn of_two_equal_tops_the_lower_angle_counts() {
        let twin = |a: f64| {
            let d = a.to_degrees();
            let bump = |m: f64, h: f64| h * (-(d - m) * (d - m)).exp();
            Coefficients { cl: bump(3.0, 1.0) + bump(9.0, 1.003), cd: 0.01 }
        };
        let b = best(twin, 15f64.to_radians()).unwrap();
        assert!((b.alpha_rad.to_degrees() - 3.0).abs() < 0.01);
    }

    #[test]
    fn a_section_that_never_lifts_has_no_best() {
        assert!(best(|_| Coefficients { cl: -0.1, cd: 0.01 }, 0.2).is_none());
    }

    /// Lift that rises up to the stall against a drag that does not: the best is at the stall, which lies between
    /// two of the half-degree nodes.
    #[test]
    fn lift_to_drag_that_rises_to_the_stall_is_best_there() {
        let stall = 9.7f64.to_radians();
        let b = best(|a| Coefficients { cl: 5.0 * a, cd: 0.01 }, stall).unwrap();
        assert!((b.alpha_rad - stall).to_degrees().abs() < 2e-3, "{}", b.alpha_rad.to_degrees());
    }

    #[test]
    fn a_band_without_an_edge_reaches_as_far_on_both_sides() {
        let found = Best { alpha_rad: 8f64.to_radians(), lift_to_drag: 50.0 };
        let (lo, hi) = working_band(|_| Coefficients { cl: 0.5, cd: 0.01 }, found);
        // The reach of 20 degrees, met to one step of a quarter degree.
        for reach in [found.alpha_rad - lo, hi - found.alpha_rad] {
            assert!((reach.to_degrees() - 20.0).abs() < 0.3, "{}", reach.to_degrees());
        }
    }
}
