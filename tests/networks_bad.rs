//! Broken networks: each mistake is found where it stands, and none panics.

#![allow(clippy::unwrap_used, reason = "a test fails by panicking")]

use duskwater::diagnostic::Finding;
use duskwater::network::{Network, NetworkTexts};
use proptest::prelude::*;

const HEAD: &str = "title = \"water\"\nelements = [\"H\", \"O\"]\n";
const SPECIES: &str = "\
species,composition,delta_f_h_0K_kJ_mol,polarizability_A3,dipole_D,source,provenance,note
e-,,0,,,,,
H,,216.034,0.668,0,jones,seen,
OH,,37.262,1.08,1.655,jones,seen,
H2O,,-238.919,1.48,1.855,jones,seen,
H3O+,,605.74,,,jones,seen,
";
const REACTIONS: &str = "\
id,equation,law,alpha,beta,gamma,t_min,t_max,uncertainty,source,provenance,note
r1,H3O+ + e- -> OH + H + H,thermal,2.6e-7,-0.5,0,5,300,1.2,jones,seen,cold
r1,H3O+ + e- -> OH + 2 H,thermal,2.6e-7,-0.5,0,300,3000,1.2,jones,seen,\"hot, guessed\"
r2,OH + H -> H2O,thermal,1e-17,0,0,5,3000,2,jones,memory,
";
const SOURCES: &str = "key,citation,doi\njones,Jones 1990,\n";

fn good() -> NetworkTexts {
    NetworkTexts::new("")
        .with("network.toml", HEAD)
        .with("species.csv", SPECIES)
        .with("reactions.csv", REACTIONS)
        .with("sources.csv", SOURCES)
}

fn findings(texts: &NetworkTexts) -> Vec<Finding> {
    match Network::from_texts("water", texts) {
        Ok(loaded) => loaded.warnings,
        Err(findings) => findings,
    }
}

/// One mistake: file, what is replaced, by what, and `code place` of the finding.
type Case = (&'static str, &'static str, &'static str, &'static str);

const R: &str = "reactions.csv";
const S: &str = "species.csv";
const K: &str = "sources.csv";
const N: &str = "network.toml";

#[rustfmt::skip]
const CASES: &[Case] = &[
    // The text itself.
    (R, REACTIONS, "", "network-empty-file reactions.csv"),
    (R, "\"hot, guessed\"", "\"hot, guessed", "network-quote reactions.csv:3:72"),
    (R, "\"hot, guessed\"", "\"hot\" guessed", "network-quote reactions.csv:3:72"),
    (R, "\"hot, guessed\"", "hot, guessed", "network-fields reactions.csv:3:1"),
    (R, "5,3000,2,jones,memory,\n", "5,3000,2\n", "network-fields reactions.csv:4:1"),
    // Headers.
    (R, "id,equation,law", "id,equation,low", "network-header reactions.csv:1:13"),
    (R, "provenance,note\n", "provenance,law\n", "network-header reactions.csv:1:76"),
    (S, "species,comp", "name,comp", "network-header species.csv:1:1"),
    (K, "key,citation,doi", "key,doi", "network-header sources.csv:1:1"),
    // network.toml.
    (N, "title", "titel", "network-key network.toml:1:1"),
    (N, "\"water\"", "3", "network-key network.toml:1:9"),
    (N, "[\"H\", \"O\"]", "[\"H\", 1]", "network-key network.toml:2:18"),
    (N, "title = ", "title ", "network-toml network.toml:1:7"),
    (N, "[\"H\", \"O\"]", "[\"H\", \"O\", \"N\"]", "network-elements network.toml:2:23"),
    (N, "[\"H\", \"O\"]", "[\"O\"]", "network-elements network.toml:2:13"),
    (N, "title", "base = \"nowhere\"\ntitle", "network-base network.toml:1:8"),
    (N, "title", "without = [\"r1\"]\ntitle", "network-key network.toml:1:12"),
    // Species.
    (S, "\nOH,", "\nOx,", "species-unknown-element species.csv:4:1"),
    (S, "\nH2O,", "\nH2O+-,", "species-formula species.csv:5:4"),
    (S, "\nH2O,,", "\nH2O,H:2 O,", "species-formula species.csv:5:9"),
    (S, "\nH2O,", "\nOH,", "network-duplicate-species species.csv:5:1"),
    (S, "37.262", "x", "network-number species.csv:4:5"),
    (S, "1.855", "-1.855", "network-negative species.csv:5:20"),
    (S, "1.855,jones", "1.855,johns", "network-unknown-source species.csv:5:26"),
    // Equations.
    (R, "OH + H -> H2O", "OH + H = H2O", "network-equation reactions.csv:4:4"),
    (R, "OH + H -> H2O", "OH H -> H2O", "network-equation reactions.csv:4:4"),
    (R, "OH + H -> H2O", "OH + -> H2O", "network-equation reactions.csv:4:9"),
    (R, "OH + H -> H2O", "OH + H -> H20", "network-unknown-species reactions.csv:4:14"),
    (R, "OH + H -> H2O", "OH + H -> OH", "network-atoms reactions.csv:4:1"),
    (R, "OH + H -> H2O", "OH + H + e- -> H2O", "network-charge reactions.csv:4:1"),
    // Rows.
    (R, "r2,", ",", "network-id reactions.csv:4:1"),
    (R, "r2,", "r1,", "network-duplicate-id reactions.csv:4:1"),
    (R, "-0.5,0,300,", "-0.5,0,299,", "network-overlap reactions.csv:3:1"),
    (R, "H2O,thermal", "H2O,Thermal", "network-law reactions.csv:4:18"),
    (R, "H2O,thermal", "H2O,freeze_out", "network-law-not-built reactions.csv:4:18"),
    (R, "H2O,thermal", "H2O,starlight", "network-law-shape reactions.csv:4:1"),
    (R, "H2O,thermal", "H2O,capture", "network-law-shape reactions.csv:4:1"),
    (R, "1e-17", "1d-17", "network-number reactions.csv:4:26"),
    (R, "1e-17", "NaN", "network-number reactions.csv:4:26"),
    (R, "1e-17", "1e999", "network-number reactions.csv:4:26"),
    (R, "1e-17", "", "network-number reactions.csv:4:26"),
    (R, "1e-17", "-1e-17", "network-negative reactions.csv:4:26"),
    (R, "5,3000,2", "0,3000,2", "network-range reactions.csv:4:36"),
    (R, "5,3000,2", "5,5,2", "network-range reactions.csv:4:38"),
    (R, "5,3000,2", "5,3000,0.5", "network-uncertainty reactions.csv:4:43"),
    (R, "3000,2,jones", "3000,2,jons", "network-unknown-source reactions.csv:4:45"),
    // Sources.
    (K, "jones,Jones 1990", ",Jones 1990", "network-source-row sources.csv:2:1"),
    (K, "1990,\n", "1990,\njones,Jones 1991,\n", "network-duplicate-source sources.csv:3:1"),
];

#[test]
fn a_good_network_has_no_findings() {
    assert_eq!(findings(&good()), []);
}

#[test]
fn every_mistake_is_found_where_it_stands() {
    let mut missed = Vec::new();
    for (file, old, new, expected) in CASES {
        let texts = good();
        let text = std::str::from_utf8(texts.get(file).unwrap()).unwrap();
        assert!(text.contains(old), "{old:?} is not in {file}");
        let broken = text.replacen(old, new, 1);
        let found = findings(&texts.clone().with(file, broken));
        let list: Vec<String> = found.iter().map(|f| format!("{} {}", f.code, f.place)).collect();
        if !list.contains(&(*expected).to_string()) {
            missed.push(format!("{new:?}: {expected} not in {list:?}"));
        }
        for finding in &found {
            assert!(!finding.remedy.is_empty() && !finding.message.is_empty(), "{finding}");
        }
    }
    assert!(missed.is_empty(), "{missed:#?}");
}

#[test]
fn a_missing_file_and_broken_text_are_reported() {
    let no_sources =
        NetworkTexts::new("net").with("network.toml", HEAD).with("species.csv", SPECIES);
    let codes: Vec<String> =
        findings(&no_sources).iter().map(|f| format!("{} {}", f.code, f.place)).collect();
    assert!(codes.contains(&"network-missing-file net/sources.csv".to_string()), "{codes:?}");
    assert!(codes.contains(&"network-missing-file net/reactions.csv".to_string()), "{codes:?}");
    let latin = [REACTIONS.as_bytes(), b"r3,\xe9"].concat();
    let found = findings(&good().with(R, latin));
    assert!(
        found
            .iter()
            .any(|f| f.code == "network-encoding" && f.place.to_string() == "reactions.csv:5:4"),
        "{found:?}"
    );
}

#[test]
fn all_mistakes_of_all_files_are_reported_at_once() {
    let texts = good()
        .with(N, HEAD.replace("title", "titel"))
        .with(S, SPECIES.replace("37.262", "x"))
        .with(
            R,
            REACTIONS
                .replace("1e-17", "x")
                .replace("thermal,2.6e-7,-0.5,0,5", "magic,2.6e-7,-0.5,0,5"),
        )
        .with(K, SOURCES.replace("jones", "johns"));
    let mut codes: Vec<&str> = findings(&texts).iter().map(|f| f.code).collect();
    codes.sort_unstable();
    codes.dedup();
    assert_eq!(codes, ["network-key", "network-law", "network-number", "network-unknown-source"]);
}

#[test]
fn a_byte_order_mark_crlf_and_column_order_do_not_matter() {
    let plain = Network::from_texts("water", &good()).unwrap().network;
    let windows = good()
        .with(R, format!("\u{feff}{}", REACTIONS.replace('\n', "\r\n")))
        .with(S, SPECIES.replace('\n', "\r\n"))
        .with(K, "doi,citation,key\n,Jones 1990,jones");
    let same = Network::from_texts("water", &windows).unwrap().network;
    assert_eq!(plain, same);
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(512))]

    #[test]
    fn no_damage_makes_the_loader_panic(
        file in 0usize..4,
        cuts in proptest::collection::vec((any::<u16>(), any::<u8>(), 0u8..3), 1..8),
    ) {
        let name = [N, S, R, K][file];
        let mut bytes = good().get(name).unwrap().to_vec();
        for (at, byte, kind) in cuts {
            let at = usize::from(at) % bytes.len().max(1);
            match kind {
                0 if at < bytes.len() => bytes[at] = byte,
                1 if at < bytes.len() => {
                    bytes.remove(at);
                }
                _ => bytes.insert(at, byte),
            }
        }
        let _ = findings(&good().with(name, bytes));
    }
}
