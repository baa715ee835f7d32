//! Bad input: a clear finding at the right place, the documented exit code, no
//! panic.

use super::program::{HEAD, REACTIONS, RUN, SOURCES, SPECIES, folder, run, stderr, stdout, write};

/// What is spoilt: a file and the text that replaces another in it, or its whole
/// new content when nothing is replaced.
enum Spoil {
    /// Nothing: the arguments are at fault.
    No,
    /// In a file, one text for another.
    Swap(&'static str, &'static str, &'static str),
    /// A file's whole content.
    Whole(&'static str, &'static [u8]),
    /// A file is removed.
    Gone(&'static str),
}
use Spoil::{Gone, No, Swap, Whole};

const R: &str = "net/reactions.csv";
const S: &str = "net/species.csv";
const T: &str = "run.toml";

/// (what, spoilt file, arguments, exit code, words that stderr must hold)
type Case = (&'static str, Spoil, &'static [&'static str], i32, &'static [&'static str]);

fn original(file: &str) -> &'static str {
    match file {
        "run.toml" => RUN,
        "net/network.toml" => HEAD,
        "net/species.csv" => SPECIES,
        "net/reactions.csv" => REACTIONS,
        _ => SOURCES,
    }
}

const EVOLVE: &[&str] = &["evolve", "run.toml"];

#[rustfmt::skip]
const CASES: &[Case] = &[
    // Run files.
    ("empty run file", Whole(T, b""), EVOLVE, 2, &["run-missing-key", "network"]),
    ("run file cut short", Whole(T, b"title = \"x\"\nnetwork = \"ne"), EVOLVE, 2, &["run-syntax", "run.toml:2"]),
    ("binary run file", Whole(T, b"\x7fELF\x02\x01\xff\xfe\x00\x00"), EVOLVE, 2, &["input-encoding", "UTF-8"]),
    ("UTF-16 run file", Whole(T, b"\xff\xfet\x00i\x00"), EVOLVE, 2, &["input-encoding"]),
    ("two faults at once", Whole(T, b"a = = 1\nb = = 2\n"), EVOLVE, 2, &["run.toml:1", "run.toml:2"]),
    ("key that is nearly known", Swap(T, "temperature =", "temperatur ="), EVOLVE, 2, &["run-unknown-key", "run.toml:5:1", "did you mean `temperature`"]),
    ("section that is unknown", Swap(T, "[watch]", "[wacth]"), EVOLVE, 2, &["run-unknown-key", "did you mean `watch`"]),
    ("missing key", Swap(T, "visual_extinction = 10\n", ""), EVOLVE, 2, &["run-missing-key", "cloud.visual_extinction"]),
    ("missing section", Swap(T, "[start]\nH2 = 0.5\nA = 1e-4\n", ""), EVOLVE, 2, &["run-missing-key", "start"]),
    ("text for a number", Swap(T, "temperature = 10", "temperature = \"warm\""), EVOLVE, 2, &["run-value", "run.toml:5", "K"]),
    ("list for a number", Swap(T, "temperature = 10", "temperature = [10]"), EVOLVE, 2, &["run-type", "a list"]),
    ("value for a section", Swap(T, "[watch]\nspecies = [\"A\"]", "watch = 3"), EVOLVE, 2, &["run-unknown-key", "times.watch"]),
    ("negative temperature", Swap(T, "temperature = 10", "temperature = -10"), EVOLVE, 2, &["run-range", "run.toml:5:15"]),
    ("density that is not a number", Swap(T, "1e4", "nan"), EVOLVE, 2, &["run-value", "finite"]),
    ("infinite density", Swap(T, "1e4", "inf"), EVOLVE, 2, &["run-value", "finite"]),
    ("wrong unit", Swap(T, "temperature = 10", "temperature = \"10 mag\""), EVOLVE, 2, &["run-value", "mag", "K"]),
    ("date for a number", Swap(T, "temperature = 10", "temperature = 2026-01-01"), EVOLVE, 2, &["run-type"]),
    ("unknown start species", Swap(T, "A = 1e-4", "AA = 1e-4"), EVOLVE, 2, &["run-unknown-species", "run.toml:10:1", "did you mean `A`"]),
    ("negative abundance", Swap(T, "A = 1e-4", "A = -1e-4"), EVOLVE, 2, &["run-range", "run.toml:10:5"]),
    ("abundance that is not a number", Swap(T, "A = 1e-4", "A = nan"), EVOLVE, 2, &["run-value"]),
    ("too much hydrogen", Swap(T, "H2 = 0.5", "H2 = 1"), EVOLVE, 2, &["run-hydrogen", "2.0"]),
    ("too little hydrogen", Swap(T, "H2 = 0.5", "H2 = 0.4"), EVOLVE, 2, &["run-hydrogen", "0.8"]),
    ("charge that does not balance", Swap(T, "A = 1e-4", "A = 1e-4\n\"H3+\" = 1e-8\n\"e-\" = 2e-8"), EVOLVE, 2, &["run-charge", "run.toml:12", "leave out"]),
    ("times that do not rise", Swap(T, "[1e3, 1e5]", "[1e5, 1e3]"), EVOLVE, 2, &["run-value", "ascending"]),
    ("negative time", Swap(T, "[1e3, 1e5]", "[-1, 1e5]"), EVOLVE, 2, &["run-range", "negative"]),
    ("end before the last output", Swap(T, "until = 1e6", "until = 1e4"), EVOLVE, 2, &["run-value", "before the last output"]),
    ("no time at all", Swap(T, "until = 1e6\noutput = [1e3, 1e5]\n", ""), EVOLVE, 2, &["run-missing-key", "times.until"]),
    ("tolerance out of range", Swap(T, "[watch]", "[solver]\nrelative_tolerance = 3\n[watch]"), EVOLVE, 2, &["run-range", "default is"]),
    ("watched species that is unknown", Swap(T, "[\"A\"]", "[\"OH\"]"), EVOLVE, 2, &["run-unknown-species", "OH"]),
    ("nonsense for extrapolate", Swap(T, "network =", "extrapolate = \"guess\"\nnetwork ="), EVOLVE, 2, &["run-value", "hold"]),
    ("network that is not there", Swap(T, "\"net\"", "\"nett\""), EVOLVE, 2, &["input-missing", "run.toml:2"]),
    ("override without a value", No, &["evolve", "run.toml", "--set", "cloud.temperature"], 2, &["run-override", "--set"]),
    ("override of an unknown key", No, &["evolve", "run.toml", "--set", "cloud.temp=3"], 2, &["run-unknown-key", "--set cloud.temp=3"]),
    // Networks.
    ("empty table", Whole(R, b""), EVOLVE, 2, &["network-empty-file", "reactions.csv"]),
    ("binary table", Whole(R, b"\x00\x01\xff\xfe"), EVOLVE, 2, &["network-encoding"]),
    ("wrong heading", Swap(R, "alpha", "alfa"), EVOLVE, 2, &["network-header", "alfa"]),
    ("cell too many", Swap(R, "lab,seen,\nr-2", "lab,seen,,\nr-2"), EVOLVE, 2, &["network-fields", "reactions.csv:2"]),
    ("table cut short", Swap(R, "r-5,H3+ + e- -> H2 + H,thermal,1e-7,-0.5,0,5,3000,1.5,lab,seen,\n", "r-5,H3+ + e- -> H2"), EVOLVE, 2, &["network-fields", "reactions.csv:6"]),
    ("unknown species in an equation", Swap(R, "A -> B", "A -> BB"), EVOLVE, 2, &["network-unknown-species", "reactions.csv:2", "BB"]),
    ("atoms that do not balance", Swap(R, "H2 -> H + H", "H2 -> H"), EVOLVE, 2, &["network-atoms", "reactions.csv:4"]),
    ("charge that does not balance in an equation", Swap(R, "H3+ + e- ->", "H3+ ->"), EVOLVE, 2, &["network-charge", "reactions.csv:6"]),
    ("equation without an arrow", Swap(R, "A -> B", "A = B"), EVOLVE, 2, &["network-equation", "reactions.csv:2"]),
    ("unknown law", Swap(R, "cosmic_ray,", "cosmic_rays,"), EVOLVE, 2, &["network-law", "reactions.csv:4", "cosmic_ray"]),
    ("number that is none", Swap(R, "1e-12", "1e-12x"), EVOLVE, 2, &["network-number", "reactions.csv:2"]),
    ("coefficient that is not a number", Swap(R, "1e-12", "NaN"), EVOLVE, 2, &["reactions.csv:2"]),
    ("negative coefficient", Swap(R, "1e-12", "-1e-12"), EVOLVE, 2, &["reactions.csv:2"]),
    ("range upside down", Swap(R, "1e-12,0,0,5,3000", "1e-12,0,0,3000,5"), EVOLVE, 2, &["reactions.csv:2"]),
    ("uncertainty below one", Swap(R, "5,3000,1.5,lab,seen,\nr-2", "5,3000,0.5,lab,seen,\nr-2"), EVOLVE, 2, &["reactions.csv:2"]),
    ("source that is not listed", Swap(R, "1.5,lab,seen,\nr-2", "1.5,lob,seen,\nr-2"), EVOLVE, 2, &["network-unknown-source", "reactions.csv:2", "lab"]),
    ("overlapping ranges", Swap(R, "r-2,B", "r-1,A -> B,thermal,1e-12,0,0,100,3000,1.5,lab,seen,\nr-2,B"), EVOLVE, 2, &["network-overlap"]),
    ("one id for two reactions", Swap(R, "r-2", "r-1"), EVOLVE, 2, &["network-duplicate-id"]),
    ("species twice", Swap(S, "B,Q:1", "A,Q:1"), EVOLVE, 2, &["network-duplicate-species", "species.csv:3"]),
    ("unknown element", Swap(S, "A,Q:1", "Xq,"), EVOLVE, 2, &["species-", "species.csv:2"]),
    ("capture without an ion", Swap(R, "A -> B,thermal", "A + H2 -> B + H2,capture"), EVOLVE, 2, &["reactions.csv:2"]),
    ("missing table", Gone(R), EVOLVE, 2, &["network-missing-file", "reactions.csv"]),
    ("missing head", Gone("net/network.toml"), EVOLVE, 2, &["network.toml"]),
    ("head that is not TOML", Whole("net/network.toml", b"title = = 1"), EVOLVE, 2, &["network.toml:1"]),
    ("base that is itself", Whole("net/network.toml", b"title=\"t\"\ntext=\"\"\nelements=[]\npurpose=\"\"\nbase=\"net\"\n"), EVOLVE, 2, &["base"]),
    // Arguments.
    ("unknown verb", No, &["evlove", "run.toml"], 2, &["evolve"]),
    ("unknown option", No, &["evolve", "run.toml", "--fast"], 2, &["--fast"]),
    ("no run", No, &["evolve"], 2, &["<RUN>"]),
    ("run that is not there", No, &["evolve", "dense-cor"], 2, &["input-missing", "did you mean the shipped run `dense-core`"]),
    ("folder for a run", No, &["evolve", "net"], 2, &["folder"]),
    ("file for a network", No, &["check", "run.toml"], 2, &["a network is a folder"]),
    ("network that check cannot find", No, &["check", "clod"], 2, &["did you mean the shipped network `cloud`"]),
    ("unknown species on the command line", No, &["channels", "run.toml", "--species", "B2"], 2, &["run-unknown-species", "--species B2"]),
    ("time that is none", No, &["channels", "run.toml", "--time", "soon"], 2, &["run-value", "--time"]),
    ("negative time on the command line", No, &["channels", "run.toml", "--time=-3 yr"], 2, &["run-value", "negative"]),
    ("time and steady at once", No, &["channels", "run.toml", "--time", "1", "--steady"], 2, &["cannot be used with"]),
    ("figure of an unknown kind", No, &["evolve", "run.toml", "--figure", "a.gif"], 2, &["output-figure", ".svg"]),
    ("figure that cannot be written", No, &["evolve", "run.toml", "--figure", "net/species.csv/a.svg"], 2, &["output-write"]),
    ("code that is none", No, &["explain", "network-chrge"], 2, &["did you mean `network-charge`"]),
    ("format that is none", No, &["evolve", "run.toml", "--format", "xml"], 2, &["csv"]),
];

#[test]
fn every_mistake_gets_a_message_with_a_place_and_a_remedy() {
    let mut wrong = Vec::new();
    for (what, spoil, arguments, code, words) in CASES {
        let folder = folder();
        match spoil {
            No => {}
            Swap(file, from, to) => {
                let text = original(file);
                assert!(text.contains(from), "{what}: {file} has no `{from}`");
                write(folder.path(), file, text.replacen(from, to, 1).as_bytes());
            }
            Whole(file, content) => write(folder.path(), file, content),
            Gone(file) => std::fs::remove_file(folder.path().join(file)).unwrap(),
        }
        let output = run(folder.path(), arguments);
        let err = stderr(&output);
        if output.status.code() != Some(*code) {
            wrong.push(format!("{what}: exit {:?}\n{err}", output.status.code()));
        }
        for word in words.iter().filter(|word| !err.contains(**word)) {
            wrong.push(format!("{what}: no `{word}` in\n{err}"));
        }
        if err.contains("panicked") || err.contains('\u{1b}') {
            wrong.push(format!("{what}: panic or escape codes in\n{err}"));
        }
        let figure = arguments.contains(&"--figure");
        if !figure && !stdout(&output).is_empty() {
            wrong.push(format!("{what}: results were printed\n{}", stdout(&output)));
        }
    }
    assert!(CASES.len() >= 40);
    assert!(wrong.is_empty(), "{} wrong:\n{}", wrong.len(), wrong.join("\n"));
}
