//! From a network back to the texts of its folder.

use crate::species::Formula;

use super::{Network, NetworkTexts};

impl Network {
    /// The texts of a folder that loads as this network.
    pub fn to_texts(&self, folder: &str) -> NetworkTexts {
        NetworkTexts::new(folder)
            .with("network.toml", self.head_text())
            .with("species.csv", self.species_text())
            .with("reactions.csv", self.reactions_text())
            .with("sources.csv", self.sources_text())
    }

    fn head_text(&self) -> String {
        let mut head = toml::Table::new();
        for (key, value) in
            [("title", &self.title), ("text", &self.text), ("purpose", &self.purpose)]
        {
            if !value.is_empty() {
                head.insert(key.to_string(), toml::Value::String(value.clone()));
            }
        }
        let elements = self.elements().into_iter().map(toml::Value::String).collect();
        head.insert("elements".to_string(), toml::Value::Array(elements));
        head.to_string()
    }

    fn species_text(&self) -> String {
        let mut text = String::from(
            "species,composition,delta_f_h_0K_kJ_mol,polarizability_A3,dipole_D,source,\
             provenance,note\n",
        );
        for species in &self.species {
            let plain = Formula::parse(&species.name);
            let said = plain.is_ok_and(|formula| formula.atoms == species.atoms);
            let composition = if said {
                String::new()
            } else {
                let parts: Vec<String> =
                    species.atoms.iter().map(|(name, count)| format!("{name}:{count}")).collect();
                parts.join(" ")
            };
            let number = |value: Option<f64>| value.map_or_else(String::new, written);
            line(
                &mut text,
                &[
                    &species.name,
                    &composition,
                    &number(species.enthalpy_kj_mol),
                    &number(species.polarizability_a3),
                    &number(species.dipole_d),
                    &species.source,
                    &species.provenance,
                    &species.note,
                ],
            );
        }
        text
    }

    fn reactions_text(&self) -> String {
        let mut text = String::from(
            "id,equation,law,alpha,beta,gamma,t_min,t_max,uncertainty,source,provenance,note\n",
        );
        for reaction in &self.reactions {
            for row in &reaction.rows {
                line(
                    &mut text,
                    &[
                        &row.id,
                        &reaction.equation,
                        row.law.name(),
                        &written(row.alpha),
                        &written(row.beta),
                        &written(row.gamma),
                        &written(row.t_min),
                        &written(row.t_max),
                        &written(row.uncertainty),
                        &row.source,
                        &row.provenance,
                        &row.note,
                    ],
                );
            }
        }
        text
    }

    fn sources_text(&self) -> String {
        let mut text = String::from("key,citation,doi\n");
        for source in &self.sources {
            line(&mut text, &[&source.key, &source.citation, &source.doi]);
        }
        text
    }
}

/// The shortest digits that read back as the same number.
fn written(value: f64) -> String {
    let size = value.abs();
    if size > 0.0 && !(1e-3..1e6).contains(&size) {
        format!("{value:e}")
    } else {
        format!("{value}")
    }
}

/// One line of cells, quoted where needed.
fn line(text: &mut String, cells: &[&str]) {
    for (at, cell) in cells.iter().enumerate() {
        if at > 0 {
            text.push(',');
        }
        if cell.contains([',', '"', '\n', '\r']) {
            text.push('"');
            text.push_str(&cell.replace('"', "\"\""));
            text.push('"');
        } else {
            text.push_str(cell);
        }
    }
    text.push('\n');
}
