//! Text that may stand inside a script node without ending it.

/// JSON that may stand inside a script node: every `<` becomes the JSON escape `\u003c`, which any JSON
/// reader turns back.
///
/// `<` occurs in JSON only inside strings, so the value is unchanged.
///
/// ```
/// assert_eq!(spokeshave_boot::job_text(r#"{"title":"</script>"}"#), r#"{"title":"\u003c/script>"}"#);
/// ```
#[must_use]
pub fn job_text(json: &str) -> String {
    json.replace('<', "\\u003c")
}

/// JavaScript that may stand inside a script node: `</script` and `<!--`, which an HTML reader acts on
/// wherever they stand, get a backslash that means nothing inside the strings where they occur.
///
/// ```
/// assert_eq!(spokeshave_boot::script_text("'</script><!--'"), r"'<\/script><\!--'");
/// ```
#[must_use]
pub fn script_text(code: &str) -> String {
    code.replace("</script", "<\\/script").replace("<!--", "<\\!--")
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn escaping_twice_is_escaping_once() {
        let hostile = "a</script><!--<script>b";
        assert_eq!(script_text(&script_text(hostile)), script_text(hostile));
        assert_eq!(job_text(&job_text(hostile)), job_text(hostile));
    }

    #[test]
    fn escaped_text_cannot_end_its_node() {
        assert!(!job_text("</script>").contains('<'));
        let code = script_text("</script><!--");
        assert!(!code.contains("</script") && !code.contains("<!--"));
    }
}
