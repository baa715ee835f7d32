//! Where labels go: side by side without overlap, near what they name.

/// Moves label centres apart along one axis until neighbours are at least
/// `gap` apart and all lie between `low` and `high`, with the least sum of
/// squared moves before the ends are enforced. The order of the wanted
/// positions is kept; ties keep the order given. Where the labels do not fit,
/// they are spread evenly over the space.
pub(super) fn spread(wanted: &[f64], gap: f64, low: f64, high: f64) -> Vec<f64> {
    let n = wanted.len();
    if n == 0 {
        return Vec::new();
    }
    let room = (high - low).max(0.0);
    let gap = if n > 1 { gap.min(room / (n - 1) as f64) } else { gap };
    let middle = low + room / 2.0;
    let wish = |i: usize| if wanted[i].is_finite() { wanted[i] } else { middle };
    let mut order: Vec<usize> = (0..n).collect();
    order.sort_by(|&a, &b| wish(a).total_cmp(&wish(b)));

    // Pool adjacent violators on the positions less their due offsets.
    let mut pools: Vec<(f64, usize)> = Vec::new();
    for (rank, &i) in order.iter().enumerate() {
        let mut pool = (wish(i) - rank as f64 * gap, 1);
        while let Some(&(sum, count)) = pools.last() {
            if sum / count as f64 <= pool.0 / pool.1 as f64 {
                break;
            }
            pools.pop();
            pool = (pool.0 + sum, pool.1 + count);
        }
        pools.push(pool);
    }

    let last_start = (low + room - (n - 1) as f64 * gap).max(low);
    let starts = pools.iter().flat_map(|&(sum, count)| {
        let start = (sum / count as f64).clamp(low, last_start);
        std::iter::repeat_n(start, count)
    });
    let mut placed = vec![0.0; n];
    for (rank, (&i, start)) in order.iter().zip(starts).enumerate() {
        placed[i] = start + rank as f64 * gap;
    }
    placed
}

/// An upright rectangle.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Rect {
    pub(super) left: f64,
    pub(super) top: f64,
    pub(super) right: f64,
    pub(super) bottom: f64,
}

impl Rect {
    /// The rectangle without a rim of the given width.
    pub(super) fn inset(&self, rim: f64) -> Self {
        Self {
            left: self.left + rim,
            top: self.top + rim,
            right: self.right - rim,
            bottom: self.bottom - rim,
        }
    }

    /// Whether two rectangles share some area.
    pub(super) fn overlaps(&self, other: &Self) -> bool {
        self.left < other.right
            && other.left < self.right
            && self.top < other.bottom
            && other.top < self.bottom
    }

    /// Whether `other` lies wholly within.
    pub(super) fn contains(&self, other: &Self) -> bool {
        self.left <= other.left
            && other.right <= self.right
            && self.top <= other.top
            && other.bottom <= self.bottom
    }

    /// The part of a segment within the rectangle (Liang & Barsky 1984).
    pub(super) fn clip(
        &self,
        from: (f64, f64),
        to: (f64, f64),
    ) -> Option<((f64, f64), (f64, f64))> {
        let (dx, dy) = (to.0 - from.0, to.1 - from.1);
        let (mut enter, mut leave) = (0.0_f64, 1.0_f64);
        let edges = [
            (-dx, from.0 - self.left),
            (dx, self.right - from.0),
            (-dy, from.1 - self.top),
            (dy, self.bottom - from.1),
        ];
        for (speed, room) in edges {
            if speed < 0.0 {
                enter = enter.max(room / speed);
            } else if speed > 0.0 {
                leave = leave.min(room / speed);
            } else if room < 0.0 {
                return None;
            }
        }
        if enter > leave {
            return None;
        }
        let at = |t: f64| (from.0 + t * dx, from.1 + t * dy);
        let start = if enter > 0.0 { at(enter) } else { from };
        let end = if leave < 1.0 { at(leave) } else { to };
        Some((start, end))
    }

    /// Cuts a line to the rectangle; each piece is a line of its own.
    pub(super) fn clip_line(&self, points: &[(f64, f64)]) -> Vec<Vec<(f64, f64)>> {
        if let [only] = points {
            return self.clip(*only, *only).map(|_| vec![*only]).into_iter().collect();
        }
        let mut pieces: Vec<Vec<(f64, f64)>> = Vec::new();
        let mut joined = false;
        for pair in points.windows(2) {
            let Some((start, end)) = self.clip(pair[0], pair[1]) else {
                joined = false;
                continue;
            };
            match pieces.last_mut() {
                Some(piece) if joined => piece.push(end),
                _ => pieces.push(vec![start, end]),
            }
            joined = end == pair[1];
        }
        pieces
    }
}

/// Where to put a label of the given size on a line that ends inside the
/// frame: near its last point, clear of `lines` and of the labels in `taken`
/// as far as that can be had. Nothing when the label fits nowhere.
pub(super) fn beside(
    line: &[(f64, f64)],
    (width, height): (f64, f64),
    frame: &Rect,
    lines: &[Vec<(f64, f64)>],
    taken: &[Rect],
) -> Option<Rect> {
    let end = *line.last()?;
    let step = (line.len() / 40).max(1);
    let mut best: Option<(f64, Rect)> = None;
    for &(x, y) in line.iter().rev().step_by(step) {
        let (behind, above) = (-width, -height);
        let offsets = [
            (5.0, above / 2.0),
            (3.0, above - 2.0),
            (3.0, 2.0),
            (behind / 2.0, above - 4.0),
            (behind / 2.0, 4.0),
            (behind - 2.0, above - 2.0),
            (behind - 2.0, 3.0),
            (behind - 5.0, above / 2.0),
        ];
        for (dx, dy) in offsets {
            let place =
                Rect { left: x + dx, top: y + dy, right: x + dx + width, bottom: y + dy + height };
            if !frame.contains(&place) {
                continue;
            }
            let crossings = lines
                .iter()
                .filter(|l| l.windows(2).any(|s| place.clip(s[0], s[1]).is_some()))
                .count();
            let clashes = taken.iter().filter(|t| t.overlaps(&place)).count();
            let away = (x - end.0).abs() + (y - end.1).abs();
            let cost = 150.0 * crossings as f64 + 1000.0 * clashes as f64 + away;
            if best.is_none_or(|(least, _)| cost < least) {
                best = Some((cost, place));
            }
        }
    }
    best.map(|(_, place)| place)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn labels_with_room_stay_where_they_are_wanted() {
        assert_eq!(spread(&[10.0, 50.0, 90.0], 15.0, 0.0, 100.0), [10.0, 50.0, 90.0]);
    }

    #[test]
    fn crowded_labels_move_apart_evenly_and_keep_their_order() {
        assert_eq!(spread(&[50.0, 50.0], 10.0, 0.0, 100.0), [45.0, 55.0]);
        assert_eq!(spread(&[99.0, 98.0, 10.0], 10.0, 0.0, 100.0), [100.0, 90.0, 10.0]);
    }

    #[test]
    fn labels_never_overlap_nor_leave_their_space() {
        // Pseudo-random wishes from a linear congruence.
        let mut state = 1_u32;
        for n in 1..30 {
            let wanted: Vec<f64> = (0..n)
                .map(|_| {
                    state = state.wrapping_mul(1_664_525).wrapping_add(1_013_904_223);
                    f64::from(state >> 16) / 200.0 - 20.0
                })
                .collect();
            let mut placed = spread(&wanted, 9.0, 0.0, 200.0);
            assert!(placed.iter().all(|p| (-1e-9..=200.0 + 1e-9).contains(p)), "{placed:?}");
            placed.sort_by(f64::total_cmp);
            let due = 9.0_f64.min(200.0 / (n.max(2) - 1) as f64) - 1e-9;
            assert!(placed.windows(2).all(|w| w[1] - w[0] >= due), "{placed:?}");
        }
    }

    #[test]
    fn impossible_wishes_are_survived() {
        assert!(spread(&[], 10.0, 0.0, 100.0).is_empty());
        let placed = spread(&[f64::NAN, f64::INFINITY, 3.0], 10.0, 50.0, 0.0);
        assert!(placed.iter().all(|p| p.is_finite()));
    }

    #[test]
    fn lines_are_cut_at_the_frame() {
        let frame = Rect { left: 0.0, top: 0.0, right: 10.0, bottom: 10.0 };
        let line = [(-5.0, 5.0), (5.0, 5.0), (5.0, 15.0), (8.0, 15.0), (8.0, 5.0)];
        let pieces = frame.clip_line(&line);
        assert_eq!(
            pieces,
            [vec![(0.0, 5.0), (5.0, 5.0), (5.0, 10.0)], vec![(8.0, 10.0), (8.0, 5.0)]]
        );
        assert_eq!(frame.clip_line(&[(3.0, 3.0)]), [vec![(3.0, 3.0)]]);
        assert!(frame.clip_line(&[(30.0, 3.0)]).is_empty());
        assert!(frame.clip_line(&[]).is_empty());
    }

    #[test]
    fn a_label_on_a_line_keeps_clear_of_the_others() {
        let frame = Rect { left: 0.0, top: 0.0, right: 200.0, bottom: 100.0 };
        let line = vec![(10.0, 50.0), (60.0, 50.0)];
        let wall = vec![(70.0, 0.0), (70.0, 100.0)];
        let place = beside(&line, (30.0, 12.0), &frame, &[line.clone(), wall], &[]).unwrap();
        assert!(place.right < 70.0 && (place.bottom < 50.0 || place.top > 50.0), "{place:?}");
        assert!(beside(&line, (300.0, 12.0), &frame, &[], &[]).is_none());
        assert!(beside(&[], (30.0, 12.0), &frame, &[], &[]).is_none());
    }
}
