//! From a raw WebAssembly module to the one HTML file.

use crate::compile::Modules;
use anyhow::{Context, Result};
use base64::Engine;
use base64::prelude::BASE64_STANDARD;
use flate2::{Compression, GzBuilder};
use lzma_rust2::{LzmaOptions, LzmaWriter};
use spokeshave_boot::{BOOT_SCRIPTS, Parts};
use std::io::Write;
use std::path::Path;
use wasm_bindgen_cli_support::Bindgen;

/// The finished file.
pub(crate) struct Packed {
    pub(crate) html: String,
    pub(crate) module_bytes: usize,
}

/// Gives the module its JavaScript side and puts everything into the template.
pub(crate) fn pack(modules: &Modules, style: &str) -> Result<Packed> {
    let (glue, wasm) = bind(&modules.page, "wasm_bindgen")?;
    let (opener_glue, opener) = bind(&modules.opener, "page_opener")?;
    let engine = String::from_utf8(base91::slice_encode(&lzma(&wasm)?))?;
    let opener = BASE64_STANDARD.encode(gzip(&opener)?);
    let glue = BASE64_STANDARD.encode(gzip(glue.as_bytes())?);
    let boot = BOOT_SCRIPTS.concat();
    let parts = Parts {
        style,
        job: "",
        opener: &opener,
        opener_glue: &opener_glue,
        engine: &engine,
        glue: &glue,
        boot: &boot,
    };
    Ok(Packed { html: parts.page()?, module_bytes: wasm.len() })
}

/// The JavaScript side, which makes the global `name`, and the finished module.
fn bind(module: &Path, name: &str) -> Result<(String, Vec<u8>)> {
    let mut bindgen = Bindgen::new();
    bindgen
        .input_path(module)
        .no_modules(true)?
        .no_modules_global(name)?
        .typescript(false)
        .omit_default_module_path(true);
    bindgen.remove_name_section(true).remove_producers_section(true);
    let mut output = bindgen
        .generate_output()
        .with_context(|| format!("cannot make the JavaScript side of {}", module.display()))?;
    let inline = output.snippets().iter().filter(|(_, texts)| !texts.is_empty()).map(|(name, _)| name);
    let modules: Vec<&String> = inline.chain(output.local_modules().keys()).collect();
    anyhow::ensure!(
        modules.is_empty(),
        "packages bring JavaScript files of their own, which one HTML file cannot import: {modules:?}"
    );
    let glue = output.js().to_owned();
    Ok((glue, output.wasm_mut().emit_wasm()))
}

/// LZMA with its header; the dictionary reaches over the whole module.
fn lzma(bytes: &[u8]) -> Result<Vec<u8>> {
    let mut options = LzmaOptions::with_preset(9);
    (options.lc, options.lp, options.pb) = (4, 0, 0);
    options.nice_len = LzmaOptions::NICE_LEN_MAX;
    options.dict_size = u32::try_from(bytes.len().next_power_of_two())?;
    let mut lzma = LzmaWriter::new_use_header(Vec::new(), &options, Some(bytes.len() as u64))?;
    lzma.write_all(bytes)?;
    Ok(lzma.finish()?)
}

/// Gzip without a time stamp or a file name.
fn gzip(bytes: &[u8]) -> Result<Vec<u8>> {
    let mut gzip = GzBuilder::new().mtime(0).write(Vec::new(), Compression::best());
    gzip.write_all(bytes)?;
    Ok(gzip.finish()?)
}
