//! Checks of a list of points, and the turn into the frame of the chord line.

use super::error::{OutlineError, Place};
use super::spline::turn_rad;

/// Fewest points that draw a section.
pub const MIN_POINTS: usize = 15;
/// Most points of one outline.
pub const MAX_POINTS: usize = 2000;
/// Widest open trailing edge, chords.
const MAX_GAP: f64 = 0.06;
/// Largest turn at a point away from the nose, degrees.
const MAX_TURN_DEG: f64 = 75.0;
/// Steepest chord line in the list's own axes, degrees: nobody draws a section steeper, but one with its columns
/// exchanged stands upright.
const MAX_SLOPE_DEG: f64 = 60.0;
/// Part of the chord from the nose within which any turn is allowed, for sharp noses.
const NOSE_PART: f64 = 0.03;
/// Least and largest thickness ratio of an outline.
pub(crate) const THICKNESS: [f64; 2] = [0.01, 0.6];

/// Points in the chord-line frame with what was done to bring them there.
#[derive(Debug, Clone, PartialEq)]
pub(crate) struct Framed {
    /// Upper trailing edge, nose, lower trailing edge; chord 1.
    pub(crate) points: Vec<[f64; 2]>,
    /// Turn of the chord line from the axis of the list, radians, nose up positive.
    pub(crate) rotation_rad: f64,
    /// Index of the nose, the point farthest from the middle of the trailing edge.
    pub(crate) nose: usize,
}

/// Checks a list and turns it into the chord-line frame.
///
/// # Errors
/// Every kind of [`OutlineError`] that concerns points.
pub(crate) fn frame(points: &[[f64; 2]], places: &[Place]) -> Result<Framed, OutlineError> {
    count(points)?;
    range(points, places)?;
    repeats(points, places)?;
    let mut framed = to_chord(points);
    gap(&framed)?;
    let reversed = signed_area(&framed.points) < 0.0;
    let mut places = places.to_vec();
    if reversed {
        framed.points.reverse();
        places.reverse();
        framed.nose = framed.points.len() - 1 - framed.nose;
    }
    spikes(&framed, &places)?;
    crossings(&framed.points, &places)?;
    upright(&framed)?;
    Ok(framed)
}

fn count(points: &[[f64; 2]]) -> Result<(), OutlineError> {
    match points.len() {
        found if found < MIN_POINTS => Err(OutlineError::TooFew { found }),
        found if found > MAX_POINTS => Err(OutlineError::TooMany { found }),
        _ => Ok(()),
    }
}

fn range(points: &[[f64; 2]], places: &[Place]) -> Result<(), OutlineError> {
    let bad = |v: f64| !v.is_finite() || v.abs() > 1e6;
    match points.iter().position(|p| bad(p[0]) || bad(p[1])) {
        Some(k) => Err(OutlineError::OutOfRange { place: places[k], x: points[k][0], y: points[k][1] }),
        None => Ok(()),
    }
}

fn repeats(points: &[[f64; 2]], places: &[Place]) -> Result<(), OutlineError> {
    let extent = points.iter().flatten().fold(0.0_f64, |most, v| most.max(v.abs())).max(f64::MIN_POSITIVE);
    let close = |a: [f64; 2], b: [f64; 2]| (a[0] - b[0]).hypot(a[1] - b[1]) <= 1e-9 * extent;
    match (1..points.len()).find(|&k| close(points[k - 1], points[k])) {
        Some(k) => Err(OutlineError::Repeated { place: places[k] }),
        None => Ok(()),
    }
}

fn upright(framed: &Framed) -> Result<(), OutlineError> {
    // The angle between two lines, whichever way the list faces.
    let found_deg = framed.rotation_rad.sin().abs().asin().to_degrees();
    if found_deg <= MAX_SLOPE_DEG {
        return Ok(());
    }
    Err(OutlineError::Upright { found_deg, allowed_deg: MAX_SLOPE_DEG })
}

/// Moves, turns and scales so that the nose is at (0, 0) and the middle of the trailing edge at (1, 0).
fn to_chord(points: &[[f64; 2]]) -> Framed {
    let (a, b) = (points[0], points[points.len() - 1]);
    let edge = [0.5 * (a[0] + b[0]), 0.5 * (a[1] + b[1])];
    let far = |p: &[f64; 2]| (p[0] - edge[0]).hypot(p[1] - edge[1]);
    let nose = (0..points.len()).max_by(|&i, &j| far(&points[i]).total_cmp(&far(&points[j]))).unwrap_or(0);
    let chord = far(&points[nose]).max(f64::MIN_POSITIVE);
    let along = [(edge[0] - points[nose][0]) / chord, (edge[1] - points[nose][1]) / chord];
    let turned = points.iter().map(|p| {
        let d = [(p[0] - points[nose][0]) / chord, (p[1] - points[nose][1]) / chord];
        [d[0] * along[0] + d[1] * along[1], d[1] * along[0] - d[0] * along[1]]
    });
    Framed { points: turned.collect(), rotation_rad: -along[1].atan2(along[0]), nose }
}

fn gap(framed: &Framed) -> Result<(), OutlineError> {
    let (a, b) = (framed.points[0], framed.points[framed.points.len() - 1]);
    let gap = (a[0] - b[0]).hypot(a[1] - b[1]);
    if gap > MAX_GAP { Err(OutlineError::NotClosed { gap, allowed: MAX_GAP }) } else { Ok(()) }
}

fn spikes(framed: &Framed, places: &[Place]) -> Result<(), OutlineError> {
    for (k, place) in places.iter().enumerate().take(framed.points.len() - 1).skip(1) {
        let turn_deg = turn_rad(&framed.points, k).abs().to_degrees();
        let p = framed.points[k];
        if turn_deg > MAX_TURN_DEG && p[0].hypot(p[1]) > NOSE_PART {
            return Err(OutlineError::Spike { place: *place, turn_deg, allowed_deg: MAX_TURN_DEG });
        }
    }
    Ok(())
}

/// Twice the signed area of a closed polygon over two: positive when it runs counter-clockwise.
pub(crate) fn signed_area(points: &[[f64; 2]]) -> f64 {
    let n = points.len();
    (0..n).map(|k| (points[k], points[(k + 1) % n])).map(|(a, b)| 0.5 * (a[0] * b[1] - b[0] * a[1])).sum()
}

/// Looks for two pieces that cross, sorted along the chord so that a long list takes no long time.
pub(crate) fn crossings(points: &[[f64; 2]], places: &[Place]) -> Result<(), OutlineError> {
    let (head, tail) = (points[0], points[points.len() - 1]);
    // Ends that meet to rounding are one point.
    let shut = (head[0] - tail[0]).hypot(head[1] - tail[1]) < 1e-9;
    let reach = |k: usize| [points[k][0].min(points[k + 1][0]), points[k][0].max(points[k + 1][0])];
    let mut order: Vec<usize> = (0..points.len() - 1).collect();
    order.sort_by(|&i, &j| reach(i)[0].total_cmp(&reach(j)[0]).then(i.cmp(&j)));
    for (at, &i) in order.iter().enumerate() {
        for &j in order[at + 1..].iter().take_while(|&&j| reach(j)[0] <= reach(i)[1]) {
            let (i, j) = (i.min(j), i.max(j));
            let neighbours = j - i == 1;
            let ends = shut && i == 0 && j == points.len() - 2;
            if !neighbours && !ends && cross(points[i], points[i + 1], points[j], points[j + 1]) {
                return Err(OutlineError::Crossing { first: places[i], second: places[j] });
            }
        }
    }
    Ok(())
}

/// Whether two pieces cross or touch.
fn cross(a: [f64; 2], b: [f64; 2], c: [f64; 2], d: [f64; 2]) -> bool {
    let side =
        |p: [f64; 2], q: [f64; 2], r: [f64; 2]| (q[0] - p[0]) * (r[1] - p[1]) - (q[1] - p[1]) * (r[0] - p[0]);
    let (s1, s2, s3, s4) = (side(a, b, c), side(a, b, d), side(c, d, a), side(c, d, b));
    if s1 == 0.0 && s2 == 0.0 {
        // In one line: they touch if their boxes meet.
        let meet = |k: usize| a[k].min(b[k]) <= c[k].max(d[k]) && c[k].min(d[k]) <= a[k].max(b[k]);
        return meet(0) && meet(1);
    }
    s1 * s2 <= 0.0 && s3 * s4 <= 0.0
}

/// Turns points already near the chord-line frame so that `nose` comes to (0, 0); also the turn, radians.
pub(crate) fn reframe(points: &[[f64; 2]], nose: [f64; 2]) -> (Vec<[f64; 2]>, f64) {
    let (a, b) = (points[0], points[points.len() - 1]);
    let edge = [0.5 * (a[0] + b[0]), 0.5 * (a[1] + b[1])];
    let (dx, dy) = (edge[0] - nose[0], edge[1] - nose[1]);
    let square = (dx * dx + dy * dy).max(f64::MIN_POSITIVE);
    let turned = points.iter().map(|p| {
        let d = [p[0] - nose[0], p[1] - nose[1]];
        [(d[0] * dx + d[1] * dy) / square, (d[1] * dx - d[0] * dy) / square]
    });
    (turned.collect(), -dy.atan2(dx))
}

#[cfg(test)]
mod tests {
    use super::*;

    fn places(count: usize) -> Vec<Place> {
        (1..=count).map(|point| Place { point, line: None }).collect()
    }

    /// Two pieces in general position, turned and moved: across, touching with either end, apart, in one line.
    #[test]
    fn pieces_cross_or_touch_in_any_position() {
        let cases = [
            ([[0.0, 0.0], [4.0, 0.0], [1.0, -1.0], [2.0, 3.0]], true),
            ([[0.0, 0.0], [4.0, 0.0], [1.0, 0.0], [2.0, 3.0]], true),
            ([[0.0, 0.0], [4.0, 0.0], [2.0, 3.0], [1.0, 0.0]], true),
            ([[0.0, 0.0], [4.0, 0.0], [4.0, -1.0], [4.0, 3.0]], true),
            ([[0.0, 0.0], [4.0, 0.0], [1.0, 1.0], [2.0, 3.0]], false),
            ([[0.0, 0.0], [4.0, 0.0], [5.0, -1.0], [6.0, 3.0]], false),
            ([[0.0, 0.0], [4.0, 0.0], [3.0, 0.0], [7.0, 0.0]], true),
            ([[0.0, 0.0], [4.0, 0.0], [5.0, 0.0], [7.0, 0.0]], false),
        ];
        // Quarter turns, mirrors and moves by whole numbers: touching stays exact.
        let moves: [fn([f64; 2]) -> [f64; 2]; 4] = [
            |p| p,
            |p| [7.0 - p[1], 3.0 + p[0]],
            |p| [2.0 * p[0] - p[1] - 9.0, p[0] + 2.0 * p[1] + 5.0],
            |p| [3.0 - p[0], p[1] - 8.0],
        ];
        for (ends, expected) in cases {
            for moved in moves {
                let [a, b, c, d] = ends.map(moved);
                for found in [cross(a, b, c, d), cross(b, a, c, d), cross(c, d, a, b), cross(d, c, b, a)] {
                    assert_eq!(found, expected, "{a:?} {b:?} {c:?} {d:?}");
                }
            }
        }
    }

    /// A piece whose end the last piece, upright, runs through: they share one abscissa alone.
    #[test]
    fn pieces_that_share_one_abscissa_are_compared() {
        let points = [[0.0, 0.0], [1.0, 0.0], [0.5, -2.0], [1.0, -1.0], [1.0, 1.0]];
        assert!(crossings(&points, &places(5)).is_err());
        let apart = [[0.0, 0.0], [1.0, 0.0], [0.5, -2.0], [1.1, -1.0], [1.1, 1.0]];
        assert!(crossings(&apart, &places(5)).is_ok());
    }

    /// Points nearer than a thousand-millionth of the section's size are one, whatever the unit of the list.
    #[test]
    fn repeats_are_told_in_any_unit() {
        for size in [1e-3, 1.0, 1e3] {
            let list = |off: f64| [[size, 0.0], [0.5 * size, 0.1 * size], [0.5 * size, (0.1 + off) * size]];
            assert!(repeats(&list(1e-10), &places(3)).is_err(), "{size}");
            assert!(repeats(&list(1e-8), &places(3)).is_ok(), "{size}");
        }
    }

    /// A move, a turn and a change of size: the nose comes to (0, 0), the middle of the edge to (1, 0), and all
    /// distances change alike.
    #[test]
    fn reframing_is_a_similarity() {
        let points = [[1.0, 0.02], [0.3, 0.2], [-0.3, 0.1], [0.4, -0.1], [0.9, -0.04]];
        let (found, turn) = reframe(&points, points[2]);
        let edge = [0.95, -0.01];
        let size = (edge[0] + 0.3_f64).hypot(edge[1] - 0.1);
        assert!(found[2][0].hypot(found[2][1]) < 1e-12);
        assert!((0.5 * (found[0][0] + found[4][0]) - 1.0).abs() < 1e-12);
        assert!((found[0][1] + found[4][1]).abs() < 1e-12);
        assert!((turn - 0.11_f64.atan2(1.25)).abs() < 1e-12, "{turn}");
        let far = |p: [f64; 2], q: [f64; 2]| (p[0] - q[0]).hypot(p[1] - q[1]);
        for (i, j) in [(0, 1), (1, 3), (0, 4), (2, 3)] {
            assert!((far(found[i], found[j]) * size - far(points[i], points[j])).abs() < 1e-12, "{i} {j}");
        }
    }
}
