//! Setting up what the checks need beside Rust: a browser with its driver, the accessibility rules, and the
//! other judges of the bench's files.

use anyhow::{Context, Result};
use spokeshave_press::{Workspace, run};
use spokeshave_prove::tools::{
    AXE_VERSION, JUDGES, axe_script, chromedriver, chromium, judges_python, on_path, xdotool, xvfb,
};
use std::process::Command;

/// Installs what is missing.
///
/// # Errors
/// If something may not be installed from here; the message says what to install by hand.
pub(crate) fn set_up(workspace: &Workspace) -> Result<()> {
    println!("== what the checks need");
    rust_components(workspace)?;
    packages()?;
    accessibility_rules(workspace)?;
    judges(workspace)
}

/// The formatter and the linter, which a Rust installed without rustup may lack.
fn rust_components(workspace: &Workspace) -> Result<()> {
    for (program, component) in [("fmt", "rustfmt"), ("clippy", "clippy")] {
        let answers = || {
            let asked = workspace.cargo().args([program, "--version"]).output();
            asked.is_ok_and(|asked| asked.status.success())
        };
        if !answers() {
            let add = run(Command::new("rustup").args(["component", "add", component]));
            add.with_context(|| format!("`cargo {program}` is missing: install {component}"))?;
        }
    }
    Ok(())
}

/// Programs that come as Debian packages.
fn packages() -> Result<()> {
    let wanted = [
        ("chromium", chromium().is_some()),
        ("chromium-driver", chromedriver().is_some()),
        ("firefox-esr", on_path(&["firefox-esr", "firefox"]).is_some()),
        ("webkit2gtk-driver", on_path(&["WebKitWebDriver"]).is_some()),
        ("xvfb", xvfb().is_some()),
        ("xdotool", xdotool().is_some()),
        ("npm", on_path(&["npm"]).is_some()),
        ("python3-venv", python_makes_environments()),
    ];
    let missing: Vec<&str> = wanted.iter().filter(|(_, there)| !there).map(|(name, _)| *name).collect();
    if missing.is_empty() {
        return Ok(());
    }
    let line = format!("apt-get install --yes {}", missing.join(" "));
    anyhow::ensure!(
        may_install(),
        "missing: {}. On Debian run `{line}` as root. Elsewhere install Chromium or Chrome, the \
         chromedriver of the same version, Firefox, WebKitGTK with its WebKitWebDriver, Xvfb, xdotool, npm \
         and Python 3.11 or later with its venv module, all on the PATH",
        missing.join(", ")
    );
    println!("installing {}", missing.join(", "));
    run(Command::new("apt-get").args(["--quiet", "--quiet", "update"]))?;
    let mut install = Command::new("apt-get");
    install.args(["--quiet", "--quiet", "install", "--yes", "--no-install-recommends"]).args(missing);
    run(install.env("DEBIAN_FRONTEND", "noninteractive").stdin(std::process::Stdio::null()))
}

/// Whether this process may install Debian packages.
fn may_install() -> bool {
    let id = Command::new("id").arg("-u").output();
    on_path(&["apt-get"]).is_some() && id.is_ok_and(|id| id.stdout.trim_ascii() == b"0")
}

/// The accessibility rules, into the target folder, without a trace in the sources.
fn accessibility_rules(workspace: &Workspace) -> Result<()> {
    let script = axe_script(&workspace.target);
    if script.exists() {
        return Ok(());
    }
    let folder = workspace.target.join("axe").join(AXE_VERSION);
    std::fs::create_dir_all(&folder)?;
    let mut npm = Command::new("npm");
    npm.args(["install", "--silent", "--no-save", "--no-package-lock", "--ignore-scripts", "--prefix"]);
    run(npm.arg(&folder).arg(format!("axe-core@{AXE_VERSION}")))?;
    anyhow::ensure!(script.exists(), "npm did not bring {}", script.display());
    Ok(())
}

/// Whether Python is there and can make an environment of its own.
fn python_makes_environments() -> bool {
    let asked = Command::new("python3").args(["-c", "import ensurepip, venv"]).output();
    asked.is_ok_and(|asked| asked.status.success())
}

/// The other judges, into an environment of their own in the target folder; made anew when their list
/// changes.
fn judges(workspace: &Workspace) -> Result<()> {
    let python = judges_python(&workspace.target);
    let folder = workspace.target.join("judges");
    let list = folder.join("installed.txt");
    if std::fs::read_to_string(&list).is_ok_and(|installed| installed == JUDGES) && python.exists() {
        return Ok(());
    }
    println!("installing the judges of the bench's files");
    run(Command::new("python3").args(["-m", "venv", "--clear"]).arg(&folder))?;
    let wanted = folder.join("requirements.txt");
    std::fs::write(&wanted, JUDGES)?;
    let mut pip = Command::new(&python);
    pip.args([
        "-m",
        "pip",
        "install",
        "--quiet",
        "--no-deps",
        "--disable-pip-version-check",
        "--requirement",
    ]);
    run(pip.arg(&wanted)).with_context(|| {
        format!(
            "the judges could not be installed: run `{} -m pip install --no-deps -r tests/judges/requirements.txt`",
            python.display()
        )
    })?;
    std::fs::write(list, JUDGES)?;
    Ok(())
}
