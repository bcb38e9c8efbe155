//! Programs and packages that the checks need beside Rust.

use std::path::{Path, PathBuf};

/// The first of some programs that is on the path.
#[must_use]
pub fn on_path(names: &[&str]) -> Option<PathBuf> {
    let path = std::env::var_os("PATH")?;
    let folders: Vec<PathBuf> = std::env::split_paths(&path).collect();
    names
        .iter()
        .flat_map(|name| folders.iter().map(move |folder| folder.join(name)))
        .find(|file| file.is_file())
}

/// The browser the page is tested in.
#[must_use]
pub fn chromium() -> Option<PathBuf> {
    on_path(&["chromium", "chromium-browser", "google-chrome"])
}

/// The program that drives the browser.
#[must_use]
pub fn chromedriver() -> Option<PathBuf> {
    on_path(&["chromedriver"])
}

/// A desktop that shows nothing, for what a browser does only in a window.
#[must_use]
pub fn xvfb() -> Option<PathBuf> {
    on_path(&["Xvfb"])
}

/// The program that presses keys on a desktop.
#[must_use]
pub fn xdotool() -> Option<PathBuf> {
    on_path(&["xdotool"])
}

/// Version of the accessibility rules that the page is checked against.
pub const AXE_VERSION: &str = "4.11.0";

/// Where the accessibility rules are, once they are installed into `target`.
#[must_use]
pub fn axe_script(target: &Path) -> PathBuf {
    target.join("axe").join(AXE_VERSION).join("node_modules/axe-core/axe.min.js")
}

/// Where it is noted which checks had to run again since their browser ended by itself.
#[must_use]
pub fn lost_browsers(target: &Path) -> PathBuf {
    target.join("browser-failures").join("lost.txt")
}

/// What the judges of the bench's files are installed from.
pub const JUDGES: &str = include_str!("../../judges/requirements.txt");

/// The Python that has the other judges, once they are installed into `target`.
#[must_use]
pub fn judges_python(target: &Path) -> PathBuf {
    target.join("judges/bin/python")
}
