//! Goldstein's exact circulation of a lightly loaded propeller with least induced loss, by solving the
//! potential problem anew.
//!
//! S. Goldstein, *On the Vortex Theory of Screw Propellers*, Proc. Roy. Soc. A 123, 1929: rigid helical
//! sheets move back with w. With `μ = Ω r/V`, ζ the angle round the axis from one sheet and φ in `V w/Ω`
//! the flow about them is `(μ ∂/∂μ)² φ + (1 + μ²) ∂²φ/∂ζ² = 0`, on a sheet `∂φ/∂ζ = −μ²/(1 + μ²)`, beyond
//! its edge and half way to the next sheet `φ = 0`. The circulation is the jump across the sheet:
//! `B Γ Ω/(2π V w) = B φ(μ, 0)/π`.
//!
//! Here in `s = ln μ`, where it is `φ_ss + (1 + e^2s) φ_ζζ = 0`, by finite volumes. Nodes stand closer
//! towards the edge of the sheet with the square of their number in both directions, so that the root of
//! the distance from the edge becomes a smooth function and the error falls with the square of the width;
//! two grids then give the limit (L. F. Richardson, 1911).

use std::f64::consts::PI;

use spokeshave::curve::Curve;

/// Nodes from the axis to the edge on the coarse grid; half as many beyond it and across.
const COARSE: usize = 48;
/// Where the grid ends, in `ln μ` from the edge.
const INWARD: f64 = 7.0;
const OUTWARD: f64 = 2.5;

/// Goldstein's factor over the radius: circulation over that of infinitely many blades,
/// `B Γ Ω/(2π V w) · (1 + μ²)/μ²`.
#[derive(Clone, Debug)]
pub struct Goldstein {
    advance: f64,
    coarse: Sheet,
    fine: Sheet,
}

impl Goldstein {
    /// For so many blades and an advance ratio of the wake `λ = V/(Ω R)`.
    ///
    /// # Panics
    /// Never: the equations have a solution.
    #[must_use]
    pub fn new(blades: u32, advance: f64) -> Self {
        Self::on_grid(blades, advance, COARSE)
    }

    /// The same with so many nodes from the axis to the edge on the coarse of the two grids.
    ///
    /// # Panics
    /// Never: the equations have a solution.
    #[must_use]
    pub fn on_grid(blades: u32, advance: f64, nodes: usize) -> Self {
        let [coarse, fine] = [nodes, 2 * nodes].map(|n| Sheet::new(f64::from(blades), advance, n));
        Self { advance, coarse, fine }
    }

    /// The factor at a fraction of the radius.
    #[must_use]
    pub fn factor(&self, fraction: f64) -> f64 {
        let (coarse, fine) = (self.coarse.at(fraction), self.fine.at(fraction));
        let mu = fraction / self.advance;
        (fine + (fine - coarse) / 3.0) * (1.0 + mu * mu) / (mu * mu)
    }

    /// By how much the two grids differ there: three times what is left of the error, at most.
    #[must_use]
    pub fn doubt(&self, fraction: f64) -> f64 {
        (self.fine.at(fraction) - self.coarse.at(fraction)).abs()
    }
}

/// `B φ(μ, 0)/π` on the sheet, from one grid: over the root of the distance from the edge it is nearly
/// straight.
#[derive(Clone, Debug)]
struct Sheet(Curve);

impl Sheet {
    fn at(&self, fraction: f64) -> f64 {
        let t = (-fraction.ln() / INWARD).sqrt();
        self.0.at(t)
    }

    fn new(blades: f64, advance: f64, inside: usize) -> Self {
        let grid = Grid::new(blades, advance, inside);
        let phi = grid.solve();
        let t = (0..=inside).map(|i| i as f64 / inside as f64).collect();
        let on_sheet = (0..=inside).map(|i| phi[grid.node(inside - i, 0)] * blades / PI).collect();
        Self(Curve::new(t, on_sheet).expect("rising places"))
    }
}

/// Nodes in `s` (rows) and ζ (columns).
struct Grid {
    s: Vec<f64>,
    zeta: Vec<f64>,
    /// The row of the sheet's edge.
    edge: usize,
}

impl Grid {
    fn new(blades: f64, advance: f64, inside: usize) -> Self {
        let (tip, half) = (-advance.ln(), inside / 2);
        let square = |i: usize, n: usize| (i as f64 / n as f64).powi(2);
        let inward = (0..=inside).rev().map(|i| tip - INWARD * square(i, inside));
        let outward = (1..=half).map(|i| tip + OUTWARD * square(i, half));
        let zeta = (0..=half).map(|j| PI / blades * square(j, half)).collect();
        Self { s: inward.chain(outward).collect(), zeta, edge: inside }
    }

    fn node(&self, row: usize, column: usize) -> usize {
        row * self.zeta.len() + column
    }

    /// Whether the potential is nothing there: axis, far field, half way to the next sheet, beyond the edge.
    fn held(&self, row: usize, column: usize) -> bool {
        let far = row == 0 || row + 1 == self.s.len() || column + 1 == self.zeta.len();
        far || (column == 0 && row >= self.edge)
    }

    /// Half the distance between the neighbours of a node: the width of its cell.
    fn width(places: &[f64], i: usize) -> f64 {
        0.5 * (places[(i + 1).min(places.len() - 1)] - places[i.saturating_sub(1)])
    }

    /// Balances of flux over the cells, as a symmetric band from the diagonal on, and the flux through the
    /// sheet.
    fn balances(&self) -> (Vec<Vec<f64>>, Vec<f64>) {
        let (rows, columns) = (self.s.len(), self.zeta.len());
        let mut band = vec![vec![0.0; columns + 1]; rows * columns];
        let mut right = vec![0.0; rows * columns];
        // What flows between two neighbours; the potential of one that is held is nothing.
        let mut join = |a: usize, b: usize, free: bool, flux: f64| {
            band[a][0] += flux;
            band[b][0] += flux;
            if free {
                band[a][b - a] -= flux;
            }
        };
        for i in 0..rows {
            for j in 0..columns {
                let free = |row, column| !self.held(i, j) && !self.held(row, column);
                if i + 1 < rows {
                    let flux = Self::width(&self.zeta, j) / (self.s[i + 1] - self.s[i]);
                    join(self.node(i, j), self.node(i + 1, j), free(i + 1, j), flux);
                }
                if j + 1 < columns {
                    let stretch = 1.0 + (2.0 * self.s[i]).exp();
                    let flux = stretch * Self::width(&self.s, i) / (self.zeta[j + 1] - self.zeta[j]);
                    join(self.node(i, j), self.node(i, j + 1), free(i, j + 1), flux);
                }
            }
        }
        for i in (0..self.edge).filter(|i| !self.held(*i, 0)) {
            right[self.node(i, 0)] = (2.0 * self.s[i]).exp() * Self::width(&self.s, i);
        }
        (band, right)
    }

    /// The potential at every node, by Cholesky's factors of the band.
    fn solve(&self) -> Vec<f64> {
        let (mut band, mut x) = self.balances();
        let (n, wide) = (x.len(), self.zeta.len());
        for k in 0..n {
            let pivot = band[k].clone();
            for i in 1..=wide.min(n - 1 - k) {
                let share = pivot[i] / pivot[0];
                if share != 0.0 {
                    for j in i..=wide {
                        band[k + i][j - i] -= share * pivot[j];
                    }
                    x[k + i] -= share * x[k];
                }
            }
        }
        for k in (0..n).rev() {
            let later: f64 = (1..=wide.min(n - 1 - k)).map(|i| band[k][i] * x[k + i]).sum();
            x[k] = (x[k] - later) / band[k][0];
        }
        x
    }
}
