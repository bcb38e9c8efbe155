//! Readings of carved blades: what lies between them, what is hard to believe, and sheets of them.

use crate::any_job::cases;
use crate::carved::{carved_by, demo};
use proptest::prelude::*;
use spokeshave::carved;
use spokeshave::carved::{Measured, import};
use spokeshave::job::{AngleReference, BladeReading};
use spokeshave::result::Known;
use spokeshave::rig::Rig;
use spokeshave::rotor::Rotor;

#[test]
fn angles_between_readings_are_recovered_and_said_to_be_interpolated() {
    // Off by a smooth twist; read on the face at every other station of one blade, at all of the other.
    let twist = |s: usize| 1.0 - 0.06 * s as f64;
    let truth = carved_by(|b, s| if b == 0 { [twist(s), 0.5, 0.3] } else { [-0.4, 0.0, 0.0] });
    let mut job = truth.job.clone();
    let carved = job.carved.as_mut().unwrap();
    carved.angle_reference = AngleReference::FlatFace;
    for (b, blade) in carved.blades.iter_mut().enumerate() {
        for reading in &mut blade.readings {
            let ratio = reading.thickness_m.unwrap() / reading.chord_m.unwrap();
            let face = truth.rotor.blade.face_to_chord_of(reading.radius_m, ratio).unwrap();
            *reading.angle_deg.as_mut().unwrap() -= face.to_degrees();
        }
        let keep = |s: &usize| b == 1 || s.is_multiple_of(2);
        blade.readings = (0..11).filter(keep).map(|s| blade.readings[s]).collect();
    }
    let found = carved::analyse(&Rig::new(&job).unwrap()).unwrap();
    for (s, station) in found.blades[0].stations.iter().enumerate() {
        let drawn = truth.rotor.blade.cut(station.radius_m).angle_rad.to_degrees();
        // What the cubic through every other reading leaves of the bend is 0.01°.
        assert!((station.angle_deg.carved - drawn - twist(s)).abs() < 0.02, "{station:?}");
        let known = if s.is_multiple_of(2) { Known::Measured } else { Known::Interpolated };
        assert_eq!(station.angle_deg.known, known);
    }
    assert!(found.blades[1].stations.iter().all(|s| s.angle_deg.known == Known::Measured));
}

#[test]
fn what_was_not_read_is_said() {
    let mut job = carved_by(|_, _| [1.0, 0.0, 0.0]).job;
    let carved = job.carved.as_mut().unwrap();
    carved.blades.truncate(1);
    carved.blades[0].readings = carved.blades[0].readings[3..5].to_vec();
    carved.blades[0].readings[0].thickness_m = None;
    carved.blades[0].readings[1].thickness_m = None;
    let found = carved::analyse(&Rig::new(&job).unwrap()).unwrap();
    let first = &found.blades[0].stations;
    assert_eq!((first[0].angle_deg.known, first[3].angle_deg.known), (Known::Held, Known::Measured));
    assert_eq!(first[3].thickness_m.known, Known::AsDrawn);
    assert!(found.blades[1].stations.iter().all(|s| s.chord_m.known == Known::OtherBlades));
    assert!(found.flight_points[0].once_per_turn.unwrap().moment_n_m < 1e-9);
    job.carved = None;
    assert!(carved::analyse(&Rig::new(&job).unwrap()).unwrap_err().to_string().contains("no readings"));
}

#[test]
fn a_reading_between_stations_counts() {
    let mut job = carved_by(|_, _| [0.0; 3]).job;
    let more = BladeReading { radius_m: 0.575, angle_deg: Some(21.0), ..BladeReading::default() };
    let readings = &mut job.carved.as_mut().unwrap().blades[0].readings;
    readings.insert(readings.partition_point(|r| r.radius_m < 0.575), more);
    let rig = Rig::new(&job).unwrap();
    let measured = Measured::new(&rig).unwrap();
    let at = measured.radii_m.iter().position(|r| *r == 0.575).unwrap();
    assert!((measured.blades[0][at].angle_rad.to_degrees() - 21.0).abs() < 1e-9);
    assert_eq!(carved::analyse(&rig).unwrap().blades[0].stations.len(), 12);
}

#[test]
fn doubts_name_the_likely_cause() {
    type Spoil = fn(&mut BladeReading);
    let cases: [(Spoil, &str); 7] = [
        (|r| r.angle_deg = r.angle_deg.map(|a| 90.0 - a), "from the shaft"),
        (|r| r.angle_deg = r.angle_deg.map(|a| -a), "sign"),
        (|r| r.angle_deg = r.angle_deg.map(f64::to_radians), "radians"),
        (|r| r.chord_m = r.chord_m.map(|c| c / 25.4), "inches"),
        (|r| r.chord_m = r.chord_m.map(|c| 0.1 * c), "centimetres"),
        (|r| r.thickness_m = r.chord_m, "swapped"),
        (|r| r.angle_deg = r.angle_deg.map(|a| a + 9.0), "another station"),
    ];
    for (spoil, cause) in cases {
        let mut rig = carved_by(|_, _| [0.0; 3]);
        spoil(&mut rig.job.carved.as_mut().unwrap().blades[1].readings[6]);
        let doubts = carved::doubts(&rig);
        assert_eq!((doubts.len(), doubts[0].blade), (1, 2), "{doubts:?}");
        assert!(doubts[0].message.contains(cause), "{doubts:?}");
    }
}

#[test]
fn what_is_hard_to_believe_is_left_out_until_it_is_confirmed() {
    // One angle of blade 2 read from the shaft, and nothing else wrong: the neighbours and the other blade
    // stay as they are.
    let mut rig = carved_by(|_, _| [0.0; 3]);
    let at = |rig: &mut Rig, change: &dyn Fn(&mut BladeReading)| {
        change(&mut rig.job.carved.as_mut().unwrap().blades[1].readings[6]);
    };
    at(&mut rig, &|r| r.angle_deg = r.angle_deg.map(|a| 90.0 - a));
    let found = carved::analyse(&rig).unwrap();
    assert!(!found.doubts[0].counted && (found.doubts[0].blade, found.doubts[0].reading) == (2, 7));
    let off = |c: &spokeshave::result::Carved| {
        let all = c.blades.iter().flat_map(|b| &b.stations).map(|s| s.angle_deg.from_drawn.abs());
        all.fold(0.0, f64::max)
    };
    assert!(off(&found) < 1e-6, "{}", off(&found));
    let station = &found.blades[1].stations[6];
    assert_eq!((station.angle_deg.known, station.chord_m.known), (Known::Interpolated, Known::Measured));
    // Confirmed it counts, and is still told.
    at(&mut rig, &|r| r.confirmed = true);
    let found = carved::analyse(&rig).unwrap();
    assert!(found.doubts[0].counted && off(&found) > 20.0);
    // A blade that nobody measured is not turned by it.
    rig.job.carved.as_mut().unwrap().blades.remove(0);
    rig.job.carved.as_mut().unwrap().blades[0].readings[6].confirmed = false;
    let found = carved::analyse(&rig).unwrap();
    assert!(off(&found) < 1e-6 && found.blades[1].readings == 0);
    // Nothing left: it is said why.
    let all = &mut rig.job.carved.as_mut().unwrap().blades[0].readings;
    all.retain(|r| (r.radius_m - 0.48).abs() < 1e-3);
    (all[0].chord_m, all[0].thickness_m) = (None, None);
    assert!(carved::analyse(&rig).unwrap_err().to_string().contains("none is confirmed"));
}

#[test]
fn sheets_are_read_with_units_and_faults_have_line_and_column() {
    let p = demo().job.propeller;
    let good = "blade;radius [mm];face angle;chord (mm);thickness_mm\n1;540;18°30';75,5;\n2;540;18:30;75;10,8\n2;480;20,25;;\n";
    let (carved, unused) = import::read(good, &p, None).unwrap();
    assert_eq!((carved.angle_reference, unused.len()), (AngleReference::FlatFace, 0));
    assert_eq!(carved.blades[1].readings[0].radius_m, 0.48);
    assert_eq!(carved.blades[0].readings[0].chord_m, Some(0.0755));
    assert!(carved.blades.iter().all(|b| b.readings.last().unwrap().angle_deg == Some(18.5)));
    let cases = [
        ("", "empty"),
        ("blade,radius,angle\n1,540,18", "line 1, column 2: \"radius\" needs its unit"),
        ("blade,angle\n1,18", "line 1: no column radius_mm"),
        ("blade,radius_mm,angle\n1,540,steep", "line 2, column 3: angle: \"steep\"; allowed is a number"),
        ("blade,radius_mm,angle\n1,540,118", "line 2, column 3: angle: \"118\"; allowed is -90 to 90"),
        (
            "blade,radius_m,angle\n1,540,18",
            "line 2, column 2: radius: \"540\"; allowed is 0.0001 to 6 m; perhaps it is in mm",
        ),
        (
            "blade,radius_mm,angle\n1,840,18",
            "line 2, column 2: radius: \"840\"; allowed is 90.0 to 760.0 mm, from the hub to the tip",
        ),
        (
            "blade,radius_mm,angle\n1,80,18",
            "line 2, column 2: radius: \"80\"; allowed is 90.0 to 760.0 mm, from the hub to the tip",
        ),
        (
            "blade,radius_mm,angle\n1,0.54,18",
            "\"0.54\"; allowed is 90.0 to 760.0 mm, from the hub to the tip; perhaps it is in m",
        ),
        (
            "blade;radius_cm;angle\n1;540,5;18",
            "\"540,5\"; allowed is 90.0 to 760.0 mm, from the hub to the tip; perhaps it is in mm",
        ),
        (
            "blade,station_%,angle\n1,0.7,18",
            "line 2, column 2: station: \"0.7\"; allowed is 90.0 to 760.0 mm",
        ),
        (
            "blade,radius_mm\n1,540\n1,600",
            "line 1: no line holds an angle, a chord, a thickness or a track; there is no column angle, chord_mm, thickness_mm, track_mm",
        ),
        ("blade,radius_mm,face angle,chord_mm\n1,540,,", "there is no column thickness_mm, track_mm"),
        ("radius_mm,angle,chord_mm,thickness_mm,track_mm\n540,,,,", "no line holds an angle"),
        ("blade,radius_mm,angle\n3,540,18", "1 to 2, the blades of the job"),
        ("blade,radius_mm,angle\n1.5,540,18", "a whole number"),
        ("blade,radius_mm,angle\n1,540,18\n1,540,19", "line 3, column 2: radius: \"540\""),
        ("blade,radius_mm,angle,face angle\n1,540,18,18", "one of them is enough"),
        ("blade,radius_mm,chord_mm,thickness_mm\n1,540,10,75", "swapped"),
        ("blade,radius_mm,angle\n1,540,18 75", "75 minutes behind 18 degrees; minutes are 0 to 59"),
        ("blade,station,angle\n1,4,18", "perhaps it is the number of a station"),
        ("blade,radius_mm\n1,540,18", "line 2: 3 columns; the headings have 2"),
    ];
    for (text, expected) in cases {
        let message = import::read(text, &p, None).unwrap_err().to_string();
        assert!(message.contains(expected), "{message:?} has no {expected:?}");
    }
}

proptest! {
    #![proptest_config(cases(12))]
    #[test]
    fn no_sheet_panics(text in "\\PC{0,120}") {
        let _: Result<_, _> = import::read(&text, &demo().job.propeller, None);
        let _: Option<f64> = carved::angle_of(&text);
        let _: &Rotor = &demo().rotor;
    }
}
