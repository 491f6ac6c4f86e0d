//! Rows of the data files, by the names of their columns.

use std::collections::BTreeMap;

/// One row.
pub struct Row(BTreeMap<String, String>);

impl Row {
    pub fn text(&self, column: &str) -> &str {
        self.0.get(column).unwrap_or_else(|| panic!("no column {column}"))
    }

    /// A number; not a number where the field is empty.
    pub fn number(&self, column: &str) -> f64 {
        self.maybe(column).unwrap_or(f64::NAN)
    }

    pub fn maybe(&self, column: &str) -> Option<f64> {
        self.text(column).parse().ok()
    }
}

/// All rows of a file whose source stands in lines with `#`.
pub fn table(text: &str) -> Vec<Row> {
    let mut reader = csv::ReaderBuilder::new().comment(Some(b'#')).from_reader(text.as_bytes());
    let names: Vec<String> =
        reader.headers().expect("a data file has a header").iter().map(str::to_owned).collect();
    reader
        .records()
        .map(|record| {
            let record = record.expect("a data file has fields for its header in every row");
            Row(names.iter().cloned().zip(record.iter().map(str::to_owned)).collect())
        })
        .collect()
}

/// Rows of one test after another, in the order of the file.
pub fn by_test(text: &str) -> Vec<(String, Vec<Row>)> {
    let mut tests: Vec<(String, Vec<Row>)> = Vec::new();
    for row in table(text) {
        let test = row.text("test").to_owned();
        match tests.iter_mut().find(|(name, _)| *name == test) {
            Some((_, rows)) => rows.push(row),
            None => tests.push((test, vec![row])),
        }
    }
    tests
}

/// A test of several of one configuration: `Name_3` is of `Name`.
pub fn configuration(test: &str) -> &str {
    test.rsplit_once('_').map_or(test, |(name, _)| name)
}
