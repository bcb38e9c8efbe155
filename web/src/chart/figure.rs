//! A chart with its heading and its figures as a table.

use yew::prelude::*;

/// The figures behind a chart.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Table {
    /// Column headings with their units.
    pub columns: Vec<AttrValue>,
    /// Rows, as long as the headings; the first column names the row.
    pub rows: Vec<Vec<AttrValue>>,
}

/// Properties of [`Figure`].
#[derive(Properties, PartialEq)]
pub struct FigureProps {
    /// Heading.
    pub title: AttrValue,
    /// A line under the heading.
    #[prop_or_default]
    pub note: Html,
    /// Gives the figures when they are asked for.
    pub table: Callback<(), Table>,
    /// Further style classes.
    #[prop_or_default]
    pub class: Classes,
    /// The drawing.
    pub children: Html,
}

/// A drawing under its heading, which a button turns into a table and back.
#[component]
pub fn Figure(props: &FigureProps) -> Html {
    let tabled = use_state_eq(|| false);
    let onclick = {
        let tabled = tabled.clone();
        Callback::from(move |_: MouseEvent| tabled.set(!*tabled))
    };
    let (words, name) = if *tabled {
        ("as drawing", format!("{}: show as drawing", props.title))
    } else {
        ("as table", format!("{}: show as table", props.title))
    };
    html! {
        <figure class={classes!("figure", tabled.then_some("is-tabled"), props.class.clone())}>
            <figcaption>
                <span class="figure-title">{ &props.title }</span>
                <button type="button" class="figure-switch" {onclick} aria-label={name}>{ words }</button>
                if props.note != Html::default() { <span class="figure-note">{ props.note.clone() }</span> }
            </figcaption>
            if *tabled {
                <TableView title={props.title.clone()} table={props.table.emit(())} />
            } else {
                { props.children.clone() }
            }
        </figure>
    }
}

/// Properties of [`TableView`].
#[derive(Properties, PartialEq)]
pub struct TableViewProps {
    /// What the table is of.
    pub title: AttrValue,
    /// Its figures.
    pub table: Table,
}

/// A table that scrolls inside itself.
#[component]
pub fn TableView(props: &TableViewProps) -> Html {
    let head = props.table.columns.iter().map(|name| html! { <th scope="col">{ name }</th> });
    let rows = props.table.rows.iter().map(|row| {
        let mut cells = row.iter();
        let name = cells.next().map(|name| html! { <th scope="row">{ name }</th> });
        html! { <tr>{ name }{ for cells.map(|cell| html! { <td>{ cell }</td> }) }</tr> }
    });
    html! {
        <div class="figure-table" tabindex="0" role="region" aria-label={format!("{}, table", props.title)}>
            <table>
                <thead><tr>{ for head }</tr></thead>
                <tbody>{ for rows }</tbody>
            </table>
        </div>
    }
}
