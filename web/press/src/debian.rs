//! Debian's compiler for WebAssembly: `rustc-web` with the sources of its standard library and the
//! linker of the same LLVM.

use crate::command::{output, run};
use anyhow::{Context, Result};
use std::path::{Path, PathBuf};
use std::process::Command;

/// Debian's compiler, the sources of its standard library and a linker for WebAssembly.
#[derive(Debug, Clone)]
pub struct Debian {
    pub(crate) rustc: PathBuf,
    pub(crate) linker: PathBuf,
}

/// Finds the packages, or installs them where this may be done without asking.
///
/// # Errors
/// If they are not there and may not be installed; the message names them.
pub(crate) fn find() -> Result<Debian> {
    if let Some(found) = installed() {
        return Ok(found);
    }
    let packages = packages();
    let line = format!("apt-get install --yes {}", packages.join(" "));
    anyhow::ensure!(
        is_root() && Path::new("/usr/bin/apt-get").exists(),
        "install the target with `rustup target add {}`, or on Debian run `{line}` as root",
        crate::toolchain::TARGET
    );
    println!("Installing {} …", packages.join(", "));
    let quiet = ["--quiet", "--quiet"];
    run(Command::new("apt-get").args(quiet).arg("update"))?;
    let mut install = Command::new("apt-get");
    install.args(quiet).args(["install", "--yes", "--no-install-recommends"]).args(self::packages());
    run(install.env("DEBIAN_FRONTEND", "noninteractive"))?;
    installed().with_context(|| format!("`{line}` did not bring a compiler with its sources and linker"))
}

/// The three parts, if all are there.
fn installed() -> Option<Debian> {
    let rustc = PathBuf::from("/usr/bin/rustc");
    let sysroot = output(Command::new(&rustc).args(["--print", "sysroot"])).ok()?;
    let sources = Path::new(&sysroot).join("lib/rustlib/src/rust/library/std/Cargo.toml");
    let linker = newest_linker()?;
    sources.exists().then_some(Debian { rustc, linker })
}

/// The linker of the newest LLVM that is installed: an older one cannot read the compiler's objects.
fn newest_linker() -> Option<PathBuf> {
    let names = std::fs::read_dir("/usr/bin").ok()?.flatten().map(|entry| entry.file_name());
    let version = |name: &str| name.strip_prefix("wasm-ld-")?.parse::<u32>().ok();
    let newest = names.filter_map(|name| version(name.to_str()?)).max()?;
    Some(PathBuf::from(format!("/usr/bin/wasm-ld-{newest}")))
}

/// What to install: the linker's package carries the number of its LLVM, so the newest one is asked for.
fn packages() -> [String; 3] {
    let known = output(Command::new("apt-cache").args(["search", "--names-only", "^lld-[0-9]+$"]));
    let known = known.unwrap_or_default();
    let version = |line: &str| line.split(' ').next()?.strip_prefix("lld-")?.parse::<u32>().ok();
    let linker = known.lines().filter_map(version).max().map_or("lld".into(), |n| format!("lld-{n}"));
    ["rustc-web".into(), "rust-web-src".into(), linker]
}

/// Whether this process may install packages.
fn is_root() -> bool {
    output(Command::new("id").arg("-u")).is_ok_and(|id| id == "0")
}
