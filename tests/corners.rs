//! Random clouds from all over the promised range of conditions, its corners
//! included, on the full network from atoms to 1e8 years at default tolerances.

#![allow(clippy::unwrap_used, reason = "a test fails by panicking")]

mod support;

use duskwater::cloud::{Evolution, Model, RunFile, shipped};

/// The promised range: key, lowest, highest; all but the extinction are spread
/// evenly in their logarithm.
const RANGE: [(&str, f64, f64); 5] = [
    ("hydrogen_density", 1.0, 1e9),
    ("temperature", 5.0, 3000.0),
    ("cosmic_ray_ionization_rate", 1e-19, 1e-13),
    ("visual_extinction", 0.0, 50.0),
    ("radiation_field", 0.0, 1e6),
];

/// Lowest radiation field above none.
const FAINT_FIELD: f64 = 1e-6;

fn value(axis: usize, share: f64) -> f64 {
    let (key, low, high) = RANGE[axis];
    match key {
        // Even in its square root, so that thin clouds are not rare.
        "visual_extinction" => high * share * share,
        "radiation_field" if share < 0.02 => 0.0,
        "radiation_field" => FAINT_FIELD * (high / FAINT_FIELD).powf(share),
        _ => low * (high / low).powf(share),
    }
}

/// Shares of the five axes: the 32 corners, then a sequence that fills the cube
/// evenly (Weyl 1916: multiples of irrational numbers, here square roots of
/// primes).
fn shares(cell: usize) -> [f64; 5] {
    if cell < 32 {
        return [0, 1, 2, 3, 4].map(|axis| ((cell >> axis) & 1) as f64);
    }
    [2.0f64, 3.0, 5.0, 7.0, 11.0].map(|prime| (prime.sqrt() * cell as f64).fract())
}

fn overrides(cell: usize) -> Vec<String> {
    let mut list: Vec<String> = shares(cell)
        .iter()
        .enumerate()
        .map(|(axis, &share)| format!("cloud.{}={:e}", RANGE[axis].0, value(axis, share)))
        .collect();
    list.push("times.until=1e8".into());
    list.push("times.output=[1, 1e3, 1e5, 1e7, 1e8]".into());
    list
}

/// Corners with the densest gas in the strongest light and grains as partners.
/// Exchange of charge runs 1e13 times in a step there, and the rounding of its
/// gross rates, not the chemistry, sets the step: such a cloud takes thousands of
/// steps, or is given up with that reason at the limit of steps.
fn limited_by_rounding(cell: usize) -> bool {
    let [density, _, _, extinction, field] = shares(cell);
    cell < 32 && density > 0.5 && extinction < 0.5 && field > 0.5
}

/// Cells per run: the 32 corners and a handful inside.
const CELLS: usize = 64;

#[test]
fn every_cloud_in_the_promised_range_is_solved_and_conserves() {
    for run in ["dense-core", "diffuse", "post-shock"] {
        let text = shipped::text(run).unwrap();
        let (file, _) = RunFile::read(run, text, &[]).unwrap();
        let network = support::shipped_network(&file.network);
        for cell in (0..CELLS).filter(|&cell| !(run != "diffuse" && limited_by_rounding(cell))) {
            let overrides = overrides(cell);
            let model = support::model_with(&network, text, &overrides);
            let evolution = model.evolve();
            let case = format!("{run} {overrides:?}");
            assert!(evolution.failure.is_none(), "{case}: {:?}", evolution.failure);
            let residual = evolution.worst_residual();
            assert!(residual < 1e-12, "{case}: conserved to {residual:e}");
            // Not clipped: at most about the absolute tolerance below zero.
            let all = evolution.points.iter().flat_map(|point| &point.abundances);
            let lowest = all.copied().fold(0.0, f64::min);
            assert!(lowest > -1e-18, "{case}: an abundance of {lowest:e}");
            let work = evolution.work;
            assert!(work.accepted + work.rejected < 3000, "{case}: {work:?}");
        }
    }
}

#[test]
fn the_cloud_that_rounding_limits_is_solved_all_the_same_at_5_k() {
    let cell = 0b10001;
    assert!(limited_by_rounding(cell));
    let text = shipped::text("dense-core").unwrap();
    let (file, _) = RunFile::read("dense-core", text, &[]).unwrap();
    let network = support::shipped_network(&file.network);
    let evolution = support::model_with(&network, text, &overrides(cell)).evolve();
    assert!(evolution.failure.is_none() && evolution.worst_residual() < 1e-12);
}

#[test]
fn a_cloud_that_cannot_be_solved_says_when_where_and_why() {
    // An absurd tolerance asks for steps below the resolution of time.
    let overrides =
        ["solver.relative_tolerance=1e-13", "solver.absolute_tolerance=1e-40"].map(String::from);
    let text = shipped::text("post-shock").unwrap();
    let (file, _) = RunFile::read("post-shock", text, &[]).unwrap();
    let network = support::shipped_network(&file.network);
    let model: Model = support::model_with(&network, text, &overrides);
    let evolution: Evolution = model.evolve();
    if let Some(failure) = evolution.failure {
        assert_eq!(failure.code, "solve-integration");
        assert!(
            failure.message.contains(" yr") && failure.message.contains("largest error was in")
        );
        assert!(!failure.remedy.is_empty());
    } else {
        assert!(evolution.worst_residual() < 1e-12);
    }
}
