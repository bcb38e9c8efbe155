//! The whole analysis against a propeller measured in a wind tunnel (source in `spokeshave_tests::tunnel`).

use spokeshave::rig::Rig;
use spokeshave_tests::tunnel::{AT_REST, MEASURED, PRINT_TURN_DEG, job};

/// Root-mean-square misfit of CT and CP over the measured J, as shares of the values at the lowest J.
fn misfit(turn_deg: f64, n_crit: f64) -> (f64, f64) {
    let points = Rig::new(&job(turn_deg, n_crit)).unwrap().analysis().flight_points;
    let (ct0, cp0) = (MEASURED[0].1, MEASURED[0].2);
    let (mut ct_sum, mut cp_sum) = (0.0, 0.0);
    println!("turned {turn_deg}°, n = {n_crit}: J, CT (measured), CP (measured)");
    for (p, m) in points.iter().zip(&MEASURED) {
        let (ct, cp) = (p.figures.ct.unwrap(), p.figures.cp.unwrap());
        println!("  {:.4}  {ct:.4} ({:.4})  {cp:.4} ({:.4})", m.0, m.1, m.2);
        ct_sum += ((ct - m.1) / ct0).powi(2);
        cp_sum += ((cp - m.2) / cp0).powi(2);
    }
    let rest = &points[MEASURED.len()].figures;
    println!("  at rest {:.4} ({})  {:.4} ({})", rest.ct.unwrap(), AT_REST.0, rest.cp.unwrap(), AT_REST.1);
    let n = MEASURED.len() as f64;
    ((ct_sum / n).sqrt(), (cp_sum / n).sqrt())
}

/// The blade angle itself is uncertain by 1.36° (design against photograph), which moves CT by 8 % and CP by 7 %: that is the
/// tolerance at either end, and 5.5 % midway. Tables of quiet air, n = 9, are nearer than those of disturbed air, n = 4.
#[test]
fn validate_thrust_and_power_deters_2014() {
    let midway = misfit(PRINT_TURN_DEG / 2.0, 9.0);
    assert!(midway.0 < 0.055 && midway.1 < 0.055, "midway {midway:?}");
    let photographed = misfit(PRINT_TURN_DEG, 9.0);
    assert!(photographed.0 < 0.085 && photographed.1 < 0.085, "as photographed {photographed:?}");
    let design = misfit(0.0, 9.0);
    assert!(design.0 < 0.085, "as designed {design:?}");
    let disturbed = misfit(PRINT_TURN_DEG / 2.0, 4.0);
    assert!(disturbed.0 > midway.0, "the default n is the nearer one: {disturbed:?} {midway:?}");
}

/// From J 0.25 up the measured thrust lies between the answers for the two blade angles.
#[test]
fn validate_the_measurement_lies_between_the_two_angles() {
    let ct = |turn: f64| {
        let points = Rig::new(&job(turn, 9.0)).unwrap().analysis().flight_points;
        points.iter().map(|p| p.figures.ct.unwrap()).collect::<Vec<f64>>()
    };
    let (low, high) = (ct(0.0), ct(PRINT_TURN_DEG));
    for (i, (j, measured, _)) in MEASURED.iter().enumerate().filter(|(_, m)| m.0 > 0.25) {
        // 0.002 is the reading error of the balance at this size, common practice.
        assert!(
            (low[i] - 0.002..=high[i] + 0.002).contains(measured),
            "J {j}: {} {measured} {}",
            low[i],
            high[i]
        );
    }
}

/// Known misses: at rest and below J 0.25 the thrust comes out high whatever the angle, for momentum theory lets no wake
/// contract and the sections near the hub (37 % thick, chord not published) are held at the edge of the tables; and the power at the
/// design angle is low by 12 %. An unexpected pass fails here, so that the list stays true.
#[test]
fn known_misses_are_still_misses() {
    let rest = Rig::new(&job(0.0, 9.0)).unwrap().analysis().flight_points.pop().unwrap().figures.ct.unwrap();
    assert!(
        (1.05..1.12).contains(&(rest / AT_REST.0)),
        "thrust at rest over the measured one: {}",
        rest / AT_REST.0
    );
    let design = misfit(0.0, 9.0);
    assert!((0.10..0.135).contains(&design.1), "power at the design angle: {design:?}");
}
