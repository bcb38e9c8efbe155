//! A figure against its limits: a bar with the part allowed filled, and a mark where the figure stands.

use yew::prelude::*;

/// What is allowed of a figure, in its own unit; at least one of the two.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Allowed {
    /// Least that is allowed.
    pub least: Option<f64>,
    /// Most that is allowed.
    pub most: Option<f64>,
}

/// Where the bar puts the most that is allowed, and the least, where only one of the two is set.
const PLACE_OF_MOST: f64 = 0.75;
const PLACE_OF_LEAST: f64 = 0.5;
/// Share of the bar on each side of a band.
const BESIDE_BAND: f64 = 0.25;

/// Ends of the part allowed and the place of the figure, all as shares of the bar's length.
#[derive(Clone, Copy, Debug, PartialEq)]
struct Places {
    from: f64,
    to: f64,
    at: f64,
}

impl Allowed {
    /// Whether a figure keeps to it.
    #[must_use]
    pub fn keeps(self, figure: f64) -> bool {
        self.least.is_none_or(|least| figure >= least) && self.most.is_none_or(|most| figure <= most)
    }

    fn places(self, figure: f64) -> Option<Places> {
        let within = |at: f64| at.clamp(0.0, 1.0);
        match (self.least, self.most) {
            (Some(least), Some(most)) if most > least => {
                let share = (figure - least) / (most - least);
                let at = within(BESIDE_BAND + share * (1.0 - 2.0 * BESIDE_BAND));
                Some(Places { from: BESIDE_BAND, to: 1.0 - BESIDE_BAND, at })
            }
            (None, Some(most)) if most > 0.0 => {
                Some(Places { from: 0.0, to: PLACE_OF_MOST, at: within(PLACE_OF_MOST * figure / most) })
            }
            (Some(least), None) if least > 0.0 => {
                Some(Places { from: PLACE_OF_LEAST, to: 1.0, at: within(PLACE_OF_LEAST * figure / least) })
            }
            _ => None,
        }
    }
}

/// A figure with what is allowed of it.
#[derive(Clone, Debug, PartialEq)]
pub struct Gauge {
    places: Places,
    past: bool,
    words: String,
}

impl Gauge {
    /// A gauge; none where no limit is set. `words` say the limit to a reader of the screen.
    #[must_use]
    pub fn of(figure: f64, allowed: Allowed, words: String) -> Option<Self> {
        Some(Self { places: allowed.places(figure)?, past: !allowed.keeps(figure), words })
    }

    /// Whether the figure is past its limit.
    #[cfg(test)]
    #[must_use]
    pub fn is_past(&self) -> bool {
        self.past
    }

    /// The bar.
    pub fn bar(&self) -> Html {
        let Places { from, to, at } = self.places;
        let style = format!("--from: {from:.3}; --to: {to:.3}; --at: {at:.3}");
        let words =
            format!("{}: {}", if self.past { "Past its limit" } else { "Within its limit" }, self.words);
        let class = classes!("gauge", self.past.then_some("past"));
        html! { <span {class} {style} role="img" aria-label={words.clone()} title={words}></span> }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn at(least: Option<f64>, most: Option<f64>, figure: f64) -> Option<Places> {
        Allowed { least, most }.places(figure)
    }

    #[test]
    fn a_figure_at_its_limit_stands_at_the_end_of_the_part_allowed() {
        for (least, most, figure) in
            [(None, Some(0.8), 0.8), (Some(2200.0), None, 2200.0), (Some(-1.0), Some(2.0), 2.0)]
        {
            let places = at(least, most, figure).unwrap();
            assert!((places.at - if most.is_some() { places.to } else { places.from }).abs() < 1e-12);
            assert!(Allowed { least, most }.keeps(figure));
        }
    }

    #[test]
    fn a_figure_past_its_limit_stands_outside_and_stays_on_the_bar() {
        for figure in [0.81, 5.0] {
            let places = at(None, Some(0.8), figure).unwrap();
            assert!(places.at > places.to && places.at <= 1.0);
        }
        let places = at(Some(2200.0), None, -5.0).unwrap();
        assert!(places.at < places.from && places.at >= 0.0);
        assert!(!Allowed { least: Some(1.0), most: None }.keeps(0.9));
    }

    #[test]
    fn without_a_limit_there_is_no_bar() {
        assert_eq!(at(None, None, 1.0), None);
        assert_eq!(at(None, Some(0.0), 1.0), None);
        assert_eq!(at(Some(2.0), Some(2.0), 2.0), None);
    }
}
