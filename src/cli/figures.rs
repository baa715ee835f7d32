//! Figures of commands, written to files.

use std::collections::HashMap;
use std::path::Path;

use super::exit::Stop;
use super::output::Output;
use super::{channel_text, header, shipped};
use crate::analysis::channels::{Channels, Role, rank};
use crate::cloud::{Evolution, Model};
use crate::diagnostic::{Finding, Place};
use crate::report::figure::{Axis, LineChart, Series, ShareLayer, SharePanel, StackedShares};

/// Points per decade of time.
const PER_DECADE: i32 = 20;
/// Curves that a figure keeps apart.
const MOST_CURVES: usize = 14;
/// Bands per panel; the rest is one band.
const MOST_BANDS: usize = 7;
/// Decades shown below the highest curve.
const DECADES: i32 = 12;

/// Draws the abundances of the shown species over time.
pub(super) fn abundances(
    model: &Model,
    shown: &[usize],
    path: &Path,
    output: &mut Output,
) -> Result<(), Stop> {
    let Evolution { points, .. } = model.evolve_to(&times(model));
    let series: Vec<Series> = shown
        .iter()
        .take(MOST_CURVES)
        .map(|&species| Series {
            name: model.network.species[species].name.clone(),
            points: points.iter().map(|p| (p.time_yr, p.abundances[species])).collect(),
        })
        .collect();
    let highest = series
        .iter()
        .flat_map(|s| s.points.iter().map(|p| p.1))
        .filter(|v| v.is_finite())
        .fold(1e-30, f64::max);
    let top = highest.log10().ceil();
    let lowest = series
        .iter()
        .flat_map(|s| s.points.iter().map(|p| p.1))
        .filter(|&v| v > 10f64.powf(top - f64::from(DECADES)))
        .fold(highest, f64::min);
    let chart = LineChart {
        title: title(model),
        subtitle: conditions(model),
        x: Axis::log("time (yr)"),
        y: Axis::log("abundance *n*(X)/*n*_{H}")
            .between(10f64.powf(lowest.log10().floor()), 10f64.powf(top)),
        series,
        notes: dropped(shown.len(), MOST_CURVES, "species"),
        ..LineChart::default()
    };
    save(path, &chart.to_svg(), output)
}

/// Draws the shares of a species' channels over time.
pub(super) fn channels(
    model: &Model,
    species: usize,
    path: &Path,
    output: &mut Output,
) -> Result<(), Stop> {
    let Evolution { points, .. } = model.evolve_to(&times(model));
    let ranked: Vec<Channels> = points
        .iter()
        .map(|p| rank(&model.network, &model.reaction_rates(&p.abundances), species))
        .collect();
    let name = &model.network.species[species].name;
    let panel =
        |role: Role, heading: String| SharePanel { heading, layers: layers(model, &ranked, role) };
    let chart = StackedShares {
        title: format!("Channels of `{name}`: {}", title(model)),
        subtitle: conditions(model),
        x: Axis::log("time (yr)"),
        times: points.iter().map(|p| p.time_yr).collect(),
        panels: vec![
            panel(Role::Formation, format!("What makes `{name}`")),
            panel(Role::Destruction, format!("What destroys `{name}`")),
        ],
        ..StackedShares::default()
    };
    save(path, &chart.to_svg(), output)
}

/// The channels that matter most at some time, with their shares over time.
fn layers(model: &Model, ranked: &[Channels], role: Role) -> Vec<ShareLayer> {
    let mut largest: HashMap<usize, f64> = HashMap::new();
    for channel in ranked.iter().flat_map(|r| r.of(role)) {
        let seen = largest.entry(channel.reaction).or_default();
        *seen = seen.max(channel.share);
    }
    let mut order: Vec<(usize, f64)> = largest.into_iter().filter(|c| c.1 > 0.01).collect();
    order.sort_by(|a, b| b.1.total_cmp(&a.1).then(a.0.cmp(&b.0)));
    order
        .into_iter()
        .take(MOST_BANDS)
        .map(|(reaction, _)| {
            let r = &model.network.reactions[reaction];
            let share = |ranked: &Channels| {
                ranked.of(role).find(|c| c.reaction == reaction).map_or(0.0, |c| c.share)
            };
            ShareLayer {
                name: format!("{}{}", r.equation, channel_text::law_mark(r.law().name())),
                shares: ranked.iter().map(share).collect(),
            }
        })
        .collect()
}

/// Times even in their logarithm, from early to the end of the run.
fn times(model: &Model) -> Vec<f64> {
    let end = model.run.times.output_yr.last().copied().unwrap_or(1.0).max(1e-6);
    let first =
        model.run.times.output_yr.iter().copied().find(|&t| t > 0.0).unwrap_or(end).min(end * 1e-2)
            * 0.1;
    let count = ((end / first).log10() * f64::from(PER_DECADE)).ceil() as i32;
    (0..=count).map(|i| end * 10f64.powf(f64::from(i - count) / f64::from(PER_DECADE))).collect()
}

fn title(model: &Model) -> String {
    if model.run.title.is_empty() { model.run.name.clone() } else { model.run.title.clone() }
}

fn conditions(model: &Model) -> String {
    let c = &model.run.conditions;
    format!(
        "*n*_{{H}} = {} cm^{{-3}}, *T* = {} K, ζ = {} s^{{-1}} per `H2`, *A*_{{V}} = {} mag, χ = {}; network {}",
        header::number(c.hydrogen_density),
        header::number(c.temperature),
        header::number(c.cosmic_ray_ionization_rate),
        header::number(c.visual_extinction),
        header::number(c.radiation_field),
        model.network.name,
    )
}

fn dropped(count: usize, most: usize, what: &str) -> Vec<String> {
    if count > most {
        vec![format!("{} more {what} are not drawn", count - most)]
    } else {
        Vec::new()
    }
}

/// Writes a figure in the form that the file's ending asks for.
fn save(path: &Path, svg: &str, output: &mut Output) -> Result<(), Stop> {
    let ending = path.extension().and_then(|e| e.to_str()).unwrap_or("").to_lowercase();
    let refuse = |message: &str, remedy: &str| {
        Stop::from(
            Finding::error("output-figure", Place::file(path.display().to_string()), message)
                .remedy(remedy),
        )
    };
    match ending.as_str() {
        "svg" => shipped::write(path, svg.as_bytes())?,
        "png" => {
            #[cfg(feature = "png")]
            {
                let bytes = crate::report::figure::png::render(svg, 2.0)
                    .map_err(|error| refuse(&error.to_string(), "draw it as .svg"))?;
                shipped::write(path, &bytes)?;
            }
            #[cfg(not(feature = "png"))]
            return Err(refuse(
                "this build cannot draw PNG",
                "name the file .svg, or build with --features png",
            ));
        }
        _ => {
            return Err(refuse(
                "figures are .svg or .png files",
                "give the file one of these endings",
            ));
        }
    }
    output.remark(&format!("figure written to {}", path.display()));
    Ok(())
}
