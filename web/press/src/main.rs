//! The first command of the README: builds the page, shows what the program computes, says where the
//! page is.

mod show;

use anyhow::Result;
use clap::Parser;
use spokeshave_press::{Source, Workspace, build_page};
use std::process::ExitCode;

/// Sets up what the page needs, builds it as one HTML file and prints the demo's departure table.
#[derive(Debug, Parser)]
#[command(name = "cargo start")]
struct Options {
    /// Open the page in the browser when it is built.
    #[arg(long)]
    open: bool,
    /// Build the page only; print no table.
    #[arg(long)]
    page_only: bool,
    /// Compile the page with Debian's packages, whatever else is there.
    #[arg(long)]
    debian: bool,
}

fn main() -> ExitCode {
    match build(&Options::parse()) {
        Ok(()) => ExitCode::SUCCESS,
        Err(error) => {
            eprintln!("error: {error:#}");
            ExitCode::FAILURE
        }
    }
}

fn build(options: &Options) -> Result<()> {
    let workspace = Workspace::find()?;
    let source = if options.debian { Source::Debian } else { Source::Any };
    let page = build_page(&workspace, source)?;
    if !options.page_only {
        show::departure_table(&workspace)?;
    }
    println!("\nThe page is ready: {}", page.path.display());
    println!(
        "One file of {} bytes. It opens from disk, needs no network, and can be copied anywhere.",
        page.bytes
    );
    if options.open { show::in_browser(&page.path) } else { Ok(()) }
}
