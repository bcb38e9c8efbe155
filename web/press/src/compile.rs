//! Compiling the page to WebAssembly.

use crate::command::run;
use crate::toolchain::TARGET;
use crate::{Toolchain, Workspace};
use anyhow::Result;
use std::path::{Path, PathBuf};

/// The raw modules, as compiled.
pub(crate) struct Modules {
    /// The page.
    pub(crate) page: PathBuf,
    /// What unpacks the page's module in the browser.
    pub(crate) opener: PathBuf,
}

/// Compiles `web` and `web/opener`.
pub(crate) fn compile(workspace: &Workspace, toolchain: &Toolchain) -> Result<Modules> {
    let mut cargo = workspace.cargo();
    cargo.args([
        "build",
        "--package",
        "spokeshave-web",
        "--package",
        "spokeshave-opener",
        "--lib",
        "--profile",
        "page",
        "--target",
        TARGET,
    ]);
    cargo
        .env_remove("RUSTFLAGS")
        .env("CARGO_ENCODED_RUSTFLAGS", hidden_paths(workspace).join("\u{1f}"))
        .env("CARGO_INCREMENTAL", "0");
    let target = match toolchain {
        Toolchain::Installed => workspace.target.clone(),
        Toolchain::Debian(debian) => {
            // A target folder of its own: the two compilers would rebuild each other's work.
            let target = workspace.target.join("debian");
            cargo.args(["-Zbuild-std=std,panic_abort", "--target-dir"]).arg(&target);
            cargo.env("RUSTC", &debian.rustc).env("RUSTC_BOOTSTRAP", "1");
            cargo.env("CARGO_TARGET_WASM32_UNKNOWN_UNKNOWN_LINKER", &debian.linker);
            target
        }
    };
    run(&mut cargo)?;
    let folder = target.join(TARGET).join("page");
    let module = |name: &str| folder.join(name).with_extension("wasm");
    Ok(Modules { page: module("spokeshave_web"), opener: module("spokeshave_opener") })
}

/// Compiler flags that keep the folders of this machine out of the module. The last that fits is used.
fn hidden_paths(workspace: &Workspace) -> Vec<String> {
    let mut shown = vec![(workspace.root.clone(), "spokeshave")];
    shown.extend(home("RUSTUP_HOME", ".rustup").map(|folder| (folder, "rustup")));
    if let Some(cargo) = home("CARGO_HOME", ".cargo") {
        let sources = std::fs::read_dir(cargo.join("registry/src")).into_iter().flatten().flatten();
        shown.push((cargo, "cargo"));
        // Named after the registry that the packages happened to come from.
        shown.extend(sources.map(|folder| (folder.path(), "packages")));
    }
    shown.iter().map(|(from, to)| format!("--remap-path-prefix={}={to}", from.display())).collect()
}

/// A tool's folder: where `variable` says, else `folder` in the user's home.
fn home(variable: &str, folder: &str) -> Option<PathBuf> {
    let home = std::env::var_os("HOME").or_else(|| std::env::var_os("USERPROFILE"));
    let set = std::env::var_os(variable).map(PathBuf::from);
    set.or_else(|| home.map(|home| Path::new(&home).join(folder)))
}
