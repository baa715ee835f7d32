//! `rates`: the coefficient of every reaction at a run's conditions.

use super::arguments::RatesArguments;
use super::exit::{Exit, Outcome};
use super::output::Output;
use super::{load, species};
use crate::cloud::Model;
use crate::report::table::{Cell, Column, Table};

pub(super) fn run(arguments: &RatesArguments, output: &mut Output) -> Outcome {
    let model = load::model(&arguments.run, output)?;
    let chosen = species::indices(&model.network, &arguments.species)?;
    let table = table(&model, &chosen, output.for_people());
    if output.for_people() {
        output.text(&format!("{}\n", super::header::of(&model)))?;
    }
    output.table(&table)?;
    Ok(Exit::Done)
}

/// The table of the contract; for people also where each number comes from.
fn table(model: &Model, chosen: &[usize], for_people: bool) -> Table {
    let mut columns = vec![
        Column::new("reaction"),
        Column::new("equation"),
        Column::new("law"),
        Column::new("coefficient"),
        Column::new("unit"),
        Column::new("depends_on"),
    ];
    if for_people {
        columns.extend([Column::new("F"), Column::new("source")]);
    }
    let mut table = Table::new(columns);
    let network = &model.network;
    for (reaction, &coefficient) in network.reactions.iter().zip(&model.coefficients) {
        let takes_part = |s| reaction.reactants.contains(s) || reaction.products.contains(s);
        if !chosen.is_empty() && !chosen.iter().any(takes_part) {
            continue;
        }
        let (row, _) = reaction.active_row(model.run.conditions.temperature);
        let depends_on: Vec<&str> =
            reaction.depends_on.iter().map(|&s| network.species[s].name.as_str()).collect();
        let mut cells = vec![
            Cell::text(&reaction.id),
            Cell::text(&reaction.equation),
            Cell::text(row.law.name()),
            Cell::Number(coefficient),
            Cell::text(network.coefficient_unit(reaction)),
            Cell::text(depends_on.join(" ")),
        ];
        if for_people {
            cells.extend([Cell::Number(row.uncertainty), Cell::text(&row.source)]);
        }
        table.push(cells);
    }
    table
}
