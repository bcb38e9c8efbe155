//! What is picked, added and taken out of the readings.

use spokeshave::job::{AngleReference, BladeReading, Carved, Factors, Job, LogReading, Logbook};

use super::blade::started;

/// A choice about the carved blades.
#[derive(Clone, Debug, PartialEq)]
pub enum CarvedChoice {
    /// What the angles were read on.
    Reference(AngleReference),
    /// The readings of a sheet.
    Readings(Box<Carved>),
    /// Whether what is hard to believe of a reading counts: blade and reading, from 0.
    Confirm(usize, usize, bool),
    /// A reading is taken out: blade and reading, from 0.
    Remove(usize, usize),
    /// All readings are taken out.
    Clear,
}

/// A choice about the logbook.
#[derive(Clone, Debug, PartialEq)]
pub enum LogbookChoice {
    /// A reading more, nothing in it.
    Add,
    /// A reading less.
    Remove(usize),
    /// Whether it was level flight.
    Level(usize, bool),
    /// Whether it is left out.
    LeaveOut(usize, bool),
    /// The readings of a sheet.
    Readings(Box<Logbook>),
    /// The factors found are kept in the job and used.
    Keep(Factors),
    /// Whether the factors kept are used.
    Use(bool),
}

impl CarvedChoice {
    pub(in crate::state) fn name(&self) -> String {
        match self {
            Self::Reference(_) => "what the angles were read on",
            Self::Readings(_) => "readings of a sheet",
            Self::Confirm(.., true) => "a reading is right",
            Self::Confirm(.., false) => "a reading is left out",
            Self::Remove(..) => "take out a reading",
            Self::Clear => "take out the readings of the blades",
        }
        .into()
    }

    pub(in crate::state) fn apply(&self, job: &mut Job) {
        match self {
            Self::Reference(to) => {
                let started = started(job);
                job.carved.get_or_insert(started).angle_reference = *to;
            }
            Self::Readings(carved) => job.carved = Some(carved.as_ref().clone()),
            Self::Confirm(blade, reading, on) => {
                if let Some(reading) = readings(job, *blade).and_then(|r| r.get_mut(*reading)) {
                    reading.confirmed = *on;
                }
            }
            Self::Remove(blade, reading) => {
                if let Some(readings) = readings(job, *blade).filter(|r| *reading < r.len()) {
                    readings.remove(*reading);
                }
            }
            Self::Clear => job.carved = None,
        }
    }
}

fn readings(job: &mut Job, blade: usize) -> Option<&mut Vec<BladeReading>> {
    Some(&mut job.carved.as_mut()?.blades.get_mut(blade)?.readings)
}

impl LogbookChoice {
    pub(in crate::state) fn name(&self) -> String {
        match self {
            Self::Add => "add a reading".into(),
            Self::Remove(i) => format!("remove reading {}", i + 1),
            Self::Level(i, _) => format!("level flight of reading {}", i + 1),
            Self::LeaveOut(i, _) => format!("leave out reading {}", i + 1),
            Self::Readings(_) => "readings of a sheet".into(),
            Self::Keep(_) => "keep and use the factors".into(),
            Self::Use(true) => "use the factors".into(),
            Self::Use(false) => "switch the factors off".into(),
        }
    }

    pub(in crate::state) fn apply(&self, job: &mut Job) {
        let logbook = job.logbook.get_or_insert_with(Logbook::default);
        match self {
            Self::Add => {
                logbook.readings.push(LogReading::default());
            }
            Self::Remove(i) if *i < logbook.readings.len() => drop(logbook.readings.remove(*i)),
            Self::Level(i, on) => {
                if let Some(reading) = logbook.readings.get_mut(*i) {
                    reading.level = *on;
                }
            }
            Self::LeaveOut(i, on) => {
                if let Some(reading) = logbook.readings.get_mut(*i) {
                    reading.left_out = *on;
                }
            }
            Self::Readings(sheet) => *logbook = sheet.as_ref().clone(),
            Self::Keep(factors) => (logbook.factors, logbook.in_use) = (Some(*factors), true),
            Self::Use(on) => logbook.in_use = *on,
            Self::Remove(_) => {}
        }
    }
}
