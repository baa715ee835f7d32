//! Collisions of gas particles with charged spherical grains, including the
//! image charge that an approaching charge raises in the grain.

use crate::units::{ATOMIC_MASS_G, BOLTZMANN_ERG_K, CHARGE_ESU, MICROMETRE_CM};

/// Mean thermal speed sqrt(8 k T / (pi m)), cm s^-1, for a mass in u and a
/// temperature in K.
pub fn mean_speed(mass: f64, temperature: f64) -> f64 {
    let energy = 8.0 * BOLTZMANN_ERG_K * temperature;
    (energy / (std::f64::consts::PI * mass * ATOMIC_MASS_G)).sqrt()
}

/// Reduced temperature tau = a k T / (q e)^2, dimensionless, for a grain radius
/// in micrometres, a temperature in K and a charge in e (not zero).
pub fn reduced_temperature(radius: f64, temperature: f64, charge: i32) -> f64 {
    let q = f64::from(charge) * CHARGE_ESU;
    radius * MICROMETRE_CM * BOLTZMANN_ERG_K * temperature / (q * q)
}

/// Factor by which charge focuses collisions, dimensionless, for the reduced
/// temperature tau and nu = Z_grain / q:
/// neutral grain 1 + sqrt(pi / (2 tau));
/// attraction (1 - nu/tau)(1 + sqrt(2 / (tau - 2 nu)));
/// repulsion (1 + 1/sqrt(4 tau + 3 nu))^2 exp(-theta/tau),
/// theta = nu / (1 + 1/sqrt(nu)).
///
/// # Source
/// Draine & Sutin 1987, ApJ 320, 803, eqs. 3.3 to 3.5. Provenance: memory.
pub fn focusing(tau: f64, nu: f64) -> f64 {
    if nu < 0.0 {
        (1.0 - nu / tau) * (1.0 + (2.0 / (tau - 2.0 * nu)).sqrt())
    } else if nu > 0.0 {
        let theta = nu / (1.0 + 1.0 / nu.sqrt());
        let reach = 1.0 + 1.0 / (4.0 * tau + 3.0 * nu).sqrt();
        reach * reach * libm::exp(-theta / tau)
    } else {
        1.0 + (std::f64::consts::PI / (2.0 * tau)).sqrt()
    }
}

/// Collision rate coefficient of a particle with grains, cm^3 s^-1:
/// pi a^2 v times [`focusing`] (times 1 for a neutral particle).
///
/// # Units
/// `radius` in micrometres, `mass` of the particle in u, charges in e,
/// `temperature` in K.
///
/// # Source
/// As [`focusing`].
pub fn coefficient(
    radius: f64,
    grain_charge: i32,
    mass: f64,
    charge: i32,
    temperature: f64,
) -> f64 {
    let centimetres = radius * MICROMETRE_CM;
    let area = std::f64::consts::PI * centimetres * centimetres;
    let factor = if charge == 0 {
        1.0
    } else {
        let tau = reduced_temperature(radius, temperature, charge);
        focusing(tau, f64::from(grain_charge) / f64::from(charge))
    };
    area * mean_speed(mass, temperature) * factor
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn collisions_follow_draine_and_sutin() {
        // Hand evaluations of Draine & Sutin 1987 at a = 0.1 um; tau is 0.0598
        // at 10 K and 5.98 at 1000 K.
        let tau = reduced_temperature(0.1, 10.0, 1);
        assert!((tau / 0.05984 - 1.0).abs() < 1e-3, "{tau}");
        let cases = [
            ("opposite charges, 10 K", focusing(0.06, -1.0), 17.667 * 1.98533, 1e-4),
            ("neutral grain, 10 K", focusing(0.06, 0.0), 6.11663, 1e-4),
            ("like charges, 10 K", focusing(0.06, 1.0), 2.41975 * 2.40369e-4, 1e-3),
            ("opposite charges, hot", focusing(1e9, -1.0), 1.0, 1e-4),
        ];
        for (case, got, expected, tolerance) in cases {
            assert!((got / expected - 1.0).abs() < tolerance, "{case}: {got}");
        }
    }
}
