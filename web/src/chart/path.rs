//! SVG path data, to a tenth of a pixel and no longer than needed.

use std::fmt::Write;

/// Path data being written.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Path {
    data: String,
}

impl Path {
    /// Starts a new piece.
    pub fn move_to(&mut self, at: [f64; 2]) {
        self.data.push('M');
        self.point(at);
    }

    /// A straight line.
    pub fn line_to(&mut self, at: [f64; 2]) {
        self.data.push('L');
        self.point(at);
    }

    /// A circular arc of radius `r`, the short way; `clockwise` as seen on the screen.
    pub fn arc_to(&mut self, r: f64, clockwise: bool, at: [f64; 2]) {
        self.data.push('A');
        self.point([r, r]);
        self.data.push_str(if clockwise { " 0 0 1 " } else { " 0 0 0 " });
        self.point(at);
    }

    /// A cubic curve by its two handles and its end.
    pub fn curve_to(&mut self, handles: [[f64; 2]; 2], at: [f64; 2]) {
        self.data.push('C');
        for (i, p) in [handles[0], handles[1], at].into_iter().enumerate() {
            if i > 0 {
                self.data.push(' ');
            }
            self.point(p);
        }
    }

    /// Back to the start of the piece.
    pub fn close(&mut self) {
        self.data.push('Z');
    }

    /// A run of points as one open piece; a point that is not finite ends it and the next one starts another.
    pub fn run(&mut self, points: impl IntoIterator<Item = [f64; 2]>) {
        let mut down = false;
        for point in points {
            if !(point[0].is_finite() && point[1].is_finite()) {
                down = false;
            } else if down {
                self.line_to(point);
            } else {
                self.move_to(point);
                down = true;
            }
        }
    }

    /// The data.
    #[must_use]
    pub fn into_string(self) -> String {
        self.data
    }

    fn point(&mut self, [x, y]: [f64; 2]) {
        self.number(x);
        self.data.push(' ');
        self.number(y);
    }

    fn number(&mut self, value: f64) {
        let tenths = (value * 10.0).round() as i64;
        if tenths < 0 {
            self.data.push('-');
        }
        let (whole, tenth) = (tenths.unsigned_abs() / 10, tenths.unsigned_abs() % 10);
        let written =
            if tenth == 0 { write!(self.data, "{whole}") } else { write!(self.data, "{whole}.{tenth}") };
        debug_assert!(written.is_ok(), "writing to a string does not fail");
    }
}

/// An open line through points.
#[must_use]
pub fn polyline(points: impl IntoIterator<Item = [f64; 2]>) -> String {
    let mut path = Path::default();
    path.run(points);
    path.into_string()
}

/// A closed shape through points.
#[must_use]
pub fn polygon(points: impl IntoIterator<Item = [f64; 2]>) -> String {
    let mut path = Path::default();
    path.run(points);
    path.close();
    path.into_string()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn are_short() {
        assert_eq!(polygon([[0.04, -0.26], [10.0, 3.16], [-12.0, 0.0]]), "M0 -0.3L10 3.2L-12 0Z");
    }

    #[test]
    fn break_where_a_figure_is_missing() {
        assert_eq!(polyline([[0.0, 0.0], [1.0, 1.0], [2.0, f64::NAN], [3.0, 1.0]]), "M0 0L1 1M3 1");
    }

    #[test]
    fn hold_arcs_and_curves() {
        let mut path = Path::default();
        path.move_to([0.0, 0.0]);
        path.arc_to(2.5, true, [5.0, 0.0]);
        path.curve_to([[1.0, 2.0], [3.0, 4.0]], [5.0, 6.0]);
        assert_eq!(path.into_string(), "M0 0A2.5 2.5 0 0 1 5 0C1 2 3 4 5 6");
    }
}
