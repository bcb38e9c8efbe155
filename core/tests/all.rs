//! Every test of the core from outside in one program: compiled and linked once, run side by side.

mod any_job;
mod command;
mod paper;

mod bad_input;
mod bench;
mod bench_faults;
mod bench_solid;
mod bench_take_off;
mod carved;
mod carved_plan;
mod carved_readings;
mod cli;
mod cli_airfoils;
mod cli_carved;
mod cli_fit;
mod cli_logbook;
mod cli_polar;
mod cli_readme;
mod cli_report;
mod cli_shape;
mod cli_strength;
mod constant_speed;
mod dive_and_worth;
mod dossier;
mod envelope;
mod fit;
mod job_options;
mod logbook;
mod properties;
mod properties_fit;
mod properties_shape;
mod search;
mod shape;
mod strength;
mod twin;
