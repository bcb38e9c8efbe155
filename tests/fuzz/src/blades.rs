#![no_main]
#![allow(dead_code, reason = "each program drives one of the targets")]

#[path = "../../../core/tests/mutated/target/mod.rs"]
mod target;

libfuzzer_sys::fuzz_target!(|text: &str| target::readings::blades(text));
