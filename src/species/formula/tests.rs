//! What names say, and which names say nothing.

use proptest::prelude::*;

use super::*;

fn written(formula: &Formula) -> String {
    let mut text = String::new();
    for (element, count) in &formula.atoms {
        text.push_str(element);
        if *count > 1 {
            text.push_str(&count.to_string());
        }
    }
    let sign = if formula.charge < 0 { "-" } else { "+" };
    text.push_str(&sign.repeat(formula.charge.unsigned_abs() as usize));
    if formula.phase == Phase::Ice {
        text.push_str("(ice)");
    }
    text
}

#[test]
fn names_of_the_trade_are_read() {
    let cases = [
        ("H3O+", "H3O+", 1, Phase::Gas),
        ("C2H2+", "C2H2+", 1, Phase::Gas),
        ("CH3OH2+", "CH5O+", 1, Phase::Gas),
        ("e-", "-", -1, Phase::Gas),
        ("O2--", "O2--", -2, Phase::Gas),
        ("H2O(ice)", "H2O(ice)", 0, Phase::Ice),
        ("grain", "grain", 0, Phase::Dust),
        ("grain-", "grain-", -1, Phase::Dust),
        ("SiOH+", "HOSi+", 1, Phase::Gas),
        ("HeH+", "HHe+", 1, Phase::Gas),
        ("Co", "Co", 0, Phase::Gas),
    ];
    for (name, sorted, charge, phase) in cases {
        let formula = Formula::parse(name).unwrap();
        assert_eq!(written(&formula), sorted, "{name}");
        assert_eq!((formula.charge, formula.phase), (charge, phase), "{name}");
    }
}

#[test]
fn names_that_say_nothing_are_refused_where_they_go_wrong() {
    use FormulaErrorKind::*;
    let cases = [
        ("", Grammar, 0),
        ("+", Grammar, 0),
        ("2H", Grammar, 0),
        ("h2o", Grammar, 0),
        ("H0", Grammar, 1),
        ("H02", Grammar, 1),
        ("H99999999999", Grammar, 1),
        ("H2O+-", Grammar, 3),
        ("H2 O", Grammar, 2),
        ("H2O(gas)", Grammar, 3),
        ("grain(ice)", Grammar, 5),
        ("HXx", UnknownElement, 1),
        ("A", UnknownElement, 0),
    ];
    for (name, kind, offset) in cases {
        let error = Formula::parse(name).unwrap_err();
        assert_eq!((error.kind, error.offset), (kind, offset), "{name}: {error}");
    }
}

#[test]
fn a_composition_speaks_for_a_name_that_does_not() {
    let formula = Formula::with_composition("A++", "Q:2 H:1").unwrap();
    assert_eq!(formula.atoms, [("H".to_string(), 1), ("Q".to_string(), 2)]);
    assert_eq!((formula.charge, formula.mass_u()), (2, None));
    for wrong in ["", "Q", "Q:0", "Q:-1", "Q:1.5", "Q:1 Q:2", "1:1", "Q:x", ":1"] {
        assert!(Formula::with_composition("A", wrong).is_err(), "{wrong:?}");
    }
}

proptest! {
    #[test]
    fn any_formula_survives_writing_and_reading(
        picks in proptest::collection::vec((0usize..30, 1u32..40), 1..6),
        charge in -3i32..4,
        ice in any::<bool>(),
    ) {
        let mut atoms: Vec<(String, u32)> = Vec::new();
        for (index, count) in picks {
            let element = elements::WEIGHTS[index].0.to_string();
            if !atoms.iter().any(|(known, _)| *known == element) {
                atoms.push((element, count));
            }
        }
        atoms.sort();
        let phase = if ice { Phase::Ice } else { Phase::Gas };
        let formula = Formula { atoms, charge, phase };
        prop_assert_eq!(Formula::parse(&written(&formula)).unwrap(), formula);
    }

    #[test]
    fn no_text_makes_the_reader_panic(name in ".{0,20}", composition in ".{0,20}") {
        let _ = Formula::parse(&name);
        let _ = Formula::with_composition(&name, &composition);
    }
}
