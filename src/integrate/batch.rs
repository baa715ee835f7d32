//! Keeps the lanes of one batch filled from an iterator of cells.

use super::dense::interpolate;
use super::step::Workspace;
use super::{Cause, Failure, Options, Problem, Solution, System, Work};
use crate::sparse::Lane;

/// Bounds of the factor by which a step may change, and the safety factor on
/// the predicted optimum (Hairer & Wanner 1996, section IV.7). The upper bound is
/// wide: a start from atoms covers twenty decades of time before anything
/// happens, and the error estimate was found to hold.
const SHRINK_MOST: f64 = 0.1;
const GROW_MOST: f64 = 100.0;
const SAFETY: f64 = 0.9;

/// Where one lane stands.
struct LaneState {
    solution: Solution,
    times: Vec<f64>,
    time: f64,
    step: f64,
    after_rejection: bool,
}

/// Integrates every problem, handing each solution to `sink` as it finishes
/// (not in the order of the problems; see [`Solution::cell`]).
///
/// The lanes of the batch are filled anew as they fall free. A cell's result
/// depends on nothing but the system, the options and its own problem.
pub fn integrate_all<L: Lane, S: System>(
    system: &S,
    options: &Options,
    problems: impl IntoIterator<Item = Problem>,
    mut sink: impl FnMut(Solution),
) {
    let mut problems = problems.into_iter().enumerate().fuse();
    let mut work = Workspace::<L>::new(system, options);
    let mut lanes: Vec<Option<LaneState>> = (0..L::WIDTH).map(|_| None).collect();
    loop {
        for (lane, state) in lanes.iter_mut().enumerate() {
            while state.is_none() {
                let Some((cell, problem)) = problems.next() else { break };
                *state = load(&mut work, system, options, lane, cell, problem, &mut sink);
            }
        }
        if lanes.iter().all(Option::is_none) {
            return;
        }
        let mut h = L::splat(1.0);
        for (lane, state) in lanes.iter().enumerate() {
            if let Some(state) = state {
                h.set(lane, state.step);
            }
        }
        let error = work.try_step(system, options, h);
        for (lane, slot) in lanes.iter_mut().enumerate() {
            let Some(state) = slot else { continue };
            let accepted = judge(state, options, error.get(lane).sqrt());
            if let Some(step) = accepted {
                finish_step(&mut work, system, options, lane, state, step);
            }
            if state.solution.failure.is_none() {
                state.solution.failure = trouble(&work, options, lane, state);
            }
            let done = state.solution.states.len() == state.times.len();
            if (done || state.solution.failure.is_some())
                && let Some(state) = slot.take()
            {
                sink(state.solution);
            }
        }
    }
}

/// Puts a problem into a lane; a problem that asks for nothing is finished at
/// once.
fn load<L: Lane, S: System>(
    work: &mut Workspace<L>,
    system: &S,
    options: &Options,
    lane: usize,
    cell: usize,
    problem: Problem,
    sink: &mut impl FnMut(Solution),
) -> Option<LaneState> {
    for (slot, &value) in work.parameters.iter_mut().zip(&problem.parameters) {
        slot.set(lane, value);
    }
    for (slot, &value) in work.y.iter_mut().zip(&problem.start) {
        slot.set(lane, value);
    }
    for sum in 0..work.targets.len() {
        let target = system.invariants().sum(sum, &work.y).get(lane);
        work.targets[sum].set(lane, target);
    }
    let at_start = problem.times.iter().take_while(|&&t| t <= 0.0).count();
    let solution = Solution {
        cell,
        states: vec![problem.start; at_start],
        work: Work::default(),
        failure: None,
    };
    if at_start == problem.times.len() {
        sink(solution);
        return None;
    }
    let step = first_step(work, system, options, lane, &problem.times);
    Some(LaneState { solution, times: problem.times, time: 0.0, step, after_rejection: false })
}

/// A first step over which no unknown changes by more than a hundredth of
/// itself or the largest ones by a hundredth of the total, judged from the
/// rates of change at the start; the error control takes over from there.
fn first_step<L: Lane, S: System>(
    work: &mut Workspace<L>,
    system: &S,
    options: &Options,
    lane: usize,
    times: &[f64],
) -> f64 {
    let n = system.size();
    let mut rate = vec![L::zero(); n];
    system.rate_of_change(&work.parameters, &work.y, &mut rate);
    let mut sum = 0.0;
    for (rate, y) in rate.iter().zip(&work.y) {
        let scale = options.absolute_tolerance + options.relative_tolerance * y.get(lane).abs();
        sum += (rate.get(lane) / scale).powi(2);
    }
    let speed = (sum / n as f64).sqrt();
    let until = times.last().copied().unwrap_or(1.0);
    let step = 0.01 / speed;
    if step.is_finite() && step > 0.0 { step.min(until) } else { until * 1e-12 }
}

/// Accepts or rejects the last try by its error (1 is what is allowed), sets
/// the next step, and returns the step that was accepted.
fn judge(state: &mut LaneState, options: &Options, error: f64) -> Option<f64> {
    let tried = state.step;
    let ideal = if error.is_finite() {
        SAFETY * error.max(1e-12).powf(-1.0 / f64::from(options.method.order))
    } else {
        SHRINK_MOST
    };
    if error <= 1.0 {
        let most = if state.after_rejection { 1.0 } else { GROW_MOST };
        state.step = tried * ideal.clamp(SHRINK_MOST, most);
        state.after_rejection = false;
        state.solution.work.accepted += 1;
        Some(tried)
    } else {
        state.step = tried * ideal.clamp(SHRINK_MOST, 0.9);
        state.after_rejection = true;
        state.solution.work.rejected += 1;
        None
    }
}

/// Writes the outputs that lie in the accepted step and moves the lane on.
fn finish_step<L: Lane, S: System>(
    work: &mut Workspace<L>,
    system: &S,
    options: &Options,
    lane: usize,
    state: &mut LaneState,
    step: f64,
) {
    let end = state.time + step;
    while let Some(&wanted) = state.times.get(state.solution.states.len()) {
        if wanted > end {
            break;
        }
        let x = (wanted - state.time) / step;
        let values = interpolate(options.method, x, lane, &work.y, &work.y_new, &work.stages);
        state.solution.states.push(on_sums(work, system, lane, &values));
    }
    state.time = end;
    for (y, new) in work.y.iter_mut().zip(&work.y_new) {
        y.set(lane, new.get(lane));
    }
}

/// An interpolated state moved onto the cell's conserved sums.
fn on_sums<L: Lane, S: System>(
    work: &Workspace<L>,
    system: &S,
    lane: usize,
    values: &[f64],
) -> Vec<f64> {
    // One lane's worth, spread over the group: the same arithmetic, the same bits.
    let mut y: Vec<L> = values.iter().map(|&v| L::splat(v)).collect();
    let targets: Vec<L> = work.targets.iter().map(|t| L::splat(t.get(lane))).collect();
    crate::sparse::with_best_instructions(
        #[inline(always)]
        || {
            let invariants = system.invariants();
            invariants.project(&mut invariants.projection(), &targets, &mut y);
        },
    );
    y.iter().map(|v| v.get(0)).collect()
}

/// Whether a lane has to be given up.
fn trouble<L: Lane>(
    work: &Workspace<L>,
    options: &Options,
    lane: usize,
    state: &LaneState,
) -> Option<Failure> {
    let tries = state.solution.work.accepted + state.solution.work.rejected;
    let cause = if !state.step.is_finite() || work.y.iter().any(|y| !y.get(lane).is_finite()) {
        Cause::NotFinite
    } else if state.step < state.time * 1e-14 || state.step < 1e-280 {
        Cause::StepTooSmall
    } else if tries >= options.step_limit {
        Cause::TooManySteps
    } else {
        return None;
    };
    Some(Failure { time: state.time, step: state.step, unknown: work.worst(options, lane), cause })
}
