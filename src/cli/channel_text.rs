//! Channels of a species as a person reads them.

use super::output::Output;
use crate::analysis::channels::{Channel, Channels, Role, rank};
use crate::cloud::Model;
use crate::report::text::{ChannelLine, Layout, account, scientific};

/// What an account shows.
pub(super) struct Options {
    /// Channels per role.
    pub(super) top: usize,
    /// Whether exact reverses are taken off.
    pub(super) net: bool,
    /// Unit of the rates.
    pub(super) unit: &'static str,
}

/// A short account, for the end of another command's output.
pub(super) fn summary(
    model: &Model,
    rates: &[f64],
    species: usize,
    top: usize,
    output: &Output,
) -> String {
    let ranked = rank(&model.network, rates, species);
    let options = Options { top, net: false, unit: "cm-3 s-1" };
    both(model, &ranked, &options, output, false)
}

/// A full account with coefficients, uncertainty factors and sources.
pub(super) fn full(model: &Model, ranked: &Channels, options: &Options, output: &Output) -> String {
    both(model, ranked, options, output, true)
}

/// The channels in the order asked for: by gross or by net share.
pub(super) fn ordered(ranked: &Channels, net: bool) -> Vec<Channel> {
    let mut channels: Vec<Channel> =
        ranked.channels.iter().filter(|c| c.rate > 0.0).cloned().collect();
    if net {
        channels.retain(|c| c.net_rate > 0.0);
        channels.sort_by(|a, b| a.role.cmp(&b.role).then(b.net_share.total_cmp(&a.net_share)));
        for role in [Role::Formation, Role::Destruction] {
            let same = channels.iter_mut().filter(|c| c.role == role);
            for (place, channel) in same.enumerate() {
                channel.rank = place + 1;
            }
        }
    }
    channels
}

fn both(
    model: &Model,
    ranked: &Channels,
    options: &Options,
    output: &Output,
    details: bool,
) -> String {
    let layout = Layout { width: output.width(), symbols: output.symbols(), details };
    let name = &model.network.species[ranked.species].name;
    let channels = ordered(ranked, options.net);
    let mut out = String::from("\n");
    for (role, verb) in [(Role::Formation, "made"), (Role::Destruction, "destroyed")] {
        let of_role: Vec<&Channel> = channels.iter().filter(|c| c.role == role).collect();
        let total = ranked.total(role);
        let kind = if options.net { ", reverse reactions taken off" } else { "" };
        let heading = if of_role.is_empty() {
            format!("{name} is not {verb}")
        } else {
            format!("{name} is {verb}: {} {} in all{kind}", scientific(total, 2), options.unit)
        };
        let lines: Vec<ChannelLine> = of_role
            .iter()
            .take(options.top)
            .map(|channel| line(model, channel, options.net))
            .collect();
        let rest = of_role.len() - lines.len();
        out.push_str(&account(&heading, &lines, rest, layout));
        if details && !options.net {
            out.push_str(&cycles(model, &of_role, options));
        }
    }
    out
}

fn line(model: &Model, channel: &Channel, net: bool) -> ChannelLine {
    let network = &model.network;
    let reaction = &network.reactions[channel.reaction];
    let (row, _) = reaction.active_row(model.run.conditions.temperature);
    let source = if row.source.is_empty() { "no source" } else { &row.source };
    let law = law_mark(reaction.law().name());
    ChannelLine {
        equation: format!("{}{law}", reaction.equation),
        share: if net { channel.net_share } else { channel.share },
        detail: format!(
            "k {} {}, F {}, {source}",
            scientific(model.coefficients[channel.reaction], 2),
            network.coefficient_unit(reaction),
            row.uncertainty,
        ),
    }
}

/// What drives a reaction that its equation does not show.
fn law_mark(law: &str) -> &'static str {
    match law {
        "cosmic_ray" => " [cosmic rays]",
        "cosmic_ray_photon" => " [secondary photons]",
        "starlight" => " [starlight]",
        "dust_h2" | "dust_recombination" => " [dust]",
        _ => "",
    }
}

/// Notes on shown channels that their exact reverse undoes.
fn cycles(model: &Model, channels: &[&Channel], options: &Options) -> String {
    let mut out = String::new();
    for channel in channels.iter().take(options.top) {
        if channel.reverse.is_some() && channel.net_rate < 0.9 * channel.rate {
            let equation = &model.network.reactions[channel.reaction].equation;
            let undone = 100.0 * (1.0 - channel.net_rate / channel.rate);
            out.push_str(&format!(
                "    note: {undone:.0}% of {equation} is undone by its reverse (--net takes that off)\n"
            ));
        }
    }
    out
}
