use super::*;
use crate::fit::top_speed::fastest;
use crate::job::{Aircraft, DEMOS, Job};

fn job() -> Job {
    Job::from_json(DEMOS[0].json).unwrap()
}

fn turned(turn_deg: f64) -> Rig {
    let mut job = job();
    job.propeller.pitch_control = PitchControl::GroundAdjustable { turn_deg };
    // Parts in the slipstream take a tenth of the thrust.
    let Some(Aircraft::Aeroplane(a)) = &mut job.aircraft else { panic!("an aeroplane") };
    a.slipstream_drag_area_m2 = Some(0.18);
    Rig::new(&job).unwrap()
}

fn still(rig: &Rig) -> Condition {
    let air = crate::air::Air::standard(0.0, 0.0).unwrap();
    rig.unsolved(air, 0.0)
}

/// Two equations by hand: 2 x + 3 y + 0.08 = 0 and −x + 4 y − 0.04 = 0 at x = −0.04, y = 0.
#[test]
fn a_step_solves_both_remainders() {
    let rises = [[2.0, 3.0], [-1.0, 4.0]];
    let [x, y] = to_nothing(&rises, [0.08, -0.04]).unwrap();
    assert!((x + 0.04).abs() < 1e-15 && y.abs() < 1e-15, "{x} {y}");
    let [x, y] = to_nothing(&rises, [0.05, 0.14]).unwrap();
    assert!((2.0 * x + 3.0 * y + 0.05).abs() < 1e-15 && (4.0 * y - x + 0.14).abs() < 1e-15, "{x} {y}");
    assert!(to_nothing(&rises, [0.3, -0.15]).is_none(), "a step of 0.15");
    assert!(to_nothing(&[[1.0, 2.0], [2.0, 4.0]], [0.01, 0.01]).is_none(), "the rises tell nothing");
}

#[test]
fn a_condition_is_moved_by_shares() {
    let at = Condition { airspeed_m_s: 50.0, rotation_rad_s: 300.0, ..still(&turned(0.0)) };
    let there = moved(&at, [0.01, -0.02]);
    assert!((there.airspeed_m_s - 50.0 * 0.01_f64.exp()).abs() < 1e-12);
    assert!((there.rotation_rad_s - 300.0 * (-0.02_f64).exp()).abs() < 1e-12);
}

/// From one propeller to the next, with the throttle open and held at the limit rpm: led there, and to where
/// the look over all speeds comes.
#[test]
fn a_top_speed_leads_to_that_of_a_propeller_a_little_different() {
    for (turn_deg, held) in [(0.0, false), (-8.0, true)] {
        let before = turned(turn_deg);
        let mut near = TopNear::from(fastest(&before, &still(&before)).unwrap());
        assert_eq!(near.full.held, held);
        for more in [0.2, 0.4, 0.3] {
            let rig = turned(turn_deg + more);
            let at = still(&rig);
            near = near.on(&rig, &at).expect("led there");
            let looked = fastest(&rig, &at).unwrap();
            let (a, b) = (near.full.condition, looked.condition);
            // A last step of 1e-6 here, and there what a root leaves.
            assert!((a.airspeed_m_s / b.airspeed_m_s - 1.0).abs() < 3e-6, "{a:?} {b:?}");
            assert!((a.rotation_rad_s / b.rotation_rad_s - 1.0).abs() < 3e-6, "{a:?} {b:?}");
            assert!((near.full.loads.thrust_n / looked.loads.thrust_n - 1.0).abs() < 1e-5);
            assert!(near.full.held == held && near.rises.is_some());
        }
    }
}

/// Rises by definition, from two places a thousandth apart either way.
#[test]
fn rises_are_those_of_the_remainders() {
    let rig = turned(0.0);
    let at = fastest(&rig, &still(&rig)).unwrap().condition;
    let left = |at: &Condition| left_over(&rig, at, false, &mut Neighbour::default()).unwrap().0;
    let here = left(&at);
    assert!(here.iter().all(|l| l.abs() < LEFT_OVER), "{here:?}");
    // Beside the answer, where something is left over.
    let at = moved(&at, [0.05, 0.05]);
    let here = left(&at);
    assert!(here.iter().all(|l| l.abs() > 0.02), "{here:?}");
    let rises = measured(&rig, &at, false, here, &mut Neighbour::default()).unwrap();
    for i in 0..2 {
        for (by, step) in [(0, [APART, 0.0]), (1, [0.0, APART])] {
            let back = step.map(|s| -s);
            let expected = (left(&moved(&at, step))[i] - left(&moved(&at, back))[i]) / (2.0 * APART);
            // One-sided differences against two-sided: half a thousandth of the bend, which is a few.
            assert!((rises[i][by] - expected).abs() < 0.02, "{rises:?} {expected}");
        }
    }
    // Held, what is left to the limit rpm.
    let held = left_over(&rig, &at, true, &mut Neighbour::default()).unwrap().0[1];
    assert!((held - (3300.0 / rpm_of(&at) - 1.0)).abs() < 1e-12, "{held}");
}

#[test]
fn a_governed_propeller_is_left_to_the_look_over_all_speeds() {
    let before = turned(0.0);
    let near = TopNear::from(fastest(&before, &still(&before)).unwrap());
    let mut job = job();
    job.propeller.pitch_control =
        PitchControl::ConstantSpeed { rpm: 2900.0, turn_min_deg: -5.0, turn_max_deg: 9.0 };
    let rig = Rig::new(&job).unwrap();
    assert!(near.on(&rig, &still(&rig)).is_none());
}

/// What casts doubt on an answer, one thing after the other.
#[test]
fn an_answer_is_sound_only_within_all_its_bounds() {
    let rig = turned(0.0);
    let air = still(&rig).air;
    // More rpm, less power to spare; faster, less thrust to spare, the rpm following.
    let good: Rises = [[-2.0, 3.0], [1.0, -4.0]];
    let sound = |rpm: f64, v: f64, power: f64, held: bool, rises: &Rises| {
        let rotation_rad_s = crate::rig::rotation_rad_s(rpm);
        let at = Condition { air, airspeed_m_s: v, rotation_rad_s, turn_rad: 0.0 };
        let loads = Loads { torque_n_m: power / rotation_rad_s, ..Loads::default() };
        super::sound(&rig, &at, &loads, held, rises)
    };
    assert!(sound(2900.0, 50.0, 50_000.0, false, &good));
    assert!(!sound(3305.0, 50.0, 50_000.0, false, &good), "past the limit rpm");
    assert!(!sound(1990.0, 50.0, 50_000.0, false, &good), "below the engine's curve");
    assert!(!sound(2900.0, 240.0, 50_000.0, false, &good), "beyond Mach 0.7, 238 m/s");
    assert!(!sound(2900.0, 50.0, 50_000.0, false, &[[-2.0, 3.0], [1.0, 4.0]]), "an unstable rpm");
    // Along what the engine gives the rpm rises by c/−d with speed: −2 + 3 · 1/4 falls, −2 + 12 · 1/4 rises.
    assert!(!sound(2900.0, 50.0, 50_000.0, false, &[[-2.0, 12.0], [1.0, -4.0]]), "faster still has thrust");
    assert!(sound(2900.0, 50.0, 50_000.0, false, &[[1.0, 12.0], [-1.0, -4.0]]), "slower turns gather it");
    // Held at the limit, where 58.6 kW are given.
    assert!(sound(3300.0, 50.0, 58_000.0, true, &good));
    assert!(!sound(3300.0, 50.0, 59_200.0, true, &good), "more than the engine gives");
    assert!(!sound(3300.0, 50.0, -100.0, true, &good), "driven by the air");
}
