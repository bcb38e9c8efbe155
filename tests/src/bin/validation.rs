//! Writes the list of outside checks, `tests/validation.md`, with its pictures. Fails where a check is not
//! as it is told.

use std::path::Path;
use std::process::ExitCode;

use anyhow::{Context, Result};
use spokeshave_tests::check::Check;
use spokeshave_tests::validation::{TOPICS, Topic, list};

fn main() -> Result<ExitCode> {
    let folder = Path::new(env!("CARGO_MANIFEST_DIR"));
    for file in list::files() {
        let path = folder.join(file.name);
        std::fs::create_dir_all(path.parent().unwrap_or(folder))?;
        std::fs::write(&path, file.text).with_context(|| path.display().to_string())?;
    }
    let wrong: Vec<String> = TOPICS.iter().flat_map(Topic::checks).filter_map(Check::wrong).collect();
    for miss in &wrong {
        eprintln!("{miss}");
    }
    Ok(if wrong.is_empty() { ExitCode::SUCCESS } else { ExitCode::FAILURE })
}
