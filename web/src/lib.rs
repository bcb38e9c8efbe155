//! The Spokeshave page: a Yew app that runs entirely in the browser.
