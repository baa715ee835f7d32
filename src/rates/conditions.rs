//! The local conditions that coefficients depend on, and their ranges.

use serde::Serialize;

use crate::units::Dimension;

/// Local conditions of a piece of cloud.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct Conditions {
    /// Hydrogen nuclei n_H = n(H) + 2 n(H2), cm^-3.
    pub hydrogen_density: f64,
    /// Gas temperature, K.
    pub temperature: f64,
    /// Dust temperature, K.
    pub dust_temperature: f64,
    /// Cosmic-ray ionization rate zeta per H2 molecule, all of it, s^-1.
    pub cosmic_ray_ionization_rate: f64,
    /// Visual extinction A_V to the surface, mag.
    pub visual_extinction: f64,
    /// Starlight chi, in units of the field of Draine (1978).
    pub radiation_field: f64,
    /// Albedo omega of dust in the far ultraviolet.
    pub dust_albedo: f64,
    /// Gas-to-dust mass ratio; processes on dust scale with 100 over it.
    pub gas_to_dust: f64,
    /// H2 column to the surface, for shielding, cm^-2.
    pub h2_column: f64,
    /// CO column to the surface, for shielding, cm^-2.
    pub co_column: f64,
    /// N2 column to the surface, for shielding, cm^-2.
    pub n2_column: f64,
    /// Doppler width b of the H2 lines, km s^-1.
    pub doppler_width: f64,
    /// Grain radius, micrometres.
    pub grain_radius: f64,
    /// n(e-)/n_H assumed by the effective recombination on dust.
    pub reference_electron_abundance: f64,
}

/// A condition outside its range.
#[derive(Clone, Debug, PartialEq)]
pub struct ConditionProblem {
    /// Name of the condition, as in the run file.
    pub key: &'static str,
    /// Its value, in its documented unit.
    pub value: f64,
    /// Smallest value that is accepted.
    pub low: f64,
    /// Largest value that is accepted.
    pub high: f64,
    /// Unit of the three numbers.
    pub unit: &'static str,
}

impl std::fmt::Display for ConditionProblem {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        let Self { key, value, low, high, unit } = self;
        let unit = if *unit == "1" { String::new() } else { format!(" {unit}") };
        write!(f, "{key} = {value:?}{unit} is outside {low:?} to {high:?}{unit}")
    }
}

/// Columns to the surface, cm^-2.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Columns {
    /// H2.
    pub h2: f64,
    /// CO.
    pub co: f64,
    /// N2.
    pub n2: f64,
}

impl Conditions {
    /// Hydrogen nuclei per magnitude of visual extinction, cm^-2 mag^-1:
    /// N_H/E(B-V) = 5.8e21 (Bohlin, Savage & Drake 1978, ApJ 224, 132) over
    /// R_V = 3.1. Provenance: memory.
    pub const COLUMN_PER_MAGNITUDE: f64 = 1.87e21;

    /// N(H2)/N_H of the default columns: half of the hydrogen molecular.
    /// Our choice; at any A_V above 0.1 mag it shields H2 fully all the same.
    pub const DEFAULT_H2_SHARE: f64 = 0.25;

    /// N(CO)/N_H of the default columns. Our choice: of the order found in
    /// translucent clouds, so that shielding is not overstated.
    pub const DEFAULT_CO_SHARE: f64 = 1e-6;

    /// N(N2)/N_H of the default columns. Our choice, as for CO.
    pub const DEFAULT_N2_SHARE: f64 = 1e-6;

    /// Columns to the surface that go with a visual extinction (mag) when a
    /// run does not give them.
    pub fn default_columns(visual_extinction: f64) -> Columns {
        let hydrogen = Self::COLUMN_PER_MAGNITUDE * visual_extinction;
        Columns {
            h2: Self::DEFAULT_H2_SHARE * hydrogen,
            co: Self::DEFAULT_CO_SHARE * hydrogen,
            n2: Self::DEFAULT_N2_SHARE * hydrogen,
        }
    }

    /// The same conditions with the default columns of their extinction.
    #[must_use]
    pub fn with_default_columns(mut self) -> Self {
        let columns = Self::default_columns(self.visual_extinction);
        self.h2_column = columns.h2;
        self.co_column = columns.co;
        self.n2_column = columns.n2;
        self
    }

    /// Every condition: its name in the run file, what it measures (and so its
    /// documented unit), and the range that is accepted.
    ///
    /// The tool is meant for n_H 1 to 1e9 cm^-3, T 5 to 3000 K, zeta 1e-19 to
    /// 1e-13 s^-1, A_V 0 to 50 mag and chi 0 to 1e6; a little beyond that is
    /// accepted so that limits can be explored.
    pub const KEYS: [(&'static str, Dimension, f64, f64); 14] = [
        ("hydrogen_density", Dimension::NumberDensity, 1e-3, 1e12),
        ("temperature", Dimension::Temperature, 1.0, 1e5),
        ("dust_temperature", Dimension::Temperature, 1.0, 1e5),
        ("cosmic_ray_ionization_rate", Dimension::Rate, 0.0, 1e-10),
        ("visual_extinction", Dimension::Extinction, 0.0, 1e3),
        ("radiation_field", Dimension::Dimensionless, 0.0, 1e8),
        ("dust_albedo", Dimension::Dimensionless, 0.0, 0.99),
        ("gas_to_dust", Dimension::Dimensionless, 1.0, 1e6),
        ("h2_column", Dimension::ColumnDensity, 0.0, 1e26),
        ("co_column", Dimension::ColumnDensity, 0.0, 1e24),
        ("n2_column", Dimension::ColumnDensity, 0.0, 1e24),
        ("doppler_width", Dimension::Speed, 0.01, 100.0),
        ("grain_radius", Dimension::Length, 1e-3, 10.0),
        ("reference_electron_abundance", Dimension::Dimensionless, 1e-15, 2.0),
    ];

    /// The conditions in the order of [`Conditions::KEYS`], to be read or set.
    fn slots(&mut self) -> [&mut f64; 14] {
        [
            &mut self.hydrogen_density,
            &mut self.temperature,
            &mut self.dust_temperature,
            &mut self.cosmic_ray_ionization_rate,
            &mut self.visual_extinction,
            &mut self.radiation_field,
            &mut self.dust_albedo,
            &mut self.gas_to_dust,
            &mut self.h2_column,
            &mut self.co_column,
            &mut self.n2_column,
            &mut self.doppler_width,
            &mut self.grain_radius,
            &mut self.reference_electron_abundance,
        ]
    }

    fn position(key: &str) -> Option<usize> {
        Self::KEYS.iter().position(|(name, ..)| *name == key)
    }

    /// The value of a condition by its name; none when there is no such one.
    pub fn get(mut self, key: &str) -> Option<f64> {
        Self::position(key).map(|at| *self.slots()[at])
    }

    /// Sets a condition by its name, in its documented unit; false when there is
    /// no such one. Nothing else follows: the dust stays as warm as it was.
    pub fn set(&mut self, key: &str, value: f64) -> bool {
        match Self::position(key) {
            Some(at) => {
                *self.slots()[at] = value;
                true
            }
            None => false,
        }
    }

    /// What is out of range; empty when all is well.
    pub fn validate(&self) -> Vec<ConditionProblem> {
        let mut copy = *self;
        copy.slots()
            .into_iter()
            .zip(Self::KEYS)
            .filter(|(value, (.., low, high))| !(*low..=*high).contains(&**value))
            .map(|(value, (key, dimension, low, high))| ConditionProblem {
                key,
                value: *value,
                low,
                high,
                unit: dimension.unit(),
            })
            .collect()
    }
}

/// A quiescent dark cloud, as a place to start from: n_H 2e4 cm^-3, 10 K,
/// zeta 1.3e-17 s^-1, A_V 10 mag, chi 1, omega 0.5, gas-to-dust 100, b 1 km/s,
/// 0.1 micrometre grains, n(e-)/n_H 1e-7 and the default columns. All of these
/// are common practice.
impl Default for Conditions {
    fn default() -> Self {
        Self {
            hydrogen_density: 2e4,
            temperature: 10.0,
            dust_temperature: 10.0,
            cosmic_ray_ionization_rate: 1.3e-17,
            visual_extinction: 10.0,
            radiation_field: 1.0,
            dust_albedo: 0.5,
            gas_to_dust: 100.0,
            h2_column: 0.0,
            co_column: 0.0,
            n2_column: 0.0,
            doppler_width: 1.0,
            grain_radius: 0.1,
            reference_electron_abundance: 1e-7,
        }
        .with_default_columns()
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn conditions_out_of_range_are_named() {
        assert_eq!(Conditions::default().validate(), []);
        let bad = Conditions {
            temperature: f64::NAN,
            radiation_field: -1.0,
            gas_to_dust: f64::INFINITY,
            ..Conditions::default()
        };
        let keys: Vec<&str> = bad.validate().iter().map(|problem| problem.key).collect();
        assert_eq!(keys, ["temperature", "radiation_field", "gas_to_dust"]);
        assert_eq!(
            bad.validate()[1].to_string(),
            "radiation_field = -1.0 is outside 0.0 to 100000000.0"
        );
    }

    #[test]
    fn every_condition_is_set_and_read_by_its_name() {
        for (key, ..) in Conditions::KEYS {
            let mut conditions = Conditions::default();
            assert!(conditions.set(key, 0.125));
            let got = conditions.get(key).unwrap();
            assert!((got - 0.125).abs() < 1e-15, "{key}");
            let text = serde_json::to_value(conditions).unwrap();
            assert!((text[key].as_f64().unwrap() - 0.125).abs() < 1e-15, "{key}");
        }
        assert!(!Conditions::default().set("warmth", 1.0));
        assert_eq!(Conditions::default().get("warmth"), None);
    }

    #[test]
    fn default_columns_follow_the_extinction() {
        // Bohlin, Savage & Drake 1978: 5.8e21 / 3.1 = 1.871e21 cm-2 mag-1.
        let columns = Conditions::default_columns(2.0);
        assert!((columns.h2 / 9.35e20 - 1.0).abs() < 1e-12);
        assert!((columns.co / 3.74e15 - 1.0).abs() < 1e-12);
        assert!((Conditions::COLUMN_PER_MAGNITUDE / (5.8e21 / 3.1) - 1.0).abs() < 1e-3);
    }
}
