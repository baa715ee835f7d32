//! The lines that say which cloud and network a text result speaks of.

use crate::cloud::Model;

/// Title, conditions and network of a model, without a line end.
pub(super) fn of(model: &Model) -> String {
    let c = &model.run.conditions;
    let title = if model.run.title.is_empty() { &model.run.name } else { &model.run.title };
    format!(
        "{title}\n  n_H {} cm-3, T {} K, zeta {} s-1 per H2, A_V {} mag, chi {}\n  network {}: {} species, {} reactions",
        number(c.hydrogen_density),
        number(c.temperature),
        number(c.cosmic_ray_ionization_rate),
        number(c.visual_extinction),
        number(c.radiation_field),
        model.network.name,
        model.network.species.len(),
        model.network.reactions.len(),
    )
}

/// A number as short as it can be written.
pub(super) fn number(value: f64) -> String {
    let size = value.abs();
    if value.abs() > 0.0 && !(1e-3..1e4).contains(&size) {
        format!("{value:e}")
    } else {
        format!("{value}")
    }
}

/// A time in years, short.
pub(super) fn time(years: f64) -> String {
    format!("{} yr", number(years))
}
