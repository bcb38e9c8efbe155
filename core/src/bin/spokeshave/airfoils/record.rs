//! The three files of a family.

use std::fmt::{self, Write};

use serde::Serialize;
use spokeshave::section::outline::Outline;
use spokeshave::section::solver::{Settings, Solved, State, USUAL_NODES};

use super::catalogue::Entry;
use super::{N_CRIT, REYNOLDS, Task, angles_deg};

/// Date of the method: changed by hand with every change of the solver that changes figures.
const METHOD_DATE: &str = "2026-12-01";

/// Korn factor of ordinary sections.
const KORN: f64 = 0.87;

/// Part of the points that converged.
#[derive(Debug, Clone, Copy, PartialEq, Serialize)]
pub(crate) struct Share {
    /// From -4 to 10 degrees at Reynolds numbers of 60,000 and more.
    working: [usize; 2],
    /// From -4 to 10 degrees at 30,000.
    slow: [usize; 2],
    /// Everywhere that was tried.
    all: [usize; 2],
}

impl Share {
    pub(crate) fn of(tasks: &[Task], polars: &[Vec<Solved>]) -> Self {
        let mut share = Self { working: [0; 2], slow: [0; 2], all: [0; 2] };
        for (task, points) in tasks.iter().zip(polars) {
            let good =
                |alpha: f64| points.iter().any(|p| p.alpha_deg == alpha && p.state == State::Converged);
            for alpha in angles_deg() {
                let tried = points.iter().any(|p| p.alpha_deg == alpha);
                let add = |count: &mut [usize; 2]| {
                    count[0] += usize::from(good(alpha));
                    count[1] += 1;
                };
                if tried {
                    add(&mut share.all);
                }
                // An angle of the working range that was not tried counts as failed.
                if (-4.0..=10.0).contains(&alpha) && task.settings.reynolds >= 60e3 {
                    add(&mut share.working);
                } else if (-4.0..=10.0).contains(&alpha) && task.settings.reynolds <= 30e3 {
                    add(&mut share.slow);
                }
            }
        }
        share
    }
}

impl fmt::Display for Share {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        let part = |[good, all]: [usize; 2]| 100.0 * good as f64 / all.max(1) as f64;
        write!(
            f,
            "{:.1} % converged from -4 to 10 degrees at Re 60,000 and more, {:.1} % at 30,000, {:.1} % of all tried",
            part(self.working),
            part(self.slow),
            part(self.all)
        )
    }
}

/// `outline.dat`.
pub(crate) fn outline(entry: &Entry, base: &Outline) -> String {
    let mut text = format!("{}\n", base.name());
    for line in entry.source.split(". ") {
        let _ = writeln!(text, "# {}", line.trim_end_matches('.'));
    }
    text += "# x y in chords, from the upper trailing edge round the nose to the lower trailing edge\n";
    for [x, y] in base.points() {
        let _ = writeln!(text, "{x:.6} {y:.6}");
    }
    text
}

/// `polars.csv`: a failed row has no figures.
pub(crate) fn polars(tasks: &[Task], polars: &[Vec<Solved>]) -> String {
    let heading = "thickness_ratio,reynolds,mach,n_crit,alpha_deg,cl,cd,cm,xtr_upper,xtr_lower,state\n";
    let tables = tasks.iter().zip(polars).map(|(task, points)| rows(task, points));
    std::iter::once(heading.to_string()).chain(tables).collect()
}

/// What all rows of a polar begin with.
pub(crate) fn head(task: &Task) -> String {
    let Settings { reynolds, mach, n_crit, .. } = task.settings;
    format!("{},{reynolds},{mach},{n_crit},", task.thickness_ratio)
}

/// The rows of one polar.
pub(crate) fn rows(task: &Task, points: &[Solved]) -> String {
    let (head, mut text) = (head(task), String::new());
    for p in points {
        let _ = write!(text, "{head}{},", p.alpha_deg);
        let _ = match p.state {
            State::Converged => {
                writeln!(text, "{:.4},{:.5},{:.4},{:.3},{:.3},ok", p.cl, p.cd, p.cm, p.xtr_upper, p.xtr_lower)
            }
            State::Failed => writeln!(text, ",,,,,failed"),
            State::Stalled => writeln!(text, ",,,,,stalled"),
        };
    }
    text
}

#[derive(Serialize)]
struct FamilyFile<'a> {
    name: &'a str,
    title: &'a str,
    origin: String,
    outline_source: &'a str,
    korn_ka: f64,
    face: &'a str,
    face_angle_deg: Vec<FaceAngle>,
    method: &'a str,
    method_date: &'a str,
    settings: TableSettings,
    converged: &'a Share,
}

#[derive(Serialize)]
struct FaceAngle {
    thickness_ratio: f64,
    angle_deg: f64,
}

#[derive(Serialize)]
struct TableSettings {
    thickness_ratio: Vec<f64>,
    reynolds: Vec<f64>,
    n_crit: Vec<f64>,
    mach: f64,
    transition: &'static str,
    nodes: usize,
    alpha_deg: [f64; 3],
}

const METHOD: &str = "Vortex panels coupled by Newton's method with two-equation integral boundary layers, \
    lag of the turbulent shear stress, transition by the e^n envelope (Drela, Giles, AIAA J. 25(10), 1987); \
    drag by Squire and Young.";

/// `family.json`.
pub(crate) fn family(entry: &Entry, drawn: &[Outline], share: &Share) -> String {
    let angle = |(t, outline): (&f64, &Outline)| {
        let angle_deg = outline.face_angle_rad()?.to_degrees();
        Some(FaceAngle { thickness_ratio: *t, angle_deg: (angle_deg * 1e3).round() / 1e3 })
    };
    let face_angle_deg: Vec<FaceAngle> = entry.thickness.iter().zip(drawn).filter_map(angle).collect();
    let angles = angles_deg();
    let file = FamilyFile {
        name: entry.name,
        title: entry.title,
        origin: format!(
            "Computed by this program's section solver ({METHOD_DATE}), not measured: {share}. Outline: {}",
            entry.source
        ),
        outline_source: entry.source,
        korn_ka: KORN,
        face: if face_angle_deg.is_empty() { "none" } else { "flat" },
        face_angle_deg,
        method: METHOD,
        method_date: METHOD_DATE,
        settings: TableSettings {
            thickness_ratio: entry.thickness.to_vec(),
            reynolds: REYNOLDS.to_vec(),
            n_crit: N_CRIT.to_vec(),
            mach: 0.0,
            transition: "free",
            nodes: USUAL_NODES,
            alpha_deg: [angles[0], angles[angles.len() - 1], 0.5],
        },
        converged: share,
    };
    serde_json::to_string_pretty(&file).unwrap_or_default() + "\n"
}
