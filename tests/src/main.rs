//! The second command of the README: sets up what the checks need, runs them all and sums up.

mod prove;

use std::process::ExitCode;

fn main() -> ExitCode {
    match prove::everything() {
        Ok(report) => {
            print!("{report}");
            if report.is_clean() { ExitCode::SUCCESS } else { ExitCode::FAILURE }
        }
        Err(error) => {
            eprintln!("error: {error:#}");
            ExitCode::FAILURE
        }
    }
}
