//! The arguments of every command.

use clap::{Args, Parser, Subcommand, ValueEnum};

/// Chemistry of interstellar clouds: abundances over time, steady states, and
/// the reactions behind them.
#[derive(Debug, Parser)]
#[command(
    name = "duskwater",
    version,
    max_term_width = 100,
    after_help = "\
Examples:
  duskwater evolve dense-core                    abundances and channels of a cold core
  duskwater channels dense-core --species OH     what makes and destroys OH
  duskwater check cloud                          how far the shipped network can be trusted
  duskwater shipped --into my-cloud              copies of the shipped runs and networks

Exit codes: 0 done; 1 done, with findings; 2 could not run; 3 internal error."
)]
pub(super) struct Arguments {
    #[command(subcommand)]
    pub(super) command: Command,
    #[command(flatten)]
    pub(super) common: Common,
}

/// Options of every command.
#[derive(Args, Debug)]
pub(super) struct Common {
    /// Form of the result on standard output
    #[arg(long, global = true, value_enum, default_value_t = Format::Text)]
    pub(super) format: Format,
    /// Say only what was asked for: no notes, no progress
    #[arg(long, short, global = true, conflicts_with = "verbose")]
    pub(super) quiet: bool,
    /// Say more
    #[arg(long, short, global = true)]
    pub(super) verbose: bool,
}

/// Form of a result.
#[derive(Clone, Copy, Debug, PartialEq, Eq, ValueEnum)]
pub(super) enum Format {
    /// For people
    Text,
    /// Comma-separated values with one heading line
    Csv,
    /// An array of objects
    Json,
}

#[derive(Debug, Subcommand)]
pub(super) enum Command {
    /// Read a network, say what is wrong with it and how sure its coefficients are
    Check(CheckArguments),
    /// Print the rate coefficient of every reaction at a run's conditions
    Rates(RatesArguments),
    /// Integrate one cloud in time
    Evolve(EvolveArguments),
    /// Find all steady states of one cloud
    Steady(SteadyArguments),
    /// Rank what makes and destroys a species
    Channels(ChannelsArguments),
    /// List the shipped runs and networks, or write them out for editing
    Shipped(ShippedArguments),
    /// Explain a code of a finding
    Explain(ExplainArguments),
}

/// A run and changes to it.
#[derive(Args, Debug)]
pub(super) struct RunArguments {
    /// A run file, or the name of a shipped run
    pub(super) run: String,
    /// Override a key of the run file, as in --set cloud.temperature=20 (repeatable)
    #[arg(long, value_name = "KEY=VALUE")]
    pub(super) set: Vec<String>,
}

#[derive(Args, Debug)]
#[command(after_help = "\
Examples:
  duskwater check cloud
  duskwater check my-network --format csv
  duskwater check my-network --every-row")]
pub(super) struct CheckArguments {
    /// A network folder, or the name of a shipped network
    pub(super) network: String,
    /// List every row that rests on memory, instead of counting them
    #[arg(long)]
    pub(super) every_row: bool,
}

#[derive(Args, Debug)]
#[command(after_help = "\
Examples:
  duskwater rates dense-core --species OH
  duskwater rates dense-core --set cloud.temperature=300 --format csv")]
pub(super) struct RatesArguments {
    #[command(flatten)]
    pub(super) run: RunArguments,
    /// Only reactions that take or give one of these species
    #[arg(long, value_delimiter = ',', value_name = "LIST")]
    pub(super) species: Vec<String>,
}

#[derive(Args, Debug)]
#[command(after_help = "\
Examples:
  duskwater evolve dense-core
  duskwater evolve my-run.toml --format csv > abundances.csv
  duskwater evolve dense-core --figure core.svg")]
pub(super) struct EvolveArguments {
    #[command(flatten)]
    pub(super) run: RunArguments,
    /// Species in the text table and the figure (default: those watched and the main ones)
    #[arg(long, value_delimiter = ',', value_name = "LIST")]
    pub(super) species: Vec<String>,
    /// Draw the abundances over time into this SVG file (or PNG, where built with it)
    #[arg(long, value_name = "FILE")]
    pub(super) figure: Option<std::path::PathBuf>,
}

#[derive(Args, Debug)]
#[command(after_help = "\
Examples:
  duskwater steady dense-core
  duskwater steady dense-core --set cloud.hydrogen_density=1e3 --format json")]
pub(super) struct SteadyArguments {
    #[command(flatten)]
    pub(super) run: RunArguments,
    /// Species in the text table (default: those watched and the main ones)
    #[arg(long, value_delimiter = ',', value_name = "LIST")]
    pub(super) species: Vec<String>,
}

#[derive(Args, Debug)]
#[command(after_help = "\
Examples:
  duskwater channels dense-core --species OH,H2O
  duskwater channels dense-core --species OH --time \"1e5 yr\" --net
  duskwater channels dense-core --species OH --steady
  duskwater channels dense-core --species OH --until \"1e5 yr\"     shares over the first 1e5 yr
  duskwater channels dense-core --species OH --figure oh.svg")]
pub(super) struct ChannelsArguments {
    #[command(flatten)]
    pub(super) run: RunArguments,
    /// Species to explain (default: those watched)
    #[arg(long, value_delimiter = ',', value_name = "LIST")]
    pub(super) species: Vec<String>,
    /// Times to look at (default: every output time in csv and json, the last in text)
    #[arg(long, value_delimiter = ',', value_name = "TIME", conflicts_with_all = ["steady", "until"])]
    pub(super) time: Vec<String>,
    /// Look at the steady state instead (all of them, where there are several)
    #[arg(long, conflicts_with = "until")]
    pub(super) steady: bool,
    /// Integrate the rates from the start to this time
    #[arg(long, value_name = "TIME")]
    pub(super) until: Option<String>,
    /// Rank by net shares: a reaction's exact reverse is taken off first
    #[arg(long)]
    pub(super) net: bool,
    /// Channels shown per role in text form
    #[arg(long, value_name = "N", default_value_t = 8)]
    pub(super) top: usize,
    /// Draw the shares over time of the first species into this SVG file
    #[arg(long, value_name = "FILE")]
    pub(super) figure: Option<std::path::PathBuf>,
}

#[derive(Args, Debug)]
#[command(after_help = "\
Examples:
  duskwater shipped
  duskwater shipped --into my-cloud")]
pub(super) struct ShippedArguments {
    /// Write all of them below this folder, which must not hold them yet
    #[arg(long, value_name = "FOLDER")]
    pub(super) into: Option<std::path::PathBuf>,
}

#[derive(Args, Debug)]
#[command(after_help = "\
Example:
  duskwater explain network-charge")]
pub(super) struct ExplainArguments {
    /// A code, as printed in brackets (default: list all)
    pub(super) code: Option<String>,
}
