//! Laws `dust_h2` and `dust_recombination`: what happens on grains.
//!
//! Recombination has two forms, of which a network uses one. With `grain`
//! species among the reactants it is a collision rate; without, it is the
//! effective rate at which ions find an electron on dust at an assumed electron
//! density, which suits diffuse gas with its many small grains.

use super::grain_collision;
use super::{Conditions, Law, Numbers, Participants, RateError};

/// Gas-to-dust mass ratio to which coefficients on dust refer. Common practice.
pub const REFERENCE_GAS_TO_DUST: f64 = 100.0;

/// Probability that an H atom sticks to dust:
/// 1 / (1 + 0.4 sqrt((T + T_d)/100) + 0.2 T/100 + 0.08 (T/100)^2).
///
/// # Source
/// Hollenbach & McKee 1979, ApJS 41, 555, eq. 3.7. Provenance: memory.
pub fn sticking(temperature: f64, dust_temperature: f64) -> f64 {
    let t = temperature / 100.0;
    let both = (temperature + dust_temperature) / 100.0;
    1.0 / (1.0 + 0.4 * both.sqrt() + 0.2 * t + 0.08 * t * t)
}

/// H2 formation on dust per H atom, s^-1:
/// alpha (T/100)^beta S(T, T_d) n_H (100 / gas-to-dust).
///
/// # Units
/// alpha in cm^3 s^-1. Events per cm^3 and s are this times n(H), and each takes
/// two atoms.
///
/// # Source
/// Jura 1975, ApJ 197, 575 for alpha; [`sticking`].
pub fn h2_formation(numbers: Numbers, conditions: &Conditions, temperature: f64) -> f64 {
    numbers.alpha
        * libm::pow(temperature / 100.0, numbers.beta)
        * sticking(temperature, conditions.dust_temperature)
        * conditions.hydrogen_density
        * (REFERENCE_GAS_TO_DUST / conditions.gas_to_dust)
}

/// Constants C0 to C6 of the effective recombination, by element of the ion.
///
/// Weingartner & Draine 2001, ApJ 563, 842, table 3. Provenance: memory.
const EFFECTIVE: [(&str, [f64; 7]); 8] = [
    ("H", [12.25, 8.074e-6, 1.378, 5.087e2, 1.586e-2, 0.4723, 1.102e-5]),
    ("He", [5.572, 3.185e-7, 1.512, 5.115e3, 3.903e-7, 0.4956, 5.494e-7]),
    ("C", [45.58, 6.089e-3, 1.128, 4.331e2, 4.845e-2, 0.8120, 1.333e-4]),
    ("Na", [2.178, 1.732e-7, 2.133, 1.029e4, 1.859e-6, 1.0341, 3.223e-5]),
    ("Mg", [2.510, 8.116e-8, 1.864, 6.170e4, 2.169e-6, 0.9605, 7.232e-5]),
    ("Si", [2.166, 5.678e-8, 1.874, 4.375e4, 1.635e-6, 0.8964, 7.538e-5]),
    ("S", [3.064, 7.769e-5, 1.319, 1.087e2, 3.475e-1, 0.4790, 4.689e-2]),
    ("Fe", [1.701, 9.554e-8, 1.851, 5.763e4, 4.116e-8, 0.9456, 2.198e-5]),
];

/// The ions that have effective recombination constants, as names.
pub fn fitted_ions() -> impl Iterator<Item = String> {
    EFFECTIVE.iter().map(|(element, _)| format!("{element}+"))
}

/// Effective recombination of a singly charged atomic ion on dust, cm^3 s^-1
/// per hydrogen nucleus:
/// 1e-14 C0 / (1 + C1 psi^C2 (1 + C3 T^C4 psi^(-C5 - C6 ln T))).
///
/// # Units
/// `element` is the symbol; `psi` = G sqrt(T)/n_e in K^1/2 cm^3; temperature
/// in K. None when the element has no constants.
///
/// # Range
/// psi 1e2 to 1e6 and T 10 to 1000 K; both are held at the edge outside.
///
/// # Source
/// Weingartner & Draine 2001, ApJ 563, 842, eq. 8 and table 3. Provenance:
/// memory.
pub fn effective_recombination(element: &str, psi: f64, temperature: f64) -> Option<f64> {
    let (_, c) = EFFECTIVE.iter().find(|(name, _)| *name == element)?;
    // A psi that is not a number (no field, no electrons) is held at the low edge.
    let psi = if psi > 1e2 { psi.min(1e6) } else { 1e2 };
    let t = temperature.clamp(10.0, 1000.0);
    let inner = 1.0 + c[3] * libm::pow(t, c[4]) * libm::pow(psi, -c[5] - c[6] * libm::log(t));
    Some(1e-14 * c[0] / (1.0 + c[1] * libm::pow(psi, c[2]) * inner))
}

/// Charging parameter psi = G sqrt(T)/n_e, K^1/2 cm^3, with the field
/// G = 1.7 chi exp(-1.8 A_V) in units of Habing's and n_e from the reference
/// electron abundance.
///
/// # Source
/// Weingartner & Draine 2001, ApJ 563, 842; 1.7 is Draine's (1978) field over
/// Habing's (1968); 1.8 per magnitude is common practice for the grain-heating
/// part of the ultraviolet.
pub fn charging_parameter(conditions: &Conditions, temperature: f64) -> f64 {
    let field = 1.7 * conditions.radiation_field * libm::exp(-1.8 * conditions.visual_extinction);
    let electrons = conditions.reference_electron_abundance * conditions.hydrogen_density;
    field * temperature.sqrt() / electrons
}

pub(super) fn of_h2(
    numbers: Numbers,
    species: Participants<'_>,
    conditions: &Conditions,
    temperature: f64,
) -> Result<f64, RateError> {
    match species.reactants {
        [a, b] if a.name == b.name && a.is_neutral_gas() => {
            Ok(h2_formation(numbers, conditions, temperature))
        }
        _ => Err(RateError::Shape {
            law: Law::DustH2,
            wanted: "two equal neutral atoms (H + H)".to_string(),
        }),
    }
}

pub(super) fn of_recombination(
    numbers: Numbers,
    species: Participants<'_>,
    conditions: &Conditions,
    temperature: f64,
) -> Result<f64, RateError> {
    let wrong = || RateError::Shape {
        law: Law::DustRecombination,
        wanted: "a particle and a grain, or an atomic ion and e-".to_string(),
    };
    let [a, b] = species.reactants else {
        return Err(wrong());
    };
    match (a.is_grain(), b.is_grain()) {
        (true, true) => Err(wrong()),
        (false, false) => {
            let (ion, other) = if a.is_ion() { (a, b) } else { (b, a) };
            if !(ion.is_ion() && other.is_electron()) {
                return Err(wrong());
            }
            let none = || RateError::NoConstants { ion: ion.name.clone() };
            let element = match ion.atoms.as_slice() {
                [(element, 1)] if ion.charge == 1 => element,
                _ => return Err(none()),
            };
            let psi = charging_parameter(conditions, temperature);
            let rate = effective_recombination(element, psi, temperature).ok_or_else(none)?;
            let dust = REFERENCE_GAS_TO_DUST / conditions.gas_to_dust;
            Ok(numbers.alpha * rate * conditions.hydrogen_density * dust)
        }
        (first, _) => {
            let (grain, particle) = if first { (a, b) } else { (b, a) };
            let mass = particle.mass_u.ok_or_else(|| RateError::MissingData {
                law: Law::DustRecombination,
                species: particle.name.clone(),
                column: "the mass",
            })?;
            let collisions = grain_collision::coefficient(
                conditions.grain_radius,
                grain.charge,
                mass,
                particle.charge,
                temperature,
            );
            Ok(numbers.alpha * collisions)
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn effective_recombination_meets_its_spot_value() {
        // Spot value for H+ at 100 K, psi 377, Weingartner & Draine 2001
        // (provenance: memory); two digits are given.
        let got = effective_recombination("H", 377.0, 100.0).unwrap();
        assert!((got / 6.2e-14 - 1.0).abs() < 0.01, "{got:e}");
        assert!(effective_recombination("O", 377.0, 100.0).is_none());
    }

    #[test]
    fn effective_recombination_is_held_outside_its_fit() {
        for (element, _) in EFFECTIVE {
            let f = |psi: f64, t: f64| effective_recombination(element, psi, t).unwrap();
            for (inside, outside) in [
                (f(1e2, 50.0), f(0.0, 50.0)),
                (f(1e2, 50.0), f(f64::NAN, 50.0)),
                (f(1e6, 50.0), f(f64::INFINITY, 50.0)),
                (f(1e4, 10.0), f(1e4, 3.0)),
                (f(1e4, 1000.0), f(1e4, 3000.0)),
            ] {
                assert!((inside / outside - 1.0).abs() < 1e-15, "{element}");
                assert!(inside > 0.0 && inside < 1e-12, "{element}: {inside:e}");
            }
        }
    }

    #[test]
    fn h2_formation_follows_jura_and_sticks_less_when_hot() {
        // Jura 1975: 3e-17 cm3 s-1; S by hand from Hollenbach & McKee 1979.
        let cases = [(10.0, 10.0, 0.832), (100.0, 10.0, 0.5885), (1000.0, 20.0, 0.0814)];
        for (gas, dust, expected) in cases {
            let got = sticking(gas, dust);
            assert!((got / expected - 1.0).abs() < 2e-3, "{gas}: {got}");
        }
        let numbers = Numbers { alpha: 3e-17, beta: 0.5, gamma: 0.0 };
        let c = Conditions { hydrogen_density: 1e4, ..Conditions::default() };
        let got = h2_formation(numbers, &c, 100.0);
        assert!((got / (3e-13 * sticking(100.0, 10.0)) - 1.0).abs() < 1e-12);
        let thin = Conditions { gas_to_dust: 200.0, ..c };
        assert!((h2_formation(numbers, &thin, 100.0) / got - 0.5).abs() < 1e-12);
    }
}
