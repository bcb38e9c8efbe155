//! Integrals along the beam, exact for figures that run straight between the radii.

/// `∫ q dx` over the whole beam.
#[must_use]
pub fn total(radii_m: &[f64], q: &[f64]) -> f64 {
    spans(radii_m, q).map(|s| s.moment(0)).sum()
}

/// `∫ q x dx` over the whole beam.
#[must_use]
pub fn first_moment(radii_m: &[f64], q: &[f64]) -> f64 {
    spans(radii_m, q).map(|s| s.moment(1)).sum()
}

/// `∫ q x² dx` over the whole beam.
#[must_use]
pub fn second_moment(radii_m: &[f64], q: &[f64]) -> f64 {
    spans(radii_m, q).map(|s| s.moment(2)).sum()
}

/// `∫_r^R q dx` at each radius.
#[must_use]
pub fn outboard(radii_m: &[f64], q: &[f64]) -> Vec<f64> {
    let mut sum = 0.0;
    let mut at = vec![0.0; radii_m.len()];
    for (i, span) in spans(radii_m, q).enumerate().collect::<Vec<_>>().into_iter().rev() {
        sum += span.moment(0);
        at[i] = sum;
    }
    at
}

/// Tension `N(r) = Ω² ∫_r^R m x dx`, N, at each radius, of a mass per metre `m`, kg/m, that turns at Ω,
/// rad/s.
#[must_use]
pub fn tension_n(radii_m: &[f64], mass_kg_m: &[f64], rotation_rad_s: f64) -> Vec<f64> {
    let mut sum = 0.0;
    let mut outboard = vec![0.0; radii_m.len()];
    for (i, span) in spans(radii_m, mass_kg_m).enumerate().collect::<Vec<_>>().into_iter().rev() {
        sum += span.moment(1);
        outboard[i] = rotation_rad_s.powi(2) * sum;
    }
    outboard
}

/// Bending moment `M(r) = ∫_r^R q (x − r) dx`, N m, at each radius, of a load per metre `q`, N/m, across the
/// beam.
#[must_use]
pub fn bending_n_m(radii_m: &[f64], load_n_m: &[f64]) -> Vec<f64> {
    let (mut force, mut moment) = (0.0, 0.0);
    let mut at = vec![0.0; radii_m.len()];
    for (i, span) in spans(radii_m, load_n_m).enumerate().collect::<Vec<_>>().into_iter().rev() {
        let own = span.moment(0);
        moment += force * span.width() + span.moment(1) - own * span.from;
        force += own;
        at[i] = moment;
    }
    at
}

/// A straight piece of a figure.
#[derive(Clone, Copy)]
struct Span {
    from: f64,
    to: f64,
    q: [f64; 2],
}

impl Span {
    fn width(&self) -> f64 {
        self.to - self.from
    }

    /// `∫ q x^k dx` over the piece, k up to 2, by Gauss and Legendre's two points, which is exact for cubics.
    fn moment(&self, k: i32) -> f64 {
        let (middle, half) = (0.5 * (self.from + self.to), 0.5 * self.width());
        let at = |t: f64| {
            let q = self.q[0] + (self.q[1] - self.q[0]) * 0.5 * (1.0 + t);
            q * (middle + half * t).powi(k)
        };
        let t = (1.0_f64 / 3.0).sqrt();
        half * (at(-t) + at(t))
    }
}

fn spans<'a>(radii_m: &'a [f64], q: &'a [f64]) -> impl Iterator<Item = Span> + 'a {
    radii_m.windows(2).zip(q.windows(2)).map(|(r, q)| Span { from: r[0], to: r[1], q: [q[0], q[1]] })
}
