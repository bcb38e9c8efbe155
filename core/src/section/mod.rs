//! Sections.
