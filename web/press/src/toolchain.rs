//! A compiler that can make WebAssembly.
//!
//! The ordinary way is one `rustup target add`. Where that cannot be had, Debian's own compiler builds
//! the page, standard library included, from packages.

use crate::Workspace;
use crate::command::output;
use crate::debian::{self, Debian};
use anyhow::{Context, Result};
use std::path::Path;
use std::process::Command;

/// The target the page is compiled for.
pub(crate) const TARGET: &str = "wasm32-unknown-unknown";

/// Where the compiler for the page is to come from.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub enum Source {
    /// The Rust that is installed, with its wasm32 target; Debian's where that cannot be had.
    #[default]
    Any,
    /// Debian's packages.
    Debian,
}

/// A compiler that can make WebAssembly.
#[derive(Debug, Clone)]
pub enum Toolchain {
    /// The Rust that is installed has the target's standard library.
    Installed,
    /// Debian's compiler, which builds the standard library along with the page.
    Debian(Debian),
}

impl Toolchain {
    /// Finds a compiler, installing what is missing where this may be done without asking.
    ///
    /// # Errors
    /// If nothing helps; the message says what to install.
    pub fn find(workspace: &Workspace, source: Source) -> Result<Self> {
        if source == Source::Debian {
            return Ok(Self::Debian(debian::find()?));
        }
        if has_target(workspace) || add_target(workspace) {
            return Ok(Self::Installed);
        }
        let debian = debian::find().context(
            "the page needs the standard library for wasm32-unknown-unknown, and `rustup target add \
             wasm32-unknown-unknown` did not bring it",
        )?;
        Ok(Self::Debian(debian))
    }
}

/// Whether the compiler on the path has the target's standard library.
fn has_target(workspace: &Workspace) -> bool {
    let mut rustc = Command::new("rustc");
    rustc.args(["--print", "target-libdir", "--target", TARGET]).current_dir(&workspace.root);
    output(&mut rustc).is_ok_and(|folder| Path::new(&folder).is_dir())
}

/// Asks rustup for the target; whether it is there afterwards.
fn add_target(workspace: &Workspace) -> bool {
    println!("Adding the Rust target {TARGET} …");
    let mut rustup = Command::new("rustup");
    rustup.args(["target", "add", TARGET]).current_dir(&workspace.root);
    match output(&mut rustup) {
        Ok(_) => has_target(workspace),
        Err(error) => {
            println!("{error:#}");
            false
        }
    }
}
