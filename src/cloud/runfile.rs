//! The run file: what a run is, read from TOML with every finding at its place.

mod times;
mod values;

use times::read_times;
use values::{missing, quantity, section, text, wrong_type};

use super::document::{Document, Section, Value};
use crate::diagnostic::{Finding, Place, nearest};
use crate::network::Extrapolate;
use crate::rates::Conditions;
use crate::units::Dimension;

/// Everything a run file says, with defaults filled in.
#[derive(Clone, Debug, PartialEq)]
pub struct RunFile {
    /// Name of the text, for findings.
    pub name: String,
    /// Title for people.
    pub title: String,
    /// A shipped network's name, or a folder.
    pub network: String,
    /// Where the network is named.
    pub network_place: Place,
    /// What a coefficient does outside its temperature range.
    pub extrapolate: Extrapolate,
    /// Local conditions.
    pub conditions: Conditions,
    /// Start abundances n(X)/n_H, with the place of each.
    pub start: Vec<(String, Place, f64)>,
    /// Where the start is given.
    pub start_place: Place,
    /// Times of output.
    pub times: Times,
    /// Tolerances.
    pub solver: Solver,
    /// Species to look at first, with the place of each.
    pub watch: Vec<(String, Place)>,
}

/// Output times.
#[derive(Clone, Debug, PartialEq)]
pub struct Times {
    /// Ascending times in years; the first is 0.
    pub output_yr: Vec<f64>,
}

/// Tolerances of the integration.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Solver {
    /// Error per step relative to each abundance.
    pub relative_tolerance: f64,
    /// Error per step in each abundance besides.
    pub absolute_tolerance: f64,
}

impl RunFile {
    /// Reads a run file. `overrides` are `key.path=value` assignments.
    ///
    /// On success the findings that are not errors come along.
    ///
    /// # Errors
    /// Every finding, if one of them is an error.
    pub fn read(
        name: &str,
        text: &str,
        overrides: &[String],
    ) -> Result<(Self, Vec<Finding>), Vec<Finding>> {
        let mut document = Document::read(name, text)?;
        let mut findings: Vec<Finding> =
            overrides.iter().filter_map(|o| document.set(o).err()).collect();
        let run = read_root(name, &document, &mut findings);
        match run {
            Some(run) if !findings.iter().any(Finding::is_error) => Ok((run, findings)),
            _ => Err(findings),
        }
    }
}

fn read_root(name: &str, document: &Document, findings: &mut Vec<Finding>) -> Option<RunFile> {
    let mut root = Section::open("", document.root(), findings)?;
    let title = text(&mut root, "title", findings).map_or_else(String::new, |t| t.0);
    let network = text(&mut root, "network", findings);
    let extrapolate =
        text(&mut root, "extrapolate", findings).map(|(word, place)| match word.as_str() {
            "hold" => Extrapolate::Hold,
            "formula" => Extrapolate::Formula,
            _ => {
                findings.push(
                    Finding::error("run-value", place, format!("extrapolate is `{word}`"))
                        .remedy("use \"hold\" (the value at the edge) or \"formula\""),
                );
                Extrapolate::Hold
            }
        });
    let conditions = section(&mut root, "cloud", true, findings, read_cloud);
    let start = section(&mut root, "start", true, findings, read_start);
    let start_place = document_place(document, "start");
    let times = section(&mut root, "times", true, findings, read_times);
    let solver = section(&mut root, "solver", false, findings, read_solver);
    let watch = section(&mut root, "watch", false, findings, read_watch);
    if let Some(sweep) = root.take("sweep") {
        findings.push(
            Finding::warning(
                "run-sweep",
                sweep.place.clone(),
                "this version runs single clouds: [sweep] is left aside",
            )
            .remedy("the one cloud of [cloud] is run"),
        );
    }
    if network.is_none() {
        missing(&root, "network", findings);
    }
    root.close(findings);
    let (network, network_place) = network?;
    Some(RunFile {
        name: name.to_owned(),
        title,
        network,
        network_place,
        extrapolate: extrapolate.unwrap_or(Extrapolate::Hold),
        conditions: conditions?,
        start: start?,
        start_place,
        times: times?,
        solver: solver.unwrap_or(Solver { relative_tolerance: 1e-5, absolute_tolerance: 1e-20 }),
        watch: watch.unwrap_or_default(),
    })
}

fn document_place(document: &Document, section: &str) -> Place {
    match &document.root().value {
        Value::Table(entries) => entries
            .iter()
            .find(|(name, _, _)| name == section)
            .map_or_else(|| document.root().place.clone(), |(_, place, _)| place.clone()),
        _ => document.root().place.clone(),
    }
}

fn read_cloud(section: &mut Section<'_>, findings: &mut Vec<Finding>) -> Option<Conditions> {
    let mut c = Conditions::default();
    let mut places: Vec<(&'static str, Place)> = Vec::new();
    let before = findings.len();
    let mut take = |section: &mut Section<'_>, key, dimension, needed, slot: &mut f64| -> bool {
        let Some(node) = section.take(key) else {
            if needed {
                missing(section, key, findings);
            }
            return false;
        };
        if let Some(value) = quantity(&section.path(key), node, dimension, findings) {
            *slot = value;
        }
        places.push((key, node.place.clone()));
        true
    };
    use Dimension as D;
    take(section, "hydrogen_density", D::NumberDensity, true, &mut c.hydrogen_density);
    take(section, "temperature", D::Temperature, true, &mut c.temperature);
    c.dust_temperature = c.temperature;
    take(section, "dust_temperature", D::Temperature, false, &mut c.dust_temperature);
    take(section, "cosmic_ray_ionization_rate", D::Rate, true, &mut c.cosmic_ray_ionization_rate);
    take(section, "visual_extinction", D::Extinction, true, &mut c.visual_extinction);
    take(section, "radiation_field", D::Dimensionless, false, &mut c.radiation_field);
    c = c.with_default_columns();
    take(section, "h2_column", D::ColumnDensity, false, &mut c.h2_column);
    take(section, "co_column", D::ColumnDensity, false, &mut c.co_column);
    take(section, "n2_column", D::ColumnDensity, false, &mut c.n2_column);
    take(section, "dust_albedo", D::Dimensionless, false, &mut c.dust_albedo);
    take(section, "gas_to_dust", D::Dimensionless, false, &mut c.gas_to_dust);
    take(section, "doppler_width", D::Speed, false, &mut c.doppler_width);
    take(section, "grain_radius", D::Length, false, &mut c.grain_radius);
    take(
        section,
        "reference_electron_abundance",
        D::Dimensionless,
        false,
        &mut c.reference_electron_abundance,
    );
    for problem in c.validate() {
        let place = places
            .iter()
            .find(|(key, _)| *key == problem.key)
            .map_or_else(|| section.place(), |(_, place)| place.clone());
        findings.push(
            Finding::error("run-range", place, format!("cloud.{problem}"))
                .remedy("choose a value inside the range"),
        );
    }
    (findings[before..].iter().all(|f| !f.is_error())).then_some(c)
}

fn read_start(
    section: &mut Section<'_>,
    findings: &mut Vec<Finding>,
) -> Option<Vec<(String, Place, f64)>> {
    let mut start = Vec::new();
    for (name, place, node) in section.take_rest() {
        let path = section.path(name);
        let Some(value) = quantity(&path, node, Dimension::Dimensionless, findings) else {
            continue;
        };
        if value < 0.0 {
            findings.push(
                Finding::error(
                    "run-range",
                    node.place.clone(),
                    format!("`{path}` = {value} is negative"),
                )
                .remedy("an abundance n(X)/n_H is zero or more"),
            );
            continue;
        }
        start.push((name.clone(), place.clone(), value));
    }
    Some(start)
}

fn read_solver(section: &mut Section<'_>, findings: &mut Vec<Finding>) -> Option<Solver> {
    let mut tolerance = |section: &mut Section<'_>, key, default: f64, low: f64, high: f64| {
        let Some(node) = section.take(key) else { return default };
        let path = section.path(key);
        match quantity(&path, node, Dimension::Dimensionless, findings) {
            Some(value) if (low..=high).contains(&value) => value,
            Some(value) => {
                findings.push(
                    Finding::error(
                        "run-range",
                        node.place.clone(),
                        format!("`{path}` = {value:e} is outside {low:e} to {high:e}"),
                    )
                    .remedy(format!("the default is {default:e}")),
                );
                default
            }
            None => default,
        }
    };
    Some(Solver {
        relative_tolerance: tolerance(section, "relative_tolerance", 1e-5, 1e-13, 0.1),
        absolute_tolerance: tolerance(section, "absolute_tolerance", 1e-20, 1e-40, 1e-6),
    })
}

fn read_watch(
    section: &mut Section<'_>,
    findings: &mut Vec<Finding>,
) -> Option<Vec<(String, Place)>> {
    let node = section.take("species")?;
    let Value::List(items) = &node.value else {
        wrong_type(&section.path("species"), node, "a list of species names", findings);
        return None;
    };
    let mut names = Vec::new();
    for item in items {
        match &item.value {
            Value::Text(name) => names.push((name.clone(), item.place.clone())),
            _ => wrong_type(&section.path("species"), item, "a species name in quotes", findings),
        }
    }
    Some(names)
}

/// A finding for a species that the network does not have.
pub(super) fn unknown_species<'a>(
    name: &str,
    place: Place,
    known: impl Iterator<Item = &'a str>,
) -> Finding {
    let remedy = nearest(name, known).map_or_else(
        || "`duskwater check NETWORK` lists the species of a network".to_owned(),
        |near| format!("did you mean `{near}`?"),
    );
    Finding::error("run-unknown-species", place, format!("the network has no species `{name}`"))
        .remedy(remedy)
}
