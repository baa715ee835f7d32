//! A small SVG writer: escaped, indented, with coordinates to a hundredth.

use super::palette::{INK, PAPER};
use super::rich::{Rich, SMALL, Shift};
use std::fmt::Write;

/// Faces with common advance widths first, then whatever the system calls
/// sans-serif.
const FONTS: &str = "Helvetica, Arial, 'Liberation Sans', Arimo, sans-serif";

/// Which end of a text its position names.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Anchor {
    Start,
    Middle,
    End,
}

/// How a text is drawn.
#[derive(Clone, Copy, Debug)]
pub(super) struct Look {
    pub(super) size: f64,
    pub(super) anchor: Anchor,
    pub(super) bold: bool,
    pub(super) fill: &'static str,
    /// A quarter turn to the left.
    pub(super) upright: bool,
    /// A white rim, for text upon curves.
    pub(super) halo: bool,
}

impl Look {
    /// Dark text starting at its position.
    pub(super) fn new(size: f64) -> Self {
        Self { size, anchor: Anchor::Start, bold: false, fill: INK, upright: false, halo: false }
    }

    pub(super) fn anchored(self, anchor: Anchor) -> Self {
        Self { anchor, ..self }
    }

    pub(super) fn filled(self, fill: &'static str) -> Self {
        Self { fill, ..self }
    }
}

/// How a line is drawn.
#[derive(Clone, Copy, Debug)]
pub(super) struct Stroke {
    pub(super) colour: &'static str,
    pub(super) width: f64,
    pub(super) dash: &'static str,
}

impl Stroke {
    /// An unbroken line.
    pub(super) fn solid(colour: &'static str, width: f64) -> Self {
        Self { colour, width, dash: "" }
    }

    fn attributes(&self) -> String {
        let mut text = format!(r#"stroke="{}" stroke-width="{}""#, self.colour, px(self.width));
        if !self.dash.is_empty() {
            text += &format!(r#" stroke-dasharray="{}""#, self.dash);
        }
        text
    }
}

/// A document under construction.
#[derive(Debug)]
pub(super) struct Svg {
    out: String,
    depth: usize,
}

impl Svg {
    /// Starts a document of the given size on white paper.
    pub(super) fn new(width: f64, height: f64, title: &str, description: &str) -> Self {
        let mut svg = Self { out: String::new(), depth: 0 };
        let (w, h) = (px(width), px(height));
        svg.line_of(&format!(
            r#"<svg xmlns="http://www.w3.org/2000/svg" width="{w}" height="{h}" viewBox="0 0 {w} {h}" role="img" aria-label="{}" font-family="{FONTS}">"#,
            escape(title)
        ));
        svg.depth = 1;
        svg.line_of(&format!("<title>{}</title>", escape(title)));
        svg.line_of(&format!("<desc>{}</desc>", escape(description)));
        svg.rect(0.0, 0.0, width, height, PAPER);
        svg
    }

    /// Closes the document.
    pub(super) fn finish(mut self) -> String {
        while self.depth > 1 {
            self.close_group();
        }
        self.out += "</svg>\n";
        self.out
    }

    /// Opens a group; a name becomes its `data-name` and its tooltip.
    pub(super) fn open_group(&mut self, class: &str, name: Option<&str>) {
        match name {
            Some(name) => {
                let name = escape(name);
                self.line_of(&format!(r#"<g class="{class}" data-name="{name}">"#));
                self.depth += 1;
                self.line_of(&format!("<title>{name}</title>"));
            }
            None => {
                self.line_of(&format!(r#"<g class="{class}">"#));
                self.depth += 1;
            }
        }
    }

    /// Closes the innermost group.
    pub(super) fn close_group(&mut self) {
        self.depth -= 1;
        self.line_of("</g>");
    }

    /// A filled rectangle.
    pub(super) fn rect(&mut self, x: f64, y: f64, width: f64, height: f64, fill: &str) {
        let (w, h) = (px(width.max(0.0)), px(height.max(0.0)));
        self.line_of(&format!(
            r#"<rect x="{}" y="{}" width="{w}" height="{h}" fill="{fill}"/>"#,
            px(x),
            px(y)
        ));
    }

    /// An unfilled rectangle.
    pub(super) fn outline(&mut self, x: f64, y: f64, width: f64, height: f64, stroke: Stroke) {
        let (w, h) = (px(width.max(0.0)), px(height.max(0.0)));
        let stroke = stroke.attributes();
        self.line_of(&format!(
            r#"<rect x="{}" y="{}" width="{w}" height="{h}" fill="none" {stroke}/>"#,
            px(x),
            px(y)
        ));
    }

    /// A filled disc.
    pub(super) fn disc(&mut self, (x, y): (f64, f64), radius: f64, fill: &str) {
        self.line_of(&format!(
            r#"<circle cx="{}" cy="{}" r="{}" fill="{fill}"/>"#,
            px(x),
            px(y),
            px(radius)
        ));
    }

    /// A line through points.
    pub(super) fn path(&mut self, points: &[(f64, f64)], stroke: Stroke) {
        let d = path_data(points);
        let stroke = stroke.attributes();
        self.line_of(&format!(r#"<path d="{d}" fill="none" stroke-linejoin="round" {stroke}/>"#));
    }

    /// A filled area with a hairline rim.
    pub(super) fn area(&mut self, points: &[(f64, f64)], fill: &str) {
        let d = path_data(points);
        let rim = Stroke::solid(PAPER, 0.8).attributes();
        self.line_of(&format!(r#"<path d="{d}Z" fill="{fill}" stroke-linejoin="round" {rim}/>"#));
    }

    /// A line of text whose baseline passes through the position.
    pub(super) fn text(&mut self, (x, y): (f64, f64), text: &Rich, look: Look) {
        if text.glyphs.is_empty() {
            return;
        }
        let mut tag = if look.upright {
            format!(r#"<text transform="translate({} {}) rotate(-90)""#, px(x), px(y))
        } else {
            format!(r#"<text x="{}" y="{}""#, px(x), px(y))
        };
        tag += &format!(r#" font-size="{}" fill="{}""#, px(look.size), look.fill);
        match look.anchor {
            Anchor::Start => {}
            Anchor::Middle => tag += r#" text-anchor="middle""#,
            Anchor::End => tag += r#" text-anchor="end""#,
        }
        if look.bold {
            tag += r#" font-weight="bold""#;
        }
        if look.halo {
            tag += r##" paint-order="stroke" stroke="#ffffff" stroke-width="3" stroke-linejoin="round""##;
        }
        let body = runs(text, look.size);
        self.line_of(&format!(r#"{tag} xml:space="preserve">{body}</text>"#));
    }

    fn line_of(&mut self, text: &str) {
        for _ in 0..self.depth {
            self.out.push(' ');
        }
        self.out += text;
        self.out.push('\n');
    }
}

/// Text with raised and lowered runs as `tspan`s. Shifts are relative moves,
/// each undone by the next run, because `baseline-shift` is poorly supported.
fn runs(text: &Rich, size: f64) -> String {
    let mut out = String::new();
    let mut height = 0.0;
    for run in text.glyphs.chunk_by(|a, b| (a.shift, a.italic) == (b.shift, b.italic)) {
        let chars: String = run.iter().map(|g| g.c).collect();
        let (target, scale) = match run[0].shift {
            Shift::Base => (0.0, 1.0),
            Shift::Sub => (0.22 * size, SMALL),
            Shift::Super => (-0.36 * size, SMALL),
        };
        let move_by = px(target - height);
        height = target;
        let mut attributes = String::new();
        if move_by != "0" {
            attributes += &format!(r#" dy="{move_by}""#);
        }
        if run[0].shift != Shift::Base {
            attributes += &format!(r#" font-size="{}""#, px(size * scale));
        }
        if run[0].italic {
            attributes += r#" font-style="italic""#;
        }
        let chars = escape(&chars);
        if attributes.is_empty() {
            out += &chars;
        } else {
            out += &format!("<tspan{attributes}>{chars}</tspan>");
        }
    }
    out
}

fn path_data(points: &[(f64, f64)]) -> String {
    let mut d = String::new();
    for (i, (x, y)) in points.iter().enumerate() {
        let command = if i == 0 { 'M' } else { 'L' };
        // Writing to a string cannot fail.
        let _ = write!(d, "{command}{} {}", px(*x), px(*y));
    }
    d
}

/// A coordinate to a hundredth, without trailing zeros; `0` if not finite.
pub(super) fn px(value: f64) -> String {
    if !value.is_finite() {
        return "0".to_owned();
    }
    let text = format!("{value:.2}");
    let text = text.trim_end_matches('0').trim_end_matches('.');
    if text == "-0" { "0".to_owned() } else { text.to_owned() }
}

/// Text fit for XML content and attributes; characters that XML does not
/// allow become U+FFFD.
pub(super) fn escape(text: &str) -> String {
    let mut out = String::with_capacity(text.len());
    for c in text.chars() {
        match c {
            '&' => out += "&amp;",
            '<' => out += "&lt;",
            '>' => out += "&gt;",
            '"' => out += "&quot;",
            '\t' | '\n' | '\r' => out.push(' '),
            c if c < ' ' || matches!(c, '\u{fffe}' | '\u{ffff}') => out.push('\u{fffd}'),
            c => out.push(c),
        }
    }
    out
}
