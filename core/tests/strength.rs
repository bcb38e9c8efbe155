//! What must hold of the strength of a blade.

use crate::any_job::{cases, jobs};
use proptest::prelude::*;
use serde_json::Value;
use spokeshave::job::{
    DEMOS, Engine, Hub, Job, LinePoint, Making, OwnMaterial, PitchControl, Setting, Species, StressLimits,
    Wood,
};
use spokeshave::result::{CaseFigures, CaseKind, Finding, ModeKind, NearOrder, Strength};
use spokeshave::rig::Rig;
use spokeshave::wood::{strength, verdict};

fn demo(i: usize) -> Job {
    Job::from_json(DEMOS[i].json).unwrap()
}

fn sheet(job: &Job) -> Strength {
    strength(&Rig::new(job).unwrap()).unwrap()
}

fn margin(job: &Job) -> f64 {
    sheet(job).governing.unwrap().margin
}

fn with(change: impl Fn(&mut Wood)) -> Job {
    let mut job = demo(0);
    let mut wood = Wood::default();
    change(&mut wood);
    job.wood = Some(wood);
    assert_eq!(job.check(), vec![]);
    job
}

/// Numbers that JSON had to write as null although the sheet has an answer.
fn nulls(path: &str, value: &Value) -> Vec<String> {
    match value {
        Value::Null => vec![path.to_string()],
        Value::Object(o) => o.iter().flat_map(|(k, v)| nulls(&format!("{path}.{k}"), v)).collect(),
        Value::Array(a) => {
            a.iter().enumerate().flat_map(|(i, v)| nulls(&format!("{path}[{i}]"), v)).collect()
        }
        _ => Vec::new(),
    }
}

#[test]
fn every_demo_has_a_whole_sheet() {
    for (i, demo) in DEMOS.iter().enumerate() {
        let sheet = sheet(&self::demo(i));
        let missing = nulls("", &serde_json::to_value(&sheet).unwrap());
        let allowed = |p: &String| {
            [".thicker_m", ".hub", ".station", "_departure_deg", ".past_boss_m"]
                .iter()
                .any(|end| p.ends_with(end))
        };
        assert!(missing.iter().all(allowed), "{}: {missing:?}", demo.name);
        assert!(sheet.cases.iter().any(|c| c.kind == CaseKind::Overspeed), "{}", demo.name);
        // Every demo is drawn to hold, blade and hub, in the material it names.
        assert!(!sheet.material.assumed, "{}", demo.name);
        let least = sheet.governing.as_ref().unwrap();
        assert!(
            least.margin > 0.05 && sheet.hub.as_ref().unwrap().margin > 0.05,
            "{}: {}",
            demo.name,
            least.sentence
        );
        assert_eq!(sheet.verdict.finding, Finding::Held, "{}: {}", demo.name, sheet.verdict.sentence);
        assert!(sheet.running.iter().all(|r| r.settled), "{}: {:?}", demo.name, sheet.running);
        let modes: Vec<ModeKind> = sheet.vibration.lines.iter().map(|l| l.mode).collect();
        assert_eq!((modes[0], modes.len()), (ModeKind::Flap, 4), "{}", demo.name);
        for line in &sheet.vibration.lines {
            assert!(
                line.hz.windows(2).all(|w| w[1] > w[0] - 1e-9),
                "{}: turning stiffens: {line:?}",
                demo.name
            );
        }
    }
}

#[test]
fn a_job_without_a_material_is_judged_in_the_usual_one_and_told() {
    let mut job = demo(0);
    job.wood = None;
    let sheet = sheet(&job);
    assert!(
        sheet.material.assumed && sheet.assumptions[0].contains("yellow birch"),
        "{:?}",
        sheet.assumptions
    );
    assert!(sheet.hub.is_none());
}

/// What was not judged is told, and keeps a blade from being called within its limits.
#[test]
fn what_was_not_judged_is_told_and_is_not_called_held() {
    let whole = demo(0);
    let found = |job: &Job| {
        let told = sheet(job).verdict;
        assert_eq!(told, verdict(&Rig::new(job).unwrap()).unwrap());
        told
    };
    let missing = |job: &Job, part: &str| {
        let told = found(job);
        assert_eq!(told.finding, Finding::HeldAsFarAsJudged, "{part}: {}", told.sentence);
        assert!(told.missing.iter().any(|m| m.contains(part)), "{part}: {:?}", told.missing);
        assert!(told.warning().is_some_and(|w| w.contains(part)) && told.sentence.contains("Not judged"));
        let said = sheet(job).governing.unwrap().sentence;
        assert!(said.contains("as far as judged") && said.contains(part), "{said}");
    };
    let mut job = whole.clone();
    job.engine = None;
    missing(&job, "the job has no engine");
    missing(&job, "“Climb”");
    let mut job = whole.clone();
    job.aircraft = None;
    missing(&job, "“Cruise”");
    let mut job = whole.clone();
    job.wood.as_mut().unwrap().hub = None;
    missing(&job, "bolts and boss");
    let mut job = whole.clone();
    job.wood.as_mut().unwrap().hub.as_mut().unwrap().bolt_torque_n_m = None;
    missing(&job, "torque of the hub");
    let mut job = whole.clone();
    job.propeller.pitch_control = PitchControl::GroundAdjustable { turn_deg: 0.0 };
    missing(&job, "the root in its hub");
    let mut job = whole;
    job.flight_points.truncate(1);
    (job.flight_points[0].airspeed_m_s, job.flight_points[0].setting) = (Some(50.0), Setting::Level {});
    (job.engine, job.aircraft) = (None, None);
    let told = found(&job);
    assert_eq!((told.finding, told.margin), (Finding::NotJudged, None), "{}", told.sentence);
}

/// A margin is limit over stress less 1 wherever it is said.
#[test]
fn a_margin_is_said_in_one_way() {
    let mut job = with(|_| {});
    job.propeller.stations.iter_mut().for_each(|s| s.thickness_ratio *= 0.75);
    let sheet = sheet(&job);
    let g = sheet.governing.as_ref().unwrap();
    let said = format!("margin −{:.0} %", -100.0 * (g.limit_pa / g.stress_pa - 1.0));
    assert_eq!(sheet.verdict.finding, Finding::OverTheLimit);
    assert!(g.sentence.contains(&said), "{said}: {}", g.sentence);
    assert!(sheet.verdict.sentence.contains(&said) && sheet.verdict.broken[0].contains(&said));
    // The thickness that is missing is the same in words and in the table, at the edge of the hub as well.
    for s in sheet.stations.iter().filter(|s| s.margin.unwrap() < -0.01) {
        let mm = 1e3 * s.thicker_m.unwrap();
        assert!((10.0 * mm - (10.0 * mm).round()).abs() < 1e-6, "{mm}");
        let words = s.station.map(|n| format!("{mm:.1} mm at station {n}"));
        assert!(words.is_none_or(|w| g.sentence.contains(&w)), "{}", g.sentence);
    }
}

#[test]
fn holes_that_a_boss_cannot_hold_are_over_the_limit() {
    let mut job = demo(0);
    job.propeller.hub_diameter_m = 0.005;
    let sheet = sheet(&job);
    let (hub, verdict) = (sheet.hub.unwrap(), sheet.verdict);
    // Six bolts of 8 mm on a circle of 100 mm reach 54 mm; of a radius of 2.5 mm 2 % stay as a wall.
    assert!((hub.past_boss_m.unwrap() - (0.054 - 0.98 * 0.0025)).abs() < 1e-12 && hub.margin < -0.9);
    assert_eq!(verdict.finding, Finding::OverTheLimit);
    assert!(verdict.broken.iter().any(|b| b.contains("holes reach past")), "{:?}", verdict.broken);
}

#[test]
fn the_remedy_restores_the_margin() {
    let mut job = with(|_| {});
    job.propeller.stations.iter_mut().for_each(|s| s.thickness_ratio *= 0.75);
    let before = sheet(&job);
    let g = before.governing.as_ref().unwrap();
    assert!(g.margin < -0.1 && g.sentence.contains("More thickness restores it"), "{}", g.sentence);
    for s in &before.stations {
        let (Some(n), Some(more)) = (s.station, s.thicker_m) else { continue };
        job.propeller.stations[n - 1].thickness_ratio += more / s.chord_m;
    }
    let after = sheet(&job).governing.unwrap();
    // What is left is the air's load, which a thicker section changes a little.
    assert!(after.margin > -0.05, "{}", after.sentence);
}

#[test]
fn more_is_asked_of_a_blade_that_turns_faster_is_weaker_or_wetter() {
    let base = margin(&with(|_| {}));
    let pull = |factor: f64| {
        let cases = sheet(&with(|w| w.overspeed = factor)).cases;
        let over = cases.iter().find(|c| c.kind == CaseKind::Overspeed).unwrap();
        over.figures.as_ref().unwrap().root_tension_n
    };
    assert!((pull(1.3) / pull(1.0) - 1.69).abs() < 1e-9);
    assert!(margin(&with(|w| w.moisture_percent = 20.0)) < base);
    assert!(margin(&with(|w| w.species = Species::Named("Sitka spruce".into()))) < base);
    let halved = margin(&with(|w| w.safety_factor = 3.0));
    assert!(((halved + 1.0) * 2.0 - (base + 1.0)).abs() < 1e-9, "{halved} {base}");
    let limits = StressLimits { tension_pa: Some(1e9), compression_pa: Some(1e9), shear_pa: Some(1e9) };
    assert!(margin(&with(|w| w.limits = limits.clone())) > 10.0);
}

#[test]
fn rake_relieves_bending_by_thrust() {
    let root = |rake: f64| {
        let sheet = sheet(&with(|w| w.rake_deg = rake));
        let standing =
            sheet.cases.iter().find(|c| c.name == "Standing start").unwrap().figures.clone().unwrap();
        (
            standing.root_forward_n_m,
            standing.root_tension_n,
            standing.tip_forward_m.unwrap(),
            sheet.mass.static_moment_kg_m,
        )
    };
    let (upright, leaning) = (root(0.0), root(1.0));
    assert!(leaning.0 < upright.0 && leaning.2 < upright.2, "{upright:?} {leaning:?}");
    // Less by tan(rake) Ω² ∫ m x (x − r) dx, which is below tan(rake) times tension times the length.
    let less = upright.0 - leaning.0;
    assert!(less < 1_f64.to_radians().tan() * upright.1 * (0.76 - 0.09) && less > 0.0, "{less}");
}

/// Figures of the standing start.
fn standing(job: &Job) -> CaseFigures {
    let cases = sheet(job).cases;
    cases.iter().find(|c| c.name == "Standing start").unwrap().figures.clone().unwrap()
}

fn near(what: &str, got: f64, expected: f64, rel: f64) {
    assert!((got - expected).abs() <= rel * expected.abs(), "{what}: {got}, expected {expected}");
}

/// Rake by the stacking line is the rake by the angle.
#[test]
fn a_stacking_line_that_leans_is_the_rake() {
    let rake = with(|w| w.rake_deg = 1.0);
    let mut line = with(|_| {});
    let point = |radius_fraction: f64| LinePoint {
        radius_fraction,
        sweep_m: 0.0,
        rake_m: 0.76 * radius_fraction * 1_f64.to_radians().tan(),
    };
    line.bench = Some(Making { stacking_line: vec![point(0.1), point(1.0)], ..Making::default() });
    assert_eq!(line.check(), vec![]);
    let (a, b, upright) = (standing(&rake), standing(&line), standing(&with(|_| {})));
    near("root", b.root_forward_n_m, a.root_forward_n_m, 1e-6);
    near("twist", b.tip_twist_deg.unwrap(), a.tip_twist_deg.unwrap(), 1e-6);
    assert!(b.root_forward_n_m < 0.9 * upright.root_forward_n_m);
}

/// A blade of one section all along, stacked by a point a fifth of the chord farther back: all of it stands
/// farther ahead in the turning by `Δu = c/5 cos β`, and the centrifugal force of the mass μ per metre bends
/// it there by `Ω² μ Δu (R − r)²/2` in the plane of rotation (closed form), not at all out of it.
#[test]
fn an_even_blade_stacked_farther_back_is_bent_by_its_own_pull() {
    let stacked = |fraction: f64| {
        let mut job = with(|_| {});
        for s in &mut job.propeller.stations {
            (s.chord_m, s.thickness_ratio, s.angle_deg) = (0.1, 0.15, Some(20.0));
        }
        job.bench = Some(Making { stacking_fraction: Some(fraction), ..Making::default() });
        job
    };
    let (a, b) = (stacked(0.25), stacked(0.45));
    let area = sheet(&a).stations[4].area_m2;
    let density = sheet(&a).material.density_kg_m3;
    let (before, after) = (standing(&a), standing(&b));
    let omega = before.rpm * std::f64::consts::TAU / 60.0;
    let ahead = 0.2 * 0.1 * 20_f64.to_radians().cos();
    let closed = 0.5 * omega.powi(2) * density * area * ahead * (0.76_f64 - 0.09).powi(2);
    near("in the plane", before.rigid_against_n_m - after.rigid_against_n_m, closed, 1e-3);
    near("out of it", after.rigid_forward_n_m, before.rigid_forward_n_m, 1e-9);
    let told = sheet(&b).assumptions.join(" ");
    assert!(told.contains("stacking line") && told.contains("mm before"), "{told}");
}

/// Sweep turns a loaded blade finer, for its lift stands behind the root.
#[test]
fn a_swept_tip_turns_finer_under_load() {
    let twist = |sweep_m: f64| {
        let mut job = with(|_| {});
        let point = |radius_fraction: f64, sweep_m: f64| LinePoint { radius_fraction, sweep_m, rake_m: 0.0 };
        let line = vec![point(0.2, 0.0), point(0.6, 0.1 * sweep_m), point(1.0, sweep_m)];
        job.bench = Some(Making { stacking_line: line, ..Making::default() });
        standing(&job).tip_twist_deg.unwrap()
    };
    assert!(
        twist(0.04) < twist(0.0) - 0.3 && twist(-0.04) > twist(0.0) + 0.3,
        "{} {}",
        twist(0.04),
        twist(-0.04)
    );
}

#[test]
fn a_hub_is_judged_by_bolts_boss_and_clamping() {
    let hub = Hub {
        thickness_m: 0.1,
        flange_diameter_m: 0.15,
        bore_m: 0.02,
        bolts: 6,
        bolt_circle_m: 0.1,
        bolt_diameter_m: 0.008,
        bolt_torque_n_m: Some(16.0),
    };
    let sheet = sheet(&with(|w| w.hub = Some(hub.clone())));
    let h = sheet.hub.unwrap();
    let torque = sheet.cases.iter().filter_map(|c| Some(c.figures.as_ref()?.torque_n_m)).fold(0.0, f64::max);
    assert!((h.bolt_force_n - torque / 0.3).abs() < 1e-6 && (h.torque_n_m - torque).abs() < 1e-9);
    // F = T/(0.2 d) on six bolts over the ring's wood.
    let area = std::f64::consts::FRAC_PI_4 * (0.15_f64.powi(2) - 0.02_f64.powi(2) - 6.0 * 0.008_f64.powi(2));
    assert!((h.clamp_pa.unwrap() - 6.0 * 16.0 / (0.2 * 0.008) / area).abs() < 1.0);
    assert!((h.most_bolt_torque_n_m / 16.0 - h.clamp_limit_pa / h.clamp_pa.unwrap()).abs() < 1e-9);
    assert!(h.friction_share.unwrap() > 1.0);
}

#[test]
fn rotation_turns_the_blade_finer_and_lift_ahead_of_the_centroid_coarser() {
    let sheet = sheet(&with(|_| {}));
    let twist = |name: &str| {
        let case = sheet.cases.iter().find(|c| c.name.starts_with(name)).unwrap();
        case.figures.as_ref().unwrap().tip_twist_deg.unwrap()
    };
    // Little thrust and the fastest turning, and much thrust.
    assert!(twist("Overspeed") < 0.0 && twist("Standing") > 1.0);
}

#[test]
fn a_gear_brings_the_orders_of_the_engine() {
    let mut job = demo(0);
    let Some(Engine::Piston(engine)) = &mut job.engine else { panic!("a piston engine") };
    engine.gear_ratio = 2.0;
    engine.full_throttle.iter_mut().for_each(|p| p.rpm *= 2.0);
    engine.max_rpm = engine.max_rpm.map(|rpm| 2.0 * rpm);
    let geared = sheet(&job).vibration.near;
    let own = |n: &&NearOrder| !n.of_engine;
    // Twice a turn of the propeller is once a turn of the engine.
    let twice = geared.iter().filter(own).filter(|n| n.order == 2).count();
    assert!(
        twice > 0 && geared.iter().filter(|n| n.of_engine && n.order == 1).count() == twice,
        "{geared:?}"
    );
    assert!(sheet(&demo(0)).vibration.near.iter().all(|n| own(&n)));
}

#[test]
fn materials_by_name_and_own_values_are_told() {
    let own = OwnMaterial {
        name: "printed blend".into(),
        density_kg_m3: 1_100.0,
        modulus_pa: 2.5e9,
        bending_strength_pa: 6e7,
        compression_strength_pa: None,
        shear_strength_pa: None,
        crushing_strength_pa: None,
        shear_modulus_pa: None,
        scatter: Some(0.0),
        lasting_share: Some(1.0),
    };
    let sheet = sheet(&with(|w| w.species = Species::Own(own.clone())));
    assert_eq!(sheet.material.name, "printed blend");
    assert!(
        (sheet.material.tension_limit_pa - 4e7).abs() < 1e-3
            && (sheet.material.compression_limit_pa - 3e7).abs() < 1e-3
    );
    let unknown = with(|w| w.species = Species::Named("ironbark".into()));
    let said = strength(&Rig::new(&unknown).unwrap()).unwrap_err().to_string();
    assert!(said.contains("wood.species: \"ironbark\"") && said.contains("white-ash"), "{said}");
}

proptest! {
    #![proptest_config(cases(12))]

    #[test]
    fn any_valid_job_has_a_sheet_without_panic_or_a_figure_that_is_not_finite(job in jobs()) {
        let sheet = sheet(&job);
        let missing = nulls("", &serde_json::to_value(&sheet).unwrap());
        let must = ["_kg", "_kg_m", "_kg_m2", "centre_m", "hz", "rpm", "_n", "_pa", "_n_m", ".margin", "_m4"];
        for path in missing {
            let last = path.rsplit('.').next().unwrap_or_default().to_string();
            let answered = sheet.governing.is_some() || !path.starts_with(".stations");
            let optional = ["tip_forward_m", "tip_against_m", "running_rpm", "boss_tension_pa"].contains(&last.as_str());
            prop_assert!(!answered || optional || !must.iter().any(|m| last.ends_with(m)), "{}", path);
        }
        for s in &sheet.stations {
            let finite = [s.margin, s.tension_pa, s.compression_pa, s.shear_pa].iter().flatten().all(|v| v.is_finite());
            prop_assert!(finite && s.area_m2 > 0.0, "{:?}", s);
        }
    }
}
