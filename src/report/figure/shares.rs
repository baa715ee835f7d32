//! Shares over time: stacked areas from 0 to 100 %, one panel per question.

use super::frame::{FOOT, Frame, TICK_FOOT, tick_width};
use super::labels::{Rect, spread};
use super::palette::{self, INK, LABEL_SIZE, REST, SOFT};
use super::rich::{Rich, Shift};
use super::scale::{Axis, Scale};
use super::sheet::{self, MARGIN, Sheet};
use super::stack::{Band, Stack};
use super::svg::{Anchor, Look, Stroke, Svg};

/// One share over time.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct ShareLayer {
    /// A reaction equation or other chemical notation.
    pub name: String,
    /// Shares between 0 and 1, one for each of the chart's times. Where any
    /// layer of a panel is not finite, the panel is left blank.
    pub shares: Vec<f64>,
}

/// Layers that add up to at most the whole.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct SharePanel {
    /// Marked text above the panel, e.g. ``What makes `OH` ``.
    pub heading: String,
    /// From the bottom up. What they lack to 100 % is drawn as everything
    /// else; where they exceed 100 % they are scaled down to it.
    pub layers: Vec<ShareLayer>,
}

/// Panels of stacked shares over one axis, usually formation above
/// destruction.
#[derive(Clone, Debug, PartialEq)]
pub struct StackedShares {
    /// Marked text.
    pub title: String,
    /// Marked text below the title.
    pub subtitle: String,
    /// The axis that all panels share, usually logarithmic time.
    pub x: Axis,
    /// Positions along `x`, in any order.
    pub times: Vec<f64>,
    /// From top to bottom.
    pub panels: Vec<SharePanel>,
    /// Marked text below the chart, each on a line of its own.
    pub notes: Vec<String>,
    /// What the figure shows, for screen readers; made from the headings and
    /// names when empty.
    pub description: String,
    /// Width in user units (CSS pixels).
    pub width: f64,
    /// Height in user units.
    pub height: f64,
}

impl Default for StackedShares {
    fn default() -> Self {
        Self {
            title: String::new(),
            subtitle: String::new(),
            x: Axis::default(),
            times: Vec::new(),
            panels: Vec::new(),
            notes: Vec::new(),
            description: String::new(),
            width: 820.0,
            height: 660.0,
        }
    }
}

/// Words for the share that no layer claims.
const OTHERS: &str = "everything else";
/// Widest entry of the list beside a panel.
const ENTRY_LIMIT: f64 = 250.0;
const ENTRY_SIZE: f64 = 12.0;
const ENTRY_GAP: f64 = 17.0;
/// From the frame to the text of an entry: leader, swatch, space.
const ENTRY_INDENT: f64 = 44.0;
const HEADING: f64 = 28.0;

impl StackedShares {
    /// Draws the chart.
    pub fn to_svg(&self) -> String {
        let width = sheet::side(self.width, 420.0);
        let sheet = Sheet::new(width, &self.title, &self.subtitle, &self.notes);
        let room = sheet.room();
        let x = Scale::new(&self.x, self.times.iter().copied(), false);
        let percent = Axis::linear("share (%)").between(0.0, 100.0);
        let y = Scale::new(&percent, std::iter::empty(), false);

        let panels = self.panels.len().max(1) as f64;
        let fixed = room.top + room.bottom + FOOT - TICK_FOOT + panels * (HEADING + TICK_FOOT);
        let tall = ((sheet::side(self.height, 240.0) - fixed) / panels).max(90.0);
        let left = MARGIN + LABEL_SIZE + 12.0 + tick_width(&y, tall);
        let names = self
            .panels
            .iter()
            .flat_map(|p| &p.layers)
            .map(|l| Rich::chemical(&l.name).width(ENTRY_SIZE));
        let entry = names.fold(Rich::plain(OTHERS).width(ENTRY_SIZE), f64::max) + 20.0;
        let entry = entry.min(ENTRY_LIMIT).min(0.4 * width);
        let right = width - MARGIN - ENTRY_INDENT - entry;

        let mut svg = sheet.start(fixed + panels * tall, &self.describe());
        let mut top = room.top;
        let empty = [SharePanel::default()];
        let drawn = if self.panels.is_empty() { &empty[..] } else { &self.panels[..] };
        for (i, panel) in drawn.iter().enumerate() {
            top += HEADING;
            let frame = Frame { area: Rect { left, top, right, bottom: top + tall }, x, y };
            self.draw_panel(&mut svg, panel, &frame, entry);
            let last = i + 1 == drawn.len();
            frame.draw_axes(&mut svg, true);
            frame.draw_y_label(&mut svg, &percent.label, MARGIN + LABEL_SIZE - 2.0);
            if last {
                frame.draw_x_label(&mut svg, &self.x.label);
            }
            top += tall + TICK_FOOT;
        }
        svg.finish()
    }

    fn draw_panel(&self, svg: &mut Svg, panel: &SharePanel, frame: &Frame, entry: f64) {
        let area = &frame.area;
        let heading = Rich::marked(&panel.heading).fit(area.right - area.left + 40.0, LABEL_SIZE);
        svg.text(
            (area.left, area.top - 8.0),
            &heading,
            Look { bold: true, ..Look::new(LABEL_SIZE) },
        );
        let places: Vec<Option<f64>> =
            self.times.iter().map(|t| frame.place(*t, 0.0).map(|p| p.0)).collect();
        let shares: Vec<&[f64]> = panel.layers.iter().map(|l| l.shares.as_slice()).collect();
        let stack = Stack::new(&places, &shares, area);

        if stack.is_empty() {
            let middle = ((area.left + area.right) / 2.0, (area.top + area.bottom) / 2.0);
            let look = Look::new(ENTRY_SIZE).anchored(Anchor::Middle).filled(SOFT);
            svg.text(middle, &Rich::plain("nothing to show"), look);
            return;
        }
        let mut entries = Vec::new();
        for (i, band) in stack.bands.iter().enumerate() {
            let layer = panel.layers.get(i);
            let (name, fill) =
                layer.map_or((OTHERS, REST), |l| (l.name.as_str(), palette::fill(i)));
            if layer.is_none() && stack.rest_is_nothing {
                continue;
            }
            svg.open_group("layer", Some(name));
            for piece in &band.pieces {
                svg.area(&piece.outline(), fill);
            }
            svg.close_group();
            entries.push((i, name, fill));
        }
        for &(i, name, _) in &entries {
            let number = (i < panel.layers.len()).then_some(i + 1);
            draw_inside(svg, &stack.bands[i], name, number);
        }
        draw_list(svg, area, &stack.bands, &entries, panel.layers.len(), entry);
    }

    fn describe(&self) -> String {
        if !self.description.is_empty() {
            return self.description.clone();
        }
        let panel = |p: &SharePanel| {
            let names: Vec<&str> = p.layers.iter().map(|l| l.name.as_str()).collect();
            format!("{}: {}.", Rich::marked(&p.heading).to_plain(), names.join("; "))
        };
        let panels: Vec<String> = self.panels.iter().map(panel).collect();
        let x = Rich::marked(&self.x.label).to_plain();
        format!("Stacked shares against {x}. {}", panels.join(" "))
    }
}

/// Writes a layer's name where it fits, else its number, else nothing.
fn draw_inside(svg: &mut Svg, band: &Band, name: &str, number: Option<usize>) {
    let text = Rich::chemical(name);
    let look = Look::new(ENTRY_SIZE).anchored(Anchor::Middle);
    let whole = band.roomiest(text.width(ENTRY_SIZE) + 26.0, 17.0);
    if let Some((x, y)) = whole {
        svg.text((x, y + 4.0), &text, look.filled(if number.is_some() { INK } else { SOFT }));
    } else if let Some(number) = number
        && let Some((x, y)) = band.roomiest(30.0, 12.5)
    {
        svg.text((x, y + 4.0), &Rich::plain(&number.to_string()), Look { bold: true, ..look });
    }
}

/// The list of names beside a panel, each joined to the right end of its
/// layer.
fn draw_list(
    svg: &mut Svg,
    area: &Rect,
    bands: &[Band],
    entries: &[(usize, &str, &'static str)],
    layers: usize,
    width: f64,
) {
    let ends: Vec<Option<(f64, f64)>> =
        entries.iter().map(|e| bands[e.0].right_end(area.right)).collect();
    // Layers that are gone by the end keep their place in the order.
    let wanted: Vec<f64> = (entries.iter().zip(&ends))
        .map(|(e, end)| end.map_or_else(|| bands[e.0].resting_place(area), |(middle, _)| middle))
        .collect();
    // Reversed, because the stack grows upwards while y grows downwards.
    let flipped: Vec<f64> = wanted.iter().map(|y| -y).collect();
    let placed = spread(&flipped, ENTRY_GAP, -(area.bottom - 6.0), -(area.top + 6.0));
    let size = (area.bottom - area.top - 12.0) / (entries.len().max(2) - 1) as f64;
    let size = ENTRY_SIZE * (size / ENTRY_GAP).clamp(0.5, 1.0);
    svg.open_group("list", None);
    for (((&(i, name, fill), end), from), to) in entries.iter().zip(&ends).zip(&wanted).zip(placed)
    {
        let y = -to;
        let x = area.right + 6.0;
        if end.is_some_and(|(_, thickness)| thickness > 0.4) {
            let line = [(area.right, *from), (x - 2.0, *from), (x + 14.0, y), (x + 18.0, y)];
            svg.path(&line, Stroke::solid(SOFT, 0.8));
        }
        svg.rect(x + 18.0, y - 5.0, 12.0, 10.0, fill);
        svg.outline(x + 18.0, y - 5.0, 12.0, 10.0, Stroke::solid(SOFT, 0.6));
        let mut text = Rich::default();
        if i < layers {
            text.push(&format!("{}  ", i + 1), Shift::Base);
        }
        text.push_chemical(name);
        svg.text((x + 36.0, y + 4.0), &text.fit(width, size), Look::new(size));
    }
    svg.close_group();
}
