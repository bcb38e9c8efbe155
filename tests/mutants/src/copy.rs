//! A copy of the workspace with the mutants in it, and its tests built.

use std::collections::{BTreeSet, HashSet};
use std::fs;
use std::path::{Path, PathBuf};
use std::process::{Command, Stdio};

use anyhow::{Context, Result, bail, ensure};
use cargo_metadata::Message;
use cargo_metadata::diagnostic::{Diagnostic, DiagnosticLevel};

use crate::rewrite::{Mutant, rewrite};

/// The build script reads this one too, where there are no mutants.
const LEFT_ALONE: &str = "core/src/section/packed.rs";
/// The tests run many times over, but what asks for mutants everywhere is long in the making.
const QUICKLY_BUILT: &str = "profile.release.package.spokeshave.opt-level=2";
/// Rounds of leaving out what the compiler refuses.
const MOST_ROUNDS: u32 = 30;

/// The workspace's copy.
pub struct Copy {
    /// Its folder.
    pub root: PathBuf,
}

/// A program of tests.
pub struct Program {
    /// The file to run.
    pub file: PathBuf,
    /// Where its tests expect to be.
    pub folder: PathBuf,
}

impl Copy {
    /// Copies what the workspace has under version control, with its mutants in the folders of the core
    /// given.
    ///
    /// # Errors
    /// Where files cannot be read or written, or the compiler refuses something that no mutant explains.
    pub fn make(workspace: &Path, root: &Path, rooms: &[&str]) -> Result<(Self, Vec<Mutant>)> {
        let listed = Command::new("git").args(["ls-files", "-z"]).current_dir(workspace).output()?;
        let names: Vec<String> = String::from_utf8(listed.stdout)?
            .split_terminator('\0')
            .filter(|f| workspace.join(f).is_file())
            .map(str::to_owned)
            .collect();
        remove_gone(root, &names)?;
        let (own, others): (Vec<_>, Vec<_>) = names.iter().partition(|name| in_rooms(name, rooms));
        for name in others {
            let mut bytes = fs::read(workspace.join(name))?;
            if name == "core/src/lib.rs" {
                bytes = [b"#![allow(warnings)]\n", bytes.as_slice(), b"\nmod mutants;\n"].concat();
            }
            write(&root.join(name), &bytes)?;
        }
        write(&root.join("core/src/mutants.rs"), include_bytes!("chosen.rs"))?;
        let copy = Self { root: root.to_owned() };
        let kept = root.join("refused.txt");
        let mut refused: HashSet<String> =
            fs::read_to_string(&kept).unwrap_or_default().lines().map(str::to_owned).collect();
        for round in 0..MOST_ROUNDS {
            let mut mutants = Vec::new();
            for name in &own {
                let source = fs::read_to_string(workspace.join(name))?;
                let text = rewrite(name, &source, &mut mutants, &refused).with_context(|| (*name).clone())?;
                write(&root.join(name), text.as_bytes())?;
            }
            let faults = copy.refused(round > 2)?;
            if faults.is_empty() {
                return Ok((copy, mutants));
            }
            eprintln!("{} of {} mutants do not compile", faults.len(), mutants.len());
            refused.extend(faults.iter().map(|n| mutants[*n as usize - 1].key.clone()));
            fs::write(&kept, refused.iter().cloned().collect::<Vec<_>>().join("\n"))?;
        }
        bail!("still refused after {MOST_ROUNDS} rounds")
    }

    fn cargo(&self, arguments: &[&str]) -> Result<Vec<Message>> {
        let mut child = Command::new("cargo")
            .args(arguments)
            .args(["--message-format=json", "--config", QUICKLY_BUILT])
            .env("CARGO_PROFILE_RELEASE_DEBUG", "false")
            .current_dir(&self.root)
            .stdout(Stdio::piped())
            .spawn()?;
        let output = child.stdout.take().context("cargo's output")?;
        let messages = Message::parse_stream(std::io::BufReader::new(output)).collect::<Result<_, _>>()?;
        child.wait()?;
        Ok(messages)
    }

    /// The mutants in the way of a build: the one before each fault, and `wide` also the one after it.
    fn refused(&self, wide: bool) -> Result<BTreeSet<u32>> {
        let mut numbers = BTreeSet::new();
        for message in self.cargo(&["check", "--release", "--package", "spokeshave", "--lib"])? {
            let Message::CompilerMessage(told) = message else { continue };
            if told.message.level == DiagnosticLevel::Error && !told.message.spans.is_empty() {
                let found = self.numbers_at(&told.message, wide)?;
                ensure!(!found.is_empty(), "not a mutant's fault: {}", told.message);
                numbers.extend(found);
            }
        }
        Ok(numbers)
    }

    fn numbers_at(&self, fault: &Diagnostic, wide: bool) -> Result<Vec<u32>> {
        const ASKED: &str = "mutants::chosen(";
        let mut found = Vec::new();
        for span in fault.spans.iter().filter(|s| s.is_primary) {
            let text = fs::read_to_string(self.root.join(&span.file_name))?;
            let (start, end) = (span.byte_start as usize, span.byte_end as usize);
            let number =
                |at: usize| text[at + ASKED.len()..].split(')').next().and_then(|n| n.parse::<u32>().ok());
            found.extend(text[..end].rfind(ASKED).and_then(number));
            if wide {
                found.extend(text[start..].find(ASKED).and_then(|at| number(start + at)));
            }
        }
        Ok(found)
    }

    /// Builds the tests of the core, and those from outside too where wanted.
    ///
    /// # Errors
    /// Where cargo does not build them.
    pub fn tests(&self, outside: bool) -> Result<Vec<Program>> {
        let mut arguments = vec!["test", "--release", "--no-run", "--lib", "--test", "all"];
        arguments.extend(["--package", "spokeshave"]);
        if outside {
            arguments.extend(["--package", "spokeshave-tests", "--test", "validation"]);
        }
        let mut programs = Vec::new();
        let mut built = false;
        for message in self.cargo(&arguments)? {
            match message {
                Message::CompilerArtifact(made) if made.profile.test => {
                    programs.extend(made.executable.map(|file| Program {
                        file: file.into(),
                        folder: made.manifest_path.parent().map(Into::into).unwrap_or_default(),
                    }));
                }
                Message::CompilerMessage(told) if told.message.level == DiagnosticLevel::Error => {
                    eprintln!("{}", told.message);
                }
                Message::BuildFinished(end) => built = end.success,
                _ => {}
            }
        }
        ensure!(built, "the tests of the copy do not build");
        Ok(programs)
    }
}

/// Takes out what an earlier copy had and the workspace no longer has; notes what is copied now.
fn remove_gone(root: &Path, names: &[String]) -> Result<()> {
    let list = root.join("copied.txt");
    let now: HashSet<&str> = names.iter().map(String::as_str).collect();
    for gone in fs::read_to_string(&list).unwrap_or_default().lines().filter(|name| !now.contains(name)) {
        let file = root.join(gone);
        if file.exists() {
            fs::remove_file(file)?;
        }
    }
    write(&list, names.join("\n").as_bytes())
}

fn in_rooms(name: &str, rooms: &[&str]) -> bool {
    let inside = name.strip_prefix("core/src/").is_some_and(|rest| {
        rooms.iter().any(|room| rest.strip_prefix(room).is_some_and(|r| r.starts_with(['/', '.'])))
    });
    let of_tests = name.ends_with("/tests.rs") || name.contains("/tests/");
    inside && Path::new(name).extension().is_some_and(|e| e == "rs") && !of_tests && name != LEFT_ALONE
}

/// Writes a file unless it is so already: then cargo need not build it again.
fn write(path: &Path, bytes: &[u8]) -> Result<()> {
    if fs::read(path).is_ok_and(|there| there == bytes) {
        return Ok(());
    }
    fs::create_dir_all(path.parent().context("a folder")?)?;
    fs::write(path, bytes).with_context(|| path.display().to_string())
}
