//! The page as a file with a job inside.
//!
//! Every part of the page stays in the document as the text of its own node, so the page can put its
//! own file together again. With the job left out, the result equals the built file to the byte.

use spokeshave_boot::{Parts, node};

/// The whole HTML file with `job` (JSON) inside, to be offered as a download.
///
/// `None` if something has taken a part of the page out of the document.
#[must_use]
pub fn with_job(job: &str) -> Option<String> {
    let document = web_sys::window()?.document()?;
    let text = |id: &str| document.get_element_by_id(id)?.text_content();
    let (style, boot) = (text(node::STYLE)?, text(node::BOOT)?);
    let (opener, opener_glue) = (text(node::OPENER)?, text(node::OPENER_GLUE)?);
    let (engine, glue) = (text(node::ENGINE)?, text(node::GLUE)?);
    let parts = Parts {
        style: &style,
        job,
        opener: &opener,
        opener_glue: &opener_glue,
        engine: &engine,
        glue: &glue,
        boot: &boot,
    };
    parts.page().ok()
}
