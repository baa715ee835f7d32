//! The paper around a chart: title and subtitle above, notes below.

use super::palette::{NOTE_SIZE, SOFT, SUBTITLE_SIZE, TITLE_SIZE};
use super::rich::Rich;
use super::svg::{Look, Svg};

/// Outer margin on all sides.
pub(super) const MARGIN: f64 = 16.0;

/// A side as asked for, within reason.
pub(super) fn side(wanted: f64, least: f64) -> f64 {
    if wanted.is_finite() { wanted.clamp(least, 1e4) } else { least }
}

/// Texts around a chart, broken into lines for a width.
#[derive(Debug)]
pub(super) struct Sheet {
    width: f64,
    title: Vec<Rich>,
    subtitle: Vec<Rich>,
    notes: Vec<Rich>,
}

/// Vertical space that the texts take at the head and at the foot.
#[derive(Clone, Copy, Debug)]
pub(super) struct Room {
    pub(super) top: f64,
    pub(super) bottom: f64,
}

impl Sheet {
    /// Breaks the texts for a sheet of the given width.
    pub(super) fn new(width: f64, title: &str, subtitle: &str, notes: &[String]) -> Self {
        let room = width - 2.0 * MARGIN;
        Self {
            width,
            // Bold letters run about a fifteenth wider.
            title: Rich::marked(title).wrap(room / 1.07, TITLE_SIZE),
            subtitle: Rich::marked(subtitle).wrap(room, SUBTITLE_SIZE),
            notes: notes.iter().flat_map(|n| Rich::marked(n).wrap(room, NOTE_SIZE)).collect(),
        }
    }

    /// Space taken above and below the chart.
    pub(super) fn room(&self) -> Room {
        let lines = |n: usize, size: f64| n as f64 * size * 1.3;
        let head = lines(self.title.len(), TITLE_SIZE) + lines(self.subtitle.len(), SUBTITLE_SIZE);
        let foot = lines(self.notes.len(), NOTE_SIZE);
        Room {
            top: MARGIN + if head > 0.0 { head + 14.0 } else { 0.0 },
            bottom: MARGIN + if foot > 0.0 { foot + 10.0 } else { 0.0 },
        }
    }

    /// Starts a drawing of the given height and writes the texts.
    pub(super) fn start(&self, height: f64, description: &str) -> Svg {
        let title: Vec<String> = self.title.iter().map(Rich::to_plain).collect();
        let title = if title.is_empty() { "Chart".to_owned() } else { title.join(" ") };
        let mut svg = Svg::new(self.width, height, &title, description);
        let mut y = MARGIN;
        for line in &self.title {
            y += TITLE_SIZE * 1.3;
            svg.text((MARGIN, y - 5.0), line, Look { bold: true, ..Look::new(TITLE_SIZE) });
        }
        for line in &self.subtitle {
            y += SUBTITLE_SIZE * 1.3;
            svg.text((MARGIN, y - 4.0), line, Look::new(SUBTITLE_SIZE).filled(SOFT));
        }
        let mut y = height - MARGIN;
        for line in self.notes.iter().rev() {
            svg.text((MARGIN, y), line, Look::new(NOTE_SIZE).filled(SOFT));
            y -= NOTE_SIZE * 1.3;
        }
        svg
    }
}
