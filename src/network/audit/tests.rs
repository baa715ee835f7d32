//! The audit finds planted faults, and is silent about a clean network.

use super::*;
use crate::network::NetworkTexts;

const SPECIES: &str = "\
species,composition,delta_f_h_0K_kJ_mol,polarizability_A3,dipole_D,source
e-,,0,,,
H,,216.034,0.668,0,atct
H+,,1528.084,,,atct
H-,,143.264,,,atct
H2,,0,0.802,0,atct
H3+,,1110.304,,,atct
O,,246.844,0.785,0,atct
O+,,1560.786,,,atct
OH,,37.262,1.08,,atct
OH+,,1293.201,,,atct
H2O,,-238.919,1.48,1.855,atct
";

/// Rows in one line each: equation, law, three numbers and a range.
fn audited(rows: &[&str]) -> Vec<Finding> {
    let mut text =
        "id,equation,law,alpha,beta,gamma,t_min,t_max,uncertainty,source,provenance\n".to_string();
    for (at, row) in rows.iter().enumerate() {
        text.push_str(&format!("r{at},{row},2,atct,seen\n"));
    }
    let texts = NetworkTexts::new("")
        .with("network.toml", "title = \"test\"")
        .with("species.csv", SPECIES)
        .with("reactions.csv", text)
        .with("sources.csv", "key,citation\natct,Tables\n");
    let network = Network::from_texts("test", &texts).expect("a network that loads").network;
    let findings = audit(&network, &AuditOptions::default());
    // Species without reactions are not what these tests are about.
    findings.into_iter().filter(|f| !f.code.starts_with("audit-never")).collect()
}

#[test]
fn sound_rows_raise_nothing() {
    let findings = audited(&[
        "O+ + H2 -> OH+ + H,thermal,1.6e-9,0,0,5,3000",
        "H+ + e- -> H,thermal,3.5e-12,-0.7,0,5,3000",
    ]);
    assert_eq!(findings, []);
}

#[test]
fn each_planted_fault_is_found_at_its_row() {
    let cases: &[(&[&str], &str, u32)] = &[
        (&["O + H2 -> OH + H,thermal,3.4e-13,2.7,3150,300,3000"], "audit-range", 2),
        (
            &[
                "OH + H2 -> H2O + H,thermal,1e-12,0,2000,5,300",
                "OH + H2 -> H2O + H,thermal,3e-12,0,2000,300,3000",
            ],
            "audit-seam",
            3,
        ),
        (&["O + OH -> H + O + O,thermal,1e-8,0,0,5,3000"], "audit-too-fast", 2),
        (&["H+ + e- -> H,thermal,1e-4,0,0,5,3000"], "audit-too-fast", 2),
        (&["O+ + H2 -> OH+ + H,thermal,3e-9,0,0,5,3000"], "audit-beyond-capture", 2),
        (&["O + H2 -> OH + H,thermal,1e-12,0,0,5,3000"], "audit-uphill", 2),
        (&["O + H2 -> OH + H,thermal,1e-12,0,100,5,3000"], "audit-uphill", 2),
        (&["O+ + OH -> OH+ + O,capture,1,0,0,5,3000"], "audit-no-dipole", 0),
        (&["O+ + H2 -> OH+ + H,thermal,1.5e-9,0,500,5,3000"], "audit-ion-barrier", 2),
        (&["OH + H2 -> H2O + H,thermal,1e-12,0,2000,5,3000"], "audit-neutral-barrier", 0),
        (
            &[
                "OH + H2 -> H2O + H,thermal,2e-12,0,2100,5,3000",
                "H2O + H -> OH + H2,thermal,1e-12,0,9000,5,3000",
            ],
            "audit-detailed-balance",
            2,
        ),
        (&["H + O -> H + O,thermal,1e-12,0,0,5,3000"], "audit-no-change", 2),
        (&["O+ + e- -> O,thermal,1e-9,0,-60,100,3000"], "audit-continuation", 0),
    ];
    for (rows, code, line) in cases {
        let findings = audited(rows);
        let found: Vec<(&str, u32)> = findings.iter().map(|f| (f.code, f.place.line)).collect();
        assert!(found.contains(&(*code, *line)), "{rows:?}: {code} {line} not in {found:?}");
    }
}

#[test]
fn unmade_and_undestroyed_species_are_named() {
    let texts = NetworkTexts::new("f")
        .with("network.toml", "title = \"test\"")
        .with("species.csv", "species,composition\nA,Q:1\nB,Q:1\nC,Q:1\n")
        .with(
            "reactions.csv",
            "id,equation,law,alpha,beta,gamma,t_min,t_max,uncertainty,source\n\
             r1,A -> B,cosmic_ray,1,0,0,5,3000,2,\n",
        )
        .with("sources.csv", "key,citation\nk,K\n");
    let network = Network::from_texts("test", &texts).unwrap().network;
    let findings = audit(&network, &AuditOptions::default());
    let found: Vec<String> = findings.iter().map(|f| f.to_string()).collect();
    for expected in [
        "warning[audit-never-made] f/species.csv: species that are made by nothing at 10 K: A",
        "warning[audit-never-destroyed] f/species.csv: species that are destroyed by nothing at 10 K: B",
        "warning[audit-never-used] f/species.csv: species that take part in no reaction: C",
        "warning[audit-no-source] f/reactions.csv: 1 of 1 rows name no source",
        "note[audit-unused-source] f/sources.csv: 1 sources are cited by nothing: k",
        "note[audit-made-up-element] f/species.csv: elements without a known weight: Q",
    ] {
        assert!(found.iter().any(|text| text.starts_with(expected)), "{expected}: {found:#?}");
    }
    let each = audit(&network, &AuditOptions { every_row: true, ..AuditOptions::default() });
    assert!(each.iter().any(|f| f.code == "audit-no-source" && f.place.line == 2));
}
