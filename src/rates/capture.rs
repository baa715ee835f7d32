//! Law `capture`: an ion and a neutral that react whenever they meet.
//!
//! The neutral's polarizability, and its dipole if it has one, pull the ion in;
//! the coefficient follows from species data alone.

use super::{Law, Numbers, Participants, RateError};
use crate::species::Species;
use crate::units::{ATOMIC_MASS_G, BOLTZMANN_ERG_K, CHARGE_ESU, CUBIC_ANGSTROM_CM3, DEBYE_ESU_CM};

/// Langevin capture: k = 2 pi q e sqrt(polarizability / mu), cm^3 s^-1.
///
/// # Units
/// `polarizability` in cubic angstrom, `reduced_mass` in u, `charge` in e (its
/// sign does not matter).
///
/// # Source
/// Langevin 1905, Ann. Chim. Phys. 5, 245; Gioumousis & Stevenson 1958, J. Chem.
/// Phys. 29, 294. Provenance: memory.
pub fn langevin(polarizability: f64, reduced_mass: f64, charge: i32) -> f64 {
    let volume = polarizability * CUBIC_ANGSTROM_CM3;
    let mass = reduced_mass * ATOMIC_MASS_G;
    let charge = f64::from(charge.abs()) * CHARGE_ESU;
    2.0 * std::f64::consts::PI * charge * (volume / mass).sqrt()
}

/// Ratio of capture by a polar molecule to Langevin capture,
/// with x = D / sqrt(2 polarizability k T):
/// 0.4767 x + 0.6200 for x >= 2; (x + 0.5090)^2 / 10.526 + 0.9754 below.
///
/// The fit is to classical trajectories with thermal rotation; near 10 K it is
/// an upper estimate. At x = 0 the fit gives 1.00002, which is returned as is;
/// callers take Langevin's formula when there is no dipole.
///
/// # Source
/// Su & Chesnavich 1982, J. Chem. Phys. 76, 5183. Provenance: memory.
pub fn polar_factor(x: f64) -> f64 {
    if x >= 2.0 { 0.4767 * x + 0.6200 } else { (x + 0.5090) * (x + 0.5090) / 10.526 + 0.9754 }
}

/// Su & Chesnavich's x for a dipole (debye), a polarizability (cubic angstrom)
/// and a temperature (K); dimensionless.
pub fn polar_parameter(dipole: f64, polarizability: f64, temperature: f64) -> f64 {
    let energy = BOLTZMANN_ERG_K * temperature;
    dipole * DEBYE_ESU_CM / (2.0 * polarizability * CUBIC_ANGSTROM_CM3 * energy).sqrt()
}

/// Capture rate coefficient of an ion and a neutral, cm^3 s^-1.
///
/// # Units
/// `dipole` in debye (0 for none), `polarizability` in cubic angstrom,
/// `reduced_mass` in u, `charge` in e, `temperature` in K.
///
/// # Source
/// As [`langevin`] and [`polar_factor`].
pub fn coefficient(
    polarizability: f64,
    dipole: f64,
    reduced_mass: f64,
    charge: i32,
    temperature: f64,
) -> f64 {
    let base = langevin(polarizability, reduced_mass, charge);
    if dipole > 0.0 {
        base * polar_factor(polar_parameter(dipole, polarizability, temperature))
    } else {
        base
    }
}

/// Capture coefficient of a pair of species at a temperature (K), cm^3 s^-1.
///
/// # Errors
/// When the pair is not an ion and a neutral, or data are missing. An empty
/// dipole counts as none.
pub fn of_pair(a: &Species, b: &Species, temperature: f64) -> Result<f64, RateError> {
    let (ion, neutral) = match (a.is_ion(), b.is_ion()) {
        (true, false) if b.is_neutral_gas() => (a, b),
        (false, true) if a.is_neutral_gas() => (b, a),
        _ => {
            let wanted = "an ion (not the electron) and a neutral of the gas".to_string();
            return Err(RateError::Shape { law: Law::Capture, wanted });
        }
    };
    let missing = |species: &Species, column| RateError::MissingData {
        law: Law::Capture,
        species: species.name.clone(),
        column,
    };
    let ion_mass = ion.mass_u.ok_or_else(|| missing(ion, "the mass"))?;
    let neutral_mass = neutral.mass_u.ok_or_else(|| missing(neutral, "the mass"))?;
    let polarizability =
        neutral.polarizability_a3.ok_or_else(|| missing(neutral, "polarizability_A3"))?;
    let reduced_mass = ion_mass * neutral_mass / (ion_mass + neutral_mass);
    let dipole = neutral.dipole_d.unwrap_or(0.0);
    Ok(coefficient(polarizability, dipole, reduced_mass, ion.charge, temperature))
}

/// The coefficient of a reaction: alpha times capture.
pub(super) fn of(
    numbers: Numbers,
    species: Participants<'_>,
    temperature: f64,
) -> Result<f64, RateError> {
    let [a, b] = species.reactants else {
        let wanted = "two reactants, an ion and a neutral".to_string();
        return Err(RateError::Shape { law: Law::Capture, wanted });
    };
    Ok(numbers.alpha * of_pair(a, b, temperature)?)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn langevin_follows_its_law() {
        // Prefactor worked by hand from CODATA e and u; the digits kept by hand.
        let cases = [
            ("unit inputs", 1.0, 1.0, 1, 2.3420e-9),
            ("fourfold polarizability doubles it", 4.0, 1.0, 1, 4.6840e-9),
            ("fourfold reduced mass halves it", 1.0, 4.0, 1, 1.1710e-9),
            ("a double charge doubles it, of either sign", 1.0, 1.0, -2, 4.6840e-9),
        ];
        for (case, polarizability, mass, charge, expected) in cases {
            let got = langevin(polarizability, mass, charge);
            assert!((got / expected - 1.0).abs() < 5e-5, "{case}: {got:e}");
        }
    }

    #[test]
    fn the_polar_factor_is_smooth_and_starts_at_one() {
        // The published fit joins at x = 2 to 2e-5 and passes 1 at x = 0.
        assert!((polar_factor(0.0) - 1.0).abs() < 1e-4);
        assert!((polar_factor(2.0) / polar_factor(2.0 - 1e-12) - 1.0).abs() < 1e-4);
    }

    #[test]
    fn capture_wants_an_ion_and_a_neutral() {
        let mut water = Species::new("H2O", None).unwrap();
        let ion = Species::new("H3+", None).unwrap();
        let other = Species::new("O-", None).unwrap();
        let electron = Species::new("e-", None).unwrap();
        assert!(matches!(of_pair(&ion, &water, 10.0), Err(RateError::MissingData { .. })));
        water.polarizability_a3 = Some(1.48);
        assert!(of_pair(&ion, &water, 10.0).is_ok());
        for pair in [[&ion, &other], [&electron, &water], [&water, &water]] {
            assert!(matches!(of_pair(pair[0], pair[1], 10.0), Err(RateError::Shape { .. })));
        }
    }
}
