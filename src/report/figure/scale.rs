//! Axes: from values to positions, and where the ticks go.

use super::rich::{Rich, Shift};

/// How values are spaced along an axis.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Spacing {
    /// Equal steps for equal differences.
    #[default]
    Linear,
    /// Equal steps for equal ratios; values at or below zero have no place.
    Log,
}

/// What an axis shows.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Axis {
    /// Marked text, with the unit in brackets or after a slash.
    pub label: String,
    /// Linear or logarithmic.
    pub spacing: Spacing,
    /// Lowest and highest value shown; taken from the data when absent or
    /// unusable. An automatic logarithmic range reaches at most twelve decades
    /// below the highest value.
    pub range: Option<(f64, f64)>,
}

impl Axis {
    /// A logarithmic axis whose range follows the data.
    pub fn log(label: impl Into<String>) -> Self {
        Self { label: label.into(), spacing: Spacing::Log, range: None }
    }

    /// A linear axis whose range follows the data.
    pub fn linear(label: impl Into<String>) -> Self {
        Self { label: label.into(), spacing: Spacing::Linear, range: None }
    }

    /// The same axis from `low` to `high`.
    #[must_use]
    pub fn between(self, low: f64, high: f64) -> Self {
        Self { range: Some((low, high)), ..self }
    }
}

/// Decades that an automatic logarithmic range may span.
const MOST_DECADES: f64 = 12.0;

/// A tick; minor ones have no label.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Tick {
    /// Position along the axis, 0 at its low end and 1 at its high end.
    pub(super) at: f64,
    pub(super) label: Option<Rich>,
}

/// A resolved axis. `low` and `high` are finite and differ; they are decimal
/// logarithms when the spacing is logarithmic.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Scale {
    spacing: Spacing,
    low: f64,
    high: f64,
}

impl Scale {
    /// Resolves an axis; `roomy` widens an automatic range to round values.
    pub(super) fn new(axis: &Axis, data: impl Iterator<Item = f64>, roomy: bool) -> Self {
        let spacing = axis.spacing;
        let inner = |v: f64| match spacing {
            Spacing::Linear => v.is_finite().then_some(v),
            Spacing::Log => (v.is_finite() && v > 0.0).then(|| libm::log10(v)),
        };
        if let Some((low, high)) = axis.range
            && let (Some(low), Some(high)) = (inner(low), inner(high))
            && low < high
            && (high - low).is_finite()
        {
            return Self { spacing, low, high };
        }
        let mut span: Option<(f64, f64)> = None;
        for v in data.filter_map(inner) {
            let (low, high) = span.unwrap_or((v, v));
            span = Some((low.min(v), high.max(v)));
        }
        let (mut low, mut high) = span.unwrap_or((0.0, 1.0));
        if spacing == Spacing::Log {
            low = low.max(high - MOST_DECADES);
        }
        if !(high - low).is_finite() {
            (low, high) = (low / 4.0, high / 4.0);
        }
        if high - low <= 1e-12 * high.abs().max(low.abs()) {
            let pad = if spacing == Spacing::Log { 0.5 } else { (0.1 * high.abs()).max(0.5) };
            (low, high) = (low - pad, high + pad);
        }
        if roomy {
            (low, high) = match spacing {
                Spacing::Log => round_out_log(low, high),
                Spacing::Linear => round_out_linear(low, high),
            };
        }
        Self { spacing, low, high }
    }

    /// Linear or logarithmic.
    pub(super) fn spacing(&self) -> Spacing {
        self.spacing
    }

    /// Position of a value along the axis, within 0..1 when it is in range.
    pub(super) fn position(&self, value: f64) -> Option<f64> {
        let inner = match self.spacing {
            Spacing::Linear => value,
            Spacing::Log if value > 0.0 => libm::log10(value),
            Spacing::Log => return None,
        };
        let at = (inner - self.low) / (self.high - self.low);
        // Far outside is as good as a little outside, and keeps sums finite.
        at.is_finite().then(|| at.clamp(-1e4, 1e4))
    }

    /// Ticks for an axis of `length` user units, with labels at least `gap`
    /// apart; in ascending order.
    pub(super) fn ticks(&self, length: f64, gap: f64) -> Vec<Tick> {
        let most = (length / gap.max(1.0)).floor().max(1.0);
        let mut ticks = match self.spacing {
            Spacing::Linear => self.linear_ticks(most),
            Spacing::Log => self.log_ticks(length, most),
        };
        ticks.retain(|t| (-1e-9..=1.0 + 1e-9).contains(&t.at));
        ticks.sort_by(|a, b| a.at.total_cmp(&b.at));
        // Multiples within a decade crowd towards its end.
        let mut free_from = f64::NEG_INFINITY;
        for tick in ticks.iter_mut().filter(|t| t.label.is_some()) {
            if tick.at < free_from {
                tick.label = None;
            } else {
                free_from = tick.at + 0.55 * gap / length.max(1.0);
            }
        }
        ticks
    }

    fn fraction(&self, inner: f64) -> f64 {
        (inner - self.low) / (self.high - self.low)
    }

    fn linear_ticks(&self, most: f64) -> Vec<Tick> {
        let (step, parts) = nice_step((self.high - self.low) / most);
        let (first, last) = ((self.low / step).ceil() - 1.0, (self.high / step).floor() + 1.0);
        if !(first.is_finite() && last.is_finite() && first.abs().max(last.abs()) < 1e12) {
            return Vec::new();
        }
        let mut ticks = Vec::new();
        for i in first as i64..=last as i64 {
            let value = i as f64 * step;
            ticks.push(Tick { at: self.fraction(value), label: Some(decimal(value, step)) });
            for part in 1..parts {
                let minor = value + step * f64::from(part) / f64::from(parts);
                ticks.push(Tick { at: self.fraction(minor), label: None });
            }
        }
        ticks
    }

    fn log_ticks(&self, length: f64, most: f64) -> Vec<Tick> {
        let decades = self.high - self.low;
        let (first, last) = ((self.low - 1e-9).floor() as i32, (self.high + 1e-9).ceil() as i32);
        let inside = |inner: f64| (self.low - 1e-9..=self.high + 1e-9).contains(&inner);
        let step = [1, 2, 3, 4, 5, 10, 20, 50, 100]
            .into_iter()
            .find(|s| decades / f64::from(*s) <= most)
            .unwrap_or(200);
        let labelled: Vec<i32> =
            (first..=last).filter(|e| e % step == 0 && inside(f64::from(*e))).collect();
        let all = |mantissas: &[i32]| -> Vec<(i32, i32)> {
            (first..=last)
                .flat_map(|e| mantissas.iter().map(move |m| (*m, e)))
                .filter(|(m, e)| inside(log_of(*m, *e)))
                .collect()
        };
        let tick = |(m, e): (i32, i32), label| Tick { at: self.fraction(log_of(m, e)), label };
        if labelled.len() >= 2 {
            let plain = labelled.iter().all(|e| (-2..=3).contains(e));
            let mut ticks: Vec<Tick> =
                labelled.iter().map(|e| tick((1, *e), Some(power(1, *e, plain)))).collect();
            if step > 1 {
                let minor = all(&[1]).into_iter().filter(|(_, e)| e % step != 0);
                ticks.extend(minor.map(|me| tick(me, None)));
            } else if length / decades >= 24.0 {
                ticks.extend(all(&[2, 3, 4, 5, 6, 7, 8, 9]).into_iter().map(|me| tick(me, None)));
            }
            return ticks;
        }
        // Little more than a decade: name some multiples too.
        for (mantissas, least) in [(&[1, 2, 5][..], 3), (&[1, 2, 3, 4, 5, 6, 7, 8, 9][..], 2)] {
            let named = all(mantissas);
            if named.len() >= least {
                let plain = named.iter().all(|(_, e)| (-2..=3).contains(e));
                let mut ticks: Vec<Tick> =
                    named.iter().map(|(m, e)| tick((*m, *e), Some(power(*m, *e, plain)))).collect();
                let others = all(&[1, 2, 3, 4, 5, 6, 7, 8, 9]);
                ticks.extend(
                    others.into_iter().filter(|me| !named.contains(me)).map(|me| tick(me, None)),
                );
                return ticks;
            }
        }
        // Within a fraction of a step: round values, placed by their logarithm.
        let (low, high) = (libm::exp10(self.low), libm::exp10(self.high));
        let (step, _) = nice_step((high - low) / most.min(5.0));
        let first = (low / step).ceil();
        (0..6)
            .map(|i| (first + f64::from(i)) * step)
            .filter(|v| *v > 0.0 && v.is_finite())
            .map(|v| Tick { at: self.fraction(libm::log10(v)), label: Some(decimal(v, step)) })
            .collect()
    }
}

fn log_of(mantissa: i32, exponent: i32) -> f64 {
    libm::log10(f64::from(mantissa)) + f64::from(exponent)
}

/// Widens a logarithmic range to whole decades, or to 1, 2, 5 times one when
/// it spans less than two.
fn round_out_log(low: f64, high: f64) -> (f64, f64) {
    if high - low >= 2.0 {
        return ((low + 1e-9).floor(), (high - 1e-9).ceil());
    }
    let near = |v: f64, up: bool| {
        let decade = v.floor();
        let rungs = [0.0, 2.0_f64.log10(), 5.0_f64.log10(), 1.0].map(|r| decade + r);
        let found = if up {
            rungs.iter().find(|r| **r >= v - 1e-9)
        } else {
            rungs.iter().rfind(|r| **r <= v + 1e-9)
        };
        found.copied().unwrap_or(v)
    };
    let (l, h) = (near(low, false), near(high, true));
    if l < h { (l, h) } else { (low - 0.5, high + 0.5) }
}

fn round_out_linear(low: f64, high: f64) -> (f64, f64) {
    let (step, _) = nice_step((high - low) / 8.0);
    let (l, h) = ((low / step).floor() * step, (high / step).ceil() * step);
    if l.is_finite() && h.is_finite() && l < h { (l, h) } else { (low, high) }
}

/// The smallest of 1, 2, 5 times a power of ten that is at least `raw`, and
/// into how many parts its minor ticks cut it.
fn nice_step(raw: f64) -> (f64, i32) {
    if !(raw.is_finite() && raw > 0.0) {
        return (1.0, 1);
    }
    let exponent = libm::log10(raw).floor();
    for (mantissa, parts) in [(1.0, 5), (2.0, 4), (5.0, 5), (10.0, 5)] {
        let step = mantissa * libm::exp10(exponent);
        if step >= raw * (1.0 - 1e-9) && step > 0.0 {
            return (step, parts);
        }
    }
    (raw, 1)
}

/// A multiple of `step` with the digits that the step needs.
fn decimal(value: f64, step: f64) -> Rich {
    let step_exponent = (libm::log10(step) + 1e-9).floor() as i32;
    let size = value.abs().max(step);
    if size < 1e5 && step_exponent >= -4 {
        let digits = usize::try_from(-step_exponent).unwrap_or(0);
        return Rich::plain(
            &format!("{:.digits$}", if value.abs() < 0.5 * step { 0.0 } else { value })
                .replace('-', "\u{2212}"),
        );
    }
    if value.abs() < 0.5 * step {
        return Rich::plain("0");
    }
    let exponent = (libm::log10(value.abs()) + 1e-9).floor() as i32;
    let digits = usize::try_from(exponent - step_exponent).unwrap_or(0).min(15);
    let mantissa = value / libm::exp10(f64::from(exponent));
    let mut rich = Rich::plain(&format!("{mantissa:.digits$}\u{d7}10").replace('-', "\u{2212}"));
    rich.push(&exponent.to_string().replace('-', "\u{2212}"), Shift::Super);
    rich
}

/// `m` times ten to the `e`, written out when `plain`.
fn power(m: i32, e: i32, plain: bool) -> Rich {
    if plain || (m == 1 && (e == 0 || e == 1)) {
        let digits = usize::try_from(-e).unwrap_or(0);
        return Rich::plain(&format!("{:.digits$}", f64::from(m) * 10f64.powi(e)));
    }
    let mut rich = if m == 1 { Rich::plain("10") } else { Rich::plain(&format!("{m}\u{d7}10")) };
    rich.push(&e.to_string().replace('-', "\u{2212}"), Shift::Super);
    rich
}
