//! One browser with a fresh profile.

use super::desktop::Desktop;
use super::driver::Driver;
use super::{built_page, cdp, lost, setup, target_folder};
use anyhow::{Context, Result};
use fantoccini::{Client, ClientBuilder};
use futures_util::FutureExt;
use hyper_util::client::legacy::connect::HttpConnector;
use serde_json::Value;
use std::panic::AssertUnwindSafe;
use std::path::Path;
use std::time::{Duration, Instant};
use tempfile::TempDir;

/// How long to wait for something to appear.
const PATIENCE: Duration = Duration::from_secs(60);

/// A browser under control.
#[derive(Debug)]
pub struct Browser {
    pub(super) client: Client,
    pub(super) folder: TempDir,
    driver: Driver,
}

/// Runs a check in a browser of its own and ends the browser whatever happens. Where the browser came to an
/// end by itself in the middle of it, once more in a new one.
///
/// # Errors
/// What the check returns, or that no browser could be started.
pub async fn drive<T>(name: &str, check: impl AsyncFn(&Browser) -> Result<T>) -> Result<T> {
    drive_on(None, name, check).await
}

/// As [`drive`], in a window if there is a desktop for it.
///
/// # Errors
/// What the check returns, or that no browser could be started.
pub async fn drive_on<T>(
    desktop: Option<&Desktop>,
    name: &str,
    check: impl AsyncFn(&Browser) -> Result<T>,
) -> Result<T> {
    match attempt(desktop, name, &check).await? {
        Ended::Gave(value) => return Ok(value),
        Ended::Gone(words) => lost::note(name, &words)?,
    }
    match attempt(desktop, name, &check).await? {
        Ended::Gave(value) => Ok(value),
        Ended::Gone(words) => anyhow::bail!("the browser ended by itself, twice: {words}"),
    }
}

/// How a check came to its end without failing.
enum Ended<T> {
    /// With what it is to give.
    Gave(T),
    /// The browser ended by itself, with the last it said.
    Gone(String),
}

async fn attempt<T>(
    desktop: Option<&Desktop>,
    name: &str,
    check: &impl AsyncFn(&Browser) -> Result<T>,
) -> Result<Ended<T>> {
    let browser = Browser::start_on(desktop).await?;
    let outcome = AssertUnwindSafe(check(&browser)).catch_unwind().await;
    let failed = !matches!(outcome, Ok(Ok(_)));
    let gone = failed && browser.is_gone().await;
    if failed && !gone {
        browser.leave_picture(name).await;
    }
    let words = browser.driver.last_words();
    browser.close().await;
    match outcome {
        Ok(Ok(value)) => Ok(Ended::Gave(value)),
        _ if gone => Ok(Ended::Gone(words)),
        Ok(Err(error)) => Err(error),
        Err(panic) => std::panic::resume_unwind(panic),
    }
}

impl Browser {
    /// Starts a browser with a fresh profile and no window.
    ///
    /// # Errors
    /// If the browser or its driver is missing or does not start.
    pub async fn start() -> Result<Self> {
        Self::start_on(None).await
    }

    /// Starts a browser with a fresh profile, with a window if there is a desktop for it.
    ///
    /// # Errors
    /// If the browser or its driver is missing or does not start.
    pub async fn start_on(desktop: Option<&Desktop>) -> Result<Self> {
        let folder = TempDir::new()?;
        let capabilities = setup::capabilities(folder.path(), desktop)?;
        let driver = Driver::start(desktop, folder.path()).await?;
        let mut client = ClientBuilder::new(HttpConnector::new());
        let client = client.capabilities(capabilities).connect(&driver.url).await?;
        Ok(Self { client, folder, driver })
    }

    /// Whether the browser itself, not only a page in it, is there no more.
    async fn is_gone(&self) -> bool {
        self.client.windows().await.is_err()
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
        self.wait_until_started().await
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
        self.wait_until_started().await
    }

    /// Reloads the page, whatever it does then.
    ///
    /// # Errors
    /// If the browser refuses.
    pub async fn reload_unstarted(&self) -> Result<()> {
        Ok(self.client.refresh().await?)
    }

    /// Waits until the application has started; gives the time from the start of loading, in
    /// milliseconds.
    ///
    /// # Errors
    /// If it does not start.
    pub async fn wait_until_started(&self) -> Result<f64> {
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

    /// Runs JavaScript in the page that calls its last argument with the value to give back.
    ///
    /// # Errors
    /// If the script throws or never calls back.
    pub async fn run_async(&self, script: &str) -> Result<Value> {
        let value = self.client.execute_async(script, vec![]).await;
        value.with_context(|| format!("in the page: {script}"))
    }

    /// Runs JavaScript in every page opened from now on, before any script of the page.
    ///
    /// # Errors
    /// If the browser refuses.
    pub async fn before_any_script(&self, script: &str) -> Result<()> {
        let source = serde_json::json!({"source": script});
        self.command("Page.addScriptToEvaluateOnNewDocument", source).await.map(drop)
    }

    /// Asks again and again until there is an answer.
    ///
    /// # Errors
    /// If asking fails, or there is no answer in a minute; `what` says what was waited for.
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
    ///
    /// # Errors
    /// If the browser refuses it.
    pub async fn command(&self, name: &str, parameters: Value) -> Result<Value> {
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
