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
    /// Whether there is nothing to draw.
    pub(super) fn is_empty(&self) -> bool {
        self.bands.iter().all(|band| band.pieces.is_empty())
    }

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

#[cfg(test)]
mod tests {
    use super::*;

    const AREA: Rect = Rect { left: 0.0, top: 0.0, right: 100.0, bottom: 100.0 };

    fn stack(places: &[f64], shares: &[&[f64]]) -> Stack {
        let places: Vec<Option<f64>> = places.iter().map(|x| Some(*x)).collect();
        Stack::new(&places, shares, &AREA)
    }

    #[test]
    fn layers_rest_on_each_other_and_the_last_fills_up() {
        let s = stack(&[0.0, 100.0], &[&[0.5, 0.25], &[0.25, 0.5]]);
        assert_eq!(s.bands[0].pieces[0].cuts, [(0.0, 50.0, 100.0), (100.0, 75.0, 100.0)]);
        assert_eq!(s.bands[1].pieces[0].cuts, [(0.0, 25.0, 50.0), (100.0, 25.0, 75.0)]);
        assert_eq!(s.bands[2].pieces[0].cuts, [(0.0, 0.0, 25.0), (100.0, 0.0, 25.0)]);
        assert!(!s.rest_is_nothing);
    }

    #[test]
    fn too_much_is_scaled_down_and_less_than_nothing_is_nothing() {
        let s = stack(&[0.0, 100.0], &[&[3.0, 1.0], &[1.0, -1.0]]);
        assert_eq!(s.bands[0].pieces[0].cuts, [(0.0, 25.0, 100.0), (100.0, 0.0, 100.0)]);
        assert!(s.rest_is_nothing);
    }

    #[test]
    fn gaps_part_a_band_and_the_frame_cuts_it() {
        let s = stack(&[-50.0, 50.0, 60.0, 70.0, 150.0], &[&[0.0, 1.0, f64::NAN, 1.0, 0.0]]);
        let pieces = &s.bands[0].pieces;
        assert_eq!(pieces.len(), 2);
        assert_eq!(pieces[0].cuts, [(0.0, 50.0, 100.0), (50.0, 0.0, 100.0)]);
        assert_eq!(pieces[1].cuts[1], (100.0, 37.5, 100.0));
    }

    #[test]
    fn missing_shares_and_lone_times_are_survived() {
        assert!(stack(&[0.0, 1.0], &[&[]]).bands[0].pieces.is_empty());
        assert!(stack(&[], &[]).bands[0].pieces.is_empty());
        let lone = stack(&[50.0], &[&[0.5]]);
        assert_eq!(lone.bands[0].pieces[0].cuts, [(42.0, 50.0, 100.0), (58.0, 50.0, 100.0)]);
    }

    #[test]
    fn text_goes_where_a_band_is_thick() {
        let s = stack(&[0.0, 40.0, 60.0, 100.0], &[&[0.1, 0.1, 0.8, 0.8]]);
        let (x, y) = s.bands[0].roomiest(30.0, 20.0).unwrap();
        assert!((75.0..=85.0).contains(&x) && (55.0..65.0).contains(&y), "{x} {y}");
        assert!(s.bands[0].roomiest(90.0, 20.0).is_none());
    }
}
