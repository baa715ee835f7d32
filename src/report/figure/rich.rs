//! Text with subscripts, superscripts and italics, and how wide it is.
//!
//! Widths follow the advance widths of the Helvetica family, to which the
//! common sans-serif faces on all systems keep; they serve for layout only.

/// Where a character sits relative to the baseline.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Shift {
    Base,
    Sub,
    Super,
}

/// Size of raised and lowered characters relative to the line.
pub(super) const SMALL: f64 = 0.72;

/// One character and how it is set.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Glyph {
    pub(super) c: char,
    pub(super) shift: Shift,
    pub(super) italic: bool,
}

/// A line of set text.
#[derive(Clone, Debug, Default, PartialEq)]
pub(super) struct Rich {
    pub(super) glyphs: Vec<Glyph>,
}

impl Rich {
    /// Text as it is.
    pub(super) fn plain(text: &str) -> Self {
        let mut rich = Self::default();
        rich.push(text, Shift::Base);
        rich
    }

    /// Reactions and species; see [`Rich::push_chemical`].
    pub(super) fn chemical(text: &str) -> Self {
        let mut rich = Self::default();
        rich.push_chemical(text);
        rich
    }

    /// Marked text, as the module [`super`] describes it. Marks without their
    /// closing partner are ordinary characters.
    pub(super) fn marked(text: &str) -> Self {
        let mut rich = Self::default();
        let mut rest = text;
        while let Some(first) = rest.chars().next() {
            let tail = &rest[first.len_utf8()..];
            rest = rich.push_mark(first, tail).unwrap_or_else(|| {
                rich.push(first.encode_utf8(&mut [0; 4]), Shift::Base);
                tail
            });
        }
        rich
    }

    /// Reads one mark whose opening character is `first`; returns what follows.
    fn push_mark<'t>(&mut self, first: char, tail: &'t str) -> Option<&'t str> {
        match first {
            '^' | '_' => {
                let (inner, after) = tail.strip_prefix('{')?.split_once('}')?;
                let shift = if first == '^' { Shift::Super } else { Shift::Sub };
                self.push(&inner.replace('-', "\u{2212}"), shift);
                Some(after)
            }
            '`' => {
                let (inner, after) = tail.split_once('`')?;
                self.push_chemical(inner);
                Some(after)
            }
            '*' => {
                let (inner, after) = tail.split_once('*')?;
                if inner.is_empty() || inner.trim() != inner {
                    return None;
                }
                let start = self.glyphs.len();
                self.push(inner, Shift::Base);
                self.glyphs[start..].iter_mut().for_each(|g| g.italic = true);
                Some(after)
            }
            _ => None,
        }
    }

    /// Adds characters with one shift.
    pub(super) fn push(&mut self, text: &str, shift: Shift) {
        let glyph = |c| Glyph { c, shift, italic: false };
        self.glyphs.extend(text.chars().map(glyph));
    }

    /// Adds chemical notation: counts are lowered, charges raised, `->` becomes
    /// an arrow. A word that is no formula is added as it is.
    pub(super) fn push_chemical(&mut self, text: &str) {
        for (i, word) in text.split(' ').enumerate() {
            if i > 0 {
                self.push(" ", Shift::Base);
            }
            if word == "->" {
                self.push("\u{2192}", Shift::Base);
            } else if !self.push_species(word) {
                self.push(word, Shift::Base);
            }
        }
    }

    /// Adds one species; false, and nothing added, when `word` is none.
    fn push_species(&mut self, word: &str) -> bool {
        let body = word.trim_end_matches(['+', '-']);
        let charge = &word[body.len()..];
        let Some(shifts) = formula_shifts(body) else { return false };
        for (c, shift) in body.chars().zip(shifts) {
            self.glyphs.push(Glyph { c, shift, italic: false });
        }
        if charge.len() > 1 {
            self.push(&charge.len().to_string(), Shift::Super);
        }
        if let Some(sign) = charge.chars().next() {
            self.push(if sign == '-' { "\u{2212}" } else { "+" }, Shift::Super);
        }
        true
    }

    /// Width at a font size, in the unit of that size.
    pub(super) fn width(&self, size: f64) -> f64 {
        self.glyphs.iter().map(|g| glyph_width(g) * size).sum()
    }

    /// The text, cut with an ellipsis where it is wider than `limit`.
    pub(super) fn fit(&self, limit: f64, size: f64) -> Self {
        if self.width(size) <= limit {
            return self.clone();
        }
        let dots = Glyph { c: '\u{2026}', shift: Shift::Base, italic: false };
        let mut room = limit - glyph_width(&dots) * size;
        let mut kept = Self::default();
        for g in &self.glyphs {
            room -= glyph_width(g) * size;
            if room < 0.0 {
                break;
            }
            kept.glyphs.push(*g);
        }
        kept.glyphs.push(dots);
        kept
    }

    /// Breaks the text at spaces into lines no wider than `limit`; a single
    /// word wider than that is cut with an ellipsis.
    pub(super) fn wrap(&self, limit: f64, size: f64) -> Vec<Self> {
        let mut lines: Vec<Self> = Vec::new();
        for word in self.glyphs.split(|g| g.c == ' ' || g.c == '\n') {
            if word.is_empty() {
                continue;
            }
            let word = Self { glyphs: word.to_vec() }.fit(limit, size);
            match lines.last_mut() {
                Some(line) if line.width(size) + 0.278 * size + word.width(size) <= limit => {
                    line.push(" ", Shift::Base);
                    line.glyphs.extend(word.glyphs);
                }
                _ => lines.push(word),
            }
        }
        lines
    }

    /// The characters alone, for titles and descriptions.
    pub(super) fn to_plain(&self) -> String {
        self.glyphs.iter().map(|g| g.c).collect()
    }
}

/// Shifts of the characters of an uncharged formula such as `c-C3H2` or
/// `H2O(ice)`; nothing when the word is no formula.
fn formula_shifts(body: &str) -> Option<Vec<Shift>> {
    if matches!(body, "e" | "grain") {
        return Some(vec![Shift::Base; body.len()]);
    }
    let b = body.as_bytes();
    let prefixed = b.len() > 2 && b[0].is_ascii_lowercase() && b[1] == b'-';
    let start = if prefixed { 2 } else { 0 };
    if !b.get(start)?.is_ascii_uppercase() {
        return None;
    }
    let mut shifts = vec![Shift::Base; b.len()];
    let mut word = false;
    for i in start..b.len() {
        let before = if i > start { b[i - 1] } else { b' ' };
        match b[i] {
            b'A'..=b'Z' if !word => {}
            b'a'..=b'z' if word || before.is_ascii_uppercase() => {}
            b'(' => word = b.get(i + 1)?.is_ascii_lowercase(),
            b')' => word = false,
            b'0'..=b'9' if before.is_ascii_alphanumeric() || before == b')' => {
                shifts[i] = Shift::Sub
            }
            _ => return None,
        }
    }
    Some(shifts)
}

/// Advance width of a glyph in units of the font size.
fn glyph_width(g: &Glyph) -> f64 {
    let thousandths = match g.c {
        'i' | 'j' | 'l' | '\'' => 222,
        ' ' | '!' | ',' | '.' | '/' | ':' | ';' | 'I' | '[' | ']' | '\\' | 'f' | 't' => 278,
        '(' | ')' | '-' | 'r' | '`' | '{' | '}' | '|' => 333,
        '*' | '"' => 389,
        'c' | 'k' | 's' | 'v' | 'x' | 'y' | 'z' | 'J' => 500,
        '+' | '<' | '=' | '>' | '~' | '\u{2212}' | '\u{d7}' => 584,
        'F' | 'T' | 'Z' => 611,
        'A' | 'B' | 'E' | 'K' | 'P' | 'S' | 'V' | 'X' | 'Y' | '&' => 667,
        'C' | 'D' | 'H' | 'N' | 'R' | 'U' | 'w' => 722,
        'G' | 'O' | 'Q' => 778,
        'M' | 'm' => 833,
        '%' => 889,
        'W' => 944,
        '@' | '\u{2192}' | '\u{2026}' => 1000,
        c if c.is_ascii() => 556,
        c if c < '\u{2e80}' => 620,
        _ => 1000,
    };
    let scale = if g.shift == Shift::Base { 1.0 } else { SMALL };
    f64::from(thousandths) / 1000.0 * scale
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Shifts as signs: `.` on the line, `v` lowered, `^` raised.
    fn shown(rich: &Rich) -> (String, String) {
        let sign = |g: &Glyph| match g.shift {
            Shift::Base => '.',
            Shift::Sub => 'v',
            Shift::Super => '^',
        };
        (rich.to_plain(), rich.glyphs.iter().map(sign).collect())
    }

    #[test]
    fn formulas_are_set_as_chemists_do() {
        let cases = [
            ("H3O+", "H3O+", ".v.^"),
            ("e-", "e\u{2212}", ".^"),
            ("C10H8", "C10H8", ".vv.v"),
            ("c-C3H2", "c-C3H2", "...v.v"),
            ("He++", "He2+", "..^^"),
            ("H2O(ice)", "H2O(ice)", ".v......"),
            ("grain-", "grain\u{2212}", ".....^"),
            ("HCO+ + e- -> CO + H", "HCO+ + e\u{2212} \u{2192} CO + H", "...^....^........."),
        ];
        for (text, characters, shifts) in cases {
            assert_eq!(shown(&Rich::chemical(text)), (characters.into(), shifts.into()), "{text}");
        }
    }

    #[test]
    fn words_that_are_no_formulas_are_left_alone() {
        for text in
            ["photon", "2", "run-2", "everything else", "model2", "a+b", "", "+", "-", "X-ray"]
        {
            let (characters, shifts) = shown(&Rich::chemical(text));
            assert_eq!(characters, text);
            assert!(shifts.chars().all(|c| c == '.'), "{text}");
        }
    }

    #[test]
    fn marks_are_read_and_lone_ones_are_kept() {
        let rich = Rich::marked("*n*_{H} / cm^{-3} of `H2`");
        assert_eq!(shown(&rich), ("nH / cm\u{2212}3 of H2".into(), ".v.....^^.....v".into()));
        assert!(rich.glyphs[0].italic && !rich.glyphs[1].italic);
        for text in ["a * b * c", "x_1 ^2", "`open", "^{open", "**"] {
            assert_eq!(Rich::marked(text).to_plain(), text);
        }
    }

    #[test]
    fn text_is_cut_and_wrapped_to_a_width() {
        let rich = Rich::plain("several words in a row");
        assert_eq!(rich.fit(1e3, 10.0), rich);
        let cut = rich.fit(50.0, 10.0);
        assert!(cut.width(10.0) <= 50.0 && cut.to_plain().ends_with('\u{2026}'));
        let lines =
            Rich::plain("several words in a row unpronounceablelonglonglong").wrap(60.0, 10.0);
        assert!(lines.len() > 2 && lines.iter().all(|l| l.width(10.0) <= 60.0));
        assert!(Rich::plain("").wrap(60.0, 10.0).is_empty());
    }
}
