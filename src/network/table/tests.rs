//! Cells and their places, against an independent reader.

use proptest::prelude::*;

use super::*;

type Plain = (String, u32, u32);

fn cells(text: &str) -> (Vec<Vec<Plain>>, usize) {
    let mut findings = Vec::new();
    let records = split("t", text, &mut findings);
    let plain = |record: Vec<Cell>| {
        record.into_iter().map(|cell| (cell.text, cell.line, cell.column)).collect()
    };
    (records.into_iter().map(plain).collect(), findings.len())
}

#[test]
fn every_cell_knows_its_line_and_column() {
    let text = "a,b\r\n\n \u{b5}m , \"x, \"\"y\"\"\nz\" ,2\n3";
    let (records, findings) = cells(text);
    assert_eq!(findings, 0);
    let owned = |text: &str, line, column| (text.to_string(), line, column);
    assert_eq!(records[0], [owned("a", 1, 1), owned("b", 1, 3)]);
    assert_eq!(records[1], [owned("\u{b5}m", 3, 2), owned("x, \"y\"\nz", 3, 8), owned("2", 4, 5)]);
    assert_eq!(records[2], [owned("3", 5, 1)]);
}

#[test]
fn broken_quotes_are_reported() {
    assert_eq!(cells("a,\"b").1, 1);
    assert_eq!(cells("\"a\" b,c\n").1, 1);
}

proptest! {
    #[test]
    fn well_formed_tables_are_read_as_the_csv_crate_reads_them(
        rows in proptest::collection::vec(
            proptest::collection::vec("[a-c,\"\n\u{e9}]{0,6}", 3..4), 1..5,
        ),
    ) {
        let mut writer = csv::Writer::from_writer(Vec::new());
        for row in &rows {
            writer.write_record(row).unwrap();
        }
        let text = String::from_utf8(writer.into_inner().unwrap()).unwrap();
        let (records, findings) = cells(&text);
        prop_assert_eq!(findings, 0);
        let got: Vec<Vec<String>> = records
            .into_iter()
            .map(|record| record.into_iter().map(|(text, _, _)| text).collect())
            .collect();
        let expected: Vec<Vec<String>> = rows
            .iter()
            .map(|row| row.iter().map(|cell| cell.trim().to_string()).collect())
            .collect();
        prop_assert_eq!(got, expected);
    }
}
