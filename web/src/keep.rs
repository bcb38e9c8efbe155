//! Keeping the job safe: storage in the browser, and what happens after a crash.
//!
//! The work is done by the start scripts, which go on when this module no longer can: a panic stops
//! WebAssembly for good, and the scripts then offer the job as a file.

use wasm_bindgen::prelude::wasm_bindgen;

#[wasm_bindgen]
extern "C" {
    #[wasm_bindgen(js_namespace = ["spokeshave", "keep"], js_name = atStart)]
    fn job_at_start() -> Option<String>;
    #[wasm_bindgen(js_namespace = ["spokeshave", "keep"], js_name = torn)]
    fn kept_in_part() -> bool;
    #[wasm_bindgen(js_namespace = ["spokeshave", "keep"], js_name = inFile)]
    fn job_in_file() -> Option<String>;
    #[wasm_bindgen(js_namespace = ["spokeshave", "keep"], js_name = beside)]
    fn kept_beside() -> Option<String>;
    #[wasm_bindgen(js_namespace = ["spokeshave", "keep"], js_name = putBeside)]
    fn put_beside(json: &str) -> bool;
    #[wasm_bindgen(js_namespace = ["spokeshave", "keep"], js_name = before)]
    fn keep_before(json: &str) -> bool;
    #[wasm_bindgen(js_namespace = ["spokeshave", "keep"], js_name = after)]
    fn keep_after();
    #[wasm_bindgen(js_namespace = ["spokeshave", "keep"], js_name = setAside)]
    fn put_aside();
    #[wasm_bindgen(js_namespace = spokeshave, js_name = crashed)]
    fn crashed(detail: &str);
}

/// The job to start with, as JSON: the one kept in this browser, else the one this file was saved with.
/// `None` means an example.
#[must_use]
pub fn at_start() -> Option<String> {
    job_at_start()
}

/// Whether the last that was kept in this browser is not whole, so that [`at_start`] gives what was kept
/// before it, if anything.
#[must_use]
pub fn torn() -> bool {
    kept_in_part()
}

/// The job this very file was saved with, as JSON.
#[must_use]
pub fn in_file() -> Option<String> {
    job_in_file()
}

/// The blades kept beside the drawn one in this browser, as JSON.
#[must_use]
pub fn beside() -> Option<String> {
    kept_beside()
}

/// Keeps the blades beside the drawn one; an empty text takes them out.
///
/// Returns whether the browser's storage took them; where not, say so.
#[must_use]
pub fn keep_beside(json: &str) -> bool {
    put_beside(json)
}

/// Keeps the job; call before working it out, so that a crash finds it kept. Marks the work as begun:
/// if it never ends, the next start asks before it tries this job again.
///
/// Returns whether the browser's storage took it. It may refuse (private windows, no room); then say so.
#[must_use]
pub fn before_work(job: &str) -> bool {
    keep_before(job)
}

/// The job has been worked out; call after [`before_work`].
pub fn after_work() {
    keep_after();
}

/// Puts a job that cannot be read aside under a key of its own, so that what is kept next does not overwrite
/// it.
pub fn set_aside() {
    put_aside();
}

/// Lets a panic end in a message that offers the job, instead of a dead page.
pub fn report_panics() {
    yew::set_custom_panic_hook(Box::new(|panic| crashed(&panic.to_string())));
}
