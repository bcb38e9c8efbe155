//! A desktop without a screen, for what a browser does only in a window: its own save command.

use super::Browser;
use crate::tools;
use anyhow::{Context, Result};
use serde_json::{Value, json};
use std::io::{BufRead, BufReader};
use std::path::{Path, PathBuf};
use std::process::{Child, Command, Stdio};
use std::time::{Duration, Instant};

/// What the browser's save command writes.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum SaveAs {
    /// The file as it was loaded.
    FileOnly,
    /// The page as it now stands.
    CompletePage,
}

/// A desktop and how the browsers on it save; it ends when dropped.
#[derive(Debug)]
pub struct Desktop {
    server: Child,
    display: String,
    save_as: SaveAs,
    saved: tempfile::TempDir,
}

impl Desktop {
    /// Starts a desktop on a free display.
    ///
    /// # Errors
    /// If the programs for it are missing.
    pub fn start(save_as: SaveAs) -> Result<Self> {
        let program =
            tools::xvfb().context("Xvfb is missing: run `cargo prove`, or install the package xvfb")?;
        let mut server = Command::new(program)
            .args(["-displayfd", "1", "-screen", "0", "1440x900x24", "-nolisten", "tcp"])
            .stdin(Stdio::null())
            .stdout(Stdio::piped())
            .stderr(Stdio::null())
            .spawn()?;
        let mut number = String::new();
        BufReader::new(server.stdout.take().context("Xvfb has no output")?).read_line(&mut number)?;
        let display = format!(":{}", number.trim());
        Ok(Self { server, display, save_as, saved: tempfile::tempdir()? })
    }

    pub(super) fn display(&self) -> &str {
        &self.display
    }

    /// Preferences of a browser that saves into a folder of ours in the way asked for.
    pub(super) fn preferences(&self) -> Value {
        let kind = u8::from(self.save_as == SaveAs::CompletePage);
        json!({"savefile": {"type": kind, "default_directory": self.saved.path()}})
    }

    /// Saves the page with the browser's own command, as a person does with Ctrl+S and a click.
    ///
    /// # Errors
    /// If no file appears.
    pub async fn save(&self, browser: &Browser) -> Result<PathBuf> {
        let title = browser.run("return document.title").await?;
        let title = title.as_str().context("the page has no title")?;
        let page = self.window(title).await?;
        self.xdotool(&["windowfocus", "--sync", &page])?;
        self.xdotool(&["key", "ctrl+s"])?;
        let dialog = self.window("Save File").await?;
        let save = async || {
            // The dialog takes a moment to listen; a second click finds it gone, which is no error.
            let _ = self.press_save(&dialog);
            tokio::time::sleep(Duration::from_millis(300)).await;
            Ok(complete_file(self.saved.path()))
        };
        browser.wait("the saved page", save).await
    }

    /// The button stands in the lower right corner of the dialog.
    fn press_save(&self, dialog: &str) -> Result<()> {
        const FROM_RIGHT: i32 = 50;
        const FROM_BOTTOM: i32 = 28;
        let shape = self.xdotool(&["getwindowgeometry", "--shell", dialog])?;
        let side = |name: &str| {
            let line = shape.lines().find_map(|line| line.strip_prefix(name)).context("no size")?;
            anyhow::Ok(line.parse::<i32>()?)
        };
        let x = (side("WIDTH=")? - FROM_RIGHT).to_string();
        let y = (side("HEIGHT=")? - FROM_BOTTOM).to_string();
        self.xdotool(&["mousemove", "--window", dialog, &x, &y, "click", "1"]).map(drop)
    }

    /// Waits for a window whose title holds a text.
    async fn window(&self, title: &str) -> Result<String> {
        let begun = Instant::now();
        // The title is searched for as a pattern, in which `.*` stands for anything.
        let words = title.split(|c: char| !c.is_ascii_alphanumeric()).filter(|word| !word.is_empty());
        let pattern = words.collect::<Vec<_>>().join(".*");
        loop {
            let found = self.xdotool(&["search", "--onlyvisible", "--name", &pattern]);
            if let Some(window) = found.ok().and_then(|found| found.lines().last().map(str::to_owned)) {
                return Ok(window);
            }
            anyhow::ensure!(begun.elapsed() < Duration::from_secs(20), "no window {title:?} appeared");
            tokio::time::sleep(Duration::from_millis(100)).await;
        }
    }

    fn xdotool(&self, arguments: &[&str]) -> Result<String> {
        let program = tools::xdotool()
            .context("xdotool is missing: run `cargo prove`, or install the package xdotool")?;
        let output = Command::new(program).args(arguments).env("DISPLAY", &self.display).output()?;
        anyhow::ensure!(output.status.success(), "xdotool {arguments:?} failed");
        Ok(String::from_utf8(output.stdout)?)
    }
}

impl Drop for Desktop {
    fn drop(&mut self) {
        // It may have ended by itself, which is as good.
        let _ = self.server.kill();
        let _ = self.server.wait();
    }
}

/// The saved page, once its last line is written.
fn complete_file(folder: &Path) -> Option<PathBuf> {
    let mut files = std::fs::read_dir(folder).ok()?.flatten().map(|entry| entry.path());
    let page = files.find(|file| file.extension().is_some_and(|extension| extension == "html"))?;
    std::fs::read_to_string(&page).ok()?.trim_end().ends_with("</html>").then_some(page)
}
