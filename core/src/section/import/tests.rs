use std::fmt::Write;

use super::*;
use proptest::prelude::*;

const GOOD: &str = "alpha_deg,cl,cd,cm,Re\n-2,0.1,0.0100,-0.05,2e5\n0,0.3,0.009,-0.05,2e5\n\
    2,0.5,0.009,-0.05,2e5\n4,0.7,0.010,-0.05,2e5\n6,0.9,0.013,-0.05,2e5\n";

fn message(text: &str) -> String {
    read(text, "").unwrap_err().to_string()
}

#[test]
fn headings_units_and_separators_give_the_same_polar() {
    let expected = read(GOOD, "").unwrap().table.polars;
    assert!(expected[0].points.iter().all(|p| p.cm == Some(-0.05)));
    let semicolons = GOOD
        .replace(',', ";")
        .replace('.', ",")
        .replace("alpha_deg", "Alpha [°]")
        .replace("Re", "Reynolds number");
    let tabs = GOOD.replace(',', "\t").replace("alpha_deg", "Angle of attack (deg)");
    let quoted = GOOD.replace("alpha_deg", "\"alpha deg\"").replace('\n', "\r\n");
    let commented = format!("\u{feff}# a note, with commas\n\n{}", GOOD.replace('-', "−"));
    for text in [semicolons, tabs, quoted, commented] {
        assert_eq!(read(&text, "").unwrap().table.polars, expected, "{text}");
    }
    let thousands = GOOD.replace("Re", "re [thousand]").replace("2e5", "200");
    assert_eq!(read(&thousands, "").unwrap().table.polars, expected);
}

#[test]
fn radians_become_degrees() {
    let rows: Vec<String> =
        (-2..4).map(|k| format!("{},{},0.01", f64::from(k).to_radians(), 0.1 * f64::from(k))).collect();
    let read = read(&format!("alpha_rad,cl,cd\n{}", rows.join("\n")), "").unwrap();
    let angles: Vec<f64> = read.table.polars[0].points.iter().map(|p| p.alpha_deg).collect();
    assert_eq!(angles, [-2.0, -1.0, 0.0, 1.0, 2.0, 3.0]);
}

#[test]
fn polars_are_gathered_by_reynolds_number_and_thickness() {
    let mut text = String::from("alpha_deg,Re,cl,cd,thickness [%],lab\n");
    for k in 0..6 {
        for (re, t) in [(1e5, 10.0), (2e5, 10.0), (1e5, 12.5)] {
            writeln!(text, "{k},{re},0.{k},0.01,{t},x").unwrap();
        }
    }
    let read = read(&text, "tunnel \"A\"").unwrap();
    let polars = &read.table.polars;
    assert_eq!(polars.len(), 3);
    assert_eq!(polars[2].thickness_ratio, Some(0.125));
    assert_eq!(read.unused, ["lab"]);
    for said in ["entered by the user", "tunnel", "18 rows", "Columns not used: lab"] {
        assert!(read.table.origin.contains(said), "{}", read.table.origin);
    }
}

#[test]
fn every_fault_is_told_with_its_place() {
    let swap = |from: &str, to: &str| GOOD.replacen(from, to, 1);
    let cases = [
        (String::new(), "empty"),
        ("# nothing\n\n".into(), "empty"),
        ("1,2,3\n".into(), "line 1: \"1\" is a figure where a column heading is needed"),
        (swap("cd", "drag"), "line 1: no column cd; the headings are alpha_deg, cl, drag"),
        (swap("alpha_deg", "speed"), "no column alpha_deg or alpha_rad"),
        (swap("alpha_deg", "alpha"), "line 1, column 1: \"alpha\" needs its unit"),
        (swap("alpha_deg", "alpha [gon]"), "alpha_deg or alpha_rad"),
        (swap("cm", "cl"), "line 1, column 4: a second column for cl, the first is column 2"),
        (swap("0.5,0.009", "0.5,-0.009"), "line 4, column 3 (cd): \"-0.009\"; allowed is above 0, up to 10"),
        (swap("0.5,0.009", "0.5,0"), "line 4, column 3 (cd): \"0\""),
        (swap("0.5,0.009", "0.5,NaN"), "line 4, column 3 (cd): \"NaN\""),
        (swap("0.5,0.009", "0.5,inf"), "line 4, column 3 (cd): \"inf\""),
        (swap("0.5,0.009", "0.5,"), "line 4, column 3 (cd): \"\"; allowed is a number"),
        (swap("0.5,0.009", "0.5,0.9%"), "percentage"),
        (swap("0.5,0.009", "half,0.009"), "line 4, column 2 (cl): \"half\"; allowed is a number"),
        (swap("\n4,", "\n1,"), "line 5, column 1 (alpha): 1 degrees follows 2 degrees of line 4"),
        (swap("\n4,", "\n0,"), "line 5, column 1 (alpha): 0 degrees again, as on line 3"),
        (swap("\n4,", "\n400,"), "line 5, column 1 (alpha): \"400\""),
        (swap("-0.05", "x"), "line 2, column 4 (cm): \"x\"; allowed is a number"),
        (swap("2e5", "5"), "line 2, column 5 (reynolds): \"5\"; allowed is 100 to 1e9"),
        (swap("2e5", "2e5,7"), "line 2: 6 columns; the headings have 5"),
        (swap("2e5", "3e5"), "the polar that begins on line 2: 1 rows"),
        (GOOD.replace("Re", "t/c").replace("2e5", "12"), "line 2, column 5 (thickness_ratio): \"12\""),
        (GOOD.replace("Re", "Mach").replace("2e5", "1.2"), "(mach): \"1.2\""),
        ("x".repeat(MOST_BYTES + 1), "at most"),
    ];
    for (text, expected) in cases {
        let message = message(&text);
        assert!(message.contains(expected), "{message:?} has no {expected:?}");
    }
}

#[test]
fn rows_of_another_mach_number_need_another_reynolds_number() {
    let twice = GOOD.replace("cm", "mach").replace("-0.05", "0");
    let more = GOOD.lines().skip(1).map(|l| l.replace("-0.05", "0.3") + "\n").collect::<String>();
    assert!(message(&(twice + &more)).contains("line 7"));
}

proptest! {
    #[test]
    fn no_text_panics(text in "\\PC{0,200}") {
        let _ = read(&text, &text);
    }

    #[test]
    fn no_table_panics_and_what_is_read_is_sound(
        separator in prop::sample::select(vec![",", ";", "\t"]),
        rows in prop::collection::vec(
            prop::collection::vec("-?[0-9]{0,3}[.,]?[0-9]{0,3}|NaN|inf|1e999|%|\"|", 0..6),
            0..30,
        ),
    ) {
        let lines: Vec<String> = rows.iter().map(|r| r.join(separator)).collect();
        let text = format!("alpha_deg{separator}cl{separator}cd{separator}re\n{}", lines.join("\n"));
        if let Ok(read) = read(&text, "") {
            prop_assert!(crate::section::check_polars(&read.table.polars).is_ok());
        }
    }
}

/// The last figure that is allowed and the first that is not, as the messages say them.
#[test]
fn limits_lie_where_the_messages_say() {
    let with = |heading: &str, value: &str| GOOD.replace("Re", heading).replace("2e5", value);
    for (heading, fits, not) in [
        ("Re", "1e9", "1.01e9"),
        ("Re", "100", "99"),
        ("t/c", "0.005", "0.0049"),
        ("t/c", "1", "1.01"),
        ("Mach", "0", "-0.01"),
        ("Mach", "0.94", "0.95"),
    ] {
        assert!(read(&with(heading, fits), "").is_ok(), "{heading} {fits}");
        assert!(message(&with(heading, not)).contains(not), "{heading} {not}");
    }
}
