//! One try of a step for a batch of lanes.

use super::invariants::Projection;
use super::{Options, System};
use crate::sparse::{Factors, Lane, with_best_instructions};

/// The numbers of a batch. Arrays are `[size]` unless said otherwise.
pub(super) struct Workspace<L> {
    /// Parameters of the cells, `[parameters]`.
    pub(super) parameters: Vec<L>,
    /// Conserved sums of the cells, `[invariants]`.
    pub(super) targets: Vec<L>,
    /// State at the start of the step.
    pub(super) y: Vec<L>,
    /// State at its end, as the last try gave it.
    pub(super) y_new: Vec<L>,
    /// The stages U of the last try, `[stages * size]`.
    pub(super) stages: Vec<L>,
    argument: Vec<L>,
    factors: Factors<L>,
    projection: Projection<L>,
}

impl<L: Lane> Workspace<L> {
    pub(super) fn new<S: System>(system: &S, options: &Options) -> Self {
        let n = system.size();
        Self {
            // Lanes that never get a cell compute on zeros, harmlessly.
            parameters: vec![L::zero(); system.parameters()],
            targets: vec![L::zero(); system.invariants().count()],
            y: vec![L::zero(); n],
            y_new: vec![L::zero(); n],
            stages: vec![L::zero(); options.method.stages * n],
            argument: vec![L::zero(); n],
            factors: system.symbolic().factors(),
            projection: system.invariants().projection(),
        }
    }

    /// Tries a step of size `h` in every lane: fills `y_new` and `stages` and
    /// returns the mean square of the error over the allowed error, per lane.
    pub(super) fn try_step<S: System>(&mut self, system: &S, options: &Options, h: L) -> L {
        with_best_instructions(
            #[inline(always)]
            || {
                self.stages(system, options, h);
                self.finish(system, options)
            },
        )
    }

    #[inline(always)]
    fn stages<S: System>(&mut self, system: &S, options: &Options, h: L) {
        let method = options.method;
        let n = system.size();
        let inverse_h = L::splat(1.0) / h;
        let shift = inverse_h * L::splat(1.0 / method.gamma);
        let Self { parameters, y, stages, argument, factors, projection, .. } = self;
        let symbolic = system.symbolic();
        let invariants = system.invariants();
        invariants.weigh(projection, y);
        let first = &mut stages[..n];
        symbolic.factor(
            factors,
            #[inline(always)]
            |i, row| {
                row[i] = row[i] + shift;
                first[i] = system.subtract_jacobian_row(i, parameters, y, row);
            },
        );
        symbolic.solve(factors, first);
        invariants.level(projection, first);
        argument.copy_from_slice(y);
        for s in 1..method.stages {
            let (done, rest) = stages.split_at_mut(s * n);
            let current = &mut rest[..n];
            if s < method.accumulates_from {
                combine(argument, y, done, &method.a[s]);
            } else {
                for (argument, &u) in argument.iter_mut().zip(&done[(s - 1) * n..]) {
                    *argument = *argument + u;
                }
            }
            system.rate_of_change(parameters, argument, current);
            let mut weights = [L::zero(); super::method::MOST_STAGES];
            for (weight, &c) in weights.iter_mut().zip(&method.c[s]) {
                *weight = inverse_h * L::splat(c);
            }
            add_combination(current, done, &weights);
            symbolic.solve(factors, current);
            invariants.level(projection, current);
        }
    }

    #[inline(always)]
    fn finish<S: System>(&mut self, system: &S, options: &Options) -> L {
        let n = system.size();
        let last = &self.stages[(options.method.stages - 1) * n..];
        let relative = L::splat(options.relative_tolerance);
        let absolute = L::splat(options.absolute_tolerance);
        let mut sum = L::zero();
        for i in 0..n {
            let new = self.argument[i] + last[i];
            self.y_new[i] = new;
            let scale = self.y[i].abs().max(new.abs()).mul_add(relative, absolute);
            let ratio = last[i] / scale;
            sum = ratio.mul_add(ratio, sum);
        }
        system.invariants().project(&mut self.projection, &self.targets, &mut self.y_new);
        sum * L::splat(1.0 / n as f64)
    }

    /// The unknown whose error weighs most in the last try of one lane.
    pub(super) fn worst(&self, options: &Options, lane: usize) -> usize {
        let n = self.y.len();
        let last = &self.stages[(options.method.stages - 1) * n..];
        let ratio = |i: usize| {
            let size = self.y[i].get(lane).abs().max(self.y_new[i].get(lane).abs());
            let ratio = last[i].get(lane).abs()
                / (options.absolute_tolerance + options.relative_tolerance * size);
            if ratio.is_finite() { ratio } else { f64::INFINITY }
        };
        (0..n).max_by(|&a, &b| ratio(a).total_cmp(&ratio(b))).unwrap_or(0)
    }
}

/// `out = y + sum_j weights[j] U_j` over the stages done.
#[inline(always)]
fn combine<L: Lane>(out: &mut [L], y: &[L], done: &[L], weights: &[f64]) {
    out.copy_from_slice(y);
    let mut lanes = [L::zero(); super::method::MOST_STAGES];
    for (lane, &weight) in lanes.iter_mut().zip(weights) {
        *lane = L::splat(weight);
    }
    add_combination(out, done, &lanes);
}

/// `out += sum_j weights[j] U_j` over the stages done.
#[inline(always)]
fn add_combination<L: Lane>(out: &mut [L], done: &[L], weights: &[L]) {
    let n = out.len();
    for (stage, &weight) in done.chunks_exact(n).zip(weights) {
        for (out, &u) in out.iter_mut().zip(stage) {
            *out = u.mul_add(weight, *out);
        }
    }
}
