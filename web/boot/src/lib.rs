//! The one HTML file that carries the page.
//!
//! Two callers put it together from the same parts and must agree to the byte: the packer, which has
//! just compiled them, and the running page, which reads them back out of its own script and style
//! nodes to save itself with a job inside. Escaping is therefore idempotent: a part that was escaped
//! once passes through a second time unchanged.

#![forbid(unsafe_code)]

mod escape;
mod template;

pub use escape::{job_text, script_text};
pub use template::{Parts, StyleCannotBeInlined};

/// The scripts that start the page, in the order they run. Plain old syntax on purpose: a browser too
/// old for the page must still be able to read them and say so.
pub const BOOT_SCRIPTS: [&str; 5] = [
    include_str!("../page/keep.js"),
    include_str!("../page/overlay.js"),
    include_str!("../page/clean.js"),
    include_str!("../page/background.js"),
    include_str!("../page/start.js"),
];

/// What the messages of the start scripts look like.
pub const BOOT_STYLE: &str = include_str!("../page/boot.css");

/// Ids of the nodes that hold the parts of the page.
pub mod node {
    /// Where the application is mounted; everything inside is the application's.
    pub const APP: &str = "app";
    /// All style sheets, joined.
    pub const STYLE: &str = "page-style";
    /// The job the page was saved with, as JSON; empty in a freshly built page.
    pub const JOB: &str = "page-job";
    /// The small WebAssembly module that unpacks the engine, gzip in base64.
    pub const OPENER: &str = "page-opener";
    /// The JavaScript side of the opener.
    pub const OPENER_GLUE: &str = "page-opener-glue";
    /// The WebAssembly module, LZMA in base 91.
    pub const ENGINE: &str = "page-engine";
    /// The JavaScript side of the WebAssembly module.
    pub const GLUE: &str = "page-glue";
    /// The scripts that start the page.
    pub const BOOT: &str = "page-boot";
}
