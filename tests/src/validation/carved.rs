//! Blades as measured: what unequal masses and a blade out of track do to the shaft.

use std::f64::consts::TAU;

use spokeshave::carved::analyse;
use spokeshave::job::{BladeReading, Carved, CarvedBlade, DEMOS, Job};
use spokeshave::rig::Rig;
use spokeshave::wood::{BladeBeam, mass};

use crate::check::{Basis, Check, Mark};

/// The light aeroplane with both blades read as drawn at every station, then changed.
fn read(change: impl Fn(&mut BladeReading)) -> Rig {
    let job = Job::from_json(DEMOS[0].json).expect("a demo");
    let drawn = Rig::new(&job).expect("a demo");
    let blade = &drawn.rotor.blade;
    let as_drawn = |radius_m: f64| {
        let cut = blade.cut(radius_m);
        BladeReading {
            radius_m,
            angle_deg: Some(cut.angle_rad.to_degrees()),
            chord_m: Some(cut.chord_m),
            thickness_m: Some(cut.thickness_ratio * cut.chord_m),
            track_m: None,
            confirmed: false,
        }
    };
    let even = CarvedBlade { readings: blade.station_radii_m().map(as_drawn).collect() };
    let mut other = even.clone();
    other.readings.iter_mut().for_each(change);
    let carved = Carved { blades: vec![other, even], ..Carved::default() };
    Rig::new(&Job { carved: Some(carved), ..job }).expect("a valid job")
}

const UNEQUAL: Basis = Basis {
    source: "one of two blades wider and thicker by 1 % everywhere is heavier by 1.01² − 1, which is its share \
             of the mass moment m r; turning, that pulls with m r ω² (mechanics)",
    mark: Mark::Computed,
    why: "the rounding of sums",
};

/// The unbalance of a blade of the same shape, a little larger.
pub(super) fn unequal() -> Vec<Check> {
    let rig = read(|r| {
        (r.chord_m, r.thickness_m) = (r.chord_m.map(|c| 1.01 * c), r.thickness_m.map(|t| 1.01 * t));
    });
    let found = analyse(&rig).expect("readings that can be");
    let balance = &found.balance;
    let even = balance.blades[1].moment_kg_m;
    let mut checks = vec![
        UNEQUAL.relative("unbalance over the moment of a blade", balance.unbalance_kg_m / even, 0.0201, 1e-9),
        UNEQUAL
            .relative(
                "weight at the tip that it equals",
                balance.grams_at_tip,
                1e3 * balance.unbalance_kg_m / rig.rotor.blade.radius_m,
                1e-9,
            )
            .unit("g"),
    ];
    checks.extend(found.flight_points.iter().map(|p| {
        let omega = p.carved.rpm.unwrap_or(f64::NAN) * TAU / 60.0;
        let force = p.once_per_turn.and_then(|once| once.mass_force_n).unwrap_or(f64::NAN);
        let pull = 0.0201 * even * omega * omega;
        UNEQUAL.relative(format!("pull once a turn, {}", p.drawn.name), force, pull, 1e-9).unit("N")
    }));
    checks
}

const TRACK: Basis = Basis {
    source: "a blade whose masses lie ahead by a (r − h), a straight lean from the edge of the hub at h, turns \
             with the couple ω² a (I − h S) across the shaft, I and S its moments of inertia and of mass \
             (mechanics)",
    mark: Mark::Computed,
    why: "the outermost reading, at 0.945 R, is held from there to the tip, which leaves less of a lean: at most \
          3 % of the couple",
};

/// The couple of a blade out of track.
pub(super) fn out_of_track() -> Vec<Check> {
    let slope = 0.004;
    let hub =
        Rig::new(&Job::from_json(DEMOS[0].json).expect("a demo")).expect("a demo").rotor.blade.hub_radius_m;
    let rig = read(|r| r.track_m = Some(slope * (r.radius_m - hub)));
    let mass = mass(&BladeBeam::new(&rig).expect("a known wood"));
    let lean = slope * (mass.blade_inertia_kg_m2 - hub * mass.static_moment_kg_m);
    let found = analyse(&rig).expect("readings that can be");
    let told = found.flight_points.iter().map(|p| {
        let omega = p.carved.rpm.unwrap_or(f64::NAN) * TAU / 60.0;
        let couple = p.once_per_turn.and_then(|once| once.track_moment_n_m).unwrap_or(f64::NAN);
        let whole = omega * omega * lean;
        TRACK.between(format!("couple, {}", p.drawn.name), couple, 0.97 * whole, whole).unit("N m")
    });
    told.collect()
}
