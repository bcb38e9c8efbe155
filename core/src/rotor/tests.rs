//! The whole propeller against sums and formulas written out anew.

use std::f64::consts::PI;

use super::*;
use crate::job::{DEMOS, Job};
use crate::section::library;

/// The invented light aeroplane's propeller with something of its job changed.
pub(super) fn rotor(change: impl FnOnce(&mut Job)) -> Rotor {
    let mut job = Job::from_json(DEMOS[0].json).unwrap();
    change(&mut job);
    Rotor::new(Blade::new(&job).unwrap(), &job.method)
}

/// Standard air at sea level, 250 rad/s, blades as drawn.
pub(super) fn at_speed(airspeed_m_s: f64) -> Condition {
    let air = Air::standard(0.0, 0.0).unwrap();
    Condition { air, airspeed_m_s, rotation_rad_s: 250.0, turn_rad: 0.0 }
}

/// `∫ dr` and `∫ r dr`. The midpoint rule on `sin t` is too large by `(h/2)/sin(h/2)`, h the step of t, and its
/// places lie evenly about the middle of the blade; so both are known to rounding.
#[test]
fn the_rings_add_up_to_the_blade_from_hub_to_tip() {
    for elements in [5, 12, 40] {
        let rotor = rotor(|job| job.method.elements = elements);
        let (hub, tip) = (rotor.blade.hub_radius_m, rotor.blade.radius_m);
        assert_eq!(rotor.rings.len(), elements as usize);
        assert_eq!(rotor.rough_rings.len(), elements.min(12) as usize);
        for rings in [&rotor.rings, &rotor.rough_rings] {
            let radii: Vec<f64> = rings.iter().map(|ring| ring.cut.radius_m).collect();
            assert!(radii.is_sorted_by(|a, b| a < b) && hub < radii[0] && radii[radii.len() - 1] < tip);
            assert!(rings.iter().all(|ring| ring.width_m > 0.0));
            let half = 0.5 * PI / rings.len() as f64;
            let above = half / half.sin();
            let width: f64 = rings.iter().map(|ring| ring.width_m).sum();
            let moment: f64 = rings.iter().map(|ring| ring.width_m * ring.cut.radius_m).sum();
            assert!((width / (tip - hub) - above).abs() < 1e-12, "{elements} {width}");
            assert!((moment / (0.5 * (tip * tip - hub * hub)) - above).abs() < 1e-12, "{elements} {moment}");
            // Halfway between the edges of the elements, which lie at equal steps of t.
            let edge = |i: usize| hub + 0.5 * (tip - hub) * (1.0 - (2.0 * half * i as f64).cos());
            assert!(radii.iter().enumerate().all(|(i, r)| (edge(i)..edge(i + 1)).contains(r)));
        }
    }
}

/// `3.1 (c/r)²` of Snel, Houwink and Bosschers (1994) stops at 1 and is then lessened by the airspeed.
#[test]
fn beside_a_wide_root_stall_delay_stops_at_one() {
    let rotor = rotor(|_| ());
    let r = 0.125;
    let chord = rotor.blade.cut(r).chord_m;
    assert!(3.1 * (chord / r).powi(2) > 1.2);
    for v in [0.0, 20.0, 47.0] {
        let at = at_speed(v);
        let around = at.rotation_rad_s * r;
        let share = around * around / (v * v + around * around);
        let found = rotor.element(&rotor.ring(r), &at).1.stall_delay;
        assert!((found - share).abs() < 1e-12, "{v} {found} {share}");
    }
}

#[test]
fn a_ring_has_the_loss_that_the_job_asks_for() {
    for tip_loss in [TipLoss::Prandtl, TipLoss::Goldstein] {
        let rotor = rotor(|job| job.method.tip_loss = tip_loss);
        let (tip, hub, blades) = (rotor.blade.radius_m, rotor.blade.hub_radius_m, rotor.blade.count);
        for x in [0.3, 0.55, 0.86] {
            let plain = Ends::new(f64::from(blades), x * tip, tip, hub, true);
            let exact = plain.exact_at_tip(blades, x);
            for sin in [0.1, 0.3, 0.6] {
                let wanted = if tip_loss == TipLoss::Goldstein { exact } else { plain }.factor(sin);
                let found = rotor.ring(x * tip).ends.factor(sin);
                assert!((found - wanted).abs() < 1e-12, "{tip_loss:?} {x} {sin} {found} {wanted}");
            }
        }
    }
}

/// Between a station of one family and one of another the figures are led over in a straight line of radius.
#[test]
fn between_two_sections_the_element_has_a_share_of_each() {
    let rotor = rotor(|job| {
        for station in &mut job.propeller.stations[6..] {
            station.section = "raf-6".into();
        }
    });
    let radii: Vec<f64> = rotor.blade.station_radii_m().collect();
    for share in [0.0, 0.2, 0.7] {
        let ring = rotor.ring(radii[5] + share * (radii[6] - radii[5]));
        let (element, situation) = rotor.element(&ring, &at_speed(40.0));
        let [inner, outer] =
            ["clark-y", "raf-6"].map(|name| Local::new(library().family(name, 9.0).unwrap(), situation));
        let led = |a: f64, b: f64| (1.0 - share) * a + share * b;
        for alpha in [-0.1, 0.0, 0.07, 0.2, 0.5] {
            let (a, b, found) = (inner.at(alpha), outer.at(alpha), element.section.at(alpha));
            assert!((a.cl - b.cl).abs() > 1e-3 && (a.cd - b.cd).abs() > 1e-6, "{alpha}: the two differ");
            assert!((found.cl - led(a.cl, b.cl)).abs() < 1e-12, "{share} {alpha}");
            assert!((found.cd - led(a.cd, b.cd)).abs() < 1e-12, "{share} {alpha}");
        }
        let (a, b) = (inner.landmarks(), outer.landmarks());
        assert!((element.section.stall_rad() - led(a.stall, b.stall)).abs() < 1e-12);
        let negative = led(a.negative_stall, b.negative_stall);
        assert!((element.section.negative_stall_rad() - negative).abs() < 1e-12);
        // Relative: it is tens per radian.
        let steepest = led(inner.steepest(), outer.steepest());
        assert!((element.section.steepest() / steepest - 1.0).abs() < 1e-12);
        assert_eq!(element.section.parts().count(), if share > 0.0 { 2 } else { 1 });
        assert!((element.section.parts().map(|(_, w)| w).sum::<f64>() - 1.0).abs() < 1e-12);
    }
}

#[test]
fn looks_and_elements_without_a_balance_are_counted() {
    let rotor = rotor(|_| ());
    let at = at_speed(35.0);
    let lookups = |ring: &Ring| rotor.element(ring, &at).0.balance().unwrap().lookups;
    let each: Vec<u32> = rotor.rings.iter().map(lookups).collect();
    // Two looks to hold the root, two to close on it and one at it; a look each half degree would be 180.
    assert!(each.iter().all(|n| (5..180).contains(n)), "{each:?}");
    let all = rotor.loads(&at);
    assert_eq!((all.lookups, all.unbalanced), (each.iter().sum(), 0));
    // Every third is taken for one without a balance.
    let some = rotor.sum(&rotor.rings, &at, |i, element| element.balance().filter(|_| i % 3 != 0));
    assert_eq!(some.unbalanced, 14);
    assert_eq!(
        some.lookups,
        each.iter().enumerate().filter(|(i, _)| i % 3 != 0).map(|(_, n)| n).sum::<u32>()
    );
    let none = rotor.sum(&rotor.rings, &at, |_, _| None);
    assert_eq!(none, Loads { unbalanced: 40, ..Loads::default() });
}

/// Load by radius against the momentum that the air takes up (H. Glauert, *Airplane Propellers*, 1935):
/// `dT/dr = 4π r ρ F (V + u) u`, `dQ/dr = 4π r² ρ F (V + u) v`; and the pressure by the air's two speeds.
#[test]
fn the_spread_load_is_the_airs_momentum_and_adds_up_to_the_whole() {
    for v in [0.0, 35.0, 50.0] {
        let (rotor, at) = (rotor(|_| ()), at_speed(v));
        let (spread, density) = (rotor.spread(&at), at.air.density_kg_m3);
        assert_eq!(spread.len(), rotor.rings.len());
        let (mut thrust, mut torque) = (0.0, 0.0);
        for (graded, ring) in spread.iter().zip(&rotor.rings) {
            let r = graded.radius_m;
            assert_eq!(r, ring.cut.radius_m);
            let element = rotor.element(ring, &at).0;
            let b = element.balance().unwrap();
            let (through, around) = (v + b.induced_axial_m_s, at.rotation_rad_s * r - b.induced_swirl_m_s);
            let taken = 4.0 * PI * r * density * b.loss * through;
            // The balance closes to 1e-12 of the inflow angle; thrust is some hundred N/m, torque some ten N.
            assert!((graded.thrust_n_m - taken * b.induced_axial_m_s).abs() < 1e-6, "{v} {graded:?}");
            assert!((graded.torque_n - taken * r * b.induced_swirl_m_s).abs() < 1e-6, "{v} {graded:?}");
            let pressure = 0.5 * density * (through * through + around * around);
            assert!((graded.pressure_pa / pressure - 1.0).abs() < 1e-9, "{v} {graded:?}");
            assert_eq!(graded.alpha_rad, b.alpha_rad);
            let stall = [element.section.stall_rad(), element.section.negative_stall_rad()];
            assert_eq!(graded.stall_rad, stall);
            thrust += graded.thrust_n_m * ring.width_m;
            torque += graded.torque_n * ring.width_m;
        }
        let loads = rotor.loads(&at);
        assert!((loads.thrust_n / thrust - 1.0).abs() < 1e-12);
        assert!((loads.torque_n_m / torque - 1.0).abs() < 1e-12);
    }
}

#[test]
fn a_factor_of_power_multiplies_the_torque_alone() {
    let (as_worked_out, at) = (rotor(|_| ()), at_speed(40.0));
    assert_eq!(as_worked_out.power_factor(), 1.0);
    let taking = as_worked_out.clone().taking(1.07);
    let (one, other) = (as_worked_out.loads(&at), taking.loads(&at));
    assert_eq!((taking.power_factor(), other.thrust_n), (1.07, one.thrust_n));
    assert!((other.torque_n_m / one.torque_n_m - 1.07).abs() < 1e-12);
}
