//! Rate laws against published formulas and measured coefficients.

#![allow(clippy::unwrap_used, reason = "a test fails by panicking")]

use duskwater::rates::grain_collision::mean_speed;
use duskwater::rates::{Conditions, Numbers, capture, dust, thermal};
use duskwater::species::Species;
use duskwater::units::AVOGADRO_PER_MOL;

/// Polarizabilities (cubic angstrom) and dipoles (debye) from handbooks.
/// Provenance: memory, except those of H2, O and N2 (Schwerdtfeger & Nagle 2019,
/// Mol. Phys. 117, 1200 for O).
const NEUTRALS: [(&str, f64, f64); 13] = [
    ("H2", 0.802, 0.0),
    ("O", 0.785, 0.0),
    ("N2", 1.74, 0.0),
    ("CO", 1.95, 0.110),
    ("CO2", 2.91, 0.0),
    ("CH4", 2.59, 0.0),
    ("H2O", 1.48, 1.855),
    ("OH", 1.08, 1.655),
    ("NH3", 2.10, 1.472),
    ("HCN", 2.59, 2.985),
    ("H2S", 3.78, 0.974),
    ("CS", 4.20, 1.958),
    ("SO", 3.40, 1.55),
];

fn neutral(name: &str) -> Species {
    let (_, polarizability, dipole) =
        NEUTRALS.iter().find(|(known, ..)| *known == name).expect("a neutral of the table");
    let mut species = Species::new(name, None).expect("a readable name");
    species.polarizability_a3 = Some(*polarizability);
    species.dipole_d = Some(*dipole);
    species
}

fn captured(ion: &str, name: &str, temperature: f64) -> f64 {
    let ion = Species::new(ion, None).expect("a readable name");
    capture::of_pair(&ion, &neutral(name), temperature).expect("an ion and a neutral")
}

#[test]
fn an_ion_meets_a_molecule_without_dipole_at_the_langevin_rate() {
    // Langevin 1905, Ann. Chim. Phys. 5, 245; Gioumousis & Stevenson 1958, J.
    // Chem. Phys. 29, 294. Values worked independently with the polarizabilities
    // above, to four digits; cm3 s-1. Tolerance: those digits and the masses.
    let cases = [
        ("H3+", "CO", 1.980e-9),
        ("H3+", "N2", 1.870e-9),
        ("H3+", "O", 1.301e-9),
        ("H3+", "CH4", 2.363e-9),
        ("H3+", "CO2", 2.375e-9),
        ("H2+", "H2", 2.089e-9),
        ("O+", "H2", 1.567e-9),
        ("OH+", "H2", 1.562e-9),
        ("H2O+", "H2", 1.558e-9),
        ("C+", "CH4", 1.438e-9),
        ("He+", "N2", 1.651e-9),
        ("He+", "CO", 1.748e-9),
        ("HCO+", "CH4", 1.173e-9),
    ];
    for (ion, name, expected) in cases {
        let mut species = neutral(name);
        species.dipole_d = None;
        let ion = Species::new(ion, None).unwrap();
        let got = capture::of_pair(&ion, &species, 10.0).unwrap();
        assert!((got / expected - 1.0).abs() < 1e-3, "{} + {name}: {got:e}", ion.name);
    }
}

#[test]
fn a_polar_molecule_draws_ions_from_farther_when_cold() {
    // Su & Chesnavich 1982, J. Chem. Phys. 76, 5183, worked independently with
    // the data above at 10, 100 and 300 K; cm3 s-1.
    let cases = [
        ("H3+", "H2O", [2.559e-8, 8.843e-9, 5.569e-9]),
        ("C+", "H2O", [1.534e-8, 5.301e-9, 3.338e-9]),
        ("HCO+", "H2O", [1.235e-8, 4.268e-9, 2.688e-9]),
        ("N2H+", "H2O", [1.235e-8, 4.268e-9, 2.688e-9]),
        ("H3+", "OH", [2.289e-8, 7.881e-9, 4.948e-9]),
        ("H3+", "NH3", [2.083e-8, 7.484e-9, 4.876e-9]),
        ("HCO+", "NH3", [1.019e-8, 3.661e-9, 2.385e-9]),
        ("H3O+", "NH3", [1.113e-8, 4.001e-9, 2.607e-9]),
        ("H3+", "HCN", [3.987e-8, 1.358e-8, 8.438e-9]),
        ("HCO+", "HCN", [1.758e-8, 5.986e-9, 3.720e-9]),
        ("C+", "OH", [1.382e-8, 4.760e-9, 2.988e-9]),
        ("HCO+", "OH", [1.120e-8, 3.856e-9, 2.421e-9]),
        ("H3+", "H2S", [1.411e-8, 5.620e-9, 3.978e-9]),
        ("H3+", "CS", [2.650e-8, 9.589e-9, 6.284e-9]),
        ("H3+", "SO", [2.111e-8, 7.761e-9, 5.152e-9]),
        ("He+", "H2O", [2.275e-8, 7.863e-9, 4.952e-9]),
        ("H+", "H2O", [4.215e-8, 1.456e-8, 9.173e-9]),
        ("H3+", "CO", [2.689e-9, 2.113e-9, 2.046e-9]),
    ];
    for (ion, name, expected) in cases {
        for (temperature, expected) in [10.0, 100.0, 300.0].into_iter().zip(expected) {
            let got = captured(ion, name, temperature);
            let case = format!("{ion} + {name} at {temperature} K: {got:e}");
            assert!((got / expected - 1.0).abs() < 1e-3, "{case}");
        }
    }
}

#[test]
fn fast_proton_transfers_run_at_the_capture_rate() {
    // Measured at 300 K, cm3 s-1: ranges given with the evaluations. Provenance:
    // memory.
    let cases = [
        // Anicich & Huntress 1986, Astrophys. J. Suppl. 62, 553.
        ("H3+", "H2O", 4.1e-9, 7.7e-9),
        ("H3+", "CO", 1.4e-9, 2.2e-9),
        ("H3+", "NH3", 3.1e-9, 5.7e-9),
        ("N2H+", "H2O", 2.0e-9, 3.2e-9),
        ("C+", "H2O", 1.9e-9, 3.5e-9),
        // Rakshit 1982, Int. J. Mass Spectrom. Ion Phys. 41, 185.
        ("H3+", "N2", 1.5e-9, 2.2e-9),
        // Clary, Smith & Adams 1985, Chem. Phys. Lett. 119, 320.
        ("H3+", "HCN", 5.2e-9, 9.8e-9),
        // Adams, Smith & Grief 1978, Int. J. Mass Spectrom. Ion Phys. 26, 405.
        ("HCO+", "H2O", 2.0e-9, 3.2e-9),
        // Theard & Huntress 1974, J. Chem. Phys. 60, 2840.
        ("H2+", "H2", 1.8e-9, 2.4e-9),
    ];
    for (ion, name, low, high) in cases {
        let got = captured(ion, name, 300.0);
        assert!((low..=high).contains(&got), "{ion} + {name}: {got:e}");
    }
}

#[test]
fn slower_ion_reactions_stay_below_capture() {
    // Measured at 300 K, cm3 s-1. Provenance: memory.
    let cases = [
        // Jones, Birkinshaw & Twiddy 1981, Chem. Phys. Lett. 77, 484.
        ("OH+", "H2", 1.01e-9),
        ("H2O+", "H2", 6.4e-10),
        // Fehsenfeld 1976, Astrophys. J. 209, 638.
        ("H3+", "O", 8e-10),
    ];
    for (ion, name, measured) in cases {
        let limit = captured(ion, name, 300.0);
        assert!(measured < limit && limit < 3.0 * measured, "{ion} + {name}: {limit:e}");
    }
}

#[test]
fn the_thermal_law_carries_the_evaluations_of_combustion() {
    let molecule = AVOGADRO_PER_MOL;
    let temperatures = [300.0, 500.0, 1000.0, 2000.0];
    let cases = [
        // 3.56e-16 T^1.52 exp(-1736/T): Oldenborg et al. 1992, J. Phys. Chem. 96, 8426.
        ("OH + H2", (3.56e-16, 1.52, 1736.0), [6.361e-15, 1.400e-13, 2.278e-12, 1.556e-11]),
        // 8.5e-20 T^2.67 exp(-3160/T): Baulch et al. 2005, J. Phys. Chem. Ref. Data
        // 34, 757 (provenance: memory).
        ("O + H2", (8.5e-20, 2.67, 3160.0), [9.306e-18, 2.460e-15, 3.690e-13, 1.140e-11]),
        // 2.16e8 T^1.51 exp(-1726/T) cm3 mol-1 s-1: Smith et al. 1999, mechanism of
        // natural-gas combustion; listed at 300 and 1000 K.
        (
            "OH + H2, per mole",
            (2.16e8 / molecule, 1.51, 1726.0),
            [6.26e-15, f64::NAN, 2.163e-12, f64::NAN],
        ),
    ];
    for (case, (scale, beta, gamma), expected) in cases {
        let numbers = Numbers { alpha: scale * 300_f64.powf(beta), beta, gamma };
        for (temperature, expected) in temperatures.into_iter().zip(expected) {
            if expected.is_nan() {
                continue;
            }
            let got = thermal::coefficient(numbers, temperature);
            let case = format!("{case} at {temperature} K: {got:e}");
            assert!((got / expected - 1.0).abs() < 1e-3, "{case}");
        }
    }
}

#[test]
fn h2_forms_on_dust_as_fast_as_diffuse_clouds_ask() {
    // R = 1e-17 to 5e-17 cm3 s-1 near 80 K: Jura 1975, Astrophys. J. 197, 575.
    let numbers = Numbers { alpha: 3e-17, beta: 0.5, gamma: 0.0 };
    let conditions =
        Conditions { hydrogen_density: 1.0, dust_temperature: 15.0, ..Conditions::default() };
    let got = dust::h2_formation(numbers, &conditions, 80.0);
    assert!((1e-17..=5e-17).contains(&got), "{got:e}");
}

#[test]
fn carbon_monoxide_at_ten_kelvin_moves_at_87_metres_per_second() {
    // sqrt(8 k T / pi m) worked by hand: 8696 cm s-1.
    let got = mean_speed(28.010, 10.0);
    assert!((got / 8696.0 - 1.0).abs() < 1e-3, "{got}");
}
