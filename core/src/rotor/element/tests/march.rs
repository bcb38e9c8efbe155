//! The parts of the search: where it looks first, how far it may step, what it hands back.

use std::f64::consts::FRAC_PI_2;

use super::*;

fn of(family: &Family, v: f64, angle_deg: f64, solidity: f64) -> Element<'_> {
    element(family, (v, 100.0, angle_deg, solidity, Ends::new(2.0, 0.7, 1.0, 0.15, true)))
}

/// With the angle of attack of a balance kept, the blade angle and all else of it come out again.
#[test]
fn with_its_angle_of_attack_kept_a_balance_is_found_again() {
    let family = plate_polar();
    for (v, angle_deg) in [(0.0, 8.0), (10.0, 9.0), (30.0, 22.0), (80.0, 42.0), (30.0, 30.0)] {
        let e = of(&family, v, angle_deg, 0.08);
        let found = e.balance().unwrap();
        let turned = Element { angle_rad: -0.4, ..e };
        let again = turned.balance_at(found.alpha_rad).unwrap();
        for (a, b) in [
            (again.inflow_rad, found.inflow_rad),
            (again.alpha_rad, found.alpha_rad),
            (again.section.cl, found.section.cl),
            (again.section.cd, found.section.cd),
            (again.induced_axial_m_s, found.induced_axial_m_s),
            (again.induced_swirl_m_s, found.induced_swirl_m_s),
        ] {
            // Speeds of 100 m/s off an inflow angle good to 1e-12.
            assert!((a - b).abs() < 1e-8, "{again:?} {found:?}");
        }
        assert_eq!(again.lookups, 1);
    }
}

/// Half a degree, or as far as the residual is known not to come to zero, but never past the end; halves
/// towards zero from either side.
#[test]
fn the_march_steps_by_half_a_degree_and_halves_towards_zero() {
    let half_degree = 0.5f64.to_radians();
    for (phi, end, clear, wanted) in [
        (0.5, 0.1, 0.0, 0.5 - half_degree),
        (0.1, 0.5, 0.0, 0.1 + half_degree),
        (-0.5, -0.1, 0.0, -0.5 + half_degree),
        (-0.1, -0.5, 0.0, -0.1 - half_degree),
        (0.5, 0.1, 0.25, 0.25),
        (0.1, 0.5, 0.25, 0.35),
        (0.5, 0.1, 0.45, 0.1),
        (0.5, 0.5 - 0.4 * half_degree, 0.0, 0.5 - 0.4 * half_degree),
        // Towards zero.
        (0.015, NEAR_ZERO_RAD, 0.0, 0.0075),
        (-0.015, -NEAR_ZERO_RAD, 0.0, -0.0075),
        (1.5e-7, NEAR_ZERO_RAD, 0.0, NEAR_ZERO_RAD),
        (0.3, NEAR_ZERO_RAD, 0.0, 0.3 - half_degree),
        // Away from zero, or not as far as that.
        (0.015, 0.5, 0.0, 0.015 + half_degree),
        (-0.015, -0.5, 0.0, -0.015 - half_degree),
        (0.019, 0.001, 0.0, 0.019 - half_degree),
        (NEAR_ZERO_RAD, 0.5, 0.0, NEAR_ZERO_RAD + half_degree),
    ] {
        let found = stepped(phi, end, clear);
        assert!((found - wanted).abs() < 1e-15, "{phi} {end} {clear} {found} {wanted}");
    }
}

/// What the march relies on, put together anew: the momentum terms' greatest rise, with the greatest `sin 2φ`
/// between the two angles, and the section's.
#[test]
fn the_greatest_rise_is_that_of_momentum_and_section() {
    let family = plate_polar();
    let spans = [(0.1, 0.3), (0.3, 0.1), (-0.3, -0.1), (-0.1, -0.3), (0.02, 0.7), (0.3, 1.2), (-1.2, -0.3)];
    for (v, solidity) in [(0.0, 0.05), (30.0, 0.1), (170.0, 0.3)] {
        let e = of(&family, v, 20.0, solidity);
        for (a, b) in spans {
            let between = (0..=4000).map(|i| a + (b - a) * f64::from(i) / 4000.0);
            let sin_2phi = between.map(|p| (2.0 * p).sin().abs()).fold(0.0, f64::max);
            let speed = v.hypot(100.0);
            let momentum = 5.1 * 100.0 / speed * sin_2phi + 6.1 * v / speed;
            let wanted = momentum + solidity * e.section.steepest();
            let found = e.steepest(a, b, &e.flow());
            // The sampled sine misses its top by (step)² at most.
            assert!((found / wanted - 1.0).abs() < 1e-6, "{v} {a} {b} {found} {wanted}");
        }
    }
}

/// Between an inflow angle and the nearest one at which the residual may come to zero it does not.
#[test]
fn within_what_is_clear_the_residual_keeps_its_sign() {
    let family = plate_polar();
    let mut runner = proptest::test_runner::TestRunner::deterministic();
    let (mut tried, mut telling) = (0, 0);
    for _ in 0..400 {
        let e = element(&family, situations().new_tree(&mut runner).unwrap().current());
        let flow = e.flow();
        for i in 1..30 {
            let (phi, end) = (0.05 * f64::from(i), FRAC_PI_2);
            let t = e.terms(phi);
            let value = flow.residual(&t);
            let clear = e.clear_rad(phi, value, end, &flow);
            assert!((clear * e.steepest(phi, end, &flow) - value.abs()).abs() < 1e-12);
            for share in [0.3, 0.7, 0.999] {
                let there = e.terms((phi + share * clear).min(end));
                // In the windmill brake state the bound may be broken.
                if !(t.windmill_brake || there.windmill_brake) {
                    assert!((flow.residual(&there) > 0.0) == (value > 0.0), "{phi} {clear}");
                    tried += 1;
                }
            }
            telling += i32::from(clear > STEP_RAD);
        }
    }
    assert!(tried > 10_000 && telling > 1000, "{tried} {telling}");
}

/// At rest the flow comes from the side that lift sends it from, and from nowhere behind; in flight from ahead,
/// unless the blade turns it round.
#[test]
fn the_search_begins_where_lift_sends_the_flow() {
    let family = plate_polar();
    // Lift is nothing at −3.5°; above 8.6° (0.15 rad) it is surely positive.
    for (v, angle_deg, signs) in [
        (0.0, 20.0, vec![1.0, -1.0]),
        (0.0, 5.0, vec![1.0, -1.0]),
        (0.0, -8.0, vec![-1.0, 1.0]),
        (30.0, 20.0, vec![1.0, 1.0, -1.0]),
        (90.0, -8.0, vec![1.0, 1.0, -1.0]),
        (5.0, -8.0, vec![-1.0, 1.0, 1.0]),
    ] {
        let (brackets, count) = of(&family, v, angle_deg, 0.1).brackets();
        let found: Vec<f64> = brackets[..count].iter().map(|(lo, hi)| (lo + hi).signum()).collect();
        assert_eq!(found, signs, "{v} {angle_deg}");
        assert!(v == 0.0 || brackets[..count].iter().any(|(_, hi)| *hi > 3.0));
    }
}

/// Where the flow is turned round, too, the loss is Prandtl's: of tip and hub by the size of the inflow angle.
#[test]
fn the_loss_of_a_balance_is_prandtls_in_either_flow() {
    let family = plate_polar();
    for (v, angle_deg) in [(0.0, -10.0), (5.0, -10.0), (0.0, 10.0), (40.0, 25.0)] {
        let ends = Ends::new(2.0, 0.93, 1.0, 0.5, true);
        let b = element(&family, (v, 100.0, angle_deg, 0.1, ends)).balance().unwrap();
        assert_eq!(b.inflow_rad < 0.0, angle_deg < 0.0);
        let sin = b.inflow_rad.abs().sin();
        let one_end = |f: f64| 2.0 / PI * (-f / sin).exp().acos();
        // Two blades at 0.93 R, the hub at 0.5 R.
        let wanted = one_end(0.07 / 0.93) * one_end(0.43 / 0.5);
        assert!((b.loss - wanted).abs() < 1e-12 && wanted < 0.99, "{b:?} {wanted}");
    }
}

/// M. L. Buhl (NREL/TP-500-36834, 2005): momentum theory up to an induction of 0.4, his relation from there on.
#[test]
fn the_windmill_brake_state_begins_at_an_induction_of_two_fifths() {
    let family = plate_polar();
    let mut counts = [0; 2];
    for i in 0..600 {
        let v = 20.0 + 0.1 * f64::from(i);
        let Some(b) = of(&family, v, -6.0, 0.25).balance() else { continue };
        let a = -b.induced_axial_m_s / v;
        if b.inflow_rad <= 0.0 {
            continue;
        }
        assert!(if b.windmill_brake { a >= 0.4 - 1e-9 } else { a <= 0.4 + 1e-9 }, "{v} {a} {b:?}");
        if (0.38..0.42).contains(&a) {
            counts[usize::from(b.windmill_brake)] += 1;
        }
    }
    assert!(counts.iter().all(|n| *n >= 5), "{counts:?}");
}

#[test]
fn a_bare_end_has_no_balance_whatever_a_neighbour_tells() {
    let family = plate_polar();
    for ends in [Ends::new(2.0, 1.0, 1.0, 0.15, true), Ends::new(2.0, 0.15, 1.0, 0.15, true)] {
        let e = element(&family, (20.0, 100.0, 15.0, 0.1, ends));
        assert_eq!(e.balance(), None);
        assert_eq!(e.balance_at(0.05), None);
        for alpha_deg in [1.0f64, 2.0, 3.5, 5.0] {
            assert_eq!(e.balance_near(&mut Near::at(alpha_deg.to_radians())), None);
        }
    }
}

/// Elements close to stall that have three balances ahead, (V, blade angle, solidity): from a neighbour that stood
/// near any of them, or far off, the one of least angle of attack is found all the same.
#[test]
fn from_a_neighbour_in_another_balance_the_nearest_is_found() {
    let family = plate_polar();
    for (v, angle_deg, solidity) in [
        (0.0, 30.0, 0.3),
        (0.0, 38.0, 0.6),
        (2.0, 39.0, 0.6),
        (10.0, 42.0, 0.6),
        (20.0, 45.0, 0.6),
        (35.0, 53.0, 0.6),
        (50.0, 58.0, 0.6),
        (80.0, 68.0, 0.6),
    ] {
        let e = of(&family, v, angle_deg, solidity);
        let roots = scanned(&e, NEAR_ZERO_RAD, FRAC_PI_2, 0.2f64.to_radians());
        assert_eq!(roots.len(), 3, "{v} {angle_deg} {solidity}");
        let found = e.balance().unwrap().inflow_rad;
        assert!((found - roots[0]).abs() < 1e-9, "{v} {angle_deg} {solidity}");
        let near_roots = roots.iter().map(|phi| (e.angle_rad - phi).to_degrees());
        let others = (-30..=60).map(f64::from);
        for alpha_deg in near_roots.flat_map(|a| [a - 0.1, a - 0.01, a, a + 0.01, a + 0.1]).chain(others) {
            let again = e.balance_near(&mut Near::at(alpha_deg.to_radians())).unwrap();
            assert!((again.inflow_rad - found).abs() < 1e-9, "{v} {angle_deg} {alpha_deg} {again:?} {found}");
        }
    }
}

/// Beyond where lift rises steeply, too, a neighbour spares looks: the few that see to it that nothing lies nearer
/// find nothing.
#[test]
fn towards_stall_a_neighbour_still_spares_looks() {
    let family = plate_polar();
    let (mut tried, mut cold, mut warm) = (0, 0, 0);
    for i in 0..200 {
        let e = of(&family, 30.0, 20.0 + 0.1 * f64::from(i), 0.05);
        let found = e.balance().unwrap();
        let stall = e.section.stall_rad();
        if (0.8 * stall..0.97 * stall).contains(&found.alpha_rad) {
            let again = e.balance_near(&mut told(&found, 0.1)).unwrap();
            assert!((again.inflow_rad - found.inflow_rad).abs() < 1e-9, "{again:?} {found:?}");
            (tried, cold, warm) = (tried + 1, cold + found.lookups, warm + again.lookups);
        }
    }
    assert!(tried > 10 && 10 * warm < 9 * cold, "{tried} tried, {warm} of {cold}");
}

/// Braking elements close to where lift downward stalls that have three balances ahead, (V, blade angle, solidity):
/// the one of least angle of attack is found, of which the first two lie within 40 % of that stall.
#[test]
fn where_lift_downward_stalls_the_nearest_of_three_balances_is_found() {
    let family = upside_down();
    for (v, angle_deg, solidity) in [
        (40.0, -7.0, 0.2),
        (55.0, 5.0, 0.2),
        (80.0, 12.0, 0.3),
        (110.0, 17.0, 0.45),
        (80.0, -2.0, 0.6),
        (150.0, 21.0, 0.6),
    ] {
        let e = of(&family, v, angle_deg, solidity);
        let roots = scanned(&e, NEAR_ZERO_RAD, FRAC_PI_2, 0.2f64.to_radians());
        assert_eq!(roots.len(), 3, "{v} {angle_deg} {solidity}");
        assert!(roots[1] - e.angle_rad < -1.4 * e.section.negative_stall_rad(), "{v} {angle_deg} {solidity}");
        let found = e.balance().unwrap().inflow_rad;
        assert!((found - roots[0]).abs() < 1e-9, "{v} {angle_deg} {solidity} {found} {roots:?}");
    }
}

/// What an element leaves behind that fast air from ahead meets nearly across its chord, told to one at rest or
/// nearly so: steps from there run down the residual and far out of the flow from ahead, and lead to no balance but
/// the one that a scan finds.
#[test]
fn from_a_neighbour_of_quite_another_kind_the_same_balance_is_found() {
    let family = plate_polar();
    for (left, here) in [
        ((100.0, -36.0, 0.1), (0.0, 5.0, 0.05)),
        ((100.0, -36.0, 0.1), (0.0, 5.0, 0.1)),
        ((200.0, -21.0, 0.1), (5.0, 3.0, 0.1)),
        ((200.0, -17.0, 0.1), (0.0, 3.0, 0.1)),
    ] {
        let [before, e] = [left, here].map(|(v, angle_deg, solidity)| of(&family, v, angle_deg, solidity));
        let mut near = told(&before.balance().unwrap(), 0.0);
        before.balance_near(&mut near).unwrap();
        let found = e.balance_near(&mut near).unwrap().inflow_rad;
        let expected = by_scan(&e).unwrap();
        assert!((found - expected).abs() < 1e-9, "{left:?} {here:?} {found} {expected}");
    }
}

/// An element whose air comes mostly from ahead, close to where its lift downward stalls and fades into a plate's: of
/// its three balances the one of least angle of attack is found.
#[test]
fn where_lift_downward_fades_into_a_plates_the_nearest_of_three_balances_is_found() {
    let (family, x) = (plate_polar(), 0.994);
    let ends = Ends::new(3.0, x, 1.0, 0.15, true).exact_at_tip(3, x);
    let e = element(&family, (65.64, 22.4, 15.39, 0.5344, ends));
    let roots = scanned(&e, NEAR_ZERO_RAD, FRAC_PI_2, 0.1f64.to_radians());
    assert_eq!(roots.len(), 3, "{roots:?}");
    let found = e.balance().unwrap().inflow_rad;
    assert!((found - roots[0]).abs() < 1e-9, "{found} {roots:?}");
}
