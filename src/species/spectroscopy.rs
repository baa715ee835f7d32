//! Partition functions of common species, for checks of detailed balance.
//!
//! Electronic levels, rigid rotors and harmonic vibrations, without nuclear
//! spin (an H atom counts 2, not 4). From about 100 to 2000 K this is good to
//! a few percent, which is ample for telling a rate coefficient from a mistake.

mod data;

use crate::units::KELVIN_PER_WAVENUMBER;

use super::Species;

pub use data::MOLECULES;

/// What a species does besides moving.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Levels {
    /// Name, as networks write it.
    pub name: &'static str,
    /// Electronic levels: degeneracy and energy, cm^-1. For a [`Rotor::Pi`] the
    /// degeneracy is in the rotor and stands here as 1.
    pub electronic: &'static [(f64, f64)],
    /// How it rotates.
    pub rotor: Rotor,
    /// Vibrations: wavenumber of the fundamental, cm^-1, and degeneracy.
    pub vibrations: &'static [(f64, f64)],
}

/// A rigid rotor; constants in cm^-1.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Rotor {
    /// An atom.
    None,
    /// A linear molecule without orbital angular momentum.
    Linear {
        /// Rotational constant B of the ground vibrational level.
        b: f64,
        /// Symmetry number.
        symmetry: f64,
    },
    /// A linear molecule of two equal nuclei of spin 1/2 with the odd rotational
    /// levels three times as heavy (H2 and H2+).
    Hydrogen {
        /// Rotational constant B of the ground vibrational level.
        b: f64,
    },
    /// A diatomic in a doublet Pi state, between Hund's cases a and b (Hill &
    /// Van Vleck 1928, Phys. Rev. 32, 250).
    Pi {
        /// Rotational constant B of the ground vibrational level.
        b: f64,
        /// Spin-orbit constant A, negative when inverted.
        a: f64,
        /// Symmetry number.
        symmetry: f64,
    },
    /// A molecule that is not linear, with classical rotation.
    Bent {
        /// The three rotational constants.
        constants: [f64; 3],
        /// Symmetry number.
        symmetry: f64,
    },
}

/// Internal partition function at a temperature (K), dimensionless, counted
/// from the lowest level; none when the species has no data.
pub fn partition_function(name: &str, temperature: f64) -> Option<f64> {
    let levels = MOLECULES.iter().find(|levels| levels.name == name)?;
    // Everything in units of k T from here on: one wavenumber is x of them.
    let x = KELVIN_PER_WAVENUMBER / temperature;
    let electronic: f64 =
        levels.electronic.iter().map(|(weight, energy)| weight * libm::exp(-energy * x)).sum();
    let vibrations: f64 = levels
        .vibrations
        .iter()
        .map(|(wavenumber, times)| libm::pow(-libm::expm1(-wavenumber * x), -times))
        .product();
    Some(electronic * levels.rotor.partition_function(x) * vibrations)
}

impl Rotor {
    /// Partition function for one wavenumber = `x` k T.
    fn partition_function(self, x: f64) -> f64 {
        match self {
            Self::None => 1.0,
            Self::Linear { b, symmetry } => sum_levels(b, x, |_| 1.0) / symmetry,
            Self::Hydrogen { b } => sum_levels(b, x, |j| if j % 2 == 0 { 1.0 } else { 3.0 }) / 4.0,
            Self::Pi { b, a, symmetry } => sum_pi(b, a, x) / symmetry,
            Self::Bent { constants: [p, q, r], symmetry } => {
                (std::f64::consts::PI / (p * q * r * x * x * x)).sqrt() / symmetry
            }
        }
    }
}

/// Terms after which a rotational sum has converged for every B here at 3000 K.
const MOST_LEVELS: u32 = 400;

/// Sum of (2J+1) weight(J) exp(-B J(J+1)).
fn sum_levels(b: f64, x: f64, weight: impl Fn(u32) -> f64) -> f64 {
    (0..MOST_LEVELS)
        .map(|j| {
            let number = f64::from(j);
            (2.0 * number + 1.0) * weight(j) * libm::exp(-b * number * (number + 1.0) * x)
        })
        .sum()
}

/// Sum over both ladders of a doublet Pi state, each level twice for parity,
/// counted from its lowest level.
fn sum_pi(b: f64, a: f64, x: f64) -> f64 {
    let mut levels = Vec::new();
    for step in 1..=MOST_LEVELS {
        // z = J + 1/2; J = 1/2 exists on the Omega = 1/2 ladder alone.
        let z = f64::from(step);
        let weight = 2.0 * (2.0 * z);
        if step == 1 {
            levels.push((weight, b - a / 2.0));
            continue;
        }
        let mean = b * (z * z - 1.0);
        let half = 0.5 * ((a - 2.0 * b) * (a - 2.0 * b) + 4.0 * b * b * (z * z - 1.0)).sqrt();
        levels.push((weight, mean - half));
        levels.push((weight, mean + half));
    }
    let lowest = levels.iter().map(|(_, energy)| *energy).fold(f64::INFINITY, f64::min);
    levels.iter().map(|(weight, energy)| weight * libm::exp(-(energy - lowest) * x)).sum()
}

/// Equilibrium constant of a reaction that keeps the number of particles:
/// forward over reverse coefficient at a temperature (K), dimensionless.
///
/// None when the numbers of particles differ, or a mass, enthalpy or partition
/// function is missing.
///
/// # Source
/// Statistical mechanics (common practice); enthalpies at 0 K of the species,
/// partition functions of [`partition_function`].
pub fn equilibrium_constant(
    reactants: &[&Species],
    products: &[&Species],
    temperature: f64,
) -> Option<f64> {
    if reactants.len() != products.len() {
        return None;
    }
    let ln_side = |side: &[&Species]| -> Option<f64> {
        let mut total = 0.0;
        for species in side {
            let energy = species.enthalpy_kj_mol? * crate::units::KELVIN_PER_KJ_MOL / temperature;
            let inner = partition_function(&species.name, temperature)?;
            total += 1.5 * libm::log(species.mass_u?) + libm::log(inner) - energy;
        }
        Some(total)
    };
    Some(libm::exp(ln_side(products)? - ln_side(reactants)?))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn partition_functions_meet_values_worked_another_way() {
        // H2 at 300 K: level sum with energies 118.5, 354.4, 705.5, 1168.8 cm-1
        // (Huber & Herzberg 1979) by hand, over 4. OH: 4 x 2 parity states at 0
        // ... by the classical limit k T/B per ladder. O: 5 + 3 e^-0.759 + ...
        let cases = [
            ("H", 300.0, 2.0, 1e-12),
            ("O", 300.0, 5.0 + 3.0 * 0.4681 + 0.3367, 1e-3),
            ("H2", 300.0, 1.935, 0.02),
            ("CO", 300.0, 208.51 / 1.9225, 0.01),
        ];
        for (name, temperature, expected, tolerance) in cases {
            let got = partition_function(name, temperature).unwrap();
            assert!((got / expected - 1.0).abs() < tolerance, "{name}: {got}");
        }
        assert!(partition_function("unheard of", 300.0).is_none());
    }

    #[test]
    fn the_splitting_of_oh_is_the_measured_one() {
        // J = 1/2 of the upper ladder lies 126 cm-1 above J = 3/2 of the lower
        // (Huber & Herzberg 1979, provenance: memory): at a low temperature the
        // sum is 8 + 4 exp(-E) + higher levels.
        let x = 1.0 / 20.0;
        let got = sum_pi(18.535, -139.21, x);
        let expected = 8.0 + 4.0 * (-126.3 * x).exp() + 12.0 * (-83.7 * x).exp();
        assert!((got / expected - 1.0).abs() < 0.01, "{got} {expected}");
    }
}
