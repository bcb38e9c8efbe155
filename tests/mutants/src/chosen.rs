//! Which mutant acts, asked wherever one could. This file is written into the copy of the core as its module
//! `mutants`.
//!
//! `SPOKESHAVE_MUTANT` is the number of the mutant; 0 or nothing is the program as it is. Where
//! `SPOKESHAVE_REACHED` names a file, none acts and the number of each that was asked for is written to it
//! once.

use std::fs::OpenOptions;
use std::io::Write;
use std::sync::atomic::{AtomicBool, AtomicU32, Ordering::Relaxed};

const UNREAD: u32 = u32::MAX;
const RECORD: u32 = u32::MAX - 1;
static NOW: AtomicU32 = AtomicU32::new(UNREAD);
static REACHED: [AtomicBool; 1 << 16] = [const { AtomicBool::new(false) }; 1 << 16];

/// Whether a mutant acts.
#[inline]
pub(crate) fn chosen(number: u32) -> bool {
    let now = NOW.load(Relaxed);
    now == number || (now >= RECORD && asked(number))
}

#[cold]
#[inline(never)]
fn asked(number: u32) -> bool {
    let Some(file) = std::env::var_os("SPOKESHAVE_REACHED") else {
        let now = std::env::var("SPOKESHAVE_MUTANT").map_or(0, |n| n.parse().expect("a mutant's number"));
        NOW.store(now, Relaxed);
        return now == number;
    };
    NOW.store(RECORD, Relaxed);
    if !REACHED[number as usize].swap(true, Relaxed) {
        let mut list = OpenOptions::new().append(true).create(true).open(file).expect("the list opens");
        list.write_all(format!("{number}\n").as_bytes()).expect("the list takes a line");
    }
    false
}
