//! The page in a real browser, opened from disk as a user opens it.
//!
//! A check gets a browser with a fresh profile, does what a person would do (controls are found by
//! role and name, as a screen reader finds them) and reads what a person would read. The browser ends
//! with the check, whatever happens; a failed check leaves a picture in `browser-failures` of the
//! target folder.

mod axe;
mod cdp;
mod control;
mod desktop;
mod download;
mod driver;
mod effort;
mod log;
mod look;
mod lost;
mod page;
mod session;
mod setup;

pub use axe::Violation;
pub use control::Control;
pub use desktop::{Desktop, SaveAs};
pub use log::{ConsoleLine, Logs};
pub use look::{Look, NARROW, Size, WIDE};
pub use page::{built_page, target_folder};
pub use session::{Browser, drive, drive_on};
