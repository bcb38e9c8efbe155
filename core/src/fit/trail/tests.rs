use super::super::root::Wanted;
use super::*;
use crate::air::Air;
use crate::rotor::{Condition, Loads};

fn met(airspeed_m_s: f64, x: f64) -> Met {
    let air = Air::standard(0.0, 0.0).unwrap();
    Met {
        condition: Condition { air, airspeed_m_s, rotation_rad_s: 1.0, turn_rad: 0.0 },
        loads: Loads::default(),
        free: Free::Rpm,
        root: Root { x, slope: 1.0 },
        above_rough: Some(2.0),
        width: 1000.0,
        steepness: None,
        measured: true,
    }
}

const ALL: RangeInclusive<f64> = f64::NEG_INFINITY..=f64::INFINITY;

fn guessed(trail: &Trail, v: f64) -> f64 {
    trail.guess(Free::Rpm, v, &ALL).unwrap().x
}

/// Four answers carry a cubic on exactly, however they are spaced; fewer what they can.
#[test]
fn a_guess_is_the_polynomial_through_the_last_answers() {
    let cubic = |v: f64| 2000.0 + 3.0 * v - 0.2 * v * v + 0.01 * v.powi(3);
    let mut trail = Trail::default();
    assert!(trail.guess(Free::Rpm, 1.0, &ALL).is_none());
    trail.push(&met(1.0, cubic(1.0)));
    assert!((guessed(&trail, 9.0) - cubic(1.0)).abs() < 1e-9);
    trail.push(&met(3.0, cubic(3.0)));
    let line = cubic(1.0) + (cubic(3.0) - cubic(1.0)) / 2.0 * 8.0;
    assert!((guessed(&trail, 9.0) - line).abs() < 1e-9);
    for v in [4.0, 7.0] {
        trail.push(&met(v, cubic(v)));
    }
    for v in [2.0, 9.0, 15.0] {
        assert!((guessed(&trail, v) - cubic(v)).abs() < 1e-8, "{v}");
    }
    // The fifth drops the first.
    trail.push(&met(8.0, cubic(8.0)));
    assert_eq!(trail.past.len(), MOST);
    assert!((guessed(&trail, 12.0) - cubic(12.0)).abs() < 1e-8);
    let held = trail.guess(Free::Rpm, 12.0, &(0.0..=1500.0)).unwrap().x;
    assert!((held - 1500.0).abs() < 1e-12, "within the range");
    assert!(trail.guess(Free::Turn, 12.0, &ALL).is_none());
    trail.push(&Met { free: Free::Turn, ..met(9.0, 0.1) });
    assert!(trail.past.len() == 1 && trail.guess(Free::Rpm, 12.0, &ALL).is_none());
}

/// A guess within a thousandth of the range earns trust, one farther off loses it.
#[test]
fn the_last_guess_decides_whether_the_next_is_trusted() {
    // The range is 1000 wide, and one answer alone guesses itself.
    for (x, trusted) in [(2000.9, true), (1999.1, true), (2001.1, false), (1998.9, false)] {
        let mut trail = Trail::default();
        trail.push(&met(10.0, 2000.0));
        assert!(!trail.trusted);
        trail.push(&met(11.0, x));
        assert_eq!(trail.trusted, trusted, "{x}");
    }
}

#[test]
fn answers_found_at_once_are_counted_until_one_is_measured() {
    let mut trail = Trail::default();
    trail.push(&met(11.0, 2000.0));
    assert_eq!(trail.unmeasured, 0);
    trail.push(&Met { measured: false, ..met(12.0, 2000.0) });
    trail.push(&Met { measured: false, ..met(13.0, 2000.0) });
    assert_eq!(trail.unmeasured, 2);
    trail.push(&met(14.0, 2000.0));
    assert_eq!(trail.unmeasured, 0);
}

#[test]
fn beside_a_line_the_nearest_four_of_one_kind_lead() {
    let mut line: Vec<Met> = (0..10).map(|i| met(f64::from(i), 100.0 * f64::from(i))).collect();
    let speeds = |line: &[Met], v: f64| Trail::beside(line, v).past.iter().map(|p| p.0).collect::<Vec<_>>();
    assert_eq!(speeds(&line, 6.1), [6.0, 7.0, 5.0, 8.0]);
    assert_eq!(speeds(&line, -3.0), [0.0, 1.0, 2.0, 3.0]);
    assert!(
        Trail::beside(&line, 6.1).trusted && (guessed(&Trail::beside(&line, 6.1), 6.1) - 610.0).abs() < 1e-9
    );
    assert!(!Trail::beside(&line[..3], 1.0).trusted && Trail::beside(&[], 1.0).past.is_empty());
    line[7].free = Free::Turn;
    assert_eq!(speeds(&line, 6.1), [6.0, 5.0, 8.0, 4.0]);
    assert_eq!(speeds(&line, 7.1), [7.0]);
}

/// Few elements that lie 2 below all of them: the guess is taken down to them, bettered, and brought up again.
#[test]
fn a_guess_that_is_not_trusted_is_bettered_by_few_elements() {
    let (rough, exact) = (|x: f64| x - 2048.0, |x: f64| x - 2050.0);
    let search =
        Search { range: 1000.0..=3000.0, steps: 1, wanted: Wanted::Highest, rough: &rough, exact: &exact };
    let trail = Trail { past: vec![(10.0, met(10.0, 2000.0))], ..Trail::default() };
    let (root, above) = trail.followed(Root { x: 2060.0, slope: 1.0 }, &search).unwrap();
    assert!((root.x - 2050.0).abs() < 1e-9 && (above.unwrap() - 2.0).abs() < 1e-9, "{root:?} {above:?}");
    // 199 above few elements' root is as far as a secant goes, a tenth of the range; 201 is not.
    assert!(trail.followed(Root { x: 2050.0 + 199.0, slope: 1.0 }, &search).is_some());
    assert!(trail.followed(Root { x: 2050.0 + 201.0, slope: 1.0 }, &search).is_none());
}

/// A trusted guess asks all elements alone: once where the slope is known, and again after a few answers.
#[test]
fn a_trusted_guess_asks_all_elements_alone() {
    let asked = std::cell::Cell::new(0);
    let exact = |x: f64| {
        asked.set(asked.get() + 1);
        x - 2050.0
    };
    let rough = |_: f64| -> f64 { panic!("not asked") };
    let search =
        Search { range: 1000.0..=3000.0, steps: 1, wanted: Wanted::Highest, rough: &rough, exact: &exact };
    let looks = |trail: &Trail| {
        asked.set(0);
        let (root, above) = trail.followed(Root { x: 2050.02, slope: 1.0 }, &search).unwrap();
        assert!((root.x - 2050.0).abs() < 1e-9 && above == Some(2.0), "{root:?} {above:?}");
        asked.get()
    };
    let known = Met { steepness: Some(Steepness::default()), ..met(10.0, 2000.0) };
    let mut trail = Trail { past: vec![(10.0, known)], trusted: true, ..Trail::default() };
    assert_eq!(looks(&trail), 1);
    trail.unmeasured = MOST_UNMEASURED - 1;
    assert_eq!(looks(&trail), 1);
    trail.unmeasured = MOST_UNMEASURED;
    assert_eq!(looks(&trail), 2);
    trail = Trail { past: vec![(10.0, met(10.0, 2000.0))], trusted: true, ..Trail::default() };
    assert_eq!(looks(&trail), 2);
    assert!(trail.steepness(Free::Rpm).is_none() && trail.steepness(Free::Turn).is_none());
}

#[test]
fn the_steepness_of_the_last_answer_is_that_of_its_free_quantity() {
    let mut trail = Trail::default();
    trail.push(&Met { steepness: Some(Steepness::default()), ..met(10.0, 2000.0) });
    assert!(trail.steepness(Free::Rpm).is_some() && trail.steepness(Free::Turn).is_none());
}
