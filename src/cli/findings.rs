//! A finding as a person reads it in a terminal, with the line it speaks of.

use annotate_snippets::{AnnotationKind, Group, Level, Renderer, Snippet};
use anstyle::{AnsiColor, Style};

use crate::diagnostic::{Finding, Severity};

/// Renders a finding. `texts` are the inputs read so far, by name.
pub(super) fn render(finding: &Finding, texts: &[(String, String)], styled: bool) -> String {
    let place = &finding.place;
    let text = texts.iter().find(|(name, _)| *name == place.file).map(|(_, text)| text.as_str());
    match text.and_then(|text| Some((text, span_of(text, place.line, place.column)?))) {
        Some((text, span)) => with_line(finding, text, span, styled),
        None => in_words(finding, styled),
    }
}

fn with_line(finding: &Finding, text: &str, span: std::ops::Range<usize>, styled: bool) -> String {
    let level = match finding.severity {
        Severity::Error => Level::ERROR,
        Severity::Warning => Level::WARNING,
        Severity::Note => Level::NOTE,
    };
    let renderer = if styled { Renderer::styled() } else { Renderer::plain() };
    let title = level.primary_title(finding.message.as_str()).id(finding.code);
    let snippet = Snippet::source(text)
        .path(finding.place.file.as_str())
        .annotation(AnnotationKind::Primary.span(span));
    let mut group = Group::with_title(title).element(snippet);
    if !finding.remedy.is_empty() {
        group = group.element(Level::HELP.message(finding.remedy.as_str()));
    }
    renderer.render(&[group]).to_string()
}

/// A finding without a line to show.
fn in_words(finding: &Finding, styled: bool) -> String {
    let colour = match finding.severity {
        Severity::Error => AnsiColor::BrightRed,
        Severity::Warning => AnsiColor::BrightYellow,
        Severity::Note => AnsiColor::BrightGreen,
    };
    let style = if styled { colour.on_default().bold() } else { Style::new() };
    let place = finding.place.to_string();
    let place = if place.is_empty() { place } else { format!("{place}: ") };
    let mut out = format!(
        "{style}{}[{}]{style:#}: {place}{}",
        finding.severity, finding.code, finding.message
    );
    if !finding.remedy.is_empty() {
        out.push_str(&format!("\n  = help: {}", finding.remedy));
    }
    out
}

/// The bytes of the word (or cell) at a line and column.
fn span_of(text: &str, line: u32, column: u32) -> Option<std::ops::Range<usize>> {
    if line == 0 {
        return None;
    }
    let mut start = 0;
    for _ in 1..line {
        start += text[start..].find('\n')? + 1;
    }
    let rest = &text[start..];
    let rest = &rest[..rest.find('\n').unwrap_or(rest.len())];
    if column == 0 {
        return Some(start..start + rest.trim_end().len());
    }
    let skip = rest.char_indices().nth(column as usize - 1).map_or(rest.len(), |(at, _)| at);
    let word = &rest[skip..];
    let end = word.find([',', '=', ']', '#', '\r']).unwrap_or(word.len());
    let length = word[..end].trim_end().len();
    let length = if length == 0 { word.chars().next().map_or(0, char::len_utf8) } else { length };
    Some(start + skip..start + skip + length)
}
