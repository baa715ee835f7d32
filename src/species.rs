//! Species: what a name says about atoms, charge and phase, and reference data.
//!
//! A name such as `CH3OH2+` is read into a [`Formula`]; a [`Species`] adds the
//! mass and whatever reference data its table gives. Where a name does not say
//! what it is made of, a composition (`H:2 O:1`) does, and may use elements
//! that nobody has heard of, which is handy in test networks.

pub mod elements;
mod formula;
pub mod spectroscopy;

use crate::units::ELECTRON_MASS_U;

pub use formula::{Formula, FormulaError, FormulaErrorKind, GRAIN, Phase};

/// One species of a network.
#[derive(Clone, Debug, PartialEq)]
pub struct Species {
    /// The name as the network writes it, e.g. `H3O+`.
    pub name: String,
    /// Elements and counts, sorted by element; dust counts as the element
    /// `grain`. Empty for the electron.
    pub atoms: Vec<(String, u32)>,
    /// Charge in units of e.
    pub charge: i32,
    /// Where it is: gas, ice or dust.
    pub phase: Phase,
    /// Mass, u; none when an element without a known weight is in it.
    pub mass_u: Option<f64>,
    /// Formation enthalpy at 0 K, kJ mol^-1, electron at rest.
    pub enthalpy_kj_mol: Option<f64>,
    /// Polarizability, cubic angstrom.
    pub polarizability_a3: Option<f64>,
    /// Permanent dipole moment, debye.
    pub dipole_d: Option<f64>,
    /// Key of the source of the data.
    pub source: String,
    /// How the data were obtained: `seen`, `memory`, ...
    pub provenance: String,
    /// Free text.
    pub note: String,
}

impl Species {
    /// A species without reference data, from its name and, where the name
    /// does not say it, its composition.
    ///
    /// # Errors
    /// When the name or the composition cannot be read, or the name holds an
    /// unknown element and no composition is given.
    pub fn new(name: &str, composition: Option<&str>) -> Result<Self, FormulaError> {
        let formula = match composition {
            Some(text) => Formula::with_composition(name, text)?,
            None => Formula::parse(name)?,
        };
        Ok(Self {
            name: name.to_string(),
            mass_u: formula.mass_u(),
            atoms: formula.atoms,
            charge: formula.charge,
            phase: formula.phase,
            enthalpy_kj_mol: None,
            polarizability_a3: None,
            dipole_d: None,
            source: String::new(),
            provenance: String::new(),
            note: String::new(),
        })
    }

    /// How many atoms of `element` it holds.
    pub fn count(&self, element: &str) -> u32 {
        self.atoms.iter().find(|(name, _)| name == element).map_or(0, |(_, count)| *count)
    }

    /// Whether this is the electron: no atoms, charge -1.
    pub fn is_electron(&self) -> bool {
        self.atoms.is_empty() && self.charge == -1
    }

    /// Whether this is a charged particle of the gas other than the electron.
    pub fn is_ion(&self) -> bool {
        self.charge != 0 && self.phase == Phase::Gas && !self.is_electron()
    }

    /// Whether this is a neutral of the gas.
    pub fn is_neutral_gas(&self) -> bool {
        self.charge == 0 && self.phase == Phase::Gas
    }

    /// Whether this is a dust grain of any charge.
    pub fn is_grain(&self) -> bool {
        self.phase == Phase::Dust
    }
}

/// Mass of a composition and charge, u; none when an element has no weight.
pub(crate) fn mass_u(atoms: &[(String, u32)], charge: i32) -> Option<f64> {
    let mut total = 0.0;
    for (element, count) in atoms {
        total += elements::weight_u(element)? * f64::from(*count);
    }
    Some(total - f64::from(charge) * ELECTRON_MASS_U)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn masses_come_from_atoms_less_the_missing_electrons() {
        // Atomic weights: IUPAC 2021 abridged; electron: CODATA 2018.
        let cases = [
            ("H2O", Some(2.0 * 1.008 + 15.999)),
            ("H+", Some(1.008 - 5.48579909065e-4)),
            ("e-", Some(5.48579909065e-4)),
            ("grain", None),
        ];
        for (name, expected) in cases {
            let got = Species::new(name, None).unwrap().mass_u;
            match (got, expected) {
                (Some(got), Some(expected)) => {
                    assert!((got / expected - 1.0).abs() < 1e-12, "{name}: {got}");
                }
                (got, expected) => assert_eq!(got.is_some(), expected.is_some(), "{name}"),
            }
        }
    }

    #[test]
    fn kinds_are_told_apart() {
        let cases = [
            ("e-", [true, false, false, false]),
            ("H3+", [false, true, false, false]),
            ("O", [false, false, true, false]),
            ("grain-", [false, false, false, true]),
            ("H2O(ice)", [false, false, false, false]),
        ];
        for (name, expected) in cases {
            let s = Species::new(name, None).unwrap();
            let got = [s.is_electron(), s.is_ion(), s.is_neutral_gas(), s.is_grain()];
            assert_eq!(got, expected, "{name}");
        }
    }
}
