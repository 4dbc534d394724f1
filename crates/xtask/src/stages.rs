//! Runs one command after another, says which, and sums up what they said of their tests.

use std::{
    io::{BufRead, BufReader, Write},
    process::{Command, Stdio},
    time::{Duration, Instant},
};

use anyhow::{Result, bail};

/// What has been run so far.
#[derive(Default)]
pub struct Stages {
    done: Vec<Stage>,
    tally: Tally,
}

struct Stage {
    name: String,
    took: Duration,
    held: bool,
}

#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
struct Tally {
    passed: u32,
    failed: u32,
}

impl Stages {
    /// Does one stage. A failing one does not stop those after it: they may have more to say.
    pub fn run(&mut self, name: &str, stage: impl FnOnce(&mut Self) -> Result<()>) -> bool {
        println!("\n== {name}");
        let began = Instant::now();
        let outcome = stage(self);
        if let Err(error) = &outcome {
            println!("== {name}: {error:#}");
        }
        self.done.push(Stage { name: name.to_owned(), took: began.elapsed(), held: outcome.is_ok() });
        outcome.is_ok()
    }

    /// A stage that is one command and must succeed. What it says of its tests is counted.
    pub fn command(&mut self, command: &mut Command) -> Result<()> {
        // Its words are passed on as they come: a quarter of an hour of silence looks like a fault.
        let mut child = command.stdin(Stdio::null()).stdout(Stdio::piped()).spawn()?;
        let mut screen = std::io::stdout();
        if let Some(said) = child.stdout.take() {
            for line in BufReader::new(said).split(b'\n') {
                let line = String::from_utf8_lossy(&line?).into_owned();
                writeln!(screen, "{line}")?;
                self.tally.count(&line);
            }
        }
        match child.wait()? {
            status if status.success() => Ok(()),
            status => bail!("{status}"),
        }
    }

    /// Prints what was done and how it went.
    ///
    /// # Errors
    ///
    /// When any stage failed.
    pub fn conclude(self) -> Result<()> {
        println!();
        for stage in &self.done {
            let held = if stage.held { "holds" } else { "FAILS" };
            println!("{:>7.1} s  {held}  {}", stage.took.as_secs_f64(), stage.name);
        }
        let Tally { passed, failed } = self.tally;
        println!("{passed} passed, {failed} failed");
        match self.done.iter().filter(|stage| !stage.held).count() {
            0 => Ok(()),
            failed => bail!("{failed} of {} stages failed", self.done.len()),
        }
    }
}

impl Tally {
    /// Reads `test result: ok. 12 passed; 0 failed; …`, as every Rust test binary ends.
    fn count(&mut self, line: &str) {
        let Some((_, counts)) = line.split_once("test result: ") else { return };
        let mut words = counts.split([' ', ';']).filter(|word| !word.is_empty()).peekable();
        while let Some(word) = words.next() {
            let Ok(number) = word.parse::<u32>() else { continue };
            match words.peek() {
                Some(&"passed") => self.passed += number,
                Some(&"failed") => self.failed += number,
                _ => {}
            }
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_tally_reads_each_binary_s_last_line_and_no_other() {
        let mut tally = Tally::default();
        tally.count("running 3 tests");
        tally.count("test result: ok. 12 passed; 0 failed; 1 ignored; 0 measured; 0 filtered out; finished in 0.4s");
        tally.count("test result: FAILED. 3 passed; 2 failed; 0 ignored; 0 filtered out");
        assert_eq!(tally, Tally { passed: 15, failed: 2 });
    }
}
