//! The wood to buy: the blank round the blade, its laminations, and the heights of the edges above the bench.

use crate::job::Job;

use super::error::{BenchError, Fault};
use super::form::Form;
use super::loft::{Boss, blade_rings, root_radius_m};
use super::ring::Ring;
use crate::drilling::Pattern;

/// Thickest lamination proposed where the job names no number, m: common practice is 12 to 20 mm.
const THICKEST_LAMINATION_M: f64 = 0.020;
/// Wood planed off each board on its way to a lamination, m (common practice).
const PLANING_M: f64 = 0.003;

/// One lamination.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Plank {
    /// Rear and front face above the rear of the blank, m.
    pub faces_m: [f64; 2],
    /// By how much it is turned about the axis in the direction of turning, rad.
    pub turn_rad: f64,
    /// Width needed to hold its part of blade and hub, m.
    pub width_m: f64,
}

/// Laminations of a blank.
#[derive(Clone, Debug, PartialEq)]
pub struct Layers {
    /// From the rear to the front.
    pub planks: Vec<Plank>,
    /// Turn of each against its neighbour, rad.
    pub step_rad: f64,
    /// Length of a board, m.
    pub board_length_m: f64,
    /// Boards needed.
    pub boards: u32,
    /// Wood to buy, with what is planed off, m³.
    pub volume_m3: f64,
}

impl Layers {
    /// Widest lamination, m.
    #[must_use]
    pub fn width_m(&self) -> f64 {
        self.planks.iter().map(|p| p.width_m).fold(0.0, f64::max)
    }
}

/// The blank.
#[derive(Clone, Debug, PartialEq)]
pub struct Blank {
    /// Thickness along the axis, m.
    pub thickness_m: f64,
    /// Width, m.
    pub width_m: f64,
    /// Length: of the whole blank, or of one blade with its half of the hub, m.
    pub length_m: f64,
    /// Rear face along the direction of flight, m.
    pub back_m: f64,
    /// The boss, where hub and blades are one piece.
    pub boss: Option<Boss>,
    /// Wood left round the blade, m.
    pub allowance_m: f64,
    /// Laminations as the job asks for them.
    pub layers: Layers,
    /// Laminations fanned along the pitch: each turned by its thickness over the pitch.
    pub fanned: Layers,
}

/// Steepest face line that is marked on the sides of the blank: its rise over its run.
const STEEPEST: f64 = 50.0;

/// Where a station lies while the rear of the blank lies on the bench. Pairs are of the leading and of the
/// trailing edge's side.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Heights {
    /// Radius, m.
    pub radius_m: f64,
    /// The sawn sides of the blade from the middle line of the blank, m.
    pub outline_m: [f64; 2],
    /// The face line where it comes out at these sides, above the bench, m; none where the section stands
    /// upright. Below 0 or above the blank's thickness it comes out at the rear or the front instead.
    pub face_m: Option<[f64; 2]>,
    /// The edges themselves above the bench, m.
    pub edges_m: [f64; 2],
    /// Lowest and highest wood above the bench, m.
    pub wood_m: [f64; 2],
}

impl Blank {
    /// The blank of a form.
    ///
    /// # Errors
    /// Sizes that the job gives and that the blade does not fit into; neighbouring blades that overlap.
    pub fn new(job: &Job, form: &Form) -> Result<Self, BenchError> {
        let rings = blade_rings(form);
        let allowance_m = form.making.allowance_m.unwrap_or(0.004 * form.blade.radius_m);
        let mut faults = Vec::new();
        let boss_thickness_m = boss_thickness_m(job);
        let reach = axial_reach(&rings);
        let blade_m = reach.high - reach.low;
        let needed_m = blade_m.max(boss_thickness_m.unwrap_or(0.0));
        let thickness_m = match form.making.blank_thickness_m {
            Some(given_m) => {
                if given_m < needed_m - 1e-9 {
                    let at_m = if needed_m > blade_m { 0.0 } else { reach.at };
                    let [radius_mm, needed_mm, given_mm] = [at_m, needed_m, given_m].map(|v| 1e3 * v);
                    let by_mm = needed_mm - given_mm;
                    faults.push(Fault::ThickerThanBlank { radius_mm, needed_mm, given_mm, by_mm });
                }
                given_m
            }
            None => whole_mm(needed_m + 2.0 * allowance_m),
        };
        let middle = 0.5 * (reach.low + reach.high);
        let back_m = middle - 0.5 * thickness_m;
        let boss = form.one_piece.then(|| {
            let half = 0.5 * boss_thickness_m.unwrap_or(thickness_m);
            Boss {
                radius_m: form.blade.hub_radius_m,
                faces_m: [middle - half, middle + half],
                drilled_m: Pattern::of(job).map_or(0.0, |p| p.reach_m()),
            }
        });
        let half_width = plan_half_m(&rings, form);
        let needed_m = 2.0 * half_width.0;
        let width_m = match form.making.blank_width_m {
            Some(given_m) => {
                if given_m < needed_m - 1e-9 {
                    let [radius_mm, needed_mm, given_mm] = [half_width.1, needed_m, given_m].map(|v| 1e3 * v);
                    let by_mm = needed_mm - given_mm;
                    faults.push(Fault::WiderThanBlank { radius_mm, needed_mm, given_mm, by_mm });
                }
                given_m
            }
            None => whole_mm(needed_m + 2.0 * allowance_m),
        };
        faults.extend(overlap(&rings, form));
        if !faults.is_empty() {
            return Err(BenchError(faults));
        }
        let sizes = Sizes { thick_m: thickness_m, back_m, spare_m: allowance_m };
        let count = lamination_count(job, thickness_m);
        let pitch_m = form.blade.pitch_075_m(0.0);
        let along_pitch = if pitch_m > 0.0 {
            std::f64::consts::TAU * thickness_m / f64::from(count) / pitch_m
        } else {
            0.0
        };
        let step = form.making.fan_step_deg.unwrap_or(0.0).to_radians();
        Ok(Self {
            layers: layers(form, &rings, sizes, count, step),
            fanned: layers(form, &rings, sizes, count, along_pitch),
            length_m: board_length_m(form, 0.0, allowance_m),
            thickness_m,
            width_m,
            back_m,
            boss,
            allowance_m,
        })
    }

    /// Where a section lies while the rear of the blank lies on the bench; `sawn_m`: the sides of the blade
    /// in plan there, against and along the turning, m.
    #[must_use]
    pub fn heights(&self, ring: &Ring, sawn_m: [f64; 2]) -> Heights {
        let up = |z: f64| z - self.back_m;
        let [a, b] = ring.face_line();
        let rise = (b[1] - a[1]) / (b[0] - a[0]);
        let line = |y: f64| up(a[1] + rise * (y - a[0]));
        let [against, along] = sawn_m;
        Heights {
            radius_m: ring.radius_m,
            outline_m: [along, -against],
            face_m: (b[0] > a[0] && rise.abs() < STEEPEST).then(|| [line(along), line(against)]),
            edges_m: [ring.leading_edge(), ring.trailing_edge()].map(|p| up(p[1])),
            wood_m: ring.span(1).map(up),
        }
    }
}

#[derive(Clone, Copy)]
#[expect(clippy::struct_field_names, reason = "lengths say their unit")]
struct Sizes {
    thick_m: f64,
    back_m: f64,
    spare_m: f64,
}

struct Reach {
    low: f64,
    high: f64,
    at: f64,
}

/// How far the blade reaches along the axis, and where it reaches farthest from the middle.
fn axial_reach(rings: &[Ring]) -> Reach {
    let spans: Vec<[f64; 2]> = rings.iter().map(|r| r.span(1)).collect();
    let low = spans.iter().map(|s| s[0]).fold(f64::INFINITY, f64::min);
    let high = spans.iter().map(|s| s[1]).fold(f64::NEG_INFINITY, f64::max);
    let middle = 0.5 * (low + high);
    let far = |s: &[f64; 2]| (s[1] - middle).max(middle - s[0]);
    let at = (0..rings.len()).max_by(|&i, &j| far(&spans[i]).total_cmp(&far(&spans[j])));
    Reach { low, high, at: at.map_or(0.0, |i| rings[i].radius_m) }
}

/// Half of the width that blade and hub need in plan, and the radius where they do.
fn plan_half_m(rings: &[Ring], form: &Form) -> (f64, f64) {
    let hub = if form.one_piece { form.blade.hub_radius_m } else { 0.0 };
    rings.iter().fold((hub, 0.0), |most, ring| {
        let [low, high] = ring.span(0);
        let half = high.max(-low);
        if half > most.0 { (half, ring.radius_m) } else { most }
    })
}

fn overlap(rings: &[Ring], form: &Form) -> Option<Fault> {
    let blades = f64::from(form.blade.count);
    if !form.one_piece || form.blade.count < 3 {
        return None;
    }
    let root = root_radius_m(form);
    let past = |ring: &Ring| {
        let [low, high] = ring.span(0);
        2.0 * (high.max(-low) - ring.radius_m * (std::f64::consts::PI / blades).tan())
    };
    let worst = rings.iter().filter(|r| r.radius_m >= root).max_by(|a, b| past(a).total_cmp(&past(b)))?;
    (past(worst) > 0.0)
        .then(|| Fault::BladesOverlap { radius_mm: 1e3 * worst.radius_m, by_mm: 1e3 * past(worst) })
}

fn boss_thickness_m(job: &Job) -> Option<f64> {
    job.wood.as_ref()?.hub.as_ref().map(|hub| hub.thickness_m)
}

fn lamination_count(job: &Job, thickness_m: f64) -> u32 {
    let asked = job.wood.as_ref().and_then(|w| w.laminations);
    asked.unwrap_or((thickness_m / THICKEST_LAMINATION_M).ceil().max(1.0) as u32)
}

/// Length of a blank with its laminations turned by at most `turn`: two blades lie in one piece, others each
/// in its own.
fn board_length_m(form: &Form, turn: f64, allowance_m: f64) -> f64 {
    let (tip, hub) = (form.blade.radius_m, form.blade.hub_radius_m);
    let whole = match (form.one_piece, form.blade.count) {
        (true, 2) => 2.0 * tip,
        (true, _) => tip + hub,
        (false, _) => tip - hub,
    };
    // A turned board still has to reach the corners of the blade it holds.
    whole / turn.cos().max(0.5) + 2.0 * allowance_m
}

fn layers(form: &Form, rings: &[Ring], sizes: Sizes, count: u32, step_rad: f64) -> Layers {
    let thick = sizes.thick_m / f64::from(count);
    let planks: Vec<Plank> = (0..count)
        .map(|i| {
            let faces_m = [thick * f64::from(i), thick * f64::from(i + 1)];
            let turn_rad = step_rad * (f64::from(i) - 0.5 * f64::from(count - 1));
            let slab = faces_m.map(|z| z + sizes.back_m);
            let half = rings.iter().filter_map(|r| reach_in(r, slab, turn_rad)).fold(0.0, f64::max);
            let hub = if form.one_piece { form.blade.hub_radius_m } else { 0.0 };
            Plank { faces_m, turn_rad, width_m: whole_mm(2.0 * (half.max(hub) + sizes.spare_m)) }
        })
        .collect();
    let turned = planks.iter().map(|p| p.turn_rad.abs()).fold(0.0, f64::max);
    let pieces = if form.one_piece && form.blade.count == 2 { 1 } else { form.blade.count };
    let board_length_m = board_length_m(form, turned, sizes.spare_m);
    let cut: f64 = planks.iter().map(|p| p.width_m * board_length_m * (thick + PLANING_M)).sum();
    Layers { planks, step_rad, board_length_m, boards: count * pieces, volume_m3: cut * f64::from(pieces) }
}

/// How far a section reaches within a slab from the middle line of a board turned by `turn_rad`; `None` where
/// it has no wood there.
fn reach_in(ring: &Ring, slab: [f64; 2], turn_rad: f64) -> Option<f64> {
    let (sin, cos) = turn_rad.sin_cos();
    let across = |y: f64| (y * cos - ring.radius_m * sin).abs();
    let n = ring.points.len();
    let inside = |z: f64| z >= slab[0] && z <= slab[1];
    let mut most: Option<f64> = None;
    let mut note = |y: f64| most = Some(most.unwrap_or(0.0).max(across(y)));
    for k in 0..n {
        let (a, b) = (ring.points[k], ring.points[(k + 1) % n]);
        if inside(a[1]) {
            note(a[0]);
        }
        for face in slab {
            if (a[1] - face) * (b[1] - face) < 0.0 {
                note(a[0] + (b[0] - a[0]) * (face - a[1]) / (b[1] - a[1]));
            }
        }
    }
    most
}

/// The next whole millimetre, m.
fn whole_mm(metres: f64) -> f64 {
    (1e3 * metres - 1e-6).ceil() / 1e3
}
