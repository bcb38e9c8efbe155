use super::*;

/// A demand's root by all elements and by few, over 0 to 10 by ten steps.
fn search<'f>(rough: &'f dyn Fn(f64) -> f64, exact: &'f dyn Fn(f64) -> f64, wanted: Wanted) -> Search<'f> {
    Search { range: 0.0..=10.0, steps: 10, wanted, rough, exact }
}

fn never(_: f64) -> f64 {
    panic!("not asked")
}

/// Rises through 1.2 and 6.7, falls through 4.1.
fn thrice(x: f64) -> f64 {
    (x - 1.2) * (x - 4.1) * (x - 6.7)
}

#[test]
fn of_several_roots_at_which_it_rises_the_wanted_one_is_found() {
    for (wanted, expected) in [(Wanted::Lowest, 1.2), (Wanted::Highest, 6.7)] {
        let (root, above) = search(&thrice, &thrice, wanted).root().unwrap();
        // The last step, 3e-4 of this range, leaves a hundredth or less.
        assert!((root.x - expected).abs() < 3e-6, "{root:?}");
        assert!(above.unwrap().abs() < 1e-3, "both are the same demand: {above:?}");
        let slope = (expected - 4.1) * (expected - 7.9 + expected);
        // It is a chord's, over the last step of the few elements but one, and only leads the next search: there a
        // hundredth off leaves a hundredth of a step that is small. 1.1e-3 comes out.
        assert!((root.slope / slope - 1.0).abs() < 1e-2, "{root:?} {slope}");
        let rough = search(&thrice, &never, wanted).rough_root().unwrap();
        assert!((rough.x - expected).abs() < 1e-3, "{rough:?}");
    }
}

#[test]
fn a_straight_demand_is_met_where_it_is_with_its_slope() {
    let exact = |x: f64| 3.0 * (x - 4.25);
    let rough = |x: f64| 3.0 * (x - 4.125);
    let (root, above) = search(&rough, &exact, Wanted::Highest).root().unwrap();
    assert!((root.x - 4.25).abs() < 1e-12 && (root.slope - 3.0).abs() < 1e-12, "{root:?}");
    assert!((above.unwrap() - 0.125).abs() < 1e-12, "{above:?}");
    // Bracketed by all elements: to a thousand-millionth of the range.
    let search = Search { steps: 4, ..search(&never, &exact, Wanted::Highest) };
    let root = search.exact_root().unwrap();
    assert!((root.x - 4.25).abs() < 1e-8 && (root.slope - 3.0).abs() < 1e-12, "{root:?}");
}

#[test]
fn the_line_through_a_step_leads_to_its_root_at_once() {
    let asked = std::cell::Cell::new(0);
    let demand = |x: f64| {
        asked.set(asked.get() + 1);
        3.0 * (x - 4.25)
    };
    let root = search(&demand, &never, Wanted::Highest).rough_within(((4.0, -0.75), (5.0, 2.25)));
    assert!((root.x - 4.25).abs() < 1e-12 && (root.slope - 3.0).abs() < 1e-12, "{root:?}");
    assert!(asked.get() <= 2, "{}", asked.get());
}

/// Few elements that come near to zero without reaching it do not rule out what all of them find; those that
/// stay far from it do.
#[test]
fn few_elements_rule_a_root_out_only_where_they_leave_no_doubt() {
    let hump = |x: f64| 0.3 - (x - 5.0).abs();
    let near = |x: f64| hump(x) - 0.4;
    let (root, above) = search(&near, &hump, Wanted::Highest).root().unwrap();
    assert!((root.x - 4.7).abs() < 1e-6 && above.is_none(), "{root:?} {above:?}");
    let far = |x: f64| hump(x) - 1.0;
    assert_eq!(search(&far, &never, Wanted::Highest).root(), Err(Missed::AboveRange));
    assert_eq!(search(&|x| -far(x), &never, Wanted::Lowest).root(), Err(Missed::BelowRange));
    assert_eq!(search(&far, &never, Wanted::Highest).rough_root(), Err(Missed::AboveRange));
}

/// A secant that would leave the neighbourhood, or runs down, is given up; its answer is then bracketed.
#[test]
fn a_secant_stays_near_where_it_starts() {
    let demand = |x: f64| x - 5.0;
    let search = search(&never, &demand, Wanted::Highest);
    let from = |x: f64, slope: f64| search.refined(Root { x, slope });
    // A tenth of the range is as far as it goes.
    assert!(from(5.9, 1.0).is_some() && from(4.1, 1.0).is_some());
    assert!(from(6.2, 1.0).is_none() && from(3.8, 1.0).is_none());
    assert!(from(5.2, -1.0).is_none());
    let outside = |x: f64| x - 10.2;
    let search = Search { exact: &outside, ..search };
    assert!(search.refined(Root { x: 9.9, slope: 1.0 }).is_none(), "beyond the range");
}

/// With a slope that is known a first step that is small is the last; without, it is looked at again.
#[test]
fn a_known_slope_saves_a_look() {
    let asked = std::cell::Cell::new(0);
    let demand = |x: f64| {
        asked.set(asked.get() + 1);
        2.0 * (x - 5.0)
    };
    let search = search(&never, &demand, Wanted::Highest);
    let near = Root { x: 5.0001, slope: 2.0 };
    assert!((search.refined_at_once(near).unwrap().x - 5.0).abs() < 1e-12);
    assert_eq!(asked.replace(0), 1);
    // With half the slope the step is twice as long, and the second look mends it.
    let root = search.refined(Root { slope: 1.0, ..near }).unwrap();
    assert!((root.x - 5.0).abs() < 1e-12 && (root.slope - 2.0).abs() < 1e-9, "{root:?}");
    assert_eq!(asked.get(), 2);
}

/// A demand that jumps through zero, over as many rpm as a propeller is looked for: bracketed to a
/// thousand-millionth of the range, and off by two of those at most.
#[test]
fn a_jump_is_bracketed_within_a_wide_range() {
    for jump in [1234.567, 3000.3, 4777.1] {
        let demand = |x: f64| if x < jump { -1.0 } else { 1.0 };
        let search = Search { range: 0.0..=5000.0, steps: 24, ..search(&never, &demand, Wanted::Highest) };
        let root = search.exact_root().unwrap();
        assert!((root.x - jump).abs() < 1e-5, "{root:?} {jump}");
    }
}
