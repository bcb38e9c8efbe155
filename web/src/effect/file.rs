//! Files: offering one for download, reading one that was picked.

use gloo_file::callbacks::FileReader;
use gloo_file::{Blob, ObjectUrl};
use spokeshave::job::MOST_BYTES;
use wasm_bindgen::JsCast;
use web_sys::{HtmlAnchorElement, HtmlInputElement};

use super::text_file::{read_file, read_text};
use crate::state::{Action, Notice};

/// Offers a text as a file. Returns whether the browser took it.
#[must_use]
pub fn offer(name: &str, kind: &str, text: &str) -> bool {
    try_offer(name, Blob::new_with_options(text, Some(kind))).is_some()
}

/// Offers bytes as a file. Returns whether the browser took it.
#[must_use]
pub fn offer_bytes(name: &str, kind: &str, bytes: &[u8]) -> bool {
    try_offer(name, Blob::new_with_options(bytes, Some(kind))).is_some()
}

fn try_offer(name: &str, blob: Blob) -> Option<()> {
    let document = web_sys::window()?.document()?;
    let url = ObjectUrl::from(blob);
    let link: HtmlAnchorElement = document.create_element("a").ok()?.dyn_into().ok()?;
    link.set_href(&url);
    link.set_download(name);
    link.click();
    // The browser reads the text a little later: keep it until then.
    gloo_timers::callback::Timeout::new(10_000, move || drop(url)).forget();
    Some(())
}

/// Reads a job file that was picked in an input and says what to do with it. The reading ends when what is
/// returned is dropped.
pub fn read_picked(input: &HtmlInputElement, act: impl Fn(Action) + 'static) -> Option<FileReader> {
    read_text(input, MOST_BYTES, move |name, text| act(opened(name, text)))
}

/// The same for one that was dropped on the page.
pub fn read_dropped(event: &web_sys::DragEvent, act: impl Fn(Action) + 'static) -> Option<FileReader> {
    let file = event.data_transfer()?.files()?.get(0)?;
    read_file(file, MOST_BYTES, move |name, text| act(opened(name, text)))
}

fn opened(name: String, text: Result<String, String>) -> Action {
    match text {
        Ok(text) => Action::Open(name, text),
        Err(why) => {
            let title = format!("{name} was not opened. The job on the page stays.");
            Action::Say(Notice { title, lines: vec![why] })
        }
    }
}

/// A file name for a job, from its title.
#[must_use]
pub fn file_name(title: &str, ending: &str) -> String {
    let plain = |c: char| if c.is_alphanumeric() { c.to_ascii_lowercase() } else { '-' };
    let words: String = title.chars().take(60).map(plain).collect();
    let parts: Vec<&str> = words.split('-').filter(|w| !w.is_empty()).collect();
    let stem = if parts.is_empty() { "propeller".into() } else { parts.join("-") };
    format!("{stem}.{ending}")
}

#[cfg(test)]
mod tests {
    use super::file_name;

    #[test]
    fn a_file_is_named_after_the_job() {
        assert_eq!(
            file_name("Fenlark, 58 kW direct drive (invented)", "json"),
            "fenlark-58-kw-direct-drive-invented.json"
        );
        assert_eq!(file_name("///", "html"), "propeller.html");
    }
}
