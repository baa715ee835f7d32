//! The geometry of stacked shares: bands on paper, and the room within them.

use super::labels::Rect;

/// A vertical cut through all bands: where it lies, and the heights of the
/// edges between the bands, from 0 to 1.
#[derive(Clone, Debug)]
struct Cut {
    x: f64,
    edges: Vec<f64>,
}

/// An unbroken piece of a band: its upper and lower edge at each cut.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Piece {
    /// Position across, upper edge, lower edge, left to right.
    pub(super) cuts: Vec<(f64, f64, f64)>,
}

impl Piece {
    /// The closed outline, on paper.
    pub(super) fn outline(&self) -> Vec<(f64, f64)> {
        let upper = self.cuts.iter().map(|c| (c.0, c.1));
        let lower = self.cuts.iter().rev().map(|c| (c.0, c.2));
        upper.chain(lower).collect()
    }

    /// Upper and lower edge at a position within the piece.
    fn edges_at(&self, x: f64) -> Option<(f64, f64)> {
        let pair = self.cuts.windows(2).find(|w| (w[0].0..=w[1].0).contains(&x))?;
        let (a, b) = (pair[0], pair[1]);
        let t = if b.0 > a.0 { (x - a.0) / (b.0 - a.0) } else { 0.0 };
        Some((a.1 + t * (b.1 - a.1), a.2 + t * (b.2 - a.2)))
    }

    /// The highest lower and lowest upper edge between two positions.
    fn channel(&self, from: f64, to: f64) -> Option<(f64, f64)> {
        let ends = [self.edges_at(from)?, self.edges_at(to)?];
        let inner = self.cuts.iter().filter(|c| from < c.0 && c.0 < to).map(|c| (c.1, c.2));
        let all = ends.into_iter().chain(inner);
        Some(all.fold((f64::NEG_INFINITY, f64::INFINITY), |(t, b), (top, bottom)| {
            (t.max(top), b.min(bottom))
        }))
    }
}

/// One layer of the stack.
#[derive(Clone, Debug, Default, PartialEq)]
pub(super) struct Band {
    pub(super) pieces: Vec<Piece>,
}

impl Band {
    /// Centre of the place with the most room for a text of this size; nothing
    /// if it fits nowhere.
    pub(super) fn roomiest(&self, width: f64, height: f64) -> Option<(f64, f64)> {
        let mut best: Option<(f64, f64, f64)> = None;
        for piece in &self.pieces {
            let (Some(first), Some(last)) = (piece.cuts.first(), piece.cuts.last()) else {
                continue;
            };
            let slack = last.0 - first.0 - width;
            if slack < 0.0 {
                continue;
            }
            for i in 0..=60 {
                let from = first.0 + slack * f64::from(i) / 60.0;
                let Some((top, bottom)) = piece.channel(from, from + width) else { continue };
                let room = bottom - top;
                if room >= height && best.is_none_or(|(most, _, _)| room > most + 0.5) {
                    best = Some((room, from + width / 2.0, (top + bottom) / 2.0));
                }
            }
        }
        best.map(|(_, x, y)| (x, y))
    }

    /// Middle and thickness at the right edge of the frame, if it gets there.
    pub(super) fn right_end(&self, right: f64) -> Option<(f64, f64)> {
        let last = self.pieces.last()?.cuts.last()?;
        (last.0 > right - 1.0).then(|| ((last.1 + last.2) / 2.0, last.2 - last.1))
    }

    /// Where a band that ends early was last seen; the foot of the frame if it
    /// never was.
    pub(super) fn resting_place(&self, area: &Rect) -> f64 {
        let last = self.pieces.last().and_then(|p| p.cuts.last());
        last.map_or(area.bottom, |c| (c.1 + c.2) / 2.0)
    }
}

/// All layers, and above them what they lack to the whole.
#[derive(Clone, Debug, Default)]
pub(super) struct Stack {
    /// One per layer, and a last one for the rest.
    pub(super) bands: Vec<Band>,
    /// Whether the layers make up the whole everywhere, within half a percent.
    pub(super) rest_is_nothing: bool,
}

impl Stack {
    /// Stacks shares given at positions on paper (nothing: no place).
    pub(super) fn new(places: &[Option<f64>], shares: &[&[f64]], area: &Rect) -> Self {
        let layers = shares.len();
        let mut order: Vec<usize> = (0..places.len()).filter(|i| places[*i].is_some()).collect();
        order.sort_by(|a, b| places[*a].unwrap_or(0.0).total_cmp(&places[*b].unwrap_or(0.0)));
        let cuts: Vec<Option<Cut>> = order
            .into_iter()
            .map(|i| {
                Some(Cut { x: places[i]?, edges: edges(shares.iter().map(|s| s.get(i).copied()))? })
            })
            .collect();
        let mut stack = Self { bands: vec![Band::default(); layers + 1], rest_is_nothing: true };
        for run in cuts.split(Option::is_none) {
            let run: Vec<Cut> = run.iter().flatten().cloned().collect();
            let run = within(&run, area.left, area.right);
            if run.is_empty() {
                continue;
            }
            stack.rest_is_nothing &= run.iter().all(|c| c.edges[layers] > 0.995);
            for (i, band) in stack.bands.iter_mut().enumerate() {
                let y = |edge: f64| area.bottom - edge * (area.bottom - area.top);
                let top = |c: &Cut| if i < layers { c.edges[i + 1] } else { 1.0 };
                let cuts = run.iter().map(|c| (c.x, y(top(c)), y(c.edges[i]))).collect();
                band.pieces.push(Piece { cuts });
            }
        }
        stack
    }
}

/// Running sums of the shares, starting with 0 and never above 1; nothing if
/// there is no layer or one of them is missing or not finite.
fn edges(shares: impl Iterator<Item = Option<f64>>) -> Option<Vec<f64>> {
    let shares: Vec<f64> = shares.collect::<Option<_>>()?;
    if shares.is_empty() || shares.iter().any(|s| !s.is_finite()) {
        return None;
    }
    let total: f64 = shares.iter().map(|s| s.max(0.0)).sum();
    let scale = if total > 1.0 { 1.0 / total } else { 1.0 };
    let mut edges = vec![0.0];
    let mut sum = 0.0;
    for share in shares {
        sum += share.max(0.0) * scale;
        edges.push(sum.min(1.0));
    }
    Some(edges)
}

/// Cuts between two positions, with new ones at the ends where the stack goes
/// on beyond them. A lone cut is widened so that it can be seen.
fn within(run: &[Cut], left: f64, right: f64) -> Vec<Cut> {
    if let [only] = run {
        if !(left - 0.01..=right + 0.01).contains(&only.x) {
            return Vec::new();
        }
        let at = |x: f64| Cut { x: x.clamp(left, right), ..only.clone() };
        return vec![at(only.x - 8.0), at(only.x + 8.0)];
    }
    let mut kept: Vec<Cut> = Vec::new();
    for pair in run.windows(2) {
        let (a, b) = (&pair[0], &pair[1]);
        if b.x < left || a.x > right {
            continue;
        }
        if kept.is_empty() {
            kept.push(if a.x < left { between(a, b, left) } else { a.clone() });
        }
        kept.push(if b.x > right { between(a, b, right) } else { b.clone() });
    }
    kept
}

fn between(a: &Cut, b: &Cut, x: f64) -> Cut {
    let t = if b.x > a.x { (x - a.x) / (b.x - a.x) } else { 0.0 };
    let edges = a.edges.iter().zip(&b.edges).map(|(p, q)| p + t * (q - p)).collect();
    Cut { x, edges }
}
