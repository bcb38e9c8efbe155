#![no_main]
#![allow(dead_code, reason = "each program drives one of the targets")]

#[path = "../../../core/tests/mutated/reader/mod.rs"]
mod reader;

libfuzzer_sys::fuzz_target!(|text: &str| reader::outline::read(text));
