//! Laws `cosmic_ray`, `cosmic_ray_photon` and `starlight`: one reactant, and
//! what passes through the cloud.

use super::shielding;
use super::{Conditions, Law, Numbers, Participants, RateError};
use crate::species::Species;

/// Direct effect of cosmic rays: alpha zeta, s^-1, zeta per H2 molecule and s.
///
/// # Source
/// Common practice; alpha carries the ratio to the ionization of H2.
pub fn cosmic_ray(alpha: f64, zeta: f64) -> f64 {
    alpha * zeta
}

/// Photons made inside the cloud by cosmic rays: alpha zeta / (1 - omega),
/// s^-1, with omega the albedo of dust, since dust competes for the photons.
///
/// # Range
/// Where dust, not the gas itself, absorbs most of these photons.
///
/// # Source
/// Gredel, Lepp, Dalgarno & Herbst 1989, ApJ 347, 289. Provenance: memory.
pub fn cosmic_ray_photon(alpha: f64, zeta: f64, albedo: f64) -> f64 {
    alpha * zeta / (1.0 - albedo)
}

/// Starlight without line shielding: alpha chi exp(-gamma A_V), s^-1.
///
/// # Units
/// `alpha` in s^-1 in the unshielded field of Draine (1978, ApJS 36, 595);
/// `field` in units of that field; `gamma` per magnitude; `extinction` in mag.
///
/// # Source
/// Common practice; the exponential is a fit to dust transfer.
pub fn starlight(alpha: f64, field: f64, gamma: f64, extinction: f64) -> f64 {
    alpha * field * libm::exp(-gamma * extinction)
}

/// Which shielding function a photoprocess has.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Shield {
    /// Dust alone.
    None,
    /// H2 by its own lines.
    H2,
    /// CO by its own lines and those of H2.
    Co,
    /// N2 by its own lines and those of H2.
    N2,
}

/// The shielding function of a reactant: the neutral gas molecules H2, CO and
/// N2, recognised by composition, whatever the products (their photoionization
/// lies beyond 13.6 eV).
pub fn shield_of(species: &Species) -> Shield {
    if !species.is_neutral_gas() {
        return Shield::None;
    }
    let atoms: Vec<(&str, u32)> =
        species.atoms.iter().map(|(element, count)| (element.as_str(), *count)).collect();
    match atoms.as_slice() {
        [("H", 2)] => Shield::H2,
        [("C", 1), ("O", 1)] => Shield::Co,
        [("N", 2)] => Shield::N2,
        _ => Shield::None,
    }
}

/// The factor by which lines shield a reactant under these conditions, 0 to 1.
pub fn shielding_factor(species: &Species, conditions: &Conditions) -> f64 {
    let c = conditions;
    match shield_of(species) {
        Shield::None => 1.0,
        Shield::H2 => shielding::h2(c.h2_column, c.doppler_width),
        Shield::Co => shielding::co(c.co_column, c.h2_column),
        Shield::N2 => shielding::n2(c.n2_column, c.h2_column),
    }
}

fn single(law: Law, species: Participants<'_>) -> Result<&Species, RateError> {
    match species.reactants {
        [one] => Ok(one),
        _ => Err(RateError::Shape { law, wanted: "one reactant".to_string() }),
    }
}

pub(super) fn of_cosmic_ray(
    numbers: Numbers,
    species: Participants<'_>,
    conditions: &Conditions,
) -> Result<f64, RateError> {
    single(Law::CosmicRay, species)?;
    Ok(cosmic_ray(numbers.alpha, conditions.cosmic_ray_ionization_rate))
}

pub(super) fn of_cosmic_ray_photon(
    numbers: Numbers,
    species: Participants<'_>,
    conditions: &Conditions,
) -> Result<f64, RateError> {
    single(Law::CosmicRayPhoton, species)?;
    let zeta = conditions.cosmic_ray_ionization_rate;
    Ok(cosmic_ray_photon(numbers.alpha, zeta, conditions.dust_albedo))
}

pub(super) fn of_starlight(
    numbers: Numbers,
    species: Participants<'_>,
    conditions: &Conditions,
) -> Result<f64, RateError> {
    let reactant = single(Law::Starlight, species)?;
    let c = conditions;
    let bare = starlight(numbers.alpha, c.radiation_field, numbers.gamma, c.visual_extinction);
    Ok(bare * shielding_factor(reactant, conditions))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn cosmic_ray_and_photon_laws_follow_their_formulas() {
        let cases = [
            ("direct", cosmic_ray(0.5, 1.3e-17), 6.5e-18),
            ("secondary photons", cosmic_ray_photon(970.0, 1e-17, 0.5), 1.94e-14),
            ("starlight at the surface", starlight(3.5e-10, 2.0, 1.7, 0.0), 7e-10),
            ("starlight inside", starlight(1e-10, 1.0, 2.0, 0.5), 1e-10 / std::f64::consts::E),
        ];
        for (case, got, expected) in cases {
            assert!((got / expected - 1.0).abs() < 1e-13, "{case}: {got:e}");
        }
    }

    #[test]
    fn only_h2_co_and_n2_have_line_shielding() {
        let cases = [
            ("H2", Shield::H2),
            ("CO", Shield::Co),
            ("N2", Shield::N2),
            ("H2+", Shield::None),
            ("CO+", Shield::None),
            ("H2O", Shield::None),
            ("CO(ice)", Shield::None),
            ("C", Shield::None),
        ];
        for (name, expected) in cases {
            assert_eq!(shield_of(&Species::new(name, None).unwrap()), expected, "{name}");
        }
    }
}
