//! The audit: what is doubtful in a network that loads.
//!
//! Each family of checks is one small file with its limits in the messages.
//! Nothing here changes a network; the `check` verb prints the findings.

mod capture_limit;
mod continuation;
mod detailed_balance;
mod energy;
mod magnitude;
mod provenance;
mod ranges;
mod reach;
mod seams;
mod structure;

use crate::diagnostic::{self, Finding, Place};
use crate::rates::Conditions;

use super::{Extrapolate, Network, Reaction, Row};

/// What the audit looks for, and how strictly.
#[derive(Clone, Debug, PartialEq)]
pub struct AuditOptions {
    /// One note per row where otherwise one note counts many rows.
    pub every_row: bool,
    /// Lower end of the temperatures that matter, K.
    pub coldest: f64,
    /// Upper end of the temperatures that matter, K.
    pub hottest: f64,
    /// Ratio of held to continued coefficient from which a range that does not
    /// reach far enough is worth a warning.
    pub range_factor: f64,
    /// Jump between two pieces that is worth a warning.
    pub seam_factor: f64,
    /// Times the capture coefficient that is worth a warning.
    pub capture_factor: f64,
    /// Departure from detailed balance that is worth a warning.
    pub balance_factor: f64,
    /// Reaction enthalpies closer to zero than this are not judged, kJ mol^-1.
    pub enthalpy_tolerance_kj_mol: f64,
}

/// 5 to 3000 K; range factor 2, seam 1.5, capture 1.3 (measured coefficients
/// are good to about 25 percent), detailed balance 3, enthalpy 3 kJ/mol. All of
/// them our choices.
impl Default for AuditOptions {
    fn default() -> Self {
        Self {
            every_row: false,
            coldest: 5.0,
            hottest: 3000.0,
            range_factor: 2.0,
            seam_factor: 1.5,
            capture_factor: 1.3,
            balance_factor: 3.0,
            enthalpy_tolerance_kj_mol: 3.0,
        }
    }
}

/// Runs every family of checks; findings are sorted by severity and place.
pub fn audit(network: &Network, options: &AuditOptions) -> Vec<Finding> {
    let mut findings = Vec::new();
    let families = [
        structure::check,
        ranges::check,
        seams::check,
        magnitude::check,
        continuation::check,
        capture_limit::check,
        energy::check,
        detailed_balance::check,
        reach::check,
        provenance::check,
    ];
    for family in families {
        family(network, options, &mut findings);
    }
    diagnostic::sort(&mut findings);
    findings
}

/// The conditions under which coefficients are looked at: those of
/// [`Conditions::default`] at another temperature, dust being as warm as the
/// gas up to 100 K.
fn conditions_at(temperature: f64) -> Conditions {
    Conditions { temperature, dust_temperature: temperature.min(100.0), ..Conditions::default() }
}

/// The coefficient at a temperature (K), held at edges; none when it cannot be
/// computed, which other checks report.
fn held(network: &Network, reaction: &Reaction, temperature: f64) -> Option<f64> {
    network.coefficient(reaction, &conditions_at(temperature), Extrapolate::Hold).ok()
}

/// The coefficient of one row at a temperature (K), whatever its range.
fn of_row(network: &Network, reaction: &Reaction, row: &Row, temperature: f64) -> Option<f64> {
    network.row_coefficient(reaction, row, &conditions_at(temperature), temperature).ok()
}

/// Temperatures from `low` to `high`, evenly spaced in the logarithm.
fn temperatures(low: f64, high: f64, points: u32) -> impl Iterator<Item = f64> {
    let step = libm::log(high / low) / f64::from(points - 1);
    (0..points).map(move |at| low * libm::exp(step * f64::from(at)))
}

/// Where a reaction stands: its first row.
fn place_of(reaction: &Reaction) -> Place {
    reaction.rows[0].place.clone()
}

/// A file of the network beside the one that holds its rows.
fn file_beside(network: &Network, file: &str) -> Place {
    let rows = network.reactions.first().map_or("", |r| r.rows[0].place.file.as_str());
    match rows.rsplit_once('/') {
        Some((folder, _)) => Place::file(format!("{folder}/{file}")),
        None => Place::file(file),
    }
}

/// The ratio of two positive numbers as a factor of one or more; infinite when
/// one of them is zero and the other is not.
fn factor_between(a: f64, b: f64) -> f64 {
    let (low, high) = (a.min(b), a.max(b));
    if high <= 0.0 {
        1.0
    } else if low <= 0.0 {
        f64::INFINITY
    } else {
        high / low
    }
}

/// A factor for people.
fn factor_text(factor: f64) -> String {
    if factor < 1e3 {
        format!("a factor {factor:.1}")
    } else if factor < 1e6 {
        format!("a factor {factor:.0e}")
    } else {
        "more than a factor 1e6".to_string()
    }
}

/// A coefficient for people: two digits, or 0.
fn number_text(value: f64) -> String {
    if value > 0.0 { format!("{value:.1e}") } else { "0".to_string() }
}

/// Whether a coefficient does nothing in a cloud's life: below 1e-22 s^-1 or
/// cm^3 s^-1 (once in 3e10 yr at 1e4 cm^-3), 1e-36 cm^6 s^-1. Our choice.
fn is_nothing(reaction: &Reaction, value: f64) -> bool {
    value < if reaction.depends_on.len() > 2 { 1e-36 } else { 1e-22 }
}

#[cfg(test)]
mod tests;
