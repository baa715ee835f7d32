//! What machines rely on: columns, exit codes, streams.

use std::collections::{BTreeMap, HashMap};
use std::process::Stdio;

use super::program::{folder, program, rows, run, stderr, stdout, write};

#[test]
fn every_command_has_the_columns_of_the_contract_and_json_the_same() {
    let folder = folder();
    let cases: [(&[&str], &str); 7] = [
        (&["check", "net"], "severity,code,place,message"),
        (&["rates", "run.toml"], "reaction,equation,law,coefficient,unit,depends_on"),
        (&["evolve", "run.toml"], "time_yr,species,abundance"),
        (&["steady", "run.toml"], "state,species,abundance,stable"),
        (
            &["channels", "run.toml", "--species", "H2"],
            "time_yr,species,role,rank,reaction,equation,rate,share",
        ),
        (&["shipped"], "kind,name,species,reactions,title"),
        (&["explain"], "code,text"),
    ];
    for (arguments, columns) in cases {
        let csv = run(folder.path(), &[arguments, &["--format", "csv"]].concat());
        assert!(csv.status.code().is_some_and(|c| c <= 1), "{arguments:?}: {}", stderr(&csv));
        let (head, csv_rows) = rows(&csv);
        assert_eq!(head.join(","), columns, "{arguments:?}");
        let json = run(folder.path(), &[arguments, &["--format", "json"]].concat());
        let values: Vec<serde_json::Map<String, serde_json::Value>> =
            serde_json::from_slice(&json.stdout).unwrap();
        assert_eq!(values.len(), csv_rows.len(), "{arguments:?}");
        if let Some(first) = values.first() {
            let keys: Vec<&str> = first.keys().map(String::as_str).collect();
            assert_eq!(keys.join(","), columns, "{arguments:?}");
        }
    }
}

#[test]
fn evolve_writes_every_species_at_every_output_time_from_zero() {
    let folder = folder();
    let (_, rows) = rows(&run(folder.path(), &["evolve", "run.toml", "--format", "csv"]));
    let times: Vec<f64> = rows.iter().step_by(6).map(|row| row[0].parse().unwrap()).collect();
    assert_eq!(times, [0.0, 1e3, 1e5, 1e6]);
    assert_eq!(rows.len(), 4 * 6);
    assert_eq!(rows[0][1..], ["A", "0.0001"]);
    // A <-> B with 1e-12 and 2e-12 s-1: A = 1e-4 (2 + exp(-3e-12 t)) / 3.
    let a = rows.iter().filter(|row| row[1] == "A");
    for row in a {
        let (time, got): (f64, f64) = (row[0].parse().unwrap(), row[2].parse().unwrap());
        let expected = 1e-4 * (2.0 + (-3e-12 * time * 3.15576e7).exp()) / 3.0;
        assert!((got / expected - 1.0).abs() < 1e-5, "{time} yr: {got} against {expected}");
    }
}

#[test]
fn shares_of_a_role_add_up_and_rates_rebuild_from_the_tables() {
    let folder = folder();
    let arguments =
        ["channels", "dense-core", "--species", "OH,H2O", "--time", "1e5", "--format", "csv"];
    let (_, channels) = rows(&run(folder.path(), &arguments));
    let mut sums: BTreeMap<(String, String), f64> = BTreeMap::new();
    for row in &channels {
        *sums.entry((row[1].clone(), row[2].clone())).or_default() +=
            row[7].parse::<f64>().unwrap();
    }
    assert_eq!(sums.len(), 4);
    for (key, sum) in sums {
        assert!((sum - 1.0).abs() < 1e-9, "{key:?}: {sum}");
    }
    // Coefficients times densities give the same events.
    let (_, rates) = rows(&run(folder.path(), &["rates", "dense-core", "--format", "csv"]));
    let coefficients: HashMap<&str, (&str, f64)> = rates
        .iter()
        .map(|row| (row[0].as_str(), (row[5].as_str(), row[3].parse().unwrap())))
        .collect();
    let evolve = ["evolve", "dense-core", "--set", "times.output=[1e5]", "--format", "csv"];
    let (_, points) =
        rows(&run(folder.path(), &[&evolve[..], &["--set", "times.until=1e5"]].concat()));
    let density: HashMap<&str, f64> = points
        .iter()
        .filter(|row| row[0] == "100000")
        .map(|row| (row[1].as_str(), 2e4 * row[2].parse::<f64>().unwrap()))
        .collect();
    for row in &channels {
        let (depends_on, k) = coefficients[row[4].as_str()];
        let events = depends_on.split(' ').fold(k, |rate, species| rate * density[species]);
        let got: f64 = row[6].parse().unwrap();
        if got < 1e-200 {
            continue; // Numbers too small to keep their digits.
        }
        assert!((events / got - 1.0).abs() < 1e-6, "{row:?}: {events:e}");
    }
}

#[test]
fn check_ends_with_0_when_clean_and_1_with_findings() {
    let folder = folder();
    let clean = run(folder.path(), &["check", "net", "--format", "csv"]);
    let (_, findings) = rows(&clean);
    let serious = findings.iter().any(|row| row[0] != "note");
    assert_eq!(clean.status.code(), Some(i32::from(serious)), "{findings:?}");
    write(folder.path(), "net/reactions.csv", b"id,equation\n");
    let broken = run(folder.path(), &["check", "net", "--format", "csv"]);
    assert_eq!(broken.status.code(), Some(1));
    assert!(stdout(&broken).contains("error,network-header"));
}

#[test]
fn a_closed_pipe_ends_quietly_and_a_full_disk_with_a_message() {
    let folder = folder();
    let arguments = ["evolve", "dense-core", "--format", "csv"];
    let mut child = program(folder.path(), &arguments)
        .stdout(Stdio::piped())
        .stderr(Stdio::piped())
        .spawn()
        .unwrap();
    drop(child.stdout.take());
    let output = child.wait_with_output().unwrap();
    assert_eq!(output.status.code(), Some(0), "{}", stderr(&output));
    assert!(output.stderr.is_empty(), "{}", stderr(&output));
    if let Ok(full) = std::fs::OpenOptions::new().write(true).open("/dev/full") {
        let output = program(folder.path(), &arguments).stdout(full).output().unwrap();
        assert_eq!(output.status.code(), Some(2));
        assert!(stderr(&output).contains("output-write"), "{}", stderr(&output));
    }
}

#[test]
fn quiet_says_nothing_beside_the_result_and_warnings_do_not_spoil_it() {
    let folder = folder();
    let warned = ["evolve", "diffuse", "--set", "network=diffuse", "--format", "csv"];
    let loud = run(folder.path(), &warned);
    assert!(stderr(&loud).contains("run-absent-element"));
    let quiet = run(folder.path(), &[&warned[..], &["--quiet"]].concat());
    assert!(quiet.stderr.is_empty() && quiet.stdout == loud.stdout);
    assert_eq!(quiet.status.code(), Some(0));
}

#[test]
fn shipped_files_are_written_whole_and_never_over_others() {
    let folder = folder();
    let first = run(folder.path(), &["shipped", "--into", "mine"]);
    assert_eq!(first.status.code(), Some(0), "{}", stderr(&first));
    let second = run(folder.path(), &["shipped", "--into", "mine"]);
    assert_eq!(second.status.code(), Some(2));
    assert!(stderr(&second).contains("output-exists"));
    // A run written out finds the network beside it.
    let own = run(
        folder.path(),
        &["evolve", "mine/runs/dense-core.toml", "--set", "network=mine/networks/cloud"],
    );
    assert_eq!(own.status.code(), Some(0), "{}", stderr(&own));
}

#[test]
fn the_examples_of_every_help_text_run() {
    let folder = folder();
    run(folder.path(), &["shipped", "--into", "my"]);
    std::fs::copy(folder.path().join("my/runs/dense-core.toml"), folder.path().join("my-run.toml"))
        .unwrap();
    let network = folder.path().join("my/networks/cloud");
    let copy = folder.path().join("my-network");
    std::fs::create_dir(&copy).unwrap();
    for entry in std::fs::read_dir(network).unwrap() {
        let path = entry.unwrap().path();
        std::fs::copy(&path, copy.join(path.file_name().unwrap())).unwrap();
    }
    let mut count = 0;
    for verb in ["check", "rates", "evolve", "steady", "channels", "shipped", "explain"] {
        let help = stdout(&run(folder.path(), &[verb, "--help"]));
        let examples = help.lines().filter_map(|line| line.trim().strip_prefix("duskwater "));
        for example in examples {
            let example = example.split("  ").next().unwrap().split(" > ").next().unwrap();
            let arguments: Vec<String> = words(example);
            let arguments: Vec<&str> = arguments.iter().map(String::as_str).collect();
            let output = run(folder.path(), &arguments);
            let code = output.status.code();
            assert!(code.is_some_and(|c| c <= 1), "{example}: {code:?} {}", stderr(&output));
            count += 1;
        }
    }
    assert!(count >= 12, "only {count} examples");
}

/// Words of a command line with double quotes.
fn words(line: &str) -> Vec<String> {
    let mut words = vec![String::new()];
    let mut quoted = false;
    for c in line.chars() {
        match c {
            '"' => quoted = !quoted,
            ' ' if !quoted => words.push(String::new()),
            c => words.last_mut().unwrap().push(c),
        }
    }
    words.retain(|word| !word.is_empty());
    words
}
