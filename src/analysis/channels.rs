//! Formation and destruction channels of a species, ranked.
//!
//! The rate of a channel is its reaction's events per cm3 and second; its share
//! is of the gross total of its role, counted in molecules (a reaction that
//! gives two H counts twice for H). A reaction on both sides of which the
//! species stands counts by its net gain. Where a reaction and its exact
//! reverse both run, a fast cycle between them can hide the real source: their
//! difference is reported beside the gross rates.

use std::collections::HashMap;

use crate::cloud::{Evolution, Model};
use crate::diagnostic::Finding;
use crate::network::Network;
use crate::units::YEAR_S;

/// Whether a channel makes or destroys the species.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Role {
    /// The species is made.
    Formation,
    /// The species is destroyed.
    Destruction,
}

impl Role {
    /// `formation` or `destruction`.
    #[must_use]
    pub fn as_str(self) -> &'static str {
        match self {
            Self::Formation => "formation",
            Self::Destruction => "destruction",
        }
    }
}

/// One channel of a species.
#[derive(Clone, Debug, PartialEq)]
pub struct Channel {
    /// Index of the reaction in the network.
    pub reaction: usize,
    /// What it does to the species.
    pub role: Role,
    /// Rank within the role, from 1.
    pub rank: usize,
    /// Events, cm-3 s-1 (or cm-3 when integrated over time).
    pub rate: f64,
    /// Share of the gross total of the role.
    pub share: f64,
    /// Events left after the exact reverse is taken off (not below zero);
    /// equal to `rate` where there is no reverse.
    pub net_rate: f64,
    /// Share of the total of the role when every reverse is taken off.
    pub net_share: f64,
    /// The exact reverse, if the network has it.
    pub reverse: Option<usize>,
}

/// The channels of one species in one state.
#[derive(Clone, Debug, PartialEq)]
pub struct Channels {
    /// The species.
    pub species: usize,
    /// Channels by falling rate, formation first.
    pub channels: Vec<Channel>,
    /// Molecules made, gross, cm-3 s-1 (or cm-3).
    pub formation: f64,
    /// Molecules destroyed, gross, cm-3 s-1 (or cm-3).
    pub destruction: f64,
}

impl Channels {
    /// The channels of one role by falling rate.
    pub fn of(&self, role: Role) -> impl Iterator<Item = &Channel> {
        self.channels.iter().filter(move |channel| channel.role == role)
    }

    /// Molecules made or destroyed, gross.
    #[must_use]
    pub fn total(&self, role: Role) -> f64 {
        match role {
            Role::Formation => self.formation,
            Role::Destruction => self.destruction,
        }
    }
}

/// Ranks the channels of `species` given the events of every reaction.
///
/// # Shape
/// `rates`: `[reactions]`, cm-3 s-1, or cm-3 when integrated over time.
#[must_use]
pub fn rank(network: &Network, rates: &[f64], species: usize) -> Channels {
    let gain = |reaction: usize| {
        let count = |list: &[usize]| list.iter().filter(|&&s| s == species).count() as f64;
        let r = &network.reactions[reaction];
        count(&r.products) - count(&r.reactants)
    };
    let involved: Vec<usize> =
        (0..network.reactions.len()).filter(|&r| gain(r).abs() > 0.0).collect();
    let reverse = reverses(network, &involved);
    let mut channels = Vec::with_capacity(involved.len());
    let (mut totals, mut net_totals) = ([0.0; 2], [0.0; 2]);
    for &reaction in &involved {
        let gain = gain(reaction);
        let role = if gain > 0.0 { Role::Formation } else { Role::Destruction };
        let rate = rates[reaction];
        let reverse = reverse.get(&reaction).copied();
        let net_rate = reverse.map_or(rate, |r| (rate - rates[r]).max(0.0));
        totals[role as usize] += rate * gain.abs();
        net_totals[role as usize] += net_rate * gain.abs();
        channels.push(Channel {
            reaction,
            role,
            rank: 0,
            rate,
            share: rate * gain.abs(),
            net_rate,
            net_share: net_rate * gain.abs(),
            reverse,
        });
    }
    let fraction = |part: f64, total: f64| if total > 0.0 { part / total } else { 0.0 };
    for channel in &mut channels {
        let role = channel.role as usize;
        channel.share = fraction(channel.share, totals[role]);
        channel.net_share = fraction(channel.net_share, net_totals[role]);
    }
    channels.sort_by(|a, b| {
        (a.role, b.share, a.reaction)
            .partial_cmp(&(b.role, a.share, b.reaction))
            .unwrap_or(std::cmp::Ordering::Equal)
    });
    let mut ranks = [0; 2];
    for channel in &mut channels {
        ranks[channel.role as usize] += 1;
        channel.rank = ranks[channel.role as usize];
    }
    Channels { species, channels, formation: totals[0], destruction: totals[1] }
}

/// For each reaction of a list, the reaction of the list that is its exact
/// reverse.
fn reverses(network: &Network, list: &[usize]) -> HashMap<usize, usize> {
    let sorted = |species: &[usize]| {
        let mut species = species.to_vec();
        species.sort_unstable();
        species
    };
    let sides = |r: usize| {
        let reaction = &network.reactions[r];
        (sorted(&reaction.reactants), sorted(&reaction.products))
    };
    let by_sides: HashMap<_, _> = list.iter().map(|&r| (sides(r), r)).collect();
    list.iter()
        .filter_map(|&r| {
            let (reactants, products) = sides(r);
            by_sides.get(&(products, reactants)).map(|&reverse| (r, reverse))
        })
        .collect()
}

/// Nodes and weights of four-point Gauss-Legendre quadrature on 0..1
/// (Abramowitz & Stegun 1964, table 25.4).
const GAUSS: [(f64, f64); 4] = [
    (0.069_431_844_202_973_71, 0.173_927_422_568_726_93),
    (0.330_009_478_207_571_87, 0.326_072_577_431_273_07),
    (0.669_990_521_792_428_1, 0.326_072_577_431_273_07),
    (0.930_568_155_797_026_3, 0.173_927_422_568_726_93),
];

/// Events of every reaction per cm3 from the start of the run to `until_yr`.
///
/// Gauss-Legendre quadrature on panels that are even in log time, twelve a
/// decade, below the first of which lies a billionth of the interval.
///
/// # Errors
/// The finding that stopped the integration.
pub fn integrated_rates(model: &Model, until_yr: f64) -> Result<Vec<f64>, Finding> {
    let panels: Vec<(f64, f64)> = (0..=108)
        .map(|i| {
            let edge = |i: i32| until_yr * 10f64.powf(f64::from(i - 108) / 12.0);
            (if i == 0 { 0.0 } else { edge(i - 1) }, edge(i))
        })
        .collect();
    let nodes: Vec<(f64, f64)> = panels
        .iter()
        .flat_map(|&(from, to)| {
            GAUSS.map(|(x, w)| (from + x * (to - from), w * (to - from) * YEAR_S))
        })
        .collect();
    let times: Vec<f64> = nodes.iter().map(|n| n.0).collect();
    let Evolution { points, failure, .. } = model.evolve_to(&times);
    if let Some(failure) = failure {
        return Err(failure);
    }
    let mut events = vec![0.0; model.network.reactions.len()];
    for (point, (_, weight)) in points.iter().zip(&nodes) {
        for (sum, rate) in events.iter_mut().zip(model.reaction_rates(&point.abundances)) {
            *sum += weight * rate;
        }
    }
    Ok(events)
}
