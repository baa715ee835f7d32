//! Reading a number with its unit, as people write it in run files.

/// What a number measures. Each dimension has one documented unit, in which
/// plain numbers are taken and into which units are turned.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Dimension {
    /// Years of 365.25 days.
    Time,
    /// cm^-3.
    NumberDensity,
    /// K.
    Temperature,
    /// s^-1.
    Rate,
    /// Magnitudes.
    Extinction,
    /// cm^-2.
    ColumnDensity,
    /// Micrometres.
    Length,
    /// km s^-1.
    Speed,
    /// A pure number.
    Dimensionless,
}

impl Dimension {
    /// The documented unit, spelled as in tables: `yr`, `cm-3`, `K`, `s-1`,
    /// `mag`, `cm-2`, `um`, `km s-1`, `1`.
    pub fn unit(self) -> &'static str {
        match self {
            Self::Time => "yr",
            Self::NumberDensity => "cm-3",
            Self::Temperature => "K",
            Self::Rate => "s-1",
            Self::Extinction => "mag",
            Self::ColumnDensity => "cm-2",
            Self::Length => "um",
            Self::Speed => "km s-1",
            Self::Dimensionless => "1",
        }
    }

    /// Every accepted unit with the factor that turns it into [`Self::unit`].
    /// Spaces, `^` and `*` are ignored when a unit is looked up.
    pub fn accepted(self) -> &'static [(&'static str, f64)] {
        match self {
            Self::Time => &[
                ("yr", 1.0),
                ("kyr", 1e3),
                ("Myr", 1e6),
                ("Gyr", 1e9),
                ("d", 1.0 / 365.25),
                ("h", 1.0 / 8766.0),
                ("s", 1.0 / super::YEAR_S),
            ],
            Self::NumberDensity => &[("cm-3", 1.0), ("/cm3", 1.0), ("m-3", 1e-6)],
            Self::Temperature => &[("K", 1.0), ("mK", 1e-3), ("kK", 1e3)],
            Self::Rate => &[("s-1", 1.0), ("/s", 1.0), ("yr-1", 1.0 / super::YEAR_S)],
            Self::Extinction => &[("mag", 1.0), ("mmag", 1e-3)],
            Self::ColumnDensity => &[("cm-2", 1.0), ("/cm2", 1.0), ("m-2", 1e-4)],
            Self::Length => &[
                ("um", 1.0),
                ("\u{b5}m", 1.0),
                ("\u{3bc}m", 1.0),
                ("nm", 1e-3),
                ("mm", 1e3),
                ("cm", 1e4),
                ("m", 1e6),
            ],
            Self::Speed => &[
                ("km s-1", 1.0),
                ("km/s", 1.0),
                ("m s-1", 1e-3),
                ("m/s", 1e-3),
                ("cm s-1", 1e-5),
                ("cm/s", 1e-5),
            ],
            Self::Dimensionless => &[("1", 1.0), ("%", 1e-2)],
        }
    }
}

/// Reads a number with an optional unit and returns it in the documented unit
/// of `dimension`; a plain number is taken to be in that unit already.
///
/// # Errors
/// A sentence naming what was wrong: no number, a number that is not finite,
/// or a unit that is not among the accepted ones (which are listed).
pub fn parse_quantity(text: &str, dimension: Dimension) -> Result<f64, String> {
    let text = text.trim();
    let (number, unit) = text.split_at(number_length(text));
    let unit = unit.trim();
    let value: f64 = number.parse().map_err(|_| {
        format!("`{text}` does not start with a number (wanted a number in {})", dimension.unit())
    })?;
    if !value.is_finite() {
        return Err(format!("`{text}` is too large to be a number"));
    }
    if unit.is_empty() {
        return Ok(value);
    }
    let squeezed = squeeze(unit);
    for (name, factor) in dimension.accepted() {
        if squeeze(name) == squeezed {
            return Ok(value * factor);
        }
    }
    let names: Vec<&str> = dimension.accepted().iter().map(|(name, _)| *name).collect();
    Err(format!("`{unit}` is not a unit accepted here; use one of {}", names.join(", ")))
}

/// Length in bytes of the number at the start of `text`.
fn number_length(text: &str) -> usize {
    let bytes = text.as_bytes();
    let digits = |mut at: usize| {
        while bytes.get(at).is_some_and(u8::is_ascii_digit) {
            at += 1;
        }
        at
    };
    let sign = |at: usize| at + usize::from(matches!(bytes.get(at), Some(b'+' | b'-')));
    let mut end = digits(sign(0));
    if bytes.get(end) == Some(&b'.') {
        end = digits(end + 1);
    }
    if matches!(bytes.get(end), Some(b'e' | b'E')) {
        let start = sign(end + 1);
        if bytes.get(start).is_some_and(u8::is_ascii_digit) {
            end = digits(start);
        }
    }
    end
}

/// A unit without the characters that people write differently.
fn squeeze(unit: &str) -> String {
    unit.chars().filter(|c| !c.is_whitespace() && !matches!(c, '^' | '*')).collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn quantities_are_read_in_the_documented_unit() {
        use Dimension::*;
        let cases = [
            ("0.3 Myr", Time, 3e5),
            ("1e5 yr", Time, 1e5),
            ("1e5", Time, 1e5),
            ("3.15576e7 s", Time, 1.0),
            ("30 K", Temperature, 30.0),
            ("2e4 cm-3", NumberDensity, 2e4),
            ("2e4 cm^-3", NumberDensity, 2e4),
            ("1.3e-17 s-1", Rate, 1.3e-17),
            ("5 mag", Extinction, 5.0),
            ("1e21 cm-2", ColumnDensity, 1e21),
            ("0.1 um", Length, 0.1),
            ("100nm", Length, 0.1),
            ("1 km s-1", Speed, 1.0),
            ("1 km/s", Speed, 1.0),
            ("10%", Dimensionless, 0.1),
            (" +.5e-3 ", Dimensionless, 5e-4),
        ];
        for (text, dimension, expected) in cases {
            let got = parse_quantity(text, dimension).unwrap();
            assert!((got / expected - 1.0).abs() < 1e-12, "{text}: {got:e}");
        }
    }

    #[test]
    fn a_wrong_unit_is_refused_by_naming_the_accepted_ones() {
        let cases = [
            ("3 parsec", Dimension::Time, "Myr"),
            ("3 myr", Dimension::Time, "Myr"),
            ("2 cm-2", Dimension::NumberDensity, "cm-3"),
            ("warm", Dimension::Temperature, "number"),
            ("", Dimension::Temperature, "number"),
            ("nan", Dimension::Temperature, "number"),
            ("inf K", Dimension::Temperature, "number"),
            ("1e999 K", Dimension::Temperature, "too large"),
            ("1e K", Dimension::Temperature, "not a unit"),
        ];
        for (text, dimension, word) in cases {
            let error = parse_quantity(text, dimension).unwrap_err();
            assert!(error.contains(word), "{text}: {error}");
        }
    }
}
