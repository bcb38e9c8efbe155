//! `spokeshave shape JOB search`.

use std::ops::ControlFlow;
use std::time::{Duration, Instant};

use indicatif::{ProgressBar, ProgressStyle};
use spokeshave::job::Held;
use spokeshave::result::{AimResult, Margin, Search};
use spokeshave::rig::Rig;
use spokeshave::shape::{self, FREE, Progress, Wish};

use super::figures::{Words, words};
use super::wishes::{LimitArgs, aim, held};
use super::{Print, compared, told};
use crate::input::{Outcome, Stop};
use crate::table::{figure, signed, table};

#[derive(clap::Args)]
pub(crate) struct Args {
    /// What counts: efficiency, speed, climb, take-off, endurance, power, thrust or noise at a flight point;
    /// again for more. Without it what the job wishes for, or each flight point by what it is for
    #[arg(long, value_name = "POINT:FIGURE[=WEIGHT]")]
    aim: Vec<String>,
    #[command(flatten)]
    limits: LimitArgs,
    /// What stays as drawn: diameter, pitch, twist or chord; again for more
    #[arg(long, value_name = "WHAT", value_parser = held)]
    hold: Vec<Held>,
    /// Where the free figures start, each from -1 to 1 of its span, separated by commas; at the drawn blade
    /// without it
    #[arg(long, value_name = "X,X,…", allow_hyphen_values = true)]
    start: Option<String>,
    /// Most blades to try
    #[arg(long, value_name = "N", default_value_t = 1500, value_parser = clap::value_parser!(u32).range(1..=100_000))]
    most_trials: u32,
    /// Call it off after so many seconds; what was best by then counts
    #[arg(long, value_name = "S")]
    seconds: Option<f64>,
    #[command(flatten)]
    print: Print,
}

pub(super) fn run(rig: &Rig, args: &Args) -> Outcome {
    let wish = wish(rig, args)?;
    let bar = ProgressBar::new(u64::from(args.most_trials));
    let style = ProgressStyle::with_template("{msg} {bar:30} {pos} blades");
    let bar = bar.with_style(style.unwrap_or_else(|_| ProgressStyle::default_bar()));
    let begun = Instant::now();
    let longest = args.seconds.and_then(|s| Duration::try_from_secs_f64(s).ok());
    let found = shape::search(rig, &wish, &mut |now: &Progress| {
        bar.set_position(u64::from(now.trials));
        bar.set_message(match now.best_gain {
            Some(gain) => format!("best so far {} %", signed(Some(100.0 * gain), 2)),
            None => "none within limits yet".into(),
        });
        let late = longest.is_some_and(|most| begun.elapsed() > most);
        if late { ControlFlow::Break(()) } else { ControlFlow::Continue(()) }
    });
    bar.finish_and_clear();
    told(found, &args.print, "search", text)
}

fn wish(rig: &Rig, args: &Args) -> Result<Wish, Stop> {
    let mut wish = Wish::of(rig);
    if !args.aim.is_empty() {
        wish.aims = args.aim.iter().map(|text| aim(rig, text)).collect::<Result<_, _>>()?;
    }
    wish.limits = args.limits.over(rig)?;
    wish.most_trials = args.most_trials as usize;
    if !args.hold.is_empty() {
        wish.held.clone_from(&args.hold);
    }
    if let Some(text) = &args.start {
        let wrong = || Stop::bad(format!("--start: {text}; allowed are {FREE} figures from -1 to 1"));
        let one = |s: &str| s.trim().parse().ok().filter(|x: &f64| (-1.0..=1.0).contains(x));
        let all: Option<Vec<f64>> = text.split(',').map(one).collect();
        wish.start = all.and_then(|v| v.try_into().ok()).ok_or_else(wrong)?;
    }
    if args.seconds.is_some_and(|s| !(0.0..=1e6).contains(&s)) {
        return Err(Stop::bad("--seconds: allowed is 0 to 1000000"));
    }
    Ok(wish)
}

fn text(s: &Search) -> String {
    let aims =
        table(&["flight point", "figure", "weight", "drawn", "found"], s.aims.iter().map(row).collect());
    let free = s.free.iter().map(|f| {
        let end = if f.at_end { "at the end of its span" } else { "" };
        let span = format!("{}..{}", signed(Some(f.span.0), 2), signed(Some(f.span.1), 2));
        vec![f.name.into(), signed(Some(f.value), 3), span, f.unit.into(), end.into()]
    });
    let margins: Vec<String> = s.margins.iter().filter(|m| m.found.is_some()).map(Margin::sentence).collect();
    format!(
        "Search: {} % in the weighted mean over the drawn blade, {} blades tried. {}\n\n{aims}\n\n{}\n\n{}\n\n{}",
        signed(Some(100.0 * s.gain), 2),
        s.trials,
        s.stopped.sentence(),
        table(&["free figure", "change", "span", "", ""], free.collect()),
        margins.join("\n"),
        compared(&s.flight_points)
    )
}

fn row(a: &AimResult) -> Vec<String> {
    let Words { name, per, decimals } = words(a.figure);
    let told = |value: Option<f64>| figure(value.map(|v| v * per), decimals);
    vec![a.flight_point.clone(), name.into(), a.weight.to_string(), told(a.drawn), told(a.shaped)]
}
