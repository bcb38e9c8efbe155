//! The section solver against published wind-tunnel sections.
//!
//! Every check has its source. A check that misses its tolerance is listed in [`KNOWN_MISSES`] with the
//! reason; one that is listed and passes fails the test, so that the list stays true.

use std::ops::ControlFlow;

use spokeshave::section::outline::{Outline, clark_y, naca_four_digit};
use spokeshave::section::solver::{Settings, Solved, State, sweep};

/// Lift slope, relative.
const SLOPE: f64 = 0.04;
/// Zero-lift angle, degrees.
const ZERO_LIFT_DEG: f64 = 0.4;
/// Drag coefficient in the working range, relative.
const DRAG: f64 = 0.10;
/// Drag coefficient at Reynolds number 200,000, relative: bubbles.
const DRAG_SLOW: f64 = 0.15;
/// The same at 60,000, where long bubbles rule and runs differ.
const DRAG_BUBBLE: f64 = 0.25;
/// Moment coefficient.
const MOMENT: f64 = 0.012;
/// Largest lift coefficient, relative.
const LIFT_MAX: f64 = 0.12;

/// Checks that miss, and why.
const KNOWN_MISSES: &[(&str, &str)] = &[
    ("0012 tripped slope", SLOPE_REASON),
    ("2412 slope", SLOPE_REASON),
    ("2418 slope", SLOPE_REASON),
    ("4415 slope", SLOPE_REASON),
    (
        "4412 zero lift",
        "the published angle stands 0.5 degrees from that of the 4415 with the same mean line; the solver gives both -4.3",
    ),
    (
        "0012 free drag at cl 0.88",
        "transition in quiet air is computed late: the share of laminar flow at n = 9 is larger than in that tunnel",
    ),
    (
        "clark-y drag, n 9",
        "as for the 0012: the tunnels of the time were turbulent; the set for disturbed air agrees",
    ),
];
const SLOPE_REASON: &str = "the lift of thick or cambered sections at high Reynolds number is computed 4 to 8 % steep: the pressure gradient \
                            across the layer of the section is neglected; the curvature of the wake is counted and takes 1.6 to \
                            2 % off; friction, lag and the averaging of that curvature move the slope by less than 1 %";

/// One comparison.
struct Check {
    name: String,
    computed: f64,
    published: f64,
    tolerance: f64,
}

impl Check {
    fn relative(name: String, computed: f64, published: f64, part: f64) -> Self {
        Self { name, computed, published, tolerance: part * published.abs() }
    }

    fn passes(&self) -> bool {
        (self.computed - self.published).abs() <= self.tolerance
    }
}

fn polar(outline: &Outline, settings: &Settings, angles: &[f64]) -> Vec<Solved> {
    let points =
        sweep(outline, settings, angles, |_, _, _| ControlFlow::Continue(())).expect("fair settings");
    points.into_iter().filter(|p| p.state == State::Converged).collect()
}

fn half_degrees(first: i32, last: i32) -> Vec<f64> {
    (2 * first..=2 * last).map(|k| 0.5 * f64::from(k)).collect()
}

/// Least-squares slope of lift from -4 to 6 degrees, per degree, and the angle of zero lift on that line.
fn slope_and_zero(points: &[Solved]) -> (f64, f64) {
    let used: Vec<&Solved> = points.iter().filter(|p| (-4.0..=6.0).contains(&p.alpha_deg)).collect();
    let n = used.len() as f64;
    let (a, l) =
        (used.iter().map(|p| p.alpha_deg).sum::<f64>() / n, used.iter().map(|p| p.cl).sum::<f64>() / n);
    let above: f64 = used.iter().map(|p| (p.alpha_deg - a) * (p.cl - l)).sum();
    let slope = above / used.iter().map(|p| (p.alpha_deg - a).powi(2)).sum::<f64>();
    (slope, a - l / slope)
}

fn lift_max(points: &[Solved]) -> f64 {
    points.iter().map(|p| p.cl).fold(f64::MIN, f64::max)
}

fn drag_min(points: &[Solved]) -> f64 {
    points.iter().map(|p| p.cd).fold(f64::MAX, f64::min)
}

/// Drag at a lift coefficient, linear between points below the stall.
fn drag_at(points: &[Solved], cl: f64) -> f64 {
    let pair = points.windows(2).find(|p| p[0].cl <= cl && cl < p[1].cl).expect("the lift is reached");
    pair[0].cd + (pair[1].cd - pair[0].cd) * (cl - pair[0].cl) / (pair[1].cl - pair[0].cl)
}

/// Section, zero-lift angle, moment, slope per degree, largest lift: NACA Report 824 (Abbott, von Doenhoff,
/// Stivers, 1945) as tabulated in the USAF Stability and Control DATCOM, Table 4.1.1-B; Re 9e6, smooth; from
/// memory.
const REPORT_824: [(u8, u8, f64, f64, f64, f64, f64); 10] = [
    (0, 0, 0.06, 0.0, 0.0, 0.108, 0.92),
    (0, 0, 0.09, 0.0, 0.0, 0.109, 1.32),
    (1, 4, 0.08, -0.8, -0.023, 0.109, 1.35),
    (1, 4, 0.10, -1.0, -0.020, 0.108, 1.50),
    (1, 4, 0.12, -1.1, -0.025, 0.108, 1.58),
    (2, 4, 0.12, -2.0, -0.047, 0.105, 1.68),
    (2, 4, 0.15, -2.0, -0.049, 0.106, 1.63),
    (2, 4, 0.18, -2.3, -0.050, 0.103, 1.47),
    (4, 4, 0.12, -3.8, -0.093, 0.105, 1.67),
    (4, 4, 0.15, -4.3, -0.093, 0.105, 1.64),
];

fn report_824() -> Vec<Check> {
    let mut checks = Vec::new();
    for (camber, place, thickness, zero, moment, slope, most) in REPORT_824 {
        let section = naca_four_digit(camber, place, thickness).expect("published section");
        let name = format!("{camber}{place}{:02.0}", 100.0 * thickness);
        let points = polar(&section, &Settings::free(9e6, 9.0), &half_degrees(-5, 20));
        let (found_slope, found_zero) = slope_and_zero(&points);
        // Published angles are from the axis of the formulas.
        let found_zero = found_zero - section.rotation_rad().to_degrees();
        let at_zero = points.iter().find(|p| p.alpha_deg == 0.0).expect("converged at zero");
        checks.push(Check::relative(format!("{name} slope"), found_slope, slope, SLOPE));
        checks.push(Check {
            name: format!("{name} zero lift"),
            computed: found_zero,
            published: zero,
            tolerance: ZERO_LIFT_DEG,
        });
        checks.push(Check {
            name: format!("{name} moment"),
            computed: at_zero.cm,
            published: moment,
            tolerance: MOMENT,
        });
        checks.push(Check::relative(format!("{name} lift max"), lift_max(&points), most, LIFT_MAX));
    }
    checks
}

/// Angle, lift, drag: Ladson, NASA TM 4074 (1988), NACA 0012, Re 6e6, Mach 0.15, transition fixed by a strip
/// at 5 %.
const LADSON: [(f64, f64, f64); 9] = [
    (-4.04, -0.4417, 0.00871),
    (-2.14, -0.2385, 0.008),
    (-0.05, -0.0126, 0.00809),
    (2.05, 0.2125, 0.00816),
    (4.04, 0.4316, 0.00823),
    (6.09, 0.6546, 0.00885),
    (8.3, 0.8873, 0.0105),
    (10.12, 1.0707, 0.01201),
    (12.12, 1.2605, 0.01332),
];

fn ladson() -> Vec<Check> {
    let section = naca_four_digit(0, 0, 0.12).expect("published section");
    let trip = Some(0.05);
    let settings = Settings { mach: 0.15, trip_upper: trip, trip_lower: trip, ..Settings::free(6e6, 9.0) };
    let angles: Vec<f64> = LADSON.iter().map(|row| row.0).chain([14.22, 15.26, 16.3, 17.13, 17.6]).collect();
    let points = polar(&section, &settings, &angles);
    let mut checks: Vec<Check> = points
        .iter()
        .zip(LADSON)
        .map(|(p, (alpha, _, cd))| Check::relative(format!("0012 tripped drag at {alpha}"), p.cd, cd, DRAG))
        .collect();
    let slope = |first: f64, last: f64| (last - first) / (4.04 + 4.04);
    let computed = slope(points[0].cl, points[4].cl);
    checks.push(Check::relative(
        "0012 tripped slope".into(),
        computed,
        slope(LADSON[0].1, LADSON[4].1),
        SLOPE,
    ));
    checks.push(Check::relative("0012 tripped lift max".into(), lift_max(&points), 1.6116, LIFT_MAX));
    checks
}

/// NACA 0012, Re 6e6, smooth: NACA Report 824 curves as digitised in public collections (approximate).
fn smooth_0012() -> Vec<Check> {
    let section = naca_four_digit(0, 0, 0.12).expect("published section");
    let points = polar(&section, &Settings { mach: 0.15, ..Settings::free(6e6, 9.0) }, &half_degrees(-2, 19));
    let lift = points.iter().find(|p| p.alpha_deg == 6.0).expect("converged").cl;
    vec![
        Check::relative("0012 free drag least".into(), drag_min(&points), 0.0058, DRAG),
        Check::relative("0012 free drag at cl 0.46".into(), drag_at(&points, 0.46), 0.0066, DRAG),
        Check::relative("0012 free drag at cl 0.88".into(), drag_at(&points, 0.88), 0.0092, DRAG),
        Check::relative("0012 free lift at 6".into(), lift, 0.6466 * 6.0 / 5.908, SLOPE),
        Check::relative("0012 free lift max".into(), lift_max(&points), 1.596, LIFT_MAX),
    ]
}

/// Clark Y, 11.7 %, Re 3e6 to 8e6: NACA Reports 502 (1934) and 628 (1938), from memory, low confidence.
fn clark() -> Vec<Check> {
    let section = clark_y().expect("fixed ordinates");
    let face_deg = section.face_angle_rad().expect("a flat face").to_degrees();
    let mut checks = Vec::new();
    for n_crit in [9.0, 4.0] {
        let points = polar(&section, &Settings::free(3e6, n_crit), &half_degrees(-6, 18));
        let zero = slope_and_zero(&points).1 - face_deg;
        let middle = |name: String, computed: f64, low: f64, high: f64| Check {
            name,
            computed,
            published: 0.5 * (low + high),
            tolerance: 0.5 * (high - low),
        };
        checks.push(middle(format!("clark-y drag, n {n_crit}"), drag_min(&points), 0.0065, 0.008));
        checks.push(middle(format!("clark-y lift max, n {n_crit}"), lift_max(&points), 1.4, 1.6));
        checks.push(Check {
            name: format!("clark-y zero lift from the face, n {n_crit}"),
            computed: zero,
            published: -5.5,
            tolerance: ZERO_LIFT_DEG,
        });
    }
    checks
}

/// Eppler 387, Re 200,000 and 60,000: McGhee, Walker, Millard, NASA TM 4062 (1988); ordinates and figures from memory, those at
/// Re 60,000 with low confidence (read off a curve with a loop, between runs that differ).
fn eppler_387() -> Vec<Check> {
    let section = Outline::read(include_str!("section_published/eppler-387.dat")).expect("fair ordinates");
    let slow = polar(&section, &Settings::free(6e4, 9.0), &half_degrees(-2, 11));
    let points = polar(&section, &Settings::free(2e5, 9.0), &half_degrees(-2, 11));
    let mut checks: Vec<Check> = [(0.4, 0.0100), (0.6, 0.0109), (0.8, 0.0122)]
        .map(|(cl, cd)| {
            Check::relative(format!("387 drag at cl {cl}, Re 200,000"), drag_at(&points, cl), cd, DRAG_SLOW)
        })
        .into();
    checks.extend([(0.4, 0.021), (0.6, 0.027), (1.1, 0.026)].map(|(cl, cd)| {
        Check::relative(format!("387 drag at cl {cl}, Re 60,000"), drag_at(&slow, cl), cd, DRAG_BUBBLE)
    }));
    checks.push(Check::relative("387 lift max, Re 200,000".into(), lift_max(&points), 1.22, LIFT_MAX));
    checks
}

#[test]
fn validate_section_solver_published() {
    let mut checks = report_824();
    checks.extend(ladson());
    checks.extend(smooth_0012());
    checks.extend(clark());
    checks.extend(eppler_387());
    let mut wrong = Vec::new();
    for check in &checks {
        let known = KNOWN_MISSES.iter().find(|miss| miss.0 == check.name);
        let verdict = match (check.passes(), known) {
            (true, None) => "ok",
            (false, Some(_)) => "known miss",
            (true, Some(_)) => "passes, but is listed as a miss",
            (false, None) => "MISS",
        };
        println!("{:<40} {:>9.4} published {:>8.4} {verdict}", check.name, check.computed, check.published);
        if verdict.len() > "known miss".len() || verdict == "MISS" {
            wrong.push(format!("{}: {} against {}: {verdict}", check.name, check.computed, check.published));
        }
    }
    assert_eq!(checks.len(), 69, "the count of checks may only rise");
    assert!(wrong.is_empty(), "{}", wrong.join("\n"));
    assert!(
        KNOWN_MISSES.iter().all(|miss| checks.iter().any(|c| c.name == miss.0)),
        "a miss without its check"
    );
}
