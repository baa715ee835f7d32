//! Where results and remarks go: standard output and standard error.

use std::io::{self, BufWriter, IsTerminal, Write};

use super::arguments::{Common, Format};
use super::exit::Stop;
use super::findings;
use crate::diagnostic::{Finding, Severity};
use crate::report::table::Table;

/// Width of text output where the terminal does not say.
const WIDTH: usize = 80;
/// Widest text output: longer lines are hard to read.
const WIDEST: usize = 120;

/// The program's two streams and how to use them.
pub(super) struct Output {
    out: BufWriter<io::Stdout>,
    pub(super) format: Format,
    pub(super) quiet: bool,
    pub(super) verbose: bool,
    texts: Vec<(String, String)>,
}

impl Output {
    pub(super) fn new(common: &Common) -> Self {
        Self {
            out: BufWriter::new(io::stdout()),
            format: common.format,
            quiet: common.quiet,
            verbose: common.verbose,
            texts: Vec::new(),
        }
    }

    /// Keeps an input's text, so that findings can show the line.
    pub(super) fn remember(&mut self, name: &str, text: &str) {
        self.texts.push((name.to_owned(), text.to_owned()));
    }

    /// Writes text for people to standard output.
    pub(super) fn text(&mut self, text: &str) -> Result<(), Stop> {
        Ok(self.out.write_all(text.as_bytes())?)
    }

    /// Writes a table in the machine form that was asked for.
    pub(super) fn table(&mut self, table: &Table) -> Result<(), Stop> {
        match self.format {
            Format::Csv => table.write_csv(&mut self.out)?,
            Format::Json => table.write_json(&mut self.out)?,
            Format::Text => table.write_text(&mut self.out)?,
        }
        Ok(())
    }

    /// Whether results are for people.
    pub(super) fn for_people(&self) -> bool {
        self.format == Format::Text
    }

    /// Whether block symbols may be used on standard output: on a terminal that
    /// speaks UTF-8 and is not told to stay plain.
    pub(super) fn symbols(&self) -> bool {
        let plain = std::env::var("TERM").is_ok_and(|term| term == "dumb");
        let locale = ["LC_ALL", "LC_CTYPE", "LANG"]
            .iter()
            .find_map(|name| std::env::var(name).ok().filter(|value| !value.is_empty()));
        let utf8 =
            locale.is_some_and(|value| value.to_lowercase().replace('-', "").contains("utf8"));
        !plain && utf8 && io::stdout().is_terminal()
    }

    /// Columns of text output.
    pub(super) fn width(&self) -> usize {
        std::env::var("COLUMNS")
            .ok()
            .and_then(|text| text.parse().ok())
            .map_or(WIDTH, |width: usize| width.clamp(40, WIDEST))
    }

    /// Writes findings to standard error; notes only when asked to say more.
    pub(super) fn findings(&mut self, findings: &[Finding]) {
        // Standard error that is closed is nobody's mistake.
        let _ = self.out.flush();
        let mut err = anstream::stderr().lock();
        let styled = io::stderr().is_terminal() || std::env::var_os("CLICOLOR_FORCE").is_some();
        for finding in findings {
            let shown = match finding.severity {
                Severity::Error => true,
                Severity::Warning => !self.quiet,
                Severity::Note => self.verbose,
            };
            if shown {
                let text = findings::render(finding, &self.texts, styled);
                let _ = writeln!(err, "{text}");
            }
        }
    }

    /// Writes a remark to standard error unless quiet.
    pub(super) fn remark(&mut self, text: &str) {
        if !self.quiet {
            let _ = self.out.flush();
            let _ = writeln!(anstream::stderr().lock(), "{text}");
        }
    }

    /// Sends what is buffered.
    pub(super) fn finish(&mut self) -> Result<(), Stop> {
        Ok(self.out.flush()?)
    }
}
