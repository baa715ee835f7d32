//! The list of laws: names, descriptions, and the way from a row to a number.
//!
//! To add a law: a variant here, its lines in the `match`es below (the compiler
//! lists them), and a file with its formula.

use super::{Conditions, Numbers, Participants, RateError, capture, dust, photon, thermal};

/// How a coefficient follows from a row.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum Law {
    /// alpha (T/300)^beta exp(-gamma/T); any number of reactants up to three.
    Thermal,
    /// alpha times the ion-molecule capture rate coefficient.
    Capture,
    /// alpha zeta.
    CosmicRay,
    /// alpha zeta / (1 - omega).
    CosmicRayPhoton,
    /// alpha chi exp(-gamma A_V), shielded for H2, CO and N2.
    Starlight,
    /// H2 formation on dust.
    DustH2,
    /// Recombination with or on dust.
    DustRecombination,
}

/// Rows of one equation whose laws share an axis are pieces of one coefficient
/// over temperature; rows on different axes are different processes that add.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum Axis {
    /// Collisions in the gas: `thermal` and `capture`.
    Collision,
    /// Any other law, alone.
    Of(Law),
}

/// Names kept for gas-ice exchange, which is not yet built.
const RESERVED: [&str; 4] =
    ["freeze_out", "thermal_desorption", "cosmic_ray_desorption", "photodesorption"];

/// Why a word is not a law.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum LawNameError {
    /// A law of gas-ice exchange, whose name is reserved.
    NotYetBuilt(String),
    /// Not a law at all.
    Unknown(String),
}

impl std::fmt::Display for LawNameError {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        match self {
            Self::NotYetBuilt(name) => write!(f, "law `{name}` is not yet built"),
            Self::Unknown(name) => write!(f, "there is no law `{name}`"),
        }
    }
}

impl std::error::Error for LawNameError {}

impl Law {
    /// Every law, in the order of the manual.
    pub const ALL: [Self; 7] = [
        Self::Thermal,
        Self::Capture,
        Self::CosmicRay,
        Self::CosmicRayPhoton,
        Self::Starlight,
        Self::DustH2,
        Self::DustRecombination,
    ];

    /// The word that stands in tables.
    pub fn name(self) -> &'static str {
        match self {
            Self::Thermal => "thermal",
            Self::Capture => "capture",
            Self::CosmicRay => "cosmic_ray",
            Self::CosmicRayPhoton => "cosmic_ray_photon",
            Self::Starlight => "starlight",
            Self::DustH2 => "dust_h2",
            Self::DustRecombination => "dust_recombination",
        }
    }

    /// The law of a word.
    ///
    /// # Errors
    /// When the word is reserved for later, or is no law.
    pub fn from_name(name: &str) -> Result<Self, LawNameError> {
        match Self::ALL.into_iter().find(|law| law.name() == name) {
            Some(law) => Ok(law),
            None if RESERVED.contains(&name) => Err(LawNameError::NotYetBuilt(name.to_string())),
            None => Err(LawNameError::Unknown(name.to_string())),
        }
    }

    /// One line for people: the formula.
    pub fn describe(self) -> &'static str {
        match self {
            Self::Thermal => "alpha (T/300)^beta exp(-gamma/T)",
            Self::Capture => {
                "alpha x ion-molecule capture (Langevin; Su & Chesnavich 1982 if polar)"
            }
            Self::CosmicRay => "alpha zeta, zeta per H2",
            Self::CosmicRayPhoton => "alpha zeta / (1 - omega), omega the dust albedo",
            Self::Starlight => "alpha chi exp(-gamma A_V) x shielding of H2, CO, N2",
            Self::DustH2 => "alpha (T/100)^beta S(T) n_H, S of Hollenbach & McKee 1979",
            Self::DustRecombination => {
                "alpha x collisions with grains (Draine & Sutin 1987), or alpha x effective \
                 recombination on dust x n_H (Weingartner & Draine 2001)"
            }
        }
    }

    /// The temperature axis that rows of this law lie on.
    pub fn axis(self) -> Axis {
        match self {
            Self::Thermal | Self::Capture => Axis::Collision,
            other => Axis::Of(other),
        }
    }

    /// Which of alpha, beta, gamma the law uses; the others want to be zero.
    pub fn uses(self) -> [bool; 3] {
        match self {
            Self::Thermal => [true, true, true],
            Self::Capture => [true, false, false],
            Self::CosmicRay | Self::CosmicRayPhoton | Self::DustRecombination => {
                [true, false, false]
            }
            Self::Starlight => [true, false, true],
            Self::DustH2 => [true, true, false],
        }
    }

    /// Whether the coefficient depends on the gas temperature.
    pub fn depends_on_temperature(self) -> bool {
        !matches!(self, Self::CosmicRay | Self::CosmicRayPhoton | Self::Starlight)
    }

    /// The coefficient at `temperature` (K, which may be the edge of a row
    /// instead of the gas temperature in `conditions`), in s^-1, cm^3 s^-1 or
    /// cm^6 s^-1 by the number of species in [`Law::depends_on`].
    ///
    /// # Errors
    /// When the law does not apply to these species; never because of the
    /// conditions, so that a reaction accepted once is accepted always.
    pub fn coefficient(
        self,
        numbers: Numbers,
        species: Participants<'_>,
        conditions: &Conditions,
        temperature: f64,
    ) -> Result<f64, RateError> {
        match self {
            Self::Thermal => thermal::of(numbers, species, temperature),
            Self::Capture => capture::of(numbers, species, temperature),
            Self::CosmicRay => photon::of_cosmic_ray(numbers, species, conditions),
            Self::CosmicRayPhoton => photon::of_cosmic_ray_photon(numbers, species, conditions),
            Self::Starlight => photon::of_starlight(numbers, species, conditions),
            Self::DustH2 => dust::of_h2(numbers, species, conditions, temperature),
            Self::DustRecombination => {
                dust::of_recombination(numbers, species, conditions, temperature)
            }
        }
    }

    /// Which of the reactants' densities multiply the coefficient, as positions
    /// in the list of reactants.
    pub fn depends_on(self, species: Participants<'_>) -> Vec<usize> {
        match self {
            Self::DustH2 => vec![0],
            Self::DustRecombination if !species.reactants.iter().any(|s| s.is_grain()) => {
                let ion = species.reactants.iter().position(|s| s.is_ion());
                ion.into_iter().collect()
            }
            _ => (0..species.reactants.len()).collect(),
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_law_is_found_by_its_name_and_reserved_names_say_so() {
        for law in Law::ALL {
            assert_eq!(Law::from_name(law.name()), Ok(law));
            assert!(!law.describe().is_empty());
        }
        for name in RESERVED {
            assert!(Law::from_name(name).unwrap_err().to_string().contains("not yet built"));
        }
        assert!(matches!(Law::from_name("Thermal"), Err(LawNameError::Unknown(_))));
    }
}
