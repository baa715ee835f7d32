//! A strict little reader for the XML that the charts write.

/// What a document holds.
#[derive(Debug, Default)]
pub(super) struct Page {
    pub(super) width: f64,
    pub(super) height: f64,
    /// Names of elements as they open.
    pub(super) tags: Vec<String>,
    /// Text of `title`, `desc` and `text` elements, spans joined.
    pub(super) texts: Vec<String>,
    /// Positions of upright text and vertices of paths.
    pub(super) points: Vec<(f64, f64)>,
}

/// Reads a document.
///
/// # Panics
/// When it is not well-formed.
pub(super) fn read(svg: &str) -> Page {
    assert!(svg.chars().all(|c| c >= ' ' || c == '\n'), "control character");
    assert!(!svg.contains("NaN") && !svg.contains("inf "), "a number is not finite");
    let mut page = Page::default();
    let mut open: Vec<String> = Vec::new();
    let mut rest = svg;
    while let Some(at) = rest.find('<') {
        let text = decoded(&rest[..at]);
        match open.last().map(String::as_str) {
            Some("title" | "desc" | "text" | "tspan") => {
                page.texts.last_mut().unwrap().push_str(&text)
            }
            _ => assert!(text.trim().is_empty(), "text outside text elements: {text}"),
        }
        let end = at + rest[at..].find('>').expect("tag is closed");
        let tag = &rest[at + 1..end];
        rest = &rest[end + 1..];
        if let Some(name) = tag.strip_prefix('/') {
            assert_eq!(open.pop().as_deref(), Some(name), "closing tag");
            continue;
        }
        let (tag, alone) = tag.strip_suffix('/').map_or((tag, false), |t| (t, true));
        let (name, attributes) = tag.split_once(' ').unwrap_or((tag, ""));
        if matches!(name, "title" | "desc" | "text") {
            page.texts.push(String::new());
        }
        page.element(name, &pairs(attributes));
        if !alone {
            open.push(name.to_owned());
        }
    }
    assert!(open.is_empty() && rest.trim().is_empty(), "unclosed: {open:?}");
    page
}

impl Page {
    fn element(&mut self, name: &str, attributes: &[(String, String)]) {
        let get = |key: &str| attributes.iter().find(|a| a.0 == key).map(|a| a.1.as_str());
        let number = |key: &str| get(key).and_then(|v| v.parse::<f64>().ok());
        self.tags.push(name.to_owned());
        match name {
            "svg" => {
                self.width = number("width").unwrap();
                self.height = number("height").unwrap();
            }
            "text" => self.points.extend(number("x").zip(number("y"))),
            "path" => {
                let d = get("d").unwrap().trim_end_matches('Z');
                for vertex in d.split(['M', 'L']).filter(|v| !v.is_empty()) {
                    let (x, y) = vertex.split_once(' ').unwrap();
                    self.points.push((x.parse().unwrap(), y.parse().unwrap()));
                }
            }
            _ => {}
        }
    }
}

/// Attributes; each name once, each value in double quotes.
fn pairs(mut text: &str) -> Vec<(String, String)> {
    let mut pairs: Vec<(String, String)> = Vec::new();
    while !text.trim().is_empty() {
        let (name, after) = text.split_once("=\"").expect("a quoted value");
        let (value, after) = after.split_once('"').expect("a closing quote");
        let name = name.trim().to_owned();
        assert!(
            !name.is_empty() && name.chars().all(|c| c.is_ascii_alphabetic() || "-:".contains(c)),
            "{name}"
        );
        assert!(pairs.iter().all(|p| p.0 != name), "{name} twice");
        pairs.push((name, decoded(value)));
        text = after;
    }
    pairs
}

/// Text with its entities replaced; a bare ampersand is an error.
fn decoded(text: &str) -> String {
    let mut out = String::new();
    let mut pieces = text.split('&');
    out.push_str(pieces.next().unwrap_or(""));
    for piece in pieces {
        let (entity, after) = piece.split_once(';').expect("an entity");
        out.push(match entity {
            "amp" => '&',
            "lt" => '<',
            "gt" => '>',
            "quot" => '"',
            other => panic!("unknown entity {other}"),
        });
        out.push_str(after);
    }
    out
}
