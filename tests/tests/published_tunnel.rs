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

/// With the print's own angle, by photograph, the answer lies within 3 % of what the tunnel printed: its CT and CP are good to 1 to 3 %
/// at this size (J. B. Brandt and M. S. Selig, AIAA 2011-1255, from memory). Tables of quiet air, n = 9, are nearer than those of
/// disturbed air, n = 4: they are the default.
#[test]
fn validate_thrust_and_power_deters_2014() {
    let photographed = misfit(PRINT_TURN_DEG, 9.0);
    assert!(photographed.0 < 0.03 && photographed.1 < 0.03, "as photographed {photographed:?}");
    let disturbed = misfit(PRINT_TURN_DEG, 4.0);
    assert!(disturbed.0 > photographed.0 && disturbed.1 > photographed.1, "{disturbed:?} {photographed:?}");
}

/// At rest: CT within 2 %, CP within 3 % of the tunnel's, for the same reason.
#[test]
fn validate_at_rest_deters_2014() {
    let points = Rig::new(&job(PRINT_TURN_DEG, 9.0)).unwrap().analysis().flight_points;
    let rest = &points[MEASURED.len()].figures;
    assert!((rest.ct.unwrap() / AT_REST.0 - 1.0).abs() < 0.02, "{:?}", rest.ct);
    assert!((rest.cp.unwrap() / AT_REST.1 - 1.0).abs() < 0.03, "{:?}", rest.cp);
}

/// Known miss: with the angle of the design, 1.36° finer than the print measured, thrust is low by 11 % and power by 16 %. Which angle
/// the print really had is not known. An unexpected pass fails here, so that the list stays true.
#[test]
fn known_miss_at_the_design_angle() {
    let design = misfit(0.0, 9.0);
    assert!((0.09..0.13).contains(&design.0) && (0.14..0.18).contains(&design.1), "{design:?}");
}
