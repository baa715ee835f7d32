//! Terminal text: wrapping, share bars, ranked channels.

/// Breaks a text into lines of at most `width` characters, each with `indent`
/// blanks before it; words longer than that stand alone.
#[must_use]
pub fn wrap(text: &str, width: usize, indent: usize) -> String {
    let mut out = String::new();
    for paragraph in text.split('\n') {
        let mut length = 0;
        for word in paragraph.split_whitespace() {
            let size = word.chars().count();
            if length == 0 {
                out.push_str(&" ".repeat(indent));
            } else if length + 1 + size > width {
                out.push('\n');
                out.push_str(&" ".repeat(indent));
                length = 0;
            } else {
                out.push(' ');
                length += 1;
            }
            out.push_str(word);
            length += size;
        }
        out.push('\n');
    }
    out.truncate(out.trim_end().len());
    out
}

/// A number as `6.12e-09`: `digits` after the point, two or more in the
/// exponent, so that columns line up; zero is `0`.
#[must_use]
pub fn scientific(value: f64, digits: usize) -> String {
    if value.abs() <= 0.0 {
        return "0".to_owned();
    }
    let text = format!("{value:.digits$e}");
    match text.split_once('e') {
        Some((mantissa, exponent)) => {
            let (sign, number) = match exponent.strip_prefix('-') {
                Some(number) => ('-', number),
                None => ('+', exponent),
            };
            format!("{mantissa}e{sign}{number:0>2}")
        }
        None => text,
    }
}

/// A share of 0 to 1 as a bar of `width` characters; in eighths where symbols
/// may be used.
#[must_use]
pub fn bar(share: f64, width: usize, symbols: bool) -> String {
    let share = if share.is_finite() { share.clamp(0.0, 1.0) } else { 0.0 };
    if !symbols {
        let full = (share * width as f64).round() as usize;
        return format!("{}{}", "#".repeat(full), ".".repeat(width - full));
    }
    let eighths = (share * width as f64 * 8.0).round() as usize;
    let (full, part) = (eighths / 8, eighths % 8);
    let mut out = "█".repeat(full);
    if part > 0 {
        out.push(['▏', '▎', '▍', '▌', '▋', '▊', '▉'][part - 1]);
    }
    let filled = full + usize::from(part > 0);
    out.push_str(&" ".repeat(width - filled));
    out
}

/// A share of 0 to 1 in per cent, four characters and the sign.
#[must_use]
pub fn percent(share: f64) -> String {
    let value = share * 100.0;
    if value >= 99.95 {
        " 100%".to_owned()
    } else if value > 0.0 && value < 0.05 {
        "<0.1%".to_owned()
    } else {
        format!("{value:4.1}%")
    }
}

/// One line of a ranked account.
#[derive(Clone, Debug, PartialEq)]
pub struct ChannelLine {
    /// The reaction.
    pub equation: String,
    /// Share of the total, 0 to 1.
    pub share: f64,
    /// What stands behind the equation: coefficient, uncertainty, source.
    pub detail: String,
}

/// How an account is laid out.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Layout {
    /// Columns.
    pub width: usize,
    /// Whether block symbols may be used.
    pub symbols: bool,
    /// Whether details are wanted.
    pub details: bool,
}

/// A ranked account: a heading, a line per channel with bar, share and
/// cumulated share, and the sum of the rest.
///
/// `rest` is the number of channels left out.
#[must_use]
pub fn account(heading: &str, lines: &[ChannelLine], rest: usize, layout: Layout) -> String {
    let bar_width = if layout.width >= 72 { 10 } else { 5 };
    let mut out = format!("  {heading}\n");
    let longest = lines.iter().map(|line| line.equation.chars().count()).max().unwrap_or(0);
    let mut sum = 0.0;
    for line in lines {
        sum += line.share;
        let equation = &line.equation;
        let mut text = format!(
            "    {} {}  {}  {equation:<longest$}",
            percent(line.share),
            bar(line.share, bar_width, layout.symbols),
            percent(sum),
        );
        if layout.details && !line.detail.is_empty() {
            // Beside the equation where there is room, else below it.
            if text.chars().count() + 2 + line.detail.chars().count() <= layout.width {
                text.push_str("  ");
                text.push_str(&line.detail);
            } else {
                text.truncate(text.trim_end().len());
                text.push('\n');
                text.push_str(&" ".repeat(bar_width + 19));
                text.push_str(&line.detail);
            }
        }
        out.push_str(text.trim_end());
        out.push('\n');
    }
    if rest > 0 {
        let left = (1.0 - sum).max(0.0);
        out.push_str(&format!(
            "    {} {}         {rest} other{}\n",
            percent(left),
            bar(left, bar_width, layout.symbols),
            if rest == 1 { "" } else { "s" },
        ));
    }
    out
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn numbers_line_up() {
        let cases =
            [(6.123e-9, "6.12e-09"), (5e-101, "5.00e-101"), (0.0, "0"), (-2e4, "-2.00e+04")];
        for (value, expected) in cases {
            assert_eq!(scientific(value, 2), expected);
        }
    }

    #[test]
    fn text_is_wrapped_at_words() {
        assert_eq!(wrap("one two three", 7, 2), "  one two\n  three");
        assert_eq!(wrap("incomprehensibility is long", 5, 0), "incomprehensibility\nis\nlong");
        assert_eq!(wrap("", 5, 2), "");
    }

    #[test]
    fn a_bar_is_as_long_as_its_share() {
        assert_eq!(bar(0.5, 4, false), "##..");
        assert_eq!(bar(0.5, 4, true), "██  ");
        assert_eq!(bar(0.03125, 4, true), "▏   ");
        for share in [0.0, 0.01, 0.33, 0.99, 1.0, 2.0, f64::NAN] {
            for symbols in [true, false] {
                assert_eq!(bar(share, 10, symbols).chars().count(), 10, "{share}");
            }
        }
    }

    #[test]
    fn per_cents_are_five_characters() {
        for share in [0.0, 1e-5, 0.004, 0.5, 0.9994, 1.0] {
            assert_eq!(percent(share).chars().count(), 5, "{share}: {}", percent(share));
        }
    }

    #[test]
    fn an_account_sums_what_it_leaves_out() {
        let line = |equation: &str, share| ChannelLine {
            equation: equation.to_owned(),
            share,
            detail: "k 1e-9".to_owned(),
        };
        let layout = Layout { width: 80, symbols: false, details: false };
        let text =
            account("OH is made", &[line("A + B -> OH", 0.7), line("C -> OH", 0.2)], 3, layout);
        assert_eq!(
            text,
            "  OH is made\n    70.0% #######...  70.0%  A + B -> OH\n    20.0% ##........  90.0%  C -> OH\n    10.0% #.........         3 others\n"
        );
    }
}
