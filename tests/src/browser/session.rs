//! One browser with a fresh profile.

use super::driver::Driver;
use super::{built_page, cdp, target_folder};
use crate::tools;
use anyhow::{Context, Result};
use fantoccini::{Client, ClientBuilder};
use futures_util::FutureExt;
use hyper_util::client::legacy::connect::HttpConnector;
use serde_json::{Value, json};
use std::panic::AssertUnwindSafe;
use std::path::Path;
use std::time::{Duration, Instant};
use tempfile::TempDir;

/// Flags for a browser that shows no window, asks nothing and calls nobody. The sandbox needs rights
/// that test machines often lack, and the only page opened is our own.
const FLAGS: [&str; 12] = [
    "--headless",
    "--no-sandbox",
    "--disable-gpu",
    "--disable-quic",
    "--disable-dev-shm-usage",
    "--no-first-run",
    "--no-default-browser-check",
    "--disable-background-networking",
    "--disable-component-update",
    "--disable-sync",
    "--enable-unsafe-swiftshader",
    "--hide-scrollbars",
];

/// How long to wait for something to appear.
const PATIENCE: Duration = Duration::from_secs(10);

/// A browser under control.
#[derive(Debug)]
pub struct Browser {
    pub(super) client: Client,
    pub(super) folder: TempDir,
    driver: Driver,
}

/// Runs a check in a browser of its own and ends the browser whatever happens.
///
/// # Errors
/// What the check returns, or that no browser could be started.
pub async fn drive(name: &str, check: impl AsyncFnOnce(&Browser) -> Result<()>) -> Result<()> {
    let browser = Browser::start().await?;
    let outcome = AssertUnwindSafe(check(&browser)).catch_unwind().await;
    if !matches!(outcome, Ok(Ok(()))) {
        browser.leave_picture(name).await;
    }
    browser.close().await;
    match outcome {
        Ok(result) => result,
        Err(panic) => std::panic::resume_unwind(panic),
    }
}

impl Browser {
    /// Starts a browser with a fresh profile.
    ///
    /// # Errors
    /// If the browser or its driver is missing or does not start.
    pub async fn start() -> Result<Self> {
        let program = tools::chromium()
            .context("no Chromium found: run `cargo prove`, or install the package chromium")?;
        let folder = TempDir::new()?;
        let mut flags: Vec<String> = FLAGS.iter().map(ToString::to_string).collect();
        flags.push(format!("--user-data-dir={}", folder.path().join("profile").display()));
        let capabilities = json!({
            "browserName": "chrome",
            "goog:chromeOptions": {"args": flags, "binary": program},
            "goog:loggingPrefs": {"performance": "ALL", "browser": "ALL"},
        });
        let Value::Object(capabilities) = capabilities else { unreachable!("written as an object above") };
        let driver = Driver::start().await?;
        let client =
            ClientBuilder::new(HttpConnector::new()).capabilities(capabilities).connect(&driver.url).await?;
        Ok(Self { client, folder, driver })
    }

    /// Ends the browser, then its driver.
    pub async fn close(self) {
        // A browser that is gone already needs no closing.
        let _ = self.client.close().await;
        self.driver.stop().await;
    }

    /// Opens the built page and waits until the application has started. Returns how long the page
    /// itself took from the start of loading, in milliseconds.
    ///
    /// # Errors
    /// If the page does not build or the application does not start.
    pub async fn open_page(&self) -> Result<f64> {
        self.open_file(&built_page()?).await
    }

    /// Opens any copy of the page and waits until the application has started.
    ///
    /// # Errors
    /// If the application does not start.
    pub async fn open_file(&self, file: &Path) -> Result<f64> {
        self.go_to_file(file).await?;
        self.started().await
    }

    /// Opens a file from disk, whatever it does.
    ///
    /// # Errors
    /// If the browser refuses.
    pub async fn go_to_file(&self, file: &Path) -> Result<()> {
        let file = file.canonicalize().with_context(|| format!("no file {}", file.display()))?;
        let url = url::Url::from_file_path(&file);
        let url = url.map_err(|()| anyhow::anyhow!("{} is no path for a browser", file.display()))?;
        Ok(self.client.goto(url.as_str()).await?)
    }

    /// Reloads the page and waits until the application has started again.
    ///
    /// # Errors
    /// If the application does not start.
    pub async fn reload(&self) -> Result<f64> {
        self.client.refresh().await?;
        self.started().await
    }

    async fn started(&self) -> Result<f64> {
        let started = "return window.spokeshave && window.spokeshave.startedMs || null";
        self.wait("the application to start", async || Ok(self.run(started).await?.as_f64())).await
    }

    /// Runs JavaScript in the page; `return` gives the value back.
    ///
    /// # Errors
    /// If the script throws.
    pub async fn run(&self, script: &str) -> Result<Value> {
        self.client.execute(script, vec![]).await.with_context(|| format!("in the page: {script}"))
    }

    /// Asks again and again until there is an answer.
    ///
    /// # Errors
    /// If asking fails, or there is no answer in ten seconds; `what` says what was waited for.
    pub async fn wait<T>(&self, what: &str, ask: impl AsyncFn() -> Result<Option<T>>) -> Result<T> {
        let begun = Instant::now();
        loop {
            if let Some(answer) = ask().await? {
                return Ok(answer);
            }
            anyhow::ensure!(begun.elapsed() < PATIENCE, "waited {PATIENCE:?} in vain for {what}");
            tokio::time::sleep(Duration::from_millis(20)).await;
        }
    }

    /// Everything a person can read on the page.
    ///
    /// # Errors
    /// If the browser is gone.
    pub async fn text(&self) -> Result<String> {
        let text = self.run("return document.body.innerText").await?;
        Ok(text.as_str().unwrap_or_default().to_owned())
    }

    /// Waits until a text can be read on the page.
    ///
    /// # Errors
    /// If it does not appear; the message holds what the page says instead.
    pub async fn wait_for_text(&self, text: &str) -> Result<()> {
        let shown = async || Ok(self.text().await?.contains(text).then_some(()));
        match self.wait(&format!("the text {text:?}"), shown).await {
            Ok(()) => Ok(()),
            Err(error) => Err(error.context(format!("the page says: {}", self.text().await?))),
        }
    }

    /// A command of the browser's own protocol.
    pub(super) async fn command(&self, name: &str, parameters: Value) -> Result<Value> {
        cdp::execute(&self.client, name, parameters).await.with_context(|| name.to_owned())
    }

    async fn leave_picture(&self, name: &str) {
        // The check has failed already; a picture that fails too must not hide why.
        let picture = async {
            let folder = target_folder()?.join("browser-failures");
            std::fs::create_dir_all(&folder)?;
            let file = folder.join(format!("{name}.png"));
            std::fs::write(&file, self.client.screenshot().await?)?;
            eprintln!("picture of the failure: {}", file.display());
            anyhow::Ok(())
        };
        if let Err(error) = picture.await {
            eprintln!("no picture of the failure: {error:#}");
        }
    }
}
