//! Running the tests of every crate and counting them.

use crate::report::Tests;
use anyhow::Result;
use spokeshave_press::{Workspace, run};
use std::io::{BufRead, BufReader};
use std::path::Path;
use std::process::Stdio;

const TESTS: [&str; 3] = ["test", "--release", "--workspace"];
/// Where the random jobs of the property tests begin, unless the environment says otherwise: the same run
/// twice has the same outcome.
const SEED: (&str, &str) = ("PROPTEST_RNG_SEED", "1");
/// How many tests of a program run at once, unless the environment says otherwise: one more than two cores, for
/// a test of a browser spends half its time waiting.
const AT_ONCE: (&str, &str) = ("RUST_TEST_THREADS", "3");

/// Compiles the tests of all crates.
pub(crate) fn compile(workspace: &Workspace) -> Result<()> {
    run(workspace.cargo().args(TESTS).arg("--no-run"))
}

/// Runs the tests of all crates, showing what they print; gives their count.
pub(crate) fn all(workspace: &Workspace, page: Option<&Path>) -> Result<Option<Tests>> {
    let mut cargo = workspace.cargo();
    cargo.args(TESTS).arg("--no-fail-fast").stdout(Stdio::piped());
    if let Some(page) = page {
        cargo.env("SPOKESHAVE_PAGE", page);
    }
    for (name, value) in [SEED, AT_ONCE] {
        if std::env::var_os(name).is_none() {
            cargo.env(name, value);
        }
    }
    let mut process = cargo.spawn()?;
    let mut tests = None;
    for line in process.stdout.take().map(BufReader::new).into_iter().flat_map(BufRead::lines) {
        let line = line?;
        println!("{line}");
        if let Some(counted) = counted(&line) {
            let sum: &mut Tests = tests.get_or_insert_default();
            sum.passed += counted.passed;
            sum.failed += counted.failed;
            sum.ignored += counted.ignored;
        }
    }
    let status = process.wait()?;
    if !status.success() && tests.is_none_or(|tests| tests.failed == 0) {
        anyhow::bail!("the tests did not run to their end ({status})");
    }
    Ok(tests)
}

/// Reads `test result: ok. 3 passed; 0 failed; 1 ignored; …`.
fn counted(line: &str) -> Option<Tests> {
    let counts = line.strip_prefix("test result: ")?.split_once(". ")?.1;
    let count = |name: &str| {
        let part = counts.split("; ").find_map(|part| part.strip_suffix(name))?;
        part.trim().parse().ok()
    };
    Some(Tests { passed: count("passed")?, failed: count("failed")?, ignored: count("ignored")? })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_closing_line_is_counted() {
        let line =
            "test result: FAILED. 3 passed; 2 failed; 1 ignored; 0 measured; 0 filtered out; finished in 1s";
        assert_eq!(counted(line), Some(Tests { passed: 3, failed: 2, ignored: 1 }));
        assert_eq!(counted("test a_test ... ok"), None);
    }
}
