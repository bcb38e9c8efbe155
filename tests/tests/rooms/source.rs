//! Which rooms a crate has and what they use of one another, read from the paths in their sources. What is only
//! compiled for tests does not count.

use std::collections::{BTreeMap, BTreeSet};
use std::path::{Path, PathBuf};

/// What a room uses, each with the files that do.
pub(crate) type Uses = BTreeMap<String, BTreeSet<PathBuf>>;

/// The rooms of a crate, the modules that its root names, with what they use. Files are told from the workspace.
pub(crate) fn rooms(workspace: &Path, source: &Path) -> BTreeMap<String, Uses> {
    let root = std::fs::read_to_string(workspace.join(source).join("lib.rs")).unwrap();
    let uses = |room: String| {
        let mut uses = Uses::new();
        walk(workspace, &source.join(&room), 1, &mut uses);
        uses.remove(&room);
        (room, uses)
    };
    modules(&code(&root)).into_iter().map(uses).collect()
}

/// Reads a module, whose name ends the path, and those below it. `depth` is how far it stands below the root.
fn walk(workspace: &Path, module: &Path, depth: usize, uses: &mut Uses) {
    let files = [module.with_extension("rs"), module.join("mod.rs")];
    let read = |file: &PathBuf| Some((file.clone(), std::fs::read_to_string(workspace.join(file)).ok()?));
    let (file, text) = files.iter().find_map(read).expect("a module has its file");
    let code = code(&text);
    for used in used(&code, depth) {
        uses.entry(used).or_default().insert(file.clone());
    }
    for below in modules(&code) {
        walk(workspace, &module.join(below), depth + 1, uses);
    }
}

/// A source without comments and without what is only compiled for tests: from such an attribute to the line
/// that ends its item, set in as far.
fn code(text: &str) -> String {
    let mut kept = String::new();
    let mut test_item = None;
    for line in text.lines() {
        let line = line.split("//").next().unwrap_or_default().trim_end();
        let inset = line.len() - line.trim_start().len();
        match test_item {
            Some(at) if at == inset && line.ends_with(['}', ';']) => test_item = None,
            Some(_) => {}
            None if line.trim_start() == "#[cfg(test)]" => test_item = Some(inset),
            None => {
                kept.push_str(line);
                kept.push('\n');
            }
        }
    }
    kept
}

/// The modules that a source names and keeps in files of their own.
fn modules(code: &str) -> Vec<String> {
    let name = |line: &str| Some(line.strip_suffix(';')?.rsplit_once("mod ")?.1.to_string());
    code.lines().filter_map(name).filter(|name| name.chars().all(in_name)).collect()
}

/// The names that stand first in paths from the root: `crate::…`, or as many `super::` as lead there.
fn used(code: &str, depth: usize) -> BTreeSet<String> {
    let code = code.replace(&"super::".repeat(depth), "crate::");
    let starts = code.match_indices("crate::").map(|(at, _)| at);
    let whole = starts.filter(|&at| !code[..at].ends_with(in_name));
    whole.flat_map(|at| first_names(&code[at + "crate::".len()..])).collect()
}

/// The first name of a path, or those of each path in its braces.
fn first_names(path: &str) -> Vec<String> {
    let name = |path: &str| path.chars().take_while(|&c| in_name(c)).collect::<String>();
    let Some(inner) = path.strip_prefix('{') else { return vec![name(path)] };
    let mut open = 0;
    let outermost = |c: &char| {
        open += i32::from(*c == '{') - i32::from(*c == '}');
        open == 0
    };
    let list: String = inner.chars().take_while(|&c| c != ';').filter(outermost).collect();
    list.split(',').map(|path| name(path.trim())).filter(|name| !name.is_empty()).collect()
}

fn in_name(c: char) -> bool {
    c.is_alphanumeric() || c == '_'
}

#[test]
fn paths_from_the_root_are_found() {
    let code = "use crate::air::{Air, AirError};\nuse crate::{\n    fit::{self, line},\n\
                \u{20}   report, rig as made,\n};\n\
                fn f() -> crate::wood::Sheet { $crate::job::check(); a_crate::no::one() }\n\
                pub(in crate::view) fn g() {}\nuse self::own::Thing;\n";
    let names = |code: &str, depth| used(code, depth).into_iter().collect::<Vec<_>>().join(" ");
    assert_eq!(names(code, 1), "air fit job report rig view wood");
    let above = "use super::blade::Blade;\nuse super::{engine, shape::{self, twist}};\n";
    assert_eq!(names(above, 1), "blade engine shape");
    assert_eq!(names(above, 2), "");
    assert_eq!(names("use super::super::engine::Shaft;\n", 2), "engine");
}

#[test]
fn what_is_for_tests_does_not_count() {
    let text = "//! See [`crate::one`].\nmod below;\n#[cfg(test)]\nmod tests;\n\
        #[cfg(test)]\nuse crate::{\n    two,\n};\npub(crate) mod seen; // crate::three\n\
        impl A {\n    #[cfg(test)]\n    fn b() {\n        crate::four::f();\n    }\n\n    fn c() {}\n}\n\
        #[cfg(test)]\nmod inside {\n    use crate::five;\n}\nuse crate::six;\n";
    let code = code(text);
    assert_eq!(modules(&code), ["below", "seen"]);
    assert_eq!(used(&code, 1).into_iter().collect::<Vec<_>>(), ["six"]);
}
