//! The page in a real browser, opened from disk.

mod access;
mod carved;
mod growth;
mod input;
mod job;
mod machine;
mod native_save;
mod opening;
mod paper;
mod rescue;
mod shape;
