//! Equations in trade notation: `H3O+ + e- -> OH + 2 H`.

/// Names on both sides with repeats, and the offset of each name in characters.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub(super) struct Equation {
    pub(super) reactants: Vec<(String, usize)>,
    pub(super) products: Vec<(String, usize)>,
}

/// What is wrong with an equation, and how many characters precede it.
#[derive(Clone, Debug, PartialEq, Eq)]
pub(super) struct EquationError {
    pub(super) offset: usize,
    pub(super) message: String,
}

/// Most particles on one side of an equation. Common practice knows no more
/// than a handful.
const MOST: usize = 12;

impl Equation {
    /// Reads an equation.
    pub(super) fn parse(text: &str) -> Result<Self, EquationError> {
        let error = |offset, message: &str| EquationError { offset, message: message.to_string() };
        let words = words(text);
        let arrows: Vec<usize> = (0..words.len()).filter(|at| words[*at].0 == "->").collect();
        match arrows.as_slice() {
            [arrow] => {
                let end = text.chars().count();
                let at = words[*arrow].1;
                Ok(Self {
                    reactants: side(&words[..*arrow], at)?,
                    products: side(&words[arrow + 1..], end)?,
                })
            }
            [] => Err(error(0, "the equation has no `->` between blanks")),
            [_, second, ..] => Err(error(words[*second].1, "the equation has a second `->`")),
        }
    }

    /// The canonical text: names with single blanks, repeats written out.
    pub(super) fn canonical(&self) -> String {
        let join = |side: &[(String, usize)]| {
            side.iter().map(|(name, _)| name.as_str()).collect::<Vec<_>>().join(" + ")
        };
        format!("{} -> {}", join(&self.reactants), join(&self.products))
    }
}

/// Words between blanks, with their offsets in characters.
fn words(text: &str) -> Vec<(String, usize)> {
    let mut words: Vec<(String, usize)> = Vec::new();
    let mut inside = false;
    for (offset, letter) in text.chars().enumerate() {
        if letter.is_whitespace() {
            inside = false;
        } else if inside {
            if let Some((word, _)) = words.last_mut() {
                word.push(letter);
            }
        } else {
            words.push((letter.to_string(), offset));
            inside = true;
        }
    }
    words
}

/// One side: terms between `+`, each a name with an optional count before it.
fn side(words: &[(String, usize)], end: usize) -> Result<Vec<(String, usize)>, EquationError> {
    let error = |offset, message: String| Err(EquationError { offset, message });
    let mut names = Vec::new();
    for term in words.split(|(word, _)| word == "+") {
        let (count, (name, offset)) = match term {
            [name] => (1, name),
            [(count, offset), name] => match count.parse::<usize>() {
                Ok(count) if count > 0 && count <= MOST => (count, name),
                _ => return error(*offset, format!("`{count}` is not a count of particles")),
            },
            [] => return error(end, "a species is missing beside `+` or `->`".to_string()),
            [_, _, (word, offset), ..] => {
                return error(*offset, format!("a `+` is missing before `{word}`"));
            }
        };
        if names.len() + count > MOST {
            return error(*offset, format!("more than {MOST} particles on one side"));
        }
        names.extend(std::iter::repeat_n((name.clone(), *offset), count));
    }
    Ok(names)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn equations_are_read_and_written_canonically() {
        let cases = [
            ("H3O+ + e- -> OH + H + H", "H3O+ + e- -> OH + H + H"),
            ("  H3O+  +  e- ->  OH +  2 H ", "H3O+ + e- -> OH + H + H"),
            ("e- + grain -> grain-", "e- + grain -> grain-"),
            ("H2O -> OH + H", "H2O -> OH + H"),
        ];
        for (text, expected) in cases {
            assert_eq!(Equation::parse(text).unwrap().canonical(), expected);
        }
    }

    #[test]
    fn broken_equations_are_refused_where_they_break() {
        let cases = [
            ("", 0),
            ("H + H", 0),
            ("H + H->H2", 0),
            ("H -> H -> H", 7),
            ("-> H", 0),
            ("H ->", 4),
            ("H + -> H", 4),
            ("0 H -> H", 0),
            ("x H -> H", 0),
            ("2000 H -> H", 0),
            ("H e- H -> H", 5),
            ("H -> 12 H + H", 12),
        ];
        for (text, offset) in cases {
            let error = Equation::parse(text).unwrap_err();
            assert_eq!(error.offset, offset, "{text}: {}", error.message);
        }
    }
}
