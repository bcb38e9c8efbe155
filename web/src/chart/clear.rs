//! Finding clear places for labels inside a frame.

/// What is taken inside a frame.
#[derive(Clone, Debug, PartialEq)]
pub struct Clear {
    /// Left, right, top, low, pixels.
    frame: [f64; 4],
    /// Pixels of upright lines.
    uprights: Vec<f64>,
    /// Middles and half sizes of what has been placed.
    boxes: Vec<[f64; 4]>,
    /// Points of curves.
    points: Vec<[f64; 2]>,
}

impl Clear {
    /// An empty frame: left, right, top, low.
    #[must_use]
    pub fn new(frame: [f64; 4]) -> Self {
        Self { frame, uprights: Vec::new(), boxes: Vec::new(), points: Vec::new() }
    }

    /// Keeps labels off upright lines.
    pub fn keep_off_uprights(&mut self, at: impl IntoIterator<Item = f64>) {
        self.uprights.extend(at);
    }

    /// Keeps labels off the points of a curve.
    pub fn keep_off_points(&mut self, at: impl IntoIterator<Item = [f64; 2]>) {
        self.points.extend(at);
    }

    /// Takes a box by its middle and half size.
    pub fn take(&mut self, at: [f64; 2], half: [f64; 2]) {
        self.boxes.push([at[0], at[1], half[0], half[1]]);
    }

    /// Pixels between a box and the nearest thing or edge, negative where they overlap, at most `enough`.
    #[must_use]
    pub fn room(&self, at: [f64; 2], half: [f64; 2], enough: f64) -> f64 {
        let [left, right, top, low] = self.frame;
        let edges =
            [at[0] - left - half[0], right - at[0] - half[0], at[1] - top - half[1], low - at[1] - half[1]];
        let uprights = self.uprights.iter().map(|x| (at[0] - x).abs() - half[0]);
        let boxes = self.boxes.iter().map(|b| apart([b[0], b[1]], [b[2] + half[0], b[3] + half[1]], at));
        let points = self.points.iter().map(|p| apart(*p, half, at));
        edges.into_iter().chain(uprights).chain(boxes).chain(points).fold(enough, f64::min)
    }
}

/// How far `at` lies outside a box about `middle`, along the axis where it is further.
fn apart(middle: [f64; 2], half: [f64; 2], at: [f64; 2]) -> f64 {
    let (dx, dy) = ((at[0] - middle[0]).abs() - half[0], (at[1] - middle[1]).abs() - half[1]);
    dx.max(dy)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn room_is_the_least_distance() {
        let mut clear = Clear::new([0.0, 200.0, 0.0, 100.0]);
        assert_eq!(clear.room([100.0, 50.0], [10.0, 10.0], 99.0), 40.0, "to the frame's upper edge");
        clear.take([130.0, 50.0], [5.0, 5.0]);
        assert_eq!(clear.room([100.0, 50.0], [10.0, 10.0], 99.0), 15.0);
        clear.keep_off_points([[100.0, 65.0]]);
        assert_eq!(clear.room([100.0, 50.0], [10.0, 10.0], 99.0), 5.0);
        clear.keep_off_uprights([95.0]);
        assert_eq!(clear.room([100.0, 50.0], [10.0, 10.0], 99.0), -5.0);
        assert_eq!(clear.room([20.0, 20.0], [1.0, 1.0], 4.0), 4.0, "no more than enough");
    }
}
