//! Everything that reads a text, with texts that are wrong: no panic, no hang, and what is taken holds
//! together.
//!
//! `SPOKESHAVE_MUTATE_SECONDS=300 cargo test --release -p spokeshave --test mutated` goes on with new texts
//! for that long, each. `tests/fuzz` drives the same targets by the coverage of the code.

mod mutation;
mod reader;

use mutation::{attack, seeds};
use reader::{job, outline, readings, table};
use spokeshave::job::DEMOS;

#[test]
fn a_changed_job_file_is_read_or_refused() {
    let demos = DEMOS.iter().map(|d| d.json.to_string());
    attack(demos.chain(seeds("job")).collect(), job::read);
}

#[test]
fn a_changed_outline_is_read_or_refused() {
    let airfoils = std::path::Path::new(env!("CARGO_MANIFEST_DIR")).join("../airfoils");
    let shipped = ["clark-y", "raf-6", "naca-44xx"].map(|name| {
        std::fs::read_to_string(airfoils.join(name).join("outline.dat")).expect("a shipped outline")
    });
    attack(shipped.into_iter().chain(seeds("outline")).collect(), outline::read);
}

#[test]
fn a_changed_table_is_read_or_refused() {
    attack(seeds("table"), table::read);
}

#[test]
fn changed_readings_of_blades_are_read_or_refused() {
    attack(seeds("carved"), readings::blades);
}

#[test]
fn a_changed_logbook_is_read_or_refused() {
    attack(seeds("logbook"), readings::flights);
}
