//! What an element of the blade is told of its place: solidity, stall delay, Reynolds and Mach number.

use std::f64::consts::{PI, TAU};

use spokeshave::air::Air;
use spokeshave::job::{DEMOS, Job};
use spokeshave::rig::Rig;
use spokeshave::rotor::Condition;

fn rig(stall_delay: bool, compressibility: bool) -> Rig {
    let mut job = Job::from_json(DEMOS[0].json).unwrap();
    (job.method.stall_delay, job.method.compressibility) = (stall_delay, compressibility);
    Rig::new(&job).unwrap()
}

/// Solidity `B c/(2π r)`; `3.1 (c/r)²` after Snel, Houwink and Bosschers (1994), full to 0.7 R, half at 0.75
/// R, none from 0.8 R on.
#[test]
fn a_ring_knows_its_solidity_and_its_share_of_stall_delay() {
    let rig = rig(true, true);
    let (tip, blades) = (rig.rotor.blade.radius_m, f64::from(rig.rotor.blade.count));
    let air = Air::standard(0.0, 0.0).unwrap();
    let at_rest = Condition { air, airspeed_m_s: 0.0, rotation_rad_s: 250.0, turn_rad: 0.0 };
    for (share, fade) in [(0.4, 1.0), (0.69, 1.0), (0.75, 0.5), (0.81, 0.0), (0.95, 0.0)] {
        let r = share * tip;
        let chord = rig.rotor.blade.cut(r).chord_m;
        let (element, found) = rig.rotor.element(&rig.rotor.ring(r), &at_rest);
        assert!((element.solidity - blades * chord / (TAU * r)).abs() < 1e-12, "{share}");
        let delay = fade * 3.1 * (chord / r).powi(2);
        assert!((found.stall_delay - delay).abs() < 1e-9, "{share} {} {delay}", found.stall_delay);
    }
}

#[test]
fn an_element_meets_the_air_at_its_own_reynolds_and_mach_number() {
    let air = Air::standard(600.0, 0.0).unwrap();
    let at = Condition { air, airspeed_m_s: 47.0, rotation_rad_s: 2500.0 * PI / 30.0, turn_rad: 0.0 };
    for compressibility in [true, false] {
        let rig = rig(true, compressibility);
        let r = 0.6 * rig.rotor.blade.radius_m;
        let (_, found) = rig.rotor.element(&rig.rotor.ring(r), &at);
        let around = at.rotation_rad_s * r;
        let speed = 47.0_f64.hypot(around);
        let reynolds = air.density_kg_m3 * speed * rig.rotor.blade.cut(r).chord_m / air.viscosity_pa_s;
        assert!((found.reynolds / reynolds - 1.0).abs() < 1e-12);
        let mach = if compressibility { speed / air.sound_speed_m_s } else { 0.0 };
        assert!((found.mach - mach).abs() < 1e-12);
        let chord = rig.rotor.blade.cut(r).chord_m;
        let delay = 3.1 * (chord / r * around / speed).powi(2);
        assert!((found.stall_delay - delay).abs() < 1e-12);
    }
}
