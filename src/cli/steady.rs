//! `steady`: all steady states of one cloud.

use super::arguments::SteadyArguments;
use super::exit::{Exit, Outcome, Stop};
use super::output::Output;
use super::{channel_text, header, load, species};
use crate::cloud::{Model, SteadyReport, SteadyStateFound};
use crate::report::table::{Cell, Column, Table};
use crate::report::text::scientific;

/// Channels per role in the summary.
const TOP: usize = 3;

pub(super) fn run(arguments: &SteadyArguments, output: &mut Output) -> Outcome {
    let model = load::model(&arguments.run, output)?;
    let shown = species::shown(&model, &arguments.species)?;
    let report = model.steady_states();
    if output.for_people() {
        people(&model, &report, &shown, output)?;
    } else {
        output.table(&long_table(&model, &report))?;
    }
    output.findings(&report.failures);
    Ok(if report.failures.is_empty() { Exit::Done } else { Exit::WithFindings })
}

fn long_table(model: &Model, report: &SteadyReport) -> Table {
    let mut table = Table::new(vec![
        Column::new("state"),
        Column::new("species"),
        Column::new("abundance"),
        Column::new("stable"),
    ]);
    for (number, state) in report.states.iter().enumerate() {
        for (species, &abundance) in model.network.species.iter().zip(&state.abundances) {
            table.push(vec![
                Cell::Integer(number as i64 + 1),
                Cell::text(&species.name),
                Cell::Number(abundance),
                state.stable.map_or(Cell::Empty, Cell::Flag),
            ]);
        }
    }
    table
}

fn people(
    model: &Model,
    report: &SteadyReport,
    shown: &[usize],
    output: &mut Output,
) -> Result<(), Stop> {
    let count = match report.states.len() {
        0 => "No steady state was found.".to_owned(),
        1 => "One steady state was found.".to_owned(),
        n => format!("{n} steady states were found."),
    };
    output.text(&format!("{}\n\n{count}\n", header::of(model)))?;
    for (number, state) in report.states.iter().enumerate() {
        output.text(&format!("\nState {}: {}\n", number + 1, describe(state)))?;
    }
    if report.states.is_empty() {
        return Ok(());
    }
    output.text("\nAbundances n(X)/n_H\n")?;
    let mut columns = vec![Column::new("species")];
    columns.extend((1..=report.states.len()).map(|n| Column::new(format!("state {n}"))));
    let mut table = Table::new(columns);
    for &species in shown {
        let mut cells = vec![Cell::text(&model.network.species[species].name)];
        cells
            .extend(report.states.iter().map(|s| Cell::text(scientific(s.abundances[species], 2))));
        table.push(cells);
    }
    output.table(&table)?;
    for (number, state) in report.states.iter().enumerate() {
        output.text(&format!("\nChannels in state {}\n", number + 1))?;
        let rates = model.reaction_rates(&state.abundances);
        for &watched in &model.watch {
            let text = channel_text::summary(model, &rates, watched, TOP, output);
            output.text(&text)?;
        }
    }
    Ok(())
}

/// Stability and how the state was found, in words.
fn describe(state: &SteadyStateFound) -> String {
    let stability = match (state.stable, state.response_yr) {
        (Some(true), Some(time)) => format!("stable; disturbances fade by e in {time:.1e} yr"),
        (Some(false), Some(time)) => format!("unstable; disturbances grow by e in {time:.1e} yr"),
        _ => "its stability could not be computed".to_owned(),
    };
    let period = state
        .period_yr
        .map_or_else(String::new, |p| format!(", swinging with a period of {p:.1e} yr"));
    let kept = state.conservation.iter().map(|c| c.residual).fold(1e-16, f64::max);
    format!(
        "{stability}{period}\n  reached from {}\n  gross rates balance to {:.0e}, elements and charge kept to {kept:.0e}",
        state.from.join(", "),
        state.imbalance.max(1e-16),
    )
}
