//! The integrator on problems with known answers.

use super::dense::interpolate;
use super::step::Workspace;
use super::{Method, Options, Problem, Solution, System, integrate_all};
use crate::kinetics::{Change, Kinetics, Mechanism};
use crate::sparse::{Fused, Lane, Separate, Single, Wide};

/// Robertson (1966), the standard stiff kinetics problem: A -> B (0.04),
/// B + B -> B + C (3e7), B + C -> A + C (1e4).
fn robertson() -> Kinetics {
    let reaction = |reactants: &[usize], products: &[usize]| Change {
        reactants: reactants.to_vec(),
        products: products.to_vec(),
        depends_on: reactants.to_vec(),
    };
    Kinetics::new(&Mechanism {
        species: 3,
        reactions: vec![
            reaction(&[0], &[1]),
            reaction(&[1, 1], &[1, 2]),
            reaction(&[1, 2], &[0, 2]),
        ],
        conserved: vec![vec![1.0; 3]],
    })
}

fn robertson_problem(kinetics: &Kinetics, times: &[f64]) -> Problem {
    Problem {
        parameters: kinetics.parameters(&[0.04, 3e7, 1e4], 1.0),
        start: kinetics.to_unknowns(&[1.0, 0.0, 0.0]),
        times: times.to_vec(),
    }
}

fn options(method: &'static Method, rtol: f64) -> Options {
    Options {
        method,
        relative_tolerance: rtol,
        absolute_tolerance: rtol * 1e-12,
        ..Options::default()
    }
}

fn solve_one<S: System>(system: &S, options: &Options, problem: Problem) -> Solution {
    let mut out = None;
    integrate_all::<Single<Fused>, S>(system, options, [problem], |s| out = Some(s));
    out.expect("one solution")
}

#[test]
fn robertson_is_solved_within_ten_tolerances_by_every_method() {
    // Published digits (Hairer & Wanner 1996; H. H. Robertson 1966), recomputed
    // with a 220-bit Radau IIA integrator.
    let exact = [
        (0.4, [9.851721139e-01, 3.386395379e-05, 1.479402219e-02]),
        (40.0, [7.158270687e-01, 9.185534765e-06, 2.841637457e-01]),
        (400.0, [4.505186685e-01, 3.222901442e-06, 5.494781086e-01]),
        (4e4, [3.898337709e-02, 1.621768316e-07, 9.610164607e-01]),
        (1e11, [2.083340150e-08, 8.333360770e-14, 9.999999792e-01]),
    ];
    let kinetics = robertson();
    let times: Vec<f64> = exact.iter().map(|e| e.0).collect();
    for method in Method::all() {
        for rtol in [1e-4, 1e-6, 1e-8] {
            let problem = robertson_problem(&kinetics, &times);
            let options = Options { absolute_tolerance: 1e-22, ..options(method, rtol) };
            let solution = solve_one(&kinetics, &options, problem);
            for (state, (time, exact)) in solution.states.iter().zip(&exact) {
                for (got, want) in kinetics.to_species(state).iter().zip(exact) {
                    let error = (got / want - 1.0).abs();
                    // At 1e11 the net rate of A is 2e-10 of its gross rates, whose
                    // rounding is then 1e-6 of it: what is left after some
                    // hundred steps is an error of about 1e-7 (measured, both with
                    // and without the levelling of increments).
                    let rounding = if *time > 1e10 { 4e-7 } else { 1e-9 };
                    let allowed = 10.0 * rtol + rounding;
                    assert!(error < allowed, "{} {rtol:e} at {time:e}: {error:e}", method.name);
                }
            }
        }
    }
}

/// Error after one unit of time with `steps` equal steps, and of the
/// interpolant in the middle of the last step, on A + A -> C, A -> B, B -> A.
fn errors_with_equal_steps(method: &'static Method, steps: u32) -> (f64, f64) {
    let reaction = |reactants: &[usize], products: &[usize]| Change {
        reactants: reactants.to_vec(),
        products: products.to_vec(),
        depends_on: reactants.to_vec(),
    };
    let kinetics = Kinetics::new(&Mechanism {
        species: 3,
        reactions: vec![reaction(&[0, 0], &[2]), reaction(&[0], &[1]), reaction(&[1], &[0])],
        conserved: vec![vec![1.0, 1.0, 2.0]],
    });
    let options = options(method, 1e-8);
    let parameters = kinetics.parameters(&[2.0, 3.0, 1.0], 1.0);
    let start = kinetics.to_unknowns(&[1.0, 0.5, 0.0]);
    let h = 1.0 / f64::from(steps);
    let reference = |time: f64| {
        let fine = Options { relative_tolerance: 1e-13, absolute_tolerance: 1e-15, ..options };
        let fine = Options { method: Method::rodas5(), ..fine };
        let problem =
            Problem { parameters: parameters.clone(), start: start.clone(), times: vec![time] };
        solve_one(&kinetics, &fine, problem).states.remove(0)
    };
    let mut work = Workspace::<Single<Fused>>::new(&kinetics, &options);
    let lanes = |v: &[f64]| v.iter().map(|&x| Single::splat(x)).collect::<Vec<_>>();
    work.parameters = lanes(&parameters);
    work.y = lanes(&start);
    work.targets = kinetics.invariants().sums(&work.y);
    let mut inside = Vec::new();
    for step in 0..steps {
        work.try_step(&kinetics, &options, Single::splat(h));
        if step + 1 == steps {
            inside = interpolate(method, 0.5, 0, &work.y, &work.y_new, &work.stages);
        }
        work.y = work.y_new.clone();
    }
    let end: Vec<f64> = work.y.iter().map(|v| v.get(0)).collect();
    let distance =
        |a: &[f64], b: &[f64]| a.iter().zip(b).map(|(a, b)| (a - b).abs()).fold(0.0, f64::max);
    (distance(&end, &reference(1.0)), distance(&inside, &reference(1.0 - 0.5 * h)))
}

#[test]
fn every_method_and_its_interpolant_have_the_published_order() {
    // Orders as published: RODAS 5(4) order 5, interpolant 4; RODAS 4(3) order
    // 4, interpolant 3. A wrong digit in a coefficient shows as a lower order.
    // The interpolant's error over one step is of one order more.
    for (method, order, inside_order) in
        [(Method::rodas5(), 5.0, 5.0), (Method::rodas4(), 4.0, 4.0)]
    {
        let (coarse, coarse_inside) = errors_with_equal_steps(method, 10);
        let (fine, fine_inside) = errors_with_equal_steps(method, 20);
        let seen = (coarse / fine).log2();
        let seen_inside = (coarse_inside / fine_inside).log2();
        assert!(seen > order - 0.4 && seen < order + 1.5, "{}: order {seen}", method.name);
        assert!(seen_inside > inside_order - 0.4, "{}: inside {seen_inside}", method.name);
    }
}

#[test]
fn eight_lanes_give_the_bits_of_one() {
    let kinetics = robertson();
    let problems: Vec<Problem> = (0..13)
        .map(|i| Problem {
            parameters: kinetics.parameters(&[0.04 * f64::from(i + 1), 3e7, 1e4], 1.0),
            ..robertson_problem(&kinetics, &[0.0, 0.3, 1e3, 1e7])
        })
        .collect();
    let mut wide: Vec<Option<Solution>> = vec![None; problems.len()];
    let options = options(Method::rodas5(), 1e-6);
    integrate_all::<Wide<Fused>, _>(&kinetics, &options, problems.clone(), |s| {
        let cell = s.cell;
        wide[cell] = Some(s);
    });
    for (cell, problem) in problems.into_iter().enumerate() {
        let alone = Solution { cell, ..solve_one(&kinetics, &options, problem) };
        assert_eq!(wide[cell].as_ref(), Some(&alone), "cell {cell}");
    }
}

#[test]
fn rounding_products_and_sums_apart_changes_nothing_but_rounding() {
    // What processors without a fused multiply-add compute.
    let kinetics = robertson();
    let options = options(Method::rodas5(), 1e-8);
    let problem = robertson_problem(&kinetics, &[40.0, 4e4]);
    let fused = solve_one(&kinetics, &options, problem.clone());
    let mut apart = None;
    integrate_all::<Wide<Separate>, _>(&kinetics, &options, [problem], |s| apart = Some(s));
    for (a, b) in fused.states.iter().zip(&apart.expect("one solution").states) {
        for (a, b) in a.iter().zip(b) {
            assert!((a / b - 1.0).abs() < 1e-7, "{a:e} against {b:e}");
        }
    }
}
