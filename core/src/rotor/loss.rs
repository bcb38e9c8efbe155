//! Prandtl's loss at tip and hub; at the tip, where the job asks for it, Goldstein's (`goldstein`).
//!
//! `F = F_tip F_hub`, each `(2/π) acos(e^−f)` with `f_tip = B/2 (R − r)/(r |sin φ|)` and the choice
//! `f_hub = B/2 (r − rh)/(rh |sin φ|)`. Source: L. Prandtl's appendix to A. Betz, *Schraubenpropeller mit
//! geringstem Energieverlust*, 1919; H. Glauert, *Airplane Propellers*, 1935.

pub mod goldstein;

use std::f64::consts::{FRAC_2_PI, FRAC_PI_2};

/// Below this `e^−f` the arc cosine is its short series.
const SMALL: f64 = 0.1;
/// From this exponent on the loss is nothing within rounding.
const NO_LOSS: f64 = 36.0;

/// Geometry of the loss at one radius: `B/2 (R − r)/r` and `B/2 (r − rh)/rh`.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Ends {
    tip: f64,
    hub: f64,
    /// Goldstein's factor at the tip as a share of Prandtl's.
    exact: Option<goldstein::Share>,
}

impl Ends {
    /// For a radius between hub and tip; without hub loss only the tip counts.
    #[must_use]
    pub fn new(blades: f64, radius_m: f64, tip_radius_m: f64, hub_radius_m: f64, hub_loss: bool) -> Self {
        let tip = 0.5 * blades * (tip_radius_m - radius_m) / radius_m;
        let hub = if hub_loss && hub_radius_m > 0.0 {
            0.5 * blades * (radius_m - hub_radius_m) / hub_radius_m
        } else {
            f64::INFINITY
        };
        Self { tip, hub, exact: None }
    }

    /// The same with Goldstein's factor at the tip, for a number of blades at `r/R`. It is not let above 1,
    /// as it would be beside the axis of few blades at coarse pitch: it knows of no hub.
    #[must_use]
    pub fn exact_at_tip(self, blades: u32, fraction: f64) -> Self {
        Self { exact: Some(goldstein::Share::new(blades, fraction)), ..self }
    }

    /// Whether the load is nothing here by definition.
    #[must_use]
    pub fn bare(&self) -> bool {
        self.tip <= 0.0 || self.hub <= 0.0
    }

    /// The factor F at an inflow angle given by `|sin φ|`.
    #[must_use]
    pub fn factor(&self, sin_phi: f64) -> f64 {
        let tip = one_end(self.tip, sin_phi);
        let tip = self.exact.map_or(tip, |share| (tip * share.at(sin_phi)).min(1.0));
        tip * one_end(self.hub, sin_phi)
    }
}

fn one_end(geometry: f64, sin_phi: f64) -> f64 {
    // As sin φ → 0 the exponent grows without bound and F → 1.
    if geometry >= NO_LOSS * sin_phi {
        return 1.0;
    }
    let e = (-geometry / sin_phi).exp();
    FRAC_2_PI * if e < SMALL { short_arc_cosine(e) } else { e.acos() }
}

/// `π/2 − (e + e³/6 + 3 e⁵/40 + …)`: below [`SMALL`] the next term is below rounding, and this is quicker.
fn short_arc_cosine(e: f64) -> f64 {
    const ARC_SINE: [f64; 6] = [63.0 / 2816.0, 35.0 / 1152.0, 5.0 / 112.0, 3.0 / 40.0, 1.0 / 6.0, 1.0];
    let square = e * e;
    FRAC_PI_2 - e * ARC_SINE.iter().fold(0.0, |sum, term| sum * square + term)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn is_nothing_at_the_ends_and_everything_far_from_them() {
        let tip = Ends::new(2.0, 1.0, 1.0, 0.1, true);
        assert!(tip.bare() && tip.factor(0.3) == 0.0);
        assert!(!Ends::new(2.0, 0.5, 1.0, 0.1, true).bare());
        assert_eq!(Ends::new(2.0, 0.5, 1.0, 0.1, true).factor(1e-9), 1.0);
    }

    #[test]
    fn the_short_series_meets_the_arc_cosine() {
        for x in [0.9, 1.0, 1.1] {
            let sin_phi = 0.1;
            let geometry = x * -SMALL.ln() * sin_phi;
            let exact = FRAC_2_PI * (-geometry / sin_phi).exp().acos();
            assert!((one_end(geometry, sin_phi) - exact).abs() < 1e-15);
        }
    }

    /// `(2/π) acos(e^−f)`, `f = B/2 · distance/(reference · sin φ)` (L. Prandtl 1919, as in H. Glauert, *Airplane
    /// Propellers*, 1935; the form at the hub is common practice).
    fn written_out(blades: f64, distance: f64, reference: f64, sin: f64) -> f64 {
        2.0 / std::f64::consts::PI * (-(blades * distance) / (2.0 * reference * sin)).exp().acos()
    }

    #[test]
    fn prandtls_factor_is_that_of_the_tip_times_that_of_the_hub() {
        let (tip, hub) = (0.76, 0.09);
        for blades in [2.0, 3.0, 6.0] {
            for r in [0.1, 0.13, 0.3, 0.6, 0.74] {
                for sin in [0.05, 0.2, 0.5, 0.95] {
                    let at_tip = written_out(blades, tip - r, r, sin);
                    let at_hub = written_out(blades, r - hub, hub, sin);
                    let both = Ends::new(blades, r, tip, hub, true).factor(sin);
                    assert!((both - at_tip * at_hub).abs() < 1e-14, "{blades} {r} {sin}");
                    for (hub, wanted) in [(hub, false), (0.0, true), (0.0, false)] {
                        let alone = Ends::new(blades, r, tip, hub, wanted);
                        assert!((alone.factor(sin) - at_tip).abs() < 1e-14, "{blades} {r} {sin} {hub}");
                        assert!(!alone.bare());
                    }
                }
            }
        }
    }

    /// Goldstein's factors worked out by `tests/src/goldstein.rs`: (blades, λ, r/R, factor). The last, beside the
    /// axis, is 1.249.
    #[test]
    fn goldsteins_factor_is_that_of_the_tip_and_at_most_one() {
        for (blades, advance, x, exact) in [
            (2, 0.13, 0.85, 0.77258),
            (2, 0.6, 0.65, 0.50382),
            (4, 0.33, 0.75, 0.82840),
            (3, 0.24, 0.13, 1.0),
        ] {
            let (b, sin) = (f64::from(blades), advance / f64::hypot(advance, x));
            let alone = Ends::new(b, x, 1.0, 0.1, false).exact_at_tip(blades, x).factor(sin);
            // The table's cubics leave less than this.
            assert!((alone - exact).abs() < 1e-3, "{blades} {advance} {x} {alone}");
            let both = Ends::new(b, x, 1.0, 0.1, true).exact_at_tip(blades, x).factor(sin);
            assert!((both - alone * written_out(b, x - 0.1, 0.1, sin)).abs() < 1e-14);
        }
    }
}
