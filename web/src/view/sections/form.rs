//! What is typed to make a polar, and what it means. Nothing here touches the browser.

mod fault;

use spokeshave::section::make::{Angles, Plan, ROUGH_NOSE, Request, proposed_reynolds, proposed_thickness};
use spokeshave::section::outline::Outline;

use crate::background::polars::Order;
use fault::{blamed, said};

/// A box of the form.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Place {
    Name,
    Reynolds,
    Thickness,
    Amplification,
    First,
    Last,
    Step,
    Edge,
    TripUpper,
    TripLower,
}

impl Place {
    const ALL: [Self; 10] = [
        Self::Name,
        Self::Reynolds,
        Self::Thickness,
        Self::Amplification,
        Self::First,
        Self::Last,
        Self::Step,
        Self::Edge,
        Self::TripUpper,
        Self::TripLower,
    ];

    /// Id of the box, its label and its unit.
    pub(super) fn words(self) -> (&'static str, &'static str, &'static str) {
        match self {
            Self::Name => ("make-name", "Section name", ""),
            Self::Reynolds => ("make-reynolds", "Reynolds numbers", ""),
            Self::Thickness => ("make-thickness", "Thickness (empty: drawn)", "%"),
            Self::Amplification => ("make-n", "n at transition (9 quiet air, 4 disturbed air)", ""),
            Self::First => ("make-first", "Angles from", "°"),
            Self::Last => ("make-last", "to", "°"),
            Self::Step => ("make-step", "in steps of", "°"),
            Self::Edge => ("make-edge", "Trailing edge left, of the chord (empty: as drawn)", "%"),
            Self::TripUpper => ("make-trip-upper", "Rough on the back, up to", "%"),
            Self::TripLower => ("make-trip-lower", "and on the face, up to", "%"),
        }
    }
}

/// Texts as typed.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Form {
    /// The outline.
    pub(super) outline: String,
    pub(super) texts: [String; Place::ALL.len()],
    /// A rough or taped leading edge.
    pub(super) rough: bool,
    /// Boxes that were typed into: proposals no longer change them.
    pub(super) touched: [bool; Place::ALL.len()],
}

impl Default for Form {
    fn default() -> Self {
        let mut form = Self {
            outline: String::new(),
            texts: Default::default(),
            rough: false,
            touched: [false; Place::ALL.len()],
        };
        let angles = Angles::default();
        let percent = ROUGH_NOSE.map(|x| 100.0 * x);
        for (place, text) in [
            (Place::Name, "my-section".to_string()),
            (Place::Amplification, "9".into()),
            (Place::First, angles.first_deg.to_string()),
            (Place::Last, angles.last_deg.to_string()),
            (Place::Step, angles.step_deg.to_string()),
            (Place::TripUpper, percent[0].to_string()),
            (Place::TripLower, percent[1].to_string()),
        ] {
            form.texts[place as usize] = text;
        }
        form
    }
}

impl Form {
    pub(super) fn text(&self, place: Place) -> &str {
        &self.texts[place as usize]
    }

    /// The form with a text typed.
    pub(super) fn with(&self, place: Place, text: String) -> Self {
        let mut next = self.clone();
        next.texts[place as usize] = text;
        next.touched[place as usize] = true;
        next
    }

    /// The form with Reynolds numbers and thickness ratios that cover the stations, where nothing was typed.
    pub(super) fn proposing(&self, reynolds: &[f64], thickness: &[f64]) -> Self {
        let mut next = self.clone();
        let mut propose = |place: Place, values: Vec<f64>| {
            if !next.touched[place as usize] {
                next.texts[place as usize] = listed(&values);
            }
        };
        propose(Place::Reynolds, proposed_reynolds(reynolds));
        propose(
            Place::Thickness,
            proposed_thickness(thickness).into_iter().map(|t| (100.0 * t).round()).collect(),
        );
        next
    }

    /// The order, or what is wrong: by box, or with none for the outline as a whole.
    pub(super) fn order(&self) -> Result<Order, (Option<Place>, String)> {
        let outline = Outline::read(&self.outline).map_err(|e| (None, e.to_string()))?;
        let name = self.text(Place::Name).trim().to_string();
        if name.is_empty() {
            return Err((Some(Place::Name), "A name for the stations to call the section by.".into()));
        }
        if let Some(why) = super::taken(&name) {
            return Err((Some(Place::Name), why));
        }
        let request = self.request()?;
        Plan::new(&outline, &request).map_err(|e| (blamed(&e.to_string()), said(&e)))?;
        Ok(Order { name, outline: self.outline.clone(), request })
    }

    fn request(&self) -> Result<Request, (Option<Place>, String)> {
        let trip = |place| if self.rough { self.percent(place) } else { Ok(None) };
        let angles = Angles {
            first_deg: self.figure(Place::First)?,
            last_deg: self.figure(Place::Last)?,
            step_deg: self.figure(Place::Step)?,
        };
        let thickness = self.list(Place::Thickness)?;
        Ok(Request {
            thickness_ratios: thickness.into_iter().map(|t| t / 100.0).collect(),
            angles,
            edge_thickness: self.percent(Place::Edge)?,
            trip_upper: trip(Place::TripUpper)?,
            trip_lower: trip(Place::TripLower)?,
            ..Request::free(&self.list(Place::Reynolds)?, self.figure(Place::Amplification)?)
        })
    }

    fn figure(&self, place: Place) -> Result<f64, (Option<Place>, String)> {
        number(self.text(place)).ok_or_else(|| (Some(place), "A number is needed here.".into()))
    }

    /// A share of the chord from a percentage; none from an empty box.
    fn percent(&self, place: Place) -> Result<Option<f64>, (Option<Place>, String)> {
        if self.text(place).trim().is_empty() {
            Ok(None)
        } else {
            self.figure(place).map(|v| Some(v / 100.0))
        }
    }

    fn list(&self, place: Place) -> Result<Vec<f64>, (Option<Place>, String)> {
        // Reynolds numbers have no decimals: a comma stands between two of them.
        let reynolds = place == Place::Reynolds;
        let apart = |c: char| c.is_whitespace() || c == ';' || (c == ',' && reynolds);
        let words = self.text(place).split(apart).map(|w| w.trim_end_matches(',')).filter(|w| !w.is_empty());
        let allowed = if reynolds {
            "numbers with blanks or commas between, such as 100000, 200000"
        } else {
            "percentages with blanks between, such as 8 12 16"
        };
        let refused = |word| (Some(place), format!("“{word}” is no number. Allowed are {allowed}."));
        words.map(|word| number(word).ok_or_else(|| refused(word))).collect()
    }
}

/// A number, a comma read as a point.
fn number(text: &str) -> Option<f64> {
    let plain = text.trim().replace(',', ".").replace('−', "-");
    plain.parse::<f64>().ok().filter(|v| v.is_finite())
}

fn listed(values: &[f64]) -> String {
    values.iter().map(ToString::to_string).collect::<Vec<_>>().join(" ")
}

#[cfg(test)]
mod tests {
    use super::*;
    use spokeshave::section::outline::raf_6;

    fn filled() -> Form {
        let points: Vec<String> = raf_6().unwrap().points().iter().map(|[x, y]| format!("{x} {y}")).collect();
        let form = Form { outline: points.join("\n"), ..Form::default() };
        form.proposing(&[2e5, 8e5], &[0.08, 0.16])
    }

    #[test]
    fn a_form_that_is_filled_in_is_an_order() {
        let order = Form { rough: true, ..filled() }.with(Place::Edge, "1,5".into()).order().unwrap();
        assert_eq!(order.request.reynolds, [2e5, 4e5, 8e5]);
        assert_eq!(order.request.thickness_ratios, [0.08, 0.12, 0.16]);
        assert_eq!((order.request.edge_thickness, order.request.trip_upper), (Some(0.015), Some(0.05)));
        assert_eq!(order.name, "my-section");
    }

    #[test]
    fn what_was_typed_is_not_proposed_again() {
        let form = filled().with(Place::Reynolds, "300000".into()).proposing(&[1e5, 2e5], &[0.1]);
        assert_eq!((form.text(Place::Reynolds), form.text(Place::Thickness)), ("300000", "10"));
    }

    #[test]
    fn reynolds_numbers_stand_between_blanks_commas_or_semicolons() {
        for text in ["200000,500000", "200000, 500000", "200000;500000", " 200000\t500000 "] {
            let order = filled().with(Place::Reynolds, text.into()).order().unwrap();
            assert_eq!(order.request.reynolds, [2e5, 5e5], "{text}");
        }
        let order = filled().with(Place::Thickness, "8,5 12".into()).order().unwrap();
        assert_eq!(order.request.thickness_ratios, [0.085, 0.12]);
    }

    #[test]
    fn what_is_wrong_is_said_at_its_box() {
        let cases = [
            (Place::Name, " ", "name"),
            (Place::Name, "clark-y", "“clark-y” is one of the program’s own sections"),
            (
                Place::Reynolds,
                "fast",
                "“fast” is no number. Allowed are numbers with blanks or commas between",
            ),
            (Place::Reynolds, "", "Count of Reynolds numbers 0"),
            (Place::Reynolds, "9", "Reynolds number 9"),
            (Place::Reynolds, "200000 100000", "follows"),
            (Place::Thickness, "900", "Thickness ratio 900 %: 1 to 60 % is allowed."),
            (Place::Thickness, "9e99", "Thickness ratio 9e99 %: 1"),
            (Place::Thickness, "thick", "Allowed are percentages with blanks between"),
            (Place::Thickness, "12 8", "8 follows 12"),
            (Place::Edge, "0.1", "Trailing edge thickness"),
            (Place::Edge, "40", "40 %: 0 to 5 % is allowed."),
            (Place::Amplification, "", "number is needed"),
            (Place::Step, "0", "Step of angle"),
            (Place::Last, "99", "Last angle"),
        ];
        for (place, text, expected) in cases {
            let (at, message) = filled().with(place, text.into()).order().unwrap_err();
            assert!(at == Some(place) && message.contains(expected), "{place:?} {text}: {at:?} {message}");
        }
        let (at, message) = Form { outline: "1 0\nx 2".into(), ..filled() }.order().unwrap_err();
        assert!(at.is_none() && message.contains("line 2"), "{message}");
    }
}
