//! `evolve`: one cloud in time.

use std::time::Instant;

use super::arguments::EvolveArguments;
use super::exit::{Exit, Outcome, Stop};
use super::output::Output;
use super::{channel_text, figures, header, load, species};
use crate::cloud::{Evolution, Model, TimePoint};
use crate::report::table::{Cell, Column, Table};
use crate::report::text::scientific;

/// Channels per role in the summary.
const TOP: usize = 3;

pub(super) fn run(arguments: &EvolveArguments, output: &mut Output) -> Outcome {
    let model = load::model(&arguments.run, output)?;
    let shown = species::shown(&model, &arguments.species)?;
    let began = Instant::now();
    let evolution = model.evolve();
    let seconds = began.elapsed().as_secs_f64();
    if output.for_people() {
        people(&model, &evolution, &shown, seconds, output)?;
    } else {
        output.table(&long_table(&model, &evolution))?;
    }
    if let Some(path) = &arguments.figure {
        figures::abundances(&model, &shown, path, output)?;
    }
    finish(&evolution, output)
}

/// Ends a command that integrated: a failure is a finding, and the results up
/// to it have been printed.
pub(super) fn finish(evolution: &Evolution, output: &mut Output) -> Outcome {
    match &evolution.failure {
        None => Ok(Exit::Done),
        Some(failure) => {
            output.findings(std::slice::from_ref(failure));
            Ok(Exit::WithFindings)
        }
    }
}

fn long_table(model: &Model, evolution: &Evolution) -> Table {
    let mut table =
        Table::new(vec![Column::new("time_yr"), Column::new("species"), Column::new("abundance")]);
    for point in &evolution.points {
        for (species, &abundance) in model.network.species.iter().zip(&point.abundances) {
            table.push(vec![
                Cell::Number(point.time_yr),
                Cell::text(&species.name),
                Cell::Number(abundance),
            ]);
        }
    }
    table
}

fn people(
    model: &Model,
    evolution: &Evolution,
    shown: &[usize],
    seconds: f64,
    output: &mut Output,
) -> Result<(), Stop> {
    output.text(&format!("{}\n\nAbundances n(X)/n_H\n", header::of(model)))?;
    // As many times side by side as the width holds.
    let per_block = (output.width().saturating_sub(14) / 9).max(1);
    for (number, points) in evolution.points.chunks(per_block).enumerate() {
        if number > 0 {
            output.text("\n")?;
        }
        output.table(&wide_table(model, points, shown))?;
    }
    if let Some(last) = evolution.points.last().filter(|p| p.time_yr > 0.0) {
        let rates = model.reaction_rates(&last.abundances);
        output.text(&format!("\nChannels at {}\n", header::time(last.time_yr)))?;
        for &watched in &model.watch {
            let text = channel_text::summary(model, &rates, watched, TOP, output);
            output.text(&text)?;
        }
    }
    let work = evolution.work;
    output.text(&format!(
        "\nElements and charge kept to {:.0e}; {} steps, {} rejected, {:.0} ms.\n",
        evolution.worst_residual().max(1e-16),
        work.accepted,
        work.rejected,
        seconds * 1e3,
    ))
}

fn wide_table(model: &Model, points: &[TimePoint], shown: &[usize]) -> Table {
    let mut columns = vec![Column::with_unit("time", "yr")];
    columns.extend(shown.iter().map(|&s| Column::new(&model.network.species[s].name)));
    let mut table = Table::new(columns);
    for point in points {
        let mut cells = vec![Cell::text(header::number(point.time_yr))];
        cells.extend(shown.iter().map(|&s| Cell::text(scientific(point.abundances[s], 2))));
        table.push(cells);
    }
    table.transposed()
}
