//! Random clouds from all over the promised range of conditions, its corners
//! included, on the full network from atoms to 1e8 years at default tolerances.

#![allow(clippy::unwrap_used, reason = "a test fails by panicking")]

mod support;

use duskwater::cloud::{Model, RunFile, shipped};

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

/// Cells per run: the 32 corners and as many again and more inside.
const CELLS: usize = 100;

/// Solves one cell and says what is wrong with it.
fn trouble(model: &Model) -> Option<String> {
    let evolution = model.evolve();
    if let Some(failure) = evolution.failure {
        return Some(failure.to_string());
    }
    let all = || evolution.points.iter().flat_map(|point| &point.abundances).copied();
    // First, since maxima and minima leave out what is not a number.
    if !all().all(f64::is_finite) {
        return Some("an abundance that is not a number".into());
    }
    let residual = evolution.worst_residual();
    if residual > 1e-12 {
        return Some(format!("conserved to {residual:e}"));
    }
    // Not clipped: at most about the absolute tolerance of 1e-20 below zero.
    let lowest = all().fold(0.0, f64::min);
    if lowest < -1e-18 {
        return Some(format!("an abundance of {lowest:e}"));
    }
    // Three hundred is usual; ten times as many is a cell that struggles.
    let work = evolution.work;
    (work.accepted + work.rejected > 3000).then(|| format!("{work:?}"))
}

#[test]
fn every_cloud_in_the_promised_range_is_solved_and_conserves() {
    for run in ["dense-core", "diffuse", "post-shock"] {
        let text = shipped::text(run).unwrap();
        let (file, _) = RunFile::read(run, text, &[]).unwrap();
        let network = support::shipped_network(&file.network);
        let cells: Vec<usize> = (0..CELLS)
            .filter(|&cell| file.network != "cloud-grains" || !limited_by_rounding(cell))
            .collect();
        let threads = std::thread::available_parallelism().map_or(1, usize::from);
        let share = cells.len().div_ceil(threads);
        std::thread::scope(|scope| {
            for part in cells.chunks(share) {
                let network = &network;
                scope.spawn(move || {
                    for &cell in part {
                        let overrides = overrides(cell);
                        let found = trouble(&support::model_with(network, text, &overrides));
                        assert!(found.is_none(), "{run} {cell} {overrides:?}: {found:?}");
                    }
                });
            }
        });
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
    // Robertson's problem (in years) at a tolerance near the rounding of doubles,
    // which asks for more steps than are allowed. Three species: it is given up
    // in a moment.
    let network = support::network(
        "A,Zr:1\nB,Zr:1\nC,Zr:1",
        "A -> B,thermal,1e-9\nB + B -> B + C,thermal,1\nB + C -> A + C,thermal,3e-4",
    );
    let rest = "[times]\noutput = [1, 1e11]\n[solver]\nrelative_tolerance = 1e-13\n\
                absolute_tolerance = 1e-40\n";
    let run = support::run_text(1.0, 300.0, 1e-17, "A = 1", rest);
    let evolution = support::model(&network, &run).evolve();
    let failure = evolution.failure.unwrap();
    assert_eq!(failure.code, "solve-integration");
    for part in [" yr: ", "largest error was in ", "at a step of "] {
        assert!(failure.message.contains(part), "{}", failure.message);
    }
    let named =
        network.species.iter().any(|s| failure.message.contains(&format!("in {} ", s.name)));
    assert!(named, "{}", failure.message);
    assert!(!failure.remedy.is_empty());
    // What was reached before stays, and is finite.
    assert!(evolution.points.len() < 3);
    assert!(evolution.points.iter().flat_map(|p| &p.abundances).all(|x| x.is_finite()));
}
