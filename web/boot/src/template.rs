//! Filling the template.

use crate::escape::{job_text, script_text};
use std::fmt;

const TEMPLATE: &str = include_str!("../page/page.html");

/// The parts of the page, each as the text that stands in its node.
#[derive(Debug, Clone, Copy)]
pub struct Parts<'a> {
    /// All style sheets, joined.
    pub style: &'a str,
    /// A job as JSON, or nothing.
    pub job: &'a str,
    /// The small WebAssembly module that unpacks the engine, gzip in base64.
    pub opener: &'a str,
    /// The JavaScript side of the opener.
    pub opener_glue: &'a str,
    /// The WebAssembly module, LZMA in base 91.
    pub engine: &'a str,
    /// The JavaScript side of the WebAssembly module, gzip in base64.
    pub glue: &'a str,
    /// The scripts that start the page.
    pub boot: &'a str,
}

/// A style sheet holds `</`, which would end its node; CSS has no escape for it that means the same
/// everywhere.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct StyleCannotBeInlined;

impl fmt::Display for StyleCannotBeInlined {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str("a style sheet contains \"</\", which would end its node in the page")
    }
}

impl std::error::Error for StyleCannotBeInlined {}

impl Parts<'_> {
    /// The whole HTML file.
    ///
    /// # Errors
    /// [`StyleCannotBeInlined`] if the style sheet would end its own node.
    pub fn page(&self) -> Result<String, StyleCannotBeInlined> {
        if self.style.contains("</") {
            return Err(StyleCannotBeInlined);
        }
        Ok(fill(TEMPLATE, |slot| match slot {
            "style" => self.style.to_owned(),
            "job" => job_text(self.job),
            "opener" => self.opener.to_owned(),
            "opener-glue" => script_text(self.opener_glue),
            "engine" => self.engine.to_owned(),
            "glue" => self.glue.to_owned(),
            "boot" => script_text(self.boot),
            _ => String::new(),
        }))
    }
}

/// Replaces every `{{slot}}` of `template` by what `value` gives for it. What is put in is not looked
/// at again, so a job that happens to hold `{{boot}}` stays as it is.
fn fill(template: &str, value: impl Fn(&str) -> String) -> String {
    let mut out = String::new();
    let mut rest = template;
    while let Some((before, after)) = rest.split_once("{{") {
        let Some((slot, tail)) = after.split_once("}}") else { break };
        out.push_str(before);
        out.push_str(&value(slot));
        rest = tail;
    }
    out.push_str(rest);
    out
}

#[cfg(test)]
mod tests {
    use super::*;

    fn parts(job: &str) -> Parts<'_> {
        Parts {
            style: "p{}",
            job,
            opener: "BBBB",
            opener_glue: "let o;",
            engine: "AAAA",
            glue: "let g;",
            boot: "start()",
        }
    }

    #[test]
    fn every_slot_of_the_template_is_filled() {
        let page = parts("").page().unwrap();
        assert!(!page.contains("{{"));
        for text in ["p{}", "BBBB", "let o;", "AAAA", "let g;", "start()"] {
            assert_eq!(page.matches(text).count(), 1, "{text}");
        }
    }

    #[test]
    fn what_is_put_in_is_not_filled_again() {
        let page = parts(r#"{"title":"{{boot}} </script>"}"#).page().unwrap();
        assert!(page.contains(r#"{"title":"{{boot}} \u003c/script>"}"#));
    }

    #[test]
    fn a_style_that_would_end_its_node_is_refused() {
        let page = Parts { style: "a::after{content:'</style>'}", ..parts("") }.page();
        assert_eq!(page, Err(StyleCannotBeInlined));
    }

    #[test]
    fn the_policy_allows_no_connection() {
        let page = parts("").page().unwrap();
        assert!(page.contains("default-src 'none'"));
        assert!(!page.contains("connect-src"));
    }
}
