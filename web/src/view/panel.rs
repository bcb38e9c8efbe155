//! A panel whose heading carries its result, so that the closed stack reads as a job sheet.

use yew::prelude::*;

/// Properties of [`Panel`].
#[derive(Properties, PartialEq)]
pub struct PanelProps {
    /// Id, for the steps to lead to.
    pub id: AttrValue,
    /// Place in the order of the job.
    pub number: usize,
    /// Heading.
    pub title: AttrValue,
    /// The result in a line.
    pub result: AttrValue,
    /// Whether it is open at first.
    pub open: bool,
    /// Told when it opens or closes, and how it starts.
    #[prop_or_default]
    pub onunfold: Callback<bool>,
    /// What it holds.
    pub children: Html,
}

/// A panel.
#[component]
pub fn Panel(props: &PanelProps) -> Html {
    {
        let (told, open) = (props.onunfold.clone(), props.open);
        use_effect_with((), move |()| told.emit(open));
    }
    let ontoggle = props.onunfold.reform(|e: Event| {
        e.target_dyn_into::<web_sys::Element>().is_some_and(|panel| panel.has_attribute("open"))
    });
    html! {
        <details class="panel" id={props.id.clone()} open={props.open} {ontoggle}>
            <summary>
                <span class="panel-number">{ props.number }</span>
                <h2>{ &props.title }</h2>
                <span class="panel-result">{ &props.result }</span>
            </summary>
            <div class="panel-body">{ props.children.clone() }</div>
        </details>
    }
}
