//! The list of every code, with what it means at length.
//!
//! A new code is one line here; `tests/codes.rs` checks that every code used
//! in the sources is listed, once, and that no listed code is unused.

/// Every code and its explanation, in the order in which a reader of the
/// manual wants them.
pub const CODES: &[(&str, &str)] = &[
    (
        "species-formula",
        "A species name or composition does not follow the grammar: elements with counts, \
         then `+` or `-` for charge, then `(ice)` for ice. `e-` is the electron and \
         `grain` is dust.",
    ),
    (
        "species-unknown-element",
        "A name holds an element that has no atomic weight here (H to Zn and D have). \
         Correct it, or give the composition in its own column, where elements may be \
         made up.",
    ),
    (
        "network-missing-file",
        "A network folder holds network.toml, species.csv, reactions.csv and sources.csv; \
         one is missing. With a `base`, only network.toml is needed.",
    ),
    ("network-encoding", "A file is not UTF-8 text."),
    ("network-empty-file", "A table has not even a header line."),
    (
        "network-header",
        "The first line of a table lacks a column, or has one that is unknown or stands \
         twice.",
    ),
    (
        "network-fields",
        "A line has more or fewer cells than the header. Most often a cell with a comma \
         is not in quotes.",
    ),
    ("network-quote", "A quoted cell is not closed, or text follows its closing quote."),
    ("network-toml", "network.toml does not follow the TOML grammar."),
    (
        "network-key",
        "network.toml has an unknown key, a value of the wrong type, no title, or picks \
         from a base without naming one.",
    ),
    (
        "network-base",
        "The network named by `base` was not found, or networks build on one another in a \
         circle.",
    ),
    ("network-unknown-id", "network.toml picks a reaction that its base does not have."),
    ("network-elements", "The `elements` of network.toml are not the elements of its species."),
    ("network-source-row", "A line of sources.csv lacks its key or citation."),
    ("network-duplicate-source", "Two lines of sources.csv have one key and different citations."),
    ("network-unknown-source", "A row names a source that sources.csv does not list."),
    ("network-duplicate-species", "A species is listed twice."),
    ("network-unknown-species", "A species is used that species.csv does not list."),
    ("network-id", "A row has no id, or its id holds blanks."),
    (
        "network-duplicate-id",
        "One id stands for rows of different reactions. Rows of one reaction may share an \
         id.",
    ),
    (
        "network-equation",
        "An equation cannot be read. Species stand between ` + ` and ` -> `, with an \
         optional count before a name.",
    ),
    ("network-number", "A cell that wants a finite number holds something else."),
    ("network-negative", "A number that cannot be negative is."),
    ("network-range", "The temperature range of a row is empty or reaches 0 K."),
    ("network-uncertainty", "The uncertainty is a factor F either way and at least 1."),
    ("network-law", "The law of a row is unknown."),
    (
        "network-law-not-built",
        "The law of a row is reserved for gas-ice exchange, which is not built yet.",
    ),
    (
        "network-law-shape",
        "The law does not fit the reactants: `capture` wants an ion and a neutral, \
         photoprocesses one reactant, and so on.",
    ),
    (
        "network-missing-data",
        "A law needs a datum of a species (a mass, a polarizability) that is not given.",
    ),
    (
        "network-dust-ion",
        "The effective recombination on dust has constants for H+, He+, C+, Na+, Mg+, \
         Si+, S+ and Fe+ only.",
    ),
    ("network-unused-number", "A row gives a number that its law does not use."),
    ("network-atoms", "An equation does not keep its atoms."),
    ("network-charge", "An equation does not keep its charge."),
    (
        "network-overlap",
        "Two rows of one reaction cover the same temperatures, so that the coefficient is \
         not defined. Ranges may touch; at the shared edge the upper row holds.",
    ),
    (
        "network-mixed-dust",
        "Ions recombine both on explicit grains and by the effective form. That counts \
         the same dust twice.",
    ),
    (
        "network-coefficient",
        "A coefficient is negative or not a finite number under the given conditions.",
    ),
    (
        "audit-made-up-element",
        "A species holds an element without an atomic weight. That is fine in a test \
         network; its mass is not known.",
    ),
    (
        "audit-twins",
        "Two species have the same atoms, charge and enthalpy: perhaps one species under \
         two names.",
    ),
    (
        "audit-no-enthalpy",
        "Species without a formation enthalpy: reactions with them cannot be judged for \
         energy or detailed balance.",
    ),
    (
        "audit-no-dipole",
        "The capture law is used for a neutral whose dipole is not given and counts as 0. \
         For a polar molecule that is far too slow when cold.",
    ),
    ("audit-no-change", "Both sides of an equation are the same."),
    (
        "audit-range",
        "Rows do not cover 5 to 3000 K. Outside, the nearest row is held at its nearest \
         edge; the message says how far that is from its formula continued.",
    ),
    ("audit-seam", "The coefficient jumps where two rows meet, by more than a factor 1.5."),
    (
        "audit-too-fast",
        "A coefficient is larger than any collision of that kind: 1e-5 cm3 s-1 for two \
         opposite charges, 1e-6 with an ion, 3e-9 for neutrals, 1e-25 cm6 s-1 for \
         three bodies.",
    ),
    (
        "audit-continuation",
        "A formula gives impossible values when continued outside its range, most often \
         because gamma is negative. Harmless as long as the edge is held.",
    ),
    (
        "audit-beyond-capture",
        "The channels of an ion and a neutral together exceed the rate at which the two \
         meet.",
    ),
    (
        "audit-uphill",
        "A reaction takes energy by the enthalpies of its species, yet its coefficient is \
         large where it is cold.",
    ),
    (
        "audit-low-barrier",
        "The barrier of an endothermic reaction is much smaller than the energy it takes.",
    ),
    ("audit-ion-barrier", "A strongly exothermic reaction of an ion has a barrier, which is rare."),
    (
        "audit-neutral-barrier",
        "Exothermic reactions of neutrals that have a barrier; this is common.",
    ),
    (
        "audit-detailed-balance",
        "A reaction and its reverse are farther from detailed balance than a stated \
         factor at 300 or 1000 K.",
    ),
    ("audit-never-used", "A species takes part in no reaction."),
    ("audit-never-made", "Nothing makes a species at 10 K: it keeps at most its start abundance."),
    ("audit-never-destroyed", "Nothing destroys a species at 10 K: it piles up."),
    ("audit-no-source", "Rows without a source."),
    (
        "audit-provenance",
        "Numbers that were not seen in their source: remembered, estimated or derived.",
    ),
    ("audit-unused-source", "Sources that nothing cites."),
    (
        "run-syntax",
        "A run file does not follow the TOML grammar: `key = value` lines under [section] \
         headings.",
    ),
    (
        "run-override",
        "An option `--set` is not of the form key=value, or its key leads through \
         something that is not a section.",
    ),
    (
        "run-unknown-key",
        "A run file has a key that the program does not know; nothing is ignored \
         silently, because a misspelt key would otherwise leave a default in force.",
    ),
    ("run-missing-key", "A run file lacks a key that has no default."),
    (
        "run-type",
        "A key holds the wrong kind of value, for example text where a number or a \
         section is wanted.",
    ),
    (
        "run-value",
        "A value cannot be read, has a unit that does not fit, or contradicts another \
         key.",
    ),
    ("run-range", "A value is outside the range that the program accepts."),
    (
        "run-unknown-species",
        "A run file or an option names a species that its network does not have.",
    ),
    (
        "run-absent-element",
        "The start names a species of an element that the network leaves out \
         altogether. The species is left out, so that a run serves a network and its \
         subsets alike.",
    ),
    ("run-elements", "The network has more elements than the solver can conserve one by one."),
    (
        "run-hydrogen",
        "The start abundances do not hold one hydrogen nucleus per hydrogen nucleus. They \
         are relative to n_H = n(H) + 2 n(H2) + ..., so that all hydrogen in molecules is \
         H2 = 0.5.",
    ),
    (
        "run-charge",
        "The start abundances carry a net charge. Leave `e-` out and the electrons are \
         filled in.",
    ),
    (
        "run-watch",
        "A command that explains species was given none, neither in the run file nor as \
         an option.",
    ),
    ("run-sweep", "A run file asks for a sweep where one cloud is wanted."),
    (
        "solve-integration",
        "The integrator could not go on: its step became too small or it took too many. \
         The message says when, and at which species the error was largest.",
    ),
    ("solve-steady", "A search for a steady state gave up before the abundances stood still."),
    (
        "input-missing",
        "What the command was asked for (a run, a network, a code) is neither a file or \
         folder nor shipped with the program. `duskwater shipped` lists what is.",
    ),
    ("input-read", "A file is there but could not be read; the message says what the system says."),
    ("input-encoding", "A run file is not UTF-8 text; the place is where that shows first."),
    (
        "output-write",
        "A result could not be written: no such folder, no permission, or no space. \
         Files are written under a temporary name and renamed when whole, so that none is \
         left half-written.",
    ),
    ("output-exists", "A file that would be written is there already. Nothing was written."),
    (
        "output-figure",
        "Figures are .svg files, or .png files in a build with the feature `png`, which \
         needs a font on the system.",
    ),
];

/// The explanation of a code, or none when the code is not ours.
pub fn explain(code: &str) -> Option<&'static str> {
    CODES.iter().find(|(name, _)| *name == code).map(|(_, text)| *text)
}
