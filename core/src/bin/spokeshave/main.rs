//! The command line, thin over the library.
//!
//! Exit codes: 0 answered, 1 no answer (a flight point or request has none), 2 bad input (message on standard
//! error).

mod airfoils;
mod analyse;
mod bench;
mod briefs;
mod carved;
mod fit;
mod import;
mod input;
mod logbook;
mod map;
mod polar;
mod report;
mod sections;
mod shape;
mod sweep;
mod table;
mod vary;

use std::process::ExitCode;

use clap::{CommandFactory, FromArgMatches, Parser, Subcommand};

/// Fits a propeller to one aircraft and engine, and shows how far each station departs from its best angle.
#[derive(Parser)]
#[command(version, about, max_term_width = 100, after_help = EXAMPLES)]
struct Cli {
    #[command(subcommand)]
    command: Command,
}

const EXAMPLES: &str = "Examples:
  spokeshave analyse --demo light-aeroplane        the departure table of an invented job
  spokeshave analyse JOB.json --json               the same for programs, SI units
  spokeshave fit JOB.json                          climb, range, top speed, limits over the whole speed range
  spokeshave fit JOB.json --vary propeller.diameter_m=1.4..1.7:31    the same over any number of the file, CSV
  spokeshave shape JOB.json twist --point Cruise   angles that put every station at its best lift-to-drag
  spokeshave shape JOB.json least-loss --point Cruise --job > NEW.json    least induced loss, as a job of its own
  spokeshave carved JOB.json --readings READINGS.csv    the blades as measured, and what to take off
  spokeshave bench JOB.json strength               stress and margin by station, vibration, weight, hub
  spokeshave logbook JOB.json --readings READINGS.csv   what ground runs and flights tell, and what to change
  spokeshave report JOB.json --pdf REPORT.pdf      the whole job as pages to hand in or to keep with the propeller
  spokeshave sweep JOB.json --point Cruise --csv   coefficients from rest to where the thrust is gone
  spokeshave map JOB.json --point Cruise --csv     departure over speed and radius
  spokeshave demo light-aeroplane > JOB.json       a job file to start from
  spokeshave schema                                the JSON Schema of the job file
  spokeshave sections                              the section families and where their tables come from
  spokeshave sections clark-y --thickness 12       best angles of one by Reynolds number
  spokeshave polar OUTLINE.dat --re 1e5,3e5        lift and drag of an outline of your own
  spokeshave import TABLE.csv --name my-section    a measured table, for a job file

Exit codes: 0 answered, 1 no answer, 2 bad input.";

#[derive(Subcommand)]
enum Command {
    /// Work out every flight point of a job: figures and stations
    Analyse(analyse::Args),
    /// Where propeller, engine and aircraft meet over the whole speed range
    Fit(fit::Args),
    /// A better blade for the job, as a variant beside the drawn one
    Shape(shape::Args),
    /// Will it hold: weight and strength of the blade; its sheets of paper and its files
    Bench(bench::Args),
    /// The blades as carved: differences, what they do, what can be put right
    Carved(carved::Args),
    /// What readings of ground runs and flights tell, and what to change
    Logbook(logbook::Args),
    /// The whole job as one PDF: verdict, inputs, method, charts, stations, strength, carving tables,
    /// readings
    Report(report::Args),
    /// Coefficients over speed at a flight point's rpm and air
    Sweep(sweep::Args),
    /// Departure over speed and radius at a flight point's air
    Map(map::Args),
    /// List the section families, or the tables of one
    Sections(sections::Args),
    /// Lift and drag of an outline over the angle of attack, computed
    Polar(polar::Args),
    /// Read a measured table and print it as a section for a job file
    Import(import::Args),
    /// For maintainers: compute the tables of the section families anew
    Airfoils(airfoils::Args),
    /// Print an invented job file to start from
    Demo(input::DemoArgs),
    /// Print the JSON Schema of the job file
    Schema,
}

/// With numbers below zero taken for numbers, so that each option says what it allows.
fn taking_numbers(command: clap::Command) -> clap::Command {
    command.allow_negative_numbers(true).mut_subcommands(taking_numbers)
}

fn main() -> ExitCode {
    let given = taking_numbers(Cli::command()).get_matches();
    let cli = Cli::from_arg_matches(&given).unwrap_or_else(|e| e.exit());
    let outcome = match cli.command {
        Command::Analyse(args) => analyse::run(&args),
        Command::Fit(args) => fit::run(&args),
        Command::Shape(args) => shape::run(&args),
        Command::Bench(args) => bench::run(&args),
        Command::Carved(args) => carved::run(&args),
        Command::Logbook(args) => logbook::run(&args),
        Command::Report(args) => report::run(&args),
        Command::Sweep(args) => sweep::run(&args),
        Command::Map(args) => map::run(&args),
        Command::Sections(args) => sections::run(&args),
        Command::Polar(args) => polar::run(&args),
        Command::Import(args) => import::run(&args),
        Command::Airfoils(args) => airfoils::run(&args),
        Command::Demo(args) => input::run_demo(&args),
        Command::Schema => input::run_schema(),
    };
    match outcome {
        Ok(answered) => ExitCode::from(u8::from(!answered)),
        Err(input::Stop::ClosedPipe) => ExitCode::SUCCESS,
        Err(input::Stop::BadInput(message)) => {
            eprintln!("spokeshave: {message}");
            ExitCode::from(2)
        }
    }
}
