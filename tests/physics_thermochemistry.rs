//! Thermochemistry: reaction enthalpies and equilibrium constants.

#![allow(clippy::unwrap_used, reason = "a test fails by panicking")]

use duskwater::species::Species;
use duskwater::species::spectroscopy::equilibrium_constant;
use duskwater::units::KELVIN_PER_KJ_MOL;

/// Formation enthalpies at 0 K, kJ/mol, electron at rest: Active Thermochemical
/// Tables 1.112 (Ruscic et al. 2004, J. Phys. Chem. A 108, 9979), except S (Cox,
/// Wagman & Medvedev 1989), S+ (Martin et al. 1990), HS+ (Hsu et al. 1994,
/// memory) and H2S+ (Fischer et al. 1993, memory).
#[rustfmt::skip]
const ENTHALPIES: &[(&str, f64)] = &[
    ("e-", 0.0),
    ("H", 216.034),
    ("H+", 1528.084),
    ("H2", 0.0),
    ("H3+", 1110.304),
    ("He", 0.0),
    ("He+", 2372.322),
    ("O", 246.844),
    ("O+", 1560.786),
    ("O2", 0.0),
    ("O2H+", 1110.9),
    ("OH", 37.262),
    ("OH+", 1293.201),
    ("H2O", -238.919),
    ("H2O+", 978.484),
    ("H3O+", 605.74),
    ("C", 711.388),
    ("C+", 1797.841),
    ("CH", 592.83),
    ("CH+", 1620.15),
    ("CO", -113.805),
    ("HCO+", 827.83),
    ("HOC+", 986.02),
    ("CO2", -393.108),
    ("N", 470.573),
    ("N+", 1872.901),
    ("N2", 0.0),
    ("N2H+", 1042.76),
    ("NH", 358.74),
    ("NH+", 1658.98),
    ("NH3+", 944.272),
    ("NH4+", 643.02),
    ("NO", 90.585),
    ("CN", 436.68),
    ("HCN", 129.675),
    ("HNC", 191.58),
    ("S", 274.92),
    ("S+", 1274.51),
    ("HS+", 1147.24),
    ("H2S+", 992.35),
];

/// Both sides of an equation, and the constant at temperatures in K.
type Constants<'a> = (&'a str, &'a str, &'a [(f64, f64)]);

fn side(text: &str) -> Vec<Species> {
    text.split(" + ")
        .map(|name| {
            let mut species = Species::new(name, None).expect("a readable name");
            let known = ENTHALPIES.iter().find(|(known, _)| *known == name);
            species.enthalpy_kj_mol = known.map(|(_, value)| *value);
            species
        })
        .collect()
}

#[test]
fn reaction_enthalpies_follow_from_the_species() {
    // K, from the same tables to the last digit kept; 60 K (0.5 kJ/mol) is the
    // spread between sources of such values.
    let cases = [
        ("C+ + H2", "CH+ + H", 4612.0),
        ("H+ + O", "O+ + H", 227.6),
        ("N+ + H2", "NH+ + H", 254.1),
        ("H3+ + O2", "O2H+ + H2", 71.68),
        ("O + H2", "OH + H", 776.0),
        ("OH + H2", "H2O + H", -7234.0),
        ("H + O2", "OH + O", 8187.0),
        ("H3+ + O", "OH+ + H2", -7691.0),
        ("OH+ + H2", "H2O+ + H", -11870.0),
        ("H2O+ + H2", "H3O+ + H", -18850.0),
        ("H3O+ + e-", "OH + H + H", -16410.0),
        ("H3O+ + e-", "H2O + H", -75610.0),
        ("H2O+ + e-", "O + H + H", -36030.0),
        ("N2H+ + CO", "HCO+ + N2", -12160.0),
        ("HOC+", "HCO+", -19030.0),
        ("HNC", "HCN", -7445.0),
        ("He+ + CO", "C+ + O + He", -25720.0),
        ("N + OH", "NO + H", -24200.0),
        ("O + OH", "O2 + H", -8187.0),
        ("C + O2", "CO + O", -69560.0),
        ("HCO+ + H2O", "H3O+ + CO", -11660.0),
        ("NH3+ + H2", "NH4+ + H", -10250.0),
        ("He+ + H2", "H+ + H + He", -75560.0),
        ("S + H3+", "HS+ + H2", -28620.0),
        ("HS+ + H2", "H2S+ + H", 7354.0),
        ("S+ + H2", "HS+ + H", 10680.0),
    ];
    for (left, right, expected) in cases {
        let sum = |text| side(text).iter().map(|s| s.enthalpy_kj_mol.unwrap()).sum::<f64>();
        let got = (sum(right) - sum(left)) * KELVIN_PER_KJ_MOL;
        assert!((got - expected).abs() < 60.0, "{left} -> {right}: {got}");
    }
}

#[test]
fn equilibrium_constants_follow_from_levels_and_enthalpies() {
    // Forward over reverse coefficient. Polynomials of McBride, Gordon & Reno
    // 1993, NASA TM-4513, with their enthalpies replaced by those above. Rigid
    // rotors and harmonic vibrations are within 5 percent of them; 7 is asked.
    #[rustfmt::skip]
    let cases: &[Constants] = &[
        ("OH + H2", "H2O + H", &[(300.0, 12870000000.0), (1000.0, 361.9), (2000.0, 8.959)]),
        ("O + H2", "OH + H", &[(300.0, 0.1816), (1000.0, 1.042)]),
        ("H + O2", "OH + O", &[(300.0, 2.164e-11), (2000.0, 0.258)]),
        ("OH + OH", "H2O + O", &[(300.0, 70850000000.0), (1000.0, 347.3), (2000.0, 5.841)]),
        ("N + O2", "NO + O", &[(300.0, 5.022e+23), (1000.0, 40290000.0), (2000.0, 13860.0)]),
        ("N + OH", "NO + H", &[(300.0, 2.321e+34), (1000.0, 8162000000.0), (2000.0, 53750.0)]),
        ("OH + CO", "CO2 + H", &[(300.0, 1190000000000000.0), (1000.0, 517.8), (2000.0, 1.952)]),
        ("CN + H2", "HCN + H", &[(300.0, 1821000000000000.0), (1000.0, 10670.0), (2000.0, 58.75)]),
        ("C + H2", "CH + H", &[(300.0, 3.376e-17), (1000.0, 2.475e-05), (2000.0, 0.009509)]),
        ("N + H2", "NH + H", &[(300.0, 2.855e-18), (1000.0, 1.506e-05), (2000.0, 0.008369)]),
        ("H+ + O", "O+ + H", &[(300.0, 0.5558), (1000.0, 0.7863), (2000.0, 0.8382)]),
        ("O+ + H2", "OH+ + H", &[(300.0, 3711000000.0), (1000.0, 2034.0), (2000.0, 98.18)]),
    ];
    for (left, right, values) in cases {
        let (reactants, products) = (side(left), side(right));
        let reactants: Vec<&Species> = reactants.iter().collect();
        let products: Vec<&Species> = products.iter().collect();
        for (temperature, expected) in *values {
            let got = equilibrium_constant(&reactants, &products, *temperature).unwrap();
            let case = format!("{left} -> {right} at {temperature} K: {got:e}");
            assert!((got / expected - 1.0).abs() < 0.07, "{case}");
        }
    }
}
