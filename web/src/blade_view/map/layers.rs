//! What the map is painted of, as path data.

use super::frame::Frame;
use super::labels::{Label, label_levels, open_space, roomiest};
use crate::chart::departure::{BREAKS_DEG, style_of_class};
use crate::chart::field::{Field, Ring, data};
use spokeshave::rotor::{DepartureMap, MapCell};

/// The share of the best lift-to-drag that the working band keeps.
const WORKING_SHARE: f64 = 0.95;
/// Half the width of the words "working band", pixels.
const BAND_HALF: f64 = 46.0;
/// Lines drawn on the map, degrees; 0 is the best.
const LINES_DEG: [f64; 7] = [0.0, 2.0, -2.0, 4.0, -4.0, 6.0, -6.0];

/// The painted parts of a map.
#[derive(Clone, Debug, Default, PartialEq)]
pub(super) struct Layers {
    /// Everything at or above each break, lowest first; painted one over the other on the lowest class.
    pub(super) fills: Vec<Fill>,
    /// The line of best departure.
    pub(super) best: String,
    /// Where the blade is stalled.
    pub(super) stalled: String,
    /// Edge of the working band.
    pub(super) band: String,
    /// Where there is no figure; empty when there is one everywhere.
    pub(super) missing: String,
    /// Figures on the lines.
    pub(super) labels: Vec<Label>,
    /// Middle of the word "stalled".
    pub(super) stalled_at: Option<[f64; 2]>,
    /// Middle of the words "working band".
    pub(super) band_at: Option<[f64; 2]>,
}

/// One fill.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Fill {
    /// Style class of its colour.
    pub(super) class: &'static str,
    /// Whether its edge is drawn as a line.
    pub(super) lined: bool,
    /// Path data.
    pub(super) data: String,
}

impl Layers {
    /// The layers of a map. Labels keep clear of the flight points, at the pixels `marks` along, and stand
    /// between the lines of the stations, at the pixels `levels` down, where they can.
    pub(super) fn new(map: &DepartureMap, frame: &Frame, marks: &[f64], levels: &[f64]) -> Option<Self> {
        let departure = field(map, frame, |c| c.departure_deg)?;
        let rings: Vec<Vec<Ring>> = BREAKS_DEG.iter().map(|b| departure.rings(*b)).collect();
        let best = departure.rings(0.0);
        let stalled = |c: &MapCell| c.past_stall_deg.is_some_and(|past| past > 0.0);
        let working = |c: &MapCell| c.share_of_best.is_some_and(|s| s >= WORKING_SHARE);
        let mut space = open_space(frame, marks);
        let stalled_at = roomiest(map, frame, &mut space, 26.0, stalled);
        let mut off_best = space.clone();
        off_best.keep_off_points(best.concat());
        let band_at = roomiest(map, frame, &mut off_best, BAND_HALF, working);
        if let Some(at) = band_at {
            space.take(at, [BAND_HALF, 9.0]);
        }
        let line = |level: f64| {
            let at = BREAKS_DEG.iter().position(|b| *b == level);
            (level, at.map_or(best.as_slice(), |i| rings[i].as_slice()))
        };
        let labels = label_levels(LINES_DEG.map(line).as_slice(), frame, levels, &mut space);
        Some(Self {
            fills: BREAKS_DEG.iter().enumerate().map(|(i, b)| fill(i, *b, &rings[i])).collect(),
            best: data(&best),
            stalled: contour(map, frame, |c| c.past_stall_deg, 0.0),
            band: contour(map, frame, |c| c.share_of_best, WORKING_SHARE),
            missing: missing(map, frame),
            labels,
            stalled_at,
            band_at,
        })
    }
}

fn fill(index: usize, level: f64, rings: &[Ring]) -> Fill {
    Fill { class: style_of_class(index + 1), lined: LINES_DEG.contains(&level), data: data(rings) }
}

fn contour(map: &DepartureMap, frame: &Frame, of: impl Fn(&MapCell) -> Option<f64>, level: f64) -> String {
    field(map, frame, of).map_or_else(String::new, |field| data(&field.rings(level)))
}

fn missing(map: &DepartureMap, frame: &Frame) -> String {
    if map.cells.iter().all(|c| c.departure_deg.is_some()) {
        return String::new();
    }
    contour(map, frame, |c| Some(if c.departure_deg.is_some() { 0.0 } else { 1.0 }), 0.5)
}

/// One figure of the map, for contours.
fn field(map: &DepartureMap, frame: &Frame, of: impl Fn(&MapCell) -> Option<f64>) -> Option<Field> {
    let speed = frame.speed();
    let xs = map.airspeeds_m_s.iter().map(|v| speed.px(*v)).collect();
    let ys = map.radii_m.iter().map(|r| frame.axis.y(*r)).collect();
    Field::new(&map.cells.map(of), xs, ys)
}

#[cfg(test)]
mod tests {
    use super::super::frame::tests::{frame, sample};
    use super::*;

    #[test]
    fn a_map_is_painted_whole_and_in_finite_figures() {
        let layers = Layers::new(&sample(), &frame(), &[100.0], &[]).unwrap();
        assert_eq!(layers.fills.len(), 10);
        let all =
            layers.fills.iter().map(|f| f.data.as_str()).collect::<String>() + &layers.best + &layers.band;
        assert!(!all.contains("NaN") && !all.contains("inf"));
        assert!(!layers.missing.is_empty(), "the gap is shown");
        assert!(layers.labels.iter().any(|l| l.text == "0") && layers.labels.iter().any(|l| l.text == "+4"));
        assert!(layers.stalled_at.is_some());
    }

    #[test]
    fn a_contour_lies_where_the_figure_has_its_level() {
        let (map, frame) = (sample(), frame());
        let grid = field(&map, &frame, |c| c.departure_deg).unwrap();
        let mut seen = 0;
        for [x, y] in grid.rings(2.0).concat() {
            let inside = (15.0..405.0).contains(&x) && frame.axis.y(0.66) < y && y < frame.axis.y(0.14);
            // Row 3 has a gap, filled from beside.
            if inside && (y - frame.axis.y(map.radii_m[3])).abs() > 34.0 {
                let departure = 14.0 - 2.4 * frame.speed().value(x) / 5.0
                    + 0.3 * ((frame.axis.scale().value(y) - 0.1) / 0.05 - 0.5);
                assert!((departure - 2.0).abs() < 0.02, "{x} {y}: {departure}");
                seen += 1;
            }
        }
        assert!(seen >= 6, "{seen}");
    }

    #[test]
    fn contours_end_outside_the_frame() {
        let grid = field(&sample(), &frame(), |c| c.departure_deg).unwrap();
        let all = grid.rings(2.0).concat();
        let least = |i: usize| all.iter().map(|at| at[i]).fold(f64::MAX, f64::min);
        let most = |i: usize| all.iter().map(|at| at[i]).fold(f64::MIN, f64::max);
        let axis = frame().axis;
        assert!(
            least(0) < 10.0 && least(1) < axis.top_px && most(1) > axis.hub_px,
            "all but the fast side is hard"
        );
        assert!(most(0) < 410.0);
    }

    #[test]
    fn fills_rise_through_the_scale() {
        let layers = Layers::new(&sample(), &frame(), &[], &[]).unwrap();
        let classes: Vec<&str> = layers.fills.iter().map(|f| f.class).collect();
        assert_eq!((classes[0], classes[9]), ("departure-1", "departure-10"));
    }

    #[test]
    fn a_map_without_figures_has_no_layers() {
        let mut map = sample();
        map.cells.fill(MapCell::default());
        assert!(Layers::new(&map, &frame(), &[], &[]).is_none());
    }
}
