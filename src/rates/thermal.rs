//! Law `thermal`: the three-number temperature law of collisions in the gas.

use super::{Law, Numbers, Participants, RateError};

/// Reference temperature of the law, K. Common practice.
pub const REFERENCE_K: f64 = 300.0;

/// alpha (T/300)^beta exp(-gamma/T).
///
/// # Units
/// Those of `alpha`: cm^3 s^-1 for two reactants, s^-1 for one, cm^6 s^-1 for
/// three. `gamma` and `temperature` in K.
///
/// # Range
/// That of the row; the formula itself has no limits, and with a negative gamma
/// or a strongly negative beta it grows without bound when continued downward.
///
/// # Source
/// Arrhenius 1889, Z. Phys. Chem. 4, 226, with a power-law prefactor as is
/// common practice.
pub fn coefficient(numbers: Numbers, temperature: f64) -> f64 {
    let Numbers { alpha, beta, gamma } = numbers;
    alpha * libm::pow(temperature / REFERENCE_K, beta) * libm::exp(-gamma / temperature)
}

/// The coefficient of a reaction of one to three gas-phase reactants.
pub(super) fn of(
    numbers: Numbers,
    species: Participants<'_>,
    temperature: f64,
) -> Result<f64, RateError> {
    if !(1..=3).contains(&species.reactants.len()) {
        let wanted = "one to three reactants".to_string();
        return Err(RateError::Shape { law: Law::Thermal, wanted });
    }
    Ok(coefficient(numbers, temperature))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_thermal_law_follows_its_formula() {
        // Worked by hand; the middle case is H3O+ + e- scaled as T^-0.5.
        let cases = [
            ((1e-9, 0.0, 0.0), 10.0, 1e-9),
            ((4.3e-7, -0.5, 0.0), 75.0, 8.6e-7),
            ((1e-11, 0.0, 1000.0), 1000.0, 1e-11 / std::f64::consts::E),
        ];
        for ((alpha, beta, gamma), temperature, expected) in cases {
            let got = coefficient(Numbers { alpha, beta, gamma }, temperature);
            assert!((got / expected - 1.0).abs() < 1e-13, "{got:e}");
        }
    }
}
