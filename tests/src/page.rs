//! What the checks read and do on the page, in the page's own words.

use crate::browser::{Browser, Control};
use anyhow::{Context, Result};
use spokeshave::job::{DEMOS, Job};
use spokeshave::rig::Rig;

/// Half of the last decimal place that a departure is shown with, degrees.
const SHOWN_WITHIN_DEG: f64 = 0.05 + 1e-9;

/// The job that a fresh page shows.
///
/// # Errors
/// If the example is no job.
pub fn example() -> Result<Job> {
    Ok(Job::from_json(DEMOS.first().context("no example")?.json)?)
}

/// A job with the blade angle of one station (from 1 at the hub) changed.
///
/// # Errors
/// If there is no such station.
pub fn with_angle(job: &Job, station: usize, angle_deg: f64) -> Result<Job> {
    let mut job = job.clone();
    job.propeller.stations.get_mut(station - 1).context("no such station")?.angle_deg = Some(angle_deg);
    Ok(job)
}

/// Departure of a station (from 1 at the hub) at each flight point, as the core computes it, degrees.
///
/// # Errors
/// If the job cannot be computed.
pub fn computed_departures_deg(job: &Job, station: usize) -> Result<Vec<Option<f64>>> {
    let analysis = Rig::new(job)?.analysis();
    Ok(analysis.flight_points.iter().map(|point| point.stations.get(station - 1)?.departure_deg).collect())
}

impl Browser {
    /// The box with the blade angle of a station (from 1 at the hub).
    ///
    /// # Errors
    /// If there is none.
    pub async fn angle_box(&self, station: usize) -> Result<Control> {
        self.control("textbox", &format!("Blade angle at station {station}, degrees")).await
    }

    /// The departures that stand in a station's row of the table, by flight point, degrees.
    ///
    /// # Errors
    /// If there is no such row.
    pub async fn shown_departures_deg(&self, station: usize) -> Result<Vec<Option<f64>>> {
        let cells = format!(
            "const row = document.querySelector('[aria-label=\"Station {station}\"]').closest('tr');
            return [...row.querySelectorAll('.departure-column')].map(cell => cell.textContent)"
        );
        let cells = self.run(&cells).await?;
        let number = |text: &str| text.replace('\u{2212}', "-").parse().ok();
        let texts = cells.as_array().context("no cells")?.iter().filter_map(|cell| cell.as_str());
        Ok(texts.map(number).collect())
    }

    /// Waits until the page shows, for one station, the departures that the core computes for a job.
    ///
    /// # Errors
    /// If it does not; the message holds both.
    pub async fn wait_for_departures_of(&self, job: &Job, station: usize) -> Result<()> {
        let computed = computed_departures_deg(job, station)?;
        let same = async || {
            let shown = self.shown_departures_deg(station).await?;
            Ok(agree(&shown, &computed).then_some(()))
        };
        match self.wait("the computed departures", same).await {
            Ok(()) => Ok(()),
            Err(error) => {
                let shown = self.shown_departures_deg(station).await?;
                Err(error.context(format!("shown {shown:?}, computed {computed:?}")))
            }
        }
    }
}

fn agree(shown: &[Option<f64>], computed: &[Option<f64>]) -> bool {
    let near = |pair: (&Option<f64>, &Option<f64>)| match pair {
        (Some(shown), Some(computed)) => (shown - computed).abs() <= SHOWN_WITHIN_DEG,
        (None, None) => true,
        _ => false,
    };
    shown.len() == computed.len() && shown.iter().zip(computed).all(near)
}

#[cfg(test)]
mod tests {
    use super::agree;

    #[test]
    fn a_figure_that_differs_or_lacks_is_seen() {
        assert!(agree(&[Some(-0.9), None], &[Some(-0.94), None]));
        assert!(!agree(&[Some(-0.9)], &[Some(-0.96)]));
        assert!(!agree(&[Some(0.0)], &[None]));
        assert!(!agree(&[], &[None]));
    }
}
