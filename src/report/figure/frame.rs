//! The frame of a plot: scales, grid, ticks on all sides, axis labels.

use super::labels::Rect;
use super::palette::{GRID, INK, LABEL_SIZE, TICK_SIZE};
use super::rich::Rich;
use super::scale::{Scale, Spacing, Tick};
use super::svg::{Anchor, Look, Stroke, Svg};

/// Height of tick labels and axis label below a frame.
pub(super) const FOOT: f64 = 46.0;

/// Space for tick labels alone.
pub(super) const TICK_FOOT: f64 = 20.0;

/// A plot area with its two scales.
#[derive(Debug)]
pub(super) struct Frame {
    pub(super) area: Rect,
    pub(super) x: Scale,
    pub(super) y: Scale,
}

impl Frame {
    /// Where a pair of values lies on paper; nothing for values that the
    /// scales cannot show.
    pub(super) fn place(&self, x: f64, y: f64) -> Option<(f64, f64)> {
        let (x, y) = (self.x.position(x)?, self.y.position(y)?);
        Some((self.area.left + x * self.width(), self.area.bottom - y * self.height()))
    }

    pub(super) fn width(&self) -> f64 {
        self.area.right - self.area.left
    }

    pub(super) fn height(&self) -> f64 {
        self.area.bottom - self.area.top
    }

    fn x_ticks(&self) -> Vec<Tick> {
        self.x.ticks(self.width(), 46.0)
    }

    fn y_ticks(&self) -> Vec<Tick> {
        y_ticks(&self.y, self.height())
    }

    /// Light lines at the labelled ticks; to be drawn before the data.
    pub(super) fn draw_grid(&self, svg: &mut Svg) {
        svg.open_group("grid", None);
        let line = Stroke::solid(GRID, 0.8);
        for tick in self.y_ticks().iter().filter(|t| t.label.is_some()) {
            let y = self.area.bottom - tick.at * self.height();
            svg.path(&[(self.area.left, y), (self.area.right, y)], line);
        }
        for tick in self.x_ticks().iter().filter(|t| t.label.is_some()) {
            let x = self.area.left + tick.at * self.width();
            svg.path(&[(x, self.area.top), (x, self.area.bottom)], line);
        }
        svg.close_group();
    }

    /// Frame, ticks and tick labels; to be drawn after the data. The labels
    /// below are left out where another frame shares them.
    pub(super) fn draw_axes(&self, svg: &mut Svg, label_x: bool) {
        let a = &self.area;
        svg.open_group("axes", None);
        svg.outline(a.left, a.top, self.width(), self.height(), Stroke::solid(INK, 1.0));
        let line = Stroke::solid(INK, 0.9);
        let mut free_from = f64::NEG_INFINITY;
        for tick in self.x_ticks() {
            let x = a.left + tick.at * self.width();
            let length = if tick.label.is_some() { 6.0 } else { 3.0 };
            svg.path(&[(x, a.bottom), (x, a.bottom - length)], line);
            svg.path(&[(x, a.top), (x, a.top + length)], line);
            let Some(label) = tick.label.filter(|_| label_x) else { continue };
            let half = label.width(TICK_SIZE) / 2.0;
            if x - half > free_from {
                svg.text(
                    (x, a.bottom + 18.0),
                    &label,
                    Look::new(TICK_SIZE).anchored(Anchor::Middle),
                );
                free_from = x + half + 4.0;
            }
        }
        for tick in self.y_ticks() {
            let y = a.bottom - tick.at * self.height();
            let length = if tick.label.is_some() { 6.0 } else { 3.0 };
            svg.path(&[(a.left, y), (a.left + length, y)], line);
            svg.path(&[(a.right, y), (a.right - length, y)], line);
            if let Some(label) = tick.label {
                svg.text(
                    (a.left - 6.0, y + 4.2),
                    &label,
                    Look::new(TICK_SIZE).anchored(Anchor::End),
                );
            }
        }
        svg.close_group();
    }

    /// The label below the frame.
    pub(super) fn draw_x_label(&self, svg: &mut Svg, label: &str) {
        let a = &self.area;
        let text = Rich::marked(label).fit(self.width() + 80.0, LABEL_SIZE);
        let middle = (a.left + a.right) / 2.0;
        svg.text(
            (middle, a.bottom + FOOT - 8.0),
            &text,
            Look::new(LABEL_SIZE).anchored(Anchor::Middle),
        );
    }

    /// The label on the left, reading upwards, its baseline at `x`.
    pub(super) fn draw_y_label(&self, svg: &mut Svg, label: &str, x: f64) {
        let text = Rich::marked(label).fit(self.height() + 40.0, LABEL_SIZE);
        let middle = (self.area.top + self.area.bottom) / 2.0;
        let look = Look { upright: true, ..Look::new(LABEL_SIZE).anchored(Anchor::Middle) };
        svg.text((x, middle), &text, look);
    }
}

/// Width of the widest tick label of a vertical axis.
pub(super) fn tick_width(y: &Scale, height: f64) -> f64 {
    let widths = y_ticks(y, height).into_iter().filter_map(|t| t.label).map(|l| l.width(TICK_SIZE));
    widths.fold(0.0, f64::max)
}

fn y_ticks(y: &Scale, height: f64) -> Vec<Tick> {
    y.ticks(height, if y.spacing() == Spacing::Log { 26.0 } else { 40.0 })
}
