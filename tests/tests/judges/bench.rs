//! The bench's files before other judges: trimesh (solids), ezdxf (DXF), `MuPDF` (PDF and SVG), shapely
//! (areas). `cargo prove` installs them from `PyPI`, pinned by `judges/requirements.txt`.

use std::path::Path;

use serde_json::json;
use spokeshave::bench::{Bench, Paper, Unit, files, pdf, sheet_files};
use spokeshave::dossier::{Scales, dossier};
use spokeshave::job::{DEMOS, Job, PitchControl, Rotation};
use spokeshave::rig::Rig;
use spokeshave_tests::judge::ask;

/// What a judge says is shown, and a fault fails the test.
fn judge(script: &str, arguments: &[&str]) {
    print!("{}", ask(script, arguments).unwrap());
}

fn bench(job: &Job) -> Bench {
    Bench::new(&Rig::new(job).unwrap()).unwrap()
}

fn text(path: &Path) -> &str {
    path.to_str().unwrap()
}

fn written(folder: &Path, files: Vec<spokeshave::bench::File>) {
    for file in files {
        std::fs::write(folder.join(file.name), file.bytes).unwrap();
    }
}

/// Holes of a job's hub, and the wood they take out of its boss, mm³.
fn drilling(job: &Job) -> (u32, f64) {
    let hub = job.wood.as_ref().and_then(|w| w.hub.as_ref()).unwrap();
    let disc = |d: f64| 0.25e9 * std::f64::consts::PI * d * d;
    (hub.bolts + 1, hub.thickness_m * (disc(hub.bore_m) + f64::from(hub.bolts) * disc(hub.bolt_diameter_m)))
}

#[test]
fn validate_solid_trimesh() {
    for demo in &DEMOS {
        for (rotation, hand) in
            [(Rotation::ClockwiseFromBehind, "right"), (Rotation::AnticlockwiseFromBehind, "left")]
        {
            for one_piece in [true, false] {
                let mut job = Job::from_json(demo.json).unwrap();
                job.propeller.rotation = rotation;
                if !one_piece {
                    job.propeller.pitch_control = PitchControl::GroundAdjustable { turn_deg: 0.0 };
                }
                if one_piece && job.propeller.blades != 2 {
                    // The boss of more blades is bent into each one's share of the turn: no sum of plane
                    // sections.
                    continue;
                }
                let folder = tempfile::tempdir().unwrap();
                written(folder.path(), files(&bench(&job), Unit::Millimetre).unwrap());
                let (holes, mm3) = if one_piece { drilling(&job) } else { (0, 0.0) };
                let [blades, holes, mm3] =
                    [job.propeller.blades.to_string(), holes.to_string(), mm3.to_string()];
                judge("solid.py", &[text(folder.path()), &blades, hand, &holes, &mm3]);
            }
        }
    }
}

#[test]
fn validate_drawings_ezdxf_shapely() {
    for demo in &DEMOS {
        for rotation in [Rotation::ClockwiseFromBehind, Rotation::AnticlockwiseFromBehind] {
            let mut job = Job::from_json(demo.json).unwrap();
            job.propeller.rotation = rotation;
            let bench = bench(&job);
            let folder = tempfile::tempdir().unwrap();
            written(folder.path(), files(&bench, Unit::Inch).unwrap());
            let stations: Vec<_> = bench
                .stations
                .iter()
                .map(|s| {
                    let points: Vec<[f64; 2]> = s.ring.points.iter().map(|p| bench.on_paper(*p)).collect();
                    json!({"number": s.number, "points_mm": points})
                })
                .collect();
            let list = folder.path().join("stations.json");
            std::fs::write(&list, serde_json::to_string(&stations).unwrap()).unwrap();
            judge("drawings.py", &[text(folder.path()), text(&list)]);
        }
    }
}

#[test]
fn validate_paper_mupdf() {
    for demo in &DEMOS {
        let bench = bench(&Job::from_json(demo.json).unwrap());
        for (paper, unit) in [(Paper::A4, Unit::Millimetre), (Paper::Letter, Unit::Inch)] {
            let folder = tempfile::tempdir().unwrap();
            written(folder.path(), sheet_files(&bench, paper, unit));
            let [w, h] = paper.size_mm().map(|mm| mm.to_string());
            judge("paper.py", &[text(folder.path()), &w, &h]);
        }
    }
}

#[test]
fn validate_report_mupdf() {
    let parts = [
        "Verdict",
        "Before you act",
        "Inputs",
        "Method and validity",
        "Charts",
        "Stations",
        "Strength",
        "Bench heights",
    ];
    for demo in &DEMOS {
        let rig = Rig::new(&Job::from_json(demo.json).unwrap()).unwrap();
        for (paper, scales) in [(Paper::A4, Scales::METRIC), (Paper::Letter, Scales::INCHES)] {
            let folder = tempfile::tempdir().unwrap();
            let file = folder.path().join("report.pdf");
            std::fs::write(&file, pdf(&rig.job.title, &dossier(&rig, &scales, paper, None))).unwrap();
            let [w, h] = paper.size_mm().map(|mm| mm.to_string());
            judge("report.py", &[&[text(&file), w.as_str(), h.as_str()], &parts[..]].concat());
        }
    }
}
