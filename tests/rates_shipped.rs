//! Coefficients of the shipped network beside measured and evaluated ones: the
//! tables of `docs/checks.md`, line by line.

#![allow(clippy::unwrap_used, reason = "a test fails by panicking")]

mod support;

use std::path::Path;

/// One line: reactants, products that must be there, temperature, published
/// value and range, value here, verdict.
struct Line {
    equation: String,
    temperature: f64,
    published: f64,
    range: (f64, f64),
    here: f64,
    verdict: String,
}

/// Reactants, products, temperature (K), published share, and its range.
type Share<'a> = (&'a [&'a str], &'a [&'a str], f64, f64, f64, f64);

/// The table under "Rate coefficients of `cloud`".
fn lines() -> Vec<Line> {
    let page = Path::new(env!("CARGO_MANIFEST_DIR")).join("docs/checks.md");
    let text = std::fs::read_to_string(page).unwrap();
    let section = text.split("## Rate coefficients of `cloud`").nth(1).unwrap();
    let section = section.split("\n## ").next().unwrap();
    section
        .lines()
        .filter(|line| line.contains(" + ") && line.starts_with("| "))
        .map(|line| {
            let cells: Vec<&str> = line.trim_matches('|').split('|').map(str::trim).collect();
            let number = |text: &str| text.parse::<f64>().unwrap_or_else(|_| panic!("{line}"));
            let (low, high) = cells[3].split_once(" to ").unwrap();
            Line {
                equation: cells[0].to_owned(),
                temperature: number(cells[1]),
                published: number(cells[2]),
                range: (number(low), number(high)),
                here: number(cells[4]),
                verdict: cells[5].to_owned(),
            }
        })
        .collect()
}

fn names(side: &str) -> Vec<&str> {
    side.split(" + ").map(|name| name.trim().trim_end_matches(" (all)")).collect()
}

#[test]
fn coefficients_are_what_the_page_of_checks_says_and_lie_in_the_published_range_or_say_so() {
    let network = support::shipped_network("cloud");
    let lines = lines();
    assert!(lines.len() >= 25, "only {} lines were read", lines.len());
    for line in &lines {
        let (left, right) = match line.equation.split_once(" -> ") {
            Some((left, right)) => (names(left), names(right)),
            None => (names(&line.equation), Vec::new()),
        };
        let got = support::coefficient(&network, &left, &right, line.temperature);
        let case = format!("{} at {} K", line.equation, line.temperature);
        // The page keeps three digits.
        support::close(&case, got, line.here, 0.006);
        let (low, high) = line.range;
        assert!(low <= line.published && line.published <= high, "{case}: published outside");
        // A value on a bound, give or take the digits of the page, is within.
        let verdict = if got < low * 0.999 {
            "below"
        } else if got > high * 1.001 {
            "above"
        } else {
            "within"
        };
        assert_eq!(verdict, line.verdict, "{case}: {got:e}");
    }
    let outside = lines.iter().filter(|line| line.verdict != "within").count();
    assert!(outside <= 3, "{outside} coefficients lie outside");
}

#[test]
fn branching_of_recombination_and_of_h3p_with_oxygen_is_the_measured_one() {
    let network = support::shipped_network("cloud");
    let share = |reactants: &[&str], products: &[&str], temperature: f64| {
        support::coefficient(&network, reactants, products, temperature)
            / support::coefficient(&network, reactants, &[], temperature)
    };
    let cases: [Share<'_>; 4] = [
        // Jensen et al. 2000, ApJ 543, 764 (memory): OH 0.74; Neau et al. 2000 0.78.
        (&["H3O+", "e-"], &["OH"], 10.0, 0.74, 0.70, 0.80),
        // Jensen et al. 2000: H2O 0.25; Neau et al. 2000 0.18.
        (&["H3O+", "e-"], &["H2O"], 10.0, 0.25, 0.17, 0.26),
        // Hillenbrand et al. 2022, ApJ 927, 47 (seen): OH+ 0.58 at 10 K.
        (&["H3+", "O"], &["OH+"], 10.0, 0.58, 0.52, 0.64),
        // McCall et al. 2004, Phys. Rev. A 70, 052716 (memory): three H in 0.64.
        (&["H3+", "e-"], &["H", "H", "H"], 40.0, 0.64, 0.55, 0.75),
    ];
    for (reactants, products, temperature, published, low, high) in cases {
        let got = share(reactants, products, temperature);
        assert!(
            low <= got && got <= high,
            "{reactants:?} to {products:?}: {got:.3}, published {published}"
        );
    }
}
