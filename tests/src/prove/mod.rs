//! All checks, in the order in which a fault is cheapest to find.

mod needs;
mod report;
mod test_run;

pub(crate) use report::Report;

use anyhow::Result;
use spokeshave_press::{Source, Workspace, build_page, run};
use std::process::Command;

/// Sets up, then runs every check; a failing one does not keep the others from running.
///
/// # Errors
/// If something that the checks need is missing and cannot be installed; the message says what to do.
pub(crate) fn everything() -> Result<Report> {
    let workspace = Workspace::find()?;
    needs::set_up(&workspace)?;
    let mut report = Report::default();
    report.check("layout of the sources", || cargo(&workspace, &["fmt", "--all", "--check"]));
    report.check("lints", || {
        cargo(
            &workspace,
            &["clippy", "--release", "--workspace", "--all-targets", "--", "--deny", "warnings"],
        )
    });
    let page = report.check("the page builds", || build_page(&workspace, Source::Any));
    if let Some(page) = &page {
        println!("{}: {} bytes", page.path.display(), page.bytes);
    }
    report.check("lints of the page", || page_lints(&workspace));
    let page = page.map(|page| page.path);
    let tests = report.check("tests", || test_run::all(&workspace, page.as_deref()));
    report.tests(tests.flatten());
    Ok(report)
}

fn cargo(workspace: &Workspace, arguments: &[&str]) -> Result<()> {
    run(workspace.cargo().args(arguments))
}

/// Lints the page as it is compiled for the browser, where the installed compiler can do that.
fn page_lints(workspace: &Workspace) -> Result<()> {
    let target = ["--target", "wasm32-unknown-unknown"];
    let library = Command::new("rustc").args(["--print", "target-libdir"]).args(target).output()?;
    if !std::path::Path::new(String::from_utf8_lossy(&library.stdout).trim()).is_dir() {
        println!("left out: the lints come with the installed compiler, which has no wasm32 target here");
        return Ok(());
    }
    let page = ["clippy", "--profile", "page", "--package", "spokeshave-web"];
    run(workspace.cargo().args(page).args(target).args(["--", "--deny", "warnings"]))
}
