//! Goldstein's exact loss at the tip, as a share of Prandtl's.
//!
//! S. Goldstein, *On the Vortex Theory of Screw Propellers*, Proc. Roy. Soc. A 123, 1929: the circulation of
//! a lightly loaded propeller whose wake is rigid helical sheets. Prandtl takes the sheets for flat ones,
//! which is true for fine pitch or many blades; elsewhere his factor is too large. The share is tabulated
//! (`table`, made by `cargo run --release -p spokeshave-tests --bin goldstein`) over the number of blades,
//! the pitch of the wake `λ = r/R tan φ` of the station and the place on the blade, and led over by cubics
//! (Catmull, Rom 1974).

mod table;

use table::SHARES;

/// Finest pitch of the wake in the table; two columns on it is twice as coarse.
pub const FINEST: f64 = 0.025;
/// Columns of the table: pitches of the wake.
pub const PITCHES: usize = 13;
/// Rows of the table: places `r/R` = 1, 0.9, 0.8, …, 0.1.
pub const PLACES: usize = 10;
/// Most blades in the table; more are taken as so many.
pub const MOST_BLADES: usize = 12;

/// The share at one place on a blade, at every pitch of the table.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Share {
    fraction: f64,
    at: [f64; PITCHES],
}

impl Share {
    /// For a number of blades at `r/R`; further in than 0.1 R it is held, for there the hub is.
    pub(super) fn new(blades: u32, fraction: f64) -> Self {
        let of_blades = &SHARES[(blades as usize).clamp(1, MOST_BLADES) - 1];
        let place = 10.0 * (1.0 - fraction);
        let at = std::array::from_fn(|k| led_over(&of_blades.map(|row| 1e-4 * f64::from(row[k])), place));
        Self { fraction, at }
    }

    /// The share at an inflow angle given by `|sin φ|`; coarser pitch than the table's is taken as its
    /// coarsest.
    pub(super) fn at(&self, sin_phi: f64) -> f64 {
        let pitch = self.fraction * sin_phi / (1.0 - sin_phi * sin_phi).max(f64::MIN_POSITIVE).sqrt();
        if pitch < FINEST {
            // No loss but Prandtl's where the sheets lie close.
            return 1.0 + (self.at[0] - 1.0) * pitch / FINEST;
        }
        led_over(&self.at, 2.0 * (pitch / FINEST).log2())
    }
}

/// A cubic between two nodes 0, 1, 2, … that has at each the slope of its neighbours; held beyond the last.
fn led_over<const N: usize>(nodes: &[f64; N], place: f64) -> f64 {
    let place = place.clamp(0.0, (N - 1) as f64);
    let i = (place as usize).min(N - 2);
    let t = place - i as f64;
    let [b, c] = [nodes[i], nodes[i + 1]];
    // Beyond the ends the line goes on as it came.
    let a = if i > 0 { nodes[i - 1] } else { 2.0 * b - c };
    let d = if i + 2 < N { nodes[i + 2] } else { 2.0 * c - b };
    b + 0.5 * t * (c - a + t * (2.0 * a - 5.0 * b + 4.0 * c - d + t * (3.0 * (b - c) + d - a)))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_cubic_meets_its_nodes_and_a_parabola() {
        let nodes = [0.0, 1.0, 4.0, 9.0, 16.0];
        assert_eq!(led_over(&nodes, 3.0), 9.0);
        assert!((led_over(&nodes, 1.5) - 2.25).abs() < 1e-12);
        assert_eq!([led_over(&nodes, -1.0), led_over(&nodes, 9.0)], [0.0, 16.0]);
    }

    #[test]
    fn fine_pitch_and_many_blades_leave_prandtls_factor() {
        assert_eq!(Share::new(2, 0.7).at(0.0), 1.0);
        assert!((Share::new(12, 0.5).at(0.1) - 1.0).abs() < 1e-3);
        assert!(Share::new(2, 0.7).at(0.3) < 0.95);
        assert!(Share::new(2, 0.7).at(1.0).is_finite());
    }

    /// Goldstein's factor over Prandtl's, both worked out anew away from the nodes of the table: the one by
    /// `tests/src/goldstein.rs` on 64 and 128 nodes. (blades, λ, r/R, share, what the leading over leaves.)
    #[test]
    fn away_from_the_nodes_the_share_is_the_exact_one() {
        for (blades, advance, x, share, within) in [
            (2, 0.13, 0.85, 0.96751, 1e-3),
            (2, 0.13, 0.93, 0.95879, 1e-3),
            (3, 0.30, 0.55, 0.93264, 1e-3),
            (4, 0.33, 0.75, 0.94390, 1e-3),
            (2, 0.27, 0.70, 0.88154, 1e-3),
            (2, 0.60, 0.65, 0.71835, 1e-3),
            (6, 0.50, 0.45, 0.99310, 1e-3),
            // Finer than the table: a straight line to 1, from which the share itself bends off.
            (1, 0.02, 0.95, 0.99220, 2e-3),
            (1, 0.0125, 0.95, 0.99693, 4e-3),
        ] {
            let found = Share::new(blades, x).at(advance / f64::hypot(advance, x));
            assert!((found - share).abs() < within, "{blades} {advance} {x} {found} {share}");
        }
    }

    /// Hermite's cubic with the slopes of the neighbours, at the ends of the one neighbour.
    #[test]
    fn the_cubic_is_hermites_in_the_middle_and_at_both_ends() {
        let nodes = [1.0, 3.0, 2.0, 5.0, 4.5];
        let slopes = [2.0, 0.5, 1.0, 1.25, -0.5];
        for i in 0..4 {
            for t in [0.0, 0.2, 0.5, 0.9] {
                let (s, u) = (1.0 - t, t * t);
                let wanted = (1.0 + 2.0 * t) * s * s * nodes[i]
                    + t * s * s * slopes[i]
                    + u * (3.0 - 2.0 * t) * nodes[i + 1]
                    - u * s * slopes[i + 1];
                let found = led_over(&nodes, i as f64 + t);
                assert!((found - wanted).abs() < 1e-12, "{i} {t} {found} {wanted}");
            }
        }
    }
}
