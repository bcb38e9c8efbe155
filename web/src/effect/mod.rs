//! Where the page touches the browser: files, what is remembered of the view, the keyboard, work after a
//! frame.

pub mod after_frame;
pub mod file;
pub mod keys;
pub mod remembered;
pub mod text_file;
pub mod theme;
