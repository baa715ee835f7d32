//! `channels`: what makes and destroys a species.

use std::collections::BTreeSet;

use super::arguments::ChannelsArguments;
use super::exit::{Exit, Outcome, Stop};
use super::output::Output;
use super::{channel_text, evolve, figures, header, load, species};
use crate::analysis::channels::{Channels, integrated_rates, rank};
use crate::cloud::Model;
use crate::diagnostic::{Finding, Place};
use crate::report::table::{Cell, Column, Table};
use crate::report::text::wrap;
use crate::units::{Dimension, parse_quantity};

/// One state whose channels are wanted.
struct Moment {
    /// Years; `None` at a steady state.
    time_yr: Option<f64>,
    /// What the state is, in words.
    title: String,
    /// Events of every reaction, cm-3 s-1 (or cm-3 when integrated).
    rates: Vec<f64>,
    /// Unit of the rates.
    unit: &'static str,
}

pub(super) fn run(arguments: &ChannelsArguments, output: &mut Output) -> Outcome {
    let model = load::model(&arguments.run, output)?;
    let named = species::indices(&model.network, &arguments.species)?;
    let wanted = if named.is_empty() { model.watch.clone() } else { named };
    if wanted.is_empty() {
        return Err(Finding::error(
            "run-watch",
            Place::file(&model.run.name),
            "no species to explain",
        )
        .remedy("name one with --species, or watch one in the run file")
        .into());
    }
    let (moments, exit) = moments(arguments, &model, output)?;
    if output.for_people() {
        output.text(&format!("{}\n", header::of(&model)))?;
        for moment in &moments {
            output.text(&format!("\n{}\n", moment.title))?;
            for &species in &wanted {
                let ranked = rank(&model.network, &moment.rates, species);
                let options = channel_text::Options {
                    top: arguments.top,
                    net: arguments.net,
                    unit: moment.unit,
                };
                let text = channel_text::full(&model, &ranked, &options, output);
                output.text(&text)?;
            }
        }
        if output.verbose {
            let text = citations(&model, &moments, &wanted, arguments, output);
            output.text(&text)?;
        }
    } else {
        output.table(&long_table(&model, &moments, &wanted, arguments.net))?;
    }
    if let Some(path) = &arguments.figure {
        figures::channels(&model, wanted[0], path, output)?;
    }
    Ok(exit)
}

/// The sources of the shown channels in full.
fn citations(
    model: &Model,
    moments: &[Moment],
    wanted: &[usize],
    arguments: &ChannelsArguments,
    output: &Output,
) -> String {
    let mut keys = BTreeSet::new();
    for (moment, &species) in moments.iter().flat_map(|m| wanted.iter().map(move |s| (m, s))) {
        let ranked = rank(&model.network, &moment.rates, species);
        for channel in channel_text::ordered(&ranked, arguments.net) {
            if channel.rank <= arguments.top {
                let reaction = &model.network.reactions[channel.reaction];
                keys.insert(&reaction.active_row(model.run.conditions.temperature).0.source);
            }
        }
    }
    let mut out = String::from("\nSources\n");
    for source in keys.into_iter().filter_map(|key| model.network.source(key)) {
        let doi =
            if source.doi.is_empty() { String::new() } else { format!(" doi:{}", source.doi) };
        let line = format!("{}: {}{doi}", source.key, source.citation);
        out.push_str(&format!("{}\n", wrap(&line, output.width() - 2, 2)));
    }
    out
}

fn moments(
    arguments: &ChannelsArguments,
    model: &Model,
    output: &mut Output,
) -> Result<(Vec<Moment>, Exit), Stop> {
    if let Some(text) = &arguments.until {
        let until_yr = time(text, "--until")?;
        let rates = integrated_rates(model, until_yr)?;
        let moment = Moment {
            time_yr: Some(until_yr),
            title: format!("Over the first {}", header::time(until_yr)),
            rates,
            unit: "cm-3",
        };
        return Ok((vec![moment], Exit::Done));
    }
    if arguments.steady {
        let report = model.steady_states();
        output.findings(&report.failures);
        let moments = report
            .states
            .iter()
            .enumerate()
            .map(|(number, state)| Moment {
                time_yr: None,
                title: format!("Steady state {}", number + 1),
                rates: model.reaction_rates(&state.abundances),
                unit: "cm-3 s-1",
            })
            .collect();
        let exit = if report.failures.is_empty() { Exit::Done } else { Exit::WithFindings };
        return Ok((moments, exit));
    }
    let mut times = Vec::new();
    for text in &arguments.time {
        times.push(time(text, "--time")?);
    }
    let given = !times.is_empty();
    if !given {
        times.clone_from(&model.run.times.output_yr);
    }
    times.sort_by(f64::total_cmp);
    times.dedup();
    let evolution = model.evolve_to(&times);
    let exit = evolve::finish(&evolution, output)?;
    // Nothing is happening yet at time zero of interest to a person.
    let points = if output.for_people() && !given {
        &evolution.points[evolution.points.len().saturating_sub(1)..]
    } else {
        &evolution.points[..]
    };
    let moments = points
        .iter()
        .map(|point| Moment {
            time_yr: Some(point.time_yr),
            title: format!("At {}", header::time(point.time_yr)),
            rates: model.reaction_rates(&point.abundances),
            unit: "cm-3 s-1",
        })
        .collect();
    Ok((moments, exit))
}

fn time(text: &str, option: &str) -> Result<f64, Finding> {
    let refuse = |message: String| {
        Finding::error("run-value", Place::file(format!("{option} \"{text}\"")), message)
            .remedy("give a time of zero or more, as in \"1e5 yr\"")
    };
    match parse_quantity(text, Dimension::Time) {
        Ok(value) if value >= 0.0 => Ok(value),
        Ok(value) => Err(refuse(format!("{value} yr is negative"))),
        Err(message) => Err(refuse(message)),
    }
}

fn long_table(model: &Model, moments: &[Moment], wanted: &[usize], net: bool) -> Table {
    let mut table = Table::new(
        ["time_yr", "species", "role", "rank", "reaction", "equation", "rate", "share"]
            .map(Column::new)
            .to_vec(),
    );
    for moment in moments {
        for &species in wanted {
            let ranked = rank(&model.network, &moment.rates, species);
            push(&mut table, model, moment, &ranked, net);
        }
    }
    table
}

fn push(table: &mut Table, model: &Model, moment: &Moment, ranked: &Channels, net: bool) {
    let name = &model.network.species[ranked.species].name;
    for channel in channel_text::ordered(ranked, net) {
        let reaction = &model.network.reactions[channel.reaction];
        table.push(vec![
            moment.time_yr.map_or(Cell::Empty, Cell::Number),
            Cell::text(name),
            Cell::text(channel.role.as_str()),
            Cell::Integer(channel.rank as i64),
            Cell::text(&reaction.id),
            Cell::text(&reaction.equation),
            Cell::Number(if net { channel.net_rate } else { channel.rate }),
            Cell::Number(if net { channel.net_share } else { channel.share }),
        ]);
    }
}
