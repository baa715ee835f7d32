//! The formula reader: names and compositions into atoms, charge and phase.
//!
//! A name is a body, then a charge written as repeated `+` or `-`, then, for
//! ice, `(ice)`: `H2O`, `C2H2+`, `O2--`, `H2O(ice)`. The body is elements with
//! counts. Two names are special: `e-` is the electron, and `grain` (with any
//! charge) is dust, whose only "element" is `grain`.

use super::elements;

/// Name of dust, and of the pseudo-element that counts grains.
pub const GRAIN: &str = "grain";

/// Where a species is.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Phase {
    /// Free in the gas.
    Gas,
    /// In the ice on grains, written `(ice)`.
    Ice,
    /// A dust grain itself.
    Dust,
}

/// What a name says.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Formula {
    /// Elements and counts, sorted by element.
    pub atoms: Vec<(String, u32)>,
    /// Charge in units of e.
    pub charge: i32,
    /// Gas, ice or dust.
    pub phase: Phase,
}

/// Why a name or a composition could not be read.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct FormulaError {
    /// What kind of mistake.
    pub kind: FormulaErrorKind,
    /// Characters before the mistake.
    pub offset: usize,
    /// What is wrong, in words.
    pub message: String,
}

/// Kinds of mistake in a name or a composition.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum FormulaErrorKind {
    /// The text does not follow the grammar.
    Grammar,
    /// An element that has no place in the table.
    UnknownElement,
}

impl FormulaError {
    /// Stable code of the mistake.
    pub fn code(&self) -> &'static str {
        match self.kind {
            FormulaErrorKind::Grammar => "species-formula",
            FormulaErrorKind::UnknownElement => "species-unknown-element",
        }
    }
}

impl std::fmt::Display for FormulaError {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        f.write_str(&self.message)
    }
}

impl std::error::Error for FormulaError {}

fn grammar(offset: usize, message: String) -> FormulaError {
    FormulaError { kind: FormulaErrorKind::Grammar, offset, message }
}

/// Largest count of one element in one species.
const MOST_ATOMS: u32 = 1_000_000;

impl Formula {
    /// Reads a name such as `CH3OH2+`.
    ///
    /// # Errors
    /// When the name does not follow the grammar or holds an unknown element.
    pub fn parse(name: &str) -> Result<Self, FormulaError> {
        let (body, charge, ice) = split_name(name)?;
        if body == "e" && charge == -1 && !ice {
            return Ok(Self { atoms: Vec::new(), charge, phase: Phase::Gas });
        }
        if body == GRAIN {
            if ice {
                return Err(grammar(body.len(), format!("`{name}`: dust is not ice")));
            }
            return Ok(Self { atoms: vec![(GRAIN.to_string(), 1)], charge, phase: Phase::Dust });
        }
        let atoms = read_body(name, body)?;
        Ok(Self { atoms, charge, phase: if ice { Phase::Ice } else { Phase::Gas } })
    }

    /// Reads charge and phase from the name and the atoms from a composition
    /// such as `H:2 O:1`, whose elements may be made up. A composition that
    /// holds `grain` makes the species dust.
    ///
    /// # Errors
    /// When either does not follow its grammar.
    pub fn with_composition(name: &str, composition: &str) -> Result<Self, FormulaError> {
        let (_, charge, ice) = split_name(name)?;
        let mut atoms: Vec<(String, u32)> = Vec::new();
        let mut offset = 0;
        for part in composition.split(' ') {
            let at = offset;
            offset += part.chars().count() + 1;
            if part.is_empty() {
                continue;
            }
            let wrong = || {
                let text = format!("`{part}` is not of the form `element:count`");
                grammar(at, text)
            };
            let (element, count) = part.split_once(':').ok_or_else(wrong)?;
            if element.is_empty() || !element.chars().all(|c| c.is_ascii_alphabetic()) {
                return Err(wrong());
            }
            let count = read_count(count).ok_or_else(wrong)?;
            if atoms.iter().any(|(known, _)| known == element) {
                return Err(grammar(at, format!("element `{element}` is given twice")));
            }
            atoms.push((element.to_string(), count));
        }
        if atoms.is_empty() {
            return Err(grammar(0, "the composition is empty".to_string()));
        }
        atoms.sort();
        let dust = atoms.iter().any(|(element, _)| element == GRAIN);
        let phase = match (dust, ice) {
            (true, _) => Phase::Dust,
            (false, true) => Phase::Ice,
            (false, false) => Phase::Gas,
        };
        Ok(Self { atoms, charge, phase })
    }

    /// Mass, u; none when an element has no known weight (dust, made-up ones).
    pub fn mass_u(&self) -> Option<f64> {
        super::mass_u(&self.atoms, self.charge)
    }
}

/// Body, charge and whether `(ice)` stands at the end.
fn split_name(name: &str) -> Result<(&str, i32, bool), FormulaError> {
    if let Some(at) = name.chars().position(|c| c.is_whitespace() || c.is_control() || c == ',') {
        return Err(grammar(
            at,
            format!("`{}`: a name holds no blanks or commas", name.escape_debug()),
        ));
    }
    let (rest, ice) = match name.strip_suffix("(ice)") {
        Some(rest) => (rest, true),
        None => (name, false),
    };
    let body = rest.trim_end_matches(['+', '-']);
    let signs = &rest[body.len()..];
    if body.is_empty() {
        return Err(grammar(0, format!("`{name}` names no atoms")));
    }
    let plus = signs.bytes().filter(|sign| *sign == b'+').count();
    let minus = signs.len() - plus;
    if plus > 0 && minus > 0 {
        let at = body.chars().count();
        return Err(grammar(at, format!("`{name}` is charged both ways")));
    }
    let count = |number: usize| {
        i32::try_from(number).map_err(|_| grammar(0, "too many charges".to_string()))
    };
    Ok((body, count(plus)? - count(minus)?, ice))
}

/// Elements with counts, e.g. `CH3OH2`.
fn read_body(name: &str, body: &str) -> Result<Vec<(String, u32)>, FormulaError> {
    let mut atoms: Vec<(String, u32)> = Vec::new();
    let letters: Vec<char> = body.chars().collect();
    let mut at = 0;
    while at < letters.len() {
        let start = at;
        if !letters[at].is_ascii_uppercase() {
            let text = format!("`{name}`: expected an element at `{}`", letters[at]);
            return Err(grammar(at, text));
        }
        at += 1;
        while at < letters.len() && letters[at].is_ascii_lowercase() {
            at += 1;
        }
        let element: String = letters[start..at].iter().collect();
        if elements::weight_u(&element).is_none() {
            return Err(FormulaError {
                kind: FormulaErrorKind::UnknownElement,
                offset: start,
                message: format!("`{name}` holds `{element}`, which is not a known element"),
            });
        }
        let digits = at;
        while at < letters.len() && letters[at].is_ascii_digit() {
            at += 1;
        }
        let count = if digits == at {
            1
        } else {
            let text: String = letters[digits..at].iter().collect();
            read_count(&text).ok_or_else(|| {
                grammar(digits, format!("`{name}`: `{text}` is not a count of atoms"))
            })?
        };
        match atoms.iter_mut().find(|(known, _)| *known == element) {
            Some((_, total)) if *total <= MOST_ATOMS => *total += count,
            Some(_) => return Err(grammar(start, format!("`{name}` holds too many atoms"))),
            None => atoms.push((element, count)),
        }
    }
    atoms.sort();
    Ok(atoms)
}

/// A count: digits without a leading zero, at most a million.
fn read_count(text: &str) -> Option<u32> {
    if text.starts_with('0') || !text.bytes().all(|byte| byte.is_ascii_digit()) {
        return None;
    }
    text.parse().ok().filter(|count| *count <= MOST_ATOMS)
}

#[cfg(test)]
#[path = "formula/tests.rs"]
mod tests;
