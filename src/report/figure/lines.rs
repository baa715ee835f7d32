//! Curves over one axis, each named at its right end.

use super::frame::{FOOT, Frame, tick_width};
use super::labels::{Rect, beside, spread};
use super::palette::{self, LABEL_SIZE};
use super::rich::Rich;
use super::scale::{Axis, Scale};
use super::sheet::{self, MARGIN, Sheet};
use super::svg::{Look, Stroke, Svg};

/// One curve.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Series {
    /// Chemical notation, e.g. `H3O+`, or any words.
    pub name: String,
    /// Pairs of x and y in drawing order. A value that is not finite, or not
    /// positive on a logarithmic axis, leaves a gap.
    pub points: Vec<(f64, f64)>,
}

/// A chart of curves with direct labels; made for up to about fourteen.
#[derive(Clone, Debug, PartialEq)]
pub struct LineChart {
    /// Marked text.
    pub title: String,
    /// Marked text below the title.
    pub subtitle: String,
    /// The horizontal axis.
    pub x: Axis,
    /// The vertical axis.
    pub y: Axis,
    /// The curves; their order decides colours and dashes.
    pub series: Vec<Series>,
    /// Marked text below the chart, each on a line of its own.
    pub notes: Vec<String>,
    /// What the figure shows, for screen readers; made from the labels and
    /// names when empty.
    pub description: String,
    /// Width in user units (CSS pixels).
    pub width: f64,
    /// Height in user units.
    pub height: f64,
}

impl Default for LineChart {
    fn default() -> Self {
        Self {
            title: String::new(),
            subtitle: String::new(),
            x: Axis::default(),
            y: Axis::default(),
            series: Vec::new(),
            notes: Vec::new(),
            description: String::new(),
            width: 720.0,
            height: 500.0,
        }
    }
}

/// Length of the piece of line between the frame and a label.
const LEADER: f64 = 36.0;
/// Widest label in the margin.
const LABEL_LIMIT: f64 = 170.0;
/// Least distance between labels.
const LABEL_GAP: f64 = 15.5;

impl LineChart {
    /// Draws the chart.
    pub fn to_svg(&self) -> String {
        let (width, height) = (sheet::side(self.width, 320.0), sheet::side(self.height, 240.0));
        let x = Scale::new(
            &self.x,
            self.series.iter().flat_map(|s| s.points.iter().map(|p| p.0)),
            false,
        );
        let shown =
            |p: &&(f64, f64)| x.position(p.0).is_some_and(|at| (-1e-9..=1.0 + 1e-9).contains(&at));
        let y = Scale::new(
            &self.y,
            self.series.iter().flat_map(|s| s.points.iter().filter(shown).map(|p| p.1)),
            true,
        );
        let names: Vec<Rich> = self
            .series
            .iter()
            .map(|s| Rich::chemical(&s.name).fit(LABEL_LIMIT, LABEL_SIZE))
            .collect();
        let widest = names.iter().map(|n| n.width(LABEL_SIZE)).fold(0.0, f64::max);

        let mut notes = self.notes.clone();
        let hidden = self.hidden(&x, &y);
        if !hidden.is_empty() {
            notes.push(format!("Not in the frame: {}.", hidden.join(", ")));
        }
        let sheet = Sheet::new(width, &self.title, &self.subtitle, &notes);
        let room = sheet.room();
        let bottom = (height - room.bottom - FOOT).max(room.top + 80.0);
        let left = MARGIN + LABEL_SIZE + 12.0 + tick_width(&y, bottom - room.top);
        let right = (width - MARGIN - LEADER - 6.0 - widest).max(left + 100.0);
        let frame = Frame { area: Rect { left, top: room.top, right, bottom }, x, y };

        let mut svg = sheet.start(height.max(bottom + FOOT + room.bottom), &self.describe());
        frame.draw_grid(&mut svg);
        let lines: Vec<Vec<Vec<(f64, f64)>>> =
            self.series.iter().map(|s| visible(&frame, &s.points)).collect();
        for (i, (series, pieces)) in self.series.iter().zip(&lines).enumerate() {
            draw_curve(&mut svg, i, &series.name, pieces);
        }
        frame.draw_axes(&mut svg, true);
        frame.draw_x_label(&mut svg, &self.x.label);
        frame.draw_y_label(&mut svg, &self.y.label, MARGIN + LABEL_SIZE - 2.0);
        draw_labels(&mut svg, &frame, &names, &lines);
        svg.finish()
    }

    fn describe(&self) -> String {
        if !self.description.is_empty() {
            return self.description.clone();
        }
        let label = |axis: &Axis| Rich::marked(&axis.label).to_plain();
        let names: Vec<&str> = self.series.iter().map(|s| s.name.as_str()).collect();
        format!("Curves of {} against {}: {}.", label(&self.y), label(&self.x), names.join(", "))
    }

    /// Names, marked up, of the curves that cannot be seen.
    fn hidden(&self, x: &Scale, y: &Scale) -> Vec<String> {
        let unit = Rect { left: 0.0, top: -1.0, right: 1.0, bottom: 0.0 };
        let frame = Frame { area: unit, x: *x, y: *y };
        let unseen = self.series.iter().filter(|s| visible(&frame, &s.points).is_empty());
        unseen.map(|s| format!("`{}`", s.name.replace('`', "'"))).collect()
    }
}

/// The pieces of a curve within the frame, on paper.
fn visible(frame: &Frame, points: &[(f64, f64)]) -> Vec<Vec<(f64, f64)>> {
    let placed: Vec<Option<(f64, f64)>> = points.iter().map(|p| frame.place(p.0, p.1)).collect();
    placed
        .split(Option::is_none)
        .filter(|run| !run.is_empty())
        .flat_map(|run| {
            let run: Vec<(f64, f64)> = run.iter().copied().flatten().collect();
            frame.area.clip_line(&run)
        })
        .collect()
}

fn draw_curve(svg: &mut Svg, i: usize, name: &str, pieces: &[Vec<(f64, f64)>]) {
    let (colour, _, dash) = palette::line(i);
    svg.open_group("series", Some(name));
    for piece in pieces {
        if let [only] = piece.as_slice() {
            svg.disc(*only, 2.5, colour);
        } else {
            svg.path(piece, Stroke { colour, width: 1.8, dash });
        }
    }
    svg.close_group();
}

/// Labels beyond the right edge for curves that reach it, on the curve for
/// those that end before.
fn draw_labels(svg: &mut Svg, frame: &Frame, names: &[Rich], lines: &[Vec<Vec<(f64, f64)>>]) {
    let area = &frame.area;
    let ends: Vec<Option<(f64, f64)>> =
        lines.iter().map(|pieces| pieces.last().and_then(|p| p.last()).copied()).collect();
    let reaches = |i: &usize| ends[*i].is_some_and(|e| e.0 > area.right - 3.0);
    let outer: Vec<usize> = (0..names.len()).filter(reaches).collect();
    let wanted: Vec<f64> = outer.iter().filter_map(|i| ends[*i]).map(|e| e.1).collect();
    // Half a line beyond either end of the frame is free.
    let placed = spread(&wanted, LABEL_GAP, area.top + 2.0, area.bottom);
    let crowded = (frame.height() / (outer.len().max(2) - 1) as f64 / LABEL_GAP).clamp(0.45, 1.0);
    svg.open_group("labels", None);
    for ((&i, from), to) in outer.iter().zip(&wanted).zip(&placed) {
        let (colour, text, dash) = palette::line(i);
        let x = area.right + 4.0;
        let bend = x + 12.0;
        svg.path(
            &[(area.right, *from), (x, *from), (bend, *to), (x + LEADER - 4.0, *to)],
            Stroke { colour, width: 1.4, dash },
        );
        let look = Look { bold: false, ..Look::new(LABEL_SIZE * crowded).filled(text) };
        svg.text((x + LEADER, to + 4.5 * crowded), &names[i], look);
    }
    let all: Vec<Vec<(f64, f64)>> = lines.iter().flatten().cloned().collect();
    let inner = area.inset(9.0);
    let mut taken: Vec<Rect> = Vec::new();
    for i in (0..names.len()).filter(|i| !reaches(i)) {
        let Some(line) = lines[i].last() else { continue };
        let size = (names[i].width(LABEL_SIZE) + 2.0, LABEL_SIZE + 1.0);
        let Some(place) = beside(line, size, &inner, &all, &taken) else { continue };
        let look = Look { halo: true, ..Look::new(LABEL_SIZE).filled(palette::line(i).1) };
        svg.text((place.left + 1.0, place.bottom - 3.0), &names[i], look);
        taken.push(place);
    }
    svg.close_group();
}
