//! A TOML text as a tree in which every key and value knows its place, with
//! overrides from the command line laid over it.

use toml::de::{DeTable, DeValue};

use crate::diagnostic::{Finding, Place, nearest};

/// A TOML value with its place.
#[derive(Clone, Debug, PartialEq)]
pub struct Node {
    /// Where the value stands.
    pub place: Place,
    /// What it is.
    pub value: Value,
}

/// What a TOML value is.
#[derive(Clone, Debug, PartialEq)]
pub enum Value {
    /// Keys in the order of the text, each with the place of the key.
    Table(Vec<(String, Place, Node)>),
    /// A list.
    List(Vec<Node>),
    /// An integer or a float.
    Number(f64),
    /// A string.
    Text(String),
    /// `true` or `false`.
    Flag(bool),
    /// A date or time, which no key wants.
    Date,
}

impl Value {
    /// What the value is, in words.
    pub fn kind(&self) -> &'static str {
        match self {
            Self::Table(_) => "a table",
            Self::List(_) => "a list",
            Self::Number(_) => "a number",
            Self::Text(_) => "a text",
            Self::Flag(_) => "true or false",
            Self::Date => "a date",
        }
    }
}

/// A run file's text as a tree.
#[derive(Clone, Debug, PartialEq)]
pub struct Document {
    root: Node,
}

impl Document {
    /// Reads a TOML text; `name` stands for it in findings.
    ///
    /// # Errors
    /// A finding `run-syntax` for every place that is not TOML.
    pub fn read(name: &str, text: &str) -> Result<Self, Vec<Finding>> {
        let text = text.strip_prefix('\u{feff}').unwrap_or(text);
        let (table, errors) = DeTable::parse_recoverable(text);
        if !errors.is_empty() {
            return Err(errors
                .iter()
                .map(|error| {
                    let place = error.span().map_or_else(
                        || Place::file(name),
                        |span| Place::of_offset(name, text, span.start),
                    );
                    Finding::error("run-syntax", place, error.message().trim().to_owned())
                        .remedy("a run file is TOML: `key = value` lines under [section] headings")
                })
                .collect());
        }
        let at = |offset: usize| Place::of_offset(name, text, offset);
        let root = Node { place: Place::file(name), value: table_value(table.get_ref(), &at) };
        Ok(Self { root })
    }

    /// Lays `key.path=value` over the tree; the value is TOML, or a bare text.
    ///
    /// # Errors
    /// A finding `run-override` if there is no `=`, no key, or a key leads
    /// through something that is not a table.
    pub fn set(&mut self, assignment: &str) -> Result<(), Finding> {
        let place = Place::file(format!("--set {assignment}"));
        let refuse = |message: String| {
            Err(Finding::error("run-override", place.clone(), message)
                .remedy("write it as --set cloud.temperature=20"))
        };
        let Some((path, text)) = assignment.split_once('=') else {
            return refuse("there is no `=` in it".to_owned());
        };
        let keys: Vec<&str> = path.split('.').map(|key| key.trim().trim_matches('"')).collect();
        if keys.iter().any(|key| key.is_empty()) {
            return refuse(format!("`{path}` is not a key"));
        }
        let text = text.trim();
        let value = DeValue::parse(text)
            .map(|value| value_of(value.get_ref(), &|_| place.clone()))
            .unwrap_or_else(|_| Value::Text(text.to_owned()));
        let mut node = &mut self.root;
        for (depth, key) in keys.iter().enumerate() {
            let kind = node.value.kind();
            let Value::Table(entries) = &mut node.value else {
                return refuse(format!("`{}` is {kind}, not a section", keys[..depth].join(".")));
            };
            let at = match entries.iter().position(|(name, _, _)| name == key) {
                Some(at) => at,
                None => {
                    let empty = Node { place: place.clone(), value: Value::Table(Vec::new()) };
                    entries.push(((*key).to_owned(), place.clone(), empty));
                    entries.len() - 1
                }
            };
            node = &mut entries[at].2;
        }
        *node = Node { place, value };
        Ok(())
    }

    /// The top-level section.
    #[must_use]
    pub fn root(&self) -> &Node {
        &self.root
    }
}

fn table_value(table: &DeTable<'_>, at: &dyn Fn(usize) -> Place) -> Value {
    Value::Table(
        table
            .iter()
            .map(|(key, value)| {
                let node =
                    Node { place: at(value.span().start), value: value_of(value.get_ref(), at) };
                (key.get_ref().to_string(), at(key.span().start), node)
            })
            .collect(),
    )
}

fn value_of(value: &DeValue<'_>, at: &dyn Fn(usize) -> Place) -> Value {
    match value {
        DeValue::String(text) => Value::Text(text.to_string()),
        DeValue::Integer(number) => i64::from_str_radix(number.as_str(), number.radix())
            .map_or(Value::Date, |n| Value::Number(n as f64)),
        DeValue::Float(number) => Value::Number(number.as_str().parse().unwrap_or(f64::NAN)),
        DeValue::Boolean(flag) => Value::Flag(*flag),
        DeValue::Datetime(_) => Value::Date,
        DeValue::Array(list) => Value::List(
            list.iter()
                .map(|item| Node {
                    place: at(item.span().start),
                    value: value_of(item.get_ref(), at),
                })
                .collect(),
        ),
        DeValue::Table(table) => table_value(table, at),
    }
}

/// Walks one section: keys are taken by name, what is left at the end is
/// unknown.
pub(super) struct Section<'a> {
    /// Name of the section for messages, empty for the top level.
    name: &'a str,
    place: Place,
    entries: Vec<&'a (String, Place, Node)>,
    known: Vec<&'static str>,
}

impl<'a> Section<'a> {
    /// Opens a node as a section.
    pub(super) fn open(name: &'a str, node: &'a Node, findings: &mut Vec<Finding>) -> Option<Self> {
        match &node.value {
            Value::Table(entries) => Some(Self {
                name,
                place: node.place.clone(),
                entries: entries.iter().collect(),
                known: Vec::new(),
            }),
            other => {
                findings.push(
                    Finding::error(
                        "run-type",
                        node.place.clone(),
                        format!("`{name}` must be a section, but is {}", other.kind()),
                    )
                    .remedy(format!("write [{name}] on a line of its own, and its keys below")),
                );
                None
            }
        }
    }

    /// The full name of a key.
    pub(super) fn path(&self, key: &str) -> String {
        if self.name.is_empty() { key.to_owned() } else { format!("{}.{key}", self.name) }
    }

    /// Where the section stands.
    pub(super) fn place(&self) -> Place {
        self.place.clone()
    }

    /// Takes a key.
    pub(super) fn take(&mut self, key: &'static str) -> Option<&'a Node> {
        self.known.push(key);
        let at = self.entries.iter().position(|(name, _, _)| name == key)?;
        Some(&self.entries.remove(at).2)
    }

    /// Takes everything that is left, as (key, place of the key, node).
    pub(super) fn take_rest(&mut self) -> Vec<&'a (String, Place, Node)> {
        std::mem::take(&mut self.entries)
    }

    /// Ends the section: what was not taken is unknown.
    pub(super) fn close(self, findings: &mut Vec<Finding>) {
        for (key, place, _) in &self.entries {
            let remedy = nearest(key, self.known.iter().copied()).map_or_else(
                || format!("known keys here: {}", self.known.join(", ")),
                |near| format!("did you mean `{near}`?"),
            );
            findings.push(
                Finding::error(
                    "run-unknown-key",
                    place.clone(),
                    format!("there is no key `{}`", self.path(key)),
                )
                .remedy(remedy),
            );
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn an_override_replaces_or_adds_a_key() {
        let mut document = Document::read("r", "[cloud]\ntemperature = 10\n").unwrap();
        document.set("cloud.temperature=20").unwrap();
        document.set("times.until=1e5 yr").unwrap();
        let Value::Table(root) = &document.root().value else { panic!("a table") };
        let Value::Table(cloud) = &root[0].2.value else { panic!("a table") };
        assert_eq!(cloud[0].2.value, Value::Number(20.0));
        let Value::Table(times) = &root[1].2.value else { panic!("a table") };
        assert_eq!(times[0].2.value, Value::Text("1e5 yr".to_owned()));
        assert!(document.set("cloud.temperature.x=1").is_err());
        assert!(document.set("nothing").is_err());
    }

    #[test]
    fn every_syntax_error_has_its_place() {
        let findings = Document::read("r.toml", "a = 1\nb = = 2\n[c\n").unwrap_err();
        assert!(findings.iter().all(|f| f.code == "run-syntax"));
        assert_eq!(findings[0].place.line, 2);
    }
}
