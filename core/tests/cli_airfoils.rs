//! The tables that come with the program against what the solver computes today.
#![cfg(feature = "cli")]

use crate::command::{err, out, run};

const FOLDER: &str = concat!(env!("CARGO_MANIFEST_DIR"), "/../airfoils");

#[test]
fn a_table_is_rebuilt_byte_for_byte() {
    let one = ["airfoils", "--check", "--folder", FOLDER, "--only", "naca-44xx", "--thickness", "0.12"];
    let o = run(&[&one[..], &["--re", "400000"]].concat(), "");
    assert_eq!(o.status.code(), Some(0), "{}{}", out(&o), err(&o));
    assert!(out(&o).contains("naca-44xx: 2 of 2 polars are the same"), "{}", out(&o));
}

/// Half an hour on two cores.
#[test]
#[ignore = "computes all tables"]
fn all_tables_are_rebuilt_byte_for_byte() {
    let o = run(&["airfoils", "--check", "--folder", FOLDER], "");
    assert_eq!(o.status.code(), Some(0), "{}{}", out(&o), err(&o));
}
