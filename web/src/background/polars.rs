//! Making polars: what the page orders and what the worker reports, as plain data that goes over as JSON.

use std::ops::ControlFlow;

use serde::{Deserialize, Serialize};
use spokeshave::job::Section;
use spokeshave::section::make::{Comparison, Made, MakeError, Plan, Request, compare};
use spokeshave::section::outline::Outline;

/// Polars to make.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
pub struct Order {
    /// Name of the section.
    pub name: String,
    /// The outline's text.
    pub outline: String,
    /// Conditions.
    pub request: Request,
}

/// What the worker tells.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
pub enum Report {
    /// How far it has come.
    Step(Step),
    /// The section, and how it compares with the drawing where the request departs from it.
    Done(Box<Section>, Vec<Comparison>),
    /// Why there is none.
    Refused(String),
}

/// How far the work has come.
#[derive(Clone, Copy, Debug, PartialEq, Serialize, Deserialize)]
pub struct Step {
    /// Angles done, of all polars.
    pub done: usize,
    /// Angles asked for, of all polars.
    pub total: usize,
    /// Thickness ratio of the polar in work.
    pub thickness_ratio: f64,
    /// Reynolds number of the polar in work.
    pub reynolds: f64,
}

/// Carries out an order; `hear` gets the steps, and what comes out is the last word.
pub fn carried_out(order: &Order, mut hear: impl FnMut(&Report)) -> Report {
    match made(order, &mut hear) {
        Ok(report) => report,
        Err(why) => Report::Refused(why),
    }
}

fn made(order: &Order, hear: &mut impl FnMut(&Report)) -> Result<Report, String> {
    let outline = Outline::read(&order.outline).map_err(|e| e.to_string())?;
    let why = |e: MakeError| e.to_string();
    let carved = Plan::new(&outline, &order.request).map_err(why)?;
    // The section as drawn is computed beside it where there is something to compare.
    let as_drawn = order.request.as_drawn();
    let drawn = order.request.departs().then(|| Plan::new(&outline, &as_drawn)).transpose().map_err(why)?;
    let angles = carved.angles_deg().len();
    let total = angles * (carved.count() + drawn.as_ref().map_or(0, Plan::count));
    let made = all(&carved, 0, total, hear).map_err(why)?;
    let comparison = match &drawn {
        Some(drawn) => {
            let clean = all(drawn, angles * carved.count(), total, hear).map_err(why)?;
            compare((&carved, &made), (drawn, &clean))
        }
        None => Vec::new(),
    };
    let table = carved.table(&made).map_err(why)?;
    Ok(Report::Done(Box::new(Section::of(&order.name, table)), comparison))
}

fn all(
    plan: &Plan,
    before: usize,
    total: usize,
    hear: &mut impl FnMut(&Report),
) -> Result<Vec<Made>, MakeError> {
    let angles = plan.angles_deg().len();
    let one = |task: usize| {
        let (thickness_ratio, reynolds) = plan.conditions(task).unwrap_or_default();
        plan.run(task, |step| {
            let done = before + task * angles + step.done;
            hear(&Report::Step(Step { done, total, thickness_ratio, reynolds }));
            ControlFlow::Continue(())
        })
    };
    (0..plan.count()).map(one).collect()
}

#[cfg(test)]
mod tests {
    use super::*;
    use spokeshave::section::make::Angles;
    use spokeshave::section::outline::clark_y;

    fn order() -> Order {
        let outline = clark_y().unwrap();
        let points: Vec<String> = outline.points().iter().map(|[x, y]| format!("{x} {y}")).collect();
        let angles = Angles { first_deg: 0.0, last_deg: 4.0, step_deg: 1.0 };
        let request = Request { angles, edge_thickness: Some(0.01), ..Request::free(&[1e6], 9.0) };
        Order { name: "mine".into(), outline: points.join("\n"), request }
    }

    #[test]
    fn an_order_gives_a_section_and_its_comparison_with_the_drawing() {
        let order = serde_json::from_str::<Order>(&serde_json::to_string(&order()).unwrap()).unwrap();
        let mut steps = Vec::new();
        let last = carried_out(&order, |report| match report {
            Report::Step(step) => steps.push(step.done),
            other => panic!("{other:?}"),
        });
        assert!(steps.is_sorted() && steps.last() == Some(&10), "{steps:?}");
        let Report::Done(section, comparison) = last else { panic!("{last:?}") };
        assert_eq!((section.name.as_str(), comparison.len()), ("mine", 1));
        assert!(section.problems().is_empty());
    }

    #[test]
    fn a_bad_order_is_refused_in_words() {
        let bad = Order { outline: "1 0\nhalf 2\n".into(), ..order() };
        assert!(matches!(carried_out(&bad, |_| {}), Report::Refused(why) if why.contains("line 2")));
    }
}
