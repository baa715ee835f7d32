//! What a loaded network means: pieces over temperature, laws, parts, bases.

#![allow(clippy::unwrap_used, reason = "a test fails by panicking")]

use duskwater::network::{Extrapolate, Network, NetworkTexts, Reaction};
use duskwater::rates::Conditions;

const SPECIES: &str = "\
species,composition,polarizability_A3,dipole_D
e-,,,
grain,,,
grain-,,,
H,,0.668,0
H+,,,
H2,,0.802,0
H3+,,,
CO,,1.95,0.11
HCO+,,,
A,Q:1,,
B+,Q:1,,
";
const REACTIONS: &str = "\
id,equation,law,alpha,beta,gamma,t_min,t_max,uncertainty,source
cold,H3+ + CO -> HCO+ + H2,capture,0.9,0,0,5,100,1.2,
warm,CO + H3+ -> H2 + HCO+,thermal,2e-9,0,0,300,1000,1.2,
hot,H3+ + CO -> HCO+ + H2,thermal,1e-9,0,0,1000,3000,1.2,
dust,H + H -> H2,dust_h2,3e-17,0.5,0,5,3000,1.3,
grain,H+ + grain- -> H + grain,dust_recombination,1,0,0,5,3000,2,
ray,A -> B+ + e-,cosmic_ray,0.5,0,0,5,3000,2,
light,A -> B+ + e-,starlight,1e-10,0,2,5,3000,2,
light2,CO + H -> CO + H,thermal,1e-10,-1,100,5,3000,2,
";

fn texts() -> NetworkTexts {
    NetworkTexts::new("t")
        .with("network.toml", "title = \"test\"")
        .with("species.csv", SPECIES)
        .with("reactions.csv", REACTIONS)
        .with("sources.csv", "key,citation\n")
}

fn network() -> Network {
    Network::from_texts("test", &texts()).expect("a good network").network
}

fn find<'a>(network: &'a Network, id: &str) -> &'a Reaction {
    &network.reactions[network.reaction_index(id).expect("a reaction")]
}

#[test]
fn rows_of_one_equation_are_one_reaction_whatever_the_order_of_its_species() {
    let network = network();
    assert_eq!(network.reactions.len(), 6);
    let reaction = find(&network, "warm");
    assert_eq!((reaction.id.as_str(), reaction.rows.len()), ("cold", 3));
    assert_eq!(reaction.equation, "H3+ + CO -> HCO+ + H2");
    // The same equation under two laws that do not share an axis: two reactions.
    assert_ne!(network.reaction_index("ray"), network.reaction_index("light"));
}

#[test]
fn inside_a_row_it_holds_and_outside_the_nearest_edge_is_held() {
    let network = network();
    let reaction = find(&network, "cold");
    let cases = [
        (2.0, "cold", 5.0),
        (5.0, "cold", 5.0),
        (50.0, "cold", 50.0),
        (100.0, "cold", 100.0),
        (200.0, "cold", 100.0),
        (201.0, "warm", 300.0),
        (300.0, "warm", 300.0),
        (999.0, "warm", 999.0),
        (1000.0, "hot", 1000.0),
        (5000.0, "hot", 3000.0),
        (f64::NAN, "cold", 5.0),
    ];
    for (temperature, id, used) in cases {
        let (row, held) = reaction.active_row(temperature);
        assert_eq!(row.id, id, "{temperature}");
        assert!((held - used).abs() < 1e-12, "{temperature}: {held}");
    }
}

#[test]
fn extrapolation_continues_the_nearest_formula_only_when_asked() {
    let network = network();
    let reaction = find(&network, "light2");
    let cases = [
        (Extrapolate::Hold, 1e-10 * (300.0 / 3000.0) * (-100.0_f64 / 3000.0).exp()),
        (Extrapolate::Formula, 1e-10 * (300.0 / 6000.0) * (-100.0_f64 / 6000.0).exp()),
    ];
    for (extrapolate, expected) in cases {
        let conditions = Conditions { temperature: 6000.0, ..Conditions::default() };
        let got = network.coefficient(reaction, &conditions, extrapolate).unwrap();
        assert!((got / expected - 1.0).abs() < 1e-12, "{extrapolate:?}: {got:e}");
    }
}

#[test]
fn coefficients_say_what_they_multiply_and_in_which_unit() {
    let network = network();
    let conditions = Conditions { visual_extinction: 1.0, ..Conditions::default() };
    let values = network.coefficients(&conditions, Extrapolate::Hold).unwrap();
    assert_eq!(values.len(), network.reactions.len());
    let cases = [
        ("cold", "H3+ CO", "cm3 s-1"),
        ("dust", "H", "s-1"),
        ("grain", "H+ grain-", "cm3 s-1"),
        ("ray", "A", "s-1"),
    ];
    for (id, names, unit) in cases {
        let reaction = find(&network, id);
        let multiplied: Vec<&str> =
            reaction.depends_on.iter().map(|i| network.species[*i].name.as_str()).collect();
        assert_eq!(multiplied.join(" "), names, "{id}");
        assert_eq!(network.coefficient_unit(reaction), unit, "{id}");
    }
    // alpha zeta and alpha chi exp(-gamma A_V), by hand.
    let expected = [("ray", 0.5 * 1.3e-17), ("light", 1e-10 * (-2.0_f64).exp())];
    for (id, expected) in expected {
        let got = values[network.reaction_index(id).unwrap()];
        assert!((got / expected - 1.0).abs() < 1e-12, "{id}: {got:e}");
    }
}

#[test]
fn elements_grains_and_charge_are_conserved_by_every_reaction() {
    let network = network();
    let sums = network.conserved();
    let names: Vec<&str> = sums.iter().map(|sum| sum.name.as_str()).collect();
    assert_eq!(names, ["C", "H", "O", "Q", "grain", "charge"]);
    for reaction in &network.reactions {
        for sum in &sums {
            let side = |list: &[usize]| list.iter().map(|i| sum.weights[*i]).sum::<f64>();
            let change = side(&reaction.products) - side(&reaction.reactants);
            assert!(change.abs() < 1e-12, "{} {}", reaction.equation, sum.name);
        }
    }
}

#[test]
fn a_network_survives_writing_and_reading() {
    let network = network();
    let again = Network::from_texts("test", &network.to_texts("t")).unwrap().network;
    assert_eq!(again.species, network.species);
    assert_eq!(again.sources, network.sources);
    let conditions = Conditions::default();
    assert_eq!(
        again.coefficients(&conditions, Extrapolate::Hold).unwrap(),
        network.coefficients(&conditions, Extrapolate::Hold).unwrap()
    );
}

#[test]
fn a_part_keeps_only_what_it_can() {
    let network = network();
    let keep: Vec<usize> =
        ["e-", "A", "B+"].iter().map(|name| network.species_index(name).unwrap()).collect();
    let all: Vec<usize> = (0..network.reactions.len() + 3).collect();
    let part = network.subset(&keep, &all);
    let ids: Vec<&str> = part.reactions.iter().map(|reaction| reaction.id.as_str()).collect();
    assert_eq!(ids, ["ray", "light"]);
    assert_eq!(part.species.len(), 3);
    assert_eq!(part.conserved().len(), 2);
}

#[test]
fn a_network_may_build_on_another() {
    let head = "title = \"variant\"\nbase = \"other\"\n";
    let more = "id,equation,law,alpha,beta,gamma,t_min,t_max,uncertainty,source\n\
                new,H+ + e- -> H,thermal,1e-12,-0.7,0,5,3000,1.5,\n";
    let build = |head: String, rows: &str| {
        let variant = NetworkTexts::new("v")
            .with("network.toml", head)
            .with("reactions.csv", rows)
            .with_resolver(|name| (name == "other").then(texts));
        Network::from_texts("variant", &variant)
    };
    let cases = [
        ("", 7, 11),
        ("without = [\"light\", \"warm\"]", 5, 11),
        ("reactions = [\"ray\"]", 2, 11),
        ("species = [\"H\", \"H+\", \"H2\", \"e-\"]", 2, 4),
    ];
    for (line, reactions, species) in cases {
        let network = build(format!("{head}{line}"), more).unwrap().network;
        assert_eq!(network.reactions.len(), reactions, "{line}");
        assert_eq!(network.species.len(), species, "{line}");
        assert_eq!(network.title, "variant");
    }
    let errors =
        build(format!("{head}without = [\"lihgt\"]\nspecies = [\"HH\"]"), more).unwrap_err();
    let codes: Vec<&str> = errors.iter().map(|f| f.code).collect();
    assert!(codes.contains(&"network-unknown-id"), "{codes:?}");
    assert!(codes.contains(&"network-unknown-species"), "{codes:?}");
    // A row of the base may not be given again without leaving it out.
    let again = more.replace("H+ + e- -> H,thermal", "H + H -> H2,dust_h2");
    assert!(
        build(head.to_string(), &again).unwrap_err().iter().any(|f| f.code == "network-overlap")
    );
}

#[test]
fn networks_that_build_on_themselves_are_refused() {
    let loop_texts =
        || NetworkTexts::new("v").with("network.toml", "title = \"x\"\nbase = \"x\"\n");
    let texts = loop_texts().with_resolver(move |_| Some(loop_texts()));
    let errors = Network::from_texts("x", &texts).unwrap_err();
    assert!(errors.iter().any(|finding| finding.code == "network-base"), "{errors:?}");
}

#[test]
fn the_two_ways_of_recombining_on_dust_do_not_mix() {
    let both = format!("{REACTIONS}eff,H+ + e- -> H,dust_recombination,1,0,0,10,1000,2,\n");
    let errors = Network::from_texts("test", &texts().with("reactions.csv", both)).unwrap_err();
    let codes: Vec<&str> = errors.iter().map(|finding| finding.code).collect();
    assert_eq!(codes, ["network-mixed-dust"]);
}

#[test]
fn a_shipped_network_that_does_not_exist_is_an_error_with_advice() {
    let errors = duskwater::network::shipped::load("nowhere").unwrap_err();
    assert_eq!(errors.len(), 1);
    assert!(errors[0].message.contains("nowhere") && !errors[0].remedy.is_empty());
    for name in duskwater::network::shipped::names() {
        assert!(duskwater::network::shipped::texts(name).is_some(), "{name}");
    }
}
