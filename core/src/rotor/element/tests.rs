//! The quick search for the balance against a plain fine scan, over ordinary and extraordinary elements.

mod march;

use proptest::prelude::*;
use proptest::strategy::ValueTree;

use super::*;
use crate::section::{About, Family, Polar, PolarPoint, Situation, library};

/// An invented polar over all angles: linear lift that fades into a flat plate at 13° and −11°.
fn plate_polar() -> Family {
    family_of(plate_points(1.0))
}

/// The same section upside down, which stalls early where it lifts downward.
fn upside_down() -> Family {
    family_of(plate_points(-1.0))
}

fn family_of(points: Vec<PolarPoint>) -> Family {
    Family::new(About::default(), &[Polar { reynolds: None, mach: 0.0, thickness_ratio: None, points }])
        .unwrap()
}

/// The points of it, lift and angle of attack counted upward or downward.
fn plate_points(sign: f64) -> Vec<PolarPoint> {
    let logistic = |x: f64| 1.0 / (1.0 + (-x).exp());
    let point = |i: i32| {
        let alpha_deg = sign * f64::from(i) * 0.5;
        let a = alpha_deg.to_radians();
        let w = logistic((13.0 - alpha_deg) / 1.8) * logistic((alpha_deg + 11.0) / 1.8);
        let linear = 5.9 * (a + 3.5f64.to_radians());
        let cl = w * linear + (1.0 - w) * 0.95 * (2.0 * a).sin();
        let cd =
            w * (0.0085 + 0.012 * (linear - 0.35).powi(2)) + (1.0 - w) * (0.0085 + 1.9 * a.sin().powi(2));
        PolarPoint { alpha_deg: sign * alpha_deg, cl: sign * cl, cd, cm: None }
    };
    (-360..=360).map(point).collect()
}

/// All roots between two angles by a scan of `step`, finer near zero; the one of least `|α|` first.
fn scanned(e: &Element, lo: f64, hi: f64, step: f64) -> Vec<f64> {
    let residual = |phi: f64| {
        let t = e.terms(phi);
        e.turning_m_s * t.n - e.axial_m_s * t.m
    };
    let count = ((hi - lo) / step).ceil().max(0.0) as u32;
    let mut nodes: Vec<f64> = (0..count).map(|i| lo + step * f64::from(i)).collect();
    let small = (0..60).map(|i| NEAR_ZERO_RAD * 1.25f64.powi(i));
    nodes.extend(small.flat_map(|p| [p, -p]).filter(|p| (lo..hi).contains(p)));
    nodes.push(hi);
    nodes.sort_by(f64::total_cmp);
    let mut roots: Vec<f64> = Vec::new();
    for w in nodes.windows(2) {
        let (mut a, mut b) = (w[0], w[1]);
        let below = residual(a) < 0.0;
        if below == (residual(b) < 0.0) {
            continue;
        }
        for _ in 0..60 {
            let m = 0.5 * (a + b);
            if (residual(m) < 0.0) == below { a = m } else { b = m }
        }
        roots.push(0.5 * (a + b));
    }
    roots.sort_by(|a, b| (e.angle_rad - a).abs().total_cmp(&(e.angle_rad - b).abs()));
    roots
}

/// The roots of the first bracket that has any.
fn all_by_scan(e: &Element) -> Vec<f64> {
    let (brackets, count) = e.brackets();
    let scans = brackets[..count].iter().map(|&(lo, hi)| scanned(e, lo, hi, 0.1f64.to_radians()));
    scans.into_iter().find(|roots| !roots.is_empty()).unwrap_or_default()
}

fn by_scan(e: &Element) -> Option<f64> {
    all_by_scan(e).first().copied()
}

prop_compose! {
    fn situations()(
        v in prop_oneof![Just(0.0), 0.01..5.0f64, 5.0..120.0f64], turning in 5.0..250.0f64, angle in -40.0..80.0f64,
        solidity in 0.005..0.6f64, x in 0.16..0.995f64, blades in prop::sample::select(vec![1, 2, 3, 6]), exact: bool,
    ) -> (f64, f64, f64, f64, Ends) {
        let ends = Ends::new(f64::from(blades), x, 1.0, 0.15, true);
        (v, turning, angle, solidity, if exact { ends.exact_at_tip(blades, x) } else { ends })
    }
}

fn element(family: &Family, (v, turning, angle, solidity, ends): (f64, f64, f64, f64, Ends)) -> Element<'_> {
    let situation = Situation { thickness_ratio: 0.12, reynolds: 3e5, mach: 0.0, stall_delay: 0.0 };
    Element {
        axial_m_s: v,
        turning_m_s: turning,
        angle_rad: angle.to_radians(),
        solidity,
        ends,
        section: Blend::new(Local::new(family, situation), None),
    }
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(1500))]

    #[test]
    fn the_march_finds_the_root_that_a_fine_scan_finds(s in situations()) {
        let family = plate_polar();
        let e = element(&family, s);
        let (quick, roots) = (e.balance().map(|b| b.inflow_rad), all_by_scan(&e));
        prop_assert_eq!(quick.is_some(), !roots.is_empty());
        if let (Some(quick), Some(&slow)) = (quick, roots.first()) {
            // Two roots may lie equally far from α = 0: then either is the answer.
            let same = (quick - slow).abs() < 1e-6;
            let tie = ((e.angle_rad - quick).abs() - (e.angle_rad - slow).abs()).abs() < 1e-6;
            // Where the residual just grazes zero it has two roots within one step of the march, which passes over
            // them.
            let grazes = roots[1..].iter().any(|twin| (twin - slow).abs() < STEP_RAD)
                && roots.iter().any(|r| (r - quick).abs() < 1e-6);
            let [quick_deg, slow_deg, blade_deg] = [quick, slow, e.angle_rad].map(f64::to_degrees);
            prop_assert!(same || tie || grazes, "{} {} of {}", quick_deg, slow_deg, blade_deg);
        }
    }
}

#[test]
fn the_march_passes_over_a_root_that_a_scan_finds_in_one_of_ten_thousand_elements_at_most() {
    let family = plate_polar();
    let mut runner = proptest::test_runner::TestRunner::deterministic();
    let elements = (0..20_000).map(|_| situations().new_tree(&mut runner).unwrap().current());
    let passed_over = elements.filter(|s| {
        let e = element(&family, *s);
        let away = |phi: f64| (e.angle_rad - phi).abs();
        e.balance().zip(by_scan(&e)).is_some_and(|(quick, slow)| away(quick.inflow_rad) > away(slow) + 1e-6)
    });
    let count = passed_over.count();
    assert!(count <= 2, "{count}");
}

/// On tables with all their small waves the two may differ where roots come in pairs closer than a step; that
/// is rare.
#[test]
fn on_shipped_tables_the_march_and_the_scan_nearly_always_agree() {
    let family = library().family("clark-y", 9.0).unwrap();
    let mut runner = proptest::test_runner::TestRunner::deterministic();
    let (mut tried, mut differ) = (0, 0);
    for _ in 0..1000 {
        let s = situations().new_tree(&mut runner).unwrap().current();
        let e = element(family, s);
        let (Some(quick), Some(slow)) = (e.balance().map(|b| b.inflow_rad), by_scan(&e)) else { continue };
        tried += 1;
        differ += i32::from((quick - slow).abs() > 1e-6);
    }
    assert!(tried > 900 && differ <= 10, "{differ} of {tried} differ");
}

/// What a neighbour tells: the angle of attack a little off, the rise not known.
fn told(balance: &Balance, off_deg: f64) -> Near {
    Near::at(balance.alpha_rad + off_deg.to_radians())
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(1500))]

    #[test]
    fn from_a_neighbour_the_same_root_is_found(s in situations(), off_deg in -3.0..3.0f64) {
        let family = plate_polar();
        let e = element(&family, s);
        if let Some(found) = e.balance() {
            let mut near = told(&found, off_deg);
            let again = e.balance_near(&mut near).expect("an element in balance stays so");
            prop_assert!((again.inflow_rad - found.inflow_rad).abs() < 1e-9, "{again:?} {found:?}");
            let once_more = e.balance_near(&mut near).expect("and again");
            prop_assert!((once_more.inflow_rad - found.inflow_rad).abs() < 1e-9);
        }
    }
}

#[test]
fn on_shipped_tables_a_neighbour_leads_to_the_same_root_in_half_the_lookups() {
    let family = library().family("clark-y", 9.0).unwrap();
    let mut runner = proptest::test_runner::TestRunner::deterministic();
    let (mut cold, mut warm) = (0, 0);
    for _ in 0..2000 {
        let (v, turning, ..) = situations().new_tree(&mut runner).unwrap().current();
        let ends = Ends::new(2.0, 0.7, 1.0, 0.15, true);
        let angle = (v / turning).atan().to_degrees() + 5.0;
        let e = element(family, (v, turning, angle, 0.05, ends));
        let found = e.balance().expect("an ordinary element has a balance");
        let again = e.balance_near(&mut told(&found, 0.2)).expect("so has it again");
        assert!((again.inflow_rad - found.inflow_rad).abs() < 1e-9, "{again:?} {found:?}");
        (cold, warm) = (cold + found.lookups, warm + again.lookups);
    }
    println!("{cold} lookups, {warm} from a neighbour");
    assert!(2 * warm < cold, "{warm} of {cold}");
}

/// What the residual was made of, put together anew from the balance it led to: momentum theory with drag in
/// both equations, and CT = 8/9 + (4 F − 40/9) a + (50/9 − 4 F) a² (M. L. Buhl, NREL/TP-500-36834, 2005; from
/// memory) in the windmill brake state.
#[test]
fn at_every_balance_the_air_takes_up_what_the_blade_gives() {
    let family = plate_polar();
    let mut runner = proptest::test_runner::TestRunner::deterministic();
    let mut counts = [0; 3];
    for _ in 0..6000 {
        let e = element(&family, situations().new_tree(&mut runner).unwrap().current());
        let Some(b) = e.balance() else { continue };
        let (through, around) = (e.axial_m_s + b.induced_axial_m_s, e.turning_m_s - b.induced_swirl_m_s);
        let square = b.speed_m_s.powi(2);
        assert!((through.hypot(around) / b.speed_m_s - 1.0).abs() < 1e-9, "{b:?}");
        assert!((through.atan2(around) - b.inflow_rad).abs() < 1e-9, "{b:?}");
        let (cn, ct) = b.normal_and_tangential();
        let (push, twist) = (e.solidity * cn * square, e.solidity * ct * square);
        let taken = 4.0 * b.loss * through.abs();
        let scale = square + e.axial_m_s.powi(2);
        assert!((twist - taken * b.induced_swirl_m_s).abs() < 1e-7 * scale, "{b:?}");
        if b.windmill_brake {
            let (v, f) = (e.axial_m_s, b.loss);
            let a = -b.induced_axial_m_s / v;
            let wanted = 8.0 / 9.0 + (4.0 * f - 40.0 / 9.0) * a + (50.0 / 9.0 - 4.0 * f) * a * a;
            assert!(a > 1.0 / 3.0, "{a}");
            assert!((-push / (v * v) - wanted).abs() * v * v < 1e-7 * scale, "{b:?} {wanted}");
        } else {
            assert!((push - taken * b.induced_axial_m_s).abs() < 1e-7 * scale, "{b:?}");
        }
        counts[usize::from(b.windmill_brake) + 2 * usize::from(through < 0.0)] += 1;
    }
    assert!(counts.iter().all(|n| *n > 50), "{counts:?}");
}

/// A blade set to push backwards turns the flow round while the air comes slowly, and brakes it where it
/// comes fast.
#[test]
fn the_flow_turns_round_up_to_the_speed_at_which_the_blade_holds_it() {
    let family = plate_polar();
    for (angle, solidity) in [(-10.0, 0.1), (-7.0, 0.3), (-20.0, 0.05)] {
        let inflow = |v: f64| {
            let e = element(&family, (v, 100.0, angle, solidity, Ends::new(2.0, 0.7, 1.0, 0.15, true)));
            e.balance().map(|b| b.inflow_rad).unwrap()
        };
        let cl = element(&family, (1.0, 100.0, angle, solidity, Ends::new(2.0, 0.7, 1.0, 0.15, true)));
        let held = 100.0 * (0.5 * solidity * -cl.section.at(angle.to_radians()).cl).sqrt();
        assert!(inflow(0.0) < 0.0 && inflow(0.99 * held) < 0.0, "{angle} {held}");
        assert!(inflow(1.01 * held) > 0.0 && inflow(3.0 * held) > 0.0, "{angle} {held}");
    }
    let still = element(&family, (0.0, 100.0, 10.0, 0.1, Ends::new(2.0, 0.7, 1.0, 0.15, true)));
    assert!(still.balance().unwrap().inflow_rad > 0.0);
}
