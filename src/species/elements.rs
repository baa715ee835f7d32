//! Atomic weights.

/// Symbols and atomic weights in u, H to Zn, with deuterium as `D`.
///
/// IUPAC 2021 abridged standard atomic weights (Prohaska et al. 2022, Pure
/// Appl. Chem. 94, 573); deuterium is the isotope mass 2.01410 of the 2020
/// atomic mass evaluation (Wang et al. 2021, Chin. Phys. C 45, 030003).
/// Provenance: memory.
pub const WEIGHTS: &[(&str, f64)] = &[
    ("H", 1.0080),
    ("D", 2.0141),
    ("He", 4.0026),
    ("Li", 6.94),
    ("Be", 9.0122),
    ("B", 10.81),
    ("C", 12.011),
    ("N", 14.007),
    ("O", 15.999),
    ("F", 18.998),
    ("Ne", 20.180),
    ("Na", 22.990),
    ("Mg", 24.305),
    ("Al", 26.982),
    ("Si", 28.085),
    ("P", 30.974),
    ("S", 32.06),
    ("Cl", 35.45),
    ("Ar", 39.95),
    ("K", 39.098),
    ("Ca", 40.078),
    ("Sc", 44.956),
    ("Ti", 47.867),
    ("V", 50.942),
    ("Cr", 51.996),
    ("Mn", 54.938),
    ("Fe", 55.845),
    ("Co", 58.933),
    ("Ni", 58.693),
    ("Cu", 63.546),
    ("Zn", 65.38),
];

/// Atomic weight of an element, u; none when it is not in the table.
pub fn weight_u(symbol: &str) -> Option<f64> {
    WEIGHTS.iter().find(|(name, _)| *name == symbol).map(|(_, weight)| *weight)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn weights_are_distinct_and_rise_but_for_the_two_known_inversions() {
        for pair in WEIGHTS.windows(2) {
            let falls = pair[1].1 < pair[0].1;
            assert_eq!(falls, ["Ar", "Co"].contains(&pair[0].0), "{} {}", pair[0].0, pair[1].0);
        }
        let mut names: Vec<&str> = WEIGHTS.iter().map(|(name, _)| *name).collect();
        names.sort_unstable();
        names.dedup();
        assert_eq!(names.len(), WEIGHTS.len());
    }
}
