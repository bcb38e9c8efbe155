//! What the carver's departures from the drawing cost: the same section as carved and as drawn.

use serde::{Deserialize, Serialize};

use super::{Made, Plan, Summary};
use crate::section::outline::Outline;

/// Best lift-to-drag and its angle to the chord line of the drawing.
#[derive(Clone, Copy, Debug, PartialEq, Serialize, Deserialize)]
pub struct Peak {
    /// Angle of best lift-to-drag to the chord line of the drawing, degrees.
    pub angle_deg: f64,
    /// Greatest lift-to-drag.
    pub lift_to_drag: f64,
}

/// One polar as drawn and as carved.
#[derive(Clone, Copy, Debug, PartialEq, Serialize, Deserialize)]
pub struct Comparison {
    /// Thickness ratio.
    pub thickness_ratio: f64,
    /// Reynolds number.
    pub reynolds: f64,
    /// As drawn; none where too few points converged or it nowhere lifts.
    pub drawn: Option<Peak>,
    /// As carved.
    pub carved: Option<Peak>,
}

impl Comparison {
    /// How the best angle moves, degrees, and what share of the best lift-to-drag is left.
    #[must_use]
    pub fn change(&self) -> Option<(f64, f64)> {
        let (drawn, carved) = (self.drawn?, self.carved?);
        Some((carved.angle_deg - drawn.angle_deg, carved.lift_to_drag / drawn.lift_to_drag))
    }
}

/// Compares two plans of the same outline, thicknesses and Reynolds numbers, task by task. Both angles are to
/// the chord line of the drawing, so that their difference is one of the blade angle.
#[must_use]
pub fn compare(carved: (&Plan, &[Made]), drawn: (&Plan, &[Made])) -> Vec<Comparison> {
    let turn_rad = |plan: &Plan, task: usize| plan.outline(task).map_or(0.0, Outline::rotation_rad);
    let pairs = carved.1.iter().zip(drawn.1).enumerate();
    pairs
        .map(|(task, (c, d))| Comparison {
            thickness_ratio: d.thickness_ratio,
            reynolds: d.reynolds,
            drawn: peak(d, 0.0),
            carved: peak(c, (turn_rad(carved.0, task) - turn_rad(drawn.0, task)).to_degrees()),
        })
        .collect()
}

/// The peak of a polar whose chord line is `turn_deg` nose up from that of the drawing.
fn peak(made: &Made, turn_deg: f64) -> Option<Peak> {
    let summary = Summary::of(&made.polar()?).ok()?;
    Some(Peak { angle_deg: summary.best_angle_deg? - turn_deg, lift_to_drag: summary.best_lift_to_drag? })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::section::make::Request;
    use crate::section::outline::{clark_y, naca_four_digit};
    use crate::section::solver::{Solved, State};

    /// A polar as if computed: cl = 0.1 (α + 4°), cd = `scale` (0.01 + 0.01 cl²), best at cl = 1 and α = 6°.
    fn made(scale: f64) -> Made {
        let point = |k: i32| {
            let alpha_deg = f64::from(k);
            let cl = 0.1 * (alpha_deg + 4.0);
            let none = 0.5;
            Solved {
                alpha_deg,
                cl,
                cd: scale * (0.01 + 0.01 * cl * cl),
                cm: 0.0,
                xtr_upper: none,
                xtr_lower: none,
                iterations: 5,
                residual: 0.0,
                state: State::Converged,
            }
        };
        Made { thickness_ratio: 0.12, reynolds: 1e6, points: (-6..=12).map(point).collect() }
    }

    /// An edge of 2 % on the back of a flat-faced section turns its chord line by half of what was added: the
    /// same polar about the turned chord lies that much away from the drawing's, and twice the drag leaves half
    /// the lift-to-drag. The table says how thick the edge is.
    #[test]
    fn angles_are_told_to_the_chord_line_of_the_drawing() {
        let request = Request { edge_thickness: Some(0.02), ..Request::free(&[1e6], 9.0) };
        let [drawn, carved] =
            [request.as_drawn(), request].map(|r| Plan::new(&clark_y().unwrap(), &r).unwrap());
        let compared = compare((&carved, &[made(2.0)]), (&drawn, &[made(1.0)]));
        let (angle_deg, share) = compared[0].change().unwrap();
        let added = 0.02 - clark_y().unwrap().measures().edge_thickness;
        // The chord line drops at the nose by half of what was added: its angles of attack are smaller than those
        // of the drawing by as much.
        assert!((angle_deg - (0.5 * added).to_degrees()).abs() < 0.01, "{angle_deg}");
        assert!((share - 0.5).abs() < 1e-6, "{share}");
        let says = |plan: &Plan, words: &str| {
            let said = plan.table(&[made(1.0)]).unwrap().origin;
            assert!(said.contains(words), "{said}");
        };
        says(&carved, "Trailing edge left up to 2 % of the chord thick, where the drag is less certain");
        says(&drawn, "Trailing edge drawn up to 0.12 % of the chord thick. 19 of 19 points");
        says(&drawn, "from the outline \"Clark Y\"");
        let section = naca_four_digit(0, 0, 0.12).unwrap();
        let nameless = Outline::from_points("", section.points()).unwrap();
        says(&Plan::new(&nameless, &Request::free(&[1e6], 9.0)).unwrap(), "an outline without a name");
    }
}
