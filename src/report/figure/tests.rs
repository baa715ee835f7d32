//! Tests of whole charts: well-formed, telling, and calm with odd data.

mod scales;
mod xml;

use super::*;
use xml::read;

fn times() -> Vec<f64> {
    (0..=50).map(|i| 10f64.powf(2.0 + 0.1 * f64::from(i))).collect()
}

fn series(name: &str, f: impl Fn(f64) -> f64) -> Series {
    Series { name: name.to_owned(), points: times().into_iter().map(|t| (t, f(t))).collect() }
}

fn lines() -> LineChart {
    LineChart {
        title: "Clump & <rim>".to_owned(),
        x: Axis::log("time (yr)"),
        y: Axis::log("abundance").between(1e-12, 1e-3),
        series: vec![
            series("H3O+", |t| 1e-13 * t),
            series("CO", |_| 1e-4),
            series("C", |t| 1e-5 * (-t / 1e4).exp()),
            series("HCN", |_| 1e-20),
        ],
        ..LineChart::default()
    }
}

fn shares() -> StackedShares {
    let layer = |name: &str, f: fn(f64) -> f64| ShareLayer {
        name: name.to_owned(),
        shares: times().into_iter().map(f).collect(),
    };
    StackedShares {
        title: "What makes and destroys `OH`".to_owned(),
        x: Axis::log("time (yr)"),
        times: times(),
        panels: vec![
            SharePanel {
                heading: "Formation".to_owned(),
                layers: vec![
                    layer("H3O+ + e- -> OH + H + H", |_| 0.6),
                    layer("O + H2 -> OH + H", |t| 0.4 / (1.0 + t / 1e4)),
                ],
            },
            SharePanel {
                heading: "Destruction".to_owned(),
                layers: vec![layer("C + OH -> CO + H", |_| 1.0)],
            },
        ],
        ..StackedShares::default()
    }
}

fn bars() -> BarChart {
    let row = |name: &str, value, text: &str| BarRow {
        name: name.to_owned(),
        value,
        text: text.to_owned(),
        detail: "*k* = 1×10^{-9} cm^{3} s^{-1}".to_owned(),
        rest: false,
    };
    let rows = vec![row("C + OH -> CO + H", 0.7, "70 %"), row("density", -0.2, "-0.2")];
    BarChart {
        title: "Ranked".to_owned(),
        groups: vec![BarGroup { heading: "At 10^{5} yr".to_owned(), rows }],
        ..BarChart::default()
    }
}

#[test]
fn charts_are_well_formed_and_say_what_they_show() {
    let page = read(&lines().to_svg());
    for text in
        ["Clump & <rim>", "time (yr)", "H3O+", "CO", "10\u{2212}12", "Not in the frame: HCN."]
    {
        assert!(page.texts.iter().any(|t| t == text), "{text}: {:?}", page.texts);
    }
    let page = read(&shares().to_svg());
    let equation = "H3O+ + e\u{2212} \u{2192} OH + H + H";
    for text in ["Formation", "Destruction", equation, "everything else", "100"] {
        assert!(page.texts.iter().any(|t| t.contains(text)), "{text}: {:?}", page.texts);
    }
    let page = read(&bars().to_svg());
    for text in ["C + OH \u{2192} CO + H", "70 %", "\u{2212}0.2", "At 105 yr"] {
        assert!(page.texts.iter().any(|t| t == text), "{text}: {:?}", page.texts);
    }
}

#[test]
fn names_are_set_as_formulas() {
    let set = concat!(
        r#"H<tspan dy="2.86" font-size="9.36">3</tspan><tspan dy="-2.86">O</tspan>"#,
        r#"<tspan dy="-4.68" font-size="9.36">+</tspan></text>"#
    );
    assert!(lines().to_svg().contains(set));
}

#[test]
fn every_chart_has_a_title_and_a_description() {
    for svg in [lines().to_svg(), shares().to_svg(), bars().to_svg()] {
        let page = read(&svg);
        assert_eq!(page.tags[..3], ["svg", "title", "desc"]);
        assert!(page.texts[0].len() > 3 && page.texts[1].len() > 10);
    }
    let mut chart = lines();
    chart.description = "Carbon burns away.".to_owned();
    assert_eq!(read(&chart.to_svg()).texts[1], "Carbon burns away.");
}

#[test]
fn the_same_chart_gives_the_same_bytes() {
    assert_eq!(lines().to_svg(), lines().to_svg());
    assert_eq!(shares().to_svg(), shares().to_svg());
    assert_eq!(bars().to_svg(), bars().to_svg());
}

#[test]
fn a_whole_share_has_no_rest() {
    let mut chart = shares();
    chart.panels.remove(0);
    assert!(!chart.to_svg().contains("everything else"));
}

#[test]
fn everything_drawn_lies_on_the_paper() {
    for svg in [lines().to_svg(), shares().to_svg(), bars().to_svg()] {
        let page = read(&svg);
        for (x, y) in &page.points {
            assert!((0.0..=page.width).contains(x) && (0.0..=page.height).contains(y), "{x} {y}");
        }
        assert!(page.points.len() > 10);
    }
}

#[test]
fn empty_charts_are_drawn() {
    read(&LineChart::default().to_svg());
    read(&StackedShares::default().to_svg());
    read(&BarChart::default().to_svg());
}

#[test]
fn odd_values_are_survived() {
    let odd = [
        vec![],
        vec![(1.0, 1.0)],
        vec![(f64::NAN, f64::NAN); 4],
        vec![(0.0, 0.0), (-1.0, -1.0)],
        vec![(1e-320, 1e308), (1e308, 1e-320), (f64::INFINITY, f64::NEG_INFINITY)],
        vec![(-1e308, 1e308), (1e308, -1e308), (0.0, f64::NAN), (5.0, 5.0)],
        vec![(7.0, 7.0); 3],
    ];
    for points in odd {
        for axis in [Axis::log("a"), Axis::linear("a"), Axis::log("a").between(-1.0, f64::NAN)] {
            let one = Series { name: "OH".to_owned(), points: points.clone() };
            let (x, y) = (axis.clone(), axis.clone());
            read(&LineChart { x, y, series: vec![one; 3], ..LineChart::default() }.to_svg());
            let layer = ShareLayer {
                name: "OH".to_owned(),
                shares: points.iter().map(|p| p.1).chain([0.5]).collect(),
            };
            let panel = SharePanel { heading: String::new(), layers: vec![layer; 2] };
            let times = points.iter().map(|p| p.0).chain([1.0, 2.0]).collect();
            read(
                &StackedShares { x: axis, times, panels: vec![panel], ..Default::default() }
                    .to_svg(),
            );
        }
        let row = |p: &(f64, f64)| BarRow { value: p.1, ..BarRow::default() };
        let rows = points.iter().map(row).collect();
        let groups = vec![BarGroup { heading: String::new(), rows }];
        read(&BarChart { groups, ..BarChart::default() }.to_svg());
    }
}

#[test]
fn huge_names_and_crowds_are_survived() {
    let huge = "Z\u{1}\u{1f300}<&\"'`* ".repeat(500);
    let mut chart = lines();
    chart.title.clone_from(&huge);
    chart.notes = vec![huge.clone(); 3];
    chart.x.label.clone_from(&huge);
    chart.y.label.clone_from(&huge);
    chart.series = vec![series(&huge, |t| 1e-9 * t); 60];
    (chart.width, chart.height) = (f64::NAN, -5.0);
    read(&chart.to_svg());
    let mut chart = shares();
    chart.width = f64::INFINITY;
    chart.panels[0].layers = vec![ShareLayer { name: huge.clone(), shares: vec![0.9; 51] }; 60];
    chart.panels[0].heading.clone_from(&huge);
    read(&chart.to_svg());
    let mut chart = bars();
    chart.groups[0].rows[0] =
        BarRow { name: huge.clone(), text: huge.clone(), detail: huge, ..BarRow::default() };
    read(&chart.to_svg());
}

#[cfg(feature = "png")]
#[test]
fn charts_become_pictures() {
    match png::render(&lines().to_svg(), 1.0) {
        Ok(bytes) => assert!(bytes.starts_with(b"\x89PNG") && bytes.len() > 5000),
        Err(error) => assert!(matches!(error, png::PngError::NoFont), "{error}"),
    }
    for scale in [0.0, -1.0, f32::NAN, 1e9] {
        assert!(png::render(&lines().to_svg(), scale).is_err());
    }
    assert!(png::render("no svg", 1.0).is_err());
}
