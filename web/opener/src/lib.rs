//! Unpacks the page's own WebAssembly module inside the browser.
//!
//! The browser itself can open gzip and base64; LZMA makes the module a quarter smaller than gzip, and base
//! 91 takes 1.23 letters a byte in place of base64's 1.33. This small module comes in the
//! browser's own packing, opens the large one, and is done.

use std::io::Read;
use wasm_bindgen::prelude::wasm_bindgen;

/// Memory that unpacking may take, KiB: the dictionary is as long as the module.
const MEMORY_LIMIT_KIB: u32 = 64 << 10;

/// The module that `packed` holds: LZMA with its header, in base 91 of letters that HTML leaves alone.
///
/// # Errors
/// If the text is no such stream, or was cut short.
#[wasm_bindgen]
pub fn open(packed: &str) -> Result<Vec<u8>, String> {
    let told = |fault: &dyn std::fmt::Display| format!("the page's module cannot be unpacked: {fault}");
    let bytes = base91::slice_decode(packed.as_bytes());
    let mut module = Vec::new();
    let reader = lzma_rust2::LzmaReader::new_mem_limit(bytes.as_slice(), MEMORY_LIMIT_KIB, None);
    reader.and_then(|mut reader| reader.read_to_end(&mut module)).map_err(|fault| told(&fault))?;
    Ok(module)
}
