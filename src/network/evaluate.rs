//! Coefficients of a network under given conditions.

use crate::diagnostic::Finding;
use crate::rates::{Conditions, Participants};

use super::{Network, Reaction, Row};

/// What holds where no row of a reaction covers the temperature.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Extrapolate {
    /// The nearest row keeps the value at its nearest edge.
    #[default]
    Hold,
    /// The nearest row's formula goes on.
    Formula,
}

impl Reaction {
    /// The row that holds at a temperature (K), and the temperature to use in
    /// it under [`Extrapolate::Hold`]: the temperature itself inside the row,
    /// its nearest edge outside.
    ///
    /// Where two rows touch, the upper one holds at the shared edge. In a gap
    /// the row whose edge is nearer in K holds, the lower one when equally near.
    pub fn active_row(&self, temperature: f64) -> (&Row, f64) {
        let below = self.rows.iter().rfind(|row| row.t_min <= temperature);
        let above = self.rows.iter().find(|row| row.t_min > temperature);
        match (below, above) {
            (Some(row), _) if temperature <= row.t_max => (row, temperature),
            (Some(low), Some(high)) => {
                if high.t_min - temperature < temperature - low.t_max {
                    (high, high.t_min)
                } else {
                    (low, low.t_max)
                }
            }
            (Some(low), None) => (low, low.t_max),
            (None, Some(high)) => (high, high.t_min),
            // Only a temperature that is not a number comes here.
            (None, None) => (&self.rows[0], self.rows[0].t_min),
        }
    }

    /// Whether a row covers a temperature (K).
    pub fn covers(&self, temperature: f64) -> bool {
        self.rows.iter().any(|row| row.t_min <= temperature && temperature <= row.t_max)
    }
}

impl Network {
    /// One coefficient per reaction, in the unit of [`Network::coefficient_unit`].
    ///
    /// # Errors
    /// One finding per coefficient that is not a finite number of zero or more,
    /// or whose law does not apply (which loading has excluded).
    pub fn coefficients(
        &self,
        conditions: &Conditions,
        extrapolate: Extrapolate,
    ) -> Result<Vec<f64>, Vec<Finding>> {
        let mut values = Vec::with_capacity(self.reactions.len());
        let mut findings = Vec::new();
        for reaction in &self.reactions {
            match self.coefficient(reaction, conditions, extrapolate) {
                Ok(value) => values.push(value),
                Err(finding) => findings.push(finding),
            }
        }
        if findings.is_empty() { Ok(values) } else { Err(findings) }
    }

    /// The coefficient of one reaction of this network.
    ///
    /// # Errors
    /// As [`Network::coefficients`].
    pub fn coefficient(
        &self,
        reaction: &Reaction,
        conditions: &Conditions,
        extrapolate: Extrapolate,
    ) -> Result<f64, Finding> {
        let (row, held) = reaction.active_row(conditions.temperature);
        let temperature = match extrapolate {
            Extrapolate::Hold => held,
            Extrapolate::Formula => conditions.temperature,
        };
        self.row_coefficient(reaction, row, conditions, temperature)
    }

    /// What one row of a reaction gives at a temperature (K), whatever its range.
    ///
    /// # Errors
    /// As [`Network::coefficients`].
    pub fn row_coefficient(
        &self,
        reaction: &Reaction,
        row: &Row,
        conditions: &Conditions,
        temperature: f64,
    ) -> Result<f64, Finding> {
        let reactants = self.reactants_of(reaction);
        let products = self.products_of(reaction);
        let participants = Participants { reactants: &reactants, products: &products };
        match row.law.coefficient(row.numbers(), participants, conditions, temperature) {
            Ok(value) if value.is_finite() && value >= 0.0 => Ok(value),
            Ok(value) => {
                let message = format!(
                    "{} has the coefficient {value:e} at {temperature} K",
                    reaction.equation
                );
                Err(Finding::error("network-coefficient", row.place.clone(), message)
                    .remedy("correct the numbers of the row, or do not extrapolate"))
            }
            Err(error) => {
                let message = format!("{}: {error}", reaction.equation);
                Err(Finding::error(error.code(), row.place.clone(), message).remedy(error.remedy()))
            }
        }
    }

    /// `s-1`, `cm3 s-1` or `cm6 s-1`, by the number of densities that multiply
    /// the coefficient.
    pub fn coefficient_unit(&self, reaction: &Reaction) -> &'static str {
        match reaction.depends_on.len() {
            0 => "cm-3 s-1",
            1 => "s-1",
            2 => "cm3 s-1",
            _ => "cm6 s-1",
        }
    }

    /// As [`Reaction::active_row`].
    pub fn active_row<'a>(&self, reaction: &'a Reaction, temperature: f64) -> (&'a Row, f64) {
        reaction.active_row(temperature)
    }
}
