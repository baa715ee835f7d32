//! Constants of nature with their sources, and quantities written by people.
//!
//! Everything below computes in one set of units: cm, s, K, u (atomic mass),
//! erg and, for charges, electrostatic units. Times that people see are in
//! years of 365.25 days. [`parse_quantity`] turns `"0.3 Myr"` or `"2e4 cm-3"`
//! into a number in the documented unit of its [`Dimension`].

mod quantity;

pub use quantity::{Dimension, parse_quantity};

/// Boltzmann constant k_B, erg K^-1. Exact since the 2019 SI; CODATA 2018,
/// Tiesinga et al. 2021, Rev. Mod. Phys. 93, 025010.
pub const BOLTZMANN_ERG_K: f64 = 1.380649e-16;

/// Planck constant h, erg s. Exact since the 2019 SI; CODATA 2018.
pub const PLANCK_ERG_S: f64 = 6.62607015e-27;

/// Speed of light c, cm s^-1. Exact; CODATA 2018.
pub const LIGHT_CM_S: f64 = 2.99792458e10;

/// Elementary charge e, electrostatic units (erg^1/2 cm^1/2). From the exact
/// 1.602176634e-19 C times c/10; CODATA 2018.
pub const CHARGE_ESU: f64 = 1.602176634e-19 * 2.99792458e9;

/// Unified atomic mass unit u, g. CODATA 2018: 1.66053906660(50)e-24.
pub const ATOMIC_MASS_G: f64 = 1.66053906660e-24;

/// Electron mass, u. CODATA 2018: 5.48579909065(16)e-4.
pub const ELECTRON_MASS_U: f64 = 5.48579909065e-4;

/// Electronvolt, erg. Exact since the 2019 SI; CODATA 2018.
pub const ELECTRONVOLT_ERG: f64 = 1.602176634e-12;

/// Avogadro constant, mol^-1. Exact since the 2019 SI; CODATA 2018.
pub const AVOGADRO_PER_MOL: f64 = 6.02214076e23;

/// Temperature that carries 1 kJ mol^-1, K: 1e10 erg / (N_A k_B) = 120.272.
pub const KELVIN_PER_KJ_MOL: f64 = 1e10 / (AVOGADRO_PER_MOL * BOLTZMANN_ERG_K);

/// Temperature that carries one wavenumber, K cm: h c / k_B = 1.438777.
pub const KELVIN_PER_WAVENUMBER: f64 = PLANCK_ERG_S * LIGHT_CM_S / BOLTZMANN_ERG_K;

/// Year of 365.25 days (Julian year), s. Exact; IAU style manual 1989.
pub const YEAR_S: f64 = 3.15576e7;

/// Cubic angstrom, cm^3.
pub const CUBIC_ANGSTROM_CM3: f64 = 1e-24;

/// Debye, electrostatic units of dipole moment (esu cm). Exact by definition.
pub const DEBYE_ESU_CM: f64 = 1e-18;

/// Micrometre, cm.
pub const MICROMETRE_CM: f64 = 1e-4;

/// Parsec, cm: 648000/pi astronomical units of 1.495978707e13 cm (IAU 2015
/// resolution B2, IAU 2012 resolution B2).
pub const PARSEC_CM: f64 = 1.495978707e13 * 648_000.0 / std::f64::consts::PI;

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn derived_constants_agree_with_published_digits() {
        // CODATA 2018 (Tiesinga et al. 2021) except the parsec (IAU 2015 B2).
        let cases = [
            ("e in esu", CHARGE_ESU, 4.80320471e-10),
            ("K per kJ/mol", KELVIN_PER_KJ_MOL, 120.27236),
            ("K per cm-1", KELVIN_PER_WAVENUMBER, 1.438776877),
            ("parsec", PARSEC_CM, 3.0856775815e18),
        ];
        for (name, got, expected) in cases {
            assert!((got / expected - 1.0).abs() < 1e-7, "{name}: {got:e}");
        }
    }
}
