//! The second command of the README: sets up what the checks need, runs them all and sums up.

mod everything;
mod needs;
mod report;
mod test_run;

use std::process::ExitCode;

fn main() -> ExitCode {
    match everything::everything() {
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
