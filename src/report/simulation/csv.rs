//! A run as a table (RFC 4180): one line a time, one column a series, as a spreadsheet plots it.

use std::fmt::Write as _;

use super::SimulationResult;
use crate::report::number::Number;

/// A column: its name, and its value at each time.
struct Column<'a> {
    name: String,
    values: Values<'a>,
}

enum Values<'a> {
    Every(&'a [Number]),
    Some(&'a [Option<Number>]),
}

impl Values<'_> {
    fn at(&self, line: usize) -> Option<Number> {
        match self {
            Self::Every(values) => values.get(line).copied(),
            Self::Some(values) => values.get(line).copied().flatten(),
        }
    }
}

/// The series as a table. Names are the paths of the JSON answer (`rooms.burn.pressure_pa`), made of
/// letters that need no quotes; what is null there is empty here. Events, balance and notes are in the
/// JSON answer only: a second table in one file would be none.
#[must_use]
pub fn csv(result: &SimulationResult) -> String {
    let columns = columns(result);
    let mut table = String::from("time_s");
    for column in &columns {
        table.push(',');
        table.push_str(&column.name);
    }
    table.push_str("\r\n");
    for (line, time_s) in result.time_s.iter().enumerate() {
        push(&mut table, time_s.get());
        for column in &columns {
            table.push(',');
            if let Some(value) = column.values.at(line) {
                push(&mut table, value.get());
            }
        }
        table.push_str("\r\n");
    }
    table
}

fn columns(result: &SimulationResult) -> Vec<Column<'_>> {
    let mut columns = Vec::new();
    for (key, room) in result.rooms.iter() {
        for (member, values) in room.columns() {
            columns.push(Column { name: format!("rooms.{key}.{member}"), values: Values::Every(values) });
        }
    }
    for (key, opening) in result.openings.iter() {
        for (member, values) in [
            ("inflow_kg_s", Values::Every(&opening.inflow_kg_s)),
            ("outflow_kg_s", Values::Every(&opening.outflow_kg_s)),
            ("neutral_plane_m", Values::Some(&opening.neutral_plane_m)),
            ("flame_heat_release_kw", Values::Every(&opening.flame_heat_release_kw)),
        ] {
            columns.push(Column { name: format!("openings.{key}.{member}"), values });
        }
    }
    columns
}

/// Digits without an exponent, which every spreadsheet reads; no minus before a zero.
fn push(table: &mut String, value: f64) {
    write!(table, "{}", value + 0.0).expect("writing to a string cannot fail");
}
