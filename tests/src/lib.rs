//! Outside checks of Spokeshave.
