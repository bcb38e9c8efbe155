//! Commands beyond `WebDriver`: the browser's own protocol, and its logs.

use fantoccini::error::CmdError;
use fantoccini::wd::WebDriverCompatibleCommand;
use http::Method;
use serde_json::{Value, json};
use url::{ParseError, Url};

/// A command that takes its body as JSON.
#[derive(Debug)]
struct Command {
    path: &'static str,
    body: Value,
}

impl WebDriverCompatibleCommand for Command {
    fn endpoint(&self, base_url: &Url, session_id: Option<&str>) -> Result<Url, ParseError> {
        base_url.join(&format!("session/{}/{}", session_id.unwrap_or_default(), self.path))
    }

    fn method_and_body(&self, _request_url: &Url) -> (Method, Option<String>) {
        (Method::POST, Some(self.body.to_string()))
    }
}

/// Runs one command of the browser's protocol.
pub(super) async fn execute(
    client: &fantoccini::Client,
    command: &str,
    parameters: Value,
) -> Result<Value, CmdError> {
    let body = json!({"cmd": command, "params": parameters});
    client.issue_cmd(Command { path: "goog/cdp/execute", body }).await
}

/// Takes what has come into one of the browser's logs since the last call.
pub(super) async fn log(client: &fantoccini::Client, kind: &str) -> Result<Value, CmdError> {
    client.issue_cmd(Command { path: "se/log", body: json!({"type": kind}) }).await
}
