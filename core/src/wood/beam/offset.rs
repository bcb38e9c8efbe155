//! A beam whose centroids stand beside the radius through the axis: what centrifugal force does by those
//! offsets.
//!
//! Every piece of the beam is pulled outward along its own radius. With w out of the plane of rotation and u
//! in it (against the turning), equilibrium of the moments about the centroid at r gives what is written at
//! each function (statics; no source needed). A line that leans straight from the axis neither twists nor, in
//! the plane of rotation, bends.

use super::integrate::{bending_n_m, outboard, tension_n};

/// A beam and its offsets.
#[derive(Clone, Copy, Debug)]
pub struct Offset<'a> {
    /// Radii from root to tip, m.
    pub radii_m: &'a [f64],
    /// Mass per metre, kg/m.
    pub mass_kg_m: &'a [f64],
    /// Speed of rotation, rad/s.
    pub rotation_rad_s: f64,
    /// Offset out of the plane of rotation, forward, m.
    pub forward_m: &'a [f64],
    /// Offset in the plane of rotation, against the turning, m.
    pub against_m: &'a [f64],
}

impl Offset<'_> {
    /// Bending moments, N m, that centrifugal force takes off forward and against the turning, at the radii:
    /// `Ω² ∫ m x (w(x) − w(r)) dx` and `Ω² ∫ m (r u(x) − x u(r)) dx` from r to the tip.
    #[must_use]
    pub fn relief_n_m(&self) -> [Vec<f64>; 2] {
        let (r, square) = (self.radii_m, self.rotation_rad_s.powi(2));
        let tension = tension_n(r, self.mass_kg_m, self.rotation_rad_s);
        let forward = tension_n(r, &self.moved(self.forward_m), self.rotation_rad_s);
        let against = outboard(r, &self.moved(self.against_m));
        let each = |of: &dyn Fn(usize) -> f64| (0..r.len()).map(of).collect();
        [
            each(&|i| forward[i] - self.forward_m[i] * tension[i]),
            each(&|i| r[i] * square * against[i] - self.against_m[i] * tension[i]),
        ]
    }

    /// Forces across the line, N, that centrifugal force takes off forward and against the turning: `N w′`
    /// and `N u′ − Ω² ∫ m u dx`.
    #[must_use]
    pub fn relief_n(&self) -> [Vec<f64>; 2] {
        let tension = tension_n(self.radii_m, self.mass_kg_m, self.rotation_rad_s);
        let outward = outboard(self.radii_m, &self.moved(self.against_m));
        let (forward, against) = (self.slope(self.forward_m), self.slope(self.against_m));
        let square = self.rotation_rad_s.powi(2);
        let each = |of: &dyn Fn(usize) -> f64| (0..tension.len()).map(of).collect();
        [each(&|i| tension[i] * forward[i]), each(&|i| tension[i] * against[i] - square * outward[i])]
    }

    /// Twisting moment about the line, N m, towards coarser pitch, at the radii, of loads per metre, N/m,
    /// forward and against the turning and of centrifugal force: the moment of all forces outboard about
    /// the line's tangent, `−∫ (u(x) − u(r)) f dx + ∫ (w(x) − w(r)) (q + Ω² m u) dx + u′ M − w′ Q` with f
    /// and q the loads, M and Q the bending moments.
    #[must_use]
    pub fn twisting_n_m(&self, forward_n_m: &[f64], against_n_m: &[f64]) -> Vec<f64> {
        let (r, square) = (self.radii_m, self.rotation_rad_s.powi(2));
        let (w, u) = (self.forward_m, self.against_m);
        let outward = |i: usize| square * self.mass_kg_m[i] * u[i];
        let in_plane: Vec<f64> = (0..r.len()).map(|i| against_n_m[i] + outward(i)).collect();
        let arm = |load: &[f64], offset: &[f64]| -> Vec<f64> {
            let moved: Vec<f64> = load.iter().zip(offset).map(|(q, o)| q * o).collect();
            let (moment, force) = (outboard(r, &moved), outboard(r, load));
            (0..r.len()).map(|i| moment[i] - offset[i] * force[i]).collect()
        };
        let (by_forward, by_in_plane) = (arm(forward_n_m, u), arm(&in_plane, w));
        let relief = self.relief_n_m();
        let (bend, lag) = (bending_n_m(r, forward_n_m), bending_n_m(r, against_n_m));
        let (lean, sweep) = (self.slope(w), self.slope(u));
        let twisting = |i: usize| {
            let along = sweep[i] * (bend[i] - relief[0][i]) - lean[i] * (lag[i] - relief[1][i]);
            by_in_plane[i] - by_forward[i] + along
        };
        (0..r.len()).map(twisting).collect()
    }

    /// Whether there is no offset at all.
    #[must_use]
    pub fn is_none(&self) -> bool {
        self.forward_m.iter().chain(self.against_m).all(|v| *v == 0.0)
    }

    fn moved(&self, offset_m: &[f64]) -> Vec<f64> {
        self.mass_kg_m.iter().zip(offset_m).map(|(m, o)| m * o).collect()
    }

    /// Slope of an offset at the radii.
    fn slope(&self, offset_m: &[f64]) -> Vec<f64> {
        let (r, last) = (self.radii_m, self.radii_m.len() - 1);
        let between = |a: usize, b: usize| (offset_m[b] - offset_m[a]) / (r[b] - r[a]);
        if last < 2 {
            return vec![between(0, last); last + 1];
        }
        // Of the parabola through three neighbours.
        let slope = |i: usize| {
            let m = i.clamp(1, last - 1);
            let (before, after) = (between(m - 1, m), between(m, m + 1));
            let bend = (after - before) / (r[m + 1] - r[m - 1]);
            before + bend * (2.0 * r[i] - r[m - 1] - r[m])
        };
        (0..=last).map(slope).collect()
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    const N: usize = 401;
    const ROOT: f64 = 0.2;
    const TIP: f64 = 1.2;

    fn radii() -> Vec<f64> {
        (0..N).map(|i| ROOT + (TIP - ROOT) * i as f64 / (N - 1) as f64).collect()
    }

    fn near(what: &str, got: f64, expected: f64, abs: f64) {
        assert!((got - expected).abs() <= abs, "{what}: {got}, expected {expected}");
    }

    fn offset<'a>(r: &'a [f64], m: &'a [f64], w: &'a [f64], u: &'a [f64]) -> Offset<'a> {
        Offset { radii_m: r, mass_kg_m: m, rotation_rad_s: 10.0, forward_m: w, against_m: u }
    }

    /// Closed forms of an even beam of mass m. Leaning straight, `w = λ x`: `λ Ω² m ∫ x (x − r) dx`. Curved,
    /// `w = k (x − a)²`: `Ω² m k ∫ x ((x − a)² − (r − a)²) dx`. Standing aside by c: in the plane of
    /// rotation `−Ω² m c (R − r)²/2`.
    #[test]
    fn relief_of_an_even_beam_is_that_of_the_closed_forms() {
        let (r, m, none) = (radii(), vec![2.0; N], vec![0.0; N]);
        let (lean, bow, aside) = (0.03, 0.05, 0.01);
        let straight: Vec<f64> = r.iter().map(|x| lean * x).collect();
        let bowed: Vec<f64> = r.iter().map(|x| bow * (x - ROOT).powi(2)).collect();
        let stands = vec![aside; N];
        let (straight, bowed) = (offset(&r, &m, &straight, &none), offset(&r, &m, &bowed, &stands));
        let power = |p: i32, x: f64| (TIP.powi(p) - x.powi(p)) / f64::from(p);
        for i in [0, 100, 250, 400] {
            let x = r[i];
            let closed = 200.0 * lean * (power(3, x) - x * power(2, x));
            near("leaning", straight.relief_n_m()[0][i], closed, 1e-4);
            let (a, d) = (ROOT, (x - ROOT).powi(2));
            let closed = 200.0 * bow * (power(4, x) - 2.0 * a * power(3, x) + (a * a - d) * power(2, x));
            near("bowed", bowed.relief_n_m()[0][i], closed, 1e-4);
            near("aside", bowed.relief_n_m()[1][i], -100.0 * aside * (TIP - x).powi(2), 1e-9);
            let tension = 100.0 * (TIP * TIP - x * x);
            near("force", straight.relief_n()[0][i], lean * tension, 1e-9);
        }
    }

    /// A straight line through the axis is a radius like any other.
    #[test]
    fn a_line_straight_from_the_axis_neither_twists_nor_bends_in_the_plane() {
        let (r, m) = (radii(), vec![2.0; N]);
        let line = |slope: f64| -> Vec<f64> { r.iter().map(|x| slope * x).collect() };
        let (w, u, none) = (line(0.04), line(-0.07), vec![0.0; N]);
        let (f, q) = (vec![50.0; N], vec![9.0; N]);
        let swept = offset(&r, &m, &none, &u);
        let leaning = offset(&r, &m, &w, &none);
        let all_none =
            |what: &str, all: Vec<f64>, abs: f64| all.into_iter().for_each(|v| near(what, v, 0.0, abs));
        all_none("bending", swept.relief_n_m()[1].clone(), 1e-4);
        all_none("force", swept.relief_n()[1].clone(), 1e-9);
        all_none("swept", swept.twisting_n_m(&f, &q), 1e-4);
        all_none("leaning", leaning.twisting_n_m(&f, &q), 1e-4);
    }

    /// A tip that is swept back turns finer under thrust: lift behind the line lowers the leading edge. Even
    /// load f, `u = k (x − r0)²` at the root: `−f k L³/3`.
    #[test]
    fn lift_on_a_swept_tip_turns_the_blade_finer() {
        let (r, m, none) = (radii(), vec![0.0; N], vec![0.0; N]);
        let u: Vec<f64> = r.iter().map(|x| 0.06 * (x - ROOT).powi(2)).collect();
        let twisting = offset(&r, &m, &none, &u).twisting_n_m(&vec![30.0; N], &none);
        near("root", twisting[0], -30.0 * 0.06 / 3.0, 1e-3);
    }
}
