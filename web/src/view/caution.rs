//! The usual cautions.

use spokeshave::{cautions, job::Job};
use yew::prelude::*;

/// Before a standing start is tried.
pub fn standing_start() -> Html {
    html! {
        <aside class="caution">
            <b>{ "Before you act. " }</b>
            { "A standing start is an estimate. Tie the aircraft down, keep out of the disc plane, and run up only \
               what has been inspected and balanced. The engine maker's rpm limit comes before any figure here." }
        </aside>
    }
}

/// Before a figure of the fit is flown.
pub fn fit() -> Html {
    html! {
        <aside class="caution" aria-label="Before you act on the fit">
            <b>{ "Before you act. " }</b>
            { "These are estimates for still air, one mass and an engine in good order. Leave margin on \
               take-off, climb, range and rpm, and prove them step by step. Keep out of the disc plane on \
               the ground. The flight manual, the engine maker's limits and your aviation authority's rules \
               come before any figure here." }
        </aside>
    }
}

/// Before a shaped blade is made.
pub fn shape() -> Html {
    html! {
        <aside class="caution" aria-label="Before you act on a shaped blade">
            <b>{ "Before you act. " }</b>
            { "What is shaped here is judged by the air alone, unless the job names its wood and a stress \
               margin is asked for. A blade that comes out thinner or narrower than a proven one needs its \
               own check of strength (the Bench panel, steady load only), flutter and balance, and a \
               licensed inspector's or engineer's word where the rules ask for it." }
        </aside>
    }
}

/// Before a blade is cut or run by what the bench says.
pub fn bench(job: &Job) -> Html {
    html! {
        <aside class="caution" aria-label="Before you act at the bench">
            <b>{ "Before you act" }</b>
            <ul>{ for cautions(job).iter().map(|c| html! { <li>{ *c }</li> }) }</ul>
        </aside>
    }
}

/// Before wood is taken off a carved blade.
pub fn carved() -> Html {
    html! {
        <aside class="caution" aria-label="Before you cut a carved blade">
            <b>{ "Before you act. " }</b>
            { "Wood that is off does not come back: take off less than it says, and measure again. A thinner blade \
               is a weaker one: look at its strength after the cuts. Balance it, have it inspected where the rules \
               ask for it, and run it first at low rpm, tied down, with nobody in or near the plane of its disc." }
        </aside>
    }
}

/// Before readings are taken on the ground or in flight.
pub fn logbook() -> Html {
    html! {
        <aside class="caution" aria-label="Before you act on the logbook">
            <b>{ "Before you act. " }</b>
            { "Tie the aircraft down for ground runs, chock it, and keep everybody out of the disc plane. \
               In flight look out first and let a second person write. A blade that was planed is inspected \
               and balanced before it runs again, first at low rpm. The engine maker's limits, the flight \
               manual and your aviation authority's rules come before any figure here." }
        </aside>
    }
}

/// Before wood is cut by what stands on paper.
pub fn paper(job: &Job) -> Html {
    html! {
        <aside class="caution" aria-label="Before you act on paper">
            <b>{ "Before you act. " }</b>{ cautions(job).join(" ") }
        </aside>
    }
}

/// At the foot of the page.
pub fn foot() -> Html {
    html! {
        <p>
            <b>{ "Estimates, not an approval. " }</b>
            { "Leave margin and test. Materials vary: inspect, proof-load and balance every blade, and \
               check hub bolts again as the wood moves. Nobody stands in the plane of the disc. The rules \
               of your aviation authority, the engine maker's limits and a licensed inspector or engineer \
               come first." }
        </p>
    }
}
