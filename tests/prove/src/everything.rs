//! All checks, in the order in which a fault is cheapest to find.

use crate::report::Report;
use crate::{needs, test_run};
use anyhow::Result;
use spokeshave_press::{Source, Workspace, build_page, run};
use spokeshave_prove::tools;
use std::time::{Duration, Instant};

/// Sets up, then runs every check; a failing one does not keep the others from running.
///
/// # Errors
/// If something that the checks need is missing and cannot be installed; the message says what to do.
pub(crate) fn everything() -> Result<Report> {
    let workspace = Workspace::find()?;
    needs::set_up(&workspace)?;
    let mut report = Report::default();
    // Side by side: linking the page as a whole keeps one core busy, linting and compiling the tests the
    // others.
    let (page, compiled) = std::thread::scope(|scope| {
        let page = scope.spawn(|| timed(|| build_page(&workspace, Source::Any)));
        report.check("layout of the sources", || {
            // Two are workspaces of their own, which only those who use them build.
            ["Cargo.toml", "tests/mutants/Cargo.toml", "tests/fuzz/Cargo.toml"].iter().try_for_each(
                |manifest| cargo(&workspace, &["fmt", "--all", "--check", "--manifest-path", manifest]),
            )
        });
        report.check("lints", || {
            cargo(
                &workspace,
                &[
                    "clippy",
                    "--release",
                    "--workspace",
                    "--all-targets",
                    "--features",
                    "spokeshave/bench",
                    "--",
                    "--deny",
                    "warnings",
                ],
            )
        });
        report.check("documentation", || {
            let mut doc = workspace.cargo();
            doc.args(["doc", "--release", "--workspace", "--no-deps"]);
            run(doc.env("RUSTDOCFLAGS", "--deny warnings"))
        });
        let compiled = timed(|| test_run::compile(&workspace));
        (page.join(), compiled)
    });
    let page = page.map_err(|_| anyhow::anyhow!("the build of the page came to a sudden end"))?;
    report.done("the tests compile", compiled);
    let page = report.done("the page builds", page);
    if let Some(page) = &page {
        println!("{}: {} bytes", page.path.display(), page.bytes);
    }
    let page = page.map(|page| page.path);
    let lost = tools::lost_browsers(&workspace.target);
    if lost.exists() {
        std::fs::remove_file(&lost)?;
    }
    let tests = report.check("tests", || test_run::all(&workspace, page.as_deref()));
    report.tests(tests.flatten());
    if lost.exists() {
        report.remark(std::fs::read_to_string(&lost)?);
    }
    Ok(report)
}

fn cargo(workspace: &Workspace, arguments: &[&str]) -> Result<()> {
    run(workspace.cargo().args(arguments))
}

/// What some work gives and how long it takes.
fn timed<T>(work: impl FnOnce() -> Result<T>) -> (Result<T>, Duration) {
    let begun = Instant::now();
    (work(), begun.elapsed())
}
