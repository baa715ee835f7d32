//! `explain`: what a code means.

use super::arguments::ExplainArguments;
use super::exit::{Exit, Outcome};
use super::output::Output;
use crate::diagnostic::{CODES, Finding, Place, explain, nearest};
use crate::report::table::{Cell, Column, Table};

pub(super) fn run(arguments: &ExplainArguments, output: &mut Output) -> Outcome {
    let chosen: Vec<(&str, &str)> = match &arguments.code {
        None => CODES.to_vec(),
        Some(code) => {
            let Some(text) = explain(code) else {
                let remedy = nearest(code, CODES.iter().map(|c| c.0)).map_or_else(
                    || "`duskwater explain` lists all codes".to_owned(),
                    |near| format!("did you mean `{near}`?"),
                );
                return Err(Finding::error(
                    "input-missing",
                    Place::default(),
                    format!("there is no code `{code}`"),
                )
                .remedy(remedy)
                .into());
            };
            vec![(code, text)]
        }
    };
    if output.for_people() {
        for (code, text) in chosen {
            let wrapped = crate::report::text::wrap(text, output.width() - 4, 4);
            output.text(&format!("{code}\n{wrapped}\n"))?;
        }
    } else {
        let mut table = Table::new(vec![Column::new("code"), Column::new("text")]);
        for (code, text) in chosen {
            table.push(vec![Cell::text(code), Cell::text(text)]);
        }
        output.table(&table)?;
    }
    Ok(Exit::Done)
}
