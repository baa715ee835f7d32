//! Ranked bars: one row per channel or parameter, its value in words.

use super::palette::{GRID, INK, LABEL_SIZE, NOTE_SIZE, SOFT};
use super::rich::Rich;
use super::sheet::{self, MARGIN, Sheet};
use super::svg::{Anchor, Look, Stroke, Svg};

/// One bar.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct BarRow {
    /// A reaction equation or other chemical notation.
    pub name: String,
    /// Length of the bar; may be negative. Not drawn when not finite.
    pub value: f64,
    /// The value in words, e.g. `62.1 %`, written at the end of the bar.
    pub text: String,
    /// Marked text in the last column, e.g. a coefficient and its source.
    pub detail: String,
    /// Drawn in grey, as a sum over whatever has no row of its own.
    pub rest: bool,
}

/// Bars under a heading of their own.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct BarGroup {
    /// Marked text.
    pub heading: String,
    /// From top to bottom.
    pub rows: Vec<BarRow>,
}

/// Groups of horizontal bars with one scale. The height follows the rows.
#[derive(Clone, Debug, PartialEq)]
pub struct BarChart {
    /// Marked text.
    pub title: String,
    /// Marked text below the title.
    pub subtitle: String,
    /// From top to bottom.
    pub groups: Vec<BarGroup>,
    /// Marked text below the chart, each on a line of its own.
    pub notes: Vec<String>,
    /// What the figure shows, for screen readers; made from the rows when
    /// empty.
    pub description: String,
    /// Width in user units (CSS pixels).
    pub width: f64,
}

impl Default for BarChart {
    fn default() -> Self {
        Self {
            title: String::new(),
            subtitle: String::new(),
            groups: Vec::new(),
            notes: Vec::new(),
            description: String::new(),
            width: 760.0,
        }
    }
}

const ROW: f64 = 23.0;
const BAR: f64 = 14.0;
const HEADING: f64 = 30.0;
/// Colours of successive groups, and of their rests.
const COLOURS: [&str; 4] = ["#0072b2", "#d55e00", "#009e73", "#cc79a7"];
const GREY: &str = "#b0b0b0";

/// Horizontal positions shared by all rows.
struct Columns {
    name: f64,
    zero: f64,
    per_unit: f64,
    detail: f64,
    detail_width: f64,
}

impl BarChart {
    /// Draws the chart.
    pub fn to_svg(&self) -> String {
        let width = sheet::side(self.width, 360.0);
        let sheet = Sheet::new(width, &self.title, &self.subtitle, &self.notes);
        let room = sheet.room();
        let rows = self.groups.iter().map(|g| g.rows.len()).sum::<usize>() as f64;
        let headings = self.groups.len() as f64;
        let height = room.top + rows * ROW + headings * HEADING + room.bottom + 4.0;
        let columns = self.columns(width);
        let mut svg = sheet.start(height, &self.describe());
        let mut y = room.top;
        for (i, group) in self.groups.iter().enumerate() {
            let heading = Rich::marked(&group.heading).fit(width - 2.0 * MARGIN, LABEL_SIZE);
            svg.text(
                (MARGIN, y + HEADING - 10.0),
                &heading,
                Look { bold: true, ..Look::new(LABEL_SIZE) },
            );
            y += HEADING;
            let end = y + group.rows.len() as f64 * ROW;
            let colour = COLOURS[i % COLOURS.len()];
            for row in &group.rows {
                draw_row(&mut svg, row, y, colour, &columns);
                y += ROW;
            }
            svg.path(
                &[(columns.zero, end - group.rows.len() as f64 * ROW), (columns.zero, end)],
                Stroke::solid(INK, 1.0),
            );
        }
        svg.finish()
    }

    fn rows(&self) -> impl Iterator<Item = &BarRow> {
        self.groups.iter().flat_map(|g| &g.rows)
    }

    fn columns(&self, width: f64) -> Columns {
        let widest = |f: &dyn Fn(&BarRow) -> f64| self.rows().map(f).fold(0.0, f64::max);
        let name = widest(&|r| Rich::chemical(&r.name).width(LABEL_SIZE)).min(0.36 * width);
        let detail = widest(&|r| Rich::marked(&r.detail).width(NOTE_SIZE)).min(0.32 * width);
        let text = widest(&|r| Rich::plain(&r.text).width(LABEL_SIZE));
        let text = text.min(0.15 * width) + 8.0;
        let (mut low, mut high) = (0.0_f64, 0.0_f64);
        for v in self.rows().map(|r| r.value).filter(|v| v.is_finite()) {
            (low, high) = (low.min(v), high.max(v));
        }
        let left = MARGIN + name + 12.0 + if low < 0.0 { text } else { 0.0 };
        let gap = if detail > 0.0 { 12.0 } else { 0.0 };
        let right = (width - MARGIN - detail - gap - text).max(left + 20.0);
        // Halves, because the whole span may be too large for a number.
        let half_span = high / 2.0 - low / 2.0;
        let per_unit = if half_span > 0.0 { (right - left) / 2.0 / half_span } else { 0.0 };
        let per_unit = if per_unit.is_finite() { per_unit } else { 0.0 };
        Columns {
            name: MARGIN + name,
            zero: left - low * per_unit,
            per_unit,
            detail: right + text + gap,
            detail_width: detail,
        }
    }

    fn describe(&self) -> String {
        if !self.description.is_empty() {
            return self.description.clone();
        }
        let group = |g: &BarGroup| {
            let rows: Vec<String> =
                g.rows.iter().map(|r| format!("{} {}", r.name, r.text)).collect();
            format!("{}: {}.", Rich::marked(&g.heading).to_plain(), rows.join("; "))
        };
        let groups: Vec<String> = self.groups.iter().map(group).collect();
        format!("Ranked bars. {}", groups.join(" "))
    }
}

fn draw_row(svg: &mut Svg, row: &BarRow, y: f64, colour: &str, columns: &Columns) {
    let base = y + ROW / 2.0 + 4.5;
    svg.open_group("bar", Some(&row.name));
    let name = Rich::chemical(&row.name).fit(columns.name - MARGIN, LABEL_SIZE);
    let ink = if row.rest { SOFT } else { INK };
    svg.text((columns.name, base), &name, Look::new(LABEL_SIZE).anchored(Anchor::End).filled(ink));
    let length = if row.value.is_finite() { row.value * columns.per_unit } else { 0.0 };
    let (from, to) =
        (columns.zero.min(columns.zero + length), columns.zero.max(columns.zero + length));
    svg.rect(from, y + (ROW - BAR) / 2.0, to - from, BAR, if row.rest { GREY } else { colour });
    let text = Rich::plain(&row.text.replace('-', "\u{2212}"));
    let look = Look::new(LABEL_SIZE).filled(ink);
    if length < 0.0 {
        svg.text((from - 5.0, base), &text, look.anchored(Anchor::End));
    } else {
        svg.text((to + 5.0, base), &text, look);
    }
    let detail = Rich::marked(&row.detail).fit(columns.detail_width + 0.5, NOTE_SIZE);
    svg.text((columns.detail, base), &detail, Look::new(NOTE_SIZE).filled(SOFT));
    svg.path(
        &[(MARGIN, y + ROW), (columns.detail + columns.detail_width, y + ROW)],
        Stroke::solid(GRID, 0.6),
    );
    svg.close_group();
}
