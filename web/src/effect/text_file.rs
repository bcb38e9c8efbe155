//! Reading a text that was picked as a file.

use gloo_file::callbacks::{FileReader, read_as_text};
use web_sys::HtmlInputElement;

use crate::number::fixed;

/// Reads the file picked in an input and hands on its name with its text, or with why it could not be read.
/// The reading ends when what is returned is dropped.
pub fn read_text(
    input: &HtmlInputElement,
    most_bytes: usize,
    heard: impl Fn(String, Result<String, String>) + 'static,
) -> Option<FileReader> {
    let file = input.files()?.get(0)?;
    // The same file may be picked again.
    input.set_value("");
    read_file(file, most_bytes, heard)
}

/// The same for a file at hand.
pub fn read_file(
    file: web_sys::File,
    most_bytes: usize,
    heard: impl Fn(String, Result<String, String>) + 'static,
) -> Option<FileReader> {
    let file = gloo_file::File::from(file);
    let name = file.name();
    if file.size() > most_bytes as u64 {
        let megabytes = |bytes: f64| fixed((bytes / 1e6).ceil(), 0);
        let (found, most) = (megabytes(file.size() as f64), megabytes(most_bytes as f64));
        heard(name, Err(format!("The file has {found} MB; at most {most} MB are read.")));
        return None;
    }
    Some(read_as_text(&file, move |text| heard(name.clone(), text.map_err(|e| e.to_string()))))
}
