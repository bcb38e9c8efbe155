//! Unpacks the page's own WebAssembly module inside the browser.
//!
//! The browser itself can open gzip; LZMA makes the module a quarter smaller than that. This small module comes as gzip,
//! opens the large one, and is done.

use std::io::Read;
use wasm_bindgen::prelude::wasm_bindgen;

/// Memory that unpacking may take, KiB: the dictionary is as long as the module.
const MEMORY_LIMIT_KIB: u32 = 64 << 10;

/// The module that `packed` (LZMA with its header) holds.
///
/// # Errors
/// If the bytes are no such stream, or were cut short.
#[wasm_bindgen]
pub fn open(packed: &[u8]) -> Result<Vec<u8>, String> {
    let told = |fault: std::io::Error| format!("the page's module cannot be unpacked: {fault}");
    let mut module = Vec::new();
    let mut reader = lzma_rust2::LzmaReader::new_mem_limit(packed, MEMORY_LIMIT_KIB, None).map_err(told)?;
    reader.read_to_end(&mut module).map_err(told)?;
    Ok(module)
}
