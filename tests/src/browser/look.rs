//! What the page looks like: on screens of several sizes, light and dark, and on paper.

use super::Browser;
use anyhow::{Context, Result};
use base64::Engine;
use base64::prelude::BASE64_STANDARD;
use serde_json::{Value, json};

/// A screen, in CSS pixels.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Size {
    /// Width.
    pub width: u32,
    /// Height.
    pub height: u32,
    /// A screen that is touched.
    pub touch: bool,
}

/// An ordinary laptop.
pub const WIDE: Size = Size { width: 1440, height: 900, touch: false };
/// A phone held upright.
pub const NARROW: Size = Size { width: 390, height: 844, touch: true };

/// Which of the two sets of colours the user has asked the system for.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Look {
    /// Dark on light.
    Light,
    /// Light on dark.
    Dark,
}

impl Browser {
    /// Makes the screen this large.
    ///
    /// # Errors
    /// If the browser refuses.
    pub async fn set_size(&self, size: Size) -> Result<()> {
        let Size { width, height, touch } = size;
        let metrics = json!({"width": width, "height": height, "deviceScaleFactor": 1, "mobile": touch});
        self.command("Emulation.setDeviceMetricsOverride", metrics).await.map(drop)
    }

    /// Sets the user's choice of light or dark.
    ///
    /// # Errors
    /// If the browser refuses.
    pub async fn set_look(&self, look: Look) -> Result<()> {
        let value = if look == Look::Dark { "dark" } else { "light" };
        let media = json!({"features": [{"name": "prefers-color-scheme", "value": value}]});
        self.command("Emulation.setEmulatedMedia", media).await.map(drop)
    }

    /// A picture of the screen, or of the whole page however long it is; PNG.
    ///
    /// # Errors
    /// If the browser refuses.
    pub async fn picture(&self, whole_page: bool) -> Result<Vec<u8>> {
        // Two frames on, everything asked for so far has been drawn.
        let drawn =
            "const done = arguments[0]; requestAnimationFrame(() => requestAnimationFrame(() => done()))";
        self.run_async(drawn).await?;
        let mut ask = json!({"format": "png"});
        if whole_page {
            let layout = self.command("Page.getLayoutMetrics", json!({})).await?;
            let mut clip = layout["cssContentSize"].clone();
            clip["scale"] = json!(1);
            ask = json!({"format": "png", "captureBeyondViewport": true, "clip": clip});
        }
        decoded(&self.command("Page.captureScreenshot", ask).await?)
    }

    /// The page as it is printed; PDF. Paper size in millimetres.
    ///
    /// # Errors
    /// If the browser refuses.
    pub async fn printed(&self, width_mm: f64, height_mm: f64) -> Result<Vec<u8>> {
        const MM_PER_INCH: f64 = 25.4;
        let paper = json!({
            "paperWidth": width_mm / MM_PER_INCH,
            "paperHeight": height_mm / MM_PER_INCH,
            "preferCSSPageSize": true,
            "printBackground": true,
        });
        decoded(&self.command("Page.printToPDF", paper).await?)
    }

    /// How far the page is wider than the screen, in CSS pixels; zero if it does not scroll sideways.
    ///
    /// # Errors
    /// If the browser is gone.
    pub async fn sideways_overflow(&self) -> Result<f64> {
        let overflow = "const page = document.documentElement; return page.scrollWidth - page.clientWidth";
        self.run(overflow).await?.as_f64().context("no width")
    }
}

fn decoded(answer: &Value) -> Result<Vec<u8>> {
    let data = answer["data"].as_str().context("the browser sent no data")?;
    Ok(BASE64_STANDARD.decode(data)?)
}
