//! A finding as a person reads it in a terminal, with the line it speaks of.

use annotate_snippets::{AnnotationKind, Group, Level, Renderer, Snippet};

use crate::diagnostic::{Finding, Severity};

/// Renders a finding. `texts` are the inputs read so far, by name.
pub(super) fn render(finding: &Finding, texts: &[(String, String)], styled: bool) -> String {
    let level = match finding.severity {
        Severity::Error => Level::ERROR,
        Severity::Warning => Level::WARNING,
        Severity::Note => Level::NOTE,
    };
    let renderer = if styled { Renderer::styled() } else { Renderer::plain() };
    let place = &finding.place;
    let text = texts.iter().find(|(name, _)| *name == place.file).map(|(_, text)| text.as_str());
    let span = text.and_then(|text| span_of(text, place.line, place.column));
    let message = if span.is_none() && !place.file.is_empty() {
        format!("{place}: {}", finding.message)
    } else {
        finding.message.clone()
    };
    let title = level.primary_title(message).id(finding.code);
    let mut group = Group::with_title(title);
    if let (Some(text), Some(span)) = (text, span) {
        group = group.element(
            Snippet::source(text)
                .path(place.file.as_str())
                .annotation(AnnotationKind::Primary.span(span)),
        );
    }
    if !finding.remedy.is_empty() {
        group = group.element(Level::HELP.message(finding.remedy.as_str()));
    }
    renderer.render(&[group]).to_string()
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
