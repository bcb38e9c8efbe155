//! `spokeshave report` as a script meets it.
#![cfg(feature = "cli")]

use crate::command::{err, out, run};

#[test]
fn one_file_is_written_and_its_pages_are_told() {
    let folder = std::env::temp_dir().join(format!("spokeshave-report-{}", std::process::id()));
    std::fs::create_dir_all(&folder).unwrap();
    let file = folder.join("report.pdf");
    let path = file.to_str().unwrap();
    let o = run(&["report", "--demo", "unmanned", "--paper", "letter", "--units", "inch", "--pdf", path], "");
    assert_eq!(o.status.code(), Some(0), "{}", err(&o));
    assert!(out(&o).contains("pages") && out(&o).contains("Before you act"), "{}", out(&o));
    assert!(std::fs::read(&file).unwrap().starts_with(b"%PDF-"));
    std::fs::remove_dir_all(&folder).unwrap();
    let o = run(&["report", "--demo", "unmanned", "--pdf", path], "");
    assert_eq!(o.status.code(), Some(2), "no such folder");
    assert!(err(&o).contains("report.pdf"), "{}", err(&o));
}
