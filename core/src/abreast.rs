//! Two pieces of work side by side.

use std::panic::resume_unwind;
use std::thread::{Builder, scope};

/// What two pieces of work give that have nothing to do with one another: the first on a thread of its own
/// where there are threads, else one after the other, as in a browser. The answers are the same either way.
pub(crate) fn abreast<A: Send, B>(first: impl Fn() -> A + Sync, second: impl FnOnce() -> B) -> (A, B) {
    if cfg!(target_family = "wasm") {
        return (first(), second());
    }
    scope(|scope| {
        let begun = Builder::new().spawn_scoped(scope, &first);
        let second = second();
        let first = match begun {
            Ok(begun) => begun.join().unwrap_or_else(|panic| resume_unwind(panic)),
            Err(_) => first(),
        };
        (first, second)
    })
}

#[cfg(test)]
mod tests {
    use super::abreast;

    #[test]
    fn each_gives_its_own() {
        assert_eq!(abreast(|| 1, || "two"), (1, "two"));
    }
}
