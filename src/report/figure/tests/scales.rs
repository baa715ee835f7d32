//! Tests of scales and ticks.

use super::super::scale::{Axis, Scale, Tick};

fn scale(axis: Axis, data: &[f64], roomy: bool) -> Scale {
    Scale::new(&axis, data.iter().copied(), roomy)
}

/// Positions (to a thousandth) and labels of the labelled ticks.
fn labels(ticks: &[Tick]) -> Vec<(i64, String)> {
    let labelled = ticks.iter().filter_map(|t| t.label.as_ref().map(|l| (t.at, l.to_plain())));
    labelled.map(|(at, label)| ((at * 1000.0).round() as i64, label)).collect()
}

fn words(ticks: &[Tick]) -> String {
    let words: Vec<String> = labels(ticks).into_iter().map(|l| l.1).collect();
    words.join(" ").replace('\u{2212}', "-")
}

#[test]
fn decades_are_labelled_with_powers_of_ten() {
    let s = scale(Axis::log("t").between(1e2, 1e7), &[], false);
    let ticks = s.ticks(500.0, 46.0);
    assert_eq!(words(&ticks), "102 103 104 105 106 107");
    assert_eq!(labels(&ticks)[1].0, 200);
    // Eight minor ticks within each of five decades.
    assert_eq!(ticks.len(), 6 + 40);
    assert!(ticks.windows(2).all(|w| w[0].at <= w[1].at));
}

#[test]
fn many_decades_are_thinned_and_few_are_written_out() {
    let s = scale(Axis::log("x").between(1e-30, 1e0), &[], false);
    let ticks = s.ticks(300.0, 26.0);
    assert_eq!(words(&ticks), "10-30 10-27 10-24 10-21 10-18 10-15 10-12 10-9 10-6 10-3 1");
    assert_eq!(ticks.len(), 31, "the other decades are minor ticks");
    let s = scale(Axis::log("x").between(0.01, 100.0), &[], false);
    assert_eq!(words(&s.ticks(300.0, 26.0)), "0.01 0.1 1 10 100");
    let s = scale(Axis::log("x").between(1e-300, 1e300), &[], false);
    assert!((2..12).contains(&labels(&s.ticks(300.0, 26.0)).len()));
}

#[test]
fn short_logarithmic_axes_name_multiples() {
    let s = scale(Axis::log("x").between(1e4, 6e4), &[], false);
    assert_eq!(words(&s.ticks(300.0, 26.0)), "104 2\u{d7}104 5\u{d7}104");
    let s = scale(Axis::log("x").between(5e-5, 1e-4), &[], false);
    let some = "5\u{d7}10-5 6\u{d7}10-5 7\u{d7}10-5 8\u{d7}10-5 9\u{d7}10-5 10-4";
    assert_eq!(words(&s.ticks(300.0, 26.0)), some);
    let s = scale(Axis::log("x").between(2.1, 10.0), &[], false);
    assert_eq!(words(&s.ticks(100.0, 26.0)), "3 4 6 8", "labels keep apart");
    let s = scale(Axis::log("x").between(2.2, 2.6), &[], false);
    assert!(words(&s.ticks(300.0, 26.0)).starts_with("2.2 2.3 2.4"));
}

#[test]
fn linear_ticks_are_round() {
    let s = scale(Axis::linear("x").between(0.0, 100.0), &[], false);
    assert_eq!(words(&s.ticks(200.0, 26.0)), "0 20 40 60 80 100");
    let s = scale(Axis::linear("x").between(-0.3, 0.3), &[], false);
    assert_eq!(words(&s.ticks(200.0, 26.0)), "-0.3 -0.2 -0.1 0.0 0.1 0.2 0.3");
    let s = scale(Axis::linear("x").between(0.0, 3e-8), &[], false);
    assert_eq!(words(&s.ticks(100.0, 26.0)), "0 1\u{d7}10-8 2\u{d7}10-8 3\u{d7}10-8");
    let s = scale(Axis::linear("x").between(1e6, 1.5e6), &[], false);
    assert!(words(&s.ticks(100.0, 26.0)).starts_with("1.0\u{d7}106 1.2\u{d7}106"));
}

#[test]
fn automatic_ranges_follow_the_data() {
    let close = |scale: Scale, value: f64, at: f64| {
        let got = scale.position(value).unwrap();
        assert!((got - at).abs() < 1e-9, "{value}: {got}");
    };
    let s = scale(Axis::log("x"), &[3e-9, 2e-5, 0.0, -1.0, f64::NAN], true);
    close(s, 1e-9, 0.0);
    close(s, 1e-4, 1.0);
    let s = scale(Axis::log("x"), &[1e-40, 1e-4], true);
    close(s, 1e-16, 0.0);
    let s = scale(Axis::linear("x"), &[-0.1, 1.2], true);
    close(s, -0.2, 0.0);
    close(s, 1.2, 1.0);
    let s = scale(Axis::linear("x"), &[5.0], false);
    close(s, 5.0, 0.5);
}

#[test]
fn values_without_a_place_have_none() {
    let s = scale(Axis::log("x").between(1.0, 10.0), &[], false);
    assert!([0.0, -1.0, f64::NAN, f64::INFINITY].iter().all(|v| s.position(*v).is_none()));
    assert!(s.position(1e300).unwrap() > 1.0);
}

#[test]
fn unusable_ranges_give_way_to_the_data() {
    let unusable = [(f64::NAN, 1.0), (2.0, 1.0), (1.0, 1.0), (0.0, f64::INFINITY), (-1.0, 5.0)];
    for (low, high) in unusable {
        let s = scale(Axis::log("x").between(low, high), &[10.0, 1000.0], false);
        assert!((s.position(100.0).unwrap() - 0.5).abs() < 1e-9, "{low} {high}");
    }
}
