//! The application.

use crate::{keep, saved_page};
use yew::prelude::*;

/// The application.
#[component]
pub fn App() -> Html {
    let job = keep::at_start();
    let copy = saved_page::with_job("{}").map_or(0, |page| page.len());
    html! {
        <main>
            <h1>{ "Spokeshave" }</h1>
            <p>{ job.unwrap_or_default() }</p>
            <p>{ format!("{copy} bytes") }</p>
        </main>
    }
}
