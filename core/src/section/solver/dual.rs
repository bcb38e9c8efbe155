//! Numbers that carry their derivatives: forward differentiation with a fixed count of variables.
//!
//! The equations of the boundary layer are written once on [`Dual`]; with no variables it is a plain number.

use std::ops::{Add, Div, Mul, Neg, Sub};

/// A value and its derivatives with respect to `K` variables.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Dual<const K: usize> {
    pub(super) v: f64,
    pub(super) d: [f64; K],
}

impl<const K: usize> Dual<K> {
    /// A value that depends on nothing.
    pub(super) fn constant(v: f64) -> Self {
        Self { v, d: [0.0; K] }
    }

    /// Variable number `k`.
    pub(super) fn variable(v: f64, k: usize) -> Self {
        let mut d = [0.0; K];
        d[k] = 1.0;
        Self { v, d }
    }

    /// A function value with its derivative with respect to this number.
    #[inline]
    fn chain(self, v: f64, slope: f64) -> Self {
        Self { v, d: self.d.map(|d| slope * d) }
    }

    pub(super) fn recip(self) -> Self {
        let v = 1.0 / self.v;
        self.chain(v, -v * v)
    }

    pub(super) fn ln(self) -> Self {
        self.chain(self.v.ln(), 1.0 / self.v)
    }

    pub(super) fn exp(self) -> Self {
        let v = self.v.exp();
        self.chain(v, v)
    }

    pub(super) fn sqrt(self) -> Self {
        let v = self.v.sqrt();
        self.chain(v, 0.5 / v)
    }

    pub(super) fn square(self) -> Self {
        self.chain(self.v * self.v, 2.0 * self.v)
    }

    pub(super) fn cube(self) -> Self {
        self.chain(self.v * self.v * self.v, 3.0 * self.v * self.v)
    }

    pub(super) fn powf(self, p: f64) -> Self {
        let low = self.v.powf(p - 1.0);
        self.chain(low * self.v, p * low)
    }

    pub(super) fn tanh(self) -> Self {
        let v = self.v.tanh();
        self.chain(v, 1.0 - v * v)
    }

    /// The larger of two; the derivative is that of the larger.
    pub(super) fn max(self, other: Self) -> Self {
        if self.v >= other.v { self } else { other }
    }

    /// The smaller of two.
    pub(super) fn min(self, other: Self) -> Self {
        if self.v <= other.v { self } else { other }
    }

    /// Not below `least`.
    pub(super) fn floor_at(self, least: f64) -> Self {
        if self.v >= least { self } else { Self::constant(least) }
    }
}

macro_rules! operator {
    ($name:ident, $call:ident, |$a:ident, $b:ident| $value:expr, $da:expr, $db:expr) => {
        impl<const K: usize> $name for Dual<K> {
            type Output = Self;
            #[inline]
            fn $call(self, other: Self) -> Self {
                let ($a, $b) = (self.v, other.v);
                let (da, db): (f64, f64) = ($da, $db);
                let mut d = [0.0; K];
                for k in 0..K {
                    d[k] = da * self.d[k] + db * other.d[k];
                }
                Self { v: $value, d }
            }
        }
        impl<const K: usize> $name<f64> for Dual<K> {
            type Output = Self;
            #[inline]
            fn $call(self, other: f64) -> Self {
                let ($a, $b) = (self.v, other);
                let _ = $b;
                self.chain($value, $da)
            }
        }
        impl<const K: usize> $name<Dual<K>> for f64 {
            type Output = Dual<K>;
            #[inline]
            fn $call(self, other: Dual<K>) -> Dual<K> {
                let ($a, $b) = (self, other.v);
                let _ = $a;
                other.chain($value, $db)
            }
        }
    };
}

operator!(Add, add, |a, b| a + b, 1.0, 1.0);
operator!(Sub, sub, |a, b| a - b, 1.0, -1.0);
operator!(Mul, mul, |a, b| a * b, b, a);
operator!(Div, div, |a, b| a / b, 1.0 / b, -a / (b * b));

impl<const K: usize> Neg for Dual<K> {
    type Output = Self;
    fn neg(self) -> Self {
        self.chain(-self.v, -1.0)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn derivatives_agree_with_differences() {
        let f = |x: Dual<2>, y: Dual<2>| {
            (x * y).ln() / (2.0 - y) + (x.square() - 3.0 * y).tanh() - x.powf(1.7) * y.sqrt().exp()
                + y.cube().recip()
        };
        let (x, y, h) = (1.3, 0.8, 1e-6);
        let both = f(Dual::variable(x, 0), Dual::variable(y, 1));
        let at = |x: f64, y: f64| f(Dual::constant(x), Dual::constant(y)).v;
        assert!((both.d[0] - (at(x + h, y) - at(x - h, y)) / (2.0 * h)).abs() < 1e-7);
        assert!((both.d[1] - (at(x, y + h) - at(x, y - h)) / (2.0 * h)).abs() < 1e-7);
    }
}
